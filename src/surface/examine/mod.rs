//! What a triangle mesh is like and what is wrong with it, and the mending of what can be mended.
//!
//! Examination only looks: it never changes a mesh and never fails. [`usable`] is the gate to the solver, and [`mend`]
//! changes a mesh where it is told to and lists what it did. Everything is in file units.

mod boxes;
mod character;
mod creases;
mod error;
mod examination;
mod fans;
mod flaws;
mod holes;
mod intersect;
mod mend;
mod nesting;
mod orientation;
mod shells;
mod triangle_pair;
mod usable;

pub use character::{Character, CharacterKind, SMOOTH_SURFACE_CREASE_DEG};
pub use creases::EdgeTurn;
pub(crate) use creases::{Regions, turn_angles};
pub use error::SurfaceError;
pub use examination::{Examination, examine};
pub use fans::PinchedVertex;
pub use flaws::{ABSURD_ASPECT, NonManifoldEdge, SLIVER_ASPECT, Sliver};
pub use holes::Hole;
pub use intersect::{Intersection, Intersections};
pub use mend::{MendOptions, Mended, mend};
pub use orientation::Orientation;
pub use shells::Shell;
pub use usable::usable;
