//! `gear-grade-rule`.

use super::GROUP;
use crate::relation::gear::viscosity_rule::{self, AT_40, FLOOR, RUNNING};
use crate::trace::Recorder;
use crate::work::contact::must;
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const GRADE_RULE: Relation = Relation {
    name: "gear-grade-rule",
    group: GROUP,
    law: &AT_40,
    with: &[must("v_t", "pitch-line speed of the slowest mesh, 4.5 m/s")],
    gives: &[
        ("nu40", "viscosity at 40 degC, mm2/s"),
        ("nu_running", "the rule at running temperature, mm2/s"),
        ("nu_least", "least viscosity at running temperature, mm2/s"),
    ],
    run,
};

fn run(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let v = args.quantity(worked, "v_t", "pitch-line speed of the slowest mesh")?;
    let trace = &mut worked.trace;
    let says = "viscosity at 40 degC";
    let nu40 = trace.attempt("nu40", says, &AT_40, (("V", v),), |(v,)| {
        viscosity_rule::at_40(v)
    })?;
    let says = "viscosity at running temperature";
    let running = trace.attempt("nu", says, &RUNNING, (("v", v),), |(v,)| {
        viscosity_rule::running(v)
    })?;
    let says = "least viscosity at running temperature";
    let least = trace.law("nu_min", says, &FLOOR, (("nu", running),), |(nu,)| {
        viscosity_rule::floor(nu)
    });
    worked.result("nu40", nu40, "mm2/s");
    worked.result("nu_running", running, "mm2/s");
    worked.result("nu_least", least, "mm2/s");
    if viscosity_rule::beyond_range(v.value) {
        worked.remark("the rule is meant for 0.5 to 50 m/s");
    }
    Ok(())
}
