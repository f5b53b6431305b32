//! How the running temperature of a sump is stated.

use crate::input::fields::{Fields, Slot, quantities};
use crate::input::oils::stated_twice;
use crate::input::reader::Reader;
use crate::input::value::{Body, Value};
use crate::model::machine::Sump;
use crate::model::stated::{Between, Stated};
use crate::problem::{Code, Write};
use crate::quantity::convert::to_celsius;
use crate::quantity::{Measure, TemperatureInterval, ThermodynamicTemperature};
use crate::source::place::Given;

/// The one of the four ways that is stated; `hottest` is the hottest ambient, K, where known.
pub(super) fn read(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    hottest: Option<f64>,
) -> Option<Sump> {
    if let (Some(rise), Some(sump)) = (fields.get("sump rise"), fields.get("sump")) {
        let why = "the rise and the reading each say how hot it runs; one of them counts";
        stated_twice(reader, rise, sump, why);
        return None;
    }
    if fields.has("sump rise") {
        alone(reader, fields);
        return fields.stated(reader, "sump rise").map(Sump::Rise);
    }
    let Some(slot) = fields.get("sump") else {
        alone(reader, fields);
        return None;
    };
    let value = slot.value(reader)?;
    match &value.body {
        Body::Range { .. } => across(reader, slot, value),
        Body::Held(_) => held(slot, value),
        Body::One { .. } => reading(reader, fields, slot, value),
        Body::Unknown(_) => unknown(reader, fields, value, hottest),
        Body::Bound { .. } => None,
    }
}

/// An ambient of a reading where there is no reading.
fn alone(reader: &mut Reader<'_>, fields: &Fields<'_>) {
    let Some(slot) = fields.get("at ambient").filter(|s| s.inherited.is_none()) else {
        return;
    };
    let private = format!("x-{}", slot.name.text);
    let problem = reader
        .at(
            Code::ReadingMissing,
            "`at ambient` without a reading",
            slot.name.span,
            &slot.within,
        )
        .why("it is the ambient at which the reading behind `sump` was taken")
        .write(
            Write::edit(slot.name.span, private)
                .remark("keeps it as a remark; or add sump: 65 degC"),
        );
    reader.report(problem);
}

fn across(reader: &mut Reader<'_>, slot: &Slot<'_>, value: Value) -> Option<Sump> {
    match quantities::range_of(reader, slot, value)? {
        Stated::Known(given, _) => Some(Sump::Across(given)),
        _ => None,
    }
}

fn held(slot: &Slot<'_>, value: Value) -> Option<Sump> {
    let Body::Held(inner) = value.body else {
        return None;
    };
    let inner = Value {
        body: *inner,
        clauses: value.clauses,
        written: value.written,
        roughness: None,
    };
    quantities::stated_of(slot, inner, crate::quantity::Amount::as_measure).map(Sump::Held)
}

fn reading(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    slot: &Slot<'_>,
    value: Value,
) -> Option<Sump> {
    let Some(ambient) = fields.get("at ambient") else {
        without_ambient(reader, slot);
        return None;
    };
    let ambient_value = ambient.value(reader)?;
    let known = |stated: Stated<ThermodynamicTemperature>| match stated {
        Stated::Known(given, _) => Some(given),
        _ => None,
    };
    let ambient =
        quantities::stated_of(ambient, ambient_value, crate::quantity::Amount::as_measure)
            .and_then(known)?;
    let sump =
        quantities::stated_of(slot, value, crate::quantity::Amount::as_measure).and_then(known)?;
    if sump.value.base() < ambient.value.base() {
        let why = format!(
            "the reading lies {:.0} K below the ambient it was taken at; a cooler can do that, an exchange of the two values more often",
            to_celsius(ambient.value) - to_celsius(sump.value)
        );
        crate::input::oils::say_unusual(reader, fields, "sump", &why, None);
    }
    Some(Sump::Reading { sump, ambient })
}

fn without_ambient(reader: &mut Reader<'_>, slot: &Slot<'_>) {
    let written = slot.node.text().unwrap_or("").to_owned();
    let behind = crate::source::Span {
        start: slot.node.span.end,
        ..slot.node.span
    };
    let source = reader.source(slot.node);
    let start = slot.name.span.start as usize;
    let column = source[..start].rsplit('\n').next().map_or(0, str::len);
    let line = format!("\n{}at ambient: 20 degC", " ".repeat(column));
    let problem = reader
        .at(
            Code::SumpAmbient,
            "a sump reading without the ambient it was taken at",
            slot.node.span,
            &slot.within,
        )
        .why("only both together say how hot the sump gets on the hottest day")
        .write(
            Write::edit(behind, line)
                .said("at ambient: 20 degC")
                .remark("on a line of its own, with the right figure"),
        )
        .write(
            Write::edit(slot.node.span, format!("held at {written}"))
                .remark("if it is the same at every ambient"),
        );
    reader.report(problem);
}

/// An unknown sump within a range is an unknown rise: over the ambient it was read at, else over
/// the hottest ambient. Where neither is known it is taken as held.
fn unknown(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    value: Value,
    hottest: Option<f64>,
) -> Option<Sump> {
    let slot = fields.get("sump")?;
    let origin = slot.origin(&value.clauses);
    let read_at = fields.given::<ThermodynamicTemperature>(reader, "at ambient");
    let Body::Unknown(Some((lo, hi))) = &value.body else {
        return None;
    };
    let (lo, hi) = (lo.amount.base, hi.amount.base);
    let read_at = read_at.map(|g| g.value.base());
    let Some(ambient) = read_at.or(hottest) else {
        let range = Between {
            lo: ThermodynamicTemperature::from_base(lo),
            hi: ThermodynamicTemperature::from_base(hi),
        };
        let given = Given::new(range, value.written, origin);
        return Some(Sump::Held(Stated::Range(given, value.clauses.ask)));
    };
    let rise = Between {
        lo: TemperatureInterval::from_base(lo - ambient),
        hi: TemperatureInterval::from_base(hi - ambient),
    };
    let given = Given::new(rise, value.written, origin);
    Some(Sump::Rise(Stated::Range(given, value.clauses.ask)))
}
