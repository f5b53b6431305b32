//! Viscosity index.

use super::{GROUP, must};
use crate::quantity::{KinematicViscosity, Ratio};
use crate::relation::oil::viscosity_index::{
    INDEX, NU40, NU100, REFERENCES, WHOLE, index, nu40, nu100, references, whole,
};
use crate::trace::{Known, Recorder};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const VISCOSITY_INDEX: Relation = Relation {
    name: "viscosity-index",
    group: GROUP,
    law: &INDEX,
    with: &[
        must("nu40", "viscosity at 40 degC"),
        must("nu100", "viscosity at 100 degC"),
    ],
    gives: &[
        ("vi", "viscosity index, unrounded"),
        ("vi_rounded", "viscosity index as reported"),
        ("L", "viscosity at 40 degC of the oil of index 0, mm2/s"),
        ("H", "viscosity at 40 degC of the oil of index 100, mm2/s"),
    ],
    run: viscosity_index,
};

pub(super) const NU40_FROM_INDEX: Relation = Relation {
    name: "nu40-from-index",
    group: GROUP,
    law: &NU40,
    with: &[
        must("nu100", "viscosity at 100 degC"),
        must("vi", "viscosity index"),
    ],
    gives: &[("nu40", "viscosity at 40 degC, mm2/s")],
    run: nu40_from_index,
};

pub(super) const NU100_FROM_INDEX: Relation = Relation {
    name: "nu100-from-index",
    group: GROUP,
    law: &NU100,
    with: &[
        must("nu40", "viscosity at 40 degC"),
        must("vi", "viscosity index"),
    ],
    gives: &[("nu100", "viscosity at 100 degC, mm2/s")],
    run: nu100_from_index,
};

fn viscosity_index(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let nu40: Known<KinematicViscosity> = args.quantity(w, "nu40", "viscosity at 40 degC")?;
    let nu100: Known<KinematicViscosity> = args.quantity(w, "nu100", "viscosity at 100 degC")?;
    if nu40.value <= nu100.value {
        let words = "nu40 is not above nu100: values exchanged or mistyped";
        return Err(Refusal::new("points-upside-down", words));
    }
    let (low, high) = reference_oils(w, nu100)?;
    let with = (("U", nu40), ("Y", nu100), ("L", low), ("H", high));
    let says = "viscosity index";
    let vi = w
        .trace
        .attempt("VI", says, &INDEX, with, |(u, y, _, _)| index(u, y))?;
    let says = "viscosity index as reported";
    let rounded = w
        .trace
        .law("VI_reported", says, &WHOLE, (("VI", vi),), |(vi,)| {
            whole(vi)
        });
    w.result("vi", vi, "");
    w.result("vi_rounded", rounded, "");
    w.result("L", low, "mm2/s");
    w.result("H", high, "mm2/s");
    Ok(())
}

/// Viscosities at 40 °C of the reference oils of index 0 and 100.
fn reference_oils(
    w: &mut Worked,
    nu100: Known<KinematicViscosity>,
) -> Result<(Known<KinematicViscosity>, Known<KinematicViscosity>), Refusal> {
    let with = (("Y", nu100),);
    let trace = &mut w.trace;
    let pair = trace.attempt_all(&REFERENCES, with, |(y,)| references(y))?;
    let low = trace.take(&pair, "L", "oil of index 0 at 40 degC", |r| r.l);
    let high = trace.take(&pair, "H", "oil of index 100 at 40 degC", |r| r.h);
    Ok((low, high))
}

fn nu40_from_index(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let y: Known<KinematicViscosity> = args.quantity(w, "nu100", "viscosity at 100 degC")?;
    let vi: Known<Ratio> = args.quantity(w, "vi", "viscosity index")?;
    let says = "viscosity at 40 degC";
    let with = (("Y", y), ("VI", vi));
    let u = w
        .trace
        .attempt("U", says, &NU40, with, |(y, vi)| nu40(y, vi))?;
    w.result("nu40", u, "mm2/s");
    Ok(())
}

fn nu100_from_index(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let u: Known<KinematicViscosity> = args.quantity(w, "nu40", "viscosity at 40 degC")?;
    let vi: Known<Ratio> = args.quantity(w, "vi", "viscosity index")?;
    let says = "viscosity at 100 degC";
    let with = (("U", u), ("VI", vi));
    let y = w
        .trace
        .attempt("Y", says, &NU100, with, |(u, vi)| nu100(u, vi))?;
    w.result("nu100", y, "mm2/s");
    Ok(())
}
