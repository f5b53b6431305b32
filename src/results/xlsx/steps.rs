//! The steps behind the verdicts, and what the workbook was made from.

use super::sheets::{Content, point_cells};
use super::{Cell, Sheet, columns};
use crate::quantity::show::unit_of;
use crate::trace::{Derivation, How, Step, StepId};
use crate::weighing::{Candidate, Weighed};

/// The steps behind the oil in use and the oil proposed.
pub(super) fn steps(content: &Content<'_, '_>) -> Sheet {
    let mut rows = Vec::new();
    for w in content.weighed() {
        let shown = w
            .candidates
            .iter()
            .enumerate()
            .filter(|(i, c)| *i == 0 || c.in_use);
        for (_, c) in shown {
            let told = content.scales.explain(w, c);
            let mut results: Vec<StepId> = told.margins.iter().map(|e| e.step).collect();
            results.dedup();
            for step in told.trace.behind(&results) {
                rows.push(step_row(content, w, c, step, &told.trace));
            }
        }
    }
    Sheet {
        name: "Steps",
        columns: columns(&[
            ("Machine", "", 14.0),
            ("Point", "", 12.0),
            ("Oil", "", 12.0),
            ("Step", "", 7.0),
            ("What", "", 44.0),
            ("About", "", 24.0),
            ("Symbol", "", 10.0),
            ("Result", "in the next column", 12.0),
            ("Unit", "", 10.0),
            ("Formula, or value as written", "", 50.0),
            ("With", "", 30.0),
            ("Source", "", 40.0),
            ("Remarks", "", 40.0),
        ]),
        rows,
    }
}

fn step_row(
    content: &Content<'_, '_>,
    w: &Weighed<'_>,
    c: &Candidate,
    step: &Step,
    trace: &Derivation,
) -> Vec<Cell> {
    let [machine, point] = point_cells(w.point);
    let unit = unit_of(step.amount.kind, content.scales.units);
    let name = |id: &StepId| format!("s{}", id.0 + 1);
    let (formula, with, source) = match &step.how {
        How::Law { law, with } => {
            let with: Vec<String> = with
                .iter()
                .filter(|(_, id)| trace.step(*id).is_some())
                .map(|(symbol, id)| format!("{symbol} = {}", name(id)))
                .collect();
            (
                law.formula.to_owned(),
                with.join(", "),
                law.source.to_owned(),
            )
        }
        How::Given { written, origin } => (written.clone(), String::new(), origin.words()),
    };
    vec![
        machine,
        point,
        Cell::text(content.scales.site.oils[c.oil].id.clone()),
        Cell::text(name(&step.id)),
        Cell::text(step.says.to_string()),
        Cell::maybe(step.about.as_deref()),
        Cell::text(step.symbol),
        Cell::number(Some(step.amount.in_unit(unit)), 3),
        Cell::text(unit.name),
        Cell::text(formula),
        Cell::text(with),
        Cell::text(source),
        Cell::text(step.notes.join("; ")),
    ]
}

pub(super) fn about(content: &Content<'_, '_>) -> Sheet {
    let frame = &content.scales.site.frame;
    let mut rows: Vec<Vec<Cell>> = Vec::new();
    let mut say = |what: &str, text: Option<String>| {
        if let Some(text) = text {
            rows.push(vec![Cell::text(what), Cell::text(text)]);
        }
    };
    say("Site", frame.site.clone());
    say("Client", frame.client.clone());
    say("Document", frame.document.clone());
    say("Revision", frame.revision.clone());
    say("Author", frame.author.clone());
    say("Status", frame.status.clone());
    say("Warning", content.warning.map(str::to_owned));
    say("Date of judgement", Some(content.head.date.clone()));
    say(
        "Program",
        Some(concat!("filmwright ", env!("CARGO_PKG_VERSION")).to_owned()),
    );
    say("Rules", Some(content.head.rules.clone()));
    say(
        "Fingerprint of all inputs and rules",
        Some(content.head.inputs.clone()),
    );
    for file in content.sources.files() {
        say("File read", Some(file.path.clone()));
    }
    for (word, means) in [
        (
            "holds",
            "every limit is met over the whole ambient band, and the reserve is kept",
        ),
        ("tight", "every limit is met, the reserve is not kept"),
        ("fails", "at least one limit is not met"),
        (
            "open",
            "an input is missing, and its plausible range lies on both sides of a limit",
        ),
        (
            "barred",
            "a suitability rule bars the oil here; it is not weighed",
        ),
        (
            "VG step",
            "one grade of ISO 3448; margins are slid along the oil's own line and read at 40 degC",
        ),
    ] {
        say(word, Some(means.to_owned()));
    }
    say(
        "Numbers",
        Some("unrounded; the number format rounds what is shown".to_owned()),
    );
    say(
        "Putting the files together again",
        Some("filmwright intake THIS.xlsx --sheet Inputs -o site.yaml; with --makes oils -o oils.yaml".to_owned()),
    );
    Sheet {
        name: "About",
        columns: columns(&[("What", "", 34.0), ("", "", 100.0)]),
        rows,
    }
}
