//! The shortest list under the terms of the user, fence by fence, part by part.

use super::case::{Offer, Pick, Place, Terms};
use super::fence::Fence;
use super::reduce::{Rows, components};
use super::search::{Budget, fewest, greedy};
use super::ties::{Best, Ties, Wanted, best, ties};
use std::collections::{BTreeMap, BTreeSet};

/// An oil of the list, for the points behind one fence.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub struct Stock {
    /// The fence.
    pub fence: Fence,
    /// The oil, by its place in the oil list.
    pub oil: usize,
}

/// A list solved to its proven optimum.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Solved {
    /// The list, by fence, then by name.
    pub stocks: Vec<Stock>,
    /// What serves each place, in the order of the places.
    pub picks: Vec<Pick>,
    /// No list is shorter: proven, equal to the length of the list.
    pub bound: usize,
    /// Nodes looked at.
    pub nodes: u64,
    /// What ties came to.
    pub ties: Ties,
    /// Whether all lists of that length were compared; otherwise the nodes ran out among ties.
    pub ties_proven: bool,
    /// Length of the list that taking the oil that serves most, again and again, gives.
    pub greedy: usize,
}

/// Why there is no list.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Impossible {
    /// These places have no oil left under the terms.
    Unserved(Vec<usize>),
    /// The shortest list is longer than wanted.
    TooShort {
        /// What was wanted.
        wanted: usize,
        /// The shortest there is: proven.
        shortest: usize,
    },
}

/// What came out.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Outcome {
    /// A list, proven.
    Solved(Solved),
    /// The nodes ran out: no list is shorter than the bound, one of the known length exists.
    Gap {
        /// Proven.
        bound: usize,
        /// Of a list that serves.
        known: usize,
        /// Nodes looked at.
        nodes: u64,
    },
    /// No list keeps the terms.
    Impossible(Impossible),
}

/// Solves. `names`: the ids of all oils, in list order.
pub fn solve(places: &[Place], names: &[&str], terms: &Terms) -> Outcome {
    let offers: Vec<Vec<Offer>> = places.iter().map(|p| terms.offers(p)).collect();
    let unserved: Vec<usize> = (0..places.len())
        .filter(|i| offers[*i].is_empty())
        .collect();
    if !unserved.is_empty() {
        return Outcome::Impossible(Impossible::Unserved(unserved));
    }
    let whole = Whole {
        places,
        offers,
        rank: ranks(names),
        keep: kept(places, terms),
    };
    let mut budget = Budget::of(terms.nodes);
    let mut parts = whole.parts(&mut budget);
    let bound: usize = parts.iter().map(|p| p.bound).sum();
    let known: usize = parts.iter().map(|p| p.known).sum();
    if bound < known {
        return Outcome::Gap {
            bound,
            known,
            nodes: budget.used,
        };
    }
    if let Some(wanted) = terms.at_most.filter(|wanted| *wanted < bound) {
        return Outcome::Impossible(Impossible::TooShort {
            wanted,
            shortest: bound,
        });
    }
    Outcome::Solved(whole.settle(&mut parts, bound, &mut budget))
}

struct Whole<'p> {
    places: &'p [Place],
    offers: Vec<Vec<Offer>>,
    /// Place of each oil in the order of names.
    rank: Vec<usize>,
    keep: BTreeMap<Fence, BTreeSet<usize>>,
}

/// Places of one fence that hang together.
struct Part {
    fence: Fence,
    places: Vec<usize>,
    keep: BTreeSet<usize>,
    bound: usize,
    known: usize,
    /// A list of the known length.
    list: BTreeSet<usize>,
    greedy: usize,
}

impl Whole<'_> {
    /// Parts with their proven lengths, fenced ones first.
    fn parts(&self, budget: &mut Budget) -> Vec<Part> {
        let mut fences: Vec<Fence> = self.places.iter().map(|p| p.fence).collect();
        fences.extend(self.keep.keys());
        fences.sort_unstable_by_key(|f| (!f.stands(), *f));
        fences.dedup();
        let mut parts = Vec::new();
        for fence in fences {
            let here: Vec<usize> = (0..self.places.len())
                .filter(|i| self.places[*i].fence == fence)
                .collect();
            let rows: Rows = here.iter().map(|i| self.row(*i)).collect();
            let mut keep = self.keep.get(&fence).cloned().unwrap_or_default();
            for numbers in components(&rows) {
                let places: Vec<usize> = numbers.iter().map(|n| here[*n]).collect();
                let mine: BTreeSet<usize> = keep
                    .iter()
                    .copied()
                    .filter(|o| numbers.iter().any(|n| rows[*n].contains(o)))
                    .collect();
                keep.retain(|o| !mine.contains(o));
                parts.push(self.part(fence, places, mine, budget));
            }
            if !keep.is_empty() {
                // kept though they serve nothing here
                parts.push(self.part(fence, Vec::new(), keep, budget));
            }
        }
        parts
    }

    fn row(&self, place: usize) -> BTreeSet<usize> {
        self.offers[place].iter().map(|o| o.oil).collect()
    }

    fn part(
        &self,
        fence: Fence,
        places: Vec<usize>,
        keep: BTreeSet<usize>,
        budget: &mut Budget,
    ) -> Part {
        let rows: Rows = places
            .iter()
            .map(|i| self.row(*i))
            .filter(|row| row.is_disjoint(&keep))
            .collect();
        let greedy = greedy(&rows).len() + keep.len();
        let length = fewest(rows, budget);
        let mut list = length.list;
        list.extend(keep.iter().copied());
        Part {
            fence,
            places,
            bound: length.bound + keep.len(),
            known: list.len(),
            list,
            keep,
            greedy,
        }
    }

    /// Decides ties part by part and puts the list together.
    fn settle(&self, parts: &mut [Part], bound: usize, budget: &mut Budget) -> Solved {
        let mut stocks: BTreeSet<Stock> = BTreeSet::new();
        let mut picks: Vec<Pick> = Vec::new();
        let (mut sum, mut ties_proven) = (Ties::default(), true);
        for part in parts.iter() {
            let offers: Vec<Vec<Offer>> = part
                .places
                .iter()
                .map(|i| self.offers[*i].clone())
                .collect();
            let chosen = best(
                &Wanted {
                    offers: &offers,
                    keep: &part.keep,
                    rank: &self.rank,
                    length: part.bound,
                },
                budget,
            );
            ties_proven &= chosen.as_ref().is_some_and(|b| b.all);
            let list = chosen.map_or_else(|| part.list.clone(), |b: Best| b.list);
            for (place, offers) in part.places.iter().zip(&offers) {
                picks.extend(pick(*place, offers, |oil| list.contains(&oil)));
            }
            sum = sum + ties(&offers, |oil| list.contains(&oil));
            stocks.extend(list.into_iter().map(|oil| Stock {
                fence: part.fence,
                oil,
            }));
        }
        picks.sort_by_key(|p| p.place);
        let mut stocks: Vec<Stock> = stocks.into_iter().collect();
        stocks.sort_by_key(|s| (s.fence, self.rank[s.oil]));
        Solved {
            bound,
            stocks,
            picks,
            nodes: budget.used,
            ties: sum,
            ties_proven,
            greedy: parts.iter().map(|p| p.greedy).sum(),
        }
    }
}

/// What a place takes from a list.
pub fn pick(place: usize, offers: &[Offer], on: impl Fn(usize) -> bool) -> Option<Pick> {
    offers.iter().find(|o| on(o.oil)).map(|offer| Pick {
        place,
        offer: *offer,
    })
}

/// Places of the oils in the order of their names.
fn ranks(names: &[&str]) -> Vec<usize> {
    let mut order: Vec<usize> = (0..names.len()).collect();
    order.sort_by_key(|i| (names[*i], *i));
    let mut rank = vec![0; names.len()];
    for (place, oil) in order.into_iter().enumerate() {
        rank[oil] = place;
    }
    rank
}

/// Behind which fence each kept oil stands: where it may serve most places; of equals where there
/// is no fence, and there too where it serves none.
fn kept(places: &[Place], terms: &Terms) -> BTreeMap<Fence, BTreeSet<usize>> {
    let mut kept: BTreeMap<Fence, BTreeSet<usize>> = BTreeMap::new();
    for oil in &terms.keep {
        let mut serves: BTreeMap<Fence, usize> = BTreeMap::new();
        for place in places {
            if terms.offers(place).iter().any(|o| o.oil == *oil) {
                *serves.entry(place.fence).or_default() += 1;
            }
        }
        let fence = serves
            .into_iter()
            .max_by_key(|(fence, n)| (*n, !fence.stands(), std::cmp::Reverse(*fence)))
            .map_or(Fence::NONE, |(fence, _)| fence);
        kept.entry(fence).or_default().insert(*oil);
    }
    kept
}
