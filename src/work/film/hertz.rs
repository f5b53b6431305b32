//! `hertz-line` and `hertz-ellipse`.

use super::GROUP;
use crate::relation::film::body::{self, Radii};
use crate::relation::film::hertz;
use crate::trace::Recorder;
use crate::work::contact::{form, may, modulus, must, radii, radius};
use crate::work::{Args, Input, Refusal, Relation, Worked};

pub(super) const MODULUS: Input = may(
    "E_reduced",
    "reduced modulus E' = 2 / sum((1 - nu^2) / E); or E1, poisson1, E2, poisson2 of the bodies",
    "steel on steel, 226.4 GPa",
);
pub(super) const E1: Input = form("E1", "Young's modulus of the first body", "materials");
pub(super) const POISSON1: Input = form("poisson1", "its Poisson's ratio", "materials");
pub(super) const E2: Input = form(
    "E2",
    "Young's modulus of the second body; as the first where not given",
    "materials",
);
pub(super) const POISSON2: Input = form("poisson2", "its Poisson's ratio", "materials");
pub(super) const RADIUS: Input = form("radius", "reduced radius, 12 mm", "reduced");
pub(super) const R1X: Input = form(
    "r1x",
    "radius of the first body; concave radii are negative",
    "bodies",
);
pub(super) const R2X: Input = form(
    "r2x",
    "radius of the second body; flat where not given",
    "bodies",
);
pub(super) const RX: Input = form("rx", "reduced radius in the rolling direction", "reduced");
pub(super) const RY: Input = form("ry", "reduced radius across it", "reduced");
pub(super) const R1Y: Input = form("r1y", "radius of the first body, other plane", "bodies");
pub(super) const R2Y: Input = form("r2y", "radius of the second body, other plane", "bodies");
pub(super) const ANGLE: Input = form(
    "angle",
    "angle between the first planes of the two bodies",
    "bodies",
);

pub(super) const REDUCED_MODULUS: Relation = Relation {
    name: "reduced-modulus",
    group: GROUP,
    law: &body::REDUCED_MODULUS,
    with: &[
        must("E1", "Young's modulus of the first body, 206 GPa"),
        may("poisson1", "its Poisson's ratio", "0.3"),
        may("E2", "Young's modulus of the second body", "as the first"),
        may("poisson2", "its Poisson's ratio", "as the first"),
    ],
    gives: &[("E_reduced", "reduced modulus E', GPa")],
    run: reduced_modulus,
};

fn reduced_modulus(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    args.text("E1", "\"206 GPa\"")?;
    let e = modulus(args, worked)?;
    worked.result("E_reduced", e, "GPa");
    Ok(())
}

pub(super) const LINE: Relation = Relation {
    name: "hertz-line",
    group: GROUP,
    law: &hertz::LINE,
    with: &[
        must("load", "load per length, 200 N/mm"),
        RADIUS,
        R1X,
        R2X,
        MODULUS,
        E1,
        POISSON1,
        E2,
        POISSON2,
    ],
    gives: &[
        ("b", "half-width of the contact, um"),
        ("p_max", "largest pressure, MPa"),
        ("p_mean", "mean pressure, MPa"),
    ],
    run: line,
};

fn line(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let load = args.quantity(worked, "load", "load per length")?;
    let r = radius(args, worked)?;
    let e = modulus(args, worked)?;
    let inputs = (("w", load), ("R", r), ("E'", e));
    let contact = worked
        .trace
        .attempt_all(&hertz::LINE, inputs, |(w, r, e)| hertz::line(w, r, e))?;
    let trace = &mut worked.trace;
    let b = trace.take(&contact, "b", "half-width of the contact", |c| c.half_width);
    let p_max = trace.take(&contact, "p_max", "largest pressure", |c| c.max_pressure);
    let p_mean = trace.take(&contact, "p_mean", "mean pressure", |c| c.mean_pressure);
    worked.result("b", b, "um");
    worked.result("p_max", p_max, "MPa");
    worked.result("p_mean", p_mean, "MPa");
    Ok(())
}

pub(super) const ELLIPSE: Relation = Relation {
    name: "hertz-ellipse",
    group: GROUP,
    law: &hertz::ELLIPSE,
    with: &[
        must("load", "load, 500 N"),
        RX,
        RY,
        R1X,
        R2X,
        R1Y,
        R2Y,
        ANGLE,
        MODULUS,
        E1,
        POISSON1,
        E2,
        POISSON2,
    ],
    gives: &[
        ("a_long", "larger semi-axis, um"),
        ("a_short", "smaller semi-axis, um"),
        ("p_max", "largest pressure, MPa"),
        ("k", "semi-axis across rolling over that along it"),
        ("delta", "approach of the bodies, um"),
    ],
    run: ellipse,
};

fn ellipse(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let load = args.quantity(worked, "load", "load")?;
    let (rx, ry) = radii(args, worked)?;
    let e = modulus(args, worked)?;
    let inputs = (("F", load), ("Rx", rx), ("Ry", ry), ("E'", e));
    let law = &hertz::ELLIPSE;
    let contact = worked.trace.attempt_all(law, inputs, |(f, x, y, e)| {
        hertz::ellipse(f, Radii { x, y }, e)
    })?;
    let trace = &mut worked.trace;
    let long = trace.take(&contact, "a_long", "larger semi-axis", |c| c.a_long);
    let short = trace.take(&contact, "a_short", "smaller semi-axis", |c| c.a_short);
    let p_max = trace.take(&contact, "p_max", "largest pressure", |c| c.max_pressure);
    let says = "semi-axis across rolling over that along it";
    let k = trace.take(&contact, "k", says, |c| c.k);
    let delta = trace.take(&contact, "delta", "approach of the bodies", |c| c.approach);
    worked.result("a_long", long, "um");
    worked.result("a_short", short, "um");
    worked.result("p_max", p_max, "MPa");
    worked.result("k", k, "");
    worked.result("delta", delta, "um");
    Ok(())
}
