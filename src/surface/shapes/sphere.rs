//! The sphere: twenty macro triangles, an icosahedron blown up.

use std::f64::consts::PI;

use nalgebra::Matrix3;

use super::charts::Radial;
use super::error::{ShapeError, check_length};
use super::layout::{Layout, Piece};
use super::{ExactMeasure, Form};
use crate::surface::{Blueprint, Grading, Point};

/// A ball.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Sphere {
    diameter: f64,
}

impl Sphere {
    /// A sphere of the given diameter (m).
    ///
    /// # Errors
    /// If the diameter is not a possible length.
    pub fn new(diameter: f64) -> Result<Self, ShapeError> {
        Ok(Self { diameter: check_length("diameter", diameter)? })
    }
}

impl Form for Sphere {
    fn keyword(&self) -> &'static str {
        "sphere"
    }

    fn dimensions(&self) -> Vec<f64> {
        vec![self.diameter]
    }

    fn blueprint(&self) -> Blueprint {
        icosahedral(Matrix3::from_diagonal_element(0.5 * self.diameter))
    }

    fn exact_measure(&self) -> ExactMeasure {
        ExactMeasure { volume: PI / 6.0 * self.diameter.powi(3), area: Some(PI * self.diameter.powi(2)) }
    }
}

/// The image of the unit sphere under a linear map of positive determinant, cut like an icosahedron.
///
/// The icosahedron has two-fold axes along x, y and z, so the mesh keeps the mirror planes of an ellipsoid.
pub(super) fn icosahedral(frame: Matrix3<f64>) -> Blueprint {
    let mut layout = Layout::new();
    let chart = Some(layout.chart(Radial { centre: Point::zeros(), frame, settles: true }));
    let golden = 0.5 * (1.0 + 5.0_f64.sqrt());
    let mut corners = Vec::with_capacity(12);
    for (long, short) in [(golden, 1.0), (-golden, 1.0), (golden, -1.0), (-golden, -1.0)] {
        for point in [Point::new(0.0, short, long), Point::new(long, 0.0, short), Point::new(short, long, 0.0)] {
            corners.push((layout.vertex(), point.normalize()));
        }
    }
    // The faces are the triples of mutual neighbours; the neighbours of a corner are those at an acute angle.
    let near = |a: &Point, b: &Point| a.dot(b) > 0.0;
    for (i, a) in corners.iter().enumerate() {
        for (j, b) in corners.iter().enumerate().skip(i + 1).filter(|(_, b)| near(&a.1, &b.1)) {
            for c in corners.iter().skip(j + 1).filter(|c| near(&a.1, &c.1) && near(&b.1, &c.1)) {
                let outward = (b.1 - a.1).cross(&(c.1 - a.1)).dot(&a.1) > 0.0;
                let triangle = if outward { [*a, *b, *c] } else { [*a, *c, *b] };
                layout.triangle(Piece { chart, face: 0, shell: 0 }, triangle, Grading::Plain);
            }
        }
    }
    layout.finish()
}
