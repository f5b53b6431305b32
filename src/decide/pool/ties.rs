//! Ties among the shortest lists: every cover of the proven length is gone through, and the one
//! that ties decide for is kept. A part of the search is left out where the least its ties can come
//! to is more than the best so far.

use super::case::Offer;
use super::reduce::{Rows, strictest};
use super::search::{Budget, Search};
use std::collections::BTreeSet;
use std::ops::Add;

/// What ties are decided by, in this order; then by name. Of two lists the one whose cost is known
/// on more places comes first: an unknown cost is not a low one.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord)]
pub struct Ties {
    /// Places whose oil changes.
    pub changes: usize,
    /// Conditions that ride with the oils taken: what the changes ask of those who make them.
    pub conditions: usize,
    /// Places whose cost is not known.
    pub unpriced: usize,
    /// Cost a year, thousandths.
    pub cost: u64,
}

/// What the search for the best of the shortest lists goes by.
pub struct Wanted<'w> {
    /// Offers of each place, in the order they would be taken in.
    pub offers: &'w [Vec<Offer>],
    /// Oils that are on the list already.
    pub keep: &'w BTreeSet<usize>,
    /// Place of each oil in the order of names.
    pub rank: &'w [usize],
    /// Length of the list, kept oils included.
    pub length: usize,
}

/// The best list found.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Best {
    /// Its oils.
    pub list: BTreeSet<usize>,
    /// What it comes to.
    pub ties: Ties,
    /// Whether every list of that length was looked at.
    pub all: bool,
}

/// The best of all lists of the wanted length; `None` where there is none, or the nodes ran out
/// before one was found.
pub fn best(wanted: &Wanted<'_>, budget: &mut Budget) -> Option<Best> {
    let serving = |offers: &Vec<Offer>| offers.iter().map(|o| o.oil).collect::<BTreeSet<_>>();
    let rows: Rows = wanted
        .offers
        .iter()
        .map(serving)
        .filter(|row| row.is_disjoint(wanted.keep))
        .collect();
    let mut search = Search::new(strictest(rows));
    let oils = wanted.rank.len();
    search.out.resize(oils, false);
    search.serves.resize(oils, 0);
    let mut tying = Tying {
        wanted,
        search,
        on: vec![false; oils],
        best: None,
        all: true,
    };
    for oil in wanted.keep {
        tying.on[*oil] = true;
    }
    let left: Vec<usize> = (0..tying.search.rows.len()).collect();
    let room = wanted.length.checked_sub(wanted.keep.len())?;
    tying.descend(&left, room, budget);
    let all = tying.all;
    tying.best.map(|(ties, names)| Best {
        list: list_of(&names, wanted.rank),
        ties,
        all,
    })
}

fn list_of(names: &[usize], rank: &[usize]) -> BTreeSet<usize> {
    (0..rank.len())
        .filter(|oil| names.binary_search(&rank[*oil]).is_ok())
        .collect()
}

struct Tying<'w, 's> {
    wanted: &'s Wanted<'w>,
    search: Search,
    on: Vec<bool>,
    /// Ties and ranks of names of the best so far.
    best: Option<(Ties, Vec<usize>)>,
    all: bool,
}

impl Add for Ties {
    type Output = Self;

    fn add(self, other: Self) -> Self {
        Self {
            changes: self.changes + other.changes,
            conditions: self.conditions + other.conditions,
            unpriced: self.unpriced + other.unpriced,
            cost: self.cost + other.cost,
        }
    }
}

impl Tying<'_, '_> {
    fn descend(&mut self, left: &[usize], room: usize, budget: &mut Budget) {
        if !budget.spend() {
            self.all = false;
            return;
        }
        if self.search.bound(left) > room && !left.is_empty() {
            return;
        }
        let least = self.least();
        if self.best.as_ref().is_some_and(|(ties, _)| least > *ties) {
            return;
        }
        if left.is_empty() {
            // nothing is left to be decided: what is not on the list is not taken
            self.consider();
            return;
        }
        let row = self.search.narrowest(left);
        let mut oils: Vec<usize> = self.search.open(row).collect();
        oils.sort_by_key(|o| self.wanted.rank[*o]);
        let mut tried = Vec::new();
        for oil in oils {
            let rest: Vec<usize> = left
                .iter()
                .copied()
                .filter(|r| !self.search.rows[*r].contains(&oil))
                .collect();
            self.on[oil] = true;
            if room > 0 {
                self.descend(&rest, room - 1, budget);
            }
            self.on[oil] = false;
            self.search.out[oil] = true;
            tried.push(oil);
        }
        for oil in tried {
            self.search.out[oil] = false;
        }
    }

    /// The least the ties can come to with what is on the list and what is left out. Of a place
    /// only offers before and including its first on the list can still be taken.
    fn least(&self) -> Ties {
        let mut least = Ties::default();
        for offers in self.wanted.offers {
            let (mut change, mut unpriced, mut cost) = (true, true, u64::MAX);
            let mut conditions = usize::MAX;
            for offer in offers {
                if self.search.out[offer.oil] && !self.on[offer.oil] {
                    continue;
                }
                change &= offer.change;
                conditions = conditions.min(offer.conditions);
                unpriced &= offer.cost.is_none();
                cost = cost.min(offer.cost.unwrap_or(0));
                if self.on[offer.oil] {
                    break;
                }
            }
            least.changes += usize::from(change);
            least.conditions += if conditions == usize::MAX {
                0
            } else {
                conditions
            };
            least.unpriced += usize::from(unpriced);
            least.cost += if cost == u64::MAX { 0 } else { cost };
        }
        least
    }

    fn consider(&mut self) {
        let ties = ties(self.wanted.offers, |oil| self.on[oil]);
        let mut names: Vec<usize> = (0..self.on.len())
            .filter(|o| self.on[*o])
            .map(|o| self.wanted.rank[o])
            .collect();
        names.sort_unstable();
        let better = self
            .best
            .as_ref()
            .is_none_or(|(t, n)| (ties, &names) < (*t, n));
        if better {
            self.best = Some((ties, names));
        }
    }
}

/// What a list comes to: each place takes the first of its offers that is on it.
pub fn ties(offers: &[Vec<Offer>], on: impl Fn(usize) -> bool) -> Ties {
    let mut sum = Ties::default();
    for offer in offers.iter().filter_map(|o| o.iter().find(|o| on(o.oil))) {
        sum.changes += usize::from(offer.change);
        sum.conditions += offer.conditions;
        sum.unpriced += usize::from(offer.cost.is_none());
        sum.cost += offer.cost.unwrap_or(0);
    }
    sum
}
