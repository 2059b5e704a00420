//! Mixtures filled by partial pressure, and water from compressed air, as sheets.

use super::worked_sheet::WorkedSheet;

/// Kessler, "The mathematics behind partial pressure gas blending", 2020: 425 psi of 32 % to 3200 psi of 34 %, topped up with air of 20.9 %: add
/// 470 psi of oxygen and 2305 psi of air; 470.3224 and 2304.678 by its formula.
#[test]
fn blending_by_partial_pressure() {
    let worked = WorkedSheet::of(
        r#"
given p_c = 425 psi abs exact     "Pressure in the cylinder" from "Example"
given x_c = 32 % exact            "Oxygen in it"             from "Example"
given p_t = 3200 psi abs exact    "Pressure wanted"          from "Example"
given x_t = 34 % exact            "Oxygen wanted"            from "Example"
given x_s = 100 % exact           "Oxygen in the rich gas"   from "Example"
given x_a = 20.9 % exact          "Oxygen in the top-up"     from "Example"
unknown dp_s in psi diff          "Rich gas to be let in"
unknown dp_a in psi diff          "Top-up to be let in"
p_t = p_c + dp_s + dp_a           "Pressures add up"
x_t * p_t = x_c * p_c + x_s * dp_s + x_a * dp_a   "Oxygen adds up"
let dp_f = (x_t * p_t - x_c * p_c - x_a * (p_t - p_c)) / (x_s - x_a) in psi diff  "Rich gas by the formula"
answer dp_s, dp_a, dp_f
"#,
    );
    const PSI: f64 = 0.453_592_37 * 9.806_65 / (0.0254 * 0.0254);
    worked.assert_rounds_to("dp_s", 470.0 * PSI, PSI);
    worked.assert_rounds_to("dp_a", 2305.0 * PSI, PSI);
    worked.assert_rounds_to("dp_s", 470.3224 * PSI, 1e-4 * PSI);
    worked.assert_rounds_to("dp_a", 2304.678 * PSI, 1e-3 * PSI);
    worked.assert_rounds_to("dp_f", 470.3224 * PSI, 1e-4 * PSI);
}

/// Saturation pressure of liquid water after 40 CFR 1065.645, as relations of a sheet; `NAME` and `TEMPERATURE` stand in for those of the place.
const SATURATION: &str = r#"
log10(NAME / 1 kPa abs) = 10.79574 * (1 - 273.16 K / TEMPERATURE) - 5.028 * log10(TEMPERATURE / 273.16 K)
      + 1.50475e-4 * (1 - 10^(-8.2969 * (TEMPERATURE / 273.16 K - 1)))
      + 0.42873e-3 * (10^(4.76955 * (1 - 273.16 K / TEMPERATURE)) - 1) - 0.2138602
      "Saturation pressure over liquid water" from "40 CFR 1065.645"
unknown NAME in kPa abs           "Saturation pressure"
"#;

pub(super) fn saturation(name: &str, temperature: &str) -> String {
    SATURATION.replace("NAME", name).replace("TEMPERATURE", temperature)
}

/// Water from a cubic metre of free air: 20 degC, 70 %, compressed to 8 bar gauge, saturated at 40 degC. With saturation pressures of IAPWS:
/// 0.01210 kg in, 0.00609 kg kept, 0.00602 kg of condensate. The formula of 40 CFR 1065.645 lies up to 0.1 % below IAPWS,
/// which moves none of the figures by more than one of the last place; that much is allowed.
#[test]
fn water_from_compressed_air() {
    let worked = WorkedSheet::of(&format!(
        r#"
site pressure = 101325 Pa abs     "Atmosphere"            from "Set"
given V_1 = 1 m3 exact            "Free air"              from "Example"
given T_1 = 20 degC exact         "Intake"                from "Example"
given h_1 = 70 % exact            "Relative humidity"     from "Example"
given p_2 = 8 bar gauge exact     "After-cooler"          from "Example"
given T_2 = 40 degC exact         "After-cooler"          from "Example"
given M_w = 18.015 g/mol exact    "Molar mass of water"   from "CIAAW 2021"
{}{}
let p_v = h_1 * p_s1 in kPa abs                                                 "Vapour in the free air"
let m_i = p_v * V_1 / (R * T_1) * M_w in kg                                     "Water in"
let m_k = (site.p - p_v) * V_1 / (R * T_1) * p_s2 / (p_2 - p_s2) * M_w in kg    "Water kept"
let m_c = m_i - m_k in kg                                                       "Condensate"
answer m_i, m_k, m_c
"#,
        saturation("p_s1", "T_1"),
        saturation("p_s2", "T_2")
    ));
    worked.assert_within("m_i", 0.012_10, 1e-5);
    worked.assert_within("m_k", 0.006_09, 1e-5);
    worked.assert_within("m_c", 0.006_02, 1e-5);
}
