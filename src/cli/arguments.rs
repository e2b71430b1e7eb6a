//! The program's arguments as a whole.

use std::ffi::OsString;

use clap::{CommandFactory, FromArgMatches, Parser, Subcommand};
use serde::Serialize;
use serde_json::Value;

use super::again::AgainArguments;
use super::asked::Asked;
use super::drag::DragArguments;
use super::fluid::FluidArguments;
use super::material::MaterialArguments;
use super::regime::RegimeArguments;
use super::schema::SchemaArguments;
use super::surface::SurfaceArguments;
use super::{Exit, Failure};

/// Drag, torque, mobility and diffusion of small bodies in viscous fluids.
///
/// Every number comes with an error estimate, and every answer with a verdict on whether creeping flow holds.
#[derive(Debug, Parser)]
#[command(name = "slowmote", version, max_term_width = 100, disable_help_subcommand = true)]
#[command(after_help = "\
Examples:
  slowmote drag sphere:10um
  slowmote drag bead.stl --unit mm --fluid silicone-oil:1000cSt --temperature 22degC
  slowmote drag rod:12x2um --turn 30deg@y --speed 50um/s --along x --json
  slowmote regime --size 10um --speed 1mm/s --in tube:diameter=50um --flow tube:mean=2mm/s
  slowmote surface scan.ply --unit um
  slowmote fluid glycerol:60% --temperature 25degC

Exit codes:
  0  done
  1  the input can't be used, or the solve failed
  2  wrong arguments
  3  done, but the accuracy asked for was not reached
  4  outside creeping flow, and --strict was given
  70 a bug")]
pub struct Arguments {
    #[command(subcommand)]
    command: Command,
}

/// What to do.
#[derive(Debug, Subcommand)]
pub enum Command {
    /// How hard the fluid holds a body: resistance, mobility, diffusion, and the drag of a motion
    Drag(Box<DragArguments>),
    /// Whether creeping flow holds, without solving: every number that can be told from what is known, with its verdict
    Regime(Box<RegimeArguments>),
    /// What a surface file is like, what is wrong with it, and whether the solver takes it; mends and writes surfaces
    Surface(SurfaceArguments),
    /// Viscosity and density of a fluid, and how well they are known; without a name, the list of fluids
    Fluid(FluidArguments),
    /// Usual density of a material, and its source; without a name, the list of materials
    Material(MaterialArguments),
    /// Computes a recorded answer again and says what differs beyond the stated errors
    Again(AgainArguments),
    /// The JSON Schema of an input or output; without a name, the list of them
    Schema(SchemaArguments),
}

impl Arguments {
    /// Reads a command line, the program's name first; also what it asks, in its own words.
    ///
    /// # Errors
    /// A usage error, or help and version, which come the same way.
    pub fn of_line(line: impl IntoIterator<Item = OsString>) -> Result<(Self, Asked), clap::Error> {
        let program = Self::command();
        let matches = program.clone().try_get_matches_from(line)?;
        let arguments = Self::from_arg_matches(&matches)?;
        let asked = Asked::of(&program, &matches).unwrap_or_default();
        Ok((arguments, asked))
    }

    /// Does what was asked for.
    ///
    /// # Errors
    /// A [`Failure`] to be told on stderr.
    pub fn run(&self, asked: Asked) -> Result<Exit, Failure> {
        match &self.command {
            Command::Drag(arguments) => arguments.run(asked),
            Command::Regime(arguments) => arguments.run(asked),
            Command::Surface(arguments) => arguments.run(asked),
            Command::Fluid(arguments) => arguments.run(asked),
            Command::Material(arguments) => arguments.run(asked),
            Command::Again(arguments) => arguments.run(),
            Command::Schema(arguments) => arguments.run(),
        }
    }

    /// The answer alone, of a command whose answers can be recorded.
    ///
    /// # Errors
    /// As [`Arguments::run`]; also a command without an answer of its own.
    pub fn answer(&self, quiet: bool) -> Result<Value, Failure> {
        match &self.command {
            Command::Drag(arguments) => as_value(&arguments.answer(quiet)?),
            Command::Regime(arguments) => as_value(&arguments.answer()?),
            Command::Surface(arguments) => as_value(&arguments.answer()?),
            Command::Fluid(arguments) => arguments.answer(),
            Command::Material(arguments) => arguments.answer(),
            Command::Again(_) | Command::Schema(_) => {
                Err(Failure::new("this command gives no answer that can be recorded")
                    .hint("give a record that `--record FILE` wrote"))
            }
        }
    }
}

/// An answer as JSON.
pub fn as_value<T: Serialize>(answer: &T) -> Result<Value, Failure> {
    serde_json::to_value(answer).map_err(|error| Failure::of(&error).during("the answer can't be put into JSON"))
}
