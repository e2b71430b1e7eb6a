//! What a second computation says of the first.

use schemars::JsonSchema;
use serde::{Deserialize, Serialize};
use serde_json::Value;

use super::drag::compare_drag;
use super::{Record, RecordError};
use crate::question::DragAnswer;

/// Name and version of the layout of [`AgainReport`].
pub const AGAIN_SCHEMA: &str = "slowmote.again.1";

/// The same formula evaluated by two compilers may differ by this.
const ROUNDING: f64 = 1e-9;

/// The command whose answers have errors of their own.
const DRAG: &str = "drag";

/// Keys of what describes the run, not what was asked.
const OF_THE_RUN: [&str; 4] = ["version", "seconds", "next_command", "written"];

/// What `again` answers.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct AgainReport {
    /// Name and version of this layout: `slowmote.again.1`.
    pub schema: String,
    /// The record's file name.
    pub record: String,
    /// The question in the words of the command line.
    pub question: String,
    /// Whether nothing differs beyond the stated errors.
    pub same: bool,
    /// Version of the program that answered first.
    pub version_then: String,
    /// Version of this program.
    pub version_now: String,
    /// Files that were read and are not what they were, or are gone.
    pub changed_files: Vec<String>,
    /// Whether the mesh that was solved is another one; null where nothing is solved.
    pub mesh_changed: Option<bool>,
    /// How many numbers and words were compared.
    pub compared: usize,
    /// The largest difference within what is allowed, as a fraction of the quantity's size.
    pub largest_difference: f64,
    /// Where that is.
    pub largest_at: Option<String>,
    /// What differs beyond the stated errors, then and now.
    pub differences: Vec<Difference>,
}

/// One number, tensor or word that differs beyond the stated errors.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct Difference {
    /// Its key in the answer, as in `resistance.force_velocity_n_s_per_m`.
    pub key: String,
    /// As it was.
    pub then: Value,
    /// As it is.
    pub now: Value,
    /// The difference as a fraction of the quantity's size; null for words.
    pub difference: Option<f64>,
    /// What the stated errors of both allow; null for words.
    pub allowed: Option<f64>,
}

/// What was found so far.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Comparison {
    /// How many things were compared.
    pub compared: usize,
    /// The largest difference within what is allowed, and where.
    pub largest: (f64, Option<String>),
    /// What differs by more.
    pub differences: Vec<Difference>,
}

impl Comparison {
    /// Compares the recorded answer with one to the same question.
    ///
    /// # Errors
    /// One of them is no answer to the record's command.
    pub fn of(record: &Record, now: &Value) -> Result<Self, RecordError> {
        let mut comparison = Self::default();
        if record.command == DRAG {
            let read = |value: &Value| {
                serde_json::from_value::<DragAnswer>(value.clone())
                    .map_err(|source| RecordError::Answer { command: record.command.clone(), source })
            };
            compare_drag(&mut comparison, &read(&record.answer)?, &read(now)?);
        } else {
            comparison.values("", &record.answer, now);
        }
        Ok(comparison)
    }

    /// Compares numbers whose difference, as a fraction of `size`, may be `allowed`.
    pub(super) fn numbers(&mut self, key: &str, then: &[f64], now: &[f64], size: f64, allowed: f64) {
        self.compared += then.len();
        // What is not a number counts as different, which the maximum alone would pass over.
        let apart = |(a, b): (&f64, &f64)| if (a - b).is_nan() { f64::INFINITY } else { (a - b).abs() };
        let worst = then.iter().zip(now).map(apart).fold(0.0_f64, f64::max);
        let difference = if worst == 0.0 { 0.0 } else { worst / size };
        if then.len() == now.len() && difference <= allowed + ROUNDING {
            if difference > self.largest.0 {
                self.largest = (difference, Some(key.to_owned()));
            }
        } else {
            self.differences.push(Difference {
                key: key.to_owned(),
                then: then.into(),
                now: now.into(),
                difference: difference.is_finite().then_some(difference),
                allowed: Some(allowed),
            });
        }
    }

    /// Compares words, or whether there is an answer at all.
    pub(super) fn words<T: Serialize + PartialEq>(&mut self, key: &str, then: &T, now: &T) {
        self.compared += 1;
        if then != now {
            let value = |side: &T| serde_json::to_value(side).unwrap_or(Value::Null);
            self.differences.push(Difference {
                key: key.to_owned(),
                then: value(then),
                now: value(now),
                difference: None,
                allowed: None,
            });
        }
    }

    /// Compares answers without errors of their own, key by key: closed formulas give the same numbers again.
    fn values(&mut self, key: &str, then: &Value, now: &Value) {
        let below = |name: &str| if key.is_empty() { name.to_owned() } else { format!("{key}.{name}") };
        match (then, now) {
            (Value::Object(a), Value::Object(b)) => {
                let added = b.keys().filter(|name| !a.contains_key(*name));
                for name in a.keys().chain(added).filter(|name| !OF_THE_RUN.contains(&name.as_str())) {
                    self.values(&below(name), a.get(name).unwrap_or(&Value::Null), b.get(name).unwrap_or(&Value::Null));
                }
            }
            (Value::Array(a), Value::Array(b)) if a.len() == b.len() => {
                for (at, (a, b)) in a.iter().zip(b).enumerate() {
                    self.values(&below(&(at + 1).to_string()), a, b);
                }
            }
            _ => match (then.as_f64(), now.as_f64()) {
                (Some(a), Some(b)) => self.numbers(key, &[a], &[b], a.abs().max(b.abs()), 0.0),
                _ => self.words(key, then, now),
            },
        }
    }
}

#[cfg(test)]
mod tests {
    use serde_json::json;

    use super::*;

    #[test]
    fn what_has_no_error_must_be_the_same() {
        let then = json!({"a": {"b": [1.0, 2.0]}, "word": "x", "seconds": 1.0, "gone": null});
        let mut comparison = Comparison::default();
        comparison.values("", &then, &json!({"a": {"b": [1.0, 2.0 + 1e-12]}, "word": "x", "seconds": 9.0}));
        assert!(comparison.differences.is_empty() && comparison.compared == 4, "{comparison:?}");
        comparison.values("", &then, &json!({"a": {"b": [1.0, 2.1]}, "word": "y", "new": 1}));
        let keys = comparison.differences.iter().map(|difference| difference.key.as_str()).collect::<Vec<_>>();
        assert_eq!(keys, ["a.b.2", "word", "new"]);
        let list = json!({"list": [1.0]});
        let mut comparison = Comparison::default();
        comparison.values("", &list, &json!({"list": [1.0, 2.0]}));
        assert_eq!(comparison.differences.len(), 1);
    }

    #[test]
    fn a_number_that_is_none_differs() {
        let mut comparison = Comparison::default();
        comparison.numbers("x", &[f64::NAN], &[1.0], 1.0, 0.5);
        comparison.numbers("y", &[1.0, 2.0], &[1.0], 1.0, 0.5);
        assert_eq!(comparison.differences.len(), 2);
    }
}
