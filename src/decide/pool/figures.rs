//! Litres, money and margins of a list, beside those of today.

use super::case::{Pick, litres_a_year, litres_filled, per_litre, place};
use super::solve::{Outcome, Solved, solve};
use super::step::{Step, longer, shorter};
use super::{Place, Terms, check};
use crate::judge::Judgement;
use crate::model::Site;
use crate::weighing::{Candidate, Scales, Weighed, oil_in_use, oil_index};

/// Margins that differ by less than this count as the same, VG steps.
const SAME: f64 = 0.005;

/// A list worked out for a site.
pub struct Pool<'w, 'a> {
    /// The weighed points.
    pub weighed: &'w [Weighed<'a>],
    /// Places, and the weighed point behind each.
    pub places: Vec<Place>,
    /// Numbers of the weighed points behind the places.
    pub of_place: Vec<usize>,
    /// Weighed points that cannot be decided: no oil holds or is tight.
    pub undecided: Vec<usize>,
    /// What came out.
    pub outcome: Outcome,
    /// One shorter.
    pub shorter: Option<Step>,
    /// One longer.
    pub longer: Option<Step>,
    /// Oils in use today at the points that can be decided, each once.
    pub today: Vec<usize>,
    /// Points among them whose oil of today is not known.
    pub today_unknown: usize,
}

/// What a list comes to.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Sums {
    /// Points on which the oil holds, is tight, fails, is open.
    pub words: [usize; 4],
    /// Points whose oil changes.
    pub changes: usize,
    /// Litres to be filled in at once where the oil changes; what is not stated is left out.
    pub filled: f64,
    /// Points that change and do not state their fill in litres.
    pub fills_unknown: usize,
    /// Litres used a year where stated.
    pub litres: f64,
    /// Cost a year of the points for which it is known today and on this list.
    pub cost: f64,
    /// What the same points cost today.
    pub cost_today: f64,
    /// Points left out of both costs.
    pub unpriced: usize,
    /// Smallest margin on the list, VG steps, and its place.
    pub smallest: Option<(f64, usize)>,
    /// Sum of the margins given up against the first choice of each point, VG steps.
    pub given_up: f64,
    /// Points whose smallest margin is lower than with the oil of today.
    pub lose: usize,
    /// Points whose smallest margin is higher than with the oil of today.
    pub gain: usize,
}

/// Works the list out.
///
/// # Errors
/// The answer does not stand its own check: a defect.
pub fn pool<'w, 'a>(
    scales: &Scales<'a>,
    weighed: &'w [Weighed<'a>],
    terms: &Terms,
    on: &str,
) -> Result<Pool<'w, 'a>, check::Wrong> {
    let site = scales.site;
    let (mut places, mut of_place, mut undecided) = (Vec::new(), Vec::new(), Vec::new());
    for (i, w) in weighed.iter().enumerate() {
        match place(site, w, on) {
            Some(p) => {
                places.push(p);
                of_place.push(i);
            }
            None => undecided.push(i),
        }
    }
    let names: Vec<&str> = site.oils.iter().map(|o| o.id.as_str()).collect();
    let outcome = solve(&places, &names, terms);
    let (mut less, mut more) = (None, None);
    if let Outcome::Solved(solved) = &outcome {
        check::against_places(&places, solved, terms)?;
        check::by_weighing(scales, weighed, &of_place, solved)?;
        less = shorter(&places, solved, terms);
        more = longer(&places, solved, terms);
    }
    let in_use = |i: &usize| oil_in_use(weighed[*i].point).and_then(|id| oil_index(site, id));
    let mut today: Vec<usize> = of_place.iter().filter_map(in_use).collect();
    let today_unknown = of_place.len() - today.len();
    today.sort_unstable();
    today.dedup();
    Ok(Pool {
        weighed,
        places,
        of_place,
        undecided,
        outcome,
        shorter: less,
        longer: more,
        today,
        today_unknown,
    })
}

impl<'w, 'a> Pool<'w, 'a> {
    /// The solved list, where there is one.
    pub fn solved(&self) -> Option<&Solved> {
        match &self.outcome {
            Outcome::Solved(solved) => Some(solved),
            _ => None,
        }
    }

    /// The weighed point behind a place.
    pub fn point(&self, place: usize) -> &'w Weighed<'a> {
        &self.weighed[self.of_place[place]]
    }

    /// An oil on a place as it was weighed.
    pub fn candidate(&self, place: usize, oil: usize) -> Option<&'w Candidate> {
        self.point(place).candidates.iter().find(|c| c.oil == oil)
    }

    /// What picks come to, with the places that go without an oil.
    pub fn sums(&self, site: &Site, picks: &[Pick], unserved: &[usize]) -> Sums {
        let mut sums = Sums::default();
        for pick in picks {
            self.add(site, pick, &mut sums);
        }
        // a place without an oil of the list keeps none that serves: it counts as failing
        sums.words[2] += unserved.len();
        sums
    }

    fn add(&self, site: &Site, pick: &Pick, sums: &mut Sums) {
        let w = self.point(pick.place);
        sums.words[usize::from(pick.offer.tight)] += 1;
        if pick.offer.change {
            sums.changes += 1;
            match litres_filled(w) {
                Some(litres) => sums.filled += litres,
                None => sums.fills_unknown += 1,
            }
        }
        let litres = litres_a_year(w);
        sums.litres += litres.unwrap_or(0.0);
        let now = oil_in_use(w.point).and_then(|id| oil_index(site, id));
        let price = |oil: Option<usize>| oil.and_then(|o| per_litre(site, o));
        match (litres, price(now), price(Some(pick.offer.oil))) {
            (Some(l), Some(old), Some(new)) => {
                sums.cost += l * new;
                sums.cost_today += l * old;
            }
            _ => sums.unpriced += 1,
        }
        self.add_margins(pick, now, sums);
    }

    fn add_margins(&self, pick: &Pick, now: Option<usize>, sums: &mut Sums) {
        let of = |oil: usize| {
            self.candidate(pick.place, oil)
                .and_then(|c| smallest(&c.judgement))
        };
        let mine = of(pick.offer.oil);
        if let Some(mine) = mine
            && sums.smallest.is_none_or(|(least, _)| mine < least)
        {
            sums.smallest = Some((mine, pick.place));
        }
        let first = self.places[pick.place]
            .offers
            .first()
            .and_then(|o| of(o.oil));
        if let (Some(mine), Some(first)) = (mine, first) {
            sums.given_up += (first - mine).max(0.0);
        }
        if let (Some(mine), Some(now)) = (mine, now.and_then(of)) {
            sums.lose += usize::from(mine < now - SAME);
            sums.gain += usize::from(mine > now + SAME);
        }
    }
}

/// The smallest margin of a judgement, VG steps.
pub fn smallest(j: &Judgement) -> Option<f64> {
    [j.hot, j.cold]
        .into_iter()
        .flatten()
        .map(|m| m.value)
        .min_by(f64::total_cmp)
}
