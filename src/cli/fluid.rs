//! `slowmote fluid [NAME]`.

use clap::Args;
use slowmote::physical::Quantity;
use slowmote::physical::fluids::CATALOGUE;
use slowmote::physical::quantity::parse_temperature;
use slowmote::question::{FluidCatalogue, FluidReport};
use slowmote::show::{fluid_catalogue_text, fluid_text};

use super::options::{OutputOptions, fluid_of, parse_with};
use super::output::Output;
use super::{Exit, Failure};

/// Options of `fluid`.
#[derive(Debug, Args)]
pub struct FluidArguments {
    /// A fluid by name, such as `glycerol:60%`, or by numbers, `viscosity=1mPa.s,density=1g/mL`
    #[arg(value_name = "NAME")]
    name: Option<String>,

    /// Its temperature, such as `25degC` [default: 20degC]
    #[arg(long, value_name = "T", value_parser = parse_with(parse_temperature), allow_hyphen_values = true)]
    temperature: Option<Quantity>,

    #[command(flatten)]
    output: OutputOptions,
}

impl FluidArguments {
    /// Shows the fluid, or the list.
    ///
    /// # Errors
    /// There is no such fluid, or not at that temperature.
    pub fn run(&self) -> Result<Exit, Failure> {
        match &self.name {
            Some(name) => {
                let report = FluidReport::of(&fluid_of(name, self.temperature)?);
                let output = Output::open(&self.output, &[])?;
                output.write(&report, |style| fluid_text(&report, style))?;
            }
            None => {
                let output = Output::open(&self.output, &[])?;
                output.write(&FluidCatalogue::of(CATALOGUE), fluid_catalogue_text)?;
            }
        }
        Ok(Exit::Done)
    }
}
