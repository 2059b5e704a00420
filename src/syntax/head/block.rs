//! Where a head begins and ends, and where its entries do.

use crate::diagnostic::Span;
use crate::syntax::limits::LONGEST_HEAD;
use crate::syntax::line::first_word;
use crate::syntax::word::starts_statement;

/// The line that opens and closes a head.
const RULE: &str = "---";

/// Where a head stands.
pub(super) struct Block {
    /// Its first line.
    pub(super) open: Span,
    /// The YAML between the lines.
    pub(super) content: (usize, usize),
    /// Where the statements begin.
    pub(super) end: usize,
    /// Whether it has its closing line.
    pub(super) closed: bool,
}

impl Block {
    /// The head of `text`, if it has one.
    pub(super) fn find(text: &str) -> Option<Self> {
        // Only empty lines and comments may stand before it: otherwise the line `---` is no head but a slip.
        let mut at = 0;
        let open = loop {
            let line = text[at..].lines().next()?;
            if line.trim_end() == RULE {
                break Span::new(at, at + RULE.len());
            }
            if !line.trim().is_empty() && !line.trim_start().starts_with('#') || at > LONGEST_HEAD {
                return None;
            }
            at = next_line(text, at)?;
        };
        let start = next_line(text, at).unwrap_or(text.len());
        let mut at = start;
        // Where the head would end if its closing line is missing: at the first empty line, statement or prose.
        let mut broken_off = None;
        while let Some(line) = text[at..].lines().next() {
            if line.trim_end() == RULE {
                return Some(Self { open, content: (start, at), end: next_line(text, at).unwrap_or(text.len()), closed: true });
            }
            let word = first_word(line);
            let is_statement = starts_statement(word) && !line[word.len()..].starts_with(':') || line.starts_with('>');
            if broken_off.is_none() && (is_statement || line.trim().is_empty()) {
                broken_off = Some(at);
            }
            if is_statement {
                break;
            }
            match next_line(text, at) {
                Some(next) => at = next,
                None => {
                    at = text.len();
                    break;
                }
            }
        }
        let end = broken_off.unwrap_or(at);
        Some(Self { open, content: (start, end), end, closed: false })
    }
}

/// Where the line after the one at `at` begins; `None` where there is none.
pub(super) fn next_line(text: &str, at: usize) -> Option<usize> {
    text[at..].find('\n').map(|length| at + length + 1)
}

/// An entry of a head: a key at column 1 with the lines that belong to it.
pub(super) struct Entry<'t> {
    /// Where it begins in the block.
    pub(super) start: usize,
    /// Its lines.
    pub(super) text: &'t str,
}

/// The entries of a head: each begins with a line at column 1 that is no comment.
pub(super) fn entries(content: &str) -> Vec<Entry<'_>> {
    let mut starts: Vec<usize> = Vec::new();
    let mut at = 0;
    for line in content.split_inclusive('\n') {
        if line.starts_with(|character: char| !character.is_whitespace() && !matches!(character, '#' | ']' | '}')) {
            starts.push(at);
        }
        at += line.len();
    }
    let ends = starts.iter().skip(1).copied().chain([content.len()]);
    starts.iter().zip(ends).map(|(start, end)| Entry { start: *start, text: &content[*start..end] }).collect()
}

/// Where the unquoted text of an entry stands that holds a colon before a blank, which YAML takes for another key.
pub(super) fn plain_text_with_colon(entry: &str) -> Option<(usize, usize)> {
    let line = entry.lines().next()?.trim_end();
    let colon = line.find(':')?;
    let value = line[colon + 1..].trim_start();
    let start = line.len() - value.len();
    let plain = !value.is_empty() && !value.starts_with(['"', '\'', '[', '{', '|', '>', '&', '*', '!', '#', '@', '%', '`']);
    (plain && (value.contains(": ") || value.ends_with(':'))).then_some((start, line.len()))
}
