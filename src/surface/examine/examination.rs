//! The whole examination in one struct.

use super::character::{Character, find_character};
use super::creases::{EdgeTurn, turn_angles};
use super::fans::{PinchedVertex, pinched_vertices};
use super::flaws::{NonManifoldEdge, Sliver, duplicates, non_manifold_edges, thin_facets};
use super::holes::{Hole, find_holes};
use super::intersect::{Intersections, find_intersections};
use super::nesting::find_nesting;
use super::orientation::Orientation;
use super::shells::{Shell, find_shells};
use crate::surface::mesh::EdgeTable;
use crate::surface::{Point, SMOOTH_SURFACE_CREASE_DEG, TriangleMesh};

/// What a mesh is like, in file units; vertices and facets are numbered from 0 in the file's order.
#[derive(Debug, Clone, PartialEq)]
#[non_exhaustive]
pub struct Examination {
    /// Number of vertices.
    pub vertices: usize,
    /// Number of edges.
    pub edges: usize,
    /// Number of facets.
    pub facets: usize,
    /// Opposite corners of the smallest box around the surface.
    pub bounding_box: (Point, Point),
    /// Smallest and largest edge length; zeros if there are no facets.
    pub edge_lengths: (f64, f64),
    /// Where the surface is open.
    pub holes: Vec<Hole>,
    /// Edges with more than two facets.
    pub non_manifold_edges: Vec<NonManifoldEdge>,
    /// Vertices in which the surface touches itself.
    pub pinched_vertices: Vec<PinchedVertex>,
    /// Which way the facets face, taken over all shells.
    pub orientation: Orientation,
    /// The connected pieces.
    pub shells: Vec<Shell>,
    /// The shell of each facet.
    pub shell_of_facet: Vec<usize>,
    /// Facets over the same vertices as an earlier facet, which comes first.
    pub duplicate_facets: Vec<[usize; 2]>,
    /// Facets without area.
    pub degenerate_facets: Vec<usize>,
    /// Thin facets, from [`SLIVER_ASPECT`](super::SLIVER_ASPECT) on.
    pub slivers: Vec<Sliver>,
    /// Where the surface passes through itself.
    pub intersections: Intersections,
    /// Surface area.
    pub area: f64,
    /// Enclosed volume: of all closed shells, those inside another one subtracted.
    pub volume: f64,
    /// Centroid of that volume; of the area if there is no volume.
    pub centroid: Point,
    /// Number of handles of all shells together, if all are closed and orientable.
    pub genus: Option<usize>,
    /// Edges at which the normal turns by [`SMOOTH_SURFACE_CREASE_DEG`] or more, and their total length.
    pub creases: (usize, f64),
    /// The largest turn of the normal at an edge, in degrees.
    pub sharpest_turn_deg: f64,
    /// How far the surface turns at each edge that joins two facets which agree on their outside.
    pub turns: Vec<EdgeTurn>,
    /// Whether it is a polyhedron or a smooth body sampled by facets.
    pub character: Character,
}

impl Examination {
    /// `true` if the surface is closed: every edge has exactly two facets.
    pub fn is_closed(&self) -> bool {
        self.facets > 0 && self.shells.iter().all(|shell| shell.closed)
    }

    /// Number and total length (file units) of the edges at which the normal turns by `angle_deg` or more.
    pub fn creases_from(&self, angle_deg: f64) -> (usize, f64) {
        let sharp = self.turns.iter().filter(|turn| turn.angle_deg >= angle_deg);
        sharp.fold((0, 0.0), |(count, length), turn| (count + 1, length + turn.length))
    }
}

/// Examines a mesh. Weld it first: in an unwelded mesh no facet has a neighbour.
///
/// Takes time proportional to `n log n` for bodies as they are; memory in proportion to `n`.
pub fn examine(mesh: &TriangleMesh) -> Examination {
    let table = EdgeTable::new(mesh);
    let (mut shells, shell_of_facet) = find_shells(mesh, &table);
    find_nesting(mesh, &mut shells, &shell_of_facet);
    let (degenerate_facets, slivers) = thin_facets(mesh);
    let (volume, centroid) = total_volume(&shells);

    let length = |ends: [usize; 2]| (mesh.vertices()[ends[1]] - mesh.vertices()[ends[0]]).norm();
    let lengths = table.edges.iter().map(|edge| length(edge.ends)).collect::<Vec<_>>();
    let shortest = lengths.iter().copied().reduce(f64::min).unwrap_or(0.0);
    let longest = lengths.iter().copied().fold(0.0, f64::max);

    let threshold = SMOOTH_SURFACE_CREASE_DEG.to_radians();
    let (mut creases, mut sharpest, mut turns) = ((0, 0.0), 0.0_f64, Vec::with_capacity(table.edges.len()));
    for ((edge, angle), length) in table.edges.iter().zip(turn_angles(mesh, &table)).zip(&lengths) {
        if edge.pair().is_some() {
            sharpest = sharpest.max(angle);
            turns.push(EdgeTurn { vertices: edge.ends, angle_deg: angle.to_degrees(), length: *length });
            if angle >= threshold {
                creases = (creases.0 + 1, creases.1 + length);
            }
        }
    }
    Examination {
        vertices: mesh.vertices().len(),
        edges: table.edges.len(),
        facets: mesh.facets().len(),
        bounding_box: mesh.bounding_box(),
        edge_lengths: (shortest, longest),
        holes: find_holes(mesh, &table),
        non_manifold_edges: non_manifold_edges(mesh, &table),
        pinched_vertices: pinched_vertices(mesh, &table, &shell_of_facet),
        orientation: total_orientation(&shells),
        duplicate_facets: duplicates(mesh),
        degenerate_facets,
        slivers,
        intersections: find_intersections(mesh),
        area: shells.iter().map(|shell| shell.area).sum(),
        volume,
        centroid,
        genus: shells.iter().map(|shell| shell.genus).sum(),
        creases,
        sharpest_turn_deg: sharpest.to_degrees(),
        turns,
        character: find_character(mesh, &table),
        shells,
        shell_of_facet,
    }
}

/// Shells at odd depth are hollows.
fn total_volume(shells: &[Shell]) -> (f64, Point) {
    let is_hollow = |shell: &Shell| {
        let mut depth = 0;
        let mut at = shell.inside;
        while let Some(outer) = at {
            depth += 1;
            at = shells[outer].inside;
        }
        depth % 2 == 1
    };
    let (mut volume, mut moment, mut area, mut area_moment) = (0.0, Point::zeros(), 0.0, Point::zeros());
    for shell in shells {
        let part = if is_hollow(shell) { -shell.volume } else { shell.volume };
        volume += part;
        moment += part * shell.centroid;
        area += shell.area;
        area_moment += shell.area * shell.centroid;
    }
    let centroid = if volume > 0.0 {
        moment / volume
    } else if area > 0.0 {
        area_moment / area
    } else {
        Point::zeros()
    };
    (volume, centroid)
}

fn total_orientation(shells: &[Shell]) -> Orientation {
    let mut total = None;
    for shell in shells {
        total = Some(match (total, shell.orientation) {
            (_, Orientation::Impossible) | (Some(Orientation::Impossible), _) => Orientation::Impossible,
            (None, own) => own,
            (Some(before), own) if before == own => own,
            _ => Orientation::Mixed,
        });
    }
    total.unwrap_or(Orientation::Consistent)
}
