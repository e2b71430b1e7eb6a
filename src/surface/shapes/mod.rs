//! The named shapes.

pub(crate) mod carlson;
mod catalogue;
mod charts;
mod cone;
mod cuboid;
mod cylinder;
mod doublet;
mod ellipsoid;
mod error;
mod flat_end;
mod helix;
mod layout;
mod parse;
mod polyhedron;
mod redcell;
mod ring;
mod rod;
mod shape;
mod sphere;
mod stations;
mod text;

pub use catalogue::{CATALOGUE, Entry};
pub use cone::Cone;
pub use cuboid::Cuboid;
pub use cylinder::{Cylinder, Disc};
pub use doublet::Doublet;
pub use ellipsoid::Ellipsoid;
pub use error::{LARGEST_ASPECT, LONGEST_LENGTH, SHORTEST_LENGTH, ShapeError};
pub use helix::{Hand, Helix, HelixSizes};
pub use parse::ShapeSpec;
pub use polyhedron::{Octahedron, Tetrahedron};
pub use redcell::RedCell;
pub use ring::Ring;
pub use rod::Rod;
pub use shape::{ExactMeasure, Shape};
pub use sphere::Sphere;

use shape::Form;
