//! What is not known of an oil itself: how much it loses to shear, where it stops to pour, its base
//! stock, its density.

use super::effect::Effect;
use super::{Found, Missing, weight_of};
use crate::demand::{End, Gap, GapKind, Standing, is_severe};
use crate::judge::PreparedOil;
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
    let mut all = Vec::new();
    for oil in oils {
        all.extend(shear(scales, w, lead.oil, oil));
        all.extend(pour(scales, w, lead.oil, oil));
        all.extend(base(scales, w, lead.oil, oil));
        all.extend(density(scales, w, lead.oil, oil));
    }
    all
}

fn shear<'a>(scales: &Scales<'a>, w: &Weighed<'a>, lead: usize, oil: usize) -> Option<Found> {
    let ready = &scales.oils[oil];
    if !matches!(ready.curves.worn, Worn::Between { .. }) {
        return None;
    }
    let (lo, hi) = ready.curves.loss_range(is_severe(w.point))?;
    let described = &scales.site.oils[oil];
    let state =
        |loss: f64| PreparedOil::of(described, ready.curves.with_loss(loss), scales.rules, true);
    let gap = gap(
        SHEAR_LOSS,
        &described.id,
        (share(lo), share(hi)),
        "supplier: viscosity after a shear test, 20 h in a tapered roller bearing for gears",
    );
    Some(tried(scales, w, lead, oil, gap, state))
}

fn pour<'a>(scales: &Scales<'a>, w: &Weighed<'a>, lead: usize, oil: usize) -> Option<Found> {
    let ready = &scales.oils[oil];
    let (lo, hi) = ready
        .pour
        .filter(|(lo, hi)| !ready.pour_stated && hi > lo)?;
    let list = &w.demands.middle.list;
    let asked =
        |d: &crate::demand::Demand| d.end == End::PourMargin && d.standing == Standing::Judges;
    if ready.grease || !list.iter().any(asked) {
        return None;
    }
    let described = &scales.site.oils[oil];
    let at = ThermodynamicTemperature::from_base;
    let state = |t: f64| {
        let mut known = described.clone();
        let origin = Origin::assumed("tried over the range of its base");
        known.pour_point = Some(Given::new(Bound::Exactly(at(t)), "", origin));
        PreparedOil::of(&known, ready.curves.clone(), scales.rules, true)
    };
    let gap = gap(
        POUR_POINT,
        &described.id,
        (at(lo).amount(), at(hi).amount()),
        "the oil's data sheet",
    );
    Some(tried(scales, w, lead, oil, gap, state))
}

/// Base stocks an oil that does not name its own may well have: those most oils are sold on. What
/// is made on others (glycols, esters, silicones) says so, for it does not mix. Common practice.
const LIKELY: [BaseStock; 4] = [
    BaseStock::MineralI,
    BaseStock::MineralII,
    BaseStock::MineralIII,
    BaseStock::Pao,
];

/// A base stock nobody states: the oil in each of the likely ones.
fn base<'a>(scales: &Scales<'a>, w: &Weighed<'a>, lead: usize, oil: usize) -> Option<Found> {
    let ready = &scales.oils[oil];
    if !ready.curves.base_assumed || ready.grease {
        return None;
    }
    let described = &scales.site.oils[oil];
    let taken = ready.curves.base;
    let others = LIKELY.into_iter().filter(|b| *b != taken);
    let gap = Gap {
        kind: GapKind::Word {
            taken: taken.word().to_owned(),
            among: others.map(|b| b.word().to_owned()).collect(),
        },
        ..gap(
            BASE,
            &described.id,
            (share(0.0), share(0.0)),
            "the oil's data sheet, or its supplier",
        )
    };
    let mut effect = Effect::default();
    let now = w.in_use().map(|c| c.oil);
    for (i, base) in LIKELY.into_iter().enumerate() {
        let mut known = described.clone();
        let origin = Origin::assumed("tried among the likely ones");
        known.base = Some(Given::new(base, base.word(), origin));
        let state = PreparedOil::new(&known, scales.rules, true).ok()?;
        let closed = scales.weigh_with_oil(w, oil, &state);
        effect.take(&closed, lead, now, i as f64);
    }
    Some(told(scales, gap, effect, lead == oil))
}

/// A density nobody states: the oil at both ends of what its base is like.
fn density<'a>(scales: &Scales<'a>, w: &Weighed<'a>, lead: usize, oil: usize) -> Option<Found> {
    let ready = &scales.oils[oil];
    if !ready.curves.density.assumed || ready.grease {
        return None;
    }
    let described = &scales.site.oils[oil];
    let range = &scales.rules.base_stock(ready.curves.base)?.density15;
    let gap = Gap {
        kind: GapKind::Assumed {
            taken: ready.curves.density.at15.amount(),
            lo: range.lo.amount(),
            hi: range.hi.amount(),
        },
        ..gap(
            DENSITY,
            &described.id,
            (range.lo.amount(), range.hi.amount()),
            "the oil's data sheet",
        )
    };
    let mut effect = Effect::default();
    let now = w.in_use().map(|c| c.oil);
    let (lo, hi) = (range.lo.base(), range.hi.base());
    for at in [lo, f64::midpoint(lo, hi), hi] {
        let mut known = described.clone();
        let origin = Origin::assumed("tried over the range of its base");
        let value = (MassDensity::from_base(at), celsius(15.0));
        known.density = Some(Given::new(value, "", origin));
        let state = PreparedOil::new(&known, scales.rules, true).ok()?;
        let closed = scales.weigh_with_oil(w, oil, &state);
        effect.take(&closed, lead, now, at);
    }
    Some(told(scales, gap, effect, lead == oil))
}

fn share(base: f64) -> Amount {
    Amount {
        kind: Kind::Ratio,
        base,
    }
}

fn told(scales: &Scales<'_>, gap: Gap, effect: Effect, of_lead: bool) -> Found {
    Found {
        weight: weight_of(&effect, scales.reserve),
        missing: Missing::Input(gap),
        effect: Some(effect),
        waits: None,
        of_lead,
    }
}

fn gap(key: &str, oil: &str, (lo, hi): (Amount, Amount), how: &'static str) -> Gap {
    Gap {
        key: key.to_owned(),
        about: Some(oil.to_owned()),
        kind: GapKind::Range(lo, hi),
        ask: None,
        how,
        origin: None,
    }
}

/// Weighs the oil in each state among the others.
fn tried<'a>(
    scales: &Scales<'a>,
    w: &Weighed<'a>,
    lead: usize,
    oil: usize,
    gap: Gap,
    state: impl Fn(f64) -> PreparedOil,
) -> Found {
    let mut effect = Effect::default();
    let now = w.in_use().map(|c| c.oil);
    if let GapKind::Range(lo, hi) = &gap.kind {
        for at in [lo.base, f64::midpoint(lo.base, hi.base), hi.base] {
            let closed = scales.weigh_with_oil(w, oil, &state(at));
            effect.take(&closed, lead, now, at);
        }
    }
    told(scales, gap, effect, lead == oil)
}
