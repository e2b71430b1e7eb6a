//! Fluids by name and temperature, or by numbers: viscosity, density and how well they are known.

mod air;
mod aqueous;
mod bound;
mod catalogue;
mod error;
mod fluid;
mod fraction;
mod glycerol;
mod heavy_water;
mod model;
mod numbers;
mod parse;
mod silicone_oil;
mod sucrose;
mod water;

pub use bound::{Bound, BoundKind};
pub use catalogue::{CATALOGUE, CatalogueEntry};
pub use error::FluidError;
pub use fluid::{Fluid, default_temperature};
