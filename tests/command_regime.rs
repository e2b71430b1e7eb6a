//! `slowmote regime`: each number on the right side of its threshold, against closed forms and published values.

mod command;

use std::f64::consts::PI;

use command::{run, slowmote};
use slowmote::question::{Concern, REGIME_SCHEMA, RegimeAnswer, RegimeNumber, Verdict};

/// The answer; unknown keys are denied by its type.
fn regime(line: &str) -> RegimeAnswer {
    let run = slowmote(&format!("regime {line} --json")).ends_with(0);
    serde_json::from_str(&run.stdout).expect("the documented layout, and no key more")
}

#[track_caller]
fn number<'a>(answer: &'a RegimeAnswer, name: &str) -> &'a RegimeNumber {
    let found = answer.validity.numbers.iter().find(|number| number.name == name);
    found.unwrap_or_else(|| panic!("{name} is missing among {:?}", answer.validity.numbers))
}

#[track_caller]
fn value(line: &str, name: &str) -> f64 {
    number(&regime(line), name).value
}

#[track_caller]
fn close(value: f64, expected: f64, tolerance: f64) {
    assert!((value / expected - 1.0).abs() <= tolerance, "{value} is not {expected}");
}

/// A fluid in which 1 mPa.s and 1 g/mL make numbers that can be worked by hand.
const PLAIN: &str = "--fluid viscosity=1mPa.s,density=1g/mL";

#[test]
fn swimmers_and_flows_fall_on_the_right_side() {
    // Orders of magnitude: facts of the trade, common practice, no source; the cases are our own.
    for (line, low, high, at_best, at_worst) in [
        // A person of 1.8 m at 1 m/s: about 1e6.
        ("--size 1.8m --speed 1m/s", 1e6, 3e6, Verdict::Outside, Verdict::Outside),
        // A small fish of 3 mm at 3 mm/s: about 10.
        ("--size 3mm --speed 3mm/s", 5.0, 20.0, Verdict::Outside, Verdict::Outside),
        // A large whale of 25 m at 5 m/s: about 1e8.
        ("--size 25m --speed 5m/s --temperature 10degC", 5e7, 2e8, Verdict::Outside, Verdict::Outside),
        // A bacterium in water, 2 um at 30 um/s: about 1e-4 and below.
        ("--size 2um --speed 30um/s", 1e-5, 1e-4, Verdict::Creeping, Verdict::Creeping),
        // The same in mucus of 1 Pa.s.
        (
            "rod:2x0.8um --speed 30um/s --fluid viscosity=1Pa.s,density=1g/mL",
            1e-9,
            1e-6,
            Verdict::Creeping,
            Verdict::Creeping,
        ),
        // A boulder of 1 m sinking through lava of 1 kPa.s at 1 cm/s.
        (
            "--size 1m --speed 10mm/s --fluid viscosity=1kPa.s,density=2700kg/m3",
            0.01,
            0.1,
            Verdict::Creeping,
            Verdict::Corrected,
        ),
        // A bristle of 0.1 mm through paint of 5 Pa.s at 0.3 m/s.
        (
            "--size 0.1mm --speed 0.3m/s --fluid viscosity=5Pa.s,density=1.3g/mL",
            1e-3,
            0.1,
            Verdict::Creeping,
            Verdict::Corrected,
        ),
    ] {
        let answer = regime(line);
        let reynolds = number(&answer, "particle Reynolds number").value;
        assert!((low..=high).contains(&reynolds), "{line}: {reynolds}");
        let verdict = answer.validity.verdict.unwrap();
        assert!((at_best..=at_worst).contains(&verdict), "{line}: {verdict:?}");
        assert_eq!(answer.validity.decided_by.as_deref(), Some("particle Reynolds number"), "{line}");
    }
    // Paint of 5 Pa.s between a blade 0.5 mm above the wall and the wall, 0.1 m/s: a slot.
    let paint = regime("--in slot:height=0.5mm --flow slot:mean=0.1m/s --fluid viscosity=5Pa.s,density=1.3g/mL");
    assert!(number(&paint, "channel Reynolds number").value < 0.1);
    assert_eq!(paint.validity.verdict, Some(Verdict::Creeping));
    // Lava 5 m deep at 0.1 m/s, 1 kPa.s.
    let lava = regime("--in slot:height=5m --flow slot:mean=0.1m/s --fluid viscosity=10kPa.s,density=2700kg/m3");
    assert!(lava.validity.verdict <= Some(Verdict::Corrected), "{lava:?}");
}

#[test]
fn diameters_that_settle_at_a_reynolds_number() {
    // Recomputed from Stokes's law for water at 20 degC, 1.0016 mPa.s (IAPWS) and 998.2 kg/m3 (Kell): the diameter, um, at
    // which the Stokes Reynolds number is 0.1 and 0.5. Two to three digits, and Re goes as the third power: 3.5 %.
    for (density, tenth, half) in [("1.05", 153, 261), ("1.19", 99, 169), ("2.0", 57, 97), ("2.65", 48, 82)] {
        for (diameter, expected) in [(tenth, 0.1), (half, 0.5)] {
            let answer = regime(&format!("--size {diameter}um --body-density {density}g/mL"));
            let reynolds = number(&answer, "particle Reynolds number of settling").value;
            close(reynolds, expected, 0.035);
            close(number(&answer, "Archimedes number").value, 18.0 * reynolds, 1e-12);
        }
    }
    // 2 (drho) g a^2 / (9 mu), Stokes 1851.
    let answer = regime(&format!("--size 10um --body-density 1.1g/mL {PLAIN}"));
    let speed = answer.motions[0].speed_at_most_m_per_s.unwrap();
    close(speed, 2.0 / 9.0 * 100.0 * 9.80665 * 25e-12 / 1e-3, 1e-12);
    assert_eq!(answer.motions[0].speed_at_least_m_per_s, Some(speed));
    assert!(regime(&format!("--size 10um --body-density 0.9g/mL {PLAIN}")).motions[0].force_n.unwrap() < 0.0);
}

#[test]
fn a_force_needs_no_shape() {
    // rho F / (3 pi mu^2), whatever the body.
    let expected = 1000.0 * 2e-12 / (3.0 * PI * 1e-6);
    let name = "particle Reynolds number of the force";
    for body in ["", "sphere:10um", "rod:12x2um", "geometries/block.stl --unit um"] {
        let answer = regime(&format!("{body} --force 2pN {PLAIN}"));
        let reynolds = number(&answer, name);
        close(reynolds.value, expected, 1e-12);
        assert_eq!(reynolds.value_at_best, None);
        // At 0.05 by definition.
        close(answer.validity.force_limit_n, 0.05 * 3.0 * PI * 1e-9, 1e-12);
    }
    let text = slowmote("regime rod:12x2um --force 2pN").ends_with(0).stdout.replace("\n              ", " ");
    assert!(text.contains("exact for any shape"), "{text}");
}

#[test]
fn the_bracket_of_a_shape_holds_what_is_solved() {
    for body in ["rod:12x2um", "disc:8x1um", "cube:5um", "redcell:7.82um", "geometries/bracket.stl --unit um"] {
        let bounds = regime(body).body.unwrap();
        let run = slowmote(&format!("drag {body} --accuracy 5% --json")).ends_with(0);
        let solved: slowmote::question::DragAnswer = serde_json::from_str(&run.stdout).unwrap();
        let (low, high) = (bounds.hydrodynamic_radius_at_least_m, bounds.hydrodynamic_radius_at_most_m);
        let largest = solved.principal.unwrap().drag_n_s_per_m[2] / (6.0 * PI * solved.fluid.viscosity_pa_s);
        let mean = solved.hydrodynamic_radius_m.unwrap();
        assert!(low < mean && largest < high && high < 2.5 * low, "{body}: {low:e} {mean:e} {largest:e} {high:e}");
    }
    // The larger end is the one that is judged.
    let answer = regime("rod:12x2um --speed 1mm/s");
    let reynolds = number(&answer, "particle Reynolds number");
    assert!(reynolds.value_at_best.unwrap() < reynolds.value);
    let limit = answer.validity.speed_limit_m_per_s.unwrap();
    close(reynolds.value / 1e-3 * limit, 0.05, 1e-12);
}

#[test]
fn channels_have_the_pressure_and_shear_of_closed_forms() {
    // Hagen and Poiseuille: 128 mu L Q / (pi D^4), 32 Q / (pi D^3).
    let tube = regime(&format!("--in tube:diameter=50um,length=2cm --flow tube:rate=1nL/s {PLAIN}")).channel.unwrap();
    let d = 50e-6_f64;
    close(tube.pressure_drop_pa.unwrap(), 128.0 * 1e-3 * 0.02 * 1e-12 / (PI * d.powi(4)), 1e-9);
    close(tube.wall_shear_rate_per_s.unwrap(), 32.0 * 1e-12 / (PI * d.powi(3)), 1e-9);
    close(tube.largest_speed_m_per_s.unwrap(), 2.0 * tube.mean_speed_m_per_s.unwrap(), 1e-9);
    // Plane Poiseuille: 12 mu U / h^2, 6 U / h.
    let slot = regime(&format!("--in slot:height=20um --flow slot:mean=1mm/s {PLAIN}")).channel.unwrap();
    close(slot.pressure_gradient_pa_per_m.unwrap(), 12.0 * 1e-6 / 4e-10, 1e-9);
    close(slot.wall_shear_rate_per_s.unwrap(), 300.0, 1e-9);
    assert_eq!((slot.pressure_drop_pa, slot.flow_rate_m3_per_s, slot.width_m), (None, None, None));
    // Square duct: Darcy f Re = 2 D_h^2 G / (mu U) = 56.908 (Shah and London 1978, five digits, from memory).
    let duct = regime(&format!("--in duct:width=40um,height=40um --flow duct:mean=1mm/s {PLAIN}")).channel.unwrap();
    close(2.0 * 1.6e-9 * duct.pressure_gradient_pa_per_m.unwrap() / 1e-6, 56.908, 2e-5);
    // The walls hold back the pressure: G D_h / (4 mu) in the mean.
    let mean_shear = duct.pressure_gradient_pa_per_m.unwrap() * 40e-6 / 4e-3;
    close(duct.mean_wall_shear_rate_per_s.unwrap(), mean_shear, 1e-12);
    assert!(duct.wall_shear_rate_per_s.unwrap() > mean_shear);
    // Entry: D_h [0.6 / (1 + 0.035 Re) + 0.056 Re] (Shah and London 1978), here at Re 0.04.
    close(duct.reynolds.unwrap(), 0.04, 1e-9);
    close(duct.entry_length_m.unwrap(), 40e-6 * (0.6 / 1.0014 + 0.00224), 1e-9);
}

#[test]
fn numbers_of_channels() {
    let line =
        format!("--in tube:diameter=1mm,length=1m,bend-radius=50mm --flow tube:mean=0.1m/s --frequency 1Hz {PLAIN}");
    let answer = regime(&line);
    // Re 100, De = 100 sqrt(1/100) = 10, Wo = 0.5e-3 sqrt(2 pi / 1e-6), by hand.
    close(number(&answer, "channel Reynolds number").value, 100.0, 1e-9);
    close(number(&answer, "Dean number").value, 10.0, 1e-9);
    close(number(&answer, "Womersley number").value, 0.5e-3 * (2.0 * PI / 1e-6).sqrt(), 1e-9);
    close(number(&answer, "entry length over channel length").value, 1e-3 * (0.6 / 4.5 + 5.6), 1e-9);
    // Laminar up to about 2000: common practice, no source.
    let verdict = |speed: &str| {
        regime(&format!("--in tube:diameter=1mm --flow tube:mean={speed} {PLAIN}")).validity.verdict.unwrap()
    };
    assert_eq!(verdict("0.5mm/s"), Verdict::Creeping);
    assert_eq!(verdict("1.9m/s"), Verdict::Corrected);
    assert_eq!(verdict("3m/s"), Verdict::Doubtful);
    assert_eq!(verdict("5m/s"), Verdict::Outside);
}

#[test]
fn a_bead_that_is_focused() {
    // d/D_h = 0.2, Re_c = 50: Re_c (d/D_h)^2 = 2; L_f = pi mu D_h^2 / (rho U_max d^2 0.05) = pi 25e-6/(1 x 0.05) = 1.57 mm.
    let line = format!("--size 10um --in tube:diameter=50um,length=2cm --flow tube:mean=1m/s {PLAIN}");
    let answer = regime(&line);
    close(number(&answer, "inertial focusing number").value, 2.0, 1e-9);
    let length = PI * 1e-3 * 2500e-12 / (1000.0 * 2.0 * 1e-10 * 0.05);
    close(number(&answer, "channel length over focusing length").value, 0.02 / length, 1e-9);
    assert_eq!(answer.validity.path_verdict, Some(Verdict::Outside));
    // rho gamma a^2 / mu with gamma = 8 U / D: 4.
    close(number(&answer, "shear Reynolds number").value, 4.0, 1e-9);
    assert_eq!(answer.validity.verdict, Some(Verdict::Outside));
    // Small bodies are not.
    let small = regime(&format!("--size 1um --in tube:diameter=50um --flow tube:mean=1mm/s {PLAIN}"));
    assert!(small.validity.numbers.iter().all(|number| number.name != "inertial focusing number"));
}

#[test]
fn numbers_of_bodies() {
    let of = |options: &str, name: &str| value(&format!("sphere:10um {options} {PLAIN}"), name);
    close(of("--speed 1mm/s", "particle Reynolds number"), 0.01, 1e-9);
    close(of("--flow uniform:1mm/s", "particle Reynolds number of the flow"), 0.01, 1e-9);
    close(of("--spin 100/s", "rotation Reynolds number"), 100.0 * 25e-12 / 1e-6, 1e-9);
    close(of("--flow shear:100/s", "shear Reynolds number"), 100.0 * 25e-12 / 1e-6, 1e-9);
    close(of("--frequency 10Hz", "unsteady number"), 5e-6 / (1e-6_f64 / (10.0 * PI)).sqrt(), 1e-9);
    close(of("--speed 1mm/s --stiffness 5uN/m", "capillary number"), 1e-6 / 5e-6, 1e-9);
    close(of("--flow shear:100/s --stiffness 5uN/m", "capillary number"), 1e-3 * 100.0 * 5e-6 / 5e-6, 1e-9);
    close(of("--flow shear:100/s --stiffness 1kPa", "capillary number"), 1e-4, 1e-9);
    close(of("--body-density 1.1g/mL --stiffness 5uN/m", "Bond number"), 100.0 * 9.80665 * 25e-12 / 5e-6, 1e-9);
    close(of("--concentration 2%", "volume fraction"), 0.02, 1e-12);
    close(of("--gap 200nm --roughness 10nm", "roughness over gap"), 0.05, 1e-12);
    // U a 6 pi mu a / kT (Stokes and Einstein), k exact (SI 2019), 20 degC.
    let expected = 1e-6 * 5e-6 * 6.0 * PI * 1e-3 * 5e-6 / (1.380649e-23 * 293.15);
    close(of("--speed 1um/s", "Peclet number"), expected, 1e-9);
    // (m + m_added) / (6 pi mu a) = (2.5 + 0.5) 2 a^2 / (9 nu), times 2 pi f.
    close(
        of("--body-density 2.5g/mL --frequency 10Hz", "particle Stokes number"),
        20.0 * PI * 3.0 * 2.0 * 25e-12 / 9e-6,
        1e-9,
    );
    // Kim et al. 2005 at 1 um: 1.1568, at 23 degC where the mean free path is 67.3 nm.
    let air = regime("sphere:1um --fluid air --temperature 23degC");
    close(number(&air, "Knudsen number").value, 2.0 * 0.0673, 1e-4);
    assert_eq!(air.validity.verdict, Some(Verdict::Doubtful));
    assert!(number(&air, "Knudsen number").meaning.contains("1.16"));
}

#[test]
fn convection_is_as_fast_as_a_red_cell_settles() {
    // g beta dT W^2 / (72 sqrt3 nu): 1 mm and 0.1 K in water, 1.6 um/s (recomputed, two digits).
    let answer = regime("redcell:7.82um --material red-cell --temperature-difference 0.1K --chamber 1mm");
    close(answer.convection_speed_m_per_s.unwrap(), 1.6e-6, 0.03);
    let number = number(&answer, "thermal convection over speed");
    assert!((0.5..2.0).contains(&number.value) && number.concerns == Concern::Path);
    // It does not touch the flow itself.
    assert_eq!(answer.validity.verdict, Some(Verdict::Creeping));
    assert!(answer.validity.path_verdict >= Some(Verdict::Doubtful));
}

#[test]
fn brownian_motion_is_no_flaw_of_the_flow() {
    let answer = regime("--size 200nm --body-density 1.05g/mL");
    assert_eq!(answer.validity.verdict, Some(Verdict::Creeping));
    assert_eq!(answer.validity.path_decided_by.as_deref(), Some("Peclet number"));
    assert_eq!(number(&answer, "Peclet number").verdict, Verdict::Outside);
    assert!(number(&answer, "Peclet number").meaning.contains("rules"));
}

#[test]
fn uncertain_inputs_go_into_each_number() {
    let answer = regime("--size 10±0.5um --speed 1±0.02mm/s --fluid viscosity=1±0.03mPa.s,density=1g/mL");
    let reynolds = number(&answer, "particle Reynolds number");
    // First order in quadrature; 1/(1 - 0.03) is what a shift of 3 % does at most.
    let viscosity: f64 = 1.0 / 0.97 - 1.0;
    close(reynolds.relative_uncertainty.unwrap(), 0.05_f64.hypot(0.02).hypot(viscosity), 1e-9);
    assert_eq!(reynolds.largest_uncertainty.as_deref(), Some("the size of the body"));
    // A duct's pressure goes as the third power of its height, and more.
    let duct = regime(&format!("--in duct:width=1mm,height=40±0.4um --flow duct:rate=1uL/s {PLAIN}")).channel.unwrap();
    assert!((0.03..0.032).contains(&duct.pressure_relative_uncertainty.unwrap()), "{duct:?}");
    // A small difference of densities is uncertain beyond its size.
    let floating = regime(&format!("--size 10um --body-density 1±0.01g/mL {PLAIN}"));
    assert_eq!(number(&floating, "Archimedes number").relative_uncertainty, None);
    assert_eq!(number(&floating, "Archimedes number").value, 0.0);
}

#[test]
fn a_close_call_is_told() {
    let answer = regime("--size 153um --body-density 1.05±0.04g/mL");
    let reynolds = number(&answer, "particle Reynolds number of settling");
    assert_eq!((reynolds.verdict, reynolds.may_be), (Verdict::Corrected, Some(Verdict::Creeping)));
    let notes = answer.validity.notes.join(" ");
    assert!(notes.contains("may also be creeping") && notes.contains("the density of the body"), "{notes}");
    let sure = regime("--size 100um --body-density 1.05g/mL");
    assert!(sure.validity.numbers.iter().all(|number| number.may_be.is_none()), "{sure:?}");
}

#[test]
fn what_was_not_told_is_told() {
    let answer = regime("rod:12x2um");
    assert_eq!((answer.validity.verdict, &answer.validity.decided_by), (None, &None));
    assert!(answer.validity.numbers.is_empty() && answer.motions.is_empty() && answer.channel.is_none());
    let left: Vec<&str> = answer.questions_left.iter().map(|left| left.what.as_str()).collect();
    assert!(left.contains(&"--speed or --force") && left.contains(&"--frequency"), "{left:?}");
    let text = slowmote("regime rod:12x2um").ends_with(0).stdout;
    assert!(text.contains("verdict     none") && text.contains("not told"), "{text}");
    let channel = regime("--in tube:diameter=50um").channel.unwrap();
    assert_eq!((channel.mean_speed_m_per_s, channel.speed_relative_uncertainty), (None, None));
    assert_eq!(regime("--force 1pN").schema, REGIME_SCHEMA);
}

#[test]
fn cautions_where_one_viscosity_is_not_enough() {
    let cautions = |line: &str| regime(line).cautions.join(" ");
    let mucus = cautions("--size 2um --speed 20um/s --fluid viscosity=1Pa.s,density=1g/mL");
    assert!(mucus.contains("One viscosity does not describe") && mucus.contains("20 /s"), "{mucus}");
    assert!(
        cautions("redcell:7.82um --fluid plasma --temperature 37degC")
            .contains("one viscosity does not describe plasma")
    );
    assert!(
        cautions("--in tube:diameter=1mm --fluid viscosity=4mPa.s,density=1.06g/mL").contains("below a yield stress")
    );
    assert!(!cautions("--size 2um --speed 20um/s").contains("One viscosity"));
    let spun = cautions("--size 8um --material white-cell --centrifuge g=300");
    assert!(spun.contains("rated speed") && spun.contains("licensed practitioners") && spun.contains("soft"), "{spun}");
    assert_eq!(spun.matches("licensed practitioners").count(), 1);
}

#[test]
fn a_centrifuge_stands_for_gravity() {
    let settling = |options: &str| regime(&format!("--size 1um --body-density 1.1g/mL {PLAIN} {options}"));
    let speed = |options: &str| settling(options).motions[0].speed_at_most_m_per_s.unwrap();
    close(speed("--centrifuge g=1000"), 1000.0 * speed(""), 1e-9);
    close(settling("--centrifuge rpm=3000,radius=80mm").acceleration_m_per_s2, (100.0 * PI).powi(2) * 0.08, 1e-9);
    close(speed("--gravity 1.62m/s2"), 1.62 / 9.80665 * speed(""), 1e-9);
}

#[test]
fn strict_is_told_by_the_exit_code() {
    slowmote("regime --size 1mm --speed 1m/s").ends_with(0);
    slowmote("regime --size 1mm --speed 1m/s --strict").ends_with(4);
    slowmote("regime --size 1um --speed 1um/s --strict").ends_with(0);
    // The path is not the flow.
    slowmote("regime --size 100nm --body-density 1.05g/mL --strict").ends_with(0);
    assert_eq!(slowmote("regime --size 1um --speed 1um/s --quiet").ends_with(0).stdout, "");
}

#[test]
fn the_text_begins_with_the_verdict_and_what_decides() {
    let run = slowmote("regime --size 153um --body-density 1.05g/mL").ends_with(0);
    let lines: Vec<&str> = run.stdout.lines().collect();
    assert_eq!(lines[0], "a body of 153 um in water at 20 degC");
    assert!(
        lines[2].starts_with("  verdict     corrected: the particle Reynolds number of settling 0.10"),
        "{}",
        lines[2]
    );
    for piece in ["taken as a sphere", "taken as water at 20 degC", "settles", "Archimedes number 1.8"] {
        assert!(run.stdout.contains(piece), "`{piece}` is missing in\n{}", run.stdout);
    }
}

#[test]
fn a_case_file_is_read() {
    let answer = regime("examples/cases/settled-cell.json --body-density 1.1g/mL");
    assert_eq!((answer.fluid.name.as_str(), answer.fluid.temperature_c), ("pbs", 25.0));
    assert_eq!(answer.body.unwrap().name, "red cell, tilted");
    // A computation of our own: 1.4 to 1.7 um/s with a difference of 0.0945 g/mL.
    let motion = &answer.motions[0];
    assert!(motion.speed_at_least_m_per_s.unwrap() < 1.4e-6 && motion.speed_at_most_m_per_s.unwrap() > 1.7e-6);
}

#[test]
fn what_does_not_fit_together_is_refused_with_a_hint() {
    let refused = |options: &str, code: i32, pieces: &[&str]| {
        slowmote(&format!("regime {options}")).refuses(code, pieces);
    };
    refused("", 1, &["neither a body nor a channel", "hint: ", "--size 10um"]);
    refused("--speed 1mm/s", 1, &["a speed needs a body", "hint: "]);
    refused("--size 1um --in slot:height=20um --flow tube:mean=1mm/s", 1, &["through a tube", "slot", "hint: "]);
    refused("--size 1um --flow tube:mean=1mm/s", 1, &["needs the tube", "hint: ", "--in tube:diameter=50um"]);
    refused("--size 1um --in slot:height=20um --flow shear:1/s", 1, &["does not obey the walls", "hint: "]);
    refused("--in slot:height=20um --flow slot:rate=1uL/min", 1, &["a slot has no width", "hint: ", "duct"]);
    refused("--size 60um --in tube:diameter=50um", 1, &["does not fit", "60.0 um", "50.0 um", "hint: "]);
    refused("--size 1um --temperature-difference 1K", 1, &["needs the width of the chamber", "--chamber 1mm"]);
    refused("--size 1um --centrifuge g=100", 1, &["needs the density of the body", "hint: "]);
    refused("--size 1um --gap 1um", 1, &["a gap needs the roughness", "hint: "]);
    refused("--size 1um --material stel", 1, &["steel", "hint: "]);
    refused("missing.stl --unit um", 1, &["missing.stl", "hint: "]);
    refused("geometries/block.stl", 1, &["unit", "--unit"]);
    refused("sphere:1um --size 1um", 2, &["--size"]);
    refused("--size 1um --body-density 1g/mL --material steel", 2, &["--material"]);
    refused("--size 1um --centrifuge g=1 --gravity 1m/s2", 2, &["--gravity"]);
    refused("--size 10", 2, &["no unit"]);
    refused("--size 1e9m", 2, &["lengths from"]);
    refused("--size 1um --speed 1um", 2, &["a length", "a speed"]);
    refused("--size 1um --frequency 10rad/s", 2, &["an angular speed", "10Hz"]);
    refused("--size 1um --stiffness 1mPa.s", 2, &["5uN/m", "1kPa"]);
    refused("--size 1um --concentration 2g/L", 2, &["share of the volume"]);
    refused("--size 1um --concentration 2", 2, &["all of the volume"]);
    refused("--in tube:radius=1mm", 2, &["has no `radius`", "diameter"]);
    refused("--in duct:width=1mm", 2, &["height of the duct is missing"]);
    refused("--in tube:diameter=1mm --flow tube:mean=1um", 2, &["a length", "a speed"]);
    refused("--in tube:diameter=1e-300m --flow tube:rate=1e300m3/s", 1, &["the powers of ten"]);
    refused("--size 1um --temperature-difference 25degC --speed 1e-5", 2, &["no unit"]);
}

#[test]
fn outputs_go_where_they_are_sent() {
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("a.json");
    let option = format!("--json={}", path.display());
    let text = run(["regime", "--force", "1pN", &option]).ends_with(0).stdout;
    assert!(text.contains("creeping"));
    let written: RegimeAnswer = serde_json::from_str(&std::fs::read_to_string(path).unwrap()).unwrap();
    assert_eq!(written.validity.verdict, Some(Verdict::Creeping));
}
