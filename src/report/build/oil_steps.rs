//! The calculation of an oil's sheet. The same relation read at many temperatures is set out once;
//! the other readings stand under it with the numbers that differ.

use super::say;
use super::steps::{applied, put, remarks};
use crate::quantity::show::{Toward, Units};
use crate::relation::Law;
use crate::report::model::CalcStep;
use crate::report::names::{Href, Place};
use crate::trace::{Derivation, How, Step, StepId};
use std::collections::BTreeMap;

/// The steps of an oil.
#[derive(Default)]
pub(super) struct OilSteps {
    pub(super) list: Vec<CalcStep>,
    /// Relations used, by name.
    pub(super) laws: BTreeMap<&'static str, &'static Law>,
    places: BTreeMap<StepId, usize>,
}

/// One relation and what it is asked for.
type Group = (&'static str, &'static str, String);

/// What is written under a group: the places of its first step and of its latest note.
struct Written {
    at: usize,
    first: Vec<(&'static str, String)>,
}

/// Symbol and value of what went into a step.
type Inputs = Vec<(&'static str, String)>;

impl OilSteps {
    /// Writes the calculation of an oil.
    pub(super) fn of(d: &Derivation, units: Units, place: &Place) -> Self {
        let mut out = Self::default();
        let mut groups: BTreeMap<Group, Written> = BTreeMap::new();
        for step in d.steps() {
            let How::Law { law, with } = &step.how else {
                continue;
            };
            out.laws.insert(law.name, law);
            let used: Vec<(&'static str, &Step)> = with
                .iter()
                .filter_map(|(symbol, id)| Some((*symbol, d.step(*id)?)))
                .collect();
            let inputs: Inputs = used
                .iter()
                .map(|(symbol, s)| (*symbol, say::amount(s.amount, units, Toward::Nearest)))
                .collect();
            let key = (law.name, step.symbol, step.says.to_string());
            let at = if let Some(known) = groups.get(&key) {
                out.likewise(known, &inputs, step, units);
                known.at
            } else {
                let at = out.list.len();
                out.full((law, step), &used, units, place);
                groups.insert(key, Written { at, first: inputs });
                at
            };
            for (_, s) in &used {
                if let Some(maker) = out.places.get(&s.id) {
                    out.list[*maker].carried = true;
                }
            }
            out.places.insert(step.id, at);
        }
        out
    }

    /// Number of the step that made a number.
    pub(super) fn number(&self, step: StepId) -> Option<&str> {
        let at = self.places.get(&step)?;
        Some(self.list[*at].number.as_str())
    }

    fn full(
        &mut self,
        (law, step): (&'static Law, &Step),
        used: &[(&'static str, &Step)],
        units: Units,
        place: &Place,
    ) {
        let number = self.list.len() + 1;
        let with = used
            .iter()
            .map(|(symbol, s)| {
                let link = self.places.get(&s.id).map(|at| {
                    let made = &self.list[*at];
                    (made.number.clone(), Href::here(&place.id(&made.id)))
                });
                put((units, law), symbol, s, link)
            })
            .collect();
        let mut notes: Vec<String> = step.notes.iter().map(|n| say::told(n, units)).collect();
        for (_, given) in used {
            notes.extend(remarks(given, units));
        }
        notes.dedup();
        self.list.push(CalcStep {
            id: format!("s{number}"),
            number: number.to_string(),
            title: say::sentence(&say::told(&step.says, units)),
            formula: Some(applied(law, used)),
            with,
            result: say::amount(step.amount, units, Toward::Nearest),
            aside: String::new(),
            source: say::set(law.source),
            notes,
            carried: false,
            governs: false,
        });
    }

    /// A further reading of a relation that is set out already.
    fn likewise(&mut self, known: &Written, inputs: &Inputs, step: &Step, units: Units) {
        let differ: Vec<String> = inputs
            .iter()
            .filter(|input| !known.first.contains(input))
            .map(|(symbol, shown)| format!("{symbol} = {shown}"))
            .collect();
        let result = say::amount(step.amount, units, Toward::Nearest);
        let mut says = if differ.is_empty() {
            result
        } else {
            format!("{}: {result}", differ.join(", "))
        };
        for note in &step.notes {
            says.push_str(", ");
            says.push_str(&say::told(note, units));
        }
        let notes = &mut self.list[known.at].notes;
        match notes.iter_mut().find(|n| n.starts_with(LIKEWISE)) {
            Some(line) => {
                line.pop();
                line.push_str("; ");
                line.push_str(&says);
                line.push('.');
            }
            None => notes.push(format!("{LIKEWISE}{says}.")),
        }
    }
}

/// How the line of further readings begins.
const LIKEWISE: &str = "Likewise with ";
