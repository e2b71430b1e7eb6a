//! The numbers that tell whether the flow around the body is creeping: inertia, unsteadiness, slip.

use std::f64::consts::{PI, TAU};

use super::answer::Concern;
use super::bounds::RegimeBody;
use super::evaluation::Setting;
use super::given::{Given, Input};
use super::motion::{Motion, weight};
use super::number::{Number, one_of, percent};
use crate::question::answer::Verdict;
use crate::question::bands::{Bands, KNUDSEN, PARTICLE_REYNOLDS, TURNING_REYNOLDS, slip_factor, sphere_curve_excess};

/// The drag of an oscillating body grows by `1 + R_h/delta`; up to 0.1 the next order is below 1 %, and beyond 1 the
/// layer around the body is thinner than the body.
const UNSTEADY: Bands = Bands::new(0.01, 0.1, 1.0);

/// Beyond this Re nothing of Stokes's law is left.
const INERTIA_RULES: f64 = 100.0;

pub(super) fn particle_reynolds(motion: &Motion, body: Option<&RegimeBody>) -> Number {
    let [least, most] = motion.reynolds;
    let verdict = PARTICLE_REYNOLDS.verdict(most);
    let excess = percent(sphere_curve_excess(most));
    let by_force = motion.force.is_some();
    let mut meaning = match verdict {
        Verdict::Creeping => "inertia adds less than 1 % to the drag".to_owned(),
        Verdict::Corrected if by_force => format!("inertia slows the body by about {excess}; correct for it"),
        Verdict::Corrected => format!("inertia adds about {excess} to the drag; correct for it"),
        Verdict::Doubtful => format!("inertia adds 5 to 20 % to the drag ({excess} for a sphere)"),
        Verdict::Outside if most > INERTIA_RULES => "inertia rules; Stokes's law says nothing here".to_owned(),
        Verdict::Outside => "inertia is as strong as viscosity; Stokes's drag is far too low".to_owned(),
    };
    if by_force && verdict < Verdict::Outside && !body.is_some_and(RegimeBody::is_sphere) {
        meaning += "; exact for any shape, as the radius cancels";
    }
    Number {
        name: motion.cause.number_name(),
        formula: if by_force { "rho F / (3 pi mu^2)" } else { "2 rho U R_h / mu" },
        concern: Concern::Flow,
        value: most,
        other_end: None,
        bands: PARTICLE_REYNOLDS,
        meaning,
    }
    .with_other_end(least)
}

/// `Ar = rho |drho| g d^3 / mu^2` with the diameter of the equal-volume sphere: eighteen times Stokes's Re_h, for every
/// shape.
pub(super) fn archimedes(given: &Given, body: &RegimeBody) -> Option<Number> {
    let (density, viscosity) = (given.get(Input::FluidDensity)?, given.get(Input::Viscosity)?);
    let value = density * weight(given, body)?.abs() * 6.0 / (PI * viscosity * viscosity);
    let bands = PARTICLE_REYNOLDS.times(18.0);
    let meaning = one_of(
        bands.verdict(value),
        [
            "the body settles in creeping flow",
            "inertia slows the settling a little",
            "inertia slows the settling; Stokes's law is too fast",
            "the body settles far slower than by Stokes's law",
        ],
    );
    Some(Number {
        name: "Archimedes number",
        formula: "rho |drho| g d^3 / mu^2",
        concern: Concern::Flow,
        value,
        other_end: None,
        bands,
        meaning,
    })
}

pub(super) fn turning(
    given: &Given,
    body: &RegimeBody,
    rate: Option<f64>,
    name: &'static str,
    formula: &'static str,
) -> Option<Number> {
    let scale = given.get(Input::FluidDensity)? * rate? / given.get(Input::Viscosity)?;
    let value = scale * body.enclosing_radius_m.powi(2);
    let sentences = if name.starts_with("rotation") {
        [
            "the turning body drives no secondary flow that matters",
            "the turning body drives a weak secondary flow",
            "the turning body begins to drive a secondary flow, which adds to the torque",
            "the turning body flings fluid outwards; Stokes's torque is too low",
        ]
    } else {
        [
            "the shear around the body is that of creeping flow",
            "inertia acts in the shear around the body a little",
            "inertia acts in the shear around the body: it drifts across the flow, and turns otherwise than computed",
            "inertia rules the shear around the body; it drifts across the flow",
        ]
    };
    let meaning = one_of(TURNING_REYNOLDS.verdict(value), sentences);
    let number =
        Number { name, formula, concern: Concern::Flow, value, other_end: None, bands: TURNING_REYNOLDS, meaning };
    Some(number.with_other_end(scale * body.radius_at_least_m.powi(2)))
}

pub(super) fn unsteady(given: &Given, body: &RegimeBody) -> Option<Number> {
    let kinematic = given.get(Input::Viscosity)? / given.get(Input::FluidDensity)?;
    let depth = (2.0 * kinematic / (TAU * given.get(Input::Frequency)?)).sqrt();
    let value = body.radius_at_most_m / depth;
    let meaning = match UNSTEADY.verdict(value) {
        Verdict::Creeping => "the flow follows the oscillation at once".to_owned(),
        Verdict::Corrected => format!("the oscillation adds about {} to the drag", percent(value)),
        Verdict::Doubtful => "the fluid lags behind the oscillation, which adds tens of percent to the drag".to_owned(),
        Verdict::Outside => "the layer that follows the oscillation is thinner than the body".to_owned(),
    };
    let number = Number {
        name: "unsteady number",
        formula: "a / delta, delta = sqrt(2 nu / omega)",
        concern: Concern::Flow,
        value,
        other_end: None,
        bands: UNSTEADY,
        meaning,
    };
    Some(number.with_other_end(body.radius_at_least_m / depth))
}

pub(super) fn knudsen(setting: &Setting<'_>, body: &RegimeBody) -> Option<Number> {
    let path = setting.mean_free_path?;
    let value = path / body.radius_at_least_m;
    let slip = slip_factor(value);
    let meaning = match KNUDSEN.verdict(value) {
        Verdict::Creeping => "the gas sticks to the body as a liquid would".to_owned(),
        Verdict::Corrected => format!("the gas slips a little: divide drags by about {slip:.3}"),
        Verdict::Doubtful => format!("the gas slips: divide drags by about {slip:.2}, the factor of a sphere"),
        Verdict::Outside => "molecules hit the body one by one; the flow of a continuum is no answer".to_owned(),
    };
    let number = Number {
        name: "Knudsen number",
        formula: "lambda / R_h",
        concern: Concern::Flow,
        value,
        other_end: None,
        bands: KNUDSEN,
        meaning,
    };
    Some(number.with_other_end(path / body.radius_at_most_m))
}
