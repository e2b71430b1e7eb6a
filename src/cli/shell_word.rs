//! Words for commands that the user may copy.

/// The text as one word of a shell's command line, quoted where it must be.
pub fn shell_word(text: &str) -> String {
    let is_plain = |c: char| c.is_alphanumeric() || "._/+-:,=%@".contains(c);
    // A file whose name begins like an option is named through its folder.
    let text = if text.starts_with('-') { format!("./{text}") } else { text.to_owned() };
    if !text.is_empty() && text.chars().all(is_plain) { text } else { format!("'{}'", text.replace('\'', r"'\''")) }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn only_what_a_shell_would_take_apart_is_quoted() {
        assert_eq!(shell_word("scans/bead-2.stl"), "scans/bead-2.stl");
        assert_eq!(shell_word("my bead.stl"), "'my bead.stl'");
        assert_eq!(shell_word("it's.stl"), r"'it'\''s.stl'");
        assert_eq!(shell_word("-x.stl"), "./-x.stl");
        assert_eq!(shell_word("$(a).stl"), "'$(a).stl'");
    }
}
