//! A material, and the list of materials, as text.

use super::sheet::{Sheet, Style, sentence};
use crate::physical::quantity::DisplayUnit;
use crate::question::{MaterialCatalogue, MaterialReport};

/// Digits of a density; no product is known to more without being measured.
const DIGITS: usize = 4;

/// Digits of its spread.
const SPREAD_DIGITS: i32 = 1;

/// Decimals at most.
const MOST_DECIMALS: i32 = 4;

/// Widths of the columns of the list.
const NAME_COLUMN: usize = 18;
const DENSITY_COLUMN: usize = 22;

/// One material.
pub fn material_text(report: &MaterialReport, style: Style) -> String {
    let mut sheet = Sheet::new(style);
    sheet.title(&report.name);
    sheet.gap();
    sheet.item("density", &density(report));
    sheet.item("", "the spread is that between samples; the density of the very sample is better");
    if let Some(note) = &report.note {
        sheet.item("note", &sentence(note));
    }
    if !report.aliases.is_empty() {
        sheet.item("also", &report.aliases.join(", "));
    }
    sheet.item("source", &report.source);
    for caution in &report.cautions {
        sheet.item("beware", &sentence(caution));
    }
    sheet.finish()
}

/// All materials, one a line.
pub fn material_catalogue_text(catalogue: &MaterialCatalogue, style: Style) -> String {
    let mut sheet = Sheet::new(style);
    sheet.title("Materials known by name, with their usual density");
    sheet.gap();
    for report in &catalogue.materials {
        let aliases = report.aliases.join(", ");
        let (name, density) = (&report.name, density(report));
        sheet.line("", &format!("{name:<NAME_COLUMN$}{density:<DENSITY_COLUMN$}{aliases}"));
    }
    sheet.gap();
    sheet.item("", "`slowmote material NAME` tells the source; any other by --body-density 1.05g/mL");
    sheet.finish()
}

/// Both with the decimals of the spread.
fn density(report: &MaterialReport) -> String {
    let unit = DisplayUnit::DENSITY.choose(report.density_kg_m3, DIGITS);
    let spread = unit.value(report.spread_kg_m3);
    let decimals = (SPREAD_DIGITS - 1 - spread.log10().floor() as i32).clamp(0, MOST_DECIMALS) as usize;
    format!("{:.decimals$} ± {spread:.decimals$} {}", unit.value(report.density_kg_m3), unit.symbol())
}
