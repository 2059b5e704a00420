//! Text made visible: what a terminal would obey or hide is shown as an escape instead.

use std::borrow::Cow;
use std::fmt::Write;

/// The text with control characters and invisible direction marks shown as escapes: `\n`, `\u{1b}`, `\u{202e}`.
///
/// A sheet may come from a stranger. Its texts are shown in findings, and must neither move the cursor nor make a reader
/// see another order of words than the program read. A tab stays a tab.
///
/// ```
/// use gaswright::diagnostic::visible;
/// assert_eq!(visible("m3\u{202e} abs\u{1b}[2J"), r"m3\u{202e} abs\u{1b}[2J");
/// assert_eq!(visible("2.40 m³ ± 0.02"), "2.40 m³ ± 0.02");
/// ```
#[must_use]
pub fn visible(text: &str) -> Cow<'_, str> {
    let Some(first) = text.find(is_hidden) else { return Cow::Borrowed(text) };
    let mut shown = String::with_capacity(text.len() + 8);
    shown.push_str(&text[..first]);
    text[first..].chars().for_each(|character| push_visible(&mut shown, character));
    Cow::Owned(shown)
}

/// Appends `character`, escaped where a reader could not see it.
pub(super) fn push_visible(shown: &mut String, character: char) {
    match character {
        '\n' => shown.push_str("\\n"),
        '\r' => shown.push_str("\\r"),
        hidden if is_hidden(hidden) => {
            // Writing into a string cannot fail.
            let _ = write!(shown, "\\u{{{:x}}}", hidden as u32);
        }
        plain => shown.push(plain),
    }
}

/// Whether a character changes how text is shown without being seen itself.
fn is_hidden(character: char) -> bool {
    match character {
        '\t' => false,
        // Soft hyphen, Arabic letter mark, Mongolian vowel separator, zero-width and direction marks, line and paragraph
        // separators, embeddings, isolates, byte order mark, interlinear marks, tags.
        '\u{ad}'
        | '\u{61c}'
        | '\u{180e}'
        | '\u{200b}'..='\u{200f}'
        | '\u{2028}'..='\u{202e}'
        | '\u{2060}'..='\u{206f}'
        | '\u{feff}'
        | '\u{fff9}'..='\u{fffb}'
        | '\u{e0000}'..='\u{e007f}' => true,
        other => other.is_control(),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn what_is_seen_stays_and_is_not_copied() {
        assert!(matches!(visible("Füllung ± 0.1 bar\tθ"), Cow::Borrowed(_)));
    }

    #[test]
    fn line_ends_and_controls_are_escaped() {
        assert_eq!(visible("a\r\nb\u{7}\u{9b}"), r"a\r\nb\u{7}\u{9b}");
        assert_eq!(visible("\u{2066}x\u{2069}\u{200b}\u{feff}"), r"\u{2066}x\u{2069}\u{200b}\u{feff}");
    }
}
