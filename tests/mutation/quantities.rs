//! Mistakes with quantities and units.

use gaswright::diagnostic::Span;
use gaswright::syntax::{Basis, BinaryOp, ExprKind, ReferenceName, StatementKind};
use gaswright::units;

use super::good_sheet::GoodSheet;
use super::mutant::Mutant;

/// `bar` for `bar gauge`.
pub(super) fn basis_dropped(sheet: &GoodSheet) -> Vec<Mutant> {
    let of_a_pressure = |span: Span| units::parse(sheet.at(span)).is_ok_and(|unit| unit.is_pressure());
    sheet
        .units()
        .into_iter()
        .filter_map(|(statement, unit)| {
            let (_, basis) = unit.basis.filter(|_| of_a_pressure(unit.span))?;
            let text = sheet.with(Span { start: unit.span.end, end: basis.end }, "");
            let lines = if matches!(statement.kind, StatementKind::Prose { .. }) {
                sheet.lines_of(unit.span)
            } else {
                sheet.lines_of(statement.span)
            };
            Some(Mutant::new(text, format!("`{}` without its basis", sheet.at(unit.whole())), lines, &[&["abs"], &["gauge"], &["diff"]]))
        })
        .collect()
}

/// `barg` for `bar gauge`.
pub(super) fn basis_joined(sheet: &GoodSheet) -> Vec<Mutant> {
    sheet
        .units()
        .into_iter()
        .filter(|(_, unit)| sheet.at(unit.span) == "bar")
        .filter_map(|(_, unit)| {
            let (basis, _) = unit.basis.filter(|(basis, _)| *basis != Basis::Difference)?;
            let (joined, right) = if basis == Basis::Gauge { ("barg", "bar gauge") } else { ("bara", "bar abs") };
            Some(Mutant::new(sheet.with(unit.whole(), joined), format!("`{joined}`"), sheet.lines_of(unit.span), &[&[right]]))
        })
        .collect()
}

/// A gauge reading, or the pressure of the site, without a `site`.
pub(super) fn site_dropped(sheet: &GoodSheet) -> Vec<Mutant> {
    let site = sheet
        .statements()
        .iter()
        .find(|statement| matches!(statement.kind, StatementKind::SiteAltitude { .. } | StatementKind::SitePressure { .. }));
    let Some(site) = site else { return Vec::new() };
    let mut lines = sheet.lines_using("site");
    for statement in sheet.statements() {
        if sheet.is_gauge(statement) {
            lines.extend(sheet.lines_of(statement.span));
        }
    }
    vec![Mutant::new(sheet.without(site), "no `site`", lines, &[&["site altitude", "site pressure"]])]
}

/// `given V = 2.40` for `given V = 2.40 m3`.
pub(super) fn unit_dropped(sheet: &GoodSheet) -> Vec<Mutant> {
    sheet
        .givens()
        .filter_map(|(statement, name, value)| {
            let unit = value.unit.filter(|_| sheet.unit_of(value) != "%")?;
            let mut lines = sheet.lines_using(name);
            lines.extend(sheet.lines_of(statement.span));
            let text = sheet.with(Span { start: value.digits.end, end: unit.whole().end }, "");
            Some(Mutant::new(text, format!("`{name}` without its unit"), lines, &[&["unit"]]))
        })
        .collect()
}

/// Givens that count from absolute zero, or from vacuum or the atmosphere.
fn givens_of(sheet: &GoodSheet, wanted: fn(&str) -> bool) -> Vec<&str> {
    sheet.givens().filter(|(_, _, value)| wanted(sheet.unit_of(value))).map(|(_, name, _)| name).collect()
}

/// What counts from zero whatever it is used for; a number in `K` may be a difference.
fn is_temperature(unit: &str) -> bool {
    unit == "degC"
}

fn is_gauge_pressure(unit: &str) -> bool {
    unit.ends_with("gauge")
}

/// Terms that may not be added: another of `names` added where one of them fixes a state, and a plus for the minus between two of them.
fn added(sheet: &GoodSheet, names: &[&str], what: &str) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    let cure: &[&[&str]] = &[&["difference", "mean"]];
    let tree = &sheet.solved.tree;
    let name_at = |id| match &tree.expr(id).kind {
        ExprKind::Name(path) if path.field.is_none() => Some(sheet.at(path.base.span)).filter(|name| names.contains(name)),
        _ => None,
    };
    for statement in sheet.statements() {
        if let StatementKind::State { at, .. } = &statement.kind {
            for (_, id) in at {
                if let Some(name) = name_at(*id)
                    && let Some(other) = names.iter().find(|other| **other != name)
                {
                    let text = sheet.with(tree.expr(*id).span, &format!("{name} + {other}"));
                    mutants.push(Mutant::new(text, format!("{what} `{name} + {other}`"), sheet.lines_of(statement.span), cure));
                }
            }
        }
    }
    for expr in &tree.expressions {
        if let ExprKind::Binary(BinaryOp::Subtract, a, b) = &expr.kind
            && let (Some(a), Some(b)) = (name_at(*a), name_at(*b))
        {
            let text = sheet.with(expr.span, &format!("{a} + {b}"));
            mutants.push(Mutant::new(text, format!("{what} `{a} + {b}` for `{a} - {b}`"), sheet.lines_of(expr.span), cure));
        }
    }
    mutants
}

/// A sum of two temperatures.
pub(super) fn temperatures_added(sheet: &GoodSheet) -> Vec<Mutant> {
    added(sheet, &givens_of(sheet, is_temperature), "temperatures")
}

/// A sum of two gauge readings.
pub(super) fn gauge_readings_added(sheet: &GoodSheet) -> Vec<Mutant> {
    added(sheet, &givens_of(sheet, is_gauge_pressure), "gauge readings")
}

/// Units that are taken for each other.
const TAKEN_FOR: &[(&str, &str)] = &[
    ("kW", "kJ"),
    ("L/min", "L"),
    ("L", "L/min"),
    ("m3/h", "m3"),
    ("m3", "m2"),
    ("kg/h", "kg"),
    ("kg/s", "kg"),
    ("g/h", "g"),
    ("kg", "kg/h"),
    ("kg/m3", "m3/kg"),
    ("kJ/kg", "kJ"),
    ("Nm3/h", "Nm3"),
    ("Nm3", "Nm3/h"),
    ("Sm3/h", "m3/h"),
    ("mol/s", "mol"),
    ("mol/h", "mol"),
    ("mol", "kg"),
    ("cm3/min", "cm3"),
    ("mm2", "mm"),
    ("mm", "mm2"),
    ("m", "m2"),
    ("m/s", "m"),
    ("h", "1/h"),
    ("min", "m"),
    ("s", "m"),
    ("kg/(h.bar)", "kg/h"),
    ("Pa.s", "m2/s"),
];

/// A unit of another kind: `kJ` for `kW`, `L` for `L/min`.
pub(super) fn wrong_kind(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for (statement, unit) in sheet.units() {
        let Some((right, wrong)) = TAKEN_FOR.iter().find(|(right, _)| *right == sheet.at(unit.whole())) else { continue };
        let declared = match &statement.kind {
            StatementKind::Given { name, .. } | StatementKind::Let { name, .. } | StatementKind::Unknown { name, .. } => {
                Some(sheet.name_of(*name))
            }
            _ => None,
        };
        let mut lines = declared.map(|name| sheet.lines_using(name)).unwrap_or_default();
        let here =
            if matches!(statement.kind, StatementKind::Prose { .. }) { sheet.lines_of(unit.span) } else { sheet.lines_of(statement.span) };
        lines.extend(here);
        let word = units::parse(right).map(|unit| unit.dimension.describe()).unwrap_or_default();
        let text = sheet.with(unit.whole(), wrong);
        mutants.push(Mutant::new(text, format!("`{wrong}` for `{right}` of {}", declared.unwrap_or("a value")), lines, &[&[right, &word]]));
    }
    mutants
}

/// A prefix too many or too few in a given. Not every such value is out of the usual: 0.08 mbar is a draught and 145 mm a length.
pub(super) fn wrong_prefix(sheet: &GoodSheet) -> Vec<Mutant> {
    const PREFIXES: &[(&str, &str)] = &[("bar", "mbar"), ("mbar", "bar"), ("kPa", "MPa"), ("mm", "m"), ("m", "mm"), ("m3", "mm3")];
    sheet
        .givens()
        .filter_map(|(statement, name, value)| {
            let unit = value.unit?;
            let (right, wrong) = PREFIXES.iter().find(|(right, _)| *right == sheet.at(unit.span))?;
            units::parse(wrong).ok()?;
            let text = sheet.with(unit.span, wrong);
            Some(Mutant::new(text, format!("`{wrong}` for `{right}` of `{name}`"), sheet.lines_of(statement.span), &[&["usual"]]))
        })
        .collect()
}

/// `Nm3` without its reference conditions.
pub(super) fn reference_dropped(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for statement in sheet.statements() {
        let StatementKind::Reference { which, .. } = &statement.kind else { continue };
        let (unit, cure) = match which {
            ReferenceName::Normal => ("Nm3", "reference normal"),
            ReferenceName::Standard => ("Sm3", "reference standard"),
            ReferenceName::Scf => ("scf", "reference scf"),
        };
        let lines: Vec<u32> = sheet
            .units()
            .iter()
            .filter(|(_, here)| sheet.at(here.span).contains(unit))
            .flat_map(|(_, here)| sheet.lines_of(here.span))
            .collect();
        mutants.push(Mutant::new(sheet.without(statement), format!("no `{cure}`"), lines, &[&[cure]]));
    }
    mutants
}

/// A difference where a state wants an absolute value.
pub(super) fn difference_for_absolute(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for statement in sheet.statements() {
        let StatementKind::State { at, .. } = &statement.kind else { continue };
        for (property, id) in at {
            let instead = match sheet.name_of(*property) {
                "p" => "1.5 bar diff",
                "T" => "25 K diff",
                _ => continue,
            };
            let text = sheet.with(sheet.solved.tree.expr(*id).span, instead);
            mutants.push(Mutant::new(
                text,
                format!("`{instead}` for {}", sheet.name_of(*property)),
                sheet.lines_of(statement.span),
                &[&["abs", "counts from", "absolute"]],
            ));
        }
    }
    mutants
}

/// `5 degC` where five kelvin are meant.
pub(super) fn absolute_for_difference(sheet: &GoodSheet) -> Vec<Mutant> {
    sheet
        .units()
        .into_iter()
        .filter(|(statement, unit)| sheet.at(unit.whole()) == "K diff" && !matches!(statement.kind, StatementKind::Given { .. }))
        .map(|(statement, unit)| {
            Mutant::new(
                sheet.with(unit.whole(), "degC"),
                "`degC` for `K diff`",
                sheet.lines_of(statement.span),
                &[&["diff", "` k`", " k "]],
            )
        })
        .collect()
}

/// The molar gas constant where the gas has its own.
pub(super) fn molar_for_specific_constant(sheet: &GoodSheet) -> Vec<Mutant> {
    sheet
        .uses()
        .into_iter()
        .filter_map(|(statement, base, field)| {
            let field = field.filter(|field| sheet.at(*field) == "R")?;
            let whole = base.to(field);
            let right = sheet.at(whole).to_owned();
            let change = format!("`R` for `{right}`");
            Some(Mutant::new(sheet.with(whole, "R"), change, sheet.lines_of(statement.span), &[&[&right]]))
        })
        .collect()
}

/// A temperature below absolute zero, a pressure below vacuum.
pub(super) fn beyond_the_possible(sheet: &GoodSheet) -> Vec<Mutant> {
    sheet
        .givens()
        .filter_map(|(statement, name, value)| {
            let (number, cure): (&str, &[&str]) = match sheet.unit_of(value) {
                "degC" => ("-300", &["absolute zero"]),
                unit if unit.ends_with("gauge") => ("-1.4", &["vacuum"]),
                unit if unit.ends_with("abs") => ("-2", &["vacuum"]),
                _ => return None,
            };
            let number_span = Span { start: value.span.start, end: value.digits.end };
            Some(Mutant::new(
                sheet.with(number_span, number),
                format!("`{name}` = {number} {}", sheet.unit_of(value)),
                sheet.lines_of(statement.span),
                &[cure],
            ))
        })
        .collect()
}

/// A pressure of the site that its altitude cannot have.
pub(super) fn altitude_against_pressure(sheet: &GoodSheet) -> Vec<Mutant> {
    let mut mutants = Vec::new();
    for statement in sheet.statements() {
        let other = match &statement.kind {
            StatementKind::SiteAltitude { .. } => "site pressure = 850 mbar abs \"Barometer\" from \"Log\"",
            StatementKind::SitePressure { .. } => "site altitude = 1500 m \"Level\" from \"Survey\"",
            _ => continue,
        };
        let (text, line) = sheet.and(other);
        let mut lines: Vec<u32> = sheet.lines_of(statement.span).collect();
        lines.push(line);
        mutants.push(Mutant::new(text, format!("`{}` as well", &other[..13]), lines, &[&["standard atmosphere", "altitude"]]));
    }
    mutants
}
