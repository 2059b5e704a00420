//! Vessels that empty, leak, are purged, tested and sized, as sheets.
//!
//! Sources beside each test. Values with more figures than a source prints were worked from its formula with 20 to 40 digits.

use super::worked_sheet::WorkedSheet;

const EMPTYING: &str = r#"
given M   = 28.96546 g/mol exact  "Molar mass of dry air"          from "CIPM-2007"
given k   = 1.4 exact             "Ratio of the heat capacities"   from "Set"
given V   = 1 m3 exact            "Volume"                         from "Set"
given p_0 = 1.0 MPa abs exact     "Pressure at the start"          from "Set"
given p_1 = 0.2 MPa abs exact     "Pressure at the end"            from "Set"
given T_0 = 300 K exact           "Temperature at the start"       from "Set"
given C_d = 0.8 exact             "Discharge coefficient"          from "Set"
let tau = V / (C_d * pi / 4 * d^2) * sqrt(M / (k * R * T_0)) * ((k + 1) / 2)^((k + 1) / (2 * (k - 1))) in s "Contents over first flow"
let q_0 = p_0 * V * M / (R * T_0) / tau in kg/s                    "First flow"
t_i = tau * ln(p_0 / p_1)                                          "Contents at one temperature"
t_a = 2 * tau / (k - 1) * ((p_0 / p_1)^((k - 1) / (2 * k)) - 1)    "Contents without heat"
let T_1 = T_0 * (p_1 / p_0)^((k - 1) / k) in K                     "Temperature at the end, without heat"
"#;

/// Closed forms of an emptying vessel while the flow is choked: A. Farrell, "Vessel blowdown - ideal gases", 2025, derivation. Air, 1 m3,
/// 1.0 MPa to 0.2 MPa, 300 K, bore 10 mm, discharge coefficient 0.8. Printed with ten figures, T_1 with eight.
#[test]
fn emptying_in_closed_form() {
    let worked = WorkedSheet::of(&format!(
        "given d = 10 mm exact \"Bore\" from \"Set\"\nunknown t_i in s\nunknown t_a in s\n{EMPTYING}answer tau, q_0, t_i, t_a, T_1\n"
    ));
    worked.assert_rounds_to("tau", 79.206_777_95, 1e-8);
    worked.assert_rounds_to("q_0", 0.146_609_679_1, 1e-10);
    worked.assert_rounds_to("t_i", 127.478_391_4, 1e-7);
    worked.assert_rounds_to("t_a", 102.374_344_9, 1e-7);
    worked.assert_rounds_to("T_1", 189.415_51, 1e-5);
}

/// The same lines asked for the bore that empties the vessel in the printed time, with and without heat.
#[test]
fn emptying_asked_for_the_bore() {
    for (time, other) in [("given t_a = 102.3743449 s exact", "unknown t_i in s"), ("given t_i = 127.4783914 s exact", "unknown t_a in s")]
    {
        let worked = WorkedSheet::of(&format!(
            "{time} \"Time\" from \"Set\"\n{other}\nunknown d in mm within 1 mm .. 100 mm\n{EMPTYING}answer d in mm\n"
        ));
        // The time goes with 1/d^2; its ten figures leave the bore known to 2.5e-10.
        worked.assert_within("d", 0.010, 0.010 * 5e-10);
    }
}

/// 40 CFR 1065.644, leak test by loss of vacuum, text of the rule: 2 L, 50.6 kPa to 25.3 kPa at 293.15 K, 70 s, R = 8.314472. The rule's result
/// 0.00030 mol/s is from memory; the formula gives 2.9657047e-4.
#[test]
fn leak_by_loss_of_vacuum() {
    let worked = WorkedSheet::of(
        r#"
given V   = 0.0020000 m3 exact       "Volume"             from "40 CFR 1065.644"
given R_u = 8.314472 J/(mol.K) exact "Gas constant"       from "40 CFR 1065.644"
given p_2 = 50600 Pa abs exact       "Pressure at the end"   from "40 CFR 1065.644"
given p_1 = 25300 Pa abs exact       "Pressure at the start" from "40 CFR 1065.644"
given T   = 293.15 K exact           "Temperature"        from "40 CFR 1065.644"
given t   = 70 s exact               "Duration"           from "40 CFR 1065.644"
q_n = V / R_u * (p_2 / T - p_1 / T) / t  "Leak inwards"
unknown q_n in mol/s                 "Leak inwards"
answer q_n
"#,
    );
    worked.assert_rounds_to("q_n", 0.000_30, 1e-5);
    worked.assert_rounds_to("q_n", 2.965_704_7e-4, 1e-11);
}

/// Loss of pressure with cooling: 50 L, 8.000 bar at 295.15 K to 7.950 bar at 293.65 K in an hour, by states and by the formula; in
/// cm3/min at 0 degC and 101.325 kPa; and what it would seem without the temperatures, 5.3 times too much.
#[test]
fn leak_by_loss_of_pressure() {
    let worked = WorkedSheet::of(
        r#"
gas n2 = nitrogen
given V   = 0.05 m3 exact            "Volume"                   from "Set"
given p_1 = 8.000 bar abs exact      "Pressure at the start"    from "Set"
given T_1 = 295.15 K exact           "Temperature at the start" from "Set"
given p_2 = 7.950 bar abs exact      "Pressure at the end"      from "Set"
given T_2 = 293.65 K exact           "Temperature at the end"   from "Set"
given t   = 3600 s exact             "Duration"                 from "Set"
state full of n2 at p = p_1, T = T_1 "Start"
state left of n2 at p = p_2, T = T_2 "End"
q_n * n2.M * t = V * (full.rho - left.rho) "Loss by the densities"
unknown q_n in mol/s                 "Leak"
let q_f = V / R * (p_1 / T_1 - p_2 / T_2) / t in mol/s   "Leak by the formula"
let q_V = q_n * R * 273.15 K / 101.325 kPa abs in cm3/min  "Leak at 0 degC and 101.325 kPa"
let q_0 = V / R * (p_1 - p_2) / T_1 / t in mol/s         "Leak as it would seem"
answer q_n, q_f, q_V, q_0
"#,
    );
    worked.assert_rounds_to("q_n", 5.314_666_9e-6, 1e-13);
    worked.assert_rounds_to("q_f", 5.314_666_9e-6, 1e-13);
    worked.assert_rounds_to("q_V", 7.147_366_9e-6 / 60.0, 1e-13 / 60.0);
    worked.assert_rounds_to("q_0", 2.829_831_2e-5, 1e-12);
}

/// Purging from 21 % to 1 % of oxygen: a worksheet after C. Branan, "Rules of Thumb for Chemical Engineers". Sweep 3.1 volumes read from a
/// figure, ln 21 = 3.04452 by the formula; pressure cycles to 5 atm: two (1.8917), 0.84 % after them; vacuum cycles to 0.5 atm:
/// n = 4.4 (4.39232), 0.65625 % after five.
#[test]
fn purging() {
    let worked = WorkedSheet::of(
        r#"
given x_0 = 21 % exact      "Oxygen at the start" from "Worksheet"
given x_1 = 1 % exact       "Oxygen wanted"       from "Worksheet"
given r_p = 5 exact         "Pressure ratio of a pressure cycle" from "Worksheet"
given r_v = 2 exact         "Pressure ratio of a vacuum cycle"   from "Worksheet"
x_1 = x_0 * exp(-N)         "Sweep"
unknown N                   "Volumes of a sweep"
x_1 = x_0 * (1 / r_p)^n_p   "Pressure cycles"
unknown n_p                 "Pressure cycles"
x_1 = x_0 * (1 / r_v)^n_v   "Vacuum cycles"
unknown n_v                 "Vacuum cycles"
let x_p = x_0 / r_p^2 in %  "After two pressure cycles"
let x_v = x_0 / r_v^5 in %  "After five vacuum cycles"
answer N, n_p, n_v, x_p, x_v
"#,
    );
    worked.assert_rounds_to("N", 3.044_52, 1e-5);
    worked.assert_rounds_to("n_p", 1.8917, 1e-4);
    worked.assert_rounds_to("n_v", 4.392_32, 1e-5);
    worked.assert_rounds_to("x_p", 0.0084, 1e-15);
    worked.assert_rounds_to("x_v", 0.006_562_5, 1e-15);
}

/// Energy stored in a pneumatic test: ASME PCC-2 Appendix 501-II, as an engineering page cites it. 1 m3 at 10 bar gauge and 2 m3 at 16 bar
/// gauge above 101 kPa; the page's rounded exponent 0.286 and k = 1.4; Brode; one temperature.
#[test]
fn energy_stored_in_a_test() {
    let sheet = |volume: &str, pressure: &str| {
        format!(
            r#"
site pressure = 101000 Pa abs                "Atmosphere"     from "ASME PCC-2"
given V   = {volume} exact                   "Volume"         from "Set"
given p_t = {pressure} exact                 "Test pressure"  from "Set"
given k   = 1.4 exact                        "Ratio of the heat capacities" from "Set"
given e_T = 4266920 J/kg exact               "Energy of TNT"  from "ASME PCC-2"
let E   = p_t * V / (k - 1) * (1 - (site.p / p_t)^((k - 1) / k)) in J  "Energy, equal entropy"
let E_r = 2.5 * p_t * V * (1 - (site.p / p_t)^0.286) in J              "Energy, rounded exponent"
let E_B = (p_t - site.p) * V / (k - 1) in J                            "Energy after Brode"
let E_i = p_t * V * (ln(p_t / site.p) - 1 + site.p / p_t) in J         "Work at one temperature"
let m_T   = E / e_T in kg                                              "As TNT"
let m_r   = E_r / e_T in kg                                            "As TNT, rounded exponent"
let s     = 20 m * cbrt(2 * m_T / 1 kg) in m                           "Distance"
let s_r   = 20 m * cbrt(2 * m_r / 1 kg) in m                           "Distance, rounded exponent"
answer E, E_r, E_B, E_i, m_T, m_r, s, s_r
"#
        )
    };
    let small = WorkedSheet::of(&sheet("1 m3", "10 bar gauge"));
    small.assert_rounds_to("E_r", 1_362_508.7, 0.1);
    small.assert_rounds_to("E", 1_361_559.7, 0.1);
    small.assert_rounds_to("m_r", 0.319_319_03, 1e-8);
    small.assert_rounds_to("s_r", 17.223, 1e-3);
    small.assert_rounds_to("E_B", 2_500_000.0, 1e-3);
    small.assert_rounds_to("E_i", 1_630_127.8, 0.1);
    let large = WorkedSheet::of(&sheet("2 m3", "16 bar gauge"));
    large.assert_rounds_to("E", 4_709_410.9, 0.1);
    large.assert_rounds_to("m_T", 1.103_702_6, 1e-7);
    large.assert_rounds_to("s", 26.041, 1e-3);
}

/// Air receiver, public worksheet: demand 350 cfm, supply 250 cfm, 5 min, 100 to 60 psi gauge, atmosphere 14.7 psi: 183.75 ft3, 1374.546 US gal,
/// 5.20 m3; and the same lines asked for the time that a receiver of that volume carries the peak.
#[test]
fn air_receiver() {
    let receiver = r#"
site pressure = 14.7 psi abs         "Atmosphere"     from "Worksheet"
given q_d = 350 ft3/min exact        "Demand"         from "Worksheet"
given q_s = 250 ft3/min exact        "Supply"         from "Worksheet"
given p_1 = 100 psi gauge exact      "Upper pressure" from "Worksheet"
given p_2 = 60 psi gauge exact       "Lower pressure" from "Worksheet"
V * (p_1 - p_2) = t * (q_d - q_s) * site.p   "Balance at one temperature"
"#;
    let worked = WorkedSheet::of(&format!(
        "{receiver}given t = 5 min exact \"Peak\" from \"Worksheet\"\nunknown V in ft3\nanswer V in ft3, V in gal_us, V in m3\n"
    ));
    const CUBIC_FOOT: f64 = 0.3048 * 0.3048 * 0.3048;
    const GALLON: f64 = 231.0 * 0.0254 * 0.0254 * 0.0254;
    worked.assert_rounds_to("V", 183.75 * CUBIC_FOOT, 1e-9);
    worked.assert_rounds_to("V", 1374.5455 * GALLON, 1e-4 * GALLON);
    worked.assert_rounds_to("V", 5.203_22, 1e-5);
    let worked = WorkedSheet::of(&format!("{receiver}given V = 183.75 ft3 exact \"Receiver\" from \"Set\"\nunknown t in min\nanswer t\n"));
    worked.assert_within("t", 300.0, 1e-9);
}

/// Cylinder contents, a gas supplier's example: 29.5 L at 2000 psi over 14.7 psi. The page divides gauge by atmosphere and prints 4013 L (4013.6054
/// by its formula); with the atmosphere added the same gauge reading is 4043.1 L.
#[test]
fn cylinder_contents() {
    let worked = WorkedSheet::of(
        r#"
site pressure = 14.7 psi abs         "Atmosphere"         from "Supplier's page"
given V   = 29.5 L exact             "Water volume"       from "Supplier's page"
given p_a = 2000 psi abs exact       "Pressure, taken as absolute" from "Supplier's page"
given p_g = 2000 psi gauge exact     "Pressure, off a gauge"       from "Supplier's page"
let V_a = V * p_a / site.p in L      "Content, taken as absolute"
let V_g = V * p_g / site.p in L      "Content, off a gauge"
answer V_a in L, V_g in L
"#,
    );
    worked.assert_rounds_to("V_a", 4.013_605_4, 1e-7);
    worked.assert_rounds_to("V_g", 4.0431, 1e-4);
}
