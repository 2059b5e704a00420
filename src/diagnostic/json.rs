//! A finding as data: the object that `solve --json` lists under `findings`.

use serde::Serialize;

use super::{Diagnostic, LineIndex, Span};

/// A finding. Lines and columns count from 1, columns in characters; an end is one past the last character.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct FindingObject {
    /// A few words with hyphens, the same for ever.
    pub code: &'static str,
    /// `error`, `warning` or `note`.
    pub severity: &'static str,
    /// One sentence that stands alone.
    pub message: String,
    /// Line of the first character that is meant.
    pub line: u32,
    /// Column of the first character that is meant.
    pub column: u32,
    /// Line of the end.
    pub end_line: u32,
    /// Column of the end.
    pub end_column: u32,
    /// What to do.
    pub help: Option<String>,
    /// Facts: what is said beside the place itself, then what explains it.
    pub notes: Vec<String>,
    /// Further places.
    pub related: Vec<RelatedObject>,
    /// The change that would cure it.
    pub edit: Option<EditObject>,
}

/// A further place that belongs to a finding.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct RelatedObject {
    /// The file.
    pub path: String,
    /// Its line; `null` where the place is in another file than the sheet.
    pub line: Option<u32>,
    /// Its column.
    pub column: Option<u32>,
    /// What it has to do with the finding.
    pub label: String,
}

/// A change of the text.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct EditObject {
    /// Line of the first character to be replaced.
    pub line: u32,
    /// Column of the first character to be replaced.
    pub column: u32,
    /// Line of the end.
    pub end_line: u32,
    /// Column of the end.
    pub end_column: u32,
    /// What to put there.
    pub replacement: String,
    /// Whether it may be made without asking.
    pub safe: bool,
}

impl FindingObject {
    /// The object of a finding on `text`, the sheet at `path`.
    #[must_use]
    pub fn new(finding: &Diagnostic, path: &str, text: &str, lines: &LineIndex) -> Self {
        let [line, column, end_line, end_column] = region(finding.span, text, lines);
        let label = Some(&finding.label).filter(|label| !label.is_empty() && **label != finding.message);
        let related = finding.related.iter().map(|related| {
            let place = related.path.is_none().then(|| lines.place(text, related.span.start));
            RelatedObject {
                path: related.path.clone().unwrap_or_else(|| path.to_owned()),
                line: place.map(|place| place.line),
                column: place.map(|place| place.column),
                label: related.text.clone(),
            }
        });
        Self {
            code: finding.code,
            severity: finding.severity.word(),
            message: finding.message.clone(),
            line,
            column,
            end_line,
            end_column,
            help: finding.help.clone(),
            notes: label.into_iter().chain(&finding.notes).cloned().collect(),
            related: related.collect(),
            edit: finding.edit.as_ref().map(|edit| {
                let [line, column, end_line, end_column] = region(edit.span, text, lines);
                EditObject { line, column, end_line, end_column, replacement: edit.replacement.clone(), safe: edit.safe }
            }),
        }
    }
}

/// First line and column, last line and column of a range of `text`.
pub(super) fn region(span: Span, text: &str, lines: &LineIndex) -> [u32; 4] {
    let start = lines.place(text, span.start);
    let end = lines.place(text, span.end.max(span.start));
    [start.line, start.column, end.line, end.column]
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn places_count_characters_and_the_label_is_the_first_note() {
        let text = "given Ä = 3.2 m3\nlet b = Ä + 2 kg\n";
        let at = text.rfind("2 kg").unwrap();
        let finding = Diagnostic::error("dimension-mismatch", Span::new(at, at + 4), "these terms do not agree")
            .label("mass")
            .related(Span::new(6, 8), "volume")
            .fact("a sum has one dimension")
            .help("give both the same dimension")
            .edit(Span::new(at + 2, at + 4), "m3");
        let object = FindingObject::new(&finding, "a.gw", text, &LineIndex::new(text));
        assert_eq!((object.line, object.column, object.end_line, object.end_column), (2, 13, 2, 17));
        assert_eq!(object.notes, ["mass", "a sum has one dimension"]);
        assert_eq!(object.related[0], RelatedObject { path: "a.gw".into(), line: Some(1), column: Some(7), label: "volume".into() });
        let edit = object.edit.unwrap();
        assert_eq!((edit.line, edit.column, edit.end_column, edit.replacement.as_str(), edit.safe), (2, 15, 17, "m3", false));
    }

    #[test]
    fn a_range_beyond_the_text_ends_with_the_text() {
        let text = "given V";
        let object = FindingObject::new(&Diagnostic::note("a-code", Span::new(6, 90), "m"), "a.gw", text, &LineIndex::new(text));
        assert_eq!((object.line, object.column, object.end_line, object.end_column), (1, 7, 1, 8));
    }
}
