//! The judgements of a weighing.

use super::csv::{Cell, Table};
use super::json::{self, Head, document};
use crate::decide::scatter::Scatter;
use crate::demand::Demand;
use crate::demand::losses::Uncounted;
use crate::judge::explain::Explanation;
use crate::judge::own::Running;
use crate::judge::weigh::{At, Margin};
use crate::quantity::show::{Units, unit_of};
use crate::quantity::{Kind, Measure};
use crate::trace::{Derivation, StepId};
use crate::weighing::{Barred, Candidate, Condition, Scales, Weighed};
use serde_json::{Map, Value, json};
use std::collections::BTreeMap;

/// Samplings by point, in the order weighed, and oil; empty unless asked for.
pub type Scatters = BTreeMap<(usize, usize), Scatter>;

/// Pairs of oils by season, by point in the order weighed; only where no single oil holds.
pub type Seasons = BTreeMap<usize, crate::decide::season::Pair>;

/// A JSON document of all judgements, in parts: of a large site it is far larger than what it is
/// made from.
pub fn document_of<'d>(
    scales: &'d Scales<'_>,
    weighed: &'d [Weighed<'_>],
    scatters: &'d Scatters,
    seasons: &'d Seasons,
    head: &Head,
) -> impl Iterator<Item = String> + 'd {
    let of_point = move |(n, w): (usize, &'d Weighed<'_>)| {
        let judged = w.candidates.iter().map(move |candidate| {
            let mut value = judgement(scales, w, candidate);
            if let (Value::Object(m), Some(s)) = (&mut value, scatters.get(&(n, candidate.oil))) {
                m.insert("scatter".into(), super::scatter::value(s, scales.units));
            }
            value
        });
        judged.chain(w.barred.iter().map(move |b| barred_row(scales, w, b)))
    };
    let pairs = seasons.iter();
    let pairs = pairs.map(move |(n, pair)| super::decided::season(scales, &weighed[*n], pair));
    json::in_parts(
        document("weigh", head),
        vec![
            (
                "judgements",
                Box::new(weighed.iter().enumerate().flat_map(of_point)),
            ),
            ("seasons", Box::new(pairs)),
        ],
    )
}

fn place(w: &Weighed<'_>, oil: &str) -> Map<String, Value> {
    let mut m = Map::new();
    m.insert("machine".into(), json!(w.point.machine));
    m.insert("point".into(), json!(w.point.point));
    m.insert("oil".into(), json!(oil));
    m
}

/// One judgement with its steps.
pub fn judgement(scales: &Scales<'_>, w: &Weighed<'_>, c: &Candidate) -> Value {
    let units = scales.units;
    let j = &c.judgement;
    let told = scales.explain(w, c);
    let mut m = place(w, &scales.site.oils[c.oil].id);
    m.insert("in_use".into(), json!(c.in_use));
    m.insert("verdict".into(), json!(j.verdict.word()));
    m.insert(
        "margins".into(),
        json!({
            "hot": steps(j.hot, &told),
            "cold": steps(j.cold, &told),
            "pour": kelvins(j.pour, &told),
            "oil": kelvins(j.oil, &told),
        }),
    );
    if j.maker.is_some() {
        m.insert("maker_grade".into(), steps(j.maker, &told));
    }
    m.insert(
        "reserve".into(),
        json!({ "value": j.reserve, "unit": "VG step" }),
    );
    m.insert("band".into(), band(j.band, units));
    m.insert(
        "nu".into(),
        json!({ "hot": nu(j.at_hot, units), "start": nu(j.at_start, units) }),
    );
    m.insert(
        "temperatures".into(),
        json!({ "hot": temperature(j.at_hot, units), "start": temperature(j.at_start, units) }),
    );
    m.insert("governing".into(), governing(w, j.hot, j.cold));
    if let Some(r) = &c.running {
        m.insert("running".into(), running(r, &told, units));
    }
    m.insert("conditions".into(), conditions(&c.conditions));
    m.insert("notes".into(), conditions(&c.notes));
    m.insert("because".into(), json!(c.because));
    let mut results: Vec<StepId> = told.margins.iter().map(|e| e.step).collect();
    results.extend(&told.running);
    results.dedup();
    m.insert(
        "steps".into(),
        Value::Array(json::steps(&told.trace, &results, units)),
    );
    Value::Object(m)
}

/// How hot an oil runs by the reading and by its losses, and what it costs.
fn running(r: &Running, told: &Explanation, units: Units) -> Value {
    let t = |t: Option<f64>| t.map_or(Value::Null, |t| json::temperature(t, units));
    let watts = |w: f64| json!({ "value": w, "unit": "W" });
    let mut by_kind = Map::new();
    for (kind, power) in &r.drag.by_kind {
        by_kind.insert(kind.word().into(), watts(power.base()));
    }
    let films: Vec<Value> = r
        .drag
        .films
        .iter()
        .map(|(part, film)| json!({ "part": part, "at": t(Some(film.base())) }))
        .collect();
    json!({
        "stated": t(r.stated),
        "by_losses": t(r.by_losses),
        "judged_at": t(r.used()),
        "calibrated": r.calibrated,
        "not_counted": r.uncounted.iter().map(not_counted).collect::<Vec<_>>(),
        "drag": {
            "value": r.drag.total.base(), "unit": "W", "by": by_kind,
            "ambient": t(Some(r.drag.ambient.base())), "at": t(Some(r.drag.t.base())),
            "films": films,
            "over_in_use": r.over_in_use.map(watts),
            "energy": r.energy_kwh.map(|e| json!({ "value": e, "unit": "kWh a year" })),
        },
        "steps": told.running.iter().map(|s| json::step_name(*s)).collect::<Vec<_>>(),
    })
}

/// A share of the losses that is not in the sum.
fn not_counted(u: &Uncounted) -> Value {
    json!({ "part": u.part, "share": u.share, "because": u.because })
}

/// A barred oil.
pub fn barred_row(scales: &Scales<'_>, w: &Weighed<'_>, b: &Barred) -> Value {
    let mut m = place(w, &scales.site.oils[b.oil].id);
    m.insert("in_use".into(), json!(b.in_use));
    m.insert("verdict".into(), json!("barred"));
    m.insert("barred_by".into(), conditions(&b.by));
    m.insert("conditions".into(), json!([]));
    m.insert(
        "because".into(),
        json!(b.by.iter().map(|c| c.says.clone()).collect::<Vec<_>>()),
    );
    Value::Object(m)
}

fn conditions(list: &[Condition]) -> Value {
    Value::Array(
        list.iter()
            .map(|c| json!({ "rule": c.rule, "says": c.says, "act": c.act, "source": c.source }))
            .collect(),
    )
}

fn step_of(m: Margin, told: &Explanation) -> Option<StepId> {
    told.margins
        .iter()
        .find(|e| e.demand == m.demand)
        .map(|e| e.step)
}

fn steps(m: Option<Margin>, told: &Explanation) -> Value {
    m.map_or(Value::Null, |m| {
        json::steps_margin(m.value, step_of(m, told))
    })
}

fn kelvins(m: Option<Margin>, told: &Explanation) -> Value {
    m.map_or(Value::Null, |m| {
        json::kelvins_margin(m.value, step_of(m, told))
    })
}

/// The band: null where it is nowhere, a null end where nothing limits it.
pub fn band(band: crate::judge::Band, units: Units) -> Value {
    if band.is_nowhere() {
        return Value::Null;
    }
    let end = |t: Option<f64>| t.map_or(Value::Null, |t| json::temperature(t, units));
    json!({ "low": end(band.low_end()), "high": end(band.high_end()) })
}

fn nu(at: Option<At>, units: Units) -> Value {
    at.map_or(Value::Null, |a| json::viscosity(a.nu, units))
}

fn temperature(at: Option<At>, units: Units) -> Value {
    at.map_or(Value::Null, |a| json::temperature(a.t, units))
}

/// The demand with the smallest margin of viscosity.
fn governing(w: &Weighed<'_>, hot: Option<Margin>, cold: Option<Margin>) -> Value {
    let smaller = match (hot, cold) {
        (Some(h), Some(c)) if c.value < h.value => Some((c, "cold")),
        (Some(h), _) => Some((h, "hot")),
        (None, Some(c)) => Some((c, "cold")),
        (None, None) => None,
    };
    let Some((m, end)) = smaller else {
        return Value::Null;
    };
    let demand: &Demand = &w.demands.settings[usize::from(m.setting)].list[usize::from(m.demand)];
    json!({ "end": end, "rule": demand.rule, "part": demand.part })
}

/// The same as a table.
pub fn table_of(scales: &Scales<'_>, weighed: &[Weighed<'_>], scatters: &Scatters) -> Table {
    let units = scales.units;
    let nu_unit = unit_of(Kind::KinematicViscosity, units)
        .name
        .replace('/', "_");
    let t_unit = unit_of(Kind::Temperature, units).name;
    let headings = [
        "machine".to_owned(),
        "point".to_owned(),
        "oil".to_owned(),
        "in_use".to_owned(),
        "verdict".to_owned(),
        "hot_vg_step".to_owned(),
        "cold_vg_step".to_owned(),
        "pour_k".to_owned(),
        "oil_k".to_owned(),
        format!("nu_hot_{nu_unit}"),
        format!("t_hot_{t_unit}"),
        format!("nu_start_{nu_unit}"),
        format!("t_start_{t_unit}"),
        format!("band_low_{t_unit}"),
        format!("band_high_{t_unit}"),
        "conditions".to_owned(),
        "because".to_owned(),
        format!("t_by_losses_{t_unit}"),
        "drag_w".to_owned(),
        "drag_over_in_use_w".to_owned(),
        "drag_energy_kwh_a_year".to_owned(),
    ];
    let mut table = Table {
        headings: headings.to_vec(),
        rows: Vec::new(),
    };
    if !scatters.is_empty() {
        let more = ["met_share", "met_share_low", "met_share_high"];
        table.headings.extend(more.map(str::to_owned));
    }
    for (n, w) in weighed.iter().enumerate() {
        for c in &w.candidates {
            let mut row = row(scales, w, c, units);
            if !scatters.is_empty() {
                let s = scatters.get(&(n, c.oil));
                row.push(Cell::number(s.map(Scatter::share)));
                row.push(Cell::number(s.map(|s| s.interval.0)));
                row.push(Cell::number(s.map(|s| s.interval.1)));
            }
            table.rows.push(row);
        }
        for b in &w.barred {
            let mut row = first_cells(w, &scales.site.oils[b.oil].id, b.in_use, "barred");
            row.extend((0..10).map(|_| Cell::Empty));
            row.push(Cell::Number(0.0));
            let by: Vec<String> =
                b.by.iter()
                    .map(|c| format!("{}: {}", c.rule, c.says))
                    .collect();
            row.push(Cell::Text(by.join("; ")));
            row.extend((0..4).map(|_| Cell::Empty));
            if !scatters.is_empty() {
                row.extend((0..3).map(|_| Cell::Empty));
            }
            table.rows.push(row);
        }
    }
    table
}

fn first_cells(w: &Weighed<'_>, oil: &str, in_use: bool, verdict: &str) -> Vec<Cell> {
    vec![
        Cell::from(w.point.machine.as_str()),
        Cell::maybe(w.point.point.as_deref()),
        Cell::from(oil),
        Cell::from(if in_use { "yes" } else { "no" }),
        Cell::from(verdict),
    ]
}

fn row(scales: &Scales<'_>, w: &Weighed<'_>, c: &Candidate, units: Units) -> Vec<Cell> {
    let j = &c.judgement;
    let mut row = first_cells(w, &scales.site.oils[c.oil].id, c.in_use, j.verdict.word());
    let value = |m: Option<Margin>| Cell::number(m.map(|m| m.value));
    let nu = unit_of(Kind::KinematicViscosity, units);
    let t = unit_of(Kind::Temperature, units);
    row.extend([value(j.hot), value(j.cold), value(j.pour), value(j.oil)]);
    for at in [j.at_hot, j.at_start] {
        row.push(Cell::number(at.map(|a| nu.from_base(a.nu))));
        row.push(Cell::number(at.map(|a| t.from_base(a.t))));
    }
    let nowhere = j.band.is_nowhere();
    for end in [j.band.low_end(), j.band.high_end()] {
        row.push(Cell::number(
            end.filter(|_| !nowhere).map(|e| t.from_base(e)),
        ));
    }
    row.push(Cell::Number(c.conditions.len() as f64));
    row.push(Cell::Text(c.because.join("; ")));
    let running = c.running.as_ref();
    let by_losses = running.and_then(|r| r.by_losses);
    row.push(Cell::number(by_losses.map(|at| t.from_base(at))));
    row.push(Cell::number(running.map(|r| r.drag.total.base())));
    row.push(Cell::number(running.and_then(|r| r.over_in_use)));
    row.push(Cell::number(running.and_then(|r| r.energy_kwh)));
    row
}

/// The calculation of a judgement, for other documents.
pub fn trace_of(scales: &Scales<'_>, w: &Weighed<'_>, c: &Candidate) -> Derivation {
    scales.explain(w, c).trace
}
