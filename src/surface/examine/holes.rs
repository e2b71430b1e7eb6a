//! Boundary loops: where a surface is open.

use std::collections::BTreeMap;

use crate::surface::mesh::EdgeTable;
use crate::surface::{Point, TriangleMesh};

/// A closed chain of edges that have a facet on one side only.
#[derive(Debug, Clone, PartialEq)]
pub struct Hole {
    /// The vertices around the hole, in the direction in which the facet along the first edge runs.
    pub vertices: Vec<usize>,
    /// The mean of the vertices.
    pub place: Point,
    /// Length of the boundary, in file units.
    pub length: f64,
    /// A facet at the hole, numbered from 0.
    pub facet: usize,
}

pub(super) fn find_holes(mesh: &TriangleMesh, table: &EdgeTable) -> Vec<Hole> {
    let open = table.edges.iter().filter(|edge| edge.facets.len() == 1).collect::<Vec<_>>();
    let mut at_vertex = BTreeMap::<usize, Vec<usize>>::new();
    for (number, edge) in open.iter().enumerate() {
        for vertex in edge.ends {
            at_vertex.entry(vertex).or_default().push(number);
        }
    }
    let mut used = vec![false; open.len()];
    let mut holes = Vec::new();
    for first in 0..open.len() {
        if used[first] {
            continue;
        }
        used[first] = true;
        let (facet, forward) = open[first].facets[0];
        let [low, high] = open[first].ends;
        let (start, mut at) = if forward { (low, high) } else { (high, low) };
        let mut vertices = vec![start];
        while at != start {
            let around = at_vertex.get(&at).map_or(&[][..], Vec::as_slice);
            // Edges whose facets run on in the same direction come first, so that touching holes stay apart.
            let onward = |number: &usize| {
                let (edge, run) = (&open[*number], open[*number].facets[0].1);
                edge.ends[usize::from(!run)] == at
            };
            let free = || around.iter().filter(|number| !used[**number]);
            let Some(&next) = free().find(|number| onward(number)).or_else(|| free().next()) else { break };
            used[next] = true;
            vertices.push(at);
            let [low, high] = open[next].ends;
            at = if low == at { high } else { low };
        }
        let place = vertices.iter().map(|vertex| mesh.vertices()[*vertex]).sum::<Point>() / vertices.len() as f64;
        let ends = vertices.iter().zip(vertices.iter().cycle().skip(1));
        let length = ends.map(|(a, b)| (mesh.vertices()[*b] - mesh.vertices()[*a]).norm()).sum();
        holes.push(Hole { vertices, place, length, facet });
    }
    holes
}
