//! What a polymer-thickened oil is made of: stated, or split by assumption into the ends of a range.

use super::curve::Curve;
use super::shape::window;
use crate::model::Oil;
use crate::model::rulebook::Rulebook;
use crate::model::stated::Between;
use crate::quantity::convert::{celsius, number};
use crate::quantity::{KinematicViscosity, Measure, Ratio, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::polymer::{Level, PolymerError, ThickenedOil, Thickening, split};
use crate::relation::oil::viscosity_temperature::{Line, Point, ViscosityCurve};

/// Base oil and polymer of an oil.
#[derive(Clone, Debug, PartialEq)]
pub enum Makeup {
    /// No polymer, as far as anybody says.
    Plain,
    /// Base oil stated beside the finished one.
    Stated(ThickenedOil),
    /// Split by assumption.
    Estimated(Box<Estimate>),
    /// Thickened, but no base oil that may be assumed gives it.
    Unknown,
}

/// The ends of what a finished oil may be made of.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Estimate {
    /// The thinner base oil, with more polymer.
    pub thin: Assumed,
    /// The thicker base oil, with less polymer.
    pub thick: Assumed,
}

/// A finished oil as one assumption makes it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Assumed {
    /// The oil.
    pub oil: ThickenedOil,
    /// Viscosity index assumed for the base.
    pub base_index: Ratio,
    /// Share at 40 °C over share at 100 °C assumed for the polymer.
    pub share_ratio: Ratio,
    /// Whether the sheared viscosity bounds the base oil, not the assumption.
    pub bounded: bool,
}

impl Makeup {
    /// The oil by base and polymer: one where they are stated, both ends where they are
    /// estimated, the thinner base first.
    pub fn oils(&self) -> Vec<ThickenedOil> {
        match self {
            Self::Stated(oil) => vec![*oil],
            Self::Estimated(ends) => vec![ends.thin.oil, ends.thick.oil],
            Self::Plain | Self::Unknown => Vec::new(),
        }
    }

    /// Least and greatest share of the viscosity at 100 °C that the polymer carries.
    pub fn carried_at_100(&self) -> Option<(f64, f64)> {
        let carried = |oil: &ThickenedOil| {
            let p = oil.share_at(celsius(100.0)).base();
            p / (1.0 + p)
        };
        let all: Vec<f64> = self.oils().iter().map(carried).collect();
        let least = all.iter().copied().min_by(f64::total_cmp)?;
        Some((least, all.iter().copied().max_by(f64::total_cmp)?))
    }
}

/// Range of the ratio of shares: of the polymer named, else of all kinds.
fn share_ratio(oil: &Oil, rules: &Rulebook) -> Option<Between<Ratio>> {
    let named = oil.formulation.as_ref().and_then(|f| f.polymer.as_ref());
    if let Some(kind) = named.and_then(|p| rules.polymer(&p.value)) {
        return Some(kind.share_ratio);
    }
    let all = || rules.polymers.iter().map(|p| p.share_ratio);
    let lo = all()
        .map(|r| r.lo)
        .min_by(|a, b| a.base().total_cmp(&b.base()))?;
    let hi = all()
        .map(|r| r.hi)
        .max_by(|a, b| a.base().total_cmp(&b.base()))?;
    Some(Between { lo, hi })
}

/// Splits a finished oil at the corners of what may be assumed. `sheared` are the viscosities at
/// 40 and 100 °C after a test, where known: the base oil is no thicker than they are.
pub(super) fn estimate(
    oil: &Oil,
    new: &Curve,
    base: BaseStock,
    rules: &Rulebook,
    sheared: Option<(KinematicViscosity, KinematicViscosity)>,
) -> Makeup {
    let (nu40, nu100) = (new.nu_at(celsius(40.0)), new.nu_at(celsius(100.0)));
    let Some(ratios) = share_ratio(oil, rules) else {
        return Makeup::Unknown;
    };
    let (low, high) = rules.vi_range(base);
    let mut ends: Vec<Assumed> = Vec::new();
    for index in [low, high] {
        for ratio in [ratios.lo, ratios.hi] {
            ends.extend(corner((nu40, nu100), (number(index), ratio), sheared));
        }
    }
    let at100 = |a: &Assumed| a.oil.base().nu100().base();
    ends.sort_by(|a, b| at100(a).total_cmp(&at100(b)));
    match (ends.first(), ends.last()) {
        (Some(thin), Some(thick)) => Makeup::Estimated(Box::new(Estimate {
            thin: *thin,
            thick: *thick,
        })),
        _ => Makeup::Unknown,
    }
}

/// One corner; `None` where no base of that index gives the oil.
fn corner(
    (nu40, nu100): (KinematicViscosity, KinematicViscosity),
    (base_index, share_ratio): (Ratio, Ratio),
    sheared: Option<(KinematicViscosity, KinematicViscosity)>,
) -> Option<Assumed> {
    let (mut base40, mut base100) = match split(nu40, nu100, base_index, share_ratio) {
        Ok(split) => (split.base_nu40, split.base_nu100),
        // a base as good as the finished oil: no polymer at all at this corner
        Err(PolymerError::NoPolymer { .. }) => (nu40, nu100),
        Err(_) => return None,
    };
    let mut bounded = false;
    if let Some((s40, s100)) = sheared
        && (base40 > s40 || base100 > s100)
    {
        bounded = true;
        base40 = if base40 > s40 { s40 } else { base40 };
        base100 = if base100 > s100 { s100 } else { base100 };
    }
    let point = |t: f64, nu| Point::new(celsius(t), nu);
    let line = Line::through(point(40.0, base40), point(100.0, base100)).ok()?;
    let oil = finished_of(line, (nu40, nu100))?;
    Some(Assumed {
        oil,
        base_index,
        share_ratio,
        bounded,
    })
}

/// The oil of a base line that has these viscosities at 40 and 100 °C.
fn finished_of(
    base: Line,
    (nu40, nu100): (KinematicViscosity, KinematicViscosity),
) -> Option<ThickenedOil> {
    let level = |nu: KinematicViscosity, at: ThermodynamicTemperature| {
        // rounding may leave the base a hair above the oil at a corner without polymer
        let p = (nu.base() / base.nu_at(at).base() - 1.0).max(0.0);
        Level { p: number(p), at }
    };
    let shares = Thickening::through(
        window(),
        level(nu40, celsius(40.0)),
        level(nu100, celsius(100.0)),
    );
    shares.ok().map(|shares| ThickenedOil::new(base, shares))
}
