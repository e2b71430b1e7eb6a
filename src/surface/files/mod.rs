//! Surface files: STL, OBJ, PLY, OFF and MSH, read and written.
//!
//! Reading gives the triangles as the file holds them, in the file's own coordinates (files carry no unit), and says
//! what was left out. Nothing is mended here: welding, examining and mending are steps of their own. All readers are
//! the house's own. They work on the file's bytes in memory, believe no count before the bytes behind it are there,
//! and so need memory proportional to the file's length whatever its header claims.

mod binary;
mod builder;
mod error;
mod format;
mod msh;
mod msh2;
mod msh4;
mod obj;
mod off;
mod ply;
mod raw;
mod read;
mod scanner;
mod stl;
mod write;

pub use error::{FileError, FormatError, WriteError};
pub use format::SurfaceFormat;
pub use raw::RawSurface;
pub use read::{read_surface, read_surface_bytes};
pub use write::{surface_bytes, write_surface};
