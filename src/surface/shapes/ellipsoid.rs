//! Ellipsoids, from nearly round ones to needles, plates and blades.
//!
//! The traction of a translating ellipsoid goes like the distance of the tangent plane from the centre. At the point
//! `(a u_x, b u_y, c u_z)`, `u` on the unit sphere, that is `1 / sqrt(u_x^2/a^2 + u_y^2/b^2 + u_z^2/c^2)`: a plate's
//! peaks at the rim and falls over a latitude of about `c/a`, a needle's peaks at the tips and falls over an angle of
//! about `b/a`. Rings of macro triangles crowd there, each a constant factor wider than the one before.

use std::f64::consts::{FRAC_PI_2, PI};

use nalgebra::Matrix3;

use super::carlson;
use super::charts::{ArcTriangle, Dome, Radial, Spindle};
use super::error::{ShapeError, check_aspect, check_length};
use super::layout::{Layout, Piece, Rim, on_circle};
use super::sphere::icosahedral;
use super::stations::{Widening, widening, widening_from_both_ends};
use super::{ExactMeasure, Form};
use crate::surface::{Blueprint, Grading, Point};

/// Up to this ratio of the longest to the shortest axis the scaled icosahedron resolves the traction.
const ROUND_ASPECT: f64 = 4.0;

/// First ring at a plate's rim, in units of the peak's width there.
///
/// The force on a strip of the rim goes like the strip's latitude, so little of it depends on how the peak's top is
/// resolved. Two cuts of a 100:1 plate give the drag within 1e-4 and the torque within 1e-3 with this and the next
/// number; narrower rings cost panels a thousand times longer than wide, for rims of plates are sharply curved.
const PLATE_RING: f64 = 9.5;

/// Ratio of the widths of neighbouring rings of a plate.
const PLATE_RATIO: f64 = 5.0;

/// Latitude (rad) at which the rings of a plate end and the fan around the pole begins.
const PLATE_CAP_LATITUDE: f64 = 0.8;

/// First step at a needle's tip, or at the edge of a blade, in units of the peak's width there.
const NEEDLE_RING: f64 = 6.0;

/// Ratio of the widths of neighbouring rings of a needle.
const NEEDLE_RATIO: f64 = 3.0;

/// Largest angle (rad) of the dome at a needle's tip: it must stay well away from the equator.
const DOME_ANGLE: f64 = 0.8;

/// Longest triangle along a needle, in its own widths.
const LONGEST: f64 = 12.0;

/// Steps (rad) along a needle need not be narrower than this: eight of them reach from the tip to the middle.
const NEEDLE_STEP: f64 = 0.2;

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

/// Rings around the longest axis: domes at the tips, and a side between them.
fn needle(semi_axes: [f64; 3], order: [usize; 2], slender: f64, section: f64) -> Blueprint {
    let tip = 1.0 / slender;
    let around = Around::new(section, if slender > 8.0 { 4 } else { 6 });
    let first = (NEEDLE_RING * tip).min(DOME_ANGLE);
    let widest = (LONGEST * 2.0 * PI / around.count as f64 * tip).max(NEEDLE_STEP);
    let angles = widening_from_both_ends(FRAC_PI_2, Widening { first, ratio: NEEDLE_RATIO, widest });
    let angles = angles[1..angles.len() - 1].iter().map(|angle| angle + FRAC_PI_2).collect::<Vec<_>>();
    let frame = local_frame(semi_axes, order);
    let mut layout = Layout::new();
    let side = Piece { chart: Some(layout.chart(Spindle { frame })), face: 0, shell: 0 };
    let rings = (0..angles.len()).map(|k| layout.ring(around.count, k % 2 == 1)).collect::<Vec<_>>();
    let at = |k: usize| {
        let angle = angles[k];
        move |turns: f64| {
            let (along, across) = around.direction(turns);
            Point::new(angle, along, across)
        }
    };
    let last = angles.len() - 1;
    for k in 0..last {
        layout.strip(side, (&rings[k], &at(k)), (&rings[k + 1], &at(k + 1)), Rim::None);
    }
    for (k, forward) in [(0, false), (last, true)] {
        let radius = angles[k].sin();
        let pole = layout.vertex();
        for pair in rings[k].pairs() {
            // Counter-clockwise seen from the fluid, which is on the other side at the other end.
            let [start, end] = if forward { pair } else { [pair[1], pair[0]] };
            let [p0, p1] = [start, end].map(|(_, turns)| {
                let (along, across) = around.direction(turns);
                radius * Point::new(0.0, along, across)
            });
            let arc = ArcTriangle { corners: [p0, p1, Point::zeros()], centre: Point::zeros() };
            let chart = Some(layout.chart(Dome { arc, frame, forward }));
            let corners = [(start.0, Point::x()), (end.0, Point::y()), (pole, Point::z())];
            layout.triangle(Piece { chart, ..side }, corners, Grading::Plain);
        }
    }
    layout.finish()
}

/// The linear map of the unit sphere whose x axis goes to the first and whose y axis goes to the second axis in `order`.
fn local_frame(semi_axes: [f64; 3], order: [usize; 2]) -> Matrix3<f64> {
    let unit = |k: usize| Point::from_fn(|i, _| if i == k { 1.0 } else { 0.0 });
    let (pole, first) = (unit(order[0]), unit(order[1]));
    Matrix3::from_diagonal(&semi_axes.into()) * Matrix3::from_columns(&[pole, first, pole.cross(&first)])
}

/// Rings around the shortest axis.
fn plate(semi_axes: [f64; 3], order: [usize; 2], outline: f64, flat: f64) -> Blueprint {
    let rim = 1.0 / (flat * outline.sqrt());
    let steps = Widening { first: PLATE_RING * rim, ratio: PLATE_RATIO, widest: f64::INFINITY };
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
        let first = NEEDLE_RING / ratio;
        let quarter = if first > 0.5 { 2.0 } else { 2.0 + (1.0 / first).ln() / NEEDLE_RATIO.ln() };
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
    let frame = local_frame(semi_axes, order);
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
