//! The site file into a site.

mod accept;
mod checks;
mod facts;
mod house;
mod limits;
mod machines;
mod point;
mod sump;
mod values;

pub(super) use accept::list_wanted;
pub(super) use limits::read as limits;
pub(super) use machines::named_or_private;

use super::fields::Fields;
use super::keys::{is_private, machine::AREA, site::SITE};
use super::oils::name_twice;
use super::overlay::Overlay;
use super::reader::Reader;
use crate::model::Oil;
use crate::model::rulebook::Rulebook;
use crate::model::site::{Frame, Site};
use crate::problem::{Code, Write};
use crate::relation::bearing::designation::DimensionTable;
use crate::source::yaml::{Entry, Node, NodeKind};
use std::collections::BTreeMap;

/// What the reader of a site looks names up in.
pub struct Known<'k> {
    /// The rules: components, base stocks.
    pub rules: &'k Rulebook,
    /// Dimensions of rolling bearings.
    pub bearings: &'k DimensionTable,
    /// Ids of the rules by which limits are worked out.
    pub calculated: &'k [&'k str],
    /// Whether every file was read to its end: only then is a missing name a mistake.
    pub complete: bool,
    /// Whether there is any oil file.
    pub has_oils: bool,
}

/// Everything a point is read with.
pub(super) struct Scene<'s, 't> {
    pub(super) known: &'s Known<'s>,
    pub(super) oils: &'s [Oil],
    pub(super) oil_places: BTreeMap<&'s str, usize>,
    pub(super) areas: BTreeMap<String, Fields<'t>>,
    pub(super) house_rules: Vec<String>,
    pub(super) overlays: &'s [Overlay<'t>],
}

/// Reads a site file; the oils have been read before.
pub fn read<'t>(
    reader: &mut Reader<'_>,
    root: &'t Node,
    oils: Vec<Oil>,
    known: &Known<'_>,
    overlays: &[Overlay<'t>],
) -> Site {
    let top = Fields::read(reader, root, &SITE, "");
    if known.complete {
        top.must(reader, root);
    }
    let frame = frame(reader, &top);
    let house = house::read(reader, &top, known);
    let areas = areas(reader, &top);
    let scene = Scene {
        known,
        oils: &oils,
        oil_places: oils
            .iter()
            .enumerate()
            .map(|(i, oil)| (oil.id.as_str(), i))
            .collect(),
        areas,
        house_rules: house.rules.iter().map(|r| r.name.clone()).collect(),
        overlays,
    };
    let points = machines::read(reader, &top, &scene);
    let accept = accept::acceptances(reader, &top, &points, &scene);
    let expect = accept::expectations(reader, &top, &points, &scene);
    for point in &points {
        reader.problems.allow(&point.address(), &point.allow);
    }
    Site {
        frame,
        house,
        points,
        oils,
        accept,
        expect,
        samples: Vec::new(),
        events: Vec::new(),
    }
}

fn frame(reader: &mut Reader<'_>, top: &Fields<'_>) -> Frame {
    Frame {
        site: top.text(reader, "site"),
        client: top.text(reader, "client"),
        document: top.text(reader, "document"),
        revision: top.text(reader, "revision"),
        author: top.text(reader, "author"),
        status: top.text(reader, "status"),
        reviewed: top.day(reader, "reviewed"),
        notes: top.text(reader, "notes"),
        logo: top.text(reader, "logo"),
        currency: top.text(reader, "currency"),
    }
}

fn areas<'t>(reader: &mut Reader<'_>, top: &Fields<'t>) -> BTreeMap<String, Fields<'t>> {
    let mut found = BTreeMap::new();
    for entry in named(reader, top, "areas", "areas") {
        let name = entry.key.text.trim();
        let within = format!("area {name}");
        let fields = Fields::read(reader, &entry.value, &AREA, &within);
        point::check_area(reader, &fields);
        found.insert(name.to_owned(), fields);
    }
    found
}

/// The records under a key that holds records by name; a name used twice is kept once.
pub(super) fn named<'t>(
    reader: &mut Reader<'_>,
    fields: &Fields<'t>,
    key: &str,
    what: &str,
) -> Vec<&'t Entry> {
    let Some(slot) = fields.get(key) else {
        return Vec::new();
    };
    let Some(entries) = slot.node.entries() else {
        not_named(reader, slot.node, &slot.within, key);
        return Vec::new();
    };
    let mut first: BTreeMap<&'t str, &'t Entry> = BTreeMap::new();
    let mut found = Vec::new();
    for entry in entries {
        let name = entry.key.text.trim();
        if is_private(name) {
            continue;
        }
        if let Some(earlier) = first.get(name) {
            name_twice(reader, what, earlier, entry);
        } else {
            first.insert(name, entry);
            found.push(entry);
        }
    }
    found
}

/// A list or a text where names with records are wanted.
pub(super) fn not_named(reader: &mut Reader<'_>, node: &Node, within: &str, key: &str) {
    if matches!(node.kind, NodeKind::Refused) {
        return;
    }
    let items = node.items().unwrap_or_default().iter();
    let names = items.filter_map(Node::text).chain(node.text());
    let records: Vec<String> = names
        .filter(|t| !t.is_empty())
        .map(|t| format!("{}: {{ }}", super::reader::as_plain(t, true)))
        .collect();
    let records = if records.is_empty() {
        "NAME: { }".to_owned()
    } else {
        records.join(", ")
    };
    let span = super::fields::first_line(reader, node);
    let problem = reader
        .at(
            Code::RecordWanted,
            format!("`{key}` is a record of names"),
            span,
            within,
        )
        .why("each name stands on its own line, its keys deeper below it")
        .write(
            Write::edit(node.span, format!("{{ {records} }}"))
                .remark("with the keys in the inner braces"),
        );
    reader.report(problem);
}
