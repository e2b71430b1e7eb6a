//! What a careful user would want to be reminded of, from body and fluid.

use crate::physical::Fluid;

/// Red cells are told by the shape's name.
const RED_CELL: &str = "redcell";

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

/// The cautions for a body of this name and half length (m) in this fluid, the fluid's own first.
pub(super) fn body_cautions(body_name: &str, half_length_m: f64, fluid: &Fluid) -> Vec<String> {
    let mut cautions = fluid.cautions().to_vec();
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
    let red_cell = body_name.starts_with(RED_CELL);
    if red_cell {
        cautions.push(
            "A red cell is soft, and its shape follows the flow and the medium: the answer is that of a rigid body of \
             this shape at rest."
                .to_owned(),
        );
    }
    if red_cell || is(fluid, "plasma") {
        cautions.push(BLOOD.to_owned());
    }
    if red_cell || is(fluid, "culture-medium") || is(fluid, "plasma") {
        cautions.push(BIOLOGICAL.to_owned());
    }
    cautions
}

/// The cautions for a fluid without a body.
pub(super) fn fluid_cautions(fluid: &Fluid) -> Vec<String> {
    body_cautions("", FEWEST_MOLECULES_M, fluid)
}

/// The cautions for a body that lives, whatever it is called; `medical` if it is one of blood or tissue.
pub(super) fn living_cautions(medical: bool) -> Vec<String> {
    let medical = medical.then_some(BLOOD);
    [SOFT, BIOLOGICAL].into_iter().chain(medical).map(str::to_owned).collect()
}

fn is(fluid: &Fluid, name: &str) -> bool {
    fluid.name().split(':').next() == Some(name)
}
