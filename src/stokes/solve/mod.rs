//! From a blueprint to a resistance with an error estimate.

mod dense;
mod estimate;
mod levels;
mod refine;
mod request;
mod solution;

pub use refine::{grand_resistance, relative_change, resistance, resistance_of_panels};
pub use request::{Factor, Observer, Part, Request, Stage};
pub use solution::{GrandSolution, RelativeError, Solution, SolveError, Statistics};
