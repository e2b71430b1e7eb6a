//! Groups of options that several commands share, and how their values are read.

mod body;
mod fluid;
mod motion;
mod output;
mod solver;
mod surroundings;
mod values;

pub use body::{BodyOptions, length_unit};
pub use fluid::{FluidOptions, fluid_of};
pub use motion::MotionOptions;
pub use output::OutputOptions;
pub use solver::SolverOptions;
pub use surroundings::{ChannelOption, FlowOption, centrifuge, channel, flow};
pub use values::parse_with;
