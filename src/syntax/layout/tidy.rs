//! Tidy: the canonical layout of a whole file.
//!
//! The layout depends on nothing but the words of the file, its comments and its empty lines, so that a second pass changes
//! nothing. Neighbouring statements that begin with the same word are a block; its columns are aligned.

use super::canonical::{Break, Piece, join, prose_lines, section, written};
use crate::diagnostic::{Diagnostic, Span};
use crate::syntax::line::cut;
use crate::syntax::parse;
use crate::syntax::tree::{Statement, StatementKind};

/// Lines longer than this many characters are broken.
const WIDTH: usize = 120;

/// Names longer than this do not push the `=` of their neighbours.
const LONGEST_NAME: usize = 40;

/// Statements longer than this do not push the descriptions of their neighbours.
const LONGEST_MAIN: usize = 72;

/// Indentation of a continuation line where no column gives it.
const INDENT: usize = 6;

/// Beyond this column a continuation line is not put under the description.
const DEEPEST_INDENT: usize = 72;

/// Words whose name is followed by a column of its own: `=`, `in`, `of`.
const ALIGNED_WORDS: &[&str] = &["gas", "given", "let", "site", "state", "unknown"];

/// The canonical layout of the sheet `text`. Comments, prose and head are kept; reading the result gives the same tree up to
/// places.
///
/// # Errors
///
/// The errors of the syntax. Such a sheet is not laid out.
pub fn tidy(text: &str) -> Result<String, Vec<Diagnostic>> {
    let (tree, findings) = parse(text);
    let errors: Vec<Diagnostic> = findings.into_iter().filter(Diagnostic::is_error).collect();
    if !errors.is_empty() {
        return Err(errors);
    }
    let mut out = String::with_capacity(text.len() + text.len() / 8);
    let mut start = 0;
    if let Some(head) = tree.head.span {
        for line in head.of(text).lines() {
            out.push_str(line);
            out.push('\n');
        }
        start = text[head.end as usize..].find('\n').map_or(text.len(), |length| head.end as usize + length + 1);
    }
    let items = Items::of(text, start, &tree.statements, &tree.comments);
    let mut rest = items.as_slice();
    while let Some(item) = rest.first() {
        let mut taken = 1;
        match item {
            Item::Blank => out.push('\n'),
            Item::Line(line) => push_line(&mut out, line),
            Item::Row(first) => {
                let rows = rest.iter().map_while(|item| match item {
                    Item::Row(row) if row.word == first.word => Some(row),
                    _ => None,
                });
                let rows: Vec<&Row> = rows.collect();
                taken = rows.len();
                lay_out(&rows, &mut out);
            }
        }
        rest = &rest[taken..];
    }
    Ok(out)
}

/// What stands on the lines of a file.
enum Item {
    /// An empty line.
    Blank,
    /// A line that is kept: prose, a comment, a title.
    Line(String),
    /// A statement with columns.
    Row(Row),
}

/// A statement with what can be aligned.
struct Row {
    word: String,
    main: Vec<Piece>,
    tail: [Option<String>; 3],
    comment: Option<String>,
}

/// The items of a file in the order of the text.
struct Items<'t> {
    text: &'t str,
    items: Vec<Item>,
    /// Where the item before ends.
    end: usize,
}

impl<'t> Items<'t> {
    fn of(text: &'t str, start: usize, statements: &[Statement], comments: &[Span]) -> Vec<Item> {
        let mut items = Self { text, items: Vec::new(), end: start };
        let mut comments = comments.iter().copied().peekable();
        debug_assert_eq!(cut(text, start).lines.len(), statements.len());
        for statement in statements {
            while let Some(comment) = comments.next_if(|comment| comment.start < statement.span.start) {
                items.own_line(comment);
            }
            items.gap(statement.span.start as usize);
            let mut inside: Vec<Span> = Vec::new();
            while let Some(comment) = comments.next_if(|comment| comment.start < statement.span.end) {
                inside.push(comment);
            }
            items.end = statement.span.end as usize;
            let mut trailing = comments.next_if(|comment| !text[statement.span.end as usize..comment.start as usize].contains('\n'));
            if let Some(comment) = trailing {
                items.end = comment.end as usize;
            } else if let Some(last) = inside.iter().rposition(|comment| items.follows_code(*comment)) {
                trailing = Some(inside.remove(last));
            }
            for comment in inside {
                items.items.push(Item::Line(comment.of(text).to_owned()));
            }
            items.statement(statement, trailing.map(|comment| comment.of(text).to_owned()));
        }
        for comment in comments {
            items.own_line(comment);
        }
        items.items
    }

    /// Whether something else than blanks stands before a comment on its physical line.
    fn follows_code(&self, comment: Span) -> bool {
        let before = &self.text[..comment.start as usize];
        !before[before.rfind('\n').map_or(0, |newline| newline + 1)..].trim().is_empty()
    }

    /// Keeps one empty line where there were some.
    fn gap(&mut self, next: usize) {
        let newlines = self.text[self.end..next].bytes().filter(|byte| *byte == b'\n').count();
        // Behind the head the line end is passed already, behind an item it is not.
        let at_line_start = self.end == 0 || self.text.as_bytes()[self.end - 1] == b'\n';
        let empty = newlines + usize::from(at_line_start) > 1;
        if empty && (self.end > 0 || !self.items.is_empty()) {
            self.items.push(Item::Blank);
        }
    }

    fn own_line(&mut self, comment: Span) {
        self.gap(comment.start as usize);
        self.items.push(Item::Line(comment.of(self.text).to_owned()));
        self.end = comment.end as usize;
    }

    fn statement(&mut self, statement: &Statement, comment: Option<String>) {
        match &statement.kind {
            StatementKind::Prose { .. } => {
                for line in prose_lines(self.text, statement) {
                    let line = if line.is_empty() { ">".to_owned() } else { format!("> {line}") };
                    self.items.push(Item::Line(line));
                }
            }
            StatementKind::Section { .. } => {
                let title = section(self.text, statement);
                self.items.push(Item::Line(comment.map_or(title.clone(), |comment| format!("{title}  {comment}"))));
            }
            _ => {
                let written = written(self.text, statement);
                let word = statement.word.of(self.text).to_owned();
                self.items.push(Item::Row(Row { word, main: written.main, tail: written.tail, comment }));
            }
        }
    }
}

fn push_line(out: &mut String, line: &str) {
    out.push_str(line);
    out.push('\n');
}

fn width(text: &str) -> usize {
    text.chars().count()
}

fn pad(line: &mut String, column: usize) {
    line.extend(std::iter::repeat_n(' ', column.saturating_sub(width(line)).max(1)));
}

/// Lays out a block of statements that begin with the same word.
fn lay_out(rows: &[&Row], out: &mut String) {
    let mains = aligned_mains(rows);
    let plain: Vec<usize> = rows
        .iter()
        .zip(&mains)
        .map(|(row, main)| width(main) + row.tail.iter().flatten().map(|part| 1 + width(part)).sum::<usize>())
        .collect();
    // The columns of the texts, from left to right. Rows that are too long for a line take no part behind the first.
    let mut ends: Vec<usize> = mains.iter().map(|main| width(main)).collect();
    let mut columns = [0; 3];
    for (part, column) in columns.iter_mut().enumerate() {
        let limit = if part == 0 { LONGEST_MAIN } else { WIDTH };
        let has = |index: usize| rows[index].tail[part].is_some();
        let takes_part = |index: usize| has(index) && ends[index] <= limit && (part == 0 || plain[index] <= WIDTH);
        *column = (0..rows.len()).filter(|index| takes_part(*index)).map(|index| ends[index] + 1).max().unwrap_or(0);
        for index in 0..rows.len() {
            if let Some(text) = &rows[index].tail[part] {
                let start = if ends[index] < *column { *column } else { ends[index] + 1 };
                ends[index] = start + width(text);
            }
        }
    }
    let lines: Vec<Vec<String>> = rows.iter().zip(&mains).map(|(row, main)| lines_of(row, main, &columns)).collect();
    let comment_column = rows
        .iter()
        .zip(&lines)
        .filter(|(row, lines)| row.comment.is_some() && lines.len() == 1 && width(&lines[0]) <= WIDTH)
        .map(|(_, lines)| width(&lines[0]) + 2)
        .max()
        .unwrap_or(0);
    for (row, mut lines) in rows.iter().zip(lines) {
        if let (Some(comment), count, Some(last)) = (&row.comment, lines.len(), lines.last_mut()) {
            let column = if count == 1 { comment_column } else { 0 };
            pad(last, column.max(width(last) + 2));
            last.push_str(comment);
        }
        for line in lines {
            push_line(out, &line);
        }
    }
}

/// The statements of a block without their texts, `=` (or `in`, `of`) in one column.
fn aligned_mains(rows: &[&Row]) -> Vec<String> {
    let aligned = rows.first().is_some_and(|row| ALIGNED_WORDS.contains(&row.word.as_str()));
    let names: Vec<String> = rows.iter().map(|row| join(&row.main[..row.main.len().min(2)])).collect();
    let column = names.iter().map(|name| width(name)).filter(|length| *length <= LONGEST_NAME).max().unwrap_or(0) + 1;
    rows.iter()
        .zip(names)
        .map(|(row, name)| {
            if !aligned || row.main.len() <= 2 {
                return join(&row.main);
            }
            let mut main = name;
            pad(&mut main, column);
            main.push_str(&join(&row.main[2..]));
            main
        })
        .collect()
}

/// The lines of one statement: its texts in their columns, or on lines of their own where they do not fit.
fn lines_of(row: &Row, main: &str, columns: &[usize; 3]) -> Vec<String> {
    let mut line = main.to_owned();
    for (part, text) in row.tail.iter().enumerate() {
        if let Some(text) = text {
            pad(&mut line, columns[part]);
            line.push_str(text);
        }
    }
    if width(&line) <= WIDTH {
        return vec![line];
    }
    let mut lines = if width(main) <= WIDTH { vec![main.to_owned()] } else { broken(&row.main) };
    // A continuation stands under the description, where that is not too far to the right.
    let single = lines.len() == 1;
    let column = if single && width(main) < columns[0] { columns[0] } else { width(main) + 1 };
    let indent = if single && row.tail[0].is_some() && column <= DEEPEST_INDENT { column } else { INDENT };
    for (part, text) in row.tail.iter().enumerate() {
        let Some(text) = text else { continue };
        let Some(last) = lines.last_mut() else { continue };
        let start = if part == 0 && single { column } else { width(last) + 1 };
        if start + width(text) <= WIDTH {
            pad(last, start);
            last.push_str(text);
        } else {
            lines.push(format!("{}{text}", " ".repeat(indent)));
        }
    }
    lines
}

/// A statement that is too long for one line, broken where it can be: outside of brackets rather than inside, between its
/// parts rather than within a sum.
fn broken(pieces: &[Piece]) -> Vec<String> {
    let mut lines: Vec<String> = Vec::new();
    let mut start = 0;
    while start < pieces.len() {
        let indent = if lines.is_empty() { 0 } else { INDENT };
        let mut length = indent;
        // The first token that does not fit.
        let mut end = start;
        while end < pieces.len() {
            length += width(&pieces[end].text) + usize::from(pieces[end].blank && end > start);
            if length > WIDTH && end > start {
                break;
            }
            end += 1;
        }
        if end < pieces.len() {
            let first = if lines.is_empty() { start + 3 } else { start + 1 };
            let can = |index: &usize| pieces[*index].before != Break::Never && pieces[*index].blank;
            let cost = |index: &usize| (pieces[*index].depth, pieces[*index].before);
            let within = (first..=end).filter(can).min_by_key(|index| (cost(index), std::cmp::Reverse(*index)));
            end = within.or_else(|| (end..pieces.len()).find(can)).unwrap_or(pieces.len());
        }
        lines.push(format!("{}{}", " ".repeat(indent), join(&pieces[start..end])));
        start = end;
    }
    lines
}

#[cfg(test)]
mod tests {
    use super::*;

    fn tidied(text: &str) -> String {
        let once = tidy(text).unwrap_or_else(|errors| panic!("{text}\n{errors:?}"));
        assert_eq!(tidy(&once).as_ref(), Ok(&once), "a second pass changes something:\n{once}");
        once
    }

    #[test]
    fn columns_of_a_block_are_aligned_and_comments_stay() {
        let text = "site   altitude =   12 m  \"Yard level\" from \"Site survey\"   # surveyed twice\r\n\r\n\r\n> Prose {p_h in bar gauge}.\r\n\r\ngiven V=50.0 L   \"Volume of one  cylinder\" from \"Stamp\"     # hard to read\ngiven   n_cylinders = 12   exact \"Cylinders in the bank\"\n   from \"Delivery note\"\ngiven p_header=6.00 bar gauge \"Header pressure\" from \"Set point list\"# c\nlet V_all =n_cylinders*V   in m3\nlet p_h=(p_header)\nanswer V_all,p_h in   bar gauge";
        let expected = "\
site altitude = 12 m \"Yard level\" from \"Site survey\"  # surveyed twice

> Prose {p_h in bar gauge}.

given V           = 50.0 L         \"Volume of one  cylinder\" from \"Stamp\"           # hard to read
given n_cylinders = 12 exact       \"Cylinders in the bank\"   from \"Delivery note\"
given p_header    = 6.00 bar gauge \"Header pressure\"         from \"Set point list\"  # c
let V_all = n_cylinders * V in m3
let p_h   = (p_header)
answer V_all, p_h in bar gauge
";
        assert_eq!(tidied(text), expected);
    }

    #[test]
    fn comments_inside_a_statement_stay_beside_it() {
        let text = "let x = ( # first\n# second\n a + b\n # third\n )\n # fourth\n\nlet y = 3\n  # fifth\n  * x # sixth\n";
        let expected = "# second\n# third\nlet x = (a + b)  # first\n# fourth\n\n# fifth\nlet y = 3 * x  # sixth\n";
        assert_eq!(tidied(text), expected);
    }

    #[test]
    fn a_long_statement_is_broken_before_its_texts_and_then_between_its_parts() {
        let long = "Packing line needs 7.5 bar at the header, measured behind the last filter of the hall";
        let text = format!("require cold.p >= 7.5 bar gauge \"{long}\" from \"Line maker's data sheet\"\n");
        let indent = " ".repeat(32);
        assert_eq!(tidied(&text), format!("require cold.p >= 7.5 bar gauge \"{long}\"\n{indent}from \"Line maker's data sheet\"\n"));
        let sum = (0..40).map(|index| format!("name_{index} * (a + b)")).collect::<Vec<_>>().join(" + ");
        let laid = tidied(&format!("let total = {sum} in kg \"Sum\"\n"));
        assert!(laid.lines().all(|line| line.chars().count() <= WIDTH), "{laid}");
        assert!(laid.lines().skip(1).all(|line| line.starts_with("      +")), "{laid}");
    }

    #[test]
    fn the_head_is_kept_as_written_and_prose_keeps_its_indentation() {
        let text = "---\ntitle:   Bank  # c\nrevision: 03\n---\n\n\n>  - item\n>\n   lazy\n#  c\n";
        assert_eq!(tidied(text), "---\ntitle:   Bank  # c\nrevision: 03\n---\n\n>  - item\n>\n> lazy\n#  c\n");
    }

    #[test]
    fn a_sheet_in_error_is_not_laid_out() {
        assert!(tidy("giben x = 3\n").is_err());
    }
}
