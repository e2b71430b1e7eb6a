//! PLY 1.0: text, and binary of either byte order. Reads `x`, `y`, `z` of the element `vertex` and the list
//! `vertex_indices` (or `vertex_index`) of the element `face`; all else is skipped.

use super::binary::Cursor;
use super::builder::Builder;
use super::scanner::{Scanner, quote};
use super::{FormatError, RawSurface, SurfaceFormat};
use crate::surface::{Point, TriangleMesh};

#[derive(Debug, Clone, Copy, PartialEq)]
enum Number {
    I8,
    U8,
    I16,
    U16,
    I32,
    U32,
    F32,
    F64,
}

impl Number {
    fn named(name: &[u8]) -> Option<Self> {
        Some(match name {
            b"char" | b"int8" => Self::I8,
            b"uchar" | b"uint8" => Self::U8,
            b"short" | b"int16" => Self::I16,
            b"ushort" | b"uint16" => Self::U16,
            b"int" | b"int32" => Self::I32,
            b"uint" | b"uint32" => Self::U32,
            b"float" | b"float32" => Self::F32,
            b"double" | b"float64" => Self::F64,
            _ => return None,
        })
    }

    fn size(self) -> usize {
        match self {
            Self::I8 | Self::U8 => 1,
            Self::I16 | Self::U16 => 2,
            Self::I32 | Self::U32 | Self::F32 => 4,
            Self::F64 => 8,
        }
    }
}

#[derive(Debug, Clone, Copy, PartialEq)]
enum Role {
    Coordinate(usize),
    Corners,
    Skipped,
}

#[derive(Debug, Clone)]
struct Property {
    /// The type of a list's length, for lists.
    length: Option<Number>,
    number: Number,
    role: Role,
}

#[derive(Debug, Clone)]
struct Element {
    is_vertex: bool,
    is_face: bool,
    count: u64,
    properties: Vec<Property>,
}

struct Header {
    encoding: Encoding,
    elements: Vec<Element>,
}

#[derive(Debug, Clone, Copy, PartialEq)]
enum Encoding {
    Text,
    Little,
    Big,
}

pub(super) fn read(bytes: &[u8]) -> Result<RawSurface, FormatError> {
    let mut scanner = Scanner::new(bytes, None);
    let header = read_header(&mut scanner)?;
    let (source, variant) = match header.encoding {
        Encoding::Text => (Source::Text(scanner), "text"),
        Encoding::Little => (Source::Binary(Cursor::new(bytes, scanner.position(), false)), "binary, little endian"),
        Encoding::Big => (Source::Binary(Cursor::new(bytes, scanner.position(), true)), "binary, big endian"),
    };
    let mut builder = Builder::default();
    read_body(&header.elements, source, &mut builder)?;
    builder.finish(SurfaceFormat::Ply, variant)
}

fn read_header(scanner: &mut Scanner) -> Result<Header, FormatError> {
    scanner.keyword("ply")?;
    scanner.keyword("format")?;
    let word = scanner.word().ok_or(FormatError::Truncated { reading: "the format" })?;
    let encoding = match word {
        b"ascii" => Encoding::Text,
        b"binary_little_endian" => Encoding::Little,
        b"binary_big_endian" => Encoding::Big,
        _ => return Err(scanner.unexpected("'ascii', 'binary_little_endian' or 'binary_big_endian'", word)),
    };
    let version = scanner.rest_of_line();
    if version != b"1.0" {
        return Err(FormatError::Variant { variant: format!("PLY version '{}'", quote(version)) });
    }
    let mut elements: Vec<Element> = Vec::new();
    loop {
        let word = scanner.word().ok_or(FormatError::Truncated { reading: "the header" })?;
        match word {
            b"comment" | b"obj_info" => {}
            b"element" => {
                let name = scanner.word_on_line().ok_or(FormatError::Truncated { reading: "an element's name" })?;
                let count = scanner.number("the number of elements")?;
                let (is_vertex, is_face) = (name == b"vertex", name == b"face");
                elements.push(Element { is_vertex, is_face, count, properties: Vec::new() });
            }
            b"property" => {
                let Some(element) = elements.last_mut() else {
                    return Err(scanner.unexpected("'element' before 'property'", word));
                };
                let property = read_property(scanner, element)?;
                element.properties.push(property);
            }
            b"end_header" => {
                scanner.rest_of_line();
                return Ok(Header { encoding, elements });
            }
            _ => return Err(scanner.unexpected("'element', 'property' or 'end_header'", word)),
        }
        scanner.rest_of_line();
    }
}

fn read_property(scanner: &mut Scanner, element: &Element) -> Result<Property, FormatError> {
    let number = |scanner: &mut Scanner, word: Option<&[u8]>| {
        let word = word.ok_or(FormatError::Truncated { reading: "a property" })?;
        Number::named(word).ok_or_else(|| scanner.unexpected("a number type", word))
    };
    let word = scanner.word_on_line();
    let (length, value) = if word == Some(b"list") {
        let length = scanner.word_on_line();
        let length = number(scanner, length)?;
        let value = scanner.word_on_line();
        (Some(length), number(scanner, value)?)
    } else {
        (None, number(scanner, word)?)
    };
    let name = scanner.word_on_line().ok_or(FormatError::Truncated { reading: "a property's name" })?;
    let role = match (name, length) {
        (b"x", None) if element.is_vertex => Role::Coordinate(0),
        (b"y", None) if element.is_vertex => Role::Coordinate(1),
        (b"z", None) if element.is_vertex => Role::Coordinate(2),
        (b"vertex_indices" | b"vertex_index", Some(_)) if element.is_face => Role::Corners,
        _ => Role::Skipped,
    };
    Ok(Property { length, number: value, role })
}

enum Source<'a> {
    Text(Scanner<'a>),
    Binary(Cursor<'a>),
}

impl Source<'_> {
    fn number(&mut self, kind: Number, reading: &'static str) -> Result<f64, FormatError> {
        match self {
            Self::Text(scanner) => scanner.number(reading),
            Self::Binary(cursor) => Ok(match kind {
                Number::I8 => i8::from_le_bytes(cursor.take(reading)?).into(),
                Number::U8 => u8::from_le_bytes(cursor.take(reading)?).into(),
                Number::I16 => i16::from_le_bytes(cursor.take(reading)?).into(),
                Number::U16 => u16::from_le_bytes(cursor.take(reading)?).into(),
                Number::I32 => i32::from_le_bytes(cursor.take(reading)?).into(),
                Number::U32 => u32::from_le_bytes(cursor.take(reading)?).into(),
                Number::F32 => cursor.f32(reading)?.into(),
                Number::F64 => cursor.f64(reading)?,
            }),
        }
    }

    /// The number as a count or index; all 32-bit integers are exact in double precision.
    fn whole(&mut self, kind: Number, reading: &'static str) -> Result<i64, FormatError> {
        let number = self.number(kind, reading)?;
        if number.fract() == 0.0 && number.abs() < 9e15 {
            return Ok(number as i64);
        }
        Err(match self {
            Self::Text(scanner) => scanner.unexpected(reading, number.to_string().as_bytes()),
            Self::Binary(cursor) => {
                FormatError::UnexpectedByte { at: cursor.position(), expected: reading, found: number as i64 }
            }
        })
    }
}

fn read_body(elements: &[Element], mut source: Source, builder: &mut Builder) -> Result<(), FormatError> {
    for element in elements {
        let least = element.properties.iter().map(|p| p.length.unwrap_or(p.number).size()).sum::<usize>();
        if least == 0 {
            continue;
        }
        if let Source::Binary(cursor) = &source {
            cursor.check_room(element.count, least, "elements")?;
        }
        if element.is_vertex && element.properties.iter().filter(|p| matches!(p.role, Role::Coordinate(_))).count() != 3
        {
            return Err(FormatError::Variant { variant: "an element 'vertex' without x, y and z".to_owned() });
        }
        for _ in 0..element.count {
            read_element(element, &mut source, builder)?;
        }
    }
    Ok(())
}

fn read_element(element: &Element, source: &mut Source, builder: &mut Builder) -> Result<(), FormatError> {
    let mut x = Point::zeros();
    for property in &element.properties {
        let Some(length) = property.length else {
            let value = source.number(property.number, "a number")?;
            if let Role::Coordinate(axis) = property.role {
                x[axis] = value;
            }
            continue;
        };
        let count = source.whole(length, "the length of a list")?;
        if count < 0 || (property.role == Role::Corners && count < 3) {
            let corners = count.max(0) as u64;
            return Err(FormatError::CornerCount { facet: builder.polygon_count(), corners });
        }
        for _ in 0..count {
            let value = source.whole(property.number, "a whole number");
            if property.role != Role::Corners {
                // Lists that nobody reads may hold any number.
                if let Err(error @ FormatError::Truncated { .. }) = value {
                    return Err(error);
                }
                continue;
            }
            let number = value?;
            let missing = FormatError::NoSuchVertex { facet: builder.polygon_count(), vertex: number };
            builder.corner(usize::try_from(number).map_err(|_| missing)?);
        }
        if property.role == Role::Corners {
            builder.close_polygon()?;
        }
    }
    if element.is_vertex {
        builder.vertex(x)?;
    }
    Ok(())
}

pub(super) fn write(mesh: &TriangleMesh) -> Vec<u8> {
    let header = format!(
        "ply\nformat binary_little_endian 1.0\nelement vertex {}\nproperty double x\nproperty double y\n\
         property double z\nelement face {}\nproperty list uchar int vertex_indices\nend_header\n",
        mesh.vertices().len(),
        mesh.facets().len()
    );
    let mut bytes = header.into_bytes();
    for number in mesh.vertices().iter().flat_map(|x| [x.x, x.y, x.z]) {
        bytes.extend(number.to_le_bytes());
    }
    for corners in mesh.facets() {
        bytes.push(3);
        for vertex in corners {
            bytes.extend((*vertex as i32).to_le_bytes());
        }
    }
    bytes
}
