//! Findings as SARIF 2.1.0 (OASIS Standard, 27 March 2020), the exchange format of static analysis results.

use std::collections::BTreeMap;

use serde_json::{Value, json};
use sha2::{Digest, Sha256};

use super::{Diagnostic, LineIndex, Severity, Span, code, json::region};

/// The schema that the log names.
const SCHEMA: &str = "https://docs.oasis-open.org/sarif/sarif/v2.1.0/errata01/os/schemas/sarif-schema-2.1.0.json";

/// The name of our fingerprint, with the version of how it is made.
const FINGERPRINT: &str = "codeAndLine/v1";

/// A sheet and its findings.
#[derive(Clone, Copy, Debug)]
pub struct SarifSheet<'a> {
    /// Its path as given.
    pub path: &'a str,
    /// Its text.
    pub text: &'a str,
    /// Where its lines begin.
    pub lines: &'a LineIndex,
    /// Its findings.
    pub findings: &'a [Diagnostic],
}

/// The log of one run over some sheets.
///
/// Every code is a rule, so that an index of a rule means the same in every log of a version. The fingerprint of a result
/// is made of its code and the text of its line, not of the line's number: a finding keeps it while lines come and go
/// above it.
#[must_use]
pub fn sarif(sheets: &[SarifSheet<'_>]) -> Value {
    let results: Vec<Value> = sheets.iter().flat_map(sheet_results).collect();
    let rules: Vec<Value> = code::ALL.iter().map(rule).collect();
    json!({
        "$schema": SCHEMA,
        "version": "2.1.0",
        "runs": [{
            "tool": { "driver": { "name": "gaswright", "version": env!("CARGO_PKG_VERSION"), "rules": rules } },
            "columnKind": "unicodeCodePoints",
            "artifacts": sheets.iter().map(|sheet| json!({ "location": { "uri": uri(sheet.path) } })).collect::<Vec<_>>(),
            "results": results,
        }],
    })
}

/// A code as a rule: its name and what its page says in the first line.
fn rule(page: &code::Page) -> Value {
    let title = page.text.lines().find_map(|line| line.strip_prefix("# ")).unwrap_or(page.code);
    json!({
        "id": page.code,
        "shortDescription": { "text": title },
        "help": { "text": format!("gaswright explain {}", page.code) },
    })
}

fn sheet_results(sheet: &SarifSheet<'_>) -> Vec<Value> {
    let mut seen: BTreeMap<(&'static str, String), u32> = BTreeMap::new();
    sheet.findings.iter().map(|finding| result(finding, sheet, &mut seen)).collect()
}

fn result(finding: &Diagnostic, sheet: &SarifSheet<'_>, seen: &mut BTreeMap<(&'static str, String), u32>) -> Value {
    let mut main = location(finding.span, sheet);
    if !finding.label.is_empty() {
        main["message"] = json!({ "text": finding.label });
    }
    let mut result = json!({
        "ruleId": finding.code,
        "level": match finding.severity {
            Severity::Error => "error",
            Severity::Warning => "warning",
            Severity::Note => "note",
        },
        "message": { "text": message(finding) },
        "locations": [main],
        "partialFingerprints": { FINGERPRINT: fingerprint(finding, sheet, seen) },
    });
    if let Some(index) = code::ALL.iter().position(|page| page.code == finding.code) {
        result["ruleIndex"] = json!(index);
    }
    if !finding.related.is_empty() {
        result["relatedLocations"] = finding.related.iter().map(|related| related_location(related, sheet)).collect();
    }
    if let Some(edit) = &finding.edit {
        let mut fix = json!({
            "artifactChanges": [{
                "artifactLocation": { "uri": uri(sheet.path) },
                "replacements": [{
                    "deletedRegion": region_object(edit.span, sheet),
                    "insertedContent": { "text": edit.replacement },
                }],
            }],
        });
        if let Some(help) = &finding.help {
            fix["description"] = json!({ "text": help });
        }
        result["fixes"] = json!([fix]);
    }
    result
}

/// The headline, the facts and the help in one text: a viewer of such logs shows no other.
fn message(finding: &Diagnostic) -> String {
    let mut text = finding.message.clone();
    for line in finding.notes.iter().chain(&finding.help) {
        text.push('\n');
        text.push_str(line);
    }
    text
}

fn related_location(related: &super::Label, sheet: &SarifSheet<'_>) -> Value {
    let mut place = match &related.path {
        None => location(related.span, sheet),
        // The text of another file is not at hand, and so neither are its lines.
        Some(path) => json!({ "physicalLocation": { "artifactLocation": { "uri": uri(path) } } }),
    };
    if !related.text.is_empty() {
        place["message"] = json!({ "text": related.text });
    }
    place
}

fn location(span: Span, sheet: &SarifSheet<'_>) -> Value {
    json!({ "physicalLocation": { "artifactLocation": { "uri": uri(sheet.path) }, "region": region_object(span, sheet) } })
}

fn region_object(span: Span, sheet: &SarifSheet<'_>) -> Value {
    let [line, column, end_line, end_column] = region(span, sheet.text, sheet.lines);
    json!({ "startLine": line, "startColumn": column, "endLine": end_line, "endColumn": end_column })
}

/// A digest of the code, the text of the line with blanks folded, and how often both came before in the sheet.
fn fingerprint(finding: &Diagnostic, sheet: &SarifSheet<'_>, seen: &mut BTreeMap<(&'static str, String), u32>) -> String {
    let line = sheet.lines.line_span(sheet.text, sheet.lines.line(finding.span.start)).of(sheet.text);
    let words: Vec<&str> = line.split_whitespace().collect();
    let canonical = words.join(" ");
    let digest = Sha256::digest(canonical.as_bytes());
    let key = hex(&digest);
    let count = seen.entry((finding.code, key.clone())).and_modify(|count| *count += 1).or_insert(0);
    hex(&Sha256::digest(format!("{}\n{key}\n{count}", finding.code).as_bytes())[..16])
}

fn hex(bytes: &[u8]) -> String {
    bytes.iter().map(|byte| format!("{byte:02x}")).collect()
}

/// A path as a URI reference (RFC 3986): `/` between names, what is not plain percent-encoded.
fn uri(path: &str) -> String {
    let mut uri = String::with_capacity(path.len());
    if path.starts_with('/') {
        uri.push_str("file://");
    }
    for byte in path.replace('\\', "/").bytes() {
        match byte {
            b'A'..=b'Z' | b'a'..=b'z' | b'0'..=b'9' | b'-' | b'.' | b'_' | b'~' | b'/' => uri.push(byte as char),
            other => uri.push_str(&format!("%{other:02X}")),
        }
    }
    uri
}

#[cfg(test)]
mod tests {
    use super::*;

    const TEXT: &str = "given V = 3.20 m3\ngiven m = 3.90 kgg\ngiven m = 3.90 kgg\n";

    fn findings() -> Vec<Diagnostic> {
        vec![
            Diagnostic::error("bad-line", Span::new(33, 36), "`kgg` is no unit")
                .related(Span::new(15, 17), "a volume")
                .safe_edit(Span::new(33, 36), "kg"),
            Diagnostic::warning("bad-line", Span::new(52, 55), "`kgg` is no unit"),
        ]
    }

    fn log(text: &str, path: &str, findings: &[Diagnostic]) -> Value {
        let lines = LineIndex::new(text);
        sarif(&[SarifSheet { path, text, lines: &lines, findings }])
    }

    #[test]
    fn a_result_names_rule_level_region_and_fix() {
        let log = log(TEXT, "packing hall/ä.gw", &findings());
        assert_eq!(log["version"], "2.1.0");
        let result = &log["runs"][0]["results"][0];
        let rule = &log["runs"][0]["tool"]["driver"]["rules"][result["ruleIndex"].as_u64().unwrap() as usize];
        assert_eq!(rule["id"], result["ruleId"]);
        assert_eq!(result["level"], "error");
        let place = &result["locations"][0]["physicalLocation"];
        assert_eq!(place["artifactLocation"]["uri"], "packing%20hall/%C3%A4.gw");
        assert_eq!(place["region"], json!({ "startLine": 2, "startColumn": 16, "endLine": 2, "endColumn": 19 }));
        assert_eq!(result["relatedLocations"][0]["message"]["text"], "a volume");
        let replacement = &result["fixes"][0]["artifactChanges"][0]["replacements"][0];
        assert_eq!(replacement["insertedContent"]["text"], "kg");
        assert_eq!(replacement["deletedRegion"]["startColumn"], 16);
    }

    #[test]
    fn fingerprints_survive_moved_lines_and_layout_and_tell_twins_apart() {
        let prints = |log: &Value| -> Vec<String> {
            let results = log["runs"][0]["results"].as_array().unwrap();
            results.iter().map(|result| result["partialFingerprints"][FINGERPRINT].as_str().unwrap().to_owned()).collect()
        };
        let before = prints(&log(TEXT, "a.gw", &findings()));
        assert_ne!(before[0], before[1]);
        let moved = TEXT.replacen("given m = ", "# one line more\n  given  m  = ", 1);
        let at = moved.find("kgg").unwrap();
        let finding = Diagnostic::error("bad-line", Span::new(at, at + 3), "other words");
        assert_eq!(prints(&log(&moved, "a.gw", &[finding]))[0], before[0]);
    }
}
