//! Fluids by name against tabulated values. "From memory" marks values without a source at hand.

use slowmote::physical::fluids::{BoundKind, CATALOGUE};
use slowmote::physical::{Dimension, Fluid, Quantity};

fn at(specification: &str, temperature_c: f64) -> Fluid {
    let temperature = Quantity::exact(temperature_c + 273.15, Dimension::TEMPERATURE).expect("a temperature");
    Fluid::parse(specification, temperature).unwrap_or_else(|error| panic!("{specification}: {error}"))
}

#[track_caller]
fn assert_near(computed: f64, expected: f64, relative: f64, what: &str) {
    assert!((computed / expected - 1.0).abs() <= relative, "{what}: {computed} is not {expected}");
}

/// Package coolprop 8.0.0 at 101325 Pa; the first three are the references themselves, the others test
/// the interpolation (`tests/scripts/fluids_reference.py`).
#[test]
fn heavy_water_is_interpolated_between_references() {
    for (t, viscosity, density) in
        [(20.0, 1.24614e-3, 1105.336), (25.0, 1.09454e-3, 1104.468), (37.0, 8.33794e-4, 1101.093)]
    {
        // Five and six digits are kept of the references.
        assert_near(at("heavy-water", t).viscosity_pa_s(), viscosity, 5e-5, "viscosity");
        assert_near(at("heavy-water", t).density_kg_m3(), density, 5e-6, "density");
    }
    for (t, viscosity, density) in [(22.0, 1.18155e-3, 1105.031), (30.0, 9.71308e-4, 1103.269)] {
        let fluid = at("d2o", t);
        // What the curvature of ln mu over 1/T, and of the density over T, leaves.
        assert_near(fluid.viscosity_pa_s(), viscosity, 5e-3, "viscosity");
        assert_near(fluid.density_kg_m3(), density, 4e-4, "density");
    }
}

/// Viscosity: package fluids 1.3.1, US Standard Atmosphere 1976, all digits printed, and coolprop 8.0.0,
/// which is up to 0.8 % higher. Density: coolprop 8.0.0, whose dry air differs by 5e-5 in its make-up.
#[test]
fn air_follows_sutherland_and_the_real_gas() {
    let table = [
        (-40.0, 1.510848e-5, 1.51517e-5, 1.51599),
        (-20.0, 1.615326e-5, 1.62012e-5, 1.39565),
        (0.0, 1.716079e-5, 1.72184e-5, 1.29307),
        (20.0, 1.813406e-5, 1.82057e-5, 1.20458),
        (40.0, 1.907574e-5, 1.91652e-5, 1.12745),
        (70.0, 2.043423e-5, 2.05569e-5, 1.02869),
        (100.0, 2.173408e-5, 2.18965e-5, 0.94587),
    ];
    for (t, standard, real, density) in table {
        let air = at("air", t);
        assert_near(air.viscosity_pa_s(), standard, 1e-6, "viscosity");
        assert_near(air.viscosity_pa_s(), real, air.viscosity_relative_uncertainty(), "viscosity");
        assert_near(air.density_kg_m3(), density, 1e-4, "density");
    }
}

/// 67.3 nm at 296.15 K and 101325 Pa: Willeke 1976, from memory.
#[test]
fn air_alone_has_a_mean_free_path() {
    let path = at("air", 23.0).mean_free_path_m().expect("a gas");
    assert_near(path, 67.3e-9, 1e-12, "mean free path");
    // It grows faster than T, as the density falls and Sutherland's molecules get harder.
    let hot = at("air", 100.0).mean_free_path_m().expect("a gas");
    assert!(hot / path > 373.15 / 296.15);
    assert_eq!(at("water", 23.0).mean_free_path_m(), None);
}

/// Cheng 2008 as published, with his own water (0.35 % high at 20 degC), and the values of Segur and
/// Oberstar 1951 (from memory), from which he is within his 3 %.
#[test]
fn viscosities_of_glycerol_in_water() {
    let table = [
        (10, 1.297e-3, 1.31e-3),
        (30, 2.455e-3, 2.50e-3),
        (50, 6.002e-3, 6.00e-3),
        (60, 10.91e-3, 10.8e-3),
        (80, 60.9e-3, 60.1e-3),
        (90, 223.8e-3, 219e-3),
        (100, 1414e-3, 1410e-3),
    ];
    for (percent, cheng, measured) in table {
        let glycerol = at(&format!("glycerol:{percent}%"), 20.0);
        assert_near(glycerol.viscosity_pa_s(), cheng, 3.5e-3, "Cheng");
        assert_near(glycerol.viscosity_pa_s(), measured, glycerol.viscosity_relative_uncertainty(), "measured");
    }
}

/// Volk and Kaehler 2018, all digits printed; package coolprop 8.0.0, incompressible MGL, for their 0.07 %.
#[test]
fn densities_of_glycerol_in_water() {
    let table = [(10, 1021.8), (30, 1072.6), (50, 1126.2), (60, 1153.5), (80, 1208.1), (90, 1235.1), (100, 1261.1)];
    for (percent, density) in table {
        // Half a unit of the digit printed.
        assert!((at(&format!("glycerol:{percent}%"), 20.0).density_kg_m3() - density).abs() < 0.051, "{percent}");
    }
    let other = [
        (10, 0.0, 1025.25),
        (10, 20.0, 1022.03),
        (10, 40.0, 1015.97),
        (30, 0.0, 1078.71),
        (30, 20.0, 1072.41),
        (30, 40.0, 1064.20),
        (50, 0.0, 1135.50),
        (50, 20.0, 1126.08),
        (50, 40.0, 1115.79),
        (60, 0.0, 1163.96),
        (60, 20.0, 1153.51),
        (60, 40.0, 1142.40),
    ];
    for (percent, t, density) in other {
        let glycerol = at(&format!("glycerol:{percent}%"), t);
        assert_near(glycerol.density_kg_m3(), density, glycerol.density_relative_uncertainty(), "MGL");
        assert_near(glycerol.density_kg_m3(), density, 9e-4, "MGL");
    }
}

#[test]
fn glycerol_ends_in_water_and_is_smooth_to_both_ends() {
    for t in [0.0, 20.0, 60.0, 100.0] {
        let (none, water) = (at("glycerol:0%", t), at("water", t));
        assert_near(none.viscosity_pa_s(), water.viscosity_pa_s(), 1e-12, "water");
        // The water of Volk and Kaehler is an approximation of 2e-4 or better.
        assert_near(none.density_kg_m3(), water.density_kg_m3(), 3e-4, "water");
        let all = at("glycerol:100%", t);
        let nearly = at("glycerol:99.999%", t);
        assert_near(nearly.viscosity_pa_s(), all.viscosity_pa_s(), 1e-3, "end");
        assert_near(nearly.density_kg_m3(), all.density_kg_m3(), 1e-4, "end");
    }
}

/// Near 20 degC, from memory, to the digits given: %/K, and % per percent of mass above 90 %.
#[test]
fn sensitivities_of_bench_liquids() {
    let table = [("glycerol:80%", -6.1), ("glycerol:90%", -7.4), ("glycerol:95%", -8.3), ("glycerol:100%", -9.2)];
    for (specification, percent_per_k) in table {
        let slope = at(specification, 20.0).viscosity_temperature_sensitivity_per_k().expect("a named fluid");
        assert!((100.0 * slope - percent_per_k).abs() < 0.1, "{specification}: {slope}");
    }
    // Of the oil the kinematic viscosity is meant; the dynamic one falls by its expansion, 0.1 %/K, as well.
    let oil = |t| at("silicone-oil:1000cSt", t).kinematic_viscosity_m2_s().ln();
    assert!((100.0 * (oil(20.5) - oil(19.5)) + 2.0).abs() < 0.05);
    for percent in [91, 95, 99] {
        let unsure = at(&format!("glycerol:{percent}±1%"), 20.0);
        let composition = unsure.viscosity_budget().contributions().iter().find(|c| c.name.contains("mass fraction"));
        let per_percent = 100.0 * composition.expect("a contribution").relative;
        assert!((14.5..22.5).contains(&per_percent), "{percent}: {per_percent}");
        assert!(unsure.cautions().iter().any(|caution| caution.contains("one percent of water")));
    }
}

#[test]
fn a_volume_fraction_is_converted_and_said_so() {
    let by_volume = at("glycerol:60%vol", 20.0);
    // By hand: 0.6 x 1261.058/(0.6 x 1261.058 + 0.4 x 998.204) = 0.65456.
    let by_mass = at("glycerol:65.456%", 20.0);
    assert_near(by_volume.viscosity_pa_s(), by_mass.viscosity_pa_s(), 2e-4, "converted");
    assert!(by_volume.cautions().iter().any(|caution| caution.contains("by volume")));
    assert!(by_mass.cautions().iter().all(|caution| !caution.contains("by volume")));
    let again = at(by_volume.name(), 20.0);
    assert_near(again.viscosity_pa_s(), by_volume.viscosity_pa_s(), 1e-7, "its own name");
}

/// 20, 40, 60 % by mass at 20 degC: handbook values, from memory.
#[test]
fn sucrose_in_water() {
    for (percent, viscosity, density) in [(20, 1.945e-3, 1081.0), (40, 6.167e-3, 1176.4), (60, 58.49e-3, 1286.5)] {
        let sucrose = at(&format!("sucrose:{percent}%"), 20.0);
        assert_near(sucrose.viscosity_pa_s(), viscosity, sucrose.viscosity_relative_uncertainty(), "viscosity");
        assert_near(sucrose.density_kg_m3(), density, sucrose.density_relative_uncertainty(), "density");
    }
    for t in [5.0, 20.0, 37.0, 60.0] {
        let (none, water) = (at("sucrose:0%", t), at("water", t));
        assert_near(none.viscosity_pa_s(), water.viscosity_pa_s(), none.viscosity_relative_uncertainty(), "water");
        assert_near(none.density_kg_m3(), water.density_kg_m3(), 5e-5, "water");
    }
}

/// Laliberte 2009 by package thermo 0.6.1, and package coolprop 8.0.0, incompressible MNA (`tests/scripts/fluids_reference.py`).
#[test]
fn saline_follows_two_correlations() {
    let table = [
        (5.0, 1.53378e-3, 1006.51, 1.53793e-3, 1006.66),
        (10.0, 1.32092e-3, 1006.17, 1.32527e-3, 1006.24),
        (20.0, 1.01408e-3, 1004.53, 1.01351e-3, 1004.64),
        (25.0, 9.01393e-4, 1003.31, 8.99466e-4, 1003.46),
        (37.0, 7.00888e-4, 999.47, 7.02996e-4, 999.58),
    ];
    for (t, viscosity, density, other_viscosity, other_density) in table {
        let saline = at("saline", t);
        assert_near(saline.viscosity_pa_s(), viscosity, saline.viscosity_relative_uncertainty(), "Laliberte");
        assert_near(saline.viscosity_pa_s(), other_viscosity, saline.viscosity_relative_uncertainty(), "MNA");
        // Far inside the uncertainty that is stated: the largest difference is 0.43 %, at 37 degC.
        assert_near(saline.viscosity_pa_s(), viscosity, 5e-3, "Laliberte");
        assert_near(saline.viscosity_pa_s(), other_viscosity, 5e-3, "MNA");
        for expected in [density, other_density] {
            assert_near(saline.density_kg_m3(), expected, saline.density_relative_uncertainty() + 5e-6, "density");
        }
    }
}

/// Laliberte 2009 by package thermo 0.6.1 (`tests/scripts/fluids_reference.py`), which describes 15 to 55 degC up to 50 %.
#[test]
fn sucrose_follows_a_second_correlation() {
    let table = [
        (10, 15.0, 1.5417e-3, 1039.30),
        (10, 20.0, 1.3549e-3, 1038.20),
        (10, 25.0, 1.2021e-3, 1036.85),
        (10, 37.0, 9.3152e-4, 1032.75),
        (10, 50.0, 7.3604e-4, 1027.14),
        (20, 15.0, 2.2548e-3, 1082.33),
        (20, 20.0, 1.9647e-3, 1081.00),
        (20, 25.0, 1.7296e-3, 1079.45),
        (20, 37.0, 1.3192e-3, 1074.94),
        (20, 50.0, 1.0283e-3, 1069.01),
        (40, 15.0, 7.5492e-3, 1178.17),
        (40, 20.0, 6.2578e-3, 1176.31),
        (40, 25.0, 5.2636e-3, 1174.29),
        (40, 37.0, 3.6522e-3, 1168.87),
        (40, 50.0, 2.6183e-3, 1162.26),
        (50, 15.0, 1.9884e-2, 1231.73),
        (50, 20.0, 1.5753e-2, 1229.57),
        (50, 25.0, 1.2712e-2, 1227.27),
        (50, 37.0, 8.0905e-3, 1221.34),
        (50, 50.0, 5.3703e-3, 1214.40),
    ];
    for (percent, t, viscosity, density) in table {
        let sucrose = at(&format!("sucrose:{percent}%"), t);
        assert_near(sucrose.viscosity_pa_s(), viscosity, sucrose.viscosity_relative_uncertainty(), "viscosity");
        assert_near(sucrose.density_kg_m3(), density, sucrose.density_relative_uncertainty(), "density");
    }
}

/// From memory, all digits given; common practice for the buffer, whose density belongs to 22 degC.
#[test]
fn fluids_of_the_laboratory() {
    for (t, viscosity, density) in [(20.0, 1.0145e-3, 1004.4), (25.0, 0.9017e-3, 1003.1), (37.0, 0.7001e-3, 999.5)] {
        assert_near(at("saline", t).viscosity_pa_s(), viscosity, 1e-9, "saline");
        assert_near(at("saline", t).density_kg_m3(), density, 1e-9, "saline");
    }
    for t in [4.0, 20.0, 22.0, 37.0] {
        let ratio = at("pbs", t).viscosity_pa_s() / at("water", t).viscosity_pa_s();
        assert!((ratio - 1.02).abs() < 1e-4, "{ratio}");
    }
    assert_near(at("pbs", 22.0).viscosity_pa_s(), 0.9735e-3, 1e-4, "buffer");
    assert_near(at("pbs", 22.0).density_kg_m3(), 1004.5, 1e-9, "buffer");
    assert_near(at("pbs", 20.0).density_kg_m3(), 1004.5, 1e-3, "buffer");
    let plasma = at("plasma", 37.0);
    for edge in [1.2e-3, 1.3e-3] {
        assert_near(edge, plasma.viscosity_pa_s(), plasma.viscosity_relative_uncertainty() + 1e-12, "plasma");
    }
    assert_near(plasma.density_kg_m3(), 1025.0, 1e-9, "plasma");
    assert!(plasma.cautions().iter().any(|caution| caution.contains("one viscosity does not describe")));
    assert_near(at("culture-medium", 37.0).viscosity_pa_s(), 0.93e-3, 1e-9, "medium");
    assert_near(at("culture-medium", 37.0).density_kg_m3(), 1009.0, 1e-9, "medium");
    assert!(at("plasma", 22.0).viscosity_relative_uncertainty() > plasma.viscosity_relative_uncertainty());
}

/// Grades and densities at 25 degC, from memory.
#[test]
fn silicone_oils_meet_their_grades() {
    for (grade, density) in [(10, 935.0), (50, 960.0), (100, 966.0), (1000, 971.0), (12_500, 974.0), (60_000, 976.0)] {
        let oil = at(&format!("silicone-oil:{grade}cSt"), 25.0);
        assert_near(oil.density_kg_m3(), density, 1e-12, "density");
        assert_near(oil.kinematic_viscosity_m2_s(), f64::from(grade) * 1e-6, 1e-9, "grade");
        assert_eq!(oil.viscosity_bound().kind, BoundKind::LabelTolerance);
    }
    let between = at("silicone-oil:350cSt", 25.0).density_kg_m3();
    assert!(966.0 < between && between < 971.0);
    let warmer = at("silicone-oil:1000cSt", 26.0).density_kg_m3();
    assert_near(warmer, 971.0 * (1.0 - 9.6e-4), 1e-6, "expansion");
    let measured = at("silicone-oil:1000cSt±1%", 25.0);
    assert_near(measured.viscosity_relative_uncertainty(), 0.01, 1e-9, "given");
    assert_eq!(measured.viscosity_bound().kind, BoundKind::Given);
}

/// Our own worked numbers, to the digits printed: a body of 16 pL x 500^3, 1.185 g/mL, R_h 9 mm, sinking
/// by Stokes' law in three oils at 22 degC.
#[test]
fn a_model_sinks_through_silicone_oil() {
    for (grade, speed, digit) in [(1000, 23.62e-3, 5e-6), (12_500, 1.857e-3, 5e-7), (60_000, 0.3823e-3, 5e-8)] {
        let oil = at(&format!("silicone-oil:{grade}cSt"), 22.0);
        let weight = (1185.0 - oil.density_kg_m3()) * 16e-15 * 500f64.powi(3) * 9.80665;
        let computed = weight / (6.0 * std::f64::consts::PI * oil.viscosity_pa_s() * 9e-3);
        // Two forms of the expansion differ by 8e-6 of the density, 4e-5 of the excess weight.
        assert!((computed - speed).abs() < digit + 5e-5 * speed, "{grade}: {computed}");
    }
}

#[test]
fn every_fluid_tells_its_source_range_and_bounds() {
    for entry in CATALOGUE {
        let fluid = at(entry.example, 25.0);
        assert!(!fluid.source().is_empty() && !fluid.description().is_empty(), "{}", entry.name);
        assert!((1e-5..1.0).contains(&fluid.viscosity_relative_uncertainty()), "{}", entry.name);
        assert!((1e-6..0.1).contains(&fluid.density_relative_uncertainty()), "{}", entry.name);
        let (low, high) = fluid.validity_c().expect("a named fluid");
        for t in [low, 0.5 * (low + high), high] {
            let fluid = at(entry.example, t);
            assert!(fluid.viscosity_pa_s() > 0.0 && fluid.density_kg_m3() > 0.0, "{} at {t}", entry.name);
            let slope = fluid.viscosity_temperature_sensitivity_per_k().expect("a named fluid");
            assert_eq!(slope < 0.0, entry.name != "air", "{} at {t}", entry.name);
        }
    }
}
