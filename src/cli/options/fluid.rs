//! The fluid and its temperature.

use clap::Args;
use slowmote::physical::fluids::default_temperature;
use slowmote::physical::quantity::parse_temperature;
use slowmote::physical::{Fluid, FluidError, Quantity};

use super::parse_with;
use crate::cli::Failure;

/// The fluid that is taken, and said aloud, when none is given.
pub const DEFAULT_FLUID: &str = "water";

/// The temperature that is taken, and said aloud, when none is given: that of [`default_temperature`].
pub const DEFAULT_TEMPERATURE: &str = "20degC";

/// Which fluid, how warm.
#[derive(Debug, Clone, Args)]
#[command(next_help_heading = "The fluid")]
pub struct FluidOptions {
    /// A fluid by name, such as `glycerol:60%`, or by numbers, `viscosity=1mPa.s,density=1g/mL`; `slowmote fluid`
    /// lists the names [default: water]
    #[arg(long, value_name = "FLUID")]
    pub fluid: Option<String>,

    /// Its temperature, such as `25degC` [default: 20degC]
    #[arg(long, value_name = "T", value_parser = parse_with(parse_temperature), allow_hyphen_values = true)]
    pub temperature: Option<Quantity>,
}

impl FluidOptions {
    /// The fluid at its temperature.
    ///
    /// # Errors
    /// There is no such fluid, or not at that temperature.
    pub fn fluid(&self) -> Result<Fluid, Failure> {
        fluid_of(self.fluid.as_deref().unwrap_or(DEFAULT_FLUID), self.temperature)
    }
}

/// A fluid by its specification; the temperature is 20 degC if none is given.
///
/// # Errors
/// There is no such fluid, or not at that temperature.
pub fn fluid_of(specification: &str, temperature: Option<Quantity>) -> Result<Fluid, Failure> {
    Fluid::parse(specification, temperature.unwrap_or_else(default_temperature)).map_err(|error| {
        let hint = match &error {
            FluidError::UnknownFluid { .. } => "`slowmote fluid` lists the fluids known by name",
            FluidError::TemperatureOutOfRange { .. } | FluidError::CompositionOutOfRange { .. } => {
                "if you know its viscosity and density there, give them: --fluid viscosity=..,density=.."
            }
            FluidError::MissingNumber { .. } => "density is needed to tell whether creeping flow holds",
            _ => "`slowmote fluid` shows how each fluid is written",
        };
        Failure::of(&error).hint(hint)
    })
}
