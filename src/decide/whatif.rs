//! What a changed value moves: one point weighed before and after, compared figure by figure.

use crate::demand::End;
use crate::demand::governing::limit_amount;
use crate::judge::Verdict;
use crate::judge::weigh::Margin;
use crate::weighing::{Candidate, Scales, Weighed};

/// Figures that differ by less are the same.
const SAME: f64 = 1e-9;

/// What an oil is on a point.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Stand {
    /// Weighed.
    Weighed(Verdict),
    /// Barred.
    Barred,
    /// Not weighed there: of the other sort.
    Absent,
}

impl Stand {
    /// Its word.
    pub fn word(self) -> &'static str {
        match self {
            Self::Weighed(verdict) => verdict.word(),
            Self::Barred => "barred",
            Self::Absent => "not weighed",
        }
    }
}

/// One margin before and after.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Moved {
    /// `hot`, `cold`, `pour`, `oil`, `maker`.
    pub name: &'static str,
    /// Before.
    pub before: Option<f64>,
    /// After.
    pub after: Option<f64>,
}

/// One oil that is moved.
#[derive(Clone, Debug, PartialEq)]
pub struct OilMoved {
    /// Its id.
    pub oil: String,
    /// Whether it is the oil in use.
    pub in_use: bool,
    /// Before and after.
    pub stand: (Stand, Stand),
    /// Margins that move.
    pub margins: Vec<Moved>,
    /// Rules whose conditions come, and those that go.
    pub conditions: (Vec<String>, Vec<String>),
}

/// One limit that is moved: the governing one of its end.
#[derive(Clone, Debug, PartialEq)]
pub struct LimitMoved {
    /// The end.
    pub end: End,
    /// Before, where there was one.
    pub before: Option<Governing>,
    /// After, where there is one.
    pub after: Option<Governing>,
}

/// A governing limit.
#[derive(Clone, Debug, PartialEq)]
pub struct Governing {
    /// What it asks.
    pub says: String,
    /// The part.
    pub part: Option<String>,
    /// The limit in base units, where it is a figure.
    pub limit: Option<crate::quantity::Amount>,
    /// Temperature, K.
    pub at: Option<f64>,
}

/// Everything a change moves on one point.
#[derive(Clone, Debug, PartialEq)]
pub struct Change {
    /// Address of the point.
    pub address: String,
    /// Tag of the machine.
    pub machine: String,
    /// Name of the point.
    pub point: Option<String>,
    /// Limits that move.
    pub limits: Vec<LimitMoved>,
    /// Oils that move, in the order they stand in after.
    pub oils: Vec<OilMoved>,
    /// The oil proposed before and after, where that moves.
    pub proposed: Option<(Option<String>, Option<String>)>,
    /// Oils weighed or barred that do not move.
    pub still: usize,
    /// Whether no oil of the list is of the sort the point takes.
    pub empty: bool,
}

impl Change {
    /// Whether nothing moves.
    pub fn nothing(&self) -> bool {
        self.limits.is_empty() && self.oils.is_empty() && self.proposed.is_none()
    }
}

/// Compares one point before and after.
pub fn change(before: (&Scales<'_>, &Weighed<'_>), after: (&Scales<'_>, &Weighed<'_>)) -> Change {
    let ids = |(scales, w): (&Scales<'_>, &Weighed<'_>)| -> Vec<String> {
        let weighed = w.candidates.iter().map(|c| c.oil);
        let barred = w.barred.iter().map(|b| b.oil);
        weighed
            .chain(barred)
            .map(|oil| scales.site.oils[oil].id.clone())
            .collect()
    };
    let mut all = ids(after);
    for id in ids(before) {
        if !all.contains(&id) {
            all.push(id);
        }
    }
    let (mut oils, mut still) = (Vec::new(), 0);
    for id in all {
        match oil_moved(&id, before, after) {
            Some(moved) => oils.push(moved),
            None => still += 1,
        }
    }
    let proposed = |(scales, w): (&Scales<'_>, &Weighed<'_>)| {
        w.proposed().map(|c| scales.site.oils[c.oil].id.clone())
    };
    let (was, is) = (proposed(before), proposed(after));
    let point = after.1.point;
    Change {
        address: point.address(),
        machine: point.machine.clone(),
        point: point.point.clone(),
        limits: limits(before.1, after.1),
        oils,
        proposed: (was != is).then_some((was, is)),
        empty: oils_at_all(before.1) + oils_at_all(after.1) == 0,
        still,
    }
}

fn oils_at_all(w: &Weighed<'_>) -> usize {
    w.candidates.len() + w.barred.len()
}

/// A candidate and where it stands.
fn stand<'w>(
    id: &str,
    (scales, w): (&Scales<'_>, &'w Weighed<'_>),
) -> (Stand, Option<&'w Candidate>) {
    let named = |oil: usize| scales.site.oils[oil].id == id;
    if let Some(c) = w.candidates.iter().find(|c| named(c.oil)) {
        return (Stand::Weighed(c.judgement.verdict), Some(c));
    }
    let barred = w.barred.iter().any(|b| named(b.oil));
    (if barred { Stand::Barred } else { Stand::Absent }, None)
}

fn oil_moved(
    id: &str,
    before: (&Scales<'_>, &Weighed<'_>),
    after: (&Scales<'_>, &Weighed<'_>),
) -> Option<OilMoved> {
    let ((was, old), (is, new)) = (stand(id, before), stand(id, after));
    let margins = match (old, new) {
        (Some(old), Some(new)) => margins(old, new),
        _ => Vec::new(),
    };
    let rules = |c: Option<&Candidate>| -> Vec<String> {
        c.map_or(Vec::new(), |c| {
            c.conditions.iter().map(|c| c.rule.clone()).collect()
        })
    };
    let (had, has) = (rules(old), rules(new));
    let without = |a: &[String], b: &[String]| -> Vec<String> {
        a.iter().filter(|r| !b.contains(r)).cloned().collect()
    };
    let conditions = if was == Stand::Absent || is == Stand::Absent {
        (Vec::new(), Vec::new())
    } else {
        (without(&has, &had), without(&had, &has))
    };
    let same =
        was == is && margins.is_empty() && conditions.0.is_empty() && conditions.1.is_empty();
    (!same).then(|| OilMoved {
        oil: id.to_owned(),
        in_use: new.or(old).is_some_and(|c| c.in_use),
        stand: (was, is),
        margins,
        conditions,
    })
}

fn margins(old: &Candidate, new: &Candidate) -> Vec<Moved> {
    let of = |c: &Candidate| -> [(&'static str, Option<Margin>); 5] {
        let j = &c.judgement;
        [
            ("hot", j.hot),
            ("cold", j.cold),
            ("pour", j.pour),
            ("oil", j.oil),
            ("maker", j.maker),
        ]
    };
    of(old)
        .into_iter()
        .zip(of(new))
        .filter_map(|((name, before), (_, after))| {
            let (before, after) = (before.map(|m| m.value), after.map(|m| m.value));
            (!same(before, after)).then_some(Moved {
                name,
                before,
                after,
            })
        })
        .collect()
}

fn same(a: Option<f64>, b: Option<f64>) -> bool {
    match (a, b) {
        (Some(a), Some(b)) => (a - b).abs() <= SAME * a.abs().max(1.0),
        (a, b) => a.is_none() && b.is_none(),
    }
}

/// The governing limits that move.
fn limits(before: &Weighed<'_>, after: &Weighed<'_>) -> Vec<LimitMoved> {
    [
        End::HotFloor,
        End::MakerGrade,
        End::RunningCeiling,
        End::StartCeiling,
        End::PourMargin,
        End::OilCeiling,
    ]
    .into_iter()
    .filter_map(|end| {
        let (was, is) = (governing(before, end), governing(after, end));
        let alike = match (&was, &is) {
            (Some(a), Some(b)) => {
                a.says == b.says
                    && a.part == b.part
                    && same(a.limit.map(|l| l.base), b.limit.map(|l| l.base))
                    && same(a.at, b.at)
            }
            (a, b) => a.is_none() && b.is_none(),
        };
        (!alike).then_some(LimitMoved {
            end,
            before: was,
            after: is,
        })
    })
    .collect()
}

/// The governing limit of an end, no oil given.
pub fn governing(w: &Weighed<'_>, end: End) -> Option<Governing> {
    let middle = &w.demands.middle;
    let demand = &middle.list[middle.governing(end)?];
    let at = middle.governing_temperature(demand);
    Some(Governing {
        says: demand.says.clone(),
        part: demand.part.clone(),
        limit: limit_amount(demand, at),
        at,
    })
}
