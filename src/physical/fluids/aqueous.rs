//! Dilute aqueous fluids of the laboratory, told by their ratio to water at the same temperature.
//!
//! ```text
//! mu(t) = ratio(t) mu_water(t),   rho(t) = rho_water(t) + excess(t)
//! ```
//!
//! Ratio and excess are linear between the temperatures at which values are known, and constant beyond
//! them: what is dissolved changes them far less than the temperature changes water. That they are
//! constant is common practice, without a source, and the bounds are wider there.

use super::bound::{Bound, BoundKind};
use super::model::{Model, Range};
use super::water;

/// A known value.
struct Known {
    temperature_c: f64,
    viscosity_pa_s: f64,
    density_kg_m3: f64,
}

const fn known(temperature_c: f64, viscosity_pa_s: f64, density_kg_m3: f64) -> Known {
    Known { temperature_c, viscosity_pa_s, density_kg_m3 }
}

/// One of these fluids. All values are from memory.
pub(super) struct Aqueous {
    name: &'static str,
    description: &'static str,
    values: &'static [Known],
    range: Range,
    /// Relative bounds between the known temperatures.
    viscosity_bound: f64,
    density_bound: f64,
    /// What is added to the bound of the viscosity beyond them.
    viscosity_bound_beyond: f64,
    source: &'static str,
    caution: Option<&'static str>,
}

/// Sodium chloride, 0.9 % by mass.
pub(super) const SALINE: Aqueous = Aqueous {
    name: "saline",
    description: "saline, 0.9 % sodium chloride by mass",
    values: &[known(20.0, 1.0145e-3, 1004.4), known(25.0, 0.9017e-3, 1003.1), known(37.0, 0.7001e-3, 999.5)],
    range: Range { low_c: 4.0, high_c: 45.0, reason: "where the ratio to water is taken to hold" },
    viscosity_bound: 0.015,
    density_bound: 5e-4,
    viscosity_bound_beyond: 0.01,
    source: "values at 20, 25 and 37 degC from memory, scaled as water between and beyond",
    caution: None,
};

/// Viscosity 1.02 times that of water; the density belongs to 22 degC.
pub(super) const PBS: Aqueous = Aqueous {
    name: "pbs",
    description: "phosphate-buffered saline",
    values: &[known(22.0, PBS_RATIO_TO_WATER * WATER_22C_PA_S, 1004.5)],
    range: Range { low_c: 4.0, high_c: 45.0, reason: "where the ratio to water is taken to hold" },
    viscosity_bound: 0.02,
    density_bound: 1e-3,
    viscosity_bound_beyond: 0.0,
    source: "1.02 times the viscosity of water and 1004.5 kg/m3 at 22 degC: common practice, no source",
    caution: None,
};

const PBS_RATIO_TO_WATER: f64 = 1.02;
/// Water at 22 degC by IAPWS SR6-08(2011).
const WATER_22C_PA_S: f64 = 0.954_40e-3;

/// Blood plasma, 1.2 to 1.3 mPa.s at 37 degC.
pub(super) const PLASMA: Aqueous = Aqueous {
    name: "plasma",
    description: "blood plasma",
    values: &[known(37.0, 1.25e-3, 1025.0)],
    range: Range { low_c: 20.0, high_c: 40.0, reason: "where its ratio to water is taken to hold" },
    viscosity_bound: 0.04,
    density_bound: 3e-3,
    viscosity_bound_beyond: 0.05,
    source: "1.2 to 1.3 mPa.s and 1025 kg/m3 at 37 degC from memory, scaled as water with temperature",
    caution: Some(
        "one viscosity does not describe plasma: it differs from person to person and with diet and illness, and whole blood and mucus thin with shear",
    ),
};

/// Culture medium with 10 % serum.
pub(super) const CULTURE_MEDIUM: Aqueous = Aqueous {
    name: "culture-medium",
    description: "culture medium with 10 % serum",
    values: &[known(37.0, 0.93e-3, 1009.0)],
    range: Range { low_c: 20.0, high_c: 40.0, reason: "where its ratio to water is taken to hold" },
    viscosity_bound: 0.05,
    density_bound: 2e-3,
    viscosity_bound_beyond: 0.05,
    source: "0.93 mPa.s and 1009 kg/m3 at 37 degC from memory, scaled as water with temperature",
    caution: Some(
        "media differ with their recipe and their serum, and one that holds polymers or mucus thins with shear",
    ),
};

impl Aqueous {
    /// A property interpolated between the known temperatures, constant beyond.
    fn between(&self, t: f64, property: impl Fn(&Known) -> f64) -> f64 {
        let after = self.values.iter().position(|value| value.temperature_c >= t);
        let (low, high) = match after {
            Some(0) => (self.values.first(), self.values.first()),
            Some(index) => (self.values.get(index - 1), self.values.get(index)),
            None => (self.values.last(), self.values.last()),
        };
        let (Some(low), Some(high)) = (low, high) else { return f64::NAN };
        let (start, end) = (property(low), property(high));
        if low.temperature_c == high.temperature_c {
            return start;
        }
        start + (end - start) * (t - low.temperature_c) / (high.temperature_c - low.temperature_c)
    }

    fn is_beyond_values(&self, t: f64) -> bool {
        /// A known value speaks for this far about it, K.
        const REACH_K: f64 = 2.0;
        let near = |value: &Known, sign: f64| sign * (t - value.temperature_c) > REACH_K;
        self.values.iter().all(|value| near(value, 1.0)) || self.values.iter().all(|value| near(value, -1.0))
    }
}

impl Model for Aqueous {
    fn name(&self) -> String {
        self.name.into()
    }

    fn description(&self) -> String {
        self.description.into()
    }

    fn range(&self) -> Range {
        self.range
    }

    fn viscosity_pa_s(&self, t: f64) -> f64 {
        let ratio = |known: &Known| known.viscosity_pa_s / water::viscosity_pa_s(known.temperature_c);
        self.between(t, ratio) * water::viscosity_pa_s(t)
    }

    fn density_kg_m3(&self, t: f64) -> f64 {
        let excess = |known: &Known| known.density_kg_m3 - water::density_kg_m3(known.temperature_c);
        self.between(t, excess) + water::density_kg_m3(t)
    }

    fn viscosity_bound(&self, t: f64) -> Bound {
        let beyond = if self.is_beyond_values(t) { self.viscosity_bound_beyond } else { 0.0 };
        Bound::new(self.viscosity_bound + beyond, BoundKind::CommonPractice)
    }

    fn density_bound(&self, _t: f64) -> Bound {
        Bound::new(self.density_bound, BoundKind::CommonPractice)
    }

    fn source(&self) -> String {
        format!("{}; water: IAPWS SR6-08(2011), Kell 1975", self.source)
    }

    fn cautions(&self, _t: f64) -> Vec<String> {
        self.caution.map(String::from).into_iter().collect()
    }
}
