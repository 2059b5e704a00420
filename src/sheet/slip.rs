//! Slips that leave a sheet solvable: what a checker would ask about. Each is a warning, and each rule is common practice
//! without a source unless one is named.

use crate::diagnostic::{Span, code};
use crate::syntax::{Basis, BinaryOp, StatementKind};
use crate::units::{self, Dimension};

use super::reader::Reader;
use super::value::folded;
use super::{Constant, Expr, ExprId, Kind, Origin, Quantity, QuantityId, RelationOrigin, TypedNumber};

/// A constant given by hand may differ from that of the species by this much before it is told: the spread of published
/// molar masses of one gas.
const SAME_CONSTANT: f64 = 1e-3;

/// Within this ratio a value given by hand is taken for that of the gas.
const MEANT_FOR_IT: f64 = 0.3;

/// The usual range of a kind of quantity in gas work, in SI, and how it is told.
struct Usual {
    dimension: Dimension,
    low: f64,
    high: f64,
    word: &'static str,
    range: &'static str,
}

const fn usual(dimension: Dimension, low: f64, high: f64, word: &'static str, range: &'static str) -> Usual {
    Usual { dimension, low, high, word, range }
}

/// Usual ranges of given values (common practice, no source).
const USUAL: [Usual; 12] = [
    usual(Dimension::TEMPERATURE, 60.0, 2000.0, "temperature", "60 K to 2000 K"),
    usual(Dimension::LENGTH, 1e-6, 1e5, "length", "1 um to 100 km"),
    usual(Dimension::AREA, 1e-9, 1e6, "area", "0.001 mm2 to 1 km2"),
    usual(Dimension::VOLUME, 1e-7, 1e6, "volume", "0.1 mL to a million m3"),
    usual(Dimension::MASS, 1e-6, 1e7, "mass", "1 mg to 10 000 t"),
    usual(Dimension::DENSITY, 1e-3, 2e4, "density", "1 g/m3 to 20 t/m3"),
    usual(Dimension::VELOCITY, 1e-5, 3e3, "velocity", "0.01 mm/s to 3 km/s"),
    usual(Dimension::MASS_FLOW, 1e-10, 1e4, "mass flow", "0.1 ug/s to 10 t/s"),
    usual(Dimension::VOLUME_FLOW, 1e-10, 1e4, "volume flow", "0.1 mm3/s to 10 000 m3/s"),
    usual(Dimension::MOLAR_MASS, 2e-3, 0.4, "molar mass", "2 g/mol to 400 g/mol"),
    usual(Dimension::DYNAMIC_VISCOSITY, 1e-6, 10.0, "viscosity", "0.001 cP to 10 Pa.s"),
    usual(Dimension::SPECIFIC_HEAT_CAPACITY, 50.0, 2e4, "specific heat capacity", "0.05 kJ/(kg.K) to 20 kJ/(kg.K)"),
];

/// Usual pressures: from vacuum, and above or below the atmosphere.
const USUAL_ABSOLUTE: Usual = usual(Dimension::PRESSURE, 1.5e3, 1e8, "absolute pressure", "15 mbar to 1000 bar");
const USUAL_GAUGE: Usual = usual(Dimension::PRESSURE, 1.5e3, 1e8, "gauge pressure", "15 mbar to 1000 bar");
const USUAL_DIFFERENCE: Usual = usual(Dimension::PRESSURE, 0.1, 1e8, "pressure difference", "0.1 Pa to 1000 bar");

/// A name without underscores, its first letter as it is, since that is the symbol (`t_e` is no `T_e`), the others small.
fn folded_name(name: &str) -> impl Iterator<Item = char> {
    let mut letters = name.chars().filter(|letter| *letter != '_');
    let symbol = letters.next();
    symbol.into_iter().chain(letters.flat_map(char::to_lowercase))
}

impl Reader<'_> {
    /// Looks for slips. Called when everything else is settled.
    pub(super) fn slips(&mut self) {
        self.unusual_sizes();
        self.unused();
        self.twins();
        self.constants_by_hand();
        self.absolutes_in_products();
        self.requirements_of_inputs();
        self.typed_numbers();
    }

    fn unusual_sizes(&mut self) {
        for at in 0..self.sheet.quantities.len() {
            let quantity = &self.sheet.quantities[at];
            let Some(reading) = &quantity.reading else { continue };
            if quantity.origin != Origin::Given
                || reading.si == 0.0
                || quantity.kind == Kind::Difference && quantity.dimension == Dimension::TEMPERATURE
            {
                continue;
            }
            let usual = if quantity.dimension == Dimension::PRESSURE {
                match quantity.shown.basis {
                    Some(Basis::Gauge) => Some(&USUAL_GAUGE),
                    Some(Basis::Difference) => Some(&USUAL_DIFFERENCE),
                    _ => Some(&USUAL_ABSOLUTE),
                }
            } else if quantity.dimension == Dimension::TEMPERATURE && quantity.kind == Kind::Either {
                // In kelvin it may be a difference: only a size that neither has is told.
                None
            } else {
                USUAL.iter().find(|usual| usual.dimension == quantity.dimension)
            };
            if let Some(finding) = self.gauge_for_absolute(QuantityId(at as u32)) {
                self.report(finding);
                continue;
            }
            let quantity = &self.sheet.quantities[at];
            let Some(reading) = &quantity.reading else { continue };
            let Some(usual) = usual else { continue };
            if reading.si.abs() < usual.low || reading.si.abs() > usual.high {
                let finding = code::unusual_size::finding(quantity.span, &quantity.name, &reading.text, usual.word, usual.range);
                self.report(finding);
            }
        }
    }

    /// An absolute pressure of a state below the atmosphere of the site, though nothing says that a vacuum is meant: the reading of a
    /// gauge, very likely.
    fn gauge_for_absolute(&self, id: QuantityId) -> Option<crate::diagnostic::Diagnostic> {
        /// Part of the pressure of the site below which a vacuum is deep, and no gauge was read.
        const DEEP: f64 = 0.1;
        /// Words by which a low pressure is meant (common practice).
        const MEANT: &[&str] = &[
            "vacuum",
            "suction",
            "evacu",
            "partial",
            "vapour",
            "vapor",
            "atmospher",
            "ambient",
            "baromet",
            "saturat",
            "air pressure",
            "negative",
        ];
        let (quantity, site) = (self.sheet.quantity(id), self.site.p_pa?);
        let reading = quantity.reading.as_ref()?;
        let is_absolute = quantity.dimension == Dimension::PRESSURE && quantity.shown.basis == Some(Basis::Absolute);
        if !is_absolute || reading.si >= site * (1.0 - super::value::WEATHER) || reading.si < DEEP * site {
            return None;
        }
        let said = format!("{} {}", quantity.description, quantity.source).to_lowercase();
        let fixes_a_state = self.sheet.relations.iter().any(|relation| {
            matches!(relation.origin, RelationOrigin::At(_, super::Property::P))
                && self.sheet.exprs.get(relation.right) == Expr::Quantity(id)
        });
        if !fixes_a_state || MEANT.iter().any(|word| said.contains(word)) {
            return None;
        }
        let kpa = |pa: f64| format!("{} kPa abs", units::write_figures(pa / 1000.0, 4));
        Some(code::unusual_size::vacuum(quantity.span, &quantity.name, &reading.text, &kpa(site), &kpa(reading.si + site)))
    }

    /// Inputs that nothing uses and results that nothing asks for.
    fn unused(&mut self) {
        let mut uses = vec![0u32; self.sheet.quantities.len()];
        let mut count = |exprs: &super::Exprs, expr: ExprId| exprs.quantities(expr, &mut |id| uses[id.0 as usize] += 1);
        for relation in &self.sheet.relations {
            count(&self.sheet.exprs, relation.right);
            if matches!(relation.origin, RelationOrigin::At(..)) {
                // What fixes a state is used by it, whichever of the two finds the other.
                count(&self.sheet.exprs, relation.right);
            }
            if relation.origin != RelationOrigin::Let {
                count(&self.sheet.exprs, relation.left);
            }
        }
        for clause in self.sheet.assumptions.iter().chain(&self.sheet.requirements).chain(&self.sheet.cautions) {
            if let Some(condition) = &clause.condition {
                condition.sides(&mut |side| count(&self.sheet.exprs, side));
            }
        }
        for quantity in &self.sheet.quantities {
            for bound in [quantity.low, quantity.high, quantity.near].into_iter().flatten() {
                count(&self.sheet.exprs, bound);
            }
        }
        for answer in &self.sheet.answers {
            uses[answer.quantity.0 as usize] += 1;
        }
        for live in &self.sheet.live_values {
            uses[live.quantity.0 as usize] += 1;
        }
        for correlation in &self.sheet.correlations {
            uses[correlation.a.0 as usize] += 1;
            uses[correlation.b.0 as usize] += 1;
        }
        for (at, n_uses) in uses.iter().enumerate() {
            let quantity = &self.sheet.quantities[at];
            // An unknown stands in the relation that finds it.
            let asked = *n_uses > u32::from(quantity.origin == Origin::Unknown);
            if asked || self.poisoned[at] {
                continue;
            }
            match quantity.origin {
                Origin::Given => self.findings.push(code::unused_input::finding(quantity.span, &quantity.name)),
                Origin::Let | Origin::Unknown => self.findings.push(code::unused_input::result(quantity.span, &quantity.name)),
                _ => {}
            }
        }
    }

    /// Names that differ only in underscores or, behind their symbol, in case: `T_e` and `Te`, `Te` and `TE`.
    fn twins(&mut self) {
        let declared = |quantity: &Quantity| matches!(quantity.origin, Origin::Given | Origin::Unknown | Origin::Let);
        let mut names: Vec<QuantityId> =
            (0..self.sheet.quantities.len() as u32).map(QuantityId).filter(|id| declared(self.sheet.quantity(*id))).collect();
        let folded = |id: &QuantityId| folded_name(&self.sheet.quantity(*id).name);
        names.sort_by(|a, b| folded(a).cmp(folded(b)).then(a.cmp(b)));
        let mut twins = Vec::new();
        for pair in names.windows(2) {
            let [a, b] = pair else { continue };
            if folded(a).eq(folded(b)) && self.are_twins(*a, *b) {
                twins.push((*a, *b));
            }
        }
        for (a, b) in twins {
            let (a, b) = (self.sheet.quantity(a), self.sheet.quantity(b));
            let finding = code::twin_names::finding(b.span, &b.name, &a.name, a.span);
            self.report(finding);
        }
    }

    /// Whether two names that are alike but for underscores and case look like one. A capital behind an underscore is an index of its
    /// own (`q_n` and `q_N`), and so is one of a quantity of another kind.
    fn are_twins(&self, a: QuantityId, b: QuantityId) -> bool {
        let (a, b) = (self.sheet.quantity(a), self.sheet.quantity(b));
        let same_case = a.name.replace('_', "") == b.name.replace('_', "");
        same_case || a.dimension == b.dimension && !(a.name.contains('_') && b.name.contains('_'))
    }

    /// Molar masses and gas constants given by hand for a gas that the sheet names.
    fn constants_by_hand(&mut self) {
        let mut findings = Vec::new();
        for quantity in &self.sheet.quantities {
            let (Origin::Given, Some(reading)) = (quantity.origin, &quantity.reading) else { continue };
            let mut known: Vec<(String, f64)> = Vec::new();
            if quantity.dimension == Dimension::MOLAR_MASS {
                known.extend(self.sheet.gases.iter().map(|gas| (format!("{}.M", gas.name), gas.gas.molar_mass_kg_mol())));
            } else if quantity.dimension == Dimension::SPECIFIC_HEAT_CAPACITY {
                known.extend(self.sheet.gases.iter().map(|gas| (format!("{}.R", gas.name), gas.gas.gas_constant_j_kg_k())));
            } else if quantity.dimension == Dimension::MOLAR_HEAT_CAPACITY {
                known.push(("R".to_owned(), Constant::MolarGasConstant.value()));
            }
            let off = |value: f64| (reading.si / value - 1.0).abs();
            let nearest = known.iter().min_by(|a, b| off(a.1).total_cmp(&off(b.1)));
            let Some((owner, value)) = nearest else { continue };
            // Among heat capacities only one close to the gas constant is meant for it: cp and cv are larger.
            if off(*value) > SAME_CONSTANT
                && off(*value) < if quantity.dimension == Dimension::MOLAR_MASS { MEANT_FOR_IT } else { MEANT_FOR_IT / 3.0 }
            {
                let shown = format!("{} {}", units::write_figures(quantity.shown.unit.from_si(*value), 5), quantity.shown.unit.name);
                let percent = units::write_figures(100.0 * off(*value), 2);
                findings.push(code::constant_by_hand::finding(quantity.span, &quantity.name, &reading.text, owner, &shown, &percent));
            }
        }
        self.findings.extend(findings);
    }

    /// Literals in degC or degF as factors. Beside a gas constant they are temperatures and meant so.
    fn absolutes_in_products(&mut self) {
        let mut found: Vec<(Span, f64)> = Vec::new();
        for at in 0..self.sheet.relations.len() {
            let relation = &self.sheet.relations[at];
            for side in [relation.left, relation.right] {
                let mut constant = false;
                self.sheet.exprs.quantities(side, &mut |id| {
                    let quantity = self.sheet.quantity(id);
                    constant |= matches!(quantity.origin, Origin::GasConstant(_)) || quantity.dimension == Dimension::MOLAR_HEAT_CAPACITY;
                });
                self.factors(side, false, constant, &mut found);
            }
        }
        for (span, kelvin) in found {
            let text = folded(span.of(self.text));
            let number = text.split(' ').next().unwrap_or("").to_owned();
            let finding =
                code::absolute_in_product::finding(span, &text, &format!("{} K", units::write_figures(kelvin, 5)), &format!("{number} K"));
            self.report(finding);
        }
    }

    fn factors(&self, expr: ExprId, in_product: bool, constant: bool, found: &mut Vec<(Span, f64)>) {
        match self.sheet.exprs.get(expr) {
            Expr::Number(si, literal) if in_product && !constant => {
                if self
                    .literals
                    .get(literal as usize)
                    .is_some_and(|info| info.dimension == Dimension::TEMPERATURE && info.kind == Kind::Absolute)
                    && let Some(span) = self.sheet.span_of(expr)
                {
                    found.push((span, si));
                }
            }
            Expr::Constant(Constant::MolarGasConstant | Constant::Boltzmann) => {}
            Expr::Binary(BinaryOp::Multiply, a, b) => {
                let constant = constant || [a, b].into_iter().any(|side| self.holds_gas_constant(side));
                self.factors(a, true, constant, found);
                self.factors(b, true, constant, found);
            }
            _ => {
                for part in self.sheet.exprs.parts(expr) {
                    self.factors(part, false, constant, found);
                }
            }
        }
    }

    fn holds_gas_constant(&self, expr: ExprId) -> bool {
        match self.sheet.exprs.get(expr) {
            Expr::Constant(Constant::MolarGasConstant | Constant::Boltzmann) => true,
            Expr::Binary(BinaryOp::Multiply | BinaryOp::Divide, a, b) => self.holds_gas_constant(a) || self.holds_gas_constant(b),
            _ => false,
        }
    }

    /// Requirements in which inputs alone are compared.
    fn requirements_of_inputs(&mut self) {
        let mut findings = Vec::new();
        for clause in &self.sheet.requirements {
            let Some(condition) = &clause.condition else { continue };
            let mut results = false;
            condition.sides(&mut |side| {
                self.sheet.exprs.quantities(side, &mut |id| {
                    let quantity = self.sheet.quantity(id);
                    results |= !quantity.is_known() && quantity.origin != Origin::SitePressure;
                });
            });
            if !results {
                findings.push(code::requirement_decides_nothing::no_unknown(clause.span));
            }
        }
        self.findings.extend(findings);
    }

    /// Numbers in prose that stand beside the name of a quantity: `p_1 = 9.6 bar gauge`, `m is 28.2 kg`.
    fn typed_numbers(&mut self) {
        for at in 0..self.tree.statements.len() {
            let statement = &self.tree.statements[at];
            if !matches!(statement.kind, StatementKind::Prose { .. }) {
                continue;
            }
            let prose = statement.span.of(self.text);
            let mut from = 0;
            while let Some(offset) = prose.get(from..).and_then(|rest| rest.find(|c: char| c.is_ascii_alphabetic())) {
                let start = from + offset;
                let rest = &prose[start..];
                let end = start + rest.find(|c: char| !(c.is_ascii_alphanumeric() || c == '_' || c == '.')).unwrap_or(rest.len());
                let word = prose[start..end].trim_end_matches('.');
                let before = prose[..start].chars().next_back();
                let inside = prose[..start].matches('{').count() > prose[..start].matches('}').count();
                from = end.max(start + 1);
                if inside || before.is_some_and(|c| c.is_alphanumeric() || c == '_') {
                    continue;
                }
                let Some(id) = self.sheet.find(word) else { continue };
                if let Some((number, length)) = self.typed_number(id, &prose[start + word.len()..]) {
                    let begin = statement.span.start as usize + start;
                    let span = Span::new(begin, begin + word.len() + length);
                    self.sheet.typed_numbers.push(TypedNumber { statement: at, span, ..number });
                }
            }
        }
    }

    /// The number behind a name in prose, and how long the text up to its end is.
    fn typed_number(&self, id: QuantityId, behind: &str) -> Option<(TypedNumber, usize)> {
        let quantity = self.sheet.quantity(id);
        let mut rest = behind.trim_start_matches(['*', '`', '_', '$']).trim_start();
        let connector = ["=", "≈", "is", "of", ":"].into_iter().find(|connector| rest.starts_with(connector))?;
        rest = rest[connector.len()..].trim_start();
        let mut digits_end = rest.find(|c: char| !(c.is_ascii_digit() || c == '.' || c == '-' || c == '−')).unwrap_or(rest.len());
        // `2.6e-5`
        if let Some(exponent) = rest[digits_end..].strip_prefix(['e', 'E']) {
            let sign = exponent.chars().next().filter(|c| matches!(c, '-' | '+' | '−')).map_or(0, char::len_utf8);
            let figures = exponent[sign..].bytes().take_while(u8::is_ascii_digit).count();
            if digits_end > 0 && figures > 0 {
                digits_end += 1 + sign + figures;
            }
        }
        let digits = rest[..digits_end].trim_end_matches('.');
        let value: f64 = digits.replace('−', "-").parse().ok()?;
        let after = &rest[digits.len()..];
        let (unit, unit_length) = if quantity.dimension.is_none() && !after.trim_start().starts_with('%') {
            (units::Unit::pure(), 0)
        } else {
            let blanks = after.len() - after.trim_start().len();
            let token = after.trim_start();
            let end = token.find(|c: char| c.is_whitespace() || ",;)*".contains(c)).unwrap_or(token.len());
            let word = token[..end].trim_end_matches('.');
            (self.with_references(units::parse(word).ok()?).ok()?, blanks + word.len())
        };
        if unit.dimension != quantity.dimension {
            return None;
        }
        let next = after.get(unit_length..).unwrap_or("").trim_start();
        let gauge = next.starts_with("gauge") || (quantity.shown.basis == Some(Basis::Gauge) && !next.starts_with("abs"));
        let unit = if quantity.kind == Kind::Difference { unit.interval() } else { unit };
        let length = behind.len() - rest.len() + digits.len() + unit_length;
        let text = folded(&rest[..digits.len() + unit_length]);
        let half_width_si = 0.5 * units::math::pow(10.0, f64::from(units::last_place_written(digits))) * unit.factor;
        Some((TypedNumber { statement: 0, span: Span::default(), quantity: id, si: unit.to_si(value), gauge, half_width_si, text }, length))
    }
}
