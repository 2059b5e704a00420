//! More statements than a sheet may have.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "too-many";

/// The page.
pub(crate) const PAGE: &str = r##"
# Too many statements, comments or terms

A sheet may have 250 000 statements, 1 000 000 comments and 3 000 000 terms. A file with more is refused as a whole, since
part of a calculation is no calculation.

Split the sheet.
"##;

/// The statement at `span` is one more than `most`.
pub(crate) fn statements(span: Span, most: usize) -> Diagnostic {
    finding(span, "statements", most)
}

/// The comment at `span` is one more than `most`.
pub(crate) fn comments(span: Span, most: usize) -> Diagnostic {
    finding(span, "comments", most)
}

/// The statement at `span` makes the file hold more terms than `most`.
pub(crate) fn expressions(span: Span, most: usize) -> Diagnostic {
    finding(span, "terms in its expressions", most)
}

/// The prose at `span` makes the file hold more live values than `most`.
pub(crate) fn live_values(span: Span, most: usize) -> Diagnostic {
    finding(span, "live values in its prose", most)
}

fn finding(span: Span, what: &str, most: usize) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the sheet has more than {most} {what}")).label("one too many").help("split the sheet")
}
