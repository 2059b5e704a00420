//! Headings and prose of the sheet between the entries of the working.

use super::working::Entry;
use crate::report::draft::{Draft, markdown};
use crate::report::markdown::{escape, prose};
use crate::report::written::{Written, leading_number};
use crate::sheet::LiveValue;
use crate::syntax::{ProsePiece, StatementKind};

/// Headings and prose up to a statement.
pub(super) fn narrate(draft: &Draft, next: &mut usize, until: usize, entries: &mut Vec<Entry>) {
    while *next < until.min(draft.input.tree.statements.len()) {
        match &draft.input.tree.statements[*next].kind {
            StatementKind::Section { title } => entries.push(Entry::Section { title: title.text.clone() }),
            StatementKind::Prose { pieces } => entries.push(Entry::Prose { text: markdown(filled(draft, *next, pieces)) }),
            _ => {}
        }
        *next += 1;
    }
}

/// Prose with its live values.
fn filled(draft: &Draft, statement: usize, pieces: &[ProsePiece]) -> String {
    let input = draft.input;
    let mut text = String::new();
    for piece in pieces {
        match piece {
            ProsePiece::Text(words) => text.push_str(words),
            ProsePiece::Live { span, .. } => {
                let live = input.sheet.live_values.iter().find(|live| live.statement == statement && live.span == *span);
                text.push_str(&live.map_or_else(|| "(no value)".to_owned(), |live| escape(&live_value(draft, live))));
            }
        }
    }
    prose(&text)
}

/// A live value: a given as it was written, a result rounded as an answer is.
fn live_value(draft: &Draft, live: &LiveValue) -> String {
    let input = draft.input;
    let quantity = input.quantity(live.quantity);
    match &quantity.reading {
        Some(reading) if live.shown == quantity.shown && input.sheet.head.figures.is_none() => {
            let number = leading_number(&reading.text).to_owned();
            Written { number, unit: live.shown.text() }.typeset()
        }
        _ => input
            .written(live.quantity, &live.shown, input.answer_figures(live.quantity))
            .map_or_else(|| "(no value)".to_owned(), |written| written.typeset()),
    }
}
