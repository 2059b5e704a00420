//! What a quantity can be before anything is known of it: where it is looked for, and how large it usually is.

use crate::gas::humid_air::HUMID_T_K;
use crate::sheet::{GasModel, Kind, Origin, Property, Quantity, Sheet};
use crate::units::Dimension;

/// Where a quantity is looked for when its line gives no bounds, as powers of ten about its usual size.
const DECADES: f64 = 1e12;

/// The highest temperature that is looked at where no model says less, K.
const HOTTEST_K: f64 = 1e5;

/// Whether a quantity cannot be below zero: what a scale, a gauge or a level shows of an amount of matter, an absolute
/// pressure or temperature.
#[must_use]
pub(super) fn cannot_be_negative(quantity: &Quantity) -> bool {
    let dimension = quantity.dimension;
    if dimension == Dimension::PRESSURE || dimension == Dimension::TEMPERATURE {
        return quantity.kind == Kind::Absolute;
    }
    if let Origin::Property(_, property) = quantity.origin {
        return !matches!(property, Property::H | Property::U | Property::S);
    }
    [Dimension::MASS, Dimension::VOLUME, Dimension::DENSITY, Dimension::SPECIFIC_VOLUME, Dimension::AMOUNT, Dimension::MOLAR_MASS]
        .contains(&dimension)
}

/// Whether the positive one of two roots is meant without a word: lengths and areas, which may be negative only as
/// differences, and all that cannot be negative.
#[must_use]
pub(super) fn is_taken_positive(quantity: &Quantity) -> bool {
    cannot_be_negative(quantity) || quantity.dimension == Dimension::LENGTH || quantity.dimension == Dimension::AREA
}

/// The usual size of a quantity in SI, to start from and to scale by.
#[must_use]
pub(super) fn usual_size(quantity: &Quantity) -> f64 {
    let dimension = quantity.dimension;
    if dimension == Dimension::PRESSURE {
        return if quantity.kind == Kind::Difference { 1e4 } else { 1e5 };
    }
    if dimension == Dimension::TEMPERATURE {
        return if quantity.kind == Kind::Difference { 10.0 } else { 300.0 };
    }
    if dimension == Dimension::SPECIFIC_ENERGY {
        return 1e5;
    }
    if dimension == Dimension::SPECIFIC_HEAT_CAPACITY {
        return 1e3;
    }
    let factor = quantity.shown.unit.factor.abs();
    if factor.is_finite() && factor > 0.0 { factor } else { 1.0 }
}

/// The widest range in which a quantity is looked for.
#[must_use]
pub(super) fn widest(sheet: &Sheet, quantity: &Quantity) -> (f64, f64) {
    let size = usual_size(quantity);
    let high = size * DECADES;
    if quantity.dimension == Dimension::TEMPERATURE && quantity.kind != Kind::Difference {
        if let Origin::Property(state, Property::T) = quantity.origin {
            let state = sheet.state(state);
            match &sheet.gas(state.gas).model {
                GasModel::Real(real) => {
                    let range = real.range();
                    return (range.t_limit_low_k, range.t_limit_high_k);
                }
                GasModel::HumidAir(_) => return HUMID_T_K,
                GasModel::Ideal => {}
            }
            if state.properties.iter().any(|(property, _)| property.is_caloric()) {
                let range = sheet.gas(state.gas).gas.caloric_range();
                return (range.limit_low_k.max(1e-3), range.limit_high_k.min(HOTTEST_K));
            }
        }
        return (1e-3, HOTTEST_K);
    }
    if cannot_be_negative(quantity) { (0.0, high) } else { (-high, high) }
}
