//! The oil between the teeth: viscosity, density and pressure-viscosity coefficient there.

use crate::quantity::convert::{celsius, dynamic};
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, MassDensity, PressureViscosity, ThermodynamicTemperature,
};
use crate::relation::gear::film::{self, DENSITY};
use crate::relation::oil::density::DYNAMIC_VISCOSITY;
use crate::relation::oil::pressure_viscosity::{
    AGMA_925, Family, GOLD, ISO_15144, agma_925, gold, iso_15144,
};
use crate::trace::{Known, Recorder};
use crate::work::args::Point;
use crate::work::oil::curve::{line_at, on_line};
use crate::work::{Args, Refusal, Worked};

const ALPHA: &str = "pressure-viscosity coefficient";

/// The oil between the teeth.
pub(super) struct OilAtTeeth {
    pub(super) nu: Known<KinematicViscosity>,
    pub(super) eta: Known<DynamicViscosity>,
    /// For the ISO form.
    pub(super) alpha_iso: Known<PressureViscosity>,
    /// For the AGMA form.
    pub(super) alpha_agma: Known<PressureViscosity>,
}

impl OilAtTeeth {
    pub(super) fn read(args: &mut Args, worked: &mut Worked) -> Result<Self, Refusal> {
        let points = args.points(worked, "oil")?;
        let family = family(args)?;
        let rho15 = args.quantity(worked, "density15", "density at 15 degC")?;
        let at = args.quantity(worked, "at", "temperature of the teeth")?;
        let measured = args.maybe(worked, "alpha", "coefficient there, measured")?;
        let line = line_at(worked, &points, at)?;
        let nu = on_line(worked, &line, at)?;
        let eta = eta_of(worked, "eta", (nu, rho15, at))?;
        let (alpha_iso, alpha_agma) = match (measured, family) {
            (Some(alpha), _) => (alpha, alpha),
            (None, Family::Ester) => {
                let alpha = worked
                    .trace
                    .law("alpha", ALPHA, &GOLD, (("nu", nu),), |(nu,)| {
                        gold(family, nu)
                    });
                (alpha, alpha)
            }
            (None, _) => {
                let agma =
                    worked
                        .trace
                        .attempt("alpha", ALPHA, &AGMA_925, (("eta", eta),), |(eta,)| {
                            agma_925(family, eta)
                        })?;
                (iso(worked, family, &points, (rho15, at))?, agma)
            }
        };
        Ok(Self {
            nu,
            eta,
            alpha_iso,
            alpha_agma,
        })
    }
}

fn family(args: &mut Args) -> Result<Family, Refusal> {
    let words: Vec<&'static str> = Family::WRITTEN.iter().map(|(word, _)| *word).collect();
    let base = args.choice("base", &words, Some("mineral"))?;
    let found = Family::WRITTEN.iter().find(|(word, _)| *word == base);
    Ok(found.map(|(_, f)| *f).expect("the word is one of the list"))
}

/// The coefficient by the ISO form, from the viscosity at 38 °C.
fn iso(
    worked: &mut Worked,
    family: Family,
    points: &[Point],
    (rho15, at): (Known<MassDensity>, Known<ThermodynamicTemperature>),
) -> Result<Known<PressureViscosity>, Refusal> {
    let why = "where the method takes the viscosity";
    let says = "temperature of the coefficient's viscosity";
    let t38 = worked.trace.assume("t38", says, celsius(38.0), why);
    let line = line_at(worked, points, t38)?;
    let nu38 = on_line(worked, &line, t38)?;
    let eta38 = eta_of(worked, "eta38", (nu38, rho15, t38))?;
    let inputs = (("eta38", eta38), ("t", at));
    let trace = &mut worked.trace;
    let alpha = trace.attempt("alpha", ALPHA, &ISO_15144, inputs, |(eta, t)| {
        iso_15144(family, eta, t)
    })?;
    Ok(alpha)
}

fn eta_of(
    worked: &mut Worked,
    symbol: &'static str,
    (nu, rho15, at): (
        Known<KinematicViscosity>,
        Known<MassDensity>,
        Known<ThermodynamicTemperature>,
    ),
) -> Result<Known<DynamicViscosity>, Refusal> {
    let trace = &mut worked.trace;
    let inputs = (("rho15", rho15), ("t", at));
    let says = "density at temperature";
    let rho = trace.attempt("rho", says, &DENSITY, inputs, |(rho, t)| {
        film::density(rho, t)
    })?;
    let inputs = (("nu", nu), ("rho", rho));
    let says = "dynamic viscosity";
    Ok(
        trace.law(symbol, says, &DYNAMIC_VISCOSITY, inputs, |(nu, rho)| {
            dynamic(nu, rho)
        }),
    )
}
