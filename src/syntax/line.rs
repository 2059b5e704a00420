//! Logical lines: where each statement begins and ends, before the grammar sees it.
//!
//! A physical line that starts with blank space continues the line above it, and so does one inside an open bracket.
//! Texts in quotes are told from comments here, brackets are counted, and a line at column 1 that starts with a statement
//! word ends an open bracket, so that one slip never swallows the file.

use super::character::{is_blank, is_letter, is_name_char};
use super::limits::{DEEPEST_BRACKETS, LONGEST_LINE, MOST_COMMENTS, MOST_EXPRESSIONS, MOST_STATEMENTS};
use super::word::starts_statement;
use crate::diagnostic::Span;

/// What a logical line is read as.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum LineKind {
    /// It starts with a statement word.
    Statement,
    /// Prose, with all its physical lines.
    Prose,
    /// Anything else: a relation, or a line in error.
    Other,
    /// A line `---` that is not at the head of the file.
    Rule,
}

/// What is wrong with a logical line already by its brackets, quotes and length. The first that is met counts.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Fault {
    /// A text that begins here has no second quote.
    UnclosedText(u32),
    /// A bracket that opens here is not closed.
    UnclosedBracket(u32),
    /// A bracket that closes here was not opened.
    UnopenedBracket(u32),
    /// The second bracket closes the first, and they are of different kinds.
    MismatchedBracket(u32, u32),
    /// The bracket here is nested too deep.
    TooDeep(u32),
    /// The line is too long.
    TooLong,
    /// An indented line with nothing above it to continue.
    NothingAbove,
}

/// A logical line.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Line {
    /// From its first character to the last that is no blank and no comment.
    pub(crate) span: Span,
    /// Its first word; empty where it starts with something else.
    pub(crate) word: Span,
    /// What it is read as.
    pub(crate) kind: LineKind,
    /// What is wrong with it already.
    pub(crate) fault: Option<Fault>,
    /// Where its first continuation line begins, if it has one.
    pub(crate) continuation: Option<u32>,
}

/// What a file holds more of than it may.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum TooMany {
    /// The comment here is one too many.
    Comments(Span),
    /// The statement here is one too many.
    Statements(Span),
    /// The sign here makes the file hold more parts of expressions than it may.
    Expressions(Span),
}

/// The logical lines of a file and its comments.
#[derive(Debug, Default)]
pub(crate) struct Lines {
    pub(crate) lines: Vec<Line>,
    pub(crate) comments: Vec<Span>,
    pub(crate) too_many: Option<TooMany>,
}

/// Cuts `text` from byte `start` on (the end of the head) into logical lines.
pub(crate) fn cut(text: &str, start: usize) -> Lines {
    let mut scanner = Scanner { text, bytes: text.as_bytes(), out: Lines::default(), current: None, signs: 0 };
    let mut at = start;
    while at < text.len() && scanner.out.too_many.is_none() {
        let end = text[at..].find('\n').map_or(text.len(), |length| at + length);
        scanner.physical_line(at, if end > at && scanner.bytes[end - 1] == b'\r' { end - 1 } else { end });
        at = end + 1;
    }
    scanner.finish();
    scanner.out
}

/// A logical line that may still go on.
struct Open {
    start: usize,
    /// One past the last character that belongs to the statement.
    end: usize,
    word: Span,
    kind: LineKind,
    /// Whether the line is a title, in which brackets are letters like others.
    title: bool,
    /// Brackets that are open, with their places.
    brackets: Vec<(u8, u32)>,
    /// The quote that opened a text which is not closed yet.
    quote: Option<u32>,
    fault: Option<Fault>,
    continuation: Option<u32>,
}

struct Scanner<'t> {
    text: &'t str,
    bytes: &'t [u8],
    out: Lines,
    current: Option<Open>,
    /// Signs between parts of expressions so far: they bound the work of the grammar.
    signs: usize,
}

impl Scanner<'_> {
    fn physical_line(&mut self, start: usize, end: usize) {
        let line = &self.text[start..end];
        let Some(indent) = line.find(|character| !is_blank(character)) else { return };
        let first = start + indent;
        let in_text = self.current.as_ref().is_some_and(|open| open.quote.is_some());
        if indent > 0 && in_text {
            self.continue_line(first, end);
        } else if self.bytes[first] == b'#' && !in_text {
            self.comment(first, end);
        } else if indent > 0 {
            match self.current {
                Some(_) => self.continue_line(first, end),
                None => self.begin(first, end, Some(Fault::NothingAbove)),
            }
        } else if self.bytes[first] == b'>' {
            match &mut self.current {
                Some(open)
                    if open.kind == LineKind::Prose && self.text[open.end..first].bytes().filter(|byte| *byte == b'\n').count() == 1 =>
                {
                    open.end = end;
                    if line.len() > LONGEST_LINE {
                        open.fault = open.fault.or(Some(Fault::TooLong));
                    }
                }
                _ => self.begin(first, end, None),
            }
        } else {
            let goes_on =
                self.current.as_ref().is_some_and(|open| open.quote.is_none() && open.brackets.iter().any(|(sign, _)| *sign == b'('));
            if goes_on && !starts_statement(first_word(line)) && line.trim_end() != "---" {
                self.continue_line(first, end);
            } else {
                self.begin(first, end, None);
            }
        }
    }

    fn comment(&mut self, start: usize, end: usize) {
        let span = Span::new(start, start + self.text[start..end].trim_end_matches(is_blank).len());
        if self.out.comments.len() == MOST_COMMENTS {
            self.out.too_many = Some(TooMany::Comments(span));
        } else {
            self.out.comments.push(span);
        }
    }

    fn begin(&mut self, start: usize, end: usize, fault: Option<Fault>) {
        self.finish();
        let line = &self.text[start..end];
        let word = first_word(line);
        let kind = if line.starts_with('>') {
            LineKind::Prose
        } else if line.trim_end() == "---" {
            LineKind::Rule
        } else if starts_statement(word) {
            LineKind::Statement
        } else {
            LineKind::Other
        };
        self.current = Some(Open {
            start,
            end: start,
            word: Span::new(start, start + word.len()),
            kind,
            title: kind == LineKind::Statement && word == "section",
            brackets: Vec::new(),
            quote: None,
            fault,
            continuation: None,
        });
        self.read(start, end);
    }

    fn continue_line(&mut self, start: usize, end: usize) {
        if let Some(open) = &mut self.current {
            open.continuation = open.continuation.or(Some(start as u32));
        }
        self.read(start, end);
    }

    /// Reads the part of a physical line that belongs to the open logical line.
    fn read(&mut self, start: usize, end: usize) {
        let Some(mut open) = self.current.take() else { return };
        if open.kind == LineKind::Prose {
            open.end = end;
        } else if open.title {
            self.read_title(&mut open, start, end);
        } else {
            self.read_code(&mut open, start, end);
        }
        let length = if open.kind == LineKind::Prose || is_table(open.word.of(self.text)) { end - start } else { open.end - open.start };
        if length > LONGEST_LINE {
            // The length comes before everything else: nothing of such a line is shown.
            open.fault = Some(Fault::TooLong);
        }
        self.current = Some(open);
    }

    fn read_title(&mut self, open: &mut Open, start: usize, end: usize) {
        let at = start + title_length(&self.text[start..end]);
        let title = self.text[start..at].trim_end_matches(is_blank);
        if !title.is_empty() {
            open.end = start + title.len();
        }
        if at < end {
            self.comment(at, end);
        }
    }

    fn read_code(&mut self, open: &mut Open, start: usize, end: usize) {
        let mut at = start;
        while at < end {
            if open.quote.is_some() {
                at = self.read_text(open, at, end);
                continue;
            }
            let byte = self.bytes[at];
            match byte {
                b'"' => open.quote = Some(at as u32),
                b'#' => {
                    self.comment(at, end);
                    break;
                }
                b'(' | b'[' | b'{' => {
                    if open.brackets.len() == DEEPEST_BRACKETS {
                        open.fault = open.fault.or(Some(Fault::TooDeep(at as u32)));
                    } else {
                        open.brackets.push((byte, at as u32));
                    }
                }
                b')' | b']' | b'}' => match open.brackets.pop() {
                    None => open.fault = open.fault.or(Some(Fault::UnopenedBracket(at as u32))),
                    Some((opened, place)) if !matches!((opened, byte), (b'(', b')') | (b'[', b']') | (b'{', b'}')) => {
                        open.fault = open.fault.or(Some(Fault::MismatchedBracket(place, at as u32)));
                    }
                    Some(_) => {}
                },
                _ => {}
            }
            self.signs += match byte {
                b'+' | b'-' | b'*' | b'/' | b'^' | b',' | b'=' | b'<' | b'>' | b'"' => 1,
                b'.' => usize::from(self.bytes.get(at + 1).is_some_and(u8::is_ascii_alphabetic)),
                _ => 0,
            };
            at += 1;
            if byte > b' ' {
                open.end = at;
            }
        }
        if self.signs > MOST_EXPRESSIONS {
            self.out.too_many = self.out.too_many.or(Some(TooMany::Expressions(Span::new(start, start + 1))));
        }
        // A blank that is no ASCII ends in a byte that looks like text.
        open.end = open.start + self.text[open.start..open.end].trim_end_matches(is_blank).len();
    }

    /// Reads on within a text in quotes; returns where to go on.
    fn read_text(&self, open: &mut Open, start: usize, end: usize) -> usize {
        let mut at = start;
        while at < end {
            match self.bytes[at] {
                b'\\' if at + 1 < end && matches!(self.bytes[at + 1], b'"' | b'\\') => at += 2,
                b'"' => {
                    open.quote = None;
                    open.end = at + 1;
                    return at + 1;
                }
                _ => at += 1,
            }
        }
        open.end = open.start + self.text[open.start..end].trim_end_matches(is_blank).len();
        end
    }

    fn finish(&mut self) {
        let Some(open) = self.current.take() else { return };
        let mut fault = open.fault;
        if let Some(place) = open.quote {
            // A quote that is missing explains brackets that do not close.
            fault = match fault {
                Some(Fault::TooLong | Fault::TooDeep(_) | Fault::NothingAbove) => fault,
                _ => Some(Fault::UnclosedText(place)),
            };
        } else if let Some((_, place)) = open.brackets.first() {
            fault = fault.or(Some(Fault::UnclosedBracket(*place)));
        }
        let span = Span::new(open.start, open.end);
        if self.out.lines.len() == MOST_STATEMENTS {
            self.out.too_many = self.out.too_many.or(Some(TooMany::Statements(span)));
            return;
        }
        self.out.lines.push(Line { span, word: open.word, kind: open.kind, fault, continuation: open.continuation });
    }
}

/// How much of a physical line belongs to a title: all before a `#` that no pair of quotes holds.
pub(crate) fn title_length(line: &str) -> usize {
    let mut at = 0;
    while let Some(found) = line[at..].find(['"', '#']) {
        at += found;
        if line[at..].starts_with('#') {
            return at;
        }
        at = closing_quote(line, at + 1).unwrap_or(at) + 1;
    }
    line.len()
}

/// Whether a title holds a quote without a partner, which would pair with one in a comment behind it.
pub(crate) fn has_single_quote(title: &str) -> bool {
    let mut at = 0;
    while let Some(found) = title[at..].find('"') {
        match closing_quote(title, at + found + 1) {
            Some(close) => at = close + 1,
            None => return true,
        }
    }
    false
}

/// Where the next quote stands that no backslash makes a letter.
fn closing_quote(line: &str, start: usize) -> Option<usize> {
    let bytes = line.as_bytes();
    let mut at = start;
    while at < bytes.len() {
        match bytes[at] {
            b'\\' if matches!(bytes.get(at + 1), Some(b'"' | b'\\')) => at += 2,
            b'"' => return Some(at),
            _ => at += 1,
        }
    }
    None
}

/// Whether a statement with this word carries rows, each a physical line of its own.
fn is_table(word: &str) -> bool {
    word == "cases"
}

/// The word at the start of `line`; empty where it starts with something else.
pub(crate) fn first_word(line: &str) -> &str {
    if !line.starts_with(is_letter) {
        return "";
    }
    &line[..line.find(|character| !is_name_char(character)).unwrap_or(line.len())]
}

#[cfg(test)]
mod tests {
    use super::*;

    fn lines(text: &str) -> Vec<(&str, Option<Fault>)> {
        cut(text, 0).lines.iter().map(|line| (line.span.of(text), line.fault)).collect()
    }

    #[test]
    fn indentation_and_brackets_continue_and_statement_words_end_a_bracket() {
        let text = "given V = 3 m3  # c\n  \"x\"\n\nlet A = (V /\n2 m\nsection Working (\nlet B = V";
        let found = lines(text);
        assert_eq!(found[0], ("given V = 3 m3  # c\n  \"x\"", None));
        assert_eq!(found[1], ("let A = (V /\n2 m", Some(Fault::UnclosedBracket(35))));
        assert_eq!(found[2], ("section Working (", None));
        assert_eq!(found[3], ("let B = V", None));
    }

    #[test]
    fn comments_stand_outside_texts_and_texts_end_on_their_logical_line() {
        let text = "given n = 12 \"Rack #7\" # ten\n# whole\nlet x = 2 \"open # no comment\nlet y = 3 \"goes\n   on\" # yes";
        let all = cut(text, 0);
        let comments: Vec<_> = all.comments.iter().map(|span| span.of(text)).collect();
        assert_eq!(comments, ["# ten", "# whole", "# yes"]);
        assert_eq!(all.lines[1].fault, Some(Fault::UnclosedText(47)));
        assert_eq!(all.lines[2].span.of(text), "let y = 3 \"goes\n   on\"");
    }

    #[test]
    fn prose_is_prose_even_inside_a_bracket_and_its_lines_are_one_statement() {
        let text = "let x = (a\n> one # two\r\n> three\n\n> four";
        let found = lines(text);
        assert_eq!(found[0].0, "let x = (a");
        assert_eq!(found[1].0, "> one # two\r\n> three");
        assert_eq!(found[2].0, "> four");
    }

    #[test]
    fn blanks_that_are_no_ascii_indent_and_do_not_end_a_line() {
        assert_eq!(lines("let x =\n\u{A0}3 m\u{A0}  \n"), [("let x =\n\u{A0}3 m", None)]);
    }

    #[test]
    fn what_is_too_deep_or_too_long_is_told_before_the_grammar_sees_it() {
        let deep = format!("let x = {}V", "(".repeat(200));
        assert_eq!(lines(&deep)[0].1, Some(Fault::TooDeep(108)));
        let long = format!("let x = {}", "1 + ".repeat(20_000));
        assert_eq!(lines(&long)[0].1, Some(Fault::TooLong));
    }
}
