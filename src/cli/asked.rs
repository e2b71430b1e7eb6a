//! What was asked, in the words of the command line: what a record keeps, and how a command is called again from it.

use std::collections::BTreeMap;
use std::ffi::OsString;
use std::path::Path;

use clap::parser::ValueSource;
use clap::{ArgAction, ArgMatches, Command};
use slowmote::question::Record;

/// Options that say where an answer goes or what the machine may spend, not what is asked.
const NOT_ASKED: [&str; 8] = ["json", "quiet", "record", "write", "threads", "memory", "help", "strict"];

/// A command with its subject and options as texts.
#[derive(Debug, Clone, PartialEq, Eq, Default)]
pub struct Asked {
    /// The command.
    pub command: String,
    /// Its positional argument.
    pub subject: Option<String>,
    /// Its options by their long names; a switch has no text.
    pub options: BTreeMap<String, Vec<String>>,
}

impl Asked {
    /// What these matches ask of this program; none without a command.
    pub fn of(program: &Command, matches: &ArgMatches) -> Option<Self> {
        let (name, own) = matches.subcommand()?;
        let mut asked = Self { command: name.to_owned(), subject: None, options: BTreeMap::new() };
        for argument in program.find_subcommand(name)?.get_arguments() {
            let id = argument.get_id().as_str();
            if NOT_ASKED.contains(&id) || own.value_source(id).is_none() {
                continue;
            }
            let texts = || own.get_raw(id).into_iter().flatten().map(|text| text.to_string_lossy().into_owned());
            match (argument.get_action(), argument.get_long()) {
                (ArgAction::SetTrue, Some(long)) => {
                    if own.value_source(id) == Some(ValueSource::CommandLine) {
                        asked.options.insert(long.to_owned(), Vec::new());
                    }
                }
                (_, Some(long)) => {
                    asked.options.insert(long.to_owned(), texts().collect());
                }
                (_, None) => asked.subject = texts().next(),
            }
        }
        Some(asked)
    }

    /// Writes down what was taken for granted, so that another version with other defaults is asked the same.
    pub fn settle(&mut self, option: &str, text: impl Into<String>) {
        self.options.entry(option.to_owned()).or_insert_with(|| vec![text.into()]);
    }

    /// The command line of a record's question; files count from the record's `folder`.
    pub fn line(record: &Record, folder: &Path) -> Vec<OsString> {
        let mut line: Vec<OsString> = vec!["slowmote".into(), record.command.clone().into()];
        for (option, texts) in &record.options {
            if texts.is_empty() {
                line.push(format!("--{option}").into());
            }
            line.extend(texts.iter().map(|text| OsString::from(format!("--{option}={text}"))));
        }
        if let Some(subject) = &record.subject {
            let is_file = record.files.iter().any(|file| file.path == *subject);
            line.push("--".into());
            line.push(if is_file { folder.join(subject).into_os_string() } else { subject.into() });
        }
        line
    }

    /// The question as one reads it.
    pub fn text(record: &Record) -> String {
        let mut words = vec![record.command.clone()];
        words.extend(record.subject.clone());
        for (option, texts) in &record.options {
            words.push(format!("--{option}"));
            words.extend(texts.iter().cloned());
        }
        words.join(" ")
    }
}
