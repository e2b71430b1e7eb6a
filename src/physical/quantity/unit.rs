//! Unit expressions: products, quotients and powers of symbols.
//!
//! ```text
//! unit   = ["1"] ("/" factor | factor) { ("." | "*" | " ") factor | "/" factor }
//! factor = symbol [ ["^"] ["-"] digit ]  |  "(" unit ")" [ ["^"] ["-"] digit ]
//! ```
//!
//! A product after a quotient, `kg/m.s`, is read in two ways by different people and is refused.

use super::dimension::{Dimension, Exponents};
use super::symbols::{all_spellings, look_up};
use crate::physical::nearest::{ONE_EDIT, typing_distance};

/// A unit expression with its value: 1 unit = significand x 10^power10 in SI units.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Unit {
    pub significand: f64,
    pub power10: i32,
    pub exponents: Exponents,
    /// Kelvin to add, for a temperature that stands alone.
    pub offset_k: f64,
    /// Whether hertz occurs, which says nothing of the angle.
    pub has_hertz: bool,
}

/// Why a unit expression can't be read.
#[derive(Debug, Clone, PartialEq)]
pub(super) enum UnitError {
    Unknown { symbol: String, start: usize },
    Malformed(&'static str),
}

const AMBIGUOUS_QUOTIENT: &str = "a product after a quotient is ambiguous, so use brackets as in `kg/(m.s)`";
const SYMBOL_EXPECTED: &str = "a unit symbol is missing";
const POWER_EXPECTED: &str = "a power is one digit from 1 to 9, with a sign if need be";
const BRACKET_EXPECTED: &str = "a bracket is not closed";
const OPERATOR_EXPECTED: &str = "something stands where `.` or `/` is expected";

/// Deeper brackets are no unit, and would only use up the stack.
const DEEPEST_BRACKETS: usize = 4;

impl Unit {
    pub(super) const ONE: Unit =
        Unit { significand: 1.0, power10: 0, exponents: super::dimension::NONE, offset_k: 0.0, has_hertz: false };

    /// Reads a unit expression in which typographic signs have been replaced already.
    pub(super) fn parse(text: &str) -> Result<Unit, UnitError> {
        let mut reader = Reader { text, at: 0 };
        let unit = reader.expression(0)?;
        reader.skip_space();
        if reader.peek().is_some() {
            return Err(UnitError::Malformed(OPERATOR_EXPECTED));
        }
        Ok(unit)
    }

    fn times(self, other: Unit, power: i32) -> Unit {
        Unit {
            significand: self.significand * other.significand.powi(power),
            power10: self.power10 + power * other.power10,
            exponents: self.exponents.plus(other.exponents, power),
            // Inside a compound a degree is a difference.
            offset_k: 0.0,
            has_hertz: self.has_hertz || other.has_hertz,
        }
    }
}

struct Reader<'a> {
    text: &'a str,
    at: usize,
}

impl Reader<'_> {
    fn peek(&self) -> Option<char> {
        self.text[self.at..].chars().next()
    }

    fn advance(&mut self) {
        self.at += self.peek().map_or(0, char::len_utf8);
    }

    /// Whether there was any space.
    fn skip_space(&mut self) -> bool {
        let start = self.at;
        while self.peek().is_some_and(char::is_whitespace) {
            self.advance();
        }
        self.at > start
    }

    fn expression(&mut self, depth: usize) -> Result<Unit, UnitError> {
        if depth > DEEPEST_BRACKETS {
            return Err(UnitError::Malformed("the brackets are too deep"));
        }
        self.skip_space();
        let mut divided = false;
        let mut unit = if self.quotient_of_one() {
            divided = true;
            let (factor, power) = self.factor(depth)?;
            Unit::ONE.times(factor, -power)
        } else {
            let (factor, power) = self.factor(depth)?;
            // A unit that stands alone keeps its offset.
            if power == 1 { factor } else { Unit::ONE.times(factor, power) }
        };
        loop {
            let spaced = self.skip_space();
            match self.peek() {
                Some('/') => {
                    self.advance();
                    let (factor, power) = self.factor(depth)?;
                    unit = unit.times(factor, -power);
                    divided = true;
                }
                Some('.' | '*') if divided => return Err(UnitError::Malformed(AMBIGUOUS_QUOTIENT)),
                Some('.' | '*') => {
                    self.advance();
                    let (factor, power) = self.factor(depth)?;
                    unit = unit.times(factor, power);
                }
                Some(c) if spaced && c != ')' => {
                    if divided {
                        return Err(UnitError::Malformed(AMBIGUOUS_QUOTIENT));
                    }
                    let (factor, power) = self.factor(depth)?;
                    unit = unit.times(factor, power);
                }
                _ => return Ok(unit),
            }
        }
    }

    /// Consumes a leading `/` or `1/`, as in the unit of `10/s` or of `10 1/s`.
    fn quotient_of_one(&mut self) -> bool {
        let rest = self.text[self.at..].trim_start_matches('1').trim_start();
        let ones = self.text[self.at..].len() - self.text[self.at..].trim_start_matches('1').len();
        if ones <= 1 && rest.starts_with('/') {
            self.at = self.text.len() - rest.len() + 1;
            return true;
        }
        false
    }

    fn factor(&mut self, depth: usize) -> Result<(Unit, i32), UnitError> {
        self.skip_space();
        let unit = if self.peek() == Some('(') {
            self.advance();
            let inside = self.expression(depth + 1)?;
            self.skip_space();
            if self.peek() != Some(')') {
                return Err(UnitError::Malformed(BRACKET_EXPECTED));
            }
            self.advance();
            inside
        } else {
            self.symbol()?
        };
        Ok((unit, self.power()?))
    }

    fn symbol(&mut self) -> Result<Unit, UnitError> {
        let start = self.at;
        while self.peek().is_some_and(|c| c.is_alphabetic() || c == '%' || c == '_') {
            self.advance();
        }
        let written = &self.text[start..self.at];
        if written.is_empty() {
            return Err(UnitError::Malformed(SYMBOL_EXPECTED));
        }
        let Some((symbol, prefix)) = look_up(written) else {
            return Err(UnitError::Unknown { symbol: written.to_string(), start });
        };
        Ok(Unit {
            significand: symbol.significand,
            power10: symbol.power10 + prefix,
            exponents: symbol.exponents,
            offset_k: symbol.offset_k,
            has_hertz: symbol.text == "Hz",
        })
    }

    fn power(&mut self) -> Result<i32, UnitError> {
        let start = self.at;
        let caret = self.peek() == Some('^');
        if caret {
            self.advance();
        }
        let sign = match self.peek() {
            Some('-') => -1,
            Some('+') if caret => 1,
            _ => 0,
        };
        if sign != 0 {
            self.advance();
        }
        let digit = self.peek().and_then(|c| c.to_digit(10));
        match digit {
            Some(digit @ 1..=9) => {
                self.advance();
                if self.peek().is_some_and(|c| c.is_ascii_digit()) {
                    return Err(UnitError::Malformed(POWER_EXPECTED));
                }
                Ok(if sign < 0 { -(digit as i32) } else { digit as i32 })
            }
            None if self.at == start => Ok(1),
            _ => Err(UnitError::Malformed(POWER_EXPECTED)),
        }
    }
}

/// The unit expression as it was probably meant: one unknown symbol replaced by a known one that is
/// spelt nearly so, with a preference for what gives the expected dimension.
pub(super) fn suggest(text: &str, symbol: &str, start: usize, expected: Dimension) -> Option<String> {
    let length = symbol.chars().count();
    let replaced = |spelling: &str| {
        let end = start + symbol.len();
        Some(format!("{}{spelling}{}", text.get(..start)?, text.get(end..)?))
    };
    // One letter that is wrong altogether could be anything: there only the case may differ.
    let allowed = match length {
        0 => return None,
        1 => 1,
        2..=12 => ONE_EDIT,
        _ => return None,
    };
    all_spellings()
        .filter_map(|spelling| {
            let distance = typing_distance(symbol, &spelling);
            if distance > allowed {
                return None;
            }
            let whole = replaced(&spelling)?;
            let fits = Unit::parse(&whole).is_ok_and(|unit| expected.accepts(unit.exponents));
            // Exchanged letters are likelier than a wrong one, and that than one too many.
            let other_letters = sorted_letters(&spelling) != sorted_letters(symbol);
            let length_differs = spelling.chars().count().abs_diff(length);
            let differing = spelling.chars().zip(symbol.chars()).filter(|(a, b)| a != b).count();
            (fits || distance == 1).then_some((!fits, distance, other_letters, length_differs, differing, whole))
        })
        .min()
        .map(|(.., whole)| whole)
}

fn sorted_letters(word: &str) -> Vec<char> {
    let mut letters: Vec<char> = word.to_lowercase().chars().collect();
    letters.sort_unstable();
    letters
}

#[cfg(test)]
mod tests {
    use super::*;

    fn si(text: &str) -> f64 {
        let unit = Unit::parse(text).expect(text);
        unit.significand * 10f64.powi(unit.power10)
    }

    #[test]
    fn products_quotients_powers_and_brackets() {
        assert_eq!(si("kg/(m.s)"), 1.0);
        assert_eq!(si("kg/m/s"), 1.0);
        assert_eq!(si("mPa s"), 1e-3);
        assert_eq!(si("mPa*s"), 1e-3);
        assert_eq!(si("/ms"), 1e3);
        assert_eq!(si("1/ms"), 1e3);
        assert_eq!(si("um^2/s"), 1e-12);
        assert_eq!(si("m3.s-1"), 1.0);
        assert_eq!(si("(um/s)^2"), 1e-12);
    }

    #[test]
    fn what_can_be_read_in_two_ways_is_refused() {
        for text in ["kg/m.s", "kg/m s", "1/s.m"] {
            assert_eq!(Unit::parse(text), Err(UnitError::Malformed(AMBIGUOUS_QUOTIENT)), "{text}");
        }
    }

    #[test]
    fn malformed_units_are_refused() {
        for text in ["", "/", "um/", "um^", "um0", "um22", "(um", "um)", "um//s", "11/s", "2um", "^2"] {
            assert!(matches!(Unit::parse(text), Err(UnitError::Malformed(_))), "{text}");
        }
        let deep = format!("{}um{}", "(".repeat(50), ")".repeat(50));
        assert!(matches!(Unit::parse(&deep), Err(UnitError::Malformed(_))));
    }
}
