//! Keys that a record does not have.

use super::Fields;
use crate::input::keys::{Record, owners, spelt};
use crate::input::reader::Reader;
use crate::problem::{Code, Problem, Write};
use crate::source::yaml::Entry;

/// Reports a key that is none of the record's.
pub(super) fn report(reader: &mut Reader<'_>, fields: &Fields<'_>, entry: &Entry) {
    let name = spelt(&entry.key.text);
    let record = fields.record;
    if name == "clearance" && record.key("radial clearance").is_some() {
        clearance(reader, fields, entry);
        return;
    }
    let meant = record.meant(&name);
    let elsewhere = owners(&name, record);
    let at = |code, message: String| reader.at(code, message, entry.key.span, &fields.within);
    let problem: Problem = if let Some(meant) = meant.filter(|_| elsewhere.is_empty()) {
        at(Code::KeyUnknown, format!("unknown key \"{name}\""))
            .did_you_mean(meant)
            .write(Write::edit(entry.key.span, meant))
    } else if elsewhere.is_empty() {
        let known: Vec<&str> = record.all().map(|k| k.name).collect();
        at(Code::KeyUnknown, format!("unknown key \"{name}\""))
            .why(understood(record, &known))
            .write(private(entry))
    } else {
        let owners: Vec<&str> = elsewhere.iter().map(|r| r.name).collect();
        at(
            Code::KeyMisplaced,
            format!("`{name}` does not belong to {}", record.name),
        )
        .why(format!("it belongs to {}", listed(&owners)))
        .write(private(entry))
    };
    reader.report(problem);
}

fn understood(record: &Record, known: &[&str]) -> String {
    if known.len() <= 12 {
        format!("{} has {}", record.name, listed(known))
    } else {
        format!(
            "the keys of {} are listed by: filmwright help keys",
            record.name
        )
    }
}

fn private(entry: &Entry) -> Write {
    Write::edit(entry.key.span, format!("x-{}", entry.key.text))
        .remark("keeps it as a remark; or delete it")
}

/// `a, b and c`.
pub(super) fn listed(names: &[&str]) -> String {
    match names {
        [] => String::new(),
        [one] => (*one).to_owned(),
        [init @ .., last] => format!("{} and {last}", init.join(", ")),
    }
}

fn clearance(reader: &mut Reader<'_>, fields: &Fields<'_>, entry: &Entry) {
    let problem = reader
        .at(
            Code::ClearanceWhich,
            "a clearance may be radial or diametral",
            entry.key.span,
            &fields.within,
        )
        .why("one is twice the other, and the film follows its square")
        .write(Write::edit(entry.key.span, "radial clearance"))
        .write(Write::edit(entry.key.span, "diametral clearance"));
    reader.report(problem);
}
