//! How a number and a unit are printed: groups of digits, raised powers, signs.

use std::fmt::Write;

use super::written::{Written, leading_number};

/// No-break space: between a number and its unit.
pub(super) const NO_BREAK: char = '\u{a0}';

/// Narrow no-break space: between groups of three digits.
pub(super) const THIN: char = '\u{202f}';

/// A number as a report prints it: groups of three digits, a minus sign, a power of ten with raised digits.
pub(super) fn typeset_number(number: &str) -> String {
    let is_number = number.bytes().any(|byte| byte.is_ascii_digit());
    let (mantissa, exponent) = match number.split_once(['e', 'E']) {
        Some((mantissa, exponent)) if is_number => (mantissa, Some(exponent)),
        _ => (number, None),
    };
    let mut text = group_digits(mantissa);
    if let Some(exponent) = exponent {
        let _ = write!(text, "{NO_BREAK}×{NO_BREAK}10{}", raised(exponent.trim_start_matches('+')));
    }
    text
}

/// `-1061.2` as `−1 061.2`. Digits behind the point stay together, so that figures can be counted.
pub(super) fn group_digits(number: &str) -> String {
    let (sign, digits) = match number.strip_prefix(['-', '−']) {
        Some(digits) => ("−", digits),
        None => ("", number.strip_prefix('+').unwrap_or(number)),
    };
    let (whole, rest) = digits.find('.').map_or((digits, ""), |at| digits.split_at(at));
    let mut text = sign.to_owned();
    let grouped = whole.len() > 3 && whole.bytes().all(|byte| byte.is_ascii_digit());
    for (at, digit) in whole.chars().enumerate() {
        if grouped && at > 0 && (whole.len() - at).is_multiple_of(3) {
            text.push(THIN);
        }
        text.push(digit);
    }
    text + rest
}

/// Digits and signs as raised characters: `-6` as `⁻⁶`.
pub(super) fn raised(digits: &str) -> String {
    digits
        .chars()
        .map(|digit| match digit {
            '0' => '⁰',
            '1' => '¹',
            '2' => '²',
            '3' => '³',
            '4' => '⁴',
            '5' => '⁵',
            '6' => '⁶',
            '7' => '⁷',
            '8' => '⁸',
            '9' => '⁹',
            '-' | '−' => '⁻',
            other => other,
        })
        .collect()
}

/// Units whose digit is part of the name.
const COLUMNS: [(&str, &str); 4] = [("inH2O", "inH₂O"), ("ftH2O", "ftH₂O"), ("mmH2O", "mmH₂O"), ("cmH2O", "cmH₂O")];

/// Units of which a leading `u` stands for micro.
const MICRO: [&str; 12] = ["um", "uPa", "ubar", "ug", "us", "uL", "umol", "uA", "uV", "uJ", "uW", "uN"];

/// A unit with its basis as a report prints it: `m³`, `°C`, `kJ/(kg K)`, `bar gauge`.
pub(super) fn typeset_unit(unit: &str) -> String {
    let mut text = String::new();
    let mut word = String::new();
    for character in unit.chars().chain(['\0']) {
        if character.is_alphanumeric() {
            word.push(character);
            continue;
        }
        push_unit_word(&mut text, &word);
        word.clear();
        match character {
            '\0' => {}
            '.' | ' ' => text.push(NO_BREAK),
            other => text.push(other),
        }
    }
    text
}

fn push_unit_word(text: &mut String, word: &str) {
    if let Some((_, column)) = COLUMNS.iter().find(|(plain, _)| *plain == word) {
        text.push_str(column);
        return;
    }
    let (name, power) = word.split_at(word.trim_end_matches(|c: char| c.is_ascii_digit()).len());
    match name {
        "degC" => text.push_str("°C"),
        "degF" => text.push_str("°F"),
        "degR" => text.push_str("°R"),
        "deg" => text.push('°'),
        "Ohm" => text.push('Ω'),
        _ if MICRO.contains(&name) => {
            text.push('µ');
            text.push_str(&name[1..]);
        }
        // A number in a unit that is no power: the 1 of `1/K`.
        "" => text.push_str(power),
        _ => text.push_str(name),
    }
    if !name.is_empty() {
        text.push_str(&raised(power));
    }
}

/// A value as written in the sheet, as a report prints it: `9.6 bar gauge`, `12, exact`.
pub(super) fn typeset_reading(text: &str) -> String {
    let number = leading_number(text);
    let rest = text[number.len()..].trim();
    let (unit, exact) = rest.strip_suffix("exact").map_or((rest, ""), |unit| (unit.trim_end(), ", exact"));
    Written { number: number.to_owned(), unit: unit.to_owned() }.typeset() + exact
}

/// What stands behind a value from `±` on, as a report prints it: `± 0.1 bar, k = 2`.
pub(super) fn typeset_uncertainty(text: &str) -> String {
    let mut typeset = String::new();
    for word in text.replace("+-", "± ").split_whitespace() {
        let named = word.split_once('=');
        match (named, word) {
            (Some((name, number)), _) => {
                let _ = write!(typeset, ", {name}{NO_BREAK}={NO_BREAK}{}", typeset_number(number));
            }
            (None, "triangular" | "u-shaped") => {
                let _ = write!(typeset, ", {word}");
            }
            (None, word) => {
                if !typeset.is_empty() {
                    typeset.push(if word == "of" || typeset.ends_with("of") { ' ' } else { NO_BREAK });
                }
                let is_number = word.starts_with(|c: char| c.is_ascii_digit());
                typeset.push_str(&if is_number { typeset_number(word) } else { typeset_unit(word) });
            }
        }
    }
    typeset
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn numbers_get_groups_minus_signs_and_powers_of_ten() {
        for (plain, typeset) in [
            ("28.2", "28.2"),
            ("-8.0", "−8.0"),
            ("1061.2", "1\u{202f}061.2"),
            ("123456", "123\u{202f}456"),
            ("0.12345", "0.12345"),
            ("1.23e-6", "1.23\u{a0}×\u{a0}10⁻⁶"),
            ("1.2e+7", "1.2\u{a0}×\u{a0}10⁷"),
            ("not a number", "not a number"),
        ] {
            assert_eq!(typeset_number(plain), typeset);
        }
    }

    #[test]
    fn readings_and_uncertainties_are_typeset_word_by_word() {
        assert_eq!(typeset_reading("9.6 bar gauge"), "9.6\u{a0}bar\u{a0}gauge");
        assert_eq!(typeset_reading("3600 s exact"), "3\u{202f}600\u{a0}s, exact");
        assert_eq!(typeset_reading("-8.0 degC"), "−8.0\u{a0}°C");
        assert_eq!(typeset_uncertainty("± 0.1 bar k=2 dof=9"), "±\u{a0}0.1\u{a0}bar, k\u{a0}=\u{a0}2, dof\u{a0}=\u{a0}9");
        assert_eq!(typeset_uncertainty("+- 1 % of 16 bar triangular"), "±\u{a0}1\u{a0}% of 16\u{a0}bar, triangular");
    }

    #[test]
    fn units_get_powers_degrees_and_products() {
        for (plain, typeset) in [
            ("m3", "m³"),
            ("kJ/(kg.K)", "kJ/(kg\u{a0}K)"),
            ("degC", "°C"),
            ("bar gauge", "bar\u{a0}gauge"),
            ("inH2O diff", "inH₂O\u{a0}diff"),
            ("1/K", "1/K"),
            ("um", "µm"),
            ("umol/mol", "µmol/mol"),
            ("lbf/in2", "lbf/in²"),
            ("Nm3/h", "Nm³/h"),
            ("%", "%"),
            ("m2.kg/s3", "m²\u{a0}kg/s³"),
        ] {
            assert_eq!(typeset_unit(plain), typeset);
        }
    }
}
