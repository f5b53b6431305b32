//! What a journal bearing is held to besides viscosity, and second opinions.

use super::floor::Floor;
use super::shape::Shape;
use crate::demand::End;
use crate::demand::context::Context;
use crate::model::part::{JournalBearing, Part};
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{MassDensity, Measure, Pressure};
use crate::relation::journal::limits::laminar;
use crate::relation::journal::limits::least_film::trumpler;
use crate::relation::journal::limits::load::{
    self, Lining, lining_of, permissible, trumpler_duty, trumpler_start,
};
use crate::relation::journal::{Route, iso7902, viscosity};
use crate::trace::Recorder;

/// Adds the figures that set no limit on viscosity.
pub(super) fn findings<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
    shape: &Shape,
    floor: Option<Floor>,
) {
    specific_load(cx, part, b, shape);
    laminar_from(cx, part, shape, floor);
    if let Some(floor) = floor {
        second_opinion(cx, part, shape, floor);
    }
    twice_the_load(cx, part, shape);
}

/// The specific load against what the lining takes. Beyond its special limit the film is not
/// what decides, and the floor is left open.
fn specific_load<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
    shape: &Shape,
) {
    let written = b.lining.as_ref().map(|l| l.value.as_str());
    let known = written.and_then(lining_of);
    let lining = known.unwrap_or(Lining::WhiteMetal);
    let named = match (written, known) {
        (_, Some(lining)) => lining.name().to_owned(),
        (Some(other), None) => format!("lining {other} not in the table, taken as white-metal"),
        (None, None) => "lining not stated, taken as white-metal".to_owned(),
    };
    let (general, special) = permissible(lining);
    let load = shape.pressure.value;
    let shown = |p: Pressure| quantity(p.amount(), Units::Si, Toward::Nearest);
    let stands = if load <= general { "within" } else { "above" };
    let says = format!(
        "specific load, {stands} {} in general use ({named}; {})",
        shown(general),
        load::LAW.source
    );
    cx.inform(part, says, Some((load.amount(), shape.pressure.step)));
    if load > trumpler_start() {
        let says = "specific load above 20.7 bar: by Trumpler too much to start under; lift or \
                    relieve the shaft at start";
        cx.inform(part, says, None);
    }
    if load > special {
        let because = format!(
            "specific load {}, beyond the {} of its lining: no oil mends that",
            shown(load),
            shown(special)
        );
        cx.undecided(part, End::HotFloor, &because);
    }
}

/// Density of a mineral oil near running temperature, for figures that go with no oil.
const DENSITY: f64 = 860.0;

fn laminar_from<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    shape: &Shape,
    floor: Option<Floor>,
) {
    let why = "mineral oil near running temperature";
    let density = MassDensity::from_base(DENSITY);
    let rho = cx.r.assume("rho", "density of the oil", density, why);
    let geometry = shape.geometry();
    let with = (
        ("rho", rho),
        ("omega", shape.speed),
        ("D", shape.diameter),
        ("c", shape.clearance),
    );
    let says = "viscosity from which on the film is laminar";
    let law = &laminar::VISCOSITY;
    let eta = cx.r.law("eta_lam", says, law, with, |(rho, n, ..)| {
        laminar::viscosity(&geometry, n, rho)
    });
    let turbulent = floor.is_some_and(|f| f.eta.value < eta.value);
    let says = if turbulent {
        "not laminar at its least film, where losses and temperature are underestimated; laminar \
         from"
    } else {
        "laminar at its least film; laminar from"
    };
    cx.inform(part, says, Some((eta.value.amount(), eta.step)));
}

/// The closed forms of the standard, where they cover the width.
fn second_opinion<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    shape: &Shape,
    floor: Floor,
) {
    let geometry = shape.geometry();
    if !iso7902::covers(geometry.width_ratio()) {
        return;
    }
    let (f, d, b, c, n) = shape.sized();
    let with = (f, d, b, c, n, ("h_min", floor.film));
    let duty = shape.duty();
    let says = "viscosity by the closed form of ISO 7902-2";
    let found = cx.r.attempt("eta_iso", says, &viscosity::LAW, with, |v| {
        viscosity::needed(geometry, duty, v.5, Route::Iso7902)
    });
    if let Ok(eta) = found {
        let error = match geometry.width_ratio().base() {
            b if b <= 0.65 => "load within -5 and +7 % of the solution",
            b if b < 0.98 => "load from 11 % below to level with the solution",
            _ => "load within -3 and +5 % of the solution",
        };
        cx.r.note(|| error.to_owned());
        let says = format!("viscosity by the closed form of ISO 7902-2 ({error})");
        cx.inform(part, says, Some((eta.value.amount(), eta.step)));
    }
}

/// Trumpler asks his film of twice the load.
fn twice_the_load<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, shape: &Shape) {
    let (geometry, film) = (shape.geometry(), trumpler(shape.diameter.value));
    let Ok(duty) = trumpler_duty(&shape.duty()) else {
        return;
    };
    let (f, d, b, c, n) = shape.sized();
    let says = "viscosity Trumpler's film would need under twice the load";
    let law = &viscosity::LAW;
    let found = cx.r.attempt("eta_T", says, law, (f, d, b, c, n), |_| {
        viscosity::needed(geometry, duty, film, Route::Reynolds)
    });
    if let Ok(eta) = found {
        cx.r.note(|| "twice the load, Trumpler's film".to_owned());
        cx.inform(part, says, Some((eta.value.amount(), eta.step)));
    }
}
