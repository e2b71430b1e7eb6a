//! Who shares which edge.

use super::TriangleMesh;

/// The three directed edges of a facet.
fn facet_edges([a, b, c]: [usize; 3]) -> [[usize; 2]; 3] {
    [[a, b], [b, c], [c, a]]
}

/// An edge of a mesh.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct Edge {
    /// Its vertices, the smaller number first.
    pub ends: [usize; 2],
    /// The facets along it, in order; `true` if the facet runs from the first end to the second.
    pub facets: Vec<(usize, bool)>,
}

impl Edge {
    /// The two facets along the edge if there are two of them and they run in opposite directions; the first is the
    /// one that runs forward.
    pub fn pair(&self) -> Option<[usize; 2]> {
        match self.facets[..] {
            [(a, true), (b, false)] | [(b, false), (a, true)] => Some([a, b]),
            _ => None,
        }
    }
}

/// All edges of a mesh, sorted by their ends. Facets that have a vertex twice take no part.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct EdgeTable {
    /// The edges.
    pub edges: Vec<Edge>,
    /// For each facet its edges 0-1, 1-2, 2-0; `usize::MAX` for facets that take no part.
    pub of_facet: Vec<[usize; 3]>,
}

impl EdgeTable {
    pub fn new(mesh: &TriangleMesh) -> Self {
        let mut sides = Vec::with_capacity(3 * mesh.facets().len());
        for (facet, corners) in mesh.facets().iter().enumerate() {
            let [a, b, c] = *corners;
            if a == b || b == c || c == a {
                continue;
            }
            for (side, [from, to]) in facet_edges(*corners).into_iter().enumerate() {
                sides.push(([from.min(to), from.max(to)], facet, side, from < to));
            }
        }
        sides.sort_unstable();
        let mut edges: Vec<Edge> = Vec::new();
        let mut of_facet = vec![[usize::MAX; 3]; mesh.facets().len()];
        for (ends, facet, side, forward) in sides {
            match edges.last_mut() {
                Some(edge) if edge.ends == ends => edge.facets.push((facet, forward)),
                _ => edges.push(Edge { ends, facets: vec![(facet, forward)] }),
            }
            of_facet[facet][side] = edges.len() - 1;
        }
        Self { edges, of_facet }
    }

    /// Facets joined to `facet` across an edge that exactly two facets share.
    pub fn neighbours(&self, facet: usize) -> impl Iterator<Item = (usize, usize)> + '_ {
        self.of_facet[facet].into_iter().filter(|edge| *edge != usize::MAX).filter_map(move |edge| {
            match self.edges[edge].facets[..] {
                [(a, _), (b, _)] if a == facet => Some((edge, b)),
                [(a, _), (b, _)] if b == facet => Some((edge, a)),
                _ => None,
            }
        })
    }

    /// Labels connected facets 0, 1, ... in the order of their first facet, walking over the edges that `crosses`
    /// allows; gives the labels and their count.
    pub fn label(&self, crosses: impl Fn(usize) -> bool) -> (Vec<usize>, usize) {
        let mut labels = vec![usize::MAX; self.of_facet.len()];
        let mut count = 0;
        let mut stack = Vec::new();
        for first in 0..labels.len() {
            if labels[first] != usize::MAX {
                continue;
            }
            labels[first] = count;
            stack.push(first);
            while let Some(facet) = stack.pop() {
                for edge in self.of_facet[facet].into_iter().filter(|edge| *edge != usize::MAX && crosses(*edge)) {
                    for (other, _) in &self.edges[edge].facets {
                        if labels[*other] == usize::MAX {
                            labels[*other] = count;
                            stack.push(*other);
                        }
                    }
                }
            }
            count += 1;
        }
        (labels, count)
    }
}
