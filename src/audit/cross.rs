//! The two-by-two: whose oil it is, against whether it serves.

use super::Audit;
use super::judged::Judged;
use super::whose::Whose;
use crate::judge::Verdict;
use crate::model::Site;
use std::fmt::Write as _;

/// One row of the table.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Row {
    /// Whose oil.
    pub whose: Whose,
    /// Fills that serve.
    pub serves: Vec<String>,
    /// Fills that do not, barred ones with them.
    pub not: Vec<String>,
    /// Fills of which that is open, with the reason.
    pub open: Vec<(String, String)>,
}

/// The rows in their order: latest samples only. Of `not known`, machines without a sample are the
/// last, each with its reason.
pub fn rows(audit: &Audit, site: &Site) -> Vec<Row> {
    let mut rows: Vec<Row> = Whose::ALL
        .into_iter()
        .map(|whose| Row {
            whose,
            serves: Vec::new(),
            not: Vec::new(),
            open: Vec::new(),
        })
        .collect();
    for unit in &audit.units {
        let Some(j) = unit.latest().map(|p| &audit.judged[p]) else {
            continue;
        };
        // a sample that says nothing of today answers neither question
        let stale = j.too_old || j.twice;
        let whose = if stale { Whose::NotKnown } else { j.whose };
        let row = &mut rows[whose as usize];
        if j.is_barred() && !stale {
            row.not.push(unit.name.clone());
            continue;
        }
        match j.verdict() {
            Some(Verdict::Holds | Verdict::Tight) => row.serves.push(unit.name.clone()),
            Some(Verdict::Fails) => row.not.push(unit.name.clone()),
            _ => row.open.push((unit.name.clone(), why_open(j))),
        }
    }
    for u in &audit.unsampled {
        let name = site.points[u.point].address();
        let as_labelled = match (u.verdict, u.barred.is_empty()) {
            (_, false) => ", barred as labelled".to_owned(),
            (Some(verdict), true) => format!(", {} as labelled", verdict.word()),
            (None, true) => ", oil unknown".to_owned(),
        };
        rows[Whose::NotKnown as usize]
            .open
            .push((name, format!("never sampled{as_labelled}")));
    }
    rows
}

/// Why whether it serves is open.
pub fn why_open(j: &Judged) -> String {
    if j.twice {
        "two bottles of one day".to_owned()
    } else if j.too_old {
        "sample too old".to_owned()
    } else if let Some(serves) = &j.serves {
        serves
            .because
            .first()
            .cloned()
            .unwrap_or_else(|| "open".to_owned())
    } else {
        j.why_not_known
            .clone()
            .unwrap_or_else(|| "no viscosity was measured".to_owned())
    }
}

/// The answer in one line.
pub fn answer(audit: &Audit, site: &Site) -> String {
    let rows = rows(audit, site);
    let failing: usize = rows.iter().map(|r| r.not.len()).sum();
    let serving: usize = rows.iter().map(|r| r.serves.len()).sum();
    let sampled = audit.units.len();
    let other = rows[Whose::Another as usize].serves.len()
        + rows[Whose::Another as usize].not.len()
        + rows[Whose::Another as usize].open.len();
    if sampled == 0 {
        let n = audit.unsampled.len();
        return format!(
            "no fill was sampled; {n} {} judged as the label says",
            if n == 1 {
                "oil in use is"
            } else {
                "oils in use are"
            }
        );
    }
    let fills = |n: usize| {
        if n == 1 {
            "1 fill".to_owned()
        } else {
            format!("{n} fills")
        }
    };
    let mut says = format!(
        "of {} sampled, {serving} serve and {failing} do not",
        fills(sampled)
    );
    if other > 0 {
        let _ = write!(
            says,
            "; {other} {} another oil than labelled",
            if other == 1 { "holds" } else { "hold" }
        );
    }
    says
}
