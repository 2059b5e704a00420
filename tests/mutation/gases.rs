//! Mistakes with gases and mixtures.

use gaswright::diagnostic::Span;
use gaswright::syntax::StatementKind;

use super::good_sheet::GoodSheet;
use super::mutant::Mutant;

/// Shares without saying of what.
pub(super) fn basis_of_shares_dropped(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for statement in sheet.statements() {
        if let StatementKind::Gas { by: Some((_, span)), .. } = &statement.kind {
            let text = sheet.with(*span, "");
            mutants.push(Mutant::new(
                text,
                format!("no `{}`", sheet.at(*span)),
                sheet.lines_of(statement.span),
                &[&["by mole"], &["by mass"], &["by volume"]],
            ));
        }
    }
    mutants
}

/// Shares that do not sum to one.
pub(super) fn shares_that_do_not_sum(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for statement in sheet.statements() {
        let StatementKind::Gas { parts, .. } = &statement.kind else { continue };
        for part in parts {
            let Some(share) = part.share else { continue };
            let other = share.value + 0.02 * if share.unit.is_some() { 100.0 } else { 1.0 };
            let text = sheet.with(share.digits, &other.to_string());
            mutants.push(Mutant::new(text, format!("a share of {other}"), sheet.lines_of(statement.span), &[&["102", "1.02"]]));
        }
    }
    mutants
}

/// A ratio of the heat capacities by hand, for a gas that the sheet uses as a state.
pub(super) fn heat_capacity_ratio_by_hand(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for statement in sheet.statements() {
        let StatementKind::Let { name, value, .. } = &statement.kind else { continue };
        let ratio = sheet.at(sheet.solved.tree.expr(*value).span);
        let Some((state, _)) = ratio.split_once(".cp / ") else { continue };
        let name = sheet.name_of(*name);
        let text = sheet.with(statement.span, &format!("given {name} = 1.25 \"Ratio of the heat capacities\" from \"Handbook\""));
        mutants.push(Mutant::new(
            text,
            format!("`{name}` = 1.25 by hand"),
            sheet.lines_of(statement.span),
            &[&[&format!("{state}.k"), &format!("{state}.cp"), "1.4"]],
        ));
    }
    mutants
}

/// A molar mass or a gas constant by hand, wrong, for a gas that the sheet names.
pub(super) fn constant_by_hand(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for (field, unit, what) in [("M", "g/mol", "Molar mass"), ("R", "J/(kg.K)", "Gas constant")] {
        let uses: Vec<Span> =
            sheet.uses().into_iter().filter_map(|(_, base, here)| Some(base.to(here.filter(|here| sheet.at(*here) == field)?))).collect();
        let Some(first) = uses.first() else { continue };
        let constant = sheet.at(*first);
        let Some(id) = sheet.solved.sheet.find(constant) else { continue };
        let value = sheet.solved.sheet.quantity(id).constant.unwrap_or_default();
        let wrong = value * 1.08 * if field == "M" { 1000.0 } else { 1.0 };
        let mut text = sheet.text.clone();
        for span in uses.iter().rev() {
            text.replace_range(span.start as usize..span.end as usize, "by_hand");
        }
        let gas = constant.split('.').next().unwrap_or_default();
        let description = sheet.solved.sheet.gases.iter().find(|here| here.name == gas).map_or_else(String::new, |here| here.gas.title());
        text.push_str(&format!("given by_hand = {wrong:.1} {unit} \"{what} of {description}\" from \"Handbook\"\n"));
        let line = sheet.text.lines().count() as u32 + 1;
        mutants.push(Mutant::new(text, format!("{what} {wrong:.1} {unit} by hand for `{constant}`"), [line], &[&[constant]]));
    }
    mutants
}
