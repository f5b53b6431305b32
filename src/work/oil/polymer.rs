//! Polymer and shear.

use super::curve::{on_line, one_line};
use super::{GROUP, by_definition, may, must, share};
use crate::quantity::convert::number;
use crate::quantity::{KinematicViscosity, Measure, Ratio, ShearRate, ThermodynamicTemperature};
use crate::relation::oil::polymer::{self, FINISHED, Level, SHARE, SHEARED, SPLIT, Thickening};
use crate::relation::oil::shear::{self, LOSS, PSSI};
use crate::relation::oil::temporary_shear::{self, CROSS, Cross, RATIO};
use crate::relation::oil::viscosity_temperature::Weights;
use crate::trace::{Known, Recorder};
use crate::work::args::Point;
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const SHEAR_LOSS: Relation = Relation {
    name: "shear-loss",
    group: GROUP,
    law: &LOSS,
    with: &[
        must("nu100_new", "viscosity at 100 degC, new"),
        must("nu100_sheared", "the same after the shear test"),
        must("nu100_base", "the same without the polymer"),
    ],
    gives: &[
        ("pssi", "permanent shear stability index, %"),
        ("loss", "permanent viscosity loss, %"),
    ],
    run: shear_loss,
};

pub(super) const SHEAR_FROM_PSSI: Relation = Relation {
    name: "shear-from-pssi",
    group: GROUP,
    law: &shear::SHEARED,
    with: &[
        must("nu100_new", "viscosity at 100 degC, new"),
        must("nu100_base", "the same without the polymer"),
        must("pssi", "stability index of the test meant, 25 %"),
    ],
    gives: &[
        ("nu100_sheared", "viscosity at 100 degC after shear, mm2/s"),
        ("loss", "permanent viscosity loss, %"),
    ],
    run: shear_from_pssi,
};

pub(super) const POLYMER_CURVE: Relation = Relation {
    name: "polymer-curve",
    group: GROUP,
    law: &FINISHED,
    with: &[
        must("base_nu40", "base oil at 40 degC"),
        must("base_nu100", "base oil at 100 degC"),
        must(
            "p_cold",
            "share by which the polymer thickens below its window",
        ),
        must("p_hot", "the same above its window"),
        must("t_cold", "cold end of the window"),
        must("t_hot", "warm end of the window"),
        must("pssi", "stability index of the test meant, 25 %"),
        must("at", "temperature wanted"),
    ],
    gives: &[
        ("base", "base oil, mm2/s"),
        ("finished", "new oil, mm2/s"),
        ("sheared", "after permanent shear, mm2/s"),
        ("p", "share of the polymer there"),
    ],
    run: polymer_curve,
};

pub(super) const POLYMER_SPLIT: Relation = Relation {
    name: "polymer-split",
    group: GROUP,
    law: &SPLIT,
    with: &[
        must("nu40", "finished oil at 40 degC"),
        must("nu100", "finished oil at 100 degC"),
        must("base_vi", "viscosity index assumed for the base"),
        may("ratio", "share at 40 degC over share at 100 degC", "1"),
    ],
    gives: &[
        ("base_nu40", "base oil at 40 degC, mm2/s"),
        ("base_nu100", "base oil at 100 degC, mm2/s"),
        ("p40", "share of the polymer at 40 degC"),
        ("p100", "share of the polymer at 100 degC"),
    ],
    run: polymer_split,
};

pub(super) const TEMPORARY_SHEAR: Relation = Relation {
    name: "temporary-shear",
    group: GROUP,
    law: &CROSS,
    with: &[
        must("p", "share by which the polymer thickens at rest"),
        must("plateau", "share of that which is never lost, 0.4"),
        must("rate", "shear rate, \"1e6 1/s\""),
        must(
            "critical_rate",
            "rate at which half of what can be lost is lost",
        ),
        must("exponent", "0.6 to 1"),
    ],
    gives: &[
        ("p", "share by which the polymer thickens under shear"),
        ("ratio", "viscosity over that at rest"),
    ],
    run: temporary_shear,
};

fn shear_loss(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let new: Known<KinematicViscosity> = args.quantity(w, "nu100_new", "new oil")?;
    let sheared: Known<KinematicViscosity> = args.quantity(w, "nu100_sheared", "sheared oil")?;
    let base: Known<KinematicViscosity> = args.quantity(w, "nu100_base", "base oil")?;
    let with = (("nu_new", new), ("nu_sheared", sheared), ("nu_base", base));
    let says = "permanent shear stability index";
    let pssi = w
        .trace
        .attempt("PSSI", says, &PSSI, with, |(new, sheared, base)| {
            shear::stability_index(new, sheared, base)
        })?;
    let with = (("nu_new", new), ("nu_sheared", sheared));
    let says = "permanent viscosity loss";
    let loss = w
        .trace
        .attempt("PVL", says, &LOSS, with, |(new, sheared)| {
            shear::loss(new, sheared)
        })?;
    w.remark("a stability index belongs to one polymer and one test");
    w.result("pssi", pssi, "%");
    w.result("loss", loss, "%");
    Ok(())
}

fn shear_from_pssi(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let new: Known<KinematicViscosity> = args.quantity(w, "nu100_new", "new oil")?;
    let base: Known<KinematicViscosity> = args.quantity(w, "nu100_base", "base oil")?;
    let pssi = share(args, w, "pssi", "stability index")?;
    let with = (("nu_new", new), ("nu_base", base), ("PSSI", pssi));
    let says = "viscosity after shear";
    let law = &shear::SHEARED;
    let sheared = w
        .trace
        .attempt("nu_sheared", says, law, with, |(new, base, pssi)| {
            shear::sheared(new, base, pssi)
        })?;
    let with = (("nu_new", new), ("nu_sheared", sheared));
    let says = "permanent viscosity loss";
    let loss = w
        .trace
        .attempt("PVL", says, &LOSS, with, |(new, sheared)| {
            shear::loss(new, sheared)
        })?;
    w.result("nu100_sheared", sheared, "mm2/s");
    w.result("loss", loss, "%");
    Ok(())
}

fn polymer_curve(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let nu40 = args.quantity(w, "base_nu40", "base oil at 40 degC")?;
    let nu100 = args.quantity(w, "base_nu100", "base oil at 100 degC")?;
    let at: Known<ThermodynamicTemperature> = args.quantity(w, "at", "temperature wanted")?;
    let base = base_at(w, nu40, nu100, at)?;
    let p = polymer_share(args, w, at)?;
    let with = (("nu_base", base), ("P", p));
    let says = "viscosity of the new oil";
    let finished = w.trace.law("nu", says, &FINISHED, with, |(base, p)| {
        polymer::finished(base, p)
    });
    let pssi = share(args, w, "pssi", "stability index")?;
    let with = (("nu_base", base), ("P", p), ("PSSI", pssi));
    let says = "viscosity after permanent shear";
    let sheared = w
        .trace
        .attempt("nu_s", says, &SHEARED, with, |(base, p, pssi)| {
            polymer::after_shear(base, p, pssi)
        })?;
    w.result("base", base, "mm2/s");
    w.result("finished", finished, "mm2/s");
    w.result("sheared", sheared, "mm2/s");
    w.result("p", p, "");
    Ok(())
}

/// Base oil at a temperature, on its line through 40 and 100 °C.
fn base_at(
    w: &mut Worked,
    nu40: Known<KinematicViscosity>,
    nu100: Known<KinematicViscosity>,
    at: Known<ThermodynamicTemperature>,
) -> Result<Known<KinematicViscosity>, Refusal> {
    let (t40, t100) = (by_definition(w, 40.0), by_definition(w, 100.0));
    let points = [
        Point { at: t40, nu: nu40 },
        Point {
            at: t100,
            nu: nu100,
        },
    ];
    let line = one_line(w, &points, Weights::PerCent)?;
    on_line(w, &line, at)
}

fn polymer_share(
    args: &mut Args,
    w: &mut Worked,
    at: Known<ThermodynamicTemperature>,
) -> Result<Known<Ratio>, Refusal> {
    let p_cold: Known<Ratio> = args.quantity(w, "p_cold", "share below the window")?;
    let p_hot: Known<Ratio> = args.quantity(w, "p_hot", "share above the window")?;
    let t_cold = args.quantity(w, "t_cold", "cold end of the window")?;
    let t_hot = args.quantity(w, "t_hot", "warm end of the window")?;
    let with = (
        ("Pc", p_cold),
        ("Ph", p_hot),
        ("tc", t_cold),
        ("th", t_hot),
        ("t", at),
    );
    let says = "share by which the polymer thickens";
    let p = w.trace.attempt(
        "P",
        says,
        &SHARE,
        with,
        |(p_cold, p_hot, t_cold, t_hot, at)| {
            let cold = Level {
                p: p_cold,
                at: t_cold,
            };
            let hot = Level {
                p: p_hot,
                at: t_hot,
            };
            Thickening::between(cold, hot).map(|t| t.share_at(at))
        },
    )?;
    Ok(p)
}

fn polymer_split(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let nu40: Known<KinematicViscosity> = args.quantity(w, "nu40", "finished oil at 40 degC")?;
    let nu100: Known<KinematicViscosity> = args.quantity(w, "nu100", "finished oil at 100 degC")?;
    let base_vi: Known<Ratio> = args.quantity(w, "base_vi", "index assumed for the base")?;
    let ratio = match args.maybe(w, "ratio", "share at 40 degC over share at 100 degC")? {
        Some(ratio) => ratio,
        None => w.trace.assume(
            "R",
            "share at 40 degC over share at 100 degC",
            number(1.0),
            "a polymer whose coils do not open",
        ),
    };
    let with = (
        ("nu40", nu40),
        ("nu100", nu100),
        ("VI_base", base_vi),
        ("R", ratio),
    );
    let assumed = |(nu40, nu100, base_vi, ratio)| polymer::split(nu40, nu100, base_vi, ratio);
    let split = w.trace.attempt_all(&SPLIT, with, assumed)?;
    let trace = &mut w.trace;
    let base_nu40 = trace.take(&split, "nu40_base", "base oil at 40 degC", |s| s.base_nu40);
    let base_nu100 = trace.take(&split, "nu100_base", "base oil at 100 degC", |s| {
        s.base_nu100
    });
    let p40 = trace.take(&split, "P40", "share of the polymer at 40 degC", |s| s.p40);
    let p100 = trace.take(&split, "P100", "share of the polymer at 100 degC", |s| {
        s.p100
    });
    w.remark("an estimate: the index assumed for the base and the ratio move P by a third");
    w.result("base_nu40", base_nu40, "mm2/s");
    w.result("base_nu100", base_nu100, "mm2/s");
    w.result("p40", p40, "");
    w.result("p100", p100, "");
    Ok(())
}

fn temporary_shear(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let p: Known<Ratio> = args.quantity(w, "p", "share at rest")?;
    let plateau = share(args, w, "plateau", "share never lost")?;
    let rate: Known<ShearRate> = args.quantity(w, "rate", "shear rate")?;
    let critical: Known<ShearRate> = args.quantity(w, "critical_rate", "critical rate")?;
    let exponent: Known<Ratio> = args.quantity(w, "exponent", "exponent")?;
    if p.value.base() < 0.0 {
        let words = "p: a polymer cannot thin its base oil; it is 0 or more";
        return Err(Refusal::new("share-out-of-range", words));
    }
    let with = (
        ("P0", p),
        ("f", plateau),
        ("g", rate),
        ("g_c", critical),
        ("m", exponent),
    );
    let says = "share under shear";
    let left = w.trace.attempt(
        "P",
        says,
        &CROSS,
        with,
        |(p, plateau, rate, critical, m)| {
            Cross::new(plateau, critical, m).map(|cross| cross.share(p, rate))
        },
    )?;
    let says = "viscosity over that at rest";
    let with = (("P", left), ("P0", p));
    let ratio = w.trace.law("ratio", says, &RATIO, with, |(left, p)| {
        temporary_shear::viscosity_ratio(left, p)
    });
    w.result("p", left, "");
    w.result("ratio", ratio, "");
    Ok(())
}
