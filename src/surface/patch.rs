//! One triangle of a surface, flat or curved, as a map from the reference triangle `u, v >= 0, u + v <= 1`.
//!
//! Corner 0 is at (0, 0), corner 1 at (1, 0), corner 2 at (0, 1). `tangent_u x tangent_v` points out of the body
//! into the fluid; its length is the area ratio.

use std::sync::Arc;

use super::{Chart, Point};

/// The geometry of a panel.
#[derive(Debug, Clone)]
pub enum Patch {
    /// Three corners.
    Flat([Point; 3]),
    /// Six-node quadratic: three corners, then the mid-nodes of edges 0-1, 1-2, 2-0.
    SixNode([Point; 6]),
    /// A flat triangle in the domain of a chart, by its corners there.
    Exact {
        /// The chart.
        chart: Arc<dyn Chart>,
        /// Corners in chart coordinates.
        corners: [Point; 3],
    },
}

/// Position and first derivatives at a reference point of a patch.
#[derive(Debug, Clone, Copy)]
pub struct PatchPoint {
    /// Position.
    pub position: Point,
    /// `dx/du`.
    pub tangent_u: Point,
    /// `dx/dv`.
    pub tangent_v: Point,
}

impl PatchPoint {
    /// `tangent_u x tangent_v`: outward, its length the area per unit of reference area.
    pub fn area_normal(&self) -> Point {
        self.tangent_u.cross(&self.tangent_v)
    }
}

impl Patch {
    /// The patch at the reference point `(u, v)`.
    pub fn at(&self, u: f64, v: f64) -> PatchPoint {
        match self {
            Patch::Flat([a, b, c]) => {
                let (tangent_u, tangent_v) = (b - a, c - a);
                PatchPoint { position: a + u * tangent_u + v * tangent_v, tangent_u, tangent_v }
            }
            Patch::SixNode(nodes) => six_node(nodes, u, v),
            Patch::Exact { chart, corners: [a, b, c] } => {
                let (along_u, along_v) = (b - a, c - a);
                chart.along(&(a + u * along_u + v * along_v), &along_u, &along_v)
            }
        }
    }

    /// The three corners in space.
    pub fn corners(&self) -> [Point; 3] {
        match self {
            Patch::Flat(corners) => *corners,
            Patch::SixNode([a, b, c, ..]) => [*a, *b, *c],
            Patch::Exact { .. } => [(0.0, 0.0), (1.0, 0.0), (0.0, 1.0)].map(|(u, v)| self.at(u, v).position),
        }
    }

    /// The corners, if the patch is a flat triangle.
    pub fn as_flat(&self) -> Option<&[Point; 3]> {
        match self {
            Patch::Flat(corners) => Some(corners),
            _ => None,
        }
    }
}

fn six_node(nodes: &[Point; 6], u: f64, v: f64) -> PatchPoint {
    let w = 1.0 - u - v;
    let value = [w * (2.0 * w - 1.0), u * (2.0 * u - 1.0), v * (2.0 * v - 1.0), 4.0 * w * u, 4.0 * u * v, 4.0 * v * w];
    let by_u = [1.0 - 4.0 * w, 4.0 * u - 1.0, 0.0, 4.0 * (w - u), 4.0 * v, -4.0 * v];
    let by_v = [1.0 - 4.0 * w, 0.0, 4.0 * v - 1.0, -4.0 * u, 4.0 * u, 4.0 * (w - v)];
    let sum = |weights: [f64; 6]| nodes.iter().zip(weights).map(|(x, weight)| x * weight).sum();
    PatchPoint { position: sum(value), tangent_u: sum(by_u), tangent_v: sum(by_v) }
}
