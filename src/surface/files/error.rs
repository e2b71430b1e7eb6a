//! What can be wrong with a surface file. Numbers in fields count from 0; the texts count from 1.

use std::io;
use std::path::PathBuf;

use super::SurfaceFormat;
use crate::surface::MeshError;

/// Why a surface file could not be read.
#[derive(Debug, thiserror::Error)]
#[non_exhaustive]
pub enum FileError {
    /// There is no such file.
    #[error("there is no file {}", .path.display())]
    NotFound {
        /// The path asked for.
        path: PathBuf,
    },
    /// The path is a folder.
    #[error("{} is a folder, not a file", .path.display())]
    Folder {
        /// The path asked for.
        path: PathBuf,
    },
    /// The system refused to read it.
    #[error("{} can't be read", .path.display())]
    Unreadable {
        /// The path asked for.
        path: PathBuf,
        /// The system's reason.
        source: io::Error,
    },
    /// Neither the extension nor the content tells the format.
    #[error("the format of {} is not known", .path.display())]
    UnknownFormat {
        /// The path asked for.
        path: PathBuf,
    },
    /// The content is not a usable file of its format.
    #[error("{} is not a usable {format} file", .path.display())]
    Content {
        /// The path asked for.
        path: PathBuf,
        /// The format it was read as.
        format: SurfaceFormat,
        /// What is wrong.
        source: FormatError,
    },
}

/// What is wrong with the content of a surface file.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[non_exhaustive]
pub enum FormatError {
    /// Not a single byte, or nothing but blanks.
    #[error("the file is empty")]
    Empty,
    /// The file ends too early.
    #[error("the file ends while reading {reading}")]
    Truncated {
        /// What was being read.
        reading: &'static str,
    },
    /// A header states more than the file can hold.
    #[error("the header states {stated} {what}, but the file has room for {room} at most")]
    CountTooLarge {
        /// What is counted.
        what: &'static str,
        /// The number in the header.
        stated: u64,
        /// The largest number that the file's length allows.
        room: u64,
    },
    /// A header states fewer facets than follow it.
    #[error("the header states {stated} facets, but {held} follow it")]
    CountTooSmall {
        /// The number in the header.
        stated: u64,
        /// The number that follows.
        held: u64,
    },
    /// Something else was expected.
    #[error("line {line}: expected {expected}, found '{found}'")]
    Unexpected {
        /// The line, counted from 1.
        line: usize,
        /// What should stand there.
        expected: &'static str,
        /// What stands there, shortened.
        found: String,
    },
    /// Something else was expected in a binary part.
    #[error("byte {at}: expected {expected}, found {found}")]
    UnexpectedByte {
        /// Place in the file, counted from 0.
        at: usize,
        /// What should stand there.
        expected: &'static str,
        /// The number that stands there.
        found: i64,
    },
    /// A coordinate of a facet is infinite or not a number.
    #[error("facet {} has a coordinate that is infinite or not a number", .facet + 1)]
    NotFiniteFacet {
        /// The facet.
        facet: usize,
    },
    /// A coordinate of a vertex is infinite or not a number.
    #[error("vertex {} has a coordinate that is infinite or not a number", .vertex + 1)]
    NotFiniteVertex {
        /// The vertex.
        vertex: usize,
    },
    /// A facet names a vertex that is not in the file.
    #[error("facet {} names vertex number {vertex}, which is not in the file", .facet + 1)]
    NoSuchVertex {
        /// The facet (polygon) in the file's order.
        facet: usize,
        /// The number as it stands in the file.
        vertex: i64,
    },
    /// A polygon has fewer than three corners, or more than ten thousand.
    #[error("facet {} has {corners} corners", .facet + 1)]
    CornerCount {
        /// The facet (polygon) in the file's order.
        facet: usize,
        /// Its number of corners.
        corners: u64,
    },
    /// A valid variant of the format that is not read here.
    #[error("{variant} is not supported")]
    Variant {
        /// The variant.
        variant: String,
    },
    /// The file holds no facets.
    #[error("the file holds no surface facets")]
    NoFacets,
    /// The pieces make no mesh.
    #[error(transparent)]
    Mesh(#[from] MeshError),
}

/// Why a surface could not be written.
#[derive(Debug, thiserror::Error)]
#[non_exhaustive]
pub enum WriteError {
    /// The extension tells no format.
    #[error("the name {} does not tell the format", .path.display())]
    UnknownFormat {
        /// The path asked for.
        path: PathBuf,
    },
    /// The system refused to write it.
    #[error("{} can't be written", .path.display())]
    Unwritable {
        /// The path asked for.
        path: PathBuf,
        /// The system's reason.
        source: io::Error,
    },
    /// A coordinate is too large for the single precision of STL.
    #[error("vertex {} is too far out for the single precision of STL", .vertex + 1)]
    OutOfRange {
        /// The vertex.
        vertex: usize,
    },
    /// Two corners of a facet become one in the single precision of STL.
    #[error("facet {} collapses in the single precision of STL", .facet + 1)]
    FacetLost {
        /// The facet.
        facet: usize,
    },
    /// More facets or vertices than the format can number.
    #[error("{count} facets or vertices are more than {format} can number")]
    TooMany {
        /// How many there are.
        count: usize,
        /// The format.
        format: SurfaceFormat,
    },
}

impl FileError {
    /// What the user can do next.
    pub fn hint(&self) -> String {
        let text = match self {
            Self::NotFound { .. } => "check the name and the folder",
            Self::Folder { .. } => "name one file of it; each surface is a file of its own",
            Self::Unreadable { .. } => "check that the file may be read",
            Self::UnknownFormat { .. } => "surfaces are read from .stl, .obj, .ply, .off and .msh files",
            Self::Content { source, .. } => return source.hint().to_owned(),
        };
        text.to_owned()
    }
}

impl FormatError {
    /// What the user can do next.
    pub fn hint(&self) -> &'static str {
        match self {
            Self::Empty | Self::Truncated { .. } | Self::CountTooLarge { .. } => {
                "the file looks cut off: copy or export it again"
            }
            Self::CountTooSmall { .. } => "header and content disagree: export the file again",
            Self::NotFiniteFacet { .. } | Self::NotFiniteVertex { .. } => {
                "the program that wrote the file failed at this place: repair the model there and export it again"
            }
            Self::Variant { .. } => "export the surface as binary STL, or as MSH 2.2 or 4.1",
            Self::NoFacets => "export the boundary of the body as triangles",
            _ => "the file is damaged or not what its name says: export it again, for instance as binary STL",
        }
    }
}

impl WriteError {
    /// What the user can do next.
    pub fn hint(&self) -> &'static str {
        match self {
            Self::UnknownFormat { .. } => "end the name in .stl, .obj, .ply, .off or .msh",
            Self::Unwritable { .. } => "check that the folder exists and may be written to",
            Self::OutOfRange { .. } | Self::FacetLost { .. } => {
                "move the body to the origin, or write .ply or .obj, which keep double precision"
            }
            Self::TooMany { .. } => "write another format",
        }
    }
}
