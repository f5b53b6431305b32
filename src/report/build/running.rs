//! How hot each candidate runs by its own losses, and what it costs.

use super::case::Case;
use super::say;
use crate::judge::own::Running;
use crate::quantity::show::{Toward, significant};
use crate::quantity::{Measure, Power};
use crate::report::model::{Phrase, RunKind};

/// A sentence for each candidate whose losses are known, after one that says what they stand on.
pub(super) fn running(case: &Case<'_, '_>) -> Vec<Phrase> {
    let mut says: Vec<Phrase> = Vec::new();
    for c in &case.w.candidates {
        let Some(r) = &c.running else { continue };
        if says.is_empty() {
            says.push(stands_on(case, r).into());
        }
        let text = say::stopped(&format!(": {}", one(case, r)));
        says.push(Phrase::new().with(RunKind::Tag, case.id(c.oil)).and(text));
    }
    says
}

fn stands_on(case: &Case<'_, '_>, r: &Running) -> String {
    let ambient = say::temperature(r.drag.ambient.base(), case.units());
    r.stands_on(&ambient)
}

fn one(case: &Case<'_, '_>, r: &Running) -> String {
    let units = case.units();
    let watts = |w: f64| say::amount(Power::from_base(w).amount(), units, Toward::Nearest);
    let mut parts = Vec::new();
    if let Some(t) = r.stated {
        let by = if r.calibrated {
            "by the reading"
        } else {
            "as stated"
        };
        parts.push(format!("{} {by}", say::temperature(t, units)));
    }
    if let Some(t) = r.by_losses {
        parts.push(format!("{} by its losses", say::temperature(t, units)));
    }
    let kinds: Vec<String> = r
        .drag
        .by_kind
        .iter()
        .map(|(kind, p)| format!("{} {}", kind.word(), watts(p.base())))
        .collect();
    let mut drag = format!("drag {}", watts(r.drag.total.base()));
    if kinds.len() > 1 {
        drag = format!("{drag} ({})", kinds.join(", "));
    }
    for (part, t) in &r.drag.films {
        let t = say::temperature(t.base(), units);
        parts.push(format!("film of {} at {t}", case.part_name(part)));
    }
    if let Some(over) = r.over_in_use.filter(|w| w.abs() > 0.0) {
        let word = if over < 0.0 { "less" } else { "more" };
        drag = format!("{drag}, {} {word} than the oil in use", watts(over.abs()));
    }
    if let Some(kwh) = r.energy_kwh {
        drag = format!("{drag}, {} kWh a year", significant(kwh, 3, Toward::Up));
    }
    parts.push(drag);
    parts.join("; ")
}
