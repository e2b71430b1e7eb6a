//! The cone: a straight side from a sharp rim to a point.

use std::f64::consts::PI;

use super::charts::StraightSide;
use super::error::{ShapeError, check_aspect, check_length};
use super::flat_end::FlatEnd;
use super::layout::{Layout, Piece, Rim, on_circle};
use super::stations::{Widening, widening};
use super::{ExactMeasure, Form};
use crate::surface::{Blueprint, Grading, Point};

/// Triangles around the axis.
const AROUND: usize = 6;

/// Height of the graded strip at the rim, in radii of the base, and at most in heights of the cone.
const END_STRIP: [f64; 2] = [0.75, 0.5];

/// A circular cone, pointing along +x.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Cone {
    height: f64,
    diameter: f64,
}

impl Cone {
    /// A cone of the given height and base diameter (m).
    ///
    /// # Errors
    /// If a dimension is not a possible length, or the aspect ratio is beyond what can be meshed.
    pub fn new(height: f64, diameter: f64) -> Result<Self, ShapeError> {
        check_length("height", height)?;
        check_length("base diameter", diameter)?;
        check_aspect([height, diameter])?;
        Ok(Self { height, diameter })
    }
}

impl Form for Cone {
    fn keyword(&self) -> &'static str {
        "cone"
    }

    fn dimensions(&self) -> Vec<f64> {
        vec![self.height, self.diameter]
    }

    fn blueprint(&self) -> Blueprint {
        let (height, radius) = (self.height, 0.5 * self.diameter);
        // The centroid is a quarter of the height above the base.
        let base = -0.25 * height;
        let mut layout = Layout::new();
        let chart = Some(layout.chart(StraightSide { radius: 0.75 * radius, slope: -radius / height }));
        let side = Piece { chart, face: 1, shell: 0 };
        let strip = (END_STRIP[0] * radius).min(END_STRIP[1] * height);
        let steps = Widening { first: 3.0 * strip, ratio: 2.2, widest: 0.25 * height };
        // Heights of the rings above the base; the last step is the fan to the apex.
        let inner = widening(height - strip, steps);
        let mut places = vec![0.0];
        places.extend(inner.iter().take(inner.len() - 1).map(|s| strip + s));
        let rings = (0..places.len()).map(|k| layout.ring(AROUND, k % 2 == 1)).collect::<Vec<_>>();
        let at = |k: usize| {
            let above = places[k];
            move |turns: f64| on_circle(base + above, radius * (1.0 - above / height), turns)
        };
        let last = places.len() - 1;
        for k in 0..last {
            let rim = if k == 0 { Rim::First } else { Rim::None };
            layout.strip(side, (&rings[k], &at(k)), (&rings[k + 1], &at(k + 1)), rim);
        }
        let apex = (layout.vertex(), Point::new(0.75 * height, 0.0, 0.0));
        layout.fan_ahead(side, (&rings[last], &at(last)), apex, Grading::Vertex);
        FlatEnd { x: base, radius, forward: false, face: 0 }.lay(&mut layout, &rings[0]);
        layout.finish()
    }

    fn exact_measure(&self) -> ExactMeasure {
        let (height, radius) = (self.height, 0.5 * self.diameter);
        let area = PI * radius * (radius + height.hypot(radius));
        ExactMeasure { volume: PI / 3.0 * radius * radius * height, area: Some(area) }
    }
}
