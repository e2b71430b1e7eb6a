//! Glycerol in water, by mass fraction C = w.
//!
//! ```text
//! viscosity  mu  = mu_w^al mu_g^(1-al),  al = 1 - C + a b C (1-C)/(a C + b (1-C))
//!            a   = 0.705 - 0.0017 t,     b  = (4.9 + 0.036 t) a^2.5
//!            mu_g = 12100 exp[(-1233 + t) t/(9900 + 70 t)] mPa.s
//! density    rho = kappa [rho_w + (rho_g - rho_w)/(1 + (rho_g/rho_w)(1/w - 1))]
//!            kappa = 1 + c sin(pi w^1.31)^0.81,  c = 1.78e-6 t^2 - 1.82e-4 t + 1.41e-2
//! ```
//!
//! Viscosity: Cheng 2008 (Ind. Eng. Chem. Res. 47, 3285), with the water of IAPWS in place of his, which
//! is 0.3 % high at 20 degC. Density: Volk and Kaehler 2018 (Exp. Fluids 59, 75). Formulas from memory.

use super::bound::{Bound, BoundKind};
use super::error::FluidError;
use super::fraction::{Fraction, percent};
use super::model::{CompositionSpread, Model, Range};
use super::water;
use std::f64::consts::PI;

/// Cheng's own estimate, "about 3 %" (from memory).
const VISCOSITY_BOUND: Bound = Bound::new(0.03, BoundKind::Published);
/// Volk and Kaehler's own estimate from 15 to 30 degC (from memory).
const DENSITY_BOUND: Bound = Bound::new(7e-4, BoundKind::Published);
/// Outside these temperatures the density formula is an extrapolation.
const DENSITY_RANGE_C: (f64, f64) = (15.0, 30.0);
/// Extrapolated, it stays within 1e-3 of the package coolprop from 0 to 40 degC up to 60 %; beyond, a guess.
const EXTRAPOLATED_DENSITY_BOUND: Bound = Bound::new(0.01, BoundKind::CommonPractice);

/// Above this a small error of the composition is a large one of the viscosity.
const STEEP_MASS_FRACTION: f64 = 0.9;
/// Step of the numerical derivative by mass fraction: the formulas are smooth over it.
const COMPOSITION_STEP: f64 = 0.0005;
/// Temperature at which volumes are taken as measured out, degC.
const MEASURING_OUT_C: f64 = 20.0;

pub(super) struct Glycerol {
    mass_fraction: f64,
    mass_fraction_spread: f64,
    volume_fraction: Option<f64>,
}

impl Glycerol {
    pub(super) fn parse(parameter: &str) -> Result<Self, FluidError> {
        Ok(match Fraction::parse(parameter)? {
            Fraction::Mass(fraction) => Self {
                mass_fraction: fraction.value_si(),
                mass_fraction_spread: fraction.uncertainty_si(),
                volume_fraction: None,
            },
            Fraction::Volume(fraction) => Self::by_volume(fraction.value_si(), fraction.uncertainty_si()),
        })
    }

    /// From the volumes of the pure liquids before they are mixed.
    fn by_volume(fraction: f64, spread: f64) -> Self {
        let glycerol = pure_density_kg_m3(MEASURING_OUT_C);
        let water = water::density_kg_m3(MEASURING_OUT_C);
        let total = fraction * glycerol + (1.0 - fraction) * water;
        let slope = glycerol * water / (total * total);
        Self {
            mass_fraction: fraction * glycerol / total,
            mass_fraction_spread: slope * spread,
            volume_fraction: Some(fraction),
        }
    }

    /// dln property/dw, the step kept inside 0 to 1.
    fn slope(&self, property: impl Fn(f64) -> f64) -> f64 {
        let low = (self.mass_fraction - COMPOSITION_STEP).max(0.0);
        let high = (self.mass_fraction + COMPOSITION_STEP).min(1.0);
        (property(high) / property(low)).ln() / (high - low)
    }
}

fn pure_density_kg_m3(t: f64) -> f64 {
    1273.3 - 0.6121 * t
}

fn viscosity_pa_s(mass_fraction: f64, t: f64) -> f64 {
    let c = mass_fraction;
    let glycerol = 12.1 * ((-1233.0 + t) * t / (9900.0 + 70.0 * t)).exp();
    let a = 0.705 - 0.0017 * t;
    let b = (4.9 + 0.036 * t) * a.powf(2.5);
    let alpha = 1.0 - c + a * b * c * (1.0 - c) / (a * c + b * (1.0 - c));
    water::viscosity_pa_s(t).powf(alpha) * glycerol.powf(1.0 - alpha)
}

fn density_kg_m3(mass_fraction: f64, t: f64) -> f64 {
    let w = mass_fraction;
    let glycerol = pure_density_kg_m3(t);
    let water = 1000.0 * (1.0 - ((t - 3.98) / 615.0).abs().powf(1.71));
    // w/(w + ...) is the same as 1/(1 + ... (1/w - 1)) and holds at w = 0 too.
    let volume_fraction = w / (w + (glycerol / water) * (1.0 - w));
    let contraction = 1.78e-6 * t * t - 1.82e-4 * t + 1.41e-2;
    // Rounding can take the sine of pi below zero, where the power has no value.
    let shape = (PI * w.powf(1.31)).sin().max(0.0).powf(0.81);
    (1.0 + contraction * shape) * (water + (glycerol - water) * volume_fraction)
}

impl Model for Glycerol {
    fn name(&self) -> String {
        format!("glycerol:{}", percent(self.mass_fraction))
    }

    fn description(&self) -> String {
        let by_mass = 100.0 * self.mass_fraction;
        match self.volume_fraction {
            None => format!("glycerol in water, {} by mass", percent(self.mass_fraction)),
            Some(volume) => format!(
                "glycerol in water, {by_mass:.2} % by mass, from {:.4} % by volume of the pure liquids at {MEASURING_OUT_C} degC before mixing",
                100.0 * volume
            ),
        }
    }

    fn range(&self) -> Range {
        Range { low_c: 0.0, high_c: 100.0, reason: "the range of Cheng's formula" }
    }

    fn viscosity_pa_s(&self, temperature_c: f64) -> f64 {
        viscosity_pa_s(self.mass_fraction, temperature_c)
    }

    fn density_kg_m3(&self, temperature_c: f64) -> f64 {
        density_kg_m3(self.mass_fraction, temperature_c)
    }

    fn viscosity_bound(&self, _temperature_c: f64) -> Bound {
        VISCOSITY_BOUND
    }

    fn density_bound(&self, temperature_c: f64) -> Bound {
        let (low, high) = DENSITY_RANGE_C;
        if (low..=high).contains(&temperature_c) { DENSITY_BOUND } else { EXTRAPOLATED_DENSITY_BOUND }
    }

    fn source(&self) -> String {
        "viscosity: Cheng 2008 with the water of IAPWS SR6-08(2011); density: Volk and Kaehler 2018 (Cheng's and their formula from memory)".into()
    }

    fn cautions(&self, temperature_c: f64) -> Vec<String> {
        let mut cautions: Vec<String> = water::hot_caution(temperature_c).into_iter().collect();
        if let Some(volume) = self.volume_fraction {
            cautions.push(format!(
                "{:.4} % by volume was taken as volumes of the pure liquids before mixing, which is {:.2} % by mass",
                100.0 * volume,
                100.0 * self.mass_fraction
            ));
        }
        if self.mass_fraction > STEEP_MASS_FRACTION {
            let slope = self.slope(|w| viscosity_pa_s(w, temperature_c));
            cautions.push(format!(
                "one percent of water more or less changes the viscosity by about {slope:.0} %, and glycerol takes up water from the air"
            ));
        }
        cautions
    }

    fn composition_spread(&self, temperature_c: f64) -> Option<CompositionSpread> {
        let spread = self.mass_fraction_spread;
        (spread > 0.0).then(|| CompositionSpread {
            name: "mass fraction of glycerol",
            viscosity_relative: spread * self.slope(|w| viscosity_pa_s(w, temperature_c)),
            density_relative: spread * self.slope(|w| density_kg_m3(w, temperature_c)),
        })
    }
}
