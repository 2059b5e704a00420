//! Templates: what a report looks like.

use std::collections::BTreeMap;
use std::fmt;

use minijinja::value::ValueKind;
use minijinja::{AutoEscape, Environment, Error, ErrorKind, Output, State, UndefinedBehavior, Value};

use super::markdown::escape;

/// The templates that ship with the program: name and text.
const BUILT_IN: [(&str, &str); 3] = [
    ("report.md", include_str!("../../templates/report.md")),
    ("report.html", include_str!("../../templates/report.html")),
    ("report.css", include_str!("../../templates/report.css")),
];

/// Instructions that a template may take: plenty for what ships, soon over for an endless loop.
const FUEL: u64 = 20_000_000;

/// Instructions beyond [`FUEL`] that each statement of a sheet allows.
const FUEL_OF_A_STATEMENT: u64 = 5_000;

/// The templates that ship with the program: name and text of each.
pub fn built_in_templates() -> impl Iterator<Item = (&'static str, &'static str)> {
    BUILT_IN.iter().copied()
}

/// The templates of a report.
#[derive(Clone, Debug, Default)]
pub struct Templates {
    files: BTreeMap<String, String>,
}

impl Templates {
    /// Those that ship with the program.
    #[must_use]
    pub fn built_in() -> Self {
        Self::default()
    }

    /// Templates of a user by file name. Of the ones that ship, those that are missing here are taken as they ship; further ones can
    /// be included.
    #[must_use]
    pub fn from_files(files: BTreeMap<String, String>) -> Self {
        Self { files }
    }

    /// The text of the template `name` with its variables filled in, for a sheet of so many statements.
    pub(super) fn render(&self, name: &str, n_statements: usize, context: &Value) -> Result<String, TemplateError> {
        let mut environment = Environment::new();
        environment.set_undefined_behavior(UndefinedBehavior::Strict);
        environment.set_trim_blocks(true);
        environment.set_lstrip_blocks(true);
        environment.set_keep_trailing_newline(true);
        environment.set_fuel(Some(FUEL + FUEL_OF_A_STATEMENT * n_statements as u64));
        environment.set_auto_escape_callback(|name| match name.rsplit('.').next() {
            Some("md") => AutoEscape::Custom("markdown"),
            Some("css") => AutoEscape::Custom("css"),
            _ => AutoEscape::Html,
        });
        environment.set_formatter(write_value);
        let built_in = BUILT_IN.iter().filter(|(name, _)| !self.files.contains_key(*name));
        let own = self.files.iter().map(|(name, text)| (name.as_str(), text.as_str()));
        for (name, text) in built_in.copied().chain(own) {
            environment.add_template(name, text).map_err(|error| TemplateError::new(name, &error))?;
        }
        let template = environment.get_template(name).map_err(|error| TemplateError::new(name, &error))?;
        template.render(context).map_err(|error| TemplateError::new(name, &error))
    }
}

/// Writes a value into a template, its text escaped for what is being written.
fn write_value(out: &mut Output, state: &State, value: &Value) -> Result<(), Error> {
    let AutoEscape::Custom(language) = state.auto_escape() else { return minijinja::escape_formatter(out, state, value) };
    if value.is_undefined() {
        return Err(Error::from(ErrorKind::UndefinedError));
    }
    let text = value.to_string();
    let written = match (language, value.kind()) {
        _ if value.is_safe() => text,
        ("markdown", ValueKind::String) => escape(&text),
        ("css", ValueKind::String) => css_string(&text),
        _ => text,
    };
    out.write_str(&written).map_err(|_| Error::from(ErrorKind::WriteFailure))
}

/// A text as the inside of a string of a style sheet. All but letters, digits and blanks are escaped by their number, so that
/// it ends neither the string nor the style sheet.
fn css_string(text: &str) -> String {
    let mut out = String::with_capacity(text.len());
    for character in text.chars() {
        if character.is_ascii_alphanumeric() || character == ' ' {
            out.push(character);
        } else {
            out.push_str(&format!("\\{:x} ", character as u32));
        }
    }
    out
}

/// A template that cannot be read or filled in.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct TemplateError {
    /// The file.
    pub template: String,
    /// Its line, where it is known.
    pub line: Option<usize>,
    /// What is wrong.
    pub message: String,
}

impl TemplateError {
    fn new(name: &str, error: &Error) -> Self {
        let mut message = error.kind().to_string();
        if let Some(detail) = error.detail() {
            message = format!("{message}: {detail}");
        }
        Self { template: error.name().unwrap_or(name).to_owned(), line: error.line(), message }
    }
}

impl fmt::Display for TemplateError {
    fn fmt(&self, out: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self.line {
            Some(line) => write!(out, "template {}, line {line}: {}", self.template, self.message),
            None => write!(out, "template {}: {}", self.template, self.message),
        }
    }
}

impl std::error::Error for TemplateError {}

#[cfg(test)]
mod tests {
    use super::*;

    fn render(name: &str, text: &str, context: &Value) -> Result<String, TemplateError> {
        Templates::from_files(BTreeMap::from([(name.to_owned(), text.to_owned())])).render(name, 0, context)
    }

    #[test]
    fn texts_are_escaped_for_the_language_of_the_template() {
        let context = minijinja::context! { text => "<b> {{ 7*191 }} \"", safe => Value::from_safe_string("*x*".into()), number => 3 };
        assert_eq!(render("a.md", "{{ text }} {{ safe }} {{ number }}", &context).unwrap(), "&lt;b&gt; {{ 7\\*191 }} \" *x* 3");
        assert_eq!(render("a.css", "{{ text }}", &context).unwrap(), "\\3c b\\3e  \\7b \\7b  7\\2a 191 \\7d \\7d  \\22 ");
        assert_eq!(render("a.html", "{{ text }}", &context).unwrap(), "&lt;b&gt; {{ 7*191 }} &quot;");
    }

    #[test]
    fn an_endless_or_broken_template_is_an_error_with_its_place() {
        let endless =
            render("a.md", "{% for a in range(100000) %}{% for b in range(100000) %}x{% endfor %}{% endfor %}", &Value::UNDEFINED);
        assert!(endless.unwrap_err().message.contains("fuel"));
        let unknown = render("a.md", "a\n{{ nothing.here }}", &minijinja::context! {}).unwrap_err();
        assert_eq!((unknown.template.as_str(), unknown.line), ("a.md", Some(2)));
        let broken = render("b.html", "{% if %}", &minijinja::context! {}).unwrap_err();
        assert_eq!((broken.template.as_str(), broken.line), ("b.html", Some(1)));
        assert!(render("a.md", "{{ nothing }}", &minijinja::context! {}).is_err());
    }
}
