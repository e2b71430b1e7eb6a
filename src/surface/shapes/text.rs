//! Shapes as text: lengths said back, and the one form in which a shape is written.

use super::helix::Hand;
use super::shape::Form;
use super::{Helix, Shape};

/// Units by the length (m) from which they are used.
const UNITS: [(f64, f64, &str); 4] = [(1.0, 1.0, "m"), (1e-3, 1e-3, "mm"), (1e-7, 1e-6, "um"), (0.0, 1e-9, "nm")];

/// Lengths joined by `x` with one unit, `6x4x2um`; twelve significant digits at most.
pub(super) fn lengths_text(metres: &[f64]) -> String {
    let largest = metres.iter().fold(0.0_f64, |largest, length| largest.max(length.abs()));
    let (_, unit, symbol) = UNITS.into_iter().find(|(from, ..)| largest >= *from).unwrap_or((1.0, 1.0, "m"));
    let numbers = metres.iter().map(|length| rounded(length / unit).to_string()).collect::<Vec<_>>();
    format!("{}{symbol}", numbers.join("x"))
}

/// The number with what the unit's factor did to its last digits undone.
fn rounded(value: f64) -> f64 {
    format!("{value:.11e}").parse().unwrap_or(value)
}

/// The text that reads back as the shape.
pub(super) fn shape_text(shape: &Shape) -> String {
    match shape {
        Shape::Helix(helix) => helix_text(helix),
        _ => {
            let form: &dyn Form = shape.form();
            format!("{}:{}", form.keyword(), lengths_text(&form.dimensions()))
        }
    }
}

fn helix_text(helix: &Helix) -> String {
    let sizes = helix.sizes();
    let [pitch, diameter, thickness] = [sizes.pitch, sizes.diameter, sizes.thickness].map(|x| lengths_text(&[x]));
    let hand = if sizes.hand == Hand::Left { ",hand=left" } else { "" };
    let turns = rounded(sizes.turns);
    format!("helix:turns={turns},pitch={pitch},diameter={diameter},thickness={thickness}{hand}")
}
