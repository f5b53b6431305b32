//! Readings of efflux viscometers.

use super::{GROUP, may, must};
use crate::quantity::parse::parse;
use crate::quantity::{Efflux, Kind, KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::relation::oil::efflux::{self, Instrument};
use crate::relation::oil::saybolt;
use crate::source::Origin;
use crate::source::place::Given;
use crate::trace::{Known, Recorder};
use crate::work::{Args, Refusal, Relation, Worked};

const NU: &str = "kinematic viscosity at that temperature";
const OLD: &str = "the formulas of this instrument differ by 2 to 5 %: take the result as ± 4 %";

pub(super) const SAYBOLT: Relation = Relation {
    name: "saybolt",
    group: GROUP,
    law: &saybolt::UNIVERSAL,
    with: &[must("nu", NU), must("at", "temperature")],
    gives: &[("sus", "Saybolt Universal seconds, SUS")],
    run: to_universal,
};

pub(super) const SAYBOLT_TO_NU: Relation = Relation {
    name: "saybolt-to-nu",
    group: GROUP,
    law: &saybolt::FROM_UNIVERSAL,
    with: &[
        must("sus", "Saybolt Universal seconds, \"150 SUS\""),
        must("at", "temperature of the reading"),
    ],
    gives: &[("nu", "kinematic viscosity at that temperature, mm2/s")],
    run: from_universal,
};

pub(super) const FUROL: Relation = Relation {
    name: "furol",
    group: GROUP,
    law: &saybolt::FUROL,
    with: &[
        must("nu", NU),
        must("at", "122 degF (50 degC) or 210 degF (98.9 degC)"),
    ],
    gives: &[("sfs", "Saybolt Furol seconds, SFS")],
    run: to_furol,
};

pub(super) const FUROL_TO_NU: Relation = Relation {
    name: "furol-to-nu",
    group: GROUP,
    law: &saybolt::FROM_FUROL,
    with: &[
        must("sfs", "Saybolt Furol seconds, \"200 SFS\""),
        must("at", "122 degF (50 degC) or 210 degF (98.9 degC)"),
    ],
    gives: &[("nu", "kinematic viscosity at that temperature, mm2/s")],
    run: from_furol,
};

pub(super) const ENGLER_TO_NU: Relation = Relation {
    name: "engler-to-nu",
    group: GROUP,
    law: &efflux::ENGLER,
    with: &[must("engler", "Engler degrees, \"6.1 degE\"")],
    gives: &[(
        "nu",
        "kinematic viscosity at the temperature of the reading, mm2/s",
    )],
    run: from_engler,
};

pub(super) const REDWOOD_TO_NU: Relation = Relation {
    name: "redwood-to-nu",
    group: GROUP,
    law: &efflux::REDWOOD,
    with: &[
        must("redwood", "Redwood seconds, \"200 s Redwood\""),
        may("instrument", "1 (Standard) or 2 (Admiralty)", "1"),
    ],
    gives: &[(
        "nu",
        "kinematic viscosity at the temperature of the reading, mm2/s",
    )],
    run: from_redwood,
};

fn to_universal(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let (nu, at) = viscosity(args, w)?;
    let with = (("nu", nu), ("t", at));
    let says = "Saybolt Universal seconds";
    let sus = w
        .trace
        .attempt("SUS", says, &saybolt::UNIVERSAL, with, |(nu, t)| {
            saybolt::universal(nu, t)
        })?;
    w.result("sus", sus, "SUS");
    Ok(())
}

fn to_furol(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let (nu, at) = viscosity(args, w)?;
    let with = (("nu", nu), ("t", at));
    let says = "Saybolt Furol seconds";
    let sfs = w
        .trace
        .attempt("SFS", says, &saybolt::FUROL, with, |(nu, t)| {
            saybolt::furol(nu, t)
        })?;
    w.result("sfs", sfs, "SFS");
    Ok(())
}

fn from_universal(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let sus = reading(args, w, "sus", "150 SUS", &["SUS"])?;
    let at = args.quantity(w, "at", "temperature of the reading")?;
    let with = (("SUS", sus), ("t", at));
    let law = &saybolt::FROM_UNIVERSAL;
    let nu = w
        .trace
        .attempt("nu", "kinematic viscosity", law, with, |(sus, t)| {
            saybolt::from_universal(sus, t)
        })?;
    w.result("nu", nu, "mm2/s");
    Ok(())
}

fn from_furol(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let sfs = reading(args, w, "sfs", "200 SFS", &["SFS"])?;
    let at = args.quantity(w, "at", "temperature of the reading")?;
    let with = (("SFS", sfs), ("t", at));
    let law = &saybolt::FROM_FUROL;
    let nu = w
        .trace
        .attempt("nu", "kinematic viscosity", law, with, |(sfs, t)| {
            saybolt::from_furol(sfs, t)
        })?;
    w.result("nu", nu, "mm2/s");
    Ok(())
}

fn from_engler(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let degrees = reading(args, w, "engler", "6.1 degE", &["degE"])?;
    by_formula(w, Instrument::Engler, ("E", degrees))
}

fn from_redwood(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let allowed = &["s Redwood", "s Redwood 2"];
    let seconds = reading(args, w, "redwood", "200 s Redwood", allowed)?;
    let two = args.choice("instrument", &["1", "2"], Some("1"))? == "2";
    let written = args.text("redwood", "\"200 s Redwood\"")?;
    let admiralty = parse(Kind::Efflux, &written).is_ok_and(|r| r.unit == "s Redwood 2");
    let instrument = if two || admiralty {
        Instrument::RedwoodTwo
    } else {
        Instrument::RedwoodOne
    };
    by_formula(w, instrument, ("R", seconds))
}

fn by_formula(
    w: &mut Worked,
    instrument: Instrument,
    reading: (&'static str, Known<Efflux>),
) -> Result<(), Refusal> {
    let law = instrument.law();
    let nu = w
        .trace
        .attempt("nu", "kinematic viscosity", law, (reading,), |(r,)| {
            instrument.viscosity(r)
        })?;
    w.remark(OLD);
    w.result("nu", nu, "mm2/s");
    Ok(())
}

fn viscosity(
    args: &mut Args,
    w: &mut Worked,
) -> Result<(Known<KinematicViscosity>, Known<ThermodynamicTemperature>), Refusal> {
    let nu = args.quantity(w, "nu", NU)?;
    let at = args.quantity(w, "at", "temperature")?;
    Ok((nu, at))
}

/// A reading of the instrument the key names: in its own unit, in plain seconds, or bare; never
/// in that of another instrument.
fn reading(
    args: &mut Args,
    w: &mut Worked,
    key: &'static str,
    example: &str,
    units: &[&str],
) -> Result<Known<Efflux>, Refusal> {
    let text = args.text(key, &format!("\"{example}\""))?;
    let wrong = |what: &str| {
        let words = format!("{key}: {what}; write {key}=\"{example}\"");
        Refusal::new("reading-unreadable", words)
    };
    let own = units[0];
    let bare = [parse(Kind::Ratio, &text), parse(Kind::Time, &text)]
        .into_iter()
        .flatten()
        .find(|r| matches!(r.unit, "" | "s"));
    let text = bare.map_or(text, |seconds| format!("{} {own}", seconds.value));
    let read = parse(Kind::Efflux, &text).map_err(|bad| wrong(&bad.to_string()))?;
    if !units.contains(&read.unit) {
        return Err(wrong(&format!(
            "`{text}` is a reading of another instrument"
        )));
    }
    let given = Given::new(
        Efflux::from_base(read.amount.base),
        text.trim(),
        Origin::flag(key),
    );
    Ok(w.trace.given(key, "reading", &given))
}
