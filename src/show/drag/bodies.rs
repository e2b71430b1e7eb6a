//! The body and the fluid as they were understood.

use super::text::Assumed;
use crate::physical::quantity::{DisplayUnit, format_number};
use crate::question::{BodyAnswer, DragAnswer};
use crate::show::numbers::{GLUE, percent, si};
use crate::show::sheet::{Sheet, sentence};

/// Digits of sizes said back.
pub(super) const SIZE_DIGITS: usize = 3;

/// Units of area are a million apart: the larger one is taken from a fiftieth of it on.
const AREA_UNIT_LEAD: f64 = 50.0;

/// Digits of temperature, viscosity and density.
const FLUID_DIGITS: usize = 4;

/// Size, volume, surface, and how it was read.
pub(super) fn body_lines(sheet: &mut Sheet, body: &BodyAnswer, assumed: &Assumed) {
    let length = DisplayUnit::LENGTH.choose(body.size_m.into_iter().fold(0.0, f64::max), SIZE_DIGITS);
    let edges = |unit: &dyn Fn(f64) -> f64| body.size_m.map(|x| format_number(unit(x), SIZE_DIGITS)).join(" x ");
    let mut size = format!("{} {} along x, y, z", edges(&|x| length.value(x)), length.symbol());
    if let Some(file) = assumed.file_unit.as_ref().filter(|file| file.symbol != length.symbol()) {
        size += &format!(" ({} in the file's {})", edges(&|x| x / file.metres), file.symbol);
    }
    sheet.item("size", &size);
    let equal_sphere = (6.0 * body.volume_m3 / std::f64::consts::PI).cbrt();
    // Chosen a little early, so that 0.88 mm2 is not 880000 um2.
    let area = DisplayUnit::AREA.choose(AREA_UNIT_LEAD * body.area_m2, SIZE_DIGITS);
    sheet.item(
        "",
        &format!(
            "volume {}, that of a sphere {} across; surface {}{GLUE}{}",
            si(body.volume_m3, DisplayUnit::VOLUME, SIZE_DIGITS),
            si(equal_sphere, DisplayUnit::LENGTH, SIZE_DIGITS),
            area.number(body.area_m2, SIZE_DIGITS),
            area.symbol(),
        ),
    );
    for note in &body.notes {
        sheet.item("", &sentence(note));
    }
}

/// Viscosity and density, what was taken for granted, and the walls.
pub(super) fn fluid_lines(sheet: &mut Sheet, answer: &DragAnswer, assumed: &Assumed) {
    let mut fluid = format!(
        "{} ± {}, {}",
        si(answer.fluid.viscosity_pa_s, DisplayUnit::VISCOSITY, FLUID_DIGITS),
        percent(answer.fluid.relative_uncertainty),
        si(answer.fluid.density_kg_m3, DisplayUnit::DENSITY, FLUID_DIGITS),
    );
    fluid += assumed.fluid_words();
    sheet.item("fluid", &fluid);
    sheet.item("around it", "open fluid, no walls");
}
