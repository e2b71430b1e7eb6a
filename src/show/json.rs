//! JSON that people can read too: one key a line, but rows of numbers kept together.

use serde::Serialize;

/// Spaces a level.
const INDENT: usize = 2;

/// The value as JSON with a final line break. Lists of numbers stand on one line.
///
/// # Errors
/// As `serde_json`: a map whose keys are no strings, or a failing `Serialize`.
pub fn to_json<T: Serialize>(value: &T) -> Result<String, serde_json::Error> {
    let mut text = spread(&serde_json::to_string(value)?);
    text.push('\n');
    Ok(text)
}

/// Breaks compact JSON into lines.
fn spread(compact: &str) -> String {
    let mut text = String::with_capacity(2 * compact.len());
    let mut depth = 0;
    // Inside a list of numbers nothing is broken.
    let mut inline = false;
    let mut rest = compact;
    while let Some(next) = rest.chars().next() {
        let mut taken = next.len_utf8();
        match next {
            '"' => {
                taken = string_length(rest);
                text.push_str(&rest[..taken]);
            }
            '{' | '[' => {
                text.push(next);
                inline = next == '[' && is_flat_list(rest);
                let empty = rest[1..].starts_with(['}', ']']);
                if !inline && !empty {
                    depth += 1;
                    new_line(&mut text, depth);
                }
            }
            '}' | ']' => {
                if inline {
                    inline = false;
                } else if !text.ends_with(['{', '[']) {
                    depth -= 1;
                    new_line(&mut text, depth);
                }
                text.push(next);
            }
            ',' if inline => text.push_str(", "),
            ',' => {
                text.push(',');
                new_line(&mut text, depth);
            }
            ':' => text.push_str(": "),
            _ => text.push(next),
        }
        rest = &rest[taken..];
    }
    text
}

fn new_line(text: &mut String, depth: usize) {
    text.push('\n');
    text.extend(std::iter::repeat_n(' ', INDENT * depth));
}

/// Length in bytes of the string that the text begins with, quotes included.
fn string_length(text: &str) -> usize {
    let mut escaped = false;
    for (at, byte) in text.bytes().enumerate().skip(1) {
        match byte {
            _ if escaped => escaped = false,
            b'\\' => escaped = true,
            b'"' => return at + 1,
            _ => {}
        }
    }
    text.len()
}

/// Whether the list that the text begins with holds something, and only numbers, booleans and nulls.
fn is_flat_list(text: &str) -> bool {
    let inside = text[1..].bytes().take_while(|byte| *byte != b']');
    let mut count = 0;
    for byte in inside {
        if matches!(byte, b'"' | b'[' | b'{') {
            return false;
        }
        count += 1;
    }
    count > 0
}

#[cfg(test)]
mod tests {
    use serde_json::{Value, json};

    use super::*;

    #[test]
    fn what_is_spread_means_the_same() {
        let value = json!({
            "a": [[1.0, -2e-9], [3, null]], "empty": [], "none": {}, "s": "x: [\"1, 2\"] \\", "list": ["p, q", "]"],
            "objects": [{"k": true}, {"k": []}], "n": null, "µ": "° {"
        });
        let text = to_json(&value).unwrap();
        assert_eq!(serde_json::from_str::<Value>(&text).unwrap(), value);
        assert!(text.contains("[1.0, -2e-9],\n"));
        assert!(text.contains("\"empty\": [],"));
        assert!(text.ends_with("}\n"));
    }
}
