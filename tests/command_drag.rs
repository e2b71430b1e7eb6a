//! `slowmote drag` and `slowmote fluid` as a user runs them: text, files, exit codes.

mod command;

use std::fs;
use std::process::Stdio;
use std::time::{Duration, Instant};

use command::{box_stl, program, put, run, slowmote, told};
use slowmote::question::DragAnswer;
use tempfile::tempdir;

/// The text without what differs from run to run.
fn steady(text: &str) -> String {
    let lines = text.lines().map(|line| match line.split_once(", in ") {
        Some((before, time)) if line.trim_start().starts_with("solved") && time.ends_with(" s") => {
            format!("{before}, in [time]")
        }
        _ => line.to_owned(),
    });
    lines.collect::<Vec<_>>().join("\n")
}

#[test]
fn the_text_of_a_sphere() {
    insta::assert_snapshot!("sphere", steady(&slowmote("drag sphere:10um --elements 200").ends_with(0).stdout));
}

#[test]
fn the_text_of_a_moving_body_with_uncertainties() {
    let line = "drag ellipsoid:6±0.1x4x2um --turn 30deg@y --fluid glycerol:60% --temperature 25±0.5degC \
                --speed 50um/s --along x --spin 10/s --elements 200";
    insta::assert_snapshot!("moving", steady(&slowmote(line).ends_with(0).stdout));
}

#[test]
fn the_text_of_a_body_that_couples() {
    let line = "drag helix:turns=1.5,pitch=2um,diameter=1um,thickness=0.3um --elements 400";
    insta::assert_snapshot!("helix", steady(&slowmote(line).ends_with(0).stdout));
}

#[test]
fn the_text_of_a_motion_beyond_creeping_flow() {
    let line = "drag sphere:1mm --elements 200 --speed 0.8mm/s --along 1,1,0";
    insta::assert_snapshot!("doubtful", steady(&slowmote(line).ends_with(0).stdout));
}

#[test]
fn the_text_of_a_file() {
    let folder = tempdir().unwrap();
    put(folder.path(), "block.stl", &box_stl([0.6, 0.4, 0.2]));
    let output = program()
        .current_dir(folder.path())
        .args(["drag", "block.stl", "--unit", "mm", "--elements", "300"])
        .args(["--fluid", "silicone-oil:1000cSt", "--temperature", "22degC"])
        .output();
    insta::assert_snapshot!("file", steady(&told(output.unwrap()).ends_with(0).stdout));
}

#[test]
fn the_text_of_fluids() {
    insta::assert_snapshot!("water", slowmote("fluid water").ends_with(0).stdout);
    insta::assert_snapshot!("fluids", slowmote("fluid").ends_with(0).stdout);
}

#[test]
fn a_file_and_the_shape_it_holds_agree() {
    let folder = tempdir().unwrap();
    // Far from the origin, so that placing is felt.
    let path = put(folder.path(), "block.stl", &box_stl([6.0, 4.0, 2.0]));
    let options = ["--unit", "um", "--elements", "400", "--json"];
    let file = run(["drag", &path.to_string_lossy()].into_iter().chain(options)).ends_with(0);
    let file: DragAnswer = serde_json::from_str(&file.stdout).unwrap();
    let shape = slowmote("drag box:6x4x2um --elements 400 --json").ends_with(0);
    let shape: DragAnswer = serde_json::from_str(&shape.stdout).unwrap();
    assert_eq!((file.body.as_ref().unwrap().name.as_str(), file.body.as_ref().unwrap().triangles), ("block.stl", 12));
    let middle = [3e-6, 2e-6, 1e-6];
    assert!(
        file.body.as_ref().unwrap().centroid_m.iter().zip(middle).all(|(a, b)| (a - b).abs() < 1e-12),
        "{:?}",
        file.body.as_ref().unwrap().centroid_m
    );
    assert!((file.body.as_ref().unwrap().volume_m3 / shape.body.as_ref().unwrap().volume_m3 - 1.0).abs() < 1e-9);
    let solver =
        |answer: &DragAnswer| answer.relative_error.solver_worst().unwrap() + answer.relative_error.geometry.unwrap();
    for k in 0..3 {
        let [a, b] = [&file, &shape].map(|answer| answer.resistance.unwrap().force_velocity_n_s_per_m[k][k]);
        assert!((a / b - 1.0).abs() <= solver(&file) + solver(&shape), "{a} {b}");
    }
}

#[test]
fn turning_the_body_turns_its_resistance() {
    let drag = |options: &str| -> DragAnswer {
        let run = slowmote(&format!("drag box:6x4x2um --elements 200 --json {options}")).ends_with(0);
        serde_json::from_str(&run.stdout).unwrap()
    };
    let (straight, turned) = (drag(""), drag("--turn 90deg@z --at 1mm,0um,0um"));
    let [a, b] = [&straight, &turned].map(|answer| answer.resistance.unwrap().force_velocity_n_s_per_m);
    for (from, to) in [(0, 1), (1, 0), (2, 2)] {
        // Rounding decides which of two equal edges is cut first, so the quadrature's own error moves; it is below 1e-6.
        assert!((a[from][from] / b[to][to] - 1.0).abs() < 1e-6);
    }
    assert!((turned.body.as_ref().unwrap().centroid_m[0] - 1e-3).abs() < 1e-15);
    assert_eq!(turned.reference_point_m, turned.body.as_ref().map(|body| body.centroid_m));
    assert!((turned.body.as_ref().unwrap().size_m[1] - 6e-6).abs() < 1e-12);
}

#[test]
fn json_goes_to_stdout_alone_or_to_a_file_beside_the_text() {
    let folder = tempdir().unwrap();
    let path = folder.path().join("answer.json");
    let option = format!("--json={}", path.display());
    let both = run(["drag", "sphere:10um", "--elements", "32", &option]).ends_with(0);
    assert!(both.stdout.starts_with("sphere:10um in water"));
    let _: DragAnswer = serde_json::from_str(&fs::read_to_string(&path).unwrap()).unwrap();
    assert_eq!(fs::read_dir(folder.path()).unwrap().count(), 1, "no draft is left");

    fs::write(&path, "something older").unwrap();
    let quiet = run(["drag", "sphere:10um", "--elements", "32", "--quiet", &option]).ends_with(0);
    assert_eq!((quiet.stdout.as_str(), quiet.stderr.as_str()), ("", ""));
    let _: DragAnswer = serde_json::from_str(&fs::read_to_string(&path).unwrap()).unwrap();

    let alone = slowmote("drag sphere:10um --elements 32 --json").ends_with(0);
    assert!(alone.stdout.starts_with("{\n  \"schema\": \"slowmote.drag.1\",\n") && alone.stdout.ends_with("}\n"));
    assert_eq!(alone.stderr, "");
}

#[cfg(unix)]
#[test]
fn json_can_go_to_a_device() {
    let run = slowmote("drag sphere:10um --elements 32 --quiet --json=/dev/null").ends_with(0);
    assert_eq!(run.stdout, "");
    assert!(!fs::metadata("/dev/null").unwrap().is_file());
}

#[test]
fn an_accuracy_that_is_not_reached_is_answered_with_code_3() {
    let run = slowmote("drag cube:5um --accuracy 1e-7 --memory 75MB").ends_with(3);
    assert!(run.stdout.contains("accuracy not reached"), "{}", run.stdout);
    let json = slowmote("drag cube:5um --accuracy 1e-7 --memory 75MB --json").ends_with(3);
    let answer: DragAnswer = serde_json::from_str(&json.stdout).unwrap();
    assert!(!answer.relative_error.accuracy_reached);
    assert!(answer.relative_error.solver_worst().is_none_or(|error| error > 1e-7));
}

#[test]
fn an_accuracy_that_is_asked_for_is_reached() {
    let json = slowmote("drag sphere:10um --accuracy 2% --json").ends_with(0);
    let answer: DragAnswer = serde_json::from_str(&json.stdout).unwrap();
    let error = answer.relative_error;
    assert!(error.accuracy_reached && error.accuracy_asked == Some(0.02) && error.solver_worst().unwrap() <= 0.02);
}

#[test]
fn strict_tells_by_its_code_but_answers_all_the_same() {
    let fast = "drag sphere:1mm --elements 32 --speed 10mm/s";
    let lenient = slowmote(fast).ends_with(0);
    let strict = slowmote(&format!("{fast} --strict")).ends_with(4);
    assert_eq!(steady(&lenient.stdout), steady(&strict.stdout));
    assert!(strict.stdout.contains("outside: particle Reynolds number"));
    slowmote("drag sphere:1um --elements 32 --speed 10um/s --strict").ends_with(0);
}

#[test]
fn a_reader_that_leaves_is_no_error() {
    let mut child = program().args(["fluid"]).stdout(Stdio::piped()).stderr(Stdio::piped()).spawn().unwrap();
    drop(child.stdout.take());
    let output = child.wait_with_output().unwrap();
    assert_eq!(output.status.code(), Some(0));
    assert!(output.stderr.is_empty());
}

#[cfg(target_os = "linux")]
#[test]
fn a_full_disk_is_an_error() {
    let full = fs::File::options().write(true).open("/dev/full").unwrap();
    let output = program().args(["fluid", "water"]).stdout(full).output().unwrap();
    assert_eq!(output.status.code(), Some(1));
    assert!(String::from_utf8_lossy(&output.stderr).contains("can't be written to stdout"));
}

#[test]
fn pipes_get_no_colours() {
    let run = slowmote("drag sphere:10um --elements 32 --speed 1um/s").ends_with(0);
    assert!(!run.stdout.contains('\u{1b}'));
    assert!(run.stdout.lines().all(|line| line.chars().count() <= 100), "{}", run.stdout);
    assert!(!slowmote("drag sphere:10").ends_with(1).stderr.contains('\u{1b}'));
}

#[test]
fn threads_do_not_change_the_answer() {
    let radius = |threads: &str| {
        let run = slowmote(&format!("drag cube:5um --elements 200 --json --threads {threads}")).ends_with(0);
        serde_json::from_str::<DragAnswer>(&run.stdout).unwrap().hydrodynamic_radius_m.unwrap()
    };
    assert!((radius("1") / radius("3") - 1.0).abs() < 1e-9);
}

#[test]
fn starting_up_takes_no_time() {
    // The best of several, since the machine may be busy. Twenty milliseconds are wanted; a loaded machine gets more.
    let best = (0..10).map(|_| {
        let start = Instant::now();
        slowmote("--version").ends_with(0);
        start.elapsed()
    });
    assert!(best.min().unwrap() < Duration::from_millis(100));
}
