//! Permanent shear of polymer-thickened oils.
//!
//! A stability index belongs to a polymer and to a test: values of different tests are not
//! interchangeable. Severity rises from the sonic test and 30 cycles of the injector over 90
//! cycles to 20 h in the tapered roller bearing (from memory).

use crate::quantity::convert::number;
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{KinematicViscosity, Measure, Ratio};
use crate::relation::Law;

/// Stability index.
pub static PSSI: Law = Law {
    name: "shear-stability-index",
    title: "Permanent shear stability index",
    formula: "PSSI = (nu_new - nu_sheared) / (nu_new - nu_base), at 100 degC",
    range: "polymer-thickened oil; base is the same oil without the polymer",
    source: "ASTM D6022",
};

/// Share of viscosity lost.
pub static LOSS: Law = Law {
    name: "shear-loss",
    title: "Permanent viscosity loss",
    formula: "PVL = (nu_new - nu_sheared) / nu_new, at 100 degC",
    range: "any oil",
    source: "ASTM D6022",
};

/// Thickening by the polymer.
pub static THICKENING: Law = Law {
    name: "polymer-thickening",
    title: "Share by which the polymer thickens the base oil",
    formula: "P = nu / nu_base - 1",
    range: "polymer-thickened oil, both at one temperature",
    source: "definition",
};

/// Viscosity after shear.
pub static SHEARED: Law = Law {
    name: "shear-from-pssi",
    title: "Viscosity after permanent shear",
    formula: "nu_sheared = nu_base (1 + P (1 - PSSI)), P = nu_new / nu_base - 1",
    range: "polymer-thickened oil, stability index of the test meant",
    source: "ASTM D6022, solved for the sheared viscosity",
};

/// The same share lost at every temperature.
pub static UNIFORM: Law = Law {
    name: "shear-uniform-loss",
    title: "Viscosity after permanent shear, the same share lost at every temperature",
    formula: "nu_sheared = nu (1 - PVL)",
    range: "until base oil and polymer are known; holds to first order",
    source: "common practice",
};

/// Why no shear figure follows.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum ShearError {
    /// No polymer in it.
    #[error("the base oil at {} is not thinner than the finished oil at {}: no polymer to shear",
        shown(*base), shown(*new))]
    NoPolymer {
        /// The finished oil.
        new: KinematicViscosity,
        /// The base oil.
        base: KinematicViscosity,
    },
    /// Thicker after the test.
    #[error("the sheared viscosity {} is above the new one, {}", shown(*sheared), shown(*new))]
    Thicker {
        /// The finished oil.
        new: KinematicViscosity,
        /// After the test.
        sheared: KinematicViscosity,
    },
    /// Thinner than its own base oil.
    #[error("the sheared viscosity {} is below that of the base oil, {}: that is not shear of \
        the polymer alone", shown(*sheared), shown(*base))]
    BelowBase {
        /// After the test.
        sheared: KinematicViscosity,
        /// The base oil.
        base: KinematicViscosity,
    },
    /// An index that is no share.
    #[error("a stability index is between 0 and 100 %, this is {:.0} %", 100.0 * .0)]
    Index(f64),
}

fn shown(nu: KinematicViscosity) -> String {
    quantity(nu.amount(), Units::Si, Toward::Nearest)
}

/// Permanent shear stability index, a share of the polymer's contribution, all at 100 °C.
///
/// # Errors
/// See [`ShearError`].
pub fn stability_index(
    new: KinematicViscosity,
    sheared: KinematicViscosity,
    base: KinematicViscosity,
) -> Result<Ratio, ShearError> {
    thickening(new, base)?;
    loss(new, sheared)?;
    if sheared < base {
        return Err(ShearError::BelowBase { sheared, base });
    }
    let (new, sheared, base) = (new.base(), sheared.base(), base.base());
    Ok(number((new - sheared) / (new - base)))
}

/// Share of the viscosity lost.
///
/// # Errors
/// [`ShearError::Thicker`].
pub fn loss(new: KinematicViscosity, sheared: KinematicViscosity) -> Result<Ratio, ShearError> {
    if sheared > new {
        return Err(ShearError::Thicker { new, sheared });
    }
    Ok(number(1.0 - sheared.base() / new.base()))
}

/// Share by which the polymer thickens the base oil, `P`.
///
/// # Errors
/// [`ShearError::NoPolymer`].
pub fn thickening(
    finished: KinematicViscosity,
    base: KinematicViscosity,
) -> Result<Ratio, ShearError> {
    if finished <= base {
        let new = finished;
        return Err(ShearError::NoPolymer { new, base });
    }
    Ok(number(finished.base() / base.base() - 1.0))
}

/// Viscosity after shear, from a stability index.
///
/// # Errors
/// See [`ShearError`].
pub fn sheared(
    new: KinematicViscosity,
    base: KinematicViscosity,
    stability_index: Ratio,
) -> Result<KinematicViscosity, ShearError> {
    let p = thickening(new, base)?.base();
    let left = 1.0 - checked_index(stability_index)?;
    Ok(KinematicViscosity::from_base(
        base.base() * (1.0 + p * left),
    ))
}

/// Loss that a stability index means for an oil thickened by `P`: `PVL = PSSI P / (1 + P)`.
///
/// # Errors
/// [`ShearError::Index`].
pub fn loss_of_index(stability_index: Ratio, thickening: Ratio) -> Result<Ratio, ShearError> {
    let p = thickening.base();
    Ok(number(checked_index(stability_index)? * p / (1.0 + p)))
}

/// Stability index that a loss means for an oil thickened by `P`.
///
/// # Errors
/// [`ShearError::Index`] where the loss is more than the polymer's contribution.
pub fn index_of_loss(loss: Ratio, thickening: Ratio) -> Result<Ratio, ShearError> {
    let p = thickening.base();
    let index = loss.base() * (1.0 + p) / p;
    checked_index(number(index)).map(number)
}

pub(super) fn checked_index(index: Ratio) -> Result<f64, ShearError> {
    let value = index.base();
    if (0.0..=1.0).contains(&value) {
        Ok(value)
    } else {
        Err(ShearError::Index(value))
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::mm2_s;

    #[test]
    fn loss_and_index_undo_each_other() {
        let p = thickening(mm2_s(14.0), mm2_s(9.0)).expect("thickened");
        let loss = loss_of_index(number(0.4), p).expect("a share");
        let index = index_of_loss(loss, p).expect("a share");
        assert!((index.base() - 0.4).abs() < 1e-14);
        let sheared = sheared(mm2_s(14.0), mm2_s(9.0), number(0.4)).expect("thickened");
        assert!((sheared.base() / mm2_s(14.0).base() - (1.0 - loss.base())).abs() < 1e-14);
    }

    #[test]
    fn nonsense_is_named() {
        assert!(matches!(
            stability_index(mm2_s(10.0), mm2_s(11.0), mm2_s(8.0)),
            Err(ShearError::Thicker { .. })
        ));
        assert!(matches!(
            stability_index(mm2_s(10.0), mm2_s(7.0), mm2_s(8.0)),
            Err(ShearError::BelowBase { .. })
        ));
        assert!(matches!(
            stability_index(mm2_s(10.0), mm2_s(9.0), mm2_s(10.0)),
            Err(ShearError::NoPolymer { .. })
        ));
        assert!(matches!(
            sheared(mm2_s(10.0), mm2_s(8.0), number(25.0)),
            Err(ShearError::Index(_))
        ));
    }
}
