//! Curves along creases: a rim of straight edges is the rim of a round body.
//!
//! At a vertex where one crease passes through, its tangent is that of the circle through the vertex and its two
//! neighbours on the crease,
//!
//! ```text
//! t ~ a/|a| |b| + b/|b| |a|     a from the one before, b to the one after
//! ```
//! An edge between tangents t0 and t1 has its middle on the cubic with these tangents, with lengths that make it exact
//! on circles: `m = (x0 + x1)/2 + (T0 - T1)/8`, `T = t 2 d / (1 + cos(t, d))`. At a corner of the body the tangent is
//! that of the circle that the edge's other end asks for.

use std::collections::HashMap;

use super::corners::{CreaseRole, crease_role};
use super::smooth_faces::SmoothFaces;
use crate::surface::{Point, TriangleMesh};

/// The neighbours along the creases at each vertex that has any.
#[derive(Debug)]
pub(super) struct CreaseCurves {
    neighbours: HashMap<usize, Vec<usize>>,
}

impl CreaseCurves {
    pub fn new(faces: &SmoothFaces) -> Self {
        let mut neighbours = HashMap::<_, Vec<_>>::new();
        for (edge, _) in faces.table.edges.iter().zip(&faces.is_crease).filter(|(_, crease)| **crease) {
            let [a, b] = edge.ends;
            neighbours.entry(a).or_default().push(b);
            neighbours.entry(b).or_default().push(a);
        }
        Self { neighbours }
    }

    /// The middle of the crease from `a` to `b`.
    pub fn middle(&self, mesh: &TriangleMesh, [a, b]: [usize; 2]) -> Point {
        let (from, to) = (mesh.vertices()[a], mesh.vertices()[b]);
        let chord = to - from;
        let length = chord.norm();
        // Seen from b the crease runs the other way.
        let (start, end) = (self.tangent(mesh, a, b), self.tangent(mesh, b, a).map(|t| -t));
        let mirrored = |t: Point| chord * (2.0 * t.dot(&chord) / (length * length)) - t;
        let (start, end) = match (start, end) {
            (Some(start), Some(end)) => (start, end),
            (Some(start), None) => (start, mirrored(start)),
            (None, Some(end)) => (mirrored(end), end),
            (None, None) => return 0.5 * (from + to),
        };
        let arm = |t: Point| t * (2.0 * length / (1.0 + t.dot(&chord) / length));
        0.5 * (from + to) + (arm(start) - arm(end)) / 8.0
    }

    /// What a vertex is to the creases.
    pub fn role(&self, mesh: &TriangleMesh, vertex: usize) -> CreaseRole {
        let around = self.neighbours.get(&vertex).map_or(&[][..], Vec::as_slice);
        let ends = around.iter().map(|other| mesh.vertices()[*other]).collect::<Vec<_>>();
        crease_role(&mesh.vertices()[vertex], &ends)
    }

    /// The unit tangent at `vertex` towards its crease neighbour `ahead`, if one smooth crease passes through.
    fn tangent(&self, mesh: &TriangleMesh, vertex: usize, ahead: usize) -> Option<Point> {
        if self.role(mesh, vertex) != CreaseRole::Along {
            return None;
        }
        let around = self.neighbours.get(&vertex)?;
        let place = mesh.vertices()[vertex];
        let behind = around.iter().find(|other| **other != ahead)?;
        let (a, b) = (place - mesh.vertices()[*behind], mesh.vertices()[ahead] - place);
        (a.normalize() * b.norm() + b.normalize() * a.norm()).try_normalize(0.0)
    }
}
