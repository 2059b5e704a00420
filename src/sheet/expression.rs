//! Lowers expressions: names become quantities, literals become SI numbers.

use crate::diagnostic::{Span, code, nearest};
use crate::gas::saturation::has_saturation_line;
use crate::syntax::{self, BinaryOp, ExprKind, Function, Literal, Path, Within};
use crate::units::Unit;

use super::reader::{LiteralInfo, Meaning, Reader};
use super::value::folded;
use super::{Constant, Expr, ExprId, GasFunction, GasId, GasModel, Kind, Origin, Property, QuantityId, ShownLiteral, ShownUnit, StateId};

/// The constants of the language.
const CONSTANTS: [(&str, Constant); 5] = [
    ("pi", Constant::Pi),
    ("R", Constant::MolarGasConstant),
    ("N_A", Constant::Avogadro),
    ("k_B", Constant::Boltzmann),
    ("g_n", Constant::StandardGravity),
];

/// Whether a word is a constant of the language.
pub(super) fn is_constant(word: &str) -> bool {
    CONSTANTS.iter().any(|(constant, _)| *constant == word)
}

/// The constants that a gas offers as fields.
const GAS_FIELDS: [&str; 4] = ["M", "R", "T_c", "p_c"];

/// The functions that a gas with a saturation line offers, and what each takes.
const GAS_FUNCTIONS: [(&str, GasFunction, &str); 2] =
    [("p_sat", GasFunction::SaturationPressure, "the temperature"), ("T_sat", GasFunction::SaturationTemperature, "the pressure")];

/// What the site offers.
const SITE_FIELDS: [&str; 2] = ["p", "altitude"];

/// What a path stands for in an expression.
pub(super) enum Target {
    Quantity(QuantityId),
    Constant(Constant),
}

impl Reader<'_> {
    /// Adds an expression that stands at `span`.
    pub(super) fn expr(&mut self, expr: Expr, span: Span) -> ExprId {
        self.sheet.expr_spans.push(span);
        self.sheet.exprs.add(expr)
    }

    /// Lowers an expression; `None` where a part of it is in error, which is told, or hangs on a line in error. All parts
    /// are looked at, so that all errors of a line come in one run.
    pub(super) fn lower(&mut self, id: syntax::ExprId) -> Option<ExprId> {
        let tree = self.tree;
        let expr = tree.expr(id);
        let span = expr.span;
        match &expr.kind {
            ExprKind::Bad => None,
            ExprKind::Number(literal) => self.literal(literal),
            ExprKind::Name(path) => match self.target(path)? {
                Target::Constant(constant) => Some(self.expr(Expr::Constant(constant), span)),
                Target::Quantity(quantity) => Some(self.expr(Expr::Quantity(quantity), span)),
            },
            ExprKind::Negate(inner) => {
                let inner = self.lower(*inner)?;
                Some(self.expr(Expr::Negate(inner), span))
            }
            ExprKind::Binary(op, left, right) => {
                let (left, right) = (self.lower(*left), self.lower(*right));
                self.both(left, right).map(|(left, right)| self.expr(Expr::Binary(*op, left, right), span))
            }
            ExprKind::Call(function, _, arguments) => self.call(*function, arguments, span),
            ExprKind::CallPath(path, arguments) => {
                let lowered: Vec<Option<ExprId>> = arguments.iter().map(|argument| self.lower(*argument)).collect();
                let function = self.saturation_function(path, arguments.len());
                match (function, lowered.as_slice()) {
                    (Some((function, gas)), [Some(argument)]) => Some(self.expr(Expr::Gas(function, gas, *argument), span)),
                    _ => {
                        for argument in lowered.into_iter().flatten() {
                            self.poison_below(argument);
                        }
                        None
                    }
                }
            }
        }
    }

    /// Both sides, or the poison of one spread over the other.
    pub(super) fn both(&mut self, left: Option<ExprId>, right: Option<ExprId>) -> Option<(ExprId, ExprId)> {
        match (left, right) {
            (Some(left), Some(right)) => Some((left, right)),
            (Some(one), None) | (None, Some(one)) => {
                self.poison_below(one);
                None
            }
            (None, None) => None,
        }
    }

    fn call(&mut self, function: Function, arguments: &[syntax::ExprId], span: Span) -> Option<ExprId> {
        let lowered: Vec<Option<ExprId>> = arguments.iter().map(|argument| self.lower(*argument)).collect();
        if lowered.iter().any(Option::is_none) {
            for argument in lowered.into_iter().flatten() {
                self.poison_below(argument);
            }
            return None;
        }
        let lowered: Vec<ExprId> = lowered.into_iter().flatten().collect();
        let several = matches!(function, Function::Min | Function::Max);
        match lowered.as_slice() {
            [one] if !several => Some(self.expr(Expr::Call(function, *one, None), span)),
            [first, rest @ ..] if several && !rest.is_empty() => {
                Some(rest.iter().fold(*first, |before, next| self.expr(Expr::Call(function, before, Some(*next)), span)))
            }
            _ => {
                let (takes, example) = if several { ("two or more arguments", "(a, b)") } else { ("one argument", "(x)") };
                let word = function.word();
                self.report(
                    crate::diagnostic::Diagnostic::error(code::bad_line::CODE, span, format!("`{word}` takes {takes}"))
                        .label(format!("{} given", lowered.len()))
                        .help(format!("write `{word}{example}`")),
                );
                None
            }
        }
    }

    /// A written number.
    fn literal(&mut self, literal: &Literal) -> Option<ExprId> {
        let value = self.value(literal, "")?;
        let number = Span { start: literal.span.start, end: literal.digits.end }.of(self.text);
        self.sheet
            .literals
            .push(ShownLiteral { number: folded(number).replace(['−', ' '], "-").replace("--", "-"), unit: value.shown.text() });
        self.literals.push(LiteralInfo {
            dimension: value.shown.unit.dimension,
            kind: value.kind,
            gauge: value.gauge,
            unit: literal.unit.map(|unit| unit.span),
        });
        let at = self.sheet.literals.len() as u32 - 1;
        let number = self.expr(Expr::Number(value.si, at), literal.span);
        if !value.gauge {
            return Some(number);
        }
        let site = self.sheet.site_pressure?;
        let site = self.expr(Expr::Quantity(site), literal.span);
        Some(self.expr(Expr::Binary(BinaryOp::Add, number, site), literal.span))
    }

    /// What a path stands for; `None` where it stands for nothing, which is told, or for something in error.
    pub(super) fn target(&mut self, path: &Path) -> Option<Target> {
        let tree = self.tree;
        let base = tree.names.text(path.base.name);
        if base == "site" {
            return self.site_field(path).map(Target::Quantity);
        }
        if path.field.is_none()
            && let Some((_, constant)) = CONSTANTS.iter().find(|(word, _)| *word == base)
        {
            return Some(Target::Constant(*constant));
        }
        let meaning = self.names.get(&path.base.name).map(|(meaning, _)| *meaning);
        match (meaning, path.field) {
            (None, _) => {
                let near = self.near_names(base);
                let near: Vec<&str> = near.iter().map(String::as_str).collect();
                self.report(code::unknown_name::finding(path.base.span, base, &near));
                // A declaration that is missing is one mistake, however often its name stands.
                self.names.insert(path.base.name, (Meaning::Poisoned, path.base.span));
                None
            }
            (Some(Meaning::Poisoned), _) => None,
            (Some(Meaning::Quantity(id)), None) => (!self.poisoned[id.0 as usize]).then_some(Target::Quantity(id)),
            (Some(Meaning::Quantity(_)), Some(field)) => {
                self.report(code::unknown_field::of_quantity(field.span, base, tree.names.text(field.name)));
                None
            }
            (Some(Meaning::Gas(_)), None) => {
                self.report(code::unknown_name::not_a_quantity(path.base.span, base, "gas", &format!("`{base}.M`, `{base}.R`")));
                None
            }
            (Some(Meaning::State(_)), None) => {
                self.report(code::unknown_name::not_a_quantity(
                    path.base.span,
                    base,
                    "state",
                    &format!("`{base}.p`, `{base}.T`, `{base}.rho`"),
                ));
                None
            }
            (Some(Meaning::Gas(gas)), Some(field)) => {
                self.gas_field(gas, base, tree.names.text(field.name), field.span).map(Target::Quantity)
            }
            (Some(Meaning::State(state)), Some(field)) => {
                if self.poisoned_states[state.0 as usize] {
                    return None;
                }
                let word = tree.names.text(field.name);
                let property = self.property_of(base, word, field.span)?;
                let gas = self.sheet.gases.get(self.sheet.state(state).gas.0 as usize);
                if property.is_moisture() && gas.is_some_and(|gas| !matches!(gas.model, GasModel::HumidAir(_))) {
                    let near = nearest(word, Property::ROWS.iter().filter(|row| !row.property.is_moisture()).map(|row| row.field));
                    let offers = "`p T v rho h u s cp cv k w Z mu lambda`; only humid air has `RH T_dew W`";
                    self.report(code::unknown_field::finding(field.span, base, "state", word, &near, offers));
                    return None;
                }
                Some(Target::Quantity(self.property(state, property)))
            }
        }
    }

    /// The function that a path with arguments stands for: one that a gas with a saturation line offers.
    fn saturation_function(&mut self, path: &Path, n_arguments: usize) -> Option<(GasFunction, GasId)> {
        let tree = self.tree;
        let word = tree.names.text(path.base.name);
        let Some(field) = path.field else {
            let near = nearest(word, Function::ALL.iter().map(|function| function.word()));
            self.report(code::unknown_name::function(path.base.span, word, &near));
            return None;
        };
        let gas = match self.names.get(&path.base.name).map(|(meaning, _)| *meaning) {
            Some(Meaning::Gas(gas)) => gas,
            Some(Meaning::Poisoned) => return None,
            Some(other) => {
                self.report(code::unknown_field::no_function(path.span(), word, other.word()));
                return None;
            }
            None => {
                // Told as any other name that is missing.
                self.target(&Path { base: path.base, field: None });
                return None;
            }
        };
        let field_text = tree.names.text(field.name);
        let Some((_, function, argument)) = GAS_FUNCTIONS.into_iter().find(|(known, ..)| *known == field_text) else {
            let near = nearest(field_text, GAS_FUNCTIONS.into_iter().map(|(known, ..)| known));
            self.report(code::unknown_field::finding(
                field.span,
                word,
                "gas",
                field_text,
                &near,
                "the functions `p_sat(T)` and `T_sat(p)`",
            ));
            return None;
        };
        if n_arguments != 1 {
            self.report(code::argument_count::finding(path.span(), field_text, &format!("one argument, {argument}")));
            return None;
        }
        let entry = self.sheet.gas(gas);
        if !entry.gas.species().is_some_and(has_saturation_line) {
            let title = if matches!(entry.model, GasModel::HumidAir(_)) { "humid air".to_owned() } else { entry.gas.title() };
            self.report(code::no_gas_data::saturation(path.span(), &title));
            return None;
        }
        Some((function, gas))
    }

    fn near_names(&mut self, word: &str) -> Vec<String> {
        // A sheet of very many names and errors was written by a program: guessing for each would cost their product.
        let cost = self.names.len();
        if cost > self.comparisons_left {
            return Vec::new();
        }
        self.comparisons_left -= cost;
        let mut known: Vec<&str> = self.names.keys().map(|name| self.tree.names.text(*name)).collect();
        known.sort_unstable();
        known.extend(CONSTANTS.iter().map(|(word, _)| *word));
        nearest(word, known).into_iter().map(str::to_owned).collect()
    }

    fn site_field(&mut self, path: &Path) -> Option<QuantityId> {
        let field = path.field.map_or("", |field| self.tree.names.text(field.name));
        if field != "p" && field != "altitude" {
            self.report(code::unknown_field::finding(
                path.span(),
                "site",
                "site",
                field,
                &nearest(field, SITE_FIELDS),
                "`site.p`, `site.altitude`",
            ));
            return None;
        }
        if !self.site.stated {
            if !std::mem::replace(&mut self.site.told, true) {
                self.report(code::gauge_without_site::finding(path.span()));
            }
            return None;
        }
        let origin = if field == "p" { Origin::SitePressure } else { Origin::SiteAltitude };
        self.sheet.quantities.iter().position(|quantity| quantity.origin == origin).map(|at| QuantityId(at as u32))
    }

    fn gas_field(&mut self, gas: GasId, owner: &str, field: &str, span: Span) -> Option<QuantityId> {
        let Some(field) = GAS_FIELDS.into_iter().find(|known| *known == field) else {
            let near = nearest(field, GAS_FIELDS);
            self.report(code::unknown_field::finding(span, owner, "gas", field, &near, "`M`, `R`, `T_c`, `p_c`"));
            return None;
        };
        let id = self.gas_constant(gas, field);
        if id.is_none() {
            let offers = if matches!(self.sheet.gas(gas).model, GasModel::HumidAir(_)) {
                "nothing here: `M` and `R` of humid air change with its moisture"
            } else {
                "`M` and `R`; its critical point is not known here"
            };
            self.report(code::unknown_field::finding(span, owner, "gas", field, &[], offers));
        }
        id
    }

    /// The quantity of a constant of a gas.
    pub(super) fn gas_constant(&mut self, gas: GasId, field: &'static str) -> Option<QuantityId> {
        if let Some(id) = self.gas_constants.get(&(gas, field)) {
            return Some(*id);
        }
        let entry = self.sheet.gas(gas);
        let [molar_mass, gas_constant, t_c, p_c] = match &entry.model {
            GasModel::Real(real) => {
                let (t_c, p_c) = real.critical_point().unzip();
                [Some(real.molar_mass_kg_mol()), Some(real.gas_constant_j_kg_k()), t_c, p_c]
            }
            GasModel::Ideal => [
                Some(entry.gas.molar_mass_kg_mol()),
                Some(entry.gas.gas_constant_j_kg_k()),
                entry.gas.critical_temperature().map(|t| t.value),
                entry.gas.critical_pressure().map(|p| p.value),
            ],
            // Both change with the moisture, from state to state.
            GasModel::HumidAir(_) => [None; 4],
        };
        let (value, si, shown, word) = match field {
            "M" => (molar_mass, crate::units::Dimension::MOLAR_MASS, "g/mol", "Molar mass"),
            "R" => (gas_constant, crate::units::Dimension::SPECIFIC_HEAT_CAPACITY, "J/(kg.K)", "Gas constant"),
            "T_c" => (t_c, crate::units::Dimension::TEMPERATURE, "K", "Critical temperature"),
            _ => (p_c, crate::units::Dimension::PRESSURE, "Pa", "Critical pressure"),
        };
        let value = value?;
        let (name, statement, title) = (format!("{}.{field}", entry.name), entry.statement, entry.gas.title());
        let kept = std::mem::replace(&mut self.statement, statement);
        let declaration = &self.tree.statements[statement];
        let id = self.quantity(name, Origin::GasConstant(gas), declaration, declaration.span);
        self.statement = kept;
        let quantity = &mut self.sheet.quantities[id.0 as usize];
        quantity.description = format!("{word} of {title}");
        quantity.source = String::new();
        quantity.dimension = si;
        quantity.constant = Some(value);
        quantity.kind = if field == "T_c" || field == "p_c" { Kind::Absolute } else { Kind::Plain };
        quantity.shown = ShownUnit {
            unit: crate::units::parse(shown).unwrap_or_else(|_| Unit::pure()),
            basis: (field == "p_c").then_some(syntax::Basis::Absolute),
        };
        self.gas_constants.insert((gas, field), id);
        Some(id)
    }

    /// The property of a field, told where there is none.
    pub(super) fn property_of(&mut self, owner: &str, field: &str, span: Span) -> Option<Property> {
        match Property::of_field(field) {
            Some(property) => Some(property),
            None => {
                let near = nearest(field, Property::ROWS.iter().map(|row| row.field));
                self.report(code::unknown_field::finding(span, owner, "state", field, &near, "`p T v rho h u s cp cv k w Z mu lambda`"));
                None
            }
        }
    }

    /// The quantity of a property of a state.
    pub(super) fn property(&mut self, state: StateId, property: Property) -> QuantityId {
        if let Some(id) = self.properties.get(&(state, property)) {
            return *id;
        }
        let entry = self.sheet.state(state);
        let (name, statement, span) = (format!("{}.{}", entry.name, property.row().field), entry.statement, entry.span);
        let title = self.tree.statements[statement].description.as_ref().map_or(String::new(), |text| format!(": {}", text.text));
        let word = property.row().word;
        let kept = std::mem::replace(&mut self.statement, statement);
        let id = self.quantity(name, Origin::Property(state, property), &self.tree.statements[statement], span);
        self.statement = kept;
        let quantity = &mut self.sheet.quantities[id.0 as usize];
        let mut word = word.to_owned();
        if let Some(first) = word.get_mut(..1) {
            first.make_ascii_uppercase();
        }
        quantity.description = format!("{word}{title}");
        quantity.source = String::new();
        quantity.dimension = property.row().dimension;
        quantity.kind = if property.is_absolute() { Kind::Absolute } else { Kind::Plain };
        quantity.shown = super::value::si_unit(quantity.dimension, quantity.kind);
        self.properties.insert((state, property), id);
        id
    }

    /// `within` and `near`.
    pub(super) fn bounds(&mut self, id: QuantityId, within: Option<&Within>, near: Option<syntax::ExprId>) {
        let lower = |reader: &mut Self, expr: Option<syntax::ExprId>| -> Option<ExprId> {
            let span = reader.tree.expr(expr?).span;
            let Some(lowered) = reader.lower(expr?) else {
                reader.poisoned[id.0 as usize] = true;
                return None;
            };
            let mut unknown = None;
            reader
                .sheet
                .exprs
                .quantities(lowered, &mut |below| unknown = unknown.or((!reader.sheet.quantity(below).is_known()).then_some(below)));
            if let Some(unknown) = unknown.filter(|unknown| Some(*unknown) != reader.sheet.site_pressure) {
                let (name, other) = (reader.sheet.quantity(id).name.clone(), reader.sheet.quantity(unknown).name.clone());
                reader.report(code::bounds_out_of_place::finding(span, &name, &format!("`{other}` is not given")));
                return None;
            }
            Some(lowered)
        };
        let low = lower(self, within.and_then(|within| within.low));
        let high = lower(self, within.and_then(|within| within.high));
        let near = lower(self, near);
        let entry = &mut self.sheet.quantities[id.0 as usize];
        (entry.low, entry.high, entry.near) = (low, high, near);
        if let Some(within) = within {
            entry.bounds_span = within.span;
        }
    }
}
