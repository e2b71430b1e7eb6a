//! Body, channel and motions as the answer has them.

use super::answer::{ChannelAnswer, RegimeBodyAnswer, RegimeMotion};
use super::bounds::RegimeBody;
use super::channel::{Channel, Section};
use super::evaluation::{Evaluation, MEAN_SPEED, PRESSURE, PRESSURE_DROP, Uncertainties, WALL_SHEAR};
use super::given::{Given, Input};
use super::motion::{Cause, Motion, weight};

pub(super) fn body_answer(body: &RegimeBody, given: &Given) -> RegimeBodyAnswer {
    RegimeBodyAnswer {
        name: body.name.clone(),
        size_m: body.size_m,
        volume_m3: body.volume_m3,
        size_relative_uncertainty: body.scale.relative_uncertainty(),
        enclosing_radius_m: body.enclosing_radius_m,
        hydrodynamic_radius_at_least_m: body.radius_at_least_m,
        hydrodynamic_radius_at_most_m: body.radius_at_most_m,
        density_kg_m3: given.get(Input::BodyDensity),
        notes: body.notes.clone(),
    }
}

pub(super) fn channel_answer(
    channel: &Channel,
    state: &Evaluation,
    given: &Given,
    uncertainties: &Uncertainties,
) -> ChannelAnswer {
    let (width, height) = match channel.section {
        Section::Tube => (Some(channel.narrow), channel.narrow),
        Section::Slot => (None, channel.narrow),
        Section::Duct => (given.get(Input::Width), given.get(Input::Height).unwrap_or(channel.narrow)),
    };
    let flow = state.flow;
    let relative = |name| flow.and_then(|_| uncertainties.relative(name));
    let pressure = if channel.length.is_some() { PRESSURE_DROP } else { PRESSURE };
    let viscosity = given.get(Input::Viscosity).unwrap_or(f64::NAN);
    ChannelAnswer {
        section: channel.section.word().to_owned(),
        width_m: width,
        height_m: height,
        length_m: channel.length,
        bend_radius_m: channel.bend_radius,
        hydraulic_diameter_m: channel.hydraulic_diameter(),
        mean_speed_m_per_s: flow.map(|flow| flow.mean_speed),
        speed_relative_uncertainty: relative(MEAN_SPEED),
        largest_speed_m_per_s: flow.map(|flow| flow.largest_speed),
        flow_rate_m3_per_s: flow.and_then(|flow| flow.flow_rate),
        reynolds: flow.map(|flow| flow.reynolds),
        pressure_gradient_pa_per_m: flow.map(|flow| flow.pressure_gradient),
        pressure_drop_pa: flow.zip(channel.length).map(|(flow, length)| flow.pressure_gradient * length),
        pressure_relative_uncertainty: relative(pressure),
        wall_shear_rate_per_s: flow.map(|flow| flow.largest_wall_shear),
        mean_wall_shear_rate_per_s: flow.map(|flow| flow.mean_wall_shear),
        wall_shear_stress_pa: flow.map(|flow| viscosity * flow.largest_wall_shear),
        shear_relative_uncertainty: relative(WALL_SHEAR),
        entry_length_m: flow.map(|flow| flow.entry_length),
    }
}

pub(super) fn motion_answers(
    state: &Evaluation,
    given: &Given,
    body: Option<&RegimeBody>,
    uncertainties: &Uncertainties,
) -> Vec<RegimeMotion> {
    let answer = |motion: &Motion| RegimeMotion {
        cause: motion.cause.word().to_owned(),
        reynolds_name: motion.cause.number_name().to_owned(),
        force_n: match motion.cause {
            Cause::Weight => body.and_then(|body| weight(given, body)),
            _ => motion.force,
        },
        speed_at_least_m_per_s: motion.speed.map(|[slowest, _]| slowest),
        speed_at_most_m_per_s: motion.speed.map(|[_, fastest]| fastest),
        speed_relative_uncertainty: motion.speed.and_then(|_| uncertainties.relative(motion.cause.word())),
    };
    state.motions.iter().map(answer).collect()
}
