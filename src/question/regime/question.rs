//! The question of `regime`: what is known, whether it fits together, and the answer.

use super::answer::{Concern, REGIME_SCHEMA, RegimeAnswer, RegimeNumber, RegimeValidity, Untold};
use super::bounds::RegimeBody;
use super::cautions::cautions;
use super::channel::{Channel, Section};
use super::check::RegimeError;
use super::evaluation::{Evaluation, Setting, Uncertainties};
use super::figures::{body_answer, channel_answer, motion_answers};
use super::given::{Flow, Given, Input};
use super::number::{Number, percent};
use super::path_numbers::ROUND;
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

/// Shares of limits closer than this are the same, but for rounding.
const ROUNDING: f64 = 1e-9;

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
        if !state.is_finite() {
            return Err(RegimeError::Beyond);
        }
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

    /// What was given, with what the fluid, the body and the earth add to it.
    fn completed(&self) -> Given {
        let mut given = self.given.clone();
        let relative = |value: f64, relative: f64, dimension| Quantity::trusted(value, relative * value, dimension);
        let fluid = &self.fluid;
        let viscosity = relative(fluid.viscosity_pa_s(), fluid.viscosity_relative_uncertainty(), Dimension::VISCOSITY);
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
        let decisive = worst(numbers.iter().filter(on_flow));
        let path = worst(numbers.iter().filter(on_path));
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
                percent(share)
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
        ask(
            body && !has(Input::BodyDensity),
            "--body-density or --material",
            "settling, Archimedes and Stokes numbers",
        );
        ask(!body, "a body, or --size", "every number on the body");
        ask(channel && self.flow.is_none(), "--flow", "speeds, pressure drop and shear rates in the channel");
        ask(channel && !has(Input::Length), "length= in --in", "pressure drop, entry and focusing lengths");
        ask(channel && !has(Input::BendRadius), "bend-radius= in --in", "Dean number, if it bends");
        ask(!has(Input::Frequency), "--frequency", "if anything oscillates");
        ask(body && !has(Input::Concentration), "--concentration", "if there are many bodies");
        let stiffness = has(Input::SurfaceStiffness) || has(Input::BulkStiffness);
        ask(body && !stiffness, "--stiffness", "if the body is soft");
        let heated = self.fluid.thermal_expansion_per_k().is_some() && !has(Input::TemperatureDifference);
        ask(body && heated, "--temperature-difference", "thermal convection");
        ask(body && !has(Input::Gap), "--gap and --roughness", "near a wall");
        left
    }
}

/// The worst of some numbers: of equal verdicts the one that is most beyond its limit, or nearest to it, and of these the
/// first.
fn worst<'a>(mut numbers: impl Iterator<Item = &'a RegimeNumber>) -> Option<&'a RegimeNumber> {
    let first = numbers.next()?;
    Some(numbers.fold(first, |worst, other| {
        let further = other.share_of_limit() > worst.share_of_limit() * (1.0 + ROUNDING);
        let worse = other.verdict > worst.verdict || (other.verdict == worst.verdict && further);
        if worse { other } else { worst }
    }))
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
