//! The properties of a state and their derivatives.

use crate::units::math::sqrt;

/// A property of a state.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub enum Property {
    /// Pressure p, Pa.
    Pressure,
    /// Temperature T, K.
    Temperature,
    /// Specific volume v, m³/kg.
    Volume,
    /// Density rho, kg/m³.
    Density,
    /// Enthalpy h, J/kg.
    Enthalpy,
    /// Internal energy u, J/kg.
    InternalEnergy,
    /// Entropy s, J/(kg K).
    Entropy,
    /// Heat capacity at constant pressure cp, J/(kg K).
    HeatCapacityPressure,
    /// Heat capacity at constant volume cv, J/(kg K).
    HeatCapacityVolume,
    /// Ratio of the heat capacities k = cp/cv, 1.
    HeatCapacityRatio,
    /// Speed of sound w, m/s.
    SpeedOfSound,
    /// Compressibility factor Z = p M/(rho R T), 1, with the R of the model.
    CompressibilityFactor,
}

impl Property {
    /// All of them.
    pub const ALL: [Self; 12] = [
        Self::Pressure,
        Self::Temperature,
        Self::Volume,
        Self::Density,
        Self::Enthalpy,
        Self::InternalEnergy,
        Self::Entropy,
        Self::HeatCapacityPressure,
        Self::HeatCapacityVolume,
        Self::HeatCapacityRatio,
        Self::SpeedOfSound,
        Self::CompressibilityFactor,
    ];

    /// Its symbol in a sheet.
    #[must_use]
    pub fn symbol(self) -> &'static str {
        match self {
            Self::Pressure => "p",
            Self::Temperature => "T",
            Self::Volume => "v",
            Self::Density => "rho",
            Self::Enthalpy => "h",
            Self::InternalEnergy => "u",
            Self::Entropy => "s",
            Self::HeatCapacityPressure => "cp",
            Self::HeatCapacityVolume => "cv",
            Self::HeatCapacityRatio => "k",
            Self::SpeedOfSound => "w",
            Self::CompressibilityFactor => "Z",
        }
    }

    /// Whether two of its kind can fix a state: all but the heat capacities, k, w and Z.
    #[must_use]
    pub fn fixes_a_state(self) -> bool {
        matches!(
            self,
            Self::Pressure | Self::Temperature | Self::Volume | Self::Density | Self::Enthalpy | Self::InternalEnergy | Self::Entropy
        )
    }
}

/// A value and its derivatives by temperature (at constant density) and by density (at constant temperature).
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct WithSlopes {
    /// The value.
    pub value: f64,
    /// Derivative by temperature at constant density, per K.
    pub by_t: f64,
    /// Derivative by density at constant temperature, per kg/m³.
    pub by_rho: f64,
}

/// All properties of a state of a single phase, per mass, in SI units, as functions of temperature and density.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub struct StateProperties {
    /// Temperature, K.
    pub t_k: f64,
    /// Density, kg/m³.
    pub rho_kg_m3: f64,
    /// Pressure, Pa.
    pub p: WithSlopes,
    /// Enthalpy, J/kg.
    pub h: WithSlopes,
    /// Internal energy, J/kg.
    pub u: WithSlopes,
    /// Entropy, J/(kg K).
    pub s: WithSlopes,
    /// Heat capacity at constant pressure, J/(kg K).
    pub cp: WithSlopes,
    /// Heat capacity at constant volume, J/(kg K).
    pub cv: WithSlopes,
    /// cp/cv.
    pub k: WithSlopes,
    /// Speed of sound, m/s.
    pub w: WithSlopes,
    /// Compressibility factor.
    pub z: WithSlopes,
}

/// What a model of the reduced Helmholtz energy a/(R T) gives at one state, in the operators D = ρ ∂/∂ρ and E = -T ∂/∂T at constant
/// density. `e` holds α, E α, E² α and E³ α of ideal and residual part together, with ln ρ in the first and the zero of h and s in
/// place; `a10` and so on are of the residual part, D first.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Reduced {
    /// u/(R T).
    pub(crate) energy: f64,
    /// s/R.
    pub(crate) entropy: f64,
    pub(crate) e1: f64,
    pub(crate) e2: f64,
    pub(crate) e3: f64,
    pub(crate) a10: f64,
    pub(crate) a20: f64,
    pub(crate) a11: f64,
    pub(crate) a30: f64,
    pub(crate) a21: f64,
    pub(crate) a12: f64,
}

impl Reduced {
    /// All properties, from the reduced Helmholtz energy at `t_k` and `rho_kg_m3` of a gas of specific gas constant `r` in J/(kg K).
    ///
    /// Equation: Z = 1 + Dα, p = ρ r T Z, u = r T Eα, h = u + p/ρ, s = r (Eα - α), cv = r (Eα - E²α),
    ///           ∂p/∂ρ = r T q with q = 1 + Dα + D²α, ∂p/∂T = ρ r g with g = 1 + Dα - DEα, cp = cv + r g²/q, w² = (cp/cv) r T q;
    ///           the derivatives of cp, cv and w come from the third derivatives of α.
    /// Source:   Span 2000, Multiparameter Equations of State, table 3.10 (from memory), written in the operators D and E.
    /// Edges:    q at or below 0 (between the spinodals) gives a w that is no number: the caller keeps out of there.
    pub(crate) fn properties(&self, t_k: f64, rho: f64, r: f64) -> StateProperties {
        let Self { energy, entropy, e1, e2, e3, a10, a20, a11, a30, a21, a12 } = *self;
        let rt = r * t_k;
        let z = 1.0 + a10;
        let q = 1.0 + a10 + a20;
        let g = 1.0 + a10 - a11;
        let c = e1 - e2;
        let p = rho * rt * z;
        let p_t = rho * r * g;
        let p_rho = rt * q;
        // E and D of q, g, c.
        let (q_e, q_d) = (a11 + a21, a20 + a30);
        let (g_e, g_d) = (a11 - a12, a20 - a21);
        let (c_e, c_d) = (e2 - e3, a11 - a12);
        let b = c + g * g / q;
        let b_of = |c_x: f64, g_x: f64, q_x: f64| c_x + (2.0 * g * g_x - g * g * q_x / q) / q;
        let (b_e, b_d) = (b_of(c_e, g_e, q_e), b_of(c_d, g_d, q_d));
        let slopes = |value: f64, e: f64, d: f64| WithSlopes { value, by_t: -e / t_k, by_rho: d / rho };
        let cv = slopes(r * c, r * c_e, r * c_d);
        let cp = slopes(r * b, r * b_e, r * b_d);
        let ratio = b / c;
        let ratio_of = |b_x: f64, c_x: f64| (b_x - ratio * c_x) / c;
        let k = slopes(ratio, ratio_of(b_e, c_e), ratio_of(b_d, c_d));
        let w = sqrt(ratio * rt * q);
        // ln w² = ln k + ln T + ln q.
        let w_of = |k_x: f64, q_x: f64, t_x: f64| 0.5 * w * (k_x / ratio + q_x / q + t_x);
        let u = rt * energy;
        StateProperties {
            t_k,
            rho_kg_m3: rho,
            p: WithSlopes { value: p, by_t: p_t, by_rho: p_rho },
            u: WithSlopes { value: u, by_t: cv.value, by_rho: (p - t_k * p_t) / (rho * rho) },
            h: WithSlopes { value: u + p / rho, by_t: cv.value + p_t / rho, by_rho: (p_rho - t_k * p_t / rho) / rho },
            s: WithSlopes { value: r * entropy, by_t: cv.value / t_k, by_rho: -p_t / (rho * rho) },
            cp,
            cv,
            k,
            w: slopes(w, w_of(ratio_of(b_e, c_e), q_e, -1.0), w_of(ratio_of(b_d, c_d), q_d, 0.0)),
            z: slopes(z, a11, a20),
        }
    }
}

impl StateProperties {
    /// One of the properties.
    #[must_use]
    pub fn get(&self, property: Property) -> WithSlopes {
        match property {
            Property::Pressure => self.p,
            Property::Temperature => WithSlopes { value: self.t_k, by_t: 1.0, by_rho: 0.0 },
            Property::Volume => {
                let v = 1.0 / self.rho_kg_m3;
                WithSlopes { value: v, by_t: 0.0, by_rho: -v * v }
            }
            Property::Density => WithSlopes { value: self.rho_kg_m3, by_t: 0.0, by_rho: 1.0 },
            Property::Enthalpy => self.h,
            Property::InternalEnergy => self.u,
            Property::Entropy => self.s,
            Property::HeatCapacityPressure => self.cp,
            Property::HeatCapacityVolume => self.cv,
            Property::HeatCapacityRatio => self.k,
            Property::SpeedOfSound => self.w,
            Property::CompressibilityFactor => self.z,
        }
    }

    /// Derivatives of `of` by `x` at constant `y` and by `y` at constant `x`; `None` where x and y are not independent here.
    #[must_use]
    pub fn slopes_by(&self, of: Property, x: Property, y: Property) -> Option<(f64, f64)> {
        let (f, x, y) = (self.get(of), self.get(x), self.get(y));
        // The columns are scaled to d ln T and d ln ρ, so that the test for independence has no unit.
        let (t, rho) = (self.t_k, self.rho_kg_m3);
        let (ft, fr, xt, xr, yt, yr) = (f.by_t * t, f.by_rho * rho, x.by_t * t, x.by_rho * rho, y.by_t * t, y.by_rho * rho);
        let determinant = xt * yr - xr * yt;
        let size = (xt.abs() + xr.abs()) * (yt.abs() + yr.abs());
        if determinant.is_nan() || determinant.abs() <= DEPENDENT * size {
            return None;
        }
        Some(((ft * yr - fr * yt) / determinant, (fr * xt - ft * xr) / determinant))
    }

    /// Whether every value and every slope is a finite number.
    #[must_use]
    pub fn is_finite(&self) -> bool {
        Property::ALL.iter().all(|property| {
            let one = self.get(*property);
            one.value.is_finite() && one.by_t.is_finite() && one.by_rho.is_finite()
        })
    }
}

/// Two properties count as dependent where their slopes differ by less than this share in direction: below it the answer would have no digit
/// left of the twelve that are promised.
const DEPENDENT: f64 = 1e-12;
