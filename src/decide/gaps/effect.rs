//! What an input would change: the point weighed again at the ends of its range and in the
//! middle, all else as it is.

use crate::demand::{Gap, GapKind, Instead, Scenario};
use crate::judge::Verdict;
use crate::weighing::{Candidate, Scales, Weighed};

/// What an input over its range does to one oil, to the oil in use and to the choice.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Effect {
    /// Least and greatest of its smallest margin, VG steps; none where no margin is known.
    pub margin: Option<(f64, f64)>,
    /// Its verdicts, each once, best first; none stands for barred.
    pub verdicts: Vec<Option<Verdict>>,
    /// The verdicts of the oil in use, each once, best first; empty where it is the same oil or
    /// is not weighed.
    pub in_use: Vec<Option<Verdict>>,
    /// The oils proposed, each once; none where none is.
    pub proposed: Vec<Option<usize>>,
    /// The values tried, base units, with the oil proposed at each.
    pub at: Vec<(f64, Option<usize>)>,
}

/// The smallest margin of viscosity of an oil, VG steps.
pub fn smallest(c: &Candidate) -> Option<f64> {
    let j = &c.judgement;
    [j.hot, j.cold]
        .into_iter()
        .flatten()
        .map(|m| m.value)
        .min_by(f64::total_cmp)
}

impl Effect {
    pub(super) fn take(&mut self, w: &Weighed<'_>, oil: usize, now: Option<usize>, at: f64) {
        let found = w.candidate(oil);
        if let Some(m) = found.and_then(smallest) {
            let (lo, hi) = self.margin.unwrap_or((m, m));
            self.margin = Some((lo.min(m), hi.max(m)));
        }
        note(&mut self.verdicts, found.map(|c| c.judgement.verdict));
        if let Some(now) = now.filter(|n| *n != oil) {
            let verdict = w.candidate(now).map(|c| c.judgement.verdict);
            note(&mut self.in_use, verdict);
        }
        let proposed = w.proposed().map(|c| c.oil);
        if !self.proposed.contains(&proposed) {
            self.proposed.push(proposed);
        }
        self.at.push((at, proposed));
    }

    /// Whether it picks another oil.
    pub fn picks(&self) -> bool {
        self.proposed.len() > 1
    }

    /// Whether it picks another word, of the oil itself or of the oil in use.
    pub fn turns(&self) -> bool {
        self.verdicts.len() > 1 || self.in_use.len() > 1
    }

    /// How far it moves the margin, VG steps.
    pub fn moves(&self) -> f64 {
        self.margin.map_or(0.0, |(lo, hi)| hi - lo)
    }
}

fn note(all: &mut Vec<Option<Verdict>>, verdict: Option<Verdict>) {
    if !all.contains(&verdict) {
        all.push(verdict);
        // a barred oil has no verdict and comes last
        all.sort_by_key(|v| (v.is_none(), *v));
    }
}

/// Verdicts in words: `holds or tight`.
pub fn words(verdicts: &[Option<Verdict>]) -> String {
    let words: Vec<&str> = verdicts
        .iter()
        .map(|v| v.map_or("barred", Verdict::word))
        .collect();
    words.join(" or ")
}

/// A scenario with one share or one value fixed.
type Fix = Box<dyn Fn(&Scenario) -> Scenario>;

/// The values tried for a gap, each with what it does to a setting.
fn fixes(gap: &Gap, axis: Option<usize>) -> Vec<(f64, Fix)> {
    match (&gap.kind, axis) {
        (GapKind::Range(lo, hi), Some(axis)) => [0.0, 0.5, 1.0]
            .into_iter()
            .map(|share| {
                let fix: Fix = Box::new(move |s: &Scenario| {
                    let mut next = s.clone();
                    if let Some(own) = next.shares.get_mut(axis) {
                        *own = share;
                    }
                    next
                });
                (lo.base + (hi.base - lo.base) * share, fix)
            })
            .collect(),
        (GapKind::Assumed { lo, hi, .. }, _) => {
            let (lo, hi) = (lo.base, hi.base);
            [lo, f64::midpoint(lo, hi), hi]
                .into_iter()
                .map(|base| {
                    let instead = Instead {
                        key: gap.key.clone(),
                        about: gap.about.clone(),
                        base,
                    };
                    let fix: Fix = Box::new(move |s: &Scenario| {
                        let mut next = s.clone();
                        next.instead.push(instead.clone());
                        next
                    });
                    (base, fix)
                })
                .collect()
        }
        _ => Vec::new(),
    }
}

/// What a gap with a range would do to an oil; none where it has no range.
pub fn effect<'a>(scales: &Scales<'a>, w: &Weighed<'a>, gap: &Gap, oil: usize) -> Option<Effect> {
    let axes = &w.demands.middle.axes;
    let axis = axes
        .iter()
        .position(|a| a.key == gap.key && a.about == gap.about);
    let now = w.in_use().map(|c| c.oil);
    let mut effect = Effect::default();
    for (at, fix) in fixes(gap, axis) {
        let closed = scales.weigh_closed(w.point, &w.demands, fix);
        effect.take(&closed, oil, now, at);
    }
    (!effect.at.is_empty()).then_some(effect)
}
