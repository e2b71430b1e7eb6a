//! Which formats there are and how one is told from another.

use std::fmt;
use std::path::Path;

/// A surface file format.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
#[non_exhaustive]
pub enum SurfaceFormat {
    /// Stereolithography, text or binary.
    Stl,
    /// Wavefront object, text.
    Obj,
    /// Polygon file format, text or binary of either byte order.
    Ply,
    /// Object file format, text.
    Off,
    /// Gmsh mesh 2.2 and 4.1, text or binary; written as 2.2.
    Msh,
}

impl SurfaceFormat {
    /// All formats.
    pub const ALL: [Self; 5] = [Self::Stl, Self::Obj, Self::Ply, Self::Off, Self::Msh];

    /// The file name's extension, without the dot.
    pub fn extension(self) -> &'static str {
        match self {
            Self::Stl => "stl",
            Self::Obj => "obj",
            Self::Ply => "ply",
            Self::Off => "off",
            Self::Msh => "msh",
        }
    }

    /// The format that a path's extension names, in upper or lower case.
    pub fn of_path(path: &Path) -> Option<Self> {
        let extension = path.extension()?.to_str()?.to_ascii_lowercase();
        Self::ALL.into_iter().find(|format| format.extension() == extension)
    }

    /// The format that the content itself announces, if it does. OBJ has no mark of its own, and a binary STL only
    /// its length.
    pub fn of_content(bytes: &[u8]) -> Option<Self> {
        let start = bytes.trim_ascii_start();
        let word = start.split(|byte| byte.is_ascii_whitespace()).next().unwrap_or_default();
        if word == b"ply" {
            Some(Self::Ply)
        } else if start.starts_with(b"$MeshFormat") {
            Some(Self::Msh)
        } else if word.len() <= 7 && word.ends_with(b"OFF") {
            Some(Self::Off)
        } else if super::stl::is_binary_of_stated_length(bytes) || super::stl::is_text(bytes) {
            Some(Self::Stl)
        } else {
            None
        }
    }
}

impl fmt::Display for SurfaceFormat {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(match self {
            Self::Stl => "STL",
            Self::Obj => "OBJ",
            Self::Ply => "PLY",
            Self::Off => "OFF",
            Self::Msh => "MSH",
        })
    }
}
