//! What a named fluid has to tell about itself; [`super::Fluid`] evaluates it at a temperature.

use super::bound::Bound;

/// Temperatures at which a model holds, degC, and why it ends there.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Range {
    pub low_c: f64,
    pub high_c: f64,
    pub reason: &'static str,
}

/// The part of an uncertainty that comes from how the fluid was made up.
pub(super) struct CompositionSpread {
    pub name: &'static str,
    pub viscosity_relative: f64,
    pub density_relative: f64,
}

/// Properties as functions of the temperature in degC.
pub(super) trait Model {
    /// The specification that gives this fluid again, such as `glycerol:60%`.
    fn name(&self) -> String;
    /// What it is, in words.
    fn description(&self) -> String;
    fn range(&self) -> Range;
    /// Pa.s.
    fn viscosity_pa_s(&self, temperature_c: f64) -> f64;
    /// kg/m3.
    fn density_kg_m3(&self, temperature_c: f64) -> f64;
    fn viscosity_bound(&self, temperature_c: f64) -> Bound;
    fn density_bound(&self, temperature_c: f64) -> Bound;
    /// Where the numbers come from, and which of them are from memory.
    fn source(&self) -> String;

    fn cautions(&self, _temperature_c: f64) -> Vec<String> {
        Vec::new()
    }

    fn composition_spread(&self, _temperature_c: f64) -> Option<CompositionSpread> {
        None
    }

    /// m; only a gas has one.
    fn mean_free_path_m(&self, _temperature_c: f64) -> Option<f64> {
        None
    }
}
