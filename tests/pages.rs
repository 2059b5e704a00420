//! The page of every code: its sheet raises the code, and its cured sheet does not and has no error.

use gaswright::diagnostic::{Diagnostic, code};

/// Codes of bytes that a page cannot hold, and of sheets too large for one.
const WITHOUT_SHEET: &[&str] = &["not-utf8", "too-long", "too-many", "too-many-errors"];

/// The blocks of a page whose fence says `mark`.
fn blocks(page: &str, mark: &str) -> Vec<String> {
    let mut blocks: Vec<String> = Vec::new();
    let mut inside: Option<bool> = None;
    for line in page.lines() {
        if let Some(info) = line.strip_prefix("```") {
            inside = if inside.is_some() { None } else { Some(info.trim() == mark) };
            if inside == Some(true) {
                blocks.push(String::new());
            }
        } else if let (Some(true), Some(block)) = (inside, blocks.last_mut()) {
            block.push_str(line);
            block.push('\n');
        }
    }
    blocks
}

fn told(findings: &[Diagnostic]) -> String {
    findings.iter().map(|finding| format!("\n    {}[{}]: {}", finding.severity.word(), finding.code, finding.message)).collect()
}

#[test]
fn every_page_has_a_title_a_text_and_its_sheets() {
    for page in code::ALL {
        let text = page.text.trim();
        assert!(text.starts_with("# "), "{}: the page has no title", page.code);
        assert!(text.split_whitespace().count() >= 40, "{}: the page is too short to explain anything", page.code);
        if !WITHOUT_SHEET.contains(&page.code) {
            assert!(!blocks(text, "gw").is_empty(), "{}: no sheet that raises it", page.code);
            assert!(!blocks(text, "gw cured").is_empty(), "{}: no sheet that is cured", page.code);
        }
    }
}

#[test]
fn the_sheet_of_a_page_raises_its_code_and_the_cured_one_is_sound() {
    let mut wrong = String::new();
    for page in code::ALL {
        for block in blocks(page.text, "gw") {
            let findings = gaswright::solve(&block).findings;
            if !findings.iter().any(|finding| finding.code == page.code) {
                wrong.push_str(&format!("\n{}: its sheet raises{}", page.code, told(&findings)));
            }
        }
        for block in blocks(page.text, "gw cured") {
            let findings = gaswright::solve(&block).findings;
            if findings.iter().any(|finding| finding.is_error() || finding.code == page.code) {
                wrong.push_str(&format!("\n{}: its cured sheet raises{}", page.code, told(&findings)));
            }
        }
    }
    assert!(wrong.is_empty(), "{wrong}");
}

#[test]
fn codes_are_words_with_hyphens_each_once_in_alphabetical_order() {
    let codes: Vec<&str> = code::ALL.iter().map(|page| page.code).collect();
    assert!(codes.is_sorted(), "{codes:?}");
    assert!(codes.windows(2).all(|pair| pair[0] != pair[1]), "{codes:?}");
    for code in codes {
        assert!(code.chars().all(|character| character.is_ascii_lowercase() || character.is_ascii_digit() || character == '-'), "{code}");
        assert!(code.contains('-') && !code.starts_with('-') && !code.ends_with('-'), "{code}");
    }
}

#[test]
fn a_page_is_found_by_its_code_alone() {
    for page in code::ALL {
        assert_eq!(code::page(page.code).map(|found| found.code), Some(page.code));
    }
    assert!(code::page("no-such-code-at-all").is_none());
}
