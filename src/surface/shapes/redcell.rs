//! The human red blood cell at rest, a biconcave disc.
//!
//! Evans & Fung (1972), Microvascular Research 4, 335: with `s = 2 r / D`,
//!
//! ```text
//! z = +- (D/4) sqrt(1 - s^2) (C0 + C1 s^2 + C2 s^4)
//! ```
//!
//! The coefficients are quoted from memory. With `s` the sine and `sqrt(1 - s^2)` the cosine of a polar angle, this
//! is a smooth image of the unit sphere, poles and rim included.

use std::f64::consts::{FRAC_PI_2, FRAC_PI_4, PI};

use nalgebra::Matrix3;

use super::charts::direction;
use super::error::{ShapeError, check_length};
use super::layout::{Layout, Piece};
use super::{ExactMeasure, Form};
use crate::surface::{Blueprint, Chart, Point};

/// `C0`, `C1`, `C2` of the profile.
const PROFILE: [f64; 3] = [0.207161, 2.002558, -1.122762];

/// Triangles around the axis.
const AROUND: usize = 6;

/// A red blood cell, flat normal to z.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct RedCell {
    diameter: f64,
}

impl RedCell {
    /// A red cell of the given diameter (m), all of it scaled alike; the mean human cell has 7.82 um.
    ///
    /// # Errors
    /// If the diameter is not a possible length.
    pub fn new(diameter: f64) -> Result<Self, ShapeError> {
        Ok(Self { diameter: check_length("diameter", diameter)? })
    }
}

impl Form for RedCell {
    fn keyword(&self) -> &'static str {
        "redcell"
    }

    fn dimensions(&self) -> Vec<f64> {
        vec![self.diameter]
    }

    fn blueprint(&self) -> Blueprint {
        let mut layout = Layout::new();
        let chart = Some(layout.chart(Biconcave { radius: 0.5 * self.diameter }));
        let place = |angle: f64, turns: f64| {
            let ((sin, cos), (across, along)) = (angle.sin_cos(), (2.0 * PI * turns).sin_cos());
            Point::new(sin * along, sin * across, cos)
        };
        let stations = [PI - FRAC_PI_4, FRAC_PI_2, FRAC_PI_4];
        layout.closed_run(Piece { chart, face: 0, shell: 0 }, AROUND, &stations, &place, [-Point::z(), Point::z()]);
        layout.finish()
    }

    fn exact_measure(&self) -> ExactMeasure {
        // 4 pi int z r dr with w = s^2: the integrals of sqrt(1 - w) w^k over [0, 1] are 2/3, 4/15, 16/105.
        let [c0, c1, c2] = PROFILE;
        let sum = c0 * 2.0 / 3.0 + c1 * 4.0 / 15.0 + c2 * 16.0 / 105.0;
        ExactMeasure { volume: PI * (0.5 * self.diameter).powi(3) * sum, area: None }
    }
}

/// `x = (R d_x, R d_y, R/2 d_z P(d_x^2 + d_y^2))` with `d = q/|q|`.
#[derive(Debug, Clone)]
struct Biconcave {
    radius: f64,
}

impl Chart for Biconcave {
    fn at(&self, q: &Point) -> (Point, Matrix3<f64>) {
        let [c0, c1, c2] = PROFILE;
        let (d, inner) = direction(q);
        let w = d.x * d.x + d.y * d.y;
        let (profile, by_w) = (c0 + w * (c1 + w * c2), c1 + 2.0 * w * c2);
        let r = self.radius;
        let outer = Matrix3::new(
            r,
            0.0,
            0.0, //
            0.0,
            r,
            0.0, //
            r * d.z * by_w * d.x,
            r * d.z * by_w * d.y,
            0.5 * r * profile,
        );
        (Point::new(r * d.x, r * d.y, 0.5 * r * d.z * profile), outer * inner)
    }
}
