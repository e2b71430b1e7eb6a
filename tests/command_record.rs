//! Records, and what a second computation says of them.

mod command;

use std::fs;
use std::path::Path;

use command::{box_stl, put, run, slowmote};
use serde_json::{Value, json};
use slowmote::question::{AgainReport, RECORD_SCHEMA, Record};
use tempfile::tempdir;

fn again(record: &Path, code: i32) -> AgainReport {
    let run = run(["again", record.to_str().unwrap(), "--json"]).ends_with(code);
    serde_json::from_str(&run.stdout).expect("the documented layout, and no key more")
}

fn record(folder: &Path, line: &str) -> std::path::PathBuf {
    let path = folder.join("answer.record.json");
    let line = format!("{line} --quiet --record {}", path.display());
    assert_eq!(slowmote(&line).ends_with(0).stdout, "");
    path
}

/// Changes one value in a record.
fn forge(path: &Path, pointer: &str, value: Value) {
    let mut record: Value = serde_json::from_str(&fs::read_to_string(path).unwrap()).unwrap();
    *record.pointer_mut(pointer).unwrap_or_else(|| panic!("no {pointer}")) = value;
    fs::write(path, serde_json::to_string(&record).unwrap()).unwrap();
}

#[test]
fn every_answer_can_be_recorded_and_computed_again() {
    let folder = tempdir().unwrap();
    let lines = [
        "drag helix:turns=2,pitch=4um,diameter=2um,thickness=0.3um --elements 300 --spin 10/s",
        "drag rod:12±0.5x2um --fluid glycerol:60% --temperature 22±0.5degC --accuracy 2%",
        "drag geometries/bracket.stl --unit um --elements 80 --turn 30deg@x --turn 20deg@z --at 1um,2um,-3um",
        "drag examples/cases/two-beads.json --elements 80",
        "regime geometries/block.stl --unit um --material pmma --centrifuge g=20",
        "regime --in slot:height=20um --flow slot:mean=1mm/s",
        "fluid sucrose:20% --temperature 7degC",
        "fluid",
        "material red-cell",
        "material",
        "surface geometries/redcell.stl --unit um --mend",
        "surface ring:10x2um --elements 200",
    ];
    for line in lines {
        let report = again(&record(folder.path(), line), 0);
        assert!(report.same && report.differences.is_empty() && report.compared > 0, "{line}: {report:?}");
        // The same program on the same machine: only the sum of rounding could differ.
        assert!(report.largest_difference < 1e-12, "{line}: {report:?}");
        assert_eq!((report.version_then, report.changed_files), (report.version_now, Vec::<String>::new()), "{line}");
        assert_ne!(report.mesh_changed, Some(true), "{line}");
    }
}

#[test]
fn a_record_holds_the_question_with_its_defaults() {
    let folder = tempdir().unwrap();
    let path = record(folder.path(), "drag geometries/block.stl --unit um --elements 80 --speed 1um/s --memory 1GB");
    let record = Record::read(&path).unwrap();
    assert_eq!((record.schema.as_str(), record.command.as_str()), (RECORD_SCHEMA, "drag"));
    let option = |name: &str| record.options.get(name).map(|texts| texts.join(" "));
    for (name, text) in [
        ("fluid", "water"),
        ("temperature", "20degC"),
        ("along", "x"),
        ("unit", "um"),
        ("speed", "1um/s"),
        ("accuracy", "0.5%"),
        ("elements", "80"),
    ] {
        assert_eq!(option(name).as_deref(), Some(text), "{name}");
    }
    // What the machine may spend is no part of the question.
    assert_eq!([option("memory"), option("record"), option("quiet")], [None, None, None]);
    assert_eq!(record.files.len(), 1);
    assert_eq!(record.files[0].bytes, fs::metadata("geometries/block.stl").unwrap().len());
    // SHA-256 of the file, by sha256sum.
    assert_eq!(record.files[0].sha256, "3874e80a202bf29745ae33222678227629b7f11c00ccd38ffb1e9ffd0d13d9b0");
    assert_eq!(record.subject.as_ref(), Some(&record.files[0].path));
}

#[test]
fn files_count_from_the_folder_of_the_record() {
    let folder = tempdir().unwrap();
    put(folder.path(), "block.stl", &box_stl([3.0, 2.0, 1.0]));
    let record_path = folder.path().join("block.record.json");
    let line = ["drag", "block.stl", "--unit", "um", "--elements", "48", "-q", "--record", "block.record.json"];
    let told = command::program().args(line).current_dir(folder.path()).output().unwrap();
    command::told(told).ends_with(0);
    assert_eq!(Record::read(&record_path).unwrap().subject.as_deref(), Some("block.stl"));
    // From another folder, and after the two have moved together.
    assert!(again(&record_path, 0).same);
    let moved = tempdir().unwrap();
    for name in ["block.stl", "block.record.json"] {
        fs::rename(folder.path().join(name), moved.path().join(name)).unwrap();
    }
    assert!(again(&moved.path().join("block.record.json"), 0).same);
}

#[test]
fn what_differs_beyond_the_errors_is_told() {
    let folder = tempdir().unwrap();
    let line = "drag ellipsoid:3x2x1um --elements 320 --speed 1um/s";
    let path = record(folder.path(), line);
    let answer = Record::read(&path).unwrap().answer;
    let error = answer.pointer("/relative_error/force").unwrap().as_f64().unwrap();
    let at = "/answer/resistance/force_velocity_n_s_per_m/0/0";
    let drag = answer.pointer(at.trim_start_matches("/answer")).unwrap().as_f64().unwrap();
    let largest = answer.pointer("/resistance/force_velocity_n_s_per_m/2/2").unwrap().as_f64().unwrap();

    // Both answers state this error, so twice of it is allowed.
    forge(&path, at, json!(drag + 1.9 * error * largest));
    let report = again(&path, 0);
    assert!((report.largest_difference / error - 1.9).abs() < 1e-6, "{report:?}");
    assert_eq!(report.largest_at.as_deref(), Some("resistance.force_velocity_n_s_per_m"));

    forge(&path, at, json!(drag + 2.1 * error * largest));
    let report = again(&path, 1);
    assert!(!report.same && report.differences.len() == 1, "{report:?}");
    assert_eq!(report.differences[0].key, "resistance.force_velocity_n_s_per_m");
    let text = run(["again", path.to_str().unwrap()]).ends_with(1).stdout;
    assert!(text.contains("not the same") && text.contains("force_velocity"), "{text}");

    forge(&path, at, json!(drag));
    // Twice in the middle: as far as words are concerned nothing is allowed.
    forge(&path, "/answer/validity/verdict", json!("doubtful"));
    forge(&path, "/answer/fluid/viscosity_pa_s", json!(1.01e-3));
    let keys = again(&path, 1).differences.into_iter().map(|difference| difference.key).collect::<Vec<_>>();
    assert_eq!(keys, ["fluid.viscosity_pa_s", "validity.verdict"]);
}

#[test]
fn a_changed_file_is_named() {
    let folder = tempdir().unwrap();
    let body = put(folder.path(), "block.stl", &box_stl([3.0, 2.0, 1.0]));
    let path = record(folder.path(), &format!("drag {} --unit um --elements 48", body.display()));
    put(folder.path(), "block.stl", &box_stl([3.0, 2.0, 1.01]));
    let report = again(&path, 1);
    assert_eq!(report.changed_files, ["block.stl"]);
    assert_eq!(report.mesh_changed, Some(true));
    assert!(report.differences.iter().any(|difference| difference.key == "body.volume_m3"));
    fs::remove_file(body).unwrap();
    run(["again", path.to_str().unwrap()]).refuses(1, &["can't be computed again", "block.stl", "hint: "]);
}

#[test]
fn what_is_no_record_is_told() {
    let folder = tempdir().unwrap();
    let path = record(folder.path(), "drag sphere:2um --elements 32");
    let good = fs::read_to_string(&path).unwrap();
    let cases = [
        (String::new(), "is not a record"),
        ("[".repeat(100_000), "is not a record"),
        ("{}".to_owned(), "missing field"),
        (good.replace("slowmote.record.1", "slowmote.record.9"), "slowmote.record.9"),
        (good.replace("\"drag\"", "\"drug\""), "drug"),
        (good.replace("\"drag\"", "\"again\""), "can't be computed again"),
        (good.replace("\"elements\"", "\"eloments\""), "eloments"),
        (good.replace("sphere:2um", "sphere:-2um"), "sphere"),
        (
            good.replace("slowmote.drag.1", "slowmote.drag.2").replace("\"body\":", "\"corpse\":"),
            "the answer in the record",
        ),
    ];
    for (text, piece) in cases {
        fs::write(&path, text).unwrap();
        run(["again", path.to_str().unwrap()]).refuses(1, &["error: ", piece, "hint: "]);
    }
    run(["again", "no-such.json"]).refuses(1, &["no-such.json", "hint: "]);
    run(["again"]).refuses(2, &["RECORD"]);
}

#[test]
fn a_record_is_whole_or_not_there() {
    let folder = tempdir().unwrap();
    let path = folder.path().join("r.json");
    let path = path.to_str().unwrap();
    run(["drag", "sphere:2umm", "--record", path]).ends_with(1);
    run(["drag", "geometries/block.stl", "--unit", "um", "--record", "geometries/block.stl"])
        .refuses(1, &["choose another name"]);
    run(["drag", "sphere:2um", "--record", "no/such/folder/r.json"]).refuses(1, &["record file", "hint: "]);
    assert_eq!(fs::read_dir(folder.path()).unwrap().count(), 0);
}
