//! The mesh itself, with its invariants: indices in range, coordinates finite, one group a facet or none at all.

use crate::surface::{Panels, Point};

/// Triangles over shared vertices, in the coordinates of the file they came from.
///
/// Corners are counter-clockwise seen from outside when the surface is well oriented; the mesh itself does not
/// promise that. Facets and vertices are numbered from 0 in the file's order.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct TriangleMesh {
    vertices: Vec<Point>,
    facets: Vec<[usize; 3]>,
    groups: Vec<usize>,
}

/// Why vertices and facets are no mesh. Numbers count from 0; the text counts from 1.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
#[non_exhaustive]
pub enum MeshError {
    /// A facet names a vertex that does not exist.
    #[error("facet {} names vertex {}, but there are {vertex_count} vertices", .facet + 1, .vertex + 1)]
    NoSuchVertex {
        /// The facet.
        facet: usize,
        /// The vertex it names.
        vertex: usize,
        /// How many there are.
        vertex_count: usize,
    },
    /// A coordinate is infinite or not a number.
    #[error("vertex {} has a coordinate that is infinite or not a number", .vertex + 1)]
    NotFinite {
        /// The vertex.
        vertex: usize,
    },
    /// The list of groups is neither empty nor as long as the list of facets.
    #[error("{groups} group numbers for {facets} facets")]
    GroupCount {
        /// Length of the list of groups.
        groups: usize,
        /// Length of the list of facets.
        facets: usize,
    },
}

impl TriangleMesh {
    /// The corners of panels as a mesh of flat triangles, times `scale`.
    pub fn of_panels(panels: &Panels, scale: f64) -> Self {
        let mut vertices = vec![Point::zeros(); panels.vertex_count];
        for panel in &panels.panels {
            for (vertex, corner) in panel.vertices.iter().zip(panel.patch.corners()) {
                vertices[*vertex] = corner * scale;
            }
        }
        let facets = panels.panels.iter().map(|panel| panel.vertices).collect();
        Self { vertices, facets, groups: Vec::new() }
    }

    /// A mesh of these vertices and facets.
    ///
    /// # Errors
    /// A facet with an index out of range, or a vertex that is not finite.
    pub fn new(vertices: Vec<Point>, facets: Vec<[usize; 3]>) -> Result<Self, MeshError> {
        Self::with_groups(vertices, facets, Vec::new())
    }

    /// A mesh whose facets carry a group number each (a solid, object or physical group of the file); an empty list
    /// means that there are no groups.
    ///
    /// # Errors
    /// As [`TriangleMesh::new`]; also if the number of groups differs from the number of facets.
    pub fn with_groups(vertices: Vec<Point>, facets: Vec<[usize; 3]>, groups: Vec<usize>) -> Result<Self, MeshError> {
        let vertex_count = vertices.len();
        if let Some(vertex) = vertices.iter().position(|x| !x.iter().all(|c| c.is_finite())) {
            return Err(MeshError::NotFinite { vertex });
        }
        for (facet, corners) in facets.iter().enumerate() {
            if let Some(&vertex) = corners.iter().find(|vertex| **vertex >= vertex_count) {
                return Err(MeshError::NoSuchVertex { facet, vertex, vertex_count });
            }
        }
        if !groups.is_empty() && groups.len() != facets.len() {
            return Err(MeshError::GroupCount { groups: groups.len(), facets: facets.len() });
        }
        Ok(Self { vertices, facets, groups })
    }

    /// The vertices.
    pub fn vertices(&self) -> &[Point] {
        &self.vertices
    }

    /// The facets, each by its three vertices.
    pub fn facets(&self) -> &[[usize; 3]] {
        &self.facets
    }

    /// The group of each facet; empty if the file has no groups.
    pub fn groups(&self) -> &[usize] {
        &self.groups
    }

    /// Corner positions of a facet. Panics if there is no such facet.
    pub fn corners(&self, facet: usize) -> [Point; 3] {
        self.facets[facet].map(|vertex| self.vertices[vertex])
    }

    /// Area-weighted normal of a facet: its length is twice the area. Panics if there is no such facet.
    pub fn area_normal(&self, facet: usize) -> Point {
        let [a, b, c] = self.corners(facet);
        (b - a).cross(&(c - a))
    }

    /// Centre of a facet. Panics if there is no such facet.
    pub fn centre(&self, facet: usize) -> Point {
        let [a, b, c] = self.corners(facet);
        (a + b + c) / 3.0
    }

    /// The smallest box around all vertices, as two opposite corners; both at the origin if there are none.
    pub fn bounding_box(&self) -> (Point, Point) {
        let Some(first) = self.vertices.first() else {
            return (Point::zeros(), Point::zeros());
        };
        self.vertices.iter().fold((*first, *first), |(low, high), x| (low.inf(x), high.sup(x)))
    }

    /// The facets that `keep` accepts, with vertices that nobody uses dropped; the order stays.
    pub fn filtered(&self, keep: impl Fn(usize) -> bool) -> Self {
        let kept = (0..self.facets.len()).filter(|facet| keep(*facet)).collect::<Vec<_>>();
        let mut used = vec![false; self.vertices.len()];
        for facet in &kept {
            for vertex in self.facets[*facet] {
                used[vertex] = true;
            }
        }
        let mut numbers = vec![0; self.vertices.len()];
        let mut vertices = Vec::new();
        for (vertex, x) in self.vertices.iter().enumerate().filter(|(vertex, _)| used[*vertex]) {
            numbers[vertex] = vertices.len();
            vertices.push(*x);
        }
        let facets = kept.iter().map(|facet| self.facets[*facet].map(|vertex| numbers[vertex])).collect();
        let groups = if self.groups.is_empty() { Vec::new() } else { kept.iter().map(|f| self.groups[*f]).collect() };
        Self { vertices, facets, groups }
    }
}
