//! The report: parts into templates, Markdown into HTML.

use minijinja::{Value, context};

use super::Input;
use super::draft::{Draft, markdown};
use super::page::{body, math_font};
use super::part;
use super::template::{TemplateError, Templates};

/// What a report is written as.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Format {
    /// One page that stands on its own.
    Html,
    /// Markdown with formulas between dollar signs.
    Markdown,
}

/// The report of a solved sheet.
///
/// # Errors
///
/// A template that cannot be read or filled in. Those that ship can.
pub fn report(input: &Input, format: Format, templates: &Templates) -> Result<String, TemplateError> {
    let n_statements = input.tree.statements.len();
    let mut draft = Draft::new(input);
    let head = part::head(&draft);
    let answers = part::answers(&mut draft);
    let given = part::givens(&mut draft);
    let assumptions = part::assumptions(&mut draft);
    let [p_r, t_r] = part::reduced_symbols(&mut draft);
    let working = part::working(&mut draft);
    let states = part::state_tables(&mut draft);
    let cautions = part::cautions(&draft);
    let checks = part::checks(&mut draft);
    let findings = part::findings(&draft);
    // Last, because it holds what the others cite.
    let listing = part::listing(&draft);
    let context = context! {
        head => Value::from_serialize(&head),
        answers => Value::from_serialize(&answers),
        given => Value::from_serialize(&given),
        assumptions => Value::from_serialize(&assumptions),
        p_r => markdown(p_r),
        t_r => markdown(t_r),
        working => Value::from_serialize(&working),
        states => Value::from_serialize(&states),
        cautions => Value::from_serialize(&cautions),
        checks => Value::from_serialize(&checks),
        findings => Value::from_serialize(&findings),
        listing => Value::from_serialize(&listing),
    };
    let text = templates.render("report.md", n_statements, &context)?;
    if format == Format::Markdown {
        return Ok(text);
    }
    let head = Value::from_serialize(&head);
    let css = templates.render("report.css", n_statements, &context! { head => head, math_font => markdown(math_font()) })?;
    let body = body(&text, &draft.formulas, &assumptions.figures);
    templates.render("report.html", n_statements, &context! { head => head, css => markdown(css), body => markdown(body) })
}
