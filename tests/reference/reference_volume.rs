//! Volumes at reference conditions, and the atmosphere at an altitude, as sheets.

use super::worked_sheet::WorkedSheet;

const LITRE: f64 = 1e-3;

/// Ideal molar volumes in L/mol at the reference conditions in use, with R = 8.31446261815324 J/(mol K): the first two are CODATA 2022.
#[test]
fn molar_volumes_of_the_reference_conditions() {
    let table = [
        ("0 degC, 101.325 kPa abs", 22.413_969_545, 1e-9),
        ("0 degC, 100 kPa abs", 22.710_954_642, 1e-9),
        ("15 degC, 101.325 kPa abs", 23.644_830, 1e-6),
        ("15 degC, 1 bar abs", 23.958_124, 1e-6),
        ("20 degC, 101.325 kPa abs", 24.055_117, 1e-6),
        ("25 degC, 1 bar abs", 24.789_570, 1e-6),
        ("60 degF, 14.696 psi abs", 23.690_335, 1e-6),
    ];
    for (conditions, printed, unit) in table {
        let worked = WorkedSheet::of(&format!(
            r#"
reference normal at {conditions}
given V = 1 Nm3 exact          "Reference volume"  from "Set"
let n = V in mol               "Amount"
let v = 1 m3 / n in L/mol      "Molar volume"
answer n, v
"#
        ));
        // The table prints 22.710954642, which rounds up the 22.7109546414 of the exact constants: a unit of the last figure is allowed.
        worked.assert_within("v", printed * LITRE, unit * LITRE);
    }
}

/// 60 degF and 14.696 psi: 379.4828 ft3/lbmol.
#[test]
fn a_pound_mole_in_standard_cubic_feet() {
    let worked = WorkedSheet::of(
        r#"
reference standard at 60 degF, 14.696 psi abs
given n = 1 lbmol exact      "Amount"            from "Set"
let V = n in scf             "Reference volume"
let count = n / 1 scf        "Cubic feet"
answer V, count
"#,
    );
    worked.assert_rounds_to("count", 379.4828, 1e-4);
}

/// 100 m3/h at 0 degC and 101.325 kPa: 14.26490512 m3/h at 7 bar gauge (barometer 101.325 kPa) and 35 degC; 105.4914882 m3/h at 15 degC and
/// 101.325 kPa; 62.20943888 ft3/min at 60 degF and 14.696 psi.
#[test]
fn one_flow_in_four_ways() {
    let worked = WorkedSheet::of(
        r#"
site pressure = 101.325 kPa abs                  "Barometer"  from "Set"
reference normal at 0 degC, 101.325 kPa abs
reference standard at 15 degC, 101.325 kPa abs
reference scf at 60 degF, 14.696 psi abs
gas n2 = nitrogen
given q_N = 100 Nm3/h exact                      "Flow"       from "Set"
given p   = 7 bar gauge exact                    "Line"       from "Set"
given T   = 35 degC exact                        "Line"       from "Set"
state line of n2 at p = p, T = T                 "Line"
let q_V = q_N * n2.M * line.v in m3/h            "Flow in the line"
let standard_hourly = q_N / 1 Sm3/h              "Standard cubic metres an hour"
let feet_a_minute = q_N / 1 scf/min              "Standard cubic feet a minute"
answer q_V, standard_hourly, feet_a_minute
"#,
    );
    worked.assert_rounds_to("q_V", 14.264_905_12 / 3600.0, 1e-8 / 3600.0);
    worked.assert_rounds_to("standard_hourly", 105.491_488_2, 1e-7);
    worked.assert_rounds_to("feet_a_minute", 62.209_438_88, 1e-8);
}

/// 40 CFR 1066.630 (a), flow of a positive-displacement pump at reference conditions. The rule prints 0.7079 m3/s; its inputs give
/// 0.70797002 and 0.063836408 m3 a turn, so its last figure is cut off, not rounded.
#[test]
fn pump_flow_of_the_rule() {
    let worked = WorkedSheet::of(
        r#"
given a_1   = 0.8405 m3/s exact         "Slope"                 from "40 CFR 1066.630"
given f     = 12.58 1/s exact           "Turns"                 from "40 CFR 1066.630"
given p_out = 99.950 kPa abs exact      "Outlet"                from "40 CFR 1066.630"
given p_in  = 98.575 kPa abs exact      "Inlet"                 from "40 CFR 1066.630"
given a_0   = 0.056 m3 exact            "Volume a turn"         from "40 CFR 1066.630"
given T_in  = 323.5 K exact             "Inlet"                 from "40 CFR 1066.630"
given T_s   = 293.15 K exact            "Reference temperature" from "40 CFR 1066.630"
given p_s   = 101.325 kPa abs exact     "Reference pressure"    from "40 CFR 1066.630"
let V_r = a_1 / f * sqrt((p_out - p_in) / p_out) + a_0 in m3    "Volume a turn"
let q   = f * V_r * T_s * p_in / (T_in * p_s) in m3/s           "Flow at the reference"
answer V_r, q
"#,
    );
    worked.assert_rounds_to("V_r", 0.063_836_408, 1e-9);
    worked.assert_rounds_to("q", 0.707_970_02, 1e-8);
    worked.assert_within("q", 0.7079, 1e-4);
}

/// p = 101325 (1 - 2.25577e-5 H)^5.25588, an engineering page: 2400 m gives 0.76 bar, 0.756257 bar with more figures. The US Standard
/// Atmosphere 1976 at the geometric altitude of 2400 m gives 75 634 Pa, which is what a site at that altitude has.
#[test]
fn pressure_at_an_altitude() {
    let worked = WorkedSheet::of(
        r#"
site altitude = 2400 m        "Hut"            from "Set"
given H = 2400 m exact        "Altitude"       from "Set"
let p_f = 101325 Pa abs * (1 - 2.25577e-5 1/m * H)^5.25588 in bar abs  "Pressure by the formula"
let p_a = site.p in bar abs   "Pressure of the standard atmosphere"
answer p_f, p_a
"#,
    );
    worked.assert_rounds_to("p_f", 76_000.0, 1000.0);
    worked.assert_rounds_to("p_f", 75_625.7, 0.1);
    worked.assert_rounds_to("p_a", 75_634.0, 1.0);
}

/// US Standard Atmosphere 1976, geometric altitude, pressures with two decimals. A site follows ISO 2533, whose specific gas constant
/// 287.05287 J/(kg K) differs by 1.4e-7 from 8.31432/28.9644; at 10 km that moves the pressure by 1e-6, 0.025 Pa.
#[test]
fn pressure_of_the_site() {
    for (altitude, pressure) in [("0 m", 101_325.0), ("2000 m", 79_501.42), ("10000 m", 26_499.90)] {
        let worked = WorkedSheet::of(&format!(
            "site altitude = {altitude} \"Site\" from \"Set\"\nlet p = site.p in Pa abs \"Pressure\"\nanswer p\n"
        ));
        worked.assert_within("p", pressure, 0.03);
    }
}
