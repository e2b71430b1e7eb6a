//! Dry air at one standard atmosphere.
//!
//! ```text
//! viscosity       mu     = 1.458e-6 T^1.5 / (T + 110.4) Pa.s
//! density         rho    = p M / (Z R T),  Z = 1 - (p/T)(a0 + a1 t + a2 t^2) + (p/T)^2 d
//! mean free path  lambda = 67.3 nm (T/296.15)^2 (101325/p) (406.55/(T + 110.4))
//! ```
//!
//! Sutherland's formula with the constants of the US Standard Atmosphere 1976; Z and M of CIPM-2007
//! (Picard et al. 2008, Metrologia 45, 149) for dry air; mean free path of Willeke 1976. All from memory;
//! viscosity and density are compared with reference data.

use super::bound::{Bound, BoundKind};
use super::model::{Model, Range};
use crate::physical::constants::{GAS_CONSTANT_J_PER_MOL_K, STANDARD_ATMOSPHERE_PA, ZERO_CELSIUS_K};

/// The package coolprop is 0.3 to 0.8 % higher from -40 to 100 degC (`tests/scripts/fluids_reference.py`).
const VISCOSITY_BOUND: Bound = Bound::new(0.01, BoundKind::ComparedWithData);
/// Dry air is within 1e-4 of coolprop; moist air at 20 degC is up to 1 % lighter, and the weather moves
/// the pressure by 2 % (common practice, no source).
const DENSITY_BOUND: Bound = Bound::new(0.02, BoundKind::CommonPractice);

/// Molar mass of dry air, kg/mol (CIPM-2007, from memory).
const MOLAR_MASS_KG_PER_MOL: f64 = 28.965_46e-3;
/// Sutherland's temperature, K (US Standard Atmosphere 1976, from memory).
const SUTHERLAND_K: f64 = 110.4;
/// Temperature to which the mean free path refers, K (Willeke 1976, from memory).
const MEAN_FREE_PATH_REFERENCE_K: f64 = 296.15;

pub(super) struct Air;

fn compressibility(t: f64) -> f64 {
    // CIPM-2007 for dry air, in K/Pa, 1/Pa, 1/(K.Pa) and K2/Pa2.
    const A: [f64; 3] = [1.581_23e-6, -2.9331e-8, 1.1043e-10];
    const D: f64 = 1.83e-11;
    let ratio = STANDARD_ATMOSPHERE_PA / (t + ZERO_CELSIUS_K);
    1.0 - ratio * (A[0] + A[1] * t + A[2] * t * t) + ratio * ratio * D
}

impl Model for Air {
    fn name(&self) -> String {
        "air".into()
    }

    fn description(&self) -> String {
        "dry air at 101325 Pa".into()
    }

    fn range(&self) -> Range {
        Range { low_c: -40.0, high_c: 100.0, reason: "where it was compared with reference data" }
    }

    fn viscosity_pa_s(&self, temperature_c: f64) -> f64 {
        let t = temperature_c + ZERO_CELSIUS_K;
        1.458e-6 * t.powf(1.5) / (t + SUTHERLAND_K)
    }

    fn density_kg_m3(&self, temperature_c: f64) -> f64 {
        let t = temperature_c + ZERO_CELSIUS_K;
        let ideal = STANDARD_ATMOSPHERE_PA * MOLAR_MASS_KG_PER_MOL / (GAS_CONSTANT_J_PER_MOL_K * t);
        ideal / compressibility(temperature_c)
    }

    fn viscosity_bound(&self, _temperature_c: f64) -> Bound {
        VISCOSITY_BOUND
    }

    fn density_bound(&self, _temperature_c: f64) -> Bound {
        DENSITY_BOUND
    }

    fn source(&self) -> String {
        "viscosity: Sutherland, US Standard Atmosphere 1976; density: CIPM-2007, dry; mean free path: Willeke 1976 (formulas from memory, the first two compared with the package coolprop)".into()
    }

    fn cautions(&self, _temperature_c: f64) -> Vec<String> {
        vec!["dry air at 101325 Pa is taken; the mean free path goes with the inverse of the pressure".into()]
    }

    fn mean_free_path_m(&self, temperature_c: f64) -> Option<f64> {
        let t = temperature_c + ZERO_CELSIUS_K;
        let reference = MEAN_FREE_PATH_REFERENCE_K;
        Some(67.3e-9 * (t / reference).powi(2) * (reference + SUTHERLAND_K) / (t + SUTHERLAND_K))
    }
}
