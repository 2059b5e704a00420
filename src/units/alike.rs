//! Units that are easily written for each other: `mm2` for `mm3`, `kJ` for `kJ/kg`, `kJ` for `kW`.

use super::{Dimension, parse, quantities};

/// How one unit becomes another by a slip of the pen, the likelier first.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
enum Slip {
    /// Another power: `mm2` for `mm3`, `m` for `m3`.
    Power,
    /// A part that is left out or too many, or one letter: `kJ` for `kJ/kg`, `L/min` for `L`, `kJ` for `kW`.
    Part,
    /// Upside down: `kg/m3` for `m3/kg`, `h` for `1/h`.
    Reciprocal,
}

/// The units of `dimension` for which `written` is easily written, by the likeliest slip.
///
/// Units that the sheet uses elsewhere, `in_use`, are preferred to others of the same slip.
///
/// ```
/// use gaswright::units::{Dimension, alike};
/// assert_eq!(alike("mm2", Dimension::VOLUME, &[]), ["mm3"]);
/// assert_eq!(alike("kJ", Dimension::SPECIFIC_ENERGY, &[]), ["kJ/kg"]);
/// assert_eq!(alike("kg", Dimension::MASS_FLOW, &["kg/h"]), ["kg/h"]);
/// assert!(alike("kg", Dimension::PRESSURE, &[]).is_empty());
/// ```
#[must_use]
pub fn alike(written: &str, dimension: Dimension, in_use: &[&str]) -> Vec<String> {
    let used = in_use.iter().copied().filter(|unit| parse(unit).is_ok_and(|unit| unit.dimension == dimension));
    let listed = quantities().iter().filter(|quantity| quantity.dimension == dimension).flat_map(|quantity| &quantity.units);
    let mut found: Vec<(Slip, bool, &str)> = Vec::new();
    for (is_used, unit) in used.map(|unit| (true, unit)).chain(listed.map(|unit| (false, unit.as_str()))) {
        if let Some(slip) = slip(written, unit)
            && found.iter().all(|(_, _, known)| *known != unit)
        {
            found.push((slip, !is_used, unit));
        }
    }
    let Some(best) = found.iter().map(|(slip, unused, _)| (*slip, *unused)).min() else { return Vec::new() };
    found.into_iter().filter(|(slip, unused, _)| (*slip, *unused) == best).map(|(_, _, unit)| unit.to_owned()).collect()
}

fn slip(written: &str, meant: &str) -> Option<Slip> {
    let without_powers = |text: &str| text.chars().filter(|c| !c.is_ascii_digit()).collect::<String>();
    let starts = |long: &str, short: &str| long.strip_prefix(short).is_some_and(|rest| rest.starts_with(['/', '.']));
    let over = |unit: &str| match unit.split_once('/') {
        Some(("1", below)) => below.to_owned(),
        Some((above, below)) => format!("{below}/{above}"),
        None => format!("1/{unit}"),
    };
    if written == meant {
        None
    } else if without_powers(written) == without_powers(meant) {
        Some(Slip::Power)
    } else if starts(written, meant) || starts(meant, written) {
        Some(Slip::Part)
    } else if over(written) == meant {
        Some(Slip::Reciprocal)
    } else if written.chars().count() > 1 && strsim::damerau_levenshtein(written, meant) == 1 && differ_by_time(written, meant) {
        Some(Slip::Part)
    } else {
        None
    }
}

/// Of units that differ by a letter only an energy and a power (`kJ`, `kW`) are taken for each other; others are alike by chance.
fn differ_by_time(written: &str, meant: &str) -> bool {
    let (Ok(written), Ok(meant)) = (parse(written), parse(meant)) else { return false };
    written.dimension.per(meant.dimension) == Some(Dimension::TIME) || meant.dimension.per(written.dimension) == Some(Dimension::TIME)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn slips_of_the_pen_lead_back_to_the_unit() {
        for (written, dimension, meant) in [
            ("m", Dimension::VOLUME, "m3"),
            ("m2", Dimension::VOLUME, "m3"),
            ("kg/m2", Dimension::DENSITY, "kg/m3"),
            ("L/min", Dimension::VOLUME, "L"),
            ("kJ", Dimension::POWER, "kW"),
            ("kJ/kg", Dimension::SPECIFIC_HEAT_CAPACITY, ""),
            ("h", Dimension::FREQUENCY, "1/h"),
            ("m3/kg", Dimension::DENSITY, "kg/m3"),
            ("kg", Dimension::TEMPERATURE, ""),
        ] {
            let found = alike(written, dimension, &[]);
            assert!(if meant.is_empty() { found.is_empty() } else { found.iter().any(|unit| unit == meant) }, "{written}: {found:?}");
        }
    }

    #[test]
    fn what_the_sheet_uses_comes_first() {
        assert!(alike("kg", Dimension::MASS_FLOW, &[]).len() > 2);
        assert_eq!(alike("kg", Dimension::MASS_FLOW, &["kg/min", "bar", "no unit"]), ["kg/min"]);
    }
}
