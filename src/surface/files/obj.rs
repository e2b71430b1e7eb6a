//! OBJ: `v` and `f` statements, and `o` and `g` as groups; everything else (normals, textures, materials, lines,
//! points) is skipped. Free-form curves and surfaces are not read.

use std::fmt::Write;

use super::builder::Builder;
use super::scanner::{Scanner, parse};
use super::{FormatError, RawSurface, SurfaceFormat};
use crate::surface::{Point, TriangleMesh};

pub(super) fn read(bytes: &[u8]) -> Result<RawSurface, FormatError> {
    // A backslash joins a line with the next; blanks in its place keep the line numbers of what follows nearly right.
    let joined;
    let bytes = if bytes.contains(&b'\\') {
        joined = join_lines(bytes);
        &joined
    } else {
        bytes
    };
    let mut scanner = Scanner::new(bytes, Some(b'#'));
    let mut builder = Builder::default();
    let mut free_form = false;
    let mut last_name = Vec::new();
    while let Some(word) = scanner.word() {
        match word {
            b"v" => {
                let x = scanner.point()?;
                builder.vertex(x)?;
            }
            b"f" => read_facet(&mut scanner, &mut builder)?,
            b"o" | b"g" => {
                let name = scanner.rest_of_line();
                if name != last_name {
                    last_name = name.to_vec();
                    builder.begin_group(String::from_utf8_lossy(name).into_owned());
                }
                continue;
            }
            b"surf" | b"curv" | b"curv2" => free_form = true,
            _ if !word.iter().all(|byte| byte.is_ascii_graphic()) || word.len() > 16 => {
                return Err(scanner.unexpected("an OBJ statement", word));
            }
            _ => {}
        }
        scanner.rest_of_line();
    }
    if free_form {
        builder.note("Free-form curves and surfaces were left out.".to_owned());
    }
    builder.finish(SurfaceFormat::Obj, "text")
}

fn read_facet(scanner: &mut Scanner, builder: &mut Builder) -> Result<(), FormatError> {
    let expected = "a vertex number";
    while let Some(word) = scanner.word_on_line() {
        let first = word.split(|byte| *byte == b'/').next().unwrap_or_default();
        let number: i64 = parse(first).ok_or_else(|| scanner.unexpected(expected, word))?;
        // Positive numbers count from 1, negative ones back from the latest vertex.
        let vertex = if number > 0 { number - 1 } else { builder.vertex_count() as i64 + number };
        let missing = FormatError::NoSuchVertex { facet: builder.polygon_count(), vertex: number };
        let vertex = usize::try_from(vertex).ok().filter(|_| number != 0).ok_or(missing)?;
        builder.corner(vertex);
    }
    builder.close_polygon()
}

fn join_lines(bytes: &[u8]) -> Vec<u8> {
    let mut joined = Vec::with_capacity(bytes.len());
    let mut rest = bytes;
    while let Some((&byte, after)) = rest.split_first() {
        let end = after.strip_prefix(b"\r\n").or_else(|| after.strip_prefix(b"\n"));
        match end.filter(|_| byte == b'\\') {
            Some(next) => {
                joined.push(b' ');
                rest = next;
            }
            None => {
                joined.push(byte);
                rest = after;
            }
        }
    }
    joined
}

pub(super) fn write(mesh: &TriangleMesh) -> Vec<u8> {
    let mut text = String::new();
    for x in mesh.vertices() {
        push_point(&mut text, "v ", x);
    }
    let mut group = None;
    for (facet, [a, b, c]) in mesh.facets().iter().enumerate() {
        let own = mesh.groups().get(facet);
        if own != group {
            group = own;
            // Writing to a string can't fail.
            let _ = writeln!(text, "g group_{}", own.map_or(1, |number| number + 1));
        }
        let _ = writeln!(text, "f {} {} {}", a + 1, b + 1, c + 1);
    }
    text.into_bytes()
}

/// A line with a point, in the shortest digits that read back as the same numbers.
pub(super) fn push_point(text: &mut String, start: &str, x: &Point) {
    let _ = writeln!(text, "{start}{:?} {:?} {:?}", x.x, x.y, x.z);
}
