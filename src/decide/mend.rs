//! The smallest change that makes an oil hold on a point.
//!
//! Each change is a bracketed root: the margins of the limits it acts on, as a function of its
//! amount, cross zero (or the reserve) once. The amount found is laid over the point or the oil
//! and everything is weighed again; what does not come out is not an answer.

pub mod heater;
mod laid;
pub mod lever;
mod pairs;
mod trial;
pub mod words;

use crate::judge::{Judgement, Verdict};
use crate::model::{Point, Sump};
use crate::numeric::math::lg;
use crate::numeric::root::bracketed;
use crate::quantity::Measure;
use crate::relation::oil::grade::IsoGrade;
use crate::weighing::{Barred, Candidate, Scales};
use heater::HeaterAdvice;
use laid::Laid;
use lever::{Lever, Side, Target, excess};
use trial::{Range, Trial};

/// One change with its amount.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Change {
    /// What is changed.
    pub lever: Lever,
    /// How it is today: K, VG steps, a share or an index; `ln` of m²/s for a start limit.
    pub from: f64,
    /// The smallest change that does, in the same unit.
    pub to: f64,
}

/// Changes that together make the oil hold, weighed again.
#[derive(Clone, Debug)]
pub struct Mend {
    /// One change, or two.
    pub changes: Vec<Change>,
    /// How far it mends.
    pub target: Target,
    /// What then.
    pub then: Candidate,
    /// A grade of ISO 3448 of the same slope that does, where the grade is the change.
    pub grade: Option<IsoGrade>,
    /// The cold end of the range that a cooler or a hottest ambient is written with, K.
    pub cold_end: Option<f64>,
    /// What is to be known of it.
    pub caution: Option<String>,
}

/// Why a change was not enough alone.
#[derive(Clone, Debug, PartialEq)]
pub struct Tried {
    /// The change.
    pub lever: Lever,
    /// Why not, in a few words; empty where it does not act on the limits missed.
    pub because: String,
}

/// Everything `mend` finds for one oil on one point.
#[derive(Clone, Debug)]
pub struct Mended {
    /// The oil's place in the list.
    pub oil: usize,
    /// As things are.
    pub now: Result<Candidate, Barred>,
    /// Single changes, the least trouble first, each for the bare limits and for the reserve.
    pub single: Vec<Mend>,
    /// The pair of least trouble, for each target that no single change reaches.
    pub pairs: Vec<Mend>,
    /// Changes that are not enough alone, not even for the bare limits.
    pub tried: Vec<Tried>,
    /// What a heater would have to be, where one is an answer.
    pub heater: Option<HeaterAdvice>,
}

impl Mended {
    /// The mends of a target, the least trouble first: single ones, or the pair.
    pub fn of(&self, target: Target) -> impl Iterator<Item = &Mend> {
        let all = self.single.iter().chain(&self.pairs);
        all.filter(move |m| m.target == target)
    }

    /// The targets not reached as things are.
    pub fn missing(&self) -> Vec<Target> {
        self.now.as_ref().map_or_else(
            |_| Vec::new(),
            |now| {
                let short = |t: &Target| !reached(now.judgement.verdict, *t);
                Target::ALL.into_iter().filter(short).collect()
            },
        )
    }
}

/// Whether a verdict is as good as a target asks.
pub fn reached(verdict: Verdict, target: Target) -> bool {
    match target {
        Target::Met => matches!(verdict, Verdict::Holds | Verdict::Tight),
        Target::Reserve => verdict == Verdict::Holds,
    }
}

/// Finds what would make an oil hold on a point.
pub fn mend(scales: &Scales<'_>, point: &Point, oil: usize) -> Mended {
    let trial = Trial::new(scales, point, oil);
    let pair = trial.pair();
    let mut found = Mended {
        oil,
        now: pair.outcome,
        single: Vec::new(),
        pairs: Vec::new(),
        tried: Vec::new(),
        heater: None,
    };
    let Ok(now) = &found.now else { return found };
    let j = now.judgement.clone();
    if j.doubts.undecided {
        // a limit that cannot be worked out cannot be solved for
        return found;
    }
    for target in found.missing() {
        for lever in Lever::ALL {
            match single(&trial, &j, lever, target) {
                Some(Ok(mend)) => found.single.push(mend),
                Some(Err(because)) if target == Target::Met => {
                    found.tried.push(Tried { lever, because });
                }
                _ => {}
            }
        }
        if !found.single.iter().any(|m| m.target == target) {
            found.pairs.extend(pairs::cheapest(&trial, &j, target));
        }
    }
    found.heater = heater::advice(&trial, &found);
    found
}

/// One change alone: its mend, why it is not enough, or `None` where it has nothing to act on.
fn single(
    trial: &Trial<'_>,
    j: &Judgement,
    lever: Lever,
    target: Target,
) -> Option<Result<Mend, String>> {
    let range = trial.range(lever, j, target)?;
    if !acts(j, lever, target) {
        return Some(Err(String::new()));
    }
    let side = match lever {
        Lever::Grade if range.to > 0.0 => Side::Hot,
        Lever::Grade => Side::Cold,
        _ => lever.side(),
    };
    let Some(to) = smallest(trial, lever, range, side, target) else {
        return Some(Err(too_little(trial, lever, range)));
    };
    let change = Change {
        lever,
        from: range.from,
        to,
    };
    Some(verified(trial, vec![change], target))
}

/// Whether a limit that the change acts on is missed at all.
fn acts(j: &Judgement, lever: Lever, target: Target) -> bool {
    excess(j, lever.side(), target) < 0.0
}

/// The smallest amount at which the limits of a side let the target be reached.
fn smallest(
    trial: &Trial<'_>,
    lever: Lever,
    range: Range,
    side: Side,
    target: Target,
) -> Option<f64> {
    let mut laid = Laid::new(trial, lever);
    let mut left = |at: f64| laid.excess(at, side, target);
    if left(range.to) < 0.0 {
        return None;
    }
    if left(range.from) >= 0.0 {
        // the change itself does, as small as can be: a cooler where each oil heats by itself
        return Some(range.from);
    }
    let root = bracketed(range.from, range.to, &mut left).ok()?;
    // of the last two neighbours the one that does
    let toward = (range.to - range.from).signum();
    let mut reach = 0.0;
    for _ in 0..40 {
        let at = root.at + toward * reach;
        if left(at) >= 0.0 {
            return Some(at);
        }
        reach = if reach == 0.0 {
            root.width.max(root.at.abs() * f64::EPSILON)
        } else {
            2.0 * reach
        };
    }
    None
}

/// Why even the farthest change looked at is not enough.
fn too_little(trial: &Trial<'_>, lever: Lever, range: Range) -> String {
    let farthest = trial.with(lever, range.to).map(|t| t.pair().outcome);
    match farthest {
        Some(Ok(candidate)) => candidate.brief,
        Some(Err(barred)) => barred.by.first().map_or(String::new(), |c| c.says.clone()),
        None => "there is no such oil".to_owned(),
    }
}

/// Lays changes over the trial and weighs again.
fn verified(trial: &Trial<'_>, changes: Vec<Change>, target: Target) -> Result<Mend, String> {
    let mut next = trial.clone();
    for change in &changes {
        next = next
            .with(change.lever, change.to)
            .ok_or_else(|| "there is no such oil".to_owned())?;
    }
    match next.pair().outcome {
        Ok(then) if reached(then.judgement.verdict, target) => Ok(Mend {
            grade: grade_of(trial, &changes, target),
            cold_end: cold_end(&next, &changes),
            caution: caution(trial, &changes),
            changes,
            target,
            then,
        }),
        Ok(then) => Err(then.brief),
        Err(barred) => Err(barred.by.first().map_or(String::new(), |c| c.says.clone())),
    }
}

/// What has to be known of a change: an index beyond the base means a polymer, a start limit is
/// the maker's to give.
fn caution(trial: &Trial<'_>, changes: &[Change]) -> Option<String> {
    let of = |lever| changes.iter().find(|c| c.lever == lever);
    if let Some(index) = of(Lever::Index) {
        let natural = trial.natural_index().filter(|most| index.to > *most)?;
        return Some(format!(
            "the base stock alone gives a VI of {natural:.0} at most: a higher one needs another base, or a polymer whose shear loss then counts"
        ));
    }
    of(Lever::StartLimit).map(|_| {
        "only the maker can allow a thicker oil at start; until then the limit stands".to_owned()
    })
}

/// The cold end of the range that a change of its hot end is written with.
fn cold_end(next: &Trial<'_>, changes: &[Change]) -> Option<f64> {
    let has = |lever| changes.iter().any(|c| c.lever == lever);
    match &next.point.sump {
        Some(Sump::Across(range)) if has(Lever::Cooler) => Some(range.value.lo.base()),
        Some(Sump::Across(_)) => None,
        _ if has(Lever::HottestAmbient) => {
            let ambient = next.point.ambient.as_ref()?.known()?;
            Some(ambient.value.lo.base())
        }
        _ => None,
    }
}

/// The nearest grade of ISO 3448 that does, with the slope of the oil and its middle viscosity.
fn grade_of(trial: &Trial<'_>, changes: &[Change], target: Target) -> Option<IsoGrade> {
    let [only] = changes else { return None };
    if only.lever != Lever::Grade {
        return None;
    }
    let nu40 = trial.nu40();
    let steps = |g: &IsoGrade| 6.0 * lg(g.midpoint().base() / nu40);
    let mut able: Vec<IsoGrade> = IsoGrade::all()
        .filter(|g| steps(g) * only.to.signum() >= only.to.abs())
        .collect();
    able.sort_by(|a, b| steps(a).abs().total_cmp(&steps(b).abs()));
    let nearest = *able.first()?;
    let outcome = trial.with(Lever::Grade, steps(&nearest))?.pair().outcome;
    outcome
        .is_ok_and(|c| reached(c.judgement.verdict, target))
        .then_some(nearest)
}
