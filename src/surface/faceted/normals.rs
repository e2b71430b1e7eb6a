//! Normals at the vertices of smooth faces.
//!
//! A vertex has one normal for each smooth face that meets there. Two estimates stand side by side, and their
//! difference says how well the normals are known:
//!
//! - the mean of the facet normals, weighted by the facets' angles at the vertex (Thuermer & Wuethrich 1998, J. Graphics
//!   Tools 3, 43-46; from memory), off by the second power of the facet size;
//! - the normal of a cubic fitted to the vertices around (see `fit`), off by the third.
//!
//! Both suppose that the curvature changes little from one facet to the next. Where long facets run into short ones, as
//! the side of a drawn part runs into a rounding, it jumps, and a long facet makes much of a small error of its normals:
//! its edges take the *broad* normal, the mean over the plane regions at the vertex weighted by the squares of the
//! regions' areas, so that a wide plane keeps its own normal beside the first strip of a rounding.

use std::collections::HashMap;

use super::fit::fitted_normal;
use super::smooth_faces::SmoothFaces;
use crate::surface::examine::Regions;
use crate::surface::{Point, TriangleMesh};

/// The largest angle between the two estimates; further apart, the fit is not trusted.
const LARGEST_CORRECTION_DEG: f64 = 15.0;

/// An edge takes the broad normal at an end if it is longer than this many times the shortest edge there that points
/// the same or the opposite way. Meshes of smooth bodies seldom change their size faster.
const LONG: f64 = 3.0;

/// Cosine of the angle to the edge's line up to which another edge points the same way.
const SAME_WAY: f64 = 0.7;

/// Which estimate.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Estimate {
    /// The mean, at all ends of all edges.
    Mean,
    /// The fitted normal, or the broad one for long edges.
    Fitted,
}

/// Unit normals by smooth face and vertex.
#[derive(Debug)]
pub(super) struct VertexNormals<'a> {
    mesh: &'a TriangleMesh,
    vertices: HashMap<(usize, usize), VertexOfFace>,
}

#[derive(Debug)]
struct VertexOfFace {
    mean: Point,
    fitted: Point,
    broad: Point,
    neighbours: Vec<usize>,
}

impl<'a> VertexNormals<'a> {
    pub fn new(mesh: &'a TriangleMesh, faces: &SmoothFaces) -> Self {
        let regions = Regions::new(mesh, &faces.table);
        let fans = fans(mesh, faces);
        let vertices = fans.iter().map(|(&(face, vertex), facets)| {
            let mean = mean_normal(mesh, vertex, facets);
            let near = |n: &Point| n.dot(&mean) > LARGEST_CORRECTION_DEG.to_radians().cos();
            let fitted = fitted_normal(mesh, &fans, face, vertex, &mean).filter(near).unwrap_or(mean);
            let broad = broad_normal(&regions, facets).unwrap_or(mean);
            let mut neighbours = facets.iter().flat_map(|facet| mesh.facets()[*facet]).collect::<Vec<_>>();
            neighbours.sort_unstable();
            neighbours.dedup();
            neighbours.retain(|other| *other != vertex);
            ((face, vertex), VertexOfFace { mean, fitted, broad, neighbours })
        });
        Self { mesh, vertices: vertices.collect() }
    }

    /// The normal of a face at the first vertex of an edge; zero if the vertex is not of the face.
    pub fn at(&self, face: usize, [vertex, other]: [usize; 2], estimate: Estimate) -> Point {
        let Some(at) = self.vertices.get(&(face, vertex)) else { return Point::zeros() };
        if estimate == Estimate::Mean {
            return at.mean;
        }
        let arm = |other: usize| self.mesh.vertices()[other] - self.mesh.vertices()[vertex];
        let edge = arm(other);
        let length = edge.norm();
        let same_way = |arm: &Point| arm.dot(&edge).abs() > SAME_WAY * arm.norm() * length;
        let arms = at.neighbours.iter().map(|other| arm(*other)).filter(same_way);
        let shortest = arms.map(|arm| arm.norm()).fold(length, f64::min);
        if LONG * shortest < length { at.broad } else { at.fitted }
    }
}

/// The facets of each face at each of its vertices.
pub(super) type Fans = HashMap<(usize, usize), Vec<usize>>;

fn fans(mesh: &TriangleMesh, faces: &SmoothFaces) -> Fans {
    let mut fans = Fans::new();
    for (facet, corners) in mesh.facets().iter().enumerate() {
        for vertex in corners {
            fans.entry((faces.of_facet[facet], *vertex)).or_default().push(facet);
        }
    }
    fans
}

fn mean_normal(mesh: &TriangleMesh, vertex: usize, facets: &[usize]) -> Point {
    let sum: Point = facets
        .iter()
        .filter_map(|facet| {
            let k = mesh.facets()[*facet].iter().position(|other| *other == vertex)?;
            let corners = mesh.corners(*facet);
            let (a, b) = (corners[(k + 1) % 3] - corners[k], corners[(k + 2) % 3] - corners[k]);
            let normal = a.cross(&b);
            Some(normal.try_normalize(0.0)? * normal.norm().atan2(a.dot(&b)))
        })
        .sum();
    sum.try_normalize(0.0).unwrap_or_else(Point::zeros)
}

/// The mean over the plane regions at a vertex, weighted by the squares of their whole areas.
fn broad_normal(regions: &Regions, facets: &[usize]) -> Option<Point> {
    let mut own = facets.iter().map(|facet| regions.of_facet[*facet]).collect::<Vec<_>>();
    own.sort_unstable();
    own.dedup();
    let largest = own.iter().map(|region| regions.areas[*region]).fold(0.0, f64::max);
    let part = |region: &usize| regions.normals[*region] * (regions.areas[*region] / largest).powi(2);
    own.iter().map(part).sum::<Point>().try_normalize(0.0)
}
