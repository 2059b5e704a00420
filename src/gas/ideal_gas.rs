//! A gas to compute with: its composition, its constants, its ideal law and ideal caloric properties.

use std::fmt;
use std::sync::Arc;

use uom::si::available_energy::joule_per_kilogram;
use uom::si::f64::{AvailableEnergy, MassDensity, MolarMass, Pressure, Ratio, SpecificHeatCapacity, ThermodynamicTemperature, Velocity};
use uom::si::mass_density::kilogram_per_cubic_meter;
use uom::si::molar_mass::kilogram_per_mole;
use uom::si::pressure::pascal;
use uom::si::ratio::ratio;
use uom::si::specific_heat_capacity::joule_per_kilogram_kelvin;
use uom::si::thermodynamic_temperature::kelvin;
use uom::si::velocity::meter_per_second;
use uom::si::{ISQ, Quantity, SI};
use uom::typenum::{N2, P2, Z0};

use super::caloric::{Caloric, Property, TemperatureRange};
use super::mixture::{Component, MixtureError, ShareBasis, molar_mass_kg_mol, mole_fractions, own_fractions, rounded};
use super::name::Named;
use super::polynomial::REFERENCE_PRESSURE_PA;
use super::species::Species;
use crate::units::constants::MOLAR_GAS_CONSTANT;
use crate::units::math::{ln, sqrt};

/// Derivative of a specific heat capacity by temperature, J/(kg K²).
pub type HeatCapacitySlope = Quantity<ISQ<P2, Z0, N2, Z0, N2, Z0, Z0>, SI<f64>, f64>;

/// How the critical point of a mixture without one of its own is found. The citation is from memory.
pub const KAY_SOURCE: &str = "Kay's rule: pseudo-critical point as the mean by mole fractions (Kay 1936, Ind. Eng. Chem. 28: 1014-1019)";

/// A gas: pure, or a mixture. Cheap to clone.
///
/// Ideal law: p v = (R/M) T, with R the molar gas constant and M the molar mass.
/// Caloric properties: [`Polynomial`](super::Polynomial)s of the species, added up by mole fractions, per mass of the mixture; their range is
/// [`Self::caloric_range`]. Beyond its limits, and for gases without polynomials, the properties are not a number.
#[derive(Clone)]
pub struct Gas(Arc<Inner>);

struct Inner {
    title: String,
    components: Vec<Component>,
    molar_mass_kg_mol: f64,
    gas_constant_j_kg_k: f64,
    critical: Option<(f64, f64)>,
    critical_source: String,
    caloric: Result<Caloric, &'static str>,
}

impl Gas {
    /// A pure gas.
    #[must_use]
    pub fn pure(species: &'static Species) -> Self {
        Self::named(Named::Species(species))
    }

    /// A pure gas, or a mixture with a name of its own.
    #[must_use]
    pub fn named(named: Named) -> Self {
        let (critical, source) = match named {
            Named::Species(species) => {
                let source = species.sources.t_c.map(|source| source.text(species.equation)).unwrap_or_default();
                (species.t_c_k.zip(species.p_c_pa), source)
            }
            Named::Mixture(mixture) => (Some((mixture.t_c_k, mixture.p_c_pa)), mixture.critical_source.to_owned()),
        };
        Self::new(named.name().to_owned(), &own_fractions(named), critical, source)
    }

    /// A mixture of gases, each with its share; the shares sum to 1.
    ///
    /// # Errors
    ///
    /// [`MixtureError`], the first that applies.
    pub fn mixture(parts: &[(Named, f64)], by: ShareBasis) -> Result<Self, MixtureError> {
        let fractions = mole_fractions(parts, by)?;
        // All of one gas is that gas.
        if let Some((named, _)) = parts.iter().find(|(_, share)| *share == 1.0) {
            return Ok(Self::named(*named));
        }
        let shares: Vec<String> = parts.iter().map(|(named, share)| format!("{} {}", rounded(*share), named.name())).collect();
        let title = format!("{} {}", shares.join(" + "), by.words());
        let mean = |constant: fn(&Species) -> Option<f64>| {
            fractions.iter().map(|(species, fraction)| Some(fraction * constant(species)?)).sum::<Option<f64>>()
        };
        let critical = mean(|species| species.t_c_k).zip(mean(|species| species.p_c_pa));
        Ok(Self::new(title, &fractions, critical, KAY_SOURCE.to_owned()))
    }

    fn new(title: String, fractions: &[(&'static Species, f64)], critical: Option<(f64, f64)>, critical_source: String) -> Self {
        let molar_mass_kg_mol = molar_mass_kg_mol(fractions);
        let gas_constant_j_kg_k = MOLAR_GAS_CONSTANT / molar_mass_kg_mol;
        let components = fractions
            .iter()
            .map(|(species, fraction)| Component {
                species,
                mole_fraction: *fraction,
                mass_fraction: fraction * species.molar_mass_kg_mol / molar_mass_kg_mol,
            })
            .collect();
        let caloric = Caloric::new(fractions, gas_constant_j_kg_k);
        Self(Arc::new(Inner { title, components, molar_mass_kg_mol, gas_constant_j_kg_k, critical, critical_source, caloric }))
    }

    /// What the gas is, as a sheet would say it: `nitrogen`, `0.82 argon + 0.18 carbon dioxide by mole`.
    #[must_use]
    pub fn title(&self) -> String {
        self.0.title.clone()
    }

    /// The species it consists of.
    #[must_use]
    pub fn components(&self) -> &[Component] {
        &self.0.components
    }

    /// The species, where it is only one.
    #[must_use]
    pub fn species(&self) -> Option<&'static Species> {
        match self.0.components[..] {
            [Component { species, .. }] => Some(species),
            _ => None,
        }
    }

    /// Molar mass, M = Σ x_i M_i.
    #[must_use]
    pub fn molar_mass(&self) -> MolarMass {
        MolarMass::new::<kilogram_per_mole>(self.0.molar_mass_kg_mol)
    }

    /// Specific gas constant, R/M.
    #[must_use]
    pub fn specific_gas_constant(&self) -> SpecificHeatCapacity {
        SpecificHeatCapacity::new::<joule_per_kilogram_kelvin>(self.0.gas_constant_j_kg_k)
    }

    /// Critical temperature; of a mixture without a critical point of its own the pseudo-critical one by [`KAY_SOURCE`].
    #[must_use]
    pub fn critical_temperature(&self) -> Option<ThermodynamicTemperature> {
        self.0.critical.map(|(t_c_k, _)| ThermodynamicTemperature::new::<kelvin>(t_c_k))
    }

    /// Critical pressure; of mixtures as [`Self::critical_temperature`].
    #[must_use]
    pub fn critical_pressure(&self) -> Option<Pressure> {
        self.0.critical.map(|(_, p_c_pa)| Pressure::new::<pascal>(p_c_pa))
    }

    /// Where the critical point comes from.
    #[must_use]
    pub fn critical_source(&self) -> &str {
        &self.0.critical_source
    }

    /// Whether it has caloric properties.
    ///
    /// # Errors
    ///
    /// The name of a species that has none.
    pub fn has_caloric(&self) -> Result<(), &'static str> {
        self.0.caloric.as_ref().map(|_| ()).map_err(|species| *species)
    }

    /// The temperatures for which its caloric properties hold: those that all its species share.
    #[must_use]
    pub fn caloric_range(&self) -> TemperatureRange {
        self.0.caloric.as_ref().map_or(TemperatureRange::EMPTY, |caloric| caloric.range)
    }

    /// Density by the ideal law, p M/(R T).
    #[must_use]
    pub fn density(&self, t: ThermodynamicTemperature, p: Pressure) -> MassDensity {
        let density_kg_m3 = p.get::<pascal>() / (self.0.gas_constant_j_kg_k * t.get::<kelvin>());
        MassDensity::new::<kilogram_per_cubic_meter>(density_kg_m3)
    }

    /// Heat capacity at constant pressure.
    #[must_use]
    pub fn cp(&self, t: ThermodynamicTemperature) -> SpecificHeatCapacity {
        SpecificHeatCapacity::new::<joule_per_kilogram_kelvin>(self.cp_j_kg_k(t.get::<kelvin>()))
    }

    /// Heat capacity at constant volume, cp - R/M.
    #[must_use]
    pub fn cv(&self, t: ThermodynamicTemperature) -> SpecificHeatCapacity {
        self.cp(t) - self.specific_gas_constant()
    }

    /// Ratio of the heat capacities, cp/cv.
    #[must_use]
    pub fn heat_capacity_ratio(&self, t: ThermodynamicTemperature) -> Ratio {
        let cp = self.cp_j_kg_k(t.get::<kelvin>());
        Ratio::new::<ratio>(cp / (cp - self.0.gas_constant_j_kg_k))
    }

    /// Speed of sound, sqrt(k R T/M) with k the ratio of the heat capacities.
    #[must_use]
    pub fn speed_of_sound(&self, t: ThermodynamicTemperature) -> Velocity {
        let k = self.heat_capacity_ratio(t).get::<ratio>();
        Velocity::new::<meter_per_second>(sqrt(k * self.0.gas_constant_j_kg_k * t.get::<kelvin>()))
    }

    /// Enthalpy.
    #[must_use]
    pub fn enthalpy(&self, t: ThermodynamicTemperature) -> AvailableEnergy {
        AvailableEnergy::new::<joule_per_kilogram>(self.h_j_kg(t.get::<kelvin>()))
    }

    /// Internal energy, u = h - (R/M) T.
    #[must_use]
    pub fn internal_energy(&self, t: ThermodynamicTemperature) -> AvailableEnergy {
        let t_k = t.get::<kelvin>();
        AvailableEnergy::new::<joule_per_kilogram>(self.h_j_kg(t_k) - self.0.gas_constant_j_kg_k * t_k)
    }

    /// Entropy at [`REFERENCE_PRESSURE_PA`], with the entropy of mixing.
    #[must_use]
    pub fn entropy_at_reference_pressure(&self, t: ThermodynamicTemperature) -> SpecificHeatCapacity {
        SpecificHeatCapacity::new::<joule_per_kilogram_kelvin>(self.s_j_kg_k(t.get::<kelvin>()))
    }

    /// Entropy, s(T, p) = s(T, p_0) - (R/M) ln(p/p_0) with p_0 = [`REFERENCE_PRESSURE_PA`].
    #[must_use]
    pub fn entropy(&self, t: ThermodynamicTemperature, p: Pressure) -> SpecificHeatCapacity {
        let fall = self.0.gas_constant_j_kg_k * ln(p.get::<pascal>() / REFERENCE_PRESSURE_PA);
        SpecificHeatCapacity::new::<joule_per_kilogram_kelvin>(self.s_j_kg_k(t.get::<kelvin>()) - fall)
    }

    /// Derivative of [`Self::cp`] by temperature.
    #[must_use]
    pub fn d_cp_dt(&self, t: ThermodynamicTemperature) -> HeatCapacitySlope {
        let slope = self.dcp_dt(t.get::<kelvin>());
        HeatCapacitySlope { dimension: std::marker::PhantomData, units: std::marker::PhantomData, value: slope }
    }

    /// The temperature of an enthalpy; `None` where it would be outside the limits.
    #[must_use]
    pub fn temperature_from_enthalpy(&self, h: AvailableEnergy) -> Option<ThermodynamicTemperature> {
        within(self.t_k_from_h(h.get::<joule_per_kilogram>()))
    }

    /// The temperature of an internal energy; `None` where it would be outside the limits.
    #[must_use]
    pub fn temperature_from_internal_energy(&self, u: AvailableEnergy) -> Option<ThermodynamicTemperature> {
        within(self.t_k_from_u(u.get::<joule_per_kilogram>()))
    }

    /// The temperature of an entropy at [`REFERENCE_PRESSURE_PA`]; `None` where it would be outside the limits.
    #[must_use]
    pub fn temperature_from_entropy(&self, s: SpecificHeatCapacity) -> Option<ThermodynamicTemperature> {
        within(self.t_k_from_s(s.get::<joule_per_kilogram_kelvin>()))
    }
}

/// The same properties as plain numbers in SI units, for evaluation over and over. Not a number outside the limits.
impl Gas {
    /// Molar mass, kg/mol.
    #[must_use]
    pub fn molar_mass_kg_mol(&self) -> f64 {
        self.0.molar_mass_kg_mol
    }

    /// Specific gas constant, J/(kg K).
    #[must_use]
    pub fn gas_constant_j_kg_k(&self) -> f64 {
        self.0.gas_constant_j_kg_k
    }

    /// Heat capacity at constant pressure, J/(kg K).
    #[must_use]
    pub fn cp_j_kg_k(&self, t_k: f64) -> f64 {
        self.of_caloric(|caloric| caloric.cp(t_k))
    }

    /// Derivative of the heat capacity by temperature, J/(kg K²).
    #[must_use]
    pub fn dcp_dt(&self, t_k: f64) -> f64 {
        self.of_caloric(|caloric| caloric.cp_slope(t_k))
    }

    /// Enthalpy, J/kg.
    #[must_use]
    pub fn h_j_kg(&self, t_k: f64) -> f64 {
        self.of_caloric(|caloric| caloric.enthalpy(t_k))
    }

    /// Entropy at [`REFERENCE_PRESSURE_PA`], J/(kg K).
    #[must_use]
    pub fn s_j_kg_k(&self, t_k: f64) -> f64 {
        self.of_caloric(|caloric| caloric.entropy(t_k))
    }

    /// Temperature of an enthalpy in J/kg, K.
    #[must_use]
    pub fn t_k_from_h(&self, h_j_kg: f64) -> f64 {
        self.of_caloric(|caloric| caloric.temperature(Property::Enthalpy, h_j_kg))
    }

    /// Temperature of an internal energy in J/kg, K.
    #[must_use]
    pub fn t_k_from_u(&self, u_j_kg: f64) -> f64 {
        self.of_caloric(|caloric| caloric.temperature(Property::InternalEnergy, u_j_kg))
    }

    /// Temperature of an entropy at [`REFERENCE_PRESSURE_PA`] in J/(kg K), K.
    #[must_use]
    pub fn t_k_from_s(&self, s_j_kg_k: f64) -> f64 {
        self.of_caloric(|caloric| caloric.temperature(Property::Entropy, s_j_kg_k))
    }

    fn of_caloric(&self, property: impl FnOnce(&Caloric) -> f64) -> f64 {
        self.0.caloric.as_ref().map_or(f64::NAN, property)
    }
}

/// Gases are equal when they consist of the same species in the same mole fractions and order.
impl PartialEq for Gas {
    fn eq(&self, other: &Self) -> bool {
        let pairs = self.components().iter().zip(other.components());
        self.components().len() == other.components().len()
            && pairs.into_iter().all(|(a, b)| a.species.name == b.species.name && a.mole_fraction == b.mole_fraction)
    }
}

impl fmt::Debug for Gas {
    fn fmt(&self, out: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(out, "Gas({})", self.0.title)
    }
}

fn within(t_k: f64) -> Option<ThermodynamicTemperature> {
    t_k.is_finite().then(|| ThermodynamicTemperature::new::<kelvin>(t_k))
}
