//! One lubrication point from its values.

use super::{Scene, facts, limits, machines, sump};
use crate::input::fields::{Fields, Slot, quantities};
use crate::input::keys::Form;
use crate::input::keys::machine::{LOSSES, REGREASE};
use crate::input::overlay;
use crate::input::parts;
use crate::input::points::{Piece, grade_of};
use crate::input::reader::Reader;
use crate::model::machine::{
    Fill, InputLine, Losses, Lubrication, MakerGrade, OilNow, Point, Regrease, Sump,
};
use crate::model::stated::{Between, Stated};
use crate::problem::{Code, Write, suggest};
use crate::quantity::convert::to_celsius;
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{
    Amount, HoursPerYear, Kind, Mass, Measure, ThermodynamicTemperature, Volume, VolumePerYear,
};
use crate::source::place::Given;
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
    "losses",
    "regrease",
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
        no_parts(reader, named.entry, &fields);
    }
    let ambient = fields.range(reader, "ambient");
    let sump = sump::read(reader, &fields);
    let start = fields.stated(reader, "start");
    start_hotter(
        reader,
        &fields,
        ambient.as_ref(),
        sump.as_ref(),
        start.as_ref(),
    );
    let lubrication = lubrication(reader, &fields);
    let asks_for = fields.names(reader, "asks for");
    let oil_now = oil_now(reader, &fields, scene);
    let facts = facts::of(reader, &fields, scene, &oil_now);
    let mut point = Point {
        machine: named.machine.to_owned(),
        point: named.point.map(str::to_owned),
        title: fields.text(reader, "name"),
        area: fields.text(reader, "area"),
        register_row: fields.whole(reader, "register row").map(|n| n.value),
        count: fields.whole(reader, "count").map_or(1, |n| n.value),
        ambient,
        monthly_ambient: monthly(reader, &fields),
        lubrication,
        fill: fields.stated_as(reader, "fill", fill),
        annual_use: fields.stated_as(reader, "annual use", a_year),
        running_hours: running_hours(reader, &fields),
        oil_now,
        asks_for,
        sump,
        start,
        heater: heater(reader, &fields),
        heater_power: fields.stated(reader, "heater power"),
        heater_area: fields.stated(reader, "heater area"),
        maker_grade: maker_grade(reader, &fields),
        filter: yes(reader, &fields, "filter"),
        gravity_return: yes(reader, &fields, "gravity return"),
        limits: limits::read(reader, &fields),
        oil_limit: fields.given(reader, "oil limit"),
        facts,
        losses: losses(reader, &fields),
        regrease: regrease(reader, &fields),
        allow: allow(reader, &fields),
        inputs: inputs(reader, &fields),
        parts: std::mem::take(&mut parts.list),
        notes: Vec::new(),
        origin: fields.origin(),
    };
    point.inputs.append(&mut parts.inputs);
    facts::from_parts(&mut point);
    unusual(reader, &fields, &point);
    point
}

/// Reads what an area states, so that mistakes there are found even where no machine stands.
pub(super) fn check_area(reader: &mut Reader<'_>, fields: &Fields<'_>) {
    fields.range::<ThermodynamicTemperature>(reader, "ambient");
    monthly(reader, fields);
    facts::check_area(reader, fields);
}

fn no_parts(reader: &mut Reader<'_>, entry: &Entry, fields: &Fields<'_>) {
    let id = fields.within.to_string();
    let mut problem = reader
        .at(Code::KeyMissing, "no `parts`", entry.key.span, &id)
        .why("a point is weighed for the parts its fill serves");
    let value = &entry.value;
    let example = "parts: [{ rolling bearing: 22220 }]";
    let remark = "with the right parts; filmwright help keys lists their kinds";
    let start = crate::source::Span {
        end: value.span.start,
        ..value.span
    };
    let bracketed = reader.set.slice(value.span).starts_with('{');
    let source = reader.source(value);
    let column = source[..value.span.start as usize]
        .rsplit('\n')
        .next()
        .map_or(0, str::len);
    let write = if bracketed {
        let behind = crate::source::Span {
            start: start.start + 1,
            end: start.start + 1,
            ..start
        };
        let comma = if value.entries().is_some_and(<[Entry]>::is_empty) {
            ""
        } else {
            ","
        };
        Write::edit(behind, format!(" {example}{comma}"))
    } else if value.is_blank() {
        Write::edit(start, format!(" {{ {example} }}"))
    } else {
        Write::edit(start, format!("{example}\n{}", " ".repeat(column)))
    };
    problem = problem.write(write.said(example).remark(remark));
    reader.report(problem);
}

fn fill(amount: Amount) -> Option<Fill> {
    match amount.kind {
        Kind::Mass => Some(Fill::Grease(Mass::from_base(amount.base))),
        _ => amount.as_measure::<Volume>().map(Fill::Oil),
    }
}

/// `80 L` behind `annual use` is a year's.
fn a_year(amount: Amount) -> Option<VolumePerYear> {
    matches!(amount.kind, Kind::VolumePerYear | Kind::Volume).then_some(VolumePerYear(amount.base))
}

/// `8000 h` behind `running hours` is a year's.
fn running_hours(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Option<Stated<HoursPerYear>> {
    let make = |amount: Amount| match amount.kind {
        Kind::Time => Some(HoursPerYear(amount.base / 3600.0)),
        _ => amount.as_measure(),
    };
    let stated: Stated<HoursPerYear> = fields.stated_as(reader, "running hours", make)?;
    if let Some(given) = stated.known()
        && given.value.0 > 8784.0
    {
        let slot = fields.get("running hours")?;
        let problem = reader
            .at(
                Code::ValueImpossible,
                format!("{} is more than a year has", given.written),
                slot.node.span,
                &slot.within,
            )
            .write(Write::edit(slot.node.span, "8760 h a year").remark("at most"));
        reader.report(problem);
        return None;
    }
    Some(stated)
}

fn lubrication(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Option<Given<Lubrication>> {
    let word = fields.word(reader, "lubrication")?;
    let found = Lubrication::WRITTEN
        .iter()
        .find(|(w, _)| *w == word.value)?;
    Some(word.map(|_| found.1))
}

fn yes(reader: &mut Reader<'_>, fields: &Fields<'_>, name: &str) -> bool {
    fields.yes_no(reader, name).is_some_and(|g| g.value)
}

/// A heater that is `none` is none.
fn heater(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
) -> Option<Stated<ThermodynamicTemperature>> {
    let slot = fields.get("heater")?;
    let none = slot.node.text().is_some_and(|t| t.trim() == "none");
    if none {
        None
    } else {
        fields.stated(reader, "heater")
    }
}

/// Twelve ranges, January first.
fn monthly(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
) -> Option<Vec<Given<Between<ThermodynamicTemperature>>>> {
    let slot = fields.get("monthly ambient")?;
    let Form::Monthly(want) = slot.key.form else {
        return None;
    };
    let items = slot.items(reader)?;
    if items.len() != 12 {
        let texts: Vec<&str> = items.iter().map(|(_, t)| t.as_str()).collect();
        let filled: Vec<&str> = texts
            .iter()
            .copied()
            .chain(std::iter::repeat(
                texts.last().copied().unwrap_or("0 .. 20 degC"),
            ))
            .take(12)
            .collect();
        let problem = reader
            .at(
                Code::MonthsTwelve,
                format!("{} ranges found, twelve are wanted", items.len()),
                slot.node.span,
                &slot.within,
            )
            .why("one for each month, January first")
            .write(
                Write::edit(slot.node.span, format!("[{}]", filled.join(", ")))
                    .remark("with the right figures"),
            );
        reader.report(problem);
        return None;
    }
    let mut ranges = Vec::new();
    for (node, _) in items {
        let month = Slot {
            node,
            ..slot.clone()
        };
        let value = month.value_as(reader, &want)?;
        match quantities::range_of(reader, &month, value)? {
            Stated::Known(range, _) => ranges.push(range),
            _ => return None,
        }
    }
    Some(ranges)
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

fn maker_grade(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Option<Given<MakerGrade>> {
    let slot = fields.get("maker grade")?;
    slot.text(reader)?;
    let piece = Piece {
        node: slot.node.clone(),
    };
    let (grade, _) = grade_of(reader, slot, &piece)?;
    let iso_vg = grade.value.as_floor()?;
    Some(grade.map(|_| MakerGrade { iso_vg }))
}

fn losses(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Option<Losses> {
    let slot = fields.get("losses")?;
    let inner = Fields::read(reader, slot.node, &LOSSES, &slot.within);
    Some(Losses {
        casing_area: inner.stated(reader, "casing area"),
        heat_transfer: inner.stated(reader, "heat transfer"),
        cooler: inner.stated(reader, "cooler"),
    })
}

fn regrease(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Option<Regrease> {
    let slot = fields.get("regrease")?;
    let inner = Fields::read(reader, slot.node, &REGREASE, &slot.within);
    Some(Regrease {
        amount: inner.stated(reader, "amount"),
        interval: inner.stated(reader, "interval"),
    })
}

/// Names of warnings; one that does not exist would silence nothing.
fn allow(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Vec<String> {
    let Some(slot) = fields.get("allow") else {
        return Vec::new();
    };
    let names = fields.names(reader, "allow");
    for name in &names {
        if Code::named(&name.value).is_none() {
            let codes = Code::ALL.iter().map(|c| c.as_str());
            let meant = suggest::certain(&name.value, codes).unwrap_or("rule-range");
            let place = match &name.origin.place {
                crate::source::Place::Text(span) => *span,
                _ => slot.node.span,
            };
            let problem = reader
                .at(
                    Code::WordUnknown,
                    format!("there is no warning {}", name.value),
                    place,
                    &slot.within,
                )
                .why("the name of a warning stands in brackets behind it")
                .write(Write::edit(place, meant));
            reader.report(problem);
        }
    }
    names.into_iter().map(|n| n.value).collect()
}

fn inputs(reader: &Reader<'_>, fields: &Fields<'_>) -> Vec<InputLine> {
    fields
        .in_file_order()
        .into_iter()
        .filter(|slot| !NOT_INPUTS.contains(&slot.key.name))
        .map(|slot| slot.input_line(reader.set, None))
        .collect()
}

/// Starting hotter than running at the hottest ambient.
fn start_hotter(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    ambient: Option<&Stated<Between<ThermodynamicTemperature>>>,
    sump: Option<&Sump>,
    start: Option<&Stated<ThermodynamicTemperature>>,
) {
    let Some(start) = start.and_then(Stated::known) else {
        return;
    };
    let hottest = ambient.and_then(Stated::known).map(|a| a.value.hi.base());
    let running = match (sump, hottest) {
        (Some(Sump::Rise(rise)), Some(hot)) => rise.known().map(|r| hot + r.value.base()),
        (Some(Sump::Reading { sump, ambient }), Some(hot)) => {
            Some(hot + sump.value.base() - ambient.value.base())
        }
        (Some(Sump::Held(held)), _) => held.known().map(|h| h.value.base()),
        (Some(Sump::Across(range)), _) => Some(range.value.hi.base()),
        _ => None,
    };
    let Some(running) = running.filter(|r| start.value.base() > r + 1e-9) else {
        return;
    };
    let Some(slot) = fields.get("start") else {
        return;
    };
    let shown = |t: f64| {
        let t = ThermodynamicTemperature::from_base(t);
        quantity(t.amount(), Units::Si, Toward::Nearest)
    };
    let private = format!("x-{}", slot.name.text);
    let problem = reader
        .at(
            Code::StartHotter,
            format!(
                "start at {} is hotter than running at {}",
                start.written,
                shown(running)
            ),
            slot.node.span,
            &slot.within,
        )
        .why("an oil is at its thickest at start; the two may be exchanged")
        .write(
            Write::edit(slot.name.span, private)
                .remark("the coldest ambient then counts; or the right figure"),
        );
    reader.report(problem);
}

/// What can be, but rarely is.
fn unusual(reader: &mut Reader<'_>, fields: &Fields<'_>, point: &Point) {
    use crate::input::oils::say_unusual;
    if let Some(range) = point.ambient.as_ref().and_then(Stated::known) {
        let (lo, hi) = (to_celsius(range.value.lo), to_celsius(range.value.hi));
        if lo < -60.0 || hi > 80.0 {
            let why = "outdoor air lies between -60 and 50 °C; beside a furnace it may reach 80 °C";
            say_unusual(reader, fields, "ambient", why, None);
        }
    }
    if let Some(Sump::Rise(rise)) = &point.sump
        && let Some(rise) = rise.known()
        && !(0.0..=100.0).contains(&rise.value.base())
    {
        let why = "sumps run 10 to 70 K above ambient";
        say_unusual(reader, fields, "sump rise", why, None);
    }
    if let Some(Fill::Oil(volume)) = point.fill.as_ref().and_then(Stated::known).map(|g| g.value)
        && volume.base() > 200.0
    {
        let why = "200 000 L is the tank of a whole works";
        say_unusual(reader, fields, "fill", why, None);
    }
}
