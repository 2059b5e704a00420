//! Slips of the pen: misspelt words, lost signs.

use std::collections::BTreeSet;

use gaswright::diagnostic::Span;
use gaswright::syntax::{ExprKind, StatementKind};

use super::good_sheet::GoodSheet;
use super::mutant::Mutant;

/// A word with two of its letters turned about, or its last letter twice.
fn misspelt(word: &str) -> String {
    let mut letters: Vec<char> = word.chars().collect();
    let middle = letters.len() / 2;
    if letters.len() >= 3 && letters[middle] != letters[middle - 1] {
        letters.swap(middle - 1, middle);
    } else if let Some(last) = letters.last().copied() {
        letters.push(last);
    }
    letters.into_iter().collect()
}

/// `gievn` for `given`: each statement word of the sheet.
pub(super) fn keyword_misspelt(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut seen = BTreeSet::new();
    let mut mutants = Vec::new();
    for statement in sheet.statements() {
        let word = sheet.at(statement.word);
        if word.len() < 3 || !seen.insert(word) {
            continue;
        }
        let wrong = misspelt(word);
        mutants.push(Mutant::new(
            sheet.with(statement.word, &wrong),
            format!("`{wrong}`"),
            sheet.lines_of(statement.span),
            &[&[&format!("`{word}`")]],
        ));
    }
    mutants
}

/// A name misspelt where it is used.
pub(super) fn symbol_misspelt(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for (statement, base, _) in sheet.uses() {
        let name = sheet.at(base);
        // A name of one or two letters has no spelling of its own.
        if name.len() < 3 || name == "site" || gaswright::syntax::is_reserved(name) {
            continue;
        }
        let wrong = if name.contains('_') { name.replacen('_', "", 1) } else { misspelt(name) };
        let prose = matches!(statement.kind, StatementKind::Prose { .. });
        let lines = if prose { sheet.lines_of(base) } else { sheet.lines_of(statement.span) };
        mutants.push(Mutant::new(sheet.with(base, &wrong), format!("`{wrong}` for `{name}`"), lines, &[&[&format!("`{name}`")]]));
    }
    mutants
}

/// Units, as people write them elsewhere, and the part that is wrong, set right.
const SPELT: &[(&str, &str, &str)] = &[
    ("bar", "Bar", "bar"),
    ("mbar", "mBar", "mbar"),
    ("kPa", "KPa", "kPa"),
    ("kg/h", "kg/hr", "h"),
    ("kg/s", "kg/sec", "s"),
    ("g/h", "gr/h", "g"),
    ("m3/h", "m3/hr", "h"),
    ("L/min", "ltr/min", "L"),
    ("L", "ltr", "L"),
    ("Nm3/h", "Nm3/hr", "h"),
    ("mm", "mn", "mm"),
    ("mm2", "sqmm", "mm2"),
    ("kW", "KW", "kW"),
    ("kJ/kg", "KJ/kg", "kJ"),
    ("h", "hr", "h"),
    ("min", "mins", "min"),
    ("s", "sec", "s"),
    ("kg", "kgs", "kg"),
    ("degC", "degc", "degC"),
    ("K", "kelvin", "K"),
    ("%", "percent", "%"),
    ("mol", "mole", "mol"),
    ("mol/s", "mole/s", "mol"),
    ("cm3/min", "ccm/min", "cm3"),
    ("Pa.s", "Pas", "Pa.s"),
];

/// `kg/hr` for `kg/h`.
pub(super) fn unit_misspelt(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for (statement, unit) in sheet.units() {
        let Some((right, wrong, part)) = SPELT.iter().find(|(right, _, _)| *right == sheet.at(unit.span)) else { continue };
        let prose = matches!(statement.kind, StatementKind::Prose { .. });
        let lines = if prose { sheet.lines_of(unit.span) } else { sheet.lines_of(statement.span) };
        mutants.push(Mutant::new(
            sheet.with(unit.span, wrong),
            format!("`{wrong}` for `{right}`"),
            lines,
            &[&[&format!("`{right}`"), &format!("`{part}`")]],
        ));
    }
    mutants
}

/// `nitorgen` for `nitrogen`.
pub(super) fn gas_misspelt(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for statement in sheet.statements() {
        let StatementKind::Gas { parts, .. } = &statement.kind else { continue };
        for part in parts {
            let right = &part.species.text;
            let wrong = misspelt(right);
            mutants.push(Mutant::new(
                sheet.with(part.species.span, &wrong),
                format!("`{wrong}`"),
                sheet.lines_of(statement.span),
                &[&[right]],
            ));
        }
    }
    mutants
}

/// A field that a state or a gas does not offer.
pub(super) fn field_misspelt(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for (statement, base, field) in sheet.uses() {
        let Some(field) = field else { continue };
        let right = sheet.at(field);
        let wrong = match right {
            "p" => "P",
            "T" => "t",
            "v" => "V",
            "h" => "H",
            "s" => "S",
            "w" => "W",
            "M" => "MM",
            "R" => "Rs",
            "cp" => "Cp",
            "cv" => "Cv",
            "rho" => "roh",
            _ => continue,
        };
        let prose = matches!(statement.kind, StatementKind::Prose { .. });
        let lines = if prose { sheet.lines_of(base) } else { sheet.lines_of(statement.span) };
        let change = format!("`{}.{wrong}`", sheet.at(base));
        mutants.push(Mutant::new(
            sheet.with(field, wrong),
            change,
            lines,
            &[&[&format!("`{right}`"), &format!("{}.{right}`", sheet.at(base))]],
        ));
    }
    mutants
}

/// `2,40` for `2.40`.
pub(super) fn decimal_comma(sheet: &GoodSheet) -> Vec<Mutant> {
    sheet
        .givens()
        .filter(|(_, _, value)| sheet.at(value.digits).contains('.') && !sheet.at(value.digits).contains('e'))
        .map(|(statement, name, value)| {
            let right = sheet.at(value.digits);
            let text = sheet.with(value.digits, &right.replace('.', ","));
            Mutant::new(text, format!("a decimal comma in `{name}`"), sheet.lines_of(statement.span), &[&[right]])
        })
        .collect()
}

/// `==` for `=`.
pub(super) fn equals_doubled(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    let tree = &sheet.solved.tree;
    for statement in sheet.statements() {
        let value = match &statement.kind {
            StatementKind::Relation { right, .. } => *right,
            StatementKind::Let { value, .. } => *value,
            _ => continue,
        };
        let before = Span { start: statement.span.start, end: tree.expr(value).span.start };
        let Some(at) = sheet.at(before).rfind('=') else { continue };
        let at = statement.span.start + at as u32;
        let text = sheet.with(Span { start: at, end: at + 1 }, "==");
        mutants.push(Mutant::new(text, "`==`", sheet.lines_of(statement.span), &[&["`=`"]]));
    }
    mutants
}

/// A comparison the wrong way about: `=>`.
pub(super) fn comparison_turned(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for statement in sheet.statements() {
        if !matches!(statement.kind, StatementKind::Require { .. }) {
            continue;
        }
        let whole = sheet.at(statement.span);
        let quote = whole.find('"').unwrap_or(whole.len());
        for (right, wrong) in [(">=", "=>"), ("<=", "=<")] {
            if let Some(at) = whole[..quote].find(right) {
                let start = statement.span.start + at as u32;
                let text = sheet.with(Span { start, end: start + 2 }, wrong);
                mutants.push(Mutant::new(text, format!("`{wrong}`"), sheet.lines_of(statement.span), &[&[&format!("`{right}`")]]));
            }
        }
    }
    mutants
}

/// A text that is not closed.
pub(super) fn quote_lost(sheet: &GoodSheet) -> Vec<Mutant> {
    sheet
        .statements()
        .iter()
        .filter(|statement| {
            matches!(statement.kind, StatementKind::Given { .. } | StatementKind::Let { .. } | StatementKind::Unknown { .. })
        })
        .filter_map(|statement| {
            let text = statement.source.as_ref().or(statement.description.as_ref())?;
            let span = Span { start: text.span.end - 1, end: text.span.end };
            Some(Mutant::new(sheet.with(span, ""), "a quote not closed", sheet.lines_of(statement.span), &[&["quote", "`\"`", "close"]]))
        })
        .collect()
}

/// `V full.rho` for `V * full.rho`.
pub(super) fn operator_lost(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    let tree = &sheet.solved.tree;
    for expr in &tree.expressions {
        let ExprKind::Binary(gaswright::syntax::BinaryOp::Multiply, a, b) = &expr.kind else { continue };
        let between = Span { start: tree.expr(*a).span.end, end: tree.expr(*b).span.start };
        // Brackets around an operand stand outside its place; such a product is left alone.
        if sheet.at(between).trim() != "*" {
            continue;
        }
        mutants.push(Mutant::new(
            sheet.with(between, " "),
            format!("`{}` without `*`", sheet.at(expr.span)),
            sheet.lines_of(expr.span),
            &[&["`*`"]],
        ));
    }
    mutants
}

/// A bracket that is not closed.
pub(super) fn bracket_lost(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for statement in sheet.statements() {
        if !matches!(statement.kind, StatementKind::Let { .. } | StatementKind::Relation { .. }) {
            continue;
        }
        let whole = sheet.at(statement.span);
        let quote = whole.find('"').unwrap_or(whole.len());
        let Some(at) = whole[..quote].rfind(')') else { continue };
        let start = statement.span.start + at as u32;
        let text = sheet.with(Span { start, end: start + 1 }, "");
        mutants.push(Mutant::new(text, "a bracket not closed", sheet.lines_of(statement.span), &[&["`)`", "bracket"]]));
    }
    mutants
}
