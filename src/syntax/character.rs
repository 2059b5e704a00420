//! Characters: what counts as a blank, what a name is made of, and which characters hide themselves from a reader.

use crate::diagnostic::code::hidden_character;
use crate::diagnostic::{Diagnostic, Span};

/// Whether `character` may begin a name.
pub(crate) fn is_letter(character: char) -> bool {
    character.is_ascii_alphabetic() || !character.is_ascii() && character.is_alphabetic()
}

/// Whether `character` may stand inside a name.
pub(crate) fn is_name_char(character: char) -> bool {
    character.is_ascii_alphanumeric() || character == '_' || !character.is_ascii() && character.is_alphabetic()
}

/// Whether `character` is a blank within a line: the blank, the tab, and the blanks that word processors put between a
/// number and its unit.
pub(crate) fn is_blank(character: char) -> bool {
    matches!(character, ' ' | '\t' | '\u{A0}' | '\u{2009}' | '\u{202F}')
}

/// Whether `character` cannot be seen, or changes the order in which its neighbours are seen.
fn is_hidden(character: char) -> bool {
    match character {
        '\t' | '\n' => false,
        '\u{00}'..='\u{1F}' | '\u{7F}'..='\u{9F}' => true,
        '\u{AD}' | '\u{61C}' | '\u{180E}' | '\u{200B}' | '\u{200E}' | '\u{200F}' | '\u{2028}'..='\u{202E}' => true,
        '\u{2060}'..='\u{206F}' | '\u{FEFF}' | '\u{FFF9}'..='\u{FFFB}' | '\u{E0000}'..='\u{E007F}' => true,
        _ => false,
    }
}

/// Bytes with which a hidden character may begin; all others are passed over without decoding.
const SUSPECT: [bool; 256] = {
    let mut table = [false; 256];
    let mut byte = 0;
    while byte < 0x20 {
        table[byte] = byte != b'\t' as usize && byte != b'\n' as usize;
        byte += 1;
    }
    table[0x7F] = true;
    table[0xC2] = true; // U+0080 to U+00BF
    table[0xD8] = true; // U+0600 to U+063F
    table[0xE1] = true; // U+1000 to U+1FFF
    table[0xE2] = true; // U+2000 to U+2FFF
    table[0xEF] = true; // U+F000 to U+FFFF
    table[0xF3] = true; // U+C0000 to U+FFFFF
    table
};

/// Finds the hidden characters of `text`: runs of them that touch are one finding. At most `most` findings are made.
pub(crate) fn hidden(text: &str, most: usize) -> Vec<Diagnostic> {
    let bytes = text.as_bytes();
    let mut findings: Vec<Diagnostic> = Vec::new();
    let mut at = 0;
    while at < bytes.len() && findings.len() < most {
        if !SUSPECT[bytes[at] as usize] {
            at += 1;
            continue;
        }
        let start = at;
        let mut first = None;
        while let Some(character) = text.get(at..).and_then(|rest| rest.chars().next()) {
            let line_end = character == '\r' && bytes.get(at + 1) == Some(&b'\n');
            if line_end || !is_hidden(character) {
                break;
            }
            first = first.or(Some(character));
            at += character.len_utf8();
        }
        match first {
            Some(character) => findings.push(hidden_character::finding(Span::new(start, at), character)),
            None => at += text[start..].chars().next().map_or(1, char::len_utf8),
        }
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn hidden_characters_are_found_once_a_run_and_line_ends_are_none() {
        let text = "a\tb\r\nc\u{202E}\u{200B}d\u{A0}e\rf\u{7}";
        let spans: Vec<_> = hidden(text, 100).iter().map(|finding| finding.span.of(text)).collect();
        assert_eq!(spans, ["\u{202E}\u{200B}", "\r", "\u{7}"]);
        assert_eq!(hidden(text, 2).len(), 2);
    }

    #[test]
    fn every_hidden_character_begins_with_a_suspect_byte() {
        for character in ('\0'..='\u{10FFFF}').filter(|character| is_hidden(*character)) {
            let mut buffer = [0; 4];
            assert!(SUSPECT[character.encode_utf8(&mut buffer).as_bytes()[0] as usize], "{character:?}");
        }
    }
}
