//! The Galerkin single-layer operator: from panels to a symmetric positive definite matrix.

mod assembly;
mod clouds;
mod moments;

pub use assembly::{assemble, bytes_needed};
pub use moments::{Bodies, Moments};
