//! Canonical text: one statement on one line, without comments, blanks and pasted signs made regular. What a digest of a
//! statement is taken of, and the stuff that [`super::tidy()`] lays out.

use pest::Parser;
use pest::iterators::Pair;

use crate::diagnostic::Span;
use crate::syntax::character::is_blank;
use crate::syntax::grammar::{Grammar, Rule, plain, rule_of_word};
use crate::syntax::line::{has_single_quote, title_length};
use crate::syntax::parse::title_of;
use crate::syntax::prose::{content, is_comment};
use crate::syntax::statement::fold_blanks;
use crate::syntax::tree::{ProsePiece, Statement, StatementKind, Tree};

/// How willingly a line is broken before a token.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub(super) enum Break {
    /// Before a word between the parts of a statement, behind a comma, before `and` and `or`.
    Part,
    /// Before `+`, `-` and the signs of comparisons.
    Sum,
    /// Before `*` and `/`.
    Product,
    /// Never: a unit stays with its number.
    Never,
}

/// A token of a statement as it is written.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Piece {
    pub(super) text: String,
    /// Whether a blank stands before it.
    pub(super) blank: bool,
    /// How deep in brackets it stands.
    pub(super) depth: usize,
    /// How willingly a line is broken before it.
    pub(super) before: Break,
}

/// A statement as its canonical tokens and texts.
#[derive(Clone, Debug, Default, PartialEq)]
pub(super) struct Written {
    pub(super) main: Vec<Piece>,
    /// Description, `from "…"`, `because "…"`, as far as there.
    pub(super) tail: [Option<String>; 3],
}

/// The canonical text of one statement of `tree`, which was read from `text`: on one line (prose has its line ends written as
/// blanks), without comments, with single blanks and the signs of the language.
#[must_use]
pub fn canonical(tree: &Tree, text: &str, statement: &Statement) -> String {
    debug_assert!(tree.statements.is_empty() || statement.span.end as usize <= text.len());
    match &statement.kind {
        StatementKind::Prose { .. } => prose_lines(text, statement).iter().map(|line| format!("> {line}")).collect::<Vec<_>>().join(" "),
        StatementKind::Section { .. } => section(text, statement),
        _ => {
            let written = written(text, statement);
            let mut line = join(&written.main);
            for part in written.tail.iter().flatten() {
                line.push(' ');
                line.push_str(part);
            }
            line
        }
    }
}

/// Tokens with their blanks.
pub(super) fn join(pieces: &[Piece]) -> String {
    let mut line = String::new();
    for piece in pieces {
        if piece.blank && !line.is_empty() {
            line.push(' ');
        }
        line.push_str(&piece.text);
    }
    line
}

/// `section Title`
pub(super) fn section(text: &str, statement: &Statement) -> String {
    let behind = Span { start: statement.word.end, end: statement.span.end }.of(text);
    let (written, title) = title_of(behind);
    if title_length(&written) == written.len() && title_of(&written).1 == title && !has_single_quote(&written) {
        return format!("section {written}");
    }
    // Its quotes would be paired otherwise on one line: the title becomes one text.
    format!("section \"{}\"", title.replace('\\', "\\\\").replace('"', "\\\""))
}

/// The lines of a piece of prose, without their signs, live values in canonical form.
pub(super) fn prose_lines(text: &str, statement: &Statement) -> Vec<String> {
    let pieces: &[ProsePiece] = if let StatementKind::Prose { pieces } = &statement.kind { pieces } else { &[] };
    let mut lives = pieces
        .iter()
        .filter_map(|piece| match piece {
            ProsePiece::Live { span, .. } => Some(*span),
            ProsePiece::Text(_) => None,
        })
        .peekable();
    let mut lines = Vec::new();
    let mut start = statement.span.start as usize;
    for line in statement.span.of(text).split('\n') {
        let end = start + line.len();
        let line = line.strip_suffix('\r').unwrap_or(line);
        if is_comment(line) {
            start = end + 1;
            continue;
        }
        let said = content(line);
        let mut at = start + line.len() - said.len();
        let mut written = String::new();
        while let Some(live) = lives.next_if(|live| (live.start as usize) < end) {
            written.push_str(&text[at..live.start as usize]);
            written.push_str(&live_value(live.of(text)));
            at = live.end as usize;
        }
        if at <= start + line.len() {
            written.push_str(&text[at..start + line.len()]);
        }
        lines.push(written);
        start = end + 1;
    }
    lines
}

fn live_value(braces: &str) -> String {
    let inner = braces.trim_start_matches('{').trim_end_matches('}');
    match Grammar::parse(Rule::live, &plain(inner)).ok().and_then(|mut pairs| pairs.next()) {
        Some(pair) => {
            let mut writer = Writer::default();
            writer.all(pair);
            format!("{{{}}}", join(&writer.written.main))
        }
        None => braces.to_owned(),
    }
}

/// The tokens and texts of a statement that is neither prose nor a title.
pub(super) fn written(text: &str, statement: &Statement) -> Written {
    let slice = statement.span.of(text);
    let rule = rule_of_word(statement.word.of(text)).unwrap_or(Rule::relation_line);
    match Grammar::parse(rule, &plain(slice)).ok().and_then(|mut pairs| pairs.next()) {
        Some(pair) => {
            let mut writer = Writer::default();
            writer.all(pair);
            writer.written
        }
        // A statement in error has no tokens: its words with single blanks stand for it.
        None => {
            let piece = Piece { text: fold_blanks(slice), blank: false, depth: 0, before: Break::Never };
            Written { main: vec![piece], tail: [None, None, None] }
        }
    }
}

#[derive(Default)]
struct Writer {
    written: Written,
    depth: usize,
    /// Whether the next token touches the one before.
    touch: bool,
    /// Whether a line may well be broken before the next token: it stands behind a comma.
    behind_comma: bool,
}

impl Writer {
    fn put(&mut self, text: impl Into<String>, before: Break) {
        let before = if self.behind_comma { Break::Part } else { before };
        let piece = Piece { text: text.into(), blank: !self.touch, depth: self.depth, before };
        self.written.main.push(piece);
        self.touch = false;
        self.behind_comma = false;
    }

    /// A token that touches the one before.
    fn put_close(&mut self, text: &str) {
        self.touch = true;
        self.put(text, Break::Never);
    }

    fn all(&mut self, pair: Pair<'_, Rule>) {
        for inner in pair.into_inner() {
            self.pair(inner);
        }
    }

    fn pair(&mut self, pair: Pair<'_, Rule>) {
        let text = pair.as_str();
        match pair.as_rule() {
            Rule::EOI => {}
            Rule::description => self.tail(0, "", pair),
            Rule::source => self.tail(1, "from ", pair),
            Rule::reason => self.tail(2, "because ", pair),
            Rule::number => self.put(number(text), Break::Never),
            Rule::unit => self.put(unit(text), Break::Never),
            Rule::basis | Rule::exact => self.put(text, Break::Never),
            Rule::sign => {
                if text != "+" {
                    self.put("-", Break::Never);
                    self.touch = true;
                }
            }
            Rule::operator => match text {
                "^" => {
                    self.put_close("^");
                    self.touch = true;
                }
                "*" | "×" | "·" | "⋅" => self.put("*", Break::Product),
                "/" => self.put("/", Break::Product),
                "+" => self.put("+", Break::Sum),
                _ => self.put("-", Break::Sum),
            },
            Rule::open => {
                self.put("(", Break::Never);
                self.touch = true;
                self.depth += 1;
            }
            Rule::close => {
                self.depth = self.depth.saturating_sub(1);
                self.put_close(")");
            }
            Rule::arguments => {
                self.touch = true;
                self.all(pair);
            }
            Rule::comma => {
                self.put_close(",");
                self.behind_comma = true;
            }
            Rule::comparator => {
                let sign = match text {
                    "≤" => "<=",
                    "≥" => ">=",
                    _ => text,
                };
                self.put(sign, Break::Sum);
            }
            Rule::plus => self.put("+", Break::Sum),
            Rule::equals => self.put("=", Break::Never),
            Rule::dots => self.put("..", Break::Product),
            Rule::plus_minus => self.put("±", Break::Sum),
            Rule::coverage | Rule::freedom => {
                let word = if pair.as_rule() == Rule::coverage { "k=" } else { "dof=" };
                self.put(word, Break::Part);
                self.touch = true;
                for inner in pair.into_inner().filter(|inner| inner.as_rule() == Rule::literal) {
                    self.pair(inner);
                }
            }
            Rule::species => self.put(fold_blanks(text), Break::Never),
            Rule::share_unit | Rule::name | Rule::path => self.put(text, Break::Never),
            Rule::in_word
            | Rule::within_word
            | Rule::near_word
            | Rule::at_word
            | Rule::by_word
            | Rule::and_word
            | Rule::or_word
            | Rule::when_word
            | Rule::varying_word
            | Rule::figures_word
            | Rule::triangular
            | Rule::u_shaped => self.put(text, Break::Part),
            _ => {
                let mut inner = pair.into_inner();
                match inner.peek() {
                    None => self.put(text, Break::Never),
                    Some(_) => inner.by_ref().for_each(|inner| self.pair(inner)),
                }
            }
        }
    }

    fn tail(&mut self, slot: usize, word: &str, pair: Pair<'_, Rule>) {
        let string = pair.into_inner().last().map_or(String::new(), |string| one_line(string.as_str()));
        self.written.tail[slot] = Some(format!("{word}{string}"));
    }
}

/// A number with the minus of the keyboard.
fn number(text: &str) -> String {
    text.replace(['−', '–'], "-").replace('E', "e")
}

/// A unit in the spelling of the language: `°C` is `degC`, `m³` is `m3`, `N·m` is `N.m`, `µm` is `um`.
fn unit(text: &str) -> String {
    let mut written = String::with_capacity(text.len());
    for character in text.chars() {
        match character {
            '°' => written.push_str("deg"),
            '·' | '⋅' => written.push('.'),
            'µ' | 'μ' => written.push('u'),
            '²' => written.push('2'),
            '³' => written.push('3'),
            '¹' => written.push('1'),
            '\u{2074}'..='\u{2079}' => written.extend(char::from_digit(character as u32 - 0x2070, 10)),
            _ => written.push(character),
        }
    }
    written
}

/// A text in quotes on one line: a line end with the blanks around it becomes one blank.
fn one_line(string: &str) -> String {
    let mut lines = string.split('\n');
    let mut written = lines.next().unwrap_or("").to_owned();
    for line in lines {
        written.truncate(written.trim_end_matches(|character| is_blank(character) || character == '\r').len());
        written.push(' ');
        written.push_str(line.trim_start_matches(is_blank));
    }
    written
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::syntax::parse;

    fn lines(text: &str) -> Vec<String> {
        let (tree, findings) = parse(text);
        assert_eq!(findings, []);
        tree.statements.iter().map(|statement| canonical(&tree, text, statement)).collect()
    }

    #[test]
    fn layout_comments_and_pasted_signs_make_no_difference() {
        let pasted = "given T=−8,0"; // A comma is no sign of this language.
        assert!(!parse(pasted).1.is_empty());
        let a = "given   T = −8.0°C +- 1.5 K   k=2 # c\n  from \"x\"  \"Cold\n  night\"\nrequire(a+b)≤3 m³/h·kg and not c>2·d^-2 \"ok\"\nlet x = min( 1 , -y )^2 in µm\n";
        let b = "given T = -8.0 degC ± 1.5 K k=2 \"Cold night\" from \"x\"\nrequire (a + b) <= 3 m3/h.kg and not c > 2 * d^-2 \"ok\"\nlet x = min(1, -y)^2 in um\n";
        assert_eq!(lines(a), lines(b));
        assert_eq!(lines(b), b.lines().collect::<Vec<_>>());
    }

    #[test]
    fn gases_states_bounds_and_titles_have_one_form() {
        let text = "gas m=82% argon+18 % carbon   dioxide by mole , ideal\nstate a of m at p=1 bar abs,T=300 K\nunknown q in kg/h near 3 within ..2\nsection  Vessel   as filled # c\nsite pressure=1000 mbar abs\ncorrelate a,b -0.5\n> a {q  in kg/h} }} {{\n";
        let expected = [
            "gas m = 82 % argon + 18 % carbon dioxide by mole, ideal",
            "state a of m at p = 1 bar abs, T = 300 K",
            "unknown q in kg/h near 3 within .. 2",
            "section Vessel as filled",
            "site pressure = 1000 mbar abs",
            "correlate a, b -0.5",
            "> a {q in kg/h} }} {{",
        ];
        assert_eq!(lines(text), expected);
    }
}
