//! A file or a line that is too long.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "too-long";

/// The page.
pub(crate) const PAGE: &str = r##"
# A file or a line that is too long

A file may have 64 MiB, a logical line 64 KiB (its continuation lines included), a head 64 KiB. What is longer is no sheet
that a colleague could check; it is refused before it is read, so that a damaged or hostile file costs neither time nor
memory.

Split the sheet, or break the line into several statements with `let`.
"##;

/// The file of `length` bytes is longer than `most`.
pub(crate) fn file(span: Span, length: usize, most: usize) -> Diagnostic {
    let mega = 1024 * 1024;
    Diagnostic::error(CODE, span, format!("the file has {} MiB; a sheet may have {} MiB", length.div_ceil(mega), most / mega))
        .label("the file is not read")
        .help("split the sheet")
}

/// The logical line is longer than `most` bytes.
pub(crate) fn line(span: Span, most: usize) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("this line is longer than {} KiB", most / 1024))
        .label("the line is not read")
        .help("break it into several statements with `let`")
}

/// The head is longer than `most` bytes.
pub(crate) fn head(span: Span, most: usize) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("the head is longer than {} KiB", most / 1024))
        .label("the head is not read")
        .help("close the head with a line `---`; long texts belong into prose")
}
