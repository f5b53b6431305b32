//! What the stated tolerances of the inputs would change, and how effects are written on a page.

use super::case::Case;
use super::say;
use crate::decide::gaps::effect::Effect;
use crate::demand::{Gap, GapKind, Instead, Scenario};

/// The margin over the range of an input in figures.
pub(super) fn range(effect: &Effect) -> String {
    effect.margin.map_or(String::new(), |(lo, hi)| {
        let (lo, hi) = (say::steps(lo, 2), say::steps(hi, 2));
        if lo == hi {
            lo
        } else {
            format!("{lo} to {hi}")
        }
    })
}

/// The settings at both ends of a stated tolerance.
fn ends(gap: &Gap, axes: usize) -> Vec<Scenario> {
    let at = |base: f64| Scenario {
        shares: vec![0.5; axes],
        instead: vec![Instead {
            key: gap.key.clone(),
            about: gap.about.clone(),
            base,
        }],
        ..Scenario::default()
    };
    match &gap.kind {
        GapKind::Assumed { lo, hi, .. } => vec![at(lo.base), at(hi.base)],
        _ => Vec::new(),
    }
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
            // the middle is the stated value, judged already
            for setting in ends(gap, middle.axes.len()) {
                let w = case.run.scales.weigh_under(case.w.point, setting);
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
