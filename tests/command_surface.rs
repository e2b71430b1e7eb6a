//! `slowmote surface`: what it finds, mends and writes.

mod command;

use std::ffi::OsStr;
use std::fs;
use std::path::Path;

use command::{Run, run, slowmote};
use slowmote::question::SurfaceReport;
use tempfile::tempdir;

fn report(line: &str) -> SurfaceReport {
    serde_json::from_str(&slowmote(line).stdout).unwrap()
}

/// A box of the given sides as text STL, with some facets left out and some turned.
fn block(path: &Path, sides: [f64; 3], without: &[usize], turned: &[usize]) {
    let corner = |k: usize| [0, 1, 2].map(|axis| if k >> axis & 1 == 1 { sides[axis] } else { 0.0 });
    let facets = [
        [0, 2, 1],
        [1, 2, 3],
        [4, 5, 6],
        [5, 7, 6],
        [0, 1, 4],
        [1, 5, 4],
        [2, 6, 3],
        [3, 6, 7],
        [0, 4, 2],
        [2, 4, 6],
        [1, 3, 5],
        [3, 7, 5],
    ];
    let mut text = String::from("solid block\n");
    for (number, mut facet) in facets.into_iter().enumerate().filter(|(number, _)| !without.contains(number)) {
        if turned.contains(&number) {
            facet.swap(0, 1);
        }
        text.push_str("facet normal 0 0 0\nouter loop\n");
        for x in facet.map(corner) {
            text.push_str(&format!("vertex {} {} {}\n", x[0], x[1], x[2]));
        }
        text.push_str("endloop\nendfacet\n");
    }
    text.push_str("endsolid block\n");
    fs::write(path, text).unwrap();
}

fn surface(path: &Path, options: &[&str]) -> Run {
    let arguments = [OsStr::new("surface"), path.as_os_str()].into_iter().chain(options.iter().map(OsStr::new));
    run(arguments)
}

#[test]
fn a_sound_surface_is_usable() {
    let seen = report("surface geometries/bracket.stl --unit um --json");
    assert!(seen.usable && seen.closed && seen.orientation == "outward" && seen.kind == "polyhedral");
    assert_eq!((seen.facets, seen.vertices, seen.genus, seen.creases.count), (20, 12, Some(0), 18));
    // (20 x 6 + 6 x 10) um2, 8 um high.
    assert!((seen.volume_m3.unwrap() / 1.44e-15 - 1.0).abs() < 1e-6);
    assert!((seen.volume_in_file_units / 1440.0 - 1.0).abs() < 1e-6);
    let text = slowmote("surface geometries/bracket.stl --unit um").ends_with(0).stdout;
    assert!(text.contains("usable") && text.contains("20.00 x 16.00 x 8.000 um"), "{text}");
}

#[test]
fn without_a_unit_nothing_is_guessed() {
    let seen = report("surface geometries/bead.stl --json");
    assert!(seen.unit.is_none() && seen.volume_m3.is_none() && seen.size_m.is_none());
    assert_eq!(seen.kind, "faceted smooth");
    assert!(slowmote("surface geometries/bead.stl").ends_with(0).stdout.contains("file units"));
}

#[test]
fn an_open_surface_is_refused_with_the_place_and_mended_when_told() {
    let folder = tempdir().unwrap();
    let (path, whole) = (folder.path().join("open.stl"), folder.path().join("whole.off"));
    block(&path, [10.0, 1.0, 1.0], &[10, 11], &[4]);
    let before = fs::read(&path).unwrap();
    let text = surface(&path, &[]).ends_with(1).stdout;
    for piece in ["refused", "one hole", "near (10.00, 0.50, 0.50)", "beside facet"] {
        assert!(text.contains(piece), "`{piece}` is missing in\n{text}");
    }
    let write = whole.to_string_lossy();
    let text = surface(&path, &["--mend", "--write", &write]).ends_with(0).stdout;
    assert!(text.contains("usable") && text.matches("mended").count() >= 2, "{text}");
    let seen: SurfaceReport = serde_json::from_str(&surface(&whole, &["--json"]).ends_with(0).stdout).unwrap();
    assert!((seen.volume_in_file_units - 10.0).abs() < 1e-6 && seen.mended.is_none());
    assert_eq!(fs::read(&path).unwrap(), before, "the input is untouched");
}

#[test]
fn an_inside_out_surface_is_refused_and_turned_when_told() {
    let folder = tempdir().unwrap();
    let path = folder.path().join("inside.stl");
    block(&path, [1.0, 2.0, 3.0], &[], &(0..12).collect::<Vec<_>>());
    assert!(surface(&path, &[]).ends_with(1).stdout.contains("inside out"));
    assert!(surface(&path, &["--mend"]).ends_with(0).stdout.contains("outward, as it must"));
}

#[test]
fn each_format_is_written_and_read_back() {
    let folder = tempdir().unwrap();
    for ending in ["stl", "obj", "ply", "off", "msh"] {
        let path = folder.path().join(format!("cell.{ending}"));
        let write = path.to_string_lossy();
        slowmote(&format!("surface redcell:7.82um --elements 576 --write {write}")).ends_with(0);
        let seen: SurfaceReport =
            serde_json::from_str(&surface(&path, &["--unit", "um", "--json"]).ends_with(0).stdout).unwrap();
        assert_eq!((seen.facets, seen.genus), (576, Some(0)), "{ending}");
        // The shape has 94 fL; 576 flat triangles inscribed in it lose about 2 per cent.
        let volume = seen.volume_m3.unwrap();
        assert!((volume / 94.1e-18 - 1.0).abs() < 0.03, "{ending}: {volume:e}");
    }
}

#[test]
fn what_can_not_be_done_is_told_before_anything_is_written() {
    let folder = tempdir().unwrap();
    let path = folder.path().join("block.stl");
    block(&path, [1.0, 1.0, 1.0], &[], &[]);
    let same = path.to_string_lossy();
    surface(&path, &["--write", &same]).refuses(1, &["it is the file the body is read from", "hint: "]);
    surface(&path, &["--write", "x.step"]).refuses(1, &["x.step", ".stl", "hint: "]);
    surface(&path, &["--write", "no/such/folder/x.stl"]).refuses(1, &["can't be written", "hint: "]);
    run(["surface", "missing.stl"]).refuses(1, &["missing.stl", "hint: "]);
    run(["surface", "missing"]).refuses(1, &["hint: "]);
    run(["surface", "sphere:10um", "--elements", "0"]).refuses(2, &["triangles"]);
    assert_eq!(fs::read_dir(folder.path()).unwrap().count(), 1);
}

/// The text in one line, so that breaks don't matter.
fn joined(text: &str) -> String {
    text.split_whitespace().collect::<Vec<_>>().join(" ")
}

/// The command on the line that holds it, in words as a shell would take them.
fn next_command(text: &str) -> Vec<String> {
    let command = text.lines().map(str::trim).find(|line| line.starts_with("slowmote surface ")).unwrap();
    let mut words = vec![String::new()];
    let mut quoted = false;
    for c in command.chars() {
        match c {
            '\'' => quoted = !quoted,
            ' ' if !quoted => words.push(String::new()),
            c => words.last_mut().unwrap().push(c),
        }
    }
    words
}

#[test]
fn the_next_step_is_a_command_that_works() {
    let folder = tempdir().unwrap();
    let path = folder.path().join("my scan.stl");
    block(&path, [10.0, 1.0, 1.0], &[10, 11], &[4]);
    let text = surface(&path, &["--unit", "um"]).ends_with(1).stdout;
    let command = next_command(&text);
    let mended = folder.path().join("my scan-mended.stl");
    let mended = mended.to_string_lossy();
    let expected = ["slowmote", "surface", &path.to_string_lossy(), "--unit", "um", "--mend", "--write", &mended];
    assert_eq!(command, expected);
    run(&command[1..]).ends_with(0);
    run(["surface", &mended, "--unit", "um"]).ends_with(0);
    run(["drag", &mended, "--unit", "um", "--elements", "100"]).ends_with(0);
    // A name that is taken is not offered again.
    let text = surface(&path, &["--unit", "um"]).ends_with(1).stdout;
    assert!(next_command(&text).last().unwrap().ends_with("my scan-mended-2.stl"), "{text}");
}

#[test]
fn mending_is_not_offered_where_it_does_not_help() {
    let folder = tempdir().unwrap();
    let path = folder.path().join("bowl.stl");
    block(&path, [10.0, 10.0, 1.0], &[2, 3], &[]);
    let text = joined(&surface(&path, &["--unit", "um"]).ends_with(1).stdout);
    assert!(!text.contains("--mend") && text.contains("export the body with the missing part"), "{text}");
}

#[test]
fn what_is_asked_to_be_written_is_written_and_its_flaws_are_told() {
    let folder = tempdir().unwrap();
    let path = folder.path().join("bowl.stl");
    block(&path, [10.0, 10.0, 1.0], &[2, 3], &[2]);
    let target = folder.path().join("out.ply");
    let write = target.to_string_lossy();
    let seen: SurfaceReport =
        serde_json::from_str(&surface(&path, &["--write", &write, "--json"]).ends_with(1).stdout).unwrap();
    let written = seen.written.unwrap();
    assert!(!written.usable && written.facets == 10 && written.path == write && written.format == "PLY");
    let text = joined(&surface(&path, &["--write", &write]).ends_with(1).stdout);
    assert!(text.contains("with its flaws, not mended: the solver refuses it too"), "{text}");
    let text = joined(&surface(&path, &["--mend", "--write", &write]).ends_with(1).stdout);
    for piece in ["refused, still", "Left the hole near", "with what mending left: the solver refuses it too"] {
        assert!(text.contains(piece), "`{piece}` is missing in\n{text}");
    }
    let sound = folder.path().join("sound.stl");
    block(&sound, [1.0, 2.0, 3.0], &[], &[]);
    let text = joined(&surface(&sound, &["--mend", "--write", &write]).ends_with(0).stdout);
    assert!(text.contains("nothing that mending could change") && text.contains("the solver takes it"), "{text}");
}

#[test]
fn options_show_what_the_solver_would_do() {
    let curved = report("surface geometries/bead.stl --unit um --geometry curved --json").solved_as.unwrap();
    let flat = report("surface geometries/bead.stl --unit um --geometry flat --json").solved_as.unwrap();
    assert_eq!((curved.geometry.as_str(), flat.geometry.as_str()), ("curved", "flat"));
    assert!(flat.relative_geometry_error > curved.relative_geometry_error);
    let sharp = report("surface geometries/bead.stl --unit um --crease-angle 10 --json");
    assert!(sharp.creases.from_deg == 10.0 && sharp.creases.count > 0);
    assert_eq!(report("surface geometries/bead.stl --unit um --json").creases.count, 0);
    let text = slowmote("surface geometries/bead.stl --unit um --crease-angle 10deg").ends_with(0).stdout;
    assert!(joined(&text).contains("For study, edges of 10 degrees or more are kept sharp here"), "{text}");
    for wrong in ["-1", "200", "nan", "x"] {
        slowmote(&format!("surface geometries/bead.stl --crease-angle={wrong}")).refuses(2, &["--crease-angle"]);
    }
}

#[test]
fn a_doublet_is_written_read_and_solved() {
    let folder = tempdir().unwrap();
    let path = folder.path().join("doublet.stl");
    let write = path.to_string_lossy();
    slowmote(&format!("surface doublet:2um --elements 300 --write {write}")).ends_with(0);
    let text = joined(&surface(&path, &["--unit", "um"]).ends_with(0).stdout);
    assert!(text.contains("pieces 2 1: ") && text.contains("pieces touch in one vertex"), "{text}");
    // Against the exact shape, whose drag is tested against published values elsewhere: the file has 360 facets.
    let answer = run(["drag", &write, "--unit", "um", "--pieces", "joined", "--json"]).ends_with(0).stdout;
    let answer: serde_json::Value = serde_json::from_str(&answer).unwrap();
    let exact = slowmote("drag doublet:2um --json").ends_with(0).stdout;
    let exact: serde_json::Value = serde_json::from_str(&exact).unwrap();
    let drag = |answer: &serde_json::Value| answer["resistance"]["force_velocity_n_s_per_m"][0][0].as_f64().unwrap();
    assert!((drag(&answer) / drag(&exact) - 1.0).abs() < 2e-3, "{} {}", drag(&answer), drag(&exact));
}

#[test]
fn hostile_files_are_refused_with_the_reason() {
    let folder = tempdir().unwrap();
    let put = |name: &str, text: &str| {
        let path = folder.path().join(name);
        fs::write(&path, text).unwrap();
        path
    };
    surface(&put("empty.stl", ""), &[]).refuses(1, &["empty.stl", "the file is empty", "hint: "]);
    let nan = "solid x\nfacet normal 0 0 0\nouter loop\nvertex 0 0 nan\nvertex 1 0 0\nvertex 0 1 0\nendloop\nendfacet\nendsolid x\n";
    surface(&put("nan.stl", nan), &[]).refuses(1, &["facet 1", "not a number", "hint: "]);
    run(["surface", "sphere:10"]).refuses(1, &["`10` has no unit", "hint: "]);
    run(["surface", "spere:10um"]).refuses(1, &["did you mean sphere?", "hint: "]);
    if cfg!(unix) {
        run(["surface", "/dev/zero"]).refuses(1, &["is a device", "hint: "]);
    }
    let quads = "v 0 0 0\nv 1 0 0\nv 1 1 0\nv 0 1 0\nv 0 0 1\nv 1 0 1\nv 1 1 1\nv 0 1 1\n\
                 f 4 3 2 1\nf 5 6 7 8\nf 1 2 6 5\nf 3 4 8 7\nf 1 5 8 4\nf 2 3 7 6\n";
    let text = joined(&surface(&put("quads.obj", quads), &[]).ends_with(0).stdout);
    assert!(
        text.contains("12 facets on 8 vertices") && text.contains("cut into triangles, which count as facets"),
        "{text}"
    );
}
