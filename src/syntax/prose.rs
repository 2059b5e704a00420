//! Prose: Markdown for the report, with live values in braces.

use pest::Parser;

use super::character::is_blank;
use super::expression::Reader;
use super::grammar::{Grammar, Rule, plain};
use super::limits::MOST_ERRORS;
use super::tree::{ProsePiece, Statement, StatementKind};
use crate::diagnostic::Span;
use crate::diagnostic::code::bad_live_value;

impl Reader<'_> {
    /// Reads the lines of a piece of prose, up to `most` live values.
    pub(crate) fn prose(&mut self, span: Span, most: usize) -> Statement {
        let mut pieces: Vec<ProsePiece> = Vec::new();
        let mut written = String::new();
        let mut start = span.start as usize;
        for line in self.at(span).split('\n') {
            let next = start + line.len() + 1;
            let line = line.strip_suffix('\r').unwrap_or(line);
            if is_comment(line) {
                start = next;
                continue;
            }
            if start > span.start as usize {
                written.push('\n');
            }
            let content = content(line);
            self.line_of_prose(content, start + line.len() - content.len(), &mut pieces, &mut written);
            // Between two live values stands a text at most.
            if pieces.len() / 2 > most {
                break;
            }
            start = next;
        }
        if !written.is_empty() || pieces.is_empty() {
            pieces.push(ProsePiece::Text(written));
        }
        let word = Span::new(span.start as usize, span.start as usize + 1);
        Statement { span, word, kind: StatementKind::Prose { pieces }, description: None, source: None, because: None }
    }

    /// Reads one line, which begins at byte `start`, into pieces.
    fn line_of_prose(&mut self, line: &str, start: usize, pieces: &mut Vec<ProsePiece>, written: &mut String) {
        let mut at = 0;
        while let Some(found) = line[at..].find(['{', '}']) {
            let brace = at + found;
            written.push_str(&line[at..brace]);
            let rest = &line[brace..];
            if rest.starts_with("{{") || rest.starts_with("}}") {
                written.push_str(&rest[..1]);
                at = brace + 2;
            } else if rest.starts_with('}') {
                written.push('}');
                at = brace + 1;
            } else {
                let length = rest.find('}').map_or(rest.len(), |length| length + 1);
                let span = Span::new(start + brace, start + brace + length);
                match self.live_value(span) {
                    Some(live) => {
                        if !written.is_empty() {
                            pieces.push(ProsePiece::Text(std::mem::take(written)));
                        }
                        pieces.push(live);
                    }
                    None => written.push_str(&rest[..length]),
                }
                at = brace + length;
            }
        }
        written.push_str(&line[at..]);
    }

    /// Reads a live value between its braces. `None`, with its finding made, where it is none.
    fn live_value(&mut self, span: Span) -> Option<ProsePiece> {
        if self.findings.len() > 2 * MOST_ERRORS {
            // What would not be told any more is not looked at.
            return None;
        }
        let whole = self.at(span);
        let Some(inner) = whole.strip_prefix('{').and_then(|rest| rest.strip_suffix('}')) else {
            self.findings.push(bad_live_value::unclosed(span));
            return None;
        };
        let inner_plain = plain(inner);
        let Some(line) = Grammar::parse(Rule::live, &inner_plain).ok().and_then(|mut pairs| pairs.next()) else {
            self.findings.push(bad_live_value::unreadable(span, inner));
            return None;
        };
        let offset = std::mem::replace(&mut self.offset, span.start as usize + 1);
        let mut pairs = line.into_inner();
        let path = pairs.next().and_then(|pair| self.path(&pair));
        let unit = pairs.next().filter(|pair| pair.as_rule() == Rule::in_unit).and_then(|pair| self.in_unit(pair));
        self.offset = offset;
        Some(ProsePiece::Live { span, path: path?, unit })
    }
}

/// What a line of prose says: without the sign and the blank behind it, or without its indentation.
pub(crate) fn content(line: &str) -> &str {
    let said = match line.strip_prefix('>') {
        Some(rest) => rest.strip_prefix(is_blank).unwrap_or(rest),
        None => line.trim_start_matches(is_blank),
    };
    if said.chars().all(is_blank) { &line[line.len()..] } else { said }
}

/// Whether a physical line between lines of prose is a comment.
pub(crate) fn is_comment(line: &str) -> bool {
    line.trim_start_matches(is_blank).starts_with('#')
}
