//! `slowmote material [NAME]`.

use clap::Args;
use serde_json::Value;
use slowmote::physical::Material;
use slowmote::question::{MaterialCatalogue, MaterialReport};
use slowmote::show::{material_catalogue_text, material_text};

use super::arguments::as_value;
use super::asked::Asked;
use super::options::{OutputOptions, RecordOptions};
use super::output::Output;
use super::{Exit, Failure};

/// Options of `material`.
#[derive(Debug, Args)]
pub struct MaterialArguments {
    /// A material by name, such as `polystyrene`
    #[arg(value_name = "NAME")]
    name: Option<String>,

    #[command(flatten)]
    output: OutputOptions,
    #[command(flatten)]
    record: RecordOptions,
}

impl MaterialArguments {
    /// Shows the material, or the list.
    ///
    /// # Errors
    /// There is no such material.
    pub fn run(&self, asked: Asked) -> Result<Exit, Failure> {
        let output = |asked| Output::open(&self.output, &[])?.recording(&self.record, asked, &[]);
        match &self.name {
            Some(name) => {
                let report = MaterialReport::of(known_material(name)?);
                output(asked)?.write(&report, |style| material_text(&report, style))?;
            }
            None => {
                let catalogue = MaterialCatalogue::all();
                output(asked)?.write(&catalogue, |style| material_catalogue_text(&catalogue, style))?;
            }
        }
        Ok(Exit::Done)
    }

    /// The answer alone.
    ///
    /// # Errors
    /// There is no such material.
    pub fn answer(&self) -> Result<Value, Failure> {
        match &self.name {
            Some(name) => as_value(&MaterialReport::of(known_material(name)?)),
            None => as_value(&MaterialCatalogue::all()),
        }
    }
}

/// A material by name.
///
/// # Errors
/// There is none, with what to do then.
pub fn known_material(name: &str) -> Result<&'static Material, Failure> {
    Material::find(name).map_err(|error| {
        Failure::of(&error).hint("`slowmote material` lists them; or give a density, `--body-density 1.05g/mL`")
    })
}
