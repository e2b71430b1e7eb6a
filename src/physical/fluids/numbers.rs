//! A fluid given by numbers: `viscosity=1mPa.s,density=1g/mL`.

use super::bound::{Bound, BoundKind};
use super::error::FluidError;
use super::fluid::{Fluid, GIVEN_BY_NUMBERS, celsius};
use crate::physical::propagation::ErrorBudget;
use crate::physical::quantity::{Dimension, Quantity, QuantityError, echo};

/// Liquids more viscous than pitch at 20 degC by far, or less than any gas: a wrong prefix is likely.
/// A choice of this program.
const USUAL_VISCOSITIES_PA_S: std::ops::RangeInclusive<f64> = 1e-6..=1e5;
/// From thin gases to beyond mercury: outside, a wrong unit is likely. A choice of this program.
const USUAL_DENSITIES_KG_M3: std::ops::RangeInclusive<f64> = 1e-2..=2e4;
/// Digits in the description.
const DIGITS: usize = 4;

impl Fluid {
    /// A fluid from its viscosity and density, with their uncertainties, at a temperature that only
    /// diffusion needs: the viscosity is taken as given at it.
    ///
    /// # Errors
    /// [`FluidError::Quantity`] if viscosity or density is no such quantity or is not positive;
    /// [`FluidError::NotATemperature`].
    pub fn from_numbers(viscosity: Quantity, density: Quantity, temperature: Quantity) -> Result<Fluid, FluidError> {
        celsius(temperature)?;
        let viscosity = checked("viscosity", viscosity, Dimension::VISCOSITY)?;
        let density = checked("density", density, Dimension::DENSITY)?;
        let mut cautions = Vec::new();
        if !USUAL_VISCOSITIES_PA_S.contains(&viscosity.value_si()) {
            cautions.push(format!("a viscosity of {} is unusual: is its prefix right", viscosity.to_text(DIGITS)));
        }
        if !USUAL_DENSITIES_KG_M3.contains(&density.value_si()) {
            cautions.push(format!("a density of {} is unusual: is its unit right", density.to_text(DIGITS)));
        }
        let given = |quantity: Quantity| Bound::new(quantity.relative_uncertainty(), BoundKind::Given);
        let (viscosity_text, density_text) = (viscosity.to_text(DIGITS), density.to_text(DIGITS));
        Ok(Fluid {
            name: GIVEN_BY_NUMBERS.into(),
            description: format!("a fluid of viscosity {viscosity_text} and density {density_text}"),
            temperature,
            viscosity_pa_s: viscosity.value_si(),
            density_kg_m3: density.value_si(),
            viscosity_bound: given(viscosity),
            density_bound: given(density),
            viscosity_budget: ErrorBudget::new().with("viscosity of the fluid", viscosity.relative_uncertainty()),
            density_budget: ErrorBudget::new().with("density of the fluid", density.relative_uncertainty()),
            viscosity_temperature_sensitivity_per_k: None,
            density_temperature_sensitivity_per_k: None,
            validity_c: None,
            mean_free_path_m: None,
            source: "viscosity and density as given".into(),
            cautions,
        })
    }

    /// Reads the numbers of a fluid; `specification` holds an equals sign.
    pub(super) fn parse_numbers(specification: &str, temperature: Quantity) -> Result<Fluid, FluidError> {
        let (mut viscosity, mut density) = (None, None);
        for part in specification.split(',') {
            let unknown = || FluidError::UnknownPart { part: echo(part) };
            let (key, value) = part.split_once('=').ok_or_else(unknown)?;
            let (key, dimension, slot) = match key.trim().to_lowercase().as_str() {
                "viscosity" => ("viscosity", Dimension::VISCOSITY, &mut viscosity),
                "density" => ("density", Dimension::DENSITY, &mut density),
                _ => return Err(unknown()),
            };
            let value =
                Quantity::parse(value, dimension).map_err(|source| FluidError::Quantity { what: key, source })?;
            if slot.replace(value).is_some() {
                return Err(FluidError::GivenTwice { key });
            }
        }
        match (viscosity, density) {
            (Some(viscosity), Some(density)) => Fluid::from_numbers(viscosity, density, temperature),
            (None, _) => Err(FluidError::MissingNumber { missing: "viscosity" }),
            (_, None) => Err(FluidError::MissingNumber { missing: "density" }),
        }
    }
}

fn checked(what: &'static str, quantity: Quantity, expected: Dimension) -> Result<Quantity, FluidError> {
    let in_fluid = |source| FluidError::Quantity { what, source };
    if quantity.dimension() != expected {
        return Err(in_fluid(QuantityError::WrongDimension {
            text: quantity.to_text(DIGITS),
            given: quantity.dimension().name().into(),
            expected: expected.name(),
            example: expected.example(),
        }));
    }
    quantity.positive().map_err(in_fluid)
}
