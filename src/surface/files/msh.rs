//! MSH: the surface triangles and quads of a Gmsh mesh, version 2.2 or 4.1, text or binary.
//!
//! Lines, points and volume elements are skipped. Of second- and third-order triangles and quads the corners are used.
//! This file reads the header and finds the sections; the sections themselves differ by version.

use super::scanner::{Scanner, quote};
use super::{FormatError, RawSurface, msh2, msh4};

/// A section `$Name ... $EndName` as bytes after the line of its name, and where it starts in the file.
pub(super) struct Section<'a> {
    pub name: &'a [u8],
    pub body: &'a [u8],
    pub line: usize,
}

/// How numbers stand in the file.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Encoding {
    Text,
    Binary { big_endian: bool },
}

pub(super) fn read(bytes: &[u8]) -> Result<RawSurface, FormatError> {
    let mut sections = Sections { bytes, at: 0, line: 1 };
    let Some(format) = sections.next().transpose()? else {
        return Err(FormatError::Empty);
    };
    let mut scanner = Scanner::new(format.body, None);
    if format.name != b"MeshFormat" {
        return Err(scanner.unexpected("'$MeshFormat'", format.name));
    }
    let version = scanner.word().ok_or(FormatError::Truncated { reading: "the version" })?;
    let kind: i64 = scanner.number("the file type")?;
    let size: i64 = scanner.number("the data size")?;
    scanner.rest_of_line();
    let encoding = match kind {
        0 => Encoding::Text,
        _ => match format.body.get(scanner.position()..).and_then(|rest| rest.first_chunk()) {
            Some([1, 0, 0, 0]) => Encoding::Binary { big_endian: false },
            Some([0, 0, 0, 1]) => Encoding::Binary { big_endian: true },
            _ => return Err(FormatError::Truncated { reading: "the byte order" }),
        },
    };
    if size != 8 {
        return Err(FormatError::Variant { variant: format!("MSH with a data size of {size}") });
    }
    match version {
        b"2" | b"2.0" | b"2.1" | b"2.2" => msh2::read(sections, encoding),
        b"4.1" => msh4::read(sections, encoding),
        _ => Err(FormatError::Variant { variant: format!("MSH version {}", quote(version)) }),
    }
}

/// Walks over the sections of a file.
pub(super) struct Sections<'a> {
    bytes: &'a [u8],
    at: usize,
    line: usize,
}

impl<'a> Iterator for Sections<'a> {
    type Item = Result<Section<'a>, FormatError>;

    fn next(&mut self) -> Option<Self::Item> {
        let rest = &self.bytes[self.at..];
        let mut scanner = Scanner::new(rest, None);
        if scanner.is_done() {
            return None;
        }
        let word = scanner.word()?;
        let Some(name) = word.strip_prefix(b"$") else {
            return Some(Err(scanner.unexpected("a section such as '$Nodes'", word)));
        };
        scanner.rest_of_line();
        let start = scanner.position();
        let line = self.line + scanner.line() - 1;
        let end_mark = [b"$End", name].concat();
        let Some(length) = find(&rest[start..], &end_mark) else {
            return Some(Err(FormatError::Truncated { reading: "a section without its end" }));
        };
        let body = &rest[start..start + length];
        scanner.skip_to(start + length + end_mark.len());
        self.at += scanner.position();
        self.line += scanner.line() - 1;
        Some(Ok(Section { name, body, line }))
    }
}

/// Where `wanted` begins. Binary data may hold any bytes, but hardly a section's own end mark.
fn find(bytes: &[u8], wanted: &[u8]) -> Option<usize> {
    let mut from = 0;
    loop {
        let at = from + bytes.get(from..)?.iter().position(|byte| *byte == b'$')?;
        if bytes[at..].starts_with(wanted) {
            return Some(at);
        }
        from = at + 1;
    }
}

/// Corners to use and nodes in all of an element type; no corners for what is no surface element.
///
/// Types and node counts are those of the format's documentation (from memory).
pub(super) fn element_type(kind: i64) -> Option<(usize, usize)> {
    const NODES: [usize; 31] =
        [2, 3, 4, 4, 8, 6, 5, 3, 6, 9, 10, 27, 18, 14, 1, 8, 20, 15, 13, 9, 10, 12, 15, 15, 21, 4, 5, 6, 20, 35, 56];
    let nodes = *NODES.get(usize::try_from(kind).ok()?.checked_sub(1)?)?;
    let corners = match kind {
        2 | 9 | 20..=25 => 3,
        3 | 10 | 16 => 4,
        _ => 0,
    };
    Some((corners, nodes))
}
