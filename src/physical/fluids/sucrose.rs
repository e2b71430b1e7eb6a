//! Sucrose in water, by mass fraction w (x is its mole fraction).
//!
//! ```text
//! log10(mu/mPa.s) = 22.46 x - 0.114 + ((30 - t)/(91 + t)) (1.1 + 43.1 x^1.25)
//! rho(20 degC)    = 998.165 + 387.009 w + 122.115 w^2 + 73.605 w^3 - 29.069 w^4 kg/m3
//! ```
//!
//! Viscosity: Mathlouthi and Genotelle 1995. Away from 20 degC the density is scaled as that of water, which
//! misses the larger expansion of the syrup; the bound grows accordingly. All from memory.

use super::bound::{Bound, BoundKind};
use super::error::FluidError;
use super::fraction::{Fraction, percent};
use super::model::{CompositionSpread, Model, Range};
use super::water;

/// From -3.5 % towards pure water (there against IAPWS) to +3 % at 20 degC (from memory), rounded up.
const VISCOSITY_BOUND_20C: f64 = 0.04;
/// A guess for other temperatures, where towards pure water the formula misses by 3.6 % at most.
const VISCOSITY_BOUND_ELSEWHERE: f64 = 0.06;
/// How far from 20 degC the comparison made there is taken to hold, K.
const NEAR_20C_K: f64 = 5.0;
/// Of the polynomial at 20 degC; a plausible bound, as it was not compared.
const DENSITY_BOUND_20C: f64 = 5e-4;
/// Difference of the expansions of syrup and of water, 1/K at w = 1; a plausible bound, from memory.
const EXPANSION_DIFFERENCE_PER_K: f64 = 4e-4;
/// Near saturation at 20 degC (66.7 % by mass, from memory).
const LARGEST_MASS_FRACTION: f64 = 0.65;
const COMPOSITION_STEP: f64 = 0.0005;

/// Molar masses, g/mol.
const SUCROSE_G_PER_MOL: f64 = 342.3;
const WATER_G_PER_MOL: f64 = 18.015;

pub(super) struct Sucrose {
    mass_fraction: f64,
    mass_fraction_spread: f64,
}

impl Sucrose {
    pub(super) fn parse(parameter: &str) -> Result<Self, FluidError> {
        let fraction = match Fraction::parse(parameter)? {
            Fraction::Mass(fraction) => fraction,
            Fraction::Volume(_) => {
                return Err(FluidError::BadFraction {
                    text: crate::physical::quantity::echo(parameter),
                    reason: "a solid has no volume fraction, so give it by mass, as in `20%wt`",
                });
            }
        };
        if fraction.value_si() > LARGEST_MASS_FRACTION {
            return Err(FluidError::CompositionOutOfRange {
                fluid: "sucrose",
                what: "mass fractions",
                low: "0 %",
                high: "65 %",
                given: percent(fraction.value_si()),
            });
        }
        Ok(Self { mass_fraction: fraction.value_si(), mass_fraction_spread: fraction.uncertainty_si() })
    }

    fn slope(&self, property: impl Fn(f64) -> f64) -> f64 {
        let low = (self.mass_fraction - COMPOSITION_STEP).max(0.0);
        let high = self.mass_fraction + COMPOSITION_STEP;
        (property(high) / property(low)).ln() / (high - low)
    }
}

fn viscosity_pa_s(mass_fraction: f64, t: f64) -> f64 {
    let sugar = mass_fraction / SUCROSE_G_PER_MOL;
    let x = sugar / (sugar + (1.0 - mass_fraction) / WATER_G_PER_MOL);
    let log10 = 22.46 * x - 0.114 + ((30.0 - t) / (91.0 + t)) * (1.1 + 43.1 * x.powf(1.25));
    1e-3 * 10f64.powf(log10)
}

fn density_kg_m3(mass_fraction: f64, t: f64) -> f64 {
    let w = mass_fraction;
    let at_20 = 998.165 + w * (387.009 + w * (122.115 + w * (73.605 - w * 29.069)));
    at_20 * water::density_kg_m3(t) / water::density_kg_m3(20.0)
}

impl Model for Sucrose {
    fn name(&self) -> String {
        format!("sucrose:{}", percent(self.mass_fraction))
    }

    fn description(&self) -> String {
        format!("sucrose in water, {:.4} % by mass", 100.0 * self.mass_fraction)
    }

    fn range(&self) -> Range {
        Range { low_c: 5.0, high_c: 60.0, reason: "where the formula was looked at" }
    }

    fn viscosity_pa_s(&self, temperature_c: f64) -> f64 {
        viscosity_pa_s(self.mass_fraction, temperature_c)
    }

    fn density_kg_m3(&self, temperature_c: f64) -> f64 {
        density_kg_m3(self.mass_fraction, temperature_c)
    }

    fn viscosity_bound(&self, temperature_c: f64) -> Bound {
        let near = (temperature_c - 20.0).abs() <= NEAR_20C_K;
        let relative = if near { VISCOSITY_BOUND_20C } else { VISCOSITY_BOUND_ELSEWHERE };
        Bound::new(relative, BoundKind::CommonPractice)
    }

    fn density_bound(&self, temperature_c: f64) -> Bound {
        let expansion = EXPANSION_DIFFERENCE_PER_K * self.mass_fraction * (temperature_c - 20.0).abs();
        Bound::new(DENSITY_BOUND_20C + expansion, BoundKind::CommonPractice)
    }

    fn source(&self) -> String {
        "viscosity: Mathlouthi and Genotelle 1995; density: polynomial at 20 degC, scaled as water with temperature (both from memory)".into()
    }

    fn composition_spread(&self, temperature_c: f64) -> Option<CompositionSpread> {
        let spread = self.mass_fraction_spread;
        (spread > 0.0).then(|| CompositionSpread {
            name: "mass fraction of sucrose",
            viscosity_relative: spread * self.slope(|w| viscosity_pa_s(w, temperature_c)),
            density_relative: spread * self.slope(|w| density_kg_m3(w, temperature_c)),
        })
    }
}
