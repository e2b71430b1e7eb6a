//! STL: text (one or several `solid ... endsolid`) and binary (80 bytes of header, a 32-bit count, 50 bytes a facet:
//! normal, three vertices, attribute).
//!
//! The normals in the file are ignored: the order of the corners says which side is outside.

use super::binary::Cursor;
use super::builder::Builder;
use super::scanner::Scanner;
use super::{FormatError, RawSurface, SurfaceFormat, WriteError};
use crate::surface::{Point, TriangleMesh};

const HEADER: usize = 80;
const FACET: usize = 50;
/// Header of a written file; it must not begin with "solid".
const WRITTEN_HEADER: &[u8] = b"binary STL";

/// Binary, and exactly as long as its count says: no text file can look so, because four letters in the place of the
/// count stand for more than half a billion facets.
pub(super) fn is_binary_of_stated_length(bytes: &[u8]) -> bool {
    stated_count(bytes).is_some_and(|count| bytes.len() as u64 == (HEADER + 4) as u64 + u64::from(count) * FACET as u64)
}

/// Text: begins with "solid", and after that line with "facet" or "endsolid". The first word alone is not enough,
/// because many binary files carry it in their header.
pub(super) fn is_text(bytes: &[u8]) -> bool {
    let mut scanner = Scanner::new(bytes, None);
    if !scanner.word().is_some_and(|word| word.eq_ignore_ascii_case(b"solid")) {
        return false;
    }
    scanner.rest_of_line();
    scanner.word().is_some_and(|word| word.eq_ignore_ascii_case(b"facet") || word.eq_ignore_ascii_case(b"endsolid"))
}

fn stated_count(bytes: &[u8]) -> Option<u32> {
    bytes.get(HEADER..)?.first_chunk().map(|count| u32::from_le_bytes(*count))
}

pub(super) fn read(bytes: &[u8]) -> Result<RawSurface, FormatError> {
    if is_binary_of_stated_length(bytes) {
        read_binary(bytes)
    } else if is_text(bytes) || (bytes.starts_with(b"solid") && !bytes.contains(&0)) {
        // Text that goes wrong before its first facet is still text: its error names the line.
        read_text(bytes)
    } else {
        read_binary(bytes)
    }
}

fn read_binary(bytes: &[u8]) -> Result<RawSurface, FormatError> {
    let stated = stated_count(bytes).ok_or(FormatError::Truncated { reading: "the header" })?;
    let mut cursor = Cursor::new(bytes, HEADER + 4, false);
    cursor.check_room(u64::from(stated), FACET, "facets")?;
    let held = (cursor.left() / FACET) as u64;
    if held > u64::from(stated) {
        return Err(FormatError::CountTooSmall { stated: u64::from(stated), held });
    }
    let mut builder = Builder::default();
    for _ in 0..stated {
        let reading = "a facet";
        cursor.skip(12, reading)?;
        let corners = [cursor.point_f32(reading)?, cursor.point_f32(reading)?, cursor.point_f32(reading)?];
        cursor.skip(2, reading)?;
        builder.loose_facet(corners)?;
    }
    if cursor.left() > 0 {
        builder.note(format!("{} bytes after the last facet were ignored.", cursor.left()));
    }
    builder.finish(SurfaceFormat::Stl, "binary")
}

fn read_text(bytes: &[u8]) -> Result<RawSurface, FormatError> {
    let mut scanner = Scanner::new(bytes, None);
    let mut builder = Builder::default();
    while !scanner.is_done() {
        scanner.keyword("solid")?;
        builder.begin_group(String::from_utf8_lossy(scanner.rest_of_line()).into_owned());
        loop {
            let word = scanner.word().ok_or(FormatError::Truncated { reading: "a solid without 'endsolid'" })?;
            if word.eq_ignore_ascii_case(b"endsolid") {
                scanner.rest_of_line();
                break;
            }
            if !word.eq_ignore_ascii_case(b"facet") {
                return Err(scanner.unexpected("'facet' or 'endsolid'", word));
            }
            builder.loose_facet(read_facet(&mut scanner)?)?;
        }
    }
    builder.finish(SurfaceFormat::Stl, "text")
}

fn read_facet(scanner: &mut Scanner) -> Result<[Point; 3], FormatError> {
    scanner.keyword("normal")?;
    for _ in 0..3 {
        scanner.word().ok_or(FormatError::Truncated { reading: "a normal" })?;
    }
    scanner.keyword("outer")?;
    scanner.keyword("loop")?;
    let mut corners = [Point::zeros(); 3];
    for corner in &mut corners {
        scanner.keyword("vertex")?;
        *corner = scanner.point()?;
    }
    scanner.keyword("endloop")?;
    scanner.keyword("endfacet")?;
    Ok(corners)
}

pub(super) fn write(mesh: &TriangleMesh) -> Result<Vec<u8>, WriteError> {
    let rounded = mesh.vertices().iter().map(|x| [x.x as f32, x.y as f32, x.z as f32]).collect::<Vec<_>>();
    if let Some(vertex) = rounded.iter().position(|x| x.iter().any(|c| !c.is_finite())) {
        return Err(WriteError::OutOfRange { vertex });
    }
    let mut bytes = WRITTEN_HEADER.to_vec();
    bytes.resize(HEADER, 0);
    bytes.extend((mesh.facets().len() as u32).to_le_bytes());
    for (facet, corners) in mesh.facets().iter().enumerate() {
        let [a, b, c] = corners.map(|vertex| rounded[vertex]);
        if a == b || b == c || c == a {
            return Err(WriteError::FacetLost { facet });
        }
        let normal = mesh.area_normal(facet).try_normalize(0.0).unwrap_or_else(Point::zeros);
        let normal = [normal.x as f32, normal.y as f32, normal.z as f32];
        for number in [normal, a, b, c].into_iter().flatten() {
            bytes.extend(number.to_le_bytes());
        }
        bytes.extend([0, 0]);
    }
    Ok(bytes)
}
