//! What can hurt someone is said, where it applies and nowhere else, in the text and under the key `cautions`.

mod command;

use command::{put, slowmote};
use serde_json::Value;
use tempfile::tempdir;

const BLOOD: &str = "licensed practitioners";
const BIOLOGICAL: &str = "biological safety";
const SOFT: &str = "soft";
const HOT: &str = "scalds";
const VAPOUR: &str = "vapour and splashes";
const UNKNOWN: &str = "safety data sheet";
const THINNING: &str = "below a yield stress";
const ROTOR: &str = "rated speed, load and balance";
const STAFF: &str = "trained staff and the local rules";
const UNIT: &str = "is its unit right?";

const ALL: [&str; 10] = [BLOOD, BIOLOGICAL, SOFT, HOT, VAPOUR, UNKNOWN, THINNING, ROTOR, STAFF, UNIT];

/// Asserts that these cautions, and of the others above none, stand in the text and in the JSON.
#[track_caller]
fn cautions(line: &str, expected: &[&str]) {
    let json: Value = serde_json::from_str(&slowmote(&format!("{line} --json")).ends_with(0).stdout).unwrap();
    let json = json["cautions"].as_array().expect("a list").iter().map(|text| text.as_str().unwrap());
    let json = json.collect::<Vec<_>>().join(" ");
    let text = slowmote(line).ends_with(0).stdout;
    // What was not told is listed at the end, in words of its own.
    let text = text.split("  not told ").next().unwrap_or_default();
    let text = text.split_whitespace().collect::<Vec<_>>().join(" ");
    for caution in ALL {
        assert_eq!(json.contains(caution), expected.contains(&caution), "`{caution}` for `{line}`:\n{json}");
        assert_eq!(text.contains(caution), expected.contains(&caution), "`{caution}` for `{line}`:\n{text}");
    }
}

#[test]
fn a_bead_in_water_needs_none() {
    cautions("drag sphere:10um --elements 32", &[]);
    cautions("fluid water", &[]);
    cautions("regime --size 10um --body-density 1.05g/mL", &[]);
}

#[test]
fn blood_and_cells() {
    cautions("drag redcell:7.82um --elements 60", &[SOFT, BLOOD, BIOLOGICAL]);
    cautions("regime redcell:7.82um --speed 1um/s", &[SOFT, BLOOD, BIOLOGICAL]);
    cautions("drag sphere:10um --fluid plasma --temperature 37degC --elements 32", &[BLOOD, BIOLOGICAL]);
    cautions("fluid plasma --temperature 37degC", &[BLOOD, BIOLOGICAL]);
    cautions("fluid culture-medium --temperature 37degC", &[BIOLOGICAL]);
    cautions("regime --size 12um --material mammalian-cell", &[SOFT, BIOLOGICAL]);
    cautions("regime --size 8um --material white-cell", &[SOFT, BLOOD, BIOLOGICAL]);
}

#[test]
fn materials_that_live() {
    cautions("material polystyrene", &[]);
    cautions("material yeast", &[SOFT, BIOLOGICAL]);
    cautions("material erythrocyte", &[SOFT, BLOOD, BIOLOGICAL]);
}

/// By its shape, whatever a case calls it.
#[test]
fn a_red_cell_by_another_name() {
    let folder = tempdir().unwrap();
    let text = r#"{"bodies": [{"name": "number seven", "surface": "redcell:7.82um"}]}"#;
    let case = put(folder.path(), "case.json", text);
    cautions(&format!("drag {} --elements 60", case.display()), &[SOFT, BLOOD, BIOLOGICAL]);
    cautions(&format!("regime {}", case.display()), &[SOFT, BLOOD, BIOLOGICAL]);
    let text = r#"{"bodies": [{"name": "redcell, or so it is called", "surface": "sphere:2um"}]}"#;
    let case = put(folder.path(), "case.json", text);
    cautions(&format!("drag {} --elements 32", case.display()), &[]);
}

#[test]
fn centrifuges() {
    cautions("regime --size 2um --material silica --centrifuge g=300", &[ROTOR, STAFF]);
    cautions("regime --size 2um --material silica --centrifuge rpm=1500,radius=80mm", &[ROTOR, STAFF]);
}

#[test]
fn hot_fluids() {
    cautions("fluid water --temperature 49degC", &[]);
    cautions("fluid water --temperature 50degC", &[HOT]);
    cautions("drag sphere:10um --temperature 95degC --elements 32", &[HOT, VAPOUR]);
    cautions("regime --size 10um --speed 1um/s --fluid glycerol:100% --temperature 60degC", &[HOT]);
    // Air of this temperature does not scald.
    cautions("fluid air --temperature 60degC", &[]);
}

#[test]
fn fluids_that_only_their_user_knows() {
    let solvent = "--fluid viscosity=0.6mPa.s,density=0.87g/mL";
    cautions(&format!("drag sphere:10um --elements 32 {solvent}"), &[UNKNOWN]);
    cautions("fluid viscosity=0.6mPa.s,density=0.87g/mL", &[UNKNOWN]);
    cautions(&format!("regime --size 10um --speed 1um/s {solvent}"), &[UNKNOWN, THINNING]);
    let lava = "--fluid viscosity=100Pa.s,density=2700kg/m3 --temperature 1150degC";
    cautions(&format!("regime --in tube:diameter=1m --flow tube:mean=1mm/s {lava}"), &[UNKNOWN, THINNING, HOT, VAPOUR]);
}

#[test]
fn a_unit_that_was_mistaken() {
    cautions("drag sphere:1m --elements 32", &[UNIT]);
    cautions("regime --size 1.7m --speed 1m/s", &[UNIT]);
}
