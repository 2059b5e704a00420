//! A finding in one line, for other programs: `PATH:LINE:COLUMN: severity[code]: message`.

use super::{Diagnostic, LineIndex, visible};

/// The finding in one line, without a line end.
#[must_use]
pub fn short(finding: &Diagnostic, path: &str, text: &str, lines: &LineIndex) -> String {
    let place = lines.place(text, finding.span.start);
    format!(
        "{}:{}:{}: {}[{}]: {}",
        visible(path),
        place.line,
        place.column,
        finding.severity.word(),
        finding.code,
        visible(&finding.message)
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::diagnostic::Span;

    #[test]
    fn one_line_with_place_and_code_whatever_the_texts_hold() {
        let text = "given V = 3.20 m3\nanswer Ü.x\n";
        let finding = Diagnostic::warning("unknown-name", Span::new(28, 29), "`x`\nis \u{1b}[31mnew");
        let line = short(&finding, "a\nb.gw", text, &LineIndex::new(text));
        assert_eq!(line, r"a\nb.gw:2:10: warning[unknown-name]: `x`\nis \u{1b}[31mnew");
    }
}
