//! One dimensionless number on its way to the answer.

use super::answer::Concern;
use crate::question::answer::Verdict;
use crate::question::bands::Bands;

/// A number, its bounds, and how it is judged.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Number {
    pub name: &'static str,
    pub formula: &'static str,
    pub concern: Concern,
    /// The value that is judged: of a bracket the worse end.
    pub value: f64,
    /// The other end of the bracket, where the shape is not known well enough.
    pub other_end: Option<f64>,
    pub bands: Bands,
    pub meaning: String,
}

impl Number {
    pub(super) fn verdict(&self) -> Verdict {
        self.bands.verdict(self.value)
    }

    /// Gives it the other end of its bracket, unless the ends are one.
    pub(super) fn with_other_end(mut self, other: f64) -> Self {
        self.other_end = (other != self.value).then_some(other);
        self
    }
}

/// The sentence of a verdict: creeping, corrected, doubtful, outside.
pub(super) fn one_of(verdict: Verdict, sentences: [&str; 4]) -> String {
    let [creeping, corrected, doubtful, outside] = sentences;
    match verdict {
        Verdict::Creeping => creeping,
        Verdict::Corrected => corrected,
        Verdict::Doubtful => doubtful,
        Verdict::Outside => outside,
    }
    .to_owned()
}

/// A share as a percentage with two digits.
pub(super) fn percent(fraction: f64) -> String {
    format!("{} %", crate::physical::quantity::format_number(100.0 * fraction, 2))
}
