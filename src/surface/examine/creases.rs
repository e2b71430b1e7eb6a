//! Turn angles across edges, and the plane regions of a surface.

use crate::surface::mesh::EdgeTable;
use crate::surface::{Point, TriangleMesh};

/// Facets belong to one plane if their corners are no further from it than this part of the body's diagonal ...
///
/// Ten times the noise of files with six digits. On a smooth surface of `N` facets, neighbours are about
/// `diagonal / N` off each other's plane, which is more up to a hundred thousand facets.
const PLANE_DISTANCE: f64 = 1e-5;

/// ... and their normals turn less than this.
const PLANE_TURN_DEG: f64 = 2.0;

/// How far a surface turns at one edge.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct EdgeTurn {
    /// The edge's vertices, numbered from 0.
    pub vertices: [usize; 2],
    /// The angle between the normals of its two facets, degrees, from 0 (one plane) to 180 (folded over).
    pub angle_deg: f64,
    /// Its length, file units.
    pub length: f64,
}

/// The angle in radians by which the normal turns across each edge, 0 where the facets are in one plane. Edges that do
/// not join exactly two facets of the same orientation have `pi`: nothing is smooth there.
pub(crate) fn turn_angles(mesh: &TriangleMesh, table: &EdgeTable) -> Vec<f64> {
    let angle = |edge: &crate::surface::mesh::Edge| {
        let Some([a, b]) = edge.pair() else { return std::f64::consts::PI };
        let (n, m) = (mesh.area_normal(a), mesh.area_normal(b));
        n.cross(&m).norm().atan2(n.dot(&m))
    };
    table.edges.iter().map(angle).collect()
}

/// Connected facets that lie in one plane.
#[derive(Debug, Clone)]
pub(crate) struct Regions {
    /// The region of each facet.
    pub of_facet: Vec<usize>,
    /// The unit normal of each region, zero if it has no area.
    pub normals: Vec<Point>,
    /// The area of each region.
    pub areas: Vec<f64>,
    /// The number of facets of each region.
    pub facet_counts: Vec<usize>,
}

impl Regions {
    /// Grows regions from the largest facets, whose normals are the most exact.
    pub fn new(mesh: &TriangleMesh, table: &EdgeTable) -> Self {
        let (low, high) = mesh.bounding_box();
        let distance = PLANE_DISTANCE * (high - low).norm();
        let turn = PLANE_TURN_DEG.to_radians().cos();
        let normals = (0..mesh.facets().len()).map(|facet| mesh.area_normal(facet)).collect::<Vec<_>>();
        let mut seeds = (0..normals.len()).collect::<Vec<_>>();
        seeds.sort_by(|a, b| normals[*b].norm().total_cmp(&normals[*a].norm()).then(a.cmp(b)));

        let mut regions = Self {
            of_facet: vec![usize::MAX; normals.len()],
            normals: Vec::new(),
            areas: Vec::new(),
            facet_counts: Vec::new(),
        };
        let mut stack = Vec::new();
        for seed in seeds {
            if regions.of_facet[seed] != usize::MAX {
                continue;
            }
            let number = regions.normals.len();
            let normal = normals[seed].try_normalize(0.0).unwrap_or_else(Point::zeros);
            let origin = mesh.centre(seed);
            let (mut area, mut count) = (0.0, 0);
            regions.of_facet[seed] = number;
            stack.push(seed);
            while let Some(facet) = stack.pop() {
                area += 0.5 * normals[facet].norm();
                count += 1;
                for (edge, other) in table.neighbours(facet) {
                    let flat = normal.dot(&normals[other]) >= turn * normals[other].norm()
                        && mesh.corners(other).iter().all(|x| (x - origin).dot(&normal).abs() <= distance);
                    let free = regions.of_facet[other] == usize::MAX && table.edges[edge].pair().is_some();
                    if free && flat && normal != Point::zeros() {
                        regions.of_facet[other] = number;
                        stack.push(other);
                    }
                }
            }
            regions.normals.push(normal);
            regions.areas.push(area);
            regions.facet_counts.push(count);
        }
        regions
    }
}
