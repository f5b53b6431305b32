//! One lubrication point from its values.

use super::{Scene, checks, facts, limits, machines, sump, values};
use crate::input::fields::{Fields, Slot};
use crate::input::overlay;
use crate::input::parts;
use crate::input::reader::Reader;
use crate::model::machine::{InputLine, Lubrication, OilNow, Point, Sump};
use crate::model::part::PartKind;
use crate::model::stated::{Between, Stated};
use crate::problem::{Code, Write, suggest};
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::source::Origin;
use crate::source::place::{Given, Whose};
use crate::source::yaml::Entry;

/// What a point is called and where it is written.
pub(super) struct Named<'n, 't> {
    pub(super) machine: &'n str,
    pub(super) point: Option<&'n str>,
    pub(super) entry: &'t Entry,
}

/// Keys that say where a record stands rather than what it is.
const NOT_INPUTS: &[&str] = &[
    "name",
    "area",
    "like",
    "points",
    "parts",
    "allow",
    "register row",
    "notes",
    "losses",
    "regrease",
    "used oil",
];

pub(super) fn read<'t>(
    reader: &mut Reader<'_>,
    named: &Named<'_, 't>,
    mut fields: Fields<'t>,
    scene: &Scene<'_, 't>,
) -> Point {
    let address = match named.point {
        Some(point) => format!("{}/{point}", named.machine),
        None => named.machine.to_owned(),
    };
    let of_parts = overlay::apply(&mut fields, scene.overlays, (named.machine, &address));
    let mut parts = parts::read(reader, &fields, scene, &address, &of_parts);
    let none = parts.list.is_empty() && fields.lacks("parts");
    if none && scene.known.complete {
        checks::no_parts(reader, named.entry, &fields);
    }
    let (ambient, sump, start) = temperatures(reader, &fields);
    let lubrication = values::lubrication(reader, &fields);
    let asks_for = fields.names(reader, "asks for");
    let oil_now = oil_now(reader, &fields, scene);
    let facts = facts::of(reader, &fields, scene, &oil_now);
    let cleanliness = parts::cleanliness(reader, &fields);
    let dust = facts::dust(reader, &fields);
    let mut point = Point {
        machine: named.machine.to_owned(),
        point: named.point.map(str::to_owned),
        title: fields.text(reader, "name"),
        area: fields.text(reader, "area"),
        register_row: fields.whole(reader, "register row").map(|n| n.value),
        count: fields.whole(reader, "count").map_or(1, |n| n.value),
        ambient,
        monthly_ambient: values::monthly(reader, &fields),
        lubrication,
        fill: fields.stated_as(reader, "fill", values::fill),
        annual_use: fields.stated_as(reader, "annual use", values::a_year),
        running_hours: values::running_hours(reader, &fields),
        oil_now,
        asks_for,
        sump,
        start,
        heater: values::heater(reader, &fields),
        heater_power: fields.stated(reader, "heater power"),
        heater_area: fields.stated(reader, "heater area"),
        maker_grade: values::maker_grade(reader, &fields),
        filter: values::yes(reader, &fields, "filter"),
        gravity_return: values::yes(reader, &fields, "gravity return"),
        limits: limits::read(reader, &fields),
        oil_limit: fields.given(reader, "oil limit"),
        cleanliness,
        dust,
        facts,
        losses: values::losses(reader, &fields),
        regrease: values::regrease(reader, &fields),
        used_oil: values::used_oil(reader, &fields),
        allow: values::allow(reader, &fields),
        inputs: inputs(reader, &fields),
        parts: std::mem::take(&mut parts.list),
        notes: fields.text(reader, "notes").into_iter().collect(),
        origin: fields.origin(),
    };
    point.inputs.append(&mut parts.inputs);
    facts::from_parts(&mut point);
    greased_by_component(&mut point, scene);
    checks::unusual(reader, &fields, &point);
    point
}

/// A component that only grease serves makes a grease point of one whose lubrication nobody
/// states.
fn greased_by_component(point: &mut Point, scene: &Scene<'_, '_>) {
    if point.lubrication.is_some() {
        return;
    }
    let components = &scene.known.rules.components;
    let found = point.parts.iter().find_map(|part| match &part.kind {
        PartKind::Component(c) => {
            let window = components.get(&c.id)?;
            (window.lubrication == Some(Lubrication::Grease)).then(|| window.id.clone())
        }
        _ => None,
    });
    if let Some(id) = found {
        let origin = Origin::rule(id, Whose::Standard);
        point.lubrication = Some(Given::new(Lubrication::Grease, "grease", origin));
    }
}

/// Ambient, running and start temperatures, compared with each other.
fn temperatures(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
) -> (Option<Ambient>, Option<Sump>, Option<Start>) {
    let ambient: Option<Ambient> = fields.range(reader, "ambient");
    let known = ambient.as_ref().and_then(Stated::known);
    let hottest = known.map(|range| range.value.hi.base());
    let sump = sump::read(reader, fields, hottest);
    let start = fields.stated(reader, "start");
    let stated = (ambient.as_ref(), sump.as_ref(), start.as_ref());
    checks::start_hotter(reader, fields, stated);
    checks::start_colder(reader, fields, ambient.as_ref(), start.as_ref());
    (ambient, sump, start)
}

/// Ambient range as far as it is stated.
pub(super) type Ambient = Stated<Between<ThermodynamicTemperature>>;
/// Start temperature as far as it is stated.
pub(super) type Start = Stated<ThermodynamicTemperature>;

/// Reads what an area states, so that mistakes there are found even where no machine stands.
pub(super) fn check_area(reader: &mut Reader<'_>, fields: &Fields<'_>) {
    fields.range::<ThermodynamicTemperature>(reader, "ambient");
    values::monthly(reader, fields);
    facts::check_area(reader, fields);
}

fn oil_now(reader: &mut Reader<'_>, fields: &Fields<'_>, scene: &Scene<'_, '_>) -> OilNow {
    let Some(given) = fields.given_text(reader, "oil now") else {
        return OilNow::Unknown;
    };
    match given.value.as_str() {
        "unknown" => OilNow::Unknown,
        "none" => OilNow::Nothing,
        _ => {
            if let Some(slot) = fields.get("oil now") {
                known_oil(reader, slot, &given.value, scene);
            }
            OilNow::Oil(given)
        }
    }
}

/// Reports an oil that is not in the list, where there is a list.
pub(super) fn known_oil(
    reader: &mut Reader<'_>,
    slot: &Slot<'_>,
    id: &str,
    scene: &Scene<'_, '_>,
) -> bool {
    let known = scene.known;
    if scene.oil_places.contains_key(id) || !known.complete || !known.has_oils {
        return true;
    }
    if reader.unread_oils.contains(id) {
        return true; // reported where it stands
    }
    let names = scene.oil_places.keys().copied();
    let meant = suggest::certain(id, names.clone());
    let problem = reader.at(
        Code::OilUnknown,
        format!("there is no oil {id}"),
        slot.node.span,
        &slot.within,
    );
    let problem = if slot.key.name == "oil now" && meant.is_none() {
        problem.write(
            Write::edit(slot.node.span, "unknown").remark("or the id of an oil in the oil file"),
        )
    } else {
        machines::named_or_private(problem, slot, meant, names)
    };
    reader.report(problem);
    false
}

fn inputs(reader: &Reader<'_>, fields: &Fields<'_>) -> Vec<InputLine> {
    fields
        .in_file_order()
        .into_iter()
        .filter(|slot| !NOT_INPUTS.contains(&slot.key.name))
        .map(|slot| slot.input_line(reader.set, None))
        .collect()
}
