//! Runs a plan: straight stretches as they stand, blocks by bracketing or by Newton's method.

use crate::sheet::{QuantityId, Sheet};

use super::linear::{Entry, Factors, Symbolic};
use super::newton::{self, System, Unknown};
use super::physics;
use super::plan::{Block, Bounds, Plan, Segment};
use super::scalar::{self, Function as _, Sample};
use super::tape::Slot;

/// Blocks of more unknowns than this, each with a guess, are not searched for other solutions.
const MOST_UNKNOWNS_SEARCHED: usize = 20;

/// Starts that are tried for a block of several unknowns.
const MOST_STARTS: u32 = 24;

/// A value this far beyond a bound, relative to the size of the bound, is still on it.
const ON_THE_BOUND: f64 = 1e-9;

/// How a block was solved.
#[derive(Clone, Debug)]
pub(super) struct Solved {
    pub(super) how: &'static str,
    pub(super) evaluations: u32,
    pub(super) residual: f64,
    /// Which of the closed forms of its branches it is.
    pub(super) branch: Option<usize>,
    /// Other values of the unknown that satisfy the relations, which `near` set aside.
    pub(super) others: Vec<f64>,
    /// The unknown of the block that the others are values of.
    pub(super) told: usize,
    /// The negative root that was left out because the quantity is not negative.
    factors: Option<Factors>,
}

/// Why a block was not solved.
#[derive(Clone, Debug)]
pub(super) enum Fault {
    /// Something that it needs has no value; that has its own finding.
    Silent,
    /// Several values inside the bounds.
    Several { quantity: QuantityId, roots: Vec<f64> },
    /// A root, but outside the bounds of a quantity.
    Outside { quantity: QuantityId, value: f64, low: f64, high: f64 },
    /// No root between these.
    NoRoot { quantity: QuantityId, low: f64, high: f64 },
    /// Not converged: what was tried, and how far it came.
    NotConverged { starts: u32, worst: usize, residual: f64, at_bound: Vec<QuantityId>, best: Vec<f64> },
}

/// A plan with its values.
#[derive(Clone, Debug)]
pub(super) struct Evaluation<'a> {
    pub(super) plan: &'a Plan,
    pub(super) values: Vec<f64>,
    /// What became of each block.
    pub(super) outcomes: Vec<Result<Solved, Fault>>,
    tangents: Vec<f64>,
    magnitudes: Vec<f64>,
    adjoints: Vec<f64>,
    /// It follows a solution that was judged: other solutions of its blocks are not looked for again.
    repeated: bool,
}

/// Evaluates a plan at the inputs of its sheet.
pub(super) fn evaluate<'a>(sheet: &Sheet, plan: &'a Plan, inputs: &[f64]) -> Evaluation<'a> {
    let n = plan.tape.len();
    let mut evaluation = Evaluation {
        plan,
        values: vec![f64::NAN; n],
        outcomes: Vec::new(),
        tangents: vec![0.0; n],
        magnitudes: vec![0.0; n],
        adjoints: vec![0.0; n],
        repeated: false,
    };
    for segment in &plan.segments {
        match segment {
            Segment::Straight(range) => plan.tape.evaluate(range.clone(), inputs, &mut evaluation.values),
            Segment::Block(at) => {
                let outcome = evaluation.solve(sheet, &plan.blocks[*at], inputs);
                if outcome.is_err() {
                    evaluation.values[plan.blocks[*at].region.clone()].fill(f64::NAN);
                }
                evaluation.outcomes.push(outcome);
            }
        }
    }
    evaluation
}

impl<'a> Evaluation<'a> {
    /// Evaluates again at other inputs, from the solution that stands in `nominal`: blocks start from their unknowns there,
    /// branches stay what they are. A block that does not converge from there is solved from the beginning. Whether every
    /// block was solved.
    pub(super) fn again(&mut self, sheet: &Sheet, inputs: &[f64], nominal: &[f64]) -> bool {
        let plan = self.plan;
        self.repeated = true;
        for segment in &plan.segments {
            match segment {
                Segment::Straight(range) => plan.tape.evaluate(range.clone(), inputs, &mut self.values),
                Segment::Block(at) => {
                    let block = &plan.blocks[*at];
                    if self.follow(block, *at, inputs, nominal) {
                        continue;
                    }
                    match self.solve(sheet, block, inputs) {
                        Ok(solved) => self.outcomes[*at] = Ok(solved),
                        Err(_) => return false,
                    }
                }
            }
        }
        true
    }

    /// Newton's method on a block of one unknown from the solution of `nominal`; whether it converged inside the bounds.
    fn follow(&mut self, block: &Block, at: usize, inputs: &[f64], nominal: &[f64]) -> bool {
        /// Steps at the most: a start close to the solution needs five.
        const MOST_STEPS: u32 = 12;
        /// A step this small against the unknown is rounding.
        const SETTLED: f64 = 4.0 * f64::EPSILON;
        let ([(_, slot)], [residual]) = (&block.unknowns[..], &block.residuals[..]) else { return false };
        let slot = *slot as usize;
        if let Ok(Solved { branch: Some(branch), .. }) = &self.outcomes[at] {
            self.values[slot] = self.values[block.candidates[*branch].0 as usize];
            self.plan.tape.evaluate(block.region.clone(), inputs, &mut self.values);
            return self.values[slot].is_finite();
        }
        let Evaluation { plan, values, tangents, .. } = self;
        values[slot] = nominal[slot];
        tangents[slot] = 1.0;
        for _ in 0..MOST_STEPS {
            plan.tape.evaluate(block.region.clone(), inputs, values);
            plan.tape.tangents(block.region.clone(), values, tangents);
            let (left, right) = (residual.left as usize, residual.right as usize);
            let step = (values[left] - values[right]) / (tangents[left] - tangents[right]);
            if !step.is_finite() {
                return false;
            }
            values[slot] -= step;
            if step.abs() <= SETTLED * values[slot].abs() {
                plan.tape.evaluate(block.region.clone(), inputs, values);
                let value = |slot: Option<Slot>, otherwise: f64| slot.map_or(otherwise, |slot| values[slot as usize]);
                return block.bounds.iter().all(|bounds| {
                    let x = values[plan.slots[bounds.quantity.0 as usize] as usize];
                    x >= value(bounds.low, f64::NEG_INFINITY) && x <= value(bounds.high, f64::INFINITY)
                });
            }
        }
        false
    }
}

/// The bounds of a quantity as numbers, and what it is near to.
struct Range {
    low: f64,
    high: f64,
    near: Option<f64>,
    /// The sheet gives both ends.
    stated: bool,
}

impl Evaluation<'_> {
    fn range(&self, sheet: &Sheet, bounds: &Bounds) -> Range {
        let value = |slot: Option<Slot>| slot.map(|slot| self.values[slot as usize]).filter(|value| value.is_finite());
        let quantity = sheet.quantity(bounds.quantity);
        let (widest_low, widest_high) = physics::widest(sheet, quantity);
        let (low, high, near) = (value(bounds.low), value(bounds.high), value(bounds.near));
        let reach = near.unwrap_or(0.0).abs().max(low.unwrap_or(0.0).abs()) * 1e6;
        Range {
            low: low.unwrap_or(if physics::cannot_be_negative(quantity) { widest_low } else { widest_low.min(-reach) }),
            high: high.unwrap_or(widest_high.max(reach)),
            near,
            stated: low.is_some() && high.is_some(),
        }
    }

    fn solve(&mut self, sheet: &Sheet, block: &Block, inputs: &[f64]) -> Result<Solved, Fault> {
        if block.outer.iter().any(|slot| !self.values[*slot as usize].is_finite()) {
            return Err(Fault::Silent);
        }
        match (&block.unknowns[..], &block.residuals[..]) {
            ([(quantity, slot)], [_]) => self.solve_one(sheet, block, *quantity, *slot, inputs),
            _ => self.solve_several(sheet, block, inputs),
        }
    }

    fn sample_at(&mut self, block: &Block, slot: Slot, x: f64, size: f64, inputs: &[f64]) -> Sample {
        OneResidual { evaluation: self, block, slot, size, inputs, evaluations: 0 }.sample(x)
    }

    fn solve_one(&mut self, sheet: &Sheet, block: &Block, quantity: QuantityId, slot: Slot, inputs: &[f64]) -> Result<Solved, Fault> {
        let Some(bounds) = block.bounds.iter().find(|bounds| bounds.quantity == quantity) else { return Err(Fault::Silent) };
        let range = self.range(sheet, bounds);
        let size = range.near.filter(|near| *near != 0.0).map_or(physics::usual_size(sheet.quantity(quantity)), f64::abs);
        let mut evaluations = 0;
        let found: Vec<f64> = if block.candidates.is_empty() {
            let mut hints: Vec<f64> = range.near.into_iter().collect();
            hints.push(size);
            let mut residual = OneResidual { evaluation: self, block, slot, size, inputs, evaluations: 0 };
            let found = scalar::roots(&mut residual, range.low, range.high, &hints, size);
            evaluations = residual.evaluations;
            found
        } else {
            let mut branches: Vec<f64> =
                block.candidates.iter().map(|(slot, _)| self.values[*slot as usize]).filter(|value| value.is_finite()).collect();
            branches.dedup();
            branches
        };
        let mut inside: Vec<f64> = Vec::new();
        // Roots with a negative length or area count where there is no other.
        let mut negative: Vec<f64> = Vec::new();
        let mut outside = None;
        for root in found {
            let sample = self.sample_at(block, slot, root, size, inputs);
            if !sample.value.is_finite() {
                continue;
            }
            match self.beyond(sheet, block) {
                None if self.is_taken_positive(sheet, block) => inside.push(root),
                None => negative.push(root),
                Some(fault) => outside = outside.or(Some(fault)),
            }
        }
        if inside.is_empty() {
            inside = negative;
        }
        let chosen = match (inside.len(), range.near) {
            (0, _) => return Err(outside.unwrap_or(Fault::NoRoot { quantity, low: range.low, high: range.high })),
            (1, _) => inside[0],
            (_, Some(near)) => inside.iter().copied().min_by(|a, b| (a - near).abs().total_cmp(&(b - near).abs())).unwrap_or(inside[0]),
            (_, None) => match self.nearest_by_others(sheet, block, slot, size, &inside, inputs) {
                Some(root) => root,
                None => return Err(Fault::Several { quantity, roots: inside }),
            },
        };
        let sample = self.sample_at(block, slot, chosen, size, inputs);
        let branch = block.candidates.iter().position(|(slot, _)| self.values[*slot as usize] == chosen);
        let residual = if sample.value == 0.0 { 0.0 } else { sample.value.abs() / sample.magnitude };
        Ok(Solved {
            how: if block.candidates.is_empty() { "bracketing" } else { "closed form of two branches" },
            evaluations: evaluations.max(1),
            residual,
            branch,
            others: inside.into_iter().filter(|root| *root != chosen).collect(),
            told: 0,
            factors: Factors::of(&[Entry { row: 0, column: 0, value: sample.slope }], &[1.0], &mut Symbolic::default()),
        })
    }

    /// The root at which the other quantities of the block come nearest to what they are near to.
    fn nearest_by_others(&mut self, sheet: &Sheet, block: &Block, slot: Slot, size: f64, roots: &[f64], inputs: &[f64]) -> Option<f64> {
        let nears: Vec<(Slot, f64)> = block
            .bounds
            .iter()
            .filter_map(|bounds| Some((self.plan.slots[bounds.quantity.0 as usize], self.range(sheet, bounds).near?)))
            .collect();
        if nears.is_empty() {
            return None;
        }
        let mut best = None;
        for root in roots {
            self.sample_at(block, slot, *root, size, inputs);
            let distance: f64 = nears
                .iter()
                .map(|(slot, near)| crate::units::math::powi((self.values[*slot as usize] - near) / near.abs().max(1e-12), 2))
                .sum();
            if best.is_none_or(|(least, _)| distance < least) {
                best = Some((distance, *root));
            }
        }
        best.map(|(_, root)| root)
    }

    /// Whether every quantity of a block that is taken for positive without a word is so, at the values that stand.
    fn is_taken_positive(&self, sheet: &Sheet, block: &Block) -> bool {
        block.bounds.iter().all(|bounds| {
            let value = self.values[self.plan.slots[bounds.quantity.0 as usize] as usize];
            value >= 0.0 || bounds.low.is_some() || !physics::is_taken_positive(sheet.quantity(bounds.quantity))
        })
    }

    /// The first quantity of a block that lies beyond its bounds, at the values that stand.
    fn beyond(&self, sheet: &Sheet, block: &Block) -> Option<Fault> {
        block.bounds.iter().find_map(|bounds| {
            let value = self.values[self.plan.slots[bounds.quantity.0 as usize] as usize];
            let range = self.range(sheet, bounds);
            let quantity = sheet.quantity(bounds.quantity);
            let lowest = if bounds.low.is_some() || physics::cannot_be_negative(quantity) { range.low } else { f64::NEG_INFINITY };
            let highest = if bounds.high.is_some() { range.high } else { f64::INFINITY };
            let slack = |bound: f64| ON_THE_BOUND * bound.abs();
            (!value.is_finite() || value < lowest - slack(lowest) || value > highest + slack(highest)).then_some(Fault::Outside {
                quantity: bounds.quantity,
                value,
                low: lowest,
                high: highest,
            })
        })
    }

    fn solve_several(&mut self, sheet: &Sheet, block: &Block, inputs: &[f64]) -> Result<Solved, Fault> {
        let unknowns: Vec<Unknown> = block
            .bounds
            .iter()
            .map(|bounds| {
                let range = self.range(sheet, bounds);
                let usual = physics::usual_size(sheet.quantity(bounds.quantity));
                let span = range.high - range.low;
                let size = match range.near {
                    Some(near) if near != 0.0 => near.abs(),
                    _ if range.stated && span.is_finite() => range.low.abs().max(range.high.abs()).min(span.max(usual)),
                    _ => usual,
                };
                Unknown { low: range.low, high: range.high, near: range.near, size }
            })
            .collect();
        let guided = block.bounds.iter().zip(&unknowns).all(|(bounds, unknown)| bounds.near.is_some() || unknown.near.is_some());
        let mut solutions: Vec<newton::Run> = Vec::new();
        let mut best: Option<newton::Run> = None;
        let mut evaluations = 0;
        let mut starts = 0;
        for number in 0..MOST_STARTS {
            starts += 1;
            let start = newton::start(&unknowns, number);
            let run = newton::run(&mut InBlock { evaluation: self, block, inputs, unknowns: &unknowns }, &unknowns, &start);
            // The search for others is no part of the way to the one that is meant.
            if !guided || solutions.is_empty() {
                evaluations += run.evaluations;
            }
            if run.has_converged() {
                if !solutions.iter().any(|known| newton::same(&known.x, &run.x, &unknowns)) {
                    solutions.push(run);
                }
                // With a guess for all of them the first solution is the one that is meant; others are looked for to be told.
                if guided && (self.repeated || unknowns.len() > MOST_UNKNOWNS_SEARCHED) {
                    break;
                }
            } else if best.as_ref().is_none_or(|best| run.residual < best.residual) {
                best = Some(run);
            }
        }
        let positive = |run: &newton::Run| {
            run.x
                .iter()
                .zip(&block.bounds)
                .all(|(x, bounds)| *x >= 0.0 || bounds.low.is_some() || !physics::is_taken_positive(sheet.quantity(bounds.quantity)))
        };
        // A guess that leads to a negative length means it.
        let means_negative = guided && solutions.first().is_some_and(|first| !positive(first));
        if !means_negative && solutions.iter().any(positive) {
            solutions.retain(positive);
        }
        let distance = |run: &newton::Run| -> f64 {
            let off = |(x, unknown): (&f64, &Unknown)| unknown.near.map_or(0.0, |near| ((x - near) / near.abs().max(unknown.size)).abs());
            run.x.iter().zip(&unknowns).map(off).fold(0.0, f64::max)
        };
        let nearest = solutions.iter().enumerate().min_by(|a, b| distance(a.1).total_cmp(&distance(b.1))).map(|(at, _)| at);
        // From a guess for all of them the way itself leads to the one that is meant.
        let chosen = if guided && !solutions.is_empty() { Some(0) } else { nearest };
        let Some(solution) = chosen.map(|at| solutions.swap_remove(at)) else {
            let (worst, residual, x) = best.map_or((0, f64::INFINITY, Vec::new()), |best| (best.worst, best.residual, best.x));
            let at_bound = block
                .unknowns
                .iter()
                .zip(&unknowns)
                .zip(&x)
                .filter(|((_, unknown), x)| **x <= unknown.low || **x >= unknown.high)
                .map(|(((id, _), _), _)| *id)
                .collect();
            return Err(Fault::NotConverged { starts, worst, residual, at_bound, best: x });
        };
        // The unknown in which the solutions differ most tells them apart.
        let telling = |solutions: &[newton::Run]| {
            let spread = |at: usize| {
                let values = solutions.iter().map(|other| other.x[at]).chain([solution.x[at]]);
                let (low, high) = values.fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), x| (low.min(x), high.max(x)));
                (high - low) / unknowns[at].size.max(high.abs())
            };
            (0..unknowns.len()).max_by(|a, b| spread(*a).total_cmp(&spread(*b))).unwrap_or(0)
        };
        let at = telling(&solutions);
        let others: Vec<f64> = solutions.iter().map(|other| other.x[at]).collect();
        if !others.is_empty() && !guided && !unknowns.iter().any(|unknown| unknown.near.is_some()) {
            let mut roots: Vec<f64> = others.iter().copied().chain([solution.x[at]]).collect();
            roots.sort_by(f64::total_cmp);
            return Err(Fault::Several { quantity: block.unknowns[at].0, roots });
        }
        let n = unknowns.len();
        let mut entries = Vec::new();
        let mut system = InBlock { evaluation: self, block, inputs, unknowns: &unknowns };
        let (mut f, mut sizes) = (vec![0.0; n], vec![0.0; n]);
        system.residuals(&solution.x, &mut f, &mut sizes);
        system.jacobian(&mut entries);
        let scales: Vec<f64> = solution.x.iter().zip(&unknowns).map(|(x, unknown)| x.abs().max(1e-3 * unknown.size)).collect();
        let factors = Factors::of(&entries, &scales, &mut Symbolic::default());
        Ok(Solved { how: "Newton's method", evaluations, residual: solution.residual, branch: None, others, told: at, factors })
    }

    /// Carries the tangents of inputs through all segments. `tangents` holds those of the inputs and zeros.
    pub(super) fn tangents(&self, tangents: &mut [f64]) {
        for (segment, block) in self.segments() {
            match (segment, block) {
                (Segment::Straight(range), _) => self.plan.tape.tangents(range.clone(), &self.values, tangents),
                (Segment::Block(at), Some(block)) => {
                    let range = block.region.clone();
                    for (_, slot) in &block.unknowns {
                        tangents[*slot as usize] = 0.0;
                    }
                    self.plan.tape.tangents(range.clone(), &self.values, tangents);
                    let moved: Vec<f64> = block
                        .residuals
                        .iter()
                        .map(|residual| tangents[residual.right as usize] - tangents[residual.left as usize])
                        .collect();
                    let Some(Ok(Solved { factors: Some(factors), .. })) = self.outcomes.get(*at) else { continue };
                    if moved.iter().all(|moved| *moved == 0.0) {
                        continue;
                    }
                    for ((_, slot), tangent) in block.unknowns.iter().zip(factors.solve(&moved)) {
                        tangents[*slot as usize] = tangent;
                    }
                    self.plan.tape.tangents(range, &self.values, tangents);
                }
                (Segment::Block(_), None) => {}
            }
        }
    }

    fn segments(&self) -> impl Iterator<Item = (&Segment, Option<&Block>)> {
        self.plan.segments.iter().map(|segment| match segment {
            Segment::Straight(_) => (segment, None),
            Segment::Block(at) => (segment, self.plan.blocks.get(*at)),
        })
    }
}

/// The residual of a block of one unknown.
struct OneResidual<'e, 'p, 'a> {
    evaluation: &'e mut Evaluation<'p>,
    block: &'a Block,
    slot: Slot,
    size: f64,
    inputs: &'a [f64],
    evaluations: u32,
}

impl scalar::Function for OneResidual<'_, '_, '_> {
    fn value(&mut self, x: f64) -> f64 {
        self.evaluations += 1;
        let values = &mut self.evaluation.values;
        values[self.slot as usize] = x;
        self.evaluation.plan.tape.evaluate(self.block.region.clone(), self.inputs, values);
        let residual = &self.block.residuals[0];
        values[residual.left as usize] - values[residual.right as usize]
    }

    fn sample(&mut self, x: f64) -> Sample {
        let value = self.value(x);
        let Evaluation { plan, values, tangents, magnitudes, .. } = &mut *self.evaluation;
        let region = self.block.region.clone();
        tangents[self.slot as usize] = 1.0;
        plan.tape.tangents(region.clone(), values, tangents);
        magnitudes[self.slot as usize] = x.abs().max(1e-3 * self.size);
        plan.tape.magnitudes(region.clone(), values, magnitudes);
        let residual = &self.block.residuals[0];
        let slope = tangents[residual.left as usize] - tangents[residual.right as usize];
        let sides = |of: &[f64]| of[residual.left as usize].abs() + of[residual.right as usize].abs();
        let magnitude = sides(magnitudes).max(sides(values));
        // A side outside the block does not move with its unknown.
        tangents[region].fill(0.0);
        Sample { value, slope, magnitude }
    }
}

/// A block as a system of several unknowns.
struct InBlock<'e, 'p, 'a> {
    evaluation: &'e mut Evaluation<'p>,
    block: &'a Block,
    inputs: &'a [f64],
    unknowns: &'a [Unknown],
}

impl System for InBlock<'_, '_, '_> {
    fn n(&self) -> usize {
        self.block.unknowns.len()
    }

    fn residuals(&mut self, x: &[f64], residuals: &mut [f64], magnitudes: &mut [f64]) {
        let evaluation = &mut *self.evaluation;
        let plan = evaluation.plan;
        for (((_, slot), x), unknown) in self.block.unknowns.iter().zip(x).zip(self.unknowns) {
            evaluation.values[*slot as usize] = *x;
            evaluation.magnitudes[*slot as usize] = x.abs().max(1e-3 * unknown.size);
        }
        plan.tape.evaluate(self.block.region.clone(), self.inputs, &mut evaluation.values);
        plan.tape.magnitudes(self.block.region.clone(), &evaluation.values, &mut evaluation.magnitudes);
        for (at, residual) in self.block.residuals.iter().enumerate() {
            let (left, right) = (residual.left as usize, residual.right as usize);
            residuals[at] = evaluation.values[left] - evaluation.values[right];
            let size = |slot: usize| evaluation.magnitudes[slot].max(evaluation.values[slot].abs());
            magnitudes[at] = size(left) + size(right);
        }
    }

    fn jacobian(&mut self, entries: &mut Vec<Entry>) {
        let Evaluation { plan, values, adjoints, .. } = &mut *self.evaluation;
        for (row, residual) in self.block.residuals.iter().enumerate() {
            // Only the unknowns that this relation reads are looked at: a row costs what its relation costs.
            for column in &residual.reads {
                adjoints[self.block.unknowns[*column as usize].1 as usize] = 0.0;
            }
            adjoints[residual.ops.clone()].fill(0.0);
            adjoints[residual.left as usize] += 1.0;
            adjoints[residual.right as usize] -= 1.0;
            plan.tape.adjoints(residual.ops.clone(), values, adjoints);
            for column in &residual.reads {
                let value = adjoints[self.block.unknowns[*column as usize].1 as usize];
                if value != 0.0 {
                    entries.push(Entry { row: row as u32, column: *column, value });
                }
            }
        }
    }
}
