//! Quantities with dimensions, constants, fluids and materials.
//!
//! Everything that has a unit is read and written here; the solver below knows pure shapes only.
//! This room knows nothing of the rest of the program.

pub mod constants;
pub mod fluids;
pub mod materials;
pub(crate) mod nearest;
pub mod propagation;
pub mod quantity;

pub use fluids::{Fluid, FluidError};
pub use materials::{Material, MaterialError};
pub use propagation::{Contribution, ErrorBudget};
pub use quantity::{Dimension, DisplayUnit, Quantity, QuantityError, ScaledUnit};
