//! The indexed triangle mesh: what surface files hold and what examination, mending and the making of blueprints
//! read.
//!
//! A mesh keeps its file's coordinates and its file's order of facets, so that every complaint can name a facet that
//! the reader of the file finds again. Not responsible for judging the surface (see `examine`).

mod edges;
mod polygon;
mod triangle_mesh;
mod weld;

pub(crate) use edges::{Edge, EdgeTable};
pub(crate) use polygon::{MAX_POLYGON_CORNERS, triangulate};
pub use triangle_mesh::{MeshError, TriangleMesh};
pub use weld::{WELD_ULPS, Welded, weld, weld_tolerance};
