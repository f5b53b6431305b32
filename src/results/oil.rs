//! The sheet of one oil, with the machines it is weighed on and a blend of it.

mod blend;
mod cold;
mod machines;

use super::csv::{Cell, Table};
use super::json::{self, Head, document, number, quantity, step_name};
use crate::oil::grades::{Graded, Worn};
use crate::oil::sheet::{DrawnLine, Loss, OilSheet, PolymerSheet, Row, SpreadOf, standing};
use crate::oil::start::Standing;
use crate::quantity::show::{Units, unit_of};
use crate::quantity::{Amount, Kind, KinematicViscosity, Measure, Ratio, ThermodynamicTemperature};
use crate::trace::Known;
use crate::weighing::uses::OilUse;
use serde_json::{Map, Value, json};

pub use blend::{BlendResult, Target, blend_value};
pub use machines::machines;

/// What is told of one oil.
#[derive(Clone, Copy)]
pub struct Told<'o> {
    /// Its sheet.
    pub sheet: &'o OilSheet,
    /// The machines it was weighed on.
    pub uses: &'o [OilUse],
    /// A blend, where one was asked for.
    pub blend: Option<&'o BlendResult<'o>>,
}

/// A JSON document: `oil` for one oil, `oils` where a pattern named several.
pub fn document_of(all: &[Told<'_>], head: &Head, units: Units) -> String {
    let mut top = document("oil", head);
    let mut values: Vec<Value> = all.iter().map(|t| told(t, units)).collect();
    if values.len() == 1 {
        top.insert("oil".into(), values.remove(0));
    } else {
        top.insert("oils".into(), Value::Array(values));
    }
    json::text(top)
}

fn told(told: &Told<'_>, units: Units) -> Value {
    let mut oil = value(told.sheet, units);
    oil.insert("machines".into(), machines(told.uses, units));
    if let Some(blend) = told.blend {
        oil.insert("blend".into(), blend_value(blend, units));
    }
    Value::Object(oil)
}

/// A number with its step.
pub(super) fn known<Q: Measure>(k: Known<Q>, units: Units) -> Value {
    let mut v = match quantity(k.value, units) {
        Value::Object(m) => m,
        _ => Map::new(),
    };
    v.insert("step".into(), json!(step_name(k.step)));
    Value::Object(v)
}

fn maybe<Q: Measure>(k: Option<Known<Q>>, units: Units) -> Value {
    k.map_or(Value::Null, |k| known(k, units))
}

/// A pure number with its step, without a unit.
pub(super) fn plain(k: Known<Ratio>) -> Value {
    json!({ "value": number(k.value.base()), "step": step_name(k.step) })
}

/// A share in per cent.
pub(super) fn per_cent(share: f64) -> Value {
    json!({ "value": number(100.0 * share), "unit": "%" })
}

fn known_per_cent(k: Known<Ratio>) -> Value {
    json!({ "value": number(100.0 * k.value.base()), "unit": "%", "step": step_name(k.step) })
}

/// The sheet without machines and blend.
pub fn value(sheet: &OilSheet, units: Units) -> Map<String, Value> {
    let mut m = Map::new();
    m.insert("id".into(), json!(sheet.id));
    m.insert("name".into(), json!(sheet.name));
    m.insert("answer".into(), json!(sheet.headline));
    m.insert("because".into(), json!(sheet.because));
    let facts: Map<String, Value> = sheet
        .facts
        .iter()
        .map(|(k, v)| ((*k).to_owned(), json!(v)))
        .collect();
    m.insert("facts".into(), Value::Object(facts));
    m.insert("vi".into(), sheet.index.map_or(Value::Null, plain));
    m.insert(
        "vi_spread".into(),
        sheet.index_spread.map_or(Value::Null, plain),
    );
    m.insert(
        "vi_worn".into(),
        sheet.index_worn.map_or(Value::Null, plain),
    );
    m.insert("grades".into(), sheet.grades.iter().map(graded).collect());
    m.insert("stated".into(), range(sheet.stated, units));
    m.insert("spread".into(), json!(spread(sheet.spread)));
    m.insert(
        "points".into(),
        sheet.rows.iter().map(|r| row(r, units)).collect(),
    );
    let polymer = sheet.polymer.as_ref();
    m.insert(
        "polymer".into(),
        polymer.map_or(Value::Null, |p| polymer_value(p, units)),
    );
    m.insert("cold".into(), cold::cold(&sheet.cold, units));
    m.insert("life".into(), cold::life(sheet, units));
    let findings = sheet.findings.iter();
    let findings = findings.map(|f| json!({ "name": f.name, "says": f.says, "act": f.act }));
    m.insert("findings".into(), findings.collect());
    m.insert(
        "lines".into(),
        sheet.lines.iter().map(|l| line(l, units)).collect(),
    );
    m.insert(
        "steps".into(),
        Value::Array(json::all_steps(&sheet.steps, units)),
    );
    m
}

fn range((lo, hi): (ThermodynamicTemperature, ThermodynamicTemperature), units: Units) -> Value {
    json!({ "low": quantity(lo, units), "high": quantity(hi, units) })
}

fn spread(of: SpreadOf) -> &'static str {
    match of {
        SpreadOf::Ends => "ends of grade or tolerance, judged",
        SpreadOf::Tests => "reproducibility of the tests, not judged",
        SpreadOf::Nothing => "none",
    }
}

fn graded(g: &Graded) -> Value {
    let (worn, at_worst) = match &g.worn {
        Some(Worn::Grade(grade)) => (json!(grade), false),
        Some(Worn::AtWorst(grade)) => (json!(grade), true),
        None => (Value::Null, false),
    };
    json!({
        "system": g.system.word(),
        "new": g.new,
        "worn": worn,
        "worn_at_worst": at_worst,
        "shears": g.worn.is_some(),
        "leaves": match g.leaves() { Some(true) => "yes", Some(false) => "perhaps", None => "no" },
    })
}

fn row(r: &Row, units: Units) -> Value {
    let pair = |p: Option<(Known<_>, Known<_>)>, second: bool| {
        maybe(p.map(|(a, b)| if second { b } else { a }), units)
    };
    let base = r.base.map_or(Value::Null, |(lo, hi)| {
        let unit = unit_of(Kind::KinematicViscosity, units);
        json!({
            "range": [number(lo.amount().in_unit(unit)), number(hi.amount().in_unit(unit))],
            "unit": unit.name,
        })
    });
    json!({
        "temperature": quantity(r.at, units),
        "new": known(r.new, units),
        "cold": maybe(r.cold, units),
        "thin": pair(r.ends, false),
        "thick": pair(r.ends, true),
        "worn_least_loss": pair(r.worn, false),
        "worn": pair(r.worn, true),
        "base": base,
        "density": known(r.density, units),
        "dynamic": known(r.dynamic, units),
        "alpha": maybe(r.alpha, units),
        "standing": standing(r.standing),
        "extrapolated": extrapolated(r.standing),
        "remarks": r.remarks,
    })
}

/// Kelvins beyond what is known; negative below. Null where nothing is extrapolated.
fn extrapolated(s: Standing) -> Value {
    match s {
        Standing::Below(by) => json!({ "value": number(-by), "unit": "K" }),
        Standing::Above(by) => json!({ "value": number(by), "unit": "K" }),
        _ => Value::Null,
    }
}

fn polymer_value(p: &PolymerSheet, units: Units) -> Value {
    let base = p.base.map_or(Value::Null, |ends| {
        let at =
            |(thin, thick): (Known<_>, Known<_>)| json!([known(thin, units), known(thick, units)]);
        json!({ "nu40": at(ends[0]), "nu100": at(ends[1]) })
    });
    let loss = match p.loss {
        Loss::Nothing => Value::Null,
        Loss::Known { at40, at100 } => {
            json!({ "known": true, "at40": known_per_cent(at40), "at100": known_per_cent(at100) })
        }
        Loss::Between {
            least,
            most_mild,
            most_severe,
        } => json!({
            "known": false,
            "least": per_cent(least.base()),
            "engines_and_hydraulics": per_cent(most_mild.base()),
            "gears_and_rolling_bearings": per_cent(most_severe.base()),
        }),
    };
    json!({
        "base_and_polymer": if p.stated { "stated" } else { "estimated" },
        "polymer": p.named,
        "base_oil": base,
        "polymer_carries": p.carries.map(|(a, b)| json!([per_cent(a.base()), per_cent(b.base())])),
        "window": range(p.window, units),
        "loss": loss,
        "pssi": p.index.map_or(Value::Null, known_per_cent),
        "test": p.test.as_ref().map(|(written, known)| json!({
            "written": written,
            "known_as": known.as_ref().map(|k| k.0.clone()),
        })),
        "tests_by_severity": p.severity.iter()
            .map(|(name, severity)| json!({ "test": name, "severity": number(severity.base()) }))
            .collect::<Vec<_>>(),
        "kept_under_shear": p.kept_150.map_or(Value::Null, |(a, b)| json!({
            "least": plain(a), "most": plain(b), "calibrated": p.calibrated,
        })),
    })
}

fn line(l: &DrawnLine, units: Units) -> Value {
    let (t, nu) = (
        unit_of(Kind::Temperature, units),
        unit_of(Kind::KinematicViscosity, units),
    );
    let value = |a: Amount, unit| number(a.in_unit(unit));
    let points: Vec<Value> = l
        .readings
        .iter()
        .map(|r| {
            json!([
                value(r.at.amount(), t),
                value(r.nu.amount(), nu),
                r.extrapolated
            ])
        })
        .collect();
    json!({ "line": l.of.word(), "units": [t.name, nu.name], "points": points })
}

/// The oils at their temperatures, as a table.
pub fn table_of(sheets: &[&OilSheet], units: Units) -> Table {
    let nu = unit_of(Kind::KinematicViscosity, units)
        .name
        .replace('/', "_");
    let t = unit_of(Kind::Temperature, units).name;
    let eta = unit_of(Kind::DynamicViscosity, units)
        .name
        .replace('.', "_");
    let mut headings = vec!["oil".to_owned(), format!("t_{t}")];
    for column in [
        "new",
        "measured",
        "worn",
        "worn_least_loss",
        "thin",
        "thick",
    ] {
        headings.push(format!("nu_{column}_{nu}"));
    }
    headings.push(format!("eta_{eta}"));
    headings.push("standing".to_owned());
    headings.push("remarks".to_owned());
    let mut table = Table {
        headings,
        rows: Vec::new(),
    };
    for sheet in sheets {
        table
            .rows
            .extend(sheet.rows.iter().map(|r| cells(&sheet.id, r, units)));
    }
    table
}

fn cells(id: &str, r: &Row, units: Units) -> Vec<Cell> {
    let of = |amount: Amount| amount.in_unit(unit_of(amount.kind, units));
    let nu = |k: Option<Known<KinematicViscosity>>| Cell::number(k.map(|k| of(k.value.amount())));
    vec![
        Cell::from(id),
        Cell::number(Some(of(r.at.amount()))),
        nu(Some(r.new)),
        nu(r.cold),
        nu(r.worn.map(|w| w.1)),
        nu(r.worn.map(|w| w.0)),
        nu(r.ends.map(|e| e.0)),
        nu(r.ends.map(|e| e.1)),
        Cell::number(Some(of(r.dynamic.value.amount()))),
        Cell::from(standing(r.standing)),
        Cell::Text(r.remarks.join("; ")),
    ]
}
