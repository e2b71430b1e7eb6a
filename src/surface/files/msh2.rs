//! MSH 2.2: nodes with numbers of their own, elements one a line (text) or in blocks of one type (binary).

use std::collections::HashMap;
use std::fmt::Write;

use super::binary::Cursor;
use super::builder::Builder;
use super::msh::{Encoding, Section, Sections, element_type};
use super::obj::push_point;
use super::scanner::Scanner;
use super::{FormatError, RawSurface, SurfaceFormat};
use crate::surface::{Point, TriangleMesh};

pub(super) fn read(sections: Sections, encoding: Encoding) -> Result<RawSurface, FormatError> {
    let mut file = File::default();
    for section in sections {
        let section = section?;
        match (section.name, encoding) {
            (b"Nodes", Encoding::Text) => file.nodes_text(&section)?,
            (b"Nodes", Encoding::Binary { big_endian }) => file.nodes_binary(&section, big_endian)?,
            (b"Elements", Encoding::Text) => file.elements_text(&section)?,
            (b"Elements", Encoding::Binary { big_endian }) => file.elements_binary(&section, big_endian)?,
            _ => {}
        }
    }
    let variant = if encoding == Encoding::Text { "2.2, text" } else { "2.2, binary" };
    file.surface.finish(variant)
}

/// What versions 2.2 and 4.1 have in common: nodes by number, elements that name them, physical groups.
#[derive(Debug, Default)]
pub(super) struct Numbered {
    builder: Builder,
    nodes: HashMap<i64, usize>,
    groups: HashMap<i64, usize>,
    skipped: usize,
    high_order: usize,
}

impl Numbered {
    pub fn node(&mut self, number: i64, x: Point) -> Result<(), FormatError> {
        let vertex = self.builder.vertex(x)?;
        self.nodes.insert(number, vertex);
        Ok(())
    }

    /// Takes an element's nodes from `next`, one by one.
    pub fn element(
        &mut self,
        (corners, nodes): (usize, usize),
        group: i64,
        mut next: impl FnMut() -> Result<i64, FormatError>,
    ) -> Result<(), FormatError> {
        let facet = self.builder.polygon_count();
        for place in 0..nodes {
            let number = next()?;
            if place < corners {
                let missing = FormatError::NoSuchVertex { facet, vertex: number };
                self.builder.corner(*self.nodes.get(&number).ok_or(missing)?);
            }
        }
        if corners == 0 {
            self.skipped += 1;
            return Ok(());
        }
        self.high_order += usize::from(nodes > corners);
        let builder = &mut self.builder;
        let group = *self.groups.entry(group).or_insert_with(|| builder.begin_group(format!("surface {group}")));
        self.builder.close_polygon_in(group)
    }

    pub fn finish(mut self, variant: &str) -> Result<RawSurface, FormatError> {
        if self.skipped > 0 {
            self.builder.note(format!("{} elements that are no surface facets were left out.", self.skipped));
        }
        if self.high_order > 0 {
            self.builder.note(format!("Only the corners of {} high-order facets were used.", self.high_order));
        }
        self.builder.finish(SurfaceFormat::Msh, variant)
    }
}

#[derive(Debug, Default)]
struct File {
    surface: Numbered,
}

impl File {
    fn nodes_text(&mut self, section: &Section) -> Result<(), FormatError> {
        let mut scanner = Scanner::new(section.body, None);
        let count: u64 = scanner.number("the number of nodes")?;
        for _ in 0..count {
            let number = scanner.number("a node number").map_err(|error| at_line(error, section))?;
            let x = scanner.point().map_err(|error| at_line(error, section))?;
            self.surface.node(number, x)?;
        }
        Ok(())
    }

    fn nodes_binary(&mut self, section: &Section, big_endian: bool) -> Result<(), FormatError> {
        let (count, mut cursor) = counted(section, big_endian)?;
        cursor.check_room(count, 28, "nodes")?;
        for _ in 0..count {
            let number = cursor.i32("a node")?;
            let x = cursor.point_f64("a node")?;
            self.surface.node(number.into(), x)?;
        }
        Ok(())
    }

    fn elements_text(&mut self, section: &Section) -> Result<(), FormatError> {
        let mut scanner = Scanner::new(section.body, None);
        let count: u64 = scanner.number("the number of elements")?;
        for _ in 0..count {
            self.element_text(&mut scanner).map_err(|error| at_line(error, section))?;
        }
        Ok(())
    }

    fn element_text(&mut self, scanner: &mut Scanner) -> Result<(), FormatError> {
        let _: i64 = scanner.number("an element number")?;
        let kind = scanner.number("an element type")?;
        let shape = known(kind)?;
        let tags: u64 = scanner.number("the number of tags")?;
        let mut group = 0;
        for place in 0..tags {
            let tag: i64 = scanner.number("a tag")?;
            // The first tag is the physical group, the second the geometrical surface.
            if place == 0 || (place == 1 && group == 0) {
                group = tag;
            }
        }
        self.surface.element(shape, group, || scanner.number("a node number"))
    }

    fn elements_binary(&mut self, section: &Section, big_endian: bool) -> Result<(), FormatError> {
        let (count, mut cursor) = counted(section, big_endian)?;
        cursor.check_room(count, 4, "elements")?;
        let mut done = 0;
        while done < count {
            let reading = "a block of elements";
            let shape = known(cursor.i32(reading)?.into())?;
            let in_block = u64::try_from(cursor.i32(reading)?).unwrap_or(0).min(count - done);
            let tags = cursor.i32(reading)?.max(0);
            if in_block == 0 {
                return Err(FormatError::UnexpectedByte {
                    at: cursor.position(),
                    expected: "a block with at least one element",
                    found: 0,
                });
            }
            cursor.check_room(in_block, 4 * (1 + shape.1), "elements")?;
            for _ in 0..in_block {
                cursor.i32(reading)?;
                let mut group = 0;
                for place in 0..tags {
                    let tag = cursor.i32(reading)?.into();
                    if place == 0 || (place == 1 && group == 0) {
                        group = tag;
                    }
                }
                self.surface.element(shape, group, || cursor.i32(reading).map(i64::from))?;
            }
            done += in_block;
        }
        Ok(())
    }
}

/// The text line with a count at the start of a section, and a cursor on the binary part after it.
fn counted<'a>(section: &Section<'a>, big_endian: bool) -> Result<(u64, Cursor<'a>), FormatError> {
    let mut scanner = Scanner::new(section.body, None);
    let count = scanner.number("a count").map_err(|error| at_line(error, section))?;
    scanner.rest_of_line();
    Ok((count, Cursor::new(section.body, scanner.position(), big_endian)))
}

/// Corners and nodes of an element type that must be known, because its length has to be.
pub(super) fn known(kind: i64) -> Result<(usize, usize), FormatError> {
    element_type(kind).ok_or_else(|| FormatError::Variant { variant: format!("MSH element type {kind}") })
}

/// Counts lines from the start of the file instead of the section.
pub(super) fn at_line(error: FormatError, section: &Section) -> FormatError {
    match error {
        FormatError::Unexpected { line, expected, found } => {
            FormatError::Unexpected { line: line + section.line - 1, expected, found }
        }
        other => other,
    }
}

pub(super) fn write(mesh: &TriangleMesh) -> Vec<u8> {
    // Writing to a string can't fail.
    let mut text = String::from("$MeshFormat\n2.2 0 8\n$EndMeshFormat\n$Nodes\n");
    let _ = writeln!(text, "{}", mesh.vertices().len());
    for (vertex, x) in mesh.vertices().iter().enumerate() {
        push_point(&mut text, &format!("{} ", vertex + 1), x);
    }
    let _ = writeln!(text, "$EndNodes\n$Elements\n{}", mesh.facets().len());
    for (facet, [a, b, c]) in mesh.facets().iter().enumerate() {
        let group = mesh.groups().get(facet).map_or(1, |group| group + 1);
        let _ = writeln!(text, "{} 2 2 {group} {group} {} {} {}", facet + 1, a + 1, b + 1, c + 1);
    }
    text.push_str("$EndElements\n");
    text.into_bytes()
}
