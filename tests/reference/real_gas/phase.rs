//! What is a gas and what is not, pure and mixed.

use gaswright::gas::eos::Equation;
use gaswright::gas::model_weakness::weaknesses;
use gaswright::gas::phase::{BorderModel, PhaseGuard};
use gaswright::gas::real_gas::ModelKind;
use gaswright::gas::{Gas, Named, RealGas, ShareBasis, StateError, find};

use super::table::rows;

fn mixture(parts: &[(&str, f64)]) -> Gas {
    let parts: Vec<(Named, f64)> = parts.iter().map(|(name, x)| (find(name).unwrap(), *x)).collect();
    Gas::mixture(&parts, ShareBasis::Mole).unwrap()
}

fn pure(name: &str) -> Gas {
    Gas::named(find(name).unwrap())
}

/// Just below the saturation pressure of the table a state is a gas, 0.05 % above it is liquid. Two rows are left out whose pressure is not that of
/// their own saturated gas, by more than these margins: propane at 85.7 K and propylene at 88.13 K, both below 1 mPa.
#[test]
fn the_saturation_line_divides_gas_and_liquid() {
    let mut left_out = 0;
    for row in rows(include_str!("../real/saturation.csv")) {
        let (name, t, p) = (row.text("gas"), row.number("T_K"), row.number("psat_Pa"));
        if p < 1e-3 {
            left_out += 1;
            continue;
        }
        let gas = RealGas::new(&pure(name)).unwrap();
        let rho = gas.density_kg_m3(t, 0.9999 * p).unwrap_or_else(|error| panic!("{name} {t} K: {error}"));
        assert!(rho < row.number("rho_vapour_kg_m3") * 1.0001);
        assert!(matches!(gas.density_kg_m3(t, 1.0005 * p), Err(StateError::Liquid { .. })), "{name} {t} K");
        let near = gas.near_condensation(t, 0.9999 * p).unwrap().unwrap();
        assert!(near.margin_k < 0.1 && near.margin_k > 0.0, "{name} {t} K: {near:?}");
    }
    assert_eq!(left_out, 2);
}

#[test]
fn a_gas_near_condensation_says_so() {
    // R134a at 24.6 degC and 6 bar: saturated at 294.72 K.
    let near = PhaseGuard::new(&pure("R134a")).check(297.75, 6e5).unwrap().unwrap();
    assert!((near.t_condensation_k - 294.72).abs() < 0.01 && (near.margin_k - 3.03).abs() < 0.02);
    assert!(PhaseGuard::new(&pure("R134a")).check(300.0, 6e5).unwrap().is_none());
    assert!(PhaseGuard::new(&pure("nitrogen")).check(300.0, 1e5).unwrap().is_none());
}

#[test]
fn water_in_a_mixture_is_judged_by_its_partial_pressure() {
    let guard = PhaseGuard::new(&mixture(&[("nitrogen", 0.97), ("water", 0.03)]));
    match guard.check(288.15, 1e5) {
        Err(StateError::Condenses { component: "water", partial_pressure_pa, t_dew_k: Some(t), .. }) => {
            assert!((partial_pressure_pa - 3000.0).abs() < 1e-9 && (t - 297.23).abs() < 0.02, "{t}");
        }
        other => panic!("{other:?}"),
    }
    let near = guard.check(300.0, 1e5).unwrap().unwrap();
    assert!(near.component == "water" && near.model == BorderModel::SaturationLine && (near.margin_k - 2.77).abs() < 0.02);
    assert!(guard.check(305.0, 1e5).unwrap().is_none());
    // Frost, below 0.01 degC.
    let dry = PhaseGuard::new(&mixture(&[("nitrogen", 0.9999), ("water", 0.0001)]));
    assert!(dry.check(250.0, 1e5).unwrap().is_none());
    assert!(matches!(dry.check(225.0, 1e5), Err(StateError::Condenses { component: "water", .. })));
}

/// A mixture of propane and n-butane at 20 degC begins to condense near Raoult's dew pressure, 1/(y_1/p_1 + y_2/p_2) = 369 kPa for half and half with
/// 836 and 208 kPa: the liquid is close to ideal, the gas adds about 5 %.
#[test]
fn hydrocarbons_are_judged_by_the_cubic_equation() {
    let gas = mixture(&[("propane", 0.5), ("n-butane", 0.5)]);
    let guard = PhaseGuard::new(&gas);
    assert!(guard.check(293.15, 310e3).is_ok());
    match guard.check(293.15, 400e3) {
        Err(StateError::Condenses { component: "n-butane", t_dew_k: Some(t), .. }) => assert!(t > 293.15 && t < 300.0, "{t}"),
        other => panic!("{other:?}"),
    }
    let near = guard.check(293.15, 325e3).unwrap().unwrap();
    assert!(near.model == BorderModel::PengRobinson && near.margin_k < 5.0);
    // Natural gas at its coldest in the tables is a gas; with a little more of the heavy part it is not.
    let rich = mixture(&[("methane", 0.80), ("n-butane", 0.12), ("n-hexane", 0.08)]);
    assert!(matches!(PhaseGuard::new(&rich).check(273.15, 4e6), Err(StateError::Condenses { component: "n-hexane", .. })));
}

/// The library hands out the liquid of air at 130 K and 3.5 MPa and of a rich gas at 250 K and 5 MPa, and accepts what is beyond its range.
#[test]
fn what_the_library_lets_through_is_refused() {
    let air = RealGas::new(&mixture(&[("nitrogen", 0.7812), ("oxygen", 0.2096), ("argon", 0.0092)])).unwrap();
    assert_eq!(air.kind(), ModelKind::Gerg2008);
    let as_one_substance = RealGas::new(&pure("dry air")).unwrap();
    assert_eq!(as_one_substance.kind(), ModelKind::ReferenceEquation);
    assert!(as_one_substance.density_kg_m3(130.0, 3.5e6).is_err());
    assert!(as_one_substance.density_kg_m3(800.0, 1e5).is_ok());
    assert!(air.density_kg_m3(130.0, 3.5e6).is_err());
    let rich = RealGas::new(&mixture(&[("methane", 0.7), ("ethane", 0.1), ("propane", 0.1), ("n-butane", 0.1)])).unwrap();
    assert!(matches!(rich.density_kg_m3(250.0, 5e6), Err(StateError::Condenses { .. })));
    assert!(matches!(air.density_kg_m3(3000.0, 1e5), Err(StateError::OutOfRange(_))));
    assert!(matches!(air.density_kg_m3(300.0, 100e9), Err(StateError::OutOfRange(_))));
    assert!(matches!(air.density_kg_m3(50.0, 1e3), Err(StateError::OutOfRange(_) | StateError::Condenses { .. })));
    // No memory of what ran before: the same digits after any other temperature, also one within 1e-7 K.
    let first = air.density_kg_m3(300.0, 5e6).unwrap();
    let _ = air.density_kg_m3(300.0 + 5e-8, 5e6);
    let _ = air.density_kg_m3(250.0, 1e6);
    assert_eq!(air.density_kg_m3(300.0, 5e6).unwrap(), first);
    assert_ne!(air.density_kg_m3(300.0 + 5e-8, 5e6).unwrap(), first);
}

#[test]
fn weak_models_are_told() {
    let of = |parts: &[(&str, f64)]| {
        let gas = mixture(parts);
        weaknesses(&gas, &RealGas::new(&gas).unwrap())
    };
    assert_eq!(of(&[("argon", 0.7), ("helium", 0.3)])[0].component, "helium");
    assert_eq!(of(&[("argon", 0.7), ("helium", 0.3)])[0].spread, Some(0.049));
    assert_eq!(of(&[("helium", 0.79), ("oxygen", 0.21)])[0].spread, Some(0.012));
    assert!(of(&[("nitrogen", 0.79), ("oxygen", 0.21)]).is_empty());
    assert!(of(&[("nitrogen", 0.9), ("ammonia", 0.1)])[0].text.contains("Peng-Robinson"));
    assert_eq!(of(&[("nitrogen", 0.9), ("water", 0.1)])[0].component, "water");
    assert!(weaknesses(&pure("helium"), &RealGas::new(&pure("helium")).unwrap()).is_empty());
}

/// Every gas that has an equation, along its whole saturation line, a thousandth on either side.
#[test]
fn the_line_divides_for_every_gas() {
    for name in Equation::names().into_iter().filter(|name| *name != "dry air") {
        let equation = Equation::of_name(name).unwrap();
        let (c, gas) = (equation.constants(), RealGas::new(&pure(name)).unwrap());
        for i in 0..40 {
            let t = c.t_min_k + (0.995 * c.t_c_own_k - c.t_min_k) * f64::from(i) / 39.0;
            let p = equation.saturation(t).unwrap().p_pa;
            let above = gas.density_kg_m3(t, 1.001 * p);
            assert!(matches!(above, Err(StateError::Liquid { .. })), "{name} {t} K: {above:?}");
            assert!(gas.density_kg_m3(t, 0.999 * p).is_ok(), "{name} {t} K");
        }
    }
}
