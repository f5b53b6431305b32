//! `bearing-friction`.

use super::GROUP;
use super::size::{BORE, DESIGNATION, OUTSIDE, PITCH, pitch};
use crate::relation::bearing::friction::{self, LOAD, POWER, VISCOUS};
use crate::trace::Recorder;
use crate::work::contact::must;
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const FRICTION: Relation = Relation {
    name: "bearing-friction",
    group: GROUP,
    law: &VISCOUS,
    with: &[
        must(
            "f0",
            "factor of kind and lubrication, 2 for a deep groove ball bearing in a bath",
        ),
        must("f1", "factor of kind and load, 0.0005"),
        must("nu", "viscosity at running temperature, 20 mm2/s"),
        must("speed", "speed, 2950 r/min"),
        PITCH,
        BORE,
        OUTSIDE,
        DESIGNATION,
        must("load", "load that counts for friction, 3 kN"),
    ],
    gives: &[
        ("m0", "load-free torque, N.m"),
        ("m1", "torque of the load, N.m"),
        ("power", "power lost, W"),
    ],
    run,
};

fn run(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let f0 = args.quantity(worked, "f0", "factor of kind and lubrication")?;
    let f1 = args.quantity(worked, "f1", "factor of kind and load")?;
    let nu = args.quantity(worked, "nu", "viscosity at running temperature")?;
    let n = args.quantity(worked, "speed", "speed")?;
    let dm = pitch(args, worked)?;
    let load = args.quantity(worked, "load", "load that counts for friction")?;
    let trace = &mut worked.trace;
    let inputs = (("f0", f0), ("nu", nu), ("n", n), ("dm", dm));
    let says = "load-free torque";
    let m0 = trace.attempt("M0", says, &VISCOUS, inputs, |(f0, nu, n, dm)| {
        friction::viscous(f0, nu, n, dm)
    })?;
    let inputs = (("f1", f1), ("P1", load), ("dm", dm));
    let says = "torque of the load";
    let m1 = trace.attempt("M1", says, &LOAD, inputs, |(f1, p, dm)| {
        friction::load(f1, p, dm)
    })?;
    let inputs = (("M0", m0), ("M1", m1), ("omega", n));
    let power = trace.law("P", "power lost", &POWER, inputs, |(m0, m1, n)| {
        friction::power(m0, m1, n)
    });
    worked.result("m0", m0, "N.m");
    worked.result("m1", m1, "N.m");
    worked.result("power", power, "W");
    Ok(())
}
