//! The floors of a journal bearing: least film and transition speed.

use super::shape::{Shape, note_short};
use super::warm::{self, Oil};
use super::{FILM_RULE, TRANSITION_RULE, dynamic, wanted};
use crate::demand::context::Context;
use crate::demand::film::{FilmContact, FilmDemand, Wedge};
use crate::demand::inputs::Usual;
use crate::demand::{Demand, End, Limit};
use crate::model::part::{JournalBearing, Part};
use crate::model::rulebook::Confidence;
use crate::quantity::convert::{number, to_um, um};
use crate::quantity::{DynamicViscosity, Length, Measure};
use crate::relation::Law;
use crate::relation::film::roughness::{RQ_FROM_RA, rq_from_ra};
use crate::relation::journal::limits::least_film::{
    ISO7902, ROUGHNESS_RMS, TRUMPLER, iso7902, roughness_rms, trumpler,
};
use crate::relation::journal::{Route, table, transition, viscosity};
use crate::source::place::Whose;
use crate::trace::{Known, Recorder};

/// The film asked for.
static WANTED: Law = Law {
    name: "journal-film-wanted",
    title: "film a journal bearing is asked for",
    formula: "h = max(h_lim, h_T, h_R, 0.03 c)",
    range: "the greatest of the limits that apply; a full film is not under 3 % of the clearance",
    source: "ISO 7902-3 and Trumpler 1966 (both from memory), common practice for roughness",
};

/// A least film with the rule it comes from.
struct Least {
    film: Known<Length>,
    symbol: &'static str,
    by: &'static str,
    source: &'static str,
}

/// What the floor came to.
#[derive(Clone, Copy)]
pub(super) struct Floor {
    /// The film.
    pub(super) film: Known<Length>,
    /// The viscosity that gives it.
    pub(super) eta: Known<DynamicViscosity>,
}

/// Adds the viscosity at which the film reaches the greatest of its limits.
pub(super) fn film<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
    shape: &Shape,
    oil: Oil,
) -> Option<Floor> {
    let (film, says, rule, source, whose) = asked(cx, part, b, shape);
    let (f, d, w, c, n) = shape.sized();
    let with = (f, d, w, c, n, ("h_min", film));
    let says_eta = "viscosity at which the film reaches it";
    let (geometry, duty) = (shape.geometry(), shape.duty());
    let found =
        cx.r.attempt("eta_min", says_eta, &viscosity::LAW, with, |v| {
            viscosity::needed(geometry, duty, v.5, Route::Reynolds)
        });
    let eta = match found {
        Ok(eta) => eta,
        Err(refused) => {
            cx.undecided(part, End::HotFloor, &format!("film: {refused}"));
            return None;
        }
    };
    note_short(cx, shape);
    let at = warm::film_at(cx, shape, oil, eta);
    let contact = FilmContact::Wedge(Wedge {
        needs: eta.value,
        speed: shape.surface.value,
        law: &viscosity::LAW,
    });
    cx.push(Demand {
        end: End::HotFloor,
        limit: Limit::Film(Box::new(FilmDemand {
            contact,
            wanted: film.value,
        })),
        limit_step: Some(eta.step),
        rule,
        says,
        source,
        whose,
        confidence: Confidence::Medium,
        ..cx.blank(part, at)
    });
    Some(Floor { film, eta })
}

/// The film asked for: by a house rule, else the greatest of the published limits.
fn asked<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
    shape: &Shape,
) -> (Known<Length>, String, String, String, Whose) {
    if let Some((film, rule, source)) = cx.house_film(part, FILM_RULE) {
        let says = format!("film >= {} um", shown(film.value));
        return (film, says, rule, source, Whose::House);
    }
    let limits = limits(cx, part, b, shape);
    let least = 1.0 - table::FURTHEST;
    let full = Length::from_base(shape.clearance.value.base() * least);
    let mut film = full;
    let mut source = "a full film is not under 3 % of the clearance";
    for limit in &limits {
        if limit.film.value.base() >= film.base() {
            (film, source) = (limit.film.value, limit.source);
        }
    }
    for limit in &limits {
        let says = format!("least film by {}", limit.by);
        cx.inform(
            part,
            says,
            Some((limit.film.value.amount(), limit.film.step)),
        );
    }
    let mut with: Vec<(&'static str, Known<Length>)> =
        limits.iter().map(|l| (l.symbol, l.film)).collect();
    with.push(("c", shape.clearance));
    let wanted = cx.r.law("h", "film asked for", &WANTED, with, |_| film);
    let says = format!("film >= {} um", shown(film));
    (
        wanted,
        says,
        FILM_RULE.to_owned(),
        source.to_owned(),
        Whose::Standard,
    )
}

fn shown(film: Length) -> String {
    use crate::quantity::show::{Toward, fixed};
    fixed(to_um(film), 1, Toward::Up)
}

fn limits<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
    shape: &Shape,
) -> Vec<Least> {
    let mut limits = Vec::new();
    if let Some(film) = iso7902(shape.diameter.value, shape.surface.value) {
        let with = (("D", shape.diameter), ("U", shape.surface));
        let film = cx.r.law("h_lim", "least film", &ISO7902, with, |_| film);
        limits.push(Least {
            film,
            symbol: "h_lim",
            by: "ISO 7902-3",
            source: "ISO 7902-3 (from memory)",
        });
    }
    let with = (("D", shape.diameter),);
    let film =
        cx.r.law("h_T", "least film", &TRUMPLER, with, |(d,)| trumpler(d));
    limits.push(Least {
        film,
        symbol: "h_T",
        by: "Trumpler's criterion",
        source: "Trumpler 1966 (from memory)",
    });
    limits.push(Least {
        film: rough(cx, part, b),
        symbol: "h_R",
        by: "the roughness of shaft and shell",
        source: "common practice: 5 times the composite rms roughness",
    });
    limits
}

/// Five times the composite roughness of shaft and shell.
fn rough<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
) -> Known<Length> {
    let key = wanted("shaft roughness", "Ra_s", "Ra of the shaft", "drawing");
    let usual = Usual {
        value: um(0.4),
        lo: um(0.2),
        hi: um(0.8),
        why: "ground shaft; Ra 0.2 to 0.8 um is common practice",
    };
    let shaft = cx.or_assume(part, key, b.shaft_roughness.as_ref(), usual);
    let why = "white-metal shell; Ra 0.4 to 1 um is common practice";
    let shell = cx.r.assume("Ra_b", "Ra of the shell", um(0.6), why);
    let mut rq = |symbol, says, ra| {
        cx.r.law(symbol, says, &RQ_FROM_RA, (("Ra", ra),), |(ra,)| {
            rq_from_ra(ra)
        })
    };
    let shaft = rq("Rq_s", "Rq of the shaft", shaft);
    let shell = rq("Rq_b", "Rq of the shell", shell);
    let with = (("Rq_shaft", shaft), ("Rq_bore", shell));
    cx.r.law("h_R", "least film", &ROUGHNESS_RMS, with, |(s, b)| {
        roughness_rms(s, b)
    })
}

/// Speed over the transition speed asked for; two to three is the rule.
const FACTOR: f64 = 2.0;

/// Adds the viscosity at which the shaft runs well clear of mixed friction.
pub(super) fn transition<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    shape: &Shape,
    oil: Oil,
    floor: Option<Floor>,
) {
    let why = "two to three times is the rule; the lower end";
    let factor =
        cx.r.assume("x", "speed over transition speed", number(FACTOR), why);
    let why = "1 unless run-in, stiff and well aligned, then up to 6";
    let constant = cx.r.assume("C", "transition constant", number(1.0), why);
    let volume = transition::volume(shape.diameter.value, shape.width.value);
    let with = (
        ("x", factor),
        ("F", shape.load),
        ("C", constant),
        ("D", shape.diameter),
        ("B", shape.width),
        ("n", shape.speed),
    );
    let says = "viscosity that keeps clear of mixed friction";
    let law = &transition::VISCOSITY;
    let found =
        cx.r.attempt("eta_tr", says, law, with, |(x, f, c, _, _, n)| {
            transition::viscosity(f, n, volume, c, x)
        });
    let Ok(eta) = found else { return };
    // thinner than the film's floor it cannot be worked out how warm the film runs, nor matter
    let warm = match floor {
        Some(floor) if floor.eta.value > eta.value => floor.eta,
        _ => eta,
    };
    let at = warm::film_at(cx, shape, oil, warm);
    let demand = dynamic(End::HotFloor, eta, TRANSITION_RULE, cx.blank(part, at));
    cx.push(Demand {
        says: format!("speed at least {FACTOR} times the transition speed"),
        source: "Vogelpohl (from memory)".to_owned(),
        ..demand
    });
}
