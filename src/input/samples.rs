//! The map of a laboratory's table and the list of events, as far as their form goes.

use super::fields::{Fields, Slot};
use super::file::FileKind;
use super::keys::samples::{COLUMNS, EVENT, EVENTS, SAMPLES};
use super::reader::Reader;
use crate::quantity::Volume;
use crate::source::yaml::Node;

/// Reports what is wrong with the keys and words of a samples or events file.
pub fn check(reader: &mut Reader<'_>, kind: FileKind, root: &Node) {
    match kind {
        FileKind::Samples => samples(reader, root),
        FileKind::Events => events(reader, root),
        FileKind::Site | FileKind::Oils => {}
    }
}

fn samples(reader: &mut Reader<'_>, root: &Node) {
    let fields = Fields::read(reader, root, &SAMPLES, "samples");
    fields.text(reader, "read");
    fields.word(reader, "dates");
    if let Some(slot) = fields.get("columns") {
        let columns = Fields::read(reader, slot.node, &COLUMNS, "samples, columns");
        let names: Vec<&'static str> = columns.in_file_order().iter().map(|s| s.key.name).collect();
        for name in names {
            columns.text(reader, name);
        }
    }
    for name in ["units", "aliases"] {
        if let Some(slot) = fields.get(name) {
            table(reader, slot);
        }
    }
}

/// A record of texts under names of the user's own.
fn table(reader: &mut Reader<'_>, slot: &Slot<'_>) {
    let Some(entries) = slot.node.entries() else {
        super::site::not_named(reader, slot.node, &slot.within, slot.key.name);
        return;
    };
    for entry in entries {
        let one = Slot {
            name: &entry.key,
            node: &entry.value,
            ..slot.clone()
        };
        one.text(reader);
    }
}

fn events(reader: &mut Reader<'_>, root: &Node) {
    let fields = Fields::read(reader, root, &EVENTS, "events");
    let Some(slot) = fields.get("events") else {
        return;
    };
    let Some(items) = slot.node.items() else {
        super::site::list_wanted(reader, slot);
        return;
    };
    for node in items {
        let event = Fields::read(reader, node, &EVENT, "events");
        event.must(reader, node);
        event.text(reader, "machine");
        event.text(reader, "oil");
        event.day(reader, "date");
        event.word(reader, "what");
        event.stated::<Volume>(reader, "amount");
    }
}
