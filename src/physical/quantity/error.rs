//! What can be wrong with a quantity as it was written.

use thiserror::Error;

/// Why a text is not the quantity that was expected. Each message is one sentence.
#[derive(Debug, Clone, PartialEq, Error)]
#[non_exhaustive]
pub enum QuantityError {
    /// Nothing was written.
    #[error("{expected} such as `{example}` is expected, but nothing was given")]
    Empty {
        /// What was expected, with its article.
        expected: &'static str,
        /// How one would write it.
        example: &'static str,
    },
    /// The text is longer than any quantity.
    #[error("a text of {length} characters is no quantity (at most {limit} are read)")]
    TooLong {
        /// Its length in characters.
        length: usize,
        /// The limit.
        limit: usize,
    },
    /// The text does not begin with a number.
    #[error("`{text}` does not begin with a number; {expected} such as `{example}` is expected")]
    NoNumber {
        /// The text, shortened.
        text: String,
        /// What was expected, with its article.
        expected: &'static str,
        /// How one would write it.
        example: &'static str,
    },
    /// A comma stands inside or after the number.
    #[error("`{text}` holds a comma; write decimals with a point and no separator of thousands")]
    Comma {
        /// The text, shortened.
        text: String,
    },
    /// The number stands without a unit.
    #[error("`{text}` has no unit; {expected} such as `{example}` is expected")]
    NoUnit {
        /// The text, shortened.
        text: String,
        /// What was expected, with its article.
        expected: &'static str,
        /// How one would write it.
        example: &'static str,
    },
    /// A symbol is not known as a unit.
    #[error("`{symbol}` in `{text}` is no unit known here; {}", advice(.suggestion.as_deref(), .expected, .example))]
    UnknownUnit {
        /// The text, shortened.
        text: String,
        /// The symbol that is not known.
        symbol: String,
        /// The whole unit as it was probably meant.
        suggestion: Option<String>,
        /// What was expected, with its article.
        expected: &'static str,
        /// How one would write it.
        example: &'static str,
    },
    /// The unit can't be read as products, quotients and powers of symbols.
    #[error("the unit of `{text}` can't be read: {reason}")]
    MalformedUnit {
        /// The text, shortened.
        text: String,
        /// What is wrong.
        reason: &'static str,
    },
    /// The unit measures something else.
    #[error("`{text}` is {given}, but {expected} such as `{example}` is expected")]
    WrongDimension {
        /// The text, shortened.
        text: String,
        /// What the unit measures.
        given: String,
        /// What was expected, with its article.
        expected: &'static str,
        /// How one would write it.
        example: &'static str,
    },
    /// Hertz for an angular speed may mean turns or radians.
    #[error("`{text}` may mean turns or radians a second; write the number with `rev/s`, `rpm` or `rad/s`")]
    HertzAsAngularSpeed {
        /// The text, shortened.
        text: String,
    },
    /// The number is infinite or not a number, or leaves the range of double precision.
    #[error("`{text}` is no finite number that can be represented")]
    NotFinite {
        /// The text, shortened.
        text: String,
    },
    /// The uncertainty after `±` can't be used.
    #[error("the uncertainty in `{text}` can't be used: {reason}")]
    BadUncertainty {
        /// The text, shortened.
        text: String,
        /// What is wrong.
        reason: &'static str,
    },
    /// A temperature below absolute zero.
    #[error("`{text}` is below absolute zero")]
    BelowAbsoluteZero {
        /// The text, shortened.
        text: String,
    },
    /// A quantity that has to be positive is not.
    #[error("{expected} greater than zero is expected, not {value}")]
    NotPositive {
        /// The value in a readable unit.
        value: String,
        /// What was expected, with its article.
        expected: &'static str,
    },
    /// A quantity that must not be negative is.
    #[error("{expected} of zero or more is expected, not {value}")]
    Negative {
        /// The value in a readable unit.
        value: String,
        /// What was expected, with its article.
        expected: &'static str,
    },
    /// The uncertainty is as large as the value, where errors are carried to first order only.
    #[error("the uncertainty of {value} is as large as the value itself, which no error estimate can follow")]
    UncertaintyTooLarge {
        /// Value and uncertainty in a readable unit.
        value: String,
    },
    /// A list of lengths such as `6x4x2um` can't be read.
    #[error("`{text}` is no list of lengths such as `6x4x2um`: {reason}")]
    BadList {
        /// The text, shortened.
        text: String,
        /// What is wrong.
        reason: &'static str,
    },
}

fn advice(suggestion: Option<&str>, expected: &str, example: &str) -> String {
    match suggestion {
        Some(unit) => format!("did you mean `{unit}`?"),
        None => format!("{expected} such as `{example}` is expected"),
    }
}

/// Longest piece of the user's text that is said back.
const LONGEST_ECHO: usize = 40;

/// The text as it is said back in a message: shortened, and without characters that steer the terminal.
pub(crate) fn echo(text: &str) -> String {
    // Marks of writing direction would turn the rest of the message around.
    let steers = |c: char| {
        c.is_control() || matches!(c, '\u{200b}'..='\u{200f}' | '\u{2028}'..='\u{202e}' | '\u{2066}'..='\u{2069}')
    };
    let visible = |c: char| if steers(c) { '\u{fffd}' } else { c };
    let mut shown: String = text.trim().chars().take(LONGEST_ECHO).map(visible).collect();
    if text.trim().chars().count() > LONGEST_ECHO {
        shown.push('…');
    }
    shown
}
