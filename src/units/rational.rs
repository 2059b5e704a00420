//! The rational number: what the exponent of a dimension is.

use std::cmp::Ordering;
use std::fmt;

/// Largest denominator that [`Rational::approximate`] looks for.
const LARGEST_DENOMINATOR: i32 = 64;

/// How near a fraction has to be to a number to stand for it, relative to numbers above 1: rounding of a quotient such as
/// 2/7 is 1e-16, and fractions of these denominators lie at least 2e-4 apart.
const NEAR_ENOUGH: f64 = 1e-12;

/// A fraction of two whole numbers, in lowest terms, with a positive denominator.
///
/// ```
/// use gaswright::units::Rational;
/// let half = Rational::new(2, 4).unwrap();
/// assert_eq!((half.num(), half.den()), (1, 2));
/// assert_eq!(half.to_string(), "1/2");
/// ```
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub struct Rational {
    num: i32,
    den: i32,
}

impl Rational {
    /// Zero.
    pub const ZERO: Self = Self::whole(0);
    /// One.
    pub const ONE: Self = Self::whole(1);

    /// The fraction `num`/`den`; `None` where `den` is zero or the lowest terms do not fit.
    #[must_use]
    pub fn new(num: i32, den: i32) -> Option<Self> {
        Self::reduced(i64::from(num), i64::from(den))
    }

    /// A whole number.
    #[must_use]
    pub const fn whole(num: i32) -> Self {
        Self { num, den: 1 }
    }

    /// The fraction with a denominator of at most 64 that equals `value` but for rounding (1e-12); `None` where there is none.
    #[must_use]
    pub fn approximate(value: f64) -> Option<Self> {
        if !value.is_finite() || value.abs() > 1e6 {
            return None;
        }
        let tolerance = NEAR_ENOUGH * value.abs().max(1.0);
        (1..=LARGEST_DENOMINATOR).find_map(|den| {
            let num = (value * f64::from(den)).round();
            // The cast is exact: |num| is at most 64e6.
            ((num / f64::from(den) - value).abs() <= tolerance).then(|| Self::new(num as i32, den))?
        })
    }

    fn reduced(num: i64, den: i64) -> Option<Self> {
        if den == 0 {
            return None;
        }
        let divisor = greatest_common_divisor(num.unsigned_abs(), den.unsigned_abs());
        // Numerator and denominator are below 2^63 and the divisor is at least 1, so both quotients keep their sign.
        let divisor = i64::try_from(divisor).ok()? * den.signum();
        Some(Self { num: i32::try_from(num / divisor).ok()?, den: i32::try_from(den / divisor).ok()? })
    }

    /// The numerator, which carries the sign.
    #[must_use]
    pub const fn num(self) -> i32 {
        self.num
    }

    /// The denominator, positive.
    #[must_use]
    pub const fn den(self) -> i32 {
        self.den
    }

    /// Whether it is zero.
    #[must_use]
    pub const fn is_zero(self) -> bool {
        self.num == 0
    }

    /// Whether it is a whole number.
    #[must_use]
    pub const fn is_whole(self) -> bool {
        self.den == 1
    }

    /// The nearest double.
    #[must_use]
    pub fn to_f64(self) -> f64 {
        f64::from(self.num) / f64::from(self.den)
    }

    /// The sum; `None` where it does not fit.
    #[must_use]
    pub fn checked_add(self, other: Self) -> Option<Self> {
        // Whole numbers, which nearly all exponents are, are in lowest terms.
        if self.den == 1 && other.den == 1 {
            return Some(Self::whole(self.num.checked_add(other.num)?));
        }
        let (a, b, c, d) = (i64::from(self.num), i64::from(self.den), i64::from(other.num), i64::from(other.den));
        Self::reduced((a * d).checked_add(c * b)?, b * d)
    }

    /// The difference; `None` where it does not fit.
    #[must_use]
    pub fn checked_sub(self, other: Self) -> Option<Self> {
        self.checked_add(other.checked_neg()?)
    }

    /// The product; `None` where it does not fit.
    #[must_use]
    pub fn checked_mul(self, other: Self) -> Option<Self> {
        if self.den == 1 && other.den == 1 {
            return Some(Self::whole(self.num.checked_mul(other.num)?));
        }
        Self::reduced(i64::from(self.num) * i64::from(other.num), i64::from(self.den) * i64::from(other.den))
    }

    /// The negative; `None` where it does not fit.
    #[must_use]
    pub fn checked_neg(self) -> Option<Self> {
        Some(Self { num: self.num.checked_neg()?, den: self.den })
    }
}

fn greatest_common_divisor(mut a: u64, mut b: u64) -> u64 {
    while b != 0 {
        (a, b) = (b, a % b);
    }
    a
}

impl Default for Rational {
    fn default() -> Self {
        Self::ZERO
    }
}

impl From<i32> for Rational {
    fn from(num: i32) -> Self {
        Self::whole(num)
    }
}

impl Ord for Rational {
    fn cmp(&self, other: &Self) -> Ordering {
        (i64::from(self.num) * i64::from(other.den)).cmp(&(i64::from(other.num) * i64::from(self.den)))
    }
}

impl PartialOrd for Rational {
    fn partial_cmp(&self, other: &Self) -> Option<Ordering> {
        Some(self.cmp(other))
    }
}

impl fmt::Display for Rational {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        if self.is_whole() { write!(f, "{}", self.num) } else { write!(f, "{}/{}", self.num, self.den) }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn fraction(num: i32, den: i32) -> Rational {
        Rational::new(num, den).unwrap()
    }

    #[test]
    fn lowest_terms_and_a_positive_denominator() {
        assert_eq!(fraction(6, -4), fraction(-3, 2));
        assert_eq!(fraction(6, -4).to_string(), "-3/2");
        assert_eq!(fraction(0, -7), Rational::ZERO);
        assert_eq!(fraction(8, 4).to_string(), "2");
        assert_eq!(Rational::new(1, 0), None);
        assert_eq!(Rational::new(i32::MIN, -1), None);
        assert_eq!(fraction(i32::MIN, i32::MIN), Rational::ONE);
    }

    #[test]
    fn arithmetic_is_exact_and_refuses_what_does_not_fit() {
        assert_eq!(fraction(1, 2).checked_add(fraction(1, 3)), Some(fraction(5, 6)));
        assert_eq!(fraction(1, 2).checked_sub(fraction(1, 2)), Some(Rational::ZERO));
        assert_eq!(fraction(2, 3).checked_mul(fraction(9, 4)), Some(fraction(3, 2)));
        assert_eq!(Rational::whole(i32::MAX).checked_add(Rational::ONE), None);
        assert_eq!(Rational::whole(i32::MIN).checked_neg(), None);
        let extreme = fraction(i32::MIN, i32::MAX);
        assert_eq!(extreme.checked_add(extreme), None);
        assert_eq!(extreme.checked_mul(extreme), None);
    }

    #[test]
    fn order_is_that_of_the_numbers() {
        assert!(fraction(1, 3) < fraction(1, 2));
        assert!(fraction(-1, 2) < fraction(-1, 3));
        assert_eq!(fraction(1, 2).cmp(&fraction(2, 4)), Ordering::Equal);
    }

    #[test]
    fn numbers_near_a_fraction_are_that_fraction() {
        assert_eq!(Rational::approximate(0.5), Some(fraction(1, 2)));
        assert_eq!(Rational::approximate(2.0 / 7.0), Some(fraction(2, 7)));
        assert_eq!(Rational::approximate(-1.4), Some(fraction(-7, 5)));
        assert_eq!(Rational::approximate(63.0 / 64.0), Some(fraction(63, 64)));
        assert_eq!(Rational::approximate(0.0), Some(Rational::ZERO));
        for no in [1.0 / 65.0, 0.333_333, std::f64::consts::PI, 1.852, f64::NAN, f64::INFINITY, 1e9] {
            assert_eq!(Rational::approximate(no), None, "{no}");
        }
    }
}
