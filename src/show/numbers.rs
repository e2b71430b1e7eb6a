//! Numbers as people read them: as many digits as are known, in a readable unit.

use crate::physical::quantity::{DisplayUnit, format_number, format_si};

/// Fewest and most digits that are shown of a result.
const FEWEST_DIGITS: usize = 3;
const MOST_DIGITS: usize = 7;

/// Digits of a percentage that states an error.
const ERROR_DIGITS: usize = 2;

/// Stands between a number and its unit, where no line is broken; the sheet turns it into a space.
pub(super) const GLUE: &str = "\u{a0}";

/// Digits to show of a number known to this relative error: one more than are sure.
pub(super) fn digits_for(relative_error: Option<f64>) -> usize {
    match relative_error {
        Some(error) if error > 0.0 => {
            let sure = (-error.log10()).floor().clamp(0.0, MOST_DIGITS as f64) as usize;
            (sure + 1).clamp(FEWEST_DIGITS, MOST_DIGITS)
        }
        Some(_) => MOST_DIGITS,
        None => FEWEST_DIGITS,
    }
}

/// `1.1 %`, with two digits.
pub(super) fn percent(fraction: f64) -> String {
    format!("{}{GLUE}%", format_number(100.0 * fraction, ERROR_DIGITS))
}

/// `± 1.1 %`, or that there is no estimate.
pub(super) fn plus_minus(error: Option<f64>) -> String {
    error.map_or_else(|| "(no error estimate)".to_owned(), |error| format!("±{GLUE}{}", percent(error)))
}

/// `1.23, 0, -4.56 um`: a vector in one unit, components of less than `least` as 0.
///
/// `usual` is the size of such vectors here, which gives the unit of one that vanishes.
pub(super) fn vector(components_si: [f64; 3], unit: DisplayUnit, digits: usize, least: f64, usual: f64) -> String {
    let largest = components_si.iter().fold(0.0_f64, |largest, x| largest.max(x.abs()));
    let unit = unit.choose(if largest <= least { usual } else { largest }, digits);
    let components = components_si.map(|x| entry(unit.value(x), unit.value(largest), digits, unit.value(least)));
    format!("{}{GLUE}{}", components.join(&format!(",{GLUE}")), unit.symbol())
}

/// A temperature without needless digits: `20`, `36.6`.
pub(super) fn temperature(degrees_c: f64) -> String {
    format!("{}{GLUE}degC", (degrees_c * 100.0).round() / 100.0)
}

/// One number of several that share a unit, with the decimals that the largest of them gets.
pub(super) fn entry(value: f64, largest: f64, digits: usize, least: f64) -> String {
    let largest = largest.abs();
    if value.abs() <= least {
        return "0".to_owned();
    }
    let before_point = if largest >= 1.0 { largest.log10().floor() as usize + 1 } else { 1 };
    let decimals = digits.saturating_sub(before_point);
    let shown = format!("{value:.decimals$}");
    // A number that is not zero, but too small for its column.
    if shown.parse() == Ok(0.0) { "~0".to_owned() } else { shown }
}

/// A number in a readable unit.
pub(super) fn si(value: f64, unit: DisplayUnit, digits: usize) -> String {
    format_si(value, unit, digits).replace(' ', GLUE)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn digits_follow_the_error() {
        assert_eq!(digits_for(Some(0.011)), 3);
        assert_eq!(digits_for(Some(9e-4)), 4);
        assert_eq!(digits_for(Some(1e-12)), MOST_DIGITS);
        assert_eq!(digits_for(Some(0.0)), MOST_DIGITS);
        assert_eq!(digits_for(Some(2.0)), FEWEST_DIGITS);
        assert_eq!(digits_for(None), FEWEST_DIGITS);
    }

    #[test]
    fn temperatures_are_short() {
        assert_eq!(temperature(20.0).replace(GLUE, " "), "20 degC");
        assert_eq!(temperature(36.6).replace(GLUE, " "), "36.6 degC");
    }

    #[test]
    fn small_entries_are_zero_only_below_their_error() {
        let vector = |v, digits, least, usual| vector(v, DisplayUnit::LENGTH, digits, least, usual).replace(GLUE, " ");
        assert_eq!(vector([1e-6, 2e-10, -3e-12], 4, 1e-11, 1.0), "1.000, ~0, 0 um");
        assert_eq!(vector([1e-6, 2e-8, -1.5e-6], 3, 0.0, 1.0), "1.00, 0.02, -1.50 um");
        assert_eq!(vector([0.0; 3], 3, 0.0, 1e-5), "0, 0, 0 um");
    }
}
