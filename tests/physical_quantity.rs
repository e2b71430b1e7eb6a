//! Quantities as people write them, and what is said when they can't be read.

use slowmote::physical::quantity::{
    parse_angle, parse_angular_speed, parse_density, parse_force, parse_fraction, parse_length, parse_lengths,
    parse_shear_rate, parse_speed, parse_temperature, parse_time, parse_torque, parse_viscosity, parse_volume,
};
use slowmote::physical::{Dimension, Quantity, QuantityError};
use std::f64::consts::{PI, TAU};

/// Conversions are products of a few doubles: a few units in the last place.
const ROUNDING: f64 = 4.0 * f64::EPSILON;

#[track_caller]
fn assert_reads(text: &str, dimension: Dimension, expected_si: f64) {
    let value = Quantity::parse(text, dimension).unwrap_or_else(|error| panic!("{text}: {error}")).value_si();
    assert!((value - expected_si).abs() <= ROUNDING * expected_si.abs(), "{text}: {value} is not {expected_si}");
}

#[test]
fn spellings_of_every_kind_are_read() {
    use Dimension as D;
    let cases: &[(&str, Dimension, f64)] = &[
        ("10um", D::LENGTH, 1e-5),
        ("10 um", D::LENGTH, 1e-5),
        ("10\u{b5}m", D::LENGTH, 1e-5),
        ("10\u{3bc}m", D::LENGTH, 1e-5),
        (" 10\u{a0}um ", D::LENGTH, 1e-5),
        ("+10um", D::LENGTH, 1e-5),
        ("-3um", D::LENGTH, -3e-6),
        ("−3um", D::LENGTH, -3e-6),
        ("1e1um", D::LENGTH, 1e-5),
        ("0.01mm", D::LENGTH, 1e-5),
        ("1cm", D::LENGTH, 1e-2),
        ("2in", D::LENGTH, 0.0508),
        ("5angstrom", D::LENGTH, 5e-10),
        ("5Å", D::LENGTH, 5e-10),
        ("7microns", D::LENGTH, 7e-6),
        ("100um2", D::AREA, 1e-10),
        ("100um²", D::AREA, 1e-10),
        ("1L", D::VOLUME, 1e-3),
        ("1mL", D::VOLUME, 1e-6),
        ("1ml", D::VOLUME, 1e-6),
        ("1uL", D::VOLUME, 1e-9),
        ("1nL", D::VOLUME, 1e-12),
        ("16pL", D::VOLUME, 16e-15),
        ("94fL", D::VOLUME, 94e-18),
        ("94um3", D::VOLUME, 94e-18),
        ("1kg", D::MASS, 1.0),
        ("1g", D::MASS, 1e-3),
        ("1mg", D::MASS, 1e-6),
        ("1ug", D::MASS, 1e-9),
        ("1ng", D::MASS, 1e-12),
        ("1pg", D::MASS, 1e-15),
        ("1fg", D::MASS, 1e-18),
        ("2s", D::TIME, 2.0),
        ("2ms", D::TIME, 2e-3),
        ("2us", D::TIME, 2e-6),
        ("2min", D::TIME, 120.0),
        ("2h", D::TIME, 7200.0),
        ("25degC", D::TEMPERATURE, 298.15),
        ("25°C", D::TEMPERATURE, 298.15),
        ("25 ℃", D::TEMPERATURE, 298.15),
        ("25C", D::TEMPERATURE, 298.15),
        ("-5degC", D::TEMPERATURE, 268.15),
        ("298.15K", D::TEMPERATURE, 298.15),
        ("77degF", D::TEMPERATURE, 298.15),
        ("2degC", D::TEMPERATURE_DIFFERENCE, 2.0),
        ("9degF", D::TEMPERATURE_DIFFERENCE, 5.0),
        ("30deg", D::ANGLE, PI / 6.0),
        ("30°", D::ANGLE, PI / 6.0),
        ("1rad", D::ANGLE, 1.0),
        ("0.25turns", D::ANGLE, PI / 2.0),
        ("50um/s", D::SPEED, 5e-5),
        ("1mm/s", D::SPEED, 1e-3),
        ("6cm/min", D::SPEED, 1e-3),
        ("1m/s2", D::ACCELERATION, 1.0),
        ("1m/s^2", D::ACCELERATION, 1.0),
        ("1m.s-2", D::ACCELERATION, 1.0),
        ("1 m s⁻²", D::ACCELERATION, 1.0),
        ("10/s", D::SHEAR_RATE, 10.0),
        ("10 1/s", D::SHEAR_RATE, 10.0),
        ("10s-1", D::SHEAR_RATE, 10.0),
        ("10 s^-1", D::SHEAR_RATE, 10.0),
        ("1/ms", D::SHEAR_RATE, 1000.0),
        ("10/s", D::ANGULAR_SPEED, 10.0),
        ("10rad/s", D::ANGULAR_SPEED, 10.0),
        ("90deg/s", D::ANGULAR_SPEED, PI / 2.0),
        ("3000rpm", D::ANGULAR_SPEED, 50.0 * TAU),
        ("2rev/s", D::ANGULAR_SPEED, 2.0 * TAU),
        ("5Hz", D::FREQUENCY, 5.0),
        ("5kHz", D::FREQUENCY, 5000.0),
        ("1N", D::FORCE, 1.0),
        ("1nN", D::FORCE, 1e-9),
        ("1pN", D::FORCE, 1e-12),
        ("1fN", D::FORCE, 1e-15),
        ("1N.m", D::TORQUE, 1.0),
        ("1pN.um", D::TORQUE, 1e-18),
        ("1pN·µm", D::TORQUE, 1e-18),
        ("1Pa", D::PRESSURE, 1.0),
        ("1kPa", D::PRESSURE, 1e3),
        ("1bar", D::PRESSURE, 1e5),
        ("1dyn/cm2", D::PRESSURE, 0.1),
        ("1kPa/m", D::PRESSURE_GRADIENT, 1e3),
        ("1e-3Pa.s", D::VISCOSITY, 1e-3),
        ("1mPa.s", D::VISCOSITY, 1e-3),
        ("1mPa*s", D::VISCOSITY, 1e-3),
        ("1 mPa s", D::VISCOSITY, 1e-3),
        ("1cP", D::VISCOSITY, 1e-3),
        ("1P", D::VISCOSITY, 0.1),
        ("1kg/(m.s)", D::VISCOSITY, 1.0),
        ("1kg/m/s", D::VISCOSITY, 1.0),
        ("1000cSt", D::KINEMATIC_VISCOSITY, 1e-3),
        ("1mm2/s", D::KINEMATIC_VISCOSITY, 1e-6),
        ("1um2/s", D::DIFFUSION, 1e-12),
        ("1.05g/mL", D::DENSITY, 1050.0),
        ("1.05g/ml", D::DENSITY, 1050.0),
        ("1.05g/cm3", D::DENSITY, 1050.0),
        ("1050kg/m3", D::DENSITY, 1050.0),
        ("1050kg/m^3", D::DENSITY, 1050.0),
        ("1050 kg·m⁻³", D::DENSITY, 1050.0),
        ("1m3/s", D::FLOW_RATE, 1.0),
        ("60uL/min", D::FLOW_RATE, 1e-9),
        ("1N/m", D::SURFACE_TENSION, 1.0),
        ("5uN/m", D::SURFACE_TENSION, 5e-6),
        ("72mN/m", D::SURFACE_TENSION, 0.072),
        ("0.5", D::DIMENSIONLESS, 0.5),
        ("0.5%", D::DIMENSIONLESS, 0.005),
        ("20ppm", D::DIMENSIONLESS, 20e-6),
    ];
    for (text, dimension, expected) in cases {
        assert_reads(text, *dimension, *expected);
    }
}

#[test]
fn powers_of_ten_are_exact() {
    // The nearest double to the decimal number, not the product of two rounded ones: 10 * 1e-6 is
    // 9.999999999999999e-6.
    for (text, expected) in [("10um", 1e-5), ("7.82um", 7.82e-6), ("0.3nm", 3e-10), ("45um", 45e-6)] {
        assert_eq!(parse_length(text).map(|length| length.value_si()), Ok(expected));
    }
}

#[test]
fn the_helpers_expect_what_they_are_called_after() {
    assert_eq!(parse_length("1m").unwrap().dimension(), Dimension::LENGTH);
    assert_eq!(parse_volume("1m3").unwrap().dimension(), Dimension::VOLUME);
    assert_eq!(parse_time("1s").unwrap().dimension(), Dimension::TIME);
    assert_eq!(parse_speed("1m/s").unwrap().dimension(), Dimension::SPEED);
    assert_eq!(parse_angle("1rad").unwrap().dimension(), Dimension::ANGLE);
    assert_eq!(parse_angular_speed("1/s").unwrap().dimension(), Dimension::ANGULAR_SPEED);
    assert_eq!(parse_shear_rate("1/s").unwrap().dimension(), Dimension::SHEAR_RATE);
    assert_eq!(parse_force("1N").unwrap().dimension(), Dimension::FORCE);
    assert_eq!(parse_torque("1N.m").unwrap().dimension(), Dimension::TORQUE);
    assert_eq!(parse_viscosity("1P").unwrap().dimension(), Dimension::VISCOSITY);
    assert_eq!(parse_density("1g/mL").unwrap().dimension(), Dimension::DENSITY);
    assert_eq!(parse_temperature("1K").unwrap().dimension(), Dimension::TEMPERATURE);
    assert_eq!(parse_fraction("1%").unwrap().dimension(), Dimension::DIMENSIONLESS);
    assert_eq!(parse_lengths("3x2um").unwrap().len(), 2);
}

#[track_caller]
fn assert_uncertain(text: &str, dimension: Dimension, value_si: f64, uncertainty_si: f64) {
    let read = Quantity::parse(text, dimension).unwrap_or_else(|error| panic!("{text}: {error}"));
    assert!((read.value_si() - value_si).abs() <= ROUNDING * value_si.abs(), "{text}: {read:?}");
    assert!((read.uncertainty_si() - uncertainty_si).abs() <= ROUNDING * uncertainty_si, "{text}: {read:?}");
}

#[test]
fn uncertainties_stand_before_or_after_the_unit() {
    for text in ["10±0.3um", "10+-0.3um", "10+/-0.3um", "10 ± 0.3 um", "10um±300nm", "10um±3%", "10±3%um", "-10um±3%"]
    {
        let sign = if text.starts_with('-') { -1.0 } else { 1.0 };
        assert_uncertain(text, Dimension::LENGTH, sign * 1e-5, 3e-7);
    }
    assert_uncertain("60±1%", Dimension::DIMENSIONLESS, 0.6, 0.01);
    assert_uncertain("1.05±0.005g/mL", Dimension::DENSITY, 1050.0, 5.0);
}

#[test]
fn the_uncertainty_of_a_temperature_is_a_difference() {
    assert_uncertain("25±0.5degC", Dimension::TEMPERATURE, 298.15, 0.5);
    assert_uncertain("25degC±0.5K", Dimension::TEMPERATURE, 298.15, 0.5);
    assert_uncertain("25degC±0.5degC", Dimension::TEMPERATURE, 298.15, 0.5);
    assert_uncertain("77±9degF", Dimension::TEMPERATURE, 298.15, 5.0);
    let relative = Quantity::parse("25degC±2%", Dimension::TEMPERATURE);
    assert!(matches!(relative, Err(QuantityError::BadUncertainty { .. })));
}

#[test]
fn uncertainties_that_can_be_read_in_two_ways_are_refused() {
    for text in ["10±um", "10um±0.3", "10um±", "10±0.3um±3%", "10±-0.3um", "10um±+3%", "10um±1%±1%"] {
        let read = parse_length(text);
        assert!(matches!(read, Err(QuantityError::BadUncertainty { .. })), "{text}: {read:?}");
    }
    assert!(matches!(parse_fraction("60%±1%"), Err(QuantityError::BadUncertainty { .. })));
    assert!(matches!(parse_length("10um±3s"), Err(QuantityError::WrongDimension { .. })));
}

#[track_caller]
fn assert_says(text: &str, dimension: Dimension, message: &str) {
    let error = Quantity::parse(text, dimension).expect_err(text);
    assert_eq!(error.to_string(), message);
}

#[test]
fn every_error_says_what_is_wrong_and_what_was_expected() {
    let length = Dimension::LENGTH;
    assert_says("", length, "a length such as `10um` is expected, but nothing was given");
    assert_says("um", length, "`um` does not begin with a number; a length such as `10um` is expected");
    assert_says("10", length, "`10` has no unit; a length such as `10um` is expected");
    assert_says("1,5um", length, "`1,5um` holds a comma; write decimals with a point and no separator of thousands");
    assert_says("1mPa.s", length, "`1mPa.s` is a viscosity, but a length such as `10um` is expected");
    assert_says("10um", Dimension::VISCOSITY, "`10um` is a length, but a viscosity such as `1mPa.s` is expected");
    assert_says("10m4", length, "`10m4` is a quantity in m^4, but a length such as `10um` is expected");
    assert_says("1e999um", length, "`1e999um` is no finite number that can be represented");
    assert_says("-300degC", Dimension::TEMPERATURE, "`-300degC` is below absolute zero");
    assert_says(
        "1kg/m.s",
        Dimension::VISCOSITY,
        "the unit of `1kg/m.s` can't be read: a product after a quotient is ambiguous, so use brackets as in `kg/(m.s)`",
    );
    assert_says(
        "10zorkmids",
        length,
        "`zorkmids` in `10zorkmids` is no unit known here; a length such as `10um` is expected",
    );
    assert_says(
        "10um±0.3",
        length,
        "the uncertainty in `10um±0.3` can't be used: after the unit it needs `%` or a unit of its own, as in `10um±3%` or `10um±300nm`",
    );
}

#[test]
fn a_mistyped_unit_is_met_with_the_one_that_was_meant() {
    let cases = [
        ("10uM", Dimension::LENGTH, "um"),
        ("10UM", Dimension::LENGTH, "um"),
        ("10mu", Dimension::LENGTH, "um"),
        ("10um/S", Dimension::SPEED, "um/s"),
        ("1mpa.s", Dimension::VISCOSITY, "mPa.s"),
        ("1cp", Dimension::VISCOSITY, "cP"),
        ("1G/mL", Dimension::DENSITY, "g/mL"),
        ("1KG/m3", Dimension::DENSITY, "kg/m3"),
        ("25degc", Dimension::TEMPERATURE, "degC"),
        ("10pn", Dimension::FORCE, "pN"),
        ("1000cst", Dimension::KINEMATIC_VISCOSITY, "cSt"),
        ("30Deg", Dimension::ANGLE, "deg"),
    ];
    for (text, dimension, meant) in cases {
        match Quantity::parse(text, dimension) {
            Err(QuantityError::UnknownUnit { suggestion, .. }) => {
                assert_eq!(suggestion.as_deref(), Some(meant), "{text}");
            }
            other => panic!("{text}: {other:?}"),
        }
    }
}

#[test]
fn megametres_and_megalitres_are_mistakes_of_case() {
    for (text, dimension) in [("10Mm", Dimension::LENGTH), ("1g/ML", Dimension::DENSITY), ("1MN", Dimension::FORCE)] {
        let read = Quantity::parse(text, dimension);
        assert!(matches!(read, Err(QuantityError::UnknownUnit { suggestion: Some(_), .. })), "{text}: {read:?}");
    }
}

#[test]
fn angles_and_rates_are_told_apart() {
    assert!(matches!(parse_angle("30"), Err(QuantityError::NoUnit { .. })));
    assert!(matches!(parse_shear_rate("10rad/s"), Err(QuantityError::WrongDimension { .. })));
    assert!(matches!(parse_shear_rate("10rpm"), Err(QuantityError::WrongDimension { .. })));
    assert_says(
        "10Hz",
        Dimension::ANGULAR_SPEED,
        "`10Hz` may mean turns or radians a second; write the number with `rev/s`, `rpm` or `rad/s`",
    );
}

#[test]
fn callers_refuse_what_is_not_positive() {
    let negative = parse_length("-3um").unwrap();
    assert_eq!(negative.positive().unwrap_err().to_string(), "a length greater than zero is expected, not -3.000 um");
    assert_eq!(negative.non_negative().unwrap_err().to_string(), "a length of zero or more is expected, not -3.000 um");
    let zero = parse_length("0um").unwrap();
    assert!(matches!(zero.positive(), Err(QuantityError::NotPositive { .. })));
    assert!(zero.non_negative().is_ok());
    let vague = parse_length("1±2um").unwrap();
    assert!(matches!(vague.positive(), Err(QuantityError::UncertaintyTooLarge { .. })));
}

#[test]
fn numbers_of_a_caller_are_checked_too() {
    assert!(Quantity::exact(1e-6, Dimension::LENGTH).is_ok());
    assert!(matches!(Quantity::exact(f64::NAN, Dimension::LENGTH), Err(QuantityError::NotFinite { .. })));
    let unsure = |spread| Quantity::with_uncertainty(1.0, spread, Dimension::LENGTH);
    assert!(matches!(unsure(f64::INFINITY), Err(QuantityError::NotFinite { .. })));
    assert!(matches!(unsure(-1.0), Err(QuantityError::BadUncertainty { .. })));
    assert!(matches!(Quantity::exact(-1.0, Dimension::TEMPERATURE), Err(QuantityError::BelowAbsoluteZero { .. })));
    assert!(Quantity::exact(-1.0, Dimension::TEMPERATURE_DIFFERENCE).is_ok());
    assert_eq!(unsure(0.5).unwrap().relative_uncertainty(), 0.5);
    assert_eq!(Quantity::with_uncertainty(0.0, 0.5, Dimension::LENGTH).unwrap().relative_uncertainty(), f64::INFINITY);
}
