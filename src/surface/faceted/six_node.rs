//! The chart of a six-node patch, so that the patch can be cut into smaller ones without changing the surface.

use nalgebra::Matrix3;

use crate::surface::{Chart, Patch, Point};

/// A quadratic patch as a chart: chart coordinates `(u, v, 0)` are the reference coordinates of the patch.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct SixNodeChart {
    nodes: [Point; 6],
}

impl SixNodeChart {
    /// Chart points of the corners 0, 1, 2.
    pub const CORNERS: [[f64; 3]; 3] = [[0.0, 0.0, 0.0], [1.0, 0.0, 0.0], [0.0, 1.0, 0.0]];

    /// The patch through three corners and the mid-nodes of edges 0-1, 1-2, 2-0.
    pub fn new(nodes: [Point; 6]) -> Self {
        Self { nodes }
    }

    /// The nodes.
    pub fn nodes(&self) -> &[Point; 6] {
        &self.nodes
    }
}

impl Chart for SixNodeChart {
    fn at(&self, q: &Point) -> (Point, Matrix3<f64>) {
        let at = Patch::SixNode(self.nodes).at(q.x, q.y);
        (at.position, Matrix3::from_columns(&[at.tangent_u, at.tangent_v, Point::zeros()]))
    }
}
