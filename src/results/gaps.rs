//! What is missing, by what it would decide.

use super::csv::{Cell, Table};
use super::json::{self, Head, document};
use crate::decide::gaps::effect::Effect;
use crate::decide::gaps::letter::Question;
use crate::decide::gaps::{Found, Missing, Place, PointGaps};
use crate::demand::GapKind;
use crate::judge::Verdict;
use crate::quantity::show::{Units, unit_of};
use crate::weighing::Scales;
use serde_json::{Map, Value, json};

/// A JSON document of all gaps, the most telling first.
pub fn document_of(
    scales: &Scales<'_>,
    points: &[PointGaps<'_>],
    ranked: &[Place],
    head: &Head,
) -> String {
    let mut top = document("gaps", head);
    let list: Vec<Value> = ranked
        .iter()
        .enumerate()
        .map(|(i, p)| {
            let of = &points[p.point];
            one(scales, of, &of.gaps[p.gap], i + 1)
        })
        .collect();
    top.insert("gaps".into(), Value::Array(list));
    json::text(top)
}

/// A JSON document of the questions of a letter.
pub fn letter_of(questions: &[Question], head: &Head) -> String {
    let mut top = document("gaps", head);
    let list: Vec<Value> = questions
        .iter()
        .enumerate()
        .map(|(i, q)| {
            json!({ "number": i + 1, "machine": q.address, "name": q.title, "question": q.text })
        })
        .collect();
    top.insert("questions".into(), Value::Array(list));
    json::text(top)
}

fn one(scales: &Scales<'_>, of: &PointGaps<'_>, found: &Found, number: usize) -> Value {
    let point = of.weighed.point;
    let mut m = Map::new();
    m.insert("number".into(), json!(number));
    m.insert("machine".into(), json!(point.machine));
    m.insert("point".into(), json!(point.point));
    m.insert("decides".into(), json!(found.weight.word()));
    match &found.missing {
        Missing::Input(gap) => {
            m.insert("key".into(), json!(gap.key));
            m.insert("part".into(), json!(gap.about));
            m.insert("how_known".into(), json!(kind_word(&gap.kind)));
            m.insert("value".into(), value(&gap.kind, scales.units));
            m.insert("ask".into(), json!(gap.ask));
            m.insert("how".into(), json!(gap.how));
        }
        Missing::Fact {
            says,
            question,
            oils,
        } => {
            m.insert("key".into(), json!(says));
            m.insert("part".into(), Value::Null);
            m.insert("how_known".into(), json!("not stated"));
            m.insert("ask".into(), json!(question));
            let ids: Vec<&str> = oils
                .iter()
                .map(|o| scales.site.oils[*o].id.as_str())
                .collect();
            m.insert("oils".into(), json!(ids));
        }
    }
    let lead = crate::decide::gaps::lead(&of.weighed);
    m.insert(
        "oil".into(),
        json!(lead.map(|c| scales.site.oils[c.oil].id.clone())),
    );
    if let Some(e) = &found.effect {
        effect(&mut m, scales, e);
    }
    Value::Object(m)
}

fn effect(m: &mut Map<String, Value>, scales: &Scales<'_>, e: &Effect) {
    let margin = e.margin.map_or(Value::Null, |(lo, hi)| {
        json!({ "value": null, "range": [json::number(lo), json::number(hi)], "unit": "VG step" })
    });
    m.insert("margin".into(), margin);
    let words: Vec<&str> = e
        .verdicts
        .iter()
        .map(|v| v.map_or("barred", Verdict::word))
        .collect();
    m.insert("verdicts".into(), json!(words));
    let proposed: Vec<Option<&str>> = e
        .proposed
        .iter()
        .map(|o| o.map(|o| scales.site.oils[o].id.as_str()))
        .collect();
    m.insert("proposed".into(), json!(proposed));
}

/// How an input is known, in a word.
pub fn kind_word(kind: &GapKind) -> &'static str {
    match kind {
        GapKind::Range(..) => "unknown, with a range",
        GapKind::Assumed { .. } | GapKind::Word { .. } => "assumed",
        GapKind::Missing => "missing",
        GapKind::Fact => "not stated",
    }
}

fn value(kind: &GapKind, units: Units) -> Value {
    match kind {
        GapKind::Range(lo, hi) => json::unknown(*lo, *hi, units),
        GapKind::Assumed { taken, lo, hi } => {
            let unit = unit_of(taken.kind, units);
            json!({
                "value": json::number(taken.in_unit(unit)),
                "range": [json::number(lo.in_unit(unit)), json::number(hi.in_unit(unit))],
                "unit": unit.name,
            })
        }
        GapKind::Word { taken, among } => json!({ "value": taken, "among": among }),
        GapKind::Missing | GapKind::Fact => Value::Null,
    }
}

/// The same as a table.
pub fn table_of(scales: &Scales<'_>, points: &[PointGaps<'_>], ranked: &[Place]) -> Table {
    let headings = [
        "number",
        "machine",
        "point",
        "part",
        "missing",
        "how_known",
        "low",
        "high",
        "unit",
        "decides",
        "margin_low_vg_step",
        "margin_high_vg_step",
        "verdicts",
        "proposed",
        "ask",
    ];
    let mut table = Table {
        headings: headings.iter().map(|h| (*h).to_owned()).collect(),
        rows: Vec::new(),
    };
    for (i, place) in ranked.iter().enumerate() {
        let of = &points[place.point];
        table.rows.push(row(scales, of, &of.gaps[place.gap], i + 1));
    }
    table
}

fn row(scales: &Scales<'_>, of: &PointGaps<'_>, found: &Found, number: usize) -> Vec<Cell> {
    let point = of.weighed.point;
    let mut cells = vec![
        Cell::Number(number as f64),
        Cell::from(point.machine.as_str()),
        Cell::maybe(point.point.as_deref()),
    ];
    match &found.missing {
        Missing::Input(gap) => {
            cells.push(Cell::maybe(gap.about.as_deref()));
            cells.push(Cell::from(gap.key.as_str()));
            cells.push(Cell::from(kind_word(&gap.kind)));
            let ends = match &gap.kind {
                GapKind::Range(lo, hi) | GapKind::Assumed { lo, hi, .. } => Some((*lo, *hi)),
                GapKind::Word { .. } | GapKind::Missing | GapKind::Fact => None,
            };
            let unit = ends.map(|(lo, _)| unit_of(lo.kind, scales.units));
            let of = |a: Option<crate::quantity::Amount>| {
                Cell::number(a.zip(unit).map(|(a, unit)| a.in_unit(unit)))
            };
            cells.push(of(ends.map(|e| e.0)));
            cells.push(of(ends.map(|e| e.1)));
            cells.push(Cell::maybe(unit.map(|u| u.name)));
        }
        Missing::Fact { says, .. } => {
            cells.push(Cell::Empty);
            cells.push(Cell::from(says.as_str()));
            cells.push(Cell::from("not stated"));
            cells.extend([Cell::Empty, Cell::Empty, Cell::Empty]);
        }
    }
    cells.push(Cell::from(found.weight.word()));
    let effect = found.effect.as_ref();
    let margin = effect.and_then(|e| e.margin);
    cells.push(Cell::number(margin.map(|m| m.0)));
    cells.push(Cell::number(margin.map(|m| m.1)));
    let words = effect.map(|e| crate::decide::gaps::effect::words(&e.verdicts));
    cells.push(Cell::maybe(words.as_deref()));
    let proposed = effect.map(|e| {
        let each: Vec<&str> = e
            .proposed
            .iter()
            .map(|o| o.map_or("none", |o| scales.site.oils[o].id.as_str()))
            .collect();
        each.join(" or ")
    });
    cells.push(Cell::maybe(proposed.as_deref()));
    cells.push(Cell::Text(match &found.missing {
        Missing::Input(gap) => gap.ask.clone().unwrap_or_else(|| gap.how.to_owned()),
        Missing::Fact { question, .. } => question.clone(),
    }));
    cells
}
