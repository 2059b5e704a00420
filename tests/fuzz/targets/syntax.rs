//! The parser and the layout: no panic on any bytes; what tidy writes says the same and is its own layout.
#![no_main]

use gaswright::syntax;
use libfuzzer_sys::fuzz_target;

fuzz_target!(|bytes: &[u8]| {
    let Ok(text) = syntax::decode(bytes) else { return };
    let (tree, findings) = syntax::parse(&text);
    if findings.iter().any(gaswright::diagnostic::Diagnostic::is_error) {
        return;
    }
    let Ok(tidied) = syntax::tidy(&text) else { panic!("tidy refuses what the parser takes: {text:?}") };
    let (again, findings) = syntax::parse(&tidied);
    assert!(!findings.iter().any(gaswright::diagnostic::Diagnostic::is_error), "tidy breaks the sheet:\n{text}\n---\n{tidied}");
    let canonical = |tree: &syntax::Tree, text: &str| -> Vec<String> {
        tree.statements.iter().map(|statement| syntax::canonical(tree, text, statement)).collect()
    };
    assert_eq!(canonical(&tree, &text), canonical(&again, &tidied), "tidy changes the meaning");
    assert_eq!(syntax::tidy(&tidied).ok().as_deref(), Some(tidied.as_str()), "tidy is not its own layout");
});
