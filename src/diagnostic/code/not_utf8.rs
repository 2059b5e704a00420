//! A file that is no UTF-8 text.

use crate::diagnostic::{Diagnostic, Span};

/// The code.
pub(crate) const CODE: &str = "not-utf8";

/// The page.
pub(crate) const PAGE: &str = r##"
# A file that is not UTF-8

A sheet is a text file in UTF-8, so that `±`, `°C` and the letters of every language read the same on every machine. The
bytes at the place shown are no UTF-8: the file was saved in another encoding (Windows-1252, Latin-1, UTF-16), or it is
no text at all.

Save the file again with the encoding UTF-8. Editors offer it in the dialog for saving, or in the bar at the foot of the
window.
"##;

/// The bytes are no UTF-8 from `at` on.
pub(crate) fn finding(bytes: &[u8], at: usize) -> Diagnostic {
    let line = bytes[..at].iter().filter(|byte| **byte == b'\n').count() + 1;
    let byte = bytes.get(at).copied().unwrap_or(0);
    let wide = bytes.starts_with(b"\xFF\xFE") || bytes.starts_with(b"\xFE\xFF");
    let help = if wide {
        "the file is UTF-16: save it again as UTF-8"
    } else if bytes.contains(&0) {
        "this is no text file; a sheet is a text in UTF-8"
    } else {
        "save the file again with the encoding UTF-8"
    };
    // A byte that is no UTF-8 becomes one sign of three bytes in the text that is shown.
    Diagnostic::error(CODE, Span::new(at, at + 3), format!("the file is not UTF-8: line {line} holds the byte 0x{byte:02X}"))
        .label("no UTF-8 from here on")
        .help(help)
}
