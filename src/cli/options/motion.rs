//! A motion whose force and torque are wanted.

use clap::Args;
use slowmote::physical::Quantity;
use slowmote::physical::quantity::{parse_angular_speed, parse_speed};
use slowmote::question::PrescribedMotion;
use slowmote::surface::Point;

use super::parse_with;
use super::values::direction;

/// How the body moves.
#[derive(Debug, Clone, Args)]
#[command(next_help_heading = "A motion (its force and torque are printed)")]
pub struct MotionOptions {
    /// Speed through the fluid, such as `50um/s`
    #[arg(long, value_name = "SPEED", value_parser = parse_with(speed))]
    pub speed: Option<Quantity>,

    /// Its direction: x, y, z, with a sign if need be, or a vector such as `1,1,0` [default: x]
    #[arg(long, value_name = "AXIS", value_parser = direction, requires = "speed", allow_hyphen_values = true)]
    pub along: Option<Point>,

    /// Angular speed, such as `10/s` (radians a second) or `60rpm`
    #[arg(long, value_name = "RATE", value_parser = parse_with(spin))]
    pub spin: Option<Quantity>,

    /// Its axis, right-handed: x, y, z, with a sign if need be, or a vector such as `1,1,0` [default: z]
    #[arg(long, value_name = "AXIS", value_parser = direction, requires = "spin", allow_hyphen_values = true)]
    pub about: Option<Point>,
}

impl MotionOptions {
    /// The motion, if one was asked for.
    pub fn motion(&self) -> Option<PrescribedMotion> {
        if self.speed.is_none() && self.spin.is_none() {
            return None;
        }
        let vector = |size: &Option<Quantity>, direction: Point| {
            size.map_or_else(Point::zeros, |size| direction * size.value_si())
        };
        let uncertainty = |size: &Option<Quantity>| size.map_or(0.0, |size| size.relative_uncertainty());
        Some(PrescribedMotion {
            velocity: vector(&self.speed, self.along.unwrap_or_else(Point::x)),
            rotation: vector(&self.spin, self.about.unwrap_or_else(Point::z)),
            velocity_uncertainty: uncertainty(&self.speed),
            rotation_uncertainty: uncertainty(&self.spin),
        })
    }
}

fn speed(text: &str) -> Result<Quantity, slowmote::physical::QuantityError> {
    parse_speed(text)?.positive()
}

fn spin(text: &str) -> Result<Quantity, slowmote::physical::QuantityError> {
    parse_angular_speed(text)?.positive()
}
