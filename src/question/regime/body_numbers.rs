//! The numbers on a body: inertia, unsteadiness, slip, Brownian motion, softness, neighbours.

use std::f64::consts::{PI, TAU};

use super::answer::Concern;
use super::bounds::RegimeBody;
use super::evaluation::{Evaluation, Setting};
use super::given::{Given, Input};
use super::motion::{Motion, density_difference, weight};
use super::number::{Number, one_of, percent};
use crate::physical::quantity::{DisplayUnit, format_si};
use crate::question::answer::Verdict;
use crate::question::bands::{
    BLURRED_PECLET, Bands, KNUDSEN, PARTICLE_REYNOLDS, TURNING_REYNOLDS, slip_factor, sphere_curve_excess,
};

/// The drag of an oscillating body grows by `1 + R_h/delta`; up to 0.1 the next order is below 1 %, and beyond 1 the
/// layer around the body is thinner than the body.
const UNSTEADY: Bands = Bands::new(0.01, 0.1, 1.0);

/// A body lags behind by this share of the change it follows; beyond 1 it flies on. 0.01 for 1 %.
const PARTICLE_STOKES: Bands = Bands::new(0.01, 0.1, 1.0);

/// Above 100 a path is a path, below 1 diffusion rules. Common practice, no source.
const PECLET: Bands = Bands::new(BLURRED_PECLET, 1.0, 1.0);

/// Deformation is about the capillary number: 1 % is rigid, 5 % is not. Common practice, no source.
const RIGIDITY: Bands = Bands::new(0.01, 0.01, 0.05);

/// Batchelor's 6.55 phi is 1 % at 0.15 %, 20 % at 3 %; beyond 10 % nothing dilute is left. The first from the law, the
/// others a choice of this program.
const CROWDING: Bands = Bands::new(0.0015, 0.03, 0.1);

/// Slowing of settling spheres by their neighbours, to first order in the volume fraction (G. K. Batchelor, J. Fluid
/// Mech. 52 (1972) 245).
const BATCHELOR: f64 = 6.55;

/// Convection against the body's own speed: 1 %, 10 %, and as fast. A choice of this program.
const CONVECTION: Bands = Bands::new(0.01, 0.1, 1.0);

/// The gap should be ten times the roughness; at the roughness bodies touch. A choice of this program.
const ROUGHNESS: Bands = Bands::new(0.1, 0.1, 1.0);

/// Rounder bodies than this have no orientation to speak of.
pub(super) const ROUND: f64 = 1.05;

/// Beyond this Re nothing of Stokes's law is left.
const INERTIA_RULES: f64 = 100.0;

/// Every number that applies to the body, or to bodies in general.
pub(super) fn body_numbers(
    setting: &Setting<'_>,
    given: &Given,
    body: Option<&RegimeBody>,
    state: &Evaluation,
) -> Vec<Number> {
    let mut numbers: Vec<Number> = state.motions.iter().map(particle_reynolds).collect();
    if let Some(body) = body {
        let single = [
            archimedes(given, body),
            turning(given, body, given.get(Input::Spin), "rotation Reynolds number", "rho Omega a^2 / mu"),
            turning(given, body, state.shear_rate, "shear Reynolds number", "rho gamma a^2 / mu"),
            unsteady(given, body),
            knudsen(setting, body),
            capillary(given, body, state),
            bond(given, body),
            particle_stokes(given, body, state),
            peclet(setting, given, body, state),
            rotational_peclet(setting, given, body, state),
            convection(state),
        ];
        numbers.extend(single.into_iter().flatten());
    }
    numbers.extend([crowding(given), roughness(given)].into_iter().flatten());
    numbers
}

fn particle_reynolds(motion: &Motion) -> Number {
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
    if by_force {
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
fn archimedes(given: &Given, body: &RegimeBody) -> Option<Number> {
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

fn turning(
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

fn unsteady(given: &Given, body: &RegimeBody) -> Option<Number> {
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

fn knudsen(setting: &Setting<'_>, body: &RegimeBody) -> Option<Number> {
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

/// Stress of the flow over the stiffness, for the strongest of the flows.
fn capillary(given: &Given, body: &RegimeBody, state: &Evaluation) -> Option<Number> {
    let viscosity = given.get(Input::Viscosity)?;
    let radius = body.enclosing_radius_m;
    let by_shear = state.shear_rate.map(|rate| rate * radius);
    let speeds = state.motions.iter().filter_map(|motion| motion.speed.map(|[_, fastest]| fastest));
    let speed = speeds.chain(by_shear).reduce(f64::max)?;
    let (value, formula) = match (given.get(Input::SurfaceStiffness), given.get(Input::BulkStiffness)) {
        (Some(surface), _) => (viscosity * speed / surface, "mu U / sigma, mu gamma a / G_s"),
        (None, Some(bulk)) => (viscosity * speed / (body.radius_at_least_m * bulk), "mu gamma / G, mu U / (a G)"),
        (None, None) => return None,
    };
    Some(rigidity("capillary number", formula, value))
}

fn bond(given: &Given, body: &RegimeBody) -> Option<Number> {
    let pressure = density_difference(given)?.abs() * given.get(Input::Acceleration)? * body.enclosing_radius_m;
    let value = pressure * body.enclosing_radius_m / given.get(Input::SurfaceStiffness)?;
    Some(rigidity("Bond number", "|drho| g a^2 / sigma", value))
}

fn rigidity(name: &'static str, formula: &'static str, value: f64) -> Number {
    let meaning = one_of(
        RIGIDITY.verdict(value),
        [
            "the body keeps its shape",
            "the body keeps its shape nearly",
            "the body begins to yield: its shape and its drag change by some percent",
            "the body is not rigid; the drag of a rigid one is no answer",
        ],
    );
    Number { name, formula, concern: Concern::Body, value, other_end: None, bands: RIGIDITY, meaning }
}

/// `tau_p` times the fastest rate of change that is known, `tau_p = (mass + half the displaced mass) / (6 pi mu R_h)`.
fn particle_stokes(given: &Given, body: &RegimeBody, state: &Evaluation) -> Option<Number> {
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
fn peclet(setting: &Setting<'_>, given: &Given, body: &RegimeBody, state: &Evaluation) -> Option<Number> {
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

fn rotational_peclet(
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
fn convection(state: &Evaluation) -> Option<Number> {
    let speed = state.convection?;
    let speeds = state.motions.iter().filter_map(|motion| motion.speed);
    let [slowest, fastest] = speeds.min_by(|a, b| a[0].total_cmp(&b[0]))?;
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

fn crowding(given: &Given) -> Option<Number> {
    let value = given.get(Input::Concentration)?;
    let slowing = percent(BATCHELOR * value);
    let meaning = match CROWDING.verdict(value) {
        Verdict::Creeping => "each body is alone".to_owned(),
        Verdict::Corrected => format!("neighbours slow the settling by about {slowing} (spheres, Batchelor 1972)"),
        Verdict::Doubtful => "neighbours slow the settling by a third or more; no law of single bodies holds".to_owned(),
        Verdict::Outside => "the bodies are a suspension; the drag of a single one is no answer".to_owned(),
    };
    Some(Number {
        name: "volume fraction",
        formula: "phi",
        concern: Concern::Body,
        value,
        other_end: None,
        bands: CROWDING,
        meaning,
    })
}

fn roughness(given: &Given) -> Option<Number> {
    let value = given.get(Input::Roughness)? / given.get(Input::Gap)?;
    let meaning = one_of(
        ROUGHNESS.verdict(value),
        [
            "the gap is wide against the roughness",
            "the gap is wide against the roughness",
            "the roughness fills a part of the gap, which smooth surfaces don't know of",
            "the surfaces touch: lubrication ends at the roughness",
        ],
    );
    Some(Number {
        name: "roughness over gap",
        formula: "roughness / gap",
        concern: Concern::Body,
        value,
        other_end: None,
        bands: ROUGHNESS,
        meaning,
    })
}
