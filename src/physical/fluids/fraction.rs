//! Fractions as people write them after the name of a solution: `60%`, `60±1%wt`, `60%vol`.

use super::error::FluidError;
use crate::physical::quantity::{Dimension, Quantity, echo};

/// A fraction of 0 to 1, by mass or by volume, with its uncertainty.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) enum Fraction {
    Mass(Quantity),
    Volume(Quantity),
}

const BY_MASS: [&str; 8] = ["%wt", "wt%", "%w/w", "w/w%", "%m/m", "%mass", "%bymass", "%"];
const BY_VOLUME: [&str; 6] = ["%vol", "vol%", "%v/v", "v/v%", "%byvolume", "%volume"];
const MASS_PER_VOLUME: [&str; 2] = ["%w/v", "w/v%"];

const NO_PERCENT: &str = "write it in percent, as in `60%` by mass or `60%vol` by volume";
const PER_VOLUME: &str = "a mass in a volume depends on the density, so give it by mass, as in `60%wt`";
const NOT_A_FRACTION: &str = "it is not between 0 and 100 %";

impl Fraction {
    /// Reads a percentage; without a mark it is by mass.
    pub(super) fn parse(text: &str) -> Result<Fraction, FluidError> {
        let bad = |reason| FluidError::BadFraction { text: echo(text), reason };
        let compact: String = text.to_lowercase().split_whitespace().collect();
        let ends = |marks: &[&str]| marks.iter().find_map(|mark| compact.strip_suffix(mark));
        if ends(&MASS_PER_VOLUME).is_some() {
            return Err(bad(PER_VOLUME));
        }
        let (number, by_volume) = match (ends(&BY_VOLUME), ends(&BY_MASS)) {
            (Some(number), _) => (number, true),
            (None, Some(number)) => (number, false),
            (None, None) => return Err(bad(NO_PERCENT)),
        };
        let value = Quantity::parse(&format!("{number}%"), Dimension::DIMENSIONLESS)
            .map_err(|source| FluidError::Quantity { what: "composition", source })?;
        if !(0.0..=1.0).contains(&value.value_si()) {
            return Err(bad(NOT_A_FRACTION));
        }
        Ok(if by_volume { Fraction::Volume(value) } else { Fraction::Mass(value) })
    }
}

/// A fraction as a percentage that is read back as the same number.
pub(super) fn percent(fraction: f64) -> String {
    let rounded = (fraction * 1e8).round() / 1e6;
    format!("{rounded}%")
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn marks_tell_mass_from_volume() {
        let mass = ["60%", "60 %", "60%wt", "60 wt%", "60% w/w", "60%mass", "60 % by mass"];
        for text in mass {
            let fraction = Fraction::parse(text);
            assert!(matches!(fraction, Ok(Fraction::Mass(f)) if f.value_si() == 0.6), "{text}");
        }
        for text in ["60%vol", "60vol%", "60 % v/v", "60%VOL"] {
            let fraction = Fraction::parse(text);
            assert!(matches!(fraction, Ok(Fraction::Volume(f)) if f.value_si() == 0.6), "{text}");
        }
        assert!(matches!(Fraction::parse("60±1%"), Ok(Fraction::Mass(f)) if f.uncertainty_si() == 0.01));
    }

    #[test]
    fn what_is_no_clear_fraction_is_refused() {
        for text in ["", "60", "0.6", "%", "-1%", "101%", "60%w/v", "nan%", "60%±1%", "60um"] {
            assert!(Fraction::parse(text).is_err(), "{text}");
        }
    }
}
