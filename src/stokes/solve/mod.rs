//! From a blueprint to a resistance with an error estimate.

mod dense;
mod estimate;
mod levels;
mod refine;
mod request;
mod solution;

pub use refine::{resistance, resistance_of_panels};
pub use request::{Factor, Observer, Request, Stage};
pub use solution::{RelativeError, Solution, SolveError, Statistics};
