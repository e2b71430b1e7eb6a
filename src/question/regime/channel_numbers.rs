//! The numbers on the flow in a channel, and on a body carried by it.

use std::f64::consts::{PI, TAU};

use super::answer::Concern;
use super::bounds::RegimeBody;
use super::channel::{Channel, ChannelFlow};
use super::evaluation::Evaluation;
use super::given::{Given, Input};
use super::number::{Number, one_of, percent};
use crate::question::answer::Verdict;
use crate::question::bands::Bands;

/// Below 1 creeping flow is usable at posts and bends too (strictly, below 0.1); straight stretches are exact as long as
/// the flow is laminar, up to about 2000; by 4000 it is turbulent. Common practice, no source.
const CHANNEL_REYNOLDS: Bands = Bands::new(1.0, 2000.0, 4000.0);

/// Below this channel Reynolds number creeping flow holds at posts and bends strictly. Common practice, no source.
const STRICT_CHANNEL_REYNOLDS: f64 = 0.1;

/// Share of the channel in which the flow still develops. A choice of this program.
const ENTRY: Bands = Bands::new(0.1, 0.5, 1.0);

/// Below 1 the secondary flow in a bend may be ignored; by 10 it stirs. The first common practice, the second a choice.
const DEAN: Bands = Bands::new(1.0, 1.0, 10.0);

/// Below 1 the profile follows the oscillation; by 3 it is flattened. The first common practice, the second a choice.
const WOMERSLEY: Bands = Bands::new(1.0, 1.0, 3.0);

/// Bodies of this share of the channel and more are focused, once `Re_c (d/D_h)^2` reaches about 1 (D. Di Carlo et al.,
/// Proc. Natl. Acad. Sci. 104 (2007) 18892).
const FOCUSED_SHARE: f64 = 0.07;
const FOCUSING: Bands = Bands::new(0.1, 0.1, 1.0);

/// A channel longer than a tenth of the focusing length moves bodies sideways visibly.
const FOCUSING_LENGTH: Bands = Bands::new(0.1, 0.1, 1.0);

/// Largest lift coefficient, which gives the shortest focusing length; 0.02 to 0.05 (E. S. Asmolov, J. Fluid Mech. 381
/// (1999) 63; D. Di Carlo, Lab Chip 9 (2009) 3038).
const LIFT_COEFFICIENT: f64 = 0.05;

/// Every number that applies to the channel.
pub(super) fn channel_numbers(given: &Given, body: Option<&RegimeBody>, state: &Evaluation) -> Vec<Number> {
    let Some(channel) = &state.channel else { return Vec::new() };
    let mut numbers = Vec::new();
    if let Some(flow) = &state.flow {
        numbers.push(reynolds(flow));
        numbers.extend(dean(channel, flow));
        numbers.extend(entry(channel, flow));
    }
    numbers.extend(womersley(given, channel));
    if let (Some(body), Some(flow)) = (body, &state.flow) {
        numbers.extend(focusing(body, channel, flow));
        numbers.extend(focusing_length(given, body, channel, flow));
    }
    numbers
}

fn reynolds(flow: &ChannelFlow) -> Number {
    let value = flow.reynolds;
    let sentence = match CHANNEL_REYNOLDS.verdict(value) {
        Verdict::Creeping if value < STRICT_CHANNEL_REYNOLDS => "the flow creeps, at posts and bends too",
        Verdict::Creeping => "the flow creeps; at posts and bends nearly, strictly below 0.1",
        Verdict::Corrected => "laminar: exact in straight stretches; at ends, posts and bends inertia counts",
        Verdict::Doubtful => "the flow may turn turbulent; pressure and shear rates hold while it is laminar",
        Verdict::Outside => "the flow is turbulent; the laminar pressure and shear rates are too low",
    };
    Number {
        name: "channel Reynolds number",
        formula: "rho U D_h / mu",
        concern: Concern::Flow,
        value,
        other_end: None,
        bands: CHANNEL_REYNOLDS,
        meaning: sentence.to_owned(),
    }
}

fn dean(channel: &Channel, flow: &ChannelFlow) -> Option<Number> {
    let value = flow.reynolds * (0.5 * channel.hydraulic_diameter() / channel.bend_radius?).sqrt();
    let meaning = one_of(
        DEAN.verdict(value),
        [
            "the bends drive no secondary flow that matters",
            "the bends drive a weak secondary flow",
            "the bends drive a secondary flow across the channel",
            "the secondary flow in the bends stirs the channel",
        ],
    );
    Some(Number {
        name: "Dean number",
        formula: "Re_c sqrt(D_h / (2 R_bend))",
        concern: Concern::Flow,
        value,
        other_end: None,
        bands: DEAN,
        meaning,
    })
}

fn entry(channel: &Channel, flow: &ChannelFlow) -> Option<Number> {
    let value = flow.entry_length / channel.length?;
    let meaning = match ENTRY.verdict(value) {
        Verdict::Creeping => "the flow is developed nearly everywhere".to_owned(),
        Verdict::Corrected => format!("the flow still develops over {} of the channel", percent(value)),
        Verdict::Doubtful => "the flow develops over most of the channel; the pressure drop is higher".to_owned(),
        Verdict::Outside => "the flow never develops; pressure drop and shear rates are higher".to_owned(),
    };
    Some(Number {
        name: "entry length over channel length",
        formula: "D_h [0.6 / (1 + 0.035 Re_c) + 0.056 Re_c] / L",
        concern: Concern::Flow,
        value,
        other_end: None,
        bands: ENTRY,
        meaning,
    })
}

fn womersley(given: &Given, channel: &Channel) -> Option<Number> {
    let kinematic = given.get(Input::Viscosity)? / given.get(Input::FluidDensity)?;
    // Half the height of a slot, half the hydraulic diameter of a tube or duct.
    let radius = 0.5 * if channel.wide.is_finite() { channel.hydraulic_diameter() } else { channel.narrow };
    let value = radius * (TAU * given.get(Input::Frequency)? / kinematic).sqrt();
    let meaning = one_of(
        WOMERSLEY.verdict(value),
        [
            "the profile follows the oscillation at once",
            "the profile follows the oscillation nearly",
            "the profile lags behind the oscillation",
            "the profile is flat but for thin layers at the walls",
        ],
    );
    Some(Number {
        name: "Womersley number",
        formula: "R sqrt(omega / nu)",
        concern: Concern::Flow,
        value,
        other_end: None,
        bands: WOMERSLEY,
        meaning,
    })
}

fn focusing(body: &RegimeBody, channel: &Channel, flow: &ChannelFlow) -> Option<Number> {
    let hydraulic = channel.hydraulic_diameter();
    let share = |radius: f64| 2.0 * radius / hydraulic;
    let (most, least) = (share(body.enclosing_radius_m), share(body.radius_at_least_m));
    if most < FOCUSED_SHARE {
        return None;
    }
    let value = flow.reynolds * most * most;
    let meaning = one_of(
        FOCUSING.verdict(value),
        [
            "inertia does not line bodies up across the channel",
            "inertia hardly lines bodies up across the channel",
            "inertia pushes bodies across the channel: where they travel is no result of Stokes flow",
            "inertia lines bodies up across the channel: where they travel is no result of Stokes flow",
        ],
    );
    let number = Number {
        name: "inertial focusing number",
        formula: "Re_c (d / D_h)^2",
        concern: Concern::Path,
        value,
        other_end: None,
        bands: FOCUSING,
        meaning,
    };
    Some(number.with_other_end(flow.reynolds * least * least))
}

fn focusing_length(given: &Given, body: &RegimeBody, channel: &Channel, flow: &ChannelFlow) -> Option<Number> {
    let hydraulic = channel.hydraulic_diameter();
    let (viscosity, density) = (given.get(Input::Viscosity)?, given.get(Input::FluidDensity)?);
    let length = channel.length?;
    let share = |radius: f64| {
        let drift = density * flow.largest_speed * (2.0 * radius).powi(2) * LIFT_COEFFICIENT;
        length * drift / (PI * viscosity * hydraulic * hydraulic)
    };
    let value = share(body.enclosing_radius_m);
    let meaning = one_of(
        FOCUSING_LENGTH.verdict(value),
        [
            "the channel is too short for inertia to move bodies across it",
            "the channel is nearly too short for inertia to move bodies across it",
            "the channel is long enough for inertia to move bodies sideways",
            "the channel is long enough for inertia to line bodies up",
        ],
    );
    let number = Number {
        name: "channel length over focusing length",
        formula: "L rho U_max d^2 f_L / (pi mu D_h^2)",
        concern: Concern::Path,
        value,
        other_end: None,
        bands: FOCUSING_LENGTH,
        meaning,
    };
    Some(number.with_other_end(share(body.radius_at_least_m)))
}
