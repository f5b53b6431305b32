//! Oil files into oils.

mod build;
mod facts;
mod formulation;
mod line;
mod other;
mod shear;
mod viscosity;

pub(super) use facts::{one, set};
pub(super) use other::say_unusual;
pub(super) use shear::stated_twice;

use super::fields::Fields;
use super::keys::{is_private, oil::OIL};
use super::like::{self, Copying};
use super::reader::Reader;
use crate::model::Oil;
use crate::model::rulebook::Rulebook;
use crate::problem::{Code, Write};
use crate::source::Place;
use crate::source::yaml::{Entry, Node};
use std::collections::BTreeMap;

/// A new viscosity makes these figures of the copied oil meaningless.
const OF_ANOTHER_VISCOSITY: &[&str] = &[
    "points",
    "VI",
    "sheared",
    "base oil",
    "cold viscosity",
    "CCS",
    "MRV",
    "yield stress",
    "t150000",
    "HTHS",
    "alpha",
];

const COPYING: Copying = Copying {
    never: &["like", "name", "note", "price", "in stock"],
    together: &[&["sheared", "shear loss", "PSSI"]],
};

/// Reads the oils of all oil files, in the order of the files.
pub fn read(
    reader: &mut Reader<'_>,
    files: &[&Node],
    rules: &Rulebook,
    complete: bool,
) -> Vec<Oil> {
    let entries = entries(reader, files);
    let mut own: BTreeMap<String, Fields<'_>> = BTreeMap::new();
    for entry in &entries {
        let id = entry.key.text.trim();
        own.insert(id.to_owned(), Fields::read(reader, &entry.value, &OIL, id));
    }
    entries
        .iter()
        .filter_map(|entry| {
            let id = entry.key.text.trim();
            let fields = copied(reader, &own, id, complete);
            let oil = build::oil(reader, id, entry, &fields, rules);
            if oil.is_none() {
                reader.unread_oils.insert(id.to_owned());
            }
            oil
        })
        .collect()
}

/// The oils of the files; a name used twice is reported and kept once.
fn entries<'t>(reader: &mut Reader<'_>, files: &[&'t Node]) -> Vec<&'t Entry> {
    let mut found: Vec<&'t Entry> = Vec::new();
    let mut first: BTreeMap<&'t str, &'t Entry> = BTreeMap::new();
    for entry in files.iter().filter_map(|f| f.entries()).flatten() {
        let id = entry.key.text.trim();
        if id == "file" || is_private(id) {
            continue;
        }
        if let Some(earlier) = first.get(id) {
            name_twice(reader, "oils", earlier, entry);
        } else {
            first.insert(id, entry);
            found.push(entry);
        }
    }
    found
}

/// Two records of one name.
pub(super) fn name_twice(reader: &mut Reader<'_>, what: &str, first: &Entry, second: &Entry) {
    let name = first.key.text.trim();
    let other = format!("{} b", second.key.text.trim());
    let problem = reader
        .at(
            Code::NameTwice,
            format!("two {what} are called {name}"),
            first.key.span,
            "",
        )
        .related(Place::Text(second.key.span), "")
        .why("verdicts would depend on which is read first")
        .write(Write::edit(second.key.span, other).said("rename one, or delete one"));
    reader.report(problem);
}

/// The values of an oil with those copied.
fn copied<'t>(
    reader: &mut Reader<'_>,
    own: &BTreeMap<String, Fields<'t>>,
    id: &str,
    complete: bool,
) -> Fields<'t> {
    let mut fields = own
        .get(id)
        .cloned()
        .expect("every entry was put into the map");
    for (name, base) in like::chain(reader, own, id, complete) {
        let restated = fields.has("viscosity") || fields.has("base oil");
        let more: &[&'static str] = if restated { OF_ANOTHER_VISCOSITY } else { &[] };
        let dropped: Vec<&str> = more
            .iter()
            .copied()
            .filter(|k| base.has(k) && !fields.has(k))
            .collect();
        if !dropped.is_empty() {
            drops(reader, &fields, name, &dropped);
        }
        let except = COPYING.except(&fields, more);
        fields.inherit(base, &format!("like {name}"), &except);
    }
    fields
}

fn drops(reader: &mut Reader<'_>, fields: &Fields<'_>, base: &str, dropped: &[&str]) {
    let Some(slot) = fields.get("like") else {
        return;
    };
    let note = reader
        .at(
            Code::LikeDrops,
            format!("not copied from {base}: {}", dropped.join(", ")),
            slot.node.span,
            &slot.within,
        )
        .why("they were measured on an oil of another viscosity");
    reader.report(note);
}
