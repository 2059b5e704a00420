//! Errors beyond the number that is told in full.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "too-many-errors";

/// The page.
pub(crate) const PAGE: &str = r##"
# More errors than are shown

The first 1000 errors of the syntax of a file are told one by one, the rest are only counted. Cure what is shown and check
again; one slip repeated by a program usually explains them all.
"##;

/// From `span` on, `left` errors are not told.
pub(crate) fn finding(span: Span, left: usize) -> Diagnostic {
    let errors = if left == 1 { "error" } else { "errors" };
    Diagnostic::error(CODE, span, format!("{left} more {errors} from here on"))
        .label("not shown from here on")
        .help("cure what is shown and check again")
}

/// Reading stopped after `told` errors.
pub(crate) fn stopped(span: Span, told: usize) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("reading stopped here after {told} errors"))
        .label("lines from here on are not checked")
        .help("mend the errors above first: one mistake in a tool that writes sheets makes thousands of them")
}
