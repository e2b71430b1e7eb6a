//! Bugs: told as such, with a request to report them, and an exit code of their own.

use std::io::Write as _;
use std::panic::{self, AssertUnwindSafe};

use super::Exit;

/// Runs the program; a panic is a bug, whatever it says.
pub fn catch_bugs(run: impl FnOnce() -> Exit) -> Exit {
    panic::set_hook(Box::new(|panic| {
        let what = panic.payload_as_str().unwrap_or("no message");
        let place = panic.location().map_or_else(String::new, |place| format!(" at {place}"));
        // Nobody may be listening any more.
        let _ = writeln!(
            std::io::stderr(),
            "error: this is a bug in slowmote {}, not a mistake of yours\ncaused by: {what}{place}\n\
             hint: please report these lines together with the command and its input",
            env!("CARGO_PKG_VERSION")
        );
    }));
    panic::catch_unwind(AssertUnwindSafe(run)).unwrap_or(Exit::Bug)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_panic_becomes_the_exit_code_of_a_bug() {
        let exit = catch_bugs(|| panic!("on purpose, in a test"));
        let _ = panic::take_hook();
        assert_eq!(exit, Exit::Bug);
        assert_eq!(exit.code(), 70);
    }
}
