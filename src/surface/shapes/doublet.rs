//! The doublet: two equal spheres that touch, rigidly joined.

use std::f64::consts::PI;

use nalgebra::Matrix3;

use super::charts::Radial;
use super::error::{ShapeError, check_length};
use super::layout::{Layout, Piece, Rim, on_circle};
use super::{ExactMeasure, Form};
use crate::surface::{Blueprint, Grading, Point};

/// Cosine of the polar angle of an icosahedron's rings, `1 / sqrt(5)`.
const RING_COSINE: f64 = 0.447_213_595_499_957_9;

/// Two touching spheres along x, the contact at the origin.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Doublet {
    diameter: f64,
}

impl Doublet {
    /// Two spheres of the given diameter (m) each.
    ///
    /// # Errors
    /// If the diameter is not a possible length.
    pub fn new(diameter: f64) -> Result<Self, ShapeError> {
        Ok(Self { diameter: check_length("diameter", diameter)? })
    }
}

impl Form for Doublet {
    fn keyword(&self) -> &'static str {
        "doublet"
    }

    fn dimensions(&self) -> Vec<f64> {
        vec![self.diameter]
    }

    /// Two icosahedra blown up. The contact is one vertex of both surfaces, with a node for each, and the triangles
    /// there are graded towards it as if it were a corner: the fluid's gap closes like the square of the distance.
    fn blueprint(&self) -> Blueprint {
        let radius = 0.5 * self.diameter;
        let frame = Matrix3::from_diagonal_element(radius);
        let mut layout = Layout::new();
        let contact = layout.vertex();
        let ring_radius = (1.0 - RING_COSINE * RING_COSINE).sqrt();
        let back = |turns: f64| on_circle(-RING_COSINE, ring_radius, turns);
        let front = |turns: f64| on_circle(RING_COSINE, ring_radius, turns);
        for (shell, side) in [-1.0, 1.0].into_iter().enumerate() {
            let chart =
                Some(layout.chart(Radial { centre: Point::new(side * radius, 0.0, 0.0), frame, settles: true }));
            let piece = Piece { chart, face: shell, shell };
            let far = layout.vertex();
            // The mesh of one sphere mirrors that of the other.
            let rings = [layout.ring(5, side < 0.0), layout.ring(5, side > 0.0)];
            let (behind, ahead, gradings) = if side > 0.0 {
                (contact, far, [Grading::Vertex, Grading::Plain])
            } else {
                (far, contact, [Grading::Plain, Grading::Vertex])
            };
            layout.fan_behind(piece, (behind, -Point::x()), (&rings[0], &back), gradings[0]);
            layout.strip(piece, (&rings[0], &back), (&rings[1], &front), Rim::None);
            layout.fan_ahead(piece, (&rings[1], &front), (ahead, Point::x()), gradings[1]);
        }
        layout.finish()
    }

    fn exact_measure(&self) -> ExactMeasure {
        ExactMeasure { volume: PI / 3.0 * self.diameter.powi(3), area: Some(2.0 * PI * self.diameter.powi(2)) }
    }
}
