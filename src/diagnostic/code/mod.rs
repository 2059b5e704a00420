//! The codes. Each has one file: its wording, and its page for `gaswright explain`.
//!
//! A page says what is wrong, why it matters, shows a sheet that raises the code (a block marked `gw`) and the same
//! sheet cured (a block marked `gw cured`). Both run as tests, and so does the rule that every code has a page and a
//! sheet in the corpus.

use super::{Diagnostic, Span};

/// What `gaswright explain` knows of a code.
#[derive(Clone, Copy, Debug)]
pub struct Page {
    /// The code.
    pub code: &'static str,
    /// Markdown.
    pub text: &'static str,
}

macro_rules! codes {
    ($($module:ident),* $(,)?) => {
        $(pub(crate) mod $module;)*

        /// Every code, in alphabetical order.
        pub const ALL: &[Page] = &[$(Page { code: $module::CODE, text: $module::PAGE }),*];
    };
}

codes! {
    absolute_in_product,
    answer_without_input,
    argument_count,
    assumption_without_reason,
    bad_head,
    bad_line,
    bad_live_value,
    basis_out_of_place,
    below_absolute_zero,
    below_vacuum,
    bounds_out_of_place,
    chained_comparison,
    constant_by_hand,
    correlation_out_of_place,
    decided_by_missing_figures,
    decimal_comma,
    dependent_properties,
    description_missing,
    dimension_mismatch,
    division_by_zero,
    exact_with_uncertainty,
    foreign_sign,
    gauge_without_site,
    given_expression,
    head_key_twice,
    head_misplaced,
    head_needs_quotes,
    head_value,
    head_without_end,
    hidden_character,
    ideal_law_fails,
    inch_word,
    indented_line,
    kind_mismatch,
    later_edition,
    misplaced_uncertainty,
    missing_blank,
    missing_digit,
    missing_equals,
    missing_operator,
    missing_text,
    mixture_shares,
    name_defined_twice,
    near_condensation,
    near_critical,
    negative_result,
    no_gas_data,
    no_solution,
    no_such_state,
    not_converged,
    not_offered,
    not_utf8,
    number_out_of_range,
    one_sided_uncertainty,
    outside_model_range,
    over_determined,
    power_too_high,
    pressure_without_basis,
    property_given_twice,
    reference_missing,
    requirement_decides_nothing,
    reserved_name,
    said_twice,
    several_roots,
    site_pressure_and_altitude,
    source_missing,
    surplus_agrees,
    text_without_quotes,
    too_deep,
    too_long,
    too_many,
    too_many_errors,
    twin_names,
    typed_number_disagrees,
    unbalanced_bracket,
    uncertainty_out_of_place,
    unclosed_text,
    undefined_value,
    under_determined,
    unindented_line,
    unit_power,
    unit_with_blanks,
    unknown_field,
    unknown_gas,
    unknown_head_key,
    unknown_name,
    unknown_statement,
    unknown_unit,
    unknown_word,
    unused_input,
    unusual_size,
    water_condenses,
    weak_model,
    word_not_offered,
    would_be_solid,
    would_condense,
    wrong_equals,
    wrong_quote,
}

/// The page of a code.
#[must_use]
pub fn page(code: &str) -> Option<&'static Page> {
    ALL.iter().find(|page| page.code == code)
}

/// A dimension word with its article: `a mass`, `an energy`. What has no name is called by its unit: `a quantity in m3.K`.
pub(crate) fn a(word: &str) -> String {
    // Units of dimensions without a name hold a sign or a digit, names never do.
    if word.contains(|c: char| c.is_ascii_digit() || matches!(c, '.' | '/' | '^')) {
        return format!("a quantity in {word}");
    }
    // No word of the trade here begins with a `u` that sounds as in "unit", or with a silent `h`.
    let article = if word.starts_with(['a', 'e', 'i', 'o', 'u']) { "an" } else { "a" };
    format!("{article} {word}")
}

/// Names what was probably meant, with the edit that would put it there; `otherwise` is the help where nothing is near.
pub(crate) fn suggest(finding: Diagnostic, span: Span, near: &[&str], otherwise: &str) -> Diagnostic {
    match near {
        [] => finding.help(otherwise.to_owned()),
        [one] => finding.help(format!("did you mean `{one}`?")).edit(span, *one),
        [first, ..] => {
            let all: Vec<String> = near.iter().map(|name| format!("`{name}`")).collect();
            finding.help(format!("did you mean {}?", all.join(", "))).edit(span, *first)
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn dimension_words_have_their_article() {
        for (word, said) in [
            ("mass", "a mass"),
            ("pure number", "a pure number"),
            ("Joule-Thomson coefficient", "a Joule-Thomson coefficient"),
            ("energy", "an energy"),
            ("acceleration", "an acceleration"),
            ("amount of substance", "an amount of substance"),
            ("electric current", "an electric current"),
            ("absolute pressure", "an absolute pressure"),
            ("m3.K", "a quantity in m3.K"),
            ("1/K3", "a quantity in 1/K3"),
            ("kg^(1/2)/(m^(1/2).s)", "a quantity in kg^(1/2)/(m^(1/2).s)"),
            ("s5", "a quantity in s5"),
        ] {
            assert_eq!(a(word), said);
        }
    }
}
