//! Decimal numbers as text, kept as text until the power of ten of the unit is known.

/// Exponents beyond this leave the range of double precision, whatever the digits.
const LARGEST_EXPONENT: i64 = 100_000;

/// A decimal number: sign and digits, and a power of ten.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Decimal<'a> {
    mantissa: &'a str,
    exponent: i64,
}

impl<'a> Decimal<'a> {
    /// Reads a number at the beginning of `text`; gives it with the rest of the text.
    ///
    /// An `e` belongs to the number only if digits follow it.
    pub(super) fn read(text: &'a str) -> Option<(Decimal<'a>, &'a str)> {
        let bytes = text.as_bytes();
        let digits_from = |start: usize| bytes[start..].iter().take_while(|byte| byte.is_ascii_digit()).count();
        let sign = usize::from(matches!(bytes.first(), Some(b'+' | b'-')));
        let whole = digits_from(sign);
        let mut end = sign + whole;
        let mut fraction = 0;
        if bytes.get(end) == Some(&b'.') {
            fraction = digits_from(end + 1);
            if whole + fraction > 0 {
                end += 1 + fraction;
            }
        }
        if whole + fraction == 0 {
            return None;
        }
        let mantissa = &text[..end];
        let mut exponent = 0;
        if matches!(bytes.get(end), Some(b'e' | b'E')) {
            let exponent_sign = usize::from(matches!(bytes.get(end + 1), Some(b'+' | b'-')));
            let start = end + 1;
            let count = if start + exponent_sign <= bytes.len() { digits_from(start + exponent_sign) } else { 0 };
            if count > 0 {
                let stop = start + exponent_sign + count;
                let negative = bytes[start] == b'-';
                // Digits that do not fit an integer are far beyond the limit in any case.
                let size = text[start + exponent_sign..stop].parse::<i64>().unwrap_or(i64::MAX);
                let size = size.min(LARGEST_EXPONENT);
                exponent = if negative { -size } else { size };
                end = stop;
            }
        }
        Some((Decimal { mantissa, exponent }, &text[end..]))
    }

    /// The number times 10^power10 times a factor, correctly rounded if the factor is one; none if it
    /// leaves the range of double precision at either end.
    pub(super) fn scaled(&self, power10: i32, factor: f64) -> Option<f64> {
        let exponent = self.exponent + i64::from(power10);
        let decimal: f64 = format!("{}e{exponent}", self.mantissa).parse().ok()?;
        let value = decimal * factor;
        let is_zero = !self.mantissa.bytes().any(|byte| (b'1'..=b'9').contains(&byte));
        (value.is_finite() && (value.is_normal() || is_zero)).then_some(value)
    }

    pub(super) fn is_signed(&self) -> bool {
        self.mantissa.starts_with(['+', '-'])
    }
}

/// Whether a text begins with a spelling of infinity or of not-a-number.
pub(super) fn begins_with_non_finite(text: &str) -> bool {
    let unsigned = text.trim_start_matches(['+', '-']);
    let word: String = unsigned.chars().take_while(|c| c.is_alphabetic()).collect();
    matches!(word.to_lowercase().as_str(), "inf" | "infinity" | "nan") || unsigned.starts_with('∞')
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn numbers_end_where_the_unit_begins() {
        let read = |text| Decimal::read(text).map(|(number, rest)| (number.scaled(0, 1.0), rest));
        assert_eq!(read("10um"), Some((Some(10.0), "um")));
        assert_eq!(read("1e-3Pa.s"), Some((Some(1e-3), "Pa.s")));
        assert_eq!(read(".5um"), Some((Some(0.5), "um")));
        assert_eq!(read("5.um"), Some((Some(5.0), "um")));
        assert_eq!(read("-2E2m"), Some((Some(-200.0), "m")));
        assert_eq!(read("1em"), Some((Some(1.0), "em")));
        assert_eq!(read("1e"), Some((Some(1.0), "e")));
        assert_eq!(read("1e+"), Some((Some(1.0), "e+")));
        assert_eq!(read("1e999m"), Some((None, "m")));
        assert_eq!(read("1e-999m"), Some((None, "m")));
        assert_eq!(read("0e-999m"), Some((Some(0.0), "m")));
        assert_eq!(read("1e99999999999999999999m"), Some((None, "m")));
        for text in ["", ".", "-", "um", "e5", "+.e5"] {
            assert_eq!(read(text), None, "{text}");
        }
    }

    #[test]
    fn the_power_of_ten_is_not_rounded_twice() {
        let (ten, _) = Decimal::read("10").expect("a number");
        assert_eq!(ten.scaled(-6, 1.0), Some(1e-5));
    }
}
