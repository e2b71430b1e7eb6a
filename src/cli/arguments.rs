//! The program's arguments as a whole.

use clap::{Parser, Subcommand};

use super::drag::DragArguments;
use super::fluid::FluidArguments;
use super::regime::RegimeArguments;
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
}

impl Arguments {
    /// Does what was asked for.
    ///
    /// # Errors
    /// A [`Failure`] to be told on stderr.
    pub fn run(&self) -> Result<Exit, Failure> {
        match &self.command {
            Command::Drag(arguments) => arguments.run(),
            Command::Regime(arguments) => arguments.run(),
            Command::Surface(arguments) => arguments.run(),
            Command::Fluid(arguments) => arguments.run(),
        }
    }
}
