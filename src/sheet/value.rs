//! Values: numbers with their units and bases in SI, stated uncertainties, the site, reference conditions.

use crate::diagnostic::{Span, code};
use crate::gas;
use crate::syntax::{Basis, Literal, Named, ReferenceName, Shape, Statement, StatementKind, Uncertainty, UnitText, Width};
use crate::units::constants::MOLAR_GAS_CONSTANT;
use crate::units::{self, Dimension, ReferenceVolume, Unit, UnitErrorKind, math};

use super::expression::is_constant;
use super::reader::{Meaning, Reader};
use super::{Expr, Kind, Origin, QuantityId, Reading, ReferenceConditions, RelationOrigin, ShownUnit, StatedUncertainty};

/// Pressure of a place against the standard atmosphere of its altitude: beyond this the two are told to contradict each
/// other. Weather moves a barometer by some 3 % about its mean (common practice, no source).
pub(super) const WEATHER: f64 = 0.04;

/// A number with its unit and basis in SI.
#[derive(Clone, Debug)]
pub(super) struct Value {
    /// In SI; above the atmosphere of the site where `gauge`.
    pub(super) si: f64,
    pub(super) gauge: bool,
    pub(super) kind: Kind,
    pub(super) shown: ShownUnit,
}

impl Reader<'_> {
    /// The unit of a token, with reference conditions in its factor; `None` where it is in error, which is told.
    pub(super) fn unit(&mut self, token: Span) -> Option<Unit> {
        let text = token.of(self.text);
        let unit = match units::parse(text) {
            Ok(unit) => unit,
            Err(error) => {
                let offset = token.start as usize + error.offset;
                let place = Span::new(offset, offset + error.len);
                let finding = match &error.kind {
                    UnitErrorKind::Unknown { word, near, help, cure } => {
                        let names_a_quantity =
                            self.tree.names.find(text).is_some_and(|name| self.names.contains_key(&name) || self.is_declared(name));
                        let owner = text.split_once('.').and_then(|(owner, _)| self.tree.names.find(owner));
                        let names_a_field =
                            owner.is_some_and(|owner| matches!(self.names.get(&owner), Some((Meaning::Gas(_) | Meaning::State(_), _))));
                        if names_a_quantity || names_a_field || is_constant(text) {
                            code::unknown_unit::missing_multiplication(token, text, self.number_before(token))
                        } else {
                            let finding = code::unknown_unit::finding(place, word, near, help.as_deref());
                            match cure {
                                Some(cure) => {
                                    let basis = cure.basis.filter(|_| !self.has_basis_behind(token));
                                    code::unknown_unit::cured(finding, place, &cure.unit, basis, cure.certain)
                                }
                                None => finding,
                            }
                        }
                    }
                    UnitErrorKind::Power { .. } => code::power_too_high::unit(token, text),
                    UnitErrorKind::Syntax(why) => code::unknown_unit::unreadable(place, &cut(text), why),
                    UnitErrorKind::TooDeep => code::unknown_unit::unreadable(token, &cut(text), "its brackets are nested too deep"),
                    UnitErrorKind::TooLong => code::unknown_unit::unreadable(token, &cut(text), "it is too long"),
                };
                self.report(finding);
                return None;
            }
        };
        match self.with_references(unit) {
            Ok(unit) => Some(unit),
            Err(volume) => {
                let (at, which) = match volume {
                    ReferenceVolume::Normal => (0, "normal"),
                    ReferenceVolume::Standard => (1, "standard"),
                    ReferenceVolume::Scf => (2, "standard"),
                };
                if !std::mem::replace(&mut self.references_missing[at], true) {
                    self.report(code::reference_missing::finding(token, volume.word(), which));
                }
                None
            }
        }
    }

    /// The unit with the reference conditions of its reference volumes in its factor, or the volume that has none.
    pub(super) fn with_references(&self, mut unit: Unit) -> Result<Unit, ReferenceVolume> {
        let [normal, standard, scf] = self.sheet.references;
        for (volume, power) in std::mem::take(&mut unit.references) {
            let conditions = match volume {
                ReferenceVolume::Normal => normal,
                ReferenceVolume::Standard => standard,
                ReferenceVolume::Scf => scf.or(standard),
            };
            let conditions = conditions.ok_or(volume)?;
            let moles_per_volume = conditions.p_pa / (MOLAR_GAS_CONSTANT * conditions.t_k);
            unit.factor *= math::pow(moles_per_volume, power.to_f64());
        }
        Ok(unit)
    }

    fn has_basis_behind(&self, token: Span) -> bool {
        let next = self.text.get(token.end as usize..).unwrap_or("").split_whitespace().next();
        matches!(next, Some("abs" | "gauge" | "diff"))
    }

    fn is_declared(&self, name: crate::syntax::Name) -> bool {
        self.tree.statements.iter().any(|statement| match &statement.kind {
            StatementKind::Given { name: declared, .. }
            | StatementKind::Unknown { name: declared, .. }
            | StatementKind::Let { name: declared, .. } => declared.name == name,
            _ => false,
        })
    }

    fn number_before(&self, token: Span) -> &str {
        let before = self.text.get(..token.start as usize).unwrap_or("").trim_end();
        let from = before.rfind(|c: char| !(c.is_ascii_digit() || ".eE+-".contains(c))).map_or(0, |at| at + 1);
        before.get(from..).map_or("…", |number| number.rsplit(['+', '-']).next().unwrap_or(number))
    }

    /// Whether the basis behind a unit is there and fits; tells where not. `needed` for values and shown units.
    fn basis(&mut self, text: UnitText, unit: &Unit, needed: bool) -> Option<Option<Basis>> {
        let pressure = unit.needs_basis();
        let temperature = unit.dimension == Dimension::TEMPERATURE;
        match text.basis {
            Some((basis, span)) if !(pressure || temperature && basis == Basis::Difference) => {
                let dimension = unit.dimension.describe();
                self.report(code::basis_out_of_place::finding(span, basis.word(), &dimension));
                None
            }
            None if pressure && needed => {
                let finding = code::pressure_without_basis::finding(text.span, text.span.of(self.text), None);
                self.report(finding);
                None
            }
            basis => Some(basis.map(|(basis, _)| basis)),
        }
    }

    /// A unit behind `in`.
    pub(super) fn shown_unit(&mut self, text: UnitText) -> Option<ShownUnit> {
        let unit = self.unit(text.span)?;
        let basis = self.basis(text, &unit, true)?;
        if basis == Some(Basis::Gauge) {
            self.gauge(text.whole())?;
        }
        let unit = if basis == Some(Basis::Difference) { unit.interval() } else { unit };
        Some(ShownUnit { unit, basis })
    }

    /// Tells once that a gauge pressure needs a site; `None` where it has none.
    fn gauge(&mut self, span: Span) -> Option<()> {
        if self.site.stated {
            // A site line in error has its own finding.
            return self.site.p_pa.map(|_| ());
        }
        if !std::mem::replace(&mut self.site.told, true) {
            self.report(code::gauge_without_site::finding(span));
        }
        None
    }

    /// Absolute or difference, as a shown unit says it.
    pub(super) fn kind_of_shown(&self, shown: &ShownUnit) -> Kind {
        kind_of(&shown.unit, shown.basis)
    }

    /// A number with its unit, in SI. `owner` names it in findings (" of `T_1`"), empty for a number in a relation.
    pub(super) fn value(&mut self, literal: &Literal, owner: &str) -> Option<Value> {
        if !literal.value.is_finite() || (literal.value == 0.0 && is_nonzero(literal.digits.of(self.text))) {
            let finding = code::number_out_of_range::finding(literal.digits, &cut(literal.digits.of(self.text)));
            self.report(finding);
            return None;
        }
        let Some(text) = literal.unit else {
            return Some(Value {
                si: literal.value,
                gauge: false,
                kind: Kind::Plain,
                shown: ShownUnit { unit: Unit::pure(), basis: None },
            });
        };
        let unit = self.unit(text.span)?;
        if unit.needs_basis() && text.basis.is_none() {
            let written = folded(Span { start: literal.span.start, end: text.span.end }.of(self.text));
            let meanings = self.site.p_pa.map(|site| {
                let kpa = |pa: f64| format!("{} kPa abs", units::write_figures(pa / 1000.0, 4));
                [kpa(unit.to_si(literal.value)), kpa(unit.to_si(literal.value) + site)]
            });
            let (span, pressure) = (Span { start: literal.span.start, end: text.span.end }, unit.to_si(literal.value));
            let finding = if pressure < 0.0 {
                code::pressure_without_basis::negative(span, &written)
            } else {
                let finding = code::pressure_without_basis::finding(span, &written, meanings);
                let is_vacuum = self.site.p_pa.is_some_and(|site| pressure < site * (1.0 - WEATHER));
                if is_vacuum { code::pressure_without_basis::vacuum(finding) } else { finding }
            };
            self.report(finding);
            return None;
        }
        let basis = self.basis(text, &unit, true)?;
        let gauge = basis == Some(Basis::Gauge);
        if gauge {
            self.gauge(literal.span)?;
        }
        let kind = kind_of(&unit, basis);
        let unit = if basis == Some(Basis::Difference) { unit.interval() } else { unit };
        let si = unit.to_si(literal.value);
        if !si.is_finite() {
            let finding = code::number_out_of_range::finding(literal.digits, &cut(literal.digits.of(self.text)));
            self.report(finding);
            return None;
        }
        if kind != Kind::Difference && kind != Kind::Plain {
            let written = folded(literal.span.of(self.text));
            if unit.is_temperature() && si < 0.0 && kind == Kind::Absolute {
                self.report(code::below_absolute_zero::literal(literal.span, owner, &written));
                return None;
            }
            let absolute = si + if gauge { self.site.p_pa.unwrap_or(0.0) } else { 0.0 };
            if unit.needs_basis() && absolute < 0.0 {
                let absolute = format!("{} kPa abs", units::write_figures(absolute / 1000.0, 4));
                self.report(code::below_vacuum::literal(literal.span, owner, &written, &absolute));
                return None;
            }
        }
        Some(Value { si, gauge, kind, shown: ShownUnit { unit, basis } })
    }

    /// A value with its figures and its uncertainty.
    fn reading(&mut self, literal: &Literal, value: &Value, uncertainty: Option<&Uncertainty>) -> Option<Reading> {
        let digits = literal.digits.of(self.text);
        let stated = match uncertainty {
            Some(uncertainty) => Some(self.uncertainty(literal, value, uncertainty)?),
            None => None,
        };
        let exact = literal.exact.is_some();
        Some(Reading {
            si: value.si,
            gauge: value.gauge,
            exact,
            half_width_si: if exact { 0.0 } else { units::half_width(digits) * value.shown.unit.factor.abs() },
            figures: units::figures_written(digits),
            uncertainty: stated,
            text: folded(literal.span.of(self.text)),
            uncertainty_text: uncertainty.map_or(String::new(), |uncertainty| folded(uncertainty.span.of(self.text)).replace("+-", "±")),
        })
    }

    fn uncertainty(&mut self, literal: &Literal, value: &Value, stated: &Uncertainty) -> Option<StatedUncertainty> {
        let refuse = |reader: &mut Self, span: Span, why: &str, help: &str| {
            reader.report(code::uncertainty_out_of_place::finding(span, why, help));
            None
        };
        if literal.exact.is_some() {
            // An exact value has no uncertainty: told where the line was read.
            return None;
        }
        let width_si = match &stated.width {
            Width::Of(width) => self.width(width, value, stated.span)?,
            Width::PercentOfValue(percent) => {
                if value.shown.unit.offset != 0.0 {
                    let why = "a percentage of a value on a scale with an offset means nothing";
                    return refuse(self, stated.span, why, "give it as an interval: `± 1.0 K`");
                }
                percent.value / 100.0 * value.si.abs()
            }
            Width::PercentOfSpan(percent, span) => percent.value / 100.0 * self.width(span, value, stated.span)?.abs(),
        };
        if !width_si.is_finite() {
            return refuse(self, stated.span, "it is outside the range of numbers", "check its exponent");
        }
        if width_si < 0.0 {
            return refuse(self, stated.span, "it is negative", "give a width above zero: limits are symmetric");
        }
        let k = stated.k.map_or(1.0, |(k, _)| k);
        if let Some((k, span)) = stated.k
            && !(k.is_finite() && k > 0.0)
        {
            return refuse(self, span, "a coverage factor is above zero", "`k=2` marks an expanded uncertainty of about 95 %");
        }
        if let Some((dof, span)) = stated.dof
            && !(dof.is_finite() && dof > 0.0)
        {
            return refuse(self, span, "degrees of freedom are above zero", "write `dof=9`, or leave it out where they are many");
        }
        Some(StatedUncertainty {
            width_si,
            shape: if stated.k.is_some() { Shape::Normal } else { stated.shape },
            k,
            dof: stated.dof.map(|(dof, _)| dof),
        })
    }

    /// A width behind `±`: an interval, for which a pressure needs no basis.
    fn width(&mut self, width: &Literal, value: &Value, whole: Span) -> Option<f64> {
        if !width.value.is_finite() {
            let finding = code::number_out_of_range::finding(width.digits, &cut(width.digits.of(self.text)));
            self.report(finding);
            return None;
        }
        let unit = match width.unit {
            Some(text) => self.unit(text.span)?.interval(),
            None => Unit::pure(),
        };
        let (wanted, found) = (value.shown.unit.dimension, unit.dimension);
        if wanted != found {
            let place = if width.unit.is_some() { width.span } else { whole };
            let value_text = folded(Span { start: place.start, end: place.end }.of(self.text));
            self.report(code::dimension_mismatch::expected(
                place,
                &format!("the uncertainty `{value_text}`"),
                &found.describe(),
                "the value",
                &wanted.describe(),
                place,
            ));
            return None;
        }
        Some(width.value * unit.factor)
    }

    /// A `given`.
    pub(super) fn given(&mut self, statement: &Statement, name: Named, literal: &Literal, uncertainty: Option<&Uncertainty>) -> QuantityId {
        let text = self.tree.names.text(name.name).to_owned();
        if statement.description.is_none() {
            self.report(code::description_missing::finding(statement.span, &format!("the input `{text}`")));
        } else if statement.source.is_none() {
            let strict = self.sheet.head.strict;
            self.report(code::source_missing::finding(statement.span, &text, strict));
        }
        let id = self.quantity(text.clone(), Origin::Given, statement, name.span);
        let value = self.value(literal, &format!(" `{text}`"));
        // An uncertainty in error does not make the value unknown, but what hangs on it stays silent.
        let reading = value.as_ref().and_then(|value| self.reading(literal, value, uncertainty));
        let at = id.0 as usize;
        self.poisoned[at] = reading.is_none() || statement.description.is_none();
        if let Some(value) = value {
            let entry = &mut self.sheet.quantities[at];
            entry.dimension = value.shown.unit.dimension;
            entry.kind = value.kind;
            entry.shown = value.shown;
        } else {
            self.undetermined[at] = true;
        }
        self.sheet.quantities[at].reading = reading;
        id
    }

    /// `reference normal at 0 degC, 101.325 kPa abs`
    pub(super) fn reference(&mut self, which: ReferenceName, temperature: &Literal, pressure: &Literal, statement: &Statement) {
        let at = which as usize;
        let (t, p) = (self.value(temperature, ""), self.value(pressure, ""));
        if let Some(first) = self.sheet.references[at] {
            let first = self.tree.statements[first.statement].span;
            self.report(code::name_defined_twice::once(statement.span, "this reference", first));
            return;
        }
        let (Some(t), Some(p)) = (t, p) else {
            // Its own finding stands; uses of the reference stay silent.
            self.references_missing[at] = true;
            self.references_missing[2] |= at == 1;
            return;
        };
        if (t.shown.unit.dimension, p.shown.unit.dimension) == (Dimension::PRESSURE, Dimension::TEMPERATURE) {
            let (first, second) = (folded(temperature.span.of(self.text)), folded(pressure.span.of(self.text)));
            self.report(code::dimension_mismatch::reference_order(temperature.span.to(pressure.span), &format!("{second}, {first}")));
            self.references_missing[at] = true;
            self.references_missing[2] |= at == 1;
            return;
        }
        for (value, literal, dimension, word) in
            [(&t, temperature, Dimension::TEMPERATURE, "a temperature"), (&p, pressure, Dimension::PRESSURE, "a pressure")]
        {
            let found = value.shown.unit.dimension;
            if found != dimension || value.kind == Kind::Difference || value.gauge || value.si <= 0.0 {
                let wanted =
                    if dimension == Dimension::PRESSURE { "absolute pressure above zero" } else { "temperature above absolute zero" };
                self.report(code::dimension_mismatch::expected(
                    literal.span,
                    "this part of the reference conditions",
                    &if found == dimension { "value that cannot serve".to_owned() } else { found.describe() },
                    word,
                    wanted,
                    literal.span,
                ));
                self.references_missing[at] = true;
                return;
            }
        }
        self.sheet.references[at] = Some(ReferenceConditions { t_k: t.si, p_pa: p.si, statement: self.statement });
    }

    /// The pressure of the site, from what its lines say.
    pub(super) fn site_pressure(&mut self) {
        let mut altitude: Option<(f64, Span)> = None;
        let mut pressure: Option<(f64, Span, QuantityId)> = None;
        for at in 0..self.tree.statements.len() {
            self.statement = at;
            let statement = &self.tree.statements[at];
            match &statement.kind {
                StatementKind::SitePressure { value: literal, uncertainty } => {
                    if let Some((_, first, _)) = pressure {
                        self.report(code::name_defined_twice::once(statement.span, "the pressure of the site", first));
                        continue;
                    }
                    if literal.unit.is_some_and(|unit| matches!(unit.basis, Some((Basis::Gauge | Basis::Difference, _)))) {
                        let span = literal.span;
                        self.report(code::dimension_mismatch::expected(
                            span,
                            "this",
                            "reading against the atmosphere",
                            "the pressure of a site",
                            "absolute pressure",
                            span,
                        ));
                        continue;
                    }
                    let Some(value) = self.site_value(literal, Dimension::PRESSURE, "the pressure of a site", statement) else { continue };
                    let Some(reading) = self.reading(literal, &value, uncertainty.as_ref()) else { continue };
                    let id = self.quantity("site.p".to_owned(), Origin::SitePressure, statement, statement.span);
                    self.site.p_pa = Some(value.si);
                    pressure = Some((value.si, statement.span, id));
                    self.settle_input(id, &value, reading);
                    self.sheet.site_pressure = Some(id);
                }
                StatementKind::SiteAltitude { value: literal, uncertainty } => {
                    if let Some((_, first)) = altitude {
                        self.report(code::name_defined_twice::once(statement.span, "the altitude of the site", first));
                        continue;
                    }
                    let Some(value) = self.site_value(literal, Dimension::LENGTH, "the altitude of a site", statement) else { continue };
                    let p_pa = gas::standard_pressure_pa(value.si);
                    if !p_pa.is_finite() {
                        let text = folded(literal.span.of(self.text));
                        self.report(code::outside_model_range::altitude(literal.span, &text));
                        continue;
                    }
                    altitude = Some((p_pa, statement.span));
                    let Some(reading) = self.reading(literal, &value, uncertainty.as_ref()) else { continue };
                    let id = self.quantity("site.altitude".to_owned(), Origin::SiteAltitude, statement, statement.span);
                    self.settle_input(id, &value, reading);
                }
                _ => {}
            }
        }
        match (pressure, altitude) {
            (Some((p_pa, span, _)), Some((standard, altitude))) if (p_pa / standard - 1.0).abs() > WEATHER => {
                let kpa = |pa: f64| format!("{} kPa", units::write_figures(pa / 1000.0, 4));
                self.report(code::site_pressure_and_altitude::finding(span, &kpa(p_pa), &kpa(standard), altitude));
            }
            (None, Some((p_pa, span))) => {
                let Some(altitude) = self.sheet.quantities.iter().position(|quantity| quantity.origin == Origin::SiteAltitude) else {
                    return;
                };
                let at = self.sheet.quantities[altitude].statement;
                self.statement = at;
                let statement = &self.tree.statements[at];
                let id = self.quantity("site.p".to_owned(), Origin::SitePressure, statement, span);
                let entry = &mut self.sheet.quantities[id.0 as usize];
                entry.dimension = Dimension::PRESSURE;
                entry.kind = Kind::Absolute;
                entry.shown = si_unit(Dimension::PRESSURE, Kind::Absolute);
                entry.shown.unit = units::parse("kPa").unwrap_or_else(|_| Unit::pure());
                let left = self.expr(Expr::Quantity(id), span);
                let altitude = self.expr(Expr::Quantity(QuantityId(altitude as u32)), span);
                let right = self.expr(Expr::StandardPressure(altitude), span);
                self.relation(left, right, RelationOrigin::Atmosphere, span);
                self.site.p_pa = Some(p_pa);
                self.sheet.site_pressure = Some(id);
            }
            _ => {}
        }
    }

    fn site_value(&mut self, literal: &Literal, dimension: Dimension, what: &str, statement: &Statement) -> Option<Value> {
        let value = self.value(literal, "")?;
        let found = value.shown.unit.dimension;
        if found != dimension {
            self.report(code::dimension_mismatch::expected(
                literal.span,
                "this",
                &found.describe(),
                what,
                &dimension.describe(),
                literal.span,
            ));
            return None;
        }
        if statement.description.is_none() && statement.source.is_none() {
            let strict = self.sheet.head.strict;
            self.report(code::source_missing::finding(statement.span, "site", strict));
        }
        Some(value)
    }

    fn settle_input(&mut self, id: QuantityId, value: &Value, reading: Reading) {
        let entry = &mut self.sheet.quantities[id.0 as usize];
        entry.dimension = value.shown.unit.dimension;
        entry.kind = value.kind;
        entry.shown = value.shown.clone();
        entry.reading = Some(reading);
    }
}

/// Absolute or difference, of a unit with its basis.
pub(super) fn kind_of(unit: &Unit, basis: Option<Basis>) -> Kind {
    if unit.needs_basis() {
        match basis {
            Some(Basis::Difference) => Kind::Difference,
            _ => Kind::Absolute,
        }
    } else if unit.is_temperature() {
        match basis {
            Some(Basis::Difference) => Kind::Difference,
            _ if unit.offset != 0.0 => Kind::Absolute,
            _ => Kind::Either,
        }
    } else {
        Kind::Plain
    }
}

/// The SI unit of a dimension with the basis of its kind.
pub(super) fn si_unit(dimension: Dimension, kind: Kind) -> ShownUnit {
    let unit = units::parse(&dimension.si_unit()).unwrap_or_else(|_| Unit { name: dimension.si_unit(), dimension, ..Unit::pure() });
    let basis = (dimension == Dimension::PRESSURE).then_some(if kind == Kind::Difference { Basis::Difference } else { Basis::Absolute });
    ShownUnit { unit, basis }
}

/// Text with every run of blanks, line ends included, as one blank.
pub(super) fn folded(text: &str) -> String {
    text.split_whitespace().collect::<Vec<_>>().join(" ")
}

/// Text cut to what a message can hold.
pub(super) fn cut(text: &str) -> String {
    const LONGEST: usize = 40;
    if text.chars().count() <= LONGEST { text.to_owned() } else { text.chars().take(LONGEST).chain(['…']).collect() }
}

/// Whether digits stand for a number other than zero, its exponent not looked at.
fn is_nonzero(digits: &str) -> bool {
    digits.split(['e', 'E']).next().unwrap_or("").contains(|c: char| ('1'..='9').contains(&c))
}
