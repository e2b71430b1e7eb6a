//! All results at once, and what each uncertain input does to each of them.

use super::body_numbers::body_numbers;
use super::bounds::RegimeBody;
use super::channel::{Channel, ChannelFlow, Section};
use super::channel_numbers::channel_numbers;
use super::given::{Given, Input};
use super::motion::{Motion, motions};
use super::number::Number;
use crate::physical::ErrorBudget;

/// `72 sqrt(3)`, of the largest speed of convection in a tall slot.
const CONVECTION: f64 = 124.707_658_144_959_15;

/// What does not change when an input is shifted.
#[derive(Debug, Clone, Copy)]
pub(super) struct Setting<'a> {
    pub body: Option<&'a RegimeBody>,
    pub section: Option<Section>,
    /// Boltzmann constant times temperature, J.
    pub thermal_energy: f64,
    /// Of a gas, m.
    pub mean_free_path: Option<f64>,
    /// Volumetric thermal expansion of the fluid, 1/K.
    pub thermal_expansion: Option<f64>,
}

/// Everything that follows from the inputs.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Evaluation {
    pub channel: Option<Channel>,
    pub flow: Option<ChannelFlow>,
    pub motions: Vec<Motion>,
    /// Largest rate of shear, 1/s.
    pub shear_rate: Option<f64>,
    /// Largest speed of thermal convection, m/s.
    pub convection: Option<f64>,
    pub numbers: Vec<Number>,
}

impl Evaluation {
    pub(super) fn of(setting: &Setting<'_>, given: &Given) -> Self {
        let body = setting.body.map(|body| body.scaled(given.get(Input::BodyScale).unwrap_or(1.0)));
        let channel = setting.section.and_then(|section| Channel::of(section, given));
        let flow = channel.and_then(|channel| channel.flow(given));
        let mut evaluation = Self {
            channel,
            flow,
            motions: motions(given, body.as_ref()),
            shear_rate: flow.map(|flow| flow.largest_wall_shear).or(given.get(Input::ShearRate)),
            convection: convection(setting, given, channel.as_ref()),
            numbers: Vec::new(),
        };
        let mut numbers = body_numbers(setting, given, body.as_ref(), &evaluation);
        numbers.extend(channel_numbers(given, body.as_ref(), &evaluation));
        evaluation.numbers = numbers;
        evaluation
    }

    /// Whether every result is a number.
    pub(super) fn is_finite(&self) -> bool {
        self.results().iter().all(|(_, value)| value.is_finite())
    }

    /// Every result by a name of its own.
    fn results(&self) -> Vec<(&'static str, f64)> {
        let mut results: Vec<(&'static str, f64)> =
            self.numbers.iter().map(|number| (number.name, number.value)).collect();
        if let Some(flow) = &self.flow {
            results.push((MEAN_SPEED, flow.mean_speed));
            results.push((PRESSURE, flow.pressure_gradient));
            results.push((WALL_SHEAR, flow.largest_wall_shear));
            let drop = self.channel.and_then(|channel| channel.length).map(|length| length * flow.pressure_gradient);
            results.extend(drop.map(|drop| (PRESSURE_DROP, drop)));
        }
        for motion in &self.motions {
            results.extend(motion.speed.map(|speed| (motion.cause.word(), speed[1])));
        }
        results.extend(self.convection.map(|speed| (CONVECTION_SPEED, speed)));
        results
    }
}

/// Names of results that are no dimensionless numbers.
pub(super) const MEAN_SPEED: &str = "mean speed";
pub(super) const PRESSURE: &str = "pressure gradient";
pub(super) const PRESSURE_DROP: &str = "pressure drop";
pub(super) const WALL_SHEAR: &str = "wall shear rate";
pub(super) const CONVECTION_SPEED: &str = "convection";

/// Largest speed between two tall walls at different temperature, by the narrow side of the channel or the chamber's
/// width: `g beta dT W^2 / (72 sqrt(3) nu)`, the exact solution far from top and bottom (as in G. K. Batchelor, Q. Appl.
/// Math. 12 (1954) 209, from memory).
fn convection(setting: &Setting<'_>, given: &Given, channel: Option<&Channel>) -> Option<f64> {
    let width = given.get(Input::ChamberWidth).or(channel.map(|channel| channel.narrow))?;
    let kinematic = given.get(Input::Viscosity)? / given.get(Input::FluidDensity)?;
    let driven = setting.thermal_expansion?.abs() * given.get(Input::TemperatureDifference)?;
    Some(given.get(Input::Acceleration)? * driven * width * width / (CONVECTION * kinematic))
}

/// The budgets of all results, by name.
pub(super) struct Uncertainties(Vec<(&'static str, ErrorBudget)>);

impl Uncertainties {
    /// Shifts each uncertain input up and down by its uncertainty, and takes the larger change of each result.
    pub(super) fn of(setting: &Setting<'_>, given: &Given, central: &Evaluation) -> Self {
        let results = central.results();
        let mut budgets: Vec<(&'static str, ErrorBudget)> =
            results.iter().map(|(name, _)| (*name, ErrorBudget::new())).collect();
        for input in given.uncertain() {
            let shifted = [1.0, -1.0].map(|sign| Evaluation::of(setting, &given.shifted(input, sign)).results());
            for (slot, (name, value)) in budgets.iter_mut().zip(&results) {
                let change = |results: &Vec<(&str, f64)>| {
                    results.iter().find(|(known, _)| known == name).map_or(0.0, |(_, other)| (other - value).abs())
                };
                let largest = shifted.iter().map(change).fold(0.0, f64::max);
                // Zero over zero would be no number.
                if largest > 0.0 {
                    slot.1.add(input.words(), largest / value.abs());
                }
            }
        }
        Self(budgets)
    }

    /// Relative uncertainty of a result; none where it is beyond all bounds, as that of a difference that is zero.
    pub(super) fn relative(&self, name: &str) -> Option<f64> {
        let total = self.budget(name).map_or(0.0, ErrorBudget::total);
        total.is_finite().then_some(total)
    }

    /// The input that a result owes most of its uncertainty to.
    pub(super) fn largest(&self, name: &str) -> Option<&str> {
        self.budget(name)?.largest().map(|share| share.name.as_str())
    }

    fn budget(&self, name: &str) -> Option<&ErrorBudget> {
        self.0.iter().find(|(known, _)| *known == name).map(|(_, budget)| budget)
    }
}
