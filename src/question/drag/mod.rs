//! How hard does the fluid hold bodies: resistance, mobility, diffusion, and the drag of a motion.
//!
//! The bodies are moved so that their middle is the origin and half the longest edge of the box around them is 1, solved
//! in a fluid of viscosity 1, and the resistance is then scaled by `mu L`, `mu L^2` and `mu L^3`.

mod blocks;
mod error;
mod fingerprint;
mod motion;
mod one;
mod question;
mod scene;
mod several;
mod trust;

pub use error::DragError;
pub use motion::PrescribedMotion;
pub use question::{DRAG_SCHEMA, DragQuestion};
pub use scene::StandingBody;
