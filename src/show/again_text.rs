//! What a second computation says of the first, as text.

use serde_json::Value;

use super::numbers::percent;
use super::sheet::{Sheet, Style, Tone};
use crate::question::{AgainReport, Difference};

/// Differences beyond these are counted only.
const MOST_LISTED: usize = 12;

/// Lists of numbers longer than this are cut.
const LONGEST_VALUE: usize = 160;

/// The report as text.
pub fn again_text(report: &AgainReport, style: Style) -> String {
    let mut sheet = Sheet::new(style);
    sheet.title(&format!("{}, computed again", report.record));
    sheet.gap();
    sheet.item("question", &report.question);
    if report.same {
        sheet.toned_item("verdict", Tone::Good, "the same", ", within the stated errors");
    } else {
        let count = report.differences.len();
        let what = if count == 1 { "one result differs" } else { &format!("{count} results differ") };
        sheet.toned_item("verdict", Tone::Bad, "not the same", &format!(": {what} beyond the stated errors"));
    }
    let largest = match &report.largest_at {
        Some(key) => format!("; the largest allowed difference is {}, in {key}", percent(report.largest_difference)),
        None if report.same => ", all equal".to_owned(),
        None => String::new(),
    };
    sheet.item("compared", &format!("{} numbers and words{largest}", report.compared));
    let version = if report.version_then == report.version_now {
        format!("{} then and now", report.version_now)
    } else {
        format!("{} then, {} now", report.version_then, report.version_now)
    };
    sheet.item("version", &version);
    for file in &report.changed_files {
        sheet.toned_item("file", Tone::Middling, file, " is not what it was, or is gone");
    }
    if report.mesh_changed == Some(true) {
        sheet.item("mesh", "another one than then; the errors of both cover that");
    }
    if !report.differences.is_empty() {
        sheet.gap();
    }
    for difference in report.differences.iter().take(MOST_LISTED) {
        sheet.item("differs", &told(difference));
    }
    let more = report.differences.len().saturating_sub(MOST_LISTED);
    if more > 0 {
        sheet.item("", &format!("and {more} more, which --json lists"));
    }
    sheet.finish()
}

fn told(difference: &Difference) -> String {
    let value = |value: &Value| {
        let text = match value.as_array().map(Vec::as_slice) {
            Some([one]) => one.to_string(),
            _ => value.to_string(),
        };
        match text.char_indices().nth(LONGEST_VALUE) {
            Some((end, _)) => format!("{}...", &text[..end]),
            None => text,
        }
    };
    let by = match (difference.difference, difference.allowed) {
        (Some(by), Some(allowed)) => format!(", by {} where {} is allowed", percent(by), percent(allowed)),
        _ => String::new(),
    };
    format!("{} was {} and is {}{by}", difference.key, value(&difference.then), value(&difference.now))
}
