//! The parts of a point.

mod bearing;
mod component;
mod contact;
mod gear;
mod kind;
mod plain;

use super::fields::Fields;
use super::keys::Form;
use super::overlay::{self, Overlay};
use super::reader::Reader;
use super::site::Scene;
use super::value::{Fault, Mend};
use crate::model::machine::InputLine;
use crate::model::part::{Part, PartKind};
use crate::problem::{Code, Write, suggest};
use crate::source::place::Given;
use std::rc::Rc;

/// Parts as read.
#[derive(Default)]
pub(super) struct Parts {
    /// The parts.
    pub(super) list: Vec<Part>,
    /// Every value of theirs as written.
    pub(super) inputs: Vec<InputLine>,
    /// Whether anything could not be read.
    pub(super) faulty: bool,
}

/// Reads the parts of a point.
pub(super) fn read<'t>(
    reader: &mut Reader<'_>,
    fields: &Fields<'t>,
    scene: &Scene<'_, 't>,
    address: &str,
    overlays: &[&Overlay<'t>],
) -> Parts {
    let mut parts = Parts::default();
    let mut found = records(reader, fields, address, &mut parts.faulty);
    overlay::over_parts(reader, &mut found, overlays, address);
    for (label, fields) in &found {
        match part(reader, label, fields, scene) {
            Some(part) => parts.list.push(part),
            None => parts.faulty = true,
        }
        let lines = fields.in_file_order().into_iter();
        parts
            .inputs
            .extend(lines.map(|slot| slot.input_line(reader.set, Some(label))));
    }
    parts
}

/// The records of the parts with their labels.
fn records<'t>(
    reader: &mut Reader<'_>,
    fields: &Fields<'t>,
    address: &str,
    faulty: &mut bool,
) -> Vec<(String, Fields<'t>)> {
    let Some(slot) = fields.get("parts") else {
        return Vec::new();
    };
    let Some(items) = slot.node.items() else {
        super::site::list_wanted(reader, slot);
        *faulty = true;
        return Vec::new();
    };
    if items.is_empty() {
        let problem = reader
            .at(
                Code::ListEmpty,
                "no part in `parts`",
                slot.node.span,
                &slot.within,
            )
            .why("a point is weighed for the parts its fill serves")
            .write(
                Write::edit(slot.node.span, "[{ rolling bearing: 22220 }]")
                    .remark("with the right parts"),
            );
        reader.report(problem);
        *faulty = true;
    }
    let mut found = Vec::new();
    for node in items {
        let Some(key) = kind::of(reader, node, address) else {
            *faulty = true;
            continue;
        };
        let label = kind::label(reader, node, key);
        let within = format!("{address}, {label}");
        let mut part = Fields::read(reader, node, key.record, &within);
        part.mark_inherited(slot.inherited.as_ref());
        part.take_from_machine(fields, address);
        found.push((label, part));
    }
    found
}

fn part(
    reader: &mut Reader<'_>,
    label: &str,
    fields: &Fields<'_>,
    scene: &Scene<'_, '_>,
) -> Option<Part> {
    for slot in fields.in_file_order() {
        if matches!(slot.key.form, Form::Label) {
            slot.text(reader);
        }
    }
    let kind = kind(reader, fields, scene);
    let rule = rule(reader, fields, scene);
    let part_rise = fields.stated(reader, "part rise");
    let limits = super::site::limits(reader, fields);
    let name = fields.text(reader, "name");
    let kind = kind?;
    let label = name.unwrap_or_else(|| match &kind {
        PartKind::Component(c) => scene
            .known
            .rules
            .components
            .get(&c.id)
            .map_or_else(|| label.to_owned(), |window| window.name.clone()),
        _ => label.to_owned(),
    });
    Some(Part {
        label,
        rule,
        part_rise,
        limits,
        kind,
        origin: fields.origin(),
    })
}

fn kind(reader: &mut Reader<'_>, fields: &Fields<'_>, scene: &Scene<'_, '_>) -> Option<PartKind> {
    match fields.record.name {
        "a rolling bearing" => {
            bearing::read(reader, fields, scene).map(|b| PartKind::RollingBearing(Box::new(b)))
        }
        "a gear mesh" => Some(PartKind::GearMesh(Box::new(gear::mesh(reader, fields)))),
        "an open gear" => Some(PartKind::OpenGear(Box::new(gear::open(reader, fields)))),
        "a worm mesh" => Some(PartKind::WormMesh(Box::new(gear::worm(reader, fields)))),
        "a journal bearing" => {
            let bearing = plain::journal(reader, fields);
            Some(PartKind::JournalBearing(Box::new(bearing)))
        }
        "a thrust bearing" => {
            let bearing = plain::thrust(reader, fields);
            Some(PartKind::ThrustBearing(Box::new(bearing)))
        }
        "a contact" => Some(PartKind::Contact(Box::new(contact::read(reader, fields)))),
        "an engine" => Some(PartKind::Engine(Box::new(component::drive(reader, fields)))),
        "an axle" => Some(PartKind::Axle(Box::new(component::drive(reader, fields)))),
        _ => component::read(reader, fields, scene).map(|c| PartKind::Component(Box::new(c))),
    }
}

/// A house rule taken by name.
fn rule(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    scene: &Scene<'_, '_>,
) -> Option<Given<String>> {
    let slot = fields.get("rule")?;
    let text = slot.text(reader)?.trim().to_owned();
    // Names of house rules hold commas: `slow bearing, EP oil`.
    if scene.house_rules.contains(&text) || !scene.known.complete {
        return Some(Given::new(text.clone(), text, slot.bare_origin()));
    }
    let names = scene.house_rules.iter().map(String::as_str);
    let meant = suggest::certain(&text, names.clone());
    let problem = reader.at(
        Code::RuleUnknown,
        format!("there is no house rule {text}"),
        slot.node.span,
        &slot.within,
    );
    let problem = super::site::named_or_private(problem, slot, meant, names);
    reader.report(problem);
    None
}

/// Words of ISO 281 for cleanliness.
const CLEANLINESS: &[&str] = &["high", "normal", "slight", "severe", "very severe"];

/// An ISO 4406 code or a word of ISO 281.
pub(super) fn cleanliness(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Option<Given<String>> {
    let given = fields.given_text(reader, "cleanliness")?;
    let slot = fields.get("cleanliness")?;
    let text = given.value.replace('-', " ").trim().to_lowercase();
    let word = CLEANLINESS.iter().find(|w| **w == text);
    if word.is_some() || given.value == "unknown" || is_code(&given.value) {
        return (given.value != "unknown").then_some(given);
    }
    let all = 0..given.value.len();
    let numbers: Vec<&str> = given
        .value
        .split(|c: char| !c.is_ascii_digit())
        .filter(|p| !p.is_empty() && p.len() <= 2)
        .collect();
    let instead = match numbers.as_slice() {
        [a, b] => format!("-/{a}/{b}"),
        [a, b, c] => format!("{a}/{b}/{c}"),
        _ => "-/17/14".to_owned(),
    };
    let fault = Fault::new(
        Code::CleanlinessForm,
        format!("cleanliness \"{}\" not understood", given.value),
        all.clone(),
    )
    .why("an ISO 4406 code as -/17/14 or 19/17/14, or high, normal, slight, severe, very severe as ISO 281 uses them")
    .mend(Mend::new(all, instead));
    reader.faults(slot.node, vec![fault], &slot.within);
    None
}

/// `-/17/14` or `19/17/14`, each number from 0 to 28.
fn is_code(text: &str) -> bool {
    let parts: Vec<&str> = text.trim().split('/').collect();
    let number = |p: &str| p.parse::<u8>().is_ok_and(|n| n <= 28);
    matches!(parts.as_slice(), [first, a, b] if (*first == "-" || number(first)) && number(a) && number(b))
}

/// What holds for every part of a machine that does not state it.
const OF_THE_MACHINE: &[&str] = &["cleanliness"];

impl<'t> Fields<'t> {
    /// Takes what the machine states for its parts.
    fn take_from_machine(&mut self, machine: &Fields<'t>, address: &str) {
        for name in OF_THE_MACHINE {
            let theirs = machine.get(name);
            let Some(slot) = theirs.filter(|_| self.record.key(name).is_some()) else {
                continue;
            };
            if self.lacks(name) {
                let mut slot = slot.clone();
                let from = format!("machine {address}");
                slot.inherited.get_or_insert_with(|| from.into());
                self.put(slot);
            }
        }
    }

    /// Says of every value what the whole record was inherited from.
    fn mark_inherited(&mut self, from: Option<&Rc<str>>) {
        if let Some(from) = from {
            self.for_each(|slot| slot.inherited = Some(from.clone()));
        }
    }
}
