//! Required area of a relief device for gas in critical flow, as a sheet.

use super::worked_sheet::WorkedSheet;

/// Example 1 of API Standard 520 Part I, as the documentation of a public library quotes it: 24 270 kg/h, 348 K, Z = 0.90, M = 51, k = 1.11,
/// 670 kPa relieving, Kd = 0.975: 3699 mm2. With the rounded constant 0.03948 of its SI form the area is 3699.0461 mm2, with the exact
/// nozzle formula 3698.9757 mm2; C = 0.024890087.
#[test]
fn example_of_the_standard() {
    let worked = WorkedSheet::of(
        r#"
given q_m = 24270 kg/h exact     "Flow"                          from "Example"
given p_1 = 670 kPa abs exact    "Relieving pressure"            from "Example"
given T_1 = 348 K exact          "Relieving temperature"         from "Example"
given M   = 51 g/mol exact       "Molar mass"                    from "Example"
given Z   = 0.90 exact           "Compressibility factor"        from "Example"
given k   = 1.11 exact           "Ratio of the heat capacities"  from "Example"
given K_d = 0.975 exact          "Discharge coefficient"         from "Example"
q_m = A * K_d * p_1 * sqrt(k * (2 / (k + 1))^((k + 1) / (k - 1))) * sqrt(M / (Z * R * T_1))  "Critical flow"
unknown A in mm2                 "Required area"
let C = 0.03948 * sqrt(k * (2 / (k + 1))^((k + 1) / (k - 1)))                    "Coefficient of the SI form"
let A_r = 1 mm2 * (q_m / 1 kg/h) / (C * K_d * (p_1 / 1 kPa abs)) * sqrt(T_1 / 1 K * Z / (M / 1 g/mol)) in mm2  "Area by the SI form"
answer A, C, A_r
"#,
    );
    worked.assert_rounds_to("A", 3699e-6, 1e-6);
    worked.assert_rounds_to("A", 3698.9757e-6, 1e-10);
    worked.assert_rounds_to("C", 0.024_890_087, 1e-9);
    worked.assert_rounds_to("A_r", 3699.0461e-6, 1e-10);
}
