//! What reading a file gives.

use super::SurfaceFormat;
use crate::surface::TriangleMesh;

/// A surface as its file holds it: file coordinates, unwelded, unexamined.
#[derive(Debug, Clone, PartialEq)]
pub struct RawSurface {
    /// The triangles. In STL every facet has three vertices of its own.
    pub mesh: TriangleMesh,
    /// The format.
    pub format: SurfaceFormat,
    /// The variant of the format, such as "binary" or "4.1, text".
    pub variant: String,
    /// Names of the groups (solids, objects, physical surfaces), by the group numbers of the mesh; empty if the file
    /// has none.
    pub group_names: Vec<String>,
    /// What was cut, left out or ignored, in sentences for the user.
    pub notes: Vec<String>,
}
