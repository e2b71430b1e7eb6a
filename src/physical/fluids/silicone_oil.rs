//! Silicone oil (polydimethylsiloxane) by its grade, the nominal kinematic viscosity at 25 degC.
//!
//! ```text
//! log10(nu/nu25) = 763.1/(273.15 + t) - 763.1/298.15
//! rho            = rho25 / (1 + 9.6e-4 (t - 25))
//! ```
//!
//! The density at 25 degC is interpolated in log nu25 between listed grades. All from memory.

use super::bound::{Bound, BoundKind};
use super::error::FluidError;
use super::model::{Model, Range};
use crate::physical::constants::ZERO_CELSIUS_K;
use crate::physical::quantity::{Dimension, Quantity};

/// Grade in cSt and density at 25 degC in kg/m3, from memory.
const GRADES: [(f64, f64); 6] =
    [(10.0, 935.0), (50.0, 960.0), (100.0, 966.0), (1000.0, 971.0), (12_500.0, 974.0), (60_000.0, 976.0)];
/// Slope of log10 nu against 1/T, K, from memory.
const VISCOSITY_SLOPE_K: f64 = 763.1;
/// Thermal expansion, 1/K, from memory.
const EXPANSION_PER_K: f64 = 9.6e-4;
/// Temperature to which a grade refers, degC.
const GRADE_C: f64 = 25.0;
/// Labels are good to 5 to 10 % (common practice, no source): the larger is taken.
const LABEL_TOLERANCE: f64 = 0.10;
/// Densities of one grade differ by this between makers (common practice, no source).
const DENSITY_BOUND: Bound = Bound::new(5e-3, BoundKind::CommonPractice);
const CENTISTOKES_M2_PER_S: f64 = 1e-6;

pub(super) struct SiliconeOil {
    grade_cst: f64,
    /// Relative, if the user measured the grade instead of reading the label.
    given_spread: Option<f64>,
}

impl SiliconeOil {
    pub(super) fn parse(parameter: &str) -> Result<Self, FluidError> {
        let in_quantity = |source| FluidError::Quantity { what: "grade", source };
        let grade = Quantity::parse(parameter, Dimension::KINEMATIC_VISCOSITY).map_err(in_quantity)?;
        let grade = grade.positive().map_err(in_quantity)?;
        // Whole grades stay whole: 1000 mm2/s over 1e-6 must not become 1000.0000000000001.
        let grade_cst = (grade.value_si() / CENTISTOKES_M2_PER_S * 1e6).round() / 1e6;
        let (lowest, highest) = (GRADES[0].0, GRADES[GRADES.len() - 1].0);
        if !(lowest..=highest).contains(&grade_cst) {
            return Err(FluidError::CompositionOutOfRange {
                fluid: "silicone-oil",
                what: "grades",
                low: "10 cSt",
                high: "60000 cSt",
                given: format!("{grade_cst} cSt"),
            });
        }
        let spread = grade.relative_uncertainty();
        Ok(Self { grade_cst, given_spread: (spread > 0.0).then_some(spread) })
    }

    fn density_at_grade_temperature(&self) -> f64 {
        let high = GRADES.iter().position(|(grade, _)| *grade >= self.grade_cst);
        let high = high.unwrap_or(GRADES.len() - 1).max(1);
        let ((grade_low, low), (grade_high, high)) = (GRADES[high - 1], GRADES[high]);
        let weight = (self.grade_cst / grade_low).ln() / (grade_high / grade_low).ln();
        low + weight * (high - low)
    }

    fn kinematic_viscosity(&self, t: f64) -> f64 {
        let exponent = VISCOSITY_SLOPE_K * (1.0 / (t + ZERO_CELSIUS_K) - 1.0 / (GRADE_C + ZERO_CELSIUS_K));
        self.grade_cst * CENTISTOKES_M2_PER_S * 10f64.powf(exponent)
    }
}

impl Model for SiliconeOil {
    fn name(&self) -> String {
        format!("silicone-oil:{}cSt", self.grade_cst)
    }

    fn description(&self) -> String {
        format!("silicone oil of {} cSt at {GRADE_C} degC", self.grade_cst)
    }

    fn range(&self) -> Range {
        Range { low_c: 0.0, high_c: 100.0, reason: "where the slope with temperature is taken to hold" }
    }

    fn viscosity_pa_s(&self, temperature_c: f64) -> f64 {
        self.kinematic_viscosity(temperature_c) * self.density_kg_m3(temperature_c)
    }

    fn density_kg_m3(&self, temperature_c: f64) -> f64 {
        self.density_at_grade_temperature() / (1.0 + EXPANSION_PER_K * (temperature_c - GRADE_C))
    }

    fn viscosity_bound(&self, _temperature_c: f64) -> Bound {
        match self.given_spread {
            None => Bound::new(LABEL_TOLERANCE, BoundKind::LabelTolerance),
            Some(spread) => Bound::new(spread, BoundKind::Given),
        }
    }

    fn density_bound(&self, _temperature_c: f64) -> Bound {
        DENSITY_BOUND
    }

    fn source(&self) -> String {
        "grade at 25 degC from the label; slope with temperature, densities and expansion from memory".into()
    }

    fn cautions(&self, _temperature_c: f64) -> Vec<String> {
        /// Oils of long chains begin to thin with shear above this grade (common practice, no source).
        const THINNING_CST: f64 = 10_000.0;
        let mut cautions = Vec::new();
        if self.given_spread.is_none() {
            cautions.push("the label is good to 5 to 10 %, so measure the oil for better, and give it as in `silicone-oil:1000cSt±1%`".into());
        }
        if self.grade_cst >= THINNING_CST {
            cautions.push("oils of this grade thin at rates of shear of 100/s and more".into());
        }
        cautions
    }
}
