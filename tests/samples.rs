//! The sample surfaces, the figures and the example programs are what their commands make.

use std::path::{Path, PathBuf};
use std::process::Command;

/// The program of an example, which cargo builds with the tests, beside their own folder.
fn example(name: &str) -> PathBuf {
    let test = std::env::current_exe().unwrap();
    let profile = test.parent().and_then(Path::parent).unwrap();
    profile.join("examples").join(format!("{name}{}", std::env::consts::EXE_SUFFIX))
}

fn root() -> &'static Path {
    Path::new(env!("CARGO_MANIFEST_DIR"))
}

/// Table rows of a folder's README: the file, and the words of the command that made it.
fn made_by(folder: &str) -> Vec<(String, Vec<String>)> {
    let text = std::fs::read_to_string(root().join(folder).join("README.md")).unwrap();
    let rows = text.lines().filter_map(|line| line.strip_prefix("| `"));
    rows.map(|row| {
        let (file, rest) = row.split_once('`').unwrap();
        let command = rest.rsplit('`').nth(1).unwrap();
        let command = command.rsplit("-- ").next().unwrap();
        (file.to_owned(), command.split_whitespace().map(str::to_owned).collect())
    })
    .collect()
}

fn makes_again(folder: &str, program: &str) {
    let rows = made_by(folder);
    assert!(!rows.is_empty());
    let scratch = tempfile::tempdir().unwrap();
    for (file, mut arguments) in rows {
        let path = scratch.path().join(&file);
        assert_eq!(arguments.pop(), Some(format!("{folder}/{file}")));
        assert!(Command::new(example(program)).args(&arguments).arg(&path).status().unwrap().success(), "{file}");
        let [made, kept] = [path, root().join(folder).join(&file)].map(|path| std::fs::read(path).unwrap());
        assert!(made == kept, "{folder}/{file} is not what its command makes");
    }
}

#[test]
fn the_surfaces_are_what_their_commands_make() {
    makes_again("geometries", "write_surface");
}

#[test]
fn the_figures_are_what_their_commands_make() {
    makes_again("figures", "draw_panels");
}

#[test]
fn the_library_example_tells_how_far_a_helix_swims() {
    let output = Command::new(example("drag_of_a_body")).output().unwrap();
    let text = String::from_utf8(output.stdout).unwrap();
    assert!(output.status.success() && text.contains("advance a turn: 1.1"), "{text}");
}
