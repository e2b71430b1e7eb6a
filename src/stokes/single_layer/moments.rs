//! Integrals of the basis functions: right-hand sides and the null vector.

use crate::surface::{Panels, Point, triangle_rule};

/// Number of rigid motions.
pub const MOTIONS: usize = 6;

/// Integrals of the basis functions over the surface, one column after another, three numbers a node.
#[derive(Debug, Clone)]
pub struct Moments {
    /// `int phi_n u_k dS` for the motions `u_k`: velocity along x, y, z; rotation about x, y, z through the reference.
    pub motions: [Vec<f64>; MOTIONS],
    /// `int phi_n n dS` over each closed shell: the constant pressure that no velocity can tell.
    pub normals: Vec<Vec<f64>>,
}

impl Moments {
    /// The moments about `reference`.
    pub fn new(panels: &Panels, reference: &Point) -> Self {
        let count = 3 * panels.node_count;
        let mut motions = std::array::from_fn(|_| vec![0.0; count]);
        let mut normals = vec![vec![0.0; count]; panels.shell_count];
        for panel in &panels.panels {
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
                        motions[k][3 * node + k] += weight * value;
                        normals[panel.shell][3 * node + k] += point.weight * value * normal[k];
                        for entry in 0..3 {
                            motions[3 + k][3 * node + entry] += weight * value * turning[entry];
                        }
                    }
                }
            }
        }
        Self { motions, normals }
    }
}
