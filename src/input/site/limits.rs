//! Limits on viscosity stated for a point or a part.

use crate::input::convert::to_kinematic;
use crate::input::fields::{Fields, Slot};
use crate::input::reader::Reader;
use crate::input::value::{Body, Fault, Mend};
use crate::model::machine::Limits;
use crate::model::stated::ViscosityLimit;
use crate::problem::{Code, Write};
use crate::quantity::{DynamicViscosity, Kind, Measure};
use crate::source::Place;
use crate::source::place::Given;

/// Floor, ceiling and start limit; a floor above the ceiling is reported.
pub(in crate::input) fn read(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Limits {
    let limits = Limits {
        floor: one(reader, fields, "floor"),
        ceiling: one(reader, fields, "ceiling"),
        start: one(reader, fields, "start limit"),
    };
    crossed(reader, fields, &limits);
    limits
}

fn one(reader: &mut Reader<'_>, fields: &Fields<'_>, name: &str) -> Option<Given<ViscosityLimit>> {
    let slot = fields.get(name)?;
    let value = slot.value(reader)?;
    let origin = slot.origin(&value.clauses);
    let Body::One { read, at, .. } = value.body else {
        return None;
    };
    let limit = match (read.amount.kind, at) {
        (Kind::DynamicViscosity, None) => {
            ViscosityLimit::Dynamic(DynamicViscosity::from_base(read.amount.base))
        }
        (Kind::Efflux, Some(at)) => {
            let at = at.amount.as_measure()?;
            match to_kinematic(&read, at, None, &value.written) {
                Ok(nu) => ViscosityLimit::Kinematic(nu),
                Err(fault) => {
                    reader.faults(slot.node, vec![fault], &slot.within);
                    return None;
                }
            }
        }
        (Kind::Efflux, None) => {
            no_temperature(reader, slot, &value.written);
            return None;
        }
        (_, Some(_)) => {
            temperature(reader, slot, &value.written);
            return None;
        }
        _ => ViscosityLimit::Kinematic(read.amount.as_measure()?),
    };
    Some(Given::new(limit, value.written, origin))
}

fn no_temperature(reader: &mut Reader<'_>, slot: &Slot<'_>, written: &str) {
    let at = written.len();
    let fault = Fault::new(
        Code::AtMissing,
        "no temperature beside the reading of an instrument",
        0..at,
    )
    .why("what a reading means depends on the temperature it was taken at")
    .mend(Mend::new(at..at, " at 100 degF").remark("or the temperature of the reading"));
    reader.faults(slot.node, vec![fault], &slot.within);
}

fn temperature(reader: &mut Reader<'_>, slot: &Slot<'_>, written: &str) {
    let end = written.rfind(" at ").unwrap_or(written.len());
    let fault = Fault::new(
        Code::AtUnwanted,
        "a temperature found beside a limit",
        (end + 4).min(written.len())..written.len(),
    )
    .why("a limit holds at the temperature the machine runs or starts at")
    .mend(Mend::new(end..written.len(), ""));
    reader.faults(slot.node, vec![fault], &slot.within);
}

fn crossed(reader: &mut Reader<'_>, fields: &Fields<'_>, limits: &Limits) {
    let (Some(floor), Some(ceiling)) = (&limits.floor, &limits.ceiling) else {
        return;
    };
    let (ViscosityLimit::Kinematic(lo), ViscosityLimit::Kinematic(hi)) =
        (floor.value, ceiling.value)
    else {
        return;
    };
    if lo.base() <= hi.base() {
        return;
    }
    let (Some(low), Some(high)) = (fields.get("floor"), fields.get("ceiling")) else {
        return;
    };
    let problem = reader
        .at(
            Code::LimitsCrossed,
            format!("floor {} above ceiling {}", floor.written, ceiling.written),
            low.node.span,
            &low.within,
        )
        .related(Place::Text(high.node.span), "")
        .why("no oil lies between them; they may be exchanged")
        .write(
            Write::edit(low.node.span, reader.set.slice(high.node.span))
                .and(high.node.span, reader.set.slice(low.node.span)),
        );
    reader.report(problem);
}
