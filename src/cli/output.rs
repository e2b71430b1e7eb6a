//! Where answers go: stdout, and a JSON file that is either whole or not there.

use std::fs::{self, File};
use std::io::{self, IsTerminal, Write};
use std::path::{Path, PathBuf};

use serde::Serialize;
use slowmote::question::{RECORD_SCHEMA, Record, RecordedFile};
use slowmote::show::{Style, to_json};

use super::Failure;
use super::arguments::as_value;
use super::asked::Asked;
use super::options::{OutputOptions, RecordOptions};

/// Outputs of one run, opened before the work begins.
pub struct Output {
    quiet: bool,
    json: Json,
    record: Option<Draft>,
}

/// A record to be written.
struct Draft {
    file: NewFile,
    /// The record without its answer.
    record: Record,
}

enum Json {
    None,
    Stdout,
    File(NewFile),
}

impl Output {
    /// Opens what was asked for. `inputs` are files that must not be overwritten.
    ///
    /// # Errors
    /// The JSON file can't be written, or is one of the inputs.
    pub fn open(options: &OutputOptions, inputs: &[&Path]) -> Result<Self, Failure> {
        let json = match &options.json {
            None => Json::None,
            Some(path) if path.as_os_str() == OutputOptions::STDOUT => Json::Stdout,
            Some(path) => Json::File(NewFile::create("JSON", path, inputs)?),
        };
        Ok(Self { quiet: options.quiet, json, record: None })
    }

    /// Opens a record too, if one is wanted, of what was `asked` and the `files` it was read from.
    ///
    /// # Errors
    /// The record can't be written, or is one of the files.
    pub fn recording(mut self, options: &RecordOptions, asked: Asked, files: &[PathBuf]) -> Result<Self, Failure> {
        let Some(path) = &options.record else { return Ok(self) };
        let inputs = files.iter().map(PathBuf::as_path).collect::<Vec<_>>();
        let file = NewFile::create("record", path, &inputs)?;
        let folder = match path.parent() {
            Some(folder) if folder != Path::new("") => folder,
            _ => Path::new("."),
        };
        let seen = |path: &Path| fs::canonicalize(path).map_err(|error| unreadable(path, &error));
        let folder = seen(folder)?;
        let mut subject = asked.subject;
        let mut recorded = Vec::new();
        for from in files {
            let whole = seen(from)?;
            let near = pathdiff::diff_paths(&whole, &folder).unwrap_or(whole).to_string_lossy().into_owned();
            if subject.as_ref().is_some_and(|subject| Path::new(subject) == from) {
                subject = Some(near.clone());
            }
            recorded.push(RecordedFile::of(from, near).map_err(|error| unreadable(from, &error))?);
        }
        let record = Record {
            schema: RECORD_SCHEMA.to_owned(),
            version: env!("CARGO_PKG_VERSION").to_owned(),
            command: asked.command,
            subject,
            options: asked.options,
            files: recorded,
            answer: serde_json::Value::Null,
        };
        self.record = Some(Draft { file, record });
        Ok(self)
    }

    /// Writes the answer: JSON where it was asked for, text on stdout unless that is JSON's or quiet was asked for.
    ///
    /// # Errors
    /// A file or stdout can't be written; a reader of stdout that went away is none.
    pub fn write<T: Serialize>(self, answer: &T, text: impl FnOnce(Style) -> String) -> Result<(), Failure> {
        let json = || to_json(answer).map_err(|error| Failure::of(&error).during("the answer can't be put into JSON"));
        if let Some(Draft { file, mut record }) = self.record {
            record.answer = as_value(answer)?;
            let text =
                to_json(&record).map_err(|error| Failure::of(&error).during("the record can't be put into JSON"))?;
            file.finish(text.as_bytes())?;
        }
        let wants_text = !self.quiet;
        match self.json {
            Json::Stdout => return to_stdout(&json()?),
            Json::File(file) => file.finish(json()?.as_bytes())?,
            Json::None => {}
        }
        if wants_text { to_stdout(&text(stdout_style())) } else { Ok(()) }
    }
}

fn unreadable(path: &Path, error: &io::Error) -> Failure {
    Failure::of(error).during(format!("{} can't be read", path.display()))
}

/// Writes to stdout; a closed pipe is no error.
///
/// # Errors
/// Anything else that keeps stdout from being written, such as a full disk.
pub fn to_stdout(text: &str) -> Result<(), Failure> {
    let mut stdout = io::stdout().lock();
    match stdout.write_all(text.as_bytes()).and_then(|()| stdout.flush()) {
        Err(error) if error.kind() != io::ErrorKind::BrokenPipe => {
            Err(Failure::of(&error).during("the answer can't be written to stdout"))
        }
        _ => Ok(()),
    }
}

/// Whether colours are wanted on a stream that is a terminal or not.
pub fn wants_colour(is_terminal: bool) -> bool {
    // NO_COLOR counts when it is set and not empty.
    is_terminal && std::env::var_os("NO_COLOR").is_none_or(|value| value.is_empty())
}

/// The style of text on stdout.
pub fn stdout_style() -> Style {
    Style { colour: wants_colour(io::stdout().is_terminal()), ..Style::PLAIN }
}

/// A file that appears under its name only when it is whole.
pub struct NewFile {
    path: PathBuf,
    /// Where it is written until then; none for a device, which is written directly.
    draft: Option<PathBuf>,
    file: File,
}

impl NewFile {
    /// Opens a draft of the file, so that what forbids writing it shows before the work. `what` names its kind; `inputs` are
    /// files that must not be overwritten.
    ///
    /// # Errors
    /// It can't be written, or is one of the inputs.
    pub fn create(what: &str, path: &Path, inputs: &[&Path]) -> Result<Self, Failure> {
        let refuse =
            |why: String| Failure::new(format!("the {what} file {} can't be written", path.display())).hint(why);
        let failed = |error: io::Error| {
            Failure::of(&error)
                .during(format!("the {what} file {} can't be written", path.display()))
                .hint("check that its folder exists and may be written to")
        };
        let known = fs::canonicalize(path).ok();
        if let Some(known) = &known {
            if inputs.iter().any(|input| fs::canonicalize(input).is_ok_and(|input| input == *known)) {
                return Err(refuse("it is the file the body is read from; choose another name".to_owned()));
            }
            let kind = fs::metadata(known).map_err(failed)?;
            if kind.is_dir() {
                return Err(refuse("it is a folder; name a file in it".to_owned()));
            }
            if !kind.is_file() {
                let file = File::options().write(true).open(known).map_err(failed)?;
                return Ok(Self { path: known.clone(), draft: None, file });
            }
        }
        let path = known.unwrap_or_else(|| path.to_path_buf());
        let Some(name) = path.file_name() else {
            return Err(refuse("it has no name".to_owned()));
        };
        let mut draft_name = std::ffi::OsString::from(".");
        draft_name.push(name);
        draft_name.push(format!(".{}.part", std::process::id()));
        let draft = path.with_file_name(draft_name);
        let file = File::options().write(true).create(true).truncate(true).open(&draft).map_err(failed)?;
        Ok(Self { path, draft: Some(draft), file })
    }

    /// Writes it whole, under its own name.
    ///
    /// # Errors
    /// The system refuses, as on a full disk.
    pub fn finish(mut self, bytes: &[u8]) -> Result<(), Failure> {
        let written = self.file.write_all(bytes).and_then(|()| self.file.flush());
        let moved = written.and_then(|()| match &self.draft {
            Some(draft) => fs::rename(draft, &self.path),
            None => Ok(()),
        });
        match moved {
            Ok(()) => {
                self.draft = None;
                Ok(())
            }
            Err(error) => Err(Failure::of(&error).during(format!("{} can't be written", self.path.display()))),
        }
    }
}

impl Drop for NewFile {
    fn drop(&mut self) {
        if let Some(draft) = &self.draft {
            // Left over from a failed run; if it can't be removed there is nothing more to do.
            let _ = fs::remove_file(draft);
        }
    }
}
