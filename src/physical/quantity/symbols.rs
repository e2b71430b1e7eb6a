//! The table of unit symbols and prefixes.

use super::dimension::{ANGLE, Exponents, LENGTH, MASS, NONE, TEMPERATURE, TIME};
use crate::physical::constants::{STANDARD_ATMOSPHERE_PA, STANDARD_GRAVITY_M_PER_S2, ZERO_CELSIUS_K};
use std::f64::consts::{PI, TAU};

/// Which prefixes a symbol takes.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Prefixes {
    /// None at all.
    None,
    /// From atto to kilo: `Mm` or `ML` for a small body is a mistake of case, not a megametre.
    UpToKilo,
    /// Mega and giga as well.
    All,
}

/// One unit symbol: 1 symbol = significand x 10^power10 in SI units (plus an offset in kelvin).
#[derive(Debug, Clone, Copy)]
pub(super) struct Symbol {
    pub text: &'static str,
    pub significand: f64,
    /// Kept apart so that `10um` is the number nearest to 1e-5, not a product of two rounded ones.
    pub power10: i32,
    pub exponents: Exponents,
    pub prefixes: Prefixes,
    pub offset_k: f64,
}

const fn symbol(
    text: &'static str,
    significand: f64,
    power10: i32,
    exponents: Exponents,
    prefixes: Prefixes,
) -> Symbol {
    Symbol { text, significand, power10, exponents, prefixes, offset_k: 0.0 }
}

const fn plain(text: &'static str, significand: f64, exponents: Exponents) -> Symbol {
    symbol(text, significand, 0, exponents, Prefixes::None)
}

const fn temperature(text: &'static str, significand: f64, offset_k: f64) -> Symbol {
    Symbol { offset_k, ..plain(text, significand, TEMPERATURE) }
}

const FORCE: Exponents = Exponents::new(1, 1, -2);
const ENERGY: Exponents = Exponents::new(2, 1, -2);
const PRESSURE: Exponents = Exponents::new(-1, 1, -2);
const VOLUME: Exponents = Exponents::new(3, 0, 0);
const RATE: Exponents = Exponents::new(0, 0, -1);
const ANGULAR_SPEED: Exponents = Exponents { angle: 1, ..RATE };

/// Kelvin in a degree Fahrenheit. Exact by definition.
const FAHRENHEIT_K: f64 = 5.0 / 9.0;
/// 0 degF in kelvin: (0 + 459.67) 5/9. Exact by definition.
const ZERO_FAHRENHEIT_K: f64 = 459.67 * 5.0 / 9.0;
/// 0 degC in kelvin.
const CELSIUS: f64 = ZERO_CELSIUS_K;
/// Inch, m. Exact by definition (international inch, 1959).
const INCH_M: f64 = 0.0254;
/// Pound avoirdupois, kg. Exact by definition (1959).
const POUND_KG: f64 = 0.453_592_37;
/// Millimetre of mercury, Pa. By convention 13.5951 g/mL at standard gravity.
const MILLIMETRE_OF_MERCURY_PA: f64 = 13.5951 * STANDARD_GRAVITY_M_PER_S2;

/// Every symbol without its prefixes. A whole symbol is looked for before prefix and symbol, so that
/// `min` is a minute and `Pa` a pascal.
pub(super) const SYMBOLS: &[Symbol] = &[
    symbol("m", 1.0, 0, LENGTH, Prefixes::UpToKilo),
    plain("in", INCH_M, LENGTH),
    plain("inch", INCH_M, LENGTH),
    symbol("micron", 1.0, -6, LENGTH, Prefixes::None),
    symbol("microns", 1.0, -6, LENGTH, Prefixes::None),
    symbol("angstrom", 1.0, -10, LENGTH, Prefixes::None),
    symbol("g", 1.0, -3, MASS, Prefixes::UpToKilo),
    symbol("s", 1.0, 0, TIME, Prefixes::UpToKilo),
    plain("sec", 1.0, TIME),
    plain("min", 60.0, TIME),
    plain("h", 3600.0, TIME),
    plain("hr", 3600.0, TIME),
    plain("d", 86_400.0, TIME),
    plain("day", 86_400.0, TIME),
    plain("days", 86_400.0, TIME),
    symbol("K", 1.0, 0, TEMPERATURE, Prefixes::UpToKilo),
    temperature("degC", 1.0, CELSIUS),
    temperature("C", 1.0, CELSIUS),
    temperature("degF", FAHRENHEIT_K, ZERO_FAHRENHEIT_K),
    temperature("F", FAHRENHEIT_K, ZERO_FAHRENHEIT_K),
    symbol("rad", 1.0, 0, ANGLE, Prefixes::UpToKilo),
    plain("deg", PI / 180.0, ANGLE),
    plain("rev", TAU, ANGLE),
    plain("turn", TAU, ANGLE),
    plain("turns", TAU, ANGLE),
    symbol("Hz", 1.0, 0, RATE, Prefixes::All),
    plain("rpm", TAU / 60.0, ANGULAR_SPEED),
    symbol("N", 1.0, 0, FORCE, Prefixes::UpToKilo),
    symbol("dyn", 1.0, -5, FORCE, Prefixes::UpToKilo),
    symbol("J", 1.0, 0, ENERGY, Prefixes::UpToKilo),
    symbol("Pa", 1.0, 0, PRESSURE, Prefixes::All),
    symbol("bar", 1.0, 5, PRESSURE, Prefixes::UpToKilo),
    plain("atm", STANDARD_ATMOSPHERE_PA, PRESSURE),
    plain("psi", POUND_KG * STANDARD_GRAVITY_M_PER_S2 / (INCH_M * INCH_M), PRESSURE),
    plain("mmHg", MILLIMETRE_OF_MERCURY_PA, PRESSURE),
    symbol("P", 1.0, -1, Exponents::new(-1, 1, -1), Prefixes::UpToKilo),
    symbol("St", 1.0, -4, Exponents::new(2, 0, -1), Prefixes::UpToKilo),
    symbol("L", 1.0, -3, VOLUME, Prefixes::UpToKilo),
    symbol("l", 1.0, -3, VOLUME, Prefixes::UpToKilo),
    symbol("%", 1.0, -2, NONE, Prefixes::None),
    symbol("ppm", 1.0, -6, NONE, Prefixes::None),
];

/// Prefixes with their powers of ten. The micro signs have become `u` before they are looked for.
pub(super) const PREFIXES: &[(char, i32)] = &[
    ('a', -18),
    ('f', -15),
    ('p', -12),
    ('n', -9),
    ('u', -6),
    ('m', -3),
    ('c', -2),
    ('d', -1),
    ('h', 2),
    ('k', 3),
    ('M', 6),
    ('G', 9),
];

impl Symbol {
    /// Whether the symbol takes a prefix of this power of ten.
    pub(super) fn takes(&self, power10: i32) -> bool {
        match self.prefixes {
            Prefixes::None => false,
            Prefixes::UpToKilo => power10 <= 3,
            Prefixes::All => true,
        }
    }
}

/// The symbol written so, and the power of ten of its prefix.
pub(super) fn look_up(written: &str) -> Option<(&'static Symbol, i32)> {
    if let Some(whole) = SYMBOLS.iter().find(|symbol| symbol.text == written) {
        return Some((whole, 0));
    }
    let first = written.chars().next()?;
    let (_, power10) = PREFIXES.iter().find(|(prefix, _)| *prefix == first)?;
    let rest = &written[first.len_utf8()..];
    SYMBOLS.iter().find(|symbol| symbol.text == rest && symbol.takes(*power10)).map(|symbol| (symbol, *power10))
}

/// Every spelling that [`look_up`] finds.
pub(super) fn all_spellings() -> impl Iterator<Item = String> {
    SYMBOLS.iter().flat_map(|symbol| {
        let prefixed = PREFIXES
            .iter()
            .filter(|(_, power10)| symbol.takes(*power10))
            .map(|(prefix, _)| format!("{prefix}{}", symbol.text));
        std::iter::once(symbol.text.to_string()).chain(prefixed)
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_spelling_is_found_and_means_one_thing() {
        for spelling in all_spellings() {
            assert!(look_up(&spelling).is_some(), "{spelling}");
        }
        assert_eq!(look_up("min").map(|(s, p)| (s.text, p)), Some(("min", 0)));
        assert_eq!(look_up("mPa").map(|(s, p)| (s.text, p)), Some(("Pa", -3)));
        assert_eq!(look_up("cP").map(|(s, p)| (s.text, p)), Some(("P", -2)));
        assert!(look_up("ML").is_none());
        assert!(look_up("").is_none());
        assert!(look_up("µ").is_none());
    }

    #[test]
    fn no_whole_symbol_hides_a_prefixed_one_of_the_same_dimension() {
        for symbol in SYMBOLS {
            let mut chars = symbol.text.chars();
            let Some(first) = chars.next() else { continue };
            let rest = chars.as_str();
            let hidden = PREFIXES.iter().any(|(prefix, power10)| {
                *prefix == first
                    && SYMBOLS
                        .iter()
                        .any(|other| other.text == rest && other.takes(*power10) && other.exponents == symbol.exponents)
            });
            assert!(!hidden, "{}", symbol.text);
        }
    }
}
