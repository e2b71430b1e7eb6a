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
