//! Answers and requirements: the point of the sheet, for a reader who stops here.

use minijinja::Value;
use serde::Serialize;

use crate::report::draft::{Draft, markdown};
use crate::report::markdown::escape;
use crate::report::verdict::margin;
use crate::solve::Verdict;

/// The first part.
#[derive(Clone, Debug, Serialize)]
pub(in crate::report) struct Answers {
    answers: Vec<Answer>,
    requirements: Vec<Requirement>,
    /// What became of the assumptions, in a few words each.
    assumptions: Vec<Summary>,
    /// Whether every requirement is met and no assumption failed.
    sound: bool,
}

/// An answer.
#[derive(Clone, Debug, Serialize)]
struct Answer {
    what: String,
    symbol: Value,
    value: String,
}

/// A requirement and its verdict.
#[derive(Clone, Debug, Serialize)]
struct Requirement {
    text: String,
    condition: Value,
    met: bool,
    margin: String,
    source: String,
    line: u32,
}

/// Assumptions of one verdict.
#[derive(Clone, Debug, Serialize)]
struct Summary {
    text: String,
    verdict: &'static str,
}

/// The answers of a solved sheet.
pub(in crate::report) fn answers(draft: &mut Draft) -> Answers {
    let input = draft.input;
    let answers = input.sheet.answers.iter().map(|answer| {
        let quantity = input.quantity(answer.quantity);
        let what = if quantity.description.is_empty() { quantity.name.clone() } else { quantity.description.clone() };
        let value = input.written(answer.quantity, &answer.shown, answer.figures).map_or_else(String::new, |written| written.typeset());
        Answer { what, symbol: markdown(draft.set_symbol(answer.quantity)), value }
    });
    let answers = answers.collect();
    let judged = input.solution.map_or(&[][..], |solution| &solution.requirements);
    let requirements: Vec<Requirement> = (input.sheet.requirements.iter().zip(judged))
        .map(|(clause, judged)| {
            let condition = clause.condition.as_ref().map(|condition| draft.condition(condition));
            Requirement {
                text: clause.text.clone(),
                condition: markdown(condition.map_or_else(String::new, |condition| draft.math(&condition))),
                met: judged.holds,
                margin: margin(clause.condition.as_ref(), judged).map_or_else(String::new, |margin| margin.typeset()),
                source: clause.source.clone(),
                line: draft.line(clause.statement),
            }
        })
        .collect();
    let assumptions = summaries(draft);
    let sound = requirements.iter().all(|requirement| requirement.met)
        && assumptions.iter().all(|summary| summary.verdict != Verdict::Failed.word());
    Answers { answers, requirements, assumptions, sound }
}

/// What failed and what is left to judgement by name, what is confirmed as a number.
fn summaries(draft: &Draft) -> Vec<Summary> {
    let input = draft.input;
    let stated =
        input.sheet.assumptions.iter().enumerate().filter_map(|(at, clause)| Some((clause.text.clone(), input.assumption_verdict(at)?)));
    let ideal = super::assumption::gas_verdicts(draft);
    let all: Vec<(String, Verdict)> = ideal.into_iter().chain(stated).collect();
    let mut summaries: Vec<Summary> = [Verdict::Failed, Verdict::ForJudgement]
        .into_iter()
        .flat_map(|verdict| {
            all.iter()
                .filter(move |(_, other)| *other == verdict)
                .map(move |(text, _)| Summary { text: text.clone(), verdict: words(verdict) })
        })
        .collect();
    let confirmed: Vec<&str> = all.iter().filter(|(_, verdict)| *verdict == Verdict::Confirmed).map(|(text, _)| text.as_str()).collect();
    summaries.extend(confirmed.into_iter().map(|text| Summary { text: text.to_owned(), verdict: words(Verdict::Confirmed) }));
    summaries
}

/// The verdict as a report says it.
pub(super) fn words(verdict: Verdict) -> &'static str {
    match verdict {
        Verdict::ForJudgement => "for the checker to judge",
        other => other.word(),
    }
}

/// A text of the sheet in emphasis.
pub(super) fn emphasis(text: &str) -> String {
    format!("*{}*", escape(text))
}
