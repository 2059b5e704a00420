//! A reference equation of state: its constants, its range and its evaluation.

use std::sync::OnceLock;

use super::ideal_part::IdealPart;
use super::property::{Reduced, StateProperties};
use super::record::record_of;
use super::residual::{Isotherm, ResidualPart};
use super::saturation_line::SaturationStart;
use super::solid_line::SolidLine;
use crate::gas::polynomial::{REFERENCE_PRESSURE_PA, REFERENCE_TEMPERATURE_K};
use crate::gas::species::{Species, species};
use crate::gas::table::{number, rows};
use crate::units::math::{ln, sqrt};

/// Constants and ranges of the reference equations; columns and sources in `data/EQUATIONS.md`.
const EQUATION_TABLE: &str = include_str!("../data/equations.csv");

const COLUMNS: [&str; 16] = [
    "name",
    "r_j_mol_k",
    "molar_mass_kg_mol",
    "t_min_k",
    "t_max_k",
    "t_limit_k",
    "p_max_pa",
    "p_limit_pa",
    "t_c_k",
    "p_c_pa",
    "rho_c_mol_m3",
    "omega",
    "t_c_own_k",
    "p_c_own_pa",
    "rho_c_own_mol_m3",
    "uncertainty",
];

/// Air as one substance: an equation of fixed composition, the model of dry air and of its transport properties.
pub(crate) const AIR: &str = "dry air";

/// Source of [`AIR`].
const AIR_SOURCE: &str = "Lemmon et al. 2000, J. Phys. Chem. Ref. Data 29: 331-385 (doi 10.1063/1.1285884)";

/// Constants of an equation of state that belong to no other.
#[derive(Clone, Debug, PartialEq)]
#[non_exhaustive]
pub struct EquationConstants {
    /// Name of the gas.
    pub name: &'static str,
    /// Molar gas constant that the equation was fitted with, J/(mol K).
    pub r_j_mol_k: f64,
    /// Molar mass that belongs to it, kg/mol.
    pub molar_mass_kg_mol: f64,
    /// Lowest temperature, K: mostly the triple point.
    pub t_min_k: f64,
    /// Highest published temperature, K.
    pub t_max_k: f64,
    /// Highest temperature to which it goes on, K.
    pub t_limit_k: f64,
    /// Highest published pressure, Pa.
    pub p_max_pa: f64,
    /// Highest pressure to which it goes on, Pa.
    pub p_limit_pa: f64,
    /// Critical temperature as published with it, K.
    pub t_c_k: f64,
    /// Critical pressure as published with it, Pa.
    pub p_c_pa: f64,
    /// Critical density as published with it, mol/m³.
    pub rho_c_mol_m3: f64,
    /// Acentric factor.
    pub omega: f64,
    /// Temperature of the point where the equation itself has its first two derivatives of pressure zero, K.
    pub t_c_own_k: f64,
    /// Pressure there, Pa.
    pub p_c_own_pa: f64,
    /// Density there, mol/m³.
    pub rho_c_own_mol_m3: f64,
    /// Uncertainty as the publication states it; empty where none is on record here.
    pub uncertainty: &'static str,
    /// The publication.
    pub source: &'static str,
}

/// A reference equation of state in compiled form.
#[derive(Debug)]
pub struct Equation {
    pub(crate) constants: EquationConstants,
    pub(crate) t_reducing_k: f64,
    pub(crate) rho_reducing: f64,
    pub(crate) ideal: IdealPart,
    pub(crate) residual: ResidualPart,
    pub(crate) start: SaturationStart,
    pub(crate) solid: SolidLine,
    /// Attraction and co-volume of a cubic equation, for the first guess of a density.
    cubic: (f64, f64, f64),
}

/// One isotherm of an equation.
pub(crate) struct EquationIsotherm<'a> {
    pub(crate) equation: &'a Equation,
    pub(crate) t_k: f64,
    isotherm: Isotherm<'a>,
    /// R T, J/mol.
    pub(crate) rt: f64,
}

impl Equation {
    fn read(constants: EquationConstants) -> Option<Self> {
        let record = record_of(constants.name)?;
        let residual = ResidualPart::new(&record.residual)?;
        let ideal = IdealPart::new(&record.ideal_gas, record.tc);
        let start = SaturationStart::of(constants.name)?;
        let solid = SolidLine::of(constants.name);
        let (r, t_c, p_c, omega) = (constants.r_j_mol_k, constants.t_c_k, constants.p_c_pa, constants.omega);
        let kappa = 0.374_64 + omega * (1.542_26 - 0.269_92 * omega);
        let cubic = (0.457_235 * r * r * t_c * t_c / p_c, 0.077_796 * r * t_c / p_c, kappa);
        let mut one = Self { t_reducing_k: record.tc, rho_reducing: record.rhoc, constants, ideal, residual, start, solid, cubic };
        // The table has six decimals of a kelvin, which are 1e-8 of the pressure: the line ends at that of the equation for them.
        one.constants.p_c_own_pa = one.isotherm(one.constants.t_c_own_k).pressure(one.constants.rho_c_own_mol_m3).0;
        Some(one)
    }

    /// The equation of a gas by the name of the table; `None` for a gas without one. It is read at the first call.
    #[must_use]
    pub fn of_name(name: &str) -> Option<&'static Self> {
        static EQUATIONS: OnceLock<Vec<(EquationConstants, OnceLock<Option<Equation>>)>> = OnceLock::new();
        let equations = EQUATIONS.get_or_init(|| all_constants().map(|constants| (constants, OnceLock::new())).collect());
        let (constants, cell) = equations.iter().find(|(constants, _)| constants.name == name)?;
        cell.get_or_init(|| Self::read(constants.clone())).as_ref()
    }

    /// The equation of a species.
    #[must_use]
    pub fn of(species: &Species) -> Option<&'static Self> {
        Self::of_name(species.name)
    }

    /// Names of all gases that have one, in the order of the table.
    #[must_use]
    pub fn names() -> Vec<&'static str> {
        all_constants().map(|constants| constants.name).collect()
    }

    /// Its constants and its range.
    #[must_use]
    pub fn constants(&self) -> &EquationConstants {
        &self.constants
    }

    /// Specific gas constant, J/(kg K).
    #[must_use]
    pub fn gas_constant_j_kg_k(&self) -> f64 {
        self.constants.r_j_mol_k / self.constants.molar_mass_kg_mol
    }

    pub(crate) fn isotherm(&self, t_k: f64) -> EquationIsotherm<'_> {
        EquationIsotherm {
            equation: self,
            t_k,
            isotherm: self.residual.isotherm(self.t_reducing_k / t_k),
            rt: self.constants.r_j_mol_k * t_k,
        }
    }

    /// The reduced Helmholtz energy and its derivatives at a molar density, mol/m³.
    pub(crate) fn reduced(&self, t_k: f64, rho: f64) -> Reduced {
        let ideal = self.ideal.values(t_k);
        let a = self.residual.values(self.t_reducing_k / t_k, rho / self.rho_reducing);
        let c = &self.constants;
        let rho_reference = REFERENCE_PRESSURE_PA / (c.r_j_mol_k * REFERENCE_TEMPERATURE_K);
        Reduced {
            energy: self.ideal.energy(&ideal, t_k) + a.a01,
            entropy: self.ideal.entropy(&ideal) - ln(rho / rho_reference) + a.a01 - a.a00,
            e1: ideal.e1 + a.a01,
            e2: ideal.e2 + a.a02,
            e3: ideal.e3 + a.a03,
            a10: a.a10,
            a20: a.a20,
            a11: a.a11,
            a30: a.a30,
            a21: a.a21,
            a12: a.a12,
        }
    }

    /// All properties at a temperature, K, and a density, kg/m³, whatever the phase: the caller knows that it is a gas.
    #[must_use]
    pub fn properties(&self, t_k: f64, rho_kg_m3: f64) -> StateProperties {
        let rho = rho_kg_m3 / self.constants.molar_mass_kg_mol;
        self.reduced(t_k, rho).properties(t_k, rho_kg_m3, self.gas_constant_j_kg_k())
    }

    /// Pressure at a temperature, K, and a density, kg/m³, whatever the phase, in Pa.
    #[must_use]
    pub fn pressure_pa(&self, t_k: f64, rho_kg_m3: f64) -> f64 {
        self.isotherm(t_k).pressure(rho_kg_m3 / self.constants.molar_mass_kg_mol).0
    }

    /// Second and third virial coefficients, m³/mol and m⁶/mol², and the derivative of the second by temperature, m³/(mol K).
    #[must_use]
    pub fn virial(&self, t_k: f64) -> (f64, f64, f64) {
        let [[b, b_e], [c, _]] = self.residual.virial(self.t_reducing_k / t_k);
        let v = 1.0 / self.rho_reducing;
        (b * v, 2.0 * c * v * v, -b_e * v / t_k)
    }

    /// Heat capacity at constant pressure of the ideal gas, J/(kg K).
    #[must_use]
    pub fn ideal_cp_j_kg_k(&self, t_k: f64) -> f64 {
        let ideal = self.ideal.values(t_k);
        self.gas_constant_j_kg_k() * (ideal.e1 - ideal.e2 + 1.0)
    }

    /// A first guess of the molar density of the gas, from a cubic equation (Peng, Robinson 1976) by a few steps from the ideal gas.
    pub(crate) fn density_guess(&self, t_k: f64, p_pa: f64) -> f64 {
        let rt = self.constants.r_j_mol_k * t_k;
        let (a, b, kappa) = self.cubic;
        let alpha = 1.0 + kappa * (1.0 - sqrt(t_k / self.constants.t_c_k));
        let big_a = a * alpha * alpha * p_pa / (rt * rt);
        let big_b = b * p_pa / rt;
        let (c2, c1, c0) = (big_b - 1.0, big_a - big_b * (3.0 * big_b + 2.0), -big_b * (big_a - big_b - big_b * big_b));
        let mut z = 1.0 + big_b;
        for _ in 0..5 {
            let value = ((z + c2) * z + c1) * z + c0;
            let slope = (3.0 * z + 2.0 * c2) * z + c1;
            if slope <= 0.0 {
                break;
            }
            let next = z - value / slope;
            if next.is_nan() || next <= big_b {
                break;
            }
            z = next;
        }
        p_pa / (rt * z.max(big_b))
    }
}

impl EquationIsotherm<'_> {
    /// Pressure, Pa, and its derivative by molar density, J/mol.
    pub(crate) fn pressure(&self, rho: f64) -> (f64, f64) {
        let [_, a1, a2] = self.terms(rho);
        (rho * self.rt * (1.0 + a1), self.rt * (1.0 + a1 + a2))
    }

    /// α^r, D α^r, D² α^r.
    pub(crate) fn terms(&self, rho: f64) -> [f64; 3] {
        self.isotherm.terms(rho / self.equation.rho_reducing)
    }
}

fn all_constants() -> impl Iterator<Item = EquationConstants> {
    rows(EQUATION_TABLE, COLUMNS).filter_map(|row| {
        let name = row[0];
        let mut values = [0.0; 14];
        for (value, field) in values.iter_mut().zip(&row[1..15]) {
            *value = number(field)?;
        }
        let source = if name == AIR { AIR_SOURCE } else { species().iter().find(|one| one.name == name).map(|one| one.equation)? };
        let [r_j_mol_k, molar_mass_kg_mol, t_min_k, t_max_k, t_limit_k, p_max_pa, p_limit_pa, ..] = values;
        let [.., t_c_k, p_c_pa, rho_c_mol_m3, omega, t_c_own_k, p_c_own_pa, rho_c_own_mol_m3] = values;
        Some(EquationConstants {
            name,
            r_j_mol_k,
            molar_mass_kg_mol,
            t_min_k,
            t_max_k,
            t_limit_k,
            p_max_pa,
            p_limit_pa,
            t_c_k,
            p_c_pa,
            rho_c_mol_m3,
            omega,
            t_c_own_k,
            p_c_own_pa,
            rho_c_own_mol_m3,
            uncertainty: row[15],
            source,
        })
    })
}
