//! The viscosity a journal bearing needs.

use super::{Asked, CLEARANCE, DIAMETER, GROUP, LOAD, METHOD_SAYS, SPEED, WIDTH, may, must};
use super::{route, steps};
use crate::quantity::{DynamicViscosity, Length, Measure};
use crate::relation::Law;
use crate::relation::journal::limits::whirl;
use crate::relation::journal::viscosity::{LAW, eccentricity_for, needed};
use crate::relation::journal::{NoFilm, Route};
use crate::trace::{Known, Recorder};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const JOURNAL_VISCOSITY: Relation = Relation {
    name: "journal-viscosity",
    group: GROUP,
    law: &LAW,
    with: &[
        DIAMETER,
        WIDTH,
        CLEARANCE,
        LOAD,
        SPEED,
        must("h_min", "least film wanted: 20 um"),
        may("method", METHOD_SAYS, "reynolds"),
    ],
    gives: &[
        ("eta", "dynamic viscosity needed, mPa.s"),
        ("eccentricity", "eccentricity over radial clearance"),
        (
            "eta_other",
            "the same by the other method, mPa.s, where it applies",
        ),
        (
            "eta_whirl",
            "viscosity above which the shaft rides at e under 0.5, mPa.s",
        ),
    ],
    run: journal_viscosity,
};

/// The ceiling that eccentricity sets, as a law of its own for the record.
static CEILING: Law = Law {
    name: "journal-viscosity-ceiling",
    title: "viscosity above which a journal bearing runs at an eccentricity under 0.5",
    formula: "eta = P psi^2/(So(0.5, B/D) omega)",
    range: "a caution for light, fast rotors",
    source: "Reynolds equation solved by the program; the eccentricity is common practice",
};

fn journal_viscosity(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let asked = Asked::read(args, w)?;
    let h_min: Known<Length> = args.quantity(w, "h_min", "least film wanted")?;
    let route = route(args, Route::Reynolds)?;
    let eta = wanted(w, &asked, h_min, route)?;
    let with = (("c", asked.clearance), ("h_min", h_min));
    let geometry = asked.geometry;
    let eccentricity = w.trace.law("e", "eccentricity", &LAW, with, |(_, h)| {
        eccentricity_for(&geometry, h)
    });
    w.result("eta", eta, "mPa.s");
    w.result("eccentricity", eccentricity, "");
    let other = match route {
        Route::Reynolds => Route::Iso7902,
        Route::Iso7902 => Route::Reynolds,
    };
    match wanted(w, &asked, h_min, other) {
        Ok(eta) => {
            w.result("eta_other", eta, "mPa.s");
            steps::error_of_closed_form(w, &geometry);
        }
        Err(reason) => w.remark(format!("no second opinion: {reason}")),
    }
    let ceiling = ceiling(w, &asked, route)?;
    w.result("eta_whirl", ceiling, "mPa.s");
    if ceiling.value.base() < eta.value.base() {
        w.remark("the film wanted needs more than eta_whirl: too thick an oil is a fault as well");
    }
    steps::remarks(w, &geometry, eccentricity.value);
    Ok(())
}

fn wanted(
    w: &mut Worked,
    asked: &Asked,
    h_min: Known<Length>,
    route: Route,
) -> Result<Known<DynamicViscosity>, NoFilm> {
    let (geometry, duty) = (asked.geometry, asked.duty);
    let with = (
        ("h_min", h_min),
        ("F", asked.load),
        ("omega", asked.speed),
        ("D", asked.diameter),
        ("B", asked.width),
        ("c", asked.clearance),
    );
    let says = match route {
        Route::Reynolds => "viscosity needed, by the Reynolds solution",
        Route::Iso7902 => "viscosity needed, by the closed form of ISO 7902-2",
    };
    w.trace.attempt("eta", says, &LAW, with, |(h, ..)| {
        needed(geometry, duty, h, route)
    })
}

fn ceiling(w: &mut Worked, asked: &Asked, route: Route) -> Result<Known<DynamicViscosity>, NoFilm> {
    let (geometry, duty) = (asked.geometry, asked.duty);
    let with = (
        ("F", asked.load),
        ("omega", asked.speed),
        ("D", asked.diameter),
        ("B", asked.width),
        ("c", asked.clearance),
    );
    let says = "viscosity above which e falls under 0.5";
    w.trace.attempt("eta_max", says, &CEILING, with, |_| {
        whirl::thickest(geometry, duty, route)
    })
}
