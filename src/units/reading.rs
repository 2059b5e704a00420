//! Reading a unit: its text, letter by letter, into factor and dimension.
//!
//! `unit := ["1/"] factor (("." | "/") factor)*`, from left to right, `factor := "(" unit ")" | word [power]`. A whole word is
//! looked up first (`mmH2O`, `Nm3`); where it is no name, digits at its end are its power.

use super::misspelling::{self, Cure, Suggestion};
use super::product::Product;
use super::{LARGEST_EXPONENT, Unit, UnitError, UnitErrorKind, registry};

/// Longest unit text, in bytes. The longest of the trade are a tenth of it.
const LONGEST: usize = 256;

/// Deepest nesting of brackets.
const DEEPEST: usize = 16;

/// Reads a unit, one token without blanks.
///
/// What gets pasted is understood: `°C`, `°F`, `m³`, `µm`, `·`, `⁻¹`. The name of the unit is spelled as the tool writes it. In compounds
/// `degC` and `degF` are intervals. `1` is the unit of pure numbers.
///
/// # Errors
/// A [`UnitError`] with the place in the text.
///
/// ```
/// use gaswright::units::{Dimension, parse};
/// let unit = parse("kJ/(kg·K)").unwrap();
/// assert_eq!((unit.name.as_str(), unit.factor), ("kJ/(kg.K)", 1000.0));
/// assert_eq!(unit.dimension, Dimension::SPECIFIC_HEAT_CAPACITY);
/// assert_eq!(parse("kgg/m3").unwrap_err().len, 3);
/// ```
pub fn parse(text: &str) -> Result<Unit, UnitError> {
    if text.len() > LONGEST {
        return Err(UnitError { offset: 0, len: text.len(), kind: UnitErrorKind::TooLong });
    }
    if text == "1" {
        return Ok(Unit::pure());
    }
    let mut reader = Reader { text, at: 0 };
    let product = reader.unit(0)?;
    if let Some(c) = reader.peek() {
        return Err(reader.unexpected(c));
    }
    let unit = product.into_unit();
    if let Some((pressure, basis)) = misspelling::basis_as_factor(&unit.name) {
        let help = Some(format!("write `{pressure} {basis}`"));
        let cure = Some(Box::new(Cure { unit: pressure, basis: Some(basis), certain: true }));
        let kind = UnitErrorKind::Unknown { word: text.to_owned(), near: Vec::new(), help, cure };
        return Err(UnitError { offset: 0, len: text.len(), kind });
    }
    Ok(unit)
}

struct Reader<'a> {
    text: &'a str,
    at: usize,
}

impl Reader<'_> {
    fn peek(&self) -> Option<char> {
        self.text[self.at..].chars().next()
    }

    fn error(&self, start: usize, kind: UnitErrorKind) -> UnitError {
        UnitError { offset: start, len: self.at - start, kind }
    }

    /// A unit, up to the end or the bracket that closes it.
    fn unit(&mut self, depth: usize) -> Result<Product, UnitError> {
        let mut product = if self.text[self.at..].starts_with("1/") {
            self.at += 1;
            Product::one()
        } else {
            // A leading negative power needs its `1/`.
            let start = self.at;
            let (factor, over) = self.factor(depth)?;
            if over { self.limited(start, Product::one().combine(factor, true))? } else { factor }
        };
        while let Some(c @ ('.' | '·' | '⋅' | '/')) = self.peek() {
            self.at += c.len_utf8();
            let start = self.at;
            let (factor, negative) = self.factor(depth)?;
            product = self.limited(start, product.combine(factor, (c == '/') != negative))?;
        }
        Ok(product)
    }

    fn limited(&self, start: usize, product: Option<Product>) -> Result<Product, UnitError> {
        let part = || self.text[start..self.at].to_owned();
        product.ok_or_else(|| self.error(start, UnitErrorKind::Power { part: part(), limit: LARGEST_EXPONENT }))
    }

    /// A bracket or a word, and whether its power is negative. The product holds the positive power.
    fn factor(&mut self, depth: usize) -> Result<(Product, bool), UnitError> {
        if self.peek() != Some('(') {
            return self.word();
        }
        let start = self.at;
        self.at += 1;
        if depth == DEEPEST {
            return Err(self.error(start, UnitErrorKind::TooDeep));
        }
        let mut product = self.unit(depth + 1)?;
        match self.peek() {
            Some(')') => self.at += 1,
            Some(c) => return Err(self.unexpected(c)),
            None => return Err(self.error(start, UnitErrorKind::Syntax("the bracket is not closed".to_owned()))),
        }
        if self.peek().is_some_and(|c| c.is_numeric()) {
            let message = "a bracket takes no power: give each unit in it its own";
            return Err(self.unexpected_with(message));
        }
        if !product.single {
            product.name = format!("({})", product.name);
        }
        Ok((product, false))
    }

    /// A word with its power.
    fn word(&mut self) -> Result<(Product, bool), UnitError> {
        let start = self.at;
        let rest = &self.text[start..];
        let end = rest.find(|c: char| !is_of_a_word(c)).unwrap_or(rest.len());
        let Some(first) = rest.chars().next() else {
            let message = if start == 0 { "a unit is missing" } else { "a unit is missing at the end" };
            return Err(self.error(start, UnitErrorKind::Syntax(message.to_owned())));
        };
        if end == 0 || first.is_numeric() {
            return Err(self.unexpected(first));
        }
        self.at = start + end;
        let written = &rest[..end];
        let mut pairs = written.chars().zip(written.chars().skip(1));
        if pairs.any(|(one, next)| one.is_numeric() && next.is_numeric() && one.is_ascii() != next.is_ascii()) {
            return Err(self.error(start, UnitErrorKind::Syntax("its power is written twice".to_owned())));
        }
        let word = plain_spelling(written);
        if let Some(entry) = registry().find(&word) {
            let product = self.limited(start, Product::power(entry, word, 1))?;
            return Ok((product, false));
        }
        let (stem, power) = split_power(&word);
        // `in` is a word of the language, so that the inch is `inch`; with a power it cannot be mistaken.
        let entry = registry().find(if stem == "in" && !power.is_empty() { "inch" } else { stem });
        let Some(entry) = entry else { return Err(self.unknown(start, &word)) };
        self.check_power(start, power)?;
        let size = power.trim_start_matches('⁻').parse::<i32>().ok().filter(|size| *size <= LARGEST_EXPONENT);
        let name = size.map_or_else(String::new, |size| if size == 1 { stem.to_owned() } else { format!("{stem}{size}") });
        let product = self.limited(start, size.and_then(|size| Product::power(entry, name, size)).filter(Product::in_range))?;
        Ok((product, power.starts_with('⁻')))
    }

    fn check_power(&self, start: usize, power: &str) -> Result<(), UnitError> {
        let digits = power.trim_start_matches('⁻');
        let message = if digits.starts_with('0') {
            "a power is a whole number from 1, without zeros before it"
        } else if digits.is_empty() {
            "digits are missing in the power"
        } else {
            return Ok(());
        };
        Err(self.error(start, UnitErrorKind::Syntax(message.to_owned())))
    }

    /// The error of a word that is no unit. Behind it may stand a basis in brackets, as in `bar(g)`.
    fn unknown(&self, start: usize, word: &str) -> UnitError {
        let Suggestion { near, help, cure } = misspelling::suggest(word);
        // A basis stands behind the whole unit: within a compound it cures nothing.
        let whole = start == 0 && self.at == self.text.len();
        let cure = cure.filter(|cure| cure.basis.is_none() || whole).map(Box::new);
        self.error(start, UnitErrorKind::Unknown { word: self.text[start..self.at].to_owned(), near, help, cure })
    }

    /// The error of a character that cannot stand where it stands.
    fn unexpected(&self, c: char) -> UnitError {
        if c == '('
            && let Some(help) = self.basis_in_brackets()
        {
            let kind = UnitErrorKind::Unknown { word: self.text.to_owned(), near: Vec::new(), help: Some(help), cure: None };
            return UnitError { offset: 0, len: self.text.len(), kind };
        }
        let message = match c {
            '^' => "a power stands straight behind its unit, without `^`: `m2`".to_owned(),
            '*' | '×' => "units are multiplied with a dot: `N.m`".to_owned(),
            '-' | '−' => "a negative power is written with `/`: `1/s`, `W/(m2.K)`".to_owned(),
            ')' => "a bracket is closed that was not opened".to_owned(),
            '(' => "`.` or `/` is missing before the bracket".to_owned(),
            '.' | '/' | '·' | '⋅' => format!("a unit is missing before `{c}`"),
            c if c.is_whitespace() => "a unit has no blanks inside".to_owned(),
            c if c.is_numeric() => "a unit begins with a letter; a number stands only in `1/`".to_owned(),
            c => format!("`{}` is no part of a unit", c.escape_debug()),
        };
        self.unexpected_with(&message)
    }

    fn unexpected_with(&self, message: &str) -> UnitError {
        let len = self.peek().map_or(0, char::len_utf8);
        UnitError { offset: self.at, len, kind: UnitErrorKind::Syntax(message.to_owned()) }
    }

    fn basis_in_brackets(&self) -> Option<String> {
        let inside = self.text[self.at..].strip_prefix('(')?.strip_suffix(')')?;
        misspelling::pressure_with_basis(&self.text[..self.at], inside)
    }
}

/// Letters, digits, and the signs that stand within the word of a unit.
fn is_of_a_word(c: char) -> bool {
    c.is_alphanumeric() || matches!(c, '_' | '%' | '°' | 'µ' | '⁻')
}

/// A word with its pasted signs replaced by what the registry has: `°C`, `µm`, `m³`.
fn plain_spelling(word: &str) -> String {
    word.replacen('°', "deg", 1)
        .chars()
        .map(|c| match c {
            'µ' | 'μ' => 'u',
            '⁰' => '0',
            '¹' => '1',
            '²' => '2',
            '³' => '3',
            '⁴' => '4',
            '⁵' => '5',
            '⁶' => '6',
            '⁷' => '7',
            '⁸' => '8',
            '⁹' => '9',
            '₂' => '2',
            other => other,
        })
        .collect()
}

/// A word without its power, and the power: digits, with a raised minus before them where it is negative.
///
/// The longest name that leaves digits behind it wins, so that `Nm32` is the square of `Nm3`.
fn split_power(word: &str) -> (&str, &str) {
    let digits = word.len() - word.trim_end_matches(|c: char| c.is_ascii_digit()).len();
    let named = (1..digits).map(|power| word.split_at(word.len() - power)).find(|(stem, _)| registry().find(stem).is_some());
    named.unwrap_or_else(|| {
        let stem = word[..word.len() - digits].trim_end_matches('⁻');
        word.split_at(stem.len())
    })
}

#[cfg(test)]
mod tests {
    use super::super::{Dimension, Rational, ReferenceVolume};
    use super::*;

    fn read(text: &str) -> Unit {
        parse(text).unwrap_or_else(|error| panic!("{text}: {error:?}"))
    }

    fn refused(text: &str) -> UnitError {
        match parse(text) {
            Ok(unit) => panic!("{text} was read as {unit:?}"),
            Err(error) => error,
        }
    }

    #[test]
    fn compounds_go_from_left_to_right() {
        for (text, factor, si_unit) in [
            ("kJ/(kg.K)", 1000.0, "J/(kg.K)"),
            ("m3/h", 1.0 / 3600.0, "m3/s"),
            ("kg/m/s", 1.0, "Pa.s"),
            ("kg/m.s", 1.0, "kg.s/m"),
            ("1/K", 1.0, "1/K"),
            ("1/(m2.s)", 1.0, "1/(m2.s)"),
            ("W/(m2.K)", 1.0, "W/(m2.K)"),
            ("um/(m.K)", 1e-6, "1/K"),
            ("N.m", 1.0, "J"),
            ("kgf/cm2", 98_066.5, "Pa"),
            ("%", 0.01, ""),
            ("g/kg", 1e-3, ""),
            ("m3/(kg/kmol)", 1000.0, "m3.mol/kg"),
            ("(kg.m)/s2", 1.0, "N"),
        ] {
            let unit = read(text);
            assert_eq!((unit.name.as_str(), unit.offset), (text, 0.0));
            assert_eq!(unit.dimension.si_unit(), si_unit, "{text}");
            // Two or three roundings.
            assert!((unit.factor / factor - 1.0).abs() < 1e-15, "{text}: {}", unit.factor);
        }
    }

    #[test]
    fn whole_names_come_before_powers() {
        assert_eq!(read("inH2O").dimension, Dimension::PRESSURE);
        assert_eq!(read("mmH2O2").dimension, Dimension::PRESSURE.power(2.into()).unwrap());
        assert_eq!(read("Nm3").dimension, Dimension::AMOUNT);
        assert_eq!(read("ft3").dimension, Dimension::VOLUME);
        assert_eq!(read("m24").name, "m24");
    }

    #[test]
    fn the_inch_is_read_in_powers_alone() {
        assert_eq!(read("in2").factor, read("inch2").factor);
        assert_eq!(read("lbf/in2").factor, read("psi").factor);
        assert_eq!(read("in3").dimension, Dimension::VOLUME);
        let UnitErrorKind::Unknown { help, .. } = refused("in").kind else { panic!("`in` is a word of the language") };
        assert_eq!(help.as_deref(), Some("write `inch`"));
        assert!(parse("lbf/in").is_err());
        assert!(parse("in1").is_ok());
    }

    #[test]
    fn pasted_signs_are_spelled_out() {
        for (pasted, spelled) in [
            ("°C", "degC"),
            ("°F", "degF"),
            ("W/(m²·K)", "W/(m2.K)"),
            ("m³/h", "m3/h"),
            ("µm", "um"),
            ("μm", "um"),
            ("kcal/(kg⋅°C)", "kcal/(kg.degC)"),
            ("s⁻¹", "1/s"),
            ("W·m⁻²·K⁻¹", "W/m2/K"),
            ("J/mol⁻¹", "J.mol"),
            ("mmH₂O", "mmH2O"),
            ("kg/(m3)", "kg/m3"),
            ("((m2))", "m2"),
            ("m1", "m"),
        ] {
            let unit = read(pasted);
            assert_eq!(unit.name, spelled);
            assert_eq!(unit, read(spelled), "{pasted}");
        }
    }

    #[test]
    fn a_temperature_scale_is_an_interval_in_compounds() {
        assert_eq!(read("degC").offset, 273.15);
        for text in ["1/degC", "kcal/(kg.degC)", "degC2", "degF.m", "K/degF"] {
            assert_eq!(read(text).offset, 0.0, "{text}");
        }
        assert_eq!(read("Btu/degF").dimension, Dimension::HEAT_CAPACITY);
    }

    #[test]
    fn reference_volumes_count_as_amounts() {
        use ReferenceVolume::{Normal, Scf, Standard};
        let per_amount = Dimension::AMOUNT.power((-1).into()).unwrap();
        for (text, dimension, references) in [
            ("Nm3/h", Dimension::MOLAR_FLOW, &[(Normal, 1)][..]),
            ("kJ/Sm3", Dimension::MOLAR_ENERGY, &[(Standard, -1)]),
            ("scf/min", Dimension::MOLAR_FLOW, &[(Scf, 1)]),
            ("Nm3/Nm3", Dimension::NONE, &[]),
            ("scf/Nm32", per_amount, &[(Normal, -2), (Scf, 1)]),
        ] {
            let unit = read(text);
            assert_eq!(unit.dimension, dimension, "{text}");
            let references: Vec<_> = references.iter().map(|&(volume, power)| (volume, Rational::whole(power))).collect();
            assert_eq!(unit.references, references, "{text}");
        }
        assert_eq!(read("Nm3/h").factor, read("m3/h").factor);
        assert_eq!(read("scf").factor, read("ft3").factor);
    }

    #[test]
    fn unknown_words_are_marked_exactly() {
        for (text, offset, len, word) in [
            ("kgg/m3", 0, 3, "kgg"),
            ("kJ/(kgg.K)", 4, 3, "kgg"),
            ("m³/hr", 4, 2, "hr"),
            ("barg", 0, 4, "barg"),
            ("bar(g)", 0, 6, "bar(g)"),
            ("2", 0, 0, ""),
            ("kg/mbra2", 3, 5, "mbra2"),
        ] {
            let error = refused(text);
            if let UnitErrorKind::Unknown { word: found, .. } = &error.kind {
                assert_eq!((error.offset, error.len, found.as_str()), (offset, len, word), "{text}");
            } else {
                assert_eq!(word, "", "{text}: {error:?}");
            }
        }
    }

    #[test]
    fn powers_have_a_limit() {
        for (text, offset, part) in [
            ("m99", 0, "m99"),
            ("kg/m25", 3, "m25"),
            ("m24.m", 4, "m"),
            ("m9999999999999", 0, "m9999999999999"),
            ("kg.(m24.m2)", 8, "m2"),
            ("(kmol24.km24).GHz24", 14, "GHz24"),
            ("s⁻⁹⁹", 0, "s⁻⁹⁹"),
        ] {
            let error = refused(text);
            assert_eq!(error.kind, UnitErrorKind::Power { part: part.to_owned(), limit: 24 }, "{text}");
            assert_eq!((error.offset, error.len), (offset, part.len()), "{text}");
        }
    }

    #[test]
    fn texts_that_are_not_built_like_a_unit() {
        for (text, offset, part) in [
            ("", 0, "missing"),
            ("kg/", 3, "missing at the end"),
            ("1/", 2, "missing at the end"),
            ("kg//m3", 3, "missing before `/`"),
            (".kg", 0, "missing before `.`"),
            ("kg/(m3", 3, "not closed"),
            ("kg)", 2, "not opened"),
            ("m^2", 1, "`m2`"),
            ("N*m", 1, "dot"),
            ("s-1", 1, "negative power"),
            ("m0", 0, "from 1"),
            ("m02", 0, "from 1"),
            ("m⁻", 0, "digits"),
            ("(m/s)2", 5, "no power"),
            ("kg m", 2, "blanks"),
            ("kg(m)", 2, "missing before the bracket"),
            ("12", 0, "begins with a letter"),
            ("kg/2", 3, "begins with a letter"),
            ("kg/\u{7}", 3, "\\u{7}"),
            ("()", 1, "bracket"),
        ] {
            let error = refused(text);
            let UnitErrorKind::Syntax(message) = &error.kind else { panic!("{text}: {error:?}") };
            assert!(message.contains(part), "{text}: {message}");
            assert_eq!(error.offset, offset, "{text}");
            assert!(text.get(error.offset..error.offset + error.len).is_some(), "{text}");
        }
    }

    #[test]
    fn depth_and_length_have_a_limit() {
        let nested = |depth: usize| format!("{}m{}", "(".repeat(depth), ")".repeat(depth));
        assert_eq!(read(&nested(DEEPEST)).name, "m");
        assert_eq!(refused(&nested(DEEPEST + 1)).kind, UnitErrorKind::TooDeep);
        assert_eq!(refused(&"m/".repeat(LONGEST)).kind, UnitErrorKind::TooLong);
        assert_eq!(refused(&"(".repeat(LONGEST)).kind, UnitErrorKind::TooDeep);
    }

    #[test]
    fn pure_numbers_have_the_unit_one() {
        assert_eq!(read("1"), Unit::pure());
        assert!(read("m/m").dimension.is_none());
    }

    proptest::proptest! {
        /// Texts of the letters of units, and any texts at all: read, or refused with a place within the text.
        #[test]
        fn no_text_is_too_odd(text in "[a-zA-Z0-9./()%°µ³⁻_^ -]{0,24}|.{0,40}") {
            if let Err(error) = parse(&text) {
                proptest::prop_assert!(text.get(error.offset..error.offset + error.len).is_some());
            }
        }

        /// The name of a unit reads back as the unit, but for the rounding of another order of products.
        #[test]
        fn the_name_of_a_unit_is_the_unit(
            words in proptest::collection::vec((0..registry().entries().len(), 1..4_u32, proptest::bool::ANY), 1..6)
        ) {
            let names: Vec<&str> = registry().names().collect();
            let mut text = String::new();
            for (idx, power, over) in words {
                if !text.is_empty() {
                    text.push(if over { '/' } else { '·' });
                }
                text.push_str(names[idx]);
                if power > 1 {
                    text.push_str(&power.to_string());
                }
            }
            if let Ok(unit) = parse(&text) {
                proptest::prop_assert_eq!(parse(&unit.name), Ok(unit.clone()));
                let back = unit.from_si(unit.to_si(12.5));
                // Two roundings; the zero of a scale is at most 273.15 and so rounded to 6e-14.
                proptest::prop_assert!((back - 12.5).abs() < 1e-12, "{}: {}", unit.name, back);
            }
        }
    }
}
