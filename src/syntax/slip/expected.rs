//! What could have stood where reading stopped: the rules that were tried there, as words for people.

use crate::syntax::grammar::Rule;

/// What a number is called.
const NUMBER: &str = "a number";

/// Phrases shown at most.
const MOST: usize = 6;

/// The words that could stand in the place of a misspelt one.
pub(super) fn words(rules: &[Rule]) -> Vec<&'static str> {
    rules.iter().flat_map(|rule| word(*rule)).copied().collect()
}

/// The word or words that a rule reads.
fn word(rule: Rule) -> &'static [&'static str] {
    match rule {
        Rule::altitude_word => &["altitude"],
        Rule::and_word => &["and"],
        Rule::at_word => &["at"],
        Rule::because_word | Rule::reason => &["because"],
        Rule::by_word | Rule::share_basis => &["by"],
        Rule::figures_word | Rule::figures => &["figures"],
        Rule::from_word | Rule::source => &["from"],
        Rule::in_word | Rule::in_unit => &["in"],
        Rule::near_word | Rule::near => &["near"],
        Rule::not_word => &["not"],
        Rule::of_word => &["of"],
        Rule::or_word => &["or"],
        Rule::pressure_word => &["pressure"],
        Rule::when_word => &["when"],
        Rule::within_word | Rule::within => &["within"],
        Rule::reference_name => &["normal", "standard", "scf"],
        Rule::share_basis_name => &["mole", "mass", "volume"],
        Rule::model_name => &["ideal", "real"],
        Rule::basis => &["abs", "gauge", "diff"],
        Rule::exact => &["exact"],
        Rule::triangular => &["triangular"],
        Rule::u_shaped => &["u-shaped"],
        _ => &[],
    }
}

/// The form of a statement, as a reminder.
pub(super) fn form(rule: Rule) -> Option<&'static str> {
    Some(match rule {
        Rule::gas_line => "gas NAME = SPECIES",
        Rule::site_line => "site altitude = VALUE` or `site pressure = VALUE",
        Rule::reference_line => "reference normal at 0 degC, 101.325 kPa abs",
        Rule::given_line => "given NAME = VALUE UNIT \"description\" from \"source\"",
        Rule::unknown_line => "unknown NAME in UNIT within LO .. HI near GUESS",
        Rule::let_line => "let NAME = EXPRESSION in UNIT",
        Rule::state_line => "state NAME of GAS at X = EXPRESSION, Y = EXPRESSION",
        Rule::assume_line => "assume CONDITION \"text\" because \"reason\"",
        Rule::require_line => "require CONDITION \"text\"",
        Rule::caution_line => "caution when CONDITION \"text\"",
        Rule::answer_line => "answer NAME in UNIT, NAME",
        Rule::correlate_line => "correlate NAME, NAME NUMBER",
        _ => return None,
    })
}

/// The rules as a phrase: "`=`, a number or the end of the line".
pub(super) fn phrase(rules: &[Rule]) -> String {
    let mut phrases: Vec<String> = Vec::new();
    for rule in rules {
        let phrase = match rule {
            Rule::equals => "`=`".to_owned(),
            Rule::comma => "`,`".to_owned(),
            Rule::plus => "`+`".to_owned(),
            // A bracket opens an operand, and where one may stand so may a number, which is only tried before a digit.
            Rule::group | Rule::cond_group if !phrases.iter().any(|phrase| phrase == NUMBER) => format!("{NUMBER}, `(`"),
            Rule::open | Rule::group | Rule::cond_group => "`(`".to_owned(),
            Rule::close => "`)`".to_owned(),
            Rule::dots => "`..`".to_owned(),
            Rule::sign => continue,
            Rule::operator => "an operator".to_owned(),
            Rule::comparator => "`<`, `<=`, `>` or `>=`".to_owned(),
            Rule::number | Rule::quantity | Rule::literal => NUMBER.to_owned(),
            Rule::unit => "a unit".to_owned(),
            Rule::path | Rule::name => "a name".to_owned(),
            Rule::arguments => continue,
            Rule::expression | Rule::side | Rule::low | Rule::high => "an expression".to_owned(),
            Rule::condition | Rule::cond_and | Rule::comparison => "a condition".to_owned(),
            Rule::string | Rule::description => "a text in quotes".to_owned(),
            Rule::species | Rule::part | Rule::share => "the name of a gas".to_owned(),
            Rule::uncertainty | Rule::plus_minus => "`±`".to_owned(),
            Rule::coverage => "`k=`".to_owned(),
            Rule::freedom => "`dof=`".to_owned(),
            Rule::setting => "a property with its value".to_owned(),
            Rule::item => "a name".to_owned(),
            Rule::EOI => "the end of the line".to_owned(),
            other => match word(*other) {
                [] => continue,
                words => words.iter().map(|word| format!("`{word}`")).collect::<Vec<_>>().join(", "),
            },
        };
        if !phrases.contains(&phrase) {
            phrases.push(phrase);
        }
    }
    if phrases.len() > MOST {
        // What is likeliest stands first in the rules; the end of the line is always worth saying.
        let end = phrases.iter().position(|phrase| phrase == "the end of the line");
        let end = end.map(|index| phrases.remove(index));
        phrases.truncate(MOST - 1);
        phrases.extend(end);
    }
    match phrases.pop() {
        None => "something else".to_owned(),
        Some(last) if phrases.is_empty() => last,
        Some(last) => format!("{} or {last}", phrases.join(", ")),
    }
}
