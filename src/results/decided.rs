//! What to do where no oil holds, as parts of documents: the pair by season, the oil to ask for.

use super::csv::{Cell, Table};
use super::json;
use super::weigh::band;
use crate::decide::ask::{Ask, NO_GREASE, Specification};
use crate::decide::season::{Pair, Season};
use crate::model::word::Word;
use crate::quantity::Kind;
use crate::quantity::show::unit_of;
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

/// Why there is no specification, in words.
pub fn why_not(ask: &Ask) -> Option<String> {
    match ask {
        Ask::Specification(_) => None,
        Ask::Undecided(why) => Some(why.clone()),
        Ask::NoRoom { vi } => Some(format!(
            "the limits leave no room up to a viscosity index of {vi:.0}"
        )),
        Ask::NoGrease => Some(NO_GREASE.to_owned()),
    }
}

/// The oils to ask for as a table: one row a point.
pub fn asks_table(scales: &Scales<'_>, asked: &[(Weighed<'_>, Ask)]) -> Table {
    let t_unit = unit_of(Kind::Temperature, scales.units);
    let headings = [
        "machine",
        "point",
        "iso_vg",
        "vi_at_least",
        &format!("pour_at_most_{}", t_unit.name),
        "shear_loss_at_most_percent",
        "shear_test",
        "cold_viscosity_at_most_mpa_s",
        &format!("cold_viscosity_at_{}", t_unit.name),
        "base",
        "thickeners",
        "base_oil_low_mm2_s_at_40_degC",
        "base_oil_high_mm2_s_at_40_degC",
        "classes",
        "additives",
        "food_class",
        "environment",
        "fire_class",
        "without",
        "conditions",
        "verdict",
        "because",
    ];
    Table {
        headings: headings.map(str::to_owned).to_vec(),
        rows: asked
            .iter()
            .map(|(w, ask)| asks_row(scales, w, ask))
            .collect(),
    }
}

fn asks_row(scales: &Scales<'_>, w: &Weighed<'_>, ask: &Ask) -> Vec<Cell> {
    let mut row = vec![
        Cell::from(w.point.machine.as_str()),
        Cell::maybe(w.point.point.as_deref()),
    ];
    let Ask::Specification(spec) = ask else {
        row.extend((0..19).map(|_| Cell::Empty));
        row.push(Cell::maybe(why_not(ask).as_deref()));
        return row;
    };
    let t_unit = unit_of(Kind::Temperature, scales.units);
    let t = |k: f64| t_unit.from_base(k);
    let c = &spec.contents;
    let joined = |list: Vec<&str>| Cell::Text(list.join("; "));
    row.extend([
        Cell::number(spec.grade.map(f64::from)),
        Cell::Number(spec.vi),
        Cell::number(spec.pour.map(t)),
        Cell::number(spec.loss.map(|l| l * 100.0)),
        Cell::maybe(spec.loss.map(|_| spec.shear_test(scales.rules)).as_deref()),
        Cell::number(spec.cold.map(|(_, eta)| eta * 1e3)),
        Cell::number(spec.cold.map(|(at, _)| t(at))),
        Cell::from(spec.base.word()),
        Cell::maybe(
            spec.grease
                .as_ref()
                .map(|g| g.thickeners.join("; "))
                .as_deref(),
        ),
        Cell::number(spec.grease.as_ref().map(|g| g.nu40.0 * 1e6)),
        Cell::number(spec.grease.as_ref().map(|g| g.nu40.1 * 1e6)),
        joined(c.classes.iter().map(String::as_str).collect()),
        joined(c.additives.iter().map(|a| a.word()).collect()),
        Cell::maybe(c.facts.food_class.map(Word::word)),
        Cell::maybe(c.facts.environment.map(Word::word)),
        Cell::maybe(c.facts.fire_class.map(Word::word)),
        joined(c.without.iter().map(|w| w.what.as_str()).collect()),
        joined(c.conditions.iter().map(|(rule, _)| rule.as_str()).collect()),
        Cell::from(spec.judgement.verdict.word()),
        Cell::Empty,
    ]);
    row
}

/// What to ask for.
pub fn ask(scales: &Scales<'_>, w: &Weighed<'_>, ask: &Ask) -> Value {
    let mut m = place(w);
    match ask {
        Ask::Specification(spec) => specification(scales, &mut m, spec),
        other => {
            m.insert("specification".into(), Value::Null);
            m.insert("because".into(), json!(why_not(other)));
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
            "base_oil": spec.grease.as_ref().map(|g| json!({
                "low": json::viscosity(g.nu40.0, scales.units), "high": json::viscosity(g.nu40.1, scales.units),
                "at": "40 degC",
            })),
            "thickeners": spec.grease.as_ref().map(|g| &g.thickeners),
            "fit_for": spec.grease.as_ref().map(|g| {
                let t = |k: Option<f64>| k.map_or(Value::Null, |k| json::temperature(k, scales.units));
                json!({ "low": t(g.fit_for.0), "high": t(g.fit_for.1) })
            }),
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
