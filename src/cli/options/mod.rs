//! Groups of options that several commands share, and how their values are read.

mod body;
mod fluid;
mod motion;
mod output;
mod solver;
mod values;

pub use body::{BodyOptions, length_unit};
pub use fluid::{DEFAULT_FLUID, DEFAULT_TEMPERATURE, FluidOptions, fluid_of};
pub use motion::MotionOptions;
pub use output::{OutputOptions, RecordOptions};
pub use solver::SolverOptions;
pub use values::parse_with;
