//! The report: a sheet and its solution as text that a colleague can check, and as data that a program can.
//!
//! In comes an [`Input`]: tree, sheet, solution, findings, all plain data. Out go the [result object](result()) that
//! `solve --json` prints, described by [`SCHEMA`], the [text table](table()) of `solve`, and the [report](report()) in Markdown or
//! as one HTML page that stands on its own.
//!
//! # The way of a report
//!
//! ```text
//! Input ──part──▶ words and written numbers ──report.md──▶ Markdown ──page──▶ body ──report.html, report.css──▶ page
//!          │                                                            ▲
//!          └──formula──▶ LaTeX (in the Markdown) and MathML (by the LaTeX it stands for) ─┘
//! ```
//!
//! Read `render` first, which goes this way, then `part`, whose files are the parts of a report in their order. `formula` is one
//! tree and the two languages it is written in, `written` a rounded value with its unit and `typeset` how it is printed, `page`
//! makes HTML of the Markdown. What a report looks like is in `templates/`, and [`Templates`] may replace it.
//!
//! Texts of a sheet are escaped where a template prints them. No template text comes from a sheet, and no HTML of a sheet is
//! obeyed. The room reads no file and knows no terminal; it computes nothing that a reader of the result object would want.

mod draft;
mod formula;
mod input;
mod markdown;
mod model;
mod object;
mod page;
mod part;
mod render;
mod result;
mod table;
mod template;
mod typeset;
mod verdict;
mod written;

pub use input::Input;
pub use object::{
    AnswerObject, AssumptionObject, CautionObject, ChecksObject, ContributionObject, CorrelationObject, IdealErrorsObject,
    MonteCarloObject, QuantityObject, RequirementObject, ResultObject, RulesObject, SCHEMA, SheetObject, StateObject, StepObject,
    SurplusObject, ToolObject, UncertaintyObject,
};
pub use render::{Format, report};
pub use result::result;
pub use table::table;
pub use template::{TemplateError, Templates, built_in_templates};
pub use written::answer_text;
