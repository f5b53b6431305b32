//! An audit: samples, findings, the two-by-two.

use super::csv::{Cell, Table};
use super::json::{self, Head, document};
use crate::audit::bottle::{Bottle, Bounds};
use crate::audit::causes::Named;
use crate::audit::cross;
use crate::audit::findings::{Finding, asks, trend_words};
use crate::audit::judged::Judged;
use crate::audit::readings::Against;
use crate::audit::serves::Slope;
use crate::audit::trend::Trend;
use crate::audit::{Audit, Unsampled};
use crate::model::sample::Reading;
use crate::quantity::show::exact;
use crate::weighing::{Condition, Scales};
use serde_json::{Map, Value, json};

/// A JSON document of an audit.
pub fn document_of(scales: &Scales<'_>, audit: &Audit, head: &Head) -> String {
    let mut top = document("audit", head);
    top.insert("answer".into(), json!(cross::answer(audit, scales.site)));
    let rows = cross::rows(audit, scales.site);
    let two_by_two: Vec<Value> = rows
        .iter()
        .map(|r| {
            let open: Vec<Value> = r.open.iter().map(|(m, why)| json!({ "machine": m, "because": why })).collect();
            json!({ "label": r.whose.words(), "serves": r.serves, "does_not_serve": r.not, "open": open })
        })
        .collect();
    top.insert("two_by_two".into(), Value::Array(two_by_two));
    let mut samples: Vec<Value> = audit
        .judged
        .iter()
        .map(|j| sample(scales, audit, j))
        .collect();
    samples.extend(audit.unsampled.iter().map(|u| unsampled(scales, u)));
    top.insert("samples".into(), Value::Array(samples));
    let findings = audit.findings.iter().enumerate();
    top.insert(
        "findings".into(),
        findings.map(|(i, f)| finding(audit, i, f)).collect(),
    );
    let unmatched: Vec<Value> = audit
        .unmatched
        .iter()
        .map(|u| {
            let b = &audit.bottles[u.bottle];
            json!({ "sample": b.name(), "row": b.place.row, "machine": b.machine, "because": u.why, "did_you_mean": u.meant })
        })
        .collect();
    top.insert("unmatched".into(), Value::Array(unmatched));
    let units: Vec<Value> = audit.units.iter().map(|u| trend(scales, u)).collect();
    top.insert("trends".into(), Value::Array(units));
    let fed: Vec<Value> = audit
        .fed
        .iter()
        .map(|f| {
            json!({
                "machine": scales.site.points[f.point].address(),
                "oil": scales.site.oils[f.oil].id,
                "measured_in": f.measured_in,
                "loss": { "value": json::number(100.0 * f.loss), "unit": "%" },
                "before": f.before.word(),
                "after": f.after.word(),
                "hot": { "before": steps(f.hot.0), "after": steps(f.hot.1) },
            })
        })
        .collect();
    top.insert("measured_shear".into(), Value::Array(fed));
    json::text(top)
}

fn steps(value: Option<f64>) -> Value {
    value.map_or(Value::Null, |v| json::steps_margin(v, None))
}

fn nu(value: Option<f64>) -> Value {
    value.map_or(
        Value::Null,
        |v| json!({ "value": json::number(v), "unit": "mm2/s" }),
    )
}

fn conditions(list: &[Condition]) -> Value {
    let all = list
        .iter()
        .map(|c| json!({ "rule": c.rule, "says": c.says, "act": c.act, "source": c.source }));
    Value::Array(all.collect())
}

fn percent(share: Option<f64>) -> Value {
    share.map_or(
        Value::Null,
        |s| json!({ "value": json::number(100.0 * s), "unit": "%" }),
    )
}

/// How it serves: its margins, and what the machine asks of it at 40 and 100 °C.
fn service(m: &mut Map<String, Value>, j: &Judged) {
    let serves = j.serves.as_ref();
    let margin = |m: Option<crate::judge::Margin>| steps(m.map(|m| m.value));
    let kelvins = |m: Option<crate::judge::Margin>| {
        m.map_or(Value::Null, |m| json::kelvins_margin(m.value, None))
    };
    m.insert(
        "margins".into(),
        json!({
            "hot": margin(serves.and_then(|s| s.judgement.hot)),
            "cold": margin(serves.and_then(|s| s.judgement.cold)),
            "pour": kelvins(serves.and_then(|s| s.judgement.pour)),
            "oil": kelvins(serves.and_then(|s| s.judgement.oil)),
        }),
    );
    m.insert(
        "asks".into(),
        json!({
            "at_40": { "floor": nu(serves.and_then(|s| s.floor40)), "ceiling": nu(serves.and_then(|s| s.ceiling40)) },
            "at_100": { "floor": nu(serves.and_then(|s| s.floor100)), "ceiling": nu(serves.and_then(|s| s.ceiling100)) },
            "no_value_fits": serves.is_some_and(crate::audit::serves::Serves::no_value_fits),
            "slope": serves.map(|s| match s.slope { Slope::Own => "the sample's own", Slope::OfLabel => "the labelled oil's" }),
        }),
    );
}

/// One sample.
fn sample(scales: &Scales<'_>, audit: &Audit, j: &Judged) -> Value {
    let b = &audit.bottles[j.bottle];
    let point = j.point.map(|p| &scales.site.points[p]);
    let mut m = Map::new();
    m.insert("sample".into(), json!(b.name()));
    m.insert("row".into(), json!(b.place.row));
    m.insert("machine".into(), json!(point.map(|p| p.machine.clone())));
    m.insert("point".into(), json!(point.and_then(|p| p.point.clone())));
    m.insert("machine_as_written".into(), json!(b.machine));
    m.insert(
        "label".into(),
        json!(
            j.label
                .oil
                .map(|o| scales.site.oils[o].id.clone())
                .or(j.label.written.clone())
        ),
    );
    m.insert("label_from_machine".into(), json!(j.label.from_machine));
    m.insert(
        "machine_holds".into(),
        json!(
            j.label
                .machine_holds
                .map(|o| scales.site.oils[o].id.clone())
        ),
    );
    m.insert("drawn".into(), json!(b.drawn.map(|d| d.to_string())));
    m.insert("latest".into(), json!(j.latest));
    m.insert("as_labelled".into(), json!(j.whose.words()));
    m.insert("not_known_because".into(), json!(j.why_not_known));
    m.insert(
        "baseline".into(),
        json!(j.baseline.map(crate::audit::profile::From::words)),
    );
    m.insert("serves".into(), json!(j.word()));
    m.insert("because".into(), json!(because(j)));
    m.insert("barred_by".into(), conditions(&j.barred));
    service(&mut m, j);
    let (vi, vi_new) = j.change.vi;
    m.insert(
        "change".into(),
        json!({
            "nu40": percent(j.change.nu40),
            "nu100": percent(j.change.nu100),
            "vi": vi.map(exact),
            "vi_new": vi_new.map(exact),
        }),
    );
    m.insert(
        "limits".into(),
        Value::Array(j.against.iter().map(against).collect()),
    );
    m.insert(
        "causes".into(),
        Value::Array(
            j.diagnosis
                .causes
                .iter()
                .map(|n| cause(scales, n))
                .collect(),
        ),
    );
    m.insert("decided".into(), json!(!j.diagnosis.undecided));
    let tell: Vec<&str> = j.diagnosis.would_tell.iter().map(|r| r.key()).collect();
    m.insert("would_tell".into(), json!(tell));
    m.insert("cleanliness".into(), cleanliness(j));
    m.insert("readings".into(), readings(b));
    m.insert("flags".into(), json!(b.flags));
    let unread: Vec<Value> = b
        .unread
        .iter()
        .map(|(h, t)| json!({ "column": h, "cell": t }))
        .collect();
    m.insert("not_understood".into(), Value::Array(unread));
    Value::Object(m)
}

/// Why its word is what it is.
pub fn because(j: &Judged) -> Vec<String> {
    if j.too_old || j.twice {
        return vec![cross::why_open(j)];
    }
    if j.is_barred() {
        return j.barred.iter().map(|c| c.says.clone()).collect();
    }
    match &j.serves {
        Some(s) => s.because.clone(),
        None => j.why_not_known.clone().into_iter().collect(),
    }
}

fn against(a: &Against) -> Value {
    json!({
        "on": a.on,
        "says": a.says,
        "level": if a.level.word().is_empty() { Value::Null } else { json!(a.level.word()) },
        "rule": a.limit.rule,
        "source": a.limit.source,
        "confidence": a.limit.confidence,
    })
}

fn cause(scales: &Scales<'_>, n: &Named) -> Value {
    let lines = |sign: f64| -> Vec<Value> {
        let mine = n.evidence.iter().filter(|e| e.weight * sign > 0.0);
        mine.map(|e| json!({ "on": e.on, "says": e.says, "weight": exact(e.weight) }))
            .collect()
    };
    let oils: Vec<Value> = n
        .oils
        .iter()
        .map(|o| {
            json!({
                "oil": o.oil.map(|i| scales.site.oils[i].id.clone()),
                "says": o.says,
                "share": { "value": json::number(100.0 * o.share), "unit": "%" },
                "likelihood": exact(o.likelihood),
            })
        })
        .collect();
    json!({
        "cause": n.cause.says(),
        "id": n.cause.id(),
        "likelihood": exact(n.likelihood),
        "word": n.word(),
        "size": n.size.map(exact),
        "for": lines(1.0),
        "against": lines(-1.0),
        "oils": oils,
        "act": n.cause.act(),
    })
}

fn cleanliness(j: &Judged) -> Value {
    j.clean.as_ref().map_or(Value::Null, |c| {
        let (target, part, source) = match &c.target {
            Some((t, p, s)) => (Some(t.to_string()), Some(p.as_str()), Some(s.as_str())),
            None => (None, None, None),
        };
        json!({
            "code": c.code.to_string(),
            "from_counts": c.from_counts,
            "target": target,
            "of": part,
            "source": source,
            "over": c.over,
            "level": if c.level.word().is_empty() { Value::Null } else { json!(c.level.word()) },
        })
    })
}

fn readings(b: &Bottle) -> Value {
    let mut m = Map::new();
    for (reading, figure) in b.figures.iter() {
        let bound = match figure.bounds {
            Bounds::Exactly => None,
            Bounds::Below => Some("below"),
            Bounds::Above => Some("above"),
        };
        let mut one = json!({ "value": json::number(figure.value), "unit": reading.unit(), "written": figure.written });
        if let (Some(bound), Value::Object(o)) = (bound, &mut one) {
            o.insert("bound".into(), json!(bound));
        }
        m.insert(reading.key().into(), one);
    }
    Value::Object(m)
}

fn unsampled(scales: &Scales<'_>, u: &Unsampled) -> Value {
    let point = &scales.site.points[u.point];
    let serves = if u.barred.is_empty() {
        u.verdict.map(crate::judge::Verdict::word)
    } else {
        Some("barred")
    };
    json!({
        "sample": null,
        "machine": point.machine,
        "point": point.point,
        "label": u.oil.map(|o| scales.site.oils[o].id.clone()),
        "as_labelled": "not known",
        "not_known_because": "never sampled; judged as the label says",
        "serves": serves,
        "because": u.because,
        "barred_by": conditions(&u.barred),
        "causes": [],
        "margins": { "hot": null, "cold": null, "pour": null, "oil": null },
    })
}

fn finding(audit: &Audit, i: usize, f: &Finding) -> Value {
    let j = f.judged.map(|p| &audit.judged[p]);
    let causes: Vec<&str> = match (f.kind, j) {
        ("changed", Some(j)) => j.diagnosis.causes.iter().map(|n| n.cause.says()).collect(),
        _ => Vec::new(),
    };
    json!({
        "number": i + 1,
        "kind": f.kind,
        "level": f.level.word(),
        "machines": f.machines,
        "title": f.title,
        "text": f.text,
        "causes": causes,
        "act": f.act,
        "sample": j.map(|j| audit.bottles[j.bottle].name()),
    })
}

fn trend(scales: &Scales<'_>, u: &crate::audit::units::Unit) -> Value {
    let point = &scales.site.points[u.point];
    let mut m = json!({
        "machine": point.machine,
        "point": point.point,
        "name": u.name,
        "samples": u.judged.len(),
        "of_this_fill": u.of_this_fill,
        "events": u.events,
        "says": trend_words(&u.trend),
        "metals": u.rises.iter().map(|r| r.says.clone()).collect::<Vec<_>>(),
    });
    if let (Trend::Moves(t), Value::Object(o)) = (&u.trend, &mut m) {
        let slope = json!({ "value": json::number(t.slope), "half_width": json::number(t.slope_half), "unit": "mm2/s a year" });
        o.insert("slope".into(), slope);
        let reaches = t.reaches.as_ref().map(|r| {
            json!({
                "limit": r.limit, "nu40": nu(Some(r.nu40)), "on": r.on.to_string(),
                "between": [r.between.0.map(|d| d.to_string()), r.between.1.map(|d| d.to_string())],
            })
        });
        o.insert("reaches".into(), json!(reaches));
    }
    m
}

/// A CSV table of the samples, the unsampled oils in use at the end.
pub fn table_of(scales: &Scales<'_>, audit: &Audit) -> Table {
    let headings = [
        "sample",
        "row",
        "machine",
        "point",
        "label",
        "drawn",
        "latest",
        "nu40_mm2_s",
        "nu100_mm2_s",
        "change_nu40_percent",
        "change_nu100_percent",
        "vi",
        "vi_new",
        "as_labelled",
        "serves",
        "hot_vg_step",
        "cold_vg_step",
        "floor_40_mm2_s",
        "ceiling_40_mm2_s",
        "floor_100_mm2_s",
        "ceiling_100_mm2_s",
        "level",
        "cause",
        "likelihood",
        "more_causes",
        "cleanliness",
        "cleanliness_target",
        "flags",
        "because",
    ];
    let mut table = Table {
        headings: headings.map(str::to_owned).to_vec(),
        rows: audit.judged.iter().map(|j| row(scales, audit, j)).collect(),
    };
    for u in &audit.unsampled {
        let point = &scales.site.points[u.point];
        let mut row = vec![Cell::Empty; headings.len()];
        row[2] = Cell::from(point.machine.as_str());
        row[3] = Cell::maybe(point.point.as_deref());
        row[4] = Cell::maybe(u.oil.map(|o| scales.site.oils[o].id.as_str()));
        row[13] = Cell::from("not known");
        row[14] = match (u.barred.is_empty(), u.verdict) {
            (false, _) => Cell::from("barred"),
            (true, verdict) => Cell::maybe(verdict.map(crate::judge::Verdict::word)),
        };
        row[28] = Cell::from("never sampled; judged as the label says");
        table.rows.push(row);
    }
    table
}

fn row(scales: &Scales<'_>, audit: &Audit, j: &Judged) -> Vec<Cell> {
    let b = &audit.bottles[j.bottle];
    let point = j.point.map(|p| &scales.site.points[p]);
    let s = j.serves.as_ref();
    let label = j
        .label
        .oil
        .map(|o| scales.site.oils[o].id.as_str())
        .or(j.label.written.as_deref());
    let causes = &j.diagnosis.causes;
    let more: Vec<&str> = causes.iter().skip(1).map(|n| n.cause.says()).collect();
    let target = j
        .clean
        .as_ref()
        .and_then(|c| c.target.as_ref())
        .map(|(t, ..)| t.to_string());
    let tag = point.map_or(b.machine.as_str(), |p| p.machine.as_str());
    vec![
        Cell::Text(b.name()),
        Cell::Number(f64::from(b.place.row)),
        Cell::from(tag),
        Cell::maybe(point.and_then(|p| p.point.as_deref())),
        Cell::maybe(label),
        Cell::maybe(b.drawn.map(|d| d.to_string()).as_deref()),
        Cell::from(if j.latest { "yes" } else { "no" }),
        Cell::number(b.figures.exact(Reading::Nu40)),
        Cell::number(b.figures.exact(Reading::Nu100)),
        Cell::number(j.change.nu40.map(|x| 100.0 * x)),
        Cell::number(j.change.nu100.map(|x| 100.0 * x)),
        Cell::number(j.change.vi.0),
        Cell::number(j.change.vi.1),
        Cell::from(j.whose.words()),
        Cell::maybe(j.word()),
        Cell::number(s.and_then(|s| s.judgement.hot).map(|m| m.value)),
        Cell::number(s.and_then(|s| s.judgement.cold).map(|m| m.value)),
        Cell::number(s.and_then(|s| s.floor40)),
        Cell::number(s.and_then(|s| s.ceiling40)),
        Cell::number(s.and_then(|s| s.floor100)),
        Cell::number(s.and_then(|s| s.ceiling100)),
        Cell::maybe(Some(j.level().word()).filter(|w| !w.is_empty())),
        Cell::maybe(causes.first().map(|n| n.cause.says())),
        Cell::number(causes.first().map(|n| n.likelihood)),
        Cell::maybe(Some(more.join("; ")).filter(|t| !t.is_empty()).as_deref()),
        Cell::maybe(j.clean.as_ref().map(|c| c.code.to_string()).as_deref()),
        Cell::maybe(target.as_deref()),
        Cell::maybe(b.flags.as_deref()),
        Cell::Text(format!("asks {}; {}", asks(j), because(j).join("; "))),
    ]
}
