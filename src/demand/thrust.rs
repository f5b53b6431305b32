//! Thrust bearing: the viscosity at which the film under a pad reaches its limit.

use super::context::{Context, HotAt};
use super::film::{FilmContact, FilmDemand, Wedge};
use super::inputs::{Usual, Wanted};
use super::{Demand, End, Limit};
use crate::model::part::{PadType, Part, ThrustBearing};
use crate::model::rulebook::Confidence;
use crate::quantity::convert::{number, surface_speed, to_um};
use crate::quantity::{
    AngularVelocity, DynamicViscosity, Force, Length, Measure, Power, Ratio, Velocity, VolumeRate,
};
use crate::relation::Law;
use crate::relation::journal::SURFACE_SPEED;
use crate::relation::thrust::limits::{LEAST_FILM, Size, least_film, mean_pressure};
use crate::relation::thrust::pad::{LAW, Pad, VISCOSITY};
use crate::relation::thrust::shape::Shape;
use crate::relation::thrust::warming::{RISE, rise};
use crate::source::place::Whose;
use crate::trace::{Known, Recorder};

/// Id of the rule.
pub const FILM_RULE: &str = "thrust-film";

/// Load on one pad.
static PAD_LOAD: Law = Law {
    name: "thrust-pad-load",
    title: "load on one pad of a thrust bearing",
    formula: "W = F/z",
    range: "pads that share the load evenly",
    source: "definition",
};

/// Load over the area of a pad.
static PRESSURE: Law = Law {
    name: "thrust-mean-pressure",
    title: "mean pressure on a thrust pad",
    formula: "p = W/(B L)",
    range: "any pad, B in the direction of motion, L across",
    source: "definition",
};

/// Mean diameter of the pad ring from which on a bearing counts as large, m. Common practice.
const LARGE: f64 = 0.5;

fn wanted(key: &'static str, symbol: &'static str, says: &'static str) -> Wanted<'static> {
    super::inputs::wanted(
        key,
        symbol,
        says,
        "drawing of the thrust bearing, or a rule at the next overhaul",
    )
}

/// One pad with its duty.
pub(super) struct Loaded {
    pub(super) length: Known<Length>,
    pub(super) width: Known<Length>,
    /// On one pad.
    pub(super) load: Known<Force>,
    pub(super) speed: Known<Velocity>,
    pub(super) ratio: Known<Ratio>,
    mean_diameter: Known<Length>,
    pub(super) pads: Known<Ratio>,
    pub(super) pad: Pad,
}

/// Adds the demand of a thrust bearing.
pub fn add<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, bearing: &ThrustBearing) {
    let Some(loaded) = loaded(cx, part, bearing) else {
        return;
    };
    pressure(cx, part, &loaded);
    let (film, says, rule, source, whose) = asked(cx, part, &loaded);
    let shape = Shape::Ratio(loaded.ratio.value);
    let with = (
        ("W", loaded.load),
        ("h_out", film),
        ("U", loaded.speed),
        ("B", loaded.length),
        ("L", loaded.width),
        ("m", loaded.ratio),
    );
    let says_eta = "viscosity at which the film reaches it";
    let found =
        cx.r.attempt("eta_min", says_eta, &VISCOSITY, with, |(_, h, ..)| {
            loaded.pad.viscosity(shape, h)
        });
    let eta = match found {
        Ok(eta) => eta,
        Err(refused) => {
            cx.undecided(part, End::HotFloor, &format!("film: {refused}"));
            return;
        }
    };
    let at = film_at(cx, part, &loaded, eta);
    let contact = FilmContact::Wedge(Wedge {
        needs: eta.value,
        speed: loaded.speed.value,
        law: &VISCOSITY,
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
}

/// The film asked for: by a house rule, else by size.
fn asked<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    loaded: &Loaded,
) -> (Known<Length>, String, String, String, Whose) {
    use crate::quantity::show::{Toward, fixed};
    let shown = |film: Length| fixed(to_um(film), 1, Toward::Up);
    if let Some((film, rule, source)) = cx.house_film(part, FILM_RULE) {
        let says = format!("film >= {} um", shown(film.value));
        return (film, says, rule, source, Whose::House);
    }
    let (size, word) = if loaded.mean_diameter.value.base() > LARGE {
        (Size::Large, "large pads")
    } else {
        (Size::Small, "small pads")
    };
    let with = (("D_m", loaded.mean_diameter),);
    let film = cx.r.law("h_out", "film asked for", &LEAST_FILM, with, |_| {
        least_film(size)
    });
    let says = format!(
        "film >= {} um at the outlet of the pad ({word})",
        shown(film.value)
    );
    (
        film,
        says,
        FILM_RULE.to_owned(),
        LEAST_FILM.source.to_owned(),
        Whose::Standard,
    )
}

/// Reads the pads; what is missing altogether is noted, and the floor is undecided.
pub(super) fn loaded<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &ThrustBearing,
) -> Option<Loaded> {
    let key = wanted("mean diameter", "D_m", "mean diameter of the pad ring");
    let mean_diameter = cx.take(part, key, b.mean_diameter.as_ref());
    let key = Wanted {
        how: "nameplate, or a stopwatch",
        ..wanted("speed", "omega", "speed of the collar")
    };
    let speed: Option<Known<AngularVelocity>> = cx.take(part, key, b.speed.as_ref());
    let key = wanted("pads", "z", "number of pads");
    if b.pads.is_none() {
        cx.missing(part, key, None);
    }
    let key = wanted("pad length", "B", "length of a pad along the motion");
    let length = cx.take(part, key, b.pad_length.as_ref());
    let (Some(mean_diameter), Some(speed), Some(length), Some(pads)) =
        (mean_diameter, speed, length, b.pads.as_ref())
    else {
        let because = "film: the mean diameter, the speed, the pads or their length are missing";
        cx.undecided(part, End::HotFloor, because);
        return None;
    };
    let pads = cx.r.given("z", "number of pads", pads);
    let times = |k: f64| Length::from_base(length.value.base() * k);
    let key = wanted("pad width", "L", "width of a pad across the motion");
    let why = "not stated; 0.7 to 1.3 times the length is common practice";
    let range = (times(0.7), times(1.3));
    let width = cx.or_plausible(part, key, b.pad_width.as_ref(), range, why);
    let load = load(cx, part, b, (length, width, pads));
    let ratio = ratio(cx, part, b);
    let with = (("omega", speed), ("D", mean_diameter));
    let says = "sliding speed at the mean diameter";
    let u = cx.r.law("U", says, &SURFACE_SPEED, with, |(n, d)| {
        surface_speed(n, d)
    });
    match Pad::new(length.value, width.value, load.value, u.value) {
        Ok(pad) => Some(Loaded {
            length,
            width,
            load,
            speed: u,
            ratio,
            mean_diameter,
            pads,
            pad,
        }),
        Err(refused) => {
            cx.undecided(part, End::HotFloor, &format!("film: {refused}"));
            None
        }
    }
}

/// Load on one pad.
fn load<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &ThrustBearing,
    (length, width, pads): (Known<Length>, Known<Length>, Known<Ratio>),
) -> Known<Force> {
    let area = length.value.base() * width.value.base() * pads.value.base();
    let range = (Force::from_base(area * 0.5e6), Force::from_base(area * 3e6));
    let key = Wanted {
        how: "thrust by the maker's data sheet, weight of the rotor where it stands upright",
        ..wanted("load", "F", "load on all pads together")
    };
    let why = "not stated; 0.5 to 3 MPa over the pads is common practice";
    let total = cx.or_plausible(part, key, b.load.as_ref(), range, why);
    let with = (("F", total), ("z", pads));
    cx.r.law("W", "load on one pad", &PAD_LOAD, with, |(f, z)| {
        Force::from_base(f.base() / z.base())
    })
}

/// Films at inlet and outlet: a tilting pad takes its own, and most pivots lie near the best; the
/// taper of a fixed one must be known.
fn ratio<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, b: &ThrustBearing) -> Known<Ratio> {
    let key = wanted("ratio", "m", "film at the inlet over film at the outlet");
    let fixed = b.kind.as_ref().is_some_and(|k| k.value == PadType::Fixed);
    if fixed {
        let why = "fixed pads, taper not stated; 1.5 to 4 is common practice";
        let range = (number(1.5), number(4.0));
        return cx.or_plausible(part, key, b.ratio.as_ref(), range, why);
    }
    let usual = Usual {
        value: number(2.2),
        lo: number(1.8),
        hi: number(3.0),
        why: "pivot not stated; pivots at 0.57 to 0.61 of the length are common practice",
    };
    cx.or_assume(part, key, b.ratio.as_ref(), usual)
}

/// The mean pressure, against what is usual.
fn pressure<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, loaded: &Loaded) {
    let with = (
        ("W", loaded.load),
        ("B", loaded.length),
        ("L", loaded.width),
    );
    let p =
        cx.r.law("p", "mean pressure of a pad", &PRESSURE, with, |_| {
            loaded.pad.mean_pressure()
        });
    let says = if p.value > mean_pressure() {
        "mean pressure, above the 40 bar that is usual at most (common practice)"
    } else {
        "mean pressure, within the 40 bar that is usual at most (common practice)"
    };
    cx.inform(part, says, Some((p.value.amount(), p.step)));
}

/// Temperature of the film at its limit: that of the oil around the pads and its own rise, where
/// no rise of the part is stated.
fn film_at<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    loaded: &Loaded,
    eta: Known<DynamicViscosity>,
) -> HotAt {
    let oil = cx.hot_at(part);
    if part.part_rise.is_some() {
        return oil;
    }
    let Ok(film) = loaded.pad.film(Shape::Ratio(loaded.ratio.value), eta.value) else {
        return oil;
    };
    let with = (
        ("eta", eta),
        ("W", loaded.load),
        ("U", loaded.speed),
        ("B", loaded.length),
        ("L", loaded.width),
        ("m", loaded.ratio),
    );
    let power: Known<Power> =
        cx.r.law("P_f", "friction power of the pad", &LAW, with, |_| {
            film.power
        });
    let says = "oil drawn under the pad";
    let flow: Known<VolumeRate> = cx.r.law("Q", says, &LAW, with, |_| film.flow);
    let says = "rise of the film over the oil around the pads";
    let with = (("P_f", power), ("Q", flow));
    let by = cx.r.law("Delta_T", says, &RISE, with, |_| rise(&film));
    oil.raised(cx.r, "temperature of the film at that limit", by)
}
