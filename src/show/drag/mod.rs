//! The answer to `drag` as text.

mod axes;
mod bodies;
mod motion;
mod one;
mod several;
mod text;
mod trust;

pub use text::{Assumed, drag_text};
