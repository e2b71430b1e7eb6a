//! The numbers that tell whether a body's path follows from its drag: its mass, Brownian motion, convection.

use std::f64::consts::{PI, TAU};

use super::answer::Concern;
use super::bounds::RegimeBody;
use super::evaluation::{Evaluation, Setting};
use super::given::{Given, Input};
use super::number::{Number, percent};
use crate::physical::quantity::{DisplayUnit, format_si};
use crate::question::answer::Verdict;
use crate::question::bands::{BLURRED_PECLET, Bands};

/// A body lags behind by this share of the change it follows; beyond 1 it flies on. 0.01 for 1 %.
const PARTICLE_STOKES: Bands = Bands::new(0.01, 0.1, 1.0);

/// Above 100 a path is a path, below 1 diffusion rules. Common practice, no source.
const PECLET: Bands = Bands::new(BLURRED_PECLET, 1.0, 1.0);

/// Convection against the body's own speed: 1 %, 10 %, and as fast. A choice of this program.
const CONVECTION: Bands = Bands::new(0.01, 0.1, 1.0);

/// Rounder bodies than this have no orientation to speak of.
pub(super) const ROUND: f64 = 1.05;

/// `tau_p` times the fastest rate of change that is known, `tau_p = (mass + half the displaced mass) / (6 pi mu R_h)`.
pub(super) fn particle_stokes(given: &Given, body: &RegimeBody, state: &Evaluation) -> Option<Number> {
    let mass = (given.get(Input::BodyDensity)? + 0.5 * given.get(Input::FluidDensity)?) * body.volume_m3;
    let across = state.channel.zip(state.flow).map(|(channel, flow)| flow.mean_speed / channel.hydraulic_diameter());
    let oscillation = given.get(Input::Frequency).map(|frequency| TAU * frequency);
    let rate = [across, given.get(Input::ShearRate), oscillation].into_iter().flatten().reduce(f64::max)?;
    let number = |radius: f64| rate * mass / (6.0 * PI * given.get(Input::Viscosity).unwrap_or(f64::NAN) * radius);
    let value = number(body.radius_at_least_m);
    let meaning = match PARTICLE_STOKES.verdict(value) {
        Verdict::Creeping => "the body follows the flow without delay".to_owned(),
        Verdict::Corrected => format!("the body lags behind changes of the flow by about {}", percent(value)),
        Verdict::Doubtful => "the body lags behind changes of the flow: its path needs its mass".to_owned(),
        Verdict::Outside => "the body flies on where the flow turns".to_owned(),
    };
    let number_at_most = number(body.radius_at_most_m);
    let number = Number {
        name: "particle Stokes number",
        formula: "tau_p U / L",
        concern: Concern::Path,
        value,
        other_end: None,
        bands: PARTICLE_STOKES,
        meaning,
    };
    Some(number.with_other_end(number_at_most))
}

/// `U a / D` of the slowest motion, with the smallest radius.
pub(super) fn peclet(setting: &Setting<'_>, given: &Given, body: &RegimeBody, state: &Evaluation) -> Option<Number> {
    let speeds = state.motions.iter().filter_map(|motion| motion.speed);
    let [slowest, fastest] = speeds.min_by(|a, b| a[0].total_cmp(&b[0]))?;
    let diffusion =
        |radius: f64| given.get(Input::Viscosity).map(|mu| setting.thermal_energy / (6.0 * PI * mu * radius));
    let (least, most) = (body.radius_at_least_m, body.radius_at_most_m);
    // For a given force the radius of the speed cancels that of the diffusion.
    let by_force = slowest < fastest;
    let value = if by_force { slowest * least / diffusion(most)? } else { slowest * least / diffusion(least)? };
    let other = if by_force { fastest * most / diffusion(least)? } else { fastest * most / diffusion(most)? };
    Some(brownian("Peclet number", "U a / D", value, "the path").with_other_end(other))
}

pub(super) fn rotational_peclet(
    setting: &Setting<'_>,
    given: &Given,
    body: &RegimeBody,
    state: &Evaluation,
) -> Option<Number> {
    let rate = state.shear_rate.filter(|_| body.aspect() > ROUND)?;
    let scale = 8.0 * PI * given.get(Input::Viscosity)? * rate / setting.thermal_energy;
    let number = |radius: f64| scale * radius.powi(3);
    let value = number(body.radius_at_least_m);
    let number_at_most = number(body.enclosing_radius_m);
    Some(brownian("rotational Peclet number", "gamma / D_r", value, "the orientation").with_other_end(number_at_most))
}

fn brownian(name: &'static str, formula: &'static str, value: f64, what: &str) -> Number {
    let meaning = match PECLET.verdict(value) {
        Verdict::Creeping => format!("Brownian motion does not blur {what}"),
        Verdict::Corrected => format!("Brownian motion blurs {what}; speeds are means"),
        Verdict::Doubtful | Verdict::Outside => format!("Brownian motion rules {what}; speeds are means"),
    };
    Number { name, formula, concern: Concern::Path, value, other_end: None, bands: PECLET, meaning }
}

/// Convection against the slowest motion of the body.
pub(super) fn convection(state: &Evaluation) -> Option<Number> {
    let speed = state.convection?;
    let speeds = state.motions.iter().filter_map(|motion| motion.speed);
    // A body that floats has no speed to compare with.
    let [slowest, fastest] = speeds.filter(|[slowest, _]| *slowest > 0.0).min_by(|a, b| a[0].total_cmp(&b[0]))?;
    let value = speed / slowest;
    let text = format_si(speed, DisplayUnit::SPEED, 2);
    let meaning = match CONVECTION.verdict(value) {
        Verdict::Creeping => format!("convection at up to {text} carries the body no distance that matters"),
        Verdict::Corrected => format!("convection at up to {text} changes the path a little"),
        Verdict::Doubtful => format!("convection at up to {text} disturbs the path"),
        Verdict::Outside => format!("convection at up to {text} is faster than the body: even out the temperature"),
    };
    let number = Number {
        name: "thermal convection over speed",
        formula: "g beta dT W^2 / (72 sqrt(3) nu U)",
        concern: Concern::Path,
        value,
        other_end: None,
        bands: CONVECTION,
        meaning,
    };
    Some(number.with_other_end(speed / fastest))
}
