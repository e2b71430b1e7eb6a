//! What people and programs read: text for the one, JSON for the other.
//!
//! Everything here turns an answer into a string; nothing here prints, and nothing here computes physics.
//! JSON is a promise (see [`crate::question::DragAnswer`]); the text is for eyes and may change.

mod again_text;
mod drag;
mod fluid_text;
mod json;
mod material_text;
mod numbers;
mod regime_text;
mod sheet;
mod surface_flaws_text;
mod surface_text;
mod surface_units;
mod tensor_text;

pub use again_text::again_text;
pub use drag::{Assumed, drag_text};
pub use fluid_text::{fluid_catalogue_text, fluid_text};
pub use json::to_json;
pub use material_text::{material_catalogue_text, material_text};
pub use regime_text::regime_text;
pub use sheet::Style;
pub use surface_text::surface_text;
