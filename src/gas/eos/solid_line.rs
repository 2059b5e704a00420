//! Where a gas is solid: above its sublimation pressure below the triple point, above its melting pressure above it.

use crate::gas::table::{number, rows};
use crate::units::math::{exp, pow};

/// Melting and sublimation pressures; columns and sources in `data/EQUATIONS.md`.
const TABLE: &str = include_str!("../data/solid_lines.csv");

const COLUMNS: [&str; 12] = ["name", "line", "form", "t_low_k", "t_high_k", "t_0_k", "p_0_pa", "a1", "a2", "a3", "exponents", "source"];

#[derive(Clone, Copy, Debug, PartialEq)]
enum Form {
    /// p = p0 + a1 ((T/T0)^t1 - 1).
    Simon,
    /// p = p0 (1 + Σ a ((T/T0)^t - 1)).
    Ratio,
    /// p = p0 (1 + Σ a (T/T0 - 1)^t).
    Distance,
    /// ln(p/p0) = (T0/T) Σ a (T/T0)^t.
    Sublimation,
    /// ln(p/p0) = (T0/T) Σ a (1 - T/T0)^t.
    SublimationDistance,
}

#[derive(Clone, Debug)]
struct Piece {
    is_melting: bool,
    form: Form,
    t_low_k: f64,
    t_high_k: f64,
    t_0_k: f64,
    p_0_pa: f64,
    terms: Vec<(f64, f64)>,
    source: &'static str,
}

/// The border of the solid of one gas, where it is known.
///
/// Equation: Simon and Glatzel's or a polynomial form, as the source gives it; see the table.
/// Valid:    the temperatures of each piece; outside them nothing is known.
/// Source:   the last column of the table.
#[derive(Clone, Debug, Default)]
pub(crate) struct SolidLine(Vec<Piece>);

impl SolidLine {
    pub(crate) fn of(name: &str) -> Self {
        let pieces = rows(TABLE, COLUMNS).filter(|row| row[0] == name).filter_map(|row| {
            let form = match row[2] {
                "simon" => Form::Simon,
                "ratio" => Form::Ratio,
                "distance" => Form::Distance,
                "sublimation" => Form::Sublimation,
                "sublimation-distance" => Form::SublimationDistance,
                _ => return None,
            };
            let factors = row[7..10].iter().filter_map(|field| number(field));
            let exponents = row[10].split(';').filter_map(number);
            Some(Piece {
                is_melting: row[1] == "melting",
                form,
                t_low_k: number(row[3])?,
                t_high_k: number(row[4])?,
                t_0_k: number(row[5])?,
                p_0_pa: number(row[6])?,
                terms: factors.zip(exponents).collect(),
                source: row[11],
            })
        });
        Self(pieces.collect())
    }

    /// Pressure of the border at a temperature, Pa, with its source: of melting above the triple point, of sublimation below.
    fn border(&self, t_k: f64, melting: bool) -> Option<(f64, &'static str)> {
        let piece = self.0.iter().find(|piece| piece.is_melting == melting && t_k >= piece.t_low_k && t_k <= piece.t_high_k)?;
        let x = t_k / piece.t_0_k;
        let sum = |of: &dyn Fn(f64) -> f64| piece.terms.iter().map(|(a, t)| a * of(*t)).sum::<f64>();
        let p_pa = match piece.form {
            Form::Simon => piece.p_0_pa + sum(&|t| pow(x, t) - 1.0),
            Form::Ratio => piece.p_0_pa * (1.0 + sum(&|t| pow(x, t) - 1.0)),
            Form::Distance => piece.p_0_pa * (1.0 + sum(&|t| pow(x - 1.0, t))),
            Form::Sublimation => piece.p_0_pa * exp(sum(&|t| pow(x, t)) / x),
            Form::SublimationDistance => piece.p_0_pa * exp(sum(&|t| pow(1.0 - x, t)) / x),
        };
        Some((p_pa, piece.source))
    }

    /// Melting pressure, Pa.
    pub(crate) fn melting_pa(&self, t_k: f64) -> Option<f64> {
        self.border(t_k, true).map(|(p, _)| p)
    }

    /// Sublimation pressure, Pa.
    pub(crate) fn sublimation_pa(&self, t_k: f64) -> Option<f64> {
        self.border(t_k, false).map(|(p, _)| p)
    }

    /// Source of the sublimation pressure.
    pub(crate) fn sublimation_source(&self) -> Option<&'static str> {
        self.0.iter().find(|piece| !piece.is_melting).map(|piece| piece.source)
    }
}
