//! Formulas as MathML, of the elements of MathML Core alone.

use super::symbol::{Subscript, Symbol};
use super::tree::{Formula, Hold};
use crate::report::typeset::{NO_BREAK, group_digits, typeset_unit};
use crate::report::written::Written;

/// Between a number and its unit.
const UNIT_SPACE: &str = r#"<mspace width=".2em"/>"#;

/// Between two factors.
const FACTOR_SPACE: &str = r#"<mspace width=".167em"/>"#;

/// Widths in em from which a formula, which cannot be broken further, is set smaller on paper.
const WIDE: f64 = 40.0;
const WIDER: f64 = 56.0;

/// A formula as a `math` element.
pub(in crate::report) fn mathml(formula: &Formula) -> String {
    let class = match formula.width() {
        width if width > WIDER => r#" class="wider""#,
        width if width > WIDE => r#" class="wide""#,
        _ => "",
    };
    let mut out = format!(r#"<math displaystyle="true"{class}>"#);
    write(formula, &mut out);
    out.push_str("</math>");
    out
}

fn write(formula: &Formula, out: &mut String) {
    match formula {
        Formula::Symbol(symbol) => write_symbol(symbol, out),
        Formula::Value(written) => write_value(written, out),
        Formula::Sum(terms) => row(out, |out| write_sum(terms, out)),
        Formula::Product(factors) => row(out, |out| write_product(factors, out)),
        Formula::Fraction(above, below) => element("mfrac", out, |out| {
            write(above, out);
            write(below, out);
        }),
        Formula::Power(base, exponent) => element("msup", out, |out| {
            held(base, Hold::Atom, out);
            write_exponent(exponent, out);
        }),
        Formula::Root(inner, 3) => element("mroot", out, |out| {
            write(inner, out);
            out.push_str("<mn>3</mn>");
        }),
        Formula::Root(inner, _) => element("msqrt", out, |out| write(inner, out)),
        Formula::Function(word, arguments) => row(out, |out| {
            write_function_word(word, out);
            write_arguments(arguments, out);
        }),
        Formula::Application(symbol, arguments) => row(out, |out| {
            write_symbol(symbol, out);
            write_arguments(arguments, out);
        }),
        Formula::Magnitude(inner) => row(out, |out| {
            out.push_str(r#"<mo fence="true" stretchy="true" form="prefix">|</mo>"#);
            write(inner, out);
            out.push_str(r#"<mo fence="true" stretchy="true" form="postfix">|</mo>"#);
        }),
        Formula::Chain(first, more) => row(out, |out| {
            write(first, out);
            for (sign, part) in more {
                sign_element(sign, out);
                write(part, out);
            }
        }),
        Formula::Words(word, parts) => row(out, |out| write_words(word, parts, out)),
        Formula::Opening(left, sign) => row(out, |out| {
            if let Some(left) = left {
                write(left, out);
            }
            sign_element(sign, out);
        }),
    }
}

fn element(name: &str, out: &mut String, inside: impl FnOnce(&mut String)) {
    out.push('<');
    out.push_str(name);
    out.push('>');
    inside(out);
    out.push_str("</");
    out.push_str(name);
    out.push('>');
}

fn row(out: &mut String, inside: impl FnOnce(&mut String)) {
    element("mrow", out, inside);
}

fn sign_element(sign: &str, out: &mut String) {
    element("mo", out, |out| escape(sign, out));
}

/// A formula that has to hold together at least so tightly, in brackets where it does not.
fn held(formula: &Formula, least: Hold, out: &mut String) {
    if formula.hold() < least {
        row(out, |out| {
            let (open, close) = brackets(formula.is_tall());
            out.push_str(open);
            write(formula, out);
            out.push_str(close);
        });
    } else {
        write(formula, out);
    }
}

/// An exponent; a fraction in it lies flat, because a built one would be too small to read.
fn write_exponent(exponent: &Formula, out: &mut String) {
    match exponent {
        Formula::Fraction(above, below) => row(out, |out| {
            held(above, Hold::Product, out);
            out.push_str(r#"<mo lspace="0" rspace="0">/</mo>"#);
            held(below, Hold::Power, out);
        }),
        other => write(other, out),
    }
}

fn write_symbol(symbol: &Symbol, out: &mut String) {
    let base = |out: &mut String| {
        let letter = |out: &mut String| match symbol.is_letter() {
            true => element("mi", out, |out| escape(&symbol.base, out)),
            // A word of several letters is set upright. It is no `mtext`, which would take the space from the sign behind it.
            false => element("mi", out, |out| escape(&symbol.base, out)),
        };
        if symbol.delta {
            row(out, |out| {
                out.push_str(r#"<mi mathvariant="normal">Δ</mi>"#);
                letter(out);
            });
        } else {
            letter(out);
        }
    };
    if symbol.subscripts.is_empty() {
        base(out);
        return;
    }
    element("msub", out, |out| {
        base(out);
        match symbol.subscripts.as_slice() {
            [single] => write_subscript(single, out),
            several => row(out, |out| {
                for (at, part) in several.iter().enumerate() {
                    if at > 0 {
                        out.push_str(r#"<mo separator="true" lspace="0" rspace=".1em">,</mo>"#);
                    }
                    write_subscript(part, out);
                }
            }),
        }
    });
}

fn write_subscript(part: &Subscript, out: &mut String) {
    let name = match part.italic {
        true => "mi",
        false if part.text.bytes().all(|byte| byte.is_ascii_digit()) => "mn",
        false => "mtext",
    };
    let text = part.text.replace(' ', &NO_BREAK.to_string());
    element(name, out, |out| escape(&text, out));
}

fn write_value(written: &Written, out: &mut String) {
    if written.unit.is_empty() && !written.number.contains('e') {
        write_mantissa(&written.number, out);
        return;
    }
    row(out, |out| {
        let (mantissa, exponent) = written.number.split_once('e').map_or((written.number.as_str(), None), |(m, e)| (m, Some(e)));
        write_mantissa(mantissa, out);
        if let Some(exponent) = exponent {
            out.push_str("<mo>×</mo><msup><mn>10</mn>");
            write_mantissa(exponent.trim_start_matches('+'), out);
            out.push_str("</msup>");
        }
        if !written.unit.is_empty() {
            out.push_str(UNIT_SPACE);
            element("mtext", out, |out| escape(&typeset_unit(&written.unit), out));
        }
    });
}

fn write_mantissa(number: &str, out: &mut String) {
    element("mn", out, |out| escape(&group_digits(number), out));
}

fn write_sum(terms: &[(bool, Formula)], out: &mut String) {
    for (at, (minus, term)) in terms.iter().enumerate() {
        match (*minus, at) {
            (true, 0) => out.push_str(r#"<mo form="prefix">−</mo>"#),
            (true, _) => out.push_str("<mo>−</mo>"),
            (false, 0) => {}
            (false, _) => out.push_str("<mo>+</mo>"),
        }
        let leading = at == 0 && !*minus;
        held(term, if leading { Hold::Sum } else { Hold::Product }, out);
    }
}

fn write_product(factors: &[Formula], out: &mut String) {
    for (at, factor) in factors.iter().enumerate() {
        if at > 0 {
            out.push_str(if Formula::needs_cross(&factors[at - 1], factor) { "<mo>×</mo>" } else { FACTOR_SPACE });
        }
        held(factor, Hold::Product, out);
    }
}

fn write_function_word(word: &str, out: &mut String) {
    match word {
        "log10" => out.push_str("<msub><mi>log</mi><mn>10</mn></msub>"),
        "asin" | "acos" | "atan" => element("mi", out, |out| {
            out.push_str("arc");
            out.push_str(&word[1..]);
        }),
        other => element("mi", out, |out| escape(other, out)),
    }
}

fn write_arguments(arguments: &[impl std::borrow::Borrow<Formula>], out: &mut String) {
    let (open, close) = brackets(arguments.iter().any(|argument| argument.borrow().is_tall()));
    out.push_str("<mrow>");
    out.push_str(open);
    for (at, argument) in arguments.iter().enumerate() {
        if at > 0 {
            out.push_str(r#"<mo separator="true">,</mo>"#);
        }
        write(argument.borrow(), out);
    }
    out.push_str(close);
    out.push_str("</mrow>");
}

/// Brackets that grow with what they hold, or that stay as they are.
fn brackets(tall: bool) -> (&'static str, &'static str) {
    if tall { ("<mo>(</mo>", "<mo>)</mo>") } else { (r#"<mo stretchy="false">(</mo>"#, r#"<mo stretchy="false">)</mo>"#) }
}

fn write_words(word: &str, parts: &[Formula], out: &mut String) {
    let text = |out: &mut String, text: String| element("mtext", out, |out| out.push_str(&text));
    if let [single] = parts {
        text(out, format!("{word}{NO_BREAK}"));
        held(single, Hold::Sum, out);
        return;
    }
    for (at, part) in parts.iter().enumerate() {
        if at > 0 {
            text(out, format!("{NO_BREAK}{word}{NO_BREAK}"));
        }
        match part {
            Formula::Words(other, inner) if *other != word && inner.len() > 1 => held(part, Hold::Sum, out),
            _ => write(part, out),
        }
    }
}

/// Text as the inside of an element.
pub(in crate::report) fn escape(text: &str, out: &mut String) {
    for character in text.chars() {
        match character {
            '&' => out.push_str("&amp;"),
            '<' => out.push_str("&lt;"),
            '>' => out.push_str("&gt;"),
            '"' => out.push_str("&quot;"),
            '\'' => out.push_str("&#39;"),
            other => out.push(other),
        }
    }
}
