//! Smooth faces: what is left connected when a surface is cut along its creases.

use crate::surface::TriangleMesh;
use crate::surface::examine::turn_angles;
use crate::surface::mesh::EdgeTable;

/// A mesh cut along its creases.
#[derive(Debug)]
pub(super) struct SmoothFaces {
    /// Who shares which edge.
    pub table: EdgeTable,
    /// For each edge whether it is a crease.
    pub is_crease: Vec<bool>,
    /// The smooth face of each facet.
    pub of_facet: Vec<usize>,
}

impl SmoothFaces {
    /// Cuts along the edges at which the normal turns by `crease_deg` degrees or more.
    pub fn new(mesh: &TriangleMesh, crease_deg: f64) -> Self {
        let table = EdgeTable::new(mesh);
        let threshold = crease_deg.to_radians();
        let is_crease = turn_angles(mesh, &table).into_iter().map(|angle| angle >= threshold).collect::<Vec<_>>();
        let (of_facet, _) = table.label(|edge| !is_crease[edge]);
        Self { table, is_crease, of_facet }
    }

    /// For each vertex whether a crease touches it.
    pub fn vertices_on_creases(&self, mesh: &TriangleMesh) -> Vec<bool> {
        let mut touched = vec![false; mesh.vertices().len()];
        for (edge, _) in self.table.edges.iter().zip(&self.is_crease).filter(|(_, crease)| **crease) {
            for vertex in edge.ends {
                touched[vertex] = true;
            }
        }
        touched
    }
}
