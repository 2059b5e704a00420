//! Verdicts on requirements and assumptions, and margins in words.

use crate::sheet::{Condition, StateId};
use crate::solve::{Judged, Sides, StateVerdict, Verdict};
use crate::syntax::Comparison;
use crate::units::write_to_place;

use super::Input;
use super::written::Written;

/// How far a condition is from its limit: `0.74 bar above`.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) struct Margin {
    /// The size, never below zero, in the unit of the right side without its basis.
    pub(super) size: Written,
    /// `above` or `below`; empty at the limit.
    pub(super) side: &'static str,
}

impl Margin {
    /// In the spelling of a sheet: `0.74 bar above`.
    pub(super) fn plain(&self) -> String {
        if self.side.is_empty() { "at the limit".to_owned() } else { format!("{} {}", self.size.plain(), self.side) }
    }

    /// As a report prints it.
    pub(super) fn typeset(&self) -> String {
        if self.side.is_empty() { "at the limit".to_owned() } else { format!("{} {}", self.size.typeset(), self.side) }
    }
}

impl<'a> Input<'a> {
    /// The verdict on an assumption of the sheet; `None` without a solution.
    pub(super) fn assumption_verdict(&self, at: usize) -> Option<Verdict> {
        let judged = self.solution?.assumptions.get(at)?;
        Some(match judged {
            None => Verdict::ForJudgement,
            Some(judged) if judged.holds => Verdict::Confirmed,
            Some(_) => Verdict::Failed,
        })
    }

    /// The verdict on the ideal gas law at a state; `None` without a solution.
    pub(super) fn state_verdict(&self, state: StateId) -> Option<&'a StateVerdict> {
        self.solution?.states.iter().find(|verdict| verdict.state == state)
    }
}

/// The margin of a judged condition of one comparison.
pub(super) fn margin(condition: Option<&Condition>, judged: &Judged) -> Option<Margin> {
    let (Some(Condition::Compare { comparison, .. }), Some(sides)) = (condition, judged.sides.as_ref()) else { return None };
    let upward = matches!(comparison, Comparison::Greater | Comparison::GreaterOrEqual);
    let side = match (sides.margin == 0.0, upward == (sides.margin > 0.0)) {
        (true, _) => "",
        (false, true) => "above",
        (false, false) => "below",
    };
    Some(Margin { size: Written { number: margin_number(sides), unit: interval_unit(&sides.unit).to_owned() }, side })
}

/// The size of a margin to the place it deserves, but with one figure at least: a margin is never shown as zero.
fn margin_number(sides: &Sides) -> String {
    let size = sides.margin.abs();
    let written = write_to_place(size, sides.place);
    let is_zero = written.bytes().all(|byte| matches!(byte, b'0' | b'.'));
    if is_zero { crate::units::write_figures(size, 1) } else { written }
}

/// The unit of a difference of two readings in a unit: without basis, and K for degrees Celsius, degR for degrees Fahrenheit.
pub(super) fn interval_unit(unit: &str) -> &str {
    match unit.split(' ').next().unwrap_or_default() {
        "degC" => "K",
        "degF" => "degR",
        word => word,
    }
}
