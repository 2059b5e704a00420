//! Words that people write for units and that are none: what to write instead.

use super::{Dimension, parse, registry};
use crate::diagnostic::nearest;

/// What an unknown word probably was.
pub(super) struct Suggestion {
    /// Names most like it, best first.
    pub(super) near: Vec<&'static str>,
    /// What to write instead.
    pub(super) help: Option<String>,
    /// The unit, with its basis, that the word stands for beyond doubt.
    pub(super) cure: Option<Cure>,
}

/// What a word stands for.
#[derive(Clone, Debug, PartialEq)]
pub struct Cure {
    /// The unit.
    pub unit: String,
    /// The basis that was joined to it: `abs`, `gauge`, `diff`.
    pub basis: Option<&'static str>,
    /// Whether the word can mean nothing else.
    pub certain: bool,
}

/// Most names that are suggested for a word.
const MOST_NAMES: usize = 3;

/// Habits of which the cure is another spelling of the same unit: words, and what to write.
const SPELLINGS: &[(&[&str], &str)] = &[
    (&["in", "ins", "inches", "In"], "inch"),
    (&["feet", "foot", "Ft"], "ft"),
    (&["yard", "yards"], "yd"),
    (&["mile", "miles"], "mi"),
    (&["meter", "metre", "meters", "metres", "mtr"], "m"),
    (&["micron", "microns"], "um"),
    (&["gram", "grams", "gr", "gm"], "g"),
    (&["kilogram", "kilograms", "kilo", "kgs", "kq", "Kg", "KG", "KGS"], "kg"),
    (&["tonne", "tonnes", "te", "mt", "MT"], "t"),
    (&["lbs", "lbm", "pound", "pounds", "LB"], "lb"),
    (&["ounce", "ounces"], "oz"),
    (&["sec", "secs", "second", "seconds", "Sec"], "s"),
    (&["mins", "minute", "minutes", "Min"], "min"),
    (&["hr", "hrs", "hour", "hours", "Hr"], "h"),
    (&["day", "days"], "d"),
    (&["weeks", "wk"], "week"),
    (&["l", "litre", "liter", "litres", "liters", "ltr", "lit"], "L"),
    (&["ml"], "mL"),
    (&["hl"], "hL"),
    (&["mn"], "mm"),
    (&["cc", "ccm"], "cm3"),
    (&["cbm", "cum", "qm3"], "m3"),
    (&["cuft", "cft", "cf"], "ft3"),
    (&["sqft", "sf"], "ft2"),
    (&["sqm", "qm"], "m2"),
    (&["sqmm", "qmm"], "mm2"),
    (&["sqcm", "qcm"], "cm2"),
    (&["sqin"], "in2"),
    (&["barrel", "barrels"], "bbl"),
    (&["mole", "moles", "Mol", "gmol", "mols"], "mol"),
    (&["kgmol", "kgmole", "kmole", "Kmol", "KMOL", "kMol"], "kmol"),
    (&["lbmole", "lb_mol", "lbmols"], "lbmol"),
    (&["pascal", "pascals", "PA", "pa"], "Pa"),
    (&["bars", "Bar", "BAR"], "bar"),
    (&["KPa", "KPA", "kpa", "Kpa"], "kPa"),
    (&["mpa", "Mpa", "MPA"], "MPa"),
    (&["mBar", "mb", "MBAR", "millibar"], "mbar"),
    (&["psf_", "PSI", "lbfin2"], "psi"),
    (&["Torr", "TORR"], "torr"),
    (&["mmWC", "mmWS", "mmwc", "mmWG", "mmwg"], "mmH2O"),
    (&["inWC", "inwc", "iwc", "inWG", "inwg", "wc", "WC"], "inH2O"),
    (&["mWC", "mWS", "mwc"], "mH2O"),
    (&["at", "ata", "kp", "ksc"], "kgf/cm2"),
    (&["kelvin", "Kelvin", "degK"], "K"),
    (&["celsius", "Celsius", "centigrade", "degc", "DEGC"], "degC"),
    (&["fahrenheit", "Fahrenheit", "degf", "DEGF"], "degF"),
    (&["rankine", "Rankine", "degr"], "degR"),
    (&["joule", "joules"], "J"),
    (&["KJ", "kj"], "kJ"),
    (&["btu", "BTU", "BtuIT"], "Btu"),
    (&["mmbtu", "MMBTU", "mmBtu"], "MMBtu"),
    (&["Cal", "Kcal", "KCal", "kCal"], "kcal"),
    (&["kwh", "KWH", "kWhr", "KWh"], "kWh"),
    (&["watt", "watts"], "W"),
    (&["KW", "kw", "Kw"], "kW"),
    (&["HP", "Hp", "bhp"], "hp"),
    (&["PS", "CV", "pk"], "hp_metric"),
    (&["TR", "RT", "tonr"], "ton_refrigeration"),
    (&["newton", "newtons"], "N"),
    (&["KN"], "kN"),
    (&["dyne", "dynes"], "dyn"),
    (&["volt", "volts"], "V"),
    (&["amp", "amps", "ampere", "amperes"], "A"),
    (&["ohm", "ohms", "Ohms", "\u{3a9}", "\u{2126}"], "Ohm"),
    (&["hertz", "hz", "HZ"], "Hz"),
    (&["RPM", "Rpm", "upm"], "rpm"),
    (&["degree", "degrees", "grad"], "deg"),
    (&["percent", "pct", "Percent"], "%"),
    (&["cp", "CP"], "cP"),
    (&["cst", "CST", "cs"], "cSt"),
    (&["kmh", "kph", "kmph", "KMH"], "km/h"),
    (&["mps"], "m/s"),
    (&["fps"], "ft/s"),
    (&["fpm"], "ft/min"),
    (&["kt", "kn", "kts"], "knot"),
    (&["cfm", "CFM", "acfm", "ACFM"], "ft3/min"),
    (&["cfh", "CFH"], "ft3/h"),
    (&["lpm", "LPM"], "L/min"),
    (&["lps", "LPS"], "L/s"),
    (&["cmh", "CMH"], "m3/h"),
    (&["gpm", "GPM"], "gal_us/min"),
    (&["pph", "PPH"], "lb/h"),
    (&["tph", "TPH"], "t/h"),
    (&["scfm", "SCFM"], "scf/min"),
    (&["scfh", "SCFH"], "scf/h"),
    (&["SCF", "Scf", "scft"], "scf"),
    (&["nm3", "NM3", "Ncm", "Ncbm", "m3n", "mn3", "m3N"], "Nm3"),
    (&["sm3", "SM3", "scm", "SCM"], "Sm3"),
];

/// Those of the habits that have meant something else as well: the cure is to be looked at.
const DOUBTFUL: &[&str] = &[
    "In", "gr", "kilo", "te", "mt", "MT", "lit", "cf", "sf", "gmol", "mb", "psf_", "wc", "WC", "at", "ata", "kp", "ksc", "PS", "CV", "pk",
    "TR", "RT", "bhp", "grad", "cp", "CP", "cs", "kt", "kn", "kq", "Cal", "mn", "pa", "PA",
];

/// Words of which the cure needs a sentence.
const SENTENCES: &[(&[&str], &str)] = &[
    (&["C"], "a temperature in degrees Celsius is written `degC`, a charge in coulombs `A.s`"),
    (&["F"], "a temperature in degrees Fahrenheit is written `degF`, a capacitance in farads `A.s/V`"),
    (&["M"], "a molar concentration is written `mol/L`, a million as `e6` behind the number"),
    (&["k"], "a temperature in kelvins is written `K`, a thousand as `e3` behind the number"),
    (&["c"], "a temperature in degrees Celsius is written `degC`"),
    (&["gal", "gallon", "gallons"], "there are two gallons: write `gal_us` (231 cubic inches) or `gal_uk` (4.54609 L)"),
    (&["pt", "pint", "qt", "quart"], "write `pt_us`, `pt_uk`, `qt_us`, or a volume in `L`"),
    (&["floz", "fl_oz"], "write `floz_us`, or a volume in `mL`"),
    (
        &["ton", "tons"],
        "there are several tons: write `t` (1000 kg), `ton_us` (2000 lb), `ton_uk` (2240 lb) or `ton_refrigeration` (12000 Btu/h)",
    ),
    (&["therm", "therms", "thm"], "there are several therms: write 100000 Btu, as a number of `Btu` or `MMBtu`"),
    (&["MBtu", "MBTU", "MBH"], "M has meant a thousand and a million: write `kBtu` or `MMBtu`"),
    (&["a", "yr", "year", "years", "y"], "years have several lengths: write them in days or hours (365 d, 8760 h)"),
    (&["month", "months", "mo"], "months have several lengths: write them in days (`d`)"),
    (&["acre", "acres"], "there are two acres: write the area in `ha`, `m2` or `ft2`"),
    (
        &["NL", "Nl", "nl", "SL", "sl", "slpm", "SLPM", "nlpm", "NLPM", "sccm", "SCCM", "slm", "Nlpm", "Nccm"],
        "a gas volume at reference conditions is written in `Nm3` or `Sm3`, with a `reference` line: 1 L is 0.001 m3",
    ),
    (
        &["MMscf", "MMSCF", "Mscf", "MSCF", "MMscfd", "MMSCFD", "MMcf", "mmscfd"],
        "write the number with its exponent and `scf`: a million a day is `e6` behind the number and `scf/d`",
    ),
    (&["ppt"], "this has meant a thousandth and a million-millionth: write `e-3` or `e-12` behind the number"),
    (&["ppmv", "vppm", "ppmw", "ppm_v", "ppmm"], "write `ppm`, and say in the description whether it is by mole or by mass"),
    (&["mol%", "vol%", "wt%", "%vol", "%mol", "Vol%", "%RH"], "write `%`, and say in the description of what"),
    (&["gauge", "abs", "diff", "absolute"], "the basis of a pressure stands behind its unit: `bar gauge`, `bar abs`, `bar diff`"),
    (&["ATM"], "write `atm`"),
    (&["RH", "rh"], "relative humidity is a pure number: write `%`"),
];

/// Endings by which a word says the basis of a pressure.
const BASES: &[(&str, &str)] = &[
    ("gauge", "gauge"),
    ("gage", "gauge"),
    ("gag", "gauge"),
    ("absolute", "abs"),
    ("abs", "abs"),
    ("differential", "diff"),
    ("difference", "diff"),
    ("diff", "diff"),
    ("ga", "gauge"),
    ("g", "gauge"),
    ("G", "gauge"),
    ("e", "gauge"),
    ("ü", "gauge"),
    ("a", "abs"),
    ("A", "abs"),
    ("d", "diff"),
    ("D", "diff"),
];

/// What a word that is no unit probably was.
pub(super) fn suggest(word: &str) -> Suggestion {
    let stem = word.trim_end_matches(|c: char| c.is_ascii_digit());
    let help = help(word).or_else(|| if stem == word { None } else { help(stem) });
    Suggestion { near: near(word, stem), help: help.or_else(|| product(word)), cure: cure(word, stem) }
}

/// The unit that a word stands for.
fn cure(word: &str, stem: &str) -> Option<Cure> {
    let spelling = |word: &str| SPELLINGS.iter().find(|(words, _)| words.contains(&word)).map(|(_, spelling)| *spelling);
    let certain = !DOUBTFUL.contains(&word) && !DOUBTFUL.contains(&stem);
    if let Some(unit) = spelling(word) {
        return Some(Cure { unit: unit.to_owned(), basis: None, certain });
    }
    if let Some(unit) = spelling(stem) {
        let unit = format!("{unit}{}", &word[stem.len()..]);
        return parse(&unit).is_ok().then_some(Cure { unit, basis: None, certain });
    }
    if SENTENCES.iter().any(|(words, _)| words.contains(&word)) {
        return None;
    }
    BASES.iter().find_map(|(ending, _)| {
        let (unit, basis) = joined_basis(word.strip_suffix(ending)?.trim_end_matches(['_', '-']), ending)?;
        Some(Cure { unit, basis: Some(basis), certain: true })
    })
}

/// Names like the word. Its digits count first where they cannot be a power (`inH20`), else the word without them (`kgg3`).
fn near(word: &str, stem: &str) -> Vec<&'static str> {
    let (first, second) = if matches!(&word[stem.len()..], "2" | "3" | "4") { (stem, word) } else { (word, stem) };
    let mut names: Vec<&'static str> = nearest(first, registry().names());
    if first != second && names.len() < MOST_NAMES {
        for name in nearest(second, registry().names()) {
            if !names.contains(&name) {
                names.push(name);
            }
        }
    }
    names.truncate(MOST_NAMES);
    names
}

fn help(word: &str) -> Option<String> {
    if let Some((_, sentence)) = SENTENCES.iter().find(|(words, _)| words.contains(&word)) {
        return Some((*sentence).to_owned());
    }
    if let Some((_, spelling)) = SPELLINGS.iter().find(|(words, _)| words.contains(&word)) {
        return Some(format!("write `{spelling}`"));
    }
    BASES.iter().find_map(|(ending, _)| {
        let unit = word.strip_suffix(ending)?;
        pressure_with_basis(unit.trim_end_matches(['_', '-']), ending)
    })
}

/// The help for a unit of pressure, which may itself be misspelt, and the basis that was joined to it: `bar` and `g`.
pub(super) fn pressure_with_basis(unit: &str, basis: &str) -> Option<String> {
    joined_basis(unit, basis).map(|(unit, basis)| format!("write `{unit} {basis}`"))
}

/// A unit of pressure and its basis, of a unit that may be misspelt and a word or letter for the basis: `bar` and `g`, `Bar` and `absolute`.
///
/// ```
/// use gaswright::units::joined_basis;
/// assert_eq!(joined_basis("bar", "g"), Some(("bar".to_owned(), "gauge")));
/// assert_eq!(joined_basis("kPa", "absolute"), Some(("kPa".to_owned(), "abs")));
/// assert_eq!(joined_basis("m", "g"), None);
/// ```
#[must_use]
pub fn joined_basis(unit: &str, basis: &str) -> Option<(String, &'static str)> {
    let (_, basis) = BASES.iter().find(|(ending, _)| *ending == basis)?;
    let spelling = SPELLINGS.iter().find(|(words, _)| words.contains(&unit)).map_or(unit, |(_, spelling)| spelling);
    // An unknown word is not read: that would look for what it was meant for, ending by ending, and never come back.
    let first = spelling.split(['.', '·', '⋅', '/', '(']).next()?.trim_end_matches(|c: char| c.is_ascii_digit());
    registry().find(first)?;
    let known = parse(spelling).ok().filter(|unit| unit.dimension == Dimension::PRESSURE)?;
    Some((known.name, basis))
}

/// The unit of a pressure times what is meant for its basis: nobody measures in bar times gram.
pub(super) fn basis_as_factor(unit: &str) -> Option<(String, &'static str)> {
    let (pressure, letter) = unit.rsplit_once('.')?;
    if matches!(letter, "g" | "G" | "A" | "a") { joined_basis(pressure, letter) } else { None }
}

/// The help for two unit words run into one: `Nm`, `Pas`, `kgm3`. Two of one dimension (`kgg`) are a slip of another kind.
fn product(word: &str) -> Option<String> {
    let splits = word.char_indices().map(|(at, _)| at).skip(1).collect::<Vec<_>>();
    splits.into_iter().rev().find_map(|at| {
        let (left, right) = word.split_at(at);
        let left_dimension = registry().find(left)?.dimension();
        let right_stem = right.trim_end_matches(|c: char| c.is_ascii_digit());
        let right_dimension = registry().find(right_stem)?.dimension();
        if left_dimension == right_dimension || parse(right).is_err() {
            return None;
        }
        Some(format!("a product is written `{left}.{right}`, a quotient `{left}/{right}`"))
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    fn help_for(word: &str) -> String {
        suggest(word).help.unwrap_or_else(|| panic!("no help for {word}"))
    }

    #[test]
    fn a_joined_basis_gets_its_spelling() {
        for (word, expected) in [
            ("barg", "write `bar gauge`"),
            ("bara", "write `bar abs`"),
            ("bard", "write `bar diff`"),
            ("Barg", "write `bar gauge`"),
            ("mbarg", "write `mbar gauge`"),
            ("psig", "write `psi gauge`"),
            ("psia", "write `psi abs`"),
            ("psid", "write `psi diff`"),
            ("PSIG", "write `psi gauge`"),
            ("kPag", "write `kPa gauge`"),
            ("kPaa", "write `kPa abs`"),
            ("kPa_a", "write `kPa abs`"),
            ("MPaG", "write `MPa gauge`"),
            ("bar_abs", "write `bar abs`"),
            ("barü", "write `bar gauge`"),
            ("atg", "write `kgf/cm2 gauge`"),
        ] {
            assert_eq!(help_for(word), expected, "{word}");
        }
        // Endings of endings: each is taken off once.
        let many = format!("m3{}", "e".repeat(500));
        assert!(suggest(&many).cure.is_none());
        assert_eq!(pressure_with_basis("m", "g"), None);
        assert_eq!(pressure_with_basis("bar", "x"), None);
    }

    #[test]
    fn habits_get_their_cure() {
        for (word, part) in [
            ("in", "`inch`"),
            ("C", "`degC`"),
            ("F", "`degF`"),
            ("M", "`mol/L`"),
            ("Mol", "`mol`"),
            ("degK", "`K`"),
            ("cfm", "`ft3/min`"),
            ("gal", "`gal_us`"),
            ("sccm", "`Nm3`"),
            ("hr", "`h`"),
            ("lbs", "`lb`"),
            ("lbm3", "`lb`"),
            ("Nm", "`N.m`"),
            ("Pas", "`Pa.s`"),
            ("mPas", "`mPa.s`"),
            ("kgm3", "`kg/m3`"),
            ("gauge", "bar gauge"),
        ] {
            let help = help_for(word);
            assert!(help.contains(part), "{word}: {help}");
        }
        for word in ["xyzzy", "kgg", "mbra"] {
            assert_eq!(suggest(word).help, None, "{word}");
        }
    }

    #[test]
    fn near_names_are_few_and_like_the_word() {
        assert_eq!(suggest("mbra").near[0], "mbar");
        assert_eq!(suggest("inH20").near[0], "inH2O");
        assert_eq!(suggest("kgg3").near[0], "kg");
        assert!(suggest("barr").near.len() <= MOST_NAMES);
        assert!(suggest("xyzzy").near.is_empty());
        assert!(suggest(&"x".repeat(300)).near.is_empty());
    }

    #[test]
    fn every_cure_is_a_unit_and_no_habit_is_one() {
        for (words, spelling) in SPELLINGS {
            assert!(parse(spelling).is_ok(), "{spelling}");
            for word in *words {
                assert!(registry().find(word).is_none(), "{word} is a unit");
            }
        }
        for word in SENTENCES.iter().flat_map(|(words, _)| *words) {
            assert!(registry().find(word).is_none(), "{word} is a unit");
        }
    }

    #[test]
    fn no_habit_stands_twice() {
        let mut words: Vec<&str> = SPELLINGS.iter().chain(SENTENCES).flat_map(|(words, _)| words.iter().copied()).collect();
        words.sort_unstable();
        for pair in words.windows(2) {
            assert_ne!(pair[0], pair[1]);
        }
    }
}
