//! Collects vertices and polygons while a file is read and makes triangles of them at the end.

use super::{FormatError, RawSurface, SurfaceFormat};
use crate::surface::Point;
use crate::surface::TriangleMesh;
use crate::surface::mesh::{MAX_POLYGON_CORNERS, triangulate};

/// A surface being read.
#[derive(Debug, Default)]
pub(super) struct Builder {
    vertices: Vec<Point>,
    /// Corners of all polygons, one polygon after the other.
    corners: Vec<usize>,
    /// Where each polygon's corners end, and its group.
    polygons: Vec<(usize, usize)>,
    group_names: Vec<String>,
    notes: Vec<String>,
}

impl Builder {
    pub fn vertex_count(&self) -> usize {
        self.vertices.len()
    }

    pub fn polygon_count(&self) -> usize {
        self.polygons.len()
    }

    pub fn vertex(&mut self, x: Point) -> Result<usize, FormatError> {
        let vertex = self.vertices.len();
        if !x.iter().all(|c| c.is_finite()) {
            return Err(FormatError::NotFiniteVertex { vertex });
        }
        self.vertices.push(x);
        Ok(vertex)
    }

    /// A facet with three vertices of its own.
    pub fn loose_facet(&mut self, corners: [Point; 3]) -> Result<(), FormatError> {
        let facet = self.polygons.len();
        for x in corners {
            let corner = self.vertex(x).map_err(|_| FormatError::NotFiniteFacet { facet })?;
            self.corners.push(corner);
        }
        self.close_polygon()
    }

    /// One more corner of the polygon that is being read.
    pub fn corner(&mut self, vertex: usize) {
        self.corners.push(vertex);
    }

    /// Ends the polygon that is being read.
    pub fn close_polygon(&mut self) -> Result<(), FormatError> {
        let start = self.polygons.last().map_or(0, |(end, _)| *end);
        let corners = self.corners.len() - start;
        if !(3..=MAX_POLYGON_CORNERS).contains(&corners) {
            return Err(FormatError::CornerCount { facet: self.polygons.len(), corners: corners as u64 });
        }
        self.polygons.push((self.corners.len(), self.group_names.len().saturating_sub(1)));
        Ok(())
    }

    /// Ends the polygon that is being read and puts it into a given group.
    pub fn close_polygon_in(&mut self, group: usize) -> Result<(), FormatError> {
        self.close_polygon()?;
        if let Some(polygon) = self.polygons.last_mut() {
            polygon.1 = group;
        }
        Ok(())
    }

    /// Begins a group, into which the following polygons go; gives its number.
    pub fn begin_group(&mut self, name: String) -> usize {
        self.group_names.push(name);
        self.group_names.len() - 1
    }

    pub fn note(&mut self, note: String) {
        self.notes.push(note);
    }

    /// Cuts the polygons into triangles and gives the surface.
    pub fn finish(mut self, format: SurfaceFormat, variant: &str) -> Result<RawSurface, FormatError> {
        if self.polygons.is_empty() {
            return Err(FormatError::NoFacets);
        }
        let grouped = self.group_names.len() > 1;
        let (mut facets, mut groups) = (Vec::with_capacity(self.polygons.len()), Vec::new());
        let (mut start, mut cut) = (0, 0_usize);
        for (facet, &(end, group)) in self.polygons.iter().enumerate() {
            let polygon = self.corners.get(start..end).unwrap_or_default();
            let mut places = Vec::with_capacity(polygon.len());
            for &vertex in polygon {
                let missing = FormatError::NoSuchVertex { facet, vertex: vertex as i64 };
                places.push(*self.vertices.get(vertex).ok_or(missing)?);
            }
            let triangles = triangulate(&places);
            cut += usize::from(triangles.len() > 1);
            groups.extend(triangles.iter().filter(|_| grouped).map(|_| group));
            facets.extend(triangles.into_iter().map(|triangle| triangle.map(|corner| polygon[corner])));
            start = end;
        }
        if cut > 0 {
            let whole = self.polygons.len();
            self.notes
                .push(format!("{cut} of {whole} facets have more than three corners and were cut into triangles, which count as facets."));
        }
        let mesh = TriangleMesh::with_groups(self.vertices, facets, groups)?;
        Ok(RawSurface { mesh, format, variant: variant.to_owned(), group_names: self.group_names, notes: self.notes })
    }
}
