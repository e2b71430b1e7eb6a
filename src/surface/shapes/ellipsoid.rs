//! Ellipsoids, from nearly round ones to needles, plates and blades.
//!
//! The traction of a translating ellipsoid goes like the distance of the tangent plane from the centre. At the point
//! `(a u_x, b u_y, c u_z)`, `u` on the unit sphere, that is `1 / sqrt(u_x^2/a^2 + u_y^2/b^2 + u_z^2/c^2)`: a plate's
//! peaks at the rim and falls over a latitude of about `c/a`, a needle's peaks at the tips and falls over an angle of
//! about `b/a`. Rings of macro triangles crowd there, each a constant factor wider than the one before.

use std::f64::consts::{FRAC_PI_2, PI};

use nalgebra::Matrix3;

use super::carlson;
use super::charts::Radial;
use super::error::{ShapeError, check_aspect, check_length};
use super::layout::{Layout, Piece, on_circle};
use super::sphere::icosahedral;
use super::stations::{Widening, widening};
use super::{ExactMeasure, Form};
use crate::surface::{Blueprint, Point};

/// Up to this ratio of the longest to the shortest axis the scaled icosahedron resolves the traction.
const ROUND_ASPECT: f64 = 4.0;

/// First ring at a rim or tip, in units of the peak's width there.
///
/// The force on a strip of the rim goes like the strip's latitude, so little of it depends on how the peak's top is
/// resolved, and wider rings spare panels a thousand times longer than wide: rims of plates are sharply curved.
const FIRST_RING: f64 = 6.0;

/// Ratio of the widths of neighbouring rings.
const RING_RATIO: f64 = 3.0;

/// Latitude (rad) at which the rings of a plate end and the fan around the pole begins.
const PLATE_CAP_LATITUDE: f64 = 0.8;

/// Widest step (rad) along a needle; six of them reach from the tip to the middle.
const NEEDLE_STEP: f64 = 0.3;

/// An ellipsoid with its axes along x, y and z.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Ellipsoid {
    axes: [f64; 3],
}

impl Ellipsoid {
    /// An ellipsoid of the given full axes along x, y, z (m).
    ///
    /// # Errors
    /// If an axis is not a possible length, or the aspect ratio is beyond what can be meshed.
    pub fn new(axes: [f64; 3]) -> Result<Self, ShapeError> {
        for (name, axis) in ["x axis", "y axis", "z axis"].into_iter().zip(axes) {
            check_length(name, axis)?;
        }
        check_aspect(axes)?;
        Ok(Self { axes })
    }
}

impl Form for Ellipsoid {
    fn keyword(&self) -> &'static str {
        "ellipsoid"
    }

    fn dimensions(&self) -> Vec<f64> {
        self.axes.to_vec()
    }

    fn blueprint(&self) -> Blueprint {
        let semi_axes = self.axes.map(|axis| 0.5 * axis);
        let mut order = [0, 1, 2];
        order.sort_by(|&i, &j| semi_axes[j].total_cmp(&semi_axes[i]));
        let [long, middle, short] = order;
        let (to_middle, to_short) = (semi_axes[long] / semi_axes[middle], semi_axes[middle] / semi_axes[short]);
        if to_middle * to_short <= ROUND_ASPECT {
            icosahedral(Matrix3::from_diagonal(&semi_axes.into()))
        } else if to_middle >= to_short {
            needle(semi_axes, [long, middle], to_middle, to_short)
        } else {
            plate(semi_axes, [short, long], to_middle, to_short)
        }
    }

    fn exact_measure(&self) -> ExactMeasure {
        let [a, b, c] = self.axes;
        // Surface area in Carlson's form: DLMF 19.33.1, S = 4 pi R_G(a^2 b^2, a^2 c^2, b^2 c^2) with semi-axes.
        let area = PI * carlson::r_g((a * b).powi(2), (a * c).powi(2), (b * c).powi(2));
        ExactMeasure { volume: PI / 6.0 * a * b * c, area: Some(area) }
    }
}

/// Rings around the longest axis.
fn needle(semi_axes: [f64; 3], order: [usize; 2], slender: f64, section: f64) -> Blueprint {
    let tip = 1.0 / slender;
    let steps = Widening { first: FIRST_RING * tip, ratio: RING_RATIO, widest: NEEDLE_STEP.max(6.0 * tip) };
    let side = widening(FRAC_PI_2, steps);
    let around = Around::new(section, if slender > 8.0 { 4 } else { 6 });
    rings(semi_axes, order, around, &side[1..])
}

/// Rings around the shortest axis.
fn plate(semi_axes: [f64; 3], order: [usize; 2], outline: f64, flat: f64) -> Blueprint {
    let rim = 1.0 / (flat * outline.sqrt());
    let steps = Widening { first: FIRST_RING * rim, ratio: RING_RATIO, widest: PLATE_CAP_LATITUDE };
    let latitudes = widening(PLATE_CAP_LATITUDE, steps);
    let side = latitudes.iter().rev().map(|latitude| FRAC_PI_2 - latitude).collect::<Vec<_>>();
    rings(semi_axes, order, Around::new(outline, 6), &side)
}

/// Places around the axis of a section that is an ellipse: they crowd towards the ends of its long axis.
#[derive(Debug, Clone, Copy)]
struct Around {
    count: usize,
    /// `tan(angle) = squeeze tan(2 pi turns)`, in the same quadrant.
    squeeze: f64,
}

impl Around {
    /// For a section of this ratio of axes, at least 1; `least` places if it is nearly round.
    fn new(ratio: f64, least: usize) -> Self {
        if ratio < 2.0 {
            return Self { count: least, squeeze: 1.0 };
        }
        let first = FIRST_RING / ratio;
        let quarter = if first > 0.5 { 2.0 } else { 2.0 + (1.0 / first).ln() / RING_RATIO.ln() };
        let count = 4 * quarter.round() as usize;
        let squeeze = first / (2.0 * PI / count as f64).tan();
        Self { count, squeeze: squeeze.min(1.0) }
    }

    fn direction(&self, turns: f64) -> (f64, f64) {
        let (sin, cos) = (2.0 * PI * turns).sin_cos();
        let (across, along) = (self.squeeze * sin, cos);
        let length = across.hypot(along);
        (along / length, across / length)
    }
}

/// Rings at polar angles `side` (up to a right angle, which is the last) and their mirror images.
///
/// `order` names the polar axis and the one from which angles around it count.
fn rings(semi_axes: [f64; 3], order: [usize; 2], around: Around, side: &[f64]) -> Blueprint {
    let unit = |k: usize| Point::from_fn(|i, _| if i == k { 1.0 } else { 0.0 });
    let (pole, first) = (unit(order[0]), unit(order[1]));
    let turn = Matrix3::from_columns(&[pole, first, pole.cross(&first)]);
    let frame = Matrix3::from_diagonal(&semi_axes.into()) * turn;
    let mirrored = side.iter().rev().skip(1).map(|angle| PI - angle);
    // Along the axis, so from the far pole.
    let stations = side.iter().copied().chain(mirrored).map(|angle| PI - angle).collect::<Vec<_>>();
    let mut layout = Layout::new();
    let piece =
        Piece { chart: Some(layout.chart(Radial { centre: Point::zeros(), frame, settles: true })), face: 0, shell: 0 };
    let place = |angle: f64, turns: f64| {
        let (sin, cos) = angle.sin_cos();
        let (along, across) = around.direction(turns);
        Point::new(cos, sin * along, sin * across)
    };
    let poles = [on_circle(-1.0, 0.0, 0.0), on_circle(1.0, 0.0, 0.0)];
    layout.closed_run(piece, around.count, &stations, &place, poles);
    layout.finish()
}
