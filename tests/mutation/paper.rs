//! Mistakes of the paper: what a reader would miss.

use gaswright::diagnostic::Span;
use gaswright::syntax::{ProsePiece, Statement, StatementKind};

use super::good_sheet::GoodSheet;
use super::mutant::Mutant;

/// The sheet without a text and the word before it.
fn without_text(sheet: &GoodSheet, statement: &Statement, text: Span, word: &str) -> String {
    let before = Span { start: statement.span.start, end: text.start };
    let start = if word.is_empty() { text.start } else { statement.span.start + sheet.at(before).rfind(word).unwrap_or_default() as u32 };
    sheet.with(Span { start, end: text.end }, &"\n".repeat(sheet.at(Span { start, end: text.end }).matches('\n').count()))
}

/// An input without a description.
pub(super) fn description_dropped(sheet: &GoodSheet) -> Vec<Mutant> {
    let given = |statement: &&Statement| matches!(statement.kind, StatementKind::Given { .. });
    sheet
        .statements()
        .iter()
        .filter(given)
        .filter_map(|statement| {
            let text = without_text(sheet, statement, statement.description.as_ref()?.span, "");
            Some(Mutant::new(text, "a given without description", sheet.lines_of(statement.span), &[&["description"]]))
        })
        .collect()
}

/// A requirement, an assumption, a caution without its text.
pub(super) fn clause_without_text(sheet: &GoodSheet) -> Vec<Mutant> {
    let clause = |statement: &&Statement| {
        matches!(statement.kind, StatementKind::Require { .. } | StatementKind::Assume { .. } | StatementKind::Caution { .. })
    };
    sheet
        .statements()
        .iter()
        .filter(clause)
        .filter_map(|statement| {
            let text = without_text(sheet, statement, statement.description.as_ref()?.span, "");
            let change = format!("`{}` without its text", sheet.at(statement.word));
            Some(Mutant::new(text, change, sheet.lines_of(statement.span), &[&["quotes", "\"", "text"]]))
        })
        .collect()
}

/// An input without a source.
pub(super) fn source_dropped(sheet: &GoodSheet) -> Vec<Mutant> {
    let input = |statement: &&Statement| matches!(statement.kind, StatementKind::Given { .. });
    sheet
        .statements()
        .iter()
        .filter(input)
        .filter_map(|statement| {
            let text = without_text(sheet, statement, statement.source.as_ref()?.span, "from");
            Some(Mutant::new(text, "a given without source", sheet.lines_of(statement.span), &[&["from"]]))
        })
        .collect()
}

/// An assumption without a reason.
pub(super) fn reason_dropped(sheet: &GoodSheet) -> Vec<Mutant> {
    sheet
        .statements()
        .iter()
        .filter_map(|statement| {
            let text = without_text(sheet, statement, statement.because.as_ref()?.span, "because");
            Some(Mutant::new(text, "an assumption without reason", sheet.lines_of(statement.span), &[&["because"]]))
        })
        .collect()
}

/// A number typed in a sentence that does not agree with the result.
pub(super) fn number_typed(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    let Some(solution) = &sheet.solved.solution else { return mutants };
    for statement in sheet.statements() {
        let StatementKind::Prose { pieces } = &statement.kind else { continue };
        for piece in pieces {
            let ProsePiece::Live { span, path, .. } = piece else { continue };
            let name = sheet.at(path.span());
            let Some(id) = sheet.solved.sheet.find(name) else { continue };
            let shown = &sheet.solved.sheet.quantity(id).shown;
            let value = shown.from_si(solution.values[id.0 as usize], solution.site_pressure_pa);
            let wrong = if value == 0.0 { 1.0 } else { 1.5 * value };
            let typed = format!("{name} = {} {}", gaswright::units::write_figures(wrong, 4), shown.text());
            let lines = sheet.lines_of(*span);
            mutants.push(Mutant::new(sheet.with(*span, typed.trim_end()), format!("`{typed}` typed"), lines, &[&[&format!("{{{name}")]]));
        }
    }
    mutants
}

/// A mark of the head misspelt.
pub(super) fn head_key_misspelt(sheet: &GoodSheet) -> Vec<Mutant> {
    let keys = [("title", "titel"), ("document", "documnet"), ("revision", "revison"), ("purpose", "purpos")];
    keys.iter()
        .filter_map(|(right, wrong)| {
            let at = sheet.text.find(&format!("\n{right}:"))? + 1;
            let span = Span::new(at, at + right.len());
            Some(Mutant::new(sheet.with(span, wrong), format!("`{wrong}:`"), sheet.lines_of(span), &[&[right]]))
        })
        .collect()
}

/// A mark of the head given twice.
pub(super) fn head_key_twice(sheet: &GoodSheet) -> Vec<Mutant> {
    let Some(at) = sheet.text.find("\nrevision:") else { return Vec::new() };
    let span = Span::new(at, at);
    let line = *sheet.lines_of(Span::new(at + 1, at + 2)).start();
    vec![Mutant::new(sheet.with(span, "\nrevision: Z"), "`revision` twice", [line, line + 1], &[&["remove", "once", "one of"]])]
}
