//! Mixed friction and friction without load.

use super::{CLEARANCE, DIAMETER, GROUP, LOAD, SPEED, WIDTH, may, must};
use crate::quantity::convert::{number, to_rpm};
use crate::quantity::{AngularVelocity, DynamicViscosity, Force, Length, Measure, Ratio};
use crate::relation::Law;
use crate::relation::journal::transition::{LAW, VISCOSITY, speed, viscosity, volume};
use crate::relation::journal::{Geometry, NoFilm, petroff};
use crate::trace::{Known, Recorder};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const JOURNAL_TRANSITION: Relation = Relation {
    name: "journal-transition",
    group: GROUP,
    law: &LAW,
    with: &[
        LOAD,
        must("eta", "dynamic viscosity at running temperature"),
        DIAMETER,
        WIDTH,
        may("constant", "C, 1 to 6", "1"),
        may("running_speed", "speed to compare with", "none"),
        may("factor", "running speed over transition speed wanted", "3"),
    ],
    gives: &[
        ("speed", "transition speed, r/min"),
        (
            "factor",
            "running speed over it, where running_speed is given",
        ),
        (
            "eta",
            "viscosity for the factor wanted, mPa.s, where running_speed is given",
        ),
    ],
    run: journal_transition,
};

pub(super) const JOURNAL_PETROFF: Relation = Relation {
    name: "journal-petroff",
    group: GROUP,
    law: &petroff::LAW,
    with: &[
        DIAMETER,
        WIDTH,
        CLEARANCE,
        SPEED,
        must("eta", "dynamic viscosity"),
    ],
    gives: &[
        ("torque", "friction torque, N.m"),
        ("power", "friction power, W"),
    ],
    run: journal_petroff,
};

/// How far a speed is from the transition, for the record.
static FACTOR: Law = Law {
    name: "journal-transition-factor",
    title: "running speed over the speed at which mixed friction begins",
    formula: "x = n/n_tr",
    range: "2 to 3 or more keep a bearing clear of mixed friction",
    source: "common practice",
};

/// Factor wanted where none is given: the upper of 2 to 3.
const WANTED: f64 = 3.0;

fn journal_transition(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let load: Known<Force> = args.quantity(w, "load", LOAD.says)?;
    let eta: Known<DynamicViscosity> = args.quantity(w, "eta", "dynamic viscosity")?;
    let diameter: Known<Length> = args.quantity(w, "diameter", DIAMETER.says)?;
    let width: Known<Length> = args.quantity(w, "width", WIDTH.says)?;
    let constant: Option<Known<Ratio>> = args.maybe(w, "constant", "constant of transition")?;
    let constant = constant.unwrap_or_else(|| {
        let why = "the cautious end of 1 to 6, for a bearing not run in";
        w.trace
            .assume("C", "constant of transition", number(1.0), why)
    });
    for (size, what) in [(diameter, "the diameter"), (width, "the width")] {
        if size.value.base() <= 0.0 {
            return Err(NoFilm::NotPositive { what }.into());
        }
    }
    let with = (
        ("F", load),
        ("eta", eta),
        ("D", diameter),
        ("B", width),
        ("C", constant),
    );
    let n_tr = w.trace.attempt(
        "n_tr",
        "transition speed",
        &LAW,
        with,
        |(f, eta, d, b, c)| speed(f, eta, volume(d, b), c),
    )?;
    w.result("speed", n_tr, "r/min");
    compared(args, w, n_tr, |w, running, factor| {
        let with = (
            ("F", load),
            ("n", running),
            ("D", diameter),
            ("B", width),
            ("C", constant),
            ("x_0", factor),
        );
        let says = "viscosity for the factor wanted";
        w.trace
            .attempt("eta_0", says, &VISCOSITY, with, |(f, n, d, b, c, x)| {
                viscosity(f, n, volume(d, b), c, x)
            })
    })
}

type Needed = Result<Known<DynamicViscosity>, NoFilm>;

/// How far a running speed is from the transition, and the viscosity for the factor wanted.
fn compared(
    args: &mut Args,
    w: &mut Worked,
    n_tr: Known<AngularVelocity>,
    needed: impl FnOnce(&mut Worked, Known<AngularVelocity>, Known<Ratio>) -> Needed,
) -> Result<(), Refusal> {
    let running: Option<Known<AngularVelocity>> =
        args.maybe(w, "running_speed", "speed the shaft turns at")?;
    let factor: Option<Known<Ratio>> = args.maybe(w, "factor", "factor wanted")?;
    let Some(running) = running else {
        return match factor {
            Some(_) => Err(Refusal::new(
                "input-missing",
                "factor needs running_speed; write running_speed=\"300 r/min\"",
            )),
            None => Ok(()),
        };
    };
    let factor = factor.unwrap_or_else(|| {
        let why = "the upper of 2 to 3, common practice";
        w.trace.assume("x_0", "factor wanted", number(WANTED), why)
    });
    let with = (("n", running), ("n_tr", n_tr));
    let says = "running speed over transition speed";
    let reached = w.trace.law("x", says, &FACTOR, with, |(n, n_tr)| {
        number(to_rpm(n) / to_rpm(n_tr))
    });
    let needed = needed(w, running, factor)?;
    w.result("factor", reached, "");
    w.result("eta", needed, "mPa.s");
    if reached.value.base() < factor.value.base() {
        w.remark("the running speed is nearer to mixed friction than the factor wanted");
    }
    Ok(())
}

fn journal_petroff(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let diameter: Known<Length> = args.quantity(w, "diameter", DIAMETER.says)?;
    let width: Known<Length> = args.quantity(w, "width", WIDTH.says)?;
    let clearance: Known<Length> = args.quantity(w, "clearance", "radial clearance")?;
    let speed: Known<AngularVelocity> = args.quantity(w, "speed", SPEED.says)?;
    let eta: Known<DynamicViscosity> = args.quantity(w, "eta", "dynamic viscosity")?;
    let geometry = Geometry::new(diameter.value, width.value, clearance.value)?;
    let with = (
        ("D", diameter),
        ("B", width),
        ("c", clearance),
        ("omega", speed),
        ("eta", eta),
    );
    let law = &petroff::LAW;
    let torque = w
        .trace
        .law("T", "friction torque", law, with, |(_, _, _, n, eta)| {
            petroff::torque(&geometry, n, eta)
        });
    let power = w
        .trace
        .law("P_f", "friction power", law, with, |(_, _, _, n, eta)| {
            petroff::power(&geometry, n, eta)
        });
    w.result("torque", torque, "N.m");
    w.result("power", power, "W");
    Ok(())
}
