//! The flat circular end of a body with its axis along x: a fan in the middle, and a ring of triangles to the rim.

use super::charts::ArcTriangle;
use super::layout::{Layout, Piece, Ring, on_circle, strip_triangles};
use crate::surface::{Grading, Point};

/// Radius of the inner polygon's corners over that of the rim.
///
/// Half the radius makes the triangles of a six-sided end nearly equilateral, and lets the grading of the outer ones
/// reach over half the radius; a thin disc's traction needs that.
const INNER_RADIUS: f64 = 0.5;

/// A flat end: where it is, and which way it faces.
#[derive(Debug, Clone, Copy)]
pub(super) struct FlatEnd {
    /// Axial position.
    pub x: f64,
    /// Radius of the rim.
    pub radius: f64,
    /// Whether it faces towards +x.
    pub forward: bool,
    /// Its smooth face; a crease divides it from what is beyond the rim.
    pub face: usize,
}

impl FlatEnd {
    /// Lays the end inside its rim.
    pub fn lay(&self, layout: &mut Layout, rim: &Ring) {
        let centre = Point::new(self.x, 0.0, 0.0);
        let plane = Piece { chart: None, face: self.face, shell: 0 };
        let inner = layout.ring(rim.count(), !rim.is_staggered());
        let on_rim = |turns: f64| on_circle(self.x, self.radius, turns);
        let on_inner = |turns: f64| on_circle(self.x, INNER_RADIUS * self.radius, turns);
        let triangles = if self.forward { strip_triangles(rim, &inner) } else { strip_triangles(&inner, rim) };
        for triangle in triangles {
            if triangle.base_on_first == self.forward {
                let base = triangle.base.map(|(_, turns)| on_rim(turns));
                let corners = [base[0], base[1], on_inner(triangle.tip.1)];
                let chart = Some(layout.chart(ArcTriangle { corners, centre }));
                let vertices = [triangle.base[0].0, triangle.base[1].0, triangle.tip.0];
                let barycentric = [Point::x(), Point::y(), Point::z()];
                let corners = [0, 1, 2].map(|k| (vertices[k], barycentric[k]));
                layout.triangle(Piece { chart, ..plane }, corners, Grading::Edge);
            } else {
                let [start, end] = triangle.base.map(|(vertex, turns)| (vertex, on_inner(turns)));
                let tip = (triangle.tip.0, on_rim(triangle.tip.1));
                layout.triangle(plane, [tip, start, end], Grading::Vertex);
            }
        }
        let middle = (layout.vertex(), centre);
        if self.forward {
            layout.fan_ahead(plane, (&inner, &on_inner), middle, Grading::Plain);
        } else {
            layout.fan_behind(plane, middle, (&inner, &on_inner), Grading::Plain);
        }
    }
}
