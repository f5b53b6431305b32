//! Acceptances and expectations.

use super::{Scene, point};
use crate::input::fields::{Fields, Slot};
use crate::input::keys::Record;
use crate::input::keys::site::{ACCEPT, EXPECT};
use crate::input::reader::Reader;
use crate::model::machine::Point;
use crate::model::site::{Acceptance, Expectation};
use crate::problem::{Code, Write, suggest};
use crate::source::Place;
use crate::source::place::Given;
use crate::source::yaml::Node;

pub(super) fn acceptances(
    reader: &mut Reader<'_>,
    top: &Fields<'_>,
    points: &[Point],
    scene: &Scene<'_, '_>,
) -> Vec<Acceptance> {
    let mut found = Vec::new();
    for (node, fields) in listed(reader, top, "accept", &ACCEPT) {
        fields.must(reader, node);
        fields.word(reader, "verdict");
        let machine = machine(reader, &fields, points, scene);
        let oil = oil(reader, &fields, scene);
        let on = fields.day(reader, "on");
        let until = fields.day(reader, "until");
        in_order(reader, &fields, on.as_deref(), until.as_deref());
        let by = fields.text(reader, "by");
        let because = fields.text(reader, "because");
        if let (Some(machine), Some(oil)) = (machine, oil) {
            found.push(Acceptance {
                machine,
                oil,
                by,
                on,
                until,
                because,
            });
        }
    }
    found
}

pub(super) fn expectations(
    reader: &mut Reader<'_>,
    top: &Fields<'_>,
    points: &[Point],
    scene: &Scene<'_, '_>,
) -> Vec<Expectation> {
    let mut found = Vec::new();
    for (node, fields) in listed(reader, top, "expect", &EXPECT) {
        fields.must(reader, node);
        let machine = machine(reader, &fields, points, scene);
        let oil = oil(reader, &fields, scene);
        let verdict = fields.word(reader, "verdict");
        if let (Some(machine), Some(oil), Some(verdict)) = (machine, oil, verdict) {
            found.push(Expectation {
                machine,
                oil,
                verdict: verdict.map(str::to_owned),
            });
        }
    }
    found
}

/// The records of a list.
fn listed<'t>(
    reader: &mut Reader<'_>,
    top: &Fields<'t>,
    name: &str,
    record: &'static Record,
) -> Vec<(&'t Node, Fields<'t>)> {
    let Some(slot) = top.get(name) else {
        return Vec::new();
    };
    let Some(items) = slot.node.items() else {
        list_wanted(reader, slot);
        return Vec::new();
    };
    items
        .iter()
        .map(|node| (node, Fields::read(reader, node, record, name)))
        .collect()
}

/// A record where a list of records is wanted: brackets are put round it.
pub(in crate::input) fn list_wanted(reader: &mut Reader<'_>, slot: &Slot<'_>) {
    let text = reader.set.slice(slot.node.span);
    let span = crate::input::fields::first_line(reader, slot.node);
    let problem = reader
        .at(
            Code::ListWanted,
            format!("`{}` is a list", slot.key.name),
            span,
            &slot.within,
        )
        .why("each item begins with a dash and a space");
    let bracketed = text.starts_with('{') || slot.node.text().is_some();
    let column = reader.source(slot.node)[..slot.node.span.start as usize]
        .rsplit('\n')
        .next()
        .map_or(0, str::len);
    let write = if bracketed {
        Write::edit(slot.node.span, format!("[{text}]"))
    } else {
        let indent = format!("\n{}", " ".repeat(column));
        let deeper = format!("\n{}", " ".repeat(column + 2));
        Write::edit(
            slot.node.span,
            format!("- {}", text.replace(&indent, &deeper)),
        )
    };
    reader.report(problem.write(write));
}

fn machine(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    points: &[Point],
    scene: &Scene<'_, '_>,
) -> Option<Given<String>> {
    let given = fields.given_text(reader, "machine")?;
    let slot = fields.get("machine")?;
    if points.iter().any(|p| p.address() == given.value) || !scene.known.complete {
        return Some(given);
    }
    let addresses: Vec<String> = points.iter().map(Point::address).collect();
    let of_machine: Vec<&str> = points
        .iter()
        .zip(&addresses)
        .filter(|(p, _)| p.machine == given.value)
        .map(|(_, a)| a.as_str())
        .collect();
    let problem = if of_machine.is_empty() {
        let meant = suggest::certain(&given.value, addresses.iter().map(String::as_str));
        let problem = reader.at(
            Code::MachineUnknown,
            format!("there is no machine {}", given.value),
            slot.node.span,
            &slot.within,
        );
        let names = addresses.iter().map(String::as_str);
        super::machines::named_or_private(problem, slot, meant, names)
    } else {
        let problem = reader
            .at(
                Code::PointWhich,
                format!("{} has several points", given.value),
                slot.node.span,
                &slot.within,
            )
            .why("each is weighed by itself");
        of_machine
            .into_iter()
            .fold(problem, |p, a| p.write(Write::edit(slot.node.span, a)))
    };
    reader.report(problem);
    None
}

fn oil(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    scene: &Scene<'_, '_>,
) -> Option<Given<String>> {
    let given = fields.given_text(reader, "oil")?;
    let slot = fields.get("oil")?;
    point::known_oil(reader, slot, &given.value, scene).then_some(given)
}

/// An acceptance that ends before it begins.
fn in_order(reader: &mut Reader<'_>, fields: &Fields<'_>, on: Option<&str>, until: Option<&str>) {
    let (Some(on), Some(until)) = (on, until) else {
        return;
    };
    let (Some(first), Some(second)) = (fields.get("on"), fields.get("until")) else {
        return;
    };
    if until >= on {
        return;
    }
    let problem = reader
        .at(
            Code::DateOrder,
            format!("ends on {until}, before it begins on {on}"),
            second.node.span,
            &second.within,
        )
        .related(Place::Text(first.node.span), "")
        .write(Write::edit(second.node.span, on).and(first.node.span, until));
    reader.report(problem);
}
