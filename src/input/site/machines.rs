//! Machines, what they copy and inherit, and their points.

use super::{Scene, named, point};
use crate::input::fields::Fields;
use crate::input::keys::machine::MACHINE;
use crate::input::like::{self, Copying};
use crate::input::reader::Reader;
use crate::model::machine::Point;
use crate::problem::{Code, Problem, Write, suggest};
use crate::source::Place;
use crate::source::yaml::Entry;
use std::collections::BTreeMap;

const SUMP: &[&str] = &["sump rise", "sump", "at ambient"];
/// What depends on where a machine stands.
const OF_THE_PLACE: &[&str] = &[
    "ambient",
    "monthly ambient",
    "sump rise",
    "sump",
    "at ambient",
    "heater",
    "heater power",
    "heater area",
];

const COPYING: Copying = Copying {
    never: &["like", "name", "notes", "register row"],
    together: &[SUMP],
};

pub(super) fn read<'t>(
    reader: &mut Reader<'_>,
    top: &Fields<'t>,
    scene: &Scene<'_, 't>,
) -> Vec<Point> {
    let entries = named(reader, top, "machines", "machines");
    let mut own: BTreeMap<String, Fields<'t>> = BTreeMap::new();
    for entry in &entries {
        let tag = entry.key.text.trim();
        let fields = Fields::read(reader, &entry.value, &MACHINE, tag);
        own.insert(tag.to_owned(), fields);
    }
    let mut points = Vec::new();
    for entry in &entries {
        let tag = entry.key.text.trim();
        let machine = copied(reader, &own, tag, scene.known.complete);
        points.extend(points_of(reader, entry, machine, scene));
    }
    points
}

/// The values of a machine with those copied from others.
fn copied<'t>(
    reader: &mut Reader<'_>,
    own: &BTreeMap<String, Fields<'t>>,
    tag: &str,
    complete: bool,
) -> Fields<'t> {
    let mut fields = own
        .get(tag)
        .cloned()
        .expect("every entry was put into the map");
    let chain = like::chain(reader, own, tag, complete);
    let areas: Vec<Option<&str>> = chain
        .iter()
        .enumerate()
        .map(|(i, _)| chain[i..].iter().find_map(|(_, f)| area_of(f)))
        .collect();
    let mut dropped: Vec<&'static str> = Vec::new();
    for ((name, base), area) in chain.iter().zip(areas) {
        let elsewhere = area_of(&fields).is_some_and(|own| area.is_some_and(|a| a != own));
        let more = if elsewhere { OF_THE_PLACE } else { &[] };
        let except = COPYING.except(&fields, more);
        let kept = COPYING.except(&fields, &[]);
        dropped.extend(
            more.iter()
                .filter(|k| base.has(k) && !fields.has(k) && !kept.contains(k)),
        );
        fields.inherit(base, &format!("like {name}"), &except);
    }
    dropped.dedup();
    if let (false, Some(slot)) = (dropped.is_empty(), fields.get("area")) {
        let note = reader
            .at(
                Code::LikeDrops,
                format!("not copied: {}", dropped.join(", ")),
                slot.node.span,
                &fields.within,
            )
            .why("the machine stands in another area than the one it is like");
        reader.report(note);
    }
    fields
}

fn area_of<'f>(fields: &'f Fields<'_>) -> Option<&'f str> {
    fields.get("area")?.node.text().map(str::trim)
}

fn points_of<'t>(
    reader: &mut Reader<'_>,
    entry: &'t Entry,
    machine: Fields<'t>,
    scene: &Scene<'_, 't>,
) -> Vec<Point> {
    let tag = entry.key.text.trim();
    let places = named(reader, &machine, "points", "points");
    if !machine.has("points") {
        let mut fields = machine;
        inherit_area(reader, &mut fields, scene);
        let named = point::Named {
            machine: tag,
            point: None,
            entry,
        };
        return vec![point::read(reader, &named, fields, scene)];
    }
    let mut points = Vec::new();
    for place in places {
        let name = place.key.text.trim();
        let within = format!("{tag}/{name}");
        let mut fields = Fields::read(reader, &place.value, &MACHINE, &within);
        not_in_a_point(reader, &mut fields);
        parts_twice(reader, &machine, &fields);
        let elsewhere = area_of(&fields).is_some_and(|a| area_of(&machine).is_some_and(|m| m != a));
        let more = if elsewhere { OF_THE_PLACE } else { &[] };
        let mut except = COPYING.except(&fields, more);
        except.push("points");
        // name, notes and row of the machine are those of its points; a sister machine's are not
        except.retain(|key| !matches!(*key, "name" | "notes" | "register row"));
        fields.inherit(&machine, &format!("machine {tag}"), &except);
        inherit_area(reader, &mut fields, scene);
        let named = point::Named {
            machine: tag,
            point: Some(name),
            entry: place,
        };
        points.push(point::read(reader, &named, fields, scene));
    }
    points
}

/// A point copies from its machine, and has no points of its own.
fn not_in_a_point(reader: &mut Reader<'_>, fields: &mut Fields<'_>) {
    for name in ["like", "points", "register row"] {
        if let Some(slot) = fields.remove(name) {
            let private = format!("x-{}", slot.name.text);
            let problem = reader
                .at(
                    Code::KeyMisplaced,
                    format!("`{name}` does not belong to a point"),
                    slot.name.span,
                    &slot.within,
                )
                .why("a point takes what it does not state from its machine")
                .write(
                    Write::edit(slot.name.span, private)
                        .remark("keeps it as a remark; or delete it"),
                );
            reader.report(problem);
        }
    }
}

fn parts_twice(reader: &mut Reader<'_>, machine: &Fields<'_>, fields: &Fields<'_>) {
    let (Some(of_machine), Some(of_point)) = (machine.get("parts"), fields.get("parts")) else {
        return;
    };
    if of_machine.inherited.is_some() {
        return;
    }
    let private = format!("x-{}", of_machine.name.text);
    let problem = reader
        .at(
            Code::PartsTwice,
            "parts on the machine and on its points",
            of_machine.name.span,
            &of_machine.within,
        )
        .related(Place::Text(of_point.name.span), "")
        .why("a part is served by one fill")
        .write(
            Write::edit(of_machine.name.span, private).remark("and the parts under their points"),
        );
    reader.report(problem);
}

/// What is stated for the area of a machine.
fn inherit_area<'t>(reader: &mut Reader<'_>, fields: &mut Fields<'t>, scene: &Scene<'_, 't>) {
    let Some(slot) = fields.get("area") else {
        return;
    };
    let Some(name) = slot.text(reader).map(|t| t.trim().to_owned()) else {
        return;
    };
    if let Some(area) = scene.areas.get(&name) {
        fields.inherit(area, &format!("area {name}"), &[]);
        return;
    }
    if !scene.known.complete {
        return;
    }
    let slot = slot.clone();
    let meant = suggest::certain(&name, scene.areas.keys().map(String::as_str));
    let problem = reader.at(
        Code::AreaUnknown,
        format!("there is no area {name}"),
        slot.node.span,
        &slot.within,
    );
    let problem = named_or_private(
        problem,
        &slot,
        meant,
        scene.areas.keys().map(String::as_str),
    );
    reader.report(problem);
}

/// The name that was meant, else those there are, else the key made a remark.
pub(in crate::input) fn named_or_private<'n>(
    problem: Problem,
    slot: &crate::input::fields::Slot<'_>,
    meant: Option<&str>,
    names: impl Iterator<Item = &'n str>,
) -> Problem {
    if let Some(meant) = meant {
        return problem
            .did_you_mean(meant)
            .write(Write::edit(slot.node.span, meant));
    }
    let names: Vec<&str> = names.take(4).collect();
    if names.is_empty() {
        let private = format!("x-{}", slot.name.text);
        return problem.write(Write::edit(slot.name.span, private).remark("until there is one"));
    }
    names
        .into_iter()
        .fold(problem, |p, n| p.write(Write::edit(slot.node.span, n)))
}
