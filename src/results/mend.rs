//! What would mend an oil.

use super::csv::{Cell, Table};
use super::json::{self, Head, document};
use crate::decide::mend::heater::{Fitted, HeaterAdvice};
use crate::decide::mend::lever::Lever;
use crate::decide::mend::{Change, Mend, Mended};
use crate::judge::weigh::Margin;
use crate::model::Point;
use crate::quantity::Measure;
use crate::quantity::show::{Units, unit_of};
use crate::relation::oil::grade::IsoGrade;
use crate::weighing::{Candidate, Scales};
use serde_json::{Map, Value, json};

/// One oil on one point, with what would mend it.
pub type Case<'a> = (&'a Point, Mended);

/// A JSON document of all mends: `changes`, each one change or two that do together.
pub fn document_of(scales: &Scales<'_>, cases: &[Case<'_>], head: &Head) -> String {
    let mut top = document("mend", head);
    let (mut changes, mut now, mut tried, mut heaters) = (vec![], vec![], vec![], vec![]);
    for (point, mended) in cases {
        let place = || place(scales, point, mended);
        let mut m = place();
        m.insert("verdict".into(), json!(word(mended)));
        now.push(Value::Object(m));
        for mend in mended.single.iter().chain(&mended.pairs) {
            let mut m = place();
            fill(&mut m, mend, scales.units);
            changes.push(Value::Object(m));
        }
        for t in &mended.tried {
            let mut m = place();
            m.insert("change".into(), json!(t.lever.word()));
            let idle = t.because.is_empty();
            let because = if idle {
                "does not act on what is missed"
            } else {
                &t.because
            };
            m.insert("because".into(), json!(because));
            tried.push(Value::Object(m));
        }
        if let Some(advice) = &mended.heater {
            let mut m = place();
            heater(&mut m, advice, scales.units);
            heaters.push(Value::Object(m));
        }
    }
    top.insert("changes".into(), Value::Array(changes));
    top.insert("now".into(), Value::Array(now));
    top.insert("not_enough".into(), Value::Array(tried));
    top.insert("heaters".into(), Value::Array(heaters));
    json::text(top)
}

/// The verdict as things are.
pub fn word(mended: &Mended) -> &'static str {
    mended
        .now
        .as_ref()
        .map_or("barred", |now| now.judgement.verdict.word())
}

fn place(scales: &Scales<'_>, point: &Point, mended: &Mended) -> Map<String, Value> {
    let mut m = Map::new();
    m.insert("machine".into(), json!(point.machine));
    m.insert("point".into(), json!(point.point));
    m.insert("oil".into(), json!(scales.site.oils[mended.oil].id));
    m
}

fn fill(m: &mut Map<String, Value>, mend: &Mend, units: Units) {
    m.insert("for".into(), json!(mend.target.word()));
    let changes: Vec<Value> = mend.changes.iter().map(|c| change(c, units)).collect();
    m.insert("changes".into(), Value::Array(changes));
    if let [only] = mend.changes.as_slice() {
        // a single change stands plainly beside the list
        if let Value::Object(alone) = change(only, units) {
            m.extend(alone);
        }
    }
    m.insert("says".into(), json!(mend.words(units)));
    m.insert("grade".into(), json!(mend.grade.map(IsoGrade::number)));
    m.insert("caution".into(), json!(mend.caution));
    m.insert("set".into(), json!(mend.settings()));
    m.insert("verdict".into(), json!(mend.then.judgement.verdict.word()));
    m.insert("margins".into(), margins(&mend.then));
    let conditions: Vec<Value> = mend
        .then
        .conditions
        .iter()
        .map(|c| json!({ "rule": c.rule, "says": c.says, "act": c.act, "source": c.source }))
        .collect();
    m.insert("conditions".into(), Value::Array(conditions));
}

fn change(c: &Change, units: Units) -> Value {
    let unitless = matches!(c.lever, Lever::ShearLoss | Lever::Index);
    let amount = |a: crate::quantity::Amount| {
        if unitless {
            json!({ "value": json::number(a.base), "unit": "" })
        } else {
            json::amount(a, units)
        }
    };
    json!({
        "change": c.lever.word(),
        "to": amount(c.amount()),
        "today": c.was().map_or(Value::Null, amount),
    })
}

/// Margins of a candidate without steps: these stand on a changed point.
pub fn margins(c: &Candidate) -> Value {
    let j = &c.judgement;
    let steps = |m: Option<Margin>| m.map_or(Value::Null, |m| json::steps_margin(m.value, None));
    let kelvins =
        |m: Option<Margin>| m.map_or(Value::Null, |m| json::kelvins_margin(m.value, None));
    json!({
        "hot": steps(j.hot), "cold": steps(j.cold),
        "pour": kelvins(j.pour), "oil": kelvins(j.oil),
    })
}

fn heater(m: &mut Map<String, Value>, h: &HeaterAdvice, units: Units) {
    fn of<Q: Measure>(q: Option<Q>, units: Units) -> Value {
        q.map_or(Value::Null, |q| json::quantity(q, units))
    }
    m.insert("for".into(), json!(h.target.word()));
    m.insert("from".into(), json::quantity(h.from, units));
    m.insert("to".into(), json::quantity(h.to, units));
    m.insert("volume".into(), of(h.volume, units));
    m.insert("within".into(), json::quantity(h.within, units));
    m.insert("power".into(), of(h.power, units));
    m.insert("loss".into(), of(h.loss, units));
    m.insert("sheath".into(), of(h.sheath, units));
    let bears = h.bears.as_ref().map(|(q, rule, source)| {
        json!({ "limit": json::quantity(*q, units), "rule": rule, "source": source })
    });
    m.insert("watt_density".into(), json!(bears));
    let cautious = h
        .cautious
        .as_ref()
        .map(|(q, rule)| json!({ "limit": json::quantity(*q, units), "rule": rule }));
    m.insert("cautious".into(), json!(cautious));
    let fitted = h.fitted.map(|f: Fitted| {
        json!({
            "power": json::quantity(f.power, units), "time": of(f.time, units),
            "sheath": of(f.area, units), "watt_density": of(f.density, units),
            "too_hot": f.too_hot, "may_give": of(f.may_give, units),
            "sheath_needed": of(f.needs, units),
        })
    });
    m.insert("fitted".into(), json!(fitted));
    let cautions: Vec<Value> = h
        .cautions
        .iter()
        .map(|(says, source)| json!({ "says": says, "source": source }))
        .collect();
    m.insert("cautions".into(), Value::Array(cautions));
}

/// The same as a table: one row a change; of a pair, two rows with one number.
pub fn table_of(scales: &Scales<'_>, cases: &[Case<'_>]) -> Table {
    let headings = [
        "machine",
        "point",
        "oil",
        "verdict_today",
        "number",
        "for",
        "change",
        "to",
        "unit",
        "says",
        "verdict_then",
        "hot_vg_step",
        "cold_vg_step",
        "conditions",
    ];
    let mut table = Table {
        headings: headings.iter().map(|h| (*h).to_owned()).collect(),
        rows: Vec::new(),
    };
    for (point, mended) in cases {
        let all = mended.single.iter().chain(&mended.pairs);
        for (number, mend) in all.enumerate() {
            for change in &mend.changes {
                let a = change.amount();
                let unit = unit_of(a.kind, scales.units);
                let j = &mend.then.judgement;
                table.rows.push(vec![
                    Cell::from(point.machine.as_str()),
                    Cell::maybe(point.point.as_deref()),
                    Cell::from(scales.site.oils[mended.oil].id.as_str()),
                    Cell::from(word(mended)),
                    Cell::Number((number + 1) as f64),
                    Cell::from(mend.target.word()),
                    Cell::from(change.lever.word()),
                    Cell::number(Some(a.in_unit(unit))),
                    Cell::from(unit.name),
                    Cell::Text(change.words(mend.grade, scales.units)),
                    Cell::from(j.verdict.word()),
                    Cell::number(j.hot.map(|m| m.value)),
                    Cell::number(j.cold.map(|m| m.value)),
                    Cell::Number(mend.then.conditions.len() as f64),
                ]);
            }
        }
    }
    table
}
