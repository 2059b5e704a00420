//! The digest of what a sheet says.

use sha2::{Digest, Sha256};

use super::canonical;
use crate::syntax::tree::{StatementKind, Tree};

/// The digest of what a sheet says, `sha256:` and 64 hexadecimal digits: of its head and of the canonical text of its
/// statements. Layout, comments and the order of lines do not enter; prose and titles do.
#[must_use]
pub fn digest(tree: &Tree, text: &str) -> String {
    let mut lines: Vec<String> = tree
        .statements
        .iter()
        .map(|statement| match &statement.kind {
            StatementKind::Bad { .. } => statement.span.of(text).split_whitespace().collect::<Vec<_>>().join(" "),
            _ => canonical(tree, text, statement),
        })
        .collect();
    lines.sort();
    let mut hash = Sha256::new();
    if let Some(head) = tree.head.span {
        hash.update(head.of(text).replace("\r\n", "\n").as_bytes());
    }
    for line in lines {
        hash.update(b"\n");
        hash.update(line.as_bytes());
    }
    let mut digest = String::from("sha256:");
    for byte in hash.finalize() {
        digest.push_str(&format!("{byte:02x}"));
    }
    digest
}
