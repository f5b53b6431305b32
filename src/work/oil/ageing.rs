//! An oil in use: tolerance of its line, loss by shear over time, life, shear rate of a contact.

use super::{GROUP, may, must, share};
use crate::quantity::convert::{celsius, kelvins, number};
use crate::quantity::{
    KinematicViscosity, Length, Measure, Ratio, ShearRate, ThermodynamicTemperature, Time, Velocity,
};
use crate::relation::oil::life::{ARRHENIUS, Halving, RULE_OF_TEN, arrhenius};
use crate::relation::oil::piecewise::{Curve, PIECEWISE};
use crate::relation::oil::shear_in_use::{LEVELLING, STRAIGHT, Sample, reached};
use crate::relation::oil::temporary_shear::{CONTACT_RATE, contact_rate};
use crate::relation::oil::uncertainty::{CARRIED, REPRODUCIBILITY, factor, of_one_result};
use crate::relation::oil::viscosity_temperature::{Point, VISCOSITY, ViscosityCurve};
use crate::trace::{Both, Known, Recorder};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const LINE_TOLERANCE: Relation = Relation {
    name: "line-tolerance",
    group: GROUP,
    law: &CARRIED,
    with: &[
        must("points", "two viscosities or more with their temperatures"),
        must("at", "temperature wanted"),
        may(
            "tolerance",
            "share each point may be off, \"1 %\"",
            "the reproducibility of ASTM D445 for one result",
        ),
    ],
    gives: &[
        ("nu", "kinematic viscosity, mm2/s"),
        ("factor", "factor it may be off, up and down"),
        ("low", "thin limit, mm2/s"),
        ("high", "thick limit, mm2/s"),
    ],
    run: line_tolerance,
};

pub(super) const SHEAR_IN_USE: Relation = Relation {
    name: "shear-in-use",
    group: GROUP,
    law: &LEVELLING,
    with: &[
        must(
            "after1",
            "time since the fill of the first sample, \"200 h\"",
        ),
        must("loss1", "share of the viscosity lost then, \"8 %\""),
        must("after2", "the same of the second sample"),
        must("loss2", "the same of the second sample"),
        must("limit", "loss at which a floor is reached"),
    ],
    gives: &[
        ("straight", "time to the limit along the straight line, h"),
        (
            "levelling",
            "the same along the curve that levels off, h; none where it never gets there",
        ),
        (
            "ends_at",
            "loss the levelling curve ends at, %; none where the loss does not slow",
        ),
    ],
    run: shear_in_use,
};

pub(super) const OIL_LIFE: Relation = Relation {
    name: "oil-life",
    group: GROUP,
    law: &ARRHENIUS,
    with: &[
        must(
            "k1",
            "constant of the type of oil: -10.64 without inhibitors, -9.31 EP gear, -8.76 \
             hydraulic, -8.45 turbine, -8.05 severely hydrocracked",
        ),
        must("at", "bulk temperature of the oil"),
        may("times", "life of the base against mineral oil", "1"),
    ],
    gives: &[
        ("life", "oxidation life of clean and dry oil, h"),
        ("rule_of_ten", "the same by the rule of ten from 60 degC, h"),
    ],
    run: oil_life,
};

pub(super) const CONTACT_SHEAR_RATE: Relation = Relation {
    name: "contact-shear-rate",
    group: GROUP,
    law: &CONTACT_RATE,
    with: &[
        must("speed", "mean speed of the surfaces"),
        must("film", "film height"),
    ],
    gives: &[("rate", "shear rate at the inlet, 1/s")],
    run: contact_shear_rate,
};

fn line_tolerance(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let points = args.points(w, "points")?;
    let at: Known<ThermodynamicTemperature> = args.quantity(w, "at", "temperature wanted")?;
    let says = "share each point may be off";
    let stated = if args.has("tolerance") {
        Some(share(args, w, "tolerance", says)?)
    } else {
        None
    };
    let plain: Vec<Point> = points
        .iter()
        .map(|p| Point::new(p.at.value, p.nu.value))
        .collect();
    let (curve, _) = Curve::through(&plain)?;
    let mut off = Vec::new();
    for p in &points {
        off.push(match stated {
            Some(known) => ("u", known),
            None => {
                let says = "reproducibility, one result";
                let with = (("t", p.at),);
                (
                    "u",
                    w.trace
                        .law("R", says, &REPRODUCIBILITY, with, |(t,)| of_one_result(t)),
                )
            }
        });
    }
    let nus: Vec<_> = points.iter().map(|p| ("nu", p.nu)).collect();
    let mut ts: Vec<_> = points.iter().map(|p| ("t", p.at)).collect();
    ts.push(("t_wanted", at));
    let law = match curve {
        Curve::Line(_) => &VISCOSITY,
        Curve::Pieces(_) => &PIECEWISE,
    };
    let all = Both(nus, ts);
    let nu = w.trace.law("nu", "viscosity of the line", law, all, |_| {
        curve.nu_at(at.value)
    });
    let with = Both(off, (("t", at),));
    let carried = w.trace.attempt(
        "f",
        "factor it may be off",
        &CARRIED,
        with,
        |(off, (at,)): (Vec<Ratio>, (ThermodynamicTemperature,))| {
            let points: Vec<(Point, Ratio)> = plain.iter().copied().zip(off).collect();
            factor(&curve, &points, at)
        },
    )?;
    for (name, symbol, says, up) in [
        ("low", "nu_low", "thin limit", false),
        ("high", "nu_high", "thick limit", true),
    ] {
        let with = Both((("nu", nu),), (("f", carried),));
        let end = w.trace.law(
            symbol,
            says,
            &CARRIED,
            with,
            |((nu,), (f,)): ((KinematicViscosity,), (Ratio,))| {
                let by = if up { f.base() } else { 1.0 / f.base() };
                KinematicViscosity::from_base(nu.base() * by)
            },
        );
        w.result(name, end, "mm2/s");
    }
    w.result("nu", nu, "mm2/s");
    w.result("factor", carried, "");
    Ok(())
}

fn shear_in_use(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let after1: Known<Time> = args.quantity(w, "after1", "time of the first sample")?;
    let loss1 = share(args, w, "loss1", "loss of the first sample")?;
    let after2: Known<Time> = args.quantity(w, "after2", "time of the second sample")?;
    let loss2 = share(args, w, "loss2", "loss of the second sample")?;
    let limit = share(args, w, "limit", "loss at which a floor is reached")?;
    let with = Both(
        vec![("t_1", after1), ("t_2", after2)],
        vec![("L_1", loss1), ("L_2", loss2), ("L", limit)],
    );
    let found = w
        .trace
        .attempt_all(&LEVELLING, with, |(t, l): (Vec<Time>, Vec<Ratio>)| {
            let sample = |after, loss| Sample { after, loss };
            reached(sample(t[0], l[0]), sample(t[1], l[1]), l[2])
        })?;
    let value = found.value;
    let says = "time to the limit, carried on straight";
    let with = Both(
        vec![("t_1", after1), ("t_2", after2)],
        vec![("L_1", loss1), ("L_2", loss2)],
    );
    let straight = w.trace.law("t", says, &STRAIGHT, with, |_| value.straight);
    w.result("straight", straight, "h");
    match value.levelling {
        Some(time) => {
            let says = "time to the limit, levelling off";
            let levelling = w.trace.take(&found, "t", says, |_| time);
            w.result("levelling", levelling, "h");
        }
        None => w.text("levelling", None),
    }
    match value.ends_at {
        Some(end) => {
            let ends = w
                .trace
                .take(&found, "L_end", "loss the curve ends at", |_| end);
            w.result("ends_at", ends, "%");
        }
        None => w.text("ends_at", None),
    }
    if value.levelling.is_none() {
        w.remark("the levelling curve does not reach the limit, or the loss does not slow yet");
    }
    w.remark("the truth is expected between the two");
    Ok(())
}

fn oil_life(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let k1: Known<Ratio> = args.quantity(w, "k1", "constant of the type of oil")?;
    let at: Known<ThermodynamicTemperature> = args.quantity(w, "at", "bulk temperature")?;
    let times = match args.maybe(w, "times", "life of the base against mineral oil")? {
        Some(times) => times,
        None => w.trace.assume(
            "m",
            "life of the base against mineral oil",
            number(1.0),
            "mineral oil",
        ),
    };
    if times.value.base().is_nan() || times.value.base() <= 0.0 {
        let words = "times: the life of a base against mineral oil is above 0";
        return Err(Refusal::new("share-out-of-range", words));
    }
    let says = "oxidation life, clean and dry";
    let with = Both((("k1", k1), ("m", times)), (("T", at),));
    let life = w.trace.law(
        "L",
        says,
        &ARRHENIUS,
        with,
        |((k1, m), (t,)): ((Ratio, Ratio), (ThermodynamicTemperature,))| arrhenius(k1, m, t),
    );
    let rule = Halving {
        above: celsius(60.0),
        factor: number(2.0),
        step: kelvins(10.0),
    };
    let with = Both((("k1", k1), ("m", times)), (("t", at),));
    let says = "the same by the rule of ten from 60 degC";
    let ten = w.trace.law(
        "L",
        says,
        &RULE_OF_TEN,
        with,
        |((k1, m), (t,)): ((Ratio, Ratio), (ThermodynamicTemperature,))| {
            rule.life(arrhenius(k1, m, rule.above), t)
        },
    );
    w.remark("guidance for clean and dry oil, never a promise: water, dirt and lost additives end it earlier");
    w.result("life", life, "h");
    w.result("rule_of_ten", ten, "h");
    Ok(())
}

fn contact_shear_rate(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let speed: Known<Velocity> = args.quantity(w, "speed", "mean speed of the surfaces")?;
    let film: Known<Length> = args.quantity(w, "film", "film height")?;
    if film.value.base() <= 0.0 || speed.value.base() < 0.0 {
        let words = "film: a film is above 0, and a mean speed is not below it";
        return Err(Refusal::new("not-positive", words));
    }
    let with = (("u", speed), ("h", film));
    let says = "shear rate at the inlet of the contact";
    let rate: Known<ShearRate> = w
        .trace
        .law("g", says, &CONTACT_RATE, with, |(u, h)| contact_rate(u, h));
    w.result("rate", rate, "1/s");
    Ok(())
}
