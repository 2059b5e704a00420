//! The critical point that each equation has by itself.

use gaswright::gas::eos::Equation;

/// q = (dp/drho)/(R T) and rho dq/drho, both zero at the critical point; the second by central difference.
fn conditions(equation: &Equation, t: f64, d: f64) -> (f64, f64) {
    let c = equation.constants();
    let q = |d: f64| equation.properties(t, d * c.molar_mass_kg_mol).p.by_rho * c.molar_mass_kg_mol / (c.r_j_mol_k * t);
    let h = 1e-4 * d;
    (q(d), d * (q(d + h) - q(d - h)) / (2.0 * h))
}

/// The table has six decimals of a kelvin and five of a mole: q moves by less than 1e-6 within them. Water and carbon dioxide, whose terms are
/// singular there, have the published point by construction.
#[test]
fn the_table_holds_the_critical_point_of_every_equation() {
    let mut wrong = Vec::new();
    for name in Equation::names().into_iter().filter(|name| !["water", "carbon dioxide"].contains(name)) {
        let equation = Equation::of_name(name).unwrap();
        let c = equation.constants();
        let (q, curvature) = conditions(equation, c.t_c_own_k, c.rho_c_own_mol_m3);
        if q.abs() > 1e-6 || curvature.abs() > 1e-3 {
            let (mut t, mut d) = (c.t_c_own_k, c.rho_c_own_mol_m3);
            for _ in 0..100 {
                let (a, b) = conditions(equation, t, d);
                let (ht, hd) = (1e-5 * t, 1e-4 * d);
                let (plus, minus) = (conditions(equation, t + ht, d), conditions(equation, t - ht, d));
                let (at, bt) = ((plus.0 - minus.0) / (2.0 * ht), (plus.1 - minus.1) / (2.0 * ht));
                let (plus, minus) = (conditions(equation, t, d + hd), conditions(equation, t, d - hd));
                let (ad, bd) = ((plus.0 - minus.0) / (2.0 * hd), (plus.1 - minus.1) / (2.0 * hd));
                let det = at * bd - ad * bt;
                t += ((-a * bd + b * ad) / det).clamp(-0.001 * t, 0.001 * t);
                d += ((-at * b + bt * a) / det).clamp(-0.01 * d, 0.01 * d);
            }
            let p = equation.pressure_pa(t, d * c.molar_mass_kg_mol);
            wrong.push(format!("{name}: q {q:e}, curvature {curvature:e}; the point is {t:.6} K, {p:.3} Pa, {d:.5} mol/m3"));
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

/// The pressure column of the table is that of the unrounded temperature: half a millionth of a kelvin moves it by 1e-7 at most (d ln p/d ln T is
/// 5 to 10 and the lowest critical temperature 5 K).
#[test]
fn the_critical_pressure_is_that_of_the_equation() {
    let table = include_str!("../../../src/gas/data/equations.csv");
    for row in super::table::rows(table) {
        let c = Equation::of_name(row.text("name")).unwrap().constants();
        let published = ["water", "carbon dioxide"].contains(&c.name);
        // Water and carbon dioxide: the published point, whose pressure has five figures and more.
        let tolerance = if published { 1e-5 } else { 1e-6 };
        assert!((c.p_c_own_pa / row.number("p_c_own_pa") - 1.0).abs() < tolerance, "{}: {}", c.name, c.p_c_own_pa);
    }
}
