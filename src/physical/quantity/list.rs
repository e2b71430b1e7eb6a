//! Several lengths in one text, as catalogues state sizes: `6x4x2um`.

use super::dimension::Dimension;
use super::error::{QuantityError, echo};
use super::parse::plain_signs;
use super::value::Quantity;

/// More lengths than this are no size of a body; the limit keeps hostile input cheap.
const MOST_LENGTHS: usize = 16;
/// Longer texts are no list of so many lengths.
const LONGEST_TEXT: usize = 400;

const COMMA: &str = "commas are not read, so separate lengths by `x` and write decimals with a point";
const MISSING: &str = "a length is missing beside an `x`";
const MANY: &str = "there are more than 16 lengths";
const SOME_UNITS: &str = "either every length has a unit or only the last";
const SHARED_UNCERTAINTY: &str = "an uncertainty after the common unit may belong to one length or to all, so write it at each number as in `6±0.1x4±0.1um`";

/// Reads lengths joined by `x` or `×`, with one unit at the end (`6x4x2um`) or one each (`8um x 1um`).
///
/// Each number may have its uncertainty, `8±0.1x1±0.05um`. Values in m; their sign is the caller's to check.
///
/// # Errors
/// [`QuantityError::BadList`] for the list as a whole, else the error of the length that can't be read.
///
/// # Examples
/// ```
/// use slowmote::physical::quantity::parse_lengths;
///
/// let axes: Vec<f64> = parse_lengths("6x4x2um")?.iter().map(|axis| axis.value_si()).collect();
/// assert_eq!(axes, [6e-6, 4e-6, 2e-6]);
/// # Ok::<(), slowmote::physical::QuantityError>(())
/// ```
pub fn parse_lengths(text: &str) -> Result<Vec<Quantity>, QuantityError> {
    let bad = |reason| QuantityError::BadList { text: echo(text), reason };
    let length = text.chars().count();
    if length > LONGEST_TEXT {
        return Err(QuantityError::TooLong { length, limit: LONGEST_TEXT });
    }
    if text.contains(',') {
        return Err(bad(COMMA));
    }
    let plain = plain_signs(text.trim());
    let parts: Vec<&str> = plain.split(['x', 'X', '×']).map(str::trim).collect();
    if parts.len() > MOST_LENGTHS {
        return Err(bad(MANY));
    }
    if parts.len() > 1 && parts.iter().any(|part| part.is_empty()) {
        return Err(bad(MISSING));
    }
    let (last, others) = match parts.split_last() {
        Some((last, others)) if !others.is_empty() => (*last, others),
        _ => return Ok(vec![Quantity::parse(text, Dimension::LENGTH)?]),
    };
    let without_unit = others.iter().filter(|part| is_bare_number(part)).count();
    if without_unit == 0 {
        return parts.iter().map(|part| Quantity::parse(part, Dimension::LENGTH)).collect();
    }
    if without_unit < others.len() {
        return Err(bad(SOME_UNITS));
    }
    let unit = trailing_unit(last);
    if unit.contains('±') {
        return Err(bad(SHARED_UNCERTAINTY));
    }
    others
        .iter()
        .map(|part| Quantity::parse(&format!("{part}{unit}"), Dimension::LENGTH))
        .chain(std::iter::once(Quantity::parse(last, Dimension::LENGTH)))
        .collect()
}

/// Whether a part is a number, or a number with uncertainty, that leaves its unit to the last part.
fn is_bare_number(part: &str) -> bool {
    trailing_unit(part).is_empty()
}

/// What follows the number and an uncertainty before the unit.
fn trailing_unit(part: &str) -> &str {
    let is_exponent = |index: usize, c: char| {
        // Only after an ASCII letter is the next byte the beginning of a character.
        matches!(c, 'e' | 'E')
            && part[..index].ends_with(|c: char| c.is_ascii_digit() || c == '.')
            && part[index + 1..].trim_start_matches(['+', '-']).starts_with(|c: char| c.is_ascii_digit())
    };
    part.char_indices()
        .find(|(index, c)| c.is_alphabetic() && !is_exponent(*index, *c))
        .map_or("", |(index, _)| &part[index..])
}

#[cfg(test)]
mod tests {
    use super::*;

    fn values(text: &str) -> Result<Vec<f64>, QuantityError> {
        Ok(parse_lengths(text)?.iter().map(Quantity::value_si).collect())
    }

    #[test]
    fn one_unit_at_the_end_or_one_each() {
        assert_eq!(values("6x4x2um"), Ok(vec![6e-6, 4e-6, 2e-6]));
        assert_eq!(values("6 × 4 × 2 µm"), Ok(vec![6e-6, 4e-6, 2e-6]));
        assert_eq!(values("8um x 1um"), Ok(vec![8e-6, 1e-6]));
        assert_eq!(values("8mmx1um"), Ok(vec![8e-3, 1e-6]));
        assert_eq!(values("1e1x2e-1um"), Ok(vec![1e-5, 2e-7]));
        assert_eq!(values("10um"), Ok(vec![1e-5]));
    }

    #[test]
    fn each_number_may_have_its_uncertainty() {
        let both = parse_lengths("8±0.5x1+-0.25um").expect("lengths");
        assert_eq!(both[0].uncertainty_si(), 0.5e-6);
        assert_eq!(both[1].uncertainty_si(), 0.25e-6);
        let percent = parse_lengths("8±5%x4um").expect("lengths");
        assert_eq!(percent[0].uncertainty_si(), 0.4e-6);
        let own = parse_lengths("8um±0.5um x 1um±3%").expect("lengths");
        assert_eq!(own[1].uncertainty_si(), 0.03e-6);
    }

    #[test]
    fn what_is_ambiguous_or_broken_is_refused() {
        for text in ["6,4,2um", "x2um", "6x4x", "6umx4x2um", "6x4um±3%"] {
            assert!(matches!(values(text), Err(QuantityError::BadList { .. })), "{text}: {:?}", values(text));
        }
        assert!(matches!(values("6x4"), Err(QuantityError::NoUnit { .. })));
        assert!(matches!(values("6xum"), Err(QuantityError::NoNumber { .. })));
        assert!(matches!(values(""), Err(QuantityError::Empty { .. })));
        // Letters of two bytes once split in their middle.
        assert!(matches!(values("1À x 2um"), Err(QuantityError::UnknownUnit { .. })));
        assert!(values("!xÀ").is_err());
        assert!(values(&"1x".repeat(150)).is_err());
        assert!(values(&"1x".repeat(10_000)).is_err());
    }
}
