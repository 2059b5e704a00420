//! The count: every operator on every sheet, the table, and the floor.

use std::collections::BTreeMap;
use std::fmt::Write;

use gaswright::diagnostic::Severity;

use super::good_sheet::GoodSheet;
use super::mutant::{Found, Operator, judge};
use super::{gases, paper, quantities, relations, slips, states};

const OPERATORS: &[Operator] = &[
    Operator { name: "pressure without basis", least: Severity::Error, mutants: quantities::basis_dropped },
    Operator { name: "basis joined to its unit", least: Severity::Error, mutants: quantities::basis_joined },
    Operator { name: "gauge without site", least: Severity::Error, mutants: quantities::site_dropped },
    Operator { name: "bare number for a quantity", least: Severity::Error, mutants: quantities::unit_dropped },
    Operator { name: "two temperatures added", least: Severity::Error, mutants: quantities::temperatures_added },
    Operator { name: "two gauge readings added", least: Severity::Error, mutants: quantities::gauge_readings_added },
    Operator { name: "unit of another kind", least: Severity::Error, mutants: quantities::wrong_kind },
    Operator { name: "wrong prefix", least: Severity::Warning, mutants: quantities::wrong_prefix },
    Operator { name: "reference conditions missing", least: Severity::Error, mutants: quantities::reference_dropped },
    Operator { name: "difference for an absolute value", least: Severity::Error, mutants: quantities::difference_for_absolute },
    Operator { name: "absolute value for a difference", least: Severity::Error, mutants: quantities::absolute_for_difference },
    Operator { name: "molar for specific gas constant", least: Severity::Error, mutants: quantities::molar_for_specific_constant },
    Operator { name: "below absolute zero, below vacuum", least: Severity::Error, mutants: quantities::beyond_the_possible },
    Operator { name: "altitude against pressure", least: Severity::Warning, mutants: quantities::altitude_against_pressure },
    Operator { name: "terms of different dimension", least: Severity::Error, mutants: relations::terms_disagree },
    Operator { name: "given missing", least: Severity::Error, mutants: relations::given_dropped },
    Operator { name: "unknown missing", least: Severity::Error, mutants: relations::unknown_dropped },
    Operator { name: "relation missing", least: Severity::Error, mutants: relations::relation_dropped },
    Operator { name: "given made unknown", least: Severity::Error, mutants: relations::given_made_unknown },
    Operator { name: "relation doubled with another number", least: Severity::Error, mutants: relations::relation_doubled },
    Operator { name: "second value for a given", least: Severity::Error, mutants: relations::given_contradicted },
    Operator { name: "second value for a definition", least: Severity::Error, mutants: relations::definition_contradicted },
    Operator { name: "same name twice", least: Severity::Error, mutants: relations::name_twice },
    Operator { name: "two names for one quantity", least: Severity::Warning, mutants: relations::two_names },
    Operator { name: "given that nothing uses", least: Severity::Warning, mutants: relations::given_unused },
    Operator { name: "unknown that nothing asks for", least: Severity::Warning, mutants: relations::unknown_unused },
    Operator { name: "requirement that decides nothing", least: Severity::Warning, mutants: relations::requirement_empty },
    Operator { name: "answer that depends on no given", least: Severity::Warning, mutants: relations::answer_empty },
    Operator { name: "wrong sign", least: Severity::Error, mutants: relations::sign_turned },
    Operator { name: "undefined at the solution", least: Severity::Error, mutants: relations::undefined_at_the_solution },
    Operator { name: "wrong root of several", least: Severity::Error, mutants: relations::roots_left_open },
    Operator { name: "decided by figures not there", least: Severity::Warning, mutants: relations::decided_by_missing_figures },
    Operator { name: "p, v and T all given", least: Severity::Error, mutants: states::third_property },
    Operator { name: "one property of a state", least: Severity::Error, mutants: states::one_property },
    Operator { name: "properties that depend on each other", least: Severity::Error, mutants: states::dependent_properties },
    Operator { name: "property given twice", least: Severity::Error, mutants: states::property_twice },
    Operator { name: "property of another dimension", least: Severity::Error, mutants: states::property_of_another_dimension },
    Operator { name: "below the range of the heat capacity", least: Severity::Error, mutants: states::below_the_heat_capacity },
    Operator { name: "shares without saying of what", least: Severity::Error, mutants: gases::basis_of_shares_dropped },
    Operator { name: "shares that do not sum to one", least: Severity::Error, mutants: gases::shares_that_do_not_sum },
    Operator { name: "constant of a gas by hand", least: Severity::Warning, mutants: gases::constant_by_hand },
    Operator { name: "heat capacity ratio by hand", least: Severity::Warning, mutants: gases::heat_capacity_ratio_by_hand },
    Operator { name: "description missing", least: Severity::Error, mutants: paper::description_dropped },
    Operator { name: "clause without its text", least: Severity::Error, mutants: paper::clause_without_text },
    Operator { name: "source missing", least: Severity::Warning, mutants: paper::source_dropped },
    Operator { name: "reason missing", least: Severity::Warning, mutants: paper::reason_dropped },
    Operator { name: "number typed in a sentence", least: Severity::Warning, mutants: paper::number_typed },
    Operator { name: "head key misspelt", least: Severity::Error, mutants: paper::head_key_misspelt },
    Operator { name: "head key twice", least: Severity::Error, mutants: paper::head_key_twice },
    Operator { name: "statement word misspelt", least: Severity::Error, mutants: slips::keyword_misspelt },
    Operator { name: "symbol misspelt", least: Severity::Error, mutants: slips::symbol_misspelt },
    Operator { name: "unit misspelt", least: Severity::Error, mutants: slips::unit_misspelt },
    Operator { name: "gas misspelt", least: Severity::Error, mutants: slips::gas_misspelt },
    Operator { name: "field misspelt", least: Severity::Error, mutants: slips::field_misspelt },
    Operator { name: "decimal comma", least: Severity::Error, mutants: slips::decimal_comma },
    Operator { name: "== for =", least: Severity::Error, mutants: slips::equals_doubled },
    Operator { name: "comparison the wrong way about", least: Severity::Error, mutants: slips::comparison_turned },
    Operator { name: "quote not closed", least: Severity::Error, mutants: slips::quote_lost },
    Operator { name: "operator lost", least: Severity::Error, mutants: slips::operator_lost },
    Operator { name: "bracket not closed", least: Severity::Error, mutants: slips::bracket_lost },
];

/// The shares that must not fall, in percent: caught, on the right line, with the right cure. The goals are 98, 95 and 90; a share
/// reached is written here as its floor, so that what was once found stays found.
const FLOOR: [f64; 3] = [99.6, 99.5, 99.3];

/// One mistake, one finding: the mean number of errors of a mutant must not pass this.
const MOST_ERRORS: f64 = 1.0;

#[derive(Default)]
struct Count {
    mutants: usize,
    caught: usize,
    on_its_line: usize,
    cured: usize,
    errors: usize,
}

impl Count {
    fn add(&mut self, found: Found, errors: usize) {
        self.mutants += 1;
        self.caught += usize::from(found >= Found::Elsewhere);
        self.on_its_line += usize::from(found >= Found::OnItsLine);
        self.cured += usize::from(found == Found::Cured);
        self.errors += errors;
    }

    fn shares(&self) -> [f64; 3] {
        [self.caught, self.on_its_line, self.cured].map(|count| 100.0 * count as f64 / self.mutants.max(1) as f64)
    }

    fn row(&self, name: &str) -> String {
        let [caught, on_its_line, cured] = self.shares();
        let errors = self.errors as f64 / self.mutants.max(1) as f64;
        format!("{name:<38} {:>7} {caught:>8.1} {on_its_line:>8.1} {cured:>8.1} {errors:>8.2}\n", self.mutants)
    }
}

/// Prints the table (`cargo test mutation -- --nocapture`) and holds the floor. With the environment variable `MUTANTS=list`, every mutant
/// that was not cured on its line is listed with what was said of it.
#[test]
fn mistakes_are_caught_on_their_lines_with_their_cures() {
    let sheets = GoodSheet::all();
    assert!(sheets.len() >= 8, "{} sheets", sheets.len());
    let mut all = Count::default();
    let mut table = format!("{:<38} {:>7} {:>8} {:>8} {:>8} {:>8}\n", "mistake", "mutants", "caught %", "line %", "cure %", "errors");
    let mut panics = Vec::new();
    let mut missed: BTreeMap<Found, Vec<String>> = BTreeMap::new();
    for operator in OPERATORS {
        let mut count = Count::default();
        for sheet in &sheets {
            for mutant in (operator.mutants)(sheet) {
                assert_ne!(mutant.text, sheet.text, "{}: {} changes nothing", operator.name, mutant.change);
                let judgement = judge(sheet, operator.least, &mutant);
                count.add(judgement.found, judgement.errors);
                all.add(judgement.found, judgement.errors);
                if judgement.panicked {
                    panics.push(format!("{}: {}", sheet.name, mutant.change));
                }
                if judgement.found < Found::Cured {
                    let lines: Vec<String> = mutant.lines.iter().map(u32::to_string).collect();
                    missed.entry(judgement.found).or_default().push(format!(
                        "  {}: {}: {} (line {}){}",
                        operator.name,
                        sheet.name,
                        mutant.change,
                        lines.join(", "),
                        judgement.told
                    ));
                }
            }
        }
        assert!(count.mutants > 0, "{}: no sheet has room for it", operator.name);
        table.push_str(&count.row(operator.name));
    }
    table.push_str(&all.row("all"));
    if std::env::var_os("MUTANTS").is_some_and(|value| value == "list") {
        for (found, mutants) in &missed {
            let _ = writeln!(table, "\n{found:?}: {}\n{}", mutants.len(), mutants.join("\n"));
        }
    }
    println!("{table}");
    for ((share, floor), what) in all.shares().into_iter().zip(FLOOR).zip(["caught", "on the right line", "with the right cure"]) {
        assert!(share >= floor, "{share:.2} % {what}, {floor} % before\n{table}");
    }
    assert!(panics.is_empty(), "the program panics:\n{}", panics.join("\n"));
    assert!(all.errors as f64 <= MOST_ERRORS * all.mutants as f64, "{} errors for {} mistakes\n{table}", all.errors, all.mutants);
}
