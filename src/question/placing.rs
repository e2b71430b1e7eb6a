//! How a body stands: turned about its centroid, then placed by it.

use nalgebra::{Matrix3, Rotation3, Unit};

use crate::surface::Point;

/// One turn about a fixed axis of the laboratory, right-handed.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Turn {
    /// Angle, rad.
    pub angle: f64,
    /// Axis; its length does not matter, but must not be zero.
    pub axis: Point,
}

/// Orientation and place of a body.
///
/// Turns are about the fixed laboratory axes through the volume centroid, in the order given; the centroid is moved to
/// its place after them. Without a place it stays where the surface has it.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Placing {
    /// The turns, first to last.
    pub turns: Vec<Turn>,
    /// Where the centroid goes, m.
    pub at: Option<Point>,
}

impl Placing {
    /// All turns as one proper rotation; a turn about a zero axis does nothing.
    pub fn turn(&self) -> Matrix3<f64> {
        self.turns.iter().fold(Matrix3::identity(), |so_far, turn| match Unit::try_new(turn.axis, 0.0) {
            Some(axis) => Rotation3::from_axis_angle(&axis, turn.angle).into_inner() * so_far,
            None => so_far,
        })
    }
}

#[cfg(test)]
mod tests {
    use std::f64::consts::FRAC_PI_2;

    use super::*;

    #[test]
    fn turns_follow_each_other_about_fixed_axes() {
        let turns =
            vec![Turn { angle: FRAC_PI_2, axis: Point::x() }, Turn { angle: FRAC_PI_2, axis: Point::z() * 3.0 }];
        let turn = Placing { turns, at: None }.turn();
        // y goes to z by the first turn and stays there; z goes to -y, and that to x.
        assert!((turn * Point::y() - Point::z()).norm() < 1e-15);
        assert!((turn * Point::z() - Point::x()).norm() < 1e-15);
    }
}
