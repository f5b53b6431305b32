//! Points without a bottle, and bottles without a machine.

use super::{Finding, sentence};
use crate::audit::bottle::Bottle;
use crate::audit::limits::Level;
use crate::audit::{Audit, Unmatched};
use crate::judge::Verdict;
use crate::weighing::Scales;

pub(super) fn unsampled(audit: &Audit, scales: &Scales<'_>) -> Vec<Finding> {
    let mut list = Vec::new();
    for u in &audit.unsampled {
        let name = scales.site.points[u.point].address();
        let oil = u.oil.map_or("an unknown oil".to_owned(), |o| {
            scales.site.oils[o].id.clone()
        });
        let found = if u.barred.is_empty() {
            (u.verdict == Some(Verdict::Fails)).then(|| {
                (
                    "As labelled it does not serve",
                    u.because.first().cloned().unwrap_or_default(),
                )
            })
        } else {
            let by: Vec<&str> = u.barred.iter().map(|c| c.says.as_str()).collect();
            Some(("The labelled oil is barred here", by.join("; ")))
        };
        let Some((title, why)) = found else {
            continue;
        };
        list.push(Finding {
            kind: "unsampled",
            level: Level::Act,
            machines: vec![name],
            title: format!("{title}, not sampled"),
            text: format!(
                "No sample; judged as the label says ({oil}). {}.",
                sentence(&why)
            ),
            act: "change the specification (filmwright weigh), and draw a sample".to_owned(),
            judged: None,
            urgency: 28.0,
        });
    }
    list
}

pub(super) fn unmatched(audit: &Audit, u: &Unmatched) -> Finding {
    let b = &audit.bottles[u.bottle];
    let name = if b.machine.is_empty() {
        b.name()
    } else {
        b.machine.clone()
    };
    let judged = audit.judged.iter().position(|j| j.bottle == u.bottle);
    let causes = judged.map_or(String::new(), |p| {
        let named: Vec<&str> = audit.judged[p]
            .diagnosis
            .causes
            .iter()
            .map(|n| n.cause.says())
            .collect();
        if named.is_empty() {
            String::new()
        } else {
            format!(" Against its label: {}.", named.join(", "))
        }
    });
    let meant = u
        .meant
        .as_ref()
        .map_or(String::new(), |m| format!(" {m} may be meant."));
    Finding {
        kind: "unmatched",
        level: Level::Watch,
        machines: vec![name],
        title: "Bottle without a machine".to_owned(),
        text: format!("{} ({}): {}.{meant}{causes}", b.name(), row(b), u.why),
        act: "add an alias to the samples file, or --match \"NAME=TAG\"".to_owned(),
        judged,
        urgency: 70.0,
    }
}

fn row(b: &Bottle) -> String {
    format!("row {}", b.place.row)
}
