//! Mistakes with names, relations and degrees of freedom.

use std::collections::BTreeSet;

use gaswright::diagnostic::Span;
use gaswright::sheet::Kind;
use gaswright::syntax::{BinaryOp, Comparison, ConditionKind, ExprKind, Statement, StatementKind};

use super::good_sheet::GoodSheet;
use super::mutant::Mutant;

const DECLARED: &[&str] = &["`unknown ", "`given ", "`let ", "declare"];

/// A given that is used and not there.
pub(super) fn given_dropped(sheet: &GoodSheet) -> Vec<Mutant> {
    let used: Vec<_> = sheet.givens().filter(|(_, name, _)| !sheet.lines_using(name).is_empty()).collect();
    used.into_iter()
        .map(|(statement, name, _)| {
            Mutant::new(
                sheet.without(statement),
                format!("no `given {name}`"),
                sheet.lines_using(name),
                &[&[&format!("`{name}`")], DECLARED],
            )
        })
        .collect()
}

/// An unknown that is used and not declared.
pub(super) fn unknown_dropped(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for statement in sheet.statements() {
        if let StatementKind::Unknown { name, .. } = &statement.kind {
            let name = sheet.name_of(*name);
            mutants.push(Mutant::new(
                sheet.without(statement),
                format!("no `unknown {name}`"),
                sheet.lines_using(name),
                &[&[&format!("`{name}`")], DECLARED],
            ));
        }
    }
    mutants
}

/// The statements that declare a name.
fn declaring<'a>(sheet: &'a GoodSheet, name: &str) -> Option<&'a Statement> {
    sheet.statements().iter().find(|statement| match &statement.kind {
        StatementKind::Given { name: here, .. }
        | StatementKind::Unknown { name: here, .. }
        | StatementKind::Let { name: here, .. }
        | StatementKind::State { name: here, .. } => sheet.name_of(*here) == name,
        _ => false,
    })
}

/// The names that a statement declares or uses.
fn names_in<'a>(sheet: &'a GoodSheet, statement: &Statement) -> BTreeSet<&'a str> {
    let mut names: BTreeSet<&str> =
        sheet.uses().into_iter().filter(|(holder, _, _)| holder.span == statement.span).map(|(_, base, _)| sheet.at(base)).collect();
    if let StatementKind::Let { name, .. } | StatementKind::State { name, .. } = &statement.kind {
        names.insert(sheet.name_of(*name));
    }
    names
}

/// A relation too few: one of those that are not a definition.
pub(super) fn relation_dropped(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for statement in sheet.statements().iter().filter(|statement| matches!(statement.kind, StatementKind::Relation { .. })) {
        let unknowns: BTreeSet<&str> = names_in(sheet, statement)
            .into_iter()
            .filter(|name| declaring(sheet, name).is_some_and(|statement| !matches!(statement.kind, StatementKind::Given { .. })))
            .collect();
        // What a relation determines may be found through another one: the names that share a line with its own count too.
        let mut near: BTreeSet<&str> = unknowns.clone();
        for other in sheet.statements() {
            let names: BTreeSet<&str> = names_in(sheet, other);
            if names.iter().any(|name| unknowns.contains(name))
                && !matches!(other.kind, StatementKind::Prose { .. } | StatementKind::Answer { .. })
            {
                near.extend(names);
            }
        }
        let unknown = |name: &&&str| declaring(sheet, name).is_some_and(|statement| !matches!(statement.kind, StatementKind::Given { .. }));
        let lines =
            near.iter().filter(unknown).filter_map(|name| declaring(sheet, name)).flat_map(|statement| sheet.lines_of(statement.span));
        let names: Vec<String> = unknowns.iter().flat_map(|name| [format!("`{name}`"), format!("`{name}.")]).collect();
        let names: Vec<&str> = names.iter().map(String::as_str).collect();
        let change = format!("no `{}`", sheet.at(statement.span).split('"').next().unwrap_or_default().trim());
        mutants.push(Mutant::new(sheet.without(statement), change, lines, &[&names, &["relation"]]));
    }
    mutants
}

/// An input too few: a given made an unknown.
pub(super) fn given_made_unknown(sheet: &GoodSheet) -> Vec<Mutant> {
    sheet
        .givens()
        .map(|(statement, name, value)| {
            let unit = sheet.unit_of(value);
            let end = match &statement.kind {
                StatementKind::Given { uncertainty: Some(uncertainty), .. } => uncertainty.span.end,
                _ => value.span.end,
            };
            let declared = if unit.is_empty() { format!("unknown {name}") } else { format!("unknown {name} in {unit}") };
            let text = sheet.with(Span { start: statement.span.start, end }, &declared);
            let mut lines = sheet.lines_using(name);
            lines.extend(sheet.lines_of(statement.span));
            Mutant::new(text, format!("`{declared}` for a given"), lines, &[&[&format!("`{name}`")], &["give", "input"]])
        })
        .collect()
}

const TOO_MANY: &[&[&str]] = &[&["conflict", "contradict", "disagree"], &["remove", "take out", "leave out", "drop", "delete"]];

/// A relation too many, with another number in it.
pub(super) fn relation_doubled(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    let tree = &sheet.solved.tree;
    for statement in sheet.statements() {
        let StatementKind::Relation { left, right } = &statement.kind else { continue };
        let (left, right) =
            (sheet.at(Span { start: statement.span.start, end: tree.expr(*left).span.end }), sheet.at(tree.expr(*right).span));
        // A sum of pressures may not be multiplied as a whole; something is added to it instead.
        let is_pressure = matches!(
            tree.expr(match &statement.kind {
                StatementKind::Relation { left, .. } => *left,
                _ => unreachable!(),
            })
            .kind,
            ExprKind::Name(_)
        ) && left.starts_with("p_");
        let doubled = if is_pressure { format!("{left} = {right} + 0.2 bar diff") } else { format!("{left} = 1.1 * ({right})") };
        let (text, line) = sheet.and(&doubled);
        let mut lines: Vec<u32> = sheet.lines_of(statement.span).collect();
        lines.push(line);
        mutants.push(Mutant::new(text, format!("`{doubled}` as well"), lines, TOO_MANY));
    }
    mutants
}

/// A second value for a given.
pub(super) fn given_contradicted(sheet: &GoodSheet) -> Vec<Mutant> {
    sheet
        .givens()
        .map(|(statement, name, value)| {
            let unit = sheet.unit_of(value);
            let other = if matches!(unit, "degC" | "K") { value.value + 7.0 } else { value.value * 1.1 + 0.01 };
            let line_text = format!("{name} = {other} {unit}").trim_end().to_owned();
            let (text, line) = sheet.and(&line_text);
            let mut lines: Vec<u32> = sheet.lines_of(statement.span).collect();
            lines.push(line);
            Mutant::new(text, format!("`{line_text}` as well"), lines, TOO_MANY)
        })
        .collect()
}

/// A value by hand for what a line defines.
pub(super) fn definition_contradicted(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    let Some(solution) = &sheet.solved.solution else { return mutants };
    for statement in sheet.statements() {
        let StatementKind::Let { name, .. } = &statement.kind else { continue };
        let name = sheet.name_of(*name);
        let Some(id) = sheet.solved.sheet.find(name) else { continue };
        let quantity = sheet.solved.sheet.quantity(id);
        let basis = match quantity.kind {
            Kind::Absolute if quantity.shown.unit.is_pressure() => " abs",
            Kind::Difference => " diff",
            _ => "",
        };
        let unit = if quantity.dimension.is_none() { String::new() } else { format!(" {}{basis}", quantity.dimension.si_unit()) };
        let line_text = format!("{name} = {:e}{unit}", solution.values[id.0 as usize] * 1.2);
        let (text, line) = sheet.and(&line_text);
        let mut lines: Vec<u32> = sheet.lines_of(statement.span).collect();
        lines.push(line);
        mutants.push(Mutant::new(text, format!("`{line_text}` as well"), lines, TOO_MANY));
    }
    mutants
}

/// A name that two lines define.
pub(super) fn name_twice(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for statement in sheet.statements() {
        let (StatementKind::Given { name, .. }
        | StatementKind::Let { name, .. }
        | StatementKind::Unknown { name, .. }
        | StatementKind::State { name, .. }) = &statement.kind
        else {
            continue;
        };
        let (text, line) = sheet.and(sheet.at(statement.span));
        let lines = line..=line + sheet.at(statement.span).matches('\n').count() as u32;
        mutants.push(Mutant::new(
            text,
            format!("`{}` twice", sheet.name_of(*name)),
            lines,
            &[&["remove", "rename", "another name", "other name"]],
        ));
    }
    mutants
}

/// Two names for one quantity: a given written a second time with a name without its `_`, and used by it once.
pub(super) fn two_names(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for (statement, name, _) in sheet.givens() {
        let twin = name.replace('_', "");
        let uses: Vec<_> = sheet.uses().into_iter().filter(|(_, base, field)| field.is_none() && sheet.at(*base) == name).collect();
        if uses.len() != 2 || twin == name || sheet.solved.sheet.find(&twin).is_some() {
            continue;
        }
        let mut text = sheet.with(uses[1].1, &twin);
        text.push_str(&sheet.at(statement.span).replacen(name, &twin, 1));
        text.push('\n');
        let mut lines: Vec<u32> = sheet.lines_of(statement.span).collect();
        lines.push(sheet.text.lines().count() as u32 + 1);
        mutants.push(Mutant::new(text, format!("`{twin}` beside `{name}`"), lines, &[&[&format!("`{name}`")], &[&format!("`{twin}`")]]));
    }
    mutants
}

/// A given that nothing uses.
pub(super) fn given_unused(sheet: &GoodSheet) -> Vec<Mutant> {
    let (text, line) = sheet.and("given L_spare = 3.00 m \"Length of the spare pipe\" from \"Stock list\"");
    vec![Mutant::new(text, "a given that nothing uses", [line], &[&["remove", "use it"]])]
}

/// An unknown that nothing asks for.
pub(super) fn unknown_unused(sheet: &GoodSheet) -> Vec<Mutant> {
    let (text, line) = sheet.and("unknown L_spare in m \"Length of the spare pipe\"");
    vec![Mutant::new(text, "an unknown that nothing asks for", [line], &[&["remove", "use it", "give", "relation"]])]
}

/// Requirements that say nothing of the result.
pub(super) fn requirement_empty(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    let given = sheet.givens().find(|(_, _, value)| value.unit.is_some_and(|unit| unit.basis.is_none()) && sheet.unit_of(value) != "degC");
    let of_a_given =
        given.map(|(_, name, value)| format!("require {name} >= {} {} \"Large enough\"", value.value / 2.0, sheet.unit_of(value)));
    for require in of_a_given.into_iter().chain(["require 6 m >= 5 m \"Long enough\"".to_owned()]) {
        let (text, line) = sheet.and(&require);
        mutants.push(Mutant::new(text, format!("`{require}`"), [line], &[&["result", "unknown", "nothing", "given"]]));
    }
    mutants
}

/// An answer that depends on no given.
pub(super) fn answer_empty(sheet: &GoodSheet) -> Vec<Mutant> {
    let (text, line) = sheet.and("let six_by_hand = 2 * 3 \"Six\"\nanswer six_by_hand");
    vec![Mutant::new(text, "an answer of numbers alone", [line, line + 1], &[&["given", "input"]])]
}

/// The wrong sign of a mass, a volume, an amount, a temperature or a pressure.
pub(super) fn sign_turned(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for statement in sheet.statements() {
        let StatementKind::Let { name, value, .. } = &statement.kind else { continue };
        let name = sheet.name_of(*name);
        let Some(id) = sheet.solved.sheet.find(name) else { continue };
        let kind = sheet.solved.sheet.quantity(id).kind;
        let counts = match sheet.dimension_word(name).as_str() {
            "mass" | "volume" | "amount of substance" => true,
            "pressure" | "temperature" => kind == Kind::Absolute,
            _ => false,
        };
        if counts {
            let span = sheet.solved.tree.expr(*value).span;
            let text = sheet.with(span, &format!("-({})", sheet.at(span)));
            mutants.push(Mutant::new(
                text,
                format!("`{name}` with the other sign"),
                sheet.lines_of(statement.span),
                &[&["negative", "below", "sign", "difference"]],
            ));
        }
    }
    mutants
}

/// A division by nothing, and the logarithm and the root of less than nothing, at the solution.
pub(super) fn undefined_at_the_solution(sheet: &GoodSheet) -> Vec<Mutant> {
    let Some((_, name, _)) =
        sheet.givens().find(|(_, _, value)| value.unit.is_none_or(|unit| unit.basis.is_none()) && sheet.unit_of(value) != "degC")
    else {
        return Vec::new();
    };
    let table: [(String, &[&str]); 3] = [
        (format!("1 / ({name} - {name})"), &["zero"]),
        (format!("ln({name} / {name} - 2)"), &["negative", "zero", "positive"]),
        (format!("sqrt({name} / {name} - 2)"), &["negative", "zero", "positive"]),
    ];
    table
        .iter()
        .map(|(expression, cure)| {
            let (text, line) = sheet.and(&format!("let by_hand = {expression} \"Ratio\"\nanswer by_hand"));
            Mutant::new(text, format!("`{expression}`"), [line], &[cure])
        })
        .collect()
}

/// Two roots, and no word on which is meant.
pub(super) fn roots_left_open(sheet: &GoodSheet) -> Vec<Mutant> {
    let (text, line) = sheet.and("unknown by_hand within 0 .. 10 \"Ratio\"\nby_hand^2 - 5 * by_hand + 6 = 0\nanswer by_hand");
    vec![Mutant::new(text, "two roots inside the bounds", [line, line + 1], &[&["2.0000"], &["3.0000"], &["`near"], &["`within"]])]
}

/// A requirement whose bound lies nearer to the result than its figures tell.
pub(super) fn decided_by_missing_figures(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    let Some(solution) = &sheet.solved.solution else { return mutants };
    for (clause, judged) in sheet.solved.sheet.requirements.iter().zip(&solution.requirements) {
        let statement = &sheet.statements()[clause.statement];
        let StatementKind::Require { condition } = &statement.kind else { continue };
        let (ConditionKind::Compare(_, comparison, right), Some(sides)) = (&condition.kind, &judged.sides) else { continue };
        let ExprKind::Number(literal) = &sheet.solved.tree.expr(*right).kind else { continue };
        let nearer = if matches!(comparison, Comparison::GreaterOrEqual | Comparison::Greater) { 1.0 - 1e-5 } else { 1.0 + 1e-5 };
        // A bound of nothing has no size to be near to.
        if sides.right == 0.0 {
            continue;
        }
        let bound = format!("{:.7e}", sides.left * nearer);
        let text = sheet.with(Span { start: literal.span.start, end: literal.digits.end }, &bound);
        mutants.push(Mutant::new(
            text,
            format!("a bound of {bound} {}", sides.unit),
            sheet.lines_of(statement.span),
            &[&["figures", "uncertainty"]],
        ));
    }
    mutants
}

/// A bare number added to a quantity with a dimension: terms that do not agree.
pub(super) fn terms_disagree(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    let tree = &sheet.solved.tree;
    for statement in sheet.statements() {
        let StatementKind::Let { name, value, .. } = &statement.kind else { continue };
        let quantity = sheet.solved.sheet.find(sheet.name_of(*name)).map(|id| sheet.solved.sheet.quantity(id));
        if quantity.is_none_or(|quantity| quantity.dimension.is_none()) {
            continue;
        }
        let expr = tree.expr(*value);
        let change = format!("`+ 1` in the definition of `{}`", sheet.name_of(*name));
        let text = sheet.with(Span { start: expr.span.end, end: expr.span.end }, " + 1");
        mutants.push(Mutant::new(
            text,
            change,
            sheet.lines_of(statement.span),
            &[&["pure number"], &[&sheet.dimension_word(sheet.name_of(*name))]],
        ));
        if let ExprKind::Binary(BinaryOp::Multiply, a, b) = &expr.kind {
            let (a, b) = (sheet.at(tree.expr(*a).span), sheet.at(tree.expr(*b).span));
            // A product made a sum: its factors are of different dimensions.
            if let (Some(one), Some(two)) = (dimension_of_use(sheet, a), dimension_of_use(sheet, b))
                && one != two
            {
                let text = sheet.with(expr.span, &format!("{a} + {b}"));
                mutants.push(Mutant::new(
                    text,
                    format!("`{a} + {b}` for `{a} * {b}`"),
                    sheet.lines_of(statement.span),
                    &[&[&one], &[&two]],
                ));
            }
        }
    }
    mutants
}

/// The dimension word of a plain name or field.
fn dimension_of_use(sheet: &GoodSheet, text: &str) -> Option<String> {
    let id = sheet.solved.sheet.find(text)?;
    Some(sheet.solved.sheet.quantity(id).dimension.describe())
}
