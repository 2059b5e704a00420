//! A value as it is written for people: rounded to what it deserves, with its unit.

use crate::sheet::{Answer, Quantity, QuantityId, Reading, ShownUnit};
use crate::syntax::Basis;
use crate::units::{Unit, figures_written, last_place_written, math, place_for, write_figures, write_to_place};

use super::Input;
use super::draft::Draft;
use super::typeset::{NO_BREAK, typeset_number, typeset_unit};

/// A number and its unit, both in the spelling of a sheet.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) struct Written {
    /// `-8.0`, `1.23e-6`.
    pub(super) number: String,
    /// `bar gauge`, `kJ/(kg.K)`; empty for a plain number.
    pub(super) unit: String,
}

impl Written {
    /// As a sheet would write it: `28.2 kg`.
    pub(super) fn plain(&self) -> String {
        if self.unit.is_empty() { self.number.clone() } else { format!("{} {}", self.number, self.unit) }
    }

    /// As a report prints it: `28.2 kg`, `1 061.2 kPa abs`, `1.23 × 10⁻⁶ m³`, with spaces that do not break.
    pub(super) fn typeset(&self) -> String {
        let mut text = typeset_number(&self.number);
        if !self.unit.is_empty() {
            text.push(NO_BREAK);
            text.push_str(&typeset_unit(&self.unit));
        }
        text
    }
}

/// Fewest figures of a number that is put into a formula.
const FIGURES_CARRIED: u32 = 4;

/// How finely a value is written.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Fineness {
    /// With so many significant figures.
    Figures(u32),
    /// To a decimal place.
    Place(i32),
}

impl Fineness {
    pub(super) fn write(self, value: f64) -> String {
        match self {
            Self::Figures(figures) => write_figures(value, figures),
            Self::Place(place) => write_to_place(value, place),
        }
    }

    /// One figure more, and so many in all at least that a reader who calculates with them comes to the same result.
    fn carried(self, value: f64) -> Self {
        match self {
            Self::Figures(figures) => Self::Figures(figures.saturating_add(1).max(FIGURES_CARRIED)),
            Self::Place(place) => {
                let least = last_place_written(&format!("{value:.*e}", FIGURES_CARRIED as usize - 1));
                Self::Place(place.saturating_sub(1).min(least))
            }
        }
    }
}

impl Input<'_> {
    /// Half the width of a value in the unit it is shown in.
    fn half_width(&self, id: QuantityId, shown: &ShownUnit) -> f64 {
        let Some(solution) = self.solution else { return 0.0 };
        let gauge = shown.basis == Some(Basis::Gauge);
        let widths = if gauge { &solution.gauge_half_widths } else { &solution.half_widths };
        let width = widths.get(id.0 as usize).copied().filter(|width| width.is_finite()).unwrap_or(0.0);
        (width / shown.unit.factor).abs()
    }

    /// How finely a quantity is written in a unit: what the head or an `answer` decides, else what its inputs deserve.
    pub(super) fn fineness(&self, id: QuantityId, shown: &ShownUnit, figures: Option<u32>) -> Fineness {
        let decided = figures.or_else(|| self.sheet.head.figures.map(|(figures, _)| figures));
        match (decided, self.si(id)) {
            (Some(figures), _) => Fineness::Figures(figures),
            (None, Some(si)) => {
                let value = shown.from_si(si, self.site_pressure_pa());
                Fineness::Place(place_for(value, self.half_width(id, shown)))
            }
            (None, None) => Fineness::Figures(3),
        }
    }

    /// A quantity in a unit, rounded to what it deserves; `None` where it has no value.
    pub(super) fn written(&self, id: QuantityId, shown: &ShownUnit, figures: Option<u32>) -> Option<Written> {
        let decided = figures.is_some() || self.sheet.head.figures.is_some();
        let quantity = self.quantity(id);
        // A count or a definition has no last figure that an input could limit: it stays as it was written.
        if let Some(reading) = quantity.reading.as_ref().filter(|reading| reading.exact && !decided && *shown == quantity.shown) {
            return self.si(id).map(|_| Written { number: leading_number(&reading.text).to_owned(), unit: shown.text() });
        }
        let fineness = self.fineness(id, shown, figures);
        self.written_to(id, shown, fineness)
    }

    /// A quantity in a unit, as fine as is said.
    pub(super) fn written_to(&self, id: QuantityId, shown: &ShownUnit, fineness: Fineness) -> Option<Written> {
        let value = shown.from_si(self.si(id)?, self.site_pressure_pa());
        Some(Written { number: fineness.write(value), unit: shown.text() })
    }

    /// The figures that an `answer` line demands for a quantity, so that prose shows it as the answer does.
    pub(super) fn answer_figures(&self, id: QuantityId) -> Option<u32> {
        self.sheet.answers.iter().filter(|answer| answer.quantity == id).find_map(|answer| answer.figures)
    }

    /// Significant figures of a quantity in the unit it is shown in, as it is written.
    pub(super) fn figures(&self, id: QuantityId) -> Option<u32> {
        let quantity = self.quantity(id);
        if let Some(reading) = &quantity.reading {
            return Some(reading.figures);
        }
        let written = self.written(id, &quantity.shown, self.answer_figures(id))?;
        Some(figures_written(&written.number))
    }
}

impl Draft<'_> {
    /// A value as it is put into a formula: absolute, in the unit of its quantity, with one figure more than it deserves, so that
    /// the numbers of a formula give its result. A given stands as it was written where nothing had to be converted.
    pub(super) fn put_in(&self, id: QuantityId) -> Option<Written> {
        let input = self.input;
        let si = input.si(id)?;
        // What is only another name of a given is written as that.
        let origin = input.quantity(self.same_as(id));
        let shown = scaled(&absolute(&input.quantity(id).shown), si);
        if let Some(reading) = &origin.reading {
            return Some(read_in(reading, &origin.shown, &scaled(&absolute(&origin.shown), si), si));
        }
        if origin.constant.is_some() {
            return Some(Written { number: write_figures(shown.from_si(si, 0.0), FIGURES_OF_A_CONSTANT), unit: shown.text() });
        }
        let value = shown.from_si(si, input.site_pressure_pa());
        let fineness = input.fineness(id, &shown, input.answer_figures(id)).carried(value);
        let mut written = input.written_to(id, &shown, fineness)?;
        if input.half_width(id, &shown) == 0.0 {
            written.number = without_end_zeros(&written.number);
        }
        Some(written)
    }
}

impl Input<'_> {
    /// The value of an input in SI units, with prefixes where they help the eye.
    pub(super) fn in_si(&self, id: QuantityId) -> Option<Written> {
        let quantity = self.quantity(id);
        let si = self.si(id)?;
        let shown = scaled(&si_unit(quantity), si);
        match &quantity.reading {
            Some(reading) => Some(read_in(reading, &quantity.shown, &shown, si)),
            None => Some(Written { number: write_figures(shown.from_si(si, 0.0), FIGURES_OF_A_CONSTANT), unit: shown.text() }),
        }
    }
}

/// Figures of a constant of a gas: those of the atomic weights behind most of them.
const FIGURES_OF_A_CONSTANT: u32 = 5;

/// A reading in another unit, to the place that its last figure has there.
fn read_in(reading: &Reading, from: &ShownUnit, to: &ShownUnit, si: f64) -> Written {
    let number = leading_number(&reading.text);
    if from == to {
        return Written { number: number.to_owned(), unit: to.text() };
    }
    let value = to.from_si(si, 0.0);
    let ratio = (from.unit.factor / to.unit.factor).abs();
    let shift = math::log10(ratio);
    let missing = if reading.exact || reading.gauge { 0 } else { 3_u32.saturating_sub(figures_written(number)) };
    let last = last_place_written(number) - missing as i32;
    let whole_shift = (shift - shift.round()).abs() < 1e-9;
    let mut place = last.saturating_add(if whole_shift { shift.round() } else { shift.floor() - 1.0 } as i32);
    if reading.gauge {
        place -= 2;
    }
    if from.unit.offset != 0.0 {
        // The zero of the Celsius scale has two decimals.
        place = place.min(-2);
    }
    Written { number: write_to_place(value, place), unit: to.text() }
}

/// The number that a value as written begins with.
pub(super) fn leading_number(text: &str) -> &str {
    let mut end = 0;
    for (at, character) in text.char_indices() {
        let exponent_sign = matches!(character, '+' | '-' | '−') && (at == 0 || text[..at].ends_with(['e', 'E']));
        let exponent = matches!(character, 'e' | 'E') && text[at + 1..].starts_with(|c: char| c.is_ascii_digit() || c == '-' || c == '+');
        if !(character.is_ascii_digit() || character == '.' || exponent_sign || exponent) {
            break;
        }
        end = at + character.len_utf8();
    }
    &text[..end]
}

/// A number without the zeros that end its decimals.
pub(super) fn without_end_zeros(number: &str) -> String {
    if !number.contains('.') || number.contains('e') {
        return number.to_owned();
    }
    number.trim_end_matches('0').trim_end_matches('.').to_owned()
}

/// The unit in which a value is absolute: `bar abs` for `bar gauge`, K for degrees Celsius.
fn absolute(shown: &ShownUnit) -> ShownUnit {
    if shown.unit.offset != 0.0 {
        let unit = Unit { name: "K".to_owned(), factor: 1.0, offset: 0.0, ..shown.unit.clone() };
        return ShownUnit { unit, basis: shown.basis };
    }
    let basis = if shown.basis == Some(Basis::Gauge) { Some(Basis::Absolute) } else { shown.basis };
    ShownUnit { unit: shown.unit.clone(), basis }
}

/// The coherent SI unit of a quantity.
fn si_unit(quantity: &Quantity) -> ShownUnit {
    let unit = Unit { name: quantity.dimension.si_unit(), dimension: quantity.dimension, factor: 1.0, offset: 0.0, references: Vec::new() };
    absolute(&ShownUnit { unit, basis: quantity.shown.basis })
}

/// From here on the prefix is mega.
const MEGA_FROM: f64 = 1e7;

/// SI units that are easier to read with the prefix kilo, and from where on.
const SCALED: [(&str, f64); 8] =
    [("Pa", 1e4), ("J", 1e4), ("W", 1e4), ("N", 1e4), ("J/kg", 1e2), ("J/mol", 1e3), ("J/(kg.K)", 1e4), ("J/K", 1e4)];

/// A unit with the prefix kilo or mega where a value would have many digits.
pub(super) fn scaled(shown: &ShownUnit, si: f64) -> ShownUnit {
    let Some((_, from)) = SCALED.iter().find(|(name, _)| *name == shown.unit.name) else { return shown.clone() };
    let (prefix, factor) = match si.abs() {
        size if size >= MEGA_FROM => ("M", 1e6),
        size if size >= *from => ("k", 1e3),
        _ => return shown.clone(),
    };
    let unit = Unit { name: format!("{prefix}{}", shown.unit.name), factor, ..shown.unit.clone() };
    ShownUnit { unit, basis: shown.basis }
}

/// The rounded number and the unit of an answer in the spelling of a sheet, `28.2 kg`; empty where the sheet has no solution.
#[must_use]
pub fn answer_text(input: &Input, answer: &Answer) -> String {
    input.written(answer.quantity, &answer.shown, answer.figures).map_or_else(String::new, |written| written.plain())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_number_of_a_reading_ends_before_its_unit() {
        for (text, number) in [("9.6 bar", "9.6"), ("-185 degC", "-185"), ("8.4e4Pa", "8.4e4"), ("1e-3 m", "1e-3"), ("3eV", "3"), ("", "")]
        {
            assert_eq!(leading_number(text), number);
        }
    }
}
