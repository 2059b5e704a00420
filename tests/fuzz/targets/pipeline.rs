//! The whole way: no panic, the same digits twice, no number where there is an error, every span inside the text.
#![no_main]

use gaswright::report::{self, Input};
use gaswright::syntax;
use libfuzzer_sys::fuzz_target;

fuzz_target!(|bytes: &[u8]| {
    let Ok(text) = syntax::decode(bytes) else { return };
    let (first, second) = (gaswright::solve(&text), gaswright::solve(&text));
    assert_eq!(first.findings, second.findings);
    let errors = first.findings.iter().any(gaswright::diagnostic::Diagnostic::is_error);
    assert_eq!(errors, first.solution.is_none());
    for finding in &first.findings {
        assert!(finding.span.end as usize <= text.len() && finding.span.start <= finding.span.end, "{finding:?}");
    }
    if let (Some(a), Some(b)) = (&first.solution, &second.solution) {
        for (a, b) in a.values.iter().zip(&b.values) {
            assert_eq!(a.to_bits(), b.to_bits());
        }
    }
    let input = Input {
        path: "fuzz.gw",
        text: &text,
        tree: &first.tree,
        sheet: &first.sheet,
        solution: first.solution.as_ref(),
        findings: &first.findings,
    };
    let _ = report::table(&input);
    let object = serde_json::to_string(&report::result(&input)).expect("the result is plain data");
    assert!(!object.contains("NaN") && !object.contains("Infinity"));
});
