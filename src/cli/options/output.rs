//! What is written, and where.

use std::path::PathBuf;

use clap::Args;

/// Outputs.
#[derive(Debug, Clone, Args)]
#[command(next_help_heading = "Output")]
pub struct OutputOptions {
    /// JSON instead of text on stdout, or JSON in FILE beside the text
    #[arg(long, value_name = "FILE", num_args = 0..=1, require_equals = true, default_missing_value = Self::STDOUT)]
    pub json: Option<PathBuf>,

    /// No text and no progress, only what is asked for by other options
    #[arg(long, short)]
    pub quiet: bool,
}

/// A record of the answer.
#[derive(Debug, Clone, Args)]
pub struct RecordOptions {
    /// Writes the answer with all that it takes to compute it again (`slowmote again FILE`)
    #[arg(long, value_name = "FILE", help_heading = "Output")]
    pub record: Option<PathBuf>,
}

impl OutputOptions {
    /// Stands for stdout in place of a file's name.
    pub const STDOUT: &'static str = "-";
}
