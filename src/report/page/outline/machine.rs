//! The numbers of a machine's sheet: those of its points, one after the other, then its own.

use super::{Counter, Outline, Part};
use crate::report::model::{MachineSheet, Origin, Point};

pub(super) fn machine(counter: &mut Counter<'_>, out: &mut Outline, body: &MachineSheet) {
    for point in &body.points {
        let mut part = Part::default();
        let under = if point.name.is_some() {
            point.key.as_str()
        } else {
            ""
        };
        numbered(counter, &mut part, under, point);
        out.points.push(part);
    }
    counter.sections(
        &mut out.sheet,
        "",
        &[
            (
                "cautions",
                "Cautions",
                "Cautions",
                !body.cautions.is_empty(),
            ),
            (
                "work-order",
                "For the work order",
                "Work order",
                body.work_order.is_some(),
            ),
            ("notes", "Notes", "Notes", body.notes.is_some()),
            ("sign", "Sign-off", "Sign-off", !body.sign.boxes.is_empty()),
        ],
    );
}

fn numbered(counter: &mut Counter<'_>, part: &mut Part, under: &str, point: &Point) {
    let weighed = point.candidates.is_some() || !point.barred.is_empty();
    let changes = point.changes.as_ref();
    let basis =
        !point.assumptions.is_empty() || !point.gaps.rows.is_empty() || !point.gaps.idle.is_empty();
    let needs = !point.needs.rows.is_empty() || !point.inputs.is_empty();
    counter.sections(
        part,
        under,
        &[
            ("need", "What it needs", "Need", needs),
            (
                "curves",
                "Viscosity over temperature",
                "Curves",
                point.curves.is_some(),
            ),
            ("oils", "Oils weighed", "Oils", weighed),
            (
                "conditions",
                "Conditions",
                "Conditions",
                !point.conditions.is_empty(),
            ),
            (
                "ambient",
                "Where each oil holds",
                "Ambient",
                point.ambient.is_some(),
            ),
            (
                "change",
                "What would change it",
                "Change",
                changes.is_some(),
            ),
            (
                "change-over",
                "Change-over",
                "Change-over",
                !point.change_over.is_empty(),
            ),
            (
                "calc",
                "Calculation",
                "Calculation",
                !point.steps.is_empty() || point.steps_as.is_some(),
            ),
            ("basis", "Assumed and missing", "Assumed", basis),
        ],
    );
    counter.tables(
        part,
        &[
            ("needs", !point.needs.rows.is_empty()),
            ("oils", point.candidates.is_some()),
            ("barred", !point.barred.is_empty()),
            ("changes", changes.is_some_and(|c| !c.rows.is_empty())),
            ("assumed", !point.assumptions.is_empty()),
            ("gaps", !point.gaps.rows.is_empty()),
        ],
    );
    part.origins = origins(point);
    if let Some(curves) = &point.curves {
        counter.figure(part, Some(&curves.figure.id));
        for detail in &curves.figure.details {
            counter.figure(part, Some(&detail.id));
        }
    }
    if let Some(ambient) = &point.ambient {
        counter.figure(part, ambient.bands.as_ref().map(|f| f.id.as_str()));
        counter.figure(part, ambient.season.as_ref().map(|f| f.id.as_str()));
    }
}

/// The origins of a point's limits, inputs and steps, each once, in the order of their key.
fn origins(point: &Point) -> Vec<Origin> {
    let limits = point.needs.rows.iter().filter_map(|row| row.origin);
    let inputs = point.inputs.iter().map(|line| line.origin);
    let puts = point
        .steps
        .iter()
        .flat_map(|step| &step.with)
        .filter_map(|put| put.origin);
    let seen: Vec<Origin> = limits.chain(inputs).chain(puts).collect();
    Origin::ALL
        .into_iter()
        .filter(|origin| seen.contains(origin))
        .collect()
}
