//! Records: an answer with all that it takes to compute it again, and what a second computation says of the first.

mod compare;
mod drag;
mod file;
mod written;

pub use compare::{AGAIN_SCHEMA, AgainReport, Comparison, Difference};
pub use file::RecordedFile;
pub(super) use file::hexadecimal;
pub use written::{RECORD_SCHEMA, Record, RecordError};
