//! The result as a table of plain text, for people at a terminal.

use crate::diagnostic::{LineIndex, visible};
use crate::sheet::StateId;
use crate::solve::{Solution, Verdict};
use crate::units::write_figures;

use super::verdict::margin;
use super::{Input, answer_text};

/// Columns that the table keeps to: words of the widest column are broken where they would pass it.
const WIDTH: usize = 96;

/// Fewest columns that are left to words.
const LEAST_WORDS: usize = 24;

/// The result as a text table: answers, requirements, assumptions, cautions, checks. Empty where the sheet has no solution.
#[must_use]
pub fn table(input: &Input) -> String {
    let Some(solution) = input.solution else { return String::new() };
    let lines = LineIndex::new(input.text);
    let head = &input.sheet.head;
    let mut text = String::new();
    if let Some(title) = &head.title {
        text.push_str(&visible(&title.text));
        let marks: Vec<_> = [&head.document, &head.revision].into_iter().flatten().map(|mark| visible(&mark.text)).collect();
        if !marks.is_empty() {
            text.push_str(&format!(" ({})", marks.join(" ")));
        }
        text.push('\n');
    }
    section(&mut text, "answers", &answers(input));
    section(&mut text, "requirements", &requirements(input, solution, &lines));
    section(&mut text, "assumptions", &assumptions(input, &lines));
    section(&mut text, "cautions", &cautions(input, solution, &lines));
    if !text.is_empty() {
        text.push('\n');
    }
    text.push_str(&checks(solution));
    text
}

/// A row: a word, what it is about, a value.
struct Row {
    word: String,
    about: String,
    value: String,
}

fn answers(input: &Input) -> Vec<Row> {
    let answers = input.sheet.answers.iter();
    answers
        .map(|answer| {
            let quantity = input.quantity(answer.quantity);
            Row { word: quantity.name.clone(), about: quantity.description.clone(), value: answer_text(input, answer) }
        })
        .collect()
}

fn requirements(input: &Input, solution: &Solution, lines: &LineIndex) -> Vec<Row> {
    let clauses = input.sheet.requirements.iter().zip(&solution.requirements);
    clauses
        .map(|(clause, judged)| {
            let line = input.line(lines, clause.statement);
            let value = margin(clause.condition.as_ref(), judged).map_or_else(String::new, |margin| margin.plain());
            let word = if judged.holds { "met" } else { "NOT MET" };
            Row { word: word.to_owned(), about: format!("{} (line {line})", clause.text), value }
        })
        .collect()
}

fn assumptions(input: &Input, lines: &LineIndex) -> Vec<Row> {
    let states = input.sheet.states.iter().enumerate().filter_map(|(at, state)| {
        let verdict = input.state_verdict(StateId(at as u32))?;
        let title = input.sheet.gas(state.gas).gas.title();
        let about = format!("{title} is an ideal gas at state {} (line {})", state.name, input.line(lines, state.statement));
        let error = |percent: f64| format!("{} % in density", write_figures(percent, 2));
        let value = verdict.ideal_error_percent.map_or_else(String::new, error);
        Some(Row { word: word_of(verdict.verdict).to_owned(), about, value })
    });
    let clauses = input.sheet.assumptions.iter().enumerate().filter_map(|(at, clause)| {
        let about = format!("{} (line {})", clause.text, input.line(lines, clause.statement));
        Some(Row { word: word_of(input.assumption_verdict(at)?).to_owned(), about, value: String::new() })
    });
    states.chain(clauses).collect()
}

fn cautions(input: &Input, solution: &Solution, lines: &LineIndex) -> Vec<Row> {
    let clauses = input.sheet.cautions.iter().zip(&solution.cautions).filter(|(_, shown)| **shown);
    clauses
        .map(|(clause, _)| Row {
            word: "caution".to_owned(),
            about: format!("{} (line {})", clause.text, input.line(lines, clause.statement)),
            value: String::new(),
        })
        .collect()
}

fn word_of(verdict: Verdict) -> &'static str {
    match verdict {
        Verdict::Failed => "FAILED",
        other => other.word(),
    }
}

fn checks(solution: &Solution) -> String {
    let mut text = format!(
        "checks: {} for {}, largest residual {}",
        count(solution.n_relations, "relation"),
        count(solution.n_unknowns, "unknown"),
        residual(solution.largest_residual)
    );
    if !solution.surplus.is_empty() {
        text.push_str(&format!(", {} in agreement", count(solution.surplus.len(), "surplus relation")));
    }
    text + "\n"
}

/// `1 relation`, `6 relations`.
pub(super) fn count(number: usize, word: &str) -> String {
    format!("{number} {word}{}", if number == 1 { "" } else { "s" })
}

/// A residual with two figures; `0` where there is none.
pub(super) fn residual(value: f64) -> String {
    if value == 0.0 { "0".to_owned() } else { write_figures(value, 2) }
}

/// A heading and its rows in columns, values aligned on the decimal sign. Nothing without rows.
fn section(text: &mut String, title: &str, rows: &[Row]) {
    if rows.is_empty() {
        return;
    }
    if !text.is_empty() {
        text.push('\n');
    }
    text.push_str(title);
    text.push('\n');
    let word_width = rows.iter().map(|row| width(&visible(&row.word))).max().unwrap_or(0);
    let whole = rows.iter().map(|row| whole_part(&row.value)).max().unwrap_or(0);
    let rest = rows.iter().map(|row| width(&row.value) - whole_part(&row.value)).max().unwrap_or(0);
    let value_width = whole + rest;
    let about_room = WIDTH.saturating_sub(2 + word_width + 2 + if value_width > 0 { value_width + 2 } else { 0 }).max(LEAST_WORDS);
    let abouts: Vec<Vec<String>> = rows.iter().map(|row| wrap(&visible(&row.about), about_room)).collect();
    let about_width = abouts.iter().flatten().map(|line| width(line)).max().unwrap_or(0);
    for (row, about) in rows.iter().zip(&abouts) {
        let mut line = format!("  {}", pad(&visible(&row.word), word_width));
        if about_width > 0 {
            line.push_str(&format!("  {}", pad(about.first().map_or("", String::as_str), about_width)));
        }
        if !row.value.is_empty() {
            line.push_str(&format!("  {}{}", " ".repeat(whole - whole_part(&row.value)), row.value));
        }
        text.push_str(line.trim_end());
        text.push('\n');
        for more in about.iter().skip(1) {
            text.push_str(&format!("  {}  {more}\n", " ".repeat(word_width)));
        }
    }
}

/// Characters of a value before its decimal sign.
fn whole_part(value: &str) -> usize {
    value.chars().take_while(|c| c.is_ascii_digit() || *c == '-').count()
}

fn width(text: &str) -> usize {
    text.chars().count()
}

fn pad(text: &str, to: usize) -> String {
    format!("{text}{}", " ".repeat(to.saturating_sub(width(text))))
}

/// A text broken between words into lines of at most `room` characters; a longer word has a line of its own.
fn wrap(text: &str, room: usize) -> Vec<String> {
    let mut lines = Vec::new();
    let mut line = String::new();
    for word in text.split_whitespace() {
        if !line.is_empty() && width(&line) + 1 + width(word) > room {
            lines.push(std::mem::take(&mut line));
        }
        if !line.is_empty() {
            line.push(' ');
        }
        line.push_str(word);
    }
    if !line.is_empty() {
        lines.push(line);
    }
    lines
}

#[cfg(test)]
mod tests {
    use super::*;

    fn row(word: &str, about: &str, value: &str) -> Row {
        Row { word: word.into(), about: about.into(), value: value.into() }
    }

    #[test]
    fn values_stand_below_each_other_on_the_decimal_sign() {
        let mut text = String::new();
        section(
            &mut text,
            "answers",
            &[row("m", "Nitrogen held", "28.2 kg"), row("cold.p", "Pressure", "8.24 bar gauge"), row("n", "", "-112 mol")],
        );
        assert_eq!(
            text,
            "answers\n  m       Nitrogen held    28.2 kg\n  cold.p  Pressure          8.24 bar gauge\n  n                      -112 mol\n"
        );
    }

    #[test]
    fn long_words_are_broken_and_hidden_characters_shown() {
        let mut text = String::new();
        section(&mut text, "cautions", &[row("caution", &"gas displaces air ".repeat(10), ""), row("caution", "a\u{202e}b", "")]);
        assert!(text.lines().all(|line| width(line) <= WIDTH), "{text}");
        assert!(text.contains("a\\u{202e}b"));
        // The heading, three lines of the long caution and one of the short.
        assert_eq!(text.lines().count(), 5);
    }
}
