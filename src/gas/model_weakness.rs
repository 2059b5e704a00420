//! Where models for mixtures disagree, so that a finding can say that the result is weak.

use super::ideal_gas::Gas;
use super::real_gas::{ModelKind, RealGas};

/// Why the model of a mixture is weak, and how far two models are apart.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub struct Weakness {
    /// The component that it is about.
    pub component: &'static str,
    /// What is weak, one sentence without full stop.
    pub text: &'static str,
    /// Largest relative difference in density between GERG-2008 and the multi-fluid model with other binary parameters, up to 30 MPa, from
    /// mixtures like this one; `None` where it is not known.
    pub spread: Option<f64>,
    /// Where the spread comes from.
    pub source: &'static str,
}

/// Share from which helium counts: natural gases hold less, and there both models agree.
const HELIUM: f64 = 0.01;

/// Share from which water counts.
const WATER: f64 = 0.005;

/// Share of hydrocarbons from propane up from which a vapour of them counts.
const HEAVY: f64 = 0.5;

const SPREAD_SOURCE: &str =
    "GERG-2008 against the multi-fluid model of CoolProp 8.0.0 with the binary parameters of Gernert 2013 and Tkaczuk et al. 2020";

/// What is weak about the model of a gas, the worst first; nothing for pure gases and ordinary mixtures.
#[must_use]
pub fn weaknesses(gas: &Gas, real: &RealGas) -> Vec<Weakness> {
    let mut out = Vec::new();
    let share = |name: &str| gas.components().iter().filter(|one| one.species.name == name).map(|one| one.mole_fraction).sum::<f64>();
    if real.kind() == ModelKind::PengRobinson {
        let lacking = gas.components().first().map_or("", |one| one.species.name);
        out.push(Weakness {
            component: lacking,
            text: "the Peng-Robinson equation without interaction parameters stands in for a better model",
            spread: None,
            source: super::eos::peng_robinson::PENG_ROBINSON_SOURCE,
        });
    }
    if gas.components().len() < 2 {
        return out;
    }
    let helium = share("helium");
    if (HELIUM..=1.0 - HELIUM).contains(&helium) {
        let with_argon = share("argon") > 0.0;
        out.push(Weakness {
            component: "helium",
            text: "models of helium mixtures disagree: there is no agreed reference to better than a few percent at cylinder pressure",
            spread: Some(if with_argon { 0.049 } else { 0.012 }),
            source: SPREAD_SOURCE,
        });
    }
    if share("water") >= WATER {
        out.push(Weakness {
            component: "water",
            text: "models of wet gas disagree, and its water is judged by partial pressure alone",
            spread: Some(0.006),
            source: SPREAD_SOURCE,
        });
    }
    let heavy = ["propane", "isobutane", "n-butane", "isopentane", "n-pentane", "n-hexane"].into_iter().map(share).sum::<f64>();
    if heavy >= HEAVY {
        out.push(Weakness {
            component: "propane",
            text: "models of the vapour of liquefied petroleum gas disagree near its dew point",
            spread: Some(0.0027),
            source: SPREAD_SOURCE,
        });
    }
    if share("argon") > 0.5 && share("carbon dioxide") > 0.01 {
        out.push(Weakness {
            component: "argon",
            text: "models of argon with carbon dioxide disagree",
            spread: Some(0.0046),
            source: SPREAD_SOURCE,
        });
    }
    if share("hydrogen") + share("carbon monoxide") > 0.3 && share("hydrogen") > 0.05 && share("carbon monoxide") > 0.05 {
        out.push(Weakness { component: "hydrogen", text: "models of synthesis gas disagree", spread: Some(0.0024), source: SPREAD_SOURCE });
    }
    out
}
