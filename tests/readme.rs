//! README says what the program says: its examples, its main command, its case file and its validation table.

use std::collections::HashMap;
use std::f64::consts::PI;
use std::path::Path;
use std::process::{Command, Output};

use slowmote::question::DragAnswer;

fn readme() -> String {
    std::fs::read_to_string(root().join("README.md")).unwrap()
}

fn root() -> &'static Path {
    Path::new(env!("CARGO_MANIFEST_DIR"))
}

fn slowmote<'a>(arguments: impl IntoIterator<Item = &'a str>) -> Output {
    Command::new(env!("CARGO_BIN_EXE_slowmote")).args(arguments).current_dir(root()).output().unwrap()
}

/// The examples: what stands after the program's name, and what it prints.
fn examples(readme: &str) -> Vec<(&str, &str)> {
    let blocks = readme.split("```console\n$ ").skip(1);
    let parts = blocks.map(|block| {
        let (line, rest) = block.split_once('\n').unwrap();
        let arguments = ["slowmote ", "cargo run --release -- "].iter().find_map(|program| line.strip_prefix(program));
        (arguments.unwrap_or_else(|| panic!("not a command of ours: {line}")), rest.split_once("```").unwrap().0)
    });
    parts.collect()
}

/// A word, and whether it stands in a row of numbers, as those of a tensor.
struct Word<'a> {
    text: &'a str,
    in_tensor: bool,
}

/// The words of an answer, with the time taken out. Lines may break elsewhere, so they don't count.
fn words(text: &str) -> Vec<Word<'_>> {
    let lines = text.lines().map(|line| match line.split_once(", in ") {
        Some((before, _)) if line.trim_start().starts_with("solved") => before,
        _ => line,
    });
    lines
        .flat_map(|line| {
            let in_tensor = line.split_whitespace().all(|word| number(word).is_some());
            line.split_whitespace().map(move |text| Word { text, in_tensor })
        })
        .collect()
}

fn bare(word: &str) -> &str {
    word.trim_matches(|c: char| "(),;:".contains(c))
}

fn number(word: &str) -> Option<f64> {
    bare(word).parse().ok()
}

/// Equal, or numbers that agree to one in the last digit printed, as another processor's rounding may have it. Entries of
/// a tensor that are zero but for rounding may differ: they are far below their neighbours, and below this.
fn agree(printed: &Word<'_>, expected: &Word<'_>) -> bool {
    const ROUNDING_IN_A_TENSOR: f64 = 0.2;
    match (number(printed.text), number(expected.text)) {
        (Some(a), Some(b)) => {
            let decimals = bare(expected.text).split_once('.').map_or(0, |(_, decimals)| decimals.len());
            let nothing = expected.in_tensor && a.abs().max(b.abs()) < ROUNDING_IN_A_TENSOR;
            (a - b).abs() <= 1.01 * 10.0_f64.powi(-(decimals as i32)) || nothing
        }
        _ => printed.text == expected.text,
    }
}

#[test]
fn every_example_prints_what_readme_says() {
    let readme = readme();
    let examples = examples(&readme);
    assert!(examples.len() >= 5);
    for (arguments, expected) in examples {
        let output = slowmote(arguments.split_whitespace());
        assert!(output.status.success(), "{arguments}");
        let printed = String::from_utf8(output.stdout).unwrap();
        let (actual, expected) = (words(&printed), words(expected));
        assert_eq!(actual.len(), expected.len(), "{arguments}\n{printed}");
        for (actual, expected) in actual.iter().zip(&expected) {
            assert!(agree(actual, expected), "{arguments}: {} is not {}\n{printed}", actual.text, expected.text);
        }
    }
}

#[test]
fn numbers_must_agree_outside_tensors() {
    let word = |text| Word { text, in_tensor: false };
    assert!(agree(&word("0.0448"), &word("0.0449")) && !agree(&word("0.0448"), &word("0.0450")));
    assert!(agree(&word("(3.15,"), &word("(3.16,")) && !agree(&word("768"), &word("770")));
    let entry = |text| Word { text, in_tensor: true };
    assert!(agree(&entry("0"), &entry("-0.088")) && !agree(&entry("0.61"), &entry("0.64")));
}

#[test]
fn the_main_command_answers() {
    let readme = readme();
    let line = readme.lines().find_map(|line| line.strip_prefix("cargo run --release -- ")).unwrap();
    let output = slowmote(line.split_whitespace());
    let printed = String::from_utf8(output.stdout).unwrap();
    assert!(output.status.success() && printed.contains("12.0 x 8.00 x 5.00 um") && printed.contains("creeping"));
    // It is the first example too, whose output is compared in full.
    assert_eq!(examples(&readme)[0].0, line);
}

#[test]
fn the_case_shown_is_the_one_in_the_examples() {
    let case = std::fs::read_to_string(root().join("examples/cases/settled-cell.json")).unwrap();
    assert!(readme().contains(&format!("```json\n{case}```")));
}

/// A row of the validation table.
struct Row<'a> {
    body: &'a str,
    torque: bool,
    axis: usize,
    /// um for a drag over `6 pi mu`, um3 for a torque over `8 pi mu`.
    exact: f64,
    computed: f64,
    stated: f64,
    error: f64,
}

fn validation_table(readme: &str) -> Vec<Row<'_>> {
    let lines = readme.lines().skip_while(|line| !line.starts_with("| body | quantity | exact |")).skip(2);
    lines
        .take_while(|line| line.starts_with('|'))
        .map(|line| {
            let cells = line.split('|').map(str::trim).collect::<Vec<_>>();
            let (kind, axis) = cells[2].split_once(' ').unwrap();
            assert!(["drag", "torque"].contains(&kind), "{line}");
            let [exact, computed, stated, error] = [3, 4, 5, 6].map(|k| cells[k].parse().expect(line));
            let (body, axis) = (cells[1].trim_matches('`'), "xyz".find(axis).unwrap());
            Row { body, torque: kind == "torque", axis, exact, computed, stated, error }
        })
        .collect()
}

/// Each row: the program computes this again within what it states, the true error is within what it states, and README
/// tells neither of them wrongly. A stated error may move by a factor of two with the mesh before README must follow.
#[test]
fn every_row_of_the_validation_table_holds() {
    let readme = readme();
    let rows = validation_table(&readme);
    assert!(rows.len() >= 15);
    let mut answers = HashMap::<&str, DragAnswer>::new();
    for row in &rows {
        let answer = answers.entry(row.body).or_insert_with(|| {
            let output = slowmote(["drag", row.body, "--json"]);
            assert!(output.status.success(), "{}", row.body);
            serde_json::from_slice(&output.stdout).unwrap()
        });
        let viscosity = answer.fluid.viscosity_pa_s;
        let (computed, stated) = if row.torque {
            let torque = answer.resistance.unwrap().torque_rotation_n_m_s[row.axis][row.axis];
            (torque / (8.0 * PI * viscosity) * 1e18, answer.relative_error.torque)
        } else {
            let drag = answer.resistance.unwrap().force_velocity_n_s_per_m[row.axis][row.axis];
            (drag / (6.0 * PI * viscosity) * 1e6, answer.relative_error.force)
        };
        let name = format!("{} {} {}", row.body, if row.torque { "torque" } else { "drag" }, row.axis);
        let stated = stated.expect("one number for the solver");
        let (error, told) = ((computed / row.exact - 1.0).abs(), (row.computed / row.exact - 1.0).abs());
        assert!(error <= stated, "{name}: off by {error:e}, stated {stated:e}");
        assert!((computed / row.computed - 1.0).abs() <= stated, "{name}: {computed}, README {}", row.computed);
        assert!((0.5..2.0).contains(&(row.stated / stated)), "{name}: states {stated:e}, README {:e}", row.stated);
        // One digit is told, of numbers that are told to seven.
        assert!((told - row.error).abs() <= 0.51 * decade(row.error) + 1e-7, "{name}: {told:e} is not {:e}", row.error);
    }
}

/// The unit of the first digit.
fn decade(value: f64) -> f64 {
    10.0_f64.powf(value.log10().floor())
}
