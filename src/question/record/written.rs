//! The record itself.

use std::collections::BTreeMap;
use std::fs::File;
use std::io::Read;
use std::path::{Path, PathBuf};

use schemars::JsonSchema;
use serde::{Deserialize, Serialize};
use thiserror::Error;

use super::RecordedFile;

/// Name and version of the layout of [`Record`].
pub const RECORD_SCHEMA: &str = "slowmote.record.1";

/// A record longer than this is none: a grand resistance of a hundred bodies takes some ten megabytes.
const LONGEST: u64 = 1 << 28;

/// An answer, with the question in the words of the command line.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct Record {
    /// Name and version of this layout: `slowmote.record.1`.
    pub schema: String,
    /// Version of the program that answered.
    pub version: String,
    /// The command, such as `drag`.
    pub command: String,
    /// What it was about: a shape or a fluid as it was written, or a file's path from the record's folder; null if nothing.
    pub subject: Option<String>,
    /// The options with their texts, those left to their defaults too; a switch has no text.
    pub options: BTreeMap<String, Vec<String>>,
    /// The files that were read.
    pub files: Vec<RecordedFile>,
    /// The answer, in its own layout.
    pub answer: serde_json::Value,
}

/// Why a record can't be used.
#[derive(Debug, Error)]
#[non_exhaustive]
pub enum RecordError {
    /// The file can't be read.
    #[error("the record {} can't be read", .path.display())]
    Unreadable {
        /// The file.
        path: PathBuf,
        /// Why.
        source: std::io::Error,
    },
    /// The file is longer than any record.
    #[error("{} is longer than {LONGEST} bytes, so it is no record", .path.display())]
    TooLong {
        /// The file.
        path: PathBuf,
    },
    /// The file is no record.
    #[error("{} is not a record", .path.display())]
    Malformed {
        /// The file.
        path: PathBuf,
        /// What is wrong, with line and column.
        source: serde_json::Error,
    },
    /// The layout is another one.
    #[error("the record {} has the layout `{found}`, and this version reads `{RECORD_SCHEMA}`", .path.display())]
    OtherSchema {
        /// The file.
        path: PathBuf,
        /// The layout it names.
        found: String,
    },
    /// The answer in it is not one of its command.
    #[error("the answer in the record is not one that `{command}` gives")]
    Answer {
        /// The command.
        command: String,
        /// What is wrong.
        source: serde_json::Error,
    },
}

impl Record {
    /// Reads a record.
    ///
    /// # Errors
    /// [`RecordError`]: unreadable, too long, not JSON, unknown or missing keys, another layout.
    pub fn read(path: &Path) -> Result<Self, RecordError> {
        let unreadable = |source| RecordError::Unreadable { path: path.to_path_buf(), source };
        let mut text = Vec::new();
        File::open(path).map_err(unreadable)?.take(LONGEST + 1).read_to_end(&mut text).map_err(unreadable)?;
        if text.len() as u64 > LONGEST {
            return Err(RecordError::TooLong { path: path.to_path_buf() });
        }
        let record: Self = serde_json::from_slice(&text)
            .map_err(|source| RecordError::Malformed { path: path.to_path_buf(), source })?;
        if record.schema != RECORD_SCHEMA {
            return Err(RecordError::OtherSchema { path: path.to_path_buf(), found: record.schema });
        }
        Ok(record)
    }
}
