//! Elementary functions: the one door to them.
//!
//! The standard library hands `exp`, `ln` and `pow` to the C library, which chooses its code by the processor, so that
//! the last digit differs from one machine to the next. These come from `libm` and are the same everywhere. Square
//! roots, absolute values and the four operations are exact by IEEE 754 and need no door.

/// Largest exponent that [`pow`] takes by products and a root instead of by logarithms.
const LARGEST_POWER_BY_PRODUCTS: f64 = 64.0;

/// e to the power `x`.
#[must_use]
pub fn exp(x: f64) -> f64 {
    libm::exp(x)
}

/// e to the power `x`, less one; exact digits near `x` = 0.
#[must_use]
pub fn exp_m1(x: f64) -> f64 {
    libm::expm1(x)
}

/// Natural logarithm. NaN below zero, minus infinity at zero.
#[must_use]
pub fn ln(x: f64) -> f64 {
    libm::log(x)
}

/// Natural logarithm of `1 + x`; exact digits near `x` = 0.
#[must_use]
pub fn ln_1p(x: f64) -> f64 {
    libm::log1p(x)
}

/// Logarithm to base 10.
#[must_use]
pub fn log10(x: f64) -> f64 {
    libm::log10(x)
}

/// Sine of an angle in radians.
#[must_use]
pub fn sin(x: f64) -> f64 {
    libm::sin(x)
}

/// Cosine of an angle in radians.
#[must_use]
pub fn cos(x: f64) -> f64 {
    libm::cos(x)
}

/// Tangent of an angle in radians.
#[must_use]
pub fn tan(x: f64) -> f64 {
    libm::tan(x)
}

/// Angle in radians, from -π/2 to π/2, whose sine is `x`; NaN outside -1 to 1.
#[must_use]
pub fn asin(x: f64) -> f64 {
    libm::asin(x)
}

/// Angle in radians, from 0 to π, whose cosine is `x`; NaN outside -1 to 1.
#[must_use]
pub fn acos(x: f64) -> f64 {
    libm::acos(x)
}

/// Angle in radians, from -π/2 to π/2, whose tangent is `x`.
#[must_use]
pub fn atan(x: f64) -> f64 {
    libm::atan(x)
}

/// Hyperbolic tangent.
#[must_use]
pub fn tanh(x: f64) -> f64 {
    libm::tanh(x)
}

/// Hyperbolic sine.
#[must_use]
pub fn sinh(x: f64) -> f64 {
    libm::sinh(x)
}

/// Hyperbolic cosine.
#[must_use]
pub fn cosh(x: f64) -> f64 {
    libm::cosh(x)
}

/// Cube root, of negative numbers too.
#[must_use]
pub fn cbrt(x: f64) -> f64 {
    libm::cbrt(x)
}

/// Square root; NaN below zero.
#[must_use]
pub fn sqrt(x: f64) -> f64 {
    x.sqrt()
}

/// `x` to a whole power, by repeated squaring: the same products in the same order on every machine.
///
/// A power of zero is 1, also of zero and of infinity.
#[must_use]
pub fn powi(x: f64, power: i32) -> f64 {
    let mut product = 1.0;
    let mut square = x;
    let mut rest = power.unsigned_abs();
    while rest > 0 {
        if rest & 1 == 1 {
            product *= square;
        }
        rest >>= 1;
        if rest > 0 {
            square *= square;
        }
    }
    if power < 0 { 1.0 / product } else { product }
}

/// `x` to the power `y`.
///
/// Whole and half powers up to 64 in size are products and one square root: they are faster so, and a whole power of a
/// negative number needs no logarithm. Every other power is that of `libm`. A half power of a negative number is NaN.
#[must_use]
pub fn pow(x: f64, y: f64) -> f64 {
    if y.abs() <= LARGEST_POWER_BY_PRODUCTS {
        // The cast is exact: |y| is at most 64 here.
        let whole = y.abs().trunc() as i32;
        let rest = y.abs() - f64::from(whole);
        let product = if rest == 0.0 {
            powi(x, whole)
        } else if rest == 0.5 {
            powi(x, whole) * x.sqrt()
        } else {
            return libm::pow(x, y);
        };
        return if y < 0.0 { 1.0 / product } else { product };
    }
    libm::pow(x, y)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn whole_powers_are_products() {
        assert_eq!(powi(3.0, 5), 243.0);
        assert_eq!(powi(-2.0, 3), -8.0);
        assert_eq!(powi(2.0, -3), 0.125);
        assert_eq!(powi(0.0, 0), 1.0);
        assert_eq!(powi(0.0, -1), f64::INFINITY);
        assert_eq!(powi(1.0, i32::MIN), 1.0);
        assert_eq!(pow(10.0, 22.0), 1e22);
        assert_eq!(pow(-1.5, 2.0), 2.25);
        assert_eq!(pow(7.0, 0.0), 1.0);
    }

    #[test]
    fn half_powers_are_products_and_a_root() {
        assert_eq!(pow(4.0, 0.5), 2.0);
        assert_eq!(pow(4.0, -0.5), 0.5);
        assert_eq!(pow(4.0, 2.5), 32.0);
        assert_eq!(pow(9.0, -1.5), 1.0 / 27.0);
        assert!(pow(-4.0, 0.5).is_nan());
    }

    #[test]
    fn other_powers_agree_with_the_products_beside_them() {
        for (x, y) in [(2.5_f64, 1.4_f64), (0.03, -3.7), (1.013_25e5, 1.0 / 3.0), (12.0, 65.0)] {
            let by_logarithm = exp(y * ln(x));
            // The logarithm's rounding is multiplied by the exponent of the result, here at most 180: 180 eps = 4e-14.
            assert!((pow(x, y) / by_logarithm - 1.0).abs() < 1e-13, "{x}^{y}");
        }
    }

    #[test]
    fn functions_meet_their_identities() {
        for x in [-0.9, -0.3, 0.0, 0.2, 0.7] {
            assert!((sin(asin(x)) - x).abs() < 1e-15);
            assert!((cos(acos(x)) - x).abs() < 1e-15);
            assert!((tan(atan(x)) - x).abs() < 1e-15);
            assert!((exp_m1(ln_1p(x)) - x).abs() < 1e-15);
            assert!((cbrt(x * x * x) - x).abs() < 1e-15);
            assert!((cosh(x) * cosh(x) - sinh(x) * sinh(x) - 1.0).abs() < 1e-15);
            assert!((tanh(x) - sinh(x) / cosh(x)).abs() < 1e-15);
        }
        assert_eq!(log10(1000.0), 3.0);
        assert!(ln(-1.0).is_nan());
        assert!(asin(1.5).is_nan());
        assert_eq!(sqrt(2.25), 1.5);
    }
}
