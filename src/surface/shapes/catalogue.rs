//! The names of the shapes, what they take, an example of each, and how each is made from its lengths.

use super::{Shape, ShapeError};

/// A shape made from lengths (m); `None` if their number is not that of its dimensions.
type Build = fn(&[f64]) -> Option<Result<Shape, ShapeError>>;

/// How a shape is written.
#[derive(Debug, Clone, Copy)]
pub struct Entry {
    /// The name before the colon.
    pub keyword: &'static str,
    /// Other names that are read.
    pub aliases: &'static [&'static str],
    /// What follows the colon, in words.
    pub dimensions: &'static str,
    /// A text that can be read.
    pub example: &'static str,
    pub(super) build: Build,
}

/// All shapes.
pub const CATALOGUE: &[Entry] = &[
    Entry {
        keyword: "sphere",
        aliases: &["ball"],
        dimensions: "a diameter",
        example: "sphere:10um",
        build: |sizes| one(sizes).map(Shape::sphere),
    },
    Entry {
        keyword: "ellipsoid",
        aliases: &[],
        dimensions: "three full axes along x, y and z",
        example: "ellipsoid:6x4x2um",
        build: |sizes| sizes.try_into().ok().map(Shape::ellipsoid),
    },
    Entry {
        keyword: "rod",
        aliases: &["capsule", "spherocylinder"],
        dimensions: "an overall length and a diameter",
        example: "rod:12x2um",
        build: |sizes| two(sizes).map(|[length, diameter]| Shape::rod(length, diameter)),
    },
    Entry {
        keyword: "cylinder",
        aliases: &[],
        dimensions: "a length along x and a diameter",
        example: "cylinder:10x2um",
        build: |sizes| two(sizes).map(|[length, diameter]| Shape::cylinder(length, diameter)),
    },
    Entry {
        keyword: "disc",
        aliases: &["disk"],
        dimensions: "a diameter and a thickness",
        example: "disc:8x1um",
        build: |sizes| two(sizes).map(|[diameter, thickness]| Shape::disc(diameter, thickness)),
    },
    Entry {
        keyword: "box",
        aliases: &["cuboid"],
        dimensions: "three sides along x, y and z",
        example: "box:6x4x2um",
        build: |sizes| sizes.try_into().ok().map(Shape::cuboid),
    },
    Entry {
        keyword: "cube",
        aliases: &[],
        dimensions: "a side",
        example: "cube:5um",
        build: |sizes| one(sizes).map(Shape::cube),
    },
    Entry {
        keyword: "ring",
        aliases: &["torus"],
        dimensions: "the diameters of the centre line and of the tube",
        example: "ring:10x2um",
        build: |sizes| two(sizes).map(|[centre_line, tube]| Shape::ring(centre_line, tube)),
    },
    Entry {
        keyword: "redcell",
        aliases: &["erythrocyte"],
        dimensions: "a diameter",
        example: "redcell:7.82um",
        build: |sizes| one(sizes).map(Shape::red_cell),
    },
    Entry {
        keyword: "helix",
        aliases: &["coil"],
        dimensions: "turns, pitch, diameter of the centre line and thickness by name",
        example: "helix:turns=4,pitch=2um,diameter=1um,thickness=0.2um",
        // Made from names, not from a list.
        build: |_| None,
    },
    Entry {
        keyword: "doublet",
        aliases: &[],
        dimensions: "the diameter of each of its two spheres",
        example: "doublet:2um",
        build: |sizes| one(sizes).map(Shape::doublet),
    },
    Entry {
        keyword: "cone",
        aliases: &[],
        dimensions: "a height along x and a base diameter",
        example: "cone:6x4um",
        build: |sizes| two(sizes).map(|[height, diameter]| Shape::cone(height, diameter)),
    },
    Entry {
        keyword: "octahedron",
        aliases: &[],
        dimensions: "an edge",
        example: "octahedron:5um",
        build: |sizes| one(sizes).map(Shape::octahedron),
    },
    Entry {
        keyword: "tetrahedron",
        aliases: &[],
        dimensions: "an edge",
        example: "tetrahedron:5um",
        build: |sizes| one(sizes).map(Shape::tetrahedron),
    },
];

fn one(sizes: &[f64]) -> Option<f64> {
    if let [size] = sizes { Some(*size) } else { None }
}

fn two(sizes: &[f64]) -> Option<[f64; 2]> {
    sizes.try_into().ok()
}

/// The entry of a name or an alias, whatever its case.
pub(super) fn find(name: &str) -> Option<&'static Entry> {
    CATALOGUE.iter().find(|entry| names_of(entry).any(|known| known.eq_ignore_ascii_case(name)))
}

impl Entry {
    /// The shape of these dimensions (m), where a list of lengths makes one.
    pub(super) fn shape_of(&self, sizes: &[f64]) -> Result<Shape, ShapeError> {
        let Self { keyword, dimensions: expected, example, build, .. } = *self;
        build(sizes).unwrap_or(Err(ShapeError::WrongCount { keyword, expected, example, found: sizes.len() }))
    }
}

/// Names and aliases.
pub(super) fn all_names() -> impl Iterator<Item = &'static str> {
    CATALOGUE.iter().flat_map(names_of)
}

/// The names without aliases, for a sentence.
pub(super) fn names() -> String {
    CATALOGUE.iter().map(|entry| entry.keyword).collect::<Vec<_>>().join(", ")
}

fn names_of(entry: &'static Entry) -> impl Iterator<Item = &'static str> {
    std::iter::once(entry.keyword).chain(entry.aliases.iter().copied())
}
