//! The map of a laboratory's table, and the list of events.

use super::fields::{Fields, Slot};
use super::keys::samples::{COLUMNS, EVENT, EVENTS, SAMPLES};
use super::keys::{Record, spelt};
use super::reader::Reader;
use crate::model::sample::{Column, DateOrder, Done, Event, Reading, SampleMap};
use crate::model::{Point, Stated};
use crate::problem::{Code, Write, suggest};
use crate::quantity::Volume;
use crate::source::place::Given;
use crate::source::yaml::Node;

/// What names of machines and oils are looked up in; none while files are missing or unread.
pub struct Names<'n> {
    /// Points of the site.
    pub points: &'n [Point],
    /// Ids of its oils.
    pub oils: Vec<&'n str>,
}

/// The record, and whatever is wrong in it.
pub fn map(reader: &mut Reader<'_>, root: &Node, names: Option<&Names<'_>>) -> SampleMap {
    let fields = Fields::read(reader, root, &SAMPLES, "samples");
    let word = |reader: &mut Reader<'_>, name: &str| fields.word(reader, name).map(|w| w.value);
    let dates = word(reader, "dates");
    let delimiter = word(reader, "delimiter");
    let decimal = word(reader, "decimal");
    let mut columns = columns(reader, &fields, "columns", Some);
    let new = |column| match column {
        Column::InUse(reading) => Some(Column::New(reading)),
        _ => None,
    };
    columns.extend(self::columns(reader, &fields, "new oil", new));
    SampleMap {
        read: plain_text(reader, &fields, "read"),
        sheet: fields.text(reader, "sheet"),
        delimiter: delimiter.map(|d| match d {
            "comma" => ',',
            "semicolon" => ';',
            "tab" => '\t',
            _ => '|',
        }),
        encoding: fields.text(reader, "encoding"),
        decimal_comma: decimal == Some("comma"),
        columns,
        units: units(reader, &fields),
        dates: dates.and_then(|d| {
            let found = DateOrder::WRITTEN.iter().find(|(w, _)| *w == d);
            found.map(|(_, o)| *o)
        }),
        aliases: aliases(reader, &fields, names),
        origin: fields.origin(),
    }
}

/// A text as it stands: headings and paths may hold commas.
fn plain_text(reader: &mut Reader<'_>, fields: &Fields<'_>, name: &str) -> Option<Given<String>> {
    let slot = fields.get(name)?;
    let text = slot.text(reader)?.trim().to_owned();
    Some(Given::new(text.clone(), text, slot.bare_origin()))
}

fn columns(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    name: &'static str,
    which: impl Fn(Column) -> Option<Column>,
) -> Vec<(Column, Given<String>)> {
    let Some(slot) = fields.get(name) else {
        return Vec::new();
    };
    let within = format!("samples, {name}");
    let named = Fields::read(reader, slot.node, &COLUMNS, &within);
    let keys: Vec<&'static str> = named.in_file_order().iter().map(|s| s.key.name).collect();
    let mut found = Vec::new();
    for key in keys {
        let Some(heading) = plain_text(reader, &named, key) else {
            continue;
        };
        match Column::of(key).and_then(&which) {
            Some(column) => found.push((column, heading)),
            None => no_figure(reader, &named, key),
        }
    }
    found
}

/// A column that holds no figure, named as one of new oil.
fn no_figure(reader: &mut Reader<'_>, named: &Fields<'_>, key: &str) {
    let Some(slot) = named.get(key) else {
        return;
    };
    let problem = reader
        .at(
            Code::KeyMisplaced,
            format!("`{key}` is no figure of an oil"),
            slot.name.span,
            &slot.within,
        )
        .why("columns of new oil hold figures that are compared with those of the oil in use")
        .write(
            Write::edit(slot.name.span, "Zn").remark("or another figure; `columns` takes the rest"),
        );
    reader.report(problem);
}

/// Texts under names of the user's own.
fn table<'t>(reader: &mut Reader<'_>, fields: &Fields<'t>, name: &str) -> Vec<Slot<'t>> {
    let Some(slot) = fields.get(name) else {
        return Vec::new();
    };
    let Some(entries) = slot.node.entries() else {
        super::site::not_named(reader, slot.node, &slot.within, slot.key.name);
        return Vec::new();
    };
    let slots = entries.iter().map(|entry| Slot {
        name: &entry.key,
        node: &entry.value,
        ..slot.clone()
    });
    slots
        .collect::<Vec<_>>()
        .into_iter()
        .filter(|s| s.text(reader).is_some())
        .collect()
}

fn units(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Vec<(Reading, &'static str)> {
    let mut found = Vec::new();
    for slot in table(reader, fields, "units") {
        let key = spelt(&slot.name.text);
        let Some(reading) = Reading::of(&key) else {
            unit_of_nothing(reader, &slot, &key);
            continue;
        };
        let text = slot.node.text().unwrap_or("").trim();
        match reading.kind().unit(text) {
            Some(unit) => found.push((reading, unit.name)),
            None => unit_unknown(reader, &slot, reading, text),
        }
    }
    found
}

fn unit_of_nothing(reader: &mut Reader<'_>, slot: &Slot<'_>, key: &str) {
    let mut problem = reader.at(
        Code::KeyUnknown,
        format!("unknown key \"{key}\""),
        slot.name.span,
        &slot.within,
    );
    let meant = suggest::certain(key, Reading::ALL.iter().map(|r| r.key()));
    problem.did_you_mean = meant.map(str::to_owned);
    let write = match meant {
        Some(meant) => Write::edit(slot.name.span, meant),
        None => Write::edit(slot.name.span, format!("x-{key}")).remark("keeps it as a remark"),
    };
    if !super::keys::is_private(key) {
        reader.report(problem.write(write));
    }
}

fn unit_unknown(reader: &mut Reader<'_>, slot: &Slot<'_>, reading: Reading, text: &str) {
    let units = reading.kind().spec().units;
    let listed: Vec<&str> = units
        .iter()
        .map(|u| u.name)
        .filter(|n| !n.is_empty())
        .collect();
    let right = units.first().map_or("", |u| u.name);
    let instead = if reading.unit().is_empty() {
        right
    } else {
        reading.unit()
    };
    let problem = reader
        .at(
            Code::UnitUnknown,
            format!("{} is not given in \"{text}\"", reading.says()),
            slot.node.span,
            &slot.within,
        )
        .why(format!("units understood: {}", listed.join(", ")))
        .write(Write::edit(slot.node.span, instead));
    reader.report(problem);
}

fn aliases(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    names: Option<&Names<'_>>,
) -> Vec<(String, Given<String>)> {
    let mut found = Vec::new();
    for slot in table(reader, fields, "aliases") {
        let text = slot.node.text().unwrap_or("").trim().to_owned();
        let new_oil = text.eq_ignore_ascii_case(NEW_OIL);
        if new_oil || names.is_none_or(|n| machine(reader, &slot, &text, n)) {
            let given = Given::new(text.clone(), text, slot.bare_origin());
            found.push((slot.name.text.trim().to_owned(), given));
        }
    }
    found
}

/// What stands for a sample of new oil where a machine stands otherwise.
pub const NEW_OIL: &str = "new oil";

/// Whether a text is the address of a point; reports where it is none.
fn machine(reader: &mut Reader<'_>, slot: &Slot<'_>, text: &str, names: &Names<'_>) -> bool {
    let addresses: Vec<String> = names.points.iter().map(Point::address).collect();
    if addresses.iter().any(|a| a == text) {
        return true;
    }
    let same = |(p, a): (&Point, &String)| (p.machine == text).then(|| a.clone());
    let several: Vec<String> = names
        .points
        .iter()
        .zip(&addresses)
        .filter_map(same)
        .collect();
    let problem = if several.is_empty() {
        let listed = addresses.iter().map(String::as_str);
        let meant = suggest::certain(text, listed.clone());
        let message = format!("there is no machine {text}");
        let problem = reader.at(Code::MachineUnknown, message, slot.node.span, &slot.within);
        super::site::named_or_private(problem, slot, meant, listed)
    } else {
        let message = format!("{text} has several points");
        let problem = reader
            .at(Code::PointWhich, message, slot.node.span, &slot.within)
            .why("each is weighed by itself");
        several
            .into_iter()
            .fold(problem, |p, a| p.write(Write::edit(slot.node.span, a)))
    };
    reader.report(problem);
    false
}

/// The events of a file.
pub fn events(reader: &mut Reader<'_>, root: &Node, names: Option<&Names<'_>>) -> Vec<Event> {
    let fields = Fields::read(reader, root, &EVENTS, "events");
    let Some(slot) = fields.get("events") else {
        return Vec::new();
    };
    let Some(items) = slot.node.items() else {
        super::site::list_wanted(reader, slot);
        return Vec::new();
    };
    let mut found = Vec::new();
    for node in items {
        found.extend(event(reader, node, &EVENT, names));
    }
    found
}

fn event(
    reader: &mut Reader<'_>,
    node: &Node,
    record: &'static Record,
    names: Option<&Names<'_>>,
) -> Option<Event> {
    let event = Fields::read(reader, node, record, "events");
    event.must(reader, node);
    let tag = event.given_text(reader, "machine");
    let oil = event.given_text(reader, "oil");
    let day = event.day(reader, "date");
    let what = event.word(reader, "what");
    let amount = event.stated::<Volume>(reader, "amount");
    if let (Some(tag), Some(names)) = (&tag, names) {
        let slot = event.get("machine")?;
        if !machine(reader, slot, &tag.value, names) {
            return None;
        }
    }
    if let (Some(oil), Some(names)) = (&oil, names)
        && !names.oils.contains(&oil.value.as_str())
    {
        oil_unknown(reader, event.get("oil")?, &oil.value, names);
        return None;
    }
    let what = what?.value;
    Some(Event {
        machine: tag?,
        date: day?.parse().ok()?,
        what: Done::WRITTEN.iter().find(|(w, _)| *w == what)?.1,
        oil,
        amount: amount.as_ref().and_then(Stated::known).map(|g| g.value),
        origin: event.origin(),
    })
}

fn oil_unknown(reader: &mut Reader<'_>, slot: &Slot<'_>, oil: &str, names: &Names<'_>) {
    if reader.unread_oils.contains(oil) {
        return;
    }
    let message = format!("there is no oil {oil}");
    let problem = reader.at(Code::OilUnknown, message, slot.node.span, &slot.within);
    let listed = names.oils.iter().copied();
    let meant = suggest::certain(oil, listed.clone());
    reader.report(super::site::named_or_private(problem, slot, meant, listed));
}
