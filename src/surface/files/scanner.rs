//! Words and numbers of a text file, with line numbers.

use super::FormatError;
use crate::surface::Point;

/// Longest piece of a file that an error repeats, in characters.
const QUOTED: usize = 40;

/// Reads blank-separated words from bytes that need not be UTF-8.
#[derive(Debug, Clone)]
pub(super) struct Scanner<'a> {
    bytes: &'a [u8],
    at: usize,
    line: usize,
    comment: Option<u8>,
}

impl<'a> Scanner<'a> {
    /// A scanner that treats `comment` and what follows it on its line as blank.
    pub fn new(bytes: &'a [u8], comment: Option<u8>) -> Self {
        Self { bytes, at: 0, line: 1, comment }
    }

    /// The line that the next byte is on, counted from 1.
    pub fn line(&self) -> usize {
        self.line
    }

    /// How many bytes have been read.
    pub fn position(&self) -> usize {
        self.at
    }

    /// How many bytes there are in all.
    pub fn length(&self) -> usize {
        self.bytes.len()
    }

    /// Goes on at a later byte.
    pub fn skip_to(&mut self, position: usize) {
        let position = position.clamp(self.at, self.bytes.len());
        self.line += self.bytes[self.at..position].iter().filter(|byte| **byte == b'\n').count();
        self.at = position;
    }

    /// The next word on any line.
    pub fn word(&mut self) -> Option<&'a [u8]> {
        self.skip_blank(true);
        self.take_word()
    }

    /// The next word of the present line.
    pub fn word_on_line(&mut self) -> Option<&'a [u8]> {
        self.skip_blank(false);
        self.take_word()
    }

    /// The rest of the present line without its end and surrounding blanks; goes on at the next line.
    pub fn rest_of_line(&mut self) -> &'a [u8] {
        let rest = &self.bytes[self.at..];
        let length = rest.iter().position(|byte| *byte == b'\n').unwrap_or(rest.len());
        self.skip_to(self.at + length + 1);
        rest[..length].trim_ascii()
    }

    /// `true` if only blanks and comments are left.
    pub fn is_done(&mut self) -> bool {
        self.skip_blank(true);
        self.at == self.bytes.len()
    }

    fn skip_blank(&mut self, over_lines: bool) {
        while let Some(&byte) = self.bytes.get(self.at) {
            if byte == b'\n' {
                if !over_lines {
                    return;
                }
                self.line += 1;
                self.at += 1;
            } else if byte.is_ascii_whitespace() || byte == b'\x0b' {
                self.at += 1;
            } else if Some(byte) == self.comment {
                while self.bytes.get(self.at).is_some_and(|byte| *byte != b'\n') {
                    self.at += 1;
                }
            } else {
                return;
            }
        }
    }

    fn take_word(&mut self) -> Option<&'a [u8]> {
        let rest = self.bytes.get(self.at..)?;
        let ends = |byte: &u8| byte.is_ascii_whitespace() || *byte == b'\x0b' || Some(*byte) == self.comment;
        let length = rest.iter().position(ends).unwrap_or(rest.len());
        self.at += length;
        (length > 0).then(|| &rest[..length])
    }

    /// The next word, which must be this one in upper or lower case.
    pub fn keyword(&mut self, expected: &'static str) -> Result<(), FormatError> {
        let word = self.word().ok_or(FormatError::Truncated { reading: expected })?;
        if word.eq_ignore_ascii_case(expected.as_bytes()) { Ok(()) } else { Err(self.unexpected(expected, word)) }
    }

    /// The next word as a number of the wanted kind.
    pub fn number<T: std::str::FromStr>(&mut self, expected: &'static str) -> Result<T, FormatError> {
        let word = self.word().ok_or(FormatError::Truncated { reading: expected })?;
        parse(word).ok_or_else(|| self.unexpected(expected, word))
    }

    /// The next three words as a point, which may be infinite.
    pub fn point(&mut self) -> Result<Point, FormatError> {
        let what = "a coordinate";
        Ok(Point::new(self.number(what)?, self.number(what)?, self.number(what)?))
    }

    /// The error for a word that should be something else.
    pub fn unexpected(&self, expected: &'static str, found: &[u8]) -> FormatError {
        FormatError::Unexpected { line: self.line, expected, found: quote(found) }
    }
}

/// A word as a number.
pub(super) fn parse<T: std::str::FromStr>(word: &[u8]) -> Option<T> {
    std::str::from_utf8(word).ok()?.parse().ok()
}

/// A piece of a file, made printable and short.
pub(super) fn quote(bytes: &[u8]) -> String {
    let text = String::from_utf8_lossy(&bytes[..bytes.len().min(4 * QUOTED)]);
    let mut quoted = text.chars().map(|c| if c.is_control() { ' ' } else { c }).take(QUOTED).collect::<String>();
    if text.chars().count() > QUOTED {
        quoted.push_str("...");
    }
    quoted
}
