//! Directions and lengths of vectors in words.

use crate::question::Vector;

/// An axis within this angle of a laboratory axis, in cosine, goes by its name.
const NAMED_AXIS_COSINE: f64 = 0.999_95;

/// `x`, `-y`, or the components of a unit vector.
pub(super) fn axis_name(axis: &Vector) -> String {
    for (component, name) in axis.iter().zip(["x", "y", "z"]) {
        if component.abs() > NAMED_AXIS_COSINE {
            return if *component > 0.0 { name.to_owned() } else { format!("-{name}") };
        }
    }
    let parts = axis.map(|x| format!("{x:.3}")).map(|part| if part == "-0.000" { "0.000".to_owned() } else { part });
    format!("({})", parts.join(", "))
}

/// An axis that has no sense of its own, told with its largest component positive.
pub(super) fn line_name(axis: &Vector) -> String {
    let largest = axis.iter().fold(0.0_f64, |largest, x| if x.abs() > largest.abs() { *x } else { largest });
    axis_name(&axis.map(|x| if largest < 0.0 { -x } else { x }))
}

pub(super) fn norm(vector: &Vector) -> f64 {
    vector.iter().map(|x| x * x).sum::<f64>().sqrt()
}
