//! The ring: a torus around the z axis.

use std::f64::consts::{PI, TAU};

use nalgebra::Matrix3;

use super::error::{ShapeError, check_aspect, check_length};
use super::layout::{Layout, Piece, Rim, Ring as Vertices};
use super::text::lengths_text;
use super::{ExactMeasure, Form};
use crate::surface::{Blueprint, Chart, Point};

/// Beyond this ratio of the two diameters the traction hardly varies around the tube, and four triangles do.
const SLENDER_RATIO: f64 = 3.0;

/// Fewest and most triangles along the ring.
const ALONG: [f64; 2] = [8.0, 24.0];

/// Longest triangle along the ring, in its own widths.
const LONGEST: f64 = 8.0;

/// A torus in the xy plane.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Ring {
    centre_line: f64,
    tube: f64,
}

impl Ring {
    /// A ring of the given diameter of the centre line and of the tube (m).
    ///
    /// # Errors
    /// If a dimension is not a possible length, the hole is closed, or one of the diameters or the hole is so small
    /// against the others that it cannot be meshed.
    pub fn new(centre_line: f64, tube: f64) -> Result<Self, ShapeError> {
        check_length("centre-line diameter", centre_line)?;
        check_length("tube diameter", tube)?;
        if tube >= centre_line {
            let sentence = format!(
                "a ring's tube must be thinner than its centre-line diameter, or the hole closes \
                 (tube {}, centre line {})",
                lengths_text(&[tube]),
                lengths_text(&[centre_line])
            );
            return Err(ShapeError::Impossible { sentence });
        }
        check_aspect([centre_line, tube, centre_line - tube])?;
        Ok(Self { centre_line, tube })
    }
}

impl Form for Ring {
    fn keyword(&self) -> &'static str {
        "ring"
    }

    fn dimensions(&self) -> Vec<f64> {
        vec![self.centre_line, self.tube]
    }

    fn blueprint(&self) -> Blueprint {
        let (large, small) = (0.5 * self.centre_line, 0.5 * self.tube);
        // Angle, seen from the tube's middle, over which the radius of the hole doubles.
        let hole = (2.0 * (large - small) / small).sqrt();
        let around = if large > SLENDER_RATIO * small { 4 } else { 6 + 2 * (1.0 / hole).ln().max(0.0).ceil() as usize };
        let width = small * TAU / around as f64;
        let along = (TAU * large / (LONGEST * width)).clamp(ALONG[0], ALONG[1]).round() as usize;
        let squeeze = (1.5 * hole * around as f64 / TAU).min(1.0);
        let angles = (0..=around).map(|k| crowded(PI * (2.0 * k as f64 / around as f64 - 1.0), squeeze));
        let angles = angles.collect::<Vec<_>>();
        let mut layout = Layout::new();
        let piece = Piece { chart: Some(layout.chart(Torus { large, small })), face: 0, shell: 0 };
        let rings = (0..around).map(|k| layout.ring(along, k % 2 == 1)).collect::<Vec<Vertices>>();
        let at = |k: usize| {
            let angle = angles[k];
            move |turns: f64| Point::new(TAU * turns, angle, 0.0)
        };
        for k in 0..around {
            layout.strip(piece, (&rings[k], &at(k)), (&rings[(k + 1) % around], &at(k + 1)), Rim::None);
        }
        layout.finish()
    }

    fn exact_measure(&self) -> ExactMeasure {
        // Pappus.
        let (volume, area) =
            (0.25 * PI * PI * self.centre_line * self.tube.powi(2), PI * PI * self.centre_line * self.tube);
        ExactMeasure { volume, area: Some(area) }
    }
}

/// An angle in `[-pi, pi]` moved towards the nearer of the ends, the hole: near them distances shrink by `squeeze`.
fn crowded(angle: f64, squeeze: f64) -> f64 {
    let (sin, cos) = (0.5 * angle).sin_cos();
    2.0 * sin.atan2(squeeze * cos)
}

/// `q = (longitude, angle around the tube from the outside upwards, unused)`.
#[derive(Debug, Clone)]
struct Torus {
    large: f64,
    small: f64,
}

impl Chart for Torus {
    fn at(&self, q: &Point) -> (Point, Matrix3<f64>) {
        let ((sin_long, cos_long), (sin, cos)) = (q.x.sin_cos(), q.y.sin_cos());
        let radius = self.large + self.small * cos;
        let position = Point::new(radius * cos_long, radius * sin_long, self.small * sin);
        let by_longitude = Point::new(-radius * sin_long, radius * cos_long, 0.0);
        let by_angle = self.small * Point::new(-sin * cos_long, -sin * sin_long, cos);
        (position, Matrix3::from_columns(&[by_longitude, by_angle, Point::zeros()]))
    }
}
