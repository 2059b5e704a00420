//! Quantities of the trade: what each is called, and in which units it is read and shown.
//!
//! One table serves three: the list that a user asks for, the names of dimensions in messages, and the SI units in which a
//! quantity is shown that has no unit of its own. Of several quantities of one dimension the commonest stands first.

use std::sync::OnceLock;

use super::{Dimension, parse};
use crate::diagnostic::nearest;

/// A quantity of the trade.
#[derive(Clone, Debug, PartialEq)]
pub struct Quantity {
    /// What it is called.
    pub name: &'static str,
    /// Its dimension.
    pub dimension: Dimension,
    /// Its units, those of the SI first.
    pub units: Vec<String>,
}

/// A row of the table.
pub(super) struct Known {
    pub(super) name: &'static str,
    /// Coherent SI unit, as a sheet spells it.
    pub(super) si_unit: &'static str,
    dimension: Dimension,
    /// Units, with blanks between.
    units: &'static str,
}

/// All quantities, in the order of the table.
#[must_use]
pub fn quantities() -> &'static [Quantity] {
    static QUANTITIES: OnceLock<Vec<Quantity>> = OnceLock::new();
    QUANTITIES.get_or_init(|| {
        let quantity = |known: &Known| Quantity {
            name: known.name,
            dimension: known.dimension,
            units: known.units.split_whitespace().map(str::to_owned).collect(),
        };
        TABLE.iter().map(quantity).collect()
    })
}

/// The quantity of a name, or the commonest that is measured in a unit.
///
/// Case does not count, and hyphens and low lines stand for blanks: `Mass-flow` is `mass flow`.
///
/// # Errors
/// The names most like it, best first, where there is neither.
///
/// ```
/// use gaswright::units::find_quantity;
/// assert_eq!(find_quantity("mass-flow").unwrap().name, "mass flow");
/// assert_eq!(find_quantity("kJ/kg").unwrap().name, "specific energy");
/// assert_eq!(find_quantity("presure").unwrap_err()[0], "pressure");
/// ```
pub fn find_quantity(name: &str) -> Result<&'static Quantity, Vec<&'static str>> {
    let plain = plain_name(name.trim());
    let unit = || parse(name).ok().map(|unit| unit.dimension);
    quantities()
        .iter()
        .find(|quantity| plain_name(quantity.name) == plain)
        .or_else(|| {
            let dimension = unit()?;
            quantities().iter().find(|quantity| quantity.dimension == dimension)
        })
        .ok_or_else(|| nearest(&plain, TABLE.iter().map(|known| known.name)))
}

/// A name without what does not count in it.
fn plain_name(name: &str) -> String {
    name.to_lowercase().replace(['-', '_'], " ")
}

/// The commonest quantity of a dimension.
pub(super) fn commonest(dimension: Dimension) -> Option<&'static Known> {
    TABLE.iter().find(|known| known.dimension == dimension)
}

const fn row(name: &'static str, si_unit: &'static str, exponents: [i32; 7], units: &'static str) -> Known {
    Known { name, si_unit, dimension: Dimension::of(exponents), units }
}

/// Exponents: length, mass, time, electric current, temperature, amount of substance, luminous intensity.
const TABLE: &[Known] = &[
    row("pure number", "", [0, 0, 0, 0, 0, 0, 0], "% ppm ppb"),
    row(
        "pressure",
        "Pa",
        [-1, 1, -2, 0, 0, 0, 0],
        "Pa kPa MPa hPa daPa mPa uPa nPa pPa GPa TPa bar mbar ubar dbar kbar N/mm2 kgf/cm2 atm matm uatm torr mtorr mmHg cmHg umHg inHg \
         mmH2O cmH2O mH2O inH2O ftH2O psi ksi psf osi lbf/in2 lbf/ft2 dyn/cm2",
    ),
    row("temperature", "K", [0, 0, 0, 0, 1, 0, 0], "K mK uK kK degC degF degR"),
    row("temperature difference", "K", [0, 0, 0, 0, 1, 0, 0], "K mK degC degF degR"),
    row("length", "m", [1, 0, 0, 0, 0, 0, 0], "m km dm cm mm um nm pm inch ft yd mi nmi mil uinch angstrom"),
    row("area", "m2", [2, 0, 0, 0, 0, 0, 0], "m2 dm2 cm2 mm2 km2 ha in2 ft2 yd2"),
    row(
        "volume",
        "m3",
        [3, 0, 0, 0, 0, 0, 0],
        "m3 dm3 cm3 mm3 L kL hL daL dL cL mL uL nL pL ft3 in3 yd3 gal_us qt_us pt_us floz_us bbl gal_uk qt_uk pt_uk \
         floz_uk",
    ),
    row("permeability of a porous body", "m2", [2, 0, 0, 0, 0, 0, 0], "m2 darcy mdarcy"),
    row("mass", "kg", [0, 1, 0, 0, 0, 0, 0], "kg t g dag mg ug ng pg lb klb oz oz_troy grain slug ton_us ton_uk"),
    row("time", "s", [0, 0, 1, 0, 0, 0, 0], "s min h d week ms us ns ps ks"),
    row("amount of substance", "mol", [0, 0, 0, 0, 0, 1, 0], "mol kmol mmol umol nmol pmol fmol lbmol Nm3 Sm3 scf"),
    row("mass flow", "kg/s", [0, 1, -1, 0, 0, 0, 0], "kg/s kg/min kg/h kg/d t/h t/d g/s g/min g/h mg/s lb/s lb/min lb/h"),
    row(
        "volume flow",
        "m3/s",
        [3, 0, -1, 0, 0, 0, 0],
        "m3/s m3/min m3/h m3/d L/s L/min L/h mL/s mL/min cm3/s cm3/min ft3/s ft3/min ft3/h gal_us/min gal_uk/min bbl/d",
    ),
    row("molar flow", "mol/s", [0, 0, -1, 0, 0, 1, 0], "mol/s mol/min mol/h kmol/s kmol/h mmol/s umol/s lbmol/h Nm3/h Sm3/h scf/min scf/h"),
    row("density", "kg/m3", [-3, 1, 0, 0, 0, 0, 0], "kg/m3 g/m3 mg/m3 g/L kg/L g/cm3 lb/ft3 lb/in3 lb/gal_us"),
    row("specific volume", "m3/kg", [3, -1, 0, 0, 0, 0, 0], "m3/kg L/kg L/g cm3/g ft3/lb"),
    row("molar volume", "m3/mol", [3, 0, 0, 0, 0, -1, 0], "m3/mol m3/kmol L/mol cm3/mol ft3/lbmol"),
    row("molar concentration", "mol/m3", [-3, 0, 0, 0, 0, 1, 0], "mol/m3 kmol/m3 mol/L mmol/L lbmol/ft3"),
    row("molar mass", "kg/mol", [0, 1, 0, 0, 0, -1, 0], "kg/mol g/mol kg/kmol lb/lbmol"),
    row("molality", "mol/kg", [0, -1, 0, 0, 0, 1, 0], "mol/kg mol/g mmol/g kmol/kg lbmol/lb"),
    row("velocity", "m/s", [1, 0, -1, 0, 0, 0, 0], "m/s m/min m/h km/h cm/s mm/s mm/min ft/s ft/min mph knot"),
    row("acceleration", "m/s2", [1, 0, -2, 0, 0, 0, 0], "m/s2 cm/s2 ft/s2"),
    row("force", "N", [1, 1, -2, 0, 0, 0, 0], "N kN MN GN daN cN mN uN nN kgf gf tf lbf klbf ozf kip tonf_us tonf_uk pdl dyn"),
    row(
        "energy",
        "J",
        [2, 1, -2, 0, 0, 0, 0],
        "J kJ MJ GJ TJ PJ EJ mJ uJ nJ pJ Wh kWh MWh GWh TWh mWh cal kcal Mcal Gcal Tcal cal_th kcal_th Btu kBtu MMBtu Btu_th ft.lbf bar.m3 \
         bar.L kgf.m erg eV keV MeV",
    ),
    row("torque", "N.m", [2, 1, -2, 0, 0, 0, 0], "N.m kN.m mN.m kgf.m lbf.ft lbf.inch"),
    row(
        "power",
        "W",
        [2, 1, -3, 0, 0, 0, 0],
        "W kW MW GW TW mW uW nW pW kJ/h kcal/h Btu/h hp hp_metric hp_electric ton_refrigeration VA kVA MVA ft.lbf/s",
    ),
    row("gas throughput", "W", [2, 1, -3, 0, 0, 0, 0], "Pa.m3/s Pa.L/s mbar.L/s torr.L/s bar.cm3/s"),
    row("specific energy", "J/kg", [2, 0, -2, 0, 0, 0, 0], "J/kg kJ/kg MJ/kg J/g kWh/kg kcal/kg Btu/lb ft.lbf/lb"),
    row("molar energy", "J/mol", [2, 1, -2, 0, 0, -1, 0], "J/mol kJ/mol kJ/kmol MJ/kmol kcal/mol Btu/lbmol MJ/Nm3 kWh/Nm3"),
    row("energy per volume", "J/m3", [-1, 1, -2, 0, 0, 0, 0], "J/m3 kJ/m3 MJ/m3 kWh/m3 kcal/m3 Btu/ft3"),
    row("specific heat capacity", "J/(kg.K)", [2, 0, -2, 0, -1, 0, 0], "J/(kg.K) kJ/(kg.K) J/(g.K) kcal/(kg.K) Btu/(lb.degF)"),
    row("specific entropy", "J/(kg.K)", [2, 0, -2, 0, -1, 0, 0], "J/(kg.K) kJ/(kg.K) kcal/(kg.K) Btu/(lb.degR)"),
    row(
        "molar heat capacity",
        "J/(mol.K)",
        [2, 1, -2, 0, -1, -1, 0],
        "J/(mol.K) kJ/(kmol.K) cal/(mol.K) Btu/(lbmol.degF) L.bar/(mol.K) psi.ft3/(lbmol.degR)",
    ),
    row("heat capacity", "J/K", [2, 1, -2, 0, -1, 0, 0], "J/K kJ/K MJ/K kcal/K Btu/degF"),
    row("heat flux", "W/m2", [0, 1, -3, 0, 0, 0, 0], "W/m2 kW/m2 W/cm2 kcal/(h.m2) Btu/(h.ft2)"),
    row("heat transfer coefficient", "W/(m2.K)", [0, 1, -3, 0, -1, 0, 0], "W/(m2.K) kW/(m2.K) kcal/(h.m2.K) Btu/(h.ft2.degF)"),
    row("thermal conductivity", "W/(m.K)", [1, 1, -3, 0, -1, 0, 0], "W/(m.K) mW/(m.K) kcal/(h.m.K) Btu/(h.ft.degF)"),
    row("thermal conductance", "W/K", [2, 1, -3, 0, -1, 0, 0], "W/K kW/K Btu/(h.degF)"),
    row("thermal resistance", "K/W", [-2, -1, 3, 0, 1, 0, 0], "K/W K/kW"),
    row("thermal insulance", "m2.K/W", [0, -1, 3, 0, 1, 0, 0], "m2.K/W h.ft2.degF/Btu"),
    row("thermal expansion coefficient", "1/K", [0, 0, 0, 0, -1, 0, 0], "1/K um/(m.K) 1/degF"),
    row("volumetric heat capacity", "Pa/K", [-1, 1, -2, 0, -1, 0, 0], "J/(m3.K) kJ/(m3.K) Pa/K kPa/K bar/K"),
    row("dynamic viscosity", "Pa.s", [-1, 1, -1, 0, 0, 0, 0], "Pa.s mPa.s uPa.s P cP mP uP reyn kg/(m.s) lb/(ft.s) lb/(ft.h)"),
    row("kinematic viscosity", "m2/s", [2, 0, -1, 0, 0, 0, 0], "m2/s mm2/s cm2/s St cSt ft2/s"),
    row("mass flux", "kg/(m2.s)", [-2, 1, -1, 0, 0, 0, 0], "kg/(m2.s) kg/(m2.h) g/(cm2.s) lb/(ft2.s) lb/(ft2.h)"),
    row("molar flux", "mol/(m2.s)", [-2, 0, -1, 0, 0, 1, 0], "mol/(m2.s) mmol/(m2.s) kmol/(m2.h)"),
    row("mass per area", "kg/m2", [-2, 1, 0, 0, 0, 0, 0], "kg/m2 g/m2 lb/ft2"),
    row("mass per length", "kg/m", [-1, 1, 0, 0, 0, 0, 0], "kg/m g/m lb/ft"),
    row("surface tension", "N/m", [0, 1, -2, 0, 0, 0, 0], "N/m mN/m dyn/cm lbf/ft"),
    row("pressure gradient", "Pa/m", [-2, 1, -2, 0, 0, 0, 0], "Pa/m kPa/m mbar/m bar/km bar/m psi/ft"),
    row("rate of pressure change", "Pa/s", [-1, 1, -3, 0, 0, 0, 0], "Pa/s mbar/s mbar/h bar/min bar/h psi/min psi/h"),
    row("rate of temperature change", "K/s", [0, 0, -1, 0, 1, 0, 0], "K/s K/min K/h degF/min degF/h"),
    row("temperature gradient", "K/m", [-1, 0, 0, 0, 1, 0, 0], "K/m K/km"),
    row("Joule-Thomson coefficient", "K/Pa", [1, -1, 2, 0, 1, 0, 0], "K/Pa K/MPa K/bar degF/psi"),
    row("compressibility", "1/Pa", [1, -1, 2, 0, 0, 0, 0], "1/Pa 1/kPa 1/MPa 1/bar 1/psi"),
    row("mass flow per pressure", "kg/(s.Pa)", [1, 0, 1, 0, 0, 0, 0], "kg/(s.Pa) kg/(s.bar) kg/(h.bar) g/(s.bar)"),
    row("volume flow per pressure", "m3/(s.Pa)", [4, -1, 1, 0, 0, 0, 0], "m3/(s.Pa) m3/(h.bar) L/(min.bar) ft3/(min.psi)"),
    row("mass per energy", "kg/J", [-2, 0, 2, 0, 0, 0, 0], "kg/J kg/kWh kg/MJ g/kWh lb/MMBtu"),
    row("momentum", "kg.m/s", [1, 1, -1, 0, 0, 0, 0], "kg.m/s N.s"),
    row("moment of inertia", "kg.m2", [2, 1, 0, 0, 0, 0, 0], "kg.m2 lb.ft2"),
    row("reciprocal length", "1/m", [-1, 0, 0, 0, 0, 0, 0], "1/m 1/mm 1/cm"),
    row("number density", "1/m3", [-3, 0, 0, 0, 0, 0, 0], "1/m3 1/L 1/cm3"),
    row("frequency", "1/s", [0, 0, -1, 0, 0, 0, 0], "1/s 1/min 1/h 1/d Hz uHz mHz kHz MHz GHz THz rpm"),
    row("angular velocity", "1/s", [0, 0, -1, 0, 0, 0, 0], "rad/s deg/s"),
    row("radioactivity", "1/s", [0, 0, -1, 0, 0, 0, 0], "Bq kBq MBq GBq TBq Ci mCi uCi nCi"),
    row("angle", "", [0, 0, 0, 0, 0, 0, 0], "rad mrad urad deg gon arcmin arcsec"),
    row("luminous intensity", "cd", [0, 0, 0, 0, 0, 0, 1], "cd mcd"),
    row("electric current", "A", [0, 0, 0, 1, 0, 0, 0], "A kA mA uA nA pA"),
    row("electric charge", "A.s", [0, 0, 1, 1, 0, 0, 0], "A.s Ah mAh"),
    row("electric potential", "V", [2, 1, -3, -1, 0, 0, 0], "V MV kV mV uV nV"),
    row("electrical resistance", "Ohm", [2, 1, -3, -2, 0, 0, 0], "Ohm TOhm GOhm MOhm kOhm mOhm uOhm"),
    row("electrical conductance", "S", [-2, -1, 3, 2, 0, 0, 0], "S mS uS nS pS"),
    row("electrical conductivity", "S/m", [-3, -1, 3, 2, 0, 0, 0], "S/m mS/m uS/cm mS/cm"),
    row("inductance", "V.s/A", [2, 1, -2, -2, 0, 0, 0], "V.s/A mH uH nH"),
    row("capacitance", "A.s/V", [-2, -1, 4, 2, 0, 0, 0], "A.s/V mF uF nF pF"),
    row("amount per energy", "mol/J", [-2, -1, 2, 0, 0, 1, 0], "mol/J mol/kWh Nm3/kWh Sm3/kWh"),
    row("reciprocal amount", "1/mol", [0, 0, 0, 0, 0, -1, 0], "1/mol 1/kmol"),
];

#[cfg(test)]
mod tests {
    use super::super::registry;
    use super::*;

    #[test]
    fn every_unit_of_a_quantity_has_its_dimension() {
        for quantity in quantities() {
            for name in &quantity.units {
                let unit = parse(name).unwrap_or_else(|error| panic!("{name} of {}: {error:?}", quantity.name));
                assert_eq!(unit.dimension, quantity.dimension, "{name} of {}", quantity.name);
                assert_eq!(unit.name, *name, "{name} of {}", quantity.name);
            }
        }
    }

    #[test]
    fn every_si_unit_is_coherent() {
        for known in TABLE.iter().filter(|known| !known.si_unit.is_empty()) {
            let unit = parse(known.si_unit).unwrap();
            assert_eq!((unit.dimension, unit.factor, unit.offset), (known.dimension, 1.0, 0.0), "{}", known.name);
        }
    }

    #[test]
    fn every_name_of_the_registry_measures_a_quantity() {
        for name in registry().names() {
            assert!(quantities().iter().any(|quantity| quantity.units.iter().any(|unit| unit == name)), "{name} is in no quantity");
        }
    }

    #[test]
    fn quantities_are_many_and_named_once() {
        assert!(quantities().len() >= 30);
        for (idx, known) in TABLE.iter().enumerate() {
            assert!(TABLE[..idx].iter().all(|other| other.name != known.name), "{}", known.name);
        }
    }

    #[test]
    fn quantities_are_found_by_name_and_by_unit() {
        for quantity in quantities() {
            assert_eq!(find_quantity(quantity.name), Ok(quantity));
            assert_eq!(find_quantity(&quantity.name.to_uppercase().replace(' ', "_")), Ok(quantity));
        }
        assert_eq!(find_quantity("psi").unwrap().name, "pressure");
        assert_eq!(find_quantity("kg/(m2.s3)"), Err(vec![]));
        assert!(find_quantity("densty").unwrap_err().contains(&"density"));
    }
}
