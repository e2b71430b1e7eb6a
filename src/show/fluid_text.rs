//! A fluid, and the list of fluids, as text.

use super::numbers::{percent, si, temperature};
use super::sheet::{Sheet, Style, sentence};
use crate::physical::fluids::CATALOGUE;
use crate::physical::quantity::DisplayUnit;
use crate::question::FluidReport;

/// Digits of a fluid's properties: more than any of them is known to, so that they can be compared with tables.
const DIGITS: usize = 5;

/// Width of the column of names in the list of fluids.
const NAME_COLUMN: usize = 24;

/// Properties of one fluid.
pub fn fluid_text(report: &FluidReport, style: Style) -> String {
    let mut sheet = Sheet::new(style);
    sheet.title(&format!("{} at {}", report.name, temperature(report.temperature_c)));
    sheet.gap();
    sheet.item("what", &report.description);
    sheet.item(
        "viscosity",
        &format!(
            "{} ± {} ({})",
            si(report.viscosity_pa_s, DisplayUnit::VISCOSITY, DIGITS),
            percent(report.relative_uncertainty),
            report.grounds,
        ),
    );
    if let Some(change) = report.viscosity_change_per_k {
        sheet.item("", &format!("changes by {} a kelvin", percent(change)));
    }
    sheet.item(
        "density",
        &format!(
            "{} ± {}",
            si(report.density_kg_m3, DisplayUnit::DENSITY, DIGITS),
            percent(report.density_relative_uncertainty)
        ),
    );
    sheet.item("kinematic", &si(report.kinematic_viscosity_m2_per_s, DisplayUnit::KINEMATIC_VISCOSITY, DIGITS));
    if let Some(path) = report.mean_free_path_m {
        sheet.item("free path", &si(path, DisplayUnit::LENGTH, DIGITS));
    }
    if let Some([low, high]) = report.valid_from_to_c {
        sheet.item("described", &format!("from {low} to {high} degC"));
    }
    sheet.item("source", &report.source);
    for caution in &report.cautions {
        sheet.item("beware", &sentence(caution));
    }
    sheet.finish()
}

/// The fluids known by name, one a line.
pub fn fluid_catalogue_text(style: Style) -> String {
    let mut sheet = Sheet::new(style);
    sheet.title("Fluids known by name");
    sheet.gap();
    for entry in CATALOGUE {
        sheet.line("", &format!("{:<NAME_COLUMN$}{}", entry.example, entry.description));
    }
    sheet.gap();
    sheet.item("", "Any other by numbers: viscosity=1.2mPa.s,density=1.02g/mL");
    sheet.finish()
}
