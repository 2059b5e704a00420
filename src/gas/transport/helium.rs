//! Viscosity and thermal conductivity of helium.

use crate::gas::eos::equation::Equation;
use crate::units::math::{exp, ln, pow, sqrt};

/// Viscosity, Pa s.
///
/// Equation: ln η = ln η_0(x) + B ρ + C ρ² + D ρ³, x = ln T up to 300 K; above 100 K the thin gas by its own formula.
/// Source:   Arp, McCarty, Friend 1998, NIST Technical Note 1334 (revised).
pub(super) fn viscosity(t_k: f64, rho: f64) -> f64 {
    let d = rho / 1000.0;
    let x = ln(t_k.min(300.0));
    let of = |a: [f64; 5]| a[0] / x + a[1] + x * (a[2] + x * (a[3] + x * a[4]));
    let b = of([-47.529_525_9, 87.679_930_9, -42.074_158_9, 8.331_282_89, -0.589_252_385]);
    let c = of([547.309_267, -904.870_586, 431.404_928, -81.450_485_4, 5.370_084_33]);
    let e = of([-1_684.393_24, 3_331.086_3, -1_632.191_72, 308.804_413, -20.293_636_7]);
    let thin = of([-0.135_311_743, 1.003_478_41, 1.206_546_49, -0.149_564_551, 0.012_520_841]);
    let value = exp(thin + d * (b + d * (c + d * e)));
    let value =
        if t_k <= 100.0 { value } else { value + 196.0 * pow(t_k, 0.719_38) * exp((12.451 - 295.67 / t_k) / t_k - 4.1249) - exp(thin) };
    value * 1e-7
}

/// Thermal conductivity, W/(m K), with the enhancement near the critical point from 3.5 to 12 K.
///
/// Source: Hands, Arp 1981, Cryogenics 21: 697-703; the amplitude of the enhancement as the library CoolProp has it.
pub(super) fn conductivity(equation: &Equation, t_k: f64, rho: f64) -> Option<f64> {
    let i = 1.0 / t_k;
    let sum = i * (3.739_232_544 + i * (-26.203_169_69 + i * (59.822_522_46 - 49.263_976_34 * i)));
    let thin = 2.787_003_4e-3 * pow(t_k, 7.034_007_057e-1) * exp(sum);
    let third = pow(t_k, 1.0 / 3.0);
    let two = third * third;
    let dense = (1.862_970_530e-4 - 7.275_964_435e-7 * t_k - 1.427_549_651e-4 * third + 3.290_833_592e-5 * two) * rho
        + (-5.213_335_363e-8 + 4.492_659_933e-8 * third - 5.924_416_513e-9 * two) * rho * rho * rho
        + (7.087_321_137e-6 - 6.013_335_678e-6 * third + 8.067_145_814e-7 * two + 3.995_125_013e-7 * i) * rho * rho * ln(rho / 68.0);
    let near_critical = if t_k > 3.5 && t_k < 12.0 { enhancement(equation, t_k, rho) } else { 0.0 };
    let out = thin + dense + near_critical;
    out.is_finite().then_some(out)
}

fn enhancement(equation: &Equation, t_k: f64, rho: f64) -> f64 {
    const X0: f64 = 0.392;
    const E1: f64 = 2.8461;
    const E2: f64 = 0.271_56;
    const BETA: f64 = 0.3554;
    const GAMMA: f64 = 1.1743;
    const DELTA: f64 = 4.304;
    let (rho_c, t_c, p_c) = (69.158, 5.189_92, 2.2746e5);
    let (dt, dr) = ((1.0 - t_k / t_c).abs(), (1.0 - rho / rho_c).abs());
    let state = equation.properties(t_k, rho);
    let own = 1.0 / (rho * state.p.by_rho);
    let w = dt * dt / 0.04 + dr * dr / 0.0625;
    let compressibility = if w > 1.0 {
        own
    } else {
        let x = pow(dt / dr, 1.0 / BETA);
        let y = 1.0 + x / X0;
        let z = E2 * pow(y, 2.0 / BETA);
        let power = (GAMMA - 1.0) / (2.0 * BETA);
        let h = E1 * y * pow(1.0 + z, power);
        let slope = E1 / X0 * pow(1.0 + z, power - 1.0) * (z * (GAMMA - 1.0) / (BETA * BETA) + 1.0 + z);
        let scaled = pow(dr, DELTA - 1.0) * (DELTA * h - x / BETA * slope);
        let d = rho / rho_c;
        w * own + (1.0 - w) / (scaled * d * d * p_c)
    };
    let amplitude = 3.468_523_3e-17 * 3.726_229_668;
    amplitude * sqrt(compressibility) * t_k * t_k / (rho * viscosity(t_k, rho))
        * state.p.by_t
        * state.p.by_t
        * exp(-18.66 * dt * dt - 4.25 * dr * dr * dr * dr)
}
