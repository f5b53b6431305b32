//! What is missing or assumed, ranked by what it would decide.

pub mod effect;
pub mod letter;
pub mod oils;

use crate::demand::{Gap, GapKind};
use crate::judge::Verdict;
use crate::quantity::Amount;
use crate::quantity::show::{Toward, Units, fixed, quantity};
use crate::weighing::{Candidate, Scales, Weighed};
use effect::Effect;

/// What a gap would decide, the most telling first.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Weight {
    /// Which oil.
    Oil,
    /// A verdict, or whether there is one at all.
    Verdict,
    /// A condition.
    Condition,
    /// The margin by more than the reserve.
    Margin,
    /// Nothing.
    Nothing,
}

impl Weight {
    /// Its word in documents.
    pub fn word(self) -> &'static str {
        match self {
            Self::Oil => "which oil",
            Self::Verdict => "a verdict",
            Self::Condition => "a condition",
            Self::Margin => "a margin",
            Self::Nothing => "nothing",
        }
    }
}

/// What is missing.
#[derive(Clone, Debug, PartialEq)]
pub enum Missing {
    /// An input with a value or a range.
    Input(Gap),
    /// A fact in words that a suitability rule needs.
    Fact {
        /// The fact.
        says: String,
        /// The question to put.
        question: String,
        /// The oils it is about, by their place in the list.
        oils: Vec<usize>,
    },
}

/// Why an input without a range matters.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Waits {
    /// The verdict waits for it.
    Verdict,
    /// A further limit waits for it.
    Limit,
    /// Only a figure beside the limits.
    Nothing,
}

/// One gap with what it would decide.
#[derive(Clone, Debug, PartialEq)]
pub struct Found {
    /// What it would decide.
    pub weight: Weight,
    /// What is missing.
    pub missing: Missing,
    /// What it does over its range, where it has one.
    pub effect: Option<Effect>,
    /// What waits for it, where it has none.
    pub waits: Option<Waits>,
    /// Whether it is about the oil the point is told by, or the point itself; a fact may be about
    /// other oils alone.
    pub of_lead: bool,
}

impl Found {
    /// The key and part of an input.
    pub fn input(&self) -> Option<&Gap> {
        match &self.missing {
            Missing::Input(gap) => Some(gap),
            Missing::Fact { .. } => None,
        }
    }

    /// What is missing, in words: `rolling bearing 6312: speed`.
    pub fn says(&self) -> String {
        match &self.missing {
            Missing::Input(gap) => gap
                .about
                .as_ref()
                .map_or_else(|| gap.key.clone(), |about| format!("{about}: {}", gap.key)),
            Missing::Fact { says, .. } => says.clone(),
        }
    }

    fn moves(&self) -> f64 {
        self.effect.as_ref().map_or(0.0, Effect::moves)
    }
}

/// The candidate a point is told by: the one proposed, else the best of those weighed.
pub fn lead<'w>(w: &'w Weighed<'_>) -> Option<&'w Candidate> {
    w.proposed().or_else(|| w.candidates.first())
}

/// The gaps of a point, the most telling first, told by one of its candidates.
pub fn found<'a>(scales: &Scales<'a>, w: &Weighed<'a>, lead: Option<&Candidate>) -> Vec<Found> {
    let middle = &w.demands.middle;
    let mut all: Vec<Found> = middle
        .axes
        .iter()
        .chain(&middle.gaps)
        .filter(|g| g.kind != GapKind::Fact)
        .map(|g| of_input(scales, w, lead, g))
        .collect();
    all.extend(oils::found(scales, w, lead));
    all.extend(facts(w, lead));
    all.sort_by(|a, b| {
        a.weight
            .cmp(&b.weight)
            .then_with(|| b.of_lead.cmp(&a.of_lead))
            .then_with(|| b.moves().total_cmp(&a.moves()))
            .then_with(|| a.says().cmp(&b.says()))
    });
    all
}

fn of_input<'a>(
    scales: &Scales<'a>,
    w: &Weighed<'a>,
    lead: Option<&Candidate>,
    gap: &Gap,
) -> Found {
    let effect = lead.and_then(|c| effect::effect(scales, w, gap, c.oil));
    let (weight, waits) = match &effect {
        Some(e) => (weight_of(e, scales.reserve), None),
        None => {
            let (weight, waits) = without_range(w, lead, gap);
            (weight, Some(waits))
        }
    };
    Found {
        weight,
        missing: Missing::Input(gap.clone()),
        effect,
        waits,
        of_lead: true,
    }
}

/// What an effect decides.
fn weight_of(effect: &Effect, reserve: f64) -> Weight {
    if effect.picks() {
        Weight::Oil
    } else if effect.turns() {
        Weight::Verdict
    } else if effect.moves() > reserve {
        Weight::Margin
    } else {
        Weight::Nothing
    }
}

/// The figure of a gap as people write it: a loss in per cent.
pub fn figure(gap: &Gap, a: Amount, units: Units) -> String {
    if gap.key == oils::SHEAR_LOSS {
        return format!("{} %", fixed(100.0 * a.base, 0, Toward::Nearest));
    }
    quantity(a, units, Toward::Nearest)
}

/// An input without a range: it leaves the verdict open where a limit needs it.
fn without_range(w: &Weighed<'_>, lead: Option<&Candidate>, gap: &Gap) -> (Weight, Waits) {
    let open = lead.is_none_or(|c| c.judgement.verdict == Verdict::Open);
    let undecided = &w.demands.middle.undecided;
    let waits = undecided
        .iter()
        .any(|u| gap.about.is_none() || u.part == gap.about);
    match (waits, open) {
        (true, true) => (Weight::Verdict, Waits::Verdict),
        (true, false) => (Weight::Margin, Waits::Limit),
        _ => (Weight::Nothing, Waits::Nothing),
    }
}

/// Facts nobody stated that a suitability rule asks for, each once, with the oils it is about.
fn facts(w: &Weighed<'_>, lead: Option<&Candidate>) -> Vec<Found> {
    let mut seen: Vec<(&str, &str, Vec<usize>)> = Vec::new();
    for c in &w.candidates {
        for (fact, question) in c.facts_missing.iter().zip(&c.questions) {
            match seen.iter_mut().find(|(f, _, _)| f == fact) {
                Some((_, _, oils)) => oils.push(c.oil),
                None => seen.push((fact, question, vec![c.oil])),
            }
        }
    }
    seen.into_iter()
        .map(|(says, question, oils)| Found {
            weight: Weight::Condition,
            of_lead: lead.is_some_and(|c| oils.contains(&c.oil)),
            missing: Missing::Fact {
                says: says.to_owned(),
                question: question.to_owned(),
                oils,
            },
            effect: None,
            waits: None,
        })
        .collect()
}

/// The gaps of one point, with the point weighed.
#[derive(Clone, Debug)]
pub struct PointGaps<'a> {
    /// The point.
    pub weighed: Weighed<'a>,
    /// Its gaps, the most telling first.
    pub gaps: Vec<Found>,
}

/// The gaps of points.
pub fn of_points<'a>(
    scales: &Scales<'a>,
    points: impl IntoIterator<Item = &'a crate::model::Point>,
) -> Vec<PointGaps<'a>> {
    points
        .into_iter()
        .map(|point| {
            let weighed = scales.weigh(point);
            let gaps = found(scales, &weighed, lead(&weighed));
            PointGaps { weighed, gaps }
        })
        .collect()
}

/// One gap of the site in its order: its point and its place in the list of that point.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Place {
    /// The point.
    pub point: usize,
    /// The gap.
    pub gap: usize,
}

/// All gaps of several points, the most telling first; equal ones in the order of the points.
pub fn ranked(points: &[PointGaps<'_>]) -> Vec<Place> {
    let mut all: Vec<Place> = Vec::new();
    for (point, p) in points.iter().enumerate() {
        all.extend((0..p.gaps.len()).map(|gap| Place { point, gap }));
    }
    let of = |p: &Place| &points[p.point].gaps[p.gap];
    all.sort_by(|a, b| {
        let (x, y) = (of(a), of(b));
        x.weight
            .cmp(&y.weight)
            .then_with(|| y.of_lead.cmp(&x.of_lead))
            .then_with(|| y.moves().total_cmp(&x.moves()))
    });
    all
}
