//! Water at 0.1 MPa.
//!
//! Viscosity, IAPWS SR6-08(2011), "Revised Supplementary Release on Properties of Liquid Water at
//! 0.1 MPa", 253 to 383 K, 1 %:
//!
//! ```text
//! mu/uPa.s = 280.68 s^-1.9 + 511.45 s^-7.7 + 61.131 s^-19.6 + 0.45903 s^-40,   s = T/300 K
//! ```
//!
//! Density, Kell 1975 (J. Chem. Eng. Data 20, 97), a ratio of polynomials in t/degC; from memory, and
//! compared with IAPWS-95.

use super::bound::{Bound, BoundKind};
use super::model::{Model, Range};
use crate::physical::constants::ZERO_CELSIUS_K;

/// Uncertainty that SR6-08 states for the viscosity.
pub(super) const VISCOSITY_BOUND: Bound = Bound::new(0.01, BoundKind::Published);
/// Kell's density lies within 1.5e-5 of IAPWS-95 from 0 to 100 degC (`tests/scripts/fluids_reference.py`);
/// dissolved air takes another 3e-6.
const DENSITY_BOUND: Bound = Bound::new(2e-5, BoundKind::ComparedWithData);

/// From here on an open sample is hot enough to evaporate and to convect visibly. A choice of this program.
pub(super) const HOT_C: f64 = 60.0;

pub(super) const LIQUID_RANGE: Range = Range { low_c: 0.0, high_c: 100.0, reason: "liquid at atmospheric pressure" };

pub(super) struct Water;

/// Pa.s.
pub(super) fn viscosity_pa_s(temperature_c: f64) -> f64 {
    let s = (temperature_c + ZERO_CELSIUS_K) / 300.0;
    1e-6 * (280.68 * s.powf(-1.9) + 511.45 * s.powf(-7.7) + 61.131 * s.powf(-19.6) + 0.45903 * s.powf(-40.0))
}

/// kg/m3.
pub(super) fn density_kg_m3(t: f64) -> f64 {
    const NUMERATOR: [f64; 6] =
        [999.839_52, 16.945_176, -7.987_040_1e-3, -46.170_461e-6, 105.563_02e-9, -280.542_53e-12];
    let numerator = NUMERATOR.iter().rev().fold(0.0, |sum, coefficient| sum * t + coefficient);
    numerator / (1.0 + 16.879_850e-3 * t)
}

/// A caution for aqueous fluids that are hot.
pub(super) fn hot_caution(temperature_c: f64) -> Option<String> {
    (temperature_c > HOT_C).then(|| {
        format!(
            "above {HOT_C} degC an open sample evaporates, and small differences of temperature stir it faster than small bodies settle"
        )
    })
}

impl Model for Water {
    fn name(&self) -> String {
        "water".into()
    }

    fn description(&self) -> String {
        "pure water".into()
    }

    fn range(&self) -> Range {
        LIQUID_RANGE
    }

    fn viscosity_pa_s(&self, temperature_c: f64) -> f64 {
        viscosity_pa_s(temperature_c)
    }

    fn density_kg_m3(&self, temperature_c: f64) -> f64 {
        density_kg_m3(temperature_c)
    }

    fn viscosity_bound(&self, _temperature_c: f64) -> Bound {
        VISCOSITY_BOUND
    }

    fn density_bound(&self, _temperature_c: f64) -> Bound {
        DENSITY_BOUND
    }

    fn source(&self) -> String {
        "viscosity: IAPWS SR6-08(2011); density: Kell 1975 (formula from memory, within 1.5e-5 of IAPWS-95)".into()
    }

    fn cautions(&self, temperature_c: f64) -> Vec<String> {
        hot_caution(temperature_c).into_iter().collect()
    }
}
