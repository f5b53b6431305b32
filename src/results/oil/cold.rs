//! The cold end of an oil, and its life when hot.

use super::{extrapolated, known};
use crate::model::stated::{Bound, ViscosityLimit};
use crate::oil::cold::Used;
use crate::oil::sheet::{ColdSheet, OilSheet, standing};
use crate::quantity::show::Units;
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::results::json::{number, quantity};
use serde_json::{Value, json};

fn bound(b: Option<Bound<ThermodynamicTemperature>>, units: Units) -> Value {
    match b {
        None => Value::Null,
        Some(Bound::Exactly(t)) => quantity(t, units),
        Some(Bound::Below(t)) => json!({ "below": quantity(t, units) }),
        Some(Bound::Above(t)) => json!({ "above": quantity(t, units) }),
    }
}

fn limit(limit: ViscosityLimit, units: Units) -> Value {
    match limit {
        ViscosityLimit::Kinematic(nu) => quantity(nu, units),
        ViscosityLimit::Dynamic(eta) => quantity(eta, units),
    }
}

/// What is measured cold, where limits are reached.
pub(super) fn cold(c: &ColdSheet, units: Units) -> Value {
    let measured: Vec<Value> = c
        .measured
        .iter()
        .map(|r| {
            json!({
                "test": r.point.test.word(),
                "temperature": quantity(r.point.at, units),
                "dynamic": quantity(r.point.eta, units),
                "nu": quantity(r.point.nu, units),
                "line": quantity(r.point.line, units),
                "measured_over_line": number(r.ratio.base()),
                "used": r.point.used == Used::Yes,
            })
        })
        .collect();
    let starts: Vec<Value> = c
        .starts
        .iter()
        .map(|s| {
            json!({
                "part": s.start.part,
                "limit": limit(s.start.limit, units),
                "temperature": known(s.at, units),
                "standing": standing(s.start.standing),
                "extrapolated": extrapolated(s.start.standing),
                "rule": s.start.rule,
                "source": s.start.source,
            })
        })
        .collect();
    let designation = c.designation.as_ref().map_or(Value::Null, |(d, t)| {
        json!({
            "t750": known(*t, units),
            "measured": d.measured,
            "grade": d.grade,
            "designation": d.whole,
            "lacks": d.lacks,
        })
    });
    json!({
        "pour_point": bound(c.pour, units),
        "cloud_point": bound(c.cloud, units),
        "coldest_known": quantity(c.coldest, units),
        "measured": measured,
        "start_limits": starts,
        "d6080": designation,
    })
}

/// Life against temperature.
pub(super) fn life(sheet: &OilSheet, units: Units) -> Value {
    match &sheet.life {
        Err(why) => json!({ "why_not": why.to_string() }),
        Ok((basis, rows)) => {
            let rows: Vec<Value> = rows
                .iter()
                .map(|r| {
                    let pair = |(a, b): (_, _)| json!([quantity(a, units), quantity(b, units)]);
                    json!({
                        "temperature": quantity(r.at, units),
                        "equation": pair(r.equation),
                        "rule_of_ten": pair(r.rule_of_ten),
                    })
                })
                .collect();
            json!({
                "guidance": true,
                "type": basis.oil,
                "rule": basis.rule,
                "against_mineral": number(basis.multiple.base()),
                "calendar": basis.calendar.map(|c| quantity(c, units)),
                "at": rows,
            })
        }
    }
}
