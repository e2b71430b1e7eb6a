//! Six-node patches through the vertices of a mesh.
//!
//! The middle of an edge from x0 to x1 with unit normals n0, n1 lies at
//!
//! ```text
//! (x0 + x1)/2 + m d.(n1 - n0) / (4 (1 + c))     d = x1 - x0,  m ~ n0 + n1,  c = cos(half the angle from n0 to n1)
//! ```
//! which is exact where the edge's normals are those of a sphere or a circular cylinder, and off by the fourth power
//! of the edge's length on any smooth surface with exact normals. On creases the middle lies on the crease's own curve.

use std::collections::BTreeSet;

use super::crease_curves::CreaseCurves;
use super::normals::{Estimate, VertexNormals};
use super::smooth_faces::SmoothFaces;
use crate::surface::mesh::Edge;
use crate::surface::{Patch, Point, TriangleMesh};

/// The largest distance of a mid-node from the middle of its edge, in edge lengths: that of a quarter circle is 0.21.
const LARGEST_BULGE: f64 = 0.25;

/// A patch is folded if somewhere its normal, measured along the facet's and in units of its area, is less than this.
const FOLDED: f64 = 0.1;

/// The curved patches of a mesh.
#[derive(Debug)]
pub(super) struct CurvedMesh {
    /// Nodes of each facet's patch.
    pub patches: Vec<[Point; 6]>,
    /// Edges that were left straight because their patches would have folded.
    pub straightened: usize,
}

/// Makes the patches, with one or the other estimate of the normals.
pub(super) fn curved(
    mesh: &TriangleMesh,
    faces: &SmoothFaces,
    normals: &VertexNormals,
    estimate: Estimate,
) -> CurvedMesh {
    let table = &faces.table;
    let mut middles = edge_middles(mesh, faces, normals, estimate);
    let patch = |middles: &[Point], facet: usize| {
        let [a, b, c] = mesh.corners(facet);
        let [ab, bc, ca] = table.of_facet[facet].map(|edge| middles[edge]);
        [a, b, c, ab, bc, ca]
    };
    let straight = |edge: usize| straight_middle(mesh, table.edges[edge].ends);
    let mut straightened = 0;
    // Straightening an edge can fold the patch beyond it, but every round straightens at least one more edge.
    loop {
        let folded = (0..mesh.facets().len()).filter(|facet| is_folded(&patch(&middles, *facet)));
        let edges = folded.flat_map(|facet| table.of_facet[facet]).filter(|edge| middles[*edge] != straight(*edge));
        let edges = edges.collect::<BTreeSet<_>>();
        if edges.is_empty() {
            break;
        }
        straightened += edges.len();
        for edge in edges {
            middles[edge] = straight(edge);
        }
    }
    CurvedMesh { patches: (0..mesh.facets().len()).map(|facet| patch(&middles, facet)).collect(), straightened }
}

/// The middle of each edge on the smooth body.
pub(super) fn edge_middles(
    mesh: &TriangleMesh,
    faces: &SmoothFaces,
    normals: &VertexNormals,
    estimate: Estimate,
) -> Vec<Point> {
    let curves = CreaseCurves::new(faces);
    let middle = |(edge, is_crease): (&Edge, &bool)| {
        let ends = edge.ends;
        let straight = straight_middle(mesh, ends);
        let middle = if *is_crease {
            curves.middle(mesh, ends)
        } else {
            let face = edge.facets.first().map_or(0, |(facet, _)| faces.of_facet[*facet]);
            let [a, b] = ends;
            middle(mesh, ends, [[a, b], [b, a]].map(|edge| normals.at(face, edge, estimate)))
        };
        let length = (mesh.vertices()[ends[1]] - mesh.vertices()[ends[0]]).norm();
        if (middle - straight).norm() <= LARGEST_BULGE * length { middle } else { straight }
    };
    faces.table.edges.iter().zip(&faces.is_crease).map(middle).collect()
}

fn straight_middle(mesh: &TriangleMesh, [a, b]: [usize; 2]) -> Point {
    0.5 * (mesh.vertices()[a] + mesh.vertices()[b])
}

fn middle(mesh: &TriangleMesh, ends: [usize; 2], [n, m]: [Point; 2]) -> Point {
    let [a, b] = ends.map(|vertex| mesh.vertices()[vertex]);
    let chord = b - a;
    let straight = 0.5 * (a + b);
    let Some(mean) = (n + m).try_normalize(1e-9) else { return straight };
    let cos_half = (0.5 * (1.0 + n.dot(&m))).max(0.0).sqrt();
    straight + mean * (chord.dot(&(m - n)) / (4.0 * (1.0 + cos_half)))
}

fn is_folded(nodes: &[Point; 6]) -> bool {
    let [a, b, c, ..] = nodes;
    let facet = (b - a).cross(&(c - a));
    let patch = Patch::SixNode(*nodes);
    let samples = [(0.0, 0.0), (1.0, 0.0), (0.0, 1.0), (0.5, 0.0), (0.5, 0.5), (0.0, 0.5), (1.0 / 3.0, 1.0 / 3.0)];
    samples.iter().any(|(u, v)| patch.at(*u, *v).area_normal().dot(&facet) < FOLDED * facet.norm_squared())
}
