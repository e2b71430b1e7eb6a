//! Drag, torque and mobility of small bodies in viscous fluids, from the command line.

mod cli;

use std::io::{IsTerminal, Write};
use std::process::ExitCode;

use cli::{Arguments, Exit, catch_bugs, wants_colour};

fn main() -> ExitCode {
    catch_bugs(run).into()
}

fn run() -> Exit {
    let (arguments, asked) = match Arguments::of_line(std::env::args_os()) {
        Ok(parsed) => parsed,
        Err(told) => {
            // Help and version come this way too. If nobody reads them, there is nobody to tell.
            let _ = told.print();
            return if told.use_stderr() { Exit::Usage } else { Exit::Done };
        }
    };
    match arguments.run(asked) {
        Ok(exit) => exit,
        Err(failure) => {
            let stderr = std::io::stderr();
            let text = failure.render(wants_colour(stderr.is_terminal()));
            let _ = stderr.lock().write_all(text.as_bytes());
            Exit::Failed
        }
    }
}
