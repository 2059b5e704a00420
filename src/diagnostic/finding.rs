//! The finding: one thing that a reader of the sheet has to know, with its place, its cause and its cure.

use super::Span;

/// How grave a finding is.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub enum Severity {
    /// The sheet has no result.
    Error,
    /// The sheet solves; the report carries the finding.
    Warning,
    /// Worth knowing.
    Note,
}

impl Severity {
    /// The word for it in every output.
    #[must_use]
    pub fn word(self) -> &'static str {
        match self {
            Self::Error => "error",
            Self::Warning => "warning",
            Self::Note => "note",
        }
    }
}

/// A further place that belongs to a finding, and what it has to do with it.
#[derive(Clone, Debug, PartialEq)]
pub struct Label {
    /// The place.
    pub span: Span,
    /// What stands there.
    pub text: String,
    /// The file, where it is not the sheet itself.
    pub path: Option<String>,
}

/// A change of the text that cures the finding.
#[derive(Clone, Debug, PartialEq)]
pub struct Edit {
    /// The text to be replaced.
    pub span: Span,
    /// What to put there.
    pub replacement: String,
    /// Whether the edit may be made without asking: it cannot change a meaning that the sheet already had.
    pub safe: bool,
}

/// One finding. Rooms make them; renderers draw them.
#[derive(Clone, Debug, PartialEq)]
#[non_exhaustive]
pub struct Diagnostic {
    /// Its code: a few words with hyphens, the same for ever.
    pub code: &'static str,
    /// How grave it is.
    pub severity: Severity,
    /// One short sentence that stands alone.
    pub message: String,
    /// The exact text that is meant.
    pub span: Span,
    /// What to say beside that text; the message where empty.
    pub label: String,
    /// Further places.
    pub related: Vec<Label>,
    /// Facts that explain.
    pub notes: Vec<String>,
    /// What to do.
    pub help: Option<String>,
    /// The change that would do it.
    pub edit: Option<Edit>,
}

impl Diagnostic {
    fn new(code: &'static str, severity: Severity, span: Span, message: String) -> Self {
        Self { code, severity, message, span, label: String::new(), related: Vec::new(), notes: Vec::new(), help: None, edit: None }
    }

    /// A finding that stops the sheet.
    #[must_use]
    pub fn error(code: &'static str, span: Span, message: impl Into<String>) -> Self {
        Self::new(code, Severity::Error, span, message.into())
    }

    /// A finding that the report carries.
    #[must_use]
    pub fn warning(code: &'static str, span: Span, message: impl Into<String>) -> Self {
        Self::new(code, Severity::Warning, span, message.into())
    }

    /// A finding worth knowing.
    #[must_use]
    pub fn note(code: &'static str, span: Span, message: impl Into<String>) -> Self {
        Self::new(code, Severity::Note, span, message.into())
    }

    /// Says something beside the exact text.
    #[must_use]
    pub fn label(mut self, text: impl Into<String>) -> Self {
        self.label = text.into();
        self
    }

    /// Points at a further place.
    #[must_use]
    pub fn related(mut self, span: Span, text: impl Into<String>) -> Self {
        self.related.push(Label { span, text: text.into(), path: None });
        self
    }

    /// Adds a fact.
    #[must_use]
    pub fn fact(mut self, text: impl Into<String>) -> Self {
        self.notes.push(text.into());
        self
    }

    /// Says what to do.
    #[must_use]
    pub fn help(mut self, text: impl Into<String>) -> Self {
        self.help = Some(text.into());
        self
    }

    /// Offers the change that cures it and leaves no meaning in doubt.
    #[must_use]
    pub fn safe_edit(mut self, span: Span, replacement: impl Into<String>) -> Self {
        self.edit = Some(Edit { span, replacement: replacement.into(), safe: true });
        self
    }

    /// Offers a change that a person has to agree to.
    #[must_use]
    pub fn edit(mut self, span: Span, replacement: impl Into<String>) -> Self {
        self.edit = Some(Edit { span, replacement: replacement.into(), safe: false });
        self
    }

    /// Whether it stops the sheet.
    #[must_use]
    pub fn is_error(&self) -> bool {
        self.severity == Severity::Error
    }
}

/// Puts findings in the order of the text: by place, then by code, then by message. Findings that say the same of the
/// same place are kept once.
pub fn sort(findings: &mut Vec<Diagnostic>) {
    findings.sort_by(|a, b| (a.span.start, a.span.end, a.code, &a.message).cmp(&(b.span.start, b.span.end, b.code, &b.message)));
    findings.dedup_by(|later, first| later.code == first.code && later.span == first.span && later.message == first.message);
}
