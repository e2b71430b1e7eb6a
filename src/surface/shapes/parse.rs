//! Reading a shape as a catalogue states it: `rod:12x2um`, `helix:turns=4,pitch=2um,diameter=1um,thickness=0.2um`.

use super::catalogue::{self, Entry};
use super::error::ShapeError;
use super::helix::{Hand, HelixSizes};
use super::{Helix, Shape};
use crate::physical::nearest::nearest;
use crate::physical::quantity::{echo, parse_lengths};
use crate::physical::{Dimension, Quantity};

/// The keys of a helix, in the order of [`Shape::dimensions`].
const HELIX_KEYS: [&str; 4] = ["turns", "pitch", "diameter", "thickness"];

/// A shape as it was written, with the uncertainties of its dimensions.
#[derive(Debug, Clone, PartialEq)]
pub struct ShapeSpec {
    /// The shape with the stated dimensions.
    pub shape: Shape,
    /// Relative uncertainty of each dimension, in the order of [`Shape::dimensions`]; zero where none was stated.
    pub size_uncertainties: Vec<f64>,
}

impl ShapeSpec {
    /// Reads a shape: its name, a colon, and full dimensions with a unit, each perhaps with its uncertainty.
    ///
    /// # Errors
    /// If the name is unknown, the dimensions are not those of the shape, or no such body exists.
    ///
    /// # Examples
    /// ```
    /// use slowmote::surface::shapes::ShapeSpec;
    ///
    /// let rod = ShapeSpec::parse("rod:12x2±0.1um")?;
    /// assert_eq!(rod.shape.name(), "rod:12x2um");
    /// assert!((rod.size_uncertainties[1] - 0.05).abs() < 1e-12);
    /// # Ok::<(), slowmote::surface::ShapeError>(())
    /// ```
    pub fn parse(text: &str) -> Result<Self, ShapeError> {
        let (name, sizes) = match text.split_once(':') {
            Some((name, sizes)) => (name.trim(), Some(sizes.trim()).filter(|sizes| !sizes.is_empty())),
            None => (text.trim(), None),
        };
        let Some(entry) = catalogue::find(name) else {
            let guess = nearest(name, catalogue::all_names()).and_then(catalogue::find).map(|entry| entry.keyword);
            return Err(ShapeError::UnknownShape { name: echo(name), guess });
        };
        let sizes = sizes.ok_or(ShapeError::WrongCount {
            keyword: entry.keyword,
            expected: entry.dimensions,
            example: entry.example,
            found: 0,
        })?;
        if entry.keyword == "helix" { helix(entry, sizes) } else { by_lengths(entry, sizes) }
    }
}

impl Shape {
    /// Reads a shape such as `rod:12x2um`, leaving its uncertainties aside; see [`ShapeSpec::parse`].
    ///
    /// # Errors
    /// As [`ShapeSpec::parse`].
    ///
    /// # Examples
    /// ```
    /// use slowmote::surface::Shape;
    ///
    /// assert_eq!(Shape::parse("sphere:10um")?.name(), "sphere:10um");
    /// assert!(Shape::parse("rod:1x2um").is_err());
    /// # Ok::<(), slowmote::surface::ShapeError>(())
    /// ```
    pub fn parse(text: &str) -> Result<Self, ShapeError> {
        ShapeSpec::parse(text).map(|spec| spec.shape)
    }
}

fn by_lengths(entry: &Entry, sizes: &str) -> Result<ShapeSpec, ShapeError> {
    let unreadable =
        |error| ShapeError::Size { keyword: entry.keyword, example: entry.example, source: Box::new(error) };
    let lengths = parse_lengths(sizes).map_err(unreadable)?;
    let lengths = lengths.into_iter().map(Quantity::positive).collect::<Result<Vec<_>, _>>().map_err(unreadable)?;
    let metres = lengths.iter().map(Quantity::value_si).collect::<Vec<_>>();
    let shape = entry.shape_of(&metres)?;
    Ok(ShapeSpec { shape, size_uncertainties: lengths.iter().map(Quantity::relative_uncertainty).collect() })
}

fn helix(entry: &Entry, sizes: &str) -> Result<ShapeSpec, ShapeError> {
    let Entry { keyword, example, .. } = *entry;
    let bad_key = |problem: String| ShapeError::BadKey { keyword, problem, example };
    let unreadable = |error| ShapeError::Size { keyword, example, source: Box::new(error) };
    let mut values: [Option<Quantity>; 4] = [None; 4];
    let mut hand = None;
    for part in sizes.split(',') {
        let Some((key, value)) = part.split_once('=') else {
            return Err(bad_key(format!("\"{}\" is not of the form key=value", echo(part))));
        };
        let (key, value) = (key.trim(), value.trim());
        let again = || bad_key(format!("\"{}\" is given twice", echo(key)));
        if key == "hand" {
            let given = match value {
                "left" => Hand::Left,
                "right" => Hand::Right,
                _ => return Err(bad_key(format!("the hand is left or right, not \"{}\"", echo(value)))),
            };
            if hand.replace(given).is_some() {
                return Err(again());
            }
            continue;
        }
        let Some(index) = HELIX_KEYS.iter().position(|known| *known == key) else {
            return Err(bad_key(format!("\"{}\" is none of turns, pitch, diameter, thickness and hand", echo(key))));
        };
        let dimension = if index == 0 { Dimension::DIMENSIONLESS } else { Dimension::LENGTH };
        let quantity = Quantity::parse(value, dimension).and_then(Quantity::positive).map_err(unreadable)?;
        if values[index].replace(quantity).is_some() {
            return Err(again());
        }
    }
    let [Some(turns), Some(pitch), Some(diameter), Some(thickness)] = values else {
        let missing = HELIX_KEYS.iter().zip(values).filter(|(_, value)| value.is_none()).map(|(key, _)| *key);
        return Err(bad_key(format!("missing: {}", missing.collect::<Vec<_>>().join(", "))));
    };
    let sizes = HelixSizes {
        turns: turns.value_si(),
        pitch: pitch.value_si(),
        diameter: diameter.value_si(),
        thickness: thickness.value_si(),
        hand: hand.unwrap_or(Hand::Right),
    };
    let shape = Helix::new(sizes).map(Shape::Helix)?;
    let size_uncertainties = [turns, pitch, diameter, thickness].iter().map(Quantity::relative_uncertainty).collect();
    Ok(ShapeSpec { shape, size_uncertainties })
}
