//! The steps behind the margins of one sample.

use crate::audit::{Audit, worked};
use crate::quantity::show::{Toward, unit_of};
use crate::report::build::{Report, inputs, say};
use crate::report::model::{AuditSheet, CalcStep, Put};
use crate::report::names::Href;
use crate::trace::{How, StepId};
use std::collections::BTreeMap;

/// The worked example: the steps behind the margins of one sample.
pub(super) fn with_steps(report: &Report<'_>, audit: &Audit, mut body: AuditSheet) -> AuditSheet {
    let scales = report.run.scales;
    let Some(j) = worked::example(audit) else {
        return body;
    };
    let Some((told, _)) = worked::explanation(scales, audit, j) else {
        return body;
    };
    let Some(s) = &j.serves else {
        return body;
    };
    let judged = [s.judgement.hot, s.judgement.cold].into_iter().flatten();
    let results: Vec<StepId> = judged
        .filter_map(|m| told.margins.iter().find(|e| e.demand == m.demand))
        .map(|e| e.step)
        .collect();
    let mut places: BTreeMap<StepId, usize> = BTreeMap::new();
    for step in told.trace.behind(&results) {
        let How::Law { law, with } = &step.how else {
            continue;
        };
        let number = body.steps.len() + 1;
        let puts = with.iter().filter_map(|(symbol, id)| {
            let used = told.trace.step(*id)?;
            let link = places.get(id).map(|at| link(report, &body.steps[*at]));
            let from = match &used.how {
                How::Given { origin, .. } => Some(inputs::origin(origin.whose)),
                How::Law { .. } => None,
            };
            Some(Put {
                symbol: (*symbol).to_owned(),
                number: String::new(),
                shown: say::amount(used.amount, scales.units, Toward::Nearest),
                origin: from,
                step: link,
            })
        });
        let with: Vec<Put> = puts.collect();
        places.insert(step.id, body.steps.len());
        let governs = results.contains(&step.id);
        body.steps.push(CalcStep {
            id: format!("s{number}"),
            number: number.to_string(),
            title: say::sentence(&say::told(&step.says, scales.units)),
            formula: Some(law.formula.to_owned()),
            with,
            result: say::amount(step.amount, scales.units, Toward::Nearest),
            aside: if governs {
                "margin of the sample".to_owned()
            } else {
                String::new()
            },
            source: say::set(law.source),
            notes: step
                .notes
                .iter()
                .map(|n| say::told(n, scales.units))
                .collect(),
            carried: !governs,
            governs,
        });
    }
    let address = j
        .point
        .map_or(String::new(), |p| scales.site.points[p].address());
    body.steps_title = format!(
        "{address}, bottle {}: the same steps give every row of the table. Unit of margins: {}.",
        audit.bottles[j.bottle].name(),
        unit_of(crate::quantity::Kind::VgStep, scales.units).name
    );
    body
}

/// A step's number and where it stands on the sheet.
fn link(report: &Report<'_>, step: &CalcStep) -> (String, Href) {
    let place = report.plan.audit.as_ref().map(|f| f.place.id(&step.id));
    (step.number.clone(), Href::here(&place.unwrap_or_default()))
}
