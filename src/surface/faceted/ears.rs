//! Facets with two edges on one smooth crease, such as the first and last facet of a fan over a round cap.
//!
//! Their two edges become one smooth curve, so that a single patch would have a straight angle at the corner between
//! them, and no area there. The third edge of such a facet is cut at its middle, and the facet and its neighbour with
//! it; each piece then has one edge on the crease.

use super::corners::CreaseRole;
use super::crease_curves::CreaseCurves;
use super::curved::edge_middles;
use super::normals::{Estimate, VertexNormals};
use super::smooth_faces::SmoothFaces;
use crate::surface::TriangleMesh;

/// The mesh with such facets cut, the shell of each facet, and how many facets were cut; `None` if there are none.
pub(super) fn cut_ears(
    mesh: &TriangleMesh,
    faces: &SmoothFaces,
    normals: &VertexNormals,
    shells: &[usize],
) -> Option<(TriangleMesh, Vec<usize>, usize)> {
    let curves = CreaseCurves::new(faces);
    let is_ear = |facet: usize| {
        let edges = faces.table.of_facet[facet];
        // Edge k runs from corner k; the corner opposite the free edge lies between the other two.
        let free = (0..3).find(|k| !faces.is_crease[edges[*k]])?;
        let both = faces.is_crease[edges[(free + 1) % 3]] && faces.is_crease[edges[(free + 2) % 3]];
        let tip = mesh.facets()[facet][(free + 2) % 3];
        (both && curves.role(mesh, tip) == CreaseRole::Along).then_some(edges[free])
    };
    let mut cut = (0..mesh.facets().len()).filter_map(is_ear).collect::<Vec<_>>();
    let ears = cut.len();
    cut.sort_unstable();
    cut.dedup();
    if cut.is_empty() {
        return None;
    }
    let middles = edge_middles(mesh, faces, normals, Estimate::Fitted);
    let mut vertices = mesh.vertices().to_vec();
    let mut new_vertex = vec![None; faces.table.edges.len()];
    for edge in cut {
        new_vertex[edge] = Some(vertices.len());
        vertices.push(middles[edge]);
    }
    let (mut facets, mut groups, mut new_shells) = (Vec::new(), Vec::new(), Vec::new());
    for (facet, corners) in mesh.facets().iter().enumerate() {
        let before = facets.len();
        cut_facet(*corners, faces.table.of_facet[facet].map(|edge| new_vertex[edge]), &mut facets);
        let pieces = facets.len() - before;
        groups.extend(mesh.groups().get(facet).map(|group| vec![*group; pieces]).unwrap_or_default());
        new_shells.extend(std::iter::repeat_n(shells[facet], pieces));
    }
    let mesh = TriangleMesh::with_groups(vertices, facets, groups).ok()?;
    Some((mesh, new_shells, ears))
}

/// The pieces of a facet with new vertices on some of its edges 0-1, 1-2, 2-0.
fn cut_facet([a, b, c]: [usize; 3], new: [Option<usize>; 3], pieces: &mut Vec<[usize; 3]>) {
    match new {
        [Some(m), _, _] => {
            cut_facet([a, m, c], [None, None, new[2]], pieces);
            cut_facet([m, b, c], [None, new[1], None], pieces);
        }
        [None, Some(_), _] => cut_facet([b, c, a], [new[1], new[2], None], pieces),
        [None, None, Some(_)] => cut_facet([c, a, b], [new[2], None, None], pieces),
        [None, None, None] => pieces.push([a, b, c]),
    }
}
