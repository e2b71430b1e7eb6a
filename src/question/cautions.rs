//! What a careful user would want to be reminded of, from body and fluid.

use crate::physical::{Fluid, Material};

/// Red cells are told by the shape's name.
const RED_CELL: &str = "redcell";

/// Materials that live: soft, and different from day to day; the first of them from blood.
const LIVING: [&str; 6] = ["red-cell", "white-cell", "platelet", "mammalian-cell", "yeast", "bacterium"];
const OF_BLOOD: usize = 3;

/// From this temperature a liquid burns skin in less than a minute, degC. Common practice, no source.
const SCALDING_C: f64 = 50.0;

/// From this temperature vapour and splashes are a danger by themselves, degC. A choice of this program.
const VERY_HOT_C: f64 = 90.0;

/// Fluids below this density are gases, kg/m3.
const DENSEST_GAS_KG_M3: f64 = 100.0;

/// Bodies with a smaller half length, m, feel the molecules of a liquid one by one. Common practice, no source.
const FEWEST_MOLECULES_M: f64 = 5e-9;

/// A half length, m, beyond which a unit was mistaken more often than not. A choice of this program.
const LARGEST_USUAL_M: f64 = 0.1;

const BLOOD: &str = "Blood differs from donor to donor. Nothing here replaces tests on the device or the sample: for \
                     medical use follow the local rules and the judgement of licensed practitioners.";

const BIOLOGICAL: &str = "Handle cells and blood products by your laboratory's rules of biological safety.";

/// What is said of cells in general.
pub(super) const SOFT: &str =
    "Cells are soft and differ from each other: a rigid body of one size stands for them here.";

/// The cautions for a body of this shape, if it is a named one, and half length (m) in this fluid, the fluid's own first.
pub(super) fn body_cautions(shape: Option<&str>, half_length_m: f64, fluid: &Fluid) -> Vec<String> {
    let mut cautions = fluid_cautions(fluid);
    if half_length_m < FEWEST_MOLECULES_M {
        cautions.push(
            "So small a body feels the molecules of the fluid one by one; drag with a sticking, continuous fluid is \
             only its order of size."
                .to_owned(),
        );
    }
    if half_length_m > LARGEST_USUAL_M {
        cautions.push("This is a large body for creeping flow: is its unit right?".to_owned());
    }
    let red_cell = shape == Some(RED_CELL);
    if red_cell {
        cautions.push(
            "A red cell is soft, and its shape follows the flow and the medium: the answer is that of a rigid body of \
             this shape at rest."
                .to_owned(),
        );
    }
    for (applies, text) in [(red_cell, BLOOD), (red_cell, BIOLOGICAL)] {
        if applies && !cautions.iter().any(|known| known == text) {
            cautions.push(text.to_owned());
        }
    }
    cautions
}

/// The cautions for a fluid, with or without a body: its own, its temperature, what it is.
pub(super) fn fluid_cautions(fluid: &Fluid) -> Vec<String> {
    let mut cautions = fluid.cautions().to_vec();
    let temperature_c = fluid.temperature_c();
    let is_liquid = fluid.density_kg_m3() > DENSEST_GAS_KG_M3;
    if temperature_c >= SCALDING_C && is_liquid {
        let vapour = if temperature_c >= VERY_HOT_C { "; vapour and splashes burn too" } else { "" };
        cautions.push(format!(
            "At {temperature_c:.0} degC the fluid scalds{vapour}: guard against burns, and follow the local rules for hot \
             work."
        ));
    }
    if fluid.is_given_by_numbers() {
        cautions.push(
            "What this fluid is, the program does not know: if it is toxic, flammable or corrosive, its safety data sheet \
             and the local rules come first."
                .to_owned(),
        );
    }
    if is(fluid, "plasma") {
        cautions.push(BLOOD.to_owned());
    }
    if is(fluid, "culture-medium") || is(fluid, "plasma") {
        cautions.push(BIOLOGICAL.to_owned());
    }
    cautions
}

/// The cautions for a material: those that live are soft and differ, and some are of blood.
pub(super) fn material_cautions(material: &Material) -> Vec<String> {
    let Some(place) = LIVING.iter().position(|name| *name == material.name()) else { return Vec::new() };
    let medical = (place < OF_BLOOD).then_some(BLOOD);
    [SOFT, BIOLOGICAL].into_iter().chain(medical).map(str::to_owned).collect()
}

fn is(fluid: &Fluid, name: &str) -> bool {
    fluid.name().split(':').next() == Some(name)
}
