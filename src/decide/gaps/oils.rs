//! What is not known of an oil itself: how much it loses to shear, where it stops to pour, its base
//! stock, its density.

use super::effect::Effect;
use super::{Found, Missing, weight_of};
use crate::demand::{End, Gap, GapKind, Standing, is_severe};
use crate::judge::PreparedOil;
use crate::model::Oil;
use crate::model::stated::Bound;
use crate::oil::worn::Worn;
use crate::quantity::convert::celsius;
use crate::quantity::{Amount, Kind, MassDensity, Measure, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;
use crate::source::Origin;
use crate::source::place::Given;
use crate::weighing::{Candidate, Scales, Weighed};

/// The key of an unknown permanent loss.
pub const SHEAR_LOSS: &str = "shear loss";
/// The key of an unstated pour point.
const POUR_POINT: &str = "pour point";
/// The key of an unstated base stock.
const BASE: &str = "base";
/// The key of an unstated density.
const DENSITY: &str = "density";
const DATA_SHEET: &str = "the oil's data sheet";
const SUPPLIER: &str = "the oil's data sheet, or its supplier";
/// Base stocks an oil that does not name its own may well have: those most oils are sold on. What
/// is made on others (glycols, esters, silicones) says so, for it does not mix. Common practice.
const LIKELY: [BaseStock; 4] = [
    BaseStock::MineralI,
    BaseStock::MineralII,
    BaseStock::MineralIII,
    BaseStock::Pao,
];

/// The gaps of the oil a point is told by and of the oil in use.
pub(super) fn found<'a>(
    scales: &Scales<'a>,
    w: &Weighed<'a>,
    lead: Option<&Candidate>,
) -> Vec<Found> {
    let Some(lead) = lead else {
        return Vec::new();
    };
    let mut oils = vec![lead.oil];
    oils.extend(w.in_use().map(|c| c.oil).filter(|o| *o != lead.oil));
    oils.into_iter()
        .flat_map(|oil| {
            let of = Of {
                scales,
                w,
                lead: lead.oil,
                oil,
                ready: &scales.oils[oil],
                described: &scales.site.oils[oil],
            };
            [of.shear(), of.pour(), of.base(), of.density()]
        })
        .flatten()
        .collect()
}

/// One oil on one point.
struct Of<'s, 'a> {
    scales: &'s Scales<'a>,
    w: &'s Weighed<'a>,
    /// The oil the point is told by.
    lead: usize,
    oil: usize,
    ready: &'s PreparedOil,
    described: &'a Oil,
}

impl Of<'_, '_> {
    /// A permanent loss nobody states.
    fn shear(&self) -> Option<Found> {
        let curves = &self.ready.curves;
        if !matches!(curves.worn, Worn::Between { .. }) {
            return None;
        }
        let (lo, hi) = curves.loss_range(is_severe(self.w.point))?;
        let share = |base| Amount {
            kind: Kind::Ratio,
            base,
        };
        let how =
            "supplier: viscosity after a shear test, 20 h in a tapered roller bearing for gears";
        let kind = GapKind::Range(share(lo), share(hi));
        self.tried(SHEAR_LOSS, kind, how, &ends(lo, hi), |loss| {
            let worn = curves.with_loss(loss);
            Some(PreparedOil::of(
                self.described,
                worn,
                self.scales.rules,
                true,
            ))
        })
    }

    /// A pour point nobody states, over the range of its base.
    fn pour(&self) -> Option<Found> {
        let (lo, hi) = self
            .ready
            .pour
            .filter(|(lo, hi)| !self.ready.pour_stated && hi > lo)?;
        let mut list = self.w.demands.middle.list.iter();
        let asked = list.any(|d| d.end == End::PourMargin && d.standing == Standing::Judges);
        if self.ready.grease || !asked {
            return None;
        }
        let at = ThermodynamicTemperature::from_base;
        let kind = GapKind::Range(at(lo).amount(), at(hi).amount());
        self.tried(POUR_POINT, kind, DATA_SHEET, &ends(lo, hi), |t| {
            let mut known = self.described.clone();
            known.pour_point = Some(instead(Bound::Exactly(at(t))));
            let curves = self.ready.curves.clone();
            Some(PreparedOil::of(&known, curves, self.scales.rules, true))
        })
    }

    /// A base stock nobody states: the oil in each of the likely ones.
    fn base(&self) -> Option<Found> {
        if !self.ready.curves.base_assumed || self.ready.grease {
            return None;
        }
        let taken = self.ready.curves.base;
        let others = LIKELY.iter().filter(|b| **b != taken);
        let kind = GapKind::Word {
            taken: taken.word().to_owned(),
            among: others.map(|b| b.word().to_owned()).collect(),
        };
        let places = [0.0, 1.0, 2.0, 3.0];
        self.tried(BASE, kind, SUPPLIER, &places, |place| {
            let mut known = self.described.clone();
            let mut likely = LIKELY.into_iter().zip(places);
            let base = likely.find(|(_, p)| *p >= place)?.0;
            known.base = Some(instead(base));
            PreparedOil::new(&known, self.scales.rules, true).ok()
        })
    }

    /// A density nobody states, over the range of its base.
    fn density(&self) -> Option<Found> {
        let curves = &self.ready.curves;
        if !curves.density.assumed || self.ready.grease {
            return None;
        }
        let range = &self.scales.rules.base_stock(curves.base)?.density15;
        let kind = GapKind::Assumed {
            taken: curves.density.at15.amount(),
            lo: range.lo.amount(),
            hi: range.hi.amount(),
        };
        let ends = ends(range.lo.base(), range.hi.base());
        self.tried(DENSITY, kind, DATA_SHEET, &ends, |rho| {
            let mut known = self.described.clone();
            known.density = Some(instead((MassDensity::from_base(rho), celsius(15.0))));
            PreparedOil::new(&known, self.scales.rules, true).ok()
        })
    }

    /// Weighs the oil in each state among the others; none where a state makes no curve.
    fn tried(
        &self,
        key: &str,
        kind: GapKind,
        how: &'static str,
        values: &[f64],
        state: impl Fn(f64) -> Option<PreparedOil>,
    ) -> Option<Found> {
        let mut effect = Effect::default();
        let now = self.w.in_use().map(|c| c.oil);
        for at in values {
            let closed = self.scales.weigh_with_oil(self.w, self.oil, &state(*at)?);
            effect.take(&closed, self.lead, now, *at);
        }
        Some(Found {
            weight: weight_of(&effect, self.scales.reserve),
            missing: Missing::Input(Gap {
                key: key.to_owned(),
                about: Some(self.described.id.clone()),
                kind,
                ask: None,
                how,
                origin: None,
            }),
            effect: Some(effect),
            waits: None,
            of_lead: self.lead == self.oil,
        })
    }
}

/// Both ends of a range and its middle.
fn ends(lo: f64, hi: f64) -> [f64; 3] {
    [lo, f64::midpoint(lo, hi), hi]
}

fn instead<T>(value: T) -> Given<T> {
    Given::new(
        value,
        "",
        Origin::assumed("tried in place of what nobody states"),
    )
}
