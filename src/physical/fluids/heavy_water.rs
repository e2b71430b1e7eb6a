//! Heavy water between 20 and 37 degC, interpolated between three reference values.
//!
//! ln mu is taken linear in 1/T and the density linear in T between the tabulated temperatures; there
//! is no value outside them.

use super::bound::{Bound, BoundKind};
use super::model::{Model, Range};
use crate::physical::constants::ZERO_CELSIUS_K;

struct Reference {
    temperature_c: f64,
    viscosity_pa_s: f64,
    density_kg_m3: f64,
}

/// Computed with the package coolprop 8.0.0 at 101325 Pa (`tests/scripts/fluids_reference.py`).
const REFERENCES: [Reference; 3] = [
    Reference { temperature_c: 20.0, viscosity_pa_s: 1.2461e-3, density_kg_m3: 1105.34 },
    Reference { temperature_c: 25.0, viscosity_pa_s: 1.0945e-3, density_kg_m3: 1104.47 },
    Reference { temperature_c: 37.0, viscosity_pa_s: 0.8338e-3, density_kg_m3: 1101.09 },
];

/// Two formulations (packages coolprop and iapws) differ by 0.25 %; the interpolation adds 0.3 % at most.
const VISCOSITY_BOUND: Bound = Bound::new(0.01, BoundKind::ComparedWithData);
/// The interpolation in temperature misses at most 0.3 kg/m3; isotopic purity is the user's to know.
const DENSITY_BOUND: Bound = Bound::new(5e-4, BoundKind::ComparedWithData);

pub(super) struct HeavyWater;

/// The neighbouring references and a weight from 0 to 1 given by `coordinate`.
fn bracket(t: f64, coordinate: impl Fn(f64) -> f64) -> (&'static Reference, &'static Reference, f64) {
    let [first, middle, last] = &REFERENCES;
    let (low, high) = if t <= middle.temperature_c { (first, middle) } else { (middle, last) };
    let start = coordinate(low.temperature_c);
    let weight = (coordinate(t) - start) / (coordinate(high.temperature_c) - start);
    (low, high, weight)
}

impl Model for HeavyWater {
    fn name(&self) -> String {
        "heavy-water".into()
    }

    fn description(&self) -> String {
        "heavy water (D2O), pure".into()
    }

    fn range(&self) -> Range {
        Range { low_c: 20.0, high_c: 37.0, reason: "between the three tabulated temperatures" }
    }

    fn viscosity_pa_s(&self, temperature_c: f64) -> f64 {
        let (low, high, weight) = bracket(temperature_c, |t| 1.0 / (t + ZERO_CELSIUS_K));
        let (start, end) = (low.viscosity_pa_s.ln(), high.viscosity_pa_s.ln());
        (start + weight * (end - start)).exp()
    }

    fn density_kg_m3(&self, temperature_c: f64) -> f64 {
        let (low, high, weight) = bracket(temperature_c, |t| t);
        low.density_kg_m3 + weight * (high.density_kg_m3 - low.density_kg_m3)
    }

    fn viscosity_bound(&self, _temperature_c: f64) -> Bound {
        VISCOSITY_BOUND
    }

    fn density_bound(&self, _temperature_c: f64) -> Bound {
        DENSITY_BOUND
    }

    fn source(&self) -> String {
        "values at 20, 25 and 37 degC computed with the package coolprop, interpolated between".into()
    }

    fn cautions(&self, _temperature_c: f64) -> Vec<String> {
        vec!["heavy water takes up light water from the air, which lowers viscosity and density".into()]
    }
}
