//! Bad input: each is refused with a sentence that says what, where, and what to do next. Nothing is answered.

mod command;

use std::fs;

use command::{box_stl, open_box_stl, program, put, run, slowmote, told};
use tempfile::tempdir;

#[test]
fn wrong_arguments_are_usage_errors() {
    slowmote("").refuses(2, &["Usage"]);
    slowmote("drag").refuses(2, &["BODY", "Usage"]);
    slowmote("drgg sphere:10um").refuses(2, &["drgg", "drag"]);
    slowmote("drag sphere:10um --sped 1um/s").refuses(2, &["--sped", "--speed"]);
    slowmote("drag sphere:10um sphere:5um").refuses(2, &["sphere:5um"]);
    slowmote("drag sphere:10um --along x").refuses(2, &["--speed"]);
    slowmote("drag sphere:10um --about x").refuses(2, &["--spin"]);
    slowmote("drag sphere:10um --geometry round").refuses(2, &["round", "exact", "curved", "flat"]);
    slowmote("drag sphere:10um --factor qr").refuses(2, &["qr", "lu", "cholesky"]);
}

#[test]
fn values_of_options_need_units_and_sense() {
    let refused = |options: &str, pieces: &[&str]| {
        slowmote(&format!("drag sphere:10um {options}")).refuses(2, pieces);
    };
    refused("--speed 50", &["50", "no unit", "50um/s"]);
    refused("--speed 50um", &["a length", "a speed"]);
    refused("--speed=-50um/s", &["greater than zero"]);
    refused("--speed 0um/s", &["greater than zero"]);
    refused("--speed nanum/s", &["nanum/s"]);
    refused("--speed 1um/s --along 0,0,0", &["0,0,0", "all its components are zero"]);
    refused("--speed 1um/s --along up", &["up", "1,1,0"]);
    refused("--spin 10Hz", &["10Hz", "rev/s"]);
    refused("--temperature 25", &["25", "no unit", "degC"]);
    refused("--temperature -300degC", &["absolute zero"]);
    refused("--turn 30deg", &["30deg", "axis is missing"]);
    refused("--turn 30@y", &["no unit"]);
    refused("--at 1um,2um", &["1um,2um", "0um,0um,12um"]);
    refused("--reference 0,0,0", &["no unit"]);
    refused("--accuracy 0", &["accuracy"]);
    refused("--accuracy 60%", &["50 %"]);
    refused("--accuracy 1e-20", &["1e-10"]);
    refused("--elements 0", &["from 1"]);
    refused("--elements many", &["whole number"]);
    refused("--threads 0", &["--threads"]);
    refused("--threads 100000", &["--threads", "1024"]);
    refused("--memory 4", &["4GB"]);
    refused("--unit kg", &["kg", "unit of length"]);
}

#[test]
fn bodies_that_are_none() {
    slowmote("drag sphere:10").refuses(1, &["error: ", "sphere", "no unit", "hint: "]);
    slowmote("drag sphere:-10um").refuses(1, &["greater than zero"]);
    slowmote("drag sphere:10kg").refuses(1, &["a mass", "a length"]);
    slowmote("drag box:1x2um").refuses(1, &["box", "three sides", "box:6x4x2um"]);
    slowmote("drag rod:1x2um").refuses(1, &["error: "]);
    slowmote("drag spere:10um").refuses(1, &["spere", "sphere", "hint: "]);
    slowmote("drag nothing").refuses(1, &["`nothing` is neither a shape nor a file", ".stl"]);
    slowmote("drag cases.json").refuses(1, &["the case file cases.json can't be read"]);
    slowmote("drag sphere:10um --unit um").refuses(1, &["`--unit um` says nothing", "leave"]);
    run(["drag", ""]).refuses(1, &["neither a shape nor a file"]);
}

#[test]
fn files_that_are_none() {
    let folder = tempdir().unwrap();
    let path = |name: &str| folder.path().join(name).to_string_lossy().into_owned();
    run(["drag", &path("bead.stl"), "--unit", "um"]).refuses(1, &["there is no file", "bead.stl", "hint: "]);
    fs::create_dir(folder.path().join("folder.stl")).unwrap();
    run(["drag", &path("folder.stl"), "--unit", "um"]).refuses(1, &["folder.stl is a folder"]);
    put(folder.path(), "empty.stl", "");
    run(["drag", &path("empty.stl"), "--unit", "um"]).refuses(1, &["empty.stl", "caused by: ", "the file is empty"]);
    put(folder.path(), "prose.stl", "It was a dark and stormy night.");
    run(["drag", &path("prose.stl"), "--unit", "um"]).refuses(1, &["prose.stl", "hint: "]);
    put(folder.path(), "open.stl", &open_box_stl([3.0, 2.0, 1.0]));
    run(["drag", &path("open.stl"), "--unit", "um"]).refuses(1, &["open.stl", "a hole of 4 edges", "hint: "]);
    #[cfg(unix)]
    run(["drag", "/dev/zero", "--unit", "um"]).refuses(1, &["/dev/zero is a device"]);
    let binary: Vec<u8> = (0..4000_u32).map(|k| (k.wrapping_mul(2_654_435_761) >> 13) as u8).collect();
    fs::write(folder.path().join("noise.ply"), binary).unwrap();
    run(["drag", &path("noise.ply"), "--unit", "um"]).refuses(1, &["noise.ply", "hint: "]);
}

#[test]
fn a_file_without_its_unit_is_refused_with_its_size_in_likely_ones() {
    let folder = tempdir().unwrap();
    let path = put(folder.path(), "block.stl", &box_stl([12.3, 2.0, 1.0]));
    let path = path.to_string_lossy();
    run(["drag", &path]).refuses(1, &["block.stl", "unit", "--unit", "um: 12.3 um", "mm: 12.3 mm"]);
}

#[test]
fn fluids_that_are_none() {
    slowmote("drag sphere:10um --fluid watr").refuses(1, &["watr", "`water`", "`slowmote fluid`"]);
    slowmote("drag sphere:10um --fluid glycerol").refuses(1, &["glycerol:60%"]);
    slowmote("drag sphere:10um --fluid water --temperature 120degC").refuses(1, &["100", "120", "viscosity=.."]);
    slowmote("drag sphere:10um --fluid viscosity=1mPa.s").refuses(1, &["density"]);
    slowmote("drag sphere:10um --fluid viscosity=1mPa,density=1g/mL").refuses(1, &["viscosity", "a pressure"]);
    slowmote("fluid honey").refuses(1, &["honey", "known are", "hint: "]);
}

#[test]
fn outputs_are_checked_before_the_work() {
    let folder = tempdir().unwrap();
    let path = |name: &str| folder.path().join(name).to_string_lossy().into_owned();
    // Minutes of work if it were begun.
    let drag = |json: String| run(["drag", "cube:5um", "--accuracy", "1e-9", &format!("--json={json}")]);
    drag(path("no/such/folder/a.json")).refuses(1, &["a.json can't be written", "caused by: ", "hint: "]);
    drag(path("")).refuses(1, &["it is a folder"]);
    let block = put(folder.path(), "block.stl", &box_stl([3.0, 2.0, 1.0]));
    let block = block.to_string_lossy();
    let over = run(["drag", &block, "--unit", "um", &format!("--json={block}")]);
    over.refuses(1, &["it is the file the body is read from"]);
    assert!(fs::read_to_string(block.as_ref()).unwrap().starts_with("solid"), "the body's file is untouched");
}

#[test]
fn what_does_not_fit_the_memory_says_how_much_it_needs() {
    slowmote("drag sphere:10um --elements 2000 --memory 1MB")
        .refuses(1, &["memory", " and 1 MB are allowed", "--elements", "--memory"]);
}

#[test]
fn a_failed_run_leaves_no_file() {
    let folder = tempdir().unwrap();
    let json = folder.path().join("a.json");
    let option = format!("--json={}", json.display());
    run(["drag", "sphere:10um", "--elements", "2000", "--memory", "1MB", &option]).ends_with(1);
    assert_eq!(fs::read_dir(folder.path()).unwrap().count(), 0);
}

#[test]
fn arguments_that_are_no_text_are_no_bug() {
    #[cfg(unix)]
    {
        use std::ffi::OsStr;
        use std::os::unix::ffi::OsStrExt;
        let output = program().arg("drag").arg(OsStr::from_bytes(b"\xff\xfe.stl")).output().unwrap();
        told(output).ends_with(2);
    }
}
