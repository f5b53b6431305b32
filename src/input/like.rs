//! Records that copy from others of their kind.

use super::fields::Fields;
use super::reader::Reader;
use crate::problem::{Code, Write, suggest};
use std::collections::BTreeMap;

/// A chain may have this many records beside the first.
const DEEPEST: usize = 5;

/// How records of a kind copy.
pub struct Copying {
    /// What is never copied.
    pub never: &'static [&'static str],
    /// Groups of keys that state one thing: a record that states one of a group copies none of it.
    pub together: &'static [&'static [&'static str]],
}

/// The records a name copies from, nearest first; what is wrong with the chain is reported.
pub fn chain<'r, 't>(
    reader: &mut Reader<'_>,
    all: &'r BTreeMap<String, Fields<'t>>,
    name: &str,
    complete: bool,
) -> Vec<(&'r str, &'r Fields<'t>)> {
    let mut found: Vec<(&'r str, &'r Fields<'t>)> = Vec::new();
    let mut at = all.get(name);
    while let Some(fields) = at {
        let Some(slot) = fields.get("like") else {
            break;
        };
        let Some(base) = slot.text(reader).map(str::trim) else {
            break;
        };
        let Some((key, next)) = all.get_key_value(base) else {
            if complete {
                unknown(reader, all, fields, base);
            }
            break;
        };
        let again = base == name || found.iter().any(|(n, _)| *n == base);
        if again || found.len() == DEEPEST {
            broken(reader, fields, name, again, &found);
            break;
        }
        found.push((key.as_str(), next));
        at = Some(next);
    }
    found
}

fn unknown(
    reader: &mut Reader<'_>,
    all: &BTreeMap<String, Fields<'_>>,
    fields: &Fields<'_>,
    base: &str,
) {
    let Some(slot) = fields.get("like") else {
        return;
    };
    let span = slot.node.span;
    let meant = suggest::certain(base, all.keys().map(String::as_str));
    let mut problem = reader.at(
        Code::LikeUnknown,
        format!("there is no {base} to copy from"),
        span,
        &slot.within,
    );
    problem = match meant {
        Some(meant) => problem.did_you_mean(meant).write(Write::edit(span, meant)),
        None => problem.write(
            Write::edit(slot.name.span, format!("x-{}", slot.name.text))
                .remark("or the name of a record that exists"),
        ),
    };
    reader.report(problem);
}

fn broken(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    name: &str,
    again: bool,
    found: &[(&str, &Fields<'_>)],
) {
    let Some(slot) = fields.get("like") else {
        return;
    };
    let names: Vec<&str> = std::iter::once(name)
        .chain(found.iter().map(|(n, _)| *n))
        .collect();
    let way = names.join(" like ");
    let base = slot.node.text().unwrap_or("").trim();
    let (code, message, why) = if again {
        (
            Code::LikeLoop,
            format!("{base} is copied from itself"),
            format!("{way} like {base}: nobody states the values"),
        )
    } else {
        (
            Code::LikeDeep,
            format!("copied over more than {DEEPEST} records"),
            format!("{way} like {base}: nobody can follow where a value comes from"),
        )
    };
    let last = found.last().map_or("NAME", |(n, _)| *n);
    let mut problem = reader
        .at(code, message, slot.node.span, &slot.within)
        .why(why);
    problem = if again {
        let private = format!("x-{}", slot.name.text);
        problem.write(Write::edit(slot.name.span, private).remark("and the values themselves"))
    } else {
        problem.write(
            Write::edit(slot.name.span, format!("x-{}", slot.name.text))
                .remark(format!("and the values of {base} in {last}")),
        )
    };
    reader.report(problem);
}

impl Copying {
    /// What a record does not take from another: what is never copied, what it states itself in
    /// another way, and what else is named.
    pub fn except(&self, fields: &Fields<'_>, more: &[&'static str]) -> Vec<&'static str> {
        let mut out: Vec<&'static str> = self.never.to_vec();
        out.extend(more);
        for group in self.together {
            if group.iter().any(|k| fields.has(k)) {
                out.extend(*group);
            }
        }
        out
    }
}
