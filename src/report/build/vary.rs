//! What an input would change: the point weighed again at the ends of its range, all else as it is.

use super::case::Case;
use super::say;
use crate::demand::{Gap, GapKind, Instead, Scenario};
use crate::judge::Verdict;
use crate::weighing::{Candidate, Weighed};

/// What an input over its range does to one oil and to the choice.
#[derive(Clone, Debug, Default, PartialEq)]
pub(super) struct Effect {
    /// Least and greatest of its smallest margin, VG steps; none where no margin is known.
    pub(super) margin: Option<(f64, f64)>,
    /// Its verdicts, each once, best first; none stands for barred.
    pub(super) verdicts: Vec<Option<Verdict>>,
    /// The oils proposed, each once; none where none is.
    pub(super) proposed: Vec<Option<usize>>,
}

/// The smallest margin of viscosity of an oil, VG steps.
pub(super) fn smallest(c: &Candidate) -> Option<f64> {
    let j = &c.judgement;
    [j.hot, j.cold]
        .into_iter()
        .flatten()
        .map(|m| m.value)
        .min_by(f64::total_cmp)
}

impl Effect {
    fn take(&mut self, w: &Weighed<'_>, oil: usize) {
        let found = w.candidates.iter().find(|c| c.oil == oil);
        if let Some(m) = found.and_then(smallest) {
            let (lo, hi) = self.margin.unwrap_or((m, m));
            self.margin = Some((lo.min(m), hi.max(m)));
        }
        let verdict = found.map(|c| c.judgement.verdict);
        if !self.verdicts.contains(&verdict) {
            self.verdicts.push(verdict);
            // a barred oil has no verdict and comes last
            self.verdicts.sort_by_key(|v| (v.is_none(), *v));
        }
        let proposed = w.proposed().map(|c| c.oil);
        if !self.proposed.contains(&proposed) {
            self.proposed.push(proposed);
        }
    }

    /// Whether it picks another oil.
    pub(super) fn picks(&self) -> bool {
        self.proposed.len() > 1
    }

    /// Whether it picks another word.
    pub(super) fn turns(&self) -> bool {
        self.verdicts.len() > 1
    }

    /// How far it moves the margin, VG steps.
    pub(super) fn moves(&self) -> f64 {
        self.margin.map_or(0.0, |(lo, hi)| hi - lo)
    }

    /// The margin over the range in figures.
    pub(super) fn range(&self) -> String {
        self.margin.map_or(String::new(), |(lo, hi)| {
            let (lo, hi) = (say::steps(lo, 2), say::steps(hi, 2));
            if lo == hi {
                lo
            } else {
                format!("{lo} to {hi}")
            }
        })
    }

    /// Its words: `holds or tight`.
    pub(super) fn words(&self) -> String {
        let words: Vec<&str> = self
            .verdicts
            .iter()
            .map(|v| v.map_or("barred", Verdict::word))
            .collect();
        words.join(" or ")
    }
}

/// The settings at both ends of a gap's range, and in its middle.
fn settings(gap: &Gap, axis: Option<usize>, axes: usize) -> Vec<Scenario> {
    let at = |base: f64| Scenario {
        shares: vec![0.5; axes],
        instead: vec![Instead {
            key: gap.key.clone(),
            about: gap.about.clone(),
            base,
        }],
    };
    match (&gap.kind, axis) {
        (GapKind::Range(..), Some(axis)) => [0.0, 0.5, 1.0]
            .into_iter()
            .map(|share| {
                let mut shares = vec![0.5; axes];
                shares[axis] = share;
                Scenario {
                    shares,
                    instead: Vec::new(),
                }
            })
            .collect(),
        (GapKind::Assumed { lo, hi, .. }, _) => {
            let (lo, hi) = (lo.base, hi.base);
            vec![at(lo), at(f64::midpoint(lo, hi)), at(hi)]
        }
        _ => Vec::new(),
    }
}

/// What a gap with a range would do to an oil; none where it has no range.
pub(super) fn effect(case: &Case<'_, '_>, gap: &Gap, oil: usize) -> Option<Effect> {
    let axes = &case.w.demands.middle.axes;
    let axis = axes
        .iter()
        .position(|a| a.key == gap.key && a.about == gap.about);
    let settings = settings(gap, axis, axes.len());
    let mut effect = Effect::default();
    for setting in settings {
        let w = case.run.scales.weigh_under(case.w.point, setting);
        effect.take(&w, oil);
    }
    (!effect.verdicts.is_empty()).then_some(effect)
}

/// Least and greatest margin of an oil over the tolerances of the inputs, hot and cold.
pub(super) type Whiskers = (Option<(f64, f64)>, Option<(f64, f64)>);

/// Margins over the stated tolerances of the inputs, one at a time.
#[derive(Clone, Debug, Default)]
pub(super) struct Tolerances {
    by_oil: Vec<(usize, Whiskers)>,
    /// The inputs in words.
    pub(super) inputs: Vec<String>,
}

impl Tolerances {
    /// Weighs a point at the ends of each tolerance.
    pub(super) fn new(case: &Case<'_, '_>) -> Self {
        let mut found = Self::default();
        let middle = &case.w.demands.middle;
        for gap in &middle.tolerances {
            let settings = settings(gap, None, middle.axes.len());
            // the middle is the stated value, judged already
            for setting in [settings.first(), settings.last()].into_iter().flatten() {
                let w = case.run.scales.weigh_under(case.w.point, setting.clone());
                for c in &w.candidates {
                    let j = &c.judgement;
                    let values = (j.hot.map(|m| m.value), j.cold.map(|m| m.value));
                    found.take(c.oil, values);
                }
            }
            let about = gap
                .about
                .as_ref()
                .map_or(String::new(), |a| format!("{a}, "));
            found.inputs.push(format!("{about}{}", gap.key));
        }
        found
    }

    fn take(&mut self, oil: usize, (hot, cold): (Option<f64>, Option<f64>)) {
        let wider = |old: Option<(f64, f64)>, new: Option<f64>| match (old, new) {
            (Some((lo, hi)), Some(v)) => Some((lo.min(v), hi.max(v))),
            (None, Some(v)) => Some((v, v)),
            (old, None) => old,
        };
        let place = self.by_oil.iter().position(|(o, _)| *o == oil);
        let place = place.unwrap_or_else(|| {
            self.by_oil.push((oil, (None, None)));
            self.by_oil.len() - 1
        });
        let whiskers = &mut self.by_oil[place].1;
        *whiskers = (wider(whiskers.0, hot), wider(whiskers.1, cold));
    }

    /// The whiskers of an oil; none where the tolerances do not move it.
    pub(super) fn of(&self, oil: usize) -> Whiskers {
        let found = self.by_oil.iter().find(|(o, _)| *o == oil);
        let moved = |w: Option<(f64, f64)>| w.filter(|(lo, hi)| hi - lo > 1e-6);
        found.map_or((None, None), |(_, (hot, cold))| (moved(*hot), moved(*cold)))
    }
}
