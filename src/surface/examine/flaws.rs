//! Flaws of single facets and edges.

use std::collections::BTreeMap;

use crate::surface::mesh::EdgeTable;
use crate::surface::{Point, TriangleMesh};

/// Longest edge over height from which a facet is listed as a sliver. Meshes of drawn parts often have some; they cost
/// accuracy, but not the result.
pub const SLIVER_ASPECT: f64 = 100.0;

/// Longest edge over height from which a facet is refused: its height drowns in the rounding of single-precision
/// coordinates (1e-7 of the size) to the point where its normal is off by a thousandth and more.
pub const ABSURD_ASPECT: f64 = 1e4;

/// Longest edge over height from which a facet counts as a line.
const LINE_ASPECT: f64 = 1e10;

/// A thin facet.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Sliver {
    /// The facet, numbered from 0.
    pub facet: usize,
    /// Its centre.
    pub place: Point,
    /// Longest edge over the height on it.
    pub aspect: f64,
}

/// An edge that more than two facets share.
#[derive(Debug, Clone, PartialEq)]
pub struct NonManifoldEdge {
    /// Its vertices, numbered from 0.
    pub vertices: [usize; 2],
    /// Its middle.
    pub place: Point,
    /// The facets along it, numbered from 0.
    pub facets: Vec<usize>,
}

/// Longest edge over height; infinite for a facet without area.
pub(super) fn aspect(mesh: &TriangleMesh, facet: usize) -> f64 {
    let [a, b, c] = mesh.corners(facet);
    let longest = (b - a).norm_squared().max((c - b).norm_squared()).max((a - c).norm_squared());
    let area = mesh.area_normal(facet).norm();
    if area > 0.0 && longest > 0.0 { longest / area } else { f64::INFINITY }
}

/// Facets without area, and slivers.
pub(super) fn thin_facets(mesh: &TriangleMesh) -> (Vec<usize>, Vec<Sliver>) {
    let (mut degenerate, mut slivers) = (Vec::new(), Vec::new());
    for (facet, [a, b, c]) in mesh.facets().iter().enumerate() {
        let aspect = aspect(mesh, facet);
        if a == b || b == c || c == a || aspect > LINE_ASPECT {
            degenerate.push(facet);
        } else if aspect > SLIVER_ASPECT {
            slivers.push(Sliver { facet, place: mesh.centre(facet), aspect });
        }
    }
    (degenerate, slivers)
}

/// Facets over the same three vertices as an earlier one, with that one first.
pub(super) fn duplicates(mesh: &TriangleMesh) -> Vec<[usize; 2]> {
    let mut first = BTreeMap::new();
    let mut duplicates = Vec::new();
    for (facet, corners) in mesh.facets().iter().enumerate() {
        let mut sorted = *corners;
        sorted.sort_unstable();
        let earlier = *first.entry(sorted).or_insert(facet);
        if earlier != facet {
            duplicates.push([earlier, facet]);
        }
    }
    duplicates
}

pub(super) fn non_manifold_edges(mesh: &TriangleMesh, table: &EdgeTable) -> Vec<NonManifoldEdge> {
    let crowded = table.edges.iter().filter(|edge| edge.facets.len() > 2);
    crowded
        .map(|edge| NonManifoldEdge {
            vertices: edge.ends,
            place: 0.5 * (mesh.vertices()[edge.ends[0]] + mesh.vertices()[edge.ends[1]]),
            facets: edge.facets.iter().map(|(facet, _)| *facet).collect(),
        })
        .collect()
}
