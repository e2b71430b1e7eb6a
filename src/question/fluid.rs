//! A fluid at a temperature, on its own: the answer to `fluid NAME`.

use schemars::JsonSchema;
use serde::{Deserialize, Serialize};

use super::answer::FluidAnswer;
use super::cautions::fluid_cautions;
use crate::physical::Fluid;
use crate::physical::fluids::CatalogueEntry;

/// Name and version of the layout of [`FluidReport`].
pub const FLUID_SCHEMA: &str = "slowmote.fluid.1";

/// Name and version of the layout of [`FluidCatalogue`].
pub(super) const CATALOGUE_SCHEMA: &str = "slowmote.fluids.1";

/// Properties of a fluid at one temperature, and how well they are known.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct FluidReport {
    /// Name and version of this layout: `slowmote.fluid.1`.
    pub schema: String,
    /// The specification that gives this fluid again.
    pub name: String,
    /// What it is, in words.
    pub description: String,
    /// Temperature, degC.
    pub temperature_c: f64,
    /// Dynamic viscosity, Pa.s.
    pub viscosity_pa_s: f64,
    /// Kinematic viscosity, m2/s.
    pub kinematic_viscosity_m2_per_s: f64,
    /// Density, kg/m3.
    pub density_kg_m3: f64,
    /// Relative uncertainty of the viscosity, with those of temperature and composition.
    pub relative_uncertainty: f64,
    /// Relative uncertainty of the density.
    pub density_relative_uncertainty: f64,
    /// On what grounds the uncertainty of the viscosity is stated.
    pub grounds: String,
    /// Relative change of the viscosity with temperature, 1/K; null for a fluid given by numbers.
    pub viscosity_change_per_k: Option<f64>,
    /// Lowest and highest temperature described, degC; null for a fluid given by numbers.
    pub valid_from_to_c: Option<[f64; 2]>,
    /// Mean free path, m; null but for a gas.
    pub mean_free_path_m: Option<f64>,
    /// Where the numbers come from.
    pub source: String,
    /// What to beware of.
    pub cautions: Vec<String>,
}

/// The fluids known by name: the answer to `fluid` alone.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct FluidCatalogue {
    /// Name and version of this layout: `slowmote.fluids.1`.
    pub schema: String,
    /// The fluids.
    pub fluids: Vec<CataloguedFluid>,
}

/// A fluid known by name.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct CataloguedFluid {
    /// Its name.
    pub name: String,
    /// How it is written, with its parameter if it needs one.
    pub example: String,
    /// What it is, in words.
    pub description: String,
}

impl FluidCatalogue {
    /// The list of these fluids.
    pub fn of(entries: &[CatalogueEntry]) -> Self {
        let fluids = entries.iter().map(|entry| CataloguedFluid {
            name: entry.name.to_owned(),
            example: entry.example.to_owned(),
            description: entry.description.to_owned(),
        });
        Self { schema: CATALOGUE_SCHEMA.to_owned(), fluids: fluids.collect() }
    }
}

impl FluidReport {
    /// The report on a fluid.
    pub fn of(fluid: &Fluid) -> Self {
        Self {
            schema: FLUID_SCHEMA.to_owned(),
            name: fluid.name().to_owned(),
            description: fluid.description().to_owned(),
            temperature_c: without_binary_noise(fluid.temperature_c()),
            viscosity_pa_s: fluid.viscosity_pa_s(),
            kinematic_viscosity_m2_per_s: fluid.kinematic_viscosity_m2_s(),
            density_kg_m3: fluid.density_kg_m3(),
            relative_uncertainty: fluid.viscosity_relative_uncertainty(),
            density_relative_uncertainty: fluid.density_relative_uncertainty(),
            grounds: fluid.viscosity_bound().kind.to_string(),
            viscosity_change_per_k: fluid.viscosity_temperature_sensitivity_per_k(),
            valid_from_to_c: fluid.validity_c().map(|(low, high)| [low, high]),
            mean_free_path_m: fluid.mean_free_path_m(),
            source: fluid.source().to_owned(),
            cautions: fluid_cautions(fluid),
        }
    }
}

impl From<&Fluid> for FluidAnswer {
    fn from(fluid: &Fluid) -> Self {
        Self {
            name: fluid.name().to_owned(),
            temperature_c: without_binary_noise(fluid.temperature_c()),
            viscosity_pa_s: fluid.viscosity_pa_s(),
            density_kg_m3: fluid.density_kg_m3(),
            relative_uncertainty: fluid.viscosity_relative_uncertainty(),
            source: fluid.source().to_owned(),
        }
    }
}

/// 36.6 degC, and no 36.60000000000002, after a journey through kelvin: a nanokelvin is nobody's.
fn without_binary_noise(temperature_c: f64) -> f64 {
    (temperature_c * 1e9).round() / 1e9
}
