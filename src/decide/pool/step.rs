//! The list one shorter and one longer: what each costs and gains.

use super::case::{Offer, Pick, Place, Terms};
use super::solve::{Solved, Stock, pick};
use super::ties::{Ties, ties};

/// A list one step from the shortest.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Step {
    /// The oil left out or added.
    pub stock: Stock,
    /// What serves each place that is still served, in the order of the places.
    pub picks: Vec<Pick>,
    /// Places without an oil.
    pub unserved: Vec<usize>,
    /// What changes and costs come to.
    pub ties: Ties,
}

impl Step {
    /// Places whose oil is tight.
    pub fn tight(&self) -> usize {
        self.picks.iter().filter(|p| p.offer.tight).count()
    }
}

/// The list without the oil that is missed least: fewest places left without one, then fewest
/// tight, then as ties go. An oil to be kept stays. None where there is nothing to leave out.
pub fn shorter(places: &[Place], solved: &Solved, terms: &Terms) -> Option<Step> {
    let free = |s: &&Stock| !terms.keep.contains(&s.oil);
    solved
        .stocks
        .iter()
        .filter(free)
        .map(|out| {
            let list = solved.stocks.iter().copied().filter(|s| s != out).collect();
            taken(places, list, *out, terms)
        })
        .min_by_key(|s| (s.unserved.len(), s.tight(), s.ties, s.stock))
}

/// The list with the oil that gains most: fewest tight, then as ties go. None where none does.
pub fn longer(places: &[Place], solved: &Solved, terms: &Terms) -> Option<Step> {
    let mut others: Vec<Stock> = places
        .iter()
        .flat_map(|p| terms.offers(p).into_iter().map(|o| (p.fence, o.oil)))
        .map(|(fence, oil)| Stock { fence, oil })
        .filter(|s| !solved.stocks.contains(s))
        .collect();
    others.sort_unstable();
    others.dedup();
    let tight = solved.picks.iter().filter(|p| p.offer.tight).count();
    others
        .into_iter()
        .map(|added| {
            let mut list = solved.stocks.clone();
            list.push(added);
            taken(places, list, added, terms)
        })
        .filter(|s| (s.tight(), s.ties) < (tight, solved.ties))
        .min_by_key(|s| (s.tight(), s.ties, s.stock))
}

fn taken(places: &[Place], list: Vec<Stock>, stock: Stock, terms: &Terms) -> Step {
    let offers: Vec<Vec<Offer>> = places
        .iter()
        .map(|p| {
            let here = |o: &Offer| {
                list.contains(&Stock {
                    fence: p.fence,
                    oil: o.oil,
                })
            };
            terms.offers(p).into_iter().filter(here).collect()
        })
        .collect();
    let picks: Vec<Pick> = offers
        .iter()
        .enumerate()
        .filter_map(|(i, o)| pick(i, o, |_| true))
        .collect();
    let unserved = (0..places.len())
        .filter(|i| offers[*i].is_empty())
        .collect();
    Step {
        stock,
        picks,
        unserved,
        ties: ties(&offers, |_| true),
    }
}
