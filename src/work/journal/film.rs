//! Film, friction and flow of a journal bearing at a viscosity.

use super::{Asked, CLEARANCE, DIAMETER, GROUP, LOAD, METHOD_SAYS, SPEED, WIDTH, may, must};
use super::{route, steps};
use crate::quantity::DynamicViscosity;
use crate::relation::journal::film::LAW;
use crate::relation::journal::{Route, iso7902};
use crate::trace::Known;
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const JOURNAL_FILM: Relation = Relation {
    name: "journal-film",
    group: GROUP,
    law: &LAW,
    with: &[
        DIAMETER,
        WIDTH,
        CLEARANCE,
        LOAD,
        SPEED,
        must("eta", "dynamic viscosity of the film"),
        may("method", METHOD_SAYS, "reynolds"),
    ],
    gives: &[
        ("sommerfeld", "Sommerfeld number S"),
        ("so", "load number So"),
        ("eccentricity", "eccentricity over radial clearance"),
        ("h_min", "least film, um"),
        ("attitude", "attitude angle, deg"),
        ("friction", "friction coefficient"),
        ("friction_variable", "friction coefficient over psi"),
        ("flow", "oil drawn in, L/min; not by iso7902"),
        ("side_flow", "oil lost at the edges, L/min"),
        ("power", "friction power, W"),
        ("pressure", "specific load, MPa"),
        (
            "peak_pressure",
            "highest film pressure, MPa; not by iso7902",
        ),
        (
            "peak_at",
            "its place from the widest gap, deg; not by iso7902",
        ),
        ("rupture_at", "end of the film, deg; not by iso7902"),
        (
            "h_min_other",
            "least film by the other method, um, where it applies",
        ),
    ],
    run: journal_film,
};

fn journal_film(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let asked = Asked::read(args, w)?;
    let eta: Known<DynamicViscosity> = args.quantity(w, "eta", "dynamic viscosity")?;
    let route = route(args, Route::Reynolds)?;
    let film = steps::film(&mut w.trace, &asked, eta, route)?;
    let s = steps::sommerfeld(&mut w.trace, film.so);
    w.result("sommerfeld", s, "");
    w.result("so", film.so, "");
    w.result("eccentricity", film.eccentricity, "");
    w.result("h_min", film.h_min, "um");
    w.result("attitude", film.attitude, "deg");
    w.result("friction", film.friction, "");
    w.result("friction_variable", film.variable, "");
    if let Some(inside) = &film.inside {
        w.result("flow", inside.flow, "L/min");
    }
    w.result("side_flow", film.side_flow, "L/min");
    w.result("power", film.power, "W");
    w.result("pressure", film.pressure, "MPa");
    if let Some(inside) = &film.inside {
        w.result("peak_pressure", inside.peak, "MPa");
        w.result("peak_at", inside.peak_at, "deg");
        w.result("rupture_at", inside.rupture_at, "deg");
    }
    other(w, &asked, eta, route);
    steps::remarks(w, &asked.geometry, film.eccentricity.value);
    Ok(())
}

/// The second opinion, where the other method applies.
fn other(w: &mut Worked, asked: &Asked, eta: Known<DynamicViscosity>, used: Route) {
    let route = match used {
        Route::Reynolds => Route::Iso7902,
        Route::Iso7902 => Route::Reynolds,
    };
    match steps::film(&mut w.trace, asked, eta, route) {
        Ok(film) => w.result("h_min_other", film.h_min, "um"),
        Err(reason) => w.remark(format!("no second opinion: {reason}")),
    }
    if iso7902::covers(asked.geometry.width_ratio()) {
        steps::error_of_closed_form(w, &asked.geometry);
    }
}
