//! Vertices at which a surface is pinched: its facets there form several fans that touch only in the vertex.

use crate::surface::mesh::EdgeTable;
use crate::surface::{Point, TriangleMesh};

/// A vertex that several fans of facets share.
#[derive(Debug, Clone, PartialEq)]
pub struct PinchedVertex {
    /// The vertex, numbered from 0.
    pub vertex: usize,
    /// Where it is.
    pub place: Point,
    /// One facet of each fan, numbered from 0.
    pub facets: Vec<usize>,
    /// `true` if every fan belongs to a shell of its own: separate surfaces that touch.
    pub between_shells: bool,
}

pub(super) fn pinched_vertices(mesh: &TriangleMesh, table: &EdgeTable, shells: &[usize]) -> Vec<PinchedVertex> {
    let facets = mesh.facets();
    // Corner `3 f + k` is joined to the corner of a neighbour at the same vertex.
    let mut roots = (0..3 * facets.len()).collect::<Vec<_>>();
    for edge in &table.edges {
        for pair in edge.facets.windows(2) {
            for vertex in edge.ends {
                let corner = |facet: usize| facets[facet].iter().position(|v| *v == vertex).map(|k| 3 * facet + k);
                if let (Some(a), Some(b)) = (corner(pair[0].0), corner(pair[1].0)) {
                    let (a, b) = (root(&mut roots, a), root(&mut roots, b));
                    roots[a.max(b)] = a.min(b);
                }
            }
        }
    }
    let mut fans = vec![Vec::new(); mesh.vertices().len()];
    for (facet, corners) in facets.iter().enumerate() {
        if table.of_facet[facet].contains(&usize::MAX) {
            continue;
        }
        for (k, vertex) in corners.iter().enumerate() {
            if root(&mut roots, 3 * facet + k) == 3 * facet + k {
                fans[*vertex].push(facet);
            }
        }
    }
    let pinched = fans.into_iter().enumerate().filter(|(_, fans)| fans.len() > 1);
    pinched
        .map(|(vertex, facets)| {
            let mut owners = facets.iter().map(|facet| shells[*facet]).collect::<Vec<_>>();
            owners.sort_unstable();
            let between_shells = owners.windows(2).all(|pair| pair[0] != pair[1]);
            PinchedVertex { vertex, place: mesh.vertices()[vertex], facets, between_shells }
        })
        .collect()
}

fn root(roots: &mut [usize], mut corner: usize) -> usize {
    while roots[corner] != corner {
        roots[corner] = roots[roots[corner]];
        corner = roots[corner];
    }
    corner
}
