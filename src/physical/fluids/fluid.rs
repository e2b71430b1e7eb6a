//! A fluid at a temperature: its properties, their uncertainties and what to beware of.

use super::bound::Bound;
use super::error::FluidError;
use super::model::Model;
use super::water::Water;
use crate::physical::constants::{BOLTZMANN_J_PER_K, DEFAULT_TEMPERATURE_C, ZERO_CELSIUS_K};
use crate::physical::propagation::ErrorBudget;
use crate::physical::quantity::{Dimension, Quantity};

/// Step of the numerical derivative by temperature, K: the models are smooth over a kelvin, so that
/// the truncation stays below 1e-6 of the derivative and rounding below 1e-10.
const DERIVATIVE_STEP_K: f64 = 0.01;

/// A liquid that changes more than this a kelvin needs its temperature known; water changes 2.4 %/K.
/// A choice of this program.
const STRONG_SENSITIVITY_PER_K: f64 = 0.04;

/// A stretch of nothing: temperatures that miss the end of a range only by rounding are inside it.
const RANGE_SLACK_K: f64 = 1e-9;

/// The name of a fluid without one.
pub(super) const GIVEN_BY_NUMBERS: &str = "given by numbers";

/// The temperature taken when none is given: 20 degC, without uncertainty.
pub fn default_temperature() -> Quantity {
    Quantity::trusted(ZERO_CELSIUS_K + DEFAULT_TEMPERATURE_C, 0.0, Dimension::TEMPERATURE)
}

/// A Newtonian fluid at one temperature.
///
/// # Examples
/// ```
/// use slowmote::physical::{Dimension, Fluid, Quantity};
///
/// let warm = Quantity::parse("25±0.5degC", Dimension::TEMPERATURE)?;
/// let water = Fluid::parse("water", warm)?;
/// assert!((water.viscosity_pa_s() - 0.8900e-3).abs() < 1e-7);
/// assert!(water.viscosity_relative_uncertainty() > 0.01); // the formula's 1 % and half a kelvin
/// # Ok::<(), Box<dyn std::error::Error>>(())
/// ```
#[derive(Debug, Clone, PartialEq)]
pub struct Fluid {
    pub(super) name: String,
    pub(super) description: String,
    pub(super) temperature: Quantity,
    pub(super) viscosity_pa_s: f64,
    pub(super) density_kg_m3: f64,
    pub(super) viscosity_bound: Bound,
    pub(super) density_bound: Bound,
    pub(super) viscosity_budget: ErrorBudget,
    pub(super) density_budget: ErrorBudget,
    pub(super) viscosity_temperature_sensitivity_per_k: Option<f64>,
    pub(super) density_temperature_sensitivity_per_k: Option<f64>,
    pub(super) validity_c: Option<(f64, f64)>,
    pub(super) mean_free_path_m: Option<f64>,
    pub(super) source: String,
    pub(super) cautions: Vec<String>,
}

impl Fluid {
    /// Pure water at a temperature from 0 to 100 degC.
    ///
    /// # Errors
    /// [`FluidError::TemperatureOutOfRange`], [`FluidError::NotATemperature`].
    pub fn water(temperature: Quantity) -> Result<Self, FluidError> {
        Self::from_model(&Water, temperature)
    }

    pub(super) fn from_model(model: &dyn Model, temperature: Quantity) -> Result<Self, FluidError> {
        let temperature_c = celsius(temperature)?;
        let range = model.range();
        let inside = range.low_c - RANGE_SLACK_K..=range.high_c + RANGE_SLACK_K;
        if !inside.contains(&temperature_c) {
            return Err(FluidError::TemperatureOutOfRange {
                fluid: model.name(),
                low_c: range.low_c,
                high_c: range.high_c,
                reason: range.reason,
                given_c: temperature_c,
            });
        }
        let below = (temperature_c - DERIVATIVE_STEP_K).max(range.low_c);
        let above = (temperature_c + DERIVATIVE_STEP_K).min(range.high_c);
        let slope = |property: &dyn Fn(f64) -> f64| (property(above).ln() - property(below).ln()) / (above - below);
        let viscosity_slope = slope(&|t| model.viscosity_pa_s(t));
        let density_slope = slope(&|t| model.density_kg_m3(t));
        let viscosity_bound = model.viscosity_bound(temperature_c);
        let density_bound = model.density_bound(temperature_c);
        let spread_k = temperature.uncertainty_si();
        let mut viscosity_budget = ErrorBudget::new()
            .with("viscosity of the fluid", viscosity_bound.relative)
            .with_sensitivity("temperature", viscosity_slope, spread_k);
        let mut density_budget = ErrorBudget::new()
            .with("density of the fluid", density_bound.relative)
            .with_sensitivity("temperature", density_slope, spread_k);
        if let Some(spread) = model.composition_spread(temperature_c) {
            viscosity_budget.add(spread.name, spread.viscosity_relative);
            density_budget.add(spread.name, spread.density_relative);
        }
        let mut cautions = model.cautions(temperature_c);
        if viscosity_slope.abs() > STRONG_SENSITIVITY_PER_K {
            let percent = 100.0 * viscosity_slope;
            cautions.push(format!(
                "the viscosity changes by {percent:.1} % a kelvin, so measure the temperature where the body is"
            ));
        }
        Ok(Self {
            name: model.name(),
            description: model.description(),
            temperature,
            viscosity_pa_s: model.viscosity_pa_s(temperature_c),
            density_kg_m3: model.density_kg_m3(temperature_c),
            viscosity_bound,
            density_bound,
            viscosity_budget,
            density_budget,
            viscosity_temperature_sensitivity_per_k: Some(viscosity_slope),
            density_temperature_sensitivity_per_k: Some(density_slope),
            validity_c: Some((range.low_c, range.high_c)),
            mean_free_path_m: model.mean_free_path_m(temperature_c),
            source: model.source(),
            cautions,
        })
    }

    /// The specification that gives this fluid again, such as `glycerol:60%`, or `given by numbers`.
    pub fn name(&self) -> &str {
        &self.name
    }

    /// Whether its viscosity and density were given as numbers.
    pub fn is_given_by_numbers(&self) -> bool {
        self.name == GIVEN_BY_NUMBERS
    }

    /// What it is, in words.
    pub fn description(&self) -> &str {
        &self.description
    }

    /// The temperature, with its uncertainty.
    pub fn temperature(&self) -> Quantity {
        self.temperature
    }

    /// The temperature in degC.
    pub fn temperature_c(&self) -> f64 {
        self.temperature.value_si() - ZERO_CELSIUS_K
    }

    /// The temperature in K.
    pub fn temperature_k(&self) -> f64 {
        self.temperature.value_si()
    }

    /// Boltzmann constant times temperature, J.
    pub fn thermal_energy_j(&self) -> f64 {
        BOLTZMANN_J_PER_K * self.temperature.value_si()
    }

    /// Dynamic viscosity, Pa.s.
    pub fn viscosity_pa_s(&self) -> f64 {
        self.viscosity_pa_s
    }

    /// Density, kg/m3.
    pub fn density_kg_m3(&self) -> f64 {
        self.density_kg_m3
    }

    /// Kinematic viscosity, m2/s.
    pub fn kinematic_viscosity_m2_s(&self) -> f64 {
        self.viscosity_pa_s / self.density_kg_m3
    }

    /// How well the viscosity is known at exactly this temperature and composition, and on what grounds.
    pub fn viscosity_bound(&self) -> Bound {
        self.viscosity_bound
    }

    /// How well the density is known at exactly this temperature and composition, and on what grounds.
    pub fn density_bound(&self) -> Bound {
        self.density_bound
    }

    /// Relative uncertainty of the viscosity, with those of temperature and composition, to first order.
    pub fn viscosity_relative_uncertainty(&self) -> f64 {
        self.viscosity_budget.total()
    }

    /// Relative uncertainty of the density, with those of temperature and composition, to first order.
    pub fn density_relative_uncertainty(&self) -> f64 {
        self.density_budget.total()
    }

    /// What the uncertainty of the viscosity is made of.
    pub fn viscosity_budget(&self) -> &ErrorBudget {
        &self.viscosity_budget
    }

    /// What the uncertainty of the density is made of.
    pub fn density_budget(&self) -> &ErrorBudget {
        &self.density_budget
    }

    /// dln mu/dT, 1/K; none for a fluid given by numbers.
    pub fn viscosity_temperature_sensitivity_per_k(&self) -> Option<f64> {
        self.viscosity_temperature_sensitivity_per_k
    }

    /// Volumetric thermal expansion `-dln rho/dT`, 1/K, negative below water's densest point; none for a fluid given by
    /// numbers.
    pub fn thermal_expansion_per_k(&self) -> Option<f64> {
        self.density_temperature_sensitivity_per_k.map(|slope| -slope)
    }

    /// Lowest and highest temperature described, degC; none for a fluid given by numbers.
    pub fn validity_c(&self) -> Option<(f64, f64)> {
        self.validity_c
    }

    /// Mean free path of a gas, m; none for a liquid and for a fluid given by numbers.
    pub fn mean_free_path_m(&self) -> Option<f64> {
        self.mean_free_path_m
    }

    /// Where the numbers come from, and which of them are from memory.
    pub fn source(&self) -> &str {
        &self.source
    }

    /// What to beware of, one sentence each.
    pub fn cautions(&self) -> &[String] {
        &self.cautions
    }
}

/// The temperature in degC, if it is one.
pub(super) fn celsius(temperature: Quantity) -> Result<f64, FluidError> {
    if temperature.dimension() != Dimension::TEMPERATURE {
        return Err(FluidError::NotATemperature { given: temperature.dimension().name() });
    }
    Ok(temperature.value_si() - ZERO_CELSIUS_K)
}
