//! Reading a quantity: a number, an uncertainty, a unit.
//!
//! ```text
//! 10um   10 um   10±0.3um   10±3%um   10um±3%   10um±300nm   1e-3Pa.s   25±0.5degC
//! ```
//!
//! `+-` and `+/-` stand for `±`; the micro sign and the Greek mu stand for `u`.

use super::dimension::{Dimension, describe};
use super::error::{QuantityError, echo};
use super::number::{Decimal, begins_with_non_finite};
use super::unit::{Unit, UnitError, suggest};
use super::value::Quantity;

/// Longer texts are no quantities; the limit keeps hostile input cheap.
const LONGEST_TEXT: usize = 200;

const TWO_UNCERTAINTIES: &str = "there are two";
const NO_NUMBER_AFTER_SIGN: &str = "a number is missing after `±`";
const SIGNED: &str = "it has a sign of its own";
const NO_UNIT_OF_ITS_OWN: &str = "after the unit it needs `%` or a unit of its own, as in `10um±3%` or `10um±300nm`";
const PERCENT_OF_TEMPERATURE: &str = "a percentage of a temperature depends on the scale";
const PERCENT_OF_PERCENT: &str = "a percentage of a percentage may be relative or in points, so write it as in `60±1%`";

impl Quantity {
    /// Reads a quantity of the expected dimension as people write it.
    ///
    /// A number and a unit, with an uncertainty before or after the unit: `10um`, `10 µm`, `10±0.3um`,
    /// `10um±3%`, `1mPa.s`, `1.05g/cm3`, `25±0.5degC`. Units are products (`.`, `*`, a space), quotients
    /// (`/`) and powers (`^2` or a trailing digit) of symbols with SI prefixes. A unit is always needed,
    /// except for [`Dimension::DIMENSIONLESS`]. Negative numbers are read; see [`Quantity::positive`].
    ///
    /// # Errors
    /// A [`QuantityError`] that says what is wrong and what was expected.
    ///
    /// # Examples
    /// ```
    /// use slowmote::physical::{Dimension, Quantity};
    ///
    /// let water = Quantity::parse("1cP", Dimension::VISCOSITY)?;
    /// assert_eq!(water.value_si(), 1e-3);
    /// let wrong = Quantity::parse("1cP", Dimension::LENGTH).unwrap_err();
    /// assert_eq!(wrong.to_string(), "`1cP` is a viscosity, but a length such as `10um` is expected");
    /// # Ok::<(), slowmote::physical::QuantityError>(())
    /// ```
    pub fn parse(text: &str, expected: Dimension) -> Result<Quantity, QuantityError> {
        let length = text.chars().count();
        if length > LONGEST_TEXT {
            return Err(QuantityError::TooLong { length, limit: LONGEST_TEXT });
        }
        let plain = plain_signs(text.trim());
        Reading { text, expected }.quantity(&plain)
    }
}

/// Replaces typographic signs by the plain ones of the grammar.
pub(super) fn plain_signs(text: &str) -> String {
    let mut plain = String::with_capacity(text.len());
    for c in text.chars() {
        match c {
            'µ' | 'μ' => plain.push('u'),
            '·' | '⋅' | '∙' | '•' => plain.push('*'),
            '−' | '⁻' => plain.push('-'),
            '°' => plain.push_str("deg"),
            '℃' => plain.push_str("degC"),
            '℉' => plain.push_str("degF"),
            'Å' | '\u{212b}' => plain.push_str("angstrom"),
            '⁰' => plain.push('0'),
            '¹' => plain.push('1'),
            '²' => plain.push('2'),
            '³' => plain.push('3'),
            '⁴'..='⁹' => plain.push(char::from(b'4' + (u32::from(c) - u32::from('⁴')) as u8)),
            _ => plain.push(c),
        }
    }
    plain.replace("+/-", "±").replace("+-", "±")
}

/// An uncertainty before it has a unit.
#[derive(Clone, Copy)]
enum Spread<'a> {
    None,
    /// A number in the unit of the value.
    Absolute(Decimal<'a>),
    /// A percentage of the value.
    Percent(Decimal<'a>),
    /// A number with a unit of its own.
    Own(Decimal<'a>, Unit),
}

/// One text on its way to a quantity, with what the error messages need.
struct Reading<'t> {
    text: &'t str,
    expected: Dimension,
}

impl Reading<'_> {
    fn quantity(&self, plain: &str) -> Result<Quantity, QuantityError> {
        let (number, rest) = self.number(plain)?;
        let (before, rest) = self.spread_before_unit(rest.trim_start())?;
        let (unit_text, after_text) = match rest.split_once('±') {
            Some((unit, after)) => (unit, Some(after)),
            None => (rest, None),
        };
        let unit = self.unit(unit_text.trim())?;
        let spread = match (before, after_text) {
            (spread, None) => spread,
            (Spread::None, Some(after)) => self.spread_after_unit(after, unit_text.trim())?,
            (_, Some(_)) => return Err(self.bad_uncertainty(TWO_UNCERTAINTIES)),
        };
        self.assemble(number, unit, spread)
    }

    fn number<'p>(&self, plain: &'p str) -> Result<(Decimal<'p>, &'p str), QuantityError> {
        let (expected, example) = (self.expected.name(), self.expected.example());
        if plain.is_empty() {
            return Err(QuantityError::Empty { expected, example });
        }
        if begins_with_non_finite(plain) {
            return Err(QuantityError::NotFinite { text: echo(self.text) });
        }
        let Some((number, rest)) = Decimal::read(plain) else {
            return Err(QuantityError::NoNumber { text: echo(self.text), expected, example });
        };
        if rest.trim_start().starts_with(',') {
            return Err(QuantityError::Comma { text: echo(self.text) });
        }
        Ok((number, rest))
    }

    /// `±0.3` or `±3%` between number and unit.
    fn spread_before_unit<'p>(&self, rest: &'p str) -> Result<(Spread<'p>, &'p str), QuantityError> {
        let Some(after_sign) = rest.strip_prefix('±') else {
            return Ok((Spread::None, rest));
        };
        let (spread, rest) = self.spread_number(after_sign)?;
        // In `10±3%um` the percentage is relative; in `60±1%` it is the unit of both.
        match rest.trim_start().strip_prefix('%') {
            Some(unit) if !unit.trim().is_empty() && !unit.trim_start().starts_with('±') => {
                Ok((Spread::Percent(spread), unit))
            }
            _ => Ok((Spread::Absolute(spread), rest)),
        }
    }

    /// `3%` or `300nm` after unit and sign.
    fn spread_after_unit<'p>(&self, after_sign: &'p str, unit_of_value: &str) -> Result<Spread<'p>, QuantityError> {
        let (spread, rest) = self.spread_number(after_sign)?;
        match rest.trim() {
            "" => Err(self.bad_uncertainty(NO_UNIT_OF_ITS_OWN)),
            _ if rest.contains('±') => Err(self.bad_uncertainty(TWO_UNCERTAINTIES)),
            "%" if self.expected == Dimension::DIMENSIONLESS && !unit_of_value.is_empty() => {
                Err(self.bad_uncertainty(PERCENT_OF_PERCENT))
            }
            "%" => Ok(Spread::Percent(spread)),
            unit => Ok(Spread::Own(spread, self.unit(unit)?)),
        }
    }

    fn spread_number<'p>(&self, text: &'p str) -> Result<(Decimal<'p>, &'p str), QuantityError> {
        let text = text.trim_start();
        if begins_with_non_finite(text) {
            return Err(QuantityError::NotFinite { text: echo(self.text) });
        }
        let (number, rest) = Decimal::read(text).ok_or_else(|| self.bad_uncertainty(NO_NUMBER_AFTER_SIGN))?;
        if number.is_signed() {
            return Err(self.bad_uncertainty(SIGNED));
        }
        if rest.trim_start().starts_with(',') {
            return Err(QuantityError::Comma { text: echo(self.text) });
        }
        Ok((number, rest))
    }

    fn unit(&self, unit_text: &str) -> Result<Unit, QuantityError> {
        let (expected, example) = (self.expected.name(), self.expected.example());
        if unit_text.is_empty() {
            return match self.expected == Dimension::DIMENSIONLESS {
                true => Ok(Unit::ONE),
                false => Err(QuantityError::NoUnit { text: echo(self.text), expected, example }),
            };
        }
        let unit = Unit::parse(unit_text).map_err(|error| match error {
            UnitError::Malformed(reason) => QuantityError::MalformedUnit { text: echo(self.text), reason },
            UnitError::Unknown { symbol, start } => QuantityError::UnknownUnit {
                text: echo(self.text),
                suggestion: suggest(unit_text, &symbol, start, self.expected),
                symbol: echo(&symbol),
                expected,
                example,
            },
        })?;
        if !self.expected.accepts(unit.exponents) {
            let given = describe(unit.exponents);
            let text = echo(self.text);
            return Err(QuantityError::WrongDimension { text, given, expected, example });
        }
        if unit.has_hertz && self.expected == Dimension::ANGULAR_SPEED {
            return Err(QuantityError::HertzAsAngularSpeed { text: echo(self.text) });
        }
        Ok(unit)
    }

    fn assemble(&self, number: Decimal<'_>, unit: Unit, spread: Spread<'_>) -> Result<Quantity, QuantityError> {
        let not_finite = || QuantityError::NotFinite { text: echo(self.text) };
        let in_unit =
            |number: Decimal<'_>, unit: Unit| number.scaled(unit.power10, unit.significand).ok_or_else(not_finite);
        let absolute_temperature = self.expected.is_absolute_temperature();
        let offset = if absolute_temperature { unit.offset_k } else { 0.0 };
        let value = in_unit(number, unit)? + offset;
        if absolute_temperature && value < 0.0 {
            return Err(QuantityError::BelowAbsoluteZero { text: echo(self.text) });
        }
        let uncertainty = match spread {
            Spread::None => 0.0,
            Spread::Absolute(spread) => in_unit(spread, unit)?,
            Spread::Own(spread, own) => in_unit(spread, own)?,
            Spread::Percent(_) if absolute_temperature => {
                return Err(self.bad_uncertainty(PERCENT_OF_TEMPERATURE));
            }
            Spread::Percent(spread) => spread.scaled(-2, value.abs()).ok_or_else(not_finite)?,
        };
        Quantity::with_uncertainty(value, uncertainty, self.expected)
    }

    fn bad_uncertainty(&self, reason: &'static str) -> QuantityError {
        QuantityError::BadUncertainty { text: echo(self.text), reason }
    }
}

macro_rules! parsers {
    ($($(#[$doc:meta])* $name:ident: $dimension:ident;)*) => {
        $($(#[$doc])*
        ///
        /// # Errors
        /// As [`Quantity::parse`].
        pub fn $name(text: &str) -> Result<Quantity, QuantityError> {
            Quantity::parse(text, Dimension::$dimension)
        })*
    };
}

parsers! {
    /// Reads a length such as `10um`; SI unit m.
    parse_length: LENGTH;
    /// Reads a volume such as `10pL`; SI unit m3.
    parse_volume: VOLUME;
    /// Reads a time such as `10s`; SI unit s.
    parse_time: TIME;
    /// Reads a speed such as `50um/s`; SI unit m/s.
    parse_speed: SPEED;
    /// Reads an angle such as `30deg`; SI unit rad.
    parse_angle: ANGLE;
    /// Reads an angular speed such as `10rad/s`, `10/s` or `3000rpm`; SI unit rad/s.
    parse_angular_speed: ANGULAR_SPEED;
    /// Reads a rate of shear such as `10/s`; SI unit 1/s.
    parse_shear_rate: SHEAR_RATE;
    /// Reads a force such as `10pN`; SI unit N.
    parse_force: FORCE;
    /// Reads a torque such as `10pN.um`; SI unit N.m.
    parse_torque: TORQUE;
    /// Reads a dynamic viscosity such as `1mPa.s`; SI unit Pa.s.
    parse_viscosity: VISCOSITY;
    /// Reads a density such as `1.05g/mL`; SI unit kg/m3.
    parse_density: DENSITY;
    /// Reads an absolute temperature such as `25degC`; SI unit K.
    parse_temperature: TEMPERATURE;
    /// Reads a difference of temperatures such as `2K`; SI unit K.
    parse_temperature_difference: TEMPERATURE_DIFFERENCE;
    /// Reads an acceleration such as `9.81m/s2`; SI unit m/s2.
    parse_acceleration: ACCELERATION;
    /// Reads a frequency in cycles such as `10Hz` or `10/s`; SI unit Hz.
    parse_frequency: FREQUENCY;
    /// Reads a volume flow rate such as `10uL/min`; SI unit m3/s.
    parse_flow_rate: FLOW_RATE;
    /// Reads a pressure, a stress or an elastic modulus such as `1kPa`; SI unit Pa.
    parse_pressure: PRESSURE;
    /// Reads a surface tension or the shear modulus of a membrane such as `5uN/m`; SI unit N/m.
    parse_surface_tension: SURFACE_TENSION;
    /// Reads a pure number or a percentage such as `0.5%`; SI unit 1.
    parse_fraction: DIMENSIONLESS;
}
