//! The cone: a straight side from a sharp rim to a point.

use std::f64::consts::PI;

use super::charts::StraightSide;
use super::error::{ShapeError, check_aspect, check_length};
use super::flat_end::FlatEnd;
use super::layout::{Layout, Piece, Rim, on_circle};
use super::{ExactMeasure, Form};
use crate::surface::{Blueprint, Grading, Point};

/// Height of the graded strip at the rim, in radii of the base, and at most in heights of the cone.
const END_STRIP: [f64; 2] = [0.75, 0.5];

/// Up to this ratio of height to base radius one fan, graded towards the apex, reaches from the strip to the apex.
const BLUNT: f64 = 4.0;

/// Beyond this ratio of height to base radius four triangles around are enough, as for a long cylinder.
const LONG: f64 = 12.0;

/// Longest triangle along a slender cone, in its own widths, and the least part of the distance to the apex that a step
/// leaves: needles are let off with longer triangles.
const LONGEST: f64 = 12.0;
const LEAST_REMAINDER: f64 = 0.7;

/// Part of a slender cone's height that is left to the fan at the apex; hardly any force acts there.
const TIP: f64 = 0.05;

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
        let places = self.places();
        let count = self.count_around();
        let rings = (0..places.len()).map(|k| layout.ring(count, k % 2 == 1)).collect::<Vec<_>>();
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
        // Grading would make needles of a slender cone's last triangles, which are long already.
        let grading = if self.is_blunt() { Grading::Vertex } else { Grading::Plain };
        layout.fan_ahead(side, (&rings[last], &at(last)), apex, grading);
        FlatEnd { x: base, radius, forward: false, face: 0 }.lay(&mut layout, &rings[0]);
        layout.finish()
    }

    fn exact_measure(&self) -> ExactMeasure {
        let (height, radius) = (self.height, 0.5 * self.diameter);
        let area = PI * radius * (radius + height.hypot(radius));
        ExactMeasure { volume: PI / 3.0 * radius * radius * height, area: Some(area) }
    }
}

impl Cone {
    fn is_blunt(&self) -> bool {
        self.height <= BLUNT * 0.5 * self.diameter
    }

    fn count_around(&self) -> usize {
        if self.height > LONG * 0.5 * self.diameter { 4 } else { 6 }
    }

    /// Heights of the side's rings above the base, from the rim to the foot of the fan at the apex.
    fn places(&self) -> Vec<f64> {
        let (height, radius) = (self.height, 0.5 * self.diameter);
        let strip = (END_STRIP[0] * radius).min(END_STRIP[1] * height);
        let mut places = vec![0.0, strip];
        if self.is_blunt() {
            return places;
        }
        let width = 2.0 * PI / self.count_around() as f64 * radius / height;
        // A step takes the part p of the distance to the apex; its length over the width at its narrow end is p/(1 - p)/width.
        let part = (LONGEST * width / (1.0 + LONGEST * width)).max(1.0 - LEAST_REMAINDER);
        let mut above = strip;
        while height - above > TIP * height {
            let widened = 2.5 * strip + 1.2 * (above - strip);
            above += widened.min(part * (height - above));
            places.push(above);
        }
        places
    }
}
