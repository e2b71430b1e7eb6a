//! What can be wrong with a shape, and the checks that all shapes share.

use super::catalogue;
use super::text::lengths_text;
use crate::physical::QuantityError;

/// Shortest length (m) that a shape may have: about an atom. Below it there is no fluid to speak of.
pub const SHORTEST_LENGTH: f64 = 1e-10;

/// Longest length (m) that a shape may have. Nothing in creeping flow is larger, and an exponent typed wrongly is
/// caught here.
pub const LONGEST_LENGTH: f64 = 1e3;

/// Largest ratio of a shape's dimensions.
///
/// A plate of aspect ratio `A` has a rim whose radius of curvature is `A^-2` of its size: at 1e3 that is 1e-6, where
/// differences of positions still keep ten digits. Beyond it a body is a sheet or a line for every measurable
/// purpose.
pub const LARGEST_ASPECT: f64 = 1e3;

/// Why a shape cannot be made.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[non_exhaustive]
pub enum ShapeError {
    /// A length is zero, negative, infinite or not a number.
    #[error("the {dimension} of a shape must be a positive length, not {metres} m")]
    NotPositive {
        /// Which dimension.
        dimension: &'static str,
        /// Its value (m).
        metres: f64,
    },
    /// A length is beyond what this program is for.
    #[error(
        "the {dimension} is {}; lengths from {} to {} are possible",
        lengths_text(&[*.metres]), lengths_text(&[SHORTEST_LENGTH]), lengths_text(&[LONGEST_LENGTH])
    )]
    LengthOutOfRange {
        /// Which dimension.
        dimension: &'static str,
        /// Its value (m).
        metres: f64,
    },
    /// The dimensions differ too much.
    #[error("the dimensions differ by a factor of {ratio:.6}; up to {LARGEST_ASPECT} is possible")]
    AspectTooLarge {
        /// Largest over smallest dimension.
        ratio: f64,
    },
    /// The dimensions contradict each other.
    #[error("{sentence}")]
    Impossible {
        /// What contradicts what, with the numbers.
        sentence: String,
    },
    /// No shape has this name.
    #[error("there is no shape named \"{name}\"{}; known are {}", guess_text(.guess), catalogue::names())]
    UnknownShape {
        /// The name as given.
        name: String,
        /// The known name that looks most like it.
        guess: Option<&'static str>,
    },
    /// The shape takes another number of dimensions.
    #[error("{keyword} takes {expected} (for example {example}), but {} given", count_text(*.found))]
    WrongCount {
        /// The shape.
        keyword: &'static str,
        /// What it takes, in words.
        expected: &'static str,
        /// An example that works.
        example: &'static str,
        /// How many dimensions were given.
        found: usize,
    },
    /// A named dimension is missing, unknown, or given twice.
    #[error("{keyword}: {problem} (for example {example})")]
    BadKey {
        /// The shape.
        keyword: &'static str,
        /// What is wrong.
        problem: String,
        /// An example that works.
        example: &'static str,
    },
    /// The dimensions cannot be read.
    #[error("the size of the {keyword} (for example {example}) can't be read: {source}")]
    Size {
        /// The shape.
        keyword: &'static str,
        /// An example that works.
        example: &'static str,
        /// Why not.
        source: Box<QuantityError>,
    },
}

fn guess_text(guess: &Option<&'static str>) -> String {
    guess.map(|name| format!(" (did you mean {name}?)")).unwrap_or_default()
}

fn count_text(count: usize) -> String {
    match count {
        0 => "none is".to_string(),
        1 => "one is".to_string(),
        _ => format!("{count} are"),
    }
}

/// The length, if it is a possible one.
pub(super) fn check_length(dimension: &'static str, metres: f64) -> Result<f64, ShapeError> {
    if !(metres.is_finite() && metres > 0.0) {
        return Err(ShapeError::NotPositive { dimension, metres });
    }
    if !(SHORTEST_LENGTH..=LONGEST_LENGTH).contains(&metres) {
        return Err(ShapeError::LengthOutOfRange { dimension, metres });
    }
    Ok(metres)
}

/// Checks the ratio of the largest to the smallest of some positive lengths.
pub(super) fn check_aspect(lengths: impl IntoIterator<Item = f64>) -> Result<(), ShapeError> {
    let (low, high) = lengths.into_iter().fold((f64::INFINITY, 0.0_f64), |(l, h), x| (l.min(x), h.max(x)));
    let ratio = high / low;
    // A hair of slack, so that the limit itself passes however its decimal digits were rounded.
    if ratio > LARGEST_ASPECT * (1.0 + 1e-9) { Err(ShapeError::AspectTooLarge { ratio }) } else { Ok(()) }
}
