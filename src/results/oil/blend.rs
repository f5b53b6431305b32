//! A blend of an oil with another.

use super::{known, per_cent, plain};
use crate::judge::Judgement;
use crate::model::word::Word;
use crate::oil::blend::{Became, Blend, NoBlend};
use crate::quantity::show::{Units, unit_of};
use crate::quantity::{Kind, KinematicViscosity, Measure, Ratio, ThermodynamicTemperature};
use crate::results::json::{all_steps, number, quantity, steps_margin};
use crate::weighing::Condition;
use crate::weighing::top_up::TopUp;
use serde_json::{Value, json};

/// What was asked of a blend.
pub struct BlendResult<'b> {
    /// The oil added.
    pub with: &'b str,
    /// The blend, or why there is none; `None` where no share was asked for.
    pub blend: Option<&'b Result<Blend, NoBlend>>,
    /// What it does to machines.
    pub machines: &'b [TopUp],
    /// A target: viscosity, temperature, and the share by Walther and by Wright, or why not.
    pub target: Option<&'b Target>,
}

/// A viscosity wanted of a blend.
pub struct Target {
    /// The viscosity.
    pub nu: KinematicViscosity,
    /// Its temperature.
    pub at: ThermodynamicTemperature,
    /// Share of the oil added, by Walther and by Wright.
    pub share: Result<(Ratio, Ratio), NoBlend>,
}

/// The blend as a value.
pub fn blend_value(b: &BlendResult<'_>, units: Units) -> Value {
    let blend = match b.blend {
        None => Value::Null,
        Some(Err(why)) => json!({ "why_not": why.to_string() }),
        Some(Ok(blend)) => one(blend, units),
    };
    let target = b.target.map_or(Value::Null, |t| {
        let share = match &t.share {
            Err(why) => json!({ "why_not": why.to_string() }),
            Ok((walther, wright)) => {
                json!({ "walther": per_cent(walther.base()), "wright": per_cent(wright.base()) })
            }
        };
        json!({ "nu": quantity(t.nu, units), "temperature": quantity(t.at, units), "share": share })
    });
    let machines: Vec<Value> = b.machines.iter().map(machine).collect();
    json!({ "with": b.with, "blend": blend, "target": target, "machines": machines })
}

fn one(b: &Blend, units: Units) -> Value {
    let at: Vec<Value> =
        b.at.iter()
            .map(|(t, walther, wright)| {
                json!({
                    "temperature": quantity(*t, units),
                    "walther": known(*walther, units),
                    "wright": known(*wright, units),
                })
            })
            .collect();
    let unit = unit_of(Kind::KinematicViscosity, units);
    let by_split = b.by_split.map(|(lo, hi)| {
        let value = |nu: KinematicViscosity| number(nu.amount().in_unit(unit));
        json!({ "range": [value(lo), value(hi)], "unit": unit.name })
    });
    json!({
        "share": per_cent(b.share.base()),
        "mixing": b.mixing.word(),
        "mixing_source": b.mixing_source,
        "walther": became(&b.walther, units),
        "wright": became(&b.wright, units),
        "wright_over_walther": {
            "at40": per_cent(b.disagreement.0.base()),
            "at100": per_cent(b.disagreement.1.base()),
        },
        "at": at,
        "nu40_by_split": by_split,
        "findings": b.findings.iter()
            .map(|f| json!({ "name": f.name, "says": f.says, "act": f.act }))
            .collect::<Vec<_>>(),
        "steps": all_steps(&b.steps, units),
    })
}

fn became(b: &Became, units: Units) -> Value {
    json!({
        "nu40": known(b.nu40, units),
        "nu100": known(b.nu100, units),
        "vi": b.index.map_or(Value::Null, plain),
        "iso_vg": b.grade,
    })
}

fn machine(t: &TopUp) -> Value {
    let side = |j: &Judgement| {
        let steps = |m: Option<crate::judge::Margin>| {
            m.map_or(Value::Null, |m| steps_margin(m.value, None))
        };
        json!({ "verdict": j.verdict.word(), "hot": steps(j.hot), "cold": steps(j.cold) })
    };
    let list = |all: &[Condition]| -> Vec<Value> {
        let one = |c: &Condition| json!({ "rule": c.rule, "says": c.says, "act": c.act });
        all.iter().map(one).collect()
    };
    json!({
        "machine": t.address,
        "alone": side(&t.alone),
        "blended": side(&t.blended),
        "because": t.because,
        "barred_by": list(&t.barred_by),
        "conditions": list(&t.conditions),
    })
}
