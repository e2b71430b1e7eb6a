//! Fluids as they are specified, by name and by numbers, and what is said when they can't be used.

use slowmote::physical::fluids::{BoundKind, default_temperature};
use slowmote::physical::{Dimension, Fluid, FluidError, Quantity, QuantityError};

fn at(specification: &str, temperature: &str) -> Result<Fluid, FluidError> {
    Fluid::parse(specification, Quantity::parse(temperature, Dimension::TEMPERATURE).expect("a temperature"))
}

fn read(specification: &str) -> Result<Fluid, FluidError> {
    Fluid::parse(specification, default_temperature())
}

#[test]
fn the_default_temperature_is_twenty_degrees() {
    assert_eq!(default_temperature().value_si(), 293.15);
    assert_eq!(read("water").expect("water").temperature_c(), 20.0);
}

#[test]
fn names_are_read_whatever_their_case_and_spacing() {
    for spelling in ["water", " Water ", "WATER", "H2O"] {
        assert_eq!(read(spelling).expect(spelling).name(), "water");
    }
    for spelling in ["heavy-water", "Heavy Water", "heavy_water", "D2O"] {
        assert_eq!(read(spelling).expect(spelling).name(), "heavy-water");
    }
    for spelling in ["glycerol:60%", "Glycerine: 60 % wt", "glycerol:60wt%", "glycerol:60% w/w"] {
        assert_eq!(read(spelling).expect(spelling).name(), "glycerol:60%");
    }
    assert_eq!(read("silicone-oil:0.001m2/s").expect("oil").name(), "silicone-oil:1000cSt");
}

#[test]
fn a_fluid_is_given_by_numbers() {
    let fluid = at("viscosity=1±0.02mPa.s, density=1g/mL", "25degC").expect("a fluid");
    assert_eq!((fluid.viscosity_pa_s(), fluid.density_kg_m3()), (1e-3, 1000.0));
    assert!((fluid.viscosity_relative_uncertainty() - 0.02).abs() < 1e-12);
    assert_eq!(fluid.density_relative_uncertainty(), 0.0);
    assert_eq!(fluid.viscosity_bound().kind, BoundKind::Given);
    assert_eq!(fluid.temperature_c(), 25.0);
    assert_eq!(fluid.viscosity_temperature_sensitivity_per_k(), None);
    assert_eq!(fluid.validity_c(), None);
    assert!(fluid.cautions().is_empty());
    let swapped = read("density = 1g/mL , viscosity = 1cP").expect("a fluid");
    assert_eq!(swapped.viscosity_pa_s(), 1e-3);
}

#[test]
fn unusual_numbers_are_taken_with_a_caution() {
    let mega = read("viscosity=1MPa.s,density=1g/mL").expect("a fluid");
    assert!(mega.cautions().iter().any(|caution| caution.contains("unusual")), "{:?}", mega.cautions());
    let heavy = read("viscosity=1mPa.s,density=1e6g/mL").expect("a fluid");
    assert!(heavy.cautions().iter().any(|caution| caution.contains("unusual")));
}

#[test]
fn numbers_are_checked_for_themselves_too() {
    let quantity = |text, dimension| Quantity::parse(text, dimension).expect(text);
    let viscosity = quantity("1mPa.s", Dimension::VISCOSITY);
    let density = quantity("1g/mL", Dimension::DENSITY);
    assert!(Fluid::from_numbers(viscosity, density, default_temperature()).is_ok());
    let swapped = Fluid::from_numbers(density, viscosity, default_temperature());
    assert!(matches!(
        swapped,
        Err(FluidError::Quantity { what: "viscosity", source: QuantityError::WrongDimension { .. } })
    ));
    assert!(matches!(Fluid::from_numbers(viscosity, density, density), Err(FluidError::NotATemperature { .. })));
    assert!(matches!(Fluid::water(density), Err(FluidError::NotATemperature { .. })));
}

#[track_caller]
fn assert_says(specification: &str, message: &str) {
    assert_eq!(read(specification).expect_err(specification).to_string(), message);
}

#[test]
fn every_error_says_what_is_wrong() {
    assert_says(
        "viscosity=1mPa.s",
        "a fluid given by numbers needs its density too, as in `viscosity=1mPa.s,density=1g/mL`",
    );
    assert_says(
        "density=1g/mL",
        "a fluid given by numbers needs its viscosity too, as in `viscosity=1mPa.s,density=1g/mL`",
    );
    assert_says("viscosity=1cP,viscosity=2cP,density=1g/mL", "the viscosity of the fluid is given twice");
    assert_says(
        "viscosity=1cP,colour=red",
        "`colour=red` is no part of a fluid such as `viscosity=1mPa.s,density=1g/mL`",
    );
    assert_says(
        "viscosity=0mPa.s,density=1g/mL",
        "the viscosity of the fluid can't be used: a viscosity greater than zero is expected, not 0 Pa.s",
    );
    assert_says(
        "viscosity=1cSt,density=1g/mL",
        "the viscosity of the fluid can't be used: `1cSt` is a kinematic viscosity, but a viscosity such as `1mPa.s` is expected",
    );
    assert_says("glycerol", "glycerol needs its fraction in water, as in `glycerol:60%`");
    assert_says("silicone-oil", "silicone-oil needs its grade, as in `silicone-oil:1000cSt`");
    assert_says("water:60%", "water takes nothing after its name, but `60%` was given");
    assert_says(
        "glycerol:0.6",
        "the fraction `0.6` can't be used: write it in percent, as in `60%` by mass or `60%vol` by volume",
    );
    assert_says("glycerol:110%", "the fraction `110%` can't be used: it is not between 0 and 100 %");
    assert_says(
        "sucrose:20%vol",
        "the fraction `20%vol` can't be used: a solid has no volume fraction, so give it by mass, as in `20%wt`",
    );
    assert_says("sucrose:70%", "sucrose is described for mass fractions from 0 % to 65 %, not at 70%");
    assert_says("silicone-oil:5cSt", "silicone-oil is described for grades from 10 cSt to 60000 cSt, not at 5 cSt");
    let unknown = read("watre").expect_err("mistyped").to_string();
    assert!(
        unknown.starts_with("no fluid is called `watre`, did you mean `water`; known are water, heavy-water"),
        "{unknown}"
    );
    assert!(matches!(read("honey"), Err(FluidError::UnknownFluid { nearest: None, .. })));
}

#[test]
fn a_temperature_outside_the_description_is_refused() {
    let cases = [
        ("water", "-5degC", "water is described from 0 to 100 degC (liquid at atmospheric pressure), not at -5 degC"),
        ("water", "120degC", "water is described from 0 to 100 degC (liquid at atmospheric pressure), not at 120 degC"),
        (
            "heavy-water",
            "50degC",
            "heavy-water is described from 20 to 37 degC (between the three tabulated temperatures), not at 50 degC",
        ),
    ];
    for (specification, temperature, message) in cases {
        assert_eq!(at(specification, temperature).expect_err(specification).to_string(), message);
    }
    for (specification, temperature) in
        [("air", "200degC"), ("glycerol:60%", "-5degC"), ("sucrose:20%", "80degC"), ("saline", "50degC"), ("pbs", "1K")]
    {
        let refused = at(specification, temperature);
        assert!(matches!(refused, Err(FluidError::TemperatureOutOfRange { .. })), "{specification}");
    }
    for (specification, temperature) in
        [("water", "0degC"), ("water", "100degC"), ("heavy-water", "20degC"), ("d2o", "37degC")]
    {
        assert!(at(specification, temperature).is_ok(), "{specification} at {temperature}");
    }
    assert!(at("viscosity=1cP,density=1g/mL", "500degC").is_ok());
}
