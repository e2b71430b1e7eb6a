//! The JSON of `drag` and `fluid`: every key is there, nothing else is, and it means what the text says.

mod command;

use command::{run, slowmote};
use serde_json::Value;
use slowmote::question::{DRAG_SCHEMA, DragAnswer, FLUID_SCHEMA, FluidCatalogue, FluidReport, Verdict};

fn drag(line: &str) -> DragAnswer {
    let run = slowmote(&format!("drag {line} --json")).ends_with(0);
    serde_json::from_str(&run.stdout).expect("the documented layout, and no key more")
}

fn keys(value: &Value) -> Vec<&str> {
    let mut keys = value.as_object().expect("an object").keys().map(String::as_str).collect::<Vec<_>>();
    keys.sort_unstable();
    keys
}

/// The layout that programs rely on. A key may be added here; none may go or change its meaning under this schema.
#[test]
fn the_keys_of_drag_are_those_documented() {
    let run = slowmote("drag sphere:10um --elements 32 --speed 1mm/s --json").ends_with(0);
    let answer: Value = serde_json::from_str(&run.stdout).unwrap();
    let documented = [
        "bodies",
        "body",
        "cautions",
        "centre_of_mobility_m",
        "centre_of_resistance_m",
        "diffusion",
        "flow",
        "fluid",
        "grand_mobility",
        "grand_resistance",
        "hydrodynamic_radius_m",
        "mobility",
        "motion",
        "principal",
        "reference_point_m",
        "relative_error",
        "resistance",
        "schema",
        "solver",
        "surroundings",
        "validity",
    ];
    assert_eq!(keys(&answer), documented);
    assert_eq!(keys(&answer["body"]), ["area_m2", "centroid_m", "name", "notes", "size_m", "triangles", "volume_m3"]);
    assert_eq!(
        keys(&answer["fluid"]),
        ["density_kg_m3", "name", "relative_uncertainty", "source", "temperature_c", "viscosity_pa_s"]
    );
    assert_eq!(
        keys(&answer["resistance"]),
        ["force_rotation_n_s", "force_velocity_n_s_per_m", "torque_rotation_n_m_s", "torque_velocity_n_s"]
    );
    assert_eq!(
        keys(&answer["mobility"]),
        ["rotation_force_per_n_s", "rotation_torque_per_n_m_s", "velocity_force_m_per_n_s", "velocity_torque_per_n_s"]
    );
    assert_eq!(keys(&answer["diffusion"]), ["rotation_per_s", "translation_m2_per_s"]);
    assert_eq!(
        keys(&answer["relative_error"]),
        [
            "accuracy_asked",
            "accuracy_reached",
            "coupling",
            "force",
            "geometry",
            "input_shares",
            "inputs",
            "torque",
            "total"
        ]
    );
    assert_eq!(
        keys(&answer["motion"]),
        [
            "force_error_n",
            "force_n",
            "force_with_inertia_n",
            "rotation_per_s",
            "torque_error_n_m",
            "torque_n_m",
            "velocity_m_per_s",
        ]
    );
    assert_eq!(
        keys(&answer["validity"]),
        ["decided_by", "inertial_drag_excess", "notes", "numbers", "reynolds", "speed_limit_m_per_s", "verdict"]
    );
    assert_eq!(keys(&answer["validity"]["numbers"][0]), ["meaning", "name", "threshold", "value", "verdict"]);
    assert_eq!(
        keys(&answer["solver"]),
        ["condition", "mesh", "method", "residual", "seconds", "triangles", "unknowns", "version"]
    );
    assert_eq!(answer["schema"], DRAG_SCHEMA);
    for absent in ["bodies", "flow", "surroundings", "grand_resistance", "grand_mobility"] {
        assert_eq!(answer[absent], Value::Null, "{absent} does not apply, so it is null");
    }
}

#[test]
fn what_was_not_asked_for_is_null() {
    let answer = drag("sphere:10um --elements 32");
    assert_eq!(answer.motion, None);
    let validity = &answer.validity;
    assert_eq!((validity.verdict, validity.reynolds, &validity.decided_by), (None, None, &None));
    assert!(validity.speed_limit_m_per_s.is_some() && validity.numbers.is_empty());
    // Too few elements to tell an error from: no bound is better than a wrong one.
    assert_eq!((answer.relative_error.force, answer.relative_error.total), (None, None));
    // A fixed mesh is asked for no accuracy.
    assert_eq!(answer.relative_error.accuracy_asked, None);
}

/// Stokes 1851: 6 pi mu a and 8 pi mu a^3, exact. The error stated must cover the difference.
#[test]
fn a_sphere_has_the_drag_of_stokes() {
    let answer = drag("sphere:10um --fluid viscosity=2mPa.s,density=1g/mL --elements 128");
    let (radius, viscosity) = (5e-6, 2e-3);
    let drag = 6.0 * std::f64::consts::PI * viscosity * radius;
    let turning = 8.0 * std::f64::consts::PI * viscosity * radius * radius * radius;
    let error = &answer.relative_error;
    let off = |value: f64, exact: f64| (value / exact - 1.0).abs();
    for k in 0..3 {
        assert!(off(answer.resistance.unwrap().force_velocity_n_s_per_m[k][k], drag) <= error.force.unwrap());
        assert!(off(answer.resistance.unwrap().torque_rotation_n_m_s[k][k], turning) <= error.torque.unwrap());
    }
    assert!(off(answer.hydrodynamic_radius_m.unwrap(), radius) <= error.force.unwrap());
    assert!(error.force.unwrap() < 1e-2, "{error:?}");
    assert_eq!((error.inputs, error.geometry), (0.0, Some(0.0)));
    // D = kT / (6 pi mu a), Einstein 1905, with k exact (SI 2019) at 20 degC.
    let diffusion = 1.380649e-23 * 293.15 / drag;
    assert!(off(answer.diffusion.unwrap().translation_m2_per_s[1][1], diffusion) <= error.force.unwrap());
    let volume = 4.0 / 3.0 * std::f64::consts::PI * radius.powi(3);
    assert!(off(answer.body.as_ref().unwrap().volume_m3, volume) < 1e-12);
    assert!(off(answer.principal.unwrap().mean.unwrap().dynamic_shape_factor, 1.0) <= error.force.unwrap());
}

#[test]
fn the_mobility_inverts_the_resistance_in_si_units() {
    let answer = drag("rod:6x2um --turn 40deg@1,2,3 --reference 1um,2um,-1um --elements 100");
    let blocks = (&answer.resistance.unwrap(), &answer.mobility.unwrap());
    let entry = |row: usize, column: usize| {
        let (r, m) = blocks;
        let resistance = |i: usize, k: usize| match (i < 3, k < 3) {
            (true, true) => r.force_velocity_n_s_per_m[i][k],
            (true, false) => r.force_rotation_n_s[i][k - 3],
            (false, true) => r.torque_velocity_n_s[i - 3][k],
            (false, false) => r.torque_rotation_n_m_s[i - 3][k - 3],
        };
        let mobility = |k: usize, j: usize| match (k < 3, j < 3) {
            (true, true) => m.velocity_force_m_per_n_s[k][j],
            (true, false) => m.velocity_torque_per_n_s[k][j - 3],
            (false, true) => m.rotation_force_per_n_s[k - 3][j],
            (false, false) => m.rotation_torque_per_n_m_s[k - 3][j - 3],
        };
        (0..6).map(|k| resistance(row, k) * mobility(k, column)).sum::<f64>()
    };
    for row in 0..6 {
        for column in 0..6 {
            // Off-diagonal blocks have a length as unit: micrometres are the natural one.
            let unit = 1e-6_f64.powi(i32::from(row >= 3) - i32::from(column >= 3));
            let expected = f64::from(u8::from(row == column));
            assert!((entry(row, column) / unit - expected).abs() < 1e-9, "({row}, {column})");
        }
    }
    assert_eq!(answer.reference_point_m, Some([1e-6, 2e-6, -1e-6]));
    // The centre of a body with three planes of symmetry is its centroid, wherever torques are told about.
    for centre in [answer.centre_of_resistance_m.unwrap(), answer.centre_of_mobility_m.unwrap()] {
        assert!(centre.iter().all(|x| x.abs() < 1e-3 * 6e-6), "{centre:?}");
    }
}

#[test]
fn a_motion_feels_the_opposite_of_what_the_body_exerts() {
    let answer = drag("ellipsoid:6x4x2um --elements 100 --speed 50um/s --along -z --spin 10/s --about y");
    let motion = answer.motion.unwrap();
    assert_eq!(motion.velocity_m_per_s, [0.0, 0.0, -5e-5]);
    assert_eq!(motion.rotation_per_s, [0.0, 10.0, 0.0]);
    let drag = answer.resistance.unwrap().force_velocity_n_s_per_m[2][2];
    assert!(motion.force_n[2] > 0.0 && (motion.force_n[2] / (drag * 5e-5) - 1.0).abs() < 1e-6);
    assert!(motion.torque_n_m[1] < 0.0);
    assert!(motion.force_error_n.unwrap() < 0.05 * motion.force_n[2]);
    // The law of inertia is one of translation.
    assert_eq!(motion.force_with_inertia_n, None);
    assert_eq!(answer.validity.numbers.len(), 2);
}

#[test]
fn the_verdict_follows_the_reynolds_number() {
    // Re_h = 2 rho U a / mu = 10 U[m/s] for a sphere of 10 um in a fluid of 1 mPa.s and 1 g/mL.
    let at = |speed: &str| {
        drag(&format!("sphere:10um --fluid viscosity=1mPa.s,density=1g/mL --elements 32 --speed {speed}"))
    };
    for (speed, verdict) in [
        ("1mm/s", Verdict::Creeping),
        ("20mm/s", Verdict::Corrected),
        ("70mm/s", Verdict::Doubtful),
        ("200mm/s", Verdict::Outside),
    ] {
        assert_eq!(at(speed).validity.verdict, Some(verdict), "{speed}");
    }
    let corrected = at("20mm/s");
    let (reynolds, excess) = (corrected.validity.reynolds.unwrap(), corrected.validity.inertial_drag_excess.unwrap());
    // Oseen 1910: 3/16 Re. The solved drag of 32 triangles is within 1 % of Stokes's.
    assert!((reynolds - 0.2).abs() < 0.002 && (excess - 3.0 / 16.0 * reynolds).abs() < 1e-4);
    let motion = corrected.motion.unwrap();
    assert!((motion.force_with_inertia_n.unwrap()[0] / motion.force_n[0] - 1.0 - excess).abs() < 1e-6);
    assert!((corrected.validity.speed_limit_m_per_s.unwrap() - 0.005).abs() < 5e-5);
}

#[test]
fn uncertain_inputs_go_into_the_error() {
    let certain = drag("sphere:10um --fluid viscosity=1mPa.s,density=1g/mL --elements 80").relative_error;
    assert_eq!(certain.inputs, 0.0);
    let uncertain = drag("sphere:10±0.3um --fluid viscosity=1±0.04mPa.s,density=1g/mL --elements 80").relative_error;
    // Torque goes as the cube of the size; independent inputs add in quadrature.
    assert!((uncertain.inputs - 0.09_f64.hypot(0.04)).abs() < 1e-12);
    assert!((uncertain.total.unwrap() - certain.total.unwrap() - uncertain.inputs).abs() < 1e-12);
    assert_eq!(uncertain.input_shares[0].name, "size of the body");
}

#[test]
fn coarse_geometry_is_owned_up_to() {
    let exact = drag("sphere:10um --elements 200").relative_error;
    let run = slowmote("drag sphere:10um --elements 200 --geometry flat --json").ends_with(0);
    let flat: DragAnswer = serde_json::from_str(&run.stdout).unwrap();
    assert_eq!(exact.geometry, Some(0.0));
    // Inscribed flat triangles are smaller than the sphere: the error stated must cover what they miss.
    let missing = 1.0 - flat.hydrodynamic_radius_m.unwrap() / 5e-6;
    assert!(missing > 0.0 && missing < flat.relative_error.total.unwrap());
    let torque = 8.0 * std::f64::consts::PI * flat.fluid.viscosity_pa_s * 125e-18;
    let missing = 1.0 - flat.resistance.unwrap().torque_rotation_n_m_s[0][0] / torque;
    assert!(missing > 0.0 && missing < flat.relative_error.total.unwrap());
}

#[test]
fn both_factorisations_agree_and_say_which_ran() {
    let lu = drag("box:3x2x1um --elements 200 --factor lu");
    let cholesky = drag("box:3x2x1um --elements 200 --factor cholesky");
    assert!(lu.solver.method.contains("LU") && cholesky.solver.method.contains("Cholesky"));
    let [a, b] = [&lu, &cholesky].map(|answer| answer.hydrodynamic_radius_m.unwrap());
    assert!((a / b - 1.0).abs() < 1e-9);
}

#[test]
fn air_slips_along_small_bodies() {
    let answer = drag("sphere:1um --fluid air --elements 32");
    // 2 x 66.4 nm / 1 um is beyond 0.1.
    assert_eq!(answer.validity.verdict, Some(Verdict::Doubtful));
    assert_eq!(answer.validity.decided_by.as_deref(), Some("Knudsen number"));
}

#[test]
fn a_fluid_is_read_back_too() {
    let report = run(["fluid", "water", "--temperature", "25degC", "--json"]).ends_with(0);
    let report: FluidReport = serde_json::from_str(&report.stdout).unwrap();
    assert_eq!(report.schema, FLUID_SCHEMA);
    // IAPWS R12-08 at 25 degC: 0.8900 mPa.s; Kell 1975: 997.05 kg/m3.
    assert!((report.viscosity_pa_s - 0.8900e-3).abs() < 1e-7);
    assert!((report.density_kg_m3 - 997.05).abs() < 0.01);
    assert!(report.relative_uncertainty > 0.0 && !report.source.is_empty());
    let list = run(["fluid", "--json"]).ends_with(0);
    let list: FluidCatalogue = serde_json::from_str(&list.stdout).unwrap();
    assert!(list.fluids.iter().any(|fluid| fluid.name == "glycerol"));
}
