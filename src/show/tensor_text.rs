//! Tensors of three rows, in one unit each, beside each other.

use super::numbers::entry;
use crate::physical::quantity::DisplayUnit;
use crate::question::Tensor;

/// Least width of a column of numbers.
const COLUMN: usize = 9;

/// Space between two tensors.
const BETWEEN: usize = 5;

/// A tensor on its way to text.
pub(super) struct TensorText {
    pub what: String,
    pub tensor: Tensor,
    pub unit: DisplayUnit,
    pub digits: usize,
    /// Entries up to this are shown as 0.
    pub least: f64,
}

impl TensorText {
    fn largest(&self) -> f64 {
        self.tensor.iter().flatten().fold(0.0_f64, |largest, x| largest.max(x.abs()))
    }

    /// Whether no entry is larger than its error.
    pub(super) fn vanishes(&self) -> bool {
        self.largest() <= self.least
    }

    /// A heading and three rows, all of one width.
    fn lines(&self) -> [String; 4] {
        let unit = self.unit.choose(self.largest(), self.digits);
        let (largest, least) = (unit.value(self.largest()), unit.value(self.least));
        let cells = self.tensor.map(|row| row.map(|x| entry(unit.value(x), largest, self.digits, least)));
        let column = cells.iter().flatten().map(|cell| cell.chars().count() + 2).max().unwrap_or(0).max(COLUMN);
        let heading = format!("{}, {}", self.what, unit.symbol());
        let rows = cells.map(|row| row.map(|cell| format!("{cell:>column$}")).concat());
        let width = heading.chars().count().max(3 * column);
        [heading, rows[0].clone(), rows[1].clone(), rows[2].clone()].map(|line| format!("{line:<width$}"))
    }
}

/// Two tensors beside each other, or one alone.
pub(super) fn side_by_side(left: &TensorText, right: Option<&TensorText>) -> Vec<String> {
    let left = left.lines();
    match right.map(TensorText::lines) {
        Some(right) => {
            left.iter().zip(&right).map(|(left, right)| format!("{left}{}{right}", " ".repeat(BETWEEN))).collect()
        }
        None => left.to_vec(),
    }
}
