//! GERG-2008 for mixtures of its 21 components, through the library `aga8`, with the checks that it leaves to its caller.

use aga8::composition::Composition;
use aga8::gerg2008::Gerg2008;

use super::property::{StateProperties, WithSlopes};
use crate::gas::mixture::Component;
use crate::gas::polynomial::{REFERENCE_PRESSURE_PA, REFERENCE_TEMPERATURE_K};
use crate::gas::species::Species;
use crate::gas::state_error::StateError;
use crate::units::math::ln;

/// Where the model comes from.
pub const GERG_SOURCE: &str = "GERG-2008: Kunz, Wagner 2012, J. Chem. Eng. Data 57: 3032-3091; ISO 20765-2";

/// What its publication states, from memory.
pub const GERG_UNCERTAINTY: &str = "density 0.1 %, speed of sound 0.1 % in natural gases from 250 K to 450 K (270 K to 450 K) up to 35 MPa; \
     0.2 % to 0.3 % up to 70 MPa; other mixtures 0.5 % to 1 % where there are measurements";

/// Lowest and highest temperature of the published range of normal use, K.
pub(crate) const GERG_T_K: (f64, f64) = (90.0, 450.0);

/// Lowest and highest temperature of the extended range, K.
pub(crate) const GERG_T_LIMIT_K: (f64, f64) = (60.0, 700.0);

/// Highest pressure of the range of normal use, Pa.
pub(crate) const GERG_P_PA: f64 = 35e6;

/// Highest pressure of the extended range, Pa.
pub(crate) const GERG_P_LIMIT_PA: f64 = 70e6;

/// Molar gas constant that the model was fitted with, J/(mol K).
pub(crate) const GERG_R: f64 = 8.314_472;

/// Relative step of the central differences that give the slopes of cp, cv and w: the error is about its square, 1e-8, and the rounding
/// of the values over it.
const STEP: f64 = 1e-4;

/// Above this share of the mean critical density a root may be liquid, and the isotherm below it is looked at.
const MAYBE_LIQUID: f64 = 0.5;

/// Points of the isotherm that are looked at.
const POINTS: u32 = 32;

/// GERG-2008 for one composition.
#[derive(Clone)]
pub(crate) struct Gerg {
    /// With composition and reducing values set and no temperature seen: copied afresh for every state, since the library keeps powers of the
    /// last temperature.
    template: Gerg2008,
    pub(crate) molar_mass_kg_mol: f64,
    /// h and s at the reference state by the zero of the library, J/mol and J/(mol K).
    h_shift: f64,
    s_shift: f64,
    /// Mean critical density, mol/L, and the highest critical temperature of a component, K.
    rho_c: f64,
    highest_t_c_k: f64,
}

impl std::fmt::Debug for Gerg {
    fn fmt(&self, out: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        write!(out, "Gerg({} kg/mol)", self.molar_mass_kg_mol)
    }
}

/// The place of a species in a composition; `None` for one that the model lacks.
fn share<'a>(composition: &'a mut Composition, species: &Species) -> Option<&'a mut f64> {
    Some(match species.name {
        "methane" => &mut composition.methane,
        "nitrogen" => &mut composition.nitrogen,
        "carbon dioxide" => &mut composition.carbon_dioxide,
        "ethane" => &mut composition.ethane,
        "propane" => &mut composition.propane,
        "isobutane" => &mut composition.isobutane,
        "n-butane" => &mut composition.n_butane,
        "isopentane" => &mut composition.isopentane,
        "n-pentane" => &mut composition.n_pentane,
        "n-hexane" => &mut composition.hexane,
        "n-heptane" => &mut composition.heptane,
        "n-octane" => &mut composition.octane,
        "n-nonane" => &mut composition.nonane,
        "n-decane" => &mut composition.decane,
        "hydrogen" => &mut composition.hydrogen,
        "oxygen" => &mut composition.oxygen,
        "carbon monoxide" => &mut composition.carbon_monoxide,
        "water" => &mut composition.water,
        "hydrogen sulfide" => &mut composition.hydrogen_sulfide,
        "helium" => &mut composition.helium,
        "argon" => &mut composition.argon,
        _ => return None,
    })
}

impl Gerg {
    /// For the components of a gas; the name of one that the model lacks is the error, and an empty name stands for shares that the library
    /// refuses.
    pub(crate) fn new(components: &[Component]) -> Result<Self, &'static str> {
        let mut composition = Composition::default();
        let (mut volume, mut highest_t_c_k, mut mixing) = (0.0, 0.0_f64, 0.0);
        for component in components {
            let x = component.mole_fraction;
            // The library takes negative shares and numbers that are none.
            if !(0.0..=1.0).contains(&x) {
                return Err("");
            }
            *share(&mut composition, component.species).ok_or(component.species.name)? += x;
            if x > 0.0 {
                mixing += x * ln(x);
                highest_t_c_k = highest_t_c_k.max(component.species.t_c_k.unwrap_or(f64::INFINITY));
                let rho_c = component.species.rho_c_kg_m3.unwrap_or(f64::INFINITY) / component.species.molar_mass_kg_mol;
                volume += x / rho_c;
            }
        }
        if !(-1e-9..1e-9).contains(&(composition.sum() - 1.0)) {
            return Err("");
        }
        let mut template = Gerg2008::new();
        template.set_composition(&composition).map_err(|_| "")?;
        // At this density, in mol/L, nothing but the ideal part is left.
        let mut thin = template;
        thin.t = REFERENCE_TEMPERATURE_K;
        thin.d = 1e-13;
        thin.properties();
        let reference = REFERENCE_PRESSURE_PA / (GERG_R * REFERENCE_TEMPERATURE_K) / 1000.0;
        let s_shift = thin.s + GERG_R * (ln(thin.d / reference) + mixing);
        Ok(Self { template, molar_mass_kg_mol: thin.mm / 1000.0, h_shift: thin.h, s_shift, rho_c: 1e-3 / volume, highest_t_c_k })
    }

    pub(crate) fn gas_constant_j_kg_k(&self) -> f64 {
        GERG_R / self.molar_mass_kg_mol
    }

    /// Density of the gas, kg/m³, within the range that the caller has checked.
    ///
    /// Errors: [`StateError::NotConverged`], also where the library hands out a liquid or an unstable root.
    pub(crate) fn density(&self, t_k: f64, p_pa: f64) -> Result<f64, StateError> {
        let mut model = self.template;
        model.t = t_k;
        model.p = p_pa / 1000.0;
        model.d = 0.0;
        let failed = |residual: f64| StateError::NotConverged { what: "density of the gas", model: "GERG-2008", iterations: 50, residual };
        model.density(0).map_err(|_| failed(f64::NAN))?;
        let p = model.properties();
        let residual = p / model.p - 1.0;
        let sound = model.d > 0.0 && model.z > 0.0 && model.dp_dd > 0.0 && residual.abs() < 1e-7;
        if !sound || !self.is_gas(t_k, model.d) {
            return Err(failed(residual));
        }
        // The library ends one step after a step of 1e-7: one more of our own takes the rest.
        let d = model.d - (p - model.p) / model.dp_dd;
        Ok(d * self.molar_mass_kg_mol * 1000.0)
    }

    /// Whether a density, mol/L, is on the branch of the isotherm that starts at the ideal gas.
    fn is_gas(&self, t_k: f64, d: f64) -> bool {
        if d < MAYBE_LIQUID * self.rho_c || t_k > self.highest_t_c_k {
            return true;
        }
        let mut model = self.template;
        model.t = t_k;
        (1..POINTS).all(|i| {
            model.d = d * f64::from(i) / f64::from(POINTS);
            model.properties();
            model.dp_dd > 0.0
        })
    }

    /// All properties at a temperature, K, and a density, kg/m³. The slopes of p, h, u, s and Z are those of the model, the slopes of cp, cv, k
    /// and w central differences.
    pub(crate) fn properties(&self, t_k: f64, rho_kg_m3: f64) -> StateProperties {
        let mut out = self.values(t_k, rho_kg_m3);
        let (dt, dr) = (STEP * t_k, STEP * rho_kg_m3);
        let around = [
            self.values(t_k + dt, rho_kg_m3),
            self.values(t_k - dt, rho_kg_m3),
            self.values(t_k, rho_kg_m3 + dr),
            self.values(t_k, rho_kg_m3 - dr),
        ];
        let slopes = |of: fn(&StateProperties) -> f64| {
            let [a, b, c, d] = [of(&around[0]), of(&around[1]), of(&around[2]), of(&around[3])];
            WithSlopes { value: of(&out), by_t: (a - b) / (2.0 * dt), by_rho: (c - d) / (2.0 * dr) }
        };
        let (cp, cv) = (slopes(|s| s.cp.value), slopes(|s| s.cv.value));
        let (k, w) = (slopes(|s| s.k.value), slopes(|s| s.w.value));
        (out.cp, out.cv, out.k, out.w) = (cp, cv, k, w);
        out
    }

    /// As [`Self::properties`], without the slopes of cp, cv, k and w.
    pub(crate) fn values(&self, t_k: f64, rho_kg_m3: f64) -> StateProperties {
        let m = self.molar_mass_kg_mol;
        let mut model = self.template;
        model.t = t_k;
        model.d = rho_kg_m3 / (m * 1000.0);
        let p = model.properties() * 1000.0;
        let (p_t, p_rho) = (model.dp_dt * 1000.0, model.dp_dd / m);
        let (h, u, s) = ((model.h - self.h_shift) / m, (model.u - self.h_shift) / m, (model.s - self.s_shift) / m);
        let (cp, cv) = (model.cp / m, model.cv / m);
        let rho = rho_kg_m3;
        let plain = |value: f64| WithSlopes { value, by_t: 0.0, by_rho: 0.0 };
        let r = self.gas_constant_j_kg_k();
        let z = p / (rho * r * t_k);
        StateProperties {
            t_k,
            rho_kg_m3: rho,
            p: WithSlopes { value: p, by_t: p_t, by_rho: p_rho },
            h: WithSlopes { value: h, by_t: cv + p_t / rho, by_rho: (p_rho - t_k * p_t / rho) / rho },
            u: WithSlopes { value: u, by_t: cv, by_rho: (p - t_k * p_t) / (rho * rho) },
            s: WithSlopes { value: s, by_t: cv / t_k, by_rho: -p_t / (rho * rho) },
            cp: plain(cp),
            cv: plain(cv),
            k: plain(model.cp / model.cv),
            w: plain(model.w),
            z: WithSlopes { value: z, by_t: z * (p_t / p - 1.0 / t_k), by_rho: z * (p_rho / p - 1.0 / rho) },
        }
    }
}
