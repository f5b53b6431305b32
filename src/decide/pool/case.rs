//! What the list is worked out from: places to be served, and the oils that may serve each.

use super::fence::Fence;
use crate::decide::accept::accepted;
use crate::judge::Verdict;
use crate::judge::order::{self, Candidate as Ordered, compare, quantised};
use crate::model::Site;
use crate::model::machine::Fill;
use crate::model::oil::Price;
use crate::quantity::Measure;
use crate::weighing::{Candidate, Weighed};

/// An oil that may serve a place.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Offer {
    /// Its place in the oil list.
    pub oil: usize,
    /// Whether it is tight there, or holds.
    pub tight: bool,
    /// Whether taking it changes what is in the place today.
    pub change: bool,
    /// Conditions that ride with it there.
    pub conditions: usize,
    /// What it costs a year there, thousandths of the unit of money; none where not known.
    pub cost: Option<u64>,
}

/// A lubrication point to be served.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Place {
    /// Its fence.
    pub fence: Fence,
    /// Oils that hold or are tight, in the order they would be taken in from a list: the one
    /// proposed first. No oil stands in it twice.
    pub offers: Vec<Offer>,
}

/// What the user asks of the list.
#[derive(Clone, Debug, PartialEq)]
pub struct Terms {
    /// Oils that stay on the list whatever happens.
    pub keep: Vec<usize>,
    /// Oils that may not be on it.
    pub drop: Vec<usize>,
    /// The longest list wanted.
    pub at_most: Option<usize>,
    /// Whether tight verdicts are not taken.
    pub never_tight: bool,
    /// Nodes the search may look at.
    pub nodes: u64,
}

/// Nodes looked at where nobody says otherwise: a count, so that every machine stops at the same
/// place.
pub const NODES: u64 = 2_000_000;

impl Default for Terms {
    fn default() -> Self {
        Self {
            keep: Vec::new(),
            drop: Vec::new(),
            at_most: None,
            never_tight: false,
            nodes: NODES,
        }
    }
}

impl Terms {
    /// What is left of the offers of a place under these terms.
    pub fn offers(&self, place: &Place) -> Vec<Offer> {
        let too_tight = |o: &Offer| self.never_tight && o.tight;
        let allowed = |o: &&Offer| !too_tight(o) && !self.drop.contains(&o.oil);
        place.offers.iter().filter(allowed).copied().collect()
    }
}

/// A place served by an oil of a list.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Pick {
    /// The place, by its number.
    pub place: usize,
    /// The offer taken.
    pub offer: Offer,
}

/// The place a weighed point makes; none where no oil holds or is tight: it cannot be decided.
pub fn place(site: &Site, weighed: &Weighed<'_>, on: &str) -> Option<Place> {
    let serves = |c: &&Candidate| matches!(c.judgement.verdict, Verdict::Holds | Verdict::Tight);
    let mut serving: Vec<&Candidate> = weighed.candidates.iter().filter(serves).collect();
    serving.sort_by(|a, b| compare(&key(site, a), &key(site, b)));
    let offers: Vec<Offer> = serving
        .into_iter()
        .map(|c| Offer {
            oil: c.oil,
            tight: c.judgement.verdict == Verdict::Tight,
            change: !c.in_use,
            conditions: c.conditions.len(),
            cost: yearly(site, weighed, c.oil).map(thousandths),
        })
        .collect();
    let accepted = accepted(site, weighed, on).is_some();
    (!offers.is_empty()).then(|| Place {
        fence: Fence::of(weighed.point),
        offers: in_order(offers, accepted),
    })
}

/// What the order of the candidates goes by; every oil of a list is on the site.
fn key<'s>(site: &'s Site, c: &Candidate) -> Ordered<'s> {
    let oil = &site.oils[c.oil];
    Ordered {
        verdict: c.judgement.verdict,
        in_use: c.in_use,
        on_site: true,
        conditions: c.conditions.len(),
        excess: quantised(&c.judgement),
        price: oil.price.as_ref().map(|p| match p.value {
            Price::PerLitre(x) | Price::PerKilogram(x) => order::thousandths(x),
        }),
        id: &oil.id,
    }
}

/// Offers in the order they would be taken in, from the order of the candidates: what holds
/// before what is tight, of several tight oils the one in use first, and before all the oil in
/// use where its tight verdict is accepted.
pub fn in_order(mut offers: Vec<Offer>, accepted: bool) -> Vec<Offer> {
    // a stable sort: what is equal stays in the order of the candidates
    offers.sort_by_key(|o| (o.change || !accepted, o.tight, o.tight && o.change));
    offers
}

/// Litres of all machines of a point a year; none where nobody states it.
pub fn litres_a_year(weighed: &Weighed<'_>) -> Option<f64> {
    let given = weighed.point.annual_use.as_ref()?.known()?;
    Some(given.value.base() * 1e3 * f64::from(weighed.point.count))
}

/// Litres in all machines of a point; none where not stated, and for grease.
pub fn litres_filled(weighed: &Weighed<'_>) -> Option<f64> {
    match weighed.point.fill.as_ref()?.known()?.value {
        Fill::Oil(volume) => Some(volume.base() * 1e3 * f64::from(weighed.point.count)),
        Fill::Grease(_) => None,
    }
}

/// Price of an oil for a litre; none where it is not stated or stated by weight.
pub fn per_litre(site: &Site, oil: usize) -> Option<f64> {
    match site.oils[oil].price.as_ref()?.value {
        Price::PerLitre(price) => Some(price),
        Price::PerKilogram(_) => None,
    }
}

/// What an oil costs a year on a point.
pub fn yearly(site: &Site, weighed: &Weighed<'_>, oil: usize) -> Option<f64> {
    Some(litres_a_year(weighed)? * per_litre(site, oil)?)
}

fn thousandths(cost: f64) -> u64 {
    #[expect(
        clippy::cast_possible_truncation,
        clippy::cast_sign_loss,
        reason = "sums of money are positive and far below 2^53"
    )]
    let rounded = (cost.max(0.0) * 1e3).round() as u64;
    rounded
}
