//! `slowmote fluid [NAME]`.

use clap::Args;
use serde_json::Value;
use slowmote::physical::Quantity;
use slowmote::physical::fluids::CATALOGUE;
use slowmote::physical::quantity::parse_temperature;
use slowmote::question::{FluidCatalogue, FluidReport};
use slowmote::show::{fluid_catalogue_text, fluid_text};

use super::arguments::as_value;
use super::asked::Asked;
use super::options::{DEFAULT_TEMPERATURE, OutputOptions, RecordOptions, fluid_of, parse_with};
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
    #[command(flatten)]
    record: RecordOptions,
}

impl FluidArguments {
    /// Shows the fluid, or the list.
    ///
    /// # Errors
    /// There is no such fluid, or not at that temperature.
    pub fn run(&self, mut asked: Asked) -> Result<Exit, Failure> {
        let output = |asked| Output::open(&self.output, &[])?.recording(&self.record, asked, &[]);
        match &self.name {
            Some(name) => {
                let report = FluidReport::of(&fluid_of(name, self.temperature)?);
                if self.temperature.is_none() {
                    asked.settle("temperature", DEFAULT_TEMPERATURE);
                }
                output(asked)?.write(&report, |style| fluid_text(&report, style))?;
            }
            None => output(asked)?.write(&FluidCatalogue::of(CATALOGUE), fluid_catalogue_text)?,
        }
        Ok(Exit::Done)
    }

    /// The answer alone.
    ///
    /// # Errors
    /// As [`FluidArguments::run`].
    pub fn answer(&self) -> Result<Value, Failure> {
        match &self.name {
            Some(name) => as_value(&FluidReport::of(&fluid_of(name, self.temperature)?)),
            None => as_value(&FluidCatalogue::of(CATALOGUE)),
        }
    }
}
