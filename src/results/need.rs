//! The demands of points.

use super::csv::{Cell, Table};
use super::json::{self, Head, document};
pub use crate::demand::governing::limit_amount;
use crate::demand::{Demand, End, Information, PointDemands, Standing};
use crate::model::Point;
use crate::quantity::show::{Units, unit_of};
use crate::quantity::{Amount, Kind};
use serde_json::{Map, Value, json};

/// The word of an end in documents.
pub fn end_word(end: End) -> &'static str {
    match end {
        End::HotFloor => "hot floor",
        End::RunningCeiling => "running ceiling",
        End::StartCeiling => "start ceiling",
        End::PourMargin => "pour margin",
        End::OilCeiling => "oil ceiling",
        End::MakerGrade => "maker grade",
    }
}

/// The word of what a demand does.
pub fn standing_word(standing: &Standing) -> &'static str {
    match standing {
        Standing::Judges => "judges",
        Standing::Replaced { .. } => "replaced",
        Standing::Condition => "condition",
        Standing::Information => "information",
    }
}

/// A JSON document of the demands of points.
pub fn document_of(
    points: &[(&Point, PointDemands)],
    asks: Option<Vec<Value>>,
    head: &Head,
    units: Units,
) -> String {
    let mut top = document("need", head);
    let mut list = Vec::new();
    for (point, demands) in points {
        for (i, demand) in demands.middle.list.iter().enumerate() {
            list.push(one(point, demands, i, demand, units));
        }
    }
    top.insert("demands".into(), Value::Array(list));
    let undecided: Vec<Value> = points
        .iter()
        .flat_map(|(point, d)| {
            d.middle.undecided.iter().map(move |u| {
                json!({ "machine": point.machine, "point": point.point, "end": end_word(u.end),
                        "part": u.part, "because": u.because })
            })
        })
        .collect();
    top.insert("undecided".into(), Value::Array(undecided));
    let information: Vec<Value> = points
        .iter()
        .flat_map(|(point, d)| {
            d.middle
                .information
                .iter()
                .map(move |i| informed(point, i, units))
        })
        .collect();
    top.insert("information".into(), Value::Array(information));
    let steps: Vec<Value> = points
        .iter()
        .map(|(point, d)| {
            json!({ "machine": point.machine, "point": point.point,
                    "steps": json::all_steps(&d.trace, units) })
        })
        .collect();
    top.insert("steps".into(), Value::Array(steps));
    if let Some(asks) = asks {
        top.insert("ask".into(), Value::Array(asks));
    }
    json::text(top)
}

fn informed(point: &Point, i: &Information, units: Units) -> Value {
    json!({
        "machine": point.machine, "point": point.point, "part": i.part, "says": i.says,
        "figure": i.amount.map(|a| json::amount(a, units)),
        "step": i.step.map(json::step_name),
    })
}

fn one(point: &Point, demands: &PointDemands, i: usize, d: &Demand, units: Units) -> Value {
    let governs = demands.middle.governing(d.end) == Some(i);
    let mut m = Map::new();
    m.insert("machine".into(), json!(point.machine));
    m.insert("point".into(), json!(point.point));
    m.insert("end".into(), json!(end_word(d.end)));
    m.insert("part".into(), json!(d.part));
    m.insert("rule".into(), json!(d.rule));
    m.insert("says".into(), json!(d.says));
    m.insert("limit".into(), limit(demands, d, units));
    let t = demands.middle.governing_temperature(d);
    m.insert(
        "at".into(),
        t.map_or(Value::Null, |t| json::temperature(t, units)),
    );
    m.insert("origin".into(), json!(d.whose.to_string()));
    m.insert("source".into(), json!(d.source));
    m.insert("confidence".into(), json!(confidence(d)));
    m.insert("governs".into(), json!(governs));
    m.insert("standing".into(), json!(standing_word(&d.standing)));
    if let Some(step) = d.limit_step {
        m.insert("step".into(), json!(json::step_name(step)));
    }
    Value::Object(m)
}

/// The confidence of its rule, in a word.
pub fn confidence(d: &Demand) -> &'static str {
    use crate::model::word::Word;
    d.confidence.word()
}

/// The limit as a quantity: over all settings a range where an unknown moves it.
fn limit(demands: &PointDemands, d: &Demand, units: Units) -> Value {
    let figure = |d: &Demand, t: Option<f64>| limit_amount(d, t);
    let own = figure(d, demands.middle.governing_temperature(d));
    let same = |other: &&Demand| {
        other.end == d.end && other.rule == d.rule && other.part == d.part && other.only == d.only
    };
    let mut ends: Option<(f64, f64)> = None;
    for setting in &demands.settings {
        let Some(other) = setting.list.iter().find(same) else {
            continue;
        };
        let Some(a) = figure(other, setting.governing_temperature(other)) else {
            continue;
        };
        ends = Some(ends.map_or((a.base, a.base), |(lo, hi)| {
            (lo.min(a.base), hi.max(a.base))
        }));
    }
    match (own, ends) {
        (Some(a), Some((lo, hi))) if (hi - lo) > 1e-12 * hi.abs() => {
            json::unknown(Amount { base: lo, ..a }, Amount { base: hi, ..a }, units)
        }
        (Some(a), _) => json::amount(a, units),
        (None, _) => Value::Null,
    }
}

/// The same as a table.
pub fn table_of(points: &[(&Point, PointDemands)], units: Units) -> Table {
    let t_unit = unit_of(Kind::Temperature, units).name;
    let headings = [
        "machine",
        "point",
        "end",
        "part",
        "rule",
        "says",
        "limit",
        "limit_unit",
        "at",
        "origin",
        "confidence",
        "governs",
        "standing",
        "source",
    ];
    let mut table = Table {
        headings: headings
            .iter()
            .map(|h| {
                if *h == "at" {
                    format!("at_{t_unit}")
                } else {
                    (*h).to_owned()
                }
            })
            .collect(),
        rows: Vec::new(),
    };
    for (point, demands) in points {
        for (i, d) in demands.middle.list.iter().enumerate() {
            let t = demands.middle.governing_temperature(d);
            let a = limit_amount(d, t);
            let unit = a.map(|a| unit_of(a.kind, units));
            table.rows.push(vec![
                Cell::from(point.machine.as_str()),
                Cell::maybe(point.point.as_deref()),
                Cell::from(end_word(d.end)),
                Cell::maybe(d.part.as_deref()),
                Cell::from(d.rule.as_str()),
                Cell::from(d.says.as_str()),
                Cell::number(a.zip(unit).map(|(a, u)| a.in_unit(u))),
                Cell::maybe(unit.map(|u| u.name)),
                Cell::number(t.map(|t| unit_of(Kind::Temperature, units).from_base(t))),
                Cell::Text(d.whose.to_string()),
                Cell::from(confidence(d)),
                Cell::from(if demands.middle.governing(d.end) == Some(i) {
                    "yes"
                } else {
                    "no"
                }),
                Cell::from(standing_word(&d.standing)),
                Cell::from(d.source.as_str()),
            ]);
        }
    }
    table
}
