//! From text to tree: the head, then each logical line by the rule of its first word.

use pest::Parser;
use pest::error::{ErrorVariant, InputLocation};

use super::expression::Reader;
use super::grammar::{Grammar, Rule, plain, rule_of_word};
use super::limits::{LONGEST_FILE, MOST_COMMENTS, MOST_ERRORS, MOST_EXPRESSIONS, MOST_LIVE_VALUES, MOST_STATEMENTS};
use super::line::{Fault, Line, LineKind, TooMany, cut, title_length};
use super::slip::{self, Stop};
use super::statement::resolve;
use super::tree::{ProsePiece, Statement, StatementKind, Text, Tree};
use super::word::STATEMENT_WORDS_NOT_OFFERED;
use super::{character, head};
use crate::diagnostic::code::{
    head_misplaced, missing_text, not_utf8, reserved_name, too_long, too_many, too_many_errors, word_not_offered,
};
use crate::diagnostic::{Diagnostic, Span, finding};

/// The mark that some editors put before the text of a file.
const BYTE_ORDER_MARK: &[u8] = b"\xEF\xBB\xBF";

/// The text of a file: UTF-8, without the byte order mark that may stand before it.
///
/// The place of the finding is that of `String::from_utf8_lossy` of the bytes without such a mark.
///
/// # Errors
///
/// The finding where the bytes are no UTF-8.
#[expect(clippy::result_large_err, reason = "it is made once a file, and a finding by value is what every caller wants")]
pub fn decode(bytes: &[u8]) -> Result<&str, Diagnostic> {
    let bytes = bytes.strip_prefix(BYTE_ORDER_MARK).unwrap_or(bytes);
    std::str::from_utf8(bytes).map_err(|error| not_utf8::finding(bytes, error.valid_up_to()))
}

/// Reads a sheet. Whatever the text is, there is a tree, and all findings of the file come in one run, in the order of
/// the text.
#[must_use]
pub fn parse(text: &str) -> (Tree, Vec<Diagnostic>) {
    let mut tree = Tree::default();
    if text.len() > LONGEST_FILE {
        let shown = text.chars().take(20).take_while(|character| *character != '\n').map(char::len_utf8).sum();
        return (tree, vec![too_long::file(Span::new(0, shown), text.len(), LONGEST_FILE)]);
    }
    let mut findings = character::hidden(text, MOST_ERRORS + 1);
    let hidden: Vec<Span> = findings.iter().map(|finding| finding.span).collect();
    let (head, start) = head::read(text, &mut findings);
    tree.head = head;
    let lines = cut(text, start);
    if let Some(too_many) = lines.too_many {
        findings.push(match too_many {
            TooMany::Comments(span) => too_many::comments(span, MOST_COMMENTS),
            TooMany::Statements(span) => too_many::statements(span, MOST_STATEMENTS),
            TooMany::Expressions(span) => too_many::expressions(span, MOST_EXPRESSIONS),
        });
    } else {
        tree.comments = lines.comments;
        let mut sheet = SheetReader { text, tree: &mut tree, findings: &mut findings, hidden: &hidden, omitted: 0, live_values: 0 };
        sheet.lines(&lines.lines);
        let omitted = sheet.omitted;
        uses_of_reserved_names(text, &mut findings);
        return (tree, capped(findings, omitted));
    }
    (tree, capped(findings, 0))
}

/// Takes out what is told of the uses of a word that was declared as a name and cannot be one: the declaration is the mistake.
fn uses_of_reserved_names(text: &str, findings: &mut Vec<Diagnostic>) {
    let declared: Vec<Span> = findings.iter().filter(|finding| reserved_name::declares(finding)).map(|finding| finding.span).collect();
    if declared.is_empty() || declared.len() > MOST_ERRORS {
        return;
    }
    let words: std::collections::BTreeSet<&str> = declared.iter().map(|span| span.of(text)).collect();
    findings.retain(|finding| {
        let follows = matches!(finding.code, reserved_name::CODE | word_not_offered::CODE);
        !follows || reserved_name::declares(finding) || !words.contains(finding.span.of(text))
    });
}

/// The findings in the order of the text; of errors beyond the limit only their number is told.
fn capped(mut findings: Vec<Diagnostic>, omitted: usize) -> Vec<Diagnostic> {
    finding::sort(&mut findings);
    let mut errors = 0;
    let cut = findings.iter().position(|finding| {
        errors += usize::from(finding.is_error());
        errors > MOST_ERRORS
    });
    let mut left = omitted;
    let mut place = findings.last().map(|finding| finding.span);
    if let Some(cut) = cut {
        place = findings.get(cut).map(|finding| finding.span);
        left += findings[cut..].iter().filter(|finding| finding.is_error()).count();
        findings.truncate(cut);
    }
    if let (Some(place), true) = (place, left > 0) {
        findings.push(too_many_errors::finding(place, left));
    }
    findings
}

struct SheetReader<'t> {
    text: &'t str,
    tree: &'t mut Tree,
    findings: &'t mut Vec<Diagnostic>,
    /// Where hidden characters stand, in order.
    hidden: &'t [Span],
    /// Bad lines that are counted and no longer explained.
    omitted: usize,
    /// Live values in prose so far.
    live_values: usize,
}

impl SheetReader<'_> {
    fn lines(&mut self, lines: &[Line]) {
        self.tree.statements.reserve(lines.len());
        let mut index = 0;
        while let Some(line) = lines.get(index) {
            index += 1;
            if line.kind == LineKind::Rule {
                self.findings.push(head_misplaced::finding(line.span));
                index += self.lines_of_head(&lines[index..]);
                continue;
            }
            let statement = self.line(line);
            self.tree.statements.push(statement);
            if self.tree.expressions.len() >= MOST_EXPRESSIONS {
                self.findings.push(too_many::expressions(line.span, MOST_EXPRESSIONS));
                break;
            }
            if self.live_values > MOST_LIVE_VALUES {
                let start = line.span.start as usize;
                self.findings.push(too_many::live_values(Span::new(start, start + 1), MOST_LIVE_VALUES));
                break;
            }
            // All findings of lines are errors, and of those no more is told than the limit.
            let kept = self.hidden.len() + 2 * MOST_ERRORS;
            if self.findings.len() > kept {
                self.omitted += self.findings.len() - kept;
                self.findings.truncate(kept);
            }
        }
    }

    /// How many lines belong to a head that stands in the middle of a file, its last line included.
    fn lines_of_head(&self, lines: &[Line]) -> usize {
        let end = lines.iter().position(|line| line.kind == LineKind::Rule);
        let is_entry = |line: &Line| self.text[line.word.end as usize..].starts_with(':');
        match end {
            Some(end) if lines[..end].iter().all(is_entry) => end + 1,
            _ => 0,
        }
    }

    fn reader(&mut self, line: &Line) -> Reader<'_> {
        Reader { text: self.text, offset: line.span.start as usize, tree: self.tree, findings: self.findings, operators: 0 }
    }

    /// A statement in error whose finding is `finding`; beyond the limit of errors it is only counted.
    fn bad(&mut self, line: &Line, finding: impl FnOnce(&str) -> Diagnostic) -> Statement {
        if self.findings.len() > MOST_ERRORS {
            self.omitted += 1;
        } else {
            let finding = finding(self.text);
            self.findings.push(finding);
        }
        self.reader(line).bad(line.span, line.word)
    }

    fn line(&mut self, line: &Line) -> Statement {
        match line.fault {
            None => {}
            Some(Fault::NothingAbove) => {
                let finding = slip::fault(self.text, line, Fault::NothingAbove);
                self.findings.push(finding);
            }
            Some(fault) => {
                let misspelt = line.kind == LineKind::Other && fault != Fault::TooLong && slip::is_misspelt(self.text, line);
                return self.bad(line, |text| if misspelt { slip::misspelt(text, line) } else { slip::fault(text, line, fault) });
            }
        }
        let word = line.word.of(self.text);
        match line.kind {
            LineKind::Prose => {
                self.statements_inside(line);
                let left = MOST_LIVE_VALUES - self.live_values.min(MOST_LIVE_VALUES);
                let prose = self.reader(line).prose(line.span, left);
                if let StatementKind::Prose { pieces } = &prose.kind {
                    self.live_values += pieces.iter().filter(|piece| matches!(piece, ProsePiece::Live { .. })).count();
                }
                prose
            }
            LineKind::Statement if word == "section" => {
                self.statements_inside(line);
                self.section(line)
            }
            LineKind::Statement => match rule_of_word(word) {
                Some(rule) => self.by_rule(line, rule),
                None => {
                    debug_assert!(STATEMENT_WORDS_NOT_OFFERED.contains(&word));
                    self.bad(line, |_| word_not_offered::statement(line.word, word))
                }
            },
            LineKind::Other | LineKind::Rule if slip::is_misspelt(self.text, line) => self.bad(line, |text| slip::misspelt(text, line)),
            LineKind::Other | LineKind::Rule => self.by_rule(line, Rule::relation_line),
        }
    }

    fn by_rule(&mut self, line: &Line, rule: Rule) -> Statement {
        let slice = line.span.of(self.text);
        match Grammar::parse(rule, &plain(slice)).map(|mut pairs| pairs.next()) {
            Ok(Some(pair)) => {
                let word = if rule == Rule::relation_line { Span { start: line.span.start, end: line.span.start } } else { line.word };
                self.reader(line).statement(pair, line.span, word)
            }
            Ok(None) => self.bad(line, |text| slip::explain(text, line.span, &Stop { rule, at: line.span.start, tried: &[] })),
            Err(error) => {
                let place = match error.location {
                    InputLocation::Pos(place) | InputLocation::Span((place, _)) => place,
                };
                let tried = match error.variant {
                    ErrorVariant::ParsingError { positives, .. } => positives,
                    ErrorVariant::CustomError { .. } => Vec::new(),
                };
                if self.holds_hidden(line.span) {
                    // The hidden character has its own finding, and what follows from it needs none.
                    return self.reader(line).bad(line.span, line.word);
                }
                let at = line.span.start + place as u32;
                self.bad(line, |text| slip::explain(text, line.span, &Stop { rule, at, tried: &tried }))
            }
        }
    }

    fn holds_hidden(&self, span: Span) -> bool {
        let first = self.hidden.partition_point(|hidden| hidden.end <= span.start);
        self.hidden.get(first).is_some_and(|hidden| hidden.start < span.end)
    }

    /// Whole statements that an indentation hides in prose or in a title.
    fn statements_inside(&mut self, line: &Line) {
        if line.continuation.is_some() && self.findings.len() <= MOST_ERRORS {
            self.findings.extend(slip::indented_statement(self.text, line));
        }
    }

    fn section(&mut self, line: &Line) -> Statement {
        let start = line.word.end as usize;
        let behind = &self.text[start..line.span.end as usize];
        let (_, title) = title_of(behind);
        if title.is_empty() {
            return self.bad(line, |_| missing_text::section(line.word));
        }
        let span = Span::new(start + behind.len() - behind.trim_start().len(), line.span.end as usize);
        let kind = StatementKind::Section { title: Text { span, text: title } };
        Statement { span: line.span, word: line.word, kind, description: None, source: None, because: None }
    }
}

/// The title behind the word `section`: as it is written on one line, and what it says.
pub(crate) fn title_of(behind: &str) -> (String, String) {
    let mut lines = String::new();
    for physical in behind.lines() {
        lines.push_str(&physical[..title_length(physical)]);
        lines.push('\n');
    }
    let whole = lines.trim_matches(|character| character::is_blank(character) || matches!(character, '\n' | '\r'));
    if is_one_text(whole) && !whole.contains('\n') {
        return (whole.to_owned(), resolve(whole));
    }
    let folded = fold_title(whole);
    (folded.clone(), folded)
}

/// Whether a title is one text in quotes.
fn is_one_text(title: &str) -> bool {
    let inner = title.strip_prefix('"').and_then(|rest| rest.strip_suffix('"'));
    inner.is_some_and(|inner| !inner.replace("\\\\", "").replace("\\\"", "").contains('"'))
}

/// A title with one blank between its words.
fn fold_title(title: &str) -> String {
    title.split(|character: char| character::is_blank(character) || matches!(character, '\n' | '\r')).filter(|word| !word.is_empty()).fold(
        String::new(),
        |mut folded, word| {
            if !folded.is_empty() {
                folded.push(' ');
            }
            folded.push_str(word);
            folded
        },
    )
}
