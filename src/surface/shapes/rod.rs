//! The rod: a tube with hemispherical ends. Tube and ends join smoothly, so the surface is one face.

use std::f64::consts::PI;

use nalgebra::Matrix3;

use super::charts::{Radial, StraightSide};
use super::cylinder::widest_step;
use super::error::{ShapeError, check_aspect, check_length};
use super::layout::{Layout, Piece, Rim, on_circle};
use super::sphere::icosahedral;
use super::stations::{Widening, widening_from_both_ends};
use super::text::lengths_text;
use super::{ExactMeasure, Form};
use crate::surface::{Blueprint, Grading, Point};

/// Beyond this ratio of length to diameter four triangles around are enough: the traction far from the ends is even.
const LONG_ASPECT: f64 = 8.0;

/// A tube shorter than this part of the diameter is left out: the rod is a sphere to more digits than the solver has.
const SHORTEST_TUBE: f64 = 1e-6;

/// First step along the tube, in radii: about the side of the hemisphere's triangles.
const FIRST_STEP: f64 = 1.3;

/// A rod with hemispherical ends, its axis along x.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Rod {
    length: f64,
    diameter: f64,
}

impl Rod {
    /// A rod of the given overall length and diameter (m).
    ///
    /// # Errors
    /// If a dimension is not a possible length, the length is less than the diameter, or the aspect ratio is beyond
    /// what can be meshed.
    pub fn new(length: f64, diameter: f64) -> Result<Self, ShapeError> {
        check_length("length", length)?;
        check_length("diameter", diameter)?;
        check_aspect([length, diameter])?;
        if length < diameter {
            let sentence = format!(
                "a rod's length includes its round ends, so it cannot be less than the diameter \
                 (length {}, diameter {}); for a flat body use disc or ellipsoid",
                lengths_text(&[length]),
                lengths_text(&[diameter])
            );
            return Err(ShapeError::Impossible { sentence });
        }
        Ok(Self { length, diameter })
    }
}

impl Form for Rod {
    fn keyword(&self) -> &'static str {
        "rod"
    }

    fn dimensions(&self) -> Vec<f64> {
        vec![self.length, self.diameter]
    }

    fn blueprint(&self) -> Blueprint {
        let (half, radius) = (0.5 * (self.length - self.diameter), 0.5 * self.diameter);
        if half < SHORTEST_TUBE * radius {
            return icosahedral(Matrix3::from_diagonal_element(radius));
        }
        let count = if self.length > LONG_ASPECT * self.diameter { 4 } else { 6 };
        let steps = Widening { first: FIRST_STEP * radius, ratio: 2.2, widest: widest_step(half, radius) };
        // A short tube is one strip: two would be thin ones.
        let places = if 2.0 * half <= steps.first { vec![-half, half] } else { widening_from_both_ends(half, steps) };
        let mut layout = Layout::new();
        let rings = (0..places.len()).map(|k| layout.ring(count, k % 2 == 1)).collect::<Vec<_>>();
        let tube = Piece { chart: Some(layout.chart(StraightSide { radius, slope: 0.0 })), face: 0, shell: 0 };
        let at = |k: usize| {
            let x = places[k];
            move |turns: f64| on_circle(x, radius, turns)
        };
        let last = places.len() - 1;
        for k in 0..last {
            layout.strip(tube, (&rings[k], &at(k)), (&rings[k + 1], &at(k + 1)), Rim::None);
        }
        let frame = Matrix3::from_diagonal_element(radius);
        let equator = |turns: f64| on_circle(0.0, 1.0, turns);
        let [back, front] = [-half, half].map(|x| {
            let chart = Some(layout.chart(Radial { centre: Point::new(x, 0.0, 0.0), frame, settles: false }));
            Piece { chart, ..tube }
        });
        let poles = [-1.0, 1.0].map(|x| (layout.vertex(), Point::new(x, 0.0, 0.0)));
        layout.fan_behind(back, poles[0], (&rings[0], &equator), Grading::Plain);
        layout.fan_ahead(front, (&rings[last], &equator), poles[1], Grading::Plain);
        layout.finish()
    }

    fn exact_measure(&self) -> ExactMeasure {
        let (length, diameter) = (self.length, self.diameter);
        let volume = PI / 4.0 * diameter * diameter * (length - diameter) + PI / 6.0 * diameter.powi(3);
        ExactMeasure { volume, area: Some(PI * diameter * length) }
    }
}
