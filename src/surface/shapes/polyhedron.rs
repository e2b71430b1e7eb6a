//! Regular polyhedra with triangular faces: the tetrahedron and the octahedron.
//!
//! Every face is cut by the lines from its middle to its corners and to the middles of its edges: one crease and one
//! corner a macro triangle.

use std::collections::HashMap;

use super::error::{ShapeError, check_length};
use super::layout::{Layout, Piece};
use super::{ExactMeasure, Form};
use crate::surface::{Blueprint, Grading, Point};

/// Cuts the faces of a convex polyhedron that contains the origin; faces list corners in either sense.
fn faceted(corners: &[Point], faces: &[[usize; 3]]) -> Blueprint {
    let mut layout = Layout::new();
    let corner_vertices = corners.iter().map(|_| layout.vertex()).collect::<Vec<_>>();
    let mut edge_vertices = HashMap::new();
    for (face, loop_) in faces.iter().enumerate() {
        let [a, b, c] = loop_.map(|k| corners[k]);
        let loop_ = if a.dot(&b.cross(&c)) > 0.0 { *loop_ } else { [loop_[0], loop_[2], loop_[1]] };
        let piece = Piece { chart: None, face, shell: 0 };
        let middle = (layout.vertex(), (a + b + c) / 3.0);
        for k in 0..3 {
            let (start, end) = (loop_[k], loop_[(k + 1) % 3]);
            let half = *edge_vertices.entry((start.min(end), start.max(end))).or_insert_with(|| layout.vertex());
            let half = (half, 0.5 * (corners[start] + corners[end]));
            let [start, end] = [start, end].map(|k| (corner_vertices[k], corners[k]));
            layout.triangle(piece, [start, half, middle], Grading::Corner);
            layout.clockwise_corner(piece, [end, half, middle]);
        }
    }
    layout.finish()
}

/// A regular tetrahedron, its edges' two-fold axes along x, y and z.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Tetrahedron {
    edge: f64,
}

impl Tetrahedron {
    /// A regular tetrahedron of the given edge (m).
    ///
    /// # Errors
    /// If the edge is not a possible length.
    pub fn new(edge: f64) -> Result<Self, ShapeError> {
        Ok(Self { edge: check_length("edge", edge)? })
    }
}

impl Form for Tetrahedron {
    fn keyword(&self) -> &'static str {
        "tetrahedron"
    }

    fn dimensions(&self) -> Vec<f64> {
        vec![self.edge]
    }

    fn blueprint(&self) -> Blueprint {
        let scale = self.edge / 8.0_f64.sqrt();
        let corners = [[1.0, 1.0, 1.0], [1.0, -1.0, -1.0], [-1.0, 1.0, -1.0], [-1.0, -1.0, 1.0]];
        faceted(&corners.map(|corner| Point::from(corner) * scale), &[[1, 2, 3], [0, 2, 3], [0, 1, 3], [0, 1, 2]])
    }

    fn exact_measure(&self) -> ExactMeasure {
        let volume = self.edge.powi(3) / 72.0_f64.sqrt();
        ExactMeasure { volume, area: Some(3.0_f64.sqrt() * self.edge.powi(2)) }
    }
}

/// A regular octahedron, its corners on the axes.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Octahedron {
    edge: f64,
}

impl Octahedron {
    /// A regular octahedron of the given edge (m).
    ///
    /// # Errors
    /// If the edge is not a possible length.
    pub fn new(edge: f64) -> Result<Self, ShapeError> {
        Ok(Self { edge: check_length("edge", edge)? })
    }
}

impl Form for Octahedron {
    fn keyword(&self) -> &'static str {
        "octahedron"
    }

    fn dimensions(&self) -> Vec<f64> {
        vec![self.edge]
    }

    fn blueprint(&self) -> Blueprint {
        let reach = self.edge / 2.0_f64.sqrt();
        let corners = [Point::x(), -Point::x(), Point::y(), -Point::y(), Point::z(), -Point::z()];
        let faces = [0, 1, 2, 3, 4, 5, 6, 7].map(|k| [k & 1, 2 + ((k >> 1) & 1), 4 + (k >> 2)]);
        faceted(&corners.map(|corner| corner * reach), &faces)
    }

    fn exact_measure(&self) -> ExactMeasure {
        let volume = 2.0_f64.sqrt() / 3.0 * self.edge.powi(3);
        ExactMeasure { volume, area: Some(2.0 * 3.0_f64.sqrt() * self.edge.powi(2)) }
    }
}
