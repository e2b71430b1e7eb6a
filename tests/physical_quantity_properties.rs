//! Properties of reading and writing quantities, and hostile text.

use proptest::prelude::*;
use slowmote::physical::fluids::default_temperature;
use slowmote::physical::quantity::{format_si, parse_lengths};
use slowmote::physical::{Dimension, DisplayUnit, Fluid, Material, Quantity};

/// Digits that tell every double apart.
const ALL_DIGITS: usize = 17;
/// Writing rounds once and multiplies by the unit once, reading does so again.
const ROUNDING: f64 = 8.0 * f64::EPSILON;

fn display_units() -> impl Strategy<Value = DisplayUnit> {
    proptest::sample::select(DisplayUnit::ALL)
}

fn dimensions() -> impl Strategy<Value = Dimension> {
    proptest::sample::select(Dimension::ALL)
}

/// Numbers of every size that occurs, and far beyond.
fn magnitudes() -> impl Strategy<Value = f64> {
    (-40.0..40.0_f64, any::<bool>()).prop_map(|(log, negative)| {
        let size = 10f64.powf(log);
        if negative { -size } else { size }
    })
}

fn is_temperature(unit: DisplayUnit) -> bool {
    unit.dimension() == Dimension::TEMPERATURE
}

proptest! {
    #[test]
    fn what_is_written_is_read_back(unit in display_units(), value in magnitudes()) {
        prop_assume!(!is_temperature(unit));
        let text = format_si(value, unit, ALL_DIGITS);
        let read = Quantity::parse(&text, unit.dimension());
        let read = read.map_err(|error| TestCaseError::fail(error.to_string()))?.value_si();
        prop_assert!((read - value).abs() <= ROUNDING * value.abs(), "{text}: {read} is not {value}");
    }

    #[test]
    fn what_is_written_with_few_digits_is_read_back_within_them(
        unit in display_units(), value in magnitudes(), digits in 1_usize..8,
    ) {
        prop_assume!(!is_temperature(unit));
        let text = format_si(value, unit, digits);
        let read = Quantity::parse(&text, unit.dimension());
        let read = read.map_err(|error| TestCaseError::fail(error.to_string()))?.value_si();
        let half_a_digit = 0.5 * 10f64.powi(1 - digits as i32) + 1e-12;
        prop_assert!((read - value).abs() <= half_a_digit * value.abs(), "{text}: {read} is not {value}");
    }

    #[test]
    fn temperatures_are_read_back(kelvin in 0.0..1e4_f64) {
        let text = format_si(kelvin, DisplayUnit::TEMPERATURE, ALL_DIGITS);
        let read = Quantity::parse(&text, Dimension::TEMPERATURE);
        // Through the offset: absolute rounding at the size of the larger number.
        let read = match read {
            Ok(read) => read.value_si(),
            // Zero kelvin itself may round below zero.
            Err(_) => { prop_assert!(kelvin < 1e-9); return Ok(()); }
        };
        prop_assert!((read - kelvin).abs() <= 4.0 * f64::EPSILON * (kelvin + 273.15), "{text}");
    }

    #[test]
    fn an_uncertainty_is_read_back(value in 1e-9..1e3_f64, relative in 1e-3..0.9_f64) {
        let length = Quantity::with_uncertainty(value, relative * value, Dimension::LENGTH)
            .map_err(|error| TestCaseError::fail(error.to_string()))?;
        let text = length.to_text(6);
        let read = Quantity::parse(&text, Dimension::LENGTH);
        let read = read.map_err(|error| TestCaseError::fail(format!("{text}: {error}")))?;
        prop_assert!((read.value_si() / value - 1.0).abs() < 1e-5, "{text}");
        // Uncertainties are shown with two digits.
        prop_assert!((read.uncertainty_si() / length.uncertainty_si() - 1.0).abs() < 0.06, "{text}");
    }

    #[test]
    fn a_wrong_dimension_is_never_taken(unit in display_units(), expected in dimensions(), value in 0.1..10.0_f64) {
        let given = unit.dimension();
        let bare_rate = given == Dimension::SHEAR_RATE && expected == Dimension::ANGULAR_SPEED;
        let temperatures = unit.dimension() == Dimension::TEMPERATURE_DIFFERENCE
            && expected == Dimension::TEMPERATURE;
        prop_assume!(given != expected && !bare_rate && !temperatures);
        let text = format_si(value + 300.0, unit, 4);
        prop_assert!(Quantity::parse(&text, expected).is_err(), "{text} as {expected}");
    }

    #[test]
    fn arbitrary_text_never_panics(text in ".*", expected in dimensions()) {
        read_as_everything(&text, expected);
    }

    #[test]
    fn text_of_the_grammar_s_own_signs_never_panics(
        text in r"[0-9eE+\-±.,xX×%/*^() 0-9µumsPagKNCFdegHz²³⁻=:\u{0}]{0,30}", expected in dimensions(),
    ) {
        read_as_everything(&text, expected);
    }

    #[test]
    fn what_is_read_is_finite(number in r"-?[0-9]{1,4}(\.[0-9]{0,4})?(e-?[0-9]{1,4})?", unit in "[a-zA-Z]{1,3}") {
        for expected in Dimension::ALL {
            if let Ok(read) = Quantity::parse(&format!("{number}{unit}"), *expected) {
                prop_assert!(read.value_si().is_finite() && read.uncertainty_si() >= 0.0);
            }
        }
    }
}

fn read_as_everything(text: &str, expected: Dimension) {
    let outcomes = [
        Quantity::parse(text, expected).err().map(|error| error.to_string()),
        parse_lengths(text).err().map(|error| error.to_string()),
        Fluid::parse(text, default_temperature()).err().map(|error| error.to_string()),
        Material::find(text).err().map(|error| error.to_string()),
    ];
    for message in outcomes.into_iter().flatten() {
        assert!(message.chars().count() < 1200 && !message.contains('\n'), "{message}");
    }
}

#[test]
fn hostile_texts_are_refused() {
    let long_number = format!("{}um", "9".repeat(10_000));
    let long_unit = format!("1{}", "u".repeat(10_000));
    let many_powers = format!("1{}", "um9".repeat(3_000));
    let deep = format!("1{}um{}", "(".repeat(90), ")".repeat(90));
    let stacked = format!("1{}", "kg9.".repeat(45));
    let texts = [
        "",
        " ",
        "\t\n",
        "±",
        "±3%",
        "+-",
        "1e999",
        "1e999um",
        "-1e999um",
        "1e-999um",
        "NaN",
        "nan um",
        "NaNum",
        "inf",
        "-inf um",
        "Infinity m",
        "∞um",
        "0x10um",
        "1_000um",
        "1'000um",
        "1 000um",
        "10 um um",
        "10um10",
        "--1um",
        "1e5e5um",
        "1..5um",
        "10um\0",
        "10\0um",
        "１０um",
        "🦀",
        "10🦀",
        "10um🦀",
        "u",
        "e",
        ".",
        "-",
        "1/",
        "1//s",
        "1^",
        "1um^",
        "1um^99",
        "1um^0",
        "1()",
        "1(um",
        "1um)",
        "%",
        "1%%",
        "10um;rm",
        "10\u{202e}um",
        "١٠um",
        &long_number,
        &long_unit,
        &many_powers,
        &deep,
        &stacked,
    ];
    for text in texts {
        for dimension in [Dimension::LENGTH, Dimension::TEMPERATURE, Dimension::ANGULAR_SPEED, Dimension::VISCOSITY] {
            assert!(Quantity::parse(text, dimension).is_err(), "{text:.40}");
        }
        // Read as a list, the hexadecimal one is two lengths, of which the caller refuses the zero.
        assert!(parse_lengths(text).is_err() || text == "0x10um", "{text:.40}");
        assert!(Fluid::parse(text, default_temperature()).is_err(), "{text:.40}");
        read_as_everything(text, Dimension::DIMENSIONLESS);
    }
}
