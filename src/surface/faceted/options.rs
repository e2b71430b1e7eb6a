//! What is wanted of a faceted body, and what was chosen.

use crate::surface::CharacterKind;

/// What the facets stand for.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[non_exhaustive]
pub enum FacetedGeometry {
    /// The facets are the surface.
    Flat,
    /// Six-node patches through the vertices, smooth but for true creases.
    Curved,
}

/// How macro triangles come from facets.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[non_exhaustive]
pub enum FacetedLayout {
    /// The plane faces of a polyhedron, cut into convex polygons and these starwise, graded towards creases.
    Graded,
    /// Each facet is one macro triangle, not graded.
    AsIs,
}

/// What is wanted; `None` leaves the choice to the mesh.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct FacetedOptions {
    /// The geometry.
    pub geometry: Option<FacetedGeometry>,
    /// The layout; graded only if the geometry is flat.
    pub layout: Option<FacetedLayout>,
    /// Turn of the normal in degrees from which an edge is a crease.
    pub crease_deg: Option<f64>,
}

/// The geometry that was chosen, and why.
#[derive(Debug, Clone, PartialEq)]
pub struct GeometryChoice {
    /// The geometry.
    pub geometry: FacetedGeometry,
    /// What the mesh looks like.
    pub character: CharacterKind,
    /// The reason, in a sentence for the user.
    pub reason: String,
}

/// The layout that was chosen, and why.
#[derive(Debug, Clone, PartialEq)]
pub struct LayoutChoice {
    /// The layout.
    pub layout: FacetedLayout,
    /// Macro triangles of the graded layout, if there is one: `n * n` times as many panels when cut into `n`.
    pub graded_triangles: Option<usize>,
    /// Macro triangles of the layout as is: the number of facets.
    pub as_is_triangles: usize,
    /// The reason, in a sentence for the user.
    pub reason: String,
}
