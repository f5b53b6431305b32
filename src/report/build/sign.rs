//! The signatures, each with what it accepts, and the paragraph for the work order.

use super::case::{Case, Now};
use super::say;
use crate::judge::Verdict;
use crate::model::machine::Fill;
use crate::quantity::show::Toward;
use crate::quantity::{Measure, Volume};
use crate::report::model::{Condition, Phrase, Point, SignBox, SignOff};
use std::fmt::Write as _;

/// The signatures of a machine's sheet.
pub(super) fn of_machine(cases: &[Case<'_, '_>], points: &[Point]) -> SignOff {
    let run = cases[0].run;
    let assumed: usize = points.iter().map(|p| p.assumptions.len()).sum();
    let missing: usize = points.iter().map(|p| p.gaps.rows.len()).sum();
    let steps: usize = points.iter().map(|p| p.steps.len()).sum();
    let client = run.scales.site.frame.client.as_deref();
    SignOff {
        meaning: "Signing accepts the answer for this machine, on these inputs and for this revision only.".to_owned(),
        boxes: vec![
            SignBox {
                role: "Prepared".to_owned(),
                accepts: format!(
                    "The inputs are as found; {} and {} are listed.",
                    say::count(assumed, "assumption", "assumptions"),
                    say::count(missing, "gap", "gaps")
                )
                .into(),
            },
            SignBox {
                role: "Checked".to_owned(),
                accepts: format!(
                    "{} followed, the governing limits agreed.",
                    say::sentence(&say::count(steps, "step", "steps"))
                )
                .into(),
            },
            SignBox {
                role: client.map_or_else(|| "Accepted".to_owned(), |c| format!("Accepted for {c}")),
                accepts: accepts(cases, points),
            },
        ],
    }
}

/// What the last signature lets happen.
fn accepts(cases: &[Case<'_, '_>], points: &[Point]) -> Phrase {
    let mut phrase = Phrase::new();
    for (i, (case, point)) in cases.iter().zip(points).enumerate() {
        if i > 0 {
            phrase = phrase.and(" ");
        }
        if let Some(name) = &point.name {
            phrase = phrase.and(format!("{}: ", say::sentence(name)));
        }
        phrase = of_point(case, point, phrase);
    }
    phrase
}

fn of_point(case: &Case<'_, '_>, point: &Point, phrase: Phrase) -> Phrase {
    let Some(lead) = case.lead.filter(|_| case.proposed) else {
        return phrase.and(match case.lead.map(|c| c.judgement.verdict) {
            Some(Verdict::Open) => {
                "Nothing is released: the verdict is open until the gaps are closed."
            }
            _ => "Nothing is released: no oil on the list serves.",
        });
    };
    let id = case.id(lead.oil);
    let phrase = if lead.in_use {
        phrase.tag(id).and(" may stay.")
    } else {
        phrase.and("The change to ").tag(id).and(" may be planned.")
    };
    let phrase = if lead.judgement.verdict == Verdict::Tight {
        phrase.and(" That it is tight is accepted.")
    } else {
        phrase
    };
    let numbers = of_oil(&point.conditions, id);
    match numbers.len() {
        0 => phrase,
        1 => phrase.and(format!(" Condition {} is met first.", numbers[0])),
        _ => phrase.and(format!(
            " Conditions {} are met first.",
            say::list(&numbers)
        )),
    }
}

fn of_oil(conditions: &[Condition], id: &str) -> Vec<String> {
    conditions
        .iter()
        .filter(|c| c.oils.iter().any(|o| o == id))
        .map(|c| c.number.to_string())
        .collect()
}

/// The paragraph for the work order; none where nothing is changed.
pub(super) fn work_order(cases: &[Case<'_, '_>], points: &[Point]) -> Option<String> {
    let lines: Vec<String> = cases
        .iter()
        .zip(points)
        .filter_map(|(case, point)| order(case, point))
        .collect();
    (!lines.is_empty()).then(|| lines.join("\n"))
}

fn order(case: &Case<'_, '_>, point: &Point) -> Option<String> {
    let lead = case.lead.filter(|c| case.proposed && !c.in_use)?;
    let id = case.id(lead.oil);
    let old = match case.now {
        Now::Weighed(c) => format!("remove {}", case.id(c.oil)),
        Now::Barred(b) => format!("remove {}", case.id(b.oil)),
        Now::Other(old) => format!("remove {old}"),
        Now::Unknown => "find out and remove what is in it".to_owned(),
        Now::Nothing => "new fill".to_owned(),
    };
    let amount = fill(case).map_or(String::new(), |f| format!("{f} "));
    let verb = if case.grease() {
        "grease with"
    } else {
        "fill with"
    };
    let count = case.w.point.count;
    let times = if count > 1 {
        format!(" ({count} machines)")
    } else {
        String::new()
    };
    let mut text = format!(
        "{}{times}: {old}; {verb} {amount}{id}.",
        case.w.point.address()
    );
    for c in point
        .conditions
        .iter()
        .filter(|c| c.oils.iter().any(|o| o == id))
    {
        let _ = write!(text, "\nCondition {}: {}", c.number, c.text.text());
    }
    Some(text)
}

/// What the point holds, as shown.
pub(super) fn fill(case: &Case<'_, '_>) -> Option<String> {
    let given = case.w.point.fill.as_ref()?.known()?;
    let amount = match given.value {
        Fill::Oil(volume) => volume.amount(),
        Fill::Grease(mass) => mass.amount(),
    };
    Some(say::amount(amount, case.units(), Toward::Nearest))
}

/// Litres of all its machines together, as a volume.
pub(super) fn volume(case: &Case<'_, '_>) -> Option<Volume> {
    let given = case.w.point.fill.as_ref()?.known()?;
    match given.value {
        Fill::Oil(volume) => Some(Volume::from_base(
            volume.base() * f64::from(case.w.point.count),
        )),
        Fill::Grease(_) => None,
    }
}
