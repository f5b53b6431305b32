//! `why`: the traced steps behind one verdict, as text.

use crate::cli::text::folded;
use crate::quantity::show::{Toward, Units, quantity};
use crate::results::json::step_name;
use crate::source::place::Place;
use crate::trace::{Derivation, How, Step, StepId};
use std::fmt::Write as _;

/// The steps some results stand on, in order.
pub fn steps(
    trace: &Derivation,
    results: &[StepId],
    units: Units,
    width: usize,
    place: &dyn Fn(&Place) -> String,
) -> String {
    let mut out = String::new();
    let mut about: Option<&String> = None;
    for step in trace.behind(results) {
        if step.about.as_ref() != about {
            about = step.about.as_ref();
            if let Some(about) = about {
                let _ = writeln!(out, "\n  {about}");
            }
        }
        out.push_str(&one(trace, step, units, width, place));
    }
    out
}

fn one(
    trace: &Derivation,
    step: &Step,
    units: Units,
    width: usize,
    place: &dyn Fn(&Place) -> String,
) -> String {
    let name = step_name(step.id);
    let result = quantity(step.amount, units, Toward::Nearest);
    let mut out = format!("  {name:>4}  {}: {} = {result}\n", step.says, step.symbol);
    let mut more = |text: String| out.push_str(&folded(&text, "          ", width));
    match &step.how {
        How::Law { law, with } => {
            more(law.formula.to_owned());
            let inputs: Vec<String> = with
                .iter()
                .filter_map(|(symbol, id)| {
                    let used = trace.step(*id)?;
                    let value = quantity(used.amount, units, Toward::Nearest);
                    Some(format!("{symbol} = {value} ({})", step_name(*id)))
                })
                .collect();
            if !inputs.is_empty() {
                more(format!("with {}", inputs.join(", ")));
            }
            more(law.source.to_owned());
        }
        How::Given { written, origin } => {
            let mut from = origin.words();
            if let Some(inherited) = &origin.inherited {
                let _ = write!(from, ", {inherited}");
            }
            let at = place(&origin.place);
            if !at.is_empty() {
                let _ = write!(from, ", {at}");
            }
            if !written.is_empty() && *written != result {
                let _ = write!(from, "; written {written}");
            }
            more(from);
        }
    }
    for note in &step.notes {
        out.push_str(&folded(&format!("note: {note}"), "          ", width));
    }
    out
}
