//! From a triangle mesh to a [`Blueprint`](crate::surface::Blueprint): the body that the facets stand for.
//!
//! Two questions are answered here. *Geometry*: are the facets the true surface (a polyhedron), or samples of a smooth
//! one, which then gets six-node patches through the vertices? *Layout*: are the macro triangles cut from the faces of
//! a polyhedron and graded towards its edges, or is each facet one of them?
//!
//! Not responsible for judging the mesh (see `examine`): only usable meshes come this far.

mod body;
mod corners;
mod crease_curves;
mod curved;
mod ears;
mod fit;
mod geometry_error;
mod graded;
mod normals;
mod options;
mod plane_faces;
mod six_node;
mod smooth_faces;

pub use body::{FacetedBody, faceted};
pub use options::{FacetedGeometry, FacetedLayout, FacetedOptions, GeometryChoice, LayoutChoice};
pub use six_node::SixNodeChart;
