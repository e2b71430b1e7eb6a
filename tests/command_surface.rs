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
    assert_eq!((seen.facets, seen.vertices, seen.genus, seen.crease_count), (20, 12, Some(0), 18));
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
    for piece in ["refused", "one hole", "near", "--mend"] {
        assert!(text.contains(piece), "`{piece}` is missing in\n{text}");
    }
    let write = whole.to_string_lossy();
    let text = surface(&path, &["--mend", "--write", &write]).ends_with(0).stdout;
    assert!(text.contains("usable") && text.matches("mended").count() >= 2, "{text}");
    let seen: SurfaceReport = serde_json::from_str(&surface(&whole, &["--json"]).ends_with(0).stdout).unwrap();
    assert!((seen.volume_in_file_units - 10.0).abs() < 1e-6 && seen.mended.is_empty());
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
