//! Depth-first search for covers, with a bound.
//!
//! [`fewest`] deepens step by step: that no list of `k` oils serves is proven before `k + 1` is
//! tried, so the bound is always what has been proven and the first list found is shortest. At
//! each node the least number of oils still needed is bounded from below in two ways: by places
//! with no oil in common, and by giving each place the share `1/most` of an oil, `most` being the
//! most places any of its oils serves; no oil is worth more than one by that.

use super::reduce::{Rows, reduce};
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

    pub(super) fn spend(&mut self) -> bool {
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

pub(super) struct Search {
    pub(super) rows: Vec<Vec<usize>>,
    /// Rows an oil serves, by oil.
    pub(super) serves: Vec<usize>,
    /// Oils left out, by oil.
    pub(super) out: Vec<bool>,
    chosen: Vec<usize>,
}

impl Search {
    pub(super) fn new(rows: Rows) -> Self {
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
    pub(super) fn open(&self, row: usize) -> impl Iterator<Item = usize> + '_ {
        self.rows[row].iter().copied().filter(|o| !self.out[*o])
    }

    /// Least number of oils that serve these rows; more than any list where a row has none left.
    pub(super) fn bound(&self, left: &[usize]) -> usize {
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
    pub(super) fn narrowest(&self, left: &[usize]) -> usize {
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
