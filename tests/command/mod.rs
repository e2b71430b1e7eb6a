//! Runs the program as a user does, and makes the files it is given.
#![allow(dead_code)]

use std::ffi::OsStr;
use std::fmt::Write as _;
use std::fs;
use std::path::{Path, PathBuf};
use std::process::{Command, Output};

/// What a run left behind.
#[derive(Debug)]
pub struct Run {
    pub code: i32,
    pub stdout: String,
    pub stderr: String,
}

/// The program, not yet started, with an environment that doesn't change what it writes.
pub fn program() -> Command {
    let mut command = Command::new(env!("CARGO_BIN_EXE_slowmote"));
    command.env_remove("NO_COLOR").env_remove("CLICOLOR_FORCE").env("LC_ALL", "C").env("COLUMNS", "100");
    command
}

pub fn run<S: AsRef<OsStr>>(arguments: impl IntoIterator<Item = S>) -> Run {
    told(program().args(arguments).output().expect("the program starts"))
}

/// Runs a command line in which no argument holds a space.
pub fn slowmote(line: &str) -> Run {
    run(line.split_whitespace())
}

pub fn told(output: Output) -> Run {
    Run {
        code: output.status.code().expect("the program ends by itself"),
        stdout: String::from_utf8(output.stdout).expect("stdout is text"),
        stderr: String::from_utf8(output.stderr).expect("stderr is text"),
    }
}

impl Run {
    #[track_caller]
    pub fn ends_with(self, code: i32) -> Self {
        assert_eq!(self.code, code, "stdout:\n{}\nstderr:\n{}", self.stdout, self.stderr);
        self
    }

    /// Asserts that nothing was answered and that stderr holds each of these pieces.
    #[track_caller]
    pub fn refuses(self, code: i32, pieces: &[&str]) {
        let run = self.ends_with(code);
        assert_eq!(run.stdout, "", "nothing is answered");
        for piece in pieces {
            assert!(run.stderr.contains(piece), "`{piece}` is missing in:\n{}", run.stderr);
        }
        assert!(!run.stderr.contains("panicked"), "{}", run.stderr);
    }
}

/// A box with one corner at the origin as text STL.
pub fn box_stl([x, y, z]: [f64; 3]) -> String {
    let vertex = |k: usize| [x * (k & 1) as f64, y * (k >> 1 & 1) as f64, z * (k >> 2) as f64];
    let quads = [[0, 2, 3, 1], [4, 5, 7, 6], [0, 1, 5, 4], [2, 6, 7, 3], [0, 4, 6, 2], [1, 3, 7, 5]];
    stl(quads.iter().flat_map(|[a, b, c, d]| [[*a, *b, *c], [*a, *c, *d]]).map(|facet| facet.map(vertex)))
}

/// A box whose top is missing.
pub fn open_box_stl(sides: [f64; 3]) -> String {
    let whole = box_stl(sides);
    let mut facets: Vec<&str> = whole.split_inclusive("endfacet\n").collect();
    facets.drain(2..4);
    facets.concat()
}

fn stl(facets: impl Iterator<Item = [[f64; 3]; 3]>) -> String {
    let mut text = String::from("solid test\n");
    for facet in facets {
        text.push_str("facet normal 0 0 0\nouter loop\n");
        for [x, y, z] in facet {
            let _ = writeln!(text, "vertex {x} {y} {z}");
        }
        text.push_str("endloop\nendfacet\n");
    }
    text + "endsolid test\n"
}

/// Writes a file into a folder and gives its path.
pub fn put(folder: &Path, name: &str, content: &str) -> PathBuf {
    let path = folder.join(name);
    fs::write(&path, content).expect("the folder can be written to");
    path
}
