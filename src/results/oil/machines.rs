//! The machines an oil is weighed on.

use crate::judge::allowance::Room;
use crate::judge::weigh::Margin;
use crate::oil::life::YearlyCost;
use crate::quantity::Measure;
use crate::quantity::show::Units;
use crate::results::json::{kelvins_margin, number, quantity, steps_margin};
use crate::weighing::uses::{Age, OilUse};
use serde_json::{Value, json};

/// One object a machine.
pub fn machines(uses: &[OilUse], units: Units) -> Value {
    uses.iter().map(|u| one(u, units)).collect()
}

fn one(u: &OilUse, units: Units) -> Value {
    let j = u.judgement.as_ref();
    let steps = |m: Option<Margin>| m.map_or(Value::Null, |m| steps_margin(m.value, None));
    let kelvins = |m: Option<Margin>| m.map_or(Value::Null, |m| kelvins_margin(m.value, None));
    let margins = j.map(|j| {
        json!({
            "hot": steps(j.hot), "cold": steps(j.cold),
            "pour": kelvins(j.pour), "oil": kelvins(j.oil),
        })
    });
    json!({
        "machine": u.address,
        "role": u.role.word(),
        "verdict": u.verdict.map_or("barred", |v| v.word()),
        "margins": margins,
        "because": u.because,
        "loss_to_floor": u.room.as_ref().map(|(room, demand)| loss(*room, demand.as_deref())),
        "age": u.age.as_ref().map(|a| age(a, units)),
    })
}

fn loss(room: Room, demand: Option<&str>) -> Value {
    match room {
        Room::NoFloor => json!({ "says": "no floor there" }),
        Room::None { .. } => json!({ "says": "below a floor when new", "demand": demand }),
        Room::AllOfIt => json!({ "says": "no loss of the polymer alone reaches a floor" }),
        Room::UpTo { loss, .. } => json!({
            "value": number(100.0 * loss.base()), "unit": "%", "at": "100 degC", "demand": demand,
        }),
    }
}

fn age(a: &Age, units: Units) -> Value {
    let life = match &a.life {
        Err(why) => json!({ "why_not": why.to_string() }),
        Ok(l) => json!({
            "equation": [quantity(l.equation.0, units), quantity(l.equation.1, units)],
            "rule_of_ten": [quantity(l.rule_of_ten.0, units), quantity(l.rule_of_ten.1, units)],
            "oxidation_decides": l.decides,
        }),
    };
    let drain: Vec<Value> = a
        .drain
        .iter()
        .map(|d| {
            json!({
                "hours": [quantity(d.hours.0, units), quantity(d.hours.1, units)],
                "by": d.by, "source": d.source,
            })
        })
        .collect();
    json!({
        "guidance": true,
        "temperature": quantity(a.at, units),
        "life": life,
        "calendar": a.calendar.map(|c| quantity(c, units)),
        "drain": drain,
        "cost_a_year": a.cost.map(|(least, most)| json!([cost(least), cost(most)])),
        "cost_lacks": a.cost_lacks,
    })
}

fn cost(c: YearlyCost) -> Value {
    json!({ "changes": number(c.changes), "litres": number(c.litres), "cost": number(c.cost) })
}
