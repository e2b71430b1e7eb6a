//! README's examples print what README says.

use std::path::Path;
use std::process::Command;

/// A README example: the arguments after the program's name, and what it prints.
fn examples(readme: &str) -> Vec<(Vec<String>, String)> {
    readme
        .split("```console\n$ slowmote ")
        .skip(1)
        .filter_map(|part| {
            let (line, rest) = part.split_once('\n')?;
            let (output, _) = rest.split_once("```")?;
            Some((line.split_whitespace().map(str::to_owned).collect(), output.to_owned()))
        })
        .collect()
}

/// Words, with the time taken out and numbers told from the rest.
fn words(text: &str) -> Vec<String> {
    let lines = text.lines().map(|line| match line.split_once(", in ") {
        Some((before, _)) if line.trim_start().starts_with("solved") => before,
        _ => line,
    });
    lines.flat_map(str::split_whitespace).map(str::to_owned).collect()
}

/// Equal, or numbers that agree to one in the last digit printed, as another processor's rounding may have it. Numbers far
/// below their neighbours are rounding themselves, so two that are both small against 1 may differ.
fn agree(printed: &str, expected: &str) -> bool {
    let number = |word: &str| word.trim_matches(|c: char| "(),;".contains(c)).parse::<f64>().ok();
    match (number(printed), number(expected)) {
        (Some(a), Some(b)) => {
            let digits = expected.trim_matches(|c: char| "(),;".contains(c));
            let decimals = digits.split_once('.').map_or(0, |(_, decimals)| decimals.len());
            (a - b).abs() <= 1.01 * 10.0_f64.powi(-(decimals as i32)) || a.abs().max(b.abs()) < 0.2
        }
        _ => printed == expected,
    }
}

#[test]
fn every_example_prints_what_readme_says() {
    let root = Path::new(env!("CARGO_MANIFEST_DIR"));
    let readme = std::fs::read_to_string(root.join("README.md")).unwrap();
    let examples = examples(&readme);
    assert!(examples.len() >= 4);
    for (arguments, expected) in examples {
        let output = Command::new(env!("CARGO_BIN_EXE_slowmote")).args(&arguments).current_dir(root).output().unwrap();
        assert!(output.status.success(), "{arguments:?}");
        let printed = String::from_utf8(output.stdout).unwrap();
        let (printed, expected) = (words(&printed), words(&expected));
        assert_eq!(printed.len(), expected.len(), "{arguments:?}\n{}", printed.join(" "));
        for (printed, expected) in printed.iter().zip(&expected) {
            assert!(agree(printed, expected), "{arguments:?}: {printed} is not {expected}");
        }
    }
}

#[test]
fn the_main_command_of_readme_answers() {
    let root = Path::new(env!("CARGO_MANIFEST_DIR"));
    let readme = std::fs::read_to_string(root.join("README.md")).unwrap();
    let line = readme.lines().find_map(|line| line.strip_prefix("cargo run --release -- ")).unwrap();
    let output =
        Command::new(env!("CARGO_BIN_EXE_slowmote")).args(line.split_whitespace()).current_dir(root).output().unwrap();
    let printed = String::from_utf8(output.stdout).unwrap();
    assert!(output.status.success() && printed.contains("12.0 x 8.00 x 5.00 um") && printed.contains("creeping"));
}
