//! The command line: arguments, to a question, to what is shown. One file a command.
//!
//! Everything that touches the world outside the library stands here: arguments, files, the terminal, the clock's
//! patience, memory and threads, exit codes.

mod again;
mod arguments;
mod asked;
mod bug;
mod case;
mod drag;
mod exit;
mod failure;
mod fluid;
mod machine;
mod material;
mod options;
mod output;
mod progress;
mod regime;
mod schema;
mod shell_word;
mod surface;

pub use arguments::Arguments;
pub use bug::catch_bugs;
pub use exit::Exit;
pub use failure::Failure;
pub use output::wants_colour;
