//! The helix: a round wire along a helical centre line, with hemispherical ends.
//!
//! With `R` the radius of the centre line, `h` the advance a radian, `l = sqrt(R^2 + h^2)` and `s = +-1` the hand,
//!
//! ```text
//! c(t) = (h t, R cos t, s R sin t),    |t| <= pi turns
//! ```
//!
//! The wire is a tube around `c` in the Frenet frame (tangent, normal, binormal), of curvature `R / l^2` and torsion
//! `s h / l^2`. A half turn about the y axis maps it to itself, so only the y coordinate of the centroid needs care.

use std::f64::consts::{PI, TAU};

use nalgebra::Matrix3;

use super::charts::Radial;
use super::error::{ShapeError, check_aspect, check_length};
use super::layout::{Layout, Piece, Rim, on_circle};
use super::stations::{Widening, widening_from_both_ends};
use super::text::lengths_text;
use super::{ExactMeasure, Form};
use crate::surface::{Blueprint, Chart, Grading, Point};

/// Fewest and most turns. A tenth of a turn is a bent rod; beyond the other a coil has too many triangles.
const TURNS: [f64; 2] = [0.1, 50.0];

/// Triangles around the wire.
const AROUND: usize = 4;

/// First step along the wire, in its radii.
const FIRST_STEP: f64 = 1.5;

/// Longest step along the wire, in its radii: twelve times the width of a triangle.
const LONGEST_STEP: f64 = 12.0 * 0.5 * PI;

/// Fewest steps in a turn; twice as many are spent on a thin wire to keep them short.
const STEPS_A_TURN: f64 = 6.0;

/// Samples of the distance between neighbouring turns; its error is far below the thinnest gap that matters.
const SAMPLES: usize = 4000;

/// Which way a helix winds.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Hand {
    /// Like an ordinary screw.
    Right,
    /// Its mirror image.
    Left,
}

/// Sizes of a helix.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct HelixSizes {
    /// Number of turns, any positive number.
    pub turns: f64,
    /// Advance a turn (m).
    pub pitch: f64,
    /// Diameter of the centre line (m).
    pub diameter: f64,
    /// Diameter of the wire (m).
    pub thickness: f64,
    /// Which way it winds.
    pub hand: Hand,
}

/// A helix around the x axis.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Helix {
    sizes: HelixSizes,
}

impl Helix {
    /// A helix of the given sizes.
    ///
    /// # Errors
    /// If a size is not a possible one, or the wire runs into itself.
    pub fn new(sizes: HelixSizes) -> Result<Self, ShapeError> {
        let HelixSizes { turns, pitch, diameter, thickness, .. } = sizes;
        check_length("pitch", pitch)?;
        check_length("diameter", diameter)?;
        check_length("thickness", thickness)?;
        let refuse = |sentence: String| Err(ShapeError::Impossible { sentence });
        if !(TURNS[0]..=TURNS[1]).contains(&turns) {
            return refuse(format!("a helix needs {} to {} turns, not {turns}", TURNS[0], TURNS[1]));
        }
        if thickness >= diameter {
            return refuse(format!(
                "a helix's wire must be thinner than the diameter of its centre line \
                 (thickness {}, diameter {})",
                lengths_text(&[thickness]),
                lengths_text(&[diameter])
            ));
        }
        check_aspect([pitch, diameter, thickness])?;
        let helix = Self { sizes };
        let gap = helix.turn_distance();
        if gap <= thickness {
            return refuse(format!(
                "neighbouring turns of the helix run into each other: their centre lines are {} apart and the \
                 wire is {} thick; a larger pitch is needed",
                lengths_text(&[gap]),
                lengths_text(&[thickness])
            ));
        }
        Ok(helix)
    }

    /// The sizes.
    pub fn sizes(&self) -> HelixSizes {
        self.sizes
    }

    /// Smallest distance between points of the centre line at least half a turn apart.
    fn turn_distance(&self) -> f64 {
        let (radius, advance) = (0.5 * self.sizes.diameter, self.sizes.pitch / TAU);
        // Beyond one turn the distances only grow: the advance grows, and the rest repeats.
        let farthest = TAU * self.sizes.turns.min(1.0);
        if farthest <= PI {
            return f64::INFINITY;
        }
        (0..=SAMPLES)
            .map(|k| PI + (farthest - PI) * k as f64 / SAMPLES as f64)
            .map(|angle| (2.0 * radius * (0.5 * angle).sin()).hypot(advance * angle))
            .fold(f64::INFINITY, f64::min)
    }

    fn coil(&self) -> Coil {
        let HelixSizes { pitch, diameter, thickness, hand, .. } = self.sizes;
        let (radius, advance) = (0.5 * diameter, pitch / TAU);
        let sign = if hand == Hand::Right { 1.0 } else { -1.0 };
        let wire = 0.5 * thickness;
        Coil { radius, advance, speed: radius.hypot(advance), sign, wire, lift: 0.0 }
    }

    /// Half the range of the centre line's parameter.
    fn half_angle(&self) -> f64 {
        PI * self.sizes.turns
    }

    /// The y coordinate of the centroid if the centre line winds around the x axis.
    ///
    /// Slices of the tube have their centroid shifted outwards by `curvature a^2 / 4`; hemispheres have theirs
    /// `3 a / 8` beyond their base.
    fn centroid_y(&self) -> f64 {
        let Coil { radius, speed, wire, .. } = self.coil();
        let (sin, cos) = self.half_angle().sin_cos();
        let curvature = radius / (speed * speed);
        let tube = PI * wire * wire * (radius + 0.25 * curvature * wire * wire) * speed * 2.0 * sin;
        let ends = 4.0 / 3.0 * PI * wire.powi(3) * (radius * cos - 0.375 * wire * radius / speed * sin);
        (tube + ends) / self.exact_measure().volume
    }
}

impl Form for Helix {
    fn keyword(&self) -> &'static str {
        "helix"
    }

    fn dimensions(&self) -> Vec<f64> {
        vec![self.sizes.turns, self.sizes.pitch, self.sizes.diameter, self.sizes.thickness]
    }

    fn blueprint(&self) -> Blueprint {
        let coil = Coil { lift: -self.centroid_y(), ..self.coil() };
        let (half, wire, speed) = (self.half_angle(), coil.wire, coil.speed);
        let turn = TAU * speed;
        let widest = (LONGEST_STEP * wire).clamp(turn / (2.0 * STEPS_A_TURN), turn / STEPS_A_TURN);
        let first = (FIRST_STEP * wire).min(widest);
        let places = widening_from_both_ends(half * speed, Widening { first, ratio: 2.2, widest });
        let mut layout = Layout::new();
        let rings = (0..places.len()).map(|k| layout.ring(AROUND, k % 2 == 1)).collect::<Vec<_>>();
        let [back, front] = [-half, half].map(|t| {
            let Frame { centre, tangent, normal, binormal } = coil.frame(t);
            let frame = wire * Matrix3::from_columns(&[tangent, normal, binormal]);
            Piece { chart: Some(layout.chart(Radial { centre, frame, settles: false })), face: 0, shell: 0 }
        });
        let tube = Piece { chart: Some(layout.chart(coil)), ..back };
        let at = |k: usize| {
            let t = places[k] / speed;
            move |turns: f64| on_circle(t, 1.0, turns)
        };
        let last = places.len() - 1;
        for k in 0..last {
            layout.strip(tube, (&rings[k], &at(k)), (&rings[k + 1], &at(k + 1)), Rim::None);
        }
        let equator = |turns: f64| on_circle(0.0, 1.0, turns);
        let poles = [-1.0, 1.0].map(|x| (layout.vertex(), Point::new(x, 0.0, 0.0)));
        layout.fan_behind(back, poles[0], (&rings[0], &equator), Grading::Plain);
        layout.fan_ahead(front, (&rings[last], &equator), poles[1], Grading::Plain);
        layout.finish()
    }

    fn exact_measure(&self) -> ExactMeasure {
        // Pappus for the tube: curvature and torsion do not matter.
        let Coil { speed, wire, .. } = self.coil();
        let length = 2.0 * self.half_angle() * speed;
        let volume = PI * wire * wire * length + 4.0 / 3.0 * PI * wire.powi(3);
        ExactMeasure { volume, area: Some(2.0 * PI * wire * length + 4.0 * PI * wire * wire) }
    }
}

/// The tube: `q = (t, q_y, q_z)`, `x = c(t) + a (d_y normal + d_z binormal)` with `d` the direction of `(q_y, q_z)`.
#[derive(Debug, Clone, Copy)]
struct Coil {
    /// Radius of the centre line.
    radius: f64,
    /// Advance a radian.
    advance: f64,
    /// `|dc/dt|`.
    speed: f64,
    /// +1 for a right-handed helix, -1 for a left-handed one.
    sign: f64,
    /// Radius of the wire.
    wire: f64,
    /// Shift along y that brings the centroid to the origin.
    lift: f64,
}

/// A point of the centre line and the Frenet frame there.
struct Frame {
    centre: Point,
    tangent: Point,
    normal: Point,
    binormal: Point,
}

impl Coil {
    fn frame(&self, t: f64) -> Frame {
        let (sin, cos) = t.sin_cos();
        let Self { radius, advance, speed, sign, lift, .. } = *self;
        let tangent = Point::new(advance, -radius * sin, sign * radius * cos) / speed;
        let normal = Point::new(0.0, -cos, -sign * sin);
        let centre = Point::new(advance * t, radius * cos + lift, sign * radius * sin);
        Frame { centre, tangent, normal, binormal: tangent.cross(&normal) }
    }
}

impl Chart for Coil {
    fn at(&self, q: &Point) -> (Point, Matrix3<f64>) {
        let Frame { centre, tangent, normal, binormal } = self.frame(q.x);
        let across = q.y.hypot(q.z);
        let (cos, sin) = (q.y / across, q.z / across);
        let outward = cos * normal + sin * binormal;
        let around = cos * binormal - sin * normal;
        // Frenet: N' = l (-curvature T + torsion B), B' = -l torsion N.
        let (bend, twist) = (self.radius / self.speed, self.sign * self.advance / self.speed);
        let by_t = (self.speed - self.wire * cos * bend) * tangent + self.wire * twist * around;
        let turning = self.wire / across * around;
        (centre + self.wire * outward, Matrix3::from_columns(&[by_t, -sin * turning, cos * turning]))
    }
}
