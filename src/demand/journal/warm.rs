//! How warm the film of a journal bearing is: the oil that reaches it, and its own rise.

use super::shape::Shape;
use super::wanted;
use crate::demand::context::{Context, HotAt};
use crate::demand::losses::With;
use crate::demand::thermal::AtAmbient;
use crate::model::Lubrication;
use crate::model::part::{Feed, JournalBearing, Part};
use crate::quantity::{
    DynamicViscosity, Measure, Power, TemperatureInterval, ThermodynamicTemperature, VolumeRate,
};
use crate::relation::journal::feed::{Coolant, LAW as HOLE};
use crate::relation::journal::film::{self, POWER, SIDE_FLOW};
use crate::relation::journal::warming::{self, RISE};
use crate::trace::{Known, Recorder};

/// What takes the heat of the film away.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(in crate::demand) enum Cooled {
    /// The oil fed.
    ByOil,
    /// The housing, which is as warm as its sump.
    ByHousing,
}

/// The oil that reaches the film.
#[derive(Clone, Copy)]
pub(in crate::demand) struct Oil {
    /// Its temperature; that of the film, where the rise of the part is stated.
    pub(in crate::demand) at: HotAt,
    /// Whether the rise of the part is stated and already in it.
    pub(in crate::demand) risen: bool,
    /// What cools the film.
    pub(in crate::demand) cooled: Cooled,
}

const FEED_HOW: &str = "look at the bearing: supply line, ring, or dipping";

/// Reads how the oil gets in and how warm it is there.
pub(in crate::demand) fn oil<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
) -> Oil {
    let how = "thermometer in the supply line of the bearing";
    let key = wanted(
        "feed temperature",
        "T_in",
        "temperature of the oil fed",
        how,
    );
    let fed: Option<Known<ThermodynamicTemperature>> =
        cx.maybe(part, key, b.feed_temperature.as_ref());
    let at = match fed {
        Some(fed) => {
            let held = HotAt {
                at: Some(AtAmbient::held(fed.value.base())),
                hottest: Some(fed),
                coldest: Some(fed),
            };
            cx.raised(part, held)
        }
        None => cx.hot_at(part),
    };
    Oil {
        at,
        risen: part.part_rise.is_some(),
        cooled: cooled(cx, part, b, fed.is_some()),
    }
}

/// By the feed stated; by the lubrication of the point where none is. Where neither is known the
/// film is taken as fed, which is the warmer.
fn cooled<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
    fed: bool,
) -> Cooled {
    match b.feed.as_ref().map(|f| f.value) {
        Some(Feed::Pressure) => return Cooled::ByOil,
        Some(Feed::Ring | Feed::Bath) => return Cooled::ByHousing,
        None => {}
    }
    match cx.lubrication() {
        Some(Lubrication::Ring | Lubrication::Bath | Lubrication::Wick) if !fed => {
            Cooled::ByHousing
        }
        Some(Lubrication::Circulated | Lubrication::PressureFed | Lubrication::Gravity) => {
            Cooled::ByOil
        }
        _ => {
            if !fed {
                cx.fact_missing(part, "feed", FEED_HOW);
            }
            Cooled::ByOil
        }
    }
}

/// Temperature of a film of that viscosity. Without a film there is no rise.
pub(super) fn film_at<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    shape: &Shape,
    oil: Oil,
    eta: Known<DynamicViscosity>,
) -> HotAt {
    if oil.risen || oil.cooled == Cooled::ByHousing {
        return oil.at;
    }
    match rise(cx, shape, eta) {
        Some(rise) => oil
            .at
            .raised(cx.r, "temperature of the film at that limit", rise),
        None => oil.at,
    }
}

/// Rise of the film over the oil fed at that viscosity.
fn rise<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    shape: &Shape,
    eta: Known<DynamicViscosity>,
) -> Option<Known<TemperatureInterval>> {
    let film = shape.bearing.film(eta.value).ok()?;
    let (f, d, b, c, n) = shape.sized();
    let with = (f, d, b, c, n, ("eta", eta));
    let says = "friction power at that viscosity";
    let power: Known<Power> = cx.r.law("P_f", says, &POWER, with, |_| film.power);
    let says = "oil lost at the edges at that viscosity";
    let flow: Known<VolumeRate> = cx.r.law("Q3", says, &SIDE_FLOW, with, |_| film.side_flow);
    cx.r.note(|| film::LAW.source.to_owned());
    let says = "rise of the film over the oil fed";
    let carried = |q: f64, besides: f64, p: Power| {
        warming::rise(p, VolumeRate::from_base(q + besides), Coolant::iso7902())
    };
    let steps = shape.pushed_steps();
    if steps.is_empty() {
        let with = (("P_f", power), ("Q3", flow));
        let rise = |(p, q): (Power, VolumeRate)| carried(q.base(), 0.0, p);
        return Some(cx.r.law("Delta_T", says, &RISE, with, rise));
    }
    let besides = shape
        .feed()
        .flow(&shape.geometry(), eta.value, film.eccentricity);
    let pressed = "oil pressed through by the feed at that viscosity";
    let besides: Known<VolumeRate> = cx.r.law("Q_p", pressed, &HOLE, With(steps), |()| besides);
    let with = (("P_f", power), ("Q3", flow), ("Q_p", besides));
    let rise = |(p, q, b): (Power, VolumeRate, VolumeRate)| carried(q.base(), b.base(), p);
    Some(cx.r.law("Delta_T", says, &RISE, with, rise))
}
