//! The question of `regime`: what is known, whether it fits together, and the answer.

use thiserror::Error;

use super::answer::{
    ChannelAnswer, Concern, REGIME_SCHEMA, RegimeAnswer, RegimeBodyAnswer, RegimeMotion, RegimeNumber, RegimeValidity,
    Untold,
};
use super::body_numbers::ROUND;
use super::bounds::RegimeBody;
use super::cautions::cautions;
use super::channel::{Channel, Section};
use super::evaluation::{
    Evaluation, MEAN_SPEED, PRESSURE, PRESSURE_DROP, Setting, Uncertainties, WALL_SHEAR,
};
use super::given::{Flow, Given, Input};
use super::motion::{Cause, weight};
use super::number::Number;
use crate::physical::constants::STANDARD_GRAVITY_M_PER_S2;
use crate::physical::quantity::{DisplayUnit, format_si};
use crate::physical::{Dimension, Fluid, Material, Quantity};
use crate::question::answer::Verdict;
use crate::question::bands::SPEED_LIMIT_REYNOLDS;

/// What is known; nothing of it is solved.
#[derive(Debug, Clone)]
pub struct RegimeQuestion {
    /// The fluid.
    pub fluid: Fluid,
    /// The body.
    pub body: Option<RegimeBody>,
    /// What the body is made of; its density stands in `given`.
    pub material: Option<&'static Material>,
    /// The channel; its sizes stand in `given`.
    pub channel: Option<Section>,
    /// The background flow; its speed stands in `given`.
    pub flow: Option<Flow>,
    /// Whether the acceleration in `given` is that of a centrifuge.
    pub centrifuge: bool,
    /// The quantities.
    pub given: Given,
}

/// Why the question makes no sense.
#[derive(Debug, Clone, PartialEq, Eq, Error)]
#[non_exhaustive]
pub enum RegimeError {
    /// Nothing to tell a number from.
    #[error("there is neither a body nor a channel nor a force")]
    Nothing,
    /// A quantity that only makes sense together with another.
    #[error("{what} needs {partner}")]
    Alone {
        /// What was given.
        what: &'static str,
        /// What is missing.
        partner: &'static str,
        /// How to give it.
        hint: &'static str,
    },
    /// A flow through another channel than the one given.
    #[error("the flow is one through a {flow}, and the channel is a {channel}")]
    OtherChannel {
        /// The flow.
        flow: &'static str,
        /// The channel.
        channel: &'static str,
    },
    /// A flow that does not obey the walls.
    #[error("a {flow} flow does not obey the walls of a {channel}")]
    ThroughWalls {
        /// The flow.
        flow: &'static str,
        /// The channel.
        channel: &'static str,
    },
    /// A slot has no ends, and so no flow rate.
    #[error("a slot has no width, so a flow rate says nothing of its speed")]
    RateInSlot,
    /// The body is larger than the channel.
    #[error("the body, {body}, does not fit into the {channel}, {space}")]
    DoesNotFit {
        /// Its size in words.
        body: String,
        /// The channel.
        channel: &'static str,
        /// Its size in words.
        space: String,
    },
}

impl RegimeError {
    /// What the user can do next.
    pub fn hint(&self) -> String {
        match self {
            Self::Nothing => "give a body such as `rod:12x2um`, a size such as `--size 10um`, a channel such as `--in \
                              tube:diameter=50um`, or a force such as `--force 2pN`"
                .to_owned(),
            Self::Alone { hint, .. } => (*hint).to_owned(),
            Self::OtherChannel { channel, .. } => format!("write `--flow {channel}:mean=1mm/s`"),
            Self::ThroughWalls { channel, .. } => {
                format!("write `--flow {channel}:mean=1mm/s`, or leave `--in` out for a flow without walls")
            }
            Self::RateInSlot => {
                "give its mean speed, `--flow slot:mean=1mm/s`, or make it a duct, `--in duct:width=1mm,height=20um`"
                    .to_owned()
            }
            Self::DoesNotFit { .. } => {
                "check the units of both; sizes are full dimensions, diameters and no radii".to_owned()
            }
        }
    }
}

/// Speed or force, body, and what is missed without them.
const A_BODY: &str = "give the body, such as `rod:12x2um`, or its size, `--size 10um`";

impl RegimeQuestion {
    /// The answer.
    ///
    /// # Errors
    /// [`RegimeError`]: what was given does not fit together.
    pub fn answer(&self) -> Result<RegimeAnswer, RegimeError> {
        self.check()?;
        let given = self.completed();
        let setting = Setting {
            body: self.body.as_ref(),
            section: self.channel,
            thermal_energy: self.fluid.thermal_energy_j(),
            mean_free_path: self.fluid.mean_free_path_m(),
            thermal_expansion: self.fluid.thermal_expansion_per_k(),
        };
        let state = Evaluation::of(&setting, &given);
        self.check_fit(state.channel.as_ref())?;
        let uncertainties = Uncertainties::of(&setting, &given, &state);
        let body = self.body.as_ref();
        Ok(RegimeAnswer {
            schema: REGIME_SCHEMA.to_owned(),
            fluid: (&self.fluid).into(),
            body: body.map(|body| body_answer(body, &given)),
            channel: state.channel.map(|channel| channel_answer(&channel, &state, &given, &uncertainties)),
            motions: motion_answers(&state, &given, body, &uncertainties),
            shear_rate_per_s: state.shear_rate,
            acceleration_m_per_s2: given.get(Input::Acceleration).unwrap_or(STANDARD_GRAVITY_M_PER_S2),
            convection_speed_m_per_s: state.convection,
            validity: self.validity(&state, &uncertainties),
            cautions: cautions(&self.fluid, body, self.material, self.centrifuge, &given, &state),
            questions_left: self.questions_left(),
        })
    }

    fn check(&self) -> Result<(), RegimeError> {
        let has = |input| self.given.has(input);
        let alone = |what, partner, hint| Err(RegimeError::Alone { what, partner, hint });
        let body = self.body.is_some();
        match (self.flow, self.channel) {
            (Some(Flow::Through(flow)), Some(channel)) if flow != channel => {
                return Err(RegimeError::OtherChannel { flow: flow.word(), channel: channel.word() });
            }
            (Some(Flow::Shear), Some(channel)) => {
                return Err(RegimeError::ThroughWalls { flow: "shear", channel: channel.word() });
            }
            (Some(Flow::Uniform), Some(channel)) => {
                return Err(RegimeError::ThroughWalls { flow: "uniform", channel: channel.word() });
            }
            (Some(Flow::Through(Section::Tube)), None) => {
                return alone("the flow through a tube", "the tube", "give it, `--in tube:diameter=50um`");
            }
            (Some(Flow::Through(Section::Slot)), None) => {
                return alone("the flow through a slot", "the slot", "give it, `--in slot:height=20um`");
            }
            (Some(Flow::Through(Section::Duct)), None) => {
                return alone("the flow through a duct", "the duct", "give it, `--in duct:width=100um,height=40um`");
            }
            _ => {}
        }
        if self.channel == Some(Section::Slot) && has(Input::FlowRate) {
            return Err(RegimeError::RateInSlot);
        }
        let needs_body = [
            (Input::Speed, "a speed"),
            (Input::UniformSpeed, "a uniform flow"),
            (Input::ShearRate, "a shear flow"),
            (Input::Spin, "a spin"),
            (Input::BodyDensity, "the body's density"),
            (Input::SurfaceStiffness, "a stiffness"),
            (Input::BulkStiffness, "a stiffness"),
        ];
        for (input, what) in needs_body {
            if has(input) && !body {
                return alone(what, "a body", A_BODY);
            }
        }
        if !body && self.channel.is_none() && !has(Input::Force) {
            return Err(RegimeError::Nothing);
        }
        if has(Input::Frequency) && !body && self.channel.is_none() {
            return alone("a frequency", "a body or a channel", A_BODY);
        }
        if self.centrifuge && !has(Input::BodyDensity) {
            let hint = "give `--body-density 1.05g/mL`, or `--material polystyrene`";
            return alone("a centrifuge", "the density of the body", hint);
        }
        let width = has(Input::ChamberWidth) || self.channel.is_some();
        if has(Input::TemperatureDifference) && !width {
            let hint = "give the distance between the warm and the cold side, `--chamber 1mm`";
            return alone("a difference of temperature", "the width of the chamber", hint);
        }
        if has(Input::ChamberWidth) && !has(Input::TemperatureDifference) {
            let hint = "give it, `--temperature-difference 0.1K`";
            return alone("the width of the chamber", "the difference of temperature across it", hint);
        }
        match (has(Input::Gap), has(Input::Roughness)) {
            (true, false) => alone("a gap", "the roughness", "give it, `--roughness 10nm`"),
            (false, true) => alone("a roughness", "the gap", "give it, `--gap 200nm`"),
            _ => Ok(()),
        }
    }

    fn check_fit(&self, channel: Option<&Channel>) -> Result<(), RegimeError> {
        let (Some(body), Some(channel)) = (&self.body, channel) else { return Ok(()) };
        if channel.admits(body.size_m) {
            return Ok(());
        }
        let length = |metres: f64| format_si(metres, DisplayUnit::LENGTH, 3);
        let space = match channel.section {
            Section::Tube => format!("{} across", length(channel.narrow)),
            Section::Slot => format!("{} high", length(channel.narrow)),
            Section::Duct => format!("{} by {}", length(channel.wide), length(channel.narrow)),
        };
        let body = body.size_m.map(length).join(" x ");
        Err(RegimeError::DoesNotFit { body, channel: channel.section.word(), space })
    }

    /// What was given, with what the fluid, the body and the earth add to it.
    fn completed(&self) -> Given {
        let mut given = self.given.clone();
        let relative = |value: f64, relative: f64, dimension| Quantity::trusted(value, relative * value, dimension);
        let fluid = &self.fluid;
        let viscosity =
            relative(fluid.viscosity_pa_s(), fluid.viscosity_relative_uncertainty(), Dimension::VISCOSITY);
        let density = relative(fluid.density_kg_m3(), fluid.density_relative_uncertainty(), Dimension::DENSITY);
        given.set(Input::Viscosity, viscosity);
        given.set(Input::FluidDensity, density);
        given.set_some(Input::BodyScale, self.body.as_ref().map(|body| body.scale));
        if !given.has(Input::Acceleration) {
            let gravity = Quantity::trusted(STANDARD_GRAVITY_M_PER_S2, 0.0, Dimension::ACCELERATION);
            given.set(Input::Acceleration, gravity);
        }
        given
    }

    fn validity(&self, state: &Evaluation, uncertainties: &Uncertainties) -> RegimeValidity {
        let numbers: Vec<RegimeNumber> =
            state.numbers.iter().map(|number| number_answer(number, uncertainties)).collect();
        let on_path = |number: &&RegimeNumber| number.concerns == Concern::Path;
        let on_flow = |number: &&RegimeNumber| number.concerns != Concern::Path;
        // The first of equally bad ones decides.
        let decisive = numbers.iter().filter(on_flow).rev().max_by_key(|number| number.verdict);
        let path = numbers.iter().filter(on_path).rev().max_by_key(|number| number.verdict);
        let (viscosity, density) = (self.fluid.viscosity_pa_s(), self.fluid.density_kg_m3());
        let speed_limit =
            |body: &RegimeBody| SPEED_LIMIT_REYNOLDS * viscosity / (2.0 * density * body.radius_at_most_m);
        let mut notes = close_calls(&numbers, decisive.map(|number| number.verdict));
        notes.extend(self.notes(state));
        RegimeValidity {
            verdict: decisive.map(|number| number.verdict),
            decided_by: decisive.map(|number| number.name.clone()),
            path_verdict: path.map(|number| number.verdict),
            path_decided_by: path.map(|number| number.name.clone()),
            speed_limit_m_per_s: self.body.as_ref().map(speed_limit),
            force_limit_n: SPEED_LIMIT_REYNOLDS * 3.0 * std::f64::consts::PI * viscosity * viscosity / density,
            numbers,
            notes,
        }
    }

    fn notes(&self, state: &Evaluation) -> Vec<String> {
        let mut notes = Vec::new();
        let Some(body) = &self.body else { return notes };
        let reynolds = state.motions.iter().map(|motion| motion.reynolds[1]).fold(0.0, f64::max);
        if body.aspect() > ROUND && reynolds > 0.0 && reynolds <= 1.0 {
            let longest = body.size_m.into_iter().fold(0.0, f64::max);
            notes.push(format!(
                "Inertia turns a long or flat body broadside on a path of about {} (its length over the Reynolds \
                 number; Cox 1965, Khayat and Cox 1989): on longer ones the orientation is no result of Stokes flow.",
                format_si(longest / reynolds, DisplayUnit::LENGTH, 1)
            ));
        }
        if let Some((share, near)) = state.channel.as_ref().and_then(|channel| wall_share(body, channel)) {
            notes.push(format!(
                "The walls add {near} {} to the drag in the middle of the channel (first order, Brenner 1962), which \
                 the speeds here don't have.",
                super::number::percent(share)
            ));
        }
        notes
    }

    /// What was not told and would add to the answer, the most telling first.
    fn questions_left(&self) -> Vec<Untold> {
        let has = |input| self.given.has(input);
        let mut left = Vec::new();
        let mut ask = |missing: bool, what: &str, would_tell: &str| {
            if missing {
                left.push(Untold { what: what.to_owned(), would_tell: would_tell.to_owned() });
            }
        };
        let body = self.body.is_some();
        let channel = self.channel.is_some();
        let moved = [Input::Speed, Input::Force, Input::UniformSpeed, Input::BodyDensity].into_iter().any(has);
        ask(body && !moved, "--speed or --force", "particle Reynolds and Peclet numbers");
        ask(body && !has(Input::BodyDensity), "--body-density or --material", "settling, Archimedes and Stokes numbers");
        ask(!body, "a body, or --size", "every number on the body");
        ask(channel && self.flow.is_none(), "--flow", "speeds, pressure drop and shear rates in the channel");
        ask(channel && !has(Input::Length), "length= in --in", "pressure drop, entry and focusing lengths");
        ask(channel && !has(Input::BendRadius), "bend-radius= in --in", "Dean number, if it bends");
        ask(!has(Input::Frequency), "--frequency", "unsteady and Womersley numbers, if anything oscillates");
        ask(body && !has(Input::Concentration), "--concentration", "crowding, if there are many bodies");
        let stiffness = has(Input::SurfaceStiffness) || has(Input::BulkStiffness);
        ask(body && !stiffness, "--stiffness", "capillary number, if the body is soft");
        let heated = self.fluid.thermal_expansion_per_k().is_some() && !has(Input::TemperatureDifference);
        ask(body && heated, "--temperature-difference", "thermal convection");
        ask(body && !has(Input::Gap), "--gap and --roughness", "where lubrication ends, near a wall");
        left
    }
}

fn number_answer(number: &Number, uncertainties: &Uncertainties) -> RegimeNumber {
    let verdict = number.verdict();
    let relative = uncertainties.relative(number.name);
    // Beyond all bounds everything is possible, from nothing to twice the value.
    let spread = relative.unwrap_or(1.0) * number.value;
    let others = [number.value + spread, number.value - spread].map(|value| number.bands.verdict(value.max(0.0)));
    RegimeNumber {
        name: number.name.to_owned(),
        formula: number.formula.to_owned(),
        concerns: number.concern,
        value: number.value,
        value_at_best: number.other_end,
        relative_uncertainty: relative,
        largest_uncertainty: uncertainties.largest(number.name).map(str::to_owned),
        threshold: number.bands.creeping,
        verdict,
        may_be: others.into_iter().filter(|other| *other != verdict).max(),
        meaning: number.meaning.clone(),
    }
}

/// What there is to say where a verdict is within its uncertainty of a threshold, or hangs on the shape.
fn close_calls(numbers: &[RegimeNumber], verdict: Option<Verdict>) -> Vec<String> {
    let mut notes = Vec::new();
    let Some(verdict) = verdict else { return notes };
    for number in numbers.iter().filter(|number| number.concerns != Concern::Path) {
        let Some(other) = number.may_be else { continue };
        if number.verdict == verdict || other > verdict {
            let whose = number.largest_uncertainty.as_deref().unwrap_or("its input");
            notes.push(format!(
                "Within its uncertainty the {} may also be {}; what decides is {whose}.",
                number.name,
                other.word()
            ));
        }
    }
    notes
}

/// What the walls add to the drag of a body in the middle of a tube or slot, to first order: `k R_h / l`, and whether it
/// is about that or more.
///
/// H. Brenner, J. Fluid Mech. 12 (1962) 35, for any body: k = 2.1044 with the radius of a tube, 1.004 with half the height
/// of a slot. A duct lies between; its narrow side is taken as a slot's, which is too little.
fn wall_share(body: &RegimeBody, channel: &Channel) -> Option<(f64, &'static str)> {
    let k = if channel.section == Section::Tube { 2.1044 } else { 1.004 };
    let near = if channel.section == Section::Duct { "at least" } else { "about" };
    let share = k * body.radius_at_most_m / (0.5 * channel.narrow);
    // Beyond a half the first order is none.
    if share >= 0.5 {
        return Some((0.5, "more than"));
    }
    (share > 0.01).then_some((share, near))
}

fn body_answer(body: &RegimeBody, given: &Given) -> RegimeBodyAnswer {
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

fn channel_answer(
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

fn motion_answers(
    state: &Evaluation,
    given: &Given,
    body: Option<&RegimeBody>,
    uncertainties: &Uncertainties,
) -> Vec<RegimeMotion> {
    let answer = |motion: &super::motion::Motion| RegimeMotion {
        cause: motion.cause.word().to_owned(),
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
