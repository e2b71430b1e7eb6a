//! Writing quantities for people: a readable unit and a fixed number of significant digits.
//!
//! What is written here can be read again by [`Quantity::parse`], within the digits shown.

use super::dimension::Dimension;
use super::value::Quantity;
use crate::physical::constants::ZERO_CELSIUS_K;
use std::f64::consts::PI;

/// The units in which quantities of one kind are shown, from small to large.
#[derive(Debug, Clone, Copy)]
pub struct DisplayUnit {
    /// Symbol and size in SI units.
    steps: &'static [(&'static str, f64)],
    offset_si: f64,
    dimension: Dimension,
}

/// One unit chosen for a number or for a table of numbers.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct ScaledUnit {
    symbol: &'static str,
    factor_si: f64,
    offset_si: f64,
}

macro_rules! display_units {
    ($($constant:ident = $dimension:ident, $doc:literal, [$($symbol:literal = $factor:expr),* $(,)?];)*) => {
        impl DisplayUnit {
            $(#[doc = $doc] pub const $constant: DisplayUnit = DisplayUnit {
                steps: &[$(($symbol, $factor)),*],
                offset_si: 0.0,
                dimension: Dimension::$dimension,
            };)*

            /// Every kind, in the order in which [`DisplayUnit::of`] looks for a dimension.
            pub const ALL: &'static [DisplayUnit] = &[$(DisplayUnit::$constant,)* DisplayUnit::TEMPERATURE];
        }
    };
}

display_units! {
    DIMENSIONLESS = DIMENSIONLESS, "Pure numbers.", ["" = 1.0];
    PERCENT = DIMENSIONLESS, "Fractions as percentages.", ["%" = 1e-2];
    LENGTH = LENGTH, "Lengths: nm to m.", ["nm" = 1e-9, "um" = 1e-6, "mm" = 1e-3, "m" = 1.0];
    AREA = AREA, "Areas: nm2 to m2.", ["nm2" = 1e-18, "um2" = 1e-12, "mm2" = 1e-6, "m2" = 1.0];
    VOLUME = VOLUME, "Volumes: aL to m3.",
        ["aL" = 1e-21, "fL" = 1e-18, "pL" = 1e-15, "nL" = 1e-12, "uL" = 1e-9, "mL" = 1e-6, "L" = 1e-3, "m3" = 1.0];
    MASS = MASS, "Masses: fg to kg.",
        ["fg" = 1e-18, "pg" = 1e-15, "ng" = 1e-12, "ug" = 1e-9, "mg" = 1e-6, "g" = 1e-3, "kg" = 1.0];
    TIME = TIME, "Times: ns to days.",
        ["ns" = 1e-9, "us" = 1e-6, "ms" = 1e-3, "s" = 1.0, "min" = 60.0, "h" = 3600.0, "days" = 86_400.0];
    TEMPERATURE_DIFFERENCE = TEMPERATURE_DIFFERENCE, "Temperature differences: mK and K.", ["mK" = 1e-3, "K" = 1.0];
    ANGLE = ANGLE, "Angles in degrees.", ["deg" = PI / 180.0];
    SPEED = SPEED, "Speeds: nm/s to m/s.", ["nm/s" = 1e-9, "um/s" = 1e-6, "mm/s" = 1e-3, "m/s" = 1.0];
    ACCELERATION = ACCELERATION, "Accelerations in m/s2.", ["m/s2" = 1.0];
    RATE = SHEAR_RATE, "Rates and rotational diffusion coefficients in 1/s.", ["/s" = 1.0];
    ANGULAR_SPEED = ANGULAR_SPEED, "Angular speeds in rad/s.", ["rad/s" = 1.0];
    FORCE = FORCE, "Forces: aN to N.",
        ["aN" = 1e-18, "fN" = 1e-15, "pN" = 1e-12, "nN" = 1e-9, "uN" = 1e-6, "mN" = 1e-3, "N" = 1.0];
    TORQUE = TORQUE, "Torques: aN.um to N.m.",
        ["aN.um" = 1e-24, "fN.um" = 1e-21, "pN.um" = 1e-18, "nN.um" = 1e-15, "uN.um" = 1e-12, "nN.m" = 1e-9, "uN.m" = 1e-6, "mN.m" = 1e-3, "N.m" = 1.0];
    PRESSURE = PRESSURE, "Pressures and stresses: uPa to MPa.",
        ["uPa" = 1e-6, "mPa" = 1e-3, "Pa" = 1.0, "kPa" = 1e3, "MPa" = 1e6];
    PRESSURE_GRADIENT = PRESSURE_GRADIENT, "Pressure gradients: Pa/m to MPa/m.",
        ["Pa/m" = 1.0, "kPa/m" = 1e3, "MPa/m" = 1e6];
    VISCOSITY = VISCOSITY, "Dynamic viscosities: uPa.s to Pa.s.", ["uPa.s" = 1e-6, "mPa.s" = 1e-3, "Pa.s" = 1.0];
    KINEMATIC_VISCOSITY = KINEMATIC_VISCOSITY, "Kinematic viscosities in mm2/s (cSt).", ["mm2/s" = 1e-6];
    DIFFUSION = DIFFUSION, "Diffusion coefficients in um2/s.", ["um2/s" = 1e-12];
    DENSITY = DENSITY, "Densities: kg/m3 below 100 kg/m3, else g/mL.", ["kg/m3" = 1.0, "g/mL" = 1e3];
    FLOW_RATE = FLOW_RATE, "Flow rates: pL/s to mL/s.",
        ["pL/s" = 1e-15, "nL/s" = 1e-12, "uL/s" = 1e-9, "mL/s" = 1e-6, "L/s" = 1e-3];
    SURFACE_TENSION = SURFACE_TENSION, "Surface tensions: uN/m to N/m.", ["uN/m" = 1e-6, "mN/m" = 1e-3, "N/m" = 1.0];
    RESISTANCE = RESISTANCE, "Translational resistances: fN.s/m to N.s/m.",
        ["fN.s/m" = 1e-15, "pN.s/m" = 1e-12, "nN.s/m" = 1e-9, "uN.s/m" = 1e-6, "mN.s/m" = 1e-3, "N.s/m" = 1.0];
    COUPLING_RESISTANCE = COUPLING_RESISTANCE, "Coupling resistances: aN.s to N.s.",
        ["aN.s" = 1e-18, "fN.s" = 1e-15, "pN.s" = 1e-12, "nN.s" = 1e-9, "uN.s" = 1e-6, "mN.s" = 1e-3, "N.s" = 1.0];
    ROTATIONAL_RESISTANCE = ROTATIONAL_RESISTANCE, "Rotational resistances: aN.um.s to N.m.s.",
        ["aN.um.s" = 1e-24, "fN.um.s" = 1e-21, "pN.um.s" = 1e-18, "nN.um.s" = 1e-15, "uN.um.s" = 1e-12, "nN.m.s" = 1e-9, "uN.m.s" = 1e-6, "mN.m.s" = 1e-3, "N.m.s" = 1.0];
    MOBILITY = MOBILITY, "Translational mobilities: m/(s.N) to um/(s.fN).",
        ["m/(s.N)" = 1.0, "mm/(s.uN)" = 1e3, "um/(s.pN)" = 1e6, "um/(s.fN)" = 1e9];
    COUPLING_MOBILITY = COUPLING_MOBILITY, "Coupling mobilities: 1/(s.N) to 1/(s.fN).",
        ["/(s.N)" = 1.0, "/(s.uN)" = 1e6, "/(s.nN)" = 1e9, "/(s.pN)" = 1e12, "/(s.fN)" = 1e15];
    ROTATIONAL_MOBILITY = ROTATIONAL_MOBILITY, "Rotational mobilities: 1/(s.N.m) to 1/(s.fN.um).",
        ["/(s.N.m)" = 1.0, "/(s.uN.m)" = 1e6, "/(s.nN.m)" = 1e9, "/(s.uN.um)" = 1e12, "/(s.nN.um)" = 1e15, "/(s.pN.um)" = 1e18, "/(s.fN.um)" = 1e21];
}

/// Below this a density is that of a gas, better read in kg/m3.
const SMALLEST_LIQUID_DENSITY_KG_M3: f64 = 100.0;

/// Numbers from here on are written with an exponent.
const LARGEST_PLAIN: f64 = 1e6;
/// Numbers below this are written with an exponent.
const SMALLEST_PLAIN: f64 = 1e-4;
/// More digits than a double holds are none of the value's.
const MOST_DIGITS: usize = 17;

impl DisplayUnit {
    /// Absolute temperatures in degrees Celsius.
    pub const TEMPERATURE: DisplayUnit =
        DisplayUnit { steps: &[("degC", 1.0)], offset_si: ZERO_CELSIUS_K, dimension: Dimension::TEMPERATURE };

    /// The units in which a dimension is shown if nothing else is said; kinds that share their
    /// exponents are told apart by name first.
    pub fn of(dimension: Dimension) -> DisplayUnit {
        let fits = |unit: &&DisplayUnit| unit.dimension == dimension;
        let exact = |unit: &&DisplayUnit| fits(unit) && unit.dimension.name() == dimension.name();
        let all = DisplayUnit::ALL;
        let found = all.iter().find(exact).or_else(|| all.iter().find(fits));
        found.copied().unwrap_or(DisplayUnit::DIMENSIONLESS)
    }

    /// What is shown in these units.
    pub fn dimension(&self) -> Dimension {
        self.dimension
    }

    /// The largest of the units in which the number is one or more when rounded to `digits`.
    ///
    /// For a table take the largest magnitude in it, so that all its numbers share a unit.
    pub fn choose(&self, magnitude_si: f64, digits: usize) -> ScaledUnit {
        let magnitude = magnitude_si.abs();
        let reaches_one = |factor: f64| round_to(magnitude / factor, digits) >= 1.0;
        let chosen = if self.dimension == Dimension::DENSITY {
            self.steps.iter().rev().find(|step| step.1 == 1.0 || magnitude >= SMALLEST_LIQUID_DENSITY_KG_M3)
        } else if magnitude == 0.0 || !magnitude.is_finite() {
            self.steps.iter().find(|step| step.1 >= 1.0).or(self.steps.last())
        } else {
            self.steps.iter().rev().find(|step| reaches_one(step.1)).or(self.steps.first())
        };
        let (symbol, factor_si) = chosen.copied().unwrap_or(("", 1.0));
        ScaledUnit { symbol, factor_si, offset_si: self.offset_si }
    }

    /// A quantity with so many significant digits and its uncertainty, if it has one, to the same place.
    pub fn quantity(&self, quantity: &Quantity, digits: usize) -> String {
        let unit = self.choose(quantity.value_si(), digits);
        let value = unit.number(quantity.value_si(), digits);
        if quantity.uncertainty_si() == 0.0 {
            return unit.join(&value);
        }
        let spread = format_number(quantity.uncertainty_si() / unit.factor_si, DIGITS_OF_UNCERTAINTY);
        unit.join(&format!("{value} ± {spread}"))
    }
}

/// An uncertainty is itself known no better than this.
const DIGITS_OF_UNCERTAINTY: usize = 2;

impl ScaledUnit {
    /// The unit's symbol.
    pub fn symbol(&self) -> &'static str {
        self.symbol
    }

    /// The unit's size in SI units.
    pub fn factor_si(&self) -> f64 {
        self.factor_si
    }

    /// The number of units in a value given in SI units.
    pub fn value(&self, value_si: f64) -> f64 {
        (value_si - self.offset_si) / self.factor_si
    }

    /// That number as text with so many significant digits, without the symbol.
    pub fn number(&self, value_si: f64, digits: usize) -> String {
        format_number(self.value(value_si), digits)
    }

    fn join(&self, number: &str) -> String {
        match self.symbol {
            "" => number.to_string(),
            "%" => format!("{number}%"),
            symbol => format!("{number} {symbol}"),
        }
    }
}

/// A value in SI units as text, in the most readable of the units, with so many significant digits.
///
/// # Examples
/// ```
/// use slowmote::physical::quantity::{DisplayUnit, format_si};
///
/// assert_eq!(format_si(9.42e-8, DisplayUnit::RESISTANCE, 3), "94.2 nN.s/m");
/// assert_eq!(format_si(7.82e-6, DisplayUnit::LENGTH, 3), "7.82 um");
/// ```
pub fn format_si(value_si: f64, unit: DisplayUnit, digits: usize) -> String {
    let chosen = unit.choose(value_si, digits);
    chosen.join(&chosen.number(value_si, digits))
}

/// A number with so many significant digits, with an exponent where it is very large or very small.
pub fn format_number(value: f64, digits: usize) -> String {
    let digits = digits.clamp(1, MOST_DIGITS);
    if value == 0.0 || !value.is_finite() {
        return if value.is_finite() { "0".to_string() } else { format!("{value}") };
    }
    let rounded = round_to(value, digits);
    let magnitude = rounded.abs();
    if !(SMALLEST_PLAIN..LARGEST_PLAIN).contains(&magnitude) {
        return format!("{value:.*e}", digits - 1);
    }
    let before_point = magnitude.log10().floor() as i64 + 1;
    let decimals = usize::try_from(digits as i64 - before_point).unwrap_or(0);
    format!("{rounded:.decimals$}")
}

/// The number rounded to so many significant decimal digits, as its text would be.
fn round_to(value: f64, digits: usize) -> f64 {
    let digits = digits.clamp(1, MOST_DIGITS);
    format!("{value:.*e}", digits - 1).parse().unwrap_or(value)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn numbers_have_as_many_digits_as_asked_for() {
        assert_eq!(format_number(94.23, 3), "94.2");
        assert_eq!(format_number(0.012345, 3), "0.0123");
        assert_eq!(format_number(999.96, 4), "1000");
        assert_eq!(format_number(99.996, 4), "100.0");
        assert_eq!(format_number(123_456.0, 3), "123000");
        assert_eq!(format_number(-1.5e7, 3), "-1.50e7");
        assert_eq!(format_number(1.5e-7, 2), "1.5e-7");
        assert_eq!(format_number(0.0, 3), "0");
        assert_eq!(format_number(f64::INFINITY, 3), "inf");
    }

    #[test]
    fn a_readable_unit_is_chosen() {
        assert_eq!(format_si(9.9996e-7, DisplayUnit::LENGTH, 3), "1.00 um");
        assert_eq!(format_si(0.0, DisplayUnit::LENGTH, 3), "0 m");
        assert_eq!(format_si(-5e-5, DisplayUnit::SPEED, 3), "-50.0 um/s");
        assert_eq!(format_si(1.0016e-3, DisplayUnit::VISCOSITY, 5), "1.0016 mPa.s");
        assert_eq!(format_si(998.2, DisplayUnit::DENSITY, 4), "0.9982 g/mL");
        assert_eq!(format_si(1.2046, DisplayUnit::DENSITY, 4), "1.205 kg/m3");
        assert_eq!(format_si(298.15, DisplayUnit::TEMPERATURE, 3), "25.0 degC");
        assert_eq!(format_si(4.3e-13, DisplayUnit::DIFFUSION, 2), "0.43 um2/s");
        assert_eq!(format_si(7200.0, DisplayUnit::TIME, 2), "2.0 h");
        assert_eq!(format_si(0.005, DisplayUnit::PERCENT, 2), "0.50%");
        assert_eq!(format_si(1e12, DisplayUnit::LENGTH, 2), "1.0e12 m");
    }

    #[test]
    fn a_dimension_finds_its_units() {
        let diffusion = DisplayUnit::of(Dimension::DIFFUSION);
        assert_eq!(format_si(1e-12, diffusion, 2), "1.0 um2/s");
        let viscosity = DisplayUnit::of(Dimension::KINEMATIC_VISCOSITY);
        assert_eq!(format_si(1e-6, viscosity, 2), "1.0 mm2/s");
        assert_eq!(format_si(2.0, DisplayUnit::of(Dimension::FREQUENCY), 2), "2.0 /s");
        for dimension in Dimension::ALL {
            assert_eq!(DisplayUnit::of(*dimension).dimension(), *dimension);
        }
    }

    #[test]
    fn an_uncertainty_is_shown_beside_its_value() {
        let length = Quantity::parse("10±0.3um", Dimension::LENGTH).expect("a length");
        assert_eq!(length.to_text(3), "10.0 ± 0.30 um");
        let warm = Quantity::parse("25±0.5degC", Dimension::TEMPERATURE).expect("a temperature");
        assert_eq!(warm.to_text(3), "25.0 ± 0.50 degC");
    }
}
