//! The sheet itself, with the numbers of its lines and without its comments.

use minijinja::Value;
use serde::Serialize;

use crate::diagnostic::visible;
use crate::report::draft::{Draft, markdown};
use crate::report::markdown::code_block;

/// The listing.
#[derive(Clone, Debug, Serialize)]
pub(in crate::report) struct Listing {
    /// A block of code, each line with its number before it.
    block: Value,
    /// The lines that the report cites and links to.
    lines: Vec<u32>,
}

/// The listing of the sheet of a report, made after all other parts: it knows which lines they cite.
pub(in crate::report) fn listing(draft: &Draft) -> Listing {
    let text = draft.input.text;
    let n_lines = draft.lines.line_count();
    // A text that ends with a line end has one empty line more.
    let n_lines = if text.ends_with('\n') { n_lines - 1 } else { n_lines };
    let width = n_lines.to_string().len();
    let mut listed = String::with_capacity(text.len() + 8 * n_lines as usize);
    let mut comments = draft.input.tree.comments.iter().peekable();
    for line in 1..=n_lines {
        let span = draft.lines.line_span(text, line);
        while comments.peek().is_some_and(|comment| comment.end <= span.start) {
            comments.next();
        }
        let end = comments
            .peek()
            .filter(|comment| comment.start >= span.start && comment.start < span.end)
            .map_or(span.end, |comment| comment.start);
        let kept = text.get(span.start as usize..end as usize).unwrap_or_default().trim_end();
        let shown = visible(kept);
        listed.push_str(format!("{line:>width$}  {shown}").trim_end());
        listed.push('\n');
    }
    Listing { block: markdown(code_block(&listed)), lines: draft.cited() }
}
