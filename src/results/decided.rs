//! What to do where no oil holds, as parts of documents: the pair by season, the oil to ask for.

use super::json;
use super::weigh::band;
use crate::decide::ask::{Ask, Specification};
use crate::decide::season::{Pair, Season};
use crate::model::word::Word;
use crate::weighing::{Scales, Weighed};
use serde_json::{Map, Value, json};

fn place(w: &Weighed<'_>) -> Map<String, Value> {
    let mut m = Map::new();
    m.insert("machine".into(), json!(w.point.machine));
    m.insert("point".into(), json!(w.point.point));
    m
}

/// A pair by season.
pub fn season(scales: &Scales<'_>, w: &Weighed<'_>, pair: &Pair) -> Value {
    let units = scales.units;
    let t = |k: f64| json::temperature(k, units);
    let one = |s: &Season| {
        json!({
            "oil": scales.site.oils[s.oil].id,
            "verdict": s.verdict.word(),
            "in_use": s.in_use,
            "serves": { "low": t(s.serves.0), "high": t(s.serves.1) },
            "band": band(s.band, units),
            "margin": s.margin.map_or(Value::Null, |m| json::steps_margin(m, None)),
            "months": s.months,
        })
    };
    let mut m = place(w);
    m.insert("winter".into(), one(&pair.winter));
    m.insert("summer".into(), one(&pair.summer));
    m.insert("change_over".into(), t(pair.change_over));
    let overlap = json!({ "low": t(pair.overlap.0), "high": t(pair.overlap.1) });
    m.insert("overlap".into(), overlap);
    Value::Object(m)
}

/// What to ask for.
pub fn ask(scales: &Scales<'_>, w: &Weighed<'_>, ask: &Ask) -> Value {
    let mut m = place(w);
    match ask {
        Ask::Specification(spec) => specification(scales, &mut m, spec),
        Ask::Undecided(why) => {
            m.insert("specification".into(), Value::Null);
            m.insert("because".into(), json!(why));
        }
        Ask::NoRoom { vi } => {
            m.insert("specification".into(), Value::Null);
            let says = format!("the limits leave no room up to a viscosity index of {vi:.0}");
            m.insert("because".into(), json!(says));
        }
        Ask::Grease => {
            m.insert("specification".into(), Value::Null);
            m.insert("because".into(), json!("greases are not solved for"));
        }
    }
    Value::Object(m)
}

fn specification(scales: &Scales<'_>, m: &mut Map<String, Value>, spec: &Specification) {
    let c = &spec.contents;
    let margin = |x: Option<crate::judge::Margin>| {
        x.map_or(Value::Null, |m| json::steps_margin(m.value, None))
    };
    let without: Vec<Value> = c
        .without
        .iter()
        .map(|w| json!({ "what": w.what, "rule": w.rule, "says": w.title }))
        .collect();
    m.insert(
        "specification".into(),
        json!({
            "iso_vg": spec.grade,
            "vi_at_least": spec.vi,
            "pour_at_most": spec.pour.map_or(Value::Null, |t| json::temperature(t, scales.units)),
            "shear_loss_at_most": spec.loss.map_or(Value::Null, |l| json!({
                "value": json::number(l * 100.0), "unit": "%", "at": "100 degC",
                "test": spec.shear_test(scales.rules),
            })),
            "cold_viscosity_at_most": spec.cold.map_or(Value::Null, |(t, eta)| json!({
                "value": json::number(eta * 1e3), "unit": "mPa.s", "at": json::temperature(t, scales.units),
            })),
            "base": spec.base.word(),
            "classes": c.classes,
            "additives": c.additives.iter().map(|a| a.word()).collect::<Vec<_>>(),
            "food_class": c.facts.food_class.map(Word::word),
            "environment": c.facts.environment.map(Word::word),
            "fire_class": c.facts.fire_class.map(Word::word),
            "without": without,
            "conditions": c.conditions.iter().map(|(rule, says)| json!({ "rule": rule, "says": says })).collect::<Vec<_>>(),
            "verdict": spec.judgement.verdict.word(),
            "margins": { "hot": margin(spec.judgement.hot), "cold": margin(spec.judgement.cold) },
        }),
    );
}
