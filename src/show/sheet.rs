//! A sheet of labelled lines: the label on the left, what there is to say in a column of its own.

use super::numbers::GLUE;

/// Width of the text column's left margin.
const MARGIN: usize = 14;

/// Indent of the labels.
const LABEL_INDENT: usize = 2;

/// How text is set.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Style {
    /// Whether colours and bold face are used.
    pub colour: bool,
    /// Columns on a line.
    pub width: usize,
}

impl Style {
    /// No colours, 92 columns: what a file or a pipe gets.
    pub const PLAIN: Style = Style { colour: false, width: 92 };
}

/// What a piece of text is, which tells how it is set off.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Tone {
    Label,
    Title,
    Good,
    Middling,
    Bad,
}

impl Style {
    pub(super) fn set(&self, tone: Tone, text: &str) -> String {
        if !self.colour {
            return text.to_owned();
        }
        let code = match tone {
            Tone::Label => "2",
            Tone::Title => "1",
            Tone::Good => "1;32",
            Tone::Middling => "1;33",
            Tone::Bad => "1;31",
        };
        format!("\u{1b}[{code}m{text}\u{1b}[0m")
    }
}

/// Text under construction.
pub(super) struct Sheet {
    text: String,
    style: Style,
}

impl Sheet {
    pub(super) fn new(style: Style) -> Self {
        Self { text: String::new(), style }
    }

    pub(super) fn title(&mut self, title: &str) {
        self.text.push_str(&self.style.set(Tone::Title, title));
        self.text.push('\n');
    }

    pub(super) fn gap(&mut self) {
        self.text.push('\n');
    }

    /// A labelled paragraph; an empty label goes on with the one before.
    pub(super) fn item(&mut self, label: &str, paragraph: &str) {
        let room = self.style.width.saturating_sub(MARGIN).max(20);
        for (number, line) in wrapped(paragraph, room).iter().enumerate() {
            self.line(if number == 0 { label } else { "" }, line);
        }
    }

    /// A labelled paragraph that begins with a word set off by its tone.
    pub(super) fn toned_item(&mut self, label: &str, tone: Tone, word: &str, paragraph: &str) {
        let room = self.style.width.saturating_sub(MARGIN).max(20);
        let plain = format!("{word}{paragraph}");
        for (number, line) in wrapped(&plain, room).iter().enumerate() {
            match line.strip_prefix(word).filter(|_| number == 0) {
                Some(rest) => self.line(label, &format!("{}{rest}", self.style.set(tone, word))),
                None => self.line("", line),
            }
        }
    }

    /// A paragraph whose label is a judgement, set off by its tone.
    pub(super) fn judged_item(&mut self, tone: Tone, label: &str, paragraph: &str) {
        let room = self.style.width.saturating_sub(MARGIN).max(20);
        for (number, line) in wrapped(paragraph, room).iter().enumerate() {
            if number == 0 { self.toned_line(tone, label, line) } else { self.line("", line) }
        }
    }

    /// A line that is not wrapped.
    pub(super) fn line(&mut self, label: &str, line: &str) {
        self.toned_line(Tone::Label, label, line);
    }

    fn toned_line(&mut self, tone: Tone, label: &str, line: &str) {
        let padding = MARGIN.saturating_sub(LABEL_INDENT + label.chars().count()).max(1);
        let label = if label.is_empty() { String::new() } else { self.style.set(tone, label) };
        let set = format!("{}{label}{}{line}", " ".repeat(LABEL_INDENT), " ".repeat(padding));
        self.text.push_str(set.trim_end());
        self.text.push('\n');
    }

    pub(super) fn finish(self) -> String {
        self.text.replace(GLUE, " ")
    }
}

/// The text as a sentence: with a capital and a full stop.
pub(super) fn sentence(text: &str) -> String {
    let mut rest = text.chars();
    let first = rest.next().map(|first| first.to_uppercase().to_string()).unwrap_or_default();
    let end = if text.ends_with(['.', '?', '!']) { "" } else { "." };
    format!("{first}{}{end}", rest.as_str())
}

/// The paragraph in lines of at most `width` characters, broken at spaces; longer words stay whole.
fn wrapped(paragraph: &str, width: usize) -> Vec<String> {
    let mut lines = vec![String::new()];
    for word in paragraph.split(' ').filter(|word| !word.is_empty()) {
        let line =
            lines.last_mut().filter(|line| line.is_empty() || line.chars().count() + 1 + word.chars().count() <= width);
        match line {
            Some(line) => {
                if !line.is_empty() {
                    line.push(' ');
                }
                line.push_str(word);
            }
            None => lines.push(word.to_owned()),
        }
    }
    lines
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn paragraphs_hang_under_their_label() {
        let mut sheet = Sheet::new(Style { colour: false, width: 34 });
        sheet.item("fluid", "water at 20 degC and some more of it");
        assert_eq!(sheet.finish(), "  fluid       water at 20 degC and\n              some more of it\n");
    }

    #[test]
    fn colours_do_not_change_the_layout() {
        let plain = {
            let mut sheet = Sheet::new(Style { colour: false, width: 40 });
            sheet.toned_item("regime", Tone::Good, "creeping", ": all is well and will stay so for long");
            sheet.finish()
        };
        let mut sheet = Sheet::new(Style { colour: true, width: 40 });
        sheet.toned_item("regime", Tone::Good, "creeping", ": all is well and will stay so for long");
        let coloured = sheet.finish();
        let mut stripped = coloured.clone();
        for code in ["\u{1b}[2m", "\u{1b}[1;32m", "\u{1b}[0m"] {
            stripped = stripped.replace(code, "");
        }
        assert_ne!(coloured, plain);
        assert_eq!(stripped, plain);
    }
}
