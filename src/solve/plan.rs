//! The plan: the sheet compiled to one tape, in the order in which it can be solved.

use std::collections::BTreeMap;
use std::ops::Range;
use std::sync::Arc;

use crate::sheet::{Condition, Constant, Expr, ExprId, Origin, Property, QuantityId, RelationOrigin, Sheet};
use crate::syntax::{BinaryOp, Function};

use super::closed_form::{ClosedForm, solve_for, solve_for_state};
use super::physics;
use super::state_function::Substance;
use super::structure::Part;
use super::tape::{Op, Slot, Tape};

/// Blocks of more quantities than this are not searched for one quantity that opens them.
const LARGEST_TEAR: usize = 24;

/// No slot.
pub(super) const NO_SLOT: Slot = Slot::MAX;

/// A stretch of the tape.
#[derive(Clone, Debug)]
pub(super) enum Segment {
    /// Evaluated as it stands.
    Straight(Range<usize>),
    /// Solved.
    Block(usize),
}

/// A relation whose sides have to agree.
#[derive(Clone, Debug)]
pub(super) struct Residual {
    pub(super) relation: usize,
    pub(super) left: Slot,
    pub(super) right: Slot,
    /// The operations of both sides.
    pub(super) ops: Range<usize>,
    /// Of a block of several unknowns: those that it reads, by their place in the block.
    pub(super) reads: Vec<u32>,
}

/// What bounds a quantity of a block.
#[derive(Clone, Copy, Debug)]
pub(super) struct Bounds {
    pub(super) quantity: QuantityId,
    pub(super) low: Option<Slot>,
    pub(super) high: Option<Slot>,
    pub(super) near: Option<Slot>,
}

/// Relations that are solved together or by iteration.
#[derive(Clone, Debug)]
pub(super) struct Block {
    pub(super) relations: Vec<usize>,
    /// What it finds.
    pub(super) bounds: Vec<Bounds>,
    /// What the solver varies, with their slots.
    pub(super) unknowns: Vec<(QuantityId, Slot)>,
    /// From the first unknown to the last operation.
    pub(super) region: Range<usize>,
    pub(super) residuals: Vec<Residual>,
    /// Closed forms of the branches of its one unknown, before the region.
    pub(super) candidates: Vec<(Slot, ExprId)>,
    /// Slots before the region that it reads.
    pub(super) outer: Vec<Slot>,
}

/// How a step of the working is found.
#[derive(Clone, Debug)]
pub(super) enum How {
    ClosedForm(ExprId),
    Block(usize),
}

/// A step of the working.
#[derive(Clone, Debug)]
pub(super) struct PlannedStep {
    pub(super) quantities: Vec<QuantityId>,
    pub(super) relations: Vec<usize>,
    pub(super) how: How,
}

/// The sides of a comparison on the tape.
#[derive(Clone, Copy, Debug)]
pub(super) struct SideSlots {
    pub(super) left: Slot,
    pub(super) right: Slot,
}

/// The plan.
#[derive(Clone, Debug)]
pub(super) struct Plan {
    pub(super) tape: Tape,
    pub(super) segments: Vec<Segment>,
    pub(super) blocks: Vec<Block>,
    pub(super) steps: Vec<PlannedStep>,
    /// The inputs, in the order of [`Op::Input`], with their slots.
    pub(super) inputs: Vec<(QuantityId, Slot)>,
    /// The slot of every quantity.
    pub(super) slots: Vec<Slot>,
    /// Relations that were not needed.
    pub(super) surplus: Vec<Residual>,
    /// The sides of every comparison, in the order in which the conditions of the sheet are walked: assumptions,
    /// requirements, cautions.
    pub(super) comparisons: Vec<SideSlots>,
    /// Relations from which their quantity drops out.
    pub(super) empty: Vec<(usize, QuantityId)>,
}

struct Compiler<'a> {
    sheet: &'a mut Sheet,
    plan: Plan,
    straight_from: usize,
    forms: BTreeMap<(usize, QuantityId), ClosedForm>,
}

/// Compiles a sheet. `blocks` are in the order in which they can be solved; rows are relations, columns are quantities.
pub(super) fn compile(sheet: &mut Sheet, blocks: &[Part], surplus: &[usize]) -> Plan {
    let substances = sheet.gases.iter().map(|gas| Arc::new(Substance::new(gas.clone()))).collect();
    let plan = Plan {
        tape: Tape::new(substances),
        segments: Vec::new(),
        blocks: Vec::new(),
        steps: Vec::new(),
        inputs: Vec::new(),
        slots: vec![NO_SLOT; sheet.quantities.len()],
        surplus: Vec::new(),
        comparisons: Vec::new(),
        empty: Vec::new(),
    };
    let mut compiler = Compiler { sheet, plan, straight_from: 0, forms: BTreeMap::new() };
    compiler.inputs();
    for block in blocks {
        compiler.block(block);
    }
    for relation in surplus {
        let residual = compiler.residual(*relation);
        compiler.plan.surplus.push(residual);
    }
    compiler.conditions();
    compiler.end_straight();
    compiler.plan
}

impl Compiler<'_> {
    fn end_straight(&mut self) {
        let here = self.plan.tape.len();
        if here > self.straight_from {
            self.plan.segments.push(Segment::Straight(self.straight_from..here));
        }
        self.straight_from = here;
    }

    fn slot(&self, id: QuantityId) -> Slot {
        self.plan.slots[id.0 as usize]
    }

    /// Inputs and constants first, then the pressure of the site, then gauge readings, which count from it.
    fn inputs(&mut self) {
        let mut gauge = Vec::new();
        for at in 0..self.sheet.quantities.len() {
            let quantity = &self.sheet.quantities[at];
            if let Some(constant) = quantity.constant {
                self.plan.slots[at] = self.plan.tape.push(Op::Constant(constant));
            } else if let Some(reading) = &quantity.reading {
                let is_gauge = reading.gauge;
                let input = self.plan.tape.push(Op::Input(self.plan.inputs.len() as u32));
                self.plan.inputs.push((QuantityId(at as u32), input));
                self.plan.slots[at] = input;
                if is_gauge {
                    gauge.push((at, input));
                }
            }
        }
        if let Some(at) = self.sheet.relations.iter().position(|relation| relation.origin == RelationOrigin::Atmosphere)
            && let Some(site) = self.sheet.site_pressure
        {
            let expression = self.sheet.relations[at].right;
            self.plan.slots[site.0 as usize] = self.expr(expression);
            self.plan.steps.push(PlannedStep { quantities: vec![site], relations: vec![at], how: How::ClosedForm(expression) });
        }
        if let Some(site) = self.sheet.site_pressure.map(|site| self.slot(site)).filter(|slot| *slot != NO_SLOT) {
            for (at, input) in gauge {
                self.plan.slots[at] = self.plan.tape.push(Op::Add(input, site));
            }
        }
    }

    fn block(&mut self, part: &Part) {
        let relations: Vec<usize> = part.rows.iter().map(|row| *row as usize).collect();
        let quantities: Vec<QuantityId> = part.columns.iter().map(|column| QuantityId(*column)).collect();
        if let ([relation], [quantity]) = (&relations[..], &quantities[..]) {
            let (relation, quantity) = (*relation, *quantity);
            match self.form(relation, quantity) {
                ClosedForm::One(expression) => {
                    self.plan.slots[quantity.0 as usize] = self.expr(expression);
                    self.plan.steps.push(PlannedStep { quantities, relations, how: How::ClosedForm(expression) });
                }
                ClosedForm::Two(a, b) => {
                    let candidates = vec![(self.expr(a), a), (self.expr(b), b)];
                    self.numeric(relations, quantities.clone(), &quantities, &[], candidates);
                }
                ClosedForm::DropsOut => self.plan.empty.push((relation, quantity)),
                ClosedForm::None => self.numeric(relations, quantities.clone(), &quantities, &[], Vec::new()),
            }
            return;
        }
        if self.state_by_two(&relations, &quantities) {
            return;
        }
        match self.tear(&relations, &quantities) {
            Some((tear, order)) => {
                let mut rest = relations.clone();
                rest.retain(|relation| order.iter().all(|(used, ..)| used != relation));
                self.numeric_torn(relations, quantities, tear, &order, &rest);
            }
            None => {
                let unknowns = quantities.clone();
                self.numeric(relations, quantities, &unknowns, &[], Vec::new());
            }
        }
    }

    /// A block that is the temperature and the pressure of one state, from two other properties of it.
    fn state_by_two(&mut self, relations: &[usize], quantities: &[QuantityId]) -> bool {
        let (&[first, second], &[a, b]) = (relations, quantities) else { return false };
        let origin = |id: QuantityId| self.sheet.quantity(id).origin;
        let (t, p) = match (origin(a), origin(b)) {
            (Origin::Property(one, Property::T), Origin::Property(other, Property::P)) if one == other => (a, b),
            (Origin::Property(one, Property::P), Origin::Property(other, Property::T)) if one == other => (b, a),
            _ => return false,
        };
        let sides = [first, second].map(|at| (self.sheet.relations[at].left, self.sheet.relations[at].right));
        let Some(forms) = solve_for_state(&mut self.sheet.exprs, sides) else { return false };
        for (id, expression) in [t, p].into_iter().zip(forms) {
            self.plan.slots[id.0 as usize] = self.expr(expression);
            self.plan.steps.push(PlannedStep { quantities: vec![id], relations: relations.to_vec(), how: How::ClosedForm(expression) });
        }
        true
    }

    /// The relation rearranged for a quantity.
    fn form(&mut self, relation: usize, quantity: QuantityId) -> ClosedForm {
        if let Some(form) = self.forms.get(&(relation, quantity)) {
            return form.clone();
        }
        let entry = self.sheet.quantity(quantity);
        let bounded = entry.low.and_then(|low| self.sheet.exprs.constant_value(low)).is_some_and(|low| low >= 0.0);
        let nonnegative = bounded || physics::is_taken_positive(entry);
        let (left, right) = (self.sheet.relations[relation].left, self.sheet.relations[relation].right);
        let form = solve_for(&mut self.sheet.exprs, left, right, quantity, nonnegative);
        self.forms.insert((relation, quantity), form.clone());
        form
    }

    /// A quantity that opens the block: once it is known, closed forms give all others in order, and one relation is left.
    #[expect(clippy::type_complexity, reason = "the tear and its order are taken apart at once by the only caller")]
    fn tear(&mut self, relations: &[usize], quantities: &[QuantityId]) -> Option<(QuantityId, Vec<(usize, QuantityId, ExprId)>)> {
        if quantities.len() > LARGEST_TEAR {
            return None;
        }
        let mut candidates: Vec<(u8, QuantityId)> = quantities
            .iter()
            .map(|id| {
                let quantity = self.sheet.quantity(*id);
                let rank = match (quantity.low.is_some() && quantity.high.is_some(), quantity.near.is_some()) {
                    (true, _) => 0,
                    (_, true) => 1,
                    _ if quantity.low.is_some() || quantity.high.is_some() => 2,
                    _ => 3,
                };
                (rank, *id)
            })
            .collect();
        candidates.sort();
        let inside: Vec<Vec<QuantityId>> = relations
            .iter()
            .map(|relation| {
                let mut found = Vec::new();
                let relation = &self.sheet.relations[*relation];
                for side in [relation.left, relation.right] {
                    self.sheet.exprs.quantities(side, &mut |id| {
                        if quantities.contains(&id) && !found.contains(&id) {
                            found.push(id);
                        }
                    });
                }
                found
            })
            .collect();
        for (_, tear) in candidates {
            let mut known = vec![tear];
            let mut used = vec![false; relations.len()];
            let mut order = Vec::new();
            'grow: loop {
                for (at, relation) in relations.iter().enumerate() {
                    if used[at] {
                        continue;
                    }
                    let mut open = inside[at].iter().filter(|id| !known.contains(id));
                    let (Some(next), None) = (open.next().copied(), open.next()) else { continue };
                    if let ClosedForm::One(expression) = self.form(*relation, next) {
                        used[at] = true;
                        known.push(next);
                        order.push((*relation, next, expression));
                        continue 'grow;
                    }
                }
                break;
            }
            if known.len() == quantities.len() {
                return Some((tear, order));
            }
        }
        None
    }

    fn numeric_torn(
        &mut self,
        relations: Vec<usize>,
        quantities: Vec<QuantityId>,
        tear: QuantityId,
        order: &[(usize, QuantityId, ExprId)],
        rest: &[usize],
    ) {
        debug_assert_eq!(rest.len(), 1);
        self.numeric(relations, quantities, &[tear], order, Vec::new());
    }

    fn numeric(
        &mut self,
        relations: Vec<usize>,
        quantities: Vec<QuantityId>,
        unknowns: &[QuantityId],
        order: &[(usize, QuantityId, ExprId)],
        candidates: Vec<(Slot, ExprId)>,
    ) {
        let bounds: Vec<Bounds> = quantities
            .iter()
            .map(|id| {
                let quantity = self.sheet.quantity(*id);
                let (low, high, near) = (quantity.low, quantity.high, quantity.near);
                let mut slot = |bound: Option<ExprId>| bound.map(|bound| self.expr(bound));
                Bounds { quantity: *id, low: slot(low), high: slot(high), near: slot(near) }
            })
            .collect();
        self.end_straight();
        let from = self.plan.tape.len();
        let unknowns: Vec<(QuantityId, Slot)> = unknowns
            .iter()
            .map(|id| {
                let slot = self.plan.tape.push(Op::Unknown);
                self.plan.slots[id.0 as usize] = slot;
                (*id, slot)
            })
            .collect();
        for (_, id, expression) in order {
            self.plan.slots[id.0 as usize] = self.expr(*expression);
        }
        let mut residuals: Vec<Residual> = relations
            .iter()
            .filter(|relation| order.iter().all(|(used, ..)| used != *relation))
            .map(|relation| self.residual(*relation))
            .collect();
        let places: BTreeMap<QuantityId, u32> = unknowns.iter().enumerate().map(|(at, (id, _))| (*id, at as u32)).collect();
        for residual in &mut residuals {
            let relation = &self.sheet.relations[residual.relation];
            for side in [relation.left, relation.right] {
                self.sheet.exprs.quantities(side, &mut |id| residual.reads.extend(places.get(&id)));
            }
            residual.reads.sort_unstable();
            residual.reads.dedup();
        }
        let region = from..self.plan.tape.len();
        let outer = self.plan.tape.reads_before(region.clone());
        self.straight_from = region.end;
        self.plan.segments.push(Segment::Block(self.plan.blocks.len()));
        self.plan.steps.push(PlannedStep { quantities, relations: relations.clone(), how: How::Block(self.plan.blocks.len()) });
        self.plan.blocks.push(Block { relations, bounds, unknowns, region, residuals, candidates, outer });
    }

    fn residual(&mut self, relation: usize) -> Residual {
        let from = self.plan.tape.len();
        let (left, right) = (self.sheet.relations[relation].left, self.sheet.relations[relation].right);
        let (left, right) = (self.expr(left), self.expr(right));
        Residual { relation, left, right, ops: from..self.plan.tape.len(), reads: Vec::new() }
    }

    fn conditions(&mut self) {
        let mut sides = Vec::new();
        for clause in self.sheet.assumptions.iter().chain(&self.sheet.requirements).chain(&self.sheet.cautions) {
            if let Some(condition) = &clause.condition {
                comparisons(condition, &mut |left, right| sides.push((left, right)));
            }
        }
        for (left, right) in sides {
            let slots = SideSlots { left: self.expr(left), right: self.expr(right) };
            self.plan.comparisons.push(slots);
        }
    }

    fn expr(&mut self, id: ExprId) -> Slot {
        let op = match self.sheet.exprs.get(id) {
            Expr::Number(value, _) => Op::Constant(value),
            Expr::Constant(Constant::Pi) => Op::Constant(std::f64::consts::PI),
            Expr::Constant(constant) => Op::Constant(constant.value()),
            Expr::Quantity(quantity) => {
                let slot = self.slot(quantity);
                if slot != NO_SLOT {
                    return slot;
                }
                // What the sheet could not determine has no value, and neither has what hangs on it.
                Op::Constant(f64::NAN)
            }
            Expr::Negate(a) => Op::Negate(self.expr(a)),
            Expr::Binary(op, a, b) => {
                let (a, b) = (self.expr(a), self.expr(b));
                match op {
                    BinaryOp::Add => Op::Add(a, b),
                    BinaryOp::Subtract => Op::Subtract(a, b),
                    BinaryOp::Multiply => Op::Multiply(a, b),
                    BinaryOp::Divide => Op::Divide(a, b),
                    BinaryOp::Power => {
                        let b = match self.sheet.exprs.constant_value(self.binary_right(id)) {
                            Some(value) => self.plan.tape.push(Op::Constant(value)),
                            None => b,
                        };
                        Op::Power(a, b)
                    }
                }
            }
            Expr::Call(Function::Min, a, Some(b)) => Op::Least(self.expr(a), self.expr(b)),
            Expr::Call(Function::Max, a, Some(b)) => Op::Greatest(self.expr(a), self.expr(b)),
            Expr::Call(function, a, _) => Op::Call(function, self.expr(a)),
            Expr::Gas(function, gas, a) => Op::Gas(function, gas.0, self.expr(a)),
            Expr::State(function, gas, arguments) => {
                let [a, b] = [self.expr(arguments[0]), self.expr(arguments[1])];
                let c = if function.moisture.is_some() { self.expr(arguments[2]) } else { b };
                return self.plan.tape.push_state(function, gas.0, [a, b, c]);
            }
            Expr::StandardPressure(a) => Op::StandardPressure(self.expr(a)),
        };
        self.plan.tape.push(op)
    }

    fn binary_right(&self, id: ExprId) -> ExprId {
        match self.sheet.exprs.get(id) {
            Expr::Binary(_, _, b) => b,
            _ => id,
        }
    }
}

/// Calls `visit` with the sides of every comparison of a condition, in the order written.
pub(super) fn comparisons(condition: &Condition, visit: &mut impl FnMut(ExprId, ExprId)) {
    match condition {
        Condition::Compare { left, right, .. } => visit(*left, *right),
        Condition::And(a, b) | Condition::Or(a, b) => {
            comparisons(a, visit);
            comparisons(b, visit);
        }
        Condition::Not(inner) => comparisons(inner, visit),
    }
}
