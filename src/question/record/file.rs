//! Files that a question was read from, told apart by their contents.

use std::fs;
use std::io;
use std::path::Path;

use schemars::JsonSchema;
use serde::{Deserialize, Serialize};
use sha2::{Digest, Sha256};

/// A file as it was when it was read.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct RecordedFile {
    /// Its path, from the record's folder.
    pub path: String,
    /// Its length.
    pub bytes: u64,
    /// SHA-256 of its contents, in hexadecimal digits.
    pub sha256: String,
}

impl RecordedFile {
    /// The file at `from`, to be called `path`.
    ///
    /// # Errors
    /// It can't be read.
    pub fn of(from: &Path, path: String) -> io::Result<Self> {
        let contents = fs::read(from)?;
        Ok(Self { path, bytes: contents.len() as u64, sha256: hexadecimal(&Sha256::digest(&contents)) })
    }

    /// Whether the file at `from` still holds the same.
    pub fn is_still(&self, from: &Path) -> bool {
        Self::of(from, self.path.clone()).is_ok_and(|now| now == *self)
    }
}

/// Bytes as hexadecimal digits.
pub(in crate::question) fn hexadecimal(bytes: &[u8]) -> String {
    bytes.iter().map(|byte| format!("{byte:02x}")).collect()
}
