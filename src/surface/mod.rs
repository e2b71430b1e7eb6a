//! Bodies and walls as triangulated surfaces.
//!
//! Responsible for shapes by name, surface files, their examination, and for cutting a body into the curved
//! triangles ("panels") that the solver works on. Not responsible for physics: nothing here knows of fluids.
//!
//! The data flows one way: a shape or a file becomes a [`Blueprint`] (a few large macro triangles on exact
//! charts); the blueprint is subdivided into [`Panels`]; the solver reads panels and nothing else.

mod blueprint;
mod chart;
mod examine;
mod faceted;
mod files;
mod measure;
mod mesh;
mod panels;
mod patch;
pub mod shapes;
mod thinning;
pub mod triangle_rule;

pub use blueprint::{Blueprint, Geometry, Grading, MacroTriangle};
pub use chart::{Chart, Placed, Placement};
pub use examine::{
    ABSURD_ASPECT, Character, CharacterKind, EdgeTurn, Examination, Hole, Intersection, Intersections, MendOptions,
    Mended, NonManifoldEdge, Orientation, PinchedVertex, SLIVER_ASPECT, SMOOTH_SURFACE_CREASE_DEG, Shell, Sliver,
    SurfaceError, examine, mend, usable,
};
pub use faceted::{
    FacetedBody, FacetedGeometry, FacetedLayout, FacetedOptions, GeometryChoice, LayoutChoice, SixNodeChart, faceted,
};
pub use files::{
    FileError, FormatError, RawSurface, SurfaceFormat, WriteError, read_surface, read_surface_bytes, surface_bytes,
    write_surface,
};
pub use measure::Measure;
pub use mesh::{MeshError, TriangleMesh, WELD_ULPS, Welded, weld, weld_tolerance};
pub use panels::{Panel, Panels, Prolongation};
pub use patch::{Patch, PatchPoint};
pub use shapes::{Shape, ShapeError};

/// A point or a direction in space: x, y, z.
pub type Point = nalgebra::Vector3<f64>;
