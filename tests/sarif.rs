//! The SARIF log of every sheet of the corpus, against the published schema: SARIF 2.1.0, OASIS Standard, 27 March 2020,
//! `sarif-schema-2.1.0.json` of the OASIS technical committee (`tests/reference/sarif-2.1.0.schema.json`).

use std::fs;
use std::path::Path;

use gaswright::diagnostic::{Diagnostic, LineIndex, SarifSheet, sarif};

/// Every sheet of the corpus that is read as it is, with what is found in it.
fn corpus() -> Vec<(String, String, Vec<Diagnostic>)> {
    let corpus = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/corpus");
    let rooms = fs::read_dir(&corpus).expect("the corpus is there").map(|room| room.expect("a room can be read").path());
    let sheets = rooms.filter(|room| room.is_dir()).flat_map(|room| fs::read_dir(room).expect("a room can be read"));
    let mut paths: Vec<_> = sheets.map(|sheet| sheet.expect("a sheet can be read").path()).collect();
    paths.retain(|path| path.extension().is_some_and(|ending| ending == "gw") && !path.to_string_lossy().ends_with(".made.gw"));
    paths.sort();
    let found = paths.into_iter().map(|path| {
        let bytes = fs::read(&path).expect("a sheet can be read");
        let name = path.strip_prefix(&corpus).expect("the path begins with the corpus").to_string_lossy().into_owned();
        match gaswright::syntax::decode(&bytes) {
            Ok(text) => (name, text.to_owned(), gaswright::solve(text).findings),
            Err(finding) => (name, String::from_utf8_lossy(&bytes).into_owned(), vec![finding]),
        }
    });
    found.collect()
}

#[test]
fn the_log_of_the_corpus_is_valid_and_holds_every_finding() {
    let schema = include_str!("reference/sarif-2.1.0.schema.json");
    let mut schema: serde_json::Value = serde_json::from_str(schema).expect("the schema is JSON");
    // The published pattern of `language`, which the log does not use, has a bracket too many and is no regular expression.
    for owner in ["run", "toolComponent"] {
        let language = schema["definitions"][owner]["properties"]["language"].as_object_mut().expect("the property is there");
        assert!(language.remove("pattern").is_some());
    }
    let validator = jsonschema::draft7::new(&schema).expect("the schema is a schema");
    let corpus = corpus();
    let lines: Vec<LineIndex> = corpus.iter().map(|(_, text, _)| LineIndex::new(text)).collect();
    let sheets: Vec<SarifSheet<'_>> =
        corpus.iter().zip(&lines).map(|((path, text, findings), lines)| SarifSheet { path, text, lines, findings }).collect();
    let log = sarif(&sheets);
    let errors: Vec<String> = validator.iter_errors(&log).map(|error| format!("{} at {}", error, error.instance_path())).collect();
    assert!(errors.is_empty(), "{errors:#?}");
    let results = log["runs"][0]["results"].as_array().expect("there are results");
    assert_eq!(results.len(), corpus.iter().map(|(_, _, findings)| findings.len()).sum::<usize>());
    assert!(results.len() > 100, "{} results", results.len());
}

#[test]
fn no_two_results_of_a_sheet_share_a_fingerprint() {
    for (path, text, findings) in corpus() {
        let lines = LineIndex::new(&text);
        let log = sarif(&[SarifSheet { path: &path, text: &text, lines: &lines, findings: &findings }]);
        let results = log["runs"][0]["results"].as_array().expect("there are results").clone();
        let mut prints: Vec<String> = results.iter().map(|result| result["partialFingerprints"].to_string()).collect();
        prints.sort();
        prints.dedup();
        assert_eq!(prints.len(), findings.len(), "{path}");
    }
}
