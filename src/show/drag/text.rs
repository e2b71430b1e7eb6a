//! The answer to `drag` as text: the bodies said back, the drags, whether they hold, and how far to trust them.

use super::bodies::{body_lines, fluid_lines};
use super::motion::motion_lines;
use super::one::{drags, tensors};
use super::several::{grand_tensors, list_of_bodies};
use super::trust::{regime, trust};
use crate::physical::quantity::format_number;
use crate::question::{DragAnswer, LengthUnit};
use crate::show::numbers::temperature;
use crate::show::sheet::{Sheet, Style, sentence};

/// What was taken for granted because nothing was said, and is said aloud.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Assumed {
    /// The fluid.
    pub fluid: bool,
    /// Its temperature.
    pub temperature: bool,
    /// The direction of the motion.
    pub direction: bool,
    /// The axis of the spin.
    pub axis: bool,
    /// The unit of the body's file, in which its size is said back as well.
    pub file_unit: Option<LengthUnit>,
}

impl Assumed {
    /// What was taken for granted of the fluid, to be put behind it.
    pub(in crate::show) fn fluid_words(&self) -> &'static str {
        match (self.fluid, self.temperature) {
            (true, true) => "; taken as water at 20 degC, since no fluid was given",
            (true, false) => "; taken as water, since no fluid was given",
            (false, true) => "; taken at 20 degC, since no temperature was given",
            (false, false) => "",
        }
    }
}

/// The whole answer as text, for eyes.
pub fn drag_text(answer: &DragAnswer, assumed: &Assumed, style: Style) -> String {
    let mut sheet = Sheet::new(style);
    let one = answer.one();
    let several = answer.bodies.as_deref().unwrap_or(&[]);
    let what = match &one {
        Some(one) => one.body.name.clone(),
        None => format!("{} bodies", several.len()),
    };
    let temperature = temperature(answer.fluid.temperature_c);
    sheet.title(&format!("{what} in {} at {temperature}", fluid_name(answer)));
    sheet.gap();
    match &one {
        Some(one) => body_lines(&mut sheet, one.body, assumed),
        None => list_of_bodies(&mut sheet, several),
    }
    fluid_lines(&mut sheet, answer, assumed);
    if let Some(one) = &one {
        sheet.gap();
        drags(&mut sheet, answer, one);
        if let Some(motion) = &answer.motion {
            sheet.gap();
            motion_lines(&mut sheet, answer, one, motion, assumed);
        }
    }
    sheet.gap();
    regime(&mut sheet, answer);
    trust(&mut sheet, answer);
    let solver = &answer.solver;
    sheet.item(
        "solved",
        &format!(
            "{} triangles, {} unknowns, {}, in {} s",
            solver.triangles,
            solver.unknowns,
            solver.method,
            format_number(solver.seconds, 2)
        ),
    );
    for caution in &answer.cautions {
        sheet.item("beware", &sentence(caution));
    }
    sheet.gap();
    match &one {
        Some(one) => tensors(&mut sheet, answer, one),
        None => grand_tensors(&mut sheet, answer, several),
    }
    sheet.finish()
}

fn fluid_name(answer: &DragAnswer) -> &str {
    if answer.fluid.name.starts_with("given") { "a fluid given by numbers" } else { &answer.fluid.name }
}
