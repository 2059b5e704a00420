//! The head: what the sheet is, who stands for it, which text it was made from.

use serde::Serialize;

use crate::report::draft::Draft;

/// The head of a report.
#[derive(Clone, Debug, Serialize)]
pub(in crate::report) struct Head {
    pub(in crate::report) title: String,
    pub(in crate::report) document: Option<String>,
    pub(in crate::report) revision: Option<String>,
    pub(in crate::report) purpose: Option<String>,
    pub(in crate::report) roles: Vec<Role>,
    /// `unsigned`, for the head of every page.
    pub(in crate::report) sign_off: &'static str,
    /// The digest, whole.
    pub(in crate::report) digest: String,
    /// Its first digits in groups.
    pub(in crate::report) short_digest: String,
    /// Name and version of the program.
    pub(in crate::report) tool: String,
    /// The path of the sheet as it was given.
    pub(in crate::report) path: String,
}

/// A role and the state of its signature.
#[derive(Clone, Debug, Serialize)]
pub(in crate::report) struct Role {
    name: &'static str,
    state: &'static str,
}

/// The roles of the sign-off, in their order.
const ROLES: [&str; 3] = ["Prepared", "Checked", "Approved"];

/// The head of the report of a sheet. A sheet without a title is called by its file.
pub(in crate::report) fn head(draft: &Draft) -> Head {
    let input = draft.input;
    let head = &input.sheet.head;
    let text = |text: &Option<crate::syntax::Text>| text.as_ref().map(|text| text.text.clone()).filter(|text| !text.trim().is_empty());
    let file = input.path.rsplit(['/', '\\']).next().unwrap_or(input.path);
    let title = text(&head.title).unwrap_or_else(|| file.strip_suffix(".gw").unwrap_or(file).to_owned());
    let digest = input.digest();
    Head {
        title,
        document: text(&head.document),
        revision: text(&head.revision),
        purpose: text(&head.purpose),
        roles: ROLES.iter().map(|name| Role { name, state: "not signed" }).collect(),
        sign_off: "unsigned",
        short_digest: short(&digest),
        digest,
        tool: format!("{} {}", env!("CARGO_PKG_NAME"), env!("CARGO_PKG_VERSION")),
        path: input.path.to_owned(),
    }
}

/// A digest without the name of its function, first digits in groups of four: `9f3a 61c2 07de`.
fn short(digest: &str) -> String {
    let digits: Vec<char> = digest.rsplit(':').next().unwrap_or_default().chars().take(12).collect();
    digits.chunks(4).map(|group| group.iter().collect::<String>()).collect::<Vec<_>>().join(" ")
}
