//! Texts of a sheet as Markdown that says what they say: nothing in them runs, expands or reaches beyond its place.

use std::ops::Range;

use pulldown_cmark::{CodeBlockKind, Event, Options, Parser, Tag, TagEnd};

use crate::diagnostic::visible;

/// What of Markdown the reports are written in.
pub(super) const OPTIONS: Options = Options::ENABLE_TABLES.union(Options::ENABLE_MATH).union(Options::ENABLE_STRIKETHROUGH);

/// A paragraph that no sheet holds, to see whether the prose before it is closed.
const SENTINEL: &str = "end\u{2063}of\u{2063}prose";

/// How often the HTML of a prose may be escaped again because the text behind it reads otherwise then.
const ROUNDS: usize = 8;

/// A text on one line as Markdown that shows exactly it, in a paragraph, a heading or a cell of a table.
pub(super) fn escape(text: &str) -> String {
    let text = visible(text);
    let mut out = String::with_capacity(text.len() + 8);
    let mut characters = text.chars().peekable();
    let mut before = ' ';
    while let Some(character) = characters.next() {
        let after = characters.peek().copied().unwrap_or(' ');
        match character {
            '<' => out.push_str("&lt;"),
            '>' => out.push_str("&gt;"),
            '&' if after.is_alphanumeric() || after == '#' => out.push_str("&amp;"),
            '\\' | '`' | '*' | '[' | ']' | '$' | '|' | '~' | '#' => {
                out.push('\\');
                out.push(character);
            }
            // Within a word an underscore is one.
            '_' if !(before.is_alphanumeric() && after.is_alphanumeric()) => out.push_str("\\_"),
            // A list or a rule begins with these, but only at the beginning of a line.
            '-' | '+' | '=' if out.is_empty() => {
                out.push('\\');
                out.push(character);
            }
            '.' | ')' if after.is_whitespace() && !out.is_empty() && out.bytes().all(|byte| byte.is_ascii_digit()) => {
                out.push('\\');
                out.push(character);
            }
            '!' if after == '[' => out.push_str("\\!"),
            '\t' => out.push(' '),
            other => out.push(other),
        }
        before = character;
    }
    out.trim().to_owned()
}

/// The Markdown of a prose with its HTML shown as text, and closed: what stands behind it is not drawn into it.
pub(super) fn prose(text: &str) -> String {
    let text: String = text.lines().map(|line| visible(line).into_owned() + "\n").collect();
    let text = without_html(&text);
    let text = text.trim_end().to_owned();
    if is_closed(&text) {
        return text;
    }
    if let Some(fence) = open_fence(&text) {
        let closed = format!("{text}\n{fence}");
        if is_closed(&closed) {
            return closed;
        }
    }
    // Something this rule does not know is open: every line is shown as it was written.
    text.lines().map(escape).collect::<Vec<_>>().join("  \n")
}

/// Raw HTML with its angle brackets escaped.
fn without_html(text: &str) -> String {
    let mut text = text.to_owned();
    for _ in 0..ROUNDS {
        let mut ranges: Vec<Range<usize>> = Vec::new();
        for (event, range) in Parser::new_ext(&text, OPTIONS).into_offset_iter() {
            if matches!(event, Event::Html(_) | Event::InlineHtml(_)) {
                ranges.push(range);
            }
        }
        if ranges.is_empty() {
            return text;
        }
        let mut out = String::with_capacity(text.len() + 3 * ranges.len());
        let mut copied = 0;
        for range in ranges {
            if range.start < copied {
                continue;
            }
            out.push_str(&text[copied..range.start]);
            out.push_str(&text[range.clone()].replace('<', "&lt;"));
            copied = range.end;
        }
        out.push_str(&text[copied..]);
        text = out;
    }
    text.replace('<', "&lt;")
}

/// Whether a paragraph behind the text is a paragraph of its own.
fn is_closed(text: &str) -> bool {
    let whole = format!("{text}\n\n{SENTINEL}\n");
    let mut depth = 0_usize;
    let mut last = (0, String::new());
    for event in Parser::new_ext(&whole, OPTIONS) {
        match event {
            Event::Start(_) => depth += 1,
            Event::End(_) => depth = depth.saturating_sub(1),
            Event::Text(text) => last = (depth, text.into_string()),
            _ => {}
        }
    }
    last.0 == 1 && last.1 == SENTINEL
}

/// The fence that would close the last code block.
fn open_fence(text: &str) -> Option<String> {
    let mut fence = None;
    for (event, range) in Parser::new_ext(text, OPTIONS).into_offset_iter() {
        match event {
            Event::Start(Tag::CodeBlock(CodeBlockKind::Fenced(_))) => {
                let opening = text[range].trim_start();
                let mark = opening.chars().next()?;
                fence = Some(opening.chars().take_while(|c| *c == mark).collect());
            }
            Event::End(TagEnd::CodeBlock) => {}
            _ => {}
        }
    }
    fence
}

/// A text as a block of code; the fence is longer than any in it.
pub(super) fn code_block(text: &str) -> String {
    let longest = text.split(|c| c != '`').map(str::len).max().unwrap_or(0);
    let fence = "`".repeat(longest.max(2) + 1);
    format!("{fence}text\n{}\n{fence}", text.trim_end_matches('\n'))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn html(markdown: &str) -> String {
        let mut out = String::new();
        pulldown_cmark::html::push_html(&mut out, Parser::new_ext(markdown, OPTIONS));
        out
    }

    #[test]
    fn escaped_texts_show_exactly_what_they_say() {
        for text in [
            "plain words, 7.5 bar",
            "a*b*c and _x_ and p_1_max",
            "<script>alert(1)</script> {{ 7*191 }}",
            "| cell | `code` | $x$ | ~~gone~~ |",
            "[link](http://example.org) ![image](x.png)",
            "# heading #",
            "- item",
            "+ item",
            "=== rule",
            "3. item",
            "12) item",
            "&amp; &#60; R&D",
            "back\\slash \\* end\\",
            "5$ and $5",
        ] {
            let shown = html(&escape(text));
            let expected = format!("<p>{}</p>\n", text.replace('&', "&amp;").replace('<', "&lt;").replace('>', "&gt;"));
            assert_eq!(shown, expected);
            let cell = html(&format!("| a |\n|---|\n| {} |\n", escape(text)));
            assert!(cell.contains(&expected[3..expected.len() - 5]), "{cell}");
        }
        assert_eq!(escape("KQ-PH-C-012 p_1"), "KQ-PH-C-012 p_1");
    }

    #[test]
    fn html_in_prose_is_text_and_markdown_stays() {
        let shown =
            html(&prose("Raw <script>alert('prose')</script> and <b>bold</b> text, **strong**.\n\n<div>\n<!-- answers -->\n\n`<code>`"));
        assert!(!shown.contains("<script") && !shown.contains("<b>") && !shown.contains("<div") && !shown.contains("<!--"), "{shown}");
        assert!(shown.contains("&lt;b&gt;bold&lt;/b&gt; text, <strong>strong</strong>") && shown.contains("<code>&lt;code&gt;</code>"));
    }

    #[test]
    fn prose_never_draws_in_what_stands_behind_it() {
        for open in [
            "```\ncode",
            "~~~~ rust\ncode\n~~~",
            "- a\n\n  ```\n  code",
            "<!-- open",
            "> quote",
            "<script>",
            "    code",
            "| a |\n|---|\n| b |",
            "$$ open",
            "* ",
        ] {
            let closed = prose(open);
            assert!(is_closed(&closed), "{open:?} gave {closed:?}");
        }
    }

    #[test]
    fn a_block_of_code_ends_where_it_should() {
        let text = "a\n```\nb `````\n";
        let shown = html(&format!("{}\n\nbehind\n", code_block(text)));
        assert!(shown.ends_with("</code></pre>\n<p>behind</p>\n") && shown.contains("b `````"), "{shown}");
    }
}
