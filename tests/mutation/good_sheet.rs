//! A sheet without a mistake, and where in it one can be made.

use std::collections::BTreeSet;
use std::fs;
use std::path::Path;

use gaswright::Solved;
use gaswright::diagnostic::{Diagnostic, LineIndex, Span};
use gaswright::syntax::{Basis, ExprKind, Literal, ProsePiece, Statement, StatementKind, UnitText};

/// An example as it stands.
pub(super) struct GoodSheet {
    /// Its file name without ending.
    pub(super) name: String,
    /// Its text.
    pub(super) text: String,
    /// What the program makes of it.
    pub(super) solved: Solved,
    lines: LineIndex,
    said: BTreeSet<(&'static str, String)>,
}

impl GoodSheet {
    /// Every sheet of `sheets/examples/`, in the order of their names.
    pub(super) fn all() -> Vec<Self> {
        let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("sheets/examples");
        let mut paths: Vec<_> =
            fs::read_dir(folder).expect("the examples are there").map(|file| file.expect("the folder can be read").path()).collect();
        paths.retain(|path| path.extension().is_some_and(|ending| ending == "gw"));
        paths.sort();
        paths.iter().map(|path| Self::of(path)).collect()
    }

    fn of(path: &Path) -> Self {
        let text = fs::read_to_string(path).expect("an example can be read");
        let solved = gaswright::solve(&text);
        assert!(solved.solution.is_some(), "{} has a mistake already", path.display());
        let said = solved.findings.iter().map(|finding| (finding.code, finding.message.clone())).collect();
        let lines = LineIndex::new(&text);
        Self { name: path.file_stem().unwrap_or_default().to_string_lossy().into_owned(), text, solved, lines, said }
    }

    /// Whether the sheet raises a finding without any mistake.
    pub(super) fn says_already(&self, finding: &Diagnostic) -> bool {
        self.said.contains(&(finding.code, finding.message.clone()))
    }

    pub(super) fn statements(&self) -> &[Statement] {
        &self.solved.tree.statements
    }

    /// The text of a place.
    pub(super) fn at(&self, span: Span) -> &str {
        span.of(&self.text)
    }

    /// The lines of a place.
    pub(super) fn lines_of(&self, span: Span) -> std::ops::RangeInclusive<u32> {
        self.lines.line(span.start)..=self.lines.line(span.end.max(span.start + 1) - 1)
    }

    /// The sheet with a place written otherwise.
    pub(super) fn with(&self, span: Span, replacement: &str) -> String {
        let mut text = self.text.clone();
        text.replace_range(span.start as usize..span.end as usize, replacement);
        text
    }

    /// The sheet without a statement; its lines stay, empty, so that line numbers hold.
    pub(super) fn without(&self, statement: &Statement) -> String {
        self.with(statement.span, &"\n".repeat(self.at(statement.span).matches('\n').count()))
    }

    /// The sheet with lines more at its end, and the number of the first of them.
    pub(super) fn and(&self, lines: &str) -> (String, u32) {
        (format!("{}{lines}\n", self.text), self.text.lines().count() as u32 + 1)
    }

    /// The text of a name.
    pub(super) fn name_of(&self, name: gaswright::syntax::Named) -> &str {
        self.at(name.span)
    }

    /// The givens with their statements: name, value.
    pub(super) fn givens(&self) -> impl Iterator<Item = (&Statement, &str, &Literal)> {
        self.statements().iter().filter_map(|statement| match &statement.kind {
            StatementKind::Given { name, value, .. } => Some((statement, self.name_of(*name), value)),
            _ => None,
        })
    }

    /// The unit of a value as written, basis included; empty without.
    pub(super) fn unit_of(&self, value: &Literal) -> &str {
        value.unit.map_or("", |unit| self.at(unit.whole()))
    }

    /// The names that stand in expressions, conditions, answers and prose: the statement, the place of the name without its field, and its field.
    pub(super) fn uses(&self) -> Vec<(&Statement, Span, Option<Span>)> {
        let tree = &self.solved.tree;
        let mut paths: Vec<gaswright::syntax::Path> = tree
            .expressions
            .iter()
            .filter_map(|expr| match &expr.kind {
                ExprKind::Name(path) => Some(*path),
                _ => None,
            })
            .collect();
        for statement in self.statements() {
            match &statement.kind {
                StatementKind::Answer { items } => paths.extend(items.iter().map(|item| item.path)),
                StatementKind::Prose { pieces } => paths.extend(pieces.iter().filter_map(|piece| match piece {
                    ProsePiece::Live { path, .. } => Some(*path),
                    ProsePiece::Text(_) => None,
                })),
                StatementKind::Correlate { a, b, .. } => paths.extend([*a, *b]),
                _ => {}
            }
        }
        let holder =
            |span: Span| self.statements().iter().find(|statement| statement.span.start <= span.start && span.end <= statement.span.end);
        let mut uses: Vec<_> = paths
            .into_iter()
            .filter_map(|path| Some((holder(path.base.span)?, path.base.span, path.field.map(|field| field.span))))
            .collect();
        uses.sort_by_key(|(_, span, _)| span.start);
        uses.dedup_by_key(|(_, span, _)| span.start);
        uses
    }

    /// The lines of the statements that use a name, and of the states of a gas of that name.
    pub(super) fn lines_using(&self, name: &str) -> BTreeSet<u32> {
        let mut lines: BTreeSet<u32> = BTreeSet::new();
        for (statement, span, _) in self.uses() {
            if self.at(span) == name {
                lines.extend(self.lines_of(statement.span));
            }
        }
        for statement in self.statements() {
            if let StatementKind::State { gas, .. } = &statement.kind
                && self.name_of(*gas) == name
            {
                lines.extend(self.lines_of(statement.span));
            }
        }
        lines
    }

    /// Numbers in expressions, conditions and bounds, each with its statement.
    pub(super) fn numbers(&self) -> Vec<(&Statement, Literal)> {
        let literals = self.solved.tree.expressions.iter().filter_map(|expr| match &expr.kind {
            ExprKind::Number(literal) => Some(*literal),
            _ => None,
        });
        literals
            .filter_map(|literal| {
                let statement = self
                    .statements()
                    .iter()
                    .find(|statement| statement.span.start <= literal.span.start && literal.span.end <= statement.span.end)?;
                Some((statement, literal))
            })
            .collect()
    }

    /// Every unit that is written, with its statement; those behind `±` left out.
    pub(super) fn units(&self) -> Vec<(&Statement, UnitText)> {
        let mut units: Vec<(&Statement, UnitText)> =
            self.numbers().into_iter().filter_map(|(statement, literal)| Some((statement, literal.unit?))).collect();
        for statement in self.statements() {
            let here: Vec<Option<UnitText>> = match &statement.kind {
                StatementKind::Given { value, .. }
                | StatementKind::SiteAltitude { value, .. }
                | StatementKind::SitePressure { value, .. } => vec![value.unit],
                StatementKind::Reference { temperature, pressure, .. } => vec![temperature.unit, pressure.unit],
                StatementKind::Unknown { unit, .. } | StatementKind::Let { unit, .. } => vec![*unit],
                StatementKind::Answer { items } => items.iter().map(|item| item.unit).collect(),
                StatementKind::Prose { pieces } => pieces
                    .iter()
                    .map(|piece| match piece {
                        ProsePiece::Live { unit, .. } => *unit,
                        ProsePiece::Text(_) => None,
                    })
                    .collect(),
                _ => Vec::new(),
            };
            units.extend(here.into_iter().flatten().map(|unit| (statement, unit)));
        }
        units.sort_by_key(|(_, unit)| unit.span.start);
        units
    }

    /// The trade's word for the dimension of a quantity.
    pub(super) fn dimension_word(&self, name: &str) -> String {
        let sheet = &self.solved.sheet;
        sheet.find(name).map_or_else(String::new, |id| sheet.quantity(id).dimension.describe())
    }

    /// Whether a statement has a gauge pressure in it.
    pub(super) fn is_gauge(&self, statement: &Statement) -> bool {
        self.units()
            .iter()
            .any(|(holder, unit)| holder.span == statement.span && unit.basis.is_some_and(|(basis, _)| basis == Basis::Gauge))
    }
}
