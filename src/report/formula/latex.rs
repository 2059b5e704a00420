//! Formulas as LaTeX, for the Markdown report.
//!
//! Hosts of Markdown take a backslash before punctuation for an escape of their own, even between dollar signs, and a
//! vertical bar for the end of a table cell. So commands are words throughout: `\thinspace`, `\lvert`.

use super::symbol::{Subscript, Symbol, greek_word};
use super::tree::{Formula, Hold};
use crate::report::typeset::{THIN, group_digits, typeset_unit};
use crate::report::written::Written;

/// A formula between dollar signs.
pub(in crate::report) fn latex(formula: &Formula) -> String {
    let mut out = String::from("$");
    write(formula, &mut out);
    out.push('$');
    out
}

fn write(formula: &Formula, out: &mut String) {
    match formula {
        Formula::Symbol(symbol) => write_symbol(symbol, out),
        Formula::Value(written) => write_value(written, out),
        Formula::Sum(terms) => write_sum(terms, out),
        Formula::Product(factors) => write_product(factors, out),
        Formula::Fraction(above, below) => {
            out.push_str("\\dfrac");
            group(out, |out| write(above, out));
            group(out, |out| write(below, out));
        }
        Formula::Power(base, exponent) => {
            held(base, Hold::Atom, out);
            out.push('^');
            group(out, |out| match exponent.as_ref() {
                // A built fraction would be too small to read.
                Formula::Fraction(above, below) => {
                    held(above, Hold::Product, out);
                    out.push('/');
                    held(below, Hold::Power, out);
                }
                other => write(other, out),
            });
        }
        Formula::Root(inner, degree) => {
            out.push_str(if *degree == 3 { "\\sqrt[3]" } else { "\\sqrt" });
            group(out, |out| write(inner, out));
        }
        Formula::Function(word, arguments) => {
            write_function_word(word, out);
            write_arguments(arguments, out);
        }
        Formula::Application(symbol, arguments) => {
            write_symbol(symbol, out);
            write_arguments(arguments, out);
        }
        Formula::Magnitude(inner) => {
            out.push_str("\\left\\lvert ");
            write(inner, out);
            out.push_str(" \\right\\rvert ");
        }
        Formula::Chain(first, more) => {
            write(first, out);
            for (sign, part) in more {
                out.push(' ');
                out.push_str(sign_command(sign));
                out.push(' ');
                write(part, out);
            }
        }
        Formula::Words(word, parts) => write_words(word, parts, out),
        Formula::Opening(left, sign) => {
            if let Some(left) = left {
                write(left, out);
                out.push(' ');
            }
            out.push_str(sign_command(sign));
        }
    }
}

fn sign_command(sign: &str) -> &str {
    match sign {
        "≤" => "\\le",
        "≥" => "\\ge",
        "<" => "\\lt",
        ">" => "\\gt",
        "≈" => "\\approx",
        "×" => "\\times",
        "−" => "-",
        other => other,
    }
}

fn group(out: &mut String, inside: impl FnOnce(&mut String)) {
    out.push('{');
    inside(out);
    out.push('}');
}

fn held(formula: &Formula, least: Hold, out: &mut String) {
    if formula.hold() < least {
        out.push_str("\\left(");
        write(formula, out);
        out.push_str("\\right)");
    } else {
        write(formula, out);
    }
}

fn write_symbol(symbol: &Symbol, out: &mut String) {
    if symbol.delta {
        out.push_str("\\Delta ");
    }
    match greek_word(&symbol.base) {
        Some("eps") => out.push_str("\\epsilon"),
        Some(word) => {
            out.push('\\');
            out.push_str(word);
        }
        None if symbol.is_letter() => out.push_str(&symbol.base),
        None => text(&symbol.base, out),
    }
    if !symbol.subscripts.is_empty() {
        out.push('_');
        group(out, |out| {
            for (at, part) in symbol.subscripts.iter().enumerate() {
                if at > 0 {
                    out.push(',');
                }
                write_subscript(part, out);
            }
        });
    }
}

fn write_subscript(part: &Subscript, out: &mut String) {
    if part.italic || part.text.bytes().all(|byte| byte.is_ascii_digit()) {
        out.push_str(&part.text);
    } else {
        text(&part.text, out);
    }
}

/// Upright text.
fn text(text: &str, out: &mut String) {
    out.push_str("\\text");
    group(out, |out| {
        for character in text.chars() {
            match character {
                '%' => out.push_str("\\%"),
                // Nothing else that LaTeX would obey can stand in a name or a unit.
                '\\' | '{' | '}' | '$' | '#' | '&' | '^' | '_' | '~' => out.push(' '),
                other => out.push(other),
            }
        }
    });
}

fn write_value(written: &Written, out: &mut String) {
    let (mantissa, exponent) = written.number.split_once('e').map_or((written.number.as_str(), None), |(m, e)| (m, Some(e)));
    write_digits(mantissa, out);
    if let Some(exponent) = exponent {
        out.push_str(" \\times 10^");
        group(out, |out| write_digits(exponent.trim_start_matches('+'), out));
    }
    if !written.unit.is_empty() {
        out.push_str("\\thinspace ");
        text(&typeset_unit(&written.unit), out);
    }
}

/// Digits in groups of three.
fn write_digits(number: &str, out: &mut String) {
    for character in group_digits(number).chars() {
        match character {
            THIN => out.push_str("\\thinspace "),
            '−' => out.push('-'),
            other => out.push(other),
        }
    }
}

fn write_sum(terms: &[(bool, Formula)], out: &mut String) {
    for (at, (minus, term)) in terms.iter().enumerate() {
        match (*minus, at) {
            (true, 0) => out.push('-'),
            (true, _) => out.push_str(" - "),
            (false, 0) => {}
            (false, _) => out.push_str(" + "),
        }
        let leading = at == 0 && !*minus;
        held(term, if leading { Hold::Sum } else { Hold::Product }, out);
    }
}

fn write_product(factors: &[Formula], out: &mut String) {
    for (at, factor) in factors.iter().enumerate() {
        if at > 0 {
            out.push_str(if Formula::needs_cross(&factors[at - 1], factor) { " \\times " } else { "\\thinspace " });
        }
        held(factor, Hold::Product, out);
    }
}

fn write_function_word(word: &str, out: &mut String) {
    match word {
        "log10" => out.push_str("\\log_{10}"),
        "asin" => out.push_str("\\arcsin"),
        "acos" => out.push_str("\\arccos"),
        "atan" => out.push_str("\\arctan"),
        other => {
            // exp, ln, sin, cos, tan, min and max are commands of the same name.
            out.push('\\');
            out.push_str(other);
        }
    }
}

fn write_arguments(arguments: &[impl std::borrow::Borrow<Formula>], out: &mut String) {
    out.push_str("\\left(");
    for (at, argument) in arguments.iter().enumerate() {
        if at > 0 {
            out.push_str(", ");
        }
        write(argument.borrow(), out);
    }
    out.push_str("\\right)");
}

fn write_words(word: &str, parts: &[Formula], out: &mut String) {
    if let [single] = parts {
        text(&format!("{word} "), out);
        held(single, Hold::Sum, out);
        return;
    }
    for (at, part) in parts.iter().enumerate() {
        if at > 0 {
            text(&format!(" {word} "), out);
        }
        match part {
            Formula::Words(other, inner) if *other != word && inner.len() > 1 => held(part, Hold::Sum, out),
            _ => write(part, out),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::super::mathml::mathml;
    use super::*;

    fn symbol(name: &str) -> Formula {
        Formula::Symbol(Symbol::of_name(name))
    }

    fn value(number: &str, unit: &str) -> Formula {
        Formula::Value(Written { number: number.into(), unit: unit.into() })
    }

    #[test]
    fn brackets_stand_only_where_they_are_needed() {
        let sum = Formula::Sum(vec![(false, symbol("a")), (true, symbol("b"))]);
        let product = Formula::Product(vec![symbol("c"), sum.clone()]);
        assert_eq!(latex(&product), r"$c\thinspace \left(a - b\right)$");
        let fraction = Formula::Fraction(Box::new(sum.clone()), Box::new(symbol("d")));
        assert_eq!(latex(&fraction), r"$\dfrac{a - b}{d}$");
        let square = Formula::Power(Box::new(value("80.0", "mm")), Box::new(value("2", "")));
        assert_eq!(latex(&square), r"$\left(80.0\thinspace \text{mm}\right)^{2}$");
        assert_eq!(latex(&Formula::Power(Box::new(symbol("d")), Box::new(value("2", "")))), "$d^{2}$");
        assert_eq!(latex(&Formula::Sum(vec![(false, symbol("a")), (true, sum)])), r"$a - \left(a - b\right)$");
    }

    #[test]
    fn exponents_lie_flat() {
        let one_less = Formula::Sum(vec![(false, symbol("k")), (true, value("1", ""))]);
        let exponent = Formula::Fraction(Box::new(symbol("k")), Box::new(one_less));
        let power = Formula::Power(Box::new(symbol("r")), Box::new(exponent));
        assert_eq!(latex(&power), r"$r^{k/\left(k - 1\right)}$");
        assert!(mathml(&power).contains(r#"<mi>k</mi><mo lspace="0" rspace="0">/</mo><mrow><mo stretchy="false">(</mo>"#));
    }

    #[test]
    fn a_cross_stands_before_numbers_and_behind_units() {
        let product = Formula::Product(vec![value("2", ""), symbol("V"), symbol("full.rho")]);
        assert_eq!(latex(&product), r"$2\thinspace V\thinspace \rho_{\text{full}}$");
        let product = Formula::Product(vec![value("2.40", "m3"), value("11.76", "kg/m3")]);
        assert_eq!(latex(&product), r"$2.40\thinspace \text{m³} \times 11.76\thinspace \text{kg/m³}$");
        let product = Formula::Product(vec![value("20", "m"), symbol("x")]);
        assert_eq!(latex(&product), r"$20\thinspace \text{m} \times x$");
    }

    #[test]
    fn both_forms_hold_the_same_formula() {
        let formula = Formula::Chain(
            Box::new(symbol("cold.cp")),
            vec![("≥", Formula::Function("log10", vec![Formula::Root(Box::new(value("1.2e-6", "%")), 3)]))],
        );
        assert_eq!(latex(&formula), r"$c_{p,\text{cold}} \ge \log_{10}\left(\sqrt[3]{1.2 \times 10^{-6}\thinspace \text{\%}}\right)$");
        assert_eq!(
            mathml(&formula),
            concat!(
                r#"<math displaystyle="true"><mrow><msub><mi>c</mi><mrow><mi>p</mi><mo separator="true" lspace="0" rspace=".1em">,</mo>"#,
                r#"<mtext>cold</mtext></mrow></msub><mo>≥</mo><mrow><msub><mi>log</mi><mn>10</mn></msub><mrow><mo>(</mo>"#,
                r#"<mroot><mrow><mn>1.2</mn><mo>×</mo><msup><mn>10</mn><mn>−6</mn></msup><mspace width=".2em"/><mtext>%</mtext></mrow>"#,
                r#"<mn>3</mn></mroot><mo>)</mo></mrow></mrow></mrow></math>"#
            )
        );
    }
}
