//! Integrals of the basis functions: right-hand sides and the null vector.

use std::ops::Range;

use crate::surface::{Panels, Point, triangle_rule};

/// Number of rigid motions of a body.
pub const MOTIONS: usize = 6;

/// The bodies that a surface consists of.
#[derive(Debug, Clone, PartialEq)]
pub struct Bodies {
    /// The reference point of each.
    pub references: Vec<Point>,
    /// The body that each closed shell belongs to.
    pub of_shell: Vec<usize>,
}

impl Bodies {
    /// Which panels are whose, where they stand body after body.
    pub fn ranges(&self, panels: &Panels) -> Vec<Range<usize>> {
        let count = |body| panels.panels.iter().filter(|panel| self.of_shell[panel.shell] == body).count();
        let mut from = 0;
        let range = |body| {
            let range = from..from + count(body);
            from = range.end;
            range
        };
        (0..self.references.len()).map(range).collect()
    }

    /// All shells as one body.
    pub fn one(reference: Point, shells: usize) -> Self {
        Self { references: vec![reference], of_shell: vec![0; shells] }
    }
}

/// Integrals of the basis functions over the surface, one column after another, three numbers a node.
#[derive(Debug, Clone)]
pub struct Moments {
    /// `int phi_n u_k dS` for the motions `u_k`, six a body: velocity along x, y, z; rotation about x, y, z through the
    /// body's reference. A body's motion is zero on the others.
    pub motions: Vec<Vec<f64>>,
    /// `int phi_n n dS` over each closed shell: the constant pressure that no velocity can tell.
    pub normals: Vec<Vec<f64>>,
}

impl Moments {
    /// The moments of all bodies.
    pub fn new(panels: &Panels, bodies: &Bodies) -> Self {
        let count = 3 * panels.node_count;
        let mut motions = vec![vec![0.0; count]; MOTIONS * bodies.references.len()];
        let mut normals = vec![vec![0.0; count]; panels.shell_count];
        for panel in &panels.panels {
            let body = bodies.of_shell[panel.shell];
            let reference = bodies.references[body];
            let first = MOTIONS * body;
            for point in triangle_rule::degree_8() {
                let at = panel.patch.at(point.u, point.v);
                let normal = at.area_normal();
                let weight = point.weight * normal.norm();
                let arm = at.position - reference;
                let basis = [1.0 - point.u - point.v, point.u, point.v];
                for (node, value) in panel.nodes.iter().zip(basis) {
                    for k in 0..3 {
                        let unit = Point::ith(k, 1.0);
                        let turning = unit.cross(&arm);
                        motions[first + k][3 * node + k] += weight * value;
                        normals[panel.shell][3 * node + k] += point.weight * value * normal[k];
                        for entry in 0..3 {
                            motions[first + 3 + k][3 * node + entry] += weight * value * turning[entry];
                        }
                    }
                }
            }
        }
        Self { motions, normals }
    }
}
