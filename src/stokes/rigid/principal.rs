//! Principal values and axes of a symmetric tensor, in a fixed order and with fixed signs.

use nalgebra::{Matrix3, SymmetricEigen};

use crate::surface::Point;

/// Values closer than this, relative to the largest, are equal even if the caller asks for less: rounding alone
/// separates them by some 1e-15.
const LEAST_TOLERANCE: f64 = 1e-12;

/// A component counts as the larger one of two only beyond this margin, so that rounding does not choose signs.
const CLEARLY_LARGER: f64 = 1e-6;

/// Principal values and axes.
///
/// Values rise. The axes are unit vectors and a right-handed frame; each of the first two points so that its largest
/// component is positive (the first of equal ones counts). Axes that the tensor does not determine, because their
/// values agree within a tolerance, are taken as near to the laboratory's as they can be.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Principal {
    /// The values, smallest first; those that agree within the tolerance may stand in any order.
    pub values: [f64; 3],
    /// The axes, in the order of the values.
    pub axes: [Point; 3],
}

impl Principal {
    /// Principal values and axes of the symmetric part of `tensor`.
    ///
    /// Values that differ by less than `tolerance` times the largest count as equal.
    pub fn of(tensor: &Matrix3<f64>, tolerance: f64) -> Self {
        let symmetric = 0.5 * (tensor + tensor.transpose());
        let eigen = SymmetricEigen::new(symmetric);
        let mut order = [0, 1, 2];
        order.sort_by(|a, b| eigen.eigenvalues[*a].total_cmp(&eigen.eigenvalues[*b]));
        let values = order.map(|k| eigen.eigenvalues[k]);
        let vectors = order.map(|k| eigen.eigenvectors.column(k).into_owned());

        let largest = values.iter().fold(0.0_f64, |largest, value| largest.max(value.abs()));
        let equal = |a: f64, b: f64| (b - a).abs() <= tolerance.max(LEAST_TOLERANCE) * largest;
        let low = equal(values[0], values[1]);
        let high = equal(values[1], values[2]);
        let axes = match (low, high) {
            (true, true) => [Point::x(), Point::y(), Point::z()],
            (true, false) => {
                let axis = pointed(vectors[2]);
                let first = nearest_laboratory_axis_across(&axis);
                [first, axis.cross(&first), axis]
            }
            (false, true) => {
                let axis = pointed(vectors[0]);
                let second = nearest_laboratory_axis_across(&axis);
                [axis, second, axis.cross(&second)]
            }
            (false, false) => {
                let (first, second) = (pointed(vectors[0]), pointed(vectors[1]));
                [first, second, first.cross(&second)]
            }
        };
        Self { values: axes.map(|axis| axis.dot(&(symmetric * axis))), axes }
    }
}

/// The axis or its opposite, such that the largest component is positive.
fn pointed(axis: Point) -> Point {
    let mut largest = 0;
    for k in 1..3 {
        if axis[k].abs() > axis[largest].abs() + CLEARLY_LARGER {
            largest = k;
        }
    }
    if axis[largest] < 0.0 { -axis } else { axis }
}

/// The unit vector across `axis` that is nearest to a laboratory axis.
fn nearest_laboratory_axis_across(axis: &Point) -> Point {
    let mut nearest = 0;
    for k in 1..3 {
        if axis[k].abs() < axis[nearest].abs() - CLEARLY_LARGER {
            nearest = k;
        }
    }
    let mut laboratory = Point::zeros();
    laboratory[nearest] = 1.0;
    (laboratory - axis * axis[nearest]).normalize()
}
