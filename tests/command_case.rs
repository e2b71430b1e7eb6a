//! Case files in the place of BODY.

mod command;

use std::fs;

use command::{run, slowmote};
use slowmote::question::DragAnswer;
use tempfile::tempdir;

fn answer(line: &str) -> DragAnswer {
    serde_json::from_str(&slowmote(line).ends_with(0).stdout).unwrap()
}

#[test]
fn a_case_asks_what_the_options_ask() {
    let case = answer("drag examples/cases/settled-cell.json --elements 144 --json");
    let options = answer("drag redcell:7.82um --fluid pbs --temperature 25degC --turn 30deg@y --elements 144 --json");
    assert_eq!(case.body.as_ref().unwrap().name, "red cell, tilted");
    assert_eq!(case.resistance, options.resistance);
    assert_eq!(case.fluid.viscosity_pa_s, options.fluid.viscosity_pa_s);
}

#[test]
fn a_surface_file_counts_from_the_folder_of_the_case() {
    let case = answer("drag examples/cases/bracket-in-oil.json --elements 80 --json");
    assert_eq!(case.body.as_ref().unwrap().name, "angle bracket");
    // 20 x 6 + 6 x 10 um2, 8 um high.
    assert!((case.body.as_ref().unwrap().volume_m3 / 1.44e-15 - 1.0).abs() < 1e-9);
    assert!((case.body.as_ref().unwrap().centroid_m[2] - 12e-6).abs() < 1e-12);
    assert!((case.fluid.viscosity_pa_s - 0.097).abs() < 1e-12);
}

#[test]
fn options_override_the_case() {
    let line =
        "drag examples/cases/settled-cell.json --elements 144 --json --fluid water --temperature 37degC --turn 0deg@x";
    let case = answer(line);
    assert!(case.fluid.name.starts_with("water") && (case.fluid.temperature_c - 37.0).abs() < 1e-9);
    let flat = answer("drag redcell:7.82um --fluid water --temperature 37degC --elements 144 --json");
    assert_eq!(case.resistance, flat.resistance);
}

#[test]
fn what_a_case_can_not_be_is_told() {
    let folder = tempdir().unwrap();
    let bodies = r#""bodies": [{"surface": "sphere:2um"}]"#;
    let deep = "[".repeat(100_000);
    let cases = [
        ("", "is not a case file"),
        ("{", "is not a case file"),
        ("[1, 2]", "is not a case file"),
        (&deep, "is not a case file"),
        ("{\"bodies\": []}", "names no body"),
        (&format!("{{{bodies}, \"wind\": 1}}"), "unknown field `wind`"),
        (&format!("{{{bodies}, \"surroundings\": [\"plane:z=-3um\"]}}"), "plane:z=-3um"),
        (&format!("{{{bodies}, \"flow\": \"shear:10/s\"}}"), "shear:10/s"),
        (&format!("{{{bodies}, \"fluid\": {{\"temperature\": \"25degC\"}}}}"), "viscosity and density"),
        (&format!("{{{bodies}, \"fluid\": {{\"name\": \"watr\"}}}}"), "watr"),
        (&format!("{{{bodies}, \"fluid\": {{\"name\": \"water\", \"temperature\": \"25um\"}}}}"), "temperature"),
        ("{\"bodies\": [{\"surface\": \"sphere:2um\", \"pieces\": \"glued\"}]}", "glued"),
        ("{\"bodies\": [{\"surface\": \"sphere:2um\", \"turn\": [\"30deg\"]}]}", "30deg"),
        ("{\"bodies\": [{\"surface\": \"sphere:2um\", \"at\": [\"0um\", \"0um\", \"12\"]}]}", "no unit"),
        ("{\"bodies\": [{\"surface\": \"sphere:2um\", \"at\": [\"0um\"]}]}", "length 1"),
        ("{\"bodies\": [{\"surface\": \"missing.stl\", \"unit\": \"um\"}]}", "missing.stl"),
    ];
    for (text, piece) in cases {
        let path = folder.path().join("case.json");
        fs::write(&path, text).unwrap();
        run([std::ffi::OsStr::new("drag"), path.as_os_str()]).refuses(1, &["error: ", piece, "hint: "]);
    }
    run(["drag", "no-such-case.json"]).refuses(1, &["no-such-case.json", "hint: "]);
    run(["drag", "/dev/zero.json"]).refuses(1, &["hint: "]);
}
