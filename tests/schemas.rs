//! The JSON Schemas: those of the types are those in the folder `schemas`, and what is written and read obeys them.
//!
//! After a change of a layout, write its schema anew: `slowmote schema slowmote.drag.1 > schemas/slowmote.drag.1.json`.

mod command;

use std::fs;
use std::path::{Path, PathBuf};

use command::{run, slowmote};
use jsonschema::Validator;
use serde_json::{Value, json};
use slowmote::question::Layout;
use slowmote::show::to_json;
use tempfile::tempdir;

fn committed(layout: &Layout) -> PathBuf {
    Path::new("schemas").join(format!("{}.json", layout.name))
}

fn validator(name: &str) -> Validator {
    let text = fs::read_to_string(committed(Layout::find(name).unwrap())).unwrap();
    jsonschema::validator_for(&serde_json::from_str(&text).unwrap()).unwrap()
}

#[track_caller]
fn obeys(validator: &Validator, value: &Value, what: &str) {
    if let Err(error) = validator.validate(value) {
        panic!("{what}: {error} at {}", error.instance_path());
    }
}

#[test]
fn the_committed_schemas_are_those_of_the_types() {
    for layout in Layout::ALL {
        let made = to_json(&layout.schema()).unwrap();
        let path = committed(layout);
        let kept = fs::read_to_string(&path).unwrap_or_default();
        assert!(kept == made, "{} is not what the types say; see the head of this test", path.display());
        // And the program prints the same.
        assert_eq!(run(["schema", layout.name]).ends_with(0).stdout, made);
    }
    assert_eq!(fs::read_dir("schemas").unwrap().count(), Layout::ALL.len(), "no schema of a layout that is gone");
}

#[test]
fn every_answer_obeys_its_schema() {
    let lines = [
        ("drag", "drag sphere:10um --elements 32 --speed 1mm/s"),
        ("drag", "drag rod:12±0.5x2um --elements 60 --fluid air"),
        ("drag", "drag examples/cases/two-beads.json --elements 32"),
        ("surface", "surface geometries/bracket.stl --unit um --mend"),
        ("surface", "surface cube:5um"),
        ("fluid", "fluid glycerol:60%"),
        ("fluids", "fluid"),
        ("material", "material silica"),
        ("materials", "material"),
        ("regime", "regime rod:12±1x2um --material polystyrene --in tube:diameter=50um --flow tube:mean=1mm/s"),
        ("regime", "regime --in duct:width=100um,height=40um,length=2cm --flow duct:rate=10uL/min"),
    ];
    for (name, line) in lines {
        let answer = slowmote(&format!("{line} --json")).ends_with(0).stdout;
        obeys(&validator(name), &serde_json::from_str(&answer).unwrap(), line);
    }
}

#[test]
fn records_and_what_is_said_of_them_obey_too() {
    let folder = tempdir().unwrap();
    let path = folder.path().join("r.json");
    let path = path.to_str().unwrap();
    run(["drag", "geometries/block.stl", "--unit", "um", "--elements", "48", "-q", "--record", path]).ends_with(0);
    obeys(&validator("record"), &serde_json::from_str(&fs::read_to_string(path).unwrap()).unwrap(), "record");
    let again = run(["again", path, "--json"]).ends_with(0).stdout;
    obeys(&validator("again"), &serde_json::from_str(&again).unwrap(), "again");
}

/// The schema of cases refuses what the program refuses for its form, and takes the samples.
#[test]
fn cases_are_described_as_they_are_read() {
    let validator = validator("case");
    for entry in fs::read_dir("examples/cases").unwrap() {
        let path = entry.unwrap().path();
        obeys(&validator, &serde_json::from_str(&fs::read_to_string(&path).unwrap()).unwrap(), &path.to_string_lossy());
    }
    for wrong in [
        json!({}),
        json!({"bodies": [{"surface": 3}]}),
        json!({"bodies": [{"surface": "sphere:2um"}], "wind": 1}),
        json!({"bodies": [{"surface": "sphere:2um", "at": ["0um"]}]}),
        json!({"bodies": [{"surface": "sphere:2um"}], "fluid": "water"}),
    ] {
        assert!(!validator.is_valid(&wrong), "{wrong}");
    }
}

/// A schema that lets anything pass would pass all of the above.
#[test]
fn the_schemas_refuse_what_is_not_documented() {
    let answer = slowmote("drag sphere:10um --elements 32 --json").ends_with(0).stdout;
    let answer: Value = serde_json::from_str(&answer).unwrap();
    let validator = validator("drag");
    for (pointer, value) in
        [("/fluid/viscosity_pa_s", json!("1mPa.s")), ("/validity/numbers", json!(null)), ("/body/size_m", json!([1.0]))]
    {
        let mut forged = answer.clone();
        *forged.pointer_mut(pointer).unwrap() = value;
        assert!(!validator.is_valid(&forged), "{pointer}");
    }
    let mut more = answer;
    more["key"] = json!(1);
    assert!(!validator.is_valid(&more));
}

#[test]
fn layouts_are_found_by_short_names() {
    let list = run(["schema"]).ends_with(0).stdout;
    for layout in Layout::ALL {
        assert!(list.contains(layout.name) && list.contains(layout.what));
    }
    assert_eq!(run(["schema", "drag.1"]).ends_with(0).stdout, run(["schema", "slowmote.drag.1"]).ends_with(0).stdout);
    run(["schema", "drug"]).refuses(1, &["`drug`", "hint: "]);
}
