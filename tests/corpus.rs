//! The corpus: sheets that say themselves what has to be found in them.
//!
//! A sheet of `tests/corpus/<room>/` ends with comments that list its findings, all of them:
//!
//! ```text
//! #~ error[unknown-unit] 2:16-19            line 2, columns 16 to 18
//! #~ warning[source-missing] 3:1-4:7        from line 3, column 1, to before line 4, column 7
//! #~ others error[bad-line]                 and any number more of this code
//! #~ none                                   nothing at all
//! ```
//!
//! In a sheet whose name ends with `.made.gw`, `<<100 * (>>` stands for a hundred opening brackets: what is too long or too
//! deep to be kept as a file. With the environment variable `CORPUS=write` the lists are written anew from what is
//! found; every change is then to be read.

use std::collections::{BTreeMap, BTreeSet};
use std::fmt::Write;
use std::fs;
use std::path::{Path, PathBuf};

use gaswright::diagnostic::{Diagnostic, LineIndex, code};

/// What starts a line of the list.
const MARK: &str = "#~ ";

/// What a sheet is expected to raise.
#[derive(Debug, Default)]
struct Expected {
    findings: Vec<String>,
    others: BTreeSet<String>,
    stated: bool,
}

impl Expected {
    fn of(text: &str) -> Self {
        let mut expected = Self::default();
        for line in text.lines().filter_map(|line| line.strip_prefix(MARK)) {
            expected.stated = true;
            match line.strip_prefix("others ") {
                Some(other) => {
                    expected.others.insert(other.trim().to_owned());
                }
                None if line.trim() == "none" => {}
                None => expected.findings.push(line.split_whitespace().collect::<Vec<_>>().join(" ")),
            }
        }
        expected.findings.sort();
        expected
    }

    /// The codes that are named, with their severities left out.
    fn codes(&self) -> impl Iterator<Item = String> {
        self.findings.iter().chain(&self.others).filter_map(|line| Some(line.split_once('[')?.1.split_once(']')?.0.to_owned()))
    }
}

/// A finding as the list writes it: severity and code, place.
fn listed(finding: &Diagnostic, text: &str, lines: &LineIndex) -> (String, String) {
    let start = lines.place(text, finding.span.start);
    let end = lines.place(text, finding.span.end.max(finding.span.start));
    let head = format!("{}[{}]", finding.severity.word(), finding.code);
    let place = if start.line == end.line {
        format!("{}:{}-{}", start.line, start.column, end.column)
    } else {
        format!("{}:{}-{}:{}", start.line, start.column, end.line, end.column)
    };
    (head, place)
}

/// Everything that is found in the bytes of a sheet.
fn found_in(bytes: &[u8]) -> (String, Vec<Diagnostic>) {
    match gaswright::syntax::decode(bytes) {
        Ok(text) => (text.to_owned(), gaswright::solve(text).findings),
        Err(finding) => (String::from_utf8_lossy(bytes).into_owned(), vec![finding]),
    }
}

/// A made sheet with its repeats written out.
fn written_out(bytes: Vec<u8>) -> Vec<u8> {
    let mut text = String::from_utf8(bytes).expect("a made sheet is UTF-8");
    while let Some(start) = text.find("<<") {
        let end = start + text[start..].find(">>").expect("a repeat ends with >>");
        let (count, what) = text[start + 2..end].split_once(" * ").expect("a repeat is <<COUNT * TEXT>>");
        let repeated = what.replace("\\n", "\n").repeat(count.parse().expect("a repeat has a count"));
        text.replace_range(start..end + 2, &repeated);
    }
    text.into_bytes()
}

fn sheets() -> Vec<PathBuf> {
    let corpus = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/corpus");
    let mut sheets = Vec::new();
    for room in fs::read_dir(corpus).expect("the corpus is there") {
        let room = room.expect("the corpus can be read").path();
        if room.is_dir() {
            let files = fs::read_dir(room).expect("a room of the corpus can be read").map(|file| file.expect("a sheet can be read").path());
            sheets.extend(files.filter(|path| path.extension().is_some_and(|ending| ending == "gw")));
        }
    }
    sheets.sort();
    sheets
}

/// What is wrong with a sheet of the corpus; empty where all is as expected.
fn differences(path: &Path) -> String {
    let name = path.display();
    let bytes = fs::read(path).expect("a sheet can be read");
    let made = path.to_string_lossy().ends_with(".made.gw");
    let expected = Expected::of(&String::from_utf8_lossy(&bytes));
    let (text, findings) = found_in(&if made { written_out(bytes.clone()) } else { bytes.clone() });
    let lines = LineIndex::new(&text);
    let mut found: Vec<(String, String, &Diagnostic)> = findings
        .iter()
        .map(|finding| {
            let (head, place) = listed(finding, &text, &lines);
            (head.clone(), format!("{head} {place}"), finding)
        })
        .collect();
    if std::env::var_os("CORPUS").is_some_and(|value| value == "write") {
        write_list(path, &bytes, &expected, &found);
        return String::new();
    }
    let mut wrong = String::new();
    if !expected.stated {
        let _ = writeln!(wrong, "{name}: does not say what is to be found in it");
    }
    let mut missing = expected.findings.clone();
    found.retain(|(_, line, _)| match missing.iter().position(|expected| expected == line) {
        Some(at) => {
            missing.remove(at);
            false
        }
        None => true,
    });
    for line in missing {
        let _ = writeln!(wrong, "{name}: not found: {line}");
    }
    for (_, line, finding) in found.iter().filter(|(head, _, _)| !expected.others.contains(head)) {
        let _ = writeln!(wrong, "{name}: unexpected: {line}: {}", finding.message);
    }
    for other in expected.others.iter().filter(|other| !found.iter().any(|(head, _, _)| head == *other)) {
        let _ = writeln!(wrong, "{name}: none of the others: {other}");
    }
    wrong
}

/// Writes the list of a sheet anew.
fn write_list(path: &Path, bytes: &[u8], expected: &Expected, found: &[(String, String, &Diagnostic)]) {
    let mark = MARK.as_bytes();
    let mut kept: Vec<u8> =
        bytes.split_inclusive(|byte| *byte == b'\n').filter(|line| !line.starts_with(mark)).collect::<Vec<_>>().concat();
    if !kept.ends_with(b"\n") {
        kept.push(b'\n');
    }
    let listed: Vec<&String> = found.iter().filter(|(head, _, _)| !expected.others.contains(head)).map(|(_, line, _)| line).collect();
    let others = expected.others.iter().map(|other| format!("others {other}"));
    let mut list: Vec<String> = listed.into_iter().cloned().chain(others).collect();
    if list.is_empty() {
        list.push("none".to_owned());
    }
    for line in list {
        kept.extend_from_slice(format!("{MARK}{line}\n").as_bytes());
    }
    if kept != bytes {
        fs::write(path, kept).expect("the list can be written");
    }
}

#[test]
fn every_sheet_raises_what_it_says_and_nothing_else() {
    let sheets = sheets();
    assert!(sheets.len() >= code::ALL.len(), "{} sheets for {} codes", sheets.len(), code::ALL.len());
    let wrong: String = sheets.iter().map(|path| differences(path)).collect();
    assert!(wrong.is_empty(), "\n{wrong}");
}

#[test]
fn every_code_has_a_sheet_and_every_sheet_a_code() {
    let mut raised: BTreeMap<String, PathBuf> = BTreeMap::new();
    for path in sheets() {
        let text = String::from_utf8_lossy(&fs::read(&path).expect("a sheet can be read")).into_owned();
        for code in Expected::of(&text).codes() {
            raised.entry(code).or_insert_with(|| path.clone());
        }
    }
    let known: BTreeSet<&str> = code::ALL.iter().map(|page| page.code).collect();
    let without: Vec<&&str> = known.iter().filter(|code| !raised.contains_key(**code)).collect();
    assert!(without.is_empty(), "no sheet of the corpus raises {without:?}");
    let unknown: Vec<_> = raised.iter().filter(|(code, _)| !known.contains(code.as_str())).collect();
    assert!(unknown.is_empty(), "no such code: {unknown:?}");
}

#[test]
fn findings_come_in_the_order_of_the_text_and_lie_in_it() {
    for path in sheets() {
        let bytes = fs::read(&path).expect("a sheet can be read");
        let made = path.to_string_lossy().ends_with(".made.gw");
        let (text, findings) = found_in(&if made { written_out(bytes) } else { bytes });
        let places: Vec<(u32, u32)> = findings.iter().map(|finding| (finding.span.start, finding.span.end)).collect();
        assert!(places.is_sorted(), "{}: {places:?}", path.display());
        for finding in &findings {
            let edits = finding.edit.iter().map(|edit| edit.span);
            for span in std::iter::once(finding.span).chain(edits).chain(finding.related.iter().map(|related| related.span)) {
                let inside = span.start <= span.end && span.end as usize <= text.len();
                assert!(inside && text.is_char_boundary(span.start as usize), "{}: {finding:?}", path.display());
                assert!(text.is_char_boundary(span.end as usize), "{}: {finding:?}", path.display());
            }
        }
    }
}
