//! The order of the working: one in which it can be followed, and that of the sheet as far as it goes.

use std::cmp::Reverse;
use std::collections::{BTreeMap, BinaryHeap};

use crate::report::draft::Draft;
use crate::report::formula::{Formula, Put};
use crate::sheet::{ExprId, Origin, QuantityId, RelationOrigin, StateId};
use crate::solve::{Method, Step};

/// The steps in an order in which they can be followed and which keeps that of the sheet as far as it can, each with the statement
/// it belongs to. What the line of a state fixes outright is one group.
pub(super) fn grouped<'a>(draft: &Draft, steps: &'a [Step]) -> Vec<(usize, Vec<&'a Step>)> {
    let sheet = draft.input.sheet;
    let mut found_by: BTreeMap<QuantityId, usize> = BTreeMap::new();
    for (at, step) in steps.iter().enumerate() {
        for id in &step.quantities {
            found_by.insert(*id, at);
        }
    }
    let key = |step: &Step| {
        step.relations.iter().filter_map(|relation| sheet.relations.get(*relation)).map(|relation| relation.statement).max().unwrap_or(0)
    };
    let mut waits = vec![0_usize; steps.len()];
    let mut followers: Vec<Vec<usize>> = vec![Vec::new(); steps.len()];
    for (at, step) in steps.iter().enumerate() {
        let mut needs: Vec<usize> =
            uses(draft, step).into_iter().filter_map(|id| found_by.get(&id).copied()).filter(|other| *other != at).collect();
        needs.sort_unstable();
        needs.dedup();
        waits[at] = needs.len();
        for need in needs {
            followers[need].push(at);
        }
    }
    let rank = |at: usize| (key(&steps[at]), fixed_state(draft, &steps[at]).is_none(), at);
    // What a line fixes outright comes before what is calculated from it.
    let mut ready: BinaryHeap<Reverse<(usize, bool, usize)>> =
        (0..steps.len()).filter(|at| waits[*at] == 0).map(|at| Reverse(rank(at))).collect();
    let mut groups: Vec<(usize, Vec<&Step>)> = Vec::new();
    while let Some(Reverse((statement, _, at))) = ready.pop() {
        let step = &steps[at];
        let fixed = fixed_state(draft, step);
        match groups.last_mut() {
            Some((_, group)) if fixed.is_some() && group.first().is_some_and(|first| fixed_state(draft, first) == fixed) => {
                group.push(step)
            }
            _ => groups.push((statement, vec![step])),
        }
        for follower in &followers[at] {
            waits[*follower] -= 1;
            if waits[*follower] == 0 {
                ready.push(Reverse(rank(*follower)));
            }
        }
    }
    groups
}

/// The state whose line gives a quantity as the value of another, with nothing to calculate.
pub(super) fn fixed_state(draft: &Draft, step: &Step) -> Option<StateId> {
    let [relation] = step.relations.as_slice() else { return None };
    let (RelationOrigin::At(state, _), Method::ClosedForm { expression }) =
        (draft.input.sheet.relations.get(*relation)?.origin, &step.method)
    else {
        return None;
    };
    let own = |id: &QuantityId| matches!(draft.input.quantity(*id).origin, Origin::Property(owner, _) if owner == state);
    (step.quantities.iter().all(own) && is_plain(draft, *expression)).then_some(state)
}

/// Whether an expression is a quantity or a number as it stands.
pub(super) fn is_plain(draft: &Draft, expr: ExprId) -> bool {
    matches!(draft.formula(expr, Put::Symbols), Formula::Symbol(_) | Formula::Value(_))
}

/// The quantities that a step takes for known, in the order in which its formulas name them.
pub(super) fn uses(draft: &Draft, step: &Step) -> Vec<QuantityId> {
    let sheet = draft.input.sheet;
    let mut named: Vec<QuantityId> = Vec::new();
    let mut visit = |id: QuantityId| {
        if !step.quantities.contains(&id) && !named.contains(&id) {
            named.push(id);
        }
    };
    match step.method {
        Method::ClosedForm { expression } => sheet.exprs.quantities(expression, &mut visit),
        Method::Numeric { .. } => {
            for relation in step.relations.iter().filter_map(|relation| sheet.relations.get(*relation)) {
                sheet.exprs.quantities(relation.left, &mut visit);
                sheet.exprs.quantities(relation.right, &mut visit);
            }
        }
    }
    named
}
