//! Quadrature over pairs of panels: touching, near and far.

pub mod direction;
pub mod flat_inner;
pub mod gauss;
pub mod lanes;
pub mod near;
pub mod pair;
pub mod touching;
mod touching_flat;

pub use lanes::Instructions;
pub use near::NearRule;
pub use pair::{PairBlock, PairRules};
