//! From the text of a file to its head.

use super::block::Block;
use super::key::HeadReader;
use crate::diagnostic::code::{head_misplaced, head_without_end, too_long};
use crate::diagnostic::{Diagnostic, Span};
use crate::syntax::limits::LONGEST_HEAD;
use crate::syntax::tree::Head;

/// Reads the head of `text`, if it has one. Returns it with the byte at which the statements begin.
pub(crate) fn read(text: &str, findings: &mut Vec<Diagnostic>) -> (Head, usize) {
    let Some(block) = Block::find(text) else { return (Head::default(), 0) };
    if block.open.start > 0 && !text[..block.open.start as usize].trim().is_empty() {
        findings.push(head_misplaced::finding(block.open));
    }
    if !block.closed {
        findings.push(head_without_end::finding(block.open));
    }
    let end = if block.closed { block.end } else { block.content.1 };
    let span = Span::new(block.open.start as usize, text[..end].trim_end().len().max(block.open.end as usize));
    let mut head = Head { span: Some(span), ..Head::default() };
    if block.content.1 - block.content.0 > LONGEST_HEAD {
        findings.push(too_long::head(block.open, LONGEST_HEAD));
    } else {
        let mut reader = HeadReader { text, offset: block.content.0, head: &mut head, findings, seen: Vec::new() };
        reader.block(&text[block.content.0..block.content.1]);
    }
    (head, end)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn head(text: &str) -> (Head, usize, Vec<(&'static str, String)>) {
        let mut findings = Vec::new();
        let (head, end) = read(text, &mut findings);
        (head, end, findings.iter().map(|finding| (finding.code, finding.span.of(text).to_owned())).collect())
    }

    #[test]
    fn texts_stay_as_written_and_keys_are_typed() {
        let text = "---\ntitle: \"Receiver: what it holds\"\ndocument: 2026-11\nrevision: 03\npurpose: yes\nedition: 1\nlimits: {ideal gas: 2.5 %}\nfigures: 5\nstrict: true\ncoverage: 99 %\nmonte_carlo: auto\nseed: 7\n---\ngiven";
        let (head, end, findings) = head(text);
        assert_eq!(findings, []);
        assert_eq!(&text[end..], "given");
        let texts = [&head.title, &head.document, &head.revision, &head.purpose].map(|text| text.as_ref().map_or("", |text| &text.text));
        assert_eq!(texts, ["Receiver: what it holds", "2026-11", "03", "yes"]);
        assert_eq!(head.ideal_gas_limit.map(|limit| limit.0), Some(0.025));
        assert_eq!(head.figures.map(|figures| figures.0), Some(5));
        assert!(head.strict);
        assert_eq!(head.coverage.map(|coverage| coverage.0), Some(0.99));
        assert_eq!(head.monte_carlo.map(|trials| trials.0), Some(None));
        assert_eq!(head.seed.map(|seed| seed.0), Some(7));
        assert_eq!(head.revision.map(|revision| revision.span.of(text)), Some("03"));
    }

    #[test]
    fn all_errors_of_a_head_come_in_one_run_with_their_places() {
        let text = "---\ntitle: Größe: ja\nrevison: B\nfigures: plenty\nfigures: 0\nedition: 2\nstrict: yes\nlimits: {ideal gaz: 1 %}\nseed: 1.5\n---\n";
        let (_, end, findings) = head(text);
        assert_eq!(end, text.len());
        let expected = [
            ("head-needs-quotes", "Größe: ja"),
            ("unknown-head-key", "revison"),
            ("head-value", "plenty"),
            ("head-key-twice", "figures"),
            ("later-edition", "2"),
            ("head-value", "yes"),
            ("unknown-head-key", "ideal gaz"),
            ("head-value", "1.5"),
        ];
        assert_eq!(findings, expected.map(|(code, span)| (code, span.to_owned())));
    }

    #[test]
    fn a_head_without_end_does_not_hide_the_statements() {
        let text = "---\ntitle: Receiver\n\ngiven V = 3 m3\n";
        let (head, end, findings) = head(text);
        assert_eq!(findings, [("head-without-end", "---".to_owned())]);
        assert_eq!(text[end..].trim_start(), "given V = 3 m3\n");
        assert!(head.title.is_some());
    }

    #[test]
    fn unclosed_quotes_bombs_and_depth_are_told_and_end() {
        let (_, _, findings) = head("---\ntitle: \"Receiver\nrevision: B\nx: 1\n---\n");
        assert_eq!(findings.iter().map(|finding| finding.0).collect::<Vec<_>>(), ["bad-head", "unknown-head-key"]);
        let deep = format!("---\ntitle: {}\n---\n", "[".repeat(10_000));
        assert_eq!(head(&deep).2[0].0, "bad-head");
        let bomb = "---\na: &a [x, x, x]\nb: &b [*a, *a, *a]\ntitle: *b\n---\n";
        assert!(head(bomb).2.iter().any(|finding| finding.0 == "bad-head"));
    }
}
