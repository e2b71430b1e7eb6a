//! Cylinders and discs: a side and two flat ends that meet at sharp rims.

use std::f64::consts::PI;

use nalgebra::Matrix3;

use super::charts::StraightSide;
use super::error::{ShapeError, check_aspect, check_length};
use super::flat_end::FlatEnd;
use super::layout::{Layout, Piece, Rim, on_circle};
use super::stations::{Widening, widening_from_both_ends};
use super::{ExactMeasure, Form};
use crate::surface::{Blueprint, Placement, Point};

/// Beyond this ratio of length to diameter four triangles around are enough: the traction far from the ends is even.
const LONG_ASPECT: f64 = 6.0;

/// Up to this ratio of length to diameter the side is cut at its middle only.
const SHORT_ASPECT: f64 = 1.5;

/// Beyond these ratios of diameter to thickness the side's strips would get too thin; more triangles go around.
const THIN_ASPECTS: [(f64, usize); 2] = [(40.0, 12), (10.0, 8)];

/// Height of the graded strip at the rims of a long cylinder, in radii.
const END_STRIP: f64 = 1.0;

/// A circular cylinder with sharp rims, its axis along x.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Cylinder {
    length: f64,
    diameter: f64,
}

impl Cylinder {
    /// A cylinder of the given length along x and diameter (m).
    ///
    /// # Errors
    /// If a dimension is not a possible length, or the aspect ratio is beyond what can be meshed.
    pub fn new(length: f64, diameter: f64) -> Result<Self, ShapeError> {
        check_length("length", length)?;
        check_length("diameter", diameter)?;
        check_aspect([length, diameter])?;
        Ok(Self { length, diameter })
    }
}

impl Form for Cylinder {
    fn keyword(&self) -> &'static str {
        "cylinder"
    }

    fn dimensions(&self) -> Vec<f64> {
        vec![self.length, self.diameter]
    }

    fn blueprint(&self) -> Blueprint {
        let (half, radius) = (0.5 * self.length, 0.5 * self.diameter);
        let mut layout = Layout::new();
        let chart = Some(layout.chart(StraightSide { radius, slope: 0.0 }));
        let side = Piece { chart, face: 1, shell: 0 };
        let count = self.count_around();
        let places = self.places();
        let rings = (0..places.len()).map(|k| layout.ring(count, k % 2 == 1)).collect::<Vec<_>>();
        let at = |k: usize| {
            let x = places[k];
            move |turns: f64| on_circle(x, radius, turns)
        };
        let last = places.len() - 1;
        for k in 0..last {
            let rim = match k {
                0 => Rim::First,
                k if k + 1 == last => Rim::Second,
                _ => Rim::None,
            };
            layout.strip(side, (&rings[k], &at(k)), (&rings[k + 1], &at(k + 1)), rim);
        }
        FlatEnd { x: -half, radius, forward: false, face: 0 }.lay(&mut layout, &rings[0]);
        FlatEnd { x: half, radius, forward: true, face: 2 }.lay(&mut layout, &rings[last]);
        layout.finish()
    }

    fn exact_measure(&self) -> ExactMeasure {
        let (length, radius) = (self.length, 0.5 * self.diameter);
        let area = 2.0 * PI * radius * (length + radius);
        ExactMeasure { volume: PI * radius * radius * length, area: Some(area) }
    }
}

impl Cylinder {
    fn count_around(&self) -> usize {
        if self.length > LONG_ASPECT * self.diameter {
            return 4;
        }
        let thinness = self.diameter / self.length;
        THIN_ASPECTS.iter().find(|(aspect, _)| thinness > *aspect).map_or(6, |(_, count)| *count)
    }

    /// Axial places of the side's rings, rims included; an odd number of them.
    fn places(&self) -> Vec<f64> {
        let (half, radius) = (0.5 * self.length, 0.5 * self.diameter);
        if half <= SHORT_ASPECT * radius {
            return vec![-half, 0.0, half];
        }
        let strip = END_STRIP * radius;
        // The last rows of a graded strip are three times as wide as those of a plain strip of its height.
        let steps = Widening { first: 2.5 * strip, ratio: 2.2, widest: widest_step(half, radius) };
        let mut places = vec![-half];
        places.extend(widening_from_both_ends(half - strip, steps));
        places.push(half);
        places
    }
}

/// The longest piece along a slender round body: twelve times its own width, but six of them reach the middle.
pub(super) fn widest_step(half: f64, radius: f64) -> f64 {
    (12.0 * 0.5 * PI * radius).max(half / 6.0)
}

/// A flat disc with a sharp rim, its axis along z.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Disc {
    cylinder: Cylinder,
}

impl Disc {
    /// A disc of the given diameter and thickness (m).
    ///
    /// # Errors
    /// If a dimension is not a possible length, or the aspect ratio is beyond what can be meshed.
    pub fn new(diameter: f64, thickness: f64) -> Result<Self, ShapeError> {
        check_length("diameter", diameter)?;
        check_length("thickness", thickness)?;
        Cylinder::new(thickness, diameter).map(|cylinder| Self { cylinder })
    }
}

impl Form for Disc {
    fn keyword(&self) -> &'static str {
        "disc"
    }

    fn dimensions(&self) -> Vec<f64> {
        vec![self.cylinder.diameter, self.cylinder.length]
    }

    fn blueprint(&self) -> Blueprint {
        // x -> z, y -> x, z -> y.
        let turn = Matrix3::from_columns(&[Point::z(), Point::x(), Point::y()]);
        self.cylinder.blueprint().placed(&Placement { turn, ..Placement::identity() })
    }

    fn exact_measure(&self) -> ExactMeasure {
        self.cylinder.exact_measure()
    }
}
