//! Groups of options that several commands share, and how their values are read.

mod body;
mod fluid;
mod motion;
mod output;
mod solver;
mod surroundings;
mod values;

pub use body::{BodyOptions, PiecesName, length_unit};
pub use fluid::{DEFAULT_FLUID, DEFAULT_TEMPERATURE, FluidOptions, fluid_of};
pub use motion::MotionOptions;
pub use output::{OutputOptions, RecordOptions};
pub use solver::SolverOptions;
pub use surroundings::{ChannelOption, FlowOption, centrifuge, channel, flow};
pub use values::parse_with;
