//! The independent checks, and what was found on the way.

use minijinja::Value;
use serde::Serialize;

use crate::diagnostic::json::FindingObject;
use crate::report::draft::{Draft, markdown};
use crate::report::table::residual;
use crate::report::typeset::{typeset_number, typeset_unit};
use crate::report::written::scaled;
use crate::sheet::ShownUnit;
use crate::units::{Dimension, Unit, write_figures};

/// A check and its result.
#[derive(Clone, Debug, Serialize)]
pub(in crate::report) struct Check {
    what: Value,
    result: String,
}

/// A finding that the report carries.
#[derive(Clone, Debug, Serialize)]
pub(in crate::report) struct Finding {
    severity: &'static str,
    code: &'static str,
    message: String,
    help: String,
    line: u32,
}

/// The checks of a solved sheet.
pub(in crate::report) fn checks(draft: &mut Draft) -> Vec<Check> {
    let Some(solution) = draft.input.solution else { return Vec::new() };
    let mut checks = vec![
        Check { what: markdown("Relations and unknowns"), result: format!("{} and {}", solution.n_relations, solution.n_unknowns) },
        Check {
            what: markdown("Every relation evaluated again as written, largest scaled residual"),
            result: typeset_number(&residual(solution.largest_residual)),
        },
    ];
    if solution.surplus.is_empty() {
        checks.push(Check { what: markdown("Surplus relations"), result: "none".to_owned() });
    }
    for check in &solution.surplus {
        let Some(relation) = draft.input.sheet.relations.get(check.relation) else { continue };
        let line = draft.line(relation.statement);
        let formula = draft.math(&draft.relation(relation));
        let dimension = dimension_of(draft, check.relation);
        let value = |si: f64| {
            let Some(unit) = &dimension else { return typeset_number(&write_figures(si, 2)) };
            let shown = scaled(unit, si);
            let number = typeset_number(&write_figures(shown.from_si(si, 0.0), 2));
            if shown.unit.name.is_empty() { number } else { format!("{number}\u{a0}{}", typeset_unit(&shown.unit.name)) }
        };
        checks.push(Check {
            what: markdown(format!(
                "Surplus relation {formula}, [line {line}](#line-{line}): left side less right side, and what the inputs allow"
            )),
            result: format!("{}; ± {}", value(check.difference), value(check.allowed)),
        });
    }
    checks
}

/// The SI unit of the difference of the sides of a relation: that of a quantity that stands alone on one side.
fn dimension_of(draft: &Draft, relation: usize) -> Option<ShownUnit> {
    let sheet = draft.input.sheet;
    let relation = sheet.relations.get(relation)?;
    let alone = [relation.left, relation.right].into_iter().find_map(|side| match sheet.exprs.get(side) {
        crate::sheet::Expr::Quantity(id) => Some(sheet.quantity(id).dimension),
        _ => None,
    });
    let dimension: Dimension = alone?;
    Some(ShownUnit { unit: Unit { name: dimension.si_unit(), dimension, factor: 1.0, offset: 0.0, references: Vec::new() }, basis: None })
}

/// Warnings and notes, in the order of the sheet.
pub(in crate::report) fn findings(draft: &Draft) -> Vec<Finding> {
    let input = draft.input;
    let objects = input.findings.iter().map(|finding| FindingObject::new(finding, input.path, input.text, &draft.lines));
    objects
        .map(|finding| Finding {
            severity: finding.severity,
            code: finding.code,
            message: finding.message,
            help: finding.help.unwrap_or_default(),
            line: draft.cite(finding.line),
        })
        .collect()
}

/// A caution that is shown.
#[derive(Clone, Debug, Serialize)]
pub(in crate::report) struct Caution {
    text: String,
    source: String,
    line: u32,
}

/// The cautions whose conditions hold.
pub(in crate::report) fn cautions(draft: &Draft) -> Vec<Caution> {
    let input = draft.input;
    let shown = input.solution.map_or(&[][..], |solution| &solution.cautions);
    let clauses = input.sheet.cautions.iter().zip(shown).filter(|(_, shown)| **shown);
    clauses
        .map(|(clause, _)| Caution { text: clause.text.clone(), source: clause.source.clone(), line: draft.line(clause.statement) })
        .collect()
}
