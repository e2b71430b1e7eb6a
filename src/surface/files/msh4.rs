//! MSH 4.1: nodes and elements in blocks, one for each geometrical entity. Facets are grouped by their surface.

use super::binary::Cursor;
use super::msh::{Encoding, Sections};
use super::msh2::{Numbered, at_line, known};
use super::scanner::Scanner;
use super::{FormatError, RawSurface};

pub(super) fn read(sections: Sections, encoding: Encoding) -> Result<RawSurface, FormatError> {
    let mut surface = Numbered::default();
    for section in sections {
        let section = section?;
        let mut source = match encoding {
            Encoding::Text => Source::Text(Scanner::new(section.body, None)),
            Encoding::Binary { big_endian } => Source::Binary(Cursor::new(section.body, 0, big_endian)),
        };
        match section.name {
            b"Nodes" => read_nodes(&mut source, &mut surface).map_err(|error| at_line(error, &section))?,
            b"Elements" => read_elements(&mut source, &mut surface).map_err(|error| at_line(error, &section))?,
            _ => {}
        }
    }
    surface.finish(if encoding == Encoding::Text { "4.1, text" } else { "4.1, binary" })
}

enum Source<'a> {
    Text(Scanner<'a>),
    Binary(Cursor<'a>),
}

impl Source<'_> {
    /// A number that takes four bytes in a binary file.
    fn int(&mut self, reading: &'static str) -> Result<i64, FormatError> {
        match self {
            Self::Text(scanner) => scanner.number(reading),
            Self::Binary(cursor) => cursor.i32(reading).map(i64::from),
        }
    }

    /// A count or tag, which takes eight bytes in a binary file.
    fn long(&mut self, reading: &'static str) -> Result<u64, FormatError> {
        match self {
            Self::Text(scanner) => scanner.number(reading),
            Self::Binary(cursor) => cursor.u64(reading),
        }
    }

    fn coordinate(&mut self) -> Result<f64, FormatError> {
        match self {
            Self::Text(scanner) => scanner.number("a coordinate"),
            Self::Binary(cursor) => cursor.f64("a coordinate"),
        }
    }

    /// Refuses counts that the rest of the section can't hold. In text, a thing takes two bytes at least.
    fn check_room(&self, count: u64, size: usize, what: &'static str, section: usize) -> Result<(), FormatError> {
        match self {
            Self::Binary(cursor) => cursor.check_room(count, size, what),
            Self::Text(scanner) => {
                let room = (section.saturating_sub(scanner.position()) / 2) as u64;
                if count > room { Err(FormatError::CountTooLarge { what, stated: count, room }) } else { Ok(()) }
            }
        }
    }
}

fn tag(number: u64) -> i64 {
    i64::try_from(number).unwrap_or(i64::MAX)
}

fn read_nodes(source: &mut Source, surface: &mut Numbered) -> Result<(), FormatError> {
    let section = length(source);
    let reading = "a block of nodes";
    let blocks = source.long(reading)?;
    for _ in 0..3 {
        source.long(reading)?;
    }
    let mut tags = Vec::new();
    for _ in 0..blocks {
        let dimension = source.int(reading)?;
        source.int(reading)?;
        let parametric = source.int(reading)?;
        let count = source.long(reading)?;
        source.check_room(count, 8, "nodes", section)?;
        tags.clear();
        for _ in 0..count {
            tags.push(source.long(reading)?);
        }
        let parameters = if parametric == 0 { 0 } else { dimension.clamp(0, 3) };
        for number in &tags {
            let x = [source.coordinate()?, source.coordinate()?, source.coordinate()?].into();
            for _ in 0..parameters {
                source.coordinate()?;
            }
            surface.node(tag(*number), x)?;
        }
    }
    Ok(())
}

fn read_elements(source: &mut Source, surface: &mut Numbered) -> Result<(), FormatError> {
    let section = length(source);
    let reading = "a block of elements";
    let blocks = source.long(reading)?;
    for _ in 0..3 {
        source.long(reading)?;
    }
    for _ in 0..blocks {
        source.int(reading)?;
        let entity = source.int(reading)?;
        let shape = known(source.int(reading)?)?;
        let count = source.long(reading)?;
        source.check_room(count, 8 * (1 + shape.1), "elements", section)?;
        for _ in 0..count {
            source.long(reading)?;
            surface.element(shape, entity, || source.long(reading).map(tag))?;
        }
    }
    Ok(())
}

fn length(source: &Source) -> usize {
    match source {
        Source::Text(scanner) => scanner.length(),
        Source::Binary(cursor) => cursor.left(),
    }
}
