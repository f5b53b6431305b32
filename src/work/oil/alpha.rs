//! Pressure-viscosity coefficient.

use super::{GROUP, form, must};
use crate::quantity::convert::{dynamic, to_celsius};
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, MassDensity, PressureViscosity, Ratio,
    ThermodynamicTemperature,
};
use crate::relation::Law;
use crate::relation::oil::density::DYNAMIC_VISCOSITY;
use crate::relation::oil::pressure_viscosity::{
    AGMA_925, Family, GOLD, ISO_15144, MOVED, SO_KLAUS, WOOSTER, agma_925, gold, iso_15144, moved,
    so_klaus, wooster,
};
use crate::trace::{Known, Recorder};
use crate::work::{Args, Refusal, Relation, Worked};

const MODELS: [&str; 5] = ["iso15144", "agma925", "gold", "so-klaus", "wooster"];
const BASES: [&str; 4] = ["mineral", "pao", "pag", "ester"];
const SYMBOL: &str = "alpha";
const SAYS: &str = "pressure-viscosity coefficient";

/// The row's own law: the models are laws of their own.
static MODEL_LAW: Law = Law {
    name: "pressure-viscosity",
    title: "Pressure-viscosity coefficient by a published correlation",
    formula: "by model: iso15144, agma925, gold, so-klaus, wooster",
    range: "iso15144, agma925: mineral oil, PAO, PAG; gold: these and ester; so-klaus, wooster: \
            mineral oil; ± 25 %",
    source: "ISO/TR 15144-1, AGMA 925-A03, Gold 2001, So and Klaus 1980, Wooster; constants from \
             memory",
};

pub(super) const PRESSURE_VISCOSITY: Relation = Relation {
    name: "pressure-viscosity",
    group: GROUP,
    law: &MODEL_LAW,
    with: &[
        must("model", "iso15144, agma925, gold, so-klaus or wooster"),
        must("base", "mineral, pao, pag or ester"),
        form("eta38", "dynamic viscosity at 38 degC", "iso15144"),
        form("at", "temperature", "iso15144"),
        form(
            "eta",
            "dynamic viscosity at the temperature",
            "agma925, wooster",
        ),
        form(
            "nu",
            "kinematic viscosity at the temperature",
            "gold, so-klaus; others with density",
        ),
        form(
            "density",
            "density at the temperature",
            "so-klaus; others with nu for eta",
        ),
        form("B", "slope of ASTM D341", "so-klaus"),
    ],
    gives: &[("alpha", "pressure-viscosity coefficient, 1/GPa")],
    run: pressure_viscosity,
};

pub(super) const ALPHA_AT: Relation = Relation {
    name: "alpha-at",
    group: GROUP,
    law: &MOVED,
    with: &[
        must("alpha", "measured pressure-viscosity coefficient"),
        must("measured_at", "temperature it was measured at"),
        must("at", "temperature wanted"),
    ],
    gives: &[("alpha", "pressure-viscosity coefficient, 1/GPa")],
    run: alpha_at,
};

fn pressure_viscosity(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let model = args.choice("model", &MODELS, None)?;
    let default = matches!(model, "so-klaus" | "wooster").then_some("mineral");
    let base = args.choice("base", &BASES, default)?;
    let family = Family::WRITTEN
        .iter()
        .find(|(word, _)| *word == base)
        .map_or(Family::Mineral, |(_, family)| *family);
    let alpha = match model {
        "iso15144" => by_iso(args, w, family)?,
        "agma925" => {
            let eta = eta(args, w)?;
            let with = (("eta", eta),);
            (w.trace).attempt(SYMBOL, SAYS, &AGMA_925, with, |(eta,)| {
                agma_925(family, eta)
            })?
        }
        "gold" => {
            let nu: Known<KinematicViscosity> = args.quantity(w, "nu", "kinematic viscosity")?;
            w.trace
                .law(SYMBOL, SAYS, &GOLD, (("nu", nu),), |(nu,)| gold(family, nu))
        }
        "so-klaus" => by_so_klaus(args, w, family)?,
        _ => {
            let eta = eta(args, w)?;
            let with = (("eta", eta),);
            (w.trace).attempt(SYMBOL, SAYS, &WOOSTER, with, |(eta,)| wooster(family, eta))?
        }
    };
    w.remark("correlations and measured oils of one kind scatter by ± 25 %; a measured value comes first");
    w.result("alpha", alpha, "1/GPa");
    Ok(())
}

fn by_iso(
    args: &mut Args,
    w: &mut Worked,
    family: Family,
) -> Result<Known<PressureViscosity>, Refusal> {
    let eta38: Known<DynamicViscosity> =
        args.quantity(w, "eta38", "dynamic viscosity at 38 degC")?;
    let at = temperature(args, w, "at")?;
    let with = (("eta38", eta38), ("theta", at));
    let alpha = w
        .trace
        .attempt(SYMBOL, SAYS, &ISO_15144, with, |(eta38, at)| {
            iso_15144(family, eta38, at)
        })?;
    Ok(alpha)
}

fn by_so_klaus(
    args: &mut Args,
    w: &mut Worked,
    family: Family,
) -> Result<Known<PressureViscosity>, Refusal> {
    let nu: Known<KinematicViscosity> = args.quantity(w, "nu", "kinematic viscosity")?;
    let slope: Known<Ratio> = args.quantity(w, "B", "slope of ASTM D341")?;
    let density: Known<MassDensity> = args.quantity(w, "density", "density at the temperature")?;
    let with = (("nu", nu), ("B", slope), ("rho", density));
    let alpha = w
        .trace
        .attempt(SYMBOL, SAYS, &SO_KLAUS, with, |(nu, slope, density)| {
            so_klaus(family, nu, slope, density)
        })?;
    Ok(alpha)
}

/// Dynamic viscosity as given, or from kinematic viscosity and density.
fn eta(args: &mut Args, w: &mut Worked) -> Result<Known<DynamicViscosity>, Refusal> {
    if !args.has("eta") && args.has("nu") && args.has("density") {
        let nu: Known<KinematicViscosity> = args.quantity(w, "nu", "kinematic viscosity")?;
        let rho: Known<MassDensity> = args.quantity(w, "density", "density at the temperature")?;
        let with = (("nu", nu), ("rho", rho));
        return Ok(w.trace.law(
            "eta",
            "dynamic viscosity",
            &DYNAMIC_VISCOSITY,
            with,
            |(nu, rho)| dynamic(nu, rho),
        ));
    }
    args.quantity(w, "eta", "dynamic viscosity at the temperature")
}

/// A temperature at which the temperature factor means something.
fn temperature(
    args: &mut Args,
    w: &mut Worked,
    key: &'static str,
) -> Result<Known<ThermodynamicTemperature>, Refusal> {
    let at: Known<ThermodynamicTemperature> = args.quantity(w, key, "temperature")?;
    let t = to_celsius(at.value);
    if !(-60.0..=250.0).contains(&t) {
        let words = format!("{key}: {t:.0} degC is outside -60 to 250 degC");
        return Err(Refusal::new("out-of-range", words));
    }
    if !(-0.001..=150.001).contains(&t) {
        w.remark(format!(
            "{key}: the temperature factor is meant for 0 to 150 degC"
        ));
    }
    Ok(at)
}

fn alpha_at(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let alpha: Known<PressureViscosity> =
        args.quantity(w, "alpha", "measured pressure-viscosity coefficient")?;
    let was = temperature(args, w, "measured_at")?;
    let is = temperature(args, w, "at")?;
    let with = (("alpha0", alpha), ("t0", was), ("t", is));
    let moved = w.trace.law(SYMBOL, SAYS, &MOVED, with, |(alpha, was, is)| {
        moved(alpha, was, is)
    });
    w.result("alpha", moved, "1/GPa");
    Ok(())
}
