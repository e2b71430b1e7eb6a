//! `slowmote again RECORD`.

use std::path::{Path, PathBuf};

use clap::Args;
use slowmote::question::{AGAIN_SCHEMA, AgainReport, Comparison, Record};
use slowmote::show::again_text;

use super::asked::Asked;
use super::options::OutputOptions;
use super::output::Output;
use super::{Arguments, Exit, Failure};

/// Options of `again`.
#[derive(Debug, Args)]
#[command(after_help = "\
Example:
  slowmote drag bead.stl --unit um --record bead.record.json
  slowmote again bead.record.json

Files count from the record's folder. The exit code is 1 if something differs beyond the stated errors.")]
pub struct AgainArguments {
    /// A record that `--record` wrote
    #[arg(value_name = "RECORD")]
    record: PathBuf,

    #[command(flatten)]
    output: OutputOptions,
}

impl AgainArguments {
    /// Computes the record's answer again and says what differs.
    ///
    /// # Errors
    /// A record that can't be used, or a question that can no longer be answered.
    pub fn run(&self) -> Result<Exit, Failure> {
        let hint = "give a file that `--record FILE` wrote";
        let record = Record::read(&self.record).map_err(|error| Failure::of(&error).hint(hint))?;
        let folder = self.record.parent().unwrap_or(Path::new(""));
        let output = Output::open(&self.output, &[&self.record])?;
        let told = |failure: Failure| failure.during(format!("{} can't be computed again", self.record.display()));
        let now = Arguments::of_line(Asked::line(&record, folder))
            .map_err(|why| {
                // clap's own text is made for a terminal.
                let why = why.to_string();
                let first = why.lines().next().unwrap_or_default().trim_start_matches("error: ").to_owned();
                told(Failure::new(first).hint("the record may be of a version with other options"))
            })?
            .0
            .answer(self.output.quiet)
            .map_err(told)?;
        let comparison = Comparison::of(&record, &now).map_err(|error| {
            told(Failure::of(&error)).hint("the record may be of a version with another layout of answers")
        })?;
        let mesh = |answer: &serde_json::Value| answer.pointer("/solver/mesh").cloned();
        let changed = record.files.iter().filter(|file| !file.is_still(&folder.join(&file.path)));
        let name = self.record.file_name().unwrap_or(self.record.as_os_str()).to_string_lossy().into_owned();
        let report = AgainReport {
            schema: AGAIN_SCHEMA.to_owned(),
            record: name,
            question: Asked::text(&record),
            same: comparison.differences.is_empty(),
            version_then: record.version.clone(),
            version_now: env!("CARGO_PKG_VERSION").to_owned(),
            changed_files: changed.map(|file| file.path.clone()).collect(),
            mesh_changed: mesh(&record.answer).map(|then| Some(then) != mesh(&now)),
            compared: comparison.compared,
            largest_difference: comparison.largest.0,
            largest_at: comparison.largest.1,
            differences: comparison.differences,
        };
        let exit = if report.same { Exit::Done } else { Exit::Failed };
        output.write(&report, |style| again_text(&report, style))?;
        Ok(exit)
    }
}
