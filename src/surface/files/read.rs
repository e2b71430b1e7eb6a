//! From a path to a surface.

use std::fs;
use std::io;
use std::path::Path;

use super::{FileError, FormatError, RawSurface, SurfaceFormat, msh, obj, off, ply, stl};

/// Reads a surface file.
///
/// The content decides on the format where it announces itself, the extension elsewhere. Lengths are in the file's
/// own unit, which the file does not tell. Quads and polygons are cut into triangles: convex ones as a fan (quads
/// along the shorter diagonal), others by clipping ears.
///
/// # Errors
/// The file is missing, a folder, unreadable, of unknown format, or its content is damaged.
pub fn read_surface(path: impl AsRef<Path>) -> Result<RawSurface, FileError> {
    let path = path.as_ref();
    let owned = || path.to_path_buf();
    if path.is_dir() {
        return Err(FileError::Folder { path: owned() });
    }
    let bytes = fs::read(path).map_err(|source| match source.kind() {
        io::ErrorKind::NotFound => FileError::NotFound { path: owned() },
        _ => FileError::Unreadable { path: owned(), source },
    })?;
    let (announced, named) = (SurfaceFormat::of_content(&bytes), SurfaceFormat::of_path(path));
    let format = announced.or(named).ok_or_else(|| FileError::UnknownFormat { path: owned() })?;
    let mut surface =
        read_surface_bytes(&bytes, format).map_err(|source| FileError::Content { path: owned(), format, source })?;
    if let Some(named) = named.filter(|named| *named != format) {
        surface.notes.push(format!("The name says {named}, but the content is {format} and was read as such."));
    }
    Ok(surface)
}

/// Reads a surface of a known format from the bytes of its file.
///
/// # Errors
/// The content is empty, cut off, damaged or holds no facets.
pub fn read_surface_bytes(bytes: &[u8], format: SurfaceFormat) -> Result<RawSurface, FormatError> {
    if bytes.trim_ascii().is_empty() {
        return Err(FormatError::Empty);
    }
    match format {
        SurfaceFormat::Stl => stl::read(bytes),
        SurfaceFormat::Obj => obj::read(bytes),
        SurfaceFormat::Ply => ply::read(bytes),
        SurfaceFormat::Off => off::read(bytes),
        SurfaceFormat::Msh => msh::read(bytes),
    }
}
