//! What the limits were worked from: every value as it was written, with whose word it is and
//! where it stands.

use super::case::Case;
use super::say;
use crate::model::machine::InputLine as Written;
use crate::report::model::{InputLine, Origin, Phrase, RunKind};
use crate::source::place::Whose;

/// Keys that name things and decide nothing.
const NAMES: [&str; 3] = ["name", "area", "like"];

/// Whose word a value is, as its letter.
pub(super) fn origin(whose: Whose) -> Origin {
    match whose {
        Whose::Measured => Origin::Measured,
        Whose::Maker | Whose::Nameplate => Origin::Maker,
        Whose::Register => Origin::Register,
        Whose::Supplier => Origin::Supplier,
        Whose::House => Origin::House,
        Whose::Standard => Origin::Standard,
        Whose::Assumed => Origin::Assumed,
        Whose::NotStated => Origin::NotStated,
    }
}

/// The inputs of a point.
pub(super) fn lines(case: &Case<'_, '_>) -> Vec<InputLine> {
    case.w
        .point
        .inputs
        .iter()
        .filter(|line| !NAMES.contains(&line.key.as_str()))
        .map(|line| one(case, line))
        .collect()
}

/// What is written, with its key and part.
pub(super) fn named(line: &Written) -> String {
    let value = say::set(&line.written);
    match &line.about {
        // the first key of a part repeats its label
        Some(about) if *about == format!("{} {}", line.key, line.written) => about.clone(),
        Some(about) if about.starts_with(line.key.as_str()) => format!("{about}: {value}"),
        Some(about) => format!("{about}, {} {value}", line.key),
        None => format!("{} {value}", line.key),
    }
}

fn one(case: &Case<'_, '_>, line: &Written) -> InputLine {
    let mut text = Phrase::new().and(named(line));
    let extra: Vec<&str> = [&line.origin.dated, &line.origin.note]
        .into_iter()
        .flatten()
        .map(String::as_str)
        .collect();
    if !extra.is_empty() {
        text = text.with(RunKind::Quiet, format!(", {}", say::set(&extra.join(", "))));
    }
    let stands = case.stands(&line.origin.place);
    let from = match &line.origin.inherited {
        Some(by) => format!("{by}, {stands}"),
        None => stands,
    };
    InputLine {
        origin: origin(line.origin.whose),
        text,
        from,
    }
}
