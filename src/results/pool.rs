//! The shortest oil list as a document and as a table.

use super::csv::{Cell, Table};
use super::json::{self, Head, document};
use crate::decide::pool::case::{Pick, litres_a_year};
use crate::decide::pool::figures::{Pool, Sums, smallest};
use crate::decide::pool::step::Step;
use crate::decide::pool::{Fence, Outcome, Stock, Terms};
use crate::weighing::{Scales, Weighed};
use serde_json::{Map, Value, json};

/// What the user asked for.
#[derive(Clone, Copy, Debug)]
pub struct Asked<'t> {
    /// The terms.
    pub terms: &'t Terms,
    /// What holding one oil costs a year.
    pub site_price: Option<f64>,
}

/// A JSON document of the list.
pub fn document_of(
    scales: &Scales<'_>,
    pool: &Pool<'_, '_>,
    asked: &Asked<'_>,
    head: &Head,
) -> String {
    let mut top = document("pool", head);
    let id = |oil: &usize| scales.site.oils[*oil].id.clone();
    let t = asked.terms;
    top.insert(
        "terms".into(),
        json!({
            "keep": t.keep.iter().map(id).collect::<Vec<_>>(),
            "drop": t.drop.iter().map(id).collect::<Vec<_>>(),
            "at_most": t.at_most,
            "never_tight": t.never_tight,
            "site_price": asked.site_price,
            "nodes": t.nodes,
        }),
    );
    outcome(&mut top, scales, pool);
    if let Some(solved) = pool.solved() {
        let sums = pool.sums(scales.site, &solved.picks, &[]);
        top.insert("sums".into(), sums_of(scales, pool, &sums));
        let step = |s: &Option<Step>| s.as_ref().map_or(Value::Null, |s| step_of(scales, pool, s));
        top.insert("shorter".into(), step(&pool.shorter));
        top.insert("longer".into(), step(&pool.longer));
    }
    top.insert(
        "today".into(),
        json!({
            "oils": pool.today.iter().map(id).collect::<Vec<_>>(),
            "not_known": pool.today_unknown,
        }),
    );
    let undecided = pool.undecided.iter().map(|i| undecided(&pool.weighed[*i]));
    top.insert("undecided".into(), Value::Array(undecided.collect()));
    json::text(top)
}

fn outcome(top: &mut Map<String, Value>, scales: &Scales<'_>, pool: &Pool<'_, '_>) {
    let mut put = |key: &str, value: Value| {
        top.insert(key.into(), value);
    };
    let (mut oils, mut assignments) = (Vec::new(), Vec::new());
    match &pool.outcome {
        Outcome::Solved(solved) => {
            put("feasible", json!(true));
            put("proven", json!(true));
            put("bound", json!(solved.bound));
            put("length", json!(solved.stocks.len()));
            put("nodes", json!(solved.nodes));
            put("ties_proven", json!(solved.ties_proven));
            put("greedy", json!(solved.greedy));
            put("checked", json!("every pair of the list weighed again"));
            oils = solved
                .stocks
                .iter()
                .map(|s| stock(scales, pool, &solved.picks, *s))
                .collect();
            assignments = solved
                .picks
                .iter()
                .map(|p| assignment(scales, pool, p))
                .collect();
        }
        Outcome::Gap {
            bound,
            known,
            nodes,
        } => {
            put("feasible", json!(true));
            put("proven", json!(false));
            put("bound", json!(bound));
            put("known", json!(known));
            put("gap", json!(known - bound));
            put("nodes", json!(nodes));
        }
        Outcome::Impossible(why) => {
            use crate::decide::pool::Impossible;
            put("feasible", json!(false));
            put("proven", json!(true));
            match why {
                Impossible::Unserved(places) => {
                    put("bound", Value::Null);
                    let list = places.iter().map(|p| place_of(pool.point(*p)));
                    put("unserved", Value::Array(list.map(Value::Object).collect()));
                }
                Impossible::TooShort { shortest, .. } => put("bound", json!(shortest)),
            }
        }
    }
    put("oils", Value::Array(oils));
    put("assignments", Value::Array(assignments));
}

fn place_of(w: &Weighed<'_>) -> Map<String, Value> {
    let mut m = Map::new();
    m.insert("machine".into(), json!(w.point.machine));
    m.insert("point".into(), json!(w.point.point));
    m
}

fn fence(fence: Fence) -> Value {
    if fence.stands() {
        json!(fence.words())
    } else {
        Value::Null
    }
}

/// Picks of one oil behind its fence.
pub fn of_stock<'p>(
    pool: &'p Pool<'_, '_>,
    picks: &'p [Pick],
    stock: Stock,
) -> impl Iterator<Item = &'p Pick> + 'p {
    picks
        .iter()
        .filter(move |p| p.offer.oil == stock.oil && pool.places[p.place].fence == stock.fence)
}

/// Oils of today that an oil of the list takes the place of.
pub fn replaces(scales: &Scales<'_>, pool: &Pool<'_, '_>, picks: &[&Pick]) -> Vec<String> {
    let mut ids: Vec<String> = picks
        .iter()
        .filter(|p| p.offer.change)
        .filter_map(|p| crate::weighing::oil_in_use(pool.point(p.place).point))
        .filter(|id| scales.site.oil(id).is_some())
        .map(str::to_owned)
        .collect();
    ids.sort_unstable();
    ids.dedup();
    ids
}

fn stock(scales: &Scales<'_>, pool: &Pool<'_, '_>, picks: &[Pick], stock: Stock) -> Value {
    let oil = &scales.site.oils[stock.oil];
    let mine: Vec<&Pick> = of_stock(pool, picks, stock).collect();
    let litres = mine
        .iter()
        .filter_map(|p| litres_a_year(pool.point(p.place)))
        .fold(0.0, |sum, l| sum + l);
    json!({
        "oil": oil.id,
        "name": oil.name,
        "fence": fence(stock.fence),
        "serves": mine.iter().map(|p| pool.point(p.place).point.address()).collect::<Vec<_>>(),
        "litres": { "value": json::number(litres), "unit": "L a year" },
        "replaces": replaces(scales, pool, &mine),
    })
}

fn assignment(scales: &Scales<'_>, pool: &Pool<'_, '_>, pick: &Pick) -> Value {
    let w = pool.point(pick.place);
    let mut m = place_of(w);
    m.insert("oil".into(), json!(scales.site.oils[pick.offer.oil].id));
    m.insert("fence".into(), fence(pool.places[pick.place].fence));
    let word = if pick.offer.tight { "tight" } else { "holds" };
    m.insert("verdict".into(), json!(word));
    m.insert("in_use".into(), json!(!pick.offer.change));
    let now = crate::weighing::oil_in_use(w.point);
    m.insert("oil_now".into(), json!(now));
    if let Some(c) = pool.candidate(pick.place, pick.offer.oil) {
        let step = |x: Option<f64>| x.map_or(Value::Null, |x| json::steps_margin(x, None));
        let j = &c.judgement;
        m.insert(
            "margins".into(),
            json!({ "hot": step(j.hot.map(|m| m.value)), "cold": step(j.cold.map(|m| m.value)) }),
        );
        let conditions: Vec<Value> = c
            .conditions
            .iter()
            .map(|c| json!({ "rule": c.rule, "says": c.says, "act": c.act, "source": c.source }))
            .collect();
        m.insert("conditions".into(), Value::Array(conditions));
    }
    Value::Object(m)
}

fn sums_of(scales: &Scales<'_>, pool: &Pool<'_, '_>, s: &Sums) -> Value {
    let money = scales.site.frame.currency.as_deref().unwrap_or("money");
    let cost = |x: f64| json!({ "value": json::number(x), "unit": format!("{money} a year") });
    let litres = |x: f64, unit: &str| json!({ "value": json::number(x), "unit": unit });
    json!({
        "holds": s.words[0],
        "tight": s.words[1],
        "without": s.words[2],
        "changes": s.changes,
        "filled": litres(s.filled, "L"),
        "fills_not_stated": s.fills_unknown,
        "litres": litres(s.litres, "L a year"),
        "cost": cost(s.cost),
        "cost_today": cost(s.cost_today),
        "cost_not_known": s.unpriced,
        "smallest_margin": s.smallest.map_or(Value::Null, |(m, place)| json!({
            "value": json::number(m), "unit": "VG step",
            "machine": pool.point(place).point.address(),
        })),
        "margin_given_up": json::steps_margin(s.given_up, None),
        "lose_margin": s.lose,
        "gain_margin": s.gain,
    })
}

fn step_of(scales: &Scales<'_>, pool: &Pool<'_, '_>, step: &Step) -> Value {
    let sums = pool.sums(scales.site, &step.picks, &step.unserved);
    json!({
        "oil": scales.site.oils[step.stock.oil].id,
        "fence": fence(step.stock.fence),
        "without": step.unserved.iter().map(|p| pool.point(*p).point.address()).collect::<Vec<_>>(),
        "sums": sums_of(scales, pool, &sums),
    })
}

fn undecided(w: &Weighed<'_>) -> Value {
    let mut m = place_of(w);
    m.insert("because".into(), json!(why_undecided(w)));
    Value::Object(m)
}

/// Why a point has no oil to be put on the list.
pub fn why_undecided(w: &Weighed<'_>) -> &'static str {
    match w.candidates.first().map(|c| c.judgement.verdict) {
        None => "every oil is barred",
        Some(crate::judge::Verdict::Open) => "open: what is known gives no answer",
        Some(_) => "every oil weighed fails",
    }
}

/// One row a point: its oil on the list.
pub fn table_of(scales: &Scales<'_>, pool: &Pool<'_, '_>) -> Table {
    let headings = [
        "machine",
        "point",
        "fence",
        "oil",
        "verdict",
        "in_use",
        "oil_now",
        "hot_vg_step",
        "cold_vg_step",
        "smallest_vg_step",
        "conditions",
        "litres_L_a_year",
        "cost_a_year",
    ];
    let picks = pool.solved().map_or(&[][..], |s| &s.picks);
    Table {
        headings: headings.map(str::to_owned).to_vec(),
        rows: picks.iter().map(|p| row(scales, pool, p)).collect(),
    }
}

fn row(scales: &Scales<'_>, pool: &Pool<'_, '_>, pick: &Pick) -> Vec<Cell> {
    let w = pool.point(pick.place);
    let fence = pool.places[pick.place].fence;
    let candidate = pool.candidate(pick.place, pick.offer.oil);
    let j = candidate.map(|c| &c.judgement);
    let margin = |m: Option<crate::judge::Margin>| Cell::number(m.map(|m| m.value));
    vec![
        Cell::from(w.point.machine.as_str()),
        Cell::maybe(w.point.point.as_deref()),
        Cell::maybe(fence.stands().then(|| fence.words()).as_deref()),
        Cell::from(scales.site.oils[pick.offer.oil].id.as_str()),
        Cell::from(if pick.offer.tight { "tight" } else { "holds" }),
        Cell::from(if pick.offer.change { "no" } else { "yes" }),
        Cell::maybe(crate::weighing::oil_in_use(w.point)),
        margin(j.and_then(|j| j.hot)),
        margin(j.and_then(|j| j.cold)),
        Cell::number(j.and_then(smallest)),
        Cell::number(candidate.map(|c| c.conditions.len() as f64)),
        Cell::number(litres_a_year(w)),
        Cell::number(crate::decide::pool::case::yearly(
            scales.site,
            w,
            pick.offer.oil,
        )),
    ]
}
