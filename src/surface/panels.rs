//! Panels: the discretised surface that the solver reads.
//!
//! Two numberings live side by side. *Vertices* are points of the surface: two panels touch if they share vertices.
//! *Nodes* carry the unknown traction: a vertex on a crease has one node for each smooth face that meets there.

use super::{Patch, Point};

/// One curved triangle.
#[derive(Debug, Clone)]
pub struct Panel {
    /// Its geometry.
    pub patch: Patch,
    /// Vertices at corners 0, 1, 2.
    pub vertices: [usize; 3],
    /// Nodes (carriers of unknowns) at corners 0, 1, 2.
    pub nodes: [usize; 3],
    /// Which closed surface the panel belongs to; a rigid body may consist of several.
    pub shell: usize,
}

/// Interpolation from a coarser node set to a finer one: fine node `i` takes `sum(weight * coarse[j])`.
#[derive(Debug, Clone, PartialEq)]
pub struct Prolongation {
    /// Number of coarse nodes.
    pub coarse_count: usize,
    /// For each fine node its coarse nodes and weights, which sum to one.
    pub rows: Vec<Vec<(usize, f64)>>,
}

/// A discretised surface.
#[derive(Debug, Clone)]
pub struct Panels {
    /// The triangles.
    pub panels: Vec<Panel>,
    /// Number of vertices.
    pub vertex_count: usize,
    /// Number of nodes; the solver has three unknowns a node.
    pub node_count: usize,
    /// Number of closed surfaces.
    pub shell_count: usize,
    /// Coarser node sets of the same surface, finest first: the first interpolates to this surface's nodes, each
    /// following one to the one before.
    pub coarsenings: Vec<Prolongation>,
}

impl Panels {
    /// The surfaces of several bodies as one, body after body: vertices, nodes and shells of each count on from those of the
    /// one before. Coarser node sets are kept as far as every body has them.
    pub fn joined(parts: Vec<Panels>) -> Self {
        let levels = parts.iter().map(|part| part.coarsenings.len()).min().unwrap_or(0);
        let empty = || Prolongation { coarse_count: 0, rows: Vec::new() };
        let mut whole = Self {
            panels: Vec::new(),
            vertex_count: 0,
            node_count: 0,
            shell_count: 0,
            coarsenings: (0..levels).map(|_| empty()).collect(),
        };
        for part in parts {
            for mut panel in part.panels {
                panel.vertices = panel.vertices.map(|vertex| vertex + whole.vertex_count);
                panel.nodes = panel.nodes.map(|node| node + whole.node_count);
                panel.shell += whole.shell_count;
                whole.panels.push(panel);
            }
            whole.vertex_count += part.vertex_count;
            whole.node_count += part.node_count;
            whole.shell_count += part.shell_count;
            for (whole, part) in whole.coarsenings.iter_mut().zip(part.coarsenings) {
                let before = whole.coarse_count;
                let counted_on = |row: Vec<(usize, f64)>| row.into_iter().map(|(node, w)| (node + before, w)).collect();
                whole.rows.extend(part.rows.into_iter().map(counted_on));
                whole.coarse_count += part.coarse_count;
            }
        }
        whole
    }

    /// The smallest box around all panel corners and centres, as two opposite corners.
    pub fn bounding_box(&self) -> (Point, Point) {
        let mut low = Point::repeat(f64::INFINITY);
        let mut high = Point::repeat(f64::NEG_INFINITY);
        for panel in &self.panels {
            let centre = panel.patch.at(1.0 / 3.0, 1.0 / 3.0).position;
            for x in panel.patch.corners().into_iter().chain([centre]) {
                low = low.inf(&x);
                high = high.sup(&x);
            }
        }
        (low, high)
    }
}
