//! OFF: a header line, the counts of vertices, facets and edges, the vertices, the facets. Vertex colours, normals
//! and texture coordinates (`COFF`, `NOFF`, `STOFF` and their mixtures) and facet colours are skipped.

use std::fmt::Write;

use super::builder::Builder;
use super::obj::push_point;
use super::scanner::{Scanner, parse};
use super::{FormatError, RawSurface, SurfaceFormat};
use crate::surface::TriangleMesh;

pub(super) fn read(bytes: &[u8]) -> Result<RawSurface, FormatError> {
    let mut scanner = Scanner::new(bytes, Some(b'#'));
    let header = scanner.word().ok_or(FormatError::Empty)?;
    let prefix = header.strip_suffix(b"OFF").ok_or_else(|| scanner.unexpected("'OFF'", header))?;
    if prefix.iter().any(|byte| !b"STCN".contains(byte)) {
        return Err(FormatError::Variant {
            variant: format!("{} (more than three dimensions)", super::scanner::quote(header)),
        });
    }
    let first = scanner.word().ok_or(FormatError::Truncated { reading: "the counts" })?;
    if first.eq_ignore_ascii_case(b"BINARY") {
        return Err(FormatError::Variant { variant: "binary OFF".to_owned() });
    }
    let vertices: u64 = parse(first).ok_or_else(|| scanner.unexpected("the number of vertices", first))?;
    let facets: u64 = scanner.number("the number of facets")?;
    // The number of edges may be missing, and nobody needs it.
    scanner.rest_of_line();

    let mut builder = Builder::default();
    for _ in 0..vertices {
        let x = scanner.point()?;
        builder.vertex(x)?;
        if !prefix.is_empty() {
            scanner.rest_of_line();
        }
    }
    for facet in 0..facets {
        let corners: u64 = scanner.number("a facet's number of corners")?;
        for _ in 0..corners {
            let number: i64 = scanner.number("a vertex number")?;
            let missing = FormatError::NoSuchVertex { facet: facet as usize, vertex: number };
            builder.corner(usize::try_from(number).map_err(|_| missing)?);
        }
        builder.close_polygon()?;
        scanner.rest_of_line();
    }
    if !scanner.is_done() {
        builder.note("Text after the last facet was ignored.".to_owned());
    }
    builder.finish(SurfaceFormat::Off, "text")
}

pub(super) fn write(mesh: &TriangleMesh) -> Vec<u8> {
    // Writing to a string can't fail.
    let mut text = String::new();
    let _ = writeln!(text, "OFF\n{} {} 0", mesh.vertices().len(), mesh.facets().len());
    for x in mesh.vertices() {
        push_point(&mut text, "", x);
    }
    for [a, b, c] in mesh.facets() {
        let _ = writeln!(text, "3 {a} {b} {c}");
    }
    text.into_bytes()
}
