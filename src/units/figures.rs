//! Significant figures: how finely a number was written, and how a result is written.
//!
//! A place is a power of ten: -2 stands for hundredths, 0 for ones, 3 for thousands. Every digit that was written
//! counts: `100` has three figures, since a writer who means one writes `1e2`.

use super::math;

/// A number written with fewer figures counts as written with this many, and a result has at least this many.
const LEAST_FIGURES: u32 = 3;

/// Figures of a result of which no input limits the figures.
const FIGURES_OF_THE_EXACT: i32 = 6;

/// Half width, relative to the value, above which a result may have fewer figures than [`LEAST_FIGURES`].
const COARSE: f64 = 0.05;

/// Figures beyond which the decimal digits of a double are those of its rounding.
const FIGURES_OF_A_DOUBLE: i32 = 15;

/// From this power of ten on, a number whose last place is above the ones is written with an exponent.
const LARGE_EXPONENT: i32 = 7;

/// Below this power of ten a number is written with an exponent.
const SMALL_EXPONENT: i32 = -4;

/// The place that a width of zero gets: below that of every double.
const SMALLEST_PLACE: i32 = -330;

/// Significant figures of a number as written: `2.40` has 3, `0.050` has 2, `8.40e4` has 3, `100` has 3.
///
/// Zeros before the first other digit do not count. In a zero all digits count: `0.0` has 2.
#[must_use]
pub fn figures_written(number: &str) -> u32 {
    let written = Written::read(number);
    u32::try_from(written.figures).unwrap_or(u32::MAX)
}

/// Place of the last written digit: -2 in `2.40`, 2 in `8.40e4`, 0 in `12`.
#[must_use]
pub fn last_place_written(number: &str) -> i32 {
    Written::read(number).last_place
}

/// Half a unit of the last written figure, where a number of fewer than three figures counts as written with three:
/// 0.005 for `2.40`, `2` and `9.6`, 0.05 for `12`.
#[must_use]
pub fn half_width(number: &str) -> f64 {
    let written = Written::read(number);
    let missing = LEAST_FIGURES.saturating_sub(u32::try_from(written.figures).unwrap_or(u32::MAX));
    let place = written.last_place.saturating_sub(i32::try_from(missing).unwrap_or(0));
    parse_power(5.0, place.saturating_sub(1))
}

/// A number as written, its digits counted.
struct Written {
    figures: usize,
    last_place: i32,
}

impl Written {
    fn read(number: &str) -> Self {
        let (mantissa, exponent) = match number.find(['e', 'E']) {
            Some(at) => (&number[..at], &number[at + 1..]),
            None => (number, ""),
        };
        let exponent = read_exponent(exponent);
        let decimals = mantissa.split_once('.').map_or(0, |(_, decimals)| count_digits(decimals));
        let digits = count_digits(mantissa);
        let leading = mantissa.chars().filter(char::is_ascii_digit).take_while(|digit| *digit == '0').count();
        let figures = if leading == digits { decimals + usize::from(digits > 0) } else { digits - leading };
        let decimals = i32::try_from(decimals).unwrap_or(i32::MAX);
        Self { figures, last_place: exponent.saturating_sub(decimals) }
    }
}

fn count_digits(text: &str) -> usize {
    text.chars().filter(char::is_ascii_digit).count()
}

fn read_exponent(text: &str) -> i32 {
    let below_zero = text.starts_with(['-', '−']);
    let size = text.chars().filter_map(|c| c.to_digit(10)).fold(0_i32, |size, digit| {
        // A digit is at most 9.
        size.saturating_mul(10).saturating_add(digit as i32)
    });
    if below_zero { -size } else { size }
}

/// The place of a full width: the power of ten nearest to it on a logarithmic scale, so that 0.04 gives tenths (-1) and
/// 0.03 hundredths (-2). A width of zero gets a place below that of every double, an infinite one a place above.
#[must_use]
pub fn place_of_width(full_width: f64) -> i32 {
    let logarithm = math::log10(full_width.abs()).round();
    if logarithm.is_nan() { SMALLEST_PLACE } else { (logarithm as i32).clamp(SMALLEST_PLACE, -SMALLEST_PLACE) }
}

/// The last place that a result shows which is known to `half_width` (not negative, in the unit of `value`).
///
/// It is that of the full width; at least three figures are shown unless the half width is above 5 % of the value.
/// A half width of zero gives six figures.
#[must_use]
pub fn place_for(value: f64, half_width: f64) -> i32 {
    // A value that is not finite is written as a word, and no place changes that.
    let Some(place_of_figures) = place_of_figures(value, LEAST_FIGURES) else {
        return if half_width > 0.0 { place_of_width(2.0 * half_width) } else { 0 };
    };
    if half_width == 0.0 {
        return place_of_figures - (FIGURES_OF_THE_EXACT - LEAST_FIGURES as i32);
    }
    let place = place_of_width(2.0 * half_width);
    if half_width > COARSE * value.abs() { place } else { place.min(place_of_figures) }
}

/// The place of the last of so many figures of a value, after rounding to them; `None` for zero and what is not finite.
fn place_of_figures(value: f64, figures: u32) -> Option<i32> {
    if value == 0.0 || !value.is_finite() {
        return None;
    }
    let decimals = figures.clamp(1, FIGURES_OF_A_DOUBLE as u32) - 1;
    Some(exponent_of(&format!("{value:.*e}", decimals as usize)) - decimals as i32)
}

/// A value with so many significant figures, at least 1 and at most 15: 9.996 with three is `10.0`.
#[must_use]
pub fn write_figures(value: f64, figures: u32) -> String {
    let figures = figures.clamp(1, FIGURES_OF_A_DOUBLE as u32);
    let place = place_of_figures(value, figures).unwrap_or(1 - figures as i32);
    write_to_place(value, place)
}

/// A value rounded to a place: 28.2134 to -2 is `28.21`, 1061234 to 2 is `1061200`.
///
/// The decimal digits are those of the exact value of the double, rounded once, and half to even. Numbers below 1e-4, and
/// numbers from 1e7 on whose place is above the ones, get an exponent: `1.23e-6`. No zero has a sign, and no
/// more than 15 figures are written, since those after them say nothing of the number.
#[must_use]
pub fn write_to_place(value: f64, place: i32) -> String {
    if !value.is_finite() {
        return if value.is_nan() { "not a number".to_owned() } else { (if value > 0.0 { "infinity" } else { "-infinity" }).to_owned() };
    }
    let size = value.abs();
    let exponent = exponent_of(&format!("{size:e}"));
    let place = place.max(exponent - (FIGURES_OF_A_DOUBLE - 1));
    let digits = digits_at(size, exponent, place);
    if digits.is_empty() {
        return write_zero(place);
    }
    let sign = if value < 0.0 { "-" } else { "" };
    // The digits are at most one more than the figures of a double.
    let first_place = place + digits.len() as i32 - 1;
    if first_place < SMALL_EXPONENT || first_place >= LARGE_EXPONENT && place > 0 {
        let (first, rest) = digits.split_at(1);
        let point = if rest.is_empty() { "" } else { "." };
        return format!("{sign}{first}{point}{rest}e{first_place}");
    }
    if place >= 0 {
        return format!("{sign}{digits}{}", "0".repeat(place as usize));
    }
    let decimals = place.unsigned_abs() as usize;
    let padded = format!("{digits:0>width$}", width = decimals + 1);
    let (whole, fraction) = padded.split_at(padded.len() - decimals);
    format!("{sign}{whole}.{fraction}")
}

/// Zero, with the decimals of its place where they can be read at a glance.
fn write_zero(place: i32) -> String {
    if (SMALL_EXPONENT - 2..0).contains(&place) { format!("0.{}", "0".repeat(place.unsigned_abs() as usize)) } else { "0".to_owned() }
}

/// The digits of a size, of which `exponent` is the power of ten, rounded to a place, without leading zeros. Empty for zero.
fn digits_at(size: f64, exponent: i32, place: i32) -> String {
    if size == 0.0 || exponent < place - 1 {
        return String::new();
    }
    if exponent == place - 1 {
        // Less than one unit of the place: one unit above half of it, none below, and none at half, which rounds to even.
        return if size > parse_power(5.0, exponent) { "1".to_owned() } else { String::new() };
    }
    let decimals = (exponent - place) as usize;
    let written = format!("{size:.decimals$e}");
    let mut digits: String = written.split('e').next().unwrap_or_default().chars().filter(char::is_ascii_digit).collect();
    if exponent_of(&written) > exponent {
        // Rounding went up to the next power of ten, whose digits end one place higher.
        digits.push('0');
    }
    digits
}

/// The exponent of a number in the form `1.5e3`.
fn exponent_of(written: &str) -> i32 {
    written.split_once('e').and_then(|(_, exponent)| exponent.parse().ok()).unwrap_or(0)
}

/// `digit` times ten to the power `exponent`, rounded once.
fn parse_power(digit: f64, exponent: i32) -> f64 {
    format!("{digit}e{exponent}").parse().unwrap_or(0.0)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn figures_as_written() {
        for (number, figures, place) in [
            ("2.40", 3, -2),
            ("0.050", 2, -3),
            ("8.40e4", 3, 2),
            ("12", 2, 0),
            ("100", 3, 0),
            ("1e2", 1, 2),
            ("-8.0", 2, -1),
            ("−8.0", 2, -1),
            ("+7", 1, 0),
            ("1.78E-5", 3, -7),
            ("007", 1, 0),
            ("0", 1, 0),
            ("0.0", 2, -1),
            ("0.000", 4, -3),
            ("0e-5", 1, -5),
            ("", 0, 0),
        ] {
            assert_eq!(figures_written(number), figures, "figures of {number}");
            assert_eq!(last_place_written(number), place, "last place of {number}");
        }
    }

    #[test]
    fn half_a_unit_of_the_last_figure_of_at_least_three() {
        for (number, expected) in [
            ("2", 0.005),
            ("4.0", 0.005),
            ("9.6", 0.005),
            ("12", 0.05),
            ("2.40", 0.005),
            ("4.0000", 0.000_05),
            ("31.0", 0.05),
            ("8.40e4", 50.0),
            ("1e6", 5000.0),
            ("0.050", 0.000_05),
            ("0", 0.005),
            ("0.000", 0.0005),
            ("98000", 0.5),
        ] {
            assert_eq!(half_width(number), expected, "half width of {number}");
        }
    }

    #[test]
    fn no_number_as_written_is_too_odd() {
        for odd in ["1e999999999999", "1e-999999999999", "e", ".", "1.2.3", "± 3", "9".repeat(400).as_str()] {
            let _ = (figures_written(odd), last_place_written(odd));
            assert!(half_width(odd) >= 0.0, "{odd}");
        }
    }

    #[test]
    fn the_nearest_power_of_ten_on_a_logarithmic_scale() {
        for (width, place) in [(0.04, -1), (0.03, -2), (0.1, -1), (1.0, 0), (3.1, 0), (3.2, 1), (2000.0, 3), (6e-9, -8)] {
            assert_eq!(place_of_width(width), place, "{width}");
        }
        assert_eq!(place_of_width(0.0), SMALLEST_PLACE);
        assert_eq!(place_of_width(f64::NAN), SMALLEST_PLACE);
        assert_eq!(place_of_width(f64::INFINITY), -SMALLEST_PLACE);
    }

    #[test]
    fn the_place_of_a_result() {
        assert_eq!(place_for(10.0, 0.02), -1);
        assert_eq!(place_for(10.0, 0.000_236), -3);
        // Two figures would do for the width; three are the least.
        assert_eq!(place_for(8.0, 0.02), -2);
        // Half width above 5 %: fewer than three figures may stand.
        assert_eq!(place_for(10.0, 0.6), 0);
        assert_eq!(place_for(10.0, 0.5), -1);
        // Rounds to 10.0, which has three figures already.
        assert_eq!(place_for(9.996, 0.05), -1);
        assert_eq!(place_for(12.0, 0.0), -4);
        assert_eq!(place_for(-1.5e-7, 0.0), -12);
        assert_eq!(place_for(0.0, 0.0), 0);
        assert_eq!(place_for(0.0, 0.02), -1);
        assert_eq!(place_for(f64::NAN, 0.0), 0);
    }

    #[test]
    fn values_to_a_place() {
        for (value, place, text) in [
            (28.2134, -2, "28.21"),
            (1_061_234.0, 2, "1061200"),
            (12_345_678.0, 2, "1.23457e7"),
            (12_345_678.0, 0, "12345678"),
            (9_999_960.0, 2, "1.00000e7"),
            (9_999_940.0, 2, "9999900"),
            (0.000_123, -6, "0.000123"),
            (0.000_012_3, -7, "1.23e-5"),
            (0.000_099_96, -7, "0.0001000"),
            (1.4e-5, -5, "1e-5"),
            (1.6e-5, -5, "2e-5"),
            (6e-6, -5, "1e-5"),
            (4e-6, -5, "0.00000"),
            (60.0, 2, "100"),
            (50.0, 2, "0"),
            (150.0, 2, "200"),
            (250.0, 2, "200"),
            (40.0, 2, "0"),
            (-0.004, -2, "0.00"),
            (-0.0, -1, "0.0"),
            (0.0, -3, "0.000"),
            (0.0, -12, "0"),
            (-8.05, -1, "-8.1"),
            (-8.0, -1, "-8.0"),
            (9.996, -2, "10.00"),
            (99.96, -1, "100.0"),
            (0.5, 0, "0"),
            (0.51, 0, "1"),
            (1.005, -2, "1.00"),
            (0.1, -20, "0.100000000000000"),
            (1e22, 0, "1.00000000000000e22"),
            (5e-324, -330, "4.940656e-324"),
            (f64::MAX, 300, "1.79769313e308"),
        ] {
            assert_eq!(write_to_place(value, place), text, "{value} to {place}");
        }
        assert_eq!(write_to_place(f64::NAN, 0), "not a number");
        assert_eq!(write_to_place(f64::NEG_INFINITY, 0), "-infinity");
        for place in [i32::MIN, -400, 400, i32::MAX] {
            let _ = write_to_place(1.5, place);
        }
    }

    #[test]
    fn values_with_so_many_figures() {
        for (value, figures, text) in [
            (12.0, 5, "12.000"),
            (9.996, 3, "10.0"),
            (1_061_234.0, 4, "1061000"),
            (1.0612e8, 3, "1.06e8"),
            (0.0, 3, "0.00"),
            (0.04, 2, "0.040"),
            (-1.0 / 3.0, 4, "-0.3333"),
            (2.5, 1, "2"),
            (2.5, 0, "2"),
            (1.0 / 3.0, 40, "0.333333333333333"),
        ] {
            assert_eq!(write_figures(value, figures), text, "{value} with {figures}");
        }
    }

    proptest::proptest! {
        #[test]
        fn a_value_to_a_place_is_within_half_of_it(value in proptest::num::f64::NORMAL, figures in 1..15_i32) {
            let place = exponent_of(&format!("{value:e}")) - figures + 1;
            let back: f64 = write_to_place(value, place).parse().unwrap();
            let half = parse_power(5.0, place - 1);
            // Reading the digits back rounds once more, by at most 1.2e-16 of the value.
            proptest::prop_assert!((back - value).abs() <= half + 1.2e-16 * value.abs(), "{value} to {place}: {back}");
        }

        #[test]
        fn odd_texts_and_places_do_no_harm(text in ".{0,30}", value in proptest::num::f64::ANY, place in proptest::num::i32::ANY) {
            let _ = (figures_written(&text), last_place_written(&text), half_width(&text));
            let _ = (write_to_place(value, place), place_for(value, value.abs()), place_of_width(value));
        }
    }
}
