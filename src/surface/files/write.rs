//! From a mesh to a file.

use std::fs;
use std::path::Path;

use super::{SurfaceFormat, WriteError, msh2, obj, off, ply, stl};
use crate::surface::TriangleMesh;

/// Writes a surface in the format that the path's extension names: binary STL, OBJ, binary PLY, OFF, MSH 2.2 text.
///
/// The same mesh gives the same bytes. All but STL keep double precision; STL rounds each vertex once, so that its
/// copies in different facets agree.
///
/// # Errors
/// An unknown extension, a mesh that the format can't hold, or a system that refuses to write.
pub fn write_surface(mesh: &TriangleMesh, path: impl AsRef<Path>) -> Result<(), WriteError> {
    let path = path.as_ref();
    let format = SurfaceFormat::of_path(path).ok_or_else(|| WriteError::UnknownFormat { path: path.to_path_buf() })?;
    let bytes = surface_bytes(mesh, format)?;
    fs::write(path, bytes).map_err(|source| WriteError::Unwritable { path: path.to_path_buf(), source })
}

/// The bytes of the file that [`write_surface`] writes.
///
/// # Errors
/// A mesh that the format can't hold.
pub fn surface_bytes(mesh: &TriangleMesh, format: SurfaceFormat) -> Result<Vec<u8>, WriteError> {
    let count = mesh.vertices().len().max(mesh.facets().len());
    // All these formats number in 32 bits, MSH and PLY with a sign.
    if count >= i32::MAX as usize {
        return Err(WriteError::TooMany { count, format });
    }
    match format {
        SurfaceFormat::Stl => stl::write(mesh),
        SurfaceFormat::Obj => Ok(obj::write(mesh)),
        SurfaceFormat::Ply => Ok(ply::write(mesh)),
        SurfaceFormat::Off => Ok(off::write(mesh)),
        SurfaceFormat::Msh => Ok(msh2::write(mesh)),
    }
}
