//! How fast the body moves through the fluid, for each cause that is known.
//!
//! A force makes `Re_h = 2 rho U R_h / mu` with `U = F / (6 pi mu R_h)`: the radius cancels, and
//!
//! ```text
//! Re_h = rho F / (3 pi mu^2)
//! ```
//!
//! is exact for a body of any shape and size, with F the force along the motion.

use std::f64::consts::PI;

use super::bounds::RegimeBody;
use super::given::{Given, Input};

/// What moves the body through the fluid.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Cause {
    Speed,
    Flow,
    Force,
    Weight,
}

impl Cause {
    pub(super) fn word(self) -> &'static str {
        match self {
            Self::Speed => "speed",
            Self::Flow => "flow",
            Self::Force => "force",
            Self::Weight => "weight",
        }
    }

    pub(super) fn number_name(self) -> &'static str {
        match self {
            Self::Speed => "particle Reynolds number",
            Self::Flow => "particle Reynolds number of the flow",
            Self::Force => "particle Reynolds number of the force",
            Self::Weight => "particle Reynolds number of settling",
        }
    }
}

/// A motion through the fluid by Stokes's law, SI units.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Motion {
    pub cause: Cause,
    /// The driving force, without sign; none if the speed is given.
    pub force: Option<f64>,
    /// Slowest and fastest speed; none for a force on a body of unknown size.
    pub speed: Option<[f64; 2]>,
    /// Smallest and largest Re_h; the same for a force.
    pub reynolds: [f64; 2],
}

/// Every motion that is known.
pub(super) fn motions(given: &Given, body: Option<&RegimeBody>) -> Vec<Motion> {
    let (Some(viscosity), Some(density)) = (given.get(Input::Viscosity), given.get(Input::FluidDensity)) else {
        return Vec::new();
    };
    let by_speed = |cause: Cause, speed: f64| {
        let reynolds = |radius: f64| 2.0 * density * speed * radius / viscosity;
        let body = body?;
        let reynolds = [reynolds(body.radius_at_least_m), reynolds(body.radius_at_most_m)];
        Some(Motion { cause, force: None, speed: Some([speed; 2]), reynolds })
    };
    let by_force = |cause: Cause, force: f64| {
        let speed = |radius: f64| force / (6.0 * PI * viscosity * radius);
        let speed = body.map(|body| [speed(body.radius_at_most_m), speed(body.radius_at_least_m)]);
        let reynolds = density * force / (3.0 * PI * viscosity * viscosity);
        Motion { cause, force: Some(force), speed, reynolds: [reynolds; 2] }
    };
    let speed = given.get(Input::Speed).and_then(|speed| by_speed(Cause::Speed, speed));
    let flow = given.get(Input::UniformSpeed).and_then(|speed| by_speed(Cause::Flow, speed));
    let force = given.get(Input::Force).map(|force| by_force(Cause::Force, force));
    let weight = body.and_then(|body| weight(given, body)).map(|force| by_force(Cause::Weight, force.abs()));
    [speed, flow, force, weight].into_iter().flatten().collect()
}

/// Weight less buoyancy, N, negative for a body that rises.
pub(super) fn weight(given: &Given, body: &RegimeBody) -> Option<f64> {
    Some(density_difference(given)? * body.volume_m3 * given.get(Input::Acceleration)?)
}

/// Density of the body less that of the fluid, kg/m3.
pub(super) fn density_difference(given: &Given) -> Option<f64> {
    Some(given.get(Input::BodyDensity)? - given.get(Input::FluidDensity)?)
}
