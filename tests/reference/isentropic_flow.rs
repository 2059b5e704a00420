//! Isentropic flow of a perfect gas, and choked flow through nozzles and orifices, as sheets.
//!
//! Sources: NACA Report 1135 (Ames Research Staff, 1953), tables for a ratio of the heat capacities of 1.4, as the tests of public libraries
//! print them; 40 CFR 1065.642 (c) (1), text of the rule; critical pressure and temperature of a gas with k = 1.289, as the
//! tests of a public library print them. Values with more figures were worked with 20 to 40 digits from the closed formulas.

use super::worked_sheet::WorkedSheet;

/// A row of the table: Mach number; p/p0 and A/A* as printed; p/p0, T/T0, rho/rho0 and A/A* with six or seven figures.
struct Row {
    mach: f64,
    /// Printed value and the unit of its last figure.
    p_printed: Option<(f64, f64)>,
    area_printed: Option<(f64, f64)>,
    p: (f64, f64),
    t: f64,
    rho: (f64, f64),
    area: f64,
}

const TABLE: [Row; 8] = [
    Row {
        mach: 0.27,
        p_printed: Some((0.9506, 1e-4)),
        area_printed: None,
        p: (0.950_600, 1e-6),
        t: 0.985_630,
        rho: (0.964_460, 1e-6),
        area: 2.238_471,
    },
    Row {
        mach: 0.80,
        p_printed: None,
        area_printed: Some((1.0382, 1e-4)),
        p: (0.656_022, 1e-6),
        t: 0.886_525,
        rho: (0.739_992, 1e-6),
        area: 1.038_230,
    },
    Row {
        mach: 1.00,
        p_printed: Some((0.5283, 1e-4)),
        area_printed: Some((1.0, 1e-3)),
        p: (0.528_282, 1e-6),
        t: 0.833_333,
        rho: (0.633_938, 1e-6),
        area: 1.0,
    },
    Row {
        mach: 1.24,
        p_printed: None,
        area_printed: Some((1.043, 1e-3)),
        p: (0.391_229, 1e-6),
        t: 0.764_807,
        rho: (0.511_539, 1e-6),
        area: 1.043_229,
    },
    Row {
        mach: 1.30,
        p_printed: Some((0.3609, 1e-4)),
        area_printed: None,
        p: (0.360_914, 1e-6),
        t: 0.747_384,
        rho: (0.482_903, 1e-6),
        area: 1.066_305,
    },
    Row {
        mach: 2.00,
        p_printed: Some((0.1278, 1e-4)),
        area_printed: Some((1.688, 1e-3)),
        p: (0.127_805, 1e-6),
        t: 0.555_556,
        rho: (0.230_048, 1e-6),
        area: 1.687_500,
    },
    Row {
        mach: 2.14,
        p_printed: None,
        area_printed: Some((1.902, 1e-3)),
        p: (0.102_726, 1e-6),
        t: 0.521_942,
        rho: (0.196_814, 1e-6),
        area: 1.901_843,
    },
    Row {
        mach: 3.00,
        p_printed: None,
        area_printed: None,
        p: (0.027_223_7, 1e-7),
        t: 0.357_143,
        rho: (0.076_226_3, 1e-7),
        area: 4.234_568,
    },
];

const RATIOS: &str = r#"
r_T = 1 / (1 + Ma^2 / 5)              "Temperature over that at rest"    from "NACA Report 1135, k = 1.4"
r_p = (1 + Ma^2 / 5)^(-3.5)           "Pressure over that at rest"       from "NACA Report 1135, k = 1.4"
r_rho = (1 + Ma^2 / 5)^(-2.5)         "Density over that at rest"        from "NACA Report 1135, k = 1.4"
r_A = ((1 + Ma^2 / 5) / 1.2)^3 / Ma   "Area over that of the throat"     from "NACA Report 1135, k = 1.4"
"#;

#[test]
fn ratios_by_mach_number() {
    for row in &TABLE {
        let mach = row.mach;
        let worked = WorkedSheet::of(&format!(
            "given Ma = {mach} exact \"Mach number\" from \"Table\"\nunknown r_T\nunknown r_p\nunknown r_rho\nunknown r_A\n{RATIOS}answer r_T, r_p, r_rho, r_A\n"
        ));
        if let Some((printed, unit)) = row.p_printed {
            worked.assert_rounds_to("r_p", printed, unit);
        }
        if let Some((printed, unit)) = row.area_printed {
            worked.assert_rounds_to("r_A", printed, unit);
        }
        worked.assert_rounds_to("r_p", row.p.0, row.p.1);
        worked.assert_rounds_to("r_T", row.t, 1e-6);
        worked.assert_rounds_to("r_rho", row.rho.0, row.rho.1);
        worked.assert_rounds_to("r_A", row.area, 1e-6);
    }
}

/// The same relations asked for the Mach number: from the temperature ratio, and from the area ratio on either branch. The area has a
/// minimum at Mach 1, so that the half unit of its last figure is worth more there; the row of Mach 1 is left to the temperature.
#[test]
fn mach_number_by_ratio() {
    for row in &TABLE {
        let t = row.t;
        let worked = WorkedSheet::of(&format!(
            "given r_T = {t} \"Temperature ratio\" from \"Table\"\nunknown Ma within 0 .. 5\nr_T = 1 / (1 + Ma^2 / 5) \"Energy\"\nanswer Ma\n"
        ));
        // Half a unit of the last figure of T/T0, through dMa/d(T/T0) = 5/(2 Ma) (T0/T)^2.
        worked.assert_within("Ma", row.mach, 0.5e-6 * 2.5 / row.mach / (t * t) * 1.001);
        if row.mach == 1.0 {
            continue;
        }
        let (area, mach) = (row.area, row.mach);
        let worked = WorkedSheet::of(&format!(
            "given r_A = {area} \"Area ratio\" from \"Table\"\nunknown Ma within 0.02 .. 6 near {}\nr_A = ((1 + Ma^2 / 5) / 1.2)^3 / Ma \"Mass\"\nanswer Ma\n",
            if mach < 1.0 { 0.5 * mach } else { 1.1 * mach }
        ));
        // dA/dMa = A (Ma^2 - 1)/(Ma (1 + Ma^2/5)).
        let slope = (area * (mach * mach - 1.0) / (mach * (1.0 + mach * mach / 5.0))).abs();
        worked.assert_within("Ma", mach, 0.5e-6 / slope * 1.001);
    }
}

/// A/A* = 4.441 belongs to Mach 3.05 as printed, and to a subsonic flow as well. Roots by bisection: 0.131670, 3.049996.
#[test]
fn an_area_ratio_has_two_branches_and_both_are_told() {
    let sheet = |near: &str| {
        format!(
            "given r_A = 4.441 \"Area over that of the throat\" from \"NACA Report 1135\"\nunknown Ma within 0.02 .. 6 {near}\nr_A = ((1 + Ma^2 / 5) / 1.2)^3 / Ma \"Mass\"\nanswer Ma\n"
        )
    };
    let solved = gaswright::solve(&sheet(""));
    assert!(solved.solution.is_none());
    let finding = solved.findings.iter().find(|finding| finding.code == "several-roots").unwrap();
    assert!(finding.message.contains("0.13167") && finding.message.contains("3.0500"), "{}", finding.message);
    for (near, root) in [("near 2.5", 3.049_996_356_907_303), ("near 0.2", 0.131_670)] {
        let worked = WorkedSheet::of(&sheet(near));
        worked.assert_within("Ma", root, 5e-7);
        assert_eq!(worked.found("several-roots").len(), 1);
    }
}

/// The pressure ratio by a state of equal entropy against the closed form with a constant ratio of the heat capacities: argon, whose heat
/// capacity does not depend on the temperature, so that k = 5/3 exactly.
#[test]
fn a_throat_by_states_agrees_with_the_closed_form() {
    let worked = WorkedSheet::of(
        r#"
gas ar = argon
given p_0 = 3.0 bar abs exact  "Pressure at rest"     from "Set"
given T_0 = 300 K exact        "Temperature at rest"  from "Set"
state rest of ar at p = p_0, T = T_0                  "At rest"
unknown p_t in bar abs within 1 bar abs .. 2.5 bar abs "Pressure in the throat"
state throat of ar at p = p_t, s = rest.s             "Throat"
throat.w^2 / 2 = rest.h - throat.h                    "The gas reaches the velocity of sound"
let r = throat.p / rest.p                             "Critical pressure ratio"
let G = throat.rho * throat.w in kg/(m2.s)            "Mass flux"
let G_closed = rest.p * sqrt(5 / 3 / (ar.R * rest.T)) * (3 / 4)^2 in kg/(m2.s) "Mass flux, closed form"
answer r, G, G_closed
"#,
    );
    // (2/(k+1))^(k/(k-1)) with k = 5/3 is (3/4)^2.5. The polynomial of argon is the constant 5/2 to the last digit.
    worked.assert_within("r", 0.487_139_289_628_747, 1e-12);
    let closed = worked.si("G_closed");
    worked.assert_within("G", closed, 1e-11 * closed);
}

/// The flow function sqrt(k) (2/(k+1))^((k+1)/(2(k-1))) and the critical ratio for k = 1.4.
#[test]
fn choked_flow_function() {
    let worked = WorkedSheet::of(
        r#"
given k = 1.4 exact "Ratio of the heat capacities" from "Set"
let psi = sqrt(k) * (2 / (k + 1))^((k + 1) / (2 * (k - 1))) "Flow function"
let r_c = (2 / (k + 1))^(k / (k - 1)) "Critical pressure ratio"
answer psi, r_c
"#,
    );
    worked.assert_rounds_to("psi", 0.684_731_456_4, 1e-10);
    worked.assert_rounds_to("r_c", 0.528_282, 1e-6);
}

/// 40 CFR 1065.642 (c) (1), critical-flow venturi. The rule prints 33.690 mol/s; with its inputs and its gas constant 8.314472 the formula
/// gives 33.68951.
#[test]
fn critical_flow_venturi_of_the_rule() {
    let worked = WorkedSheet::of(
        r#"
given C_d = 0.985 exact            "Discharge coefficient" from "40 CFR 1065.642"
given C_f = 0.7219 exact           "Flow coefficient"      from "40 CFR 1065.642"
given A   = 0.00456 m2 exact       "Throat area"           from "40 CFR 1065.642"
given p   = 98836 Pa abs exact     "Pressure at rest"      from "40 CFR 1065.642"
given M   = 0.0287805 kg/mol exact "Molar mass"            from "40 CFR 1065.642"
given R_u = 8.314472 J/(mol.K) exact "Gas constant"        from "40 CFR 1065.642"
given T   = 378.15 K exact         "Temperature at rest"   from "40 CFR 1065.642"
let q_n = C_d * C_f * A * p / sqrt(M * R_u * T) in mol/s   "Flow"
answer q_n
"#,
    );
    worked.assert_rounds_to("q_n", 33.690, 1e-3);
    worked.assert_rounds_to("q_n", 33.689_51, 1e-5);
}

/// Critical pressure and temperature with k = 1.289, forwards and backwards.
#[test]
fn critical_pressure_and_temperature() {
    let worked = WorkedSheet::of(
        r#"
given k   = 1.289 exact         "Ratio of the heat capacities" from "Set"
given p_0 = 1.4 MPa abs exact   "Pressure at rest"             from "Set"
given T_0 = 473 K exact         "Temperature at rest"          from "Set"
unknown p_c in Pa abs           "Critical pressure"
unknown T_c in K                "Critical temperature"
unknown p_back in MPa abs       "Pressure at rest, back from the critical one"
p_c / p_0 = (2 / (k + 1))^(k / (k - 1))    "Critical pressure ratio"
p_c / p_back = (T_c / T_0)^(k / (k - 1))   "Equal entropy"
T_c / T_0 = 2 / (k + 1)                    "Critical temperature ratio"
answer p_c, T_c, p_back
"#,
    );
    worked.assert_rounds_to("p_c", 766_812.90, 1e-2);
    worked.assert_rounds_to("T_c", 413.280_91, 1e-5);
    worked.assert_within("p_back", 1.4e6, 1e-8);
}

/// A row of the table of releases.
struct Release {
    k: String,
    m_kg_mol: f64,
    t0_k: f64,
    p0_pa: f64,
    p_back_pa: f64,
    choked: bool,
    critical_ratio: f64,
    ratio: f64,
    g_star: f64,
    flux: f64,
    t_throat_k: f64,
    p_throat_pa: f64,
    w_throat: f64,
    mach: f64,
}

fn releases() -> Vec<Release> {
    let mut rows = include_str!("pressure_release.csv").lines().filter(|line| !line.starts_with('#'));
    assert_eq!(
        rows.next(),
        Some(
            "k,M_kg_mol,T0_K,p0_Pa,p_back_Pa,regime,critical_pressure_ratio,pressure_ratio_used,G_star,mass_flux_kg_m2_s,T_throat_K,p_throat_Pa,w_throat_m_s,mach_throat"
        )
    );
    rows.map(|row| {
        let fields: Vec<&str> = row.split(',').collect();
        let number = |at: usize| fields[at].parse::<f64>().expect("a number");
        // 5/3 is an exact fraction in the table.
        let k = if fields[0] == "1.66666666667" { "5 / 3".to_owned() } else { fields[0].to_owned() };
        Release {
            k,
            m_kg_mol: number(1),
            t0_k: number(2),
            p0_pa: number(3),
            p_back_pa: number(4),
            choked: fields[5] == "choked",
            critical_ratio: number(6),
            ratio: number(7),
            g_star: number(8),
            flux: number(9),
            t_throat_k: number(10),
            p_throat_pa: number(11),
            w_throat: number(12),
            mach: number(13),
        }
    })
    .collect()
}

/// Every row of the table: perfect gases of constant k, choked and subsonic, worked there with 50 digits and printed with 12 figures.
///
/// Tolerance: half a unit of the twelfth figure is at most 5e-12 of a value. A subsonic flux is the root of a small difference;
/// next to a pressure ratio of 0.95 it loses two digits of the sixteen, so that 2e-11 covers both.
#[test]
fn releases_of_perfect_gases() {
    let rows = releases();
    assert_eq!(rows.len(), 127);
    for row in &rows {
        let worked = WorkedSheet::of(&format!(
            r#"
let k = {k}                                      "Ratio of the heat capacities"
given M   = {m} kg/mol exact                     "Molar mass"            from "Table"
given T_0 = {t0} K exact                         "Temperature at rest"   from "Table"
given p_0 = {p0} Pa abs exact                    "Pressure at rest"      from "Table"
given p_b = {pb} Pa abs exact                    "Pressure behind"       from "Table"
let r_c = (2 / (k + 1))^(k / (k - 1))            "Critical pressure ratio"
let r   = max(p_b / p_0, r_c)                    "Pressure ratio in the throat"
let psi = sqrt(k) * (2 / (k + 1))^((k + 1) / (2 * (k - 1))) "Flow function of choked flow"
let p_t = r * p_0 in Pa abs                      "Pressure in the throat"
let T_t = T_0 * r^((k - 1) / k) in K             "Temperature in the throat"
let w_t = sqrt(2 * k / (k - 1) * R / M * (T_0 - T_t)) in m/s "Velocity in the throat"
let Ma  = w_t / sqrt(k * R / M * T_t)            "Mach number in the throat"
G = p_t * M / (R * T_t) * w_t                    "Mass flux"
unknown G in kg/(m2.s)                           "Mass flux"
answer r_c, r, psi, G, T_t, p_t, w_t, Ma
"#,
            k = row.k,
            m = row.m_kg_mol,
            t0 = row.t0_k,
            p0 = row.p0_pa,
            pb = row.p_back_pa,
        ));
        let expected = [
            ("r_c", row.critical_ratio),
            ("r", row.ratio),
            ("psi", row.g_star),
            ("G", row.flux),
            ("T_t", row.t_throat_k),
            ("p_t", row.p_throat_pa),
            ("w_t", row.w_throat),
            ("Ma", row.mach),
        ];
        for (name, value) in expected {
            worked.assert_within(name, value, 2e-11 * value);
        }
        assert_eq!(row.choked, worked.si("r") == worked.si("r_c"));
    }
}
