//! What permanent shear leaves of an oil.

use super::curve::Curve;
use super::makeup::Makeup;
use super::shape::plain;
use crate::model::oil::{Oil, OilKind, Shear, ViscosityPoint};
use crate::model::rulebook::Rulebook;
use crate::quantity::convert::{celsius, number};
use crate::quantity::{KinematicViscosity, Measure};
use crate::relation::oil::piecewise;
use crate::relation::oil::polymer::ThickenedOil;
use crate::relation::oil::shear::stability_index;
use crate::relation::oil::viscosity_temperature::{Misfit, ViscosityCurve};

/// What is left after permanent shear.
#[derive(Clone, Debug, PartialEq)]
pub enum Worn {
    /// Nothing is lost: no polymer.
    AsNew,
    /// Known, by points, by a stated loss or by formulation and index.
    Known(Curve),
    /// Lost somewhere between these shares of the viscosity, the same at every temperature;
    /// which machine it runs in decides the upper one.
    Between {
        /// Least loss.
        least: f64,
        /// Greatest loss in engines and hydraulics.
        most_mild: f64,
        /// Greatest loss in gears and rolling bearings.
        most_severe: f64,
    },
}

/// Plausible permanent loss of an unknown polymer in engines and hydraulics, common practice.
pub const PLAUSIBLE_LOSS_MILD: f64 = 0.15;
/// Plausible permanent loss of an unknown polymer in gears and rolling bearings, common practice.
pub const PLAUSIBLE_LOSS_SEVERE: f64 = 0.25;

/// Viscosities at 40 and 100 °C after a test, where points after one are stated.
pub(super) fn measured(oil: &Oil, new: &Curve) -> Option<(KinematicViscosity, KinematicViscosity)> {
    let Some(Shear::Points { points, .. }) = &oil.shear else {
        return None;
    };
    let Ok(Worn::Known(curve)) = worn_points(points, new, None) else {
        return None;
    };
    Some((curve.nu_at(celsius(40.0)), curve.nu_at(celsius(100.0))))
}

/// The worn oil.
///
/// # Errors
/// [`Misfit`] where sheared points make no curve.
pub(super) fn worn(
    oil: &Oil,
    new: &Curve,
    makeup: &Makeup,
    rules: &Rulebook,
) -> Result<Worn, Misfit> {
    let stated = match makeup {
        Makeup::Plain if oil.shear.is_none() => return Ok(Worn::AsNew),
        Makeup::Stated(oil) => Some(*oil),
        _ => None,
    };
    match &oil.shear {
        Some(Shear::Points { points, .. }) => worn_points(points, new, stated),
        Some(Shear::Loss { loss, at, .. }) => {
            let loss = loss.value.base();
            // where base and polymer are known the loss is the polymer's, at its own temperature
            let sheared = stated.and_then(|oil| {
                let p = oil.share_at(*at).base();
                oil.sheared(number(loss * (1.0 + p) / p)).ok()
            });
            Ok(Worn::Known(match sheared {
                Some(oil) => Curve::Thickened(oil),
                None => new.after_loss(loss),
            }))
        }
        Some(Shear::Pssi { pssi, .. }) => Ok(by_index(new, makeup, stated, pssi.value.base())),
        None => Ok(plausible(oil, makeup, rules)),
    }
}

fn worn_points(
    points: &[ViscosityPoint],
    new: &Curve,
    stated: Option<ThickenedOil>,
) -> Result<Worn, Misfit> {
    if let [only] = points {
        let index = stated.and_then(|oil| {
            let base = oil.base().nu_at(only.at);
            let index = stability_index(oil.nu_at(only.at), only.nu.value, base).ok()?;
            oil.sheared(index).ok()
        });
        let kept = only.nu.value.base() / new.nu_at(only.at).base();
        let share = || new.after_loss(1.0 - kept);
        return Ok(Worn::Known(index.map_or_else(share, Curve::Thickened)));
    }
    if let (Some(oil), Some(cold), Some(hot)) = (stated, points.first(), points.last())
        && let Ok(sheared) = oil.sheared_to((cold.at, cold.nu.value), (hot.at, hot.nu.value))
    {
        return Ok(Worn::Known(Curve::Thickened(sheared)));
    }
    let (curve, _) = piecewise::Curve::through(&plain(points, |_| 1.0))?;
    Ok(Worn::Known(Curve::Plain(curve)))
}

/// From a stability index: exactly where the base is stated, else over the range of the split.
fn by_index(new: &Curve, makeup: &Makeup, stated: Option<ThickenedOil>, index: f64) -> Worn {
    if let Some(Ok(sheared)) = stated.map(|oil| oil.sheared(number(index))) {
        return Worn::Known(Curve::Thickened(sheared));
    }
    let (least, most) = match makeup.carried_at_100() {
        Some((least, most)) => (index * least, index * most),
        // no split: the polymer carries between nothing and 60 % of the viscosity at 100 °C
        None => (0.0, index * POLYMER_CARRIES_AT_MOST),
    };
    if most - least < 1e-12 {
        return Worn::Known(new.after_loss(least));
    }
    Worn::Between {
        least,
        most_mild: most,
        most_severe: most,
    }
}

/// Greatest share of the viscosity at 100 °C that a polymer carries, common practice.
const POLYMER_CARRIES_AT_MOST: f64 = 0.6;

/// Nothing is known of the loss: the range of the polymer named, else of the class.
fn plausible(oil: &Oil, makeup: &Makeup, rules: &Rulebook) -> Worn {
    let gear = oil.kind == OilKind::Gear;
    let named = oil.formulation.as_ref().and_then(|f| f.polymer.as_ref());
    let kind = named.and_then(|p| rules.polymer(&p.value));
    let (least, mild, severe) = match (kind, makeup.carried_at_100()) {
        (Some(kind), Some((low, high))) => (
            kind.index_mild.lo.base() * low,
            kind.index_mild.hi.base() * high,
            kind.index_severe.hi.base() * high,
        ),
        _ => (0.0, PLAUSIBLE_LOSS_MILD, PLAUSIBLE_LOSS_SEVERE),
    };
    Worn::Between {
        least,
        most_mild: if gear { severe } else { mild },
        most_severe: severe,
    }
}
