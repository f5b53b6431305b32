//! Depth-first search for covers, with a bound.
//!
//! [`fewest`] deepens step by step: that no list of `k` oils serves is proven before `k + 1` is
//! tried, so the bound is always what has been proven and the first list found is shortest. At
//! each node the least number of oils still needed is bounded from below in two ways: by places
//! with no oil in common, and by giving each place the share `1/most` of an oil, `most` being the
//! most places any of its oils serves; no oil is worth more than one by that.
//!
//! [`best`] goes through every cover of the proven length and keeps the one that ties decide for.

use super::case::Offer;
use super::reduce::{Rows, reduce, strictest};
use std::collections::BTreeSet;

/// Nodes left to look at.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Budget {
    /// How many may be looked at.
    pub limit: u64,
    /// How many have been.
    pub used: u64,
}

impl Budget {
    /// So many nodes.
    pub fn of(limit: u64) -> Self {
        Self { limit, used: 0 }
    }

    fn spend(&mut self) -> bool {
        if self.used >= self.limit {
            return false;
        }
        self.used += 1;
        true
    }
}

/// What is known of the length.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Length {
    /// No list is shorter than this: proven.
    pub bound: usize,
    /// A list; of the length of the bound where that is proven to be reached.
    pub list: BTreeSet<usize>,
}

/// The fewest oils that serve all rows. An empty row has no solution and is to be kept out.
pub fn fewest(rows: Rows, budget: &mut Budget) -> Length {
    let reduced = reduce(rows);
    let known = greedy(&reduced.rows);
    let mut search = Search::new(reduced.rows);
    let whole: Vec<usize> = (0..search.rows.len()).collect();
    let mut k = search.bound(&whole);
    let taken = reduced.taken.len();
    let found = loop {
        if k >= known.len() {
            break known;
        }
        match search.within(&whole, k, budget) {
            Some(true) => break search.chosen.iter().copied().collect(),
            Some(false) => k += 1,
            None => break known,
        }
    };
    let mut list = reduced.taken;
    list.extend(found);
    Length {
        bound: taken + k,
        list,
    }
}

/// A cover by taking the oil that serves most again and again: never shorter than the fewest.
pub fn greedy(rows: &Rows) -> BTreeSet<usize> {
    let mut left: Vec<&BTreeSet<usize>> = rows.iter().collect();
    let mut taken = BTreeSet::new();
    while let Some(first) = left.first() {
        let oils: BTreeSet<usize> = left.iter().flat_map(|r| r.iter().copied()).collect();
        let serves = |oil: usize| left.iter().filter(|r| r.contains(&oil)).count();
        let best = oils
            .into_iter()
            .max_by_key(|oil| (serves(*oil), std::cmp::Reverse(*oil)))
            .or_else(|| first.iter().next().copied());
        let Some(best) = best else {
            break;
        };
        taken.insert(best);
        left.retain(|r| !r.contains(&best));
    }
    taken
}

struct Search {
    rows: Vec<Vec<usize>>,
    /// Rows an oil serves, by oil.
    serves: Vec<usize>,
    out: Vec<bool>,
    chosen: Vec<usize>,
}

impl Search {
    fn new(rows: Rows) -> Self {
        let oils = rows.iter().flatten().max().map_or(0, |most| most + 1);
        let mut serves = vec![0; oils];
        for oil in rows.iter().flatten() {
            serves[*oil] += 1;
        }
        Self {
            rows: rows.into_iter().map(|r| r.into_iter().collect()).collect(),
            serves,
            out: vec![false; oils],
            chosen: Vec::new(),
        }
    }

    /// Oils of a row not left out.
    fn open<'s>(&'s self, row: usize) -> impl Iterator<Item = usize> + 's {
        self.rows[row].iter().copied().filter(|o| !self.out[*o])
    }

    /// Least number of oils that serve these rows; more than any list where a row has none left.
    fn bound(&self, left: &[usize]) -> usize {
        let mut apart = 0;
        let mut touched = vec![false; self.out.len()];
        let mut by_size: Vec<(usize, usize)> =
            left.iter().map(|r| (self.open(*r).count(), *r)).collect();
        by_size.sort_unstable();
        let mut serves = vec![0_usize; self.out.len()];
        for row in left {
            self.open(*row).for_each(|o| serves[o] += 1);
        }
        let mut shares = 0.0;
        for (size, row) in by_size {
            if size == 0 {
                return usize::MAX;
            }
            let most = self.open(row).map(|o| serves[o]).max().unwrap_or(1);
            shares += 1.0 / most as f64;
            if self.open(row).all(|o| !touched[o]) {
                apart += 1;
                self.open(row).for_each(|o| touched[o] = true);
            }
        }
        apart.max(whole(shares))
    }

    /// Whether a cover of at most `most` oils exists; `None` where the nodes ran out.
    fn within(&mut self, left: &[usize], most: usize, budget: &mut Budget) -> Option<bool> {
        if left.is_empty() {
            return Some(true);
        }
        if !budget.spend() {
            return None;
        }
        if self.bound(left) > most {
            return Some(false);
        }
        let row = self.narrowest(left);
        let mut oils: Vec<usize> = self.open(row).collect();
        oils.sort_by_key(|o| (std::cmp::Reverse(self.serves[*o]), *o));
        let mut tried = Vec::new();
        let mut answer = Some(false);
        for oil in oils {
            let rest: Vec<usize> = left
                .iter()
                .copied()
                .filter(|r| !self.rows[*r].contains(&oil))
                .collect();
            self.chosen.push(oil);
            match self.within(&rest, most - 1, budget) {
                Some(false) => {}
                reached => {
                    answer = reached;
                    break;
                }
            }
            self.chosen.pop();
            // lists with this oil have all been looked at
            self.out[oil] = true;
            tried.push(oil);
        }
        for oil in tried {
            self.out[oil] = false;
        }
        answer
    }

    /// The row with the fewest oils left.
    fn narrowest(&self, left: &[usize]) -> usize {
        left.iter()
            .copied()
            .min_by_key(|r| (self.open(*r).count(), *r))
            .unwrap_or(0)
    }
}

/// The least whole number not below a sum of shares; sums carry rounding in the last digits.
fn whole(shares: f64) -> usize {
    #[expect(
        clippy::cast_possible_truncation,
        clippy::cast_sign_loss,
        reason = "a sum of positive shares, at most the number of places"
    )]
    let least = (shares - 1e-9).ceil().max(0.0) as usize;
    least
}

/// What ties are decided by, in this order; then by name.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord)]
pub struct Ties {
    /// Oils that stand on the other side of a fence as well.
    pub shared: usize,
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
    /// Oils that stand on the other side of a fence.
    pub elsewhere: &'w BTreeSet<usize>,
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
        let mut least = Ties {
            shared: self.shared(),
            ..Ties::default()
        };
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

    fn shared(&self) -> usize {
        let elsewhere = self.wanted.elsewhere.iter();
        elsewhere.filter(|o| self.on[**o]).count()
    }

    fn consider(&mut self) {
        let ties = ties(self.wanted.offers, |oil| self.on[oil], self.shared());
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
pub fn ties(offers: &[Vec<Offer>], on: impl Fn(usize) -> bool, shared: usize) -> Ties {
    let mut sum = Ties {
        shared,
        ..Ties::default()
    };
    for offer in offers.iter().filter_map(|o| o.iter().find(|o| on(o.oil))) {
        sum.changes += usize::from(offer.change);
        sum.conditions += offer.conditions;
        sum.unpriced += usize::from(offer.cost.is_none());
        sum.cost += offer.cost.unwrap_or(0);
    }
    sum
}
