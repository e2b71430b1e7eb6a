//! What there is to say of a surface, as it is written to JSON.

use schemars::JsonSchema;
use serde::{Deserialize, Serialize};

use super::Vector;

/// Name and version of the answer's layout.
pub const SURFACE_SCHEMA: &str = "slowmote.surface.1";

/// What there is to say of a surface.
///
/// Every length stands in the file's own unit, and beside it in SI under the same name with `_m`, `_m2` or `_m3`: null
/// where the unit is not known. Facets are counted from 1, in the order of the file; polygons of the file count as
/// the triangles that they were cut into. After mending, all of it is about the mended surface. Lists of places are
/// cut off after some; the counts beside them are whole.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct SurfaceReport {
    /// `slowmote.surface.1`.
    pub schema: String,
    /// The file's name, or the shape.
    pub name: String,
    /// The format that was read and its variant; null for a shape.
    pub format: Option<String>,
    /// The unit of the coordinates as it was given; null if it was not.
    pub unit: Option<String>,
    /// Its size in metres.
    pub metres_per_file_unit: Option<f64>,
    /// Number of vertices, after those at one place were counted as one.
    pub vertices: usize,
    /// Number of facets.
    pub facets: usize,
    /// Edges of the box around it, along x, y, z.
    pub size_in_file_units: Vector,
    /// The same, m.
    pub size_m: Option<Vector>,
    /// The corner of that box with the smallest coordinates.
    pub lowest_corner_in_file_units: Vector,
    /// The same, m.
    pub lowest_corner_m: Option<Vector>,
    /// Centroid of the volume; of the area if there is no volume.
    pub centroid_in_file_units: Vector,
    /// The same, m.
    pub centroid_m: Option<Vector>,
    /// Volume inside the closed pieces, hollows taken off; 0 if no piece is closed.
    pub volume_in_file_units: f64,
    /// The same, m3.
    pub volume_m3: Option<f64>,
    /// Area of the facets.
    pub area_in_file_units: f64,
    /// The same, m2.
    pub area_m2: Option<f64>,
    /// Length of the shortest edge.
    pub shortest_edge_in_file_units: f64,
    /// The same, m.
    pub shortest_edge_m: Option<f64>,
    /// Length of the longest edge.
    pub longest_edge_in_file_units: f64,
    /// The same, m.
    pub longest_edge_m: Option<f64>,
    /// Whether every edge has two facets.
    pub closed: bool,
    /// Which way the facets face: `outward`, `inward`, `mixed`, `impossible` (one side only), or `consistent` (open, so
    /// that there is no outside).
    pub orientation: String,
    /// Facets that face the other way than they should.
    pub wrong_facing: usize,
    /// The first of them.
    pub wrong_facing_places: Vec<FlawPlace>,
    /// Number of connected pieces.
    pub shell_count: usize,
    /// The first pieces.
    pub shells: Vec<ShellReport>,
    /// Number of handles of all pieces together: 0 for balls, 1 for a ring; null if a piece is open or one-sided.
    pub genus: Option<usize>,
    /// Number of holes.
    pub hole_count: usize,
    /// The longest of them, the longest first.
    pub holes: Vec<HoleReport>,
    /// Edges with more than two facets.
    pub non_manifold_edges: usize,
    /// The first of them, with all their facets.
    pub non_manifold_edge_places: Vec<FlawPlace>,
    /// Vertices in which a surface touches itself or another piece.
    pub pinched_vertices: usize,
    /// The first of them, with one facet of each part that meets there.
    pub pinched_vertex_places: Vec<FlawPlace>,
    /// How many of them only join pieces that are otherwise apart, which does no harm.
    pub touching_vertices: usize,
    /// Facets over the corners of an earlier facet.
    pub duplicate_facets: usize,
    /// The first of them, each after the earlier facet.
    pub duplicate_facet_places: Vec<FlawPlace>,
    /// Facets without area.
    pub degenerate_facets: usize,
    /// The first of them.
    pub degenerate_facet_places: Vec<FlawPlace>,
    /// Facets whose longest edge is more than a hundred times their height.
    pub slivers: usize,
    /// The thinnest of them, the thinnest first.
    pub sliver_places: Vec<FlawPlace>,
    /// Pairs of facets that cross or touch where they share no corner.
    pub intersections: usize,
    /// Whether these are all; false if the search was ended early.
    pub intersections_complete: bool,
    /// The first of them.
    pub intersection_places: Vec<FlawPlace>,
    /// Where the surface turns, and how sharply.
    pub creases: CreaseReport,
    /// `faceted smooth` or `polyhedral`.
    pub kind: String,
    /// Why it is taken for that.
    pub kind_reason: String,
    /// What the solver makes of it; null if it refuses the surface.
    pub solved_as: Option<SolvedAs>,
    /// What was mended, in sentences, in the order in which it was done; null if nobody asked for it.
    pub mended: Option<Vec<String>>,
    /// Whether the solver takes the surface.
    pub usable: bool,
    /// Why not.
    pub refusal: Option<String>,
    /// Whether mending makes it usable; null if it is usable, or was mended.
    pub mending_suffices: Option<bool>,
    /// What to do next; null if it is usable.
    pub next_step: Option<String>,
    /// The command that mends it; null where mending doesn't help.
    pub next_command: Option<String>,
    /// What was written; null if nothing was.
    pub written: Option<WrittenReport>,
    /// What there is to know about how it was read.
    pub notes: Vec<String>,
}

/// One piece of a surface.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct ShellReport {
    /// Its first facet.
    pub first_facet: usize,
    /// Number of its facets.
    pub facets: usize,
    /// Whether every edge of it has two facets.
    pub closed: bool,
    /// Which way it faces, in the words of the whole surface.
    pub orientation: String,
    /// The volume inside it, whichever way it faces; 0 if it is open.
    pub volume_in_file_units: f64,
    /// The same, m3.
    pub volume_m3: Option<f64>,
    /// Its area.
    pub area_in_file_units: f64,
    /// The same, m2.
    pub area_m2: Option<f64>,
    /// Its centroid.
    pub centroid_in_file_units: Vector,
    /// The same, m.
    pub centroid_m: Option<Vector>,
    /// Number of its handles; null if it is open or one-sided.
    pub genus: Option<usize>,
    /// The smallest piece that it lies inside of, counted from 1 in this order.
    pub inside_shell: Option<usize>,
}

/// A hole.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct HoleReport {
    /// Number of edges around it.
    pub edges: usize,
    /// Length around it.
    pub length_in_file_units: f64,
    /// The same, m.
    pub length_m: Option<f64>,
    /// A facet beside it.
    pub facet: usize,
    /// The middle of the vertices around it.
    pub place_in_file_units: Vector,
    /// The same, m.
    pub place_m: Option<Vector>,
}

/// Where one flaw is.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct FlawPlace {
    /// The facets it is about.
    pub facets: Vec<usize>,
    /// A point of it.
    pub place_in_file_units: Vector,
    /// The same, m.
    pub place_m: Option<Vector>,
    /// Longest edge over height, for slivers; null otherwise.
    pub aspect: Option<f64>,
}

/// Where the surface turns: the angle between the normals of the two facets of an edge, 0 in a plane.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct CreaseReport {
    /// Edges that turn by this angle or more are counted as creases.
    pub from_deg: f64,
    /// Number of creases.
    pub count: usize,
    /// Their length in all.
    pub length_in_file_units: f64,
    /// The same, m.
    pub length_m: Option<f64>,
    /// The largest turn of all edges.
    pub sharpest_turn_deg: f64,
    /// All edges by their turn.
    pub by_angle: Vec<AngleBand>,
}

/// The edges whose turn lies in a range. An angle is rounded to a hundredth of a degree before it is sorted in.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct AngleBand {
    /// The range begins here.
    pub from_deg: f64,
    /// It ends here; an angle on the border goes into the range that it begins, but a right angle into that which it ends.
    pub to_deg: f64,
    /// Number of edges.
    pub edges: usize,
    /// Their length in all.
    pub length_in_file_units: f64,
    /// The same, m.
    pub length_m: Option<f64>,
}

/// What the solver makes of a surface.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct SolvedAs {
    /// `flat` or `curved`.
    pub geometry: String,
    /// Why.
    pub reason: String,
    /// Edges that turn by this angle or more are kept sharp.
    pub creases_from_deg: f64,
    /// Estimate of the relative change of the drag between this geometry and the body it stands for; 0 for a polyhedron.
    pub relative_geometry_error: f64,
    /// Triangles to begin with.
    pub macro_triangles: usize,
}

/// A surface file that was written.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct WrittenReport {
    /// Where.
    pub path: String,
    /// `STL`, `OBJ`, `PLY`, `OFF` or `MSH`.
    pub format: String,
    /// Number of facets.
    pub facets: usize,
    /// Whether the solver takes what was written, read back, and it is still the same surface but for rounding.
    pub usable: bool,
    /// Why not.
    pub refusal: Option<String>,
}
