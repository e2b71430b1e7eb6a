//! A run that failed, and how that is told: what went wrong, why, and what to do next.

use std::error::Error;
use std::fmt::Write as _;

/// What went wrong.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Failure {
    message: String,
    causes: Vec<String>,
    hints: Vec<String>,
}

impl Failure {
    /// Input that can't be used, told in a sentence.
    pub fn new(message: impl Into<String>) -> Self {
        Self { message: message.into(), causes: Vec::new(), hints: Vec::new() }
    }

    /// An error of the library with what caused it.
    pub fn of(error: &dyn Error) -> Self {
        let mut failure = Self::new(error.to_string());
        let mut said = failure.message.clone();
        let mut source = error.source();
        while let Some(cause) = source {
            let text = cause.to_string();
            // Some errors say their cause themselves.
            if !said.contains(&text) {
                failure.causes.push(text.clone());
                said = text;
            }
            source = cause.source();
        }
        failure
    }

    /// Puts what was being done before the error itself, which becomes its first cause.
    pub fn during(mut self, doing: impl Into<String>) -> Self {
        self.causes.insert(0, std::mem::replace(&mut self.message, doing.into()));
        self
    }

    /// Adds why, in a sentence.
    pub fn because(mut self, cause: impl Into<String>) -> Self {
        self.causes.push(cause.into());
        self
    }

    /// Adds what the user can do next.
    pub fn hint(mut self, hint: impl Into<String>) -> Self {
        self.hints.push(hint.into());
        self
    }

    /// The text for stderr.
    pub fn render(&self, colour: bool) -> String {
        let label = |label: &str, code: &str| match colour {
            true => format!("\u{1b}[{code}m{label}:\u{1b}[0m"),
            false => format!("{label}:"),
        };
        let mut text = format!("{} {}\n", label("error", "1;31"), self.message);
        for cause in &self.causes {
            let _ = writeln!(text, "{} {cause}", label("caused by", "1"));
        }
        for hint in &self.hints {
            let _ = writeln!(text, "{} {hint}", label("hint", "1;36"));
        }
        text
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn one_shape_for_all_errors() {
        let failure = Failure::new("the pressure is off").during("the tea can't be made").hint("wait");
        assert_eq!(failure.render(false), "error: the tea can't be made\ncaused by: the pressure is off\nhint: wait\n");
    }
}
