//! Properties of air, water vapour and common gases by published formulas, as sheets.

use super::gas_mixing::saturation;
use super::worked_sheet::WorkedSheet;

/// The formula CIPM-2007 for the density of moist air: Picard, Davis, Gläser, Fujii, Metrologia 45 (2008) 149-155, with its constants and its gas
/// constant 8.314472, for a carbon dioxide content of 0.0004. No check value is printed there; these were worked with 20 digits.
#[test]
fn density_of_moist_air() {
    // Temperature, pressure, humidity; saturation pressure, share of vapour, compressibility factor, density, each with the unit of its last figure.
    let table = [
        ("20 degC", "101325 Pa", "0", (2_339.163_23, 1e-5), 0.0, 0.999_643_139_4, 1.204_557_342),
        ("20 degC", "101325 Pa", "0.5", (2_339.163_23, 1e-5), 0.011_589_340_13, 0.999_614_767_5, 1.199_313_895),
        ("15 degC", "101325 Pa", "0", (1_705.669_094, 1e-6), 0.0, 0.999_592_211_5, 1.225_521_345),
        ("22.5 degC", "99000 Pa", "0.45", (2_726.942_269, 1e-6), 0.012_444_922_88, 0.999_645_296_3, 1.161_472_917),
    ];
    for (temperature, pressure, humidity, saturation, share, z, density) in table {
        let worked = WorkedSheet::of(&format!(
            r#"
given T   = {temperature} exact          "Temperature"           from "Set"
given p   = {pressure} abs exact         "Pressure"              from "Set"
given h   = {humidity} exact             "Relative humidity"     from "Set"
given R_u = 8.314472 J/(mol.K) exact     "Gas constant"          from "CIPM-2007"
given M_a = 28.96546e-3 kg/mol exact     "Molar mass of dry air" from "CIPM-2007"
given M_v = 18.01528e-3 kg/mol exact     "Molar mass of water"   from "CIPM-2007"
let t    = T - 273.15 K in K             "Temperature above the melting point"
let p_sv = 1 Pa abs * exp(1.2378847e-5 1/K2 * T^2 - 1.9121316e-2 1/K * T + 33.93711047 - 6.3431645e3 K / T) in Pa abs "Saturation pressure"
let f    = 1.00062 + 3.14e-8 1/Pa * p + 5.6e-7 1/K2 * t^2   "Enhancement factor"
let x_v  = h * f * p_sv / p              "Share of vapour, by mole"
let Z    = 1 - p / T * (1.58123e-6 K/Pa - 2.9331e-8 1/Pa * t + 1.1043e-10 1/(K.Pa) * t^2
         + (5.707e-6 K/Pa - 2.051e-8 1/Pa * t) * x_v + (1.9898e-4 K/Pa - 2.376e-6 1/Pa * t) * x_v^2)
         + (p / T)^2 * (1.83e-11 K2/Pa2 - 0.765e-8 K2/Pa2 * x_v^2)   "Compressibility factor"
rho * Z * R_u * T = p * M_a * (1 - x_v * (1 - M_v / M_a))            "Density"
unknown rho in kg/m3                     "Density of moist air"
answer rho, Z, x_v, p_sv
"#
        ));
        worked.assert_rounds_to("p_sv", saturation.0, saturation.1);
        worked.assert_rounds_to("x_v", share, 1e-11);
        worked.assert_rounds_to("Z", z, 1e-10);
        worked.assert_rounds_to("rho", density, 1e-9);
    }
}

/// The approximation of OIML R 111-1, from memory: 1.199294 kg/m3 at 20 degC, 1013.25 hPa and 50 %.
#[test]
fn density_of_moist_air_by_the_approximation() {
    let worked = WorkedSheet::of(
        r#"
given T = 20 degC exact       "Temperature"       from "Set"
given p = 1013.25 hPa abs exact "Pressure"        from "Set"
given h = 50 % exact          "Relative humidity" from "Set"
let t = (T - 273.15 K) / 1 K  "Celsius temperature as a number"
let rho = 1 kg/m3 * (0.34848 * (p / 1 hPa abs) - 0.009 * (100 * h) * exp(0.061 * t)) / (273.15 + t) in kg/m3 "Density"
answer rho
"#,
    );
    worked.assert_rounds_to("rho", 1.199_294, 1e-6);
}

/// Saturation pressure of water, 40 CFR 1065.645: 282.65 K gives 1.186581 kPa (1.186580514); and the share of vapour of 0.011868 (0.0118678303) at a relative
/// humidity of 50.77 %, 2.3371 kPa and 99.980 kPa. Backwards: the temperature at which the saturation pressure is that.
#[test]
fn saturation_pressure_of_water() {
    let worked = WorkedSheet::of(&format!(
        r#"
given T = 282.65 K exact         "Temperature"          from "40 CFR 1065.645"
given h = 50.77 % exact          "Relative humidity"    from "40 CFR 1065.645"
given p_w = 2.3371 kPa abs exact "Saturation pressure"  from "40 CFR 1065.645"
given p = 99.980 kPa abs exact   "Pressure"             from "40 CFR 1065.645"
{}
let x_w = h * p_w / p            "Share of vapour, by mole"
answer p_s, x_w
"#,
        saturation("p_s", "T")
    ));
    worked.assert_rounds_to("p_s", 1186.581, 1e-3);
    worked.assert_rounds_to("p_s", 1_186.580_514, 1e-6);
    worked.assert_rounds_to("x_w", 0.011_868, 1e-6);
    worked.assert_rounds_to("x_w", 0.011_867_830_3, 1e-10);
    let backwards = saturation("p_s", "T").replace("unknown p_s in kPa abs           \"Saturation pressure\"\n", "");
    let worked = WorkedSheet::of(&format!(
        "given p_s = 1.186580514 kPa abs exact \"Saturation pressure\" from \"Set\"\nunknown T in K within 273.15 K .. 373.15 K \"Temperature\"\n{backwards}answer T\n"
    ));
    // Half a unit of the last figure of the pressure, whose slope is 80 Pa/K there.
    worked.assert_within("T", 282.65, 0.5e-6 / 80.0 * 1.1);
}

/// Sutherland's formula, constants as an engineering page prints them (those of Crane TP-410 agree for air, carbon dioxide, carbon monoxide): viscosity at
/// 400 K with four figures.
#[test]
fn viscosity_by_sutherland() {
    let table = [
        ("1.827e-5", "291.15", "120", 2.326e-5, 1e-8),
        ("1.781e-5", "300.55", "111", 2.202e-5, 1e-8),
        ("2.018e-5", "292.25", "127", 2.571e-5, 1e-8),
        ("1.480e-5", "293.15", "240", 1.965e-5, 1e-8),
        ("8.76e-6", "293.85", "72", 1.078e-5, 1e-8),
        ("1.720e-5", "288.15", "118", 2.206e-5, 1e-8),
    ];
    for (mu_0, t_0, s, printed, unit) in table {
        let worked = WorkedSheet::of(&format!(
            r#"
given mu_0 = {mu_0} Pa.s exact "Viscosity at the temperature of reference" from "Table"
given T_0 = {t_0} K exact "Temperature of reference" from "Table"
given S = {s} K diff exact "Constant of Sutherland" from "Table"
given T = 400 K exact "Temperature" from "Table"
let mu = mu_0 * (T_0 + S) / (T + S) * (T / T_0)^1.5 in Pa.s "Viscosity"
answer mu
"#
        ));
        worked.assert_rounds_to("mu", printed, unit);
    }
}
