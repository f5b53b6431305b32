//! `worm-sliding` and `worm-efficiency`.

use super::GROUP;
use crate::quantity::convert::degrees;
use crate::quantity::{Angle, Ratio, Velocity};
use crate::relation::gear::worm::{self, FRICTION, HOUSING_RISE, VISCOSITY_GUIDE};
use crate::trace::{Known, Recorder};
use crate::work::contact::{form, may, must};
use crate::work::{Args, Input, Refusal, Relation, Worked};

const LEAD: Input = must("lead_angle", "lead angle, 11.3 deg");

pub(super) const SLIDING: Relation = Relation {
    name: "worm-sliding",
    group: GROUP,
    law: &worm::SLIDING,
    with: &[
        must("worm_diameter", "mean diameter of the worm, 80 mm"),
        must("speed", "speed of the worm, 1450 r/min"),
        LEAD,
        may(
            "duty",
            "medium, or heavy for slow and loaded worms",
            "medium",
        ),
    ],
    gives: &[
        ("v_g", "sliding speed, m/s"),
        ("nu40", "guide to the viscosity at 40 degC, mm2/s"),
    ],
    run: run_sliding,
};

fn run_sliding(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let heavy = args.choice("duty", &["medium", "heavy"], Some("medium"))? == "heavy";
    let lead = args.quantity(worked, "lead_angle", "lead angle")?;
    let v = sliding(args, worked, lead)?;
    let says = "guide to the viscosity at 40 degC";
    let law = &VISCOSITY_GUIDE;
    let trace = &mut worked.trace;
    let nu40 = trace.attempt("nu40", says, law, (("v_g", v),), |(v,)| {
        worm::viscosity_guide(v, heavy)
    })?;
    worked.result("v_g", v, "m/s");
    worked.result("nu40", nu40, "mm2/s");
    worked.remark("nu40 is a guide only; slow, heavily loaded worms take a thicker oil");
    Ok(())
}

fn sliding(
    args: &mut Args,
    worked: &mut Worked,
    lead: Known<Angle>,
) -> Result<Known<Velocity>, Refusal> {
    let d = args.quantity(worked, "worm_diameter", "mean diameter of the worm")?;
    let n = args.quantity(worked, "speed", "speed of the worm")?;
    let inputs = (("d1", d), ("n1", n), ("gamma", lead));
    let says = "sliding speed";
    let law = &worm::SLIDING;
    let trace = &mut worked.trace;
    let v = trace.attempt("v_g", says, law, inputs, |(d, n, gamma)| {
        worm::sliding_speed(d, n, gamma)
    })?;
    Ok(v)
}

pub(super) const EFFICIENCY: Relation = Relation {
    name: "worm-efficiency",
    group: GROUP,
    law: &worm::EFFICIENCY,
    with: &[
        LEAD,
        may("pressure_angle", "normal pressure angle", "20 deg"),
        form("mu", "coefficient of friction, where known", "friction"),
        form(
            "worm_diameter",
            "mean diameter of the worm",
            "sliding speed",
        ),
        form("speed", "speed of the worm", "sliding speed"),
        form("power", "power into the worm, for the rise", "rise"),
        form("k", "heat transfer coefficient of the housing", "rise"),
        form("area", "area of the housing", "rise"),
    ],
    gives: &[
        ("efficiency", "efficiency with the worm driving"),
        ("mu", "coefficient of friction"),
        ("v_g", "sliding speed, m/s, where worked out"),
        (
            "rise",
            "rise of the oil over the surroundings, K, where asked for",
        ),
    ],
    run: run_efficiency,
};

fn run_efficiency(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let lead = args.quantity(worked, "lead_angle", "lead angle")?;
    let angle = args.maybe(worked, "pressure_angle", "normal pressure angle")?;
    let angle = angle.unwrap_or_else(|| {
        let (says, why) = ("normal pressure angle", "the usual basic rack");
        worked.trace.assume("alpha_n", says, degrees(20.0), why)
    });
    let mu = friction(args, worked, lead)?;
    let inputs = (("gamma", lead), ("alpha_n", angle), ("mu", mu));
    let says = "efficiency with the worm driving";
    let law = &worm::EFFICIENCY;
    let trace = &mut worked.trace;
    let efficiency = trace.attempt("eta", says, law, inputs, |(gamma, alpha, mu)| {
        worm::efficiency(gamma, alpha, mu)
    })?;
    worked.result("efficiency", efficiency, "");
    worked.result("mu", mu, "");
    rise(args, worked, efficiency)
}

/// The coefficient as given, else by the sliding speed.
fn friction(
    args: &mut Args,
    worked: &mut Worked,
    lead: Known<Angle>,
) -> Result<Known<Ratio>, Refusal> {
    let given = args.maybe(worked, "mu", "coefficient of friction")?;
    if let Some(mu) = given
        && !args.has("worm_diameter")
    {
        return Ok(mu);
    }
    let v = sliding(args, worked, lead)?;
    worked.result("v_g", v, "m/s");
    if let Some(mu) = given {
        return Ok(mu);
    }
    let says = "coefficient of friction by sliding speed";
    let trace = &mut worked.trace;
    Ok(trace.law("mu", says, &FRICTION, (("v_g", v),), |(v,)| {
        worm::friction(v)
    }))
}

fn rise(args: &mut Args, worked: &mut Worked, efficiency: Known<Ratio>) -> Result<(), Refusal> {
    if !args.has("power") {
        return Ok(());
    }
    let power = args.quantity(worked, "power", "power into the worm")?;
    let k = args.quantity(worked, "k", "heat transfer coefficient of the housing")?;
    let area = args.quantity(worked, "area", "area of the housing")?;
    let inputs = (("P", power), ("eta", efficiency), ("k", k), ("A", area));
    let says = "rise of the oil over the surroundings";
    let law = &HOUSING_RISE;
    let trace = &mut worked.trace;
    let rise = trace.attempt("dT", says, law, inputs, |(p, eta, k, a)| {
        worm::housing_rise(p, eta, k, a)
    })?;
    worked.result("rise", rise, "K");
    Ok(())
}
