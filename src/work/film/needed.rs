//! `film-viscosity`: the viscosity a film ratio asks for.

use super::GROUP;
use super::ellipse::{ELLIPSE_LAWS, ellipse_film};
use super::hertz::{
    ANGLE, E1, E2, MODULUS, POISSON1, POISSON2, R1X, R1Y, R2X, R2Y, RADIUS, RX, RY,
};
use super::known::{KnownEllipse, KnownInlet, KnownLine, SPEED};
use super::line::{FORM, LINE_FORMS, line_films, line_law};
use super::ratio::{RA1, RA2, RQ1, RQ2};
use crate::quantity::convert::kinematic;
use crate::quantity::{DynamicViscosity, Length, MassDensity, PressureViscosity, Ratio, Velocity};
use crate::relation::Outside;
use crate::relation::film::groups::{Inlet, of_ellipse, of_line};
use crate::relation::film::roughness::{WANTED, film_for};
use crate::relation::film::{ellipse, inverse};
use crate::relation::oil::pressure_viscosity::{AGMA_925, Family, GOLD, agma_925, gold};
use crate::trace::{Inputs, Known, Recorder};
use crate::work::contact::{form, is_elliptical, may, must, sigma};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const VISCOSITY: Relation = Relation {
    name: "film-viscosity",
    group: GROUP,
    law: &inverse::VISCOSITY,
    with: &[
        SPEED,
        must(
            "load",
            "load, 500 N (with rx and ry), or load per length, 200 N/mm",
        ),
        RADIUS,
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
        FORM,
        may(
            "base",
            "mineral, pao, pag or ester: how pressure thickens the oil",
            "mineral",
        ),
        form(
            "alpha",
            "pressure-viscosity coefficient, where measured",
            "measured",
        ),
        form("density", "density at the temperature, for esters", "ester"),
        must("lambda", "film ratio wanted, 1"),
        RQ1,
        RQ2,
        RA1,
        RA2,
    ],
    gives: &[
        ("eta", "dynamic viscosity needed, mPa.s"),
        (
            "alpha",
            "pressure-viscosity coefficient at that viscosity, 1/GPa",
        ),
        ("h_min", "minimum film reached, um"),
        ("h_central", "central film reached, um (dowson-toyoda)"),
    ],
    run,
};

fn run(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let speed: Known<Velocity> = args.quantity(worked, "speed", "mean rolling speed")?;
    let ratio: Known<Ratio> = args.quantity(worked, "lambda", "film ratio wanted")?;
    let sigma = sigma(args, worked)?;
    let says = "film wanted";
    let inputs = (("lambda", ratio), ("sigma", sigma));
    let wanted = worked
        .trace
        .law("h", says, &WANTED, inputs, |(l, s)| film_for(l, s));
    let oil = Thickening::read(args, worked)?;
    if is_elliptical(args) {
        elliptical(args, worked, speed, wanted, oil)
    } else {
        line(args, worked, speed, wanted, oil)
    }
}

fn elliptical(
    args: &mut Args,
    worked: &mut Worked,
    speed: Known<Velocity>,
    wanted: Known<Length>,
    oil: Thickening,
) -> Result<(), Refusal> {
    let contact = KnownEllipse::read(args, worked)?;
    let k = contact.ellipticity(worked)?;
    let inputs = (
        ("h", wanted),
        ("u", speed),
        ("F", contact.load),
        ("Rx", contact.rx),
        ("k", k),
        ("E'", contact.modulus),
    );
    let plain = contact.plain();
    let eta = needed(worked, inputs, |(target, speed, load, x, k, modulus)| {
        let mut contact = plain;
        (contact.load, contact.radii.x, contact.modulus) = (load, x, modulus);
        inverse::viscosity(target, None, |eta| {
            let alpha = oil.alpha(eta);
            let groups = of_ellipse(Inlet { eta, alpha, speed }, contact)?;
            Ok(ellipse::minimum(groups, k, x))
        })
    })?;
    let alpha = oil.state(worked, eta);
    let inlet = KnownInlet { eta, alpha, speed };
    let groups = contact.groups(worked, inlet)?;
    let least = ("h_min", "minimum film");
    let h = ellipse_film(worked, groups, (k, contact.rx), least, ELLIPSE_LAWS[0]);
    worked.result("h_min", h, "um");
    Ok(())
}

fn line(
    args: &mut Args,
    worked: &mut Worked,
    speed: Known<Velocity>,
    wanted: Known<Length>,
    oil: Thickening,
) -> Result<(), Refusal> {
    let form = args.choice("form", LINE_FORMS, Some("1968"))?;
    let contact = KnownLine::read(args, worked)?;
    let (_, film) = line_law(form);
    let inputs = (
        ("h", wanted),
        ("u", speed),
        ("w", contact.load),
        ("R", contact.radius),
        ("E'", contact.modulus),
    );
    let plain = contact.plain();
    let eta = needed(worked, inputs, |(target, speed, load, radius, modulus)| {
        let mut contact = plain;
        (contact.load, contact.radius, contact.modulus) = (load, radius, modulus);
        inverse::viscosity(target, None, |eta| {
            let alpha = oil.alpha(eta);
            let groups = of_line(Inlet { eta, alpha, speed }, contact)?;
            Ok(film(groups, radius))
        })
    })?;
    let alpha = oil.state(worked, eta);
    let inlet = KnownInlet { eta, alpha, speed };
    let groups = contact.groups(worked, inlet)?;
    let (minimum, central) = line_films(worked, form, groups, contact.radius);
    if let Some(h) = minimum {
        worked.result("h_min", h, "um");
    }
    if let Some(h) = central {
        worked.result("h_central", h, "um");
    }
    Ok(())
}

fn needed<I: Inputs>(
    worked: &mut Worked,
    inputs: I,
    solve: impl FnOnce(I::Values) -> Result<DynamicViscosity, Outside>,
) -> Result<Known<DynamicViscosity>, Refusal> {
    let says = "dynamic viscosity needed";
    let law = &inverse::VISCOSITY;
    let eta = worked.trace.attempt("eta", says, law, inputs, solve)?;
    worked.result("eta", eta, "mPa.s");
    Ok(eta)
}

/// How pressure thickens the oil looked for.
#[derive(Clone, Copy)]
enum Thickening {
    /// A measured coefficient, whatever the viscosity.
    Measured(Known<PressureViscosity>),
    /// By the viscosity at the temperature.
    ByViscosity(Family),
    /// By the kinematic viscosity at the temperature, for esters.
    Ester(Known<MassDensity>),
}

impl Thickening {
    fn read(args: &mut Args, worked: &mut Worked) -> Result<Self, Refusal> {
        let words: Vec<&'static str> = Family::WRITTEN.iter().map(|(word, _)| *word).collect();
        let base = args.choice("base", &words, Some("mineral"))?;
        let says = "pressure-viscosity coefficient, measured";
        if let Some(alpha) = args.maybe(worked, "alpha", says)? {
            return Ok(Self::Measured(alpha));
        }
        let family = Family::WRITTEN.iter().find(|(word, _)| *word == base);
        match family.map_or(Family::Mineral, |(_, family)| *family) {
            Family::Ester => {
                let says = "density at the temperature";
                Ok(Self::Ester(args.quantity(worked, "density", says)?))
            }
            family => Ok(Self::ByViscosity(family)),
        }
    }

    fn alpha(self, eta: DynamicViscosity) -> PressureViscosity {
        match self {
            Self::Measured(alpha) => alpha.value,
            Self::ByViscosity(family) => {
                agma_925(family, eta).expect("esters are of another variant")
            }
            Self::Ester(density) => gold(Family::Ester, kinematic(eta, density.value)),
        }
    }

    /// The coefficient at the viscosity found, as a step and a result.
    fn state(self, worked: &mut Worked, eta: Known<DynamicViscosity>) -> Known<PressureViscosity> {
        let says = "pressure-viscosity coefficient at that viscosity";
        let alpha = match self {
            Self::Measured(alpha) => alpha,
            Self::ByViscosity(_) => {
                let inputs = (("eta", eta),);
                worked
                    .trace
                    .law("alpha", says, &AGMA_925, inputs, |(eta,)| self.alpha(eta))
            }
            Self::Ester(density) => {
                let inputs = (("eta", eta), ("rho", density));
                worked
                    .trace
                    .law("alpha", says, &GOLD, inputs, |(eta, rho)| {
                        gold(Family::Ester, kinematic(eta, rho))
                    })
            }
        };
        worked.result("alpha", alpha, "1/GPa");
        alpha
    }
}
