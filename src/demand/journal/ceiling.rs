//! Too thick an oil is also a fault: the film gets too hot, or the shaft rides near the middle.

use super::shape::Shape;
use super::warm::{self, Cooled, Oil};
use super::{TEMPERATURE_RULE, WHIRL_RULE, dynamic, wanted};
use crate::demand::context::Context;
use crate::demand::thermal::AtAmbient;
use crate::demand::{Demand, End, Standing};
use crate::model::part::{JournalBearing, Part};
use crate::model::{Fill, Stated};
use crate::numeric::math::ln;
use crate::quantity::convert::{rise, to_celsius};
use crate::quantity::{
    Area, DynamicViscosity, HeatTransfer, Measure, Power, TemperatureInterval,
    ThermodynamicTemperature,
};
use crate::relation::Law;
use crate::relation::heat::balance::conductance;
use crate::relation::journal::Route;
use crate::relation::journal::feed::{Coolant, Feed};
use crate::relation::journal::film::Bearing;
use crate::relation::journal::heat::still_air;
use crate::relation::journal::limits::temperature::{LAW as LIMIT, Supply, permissible};
use crate::relation::journal::limits::whirl;
use crate::relation::journal::warming::{
    THICKEST, THICKEST_IN_AIR, for_power, for_rise, rise_at, thinnest,
};
use crate::trace::{Known, Recorder};

/// Temperature of the film where the oil leaves at its largest.
static HALF_WAY: Law = Law {
    name: "journal-film-half-way",
    title: "temperature of the film of a journal bearing from feed and outlet",
    formula: "T_eff = (T_in + T_lim)/2",
    range: "steady running, the oil carries the heat",
    source: "ISO 7902-1 (from memory)",
};

/// A largest temperature at feeds that follow the ambient.
#[derive(Clone, Debug, PartialEq)]
pub struct HeatCeiling {
    bearing: Bearing,
    feed: Feed,
    inlet: AtAmbient,
    limit: ThermodynamicTemperature,
    /// Ambient the figure is worked out at, K.
    pub ambient: f64,
}

impl HeatCeiling {
    /// Positive where an oil keeps the bearing under its largest temperature at an ambient,
    /// negative where it does not.
    pub fn excess(
        &self,
        ambient: f64,
        eta: impl Fn(ThermodynamicTemperature) -> DynamicViscosity,
    ) -> f64 {
        let inlet = ThermodynamicTemperature::from_base(self.inlet.at(ambient));
        let room = rise(self.limit, inlet).base() / 2.0;
        if room <= 0.0 {
            return -1.0;
        }
        // half way between feed and limit the film rises by less than the way there just where
        // the settled bearing leaves cooler than the limit
        let fed = (&self.feed, Coolant::iso7902());
        let there = eta(half_way(inlet, self.limit));
        let found = rise_at(&self.bearing, there, fed)
            .or_else(|_| rise_at(&self.bearing, thinnest(&self.bearing), fed));
        found.map_or(1.0, |rise| ln(room / rise.base()))
    }
}

fn half_way(
    inlet: ThermodynamicTemperature,
    limit: ThermodynamicTemperature,
) -> ThermodynamicTemperature {
    ThermodynamicTemperature::from_base(f64::midpoint(inlet.base(), limit.base()))
}

/// Surface speed from which on a shaft is taken as fast, m/s. Common practice.
const FAST: f64 = 10.0;
/// Specific load under which a shaft is taken as light, Pa. Common practice.
const LIGHT: f64 = 1e6;

/// Adds the viscosity above which the shaft rides closer to the middle than is quiet.
pub(super) fn whirl<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    shape: &Shape,
    oil: Oil,
) {
    let (f, d, b, c, n) = shape.sized();
    let (geometry, duty) = (shape.geometry(), shape.duty());
    let says = "viscosity at which the eccentricity falls to 0.5";
    let found =
        cx.r.attempt("eta_w", says, &whirl::LAW, (f, d, b, c, n), |_| {
            whirl::thickest(geometry, duty, Route::Reynolds)
        });
    let Ok(eta) = found else { return };
    let at = warm::film_at(cx, shape, oil, eta);
    let blank = cx.blank_at(Some(part.label.clone()), at.at, at.coldest.map(|k| k.step));
    let at_risk = shape.surface.value.base() > FAST && shape.pressure.value.base() < LIGHT;
    cx.push(Demand {
        says: "eccentricity at least 0.5, against whirl of a light, fast shaft".to_owned(),
        source: "common practice".to_owned(),
        standing: if at_risk {
            Standing::Judges
        } else {
            Standing::Condition
        },
        ..dynamic(End::RunningCeiling, eta, WHIRL_RULE, blank)
    });
}

/// Adds the viscosity above which the bearing gets hotter than it may.
pub(super) fn temperature<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
    shape: &Shape,
    oil: Oil,
) {
    if oil.risen {
        return;
    }
    if oil.cooled == Cooled::ByHousing {
        by_housing(cx, part, b, shape);
        return;
    }
    // a feed that follows the ambient is judged at both ends: fed cold the oil is thick
    let follows = oil.at.at.is_some_and(|at| at.slope != 0.0);
    let ambient = cx.thermal.ambient.map(|(c, h)| (c.value, h.value));
    let hot = (oil.at.hottest, ambient.map(|a| a.1), "hottest");
    let cold = (oil.at.coldest, ambient.map(|a| a.0), "coldest");
    for (inlet, ambient, word) in [hot, cold].into_iter().take(1 + usize::from(follows)) {
        if let Some(inlet) = inlet {
            let feed = Fed {
                at: oil.at.at.filter(|_| follows).zip(ambient),
                inlet,
                word,
            };
            by_oil(cx, part, shape, feed);
        }
    }
}

/// The oil fed at one end of the ambient range.
struct Fed {
    /// As a function of ambient, where it follows it, with the ambient of that end.
    at: Option<(AtAmbient, ThermodynamicTemperature)>,
    inlet: Known<ThermodynamicTemperature>,
    word: &'static str,
}

fn by_oil<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, shape: &Shape, fed: Fed) {
    let inlet = fed.inlet;
    let limit = limit(cx, supply(cx, shape));
    let feed = shape.feed();
    let carried = (&feed, Coolant::iso7902());
    let room = TemperatureInterval::from_base(rise(limit.value, inlet.value).base() / 2.0);
    let least = rise_at(&shape.bearing, thinnest(&shape.bearing), carried);
    if least.is_ok_and(|least| least.base() >= room.base()) {
        let because = format!(
            "fed at {:.0} degC it leaves hotter than {:.0} degC with the thinnest full film",
            to_celsius(inlet.value),
            to_celsius(limit.value)
        );
        cx.undecided(part, End::RunningCeiling, &because);
        return;
    }
    let Some(found) = for_rise(&shape.bearing, room, carried) else {
        return; // no oil is thick enough for it
    };
    let (f, d, b, c, n) = shape.sized();
    let with = (f, d, b, c, n, ("T_in", inlet), ("T_lim", limit));
    let says = "viscosity at which it leaves at its largest temperature";
    let eta = cx.r.law("eta_max", says, &THICKEST, with, |_| found);
    let with = (("T_in", inlet), ("T_lim", limit));
    let says = "temperature of the film then";
    let there =
        cx.r.law("T_eff", says, &HALF_WAY, with, |(i, l)| half_way(i, l));
    let heat = fed.at.map(|(inlet, ambient)| {
        Box::new(HeatCeiling {
            bearing: shape.bearing,
            feed,
            inlet,
            limit: limit.value,
            ambient: ambient.base(),
        })
    });
    push(
        cx,
        part,
        (eta, there, limit),
        (Standing::Judges, fed.word),
        heat,
    );
}

/// The viscosity, the temperature of the film then, and the largest temperature.
type Ceiling = (
    Known<DynamicViscosity>,
    Known<ThermodynamicTemperature>,
    Known<ThermodynamicTemperature>,
);

fn push<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    (eta, there, limit): Ceiling,
    (standing, word): (Standing, &str),
    heat: Option<Box<HeatCeiling>>,
) {
    let at = Some(AtAmbient::held(there.value.base()));
    let blank = cx.blank_at(Some(part.label.clone()), at, Some(there.step));
    cx.push(Demand {
        says: format!(
            "bearing at most {:.0} degC at the {word} ambient",
            to_celsius(limit.value)
        ),
        source: "after ISO 7902-3 (from memory, unsure)".to_owned(),
        standing,
        heat,
        ..dynamic(End::RunningCeiling, eta, TEMPERATURE_RULE, blank)
    });
}

fn limit<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    supply: Supply,
) -> Known<ThermodynamicTemperature> {
    let (general, _) = permissible(supply);
    let known =
        cx.r.assume("T_lim", "largest temperature", general, LIMIT.source);
    cx.r.note(|| LIMIT.range.to_owned());
    known
}

/// More than five minutes' flow in the fill gives the oil its rest. The flow is that of the
/// thinnest full film, the largest there is.
fn supply<R: Recorder>(cx: &Context<'_, '_, R>, shape: &Shape) -> Supply {
    let Some(Stated::Known(fill, _)) = &cx.point.fill else {
        return Supply::Short;
    };
    let Fill::Oil(volume) = fill.value else {
        return Supply::Short;
    };
    let film = shape.bearing.film(thinnest(&shape.bearing));
    let flow = film.map_or(f64::INFINITY, |f| f.side_flow.base());
    let bearings = cx.point.parts.len().max(1) as f64;
    if volume.base() > 300.0 * flow * bearings {
        Supply::Ample
    } else {
        Supply::Short
    }
}

/// Cooled by its housing: a figure for information, since nobody measured what the housing gives
/// off; where there is a reading the losses of the point are calibrated on it.
fn by_housing<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
    shape: &Shape,
) {
    let losses = cx.point.losses.clone().unwrap_or_default();
    let how = "drawing, or the outside of the housing with a rule";
    let key = wanted("casing area", "A", "surface that gives off heat", how);
    let stated = b.casing_area.as_ref().or(losses.casing_area.as_ref());
    let area: Option<Known<Area>> = cx.maybe(part, key, stated);
    let ambient = cx.thermal.ambient.map(|(_, hot)| hot);
    let (Some(area), Some(ambient)) = (area, ambient) else {
        return;
    };
    let how = "ISO 7902-1: 15 to 20 in still air, more where a fan blows";
    let key = wanted("heat transfer", "k", "heat transfer to the air", how);
    let stated: Option<Known<HeatTransfer>> = cx.maybe(part, key, losses.heat_transfer.as_ref());
    let why = "the lower end of 15 to 20 W/(m2.K) in still air, ISO 7902-1 (from memory)";
    let transfer = stated.unwrap_or_else(|| {
        cx.r.assume("k", "heat transfer to the air", still_air(), why)
    });
    let limit = limit(cx, Supply::Short);
    let given_off = conductance(transfer.value, area.value).base();
    let room = given_off * rise(limit.value, ambient.value).base();
    let Some(found) = (room > 0.0)
        .then(|| for_power(&shape.bearing, Power::from_base(room)))
        .flatten()
    else {
        return;
    };
    let (f, d, w, c, n) = shape.sized();
    let with = (
        f,
        d,
        w,
        c,
        n,
        ("A", area),
        ("k", transfer),
        ("T_amb", ambient),
        ("T_lim", limit),
    );
    let says = "viscosity at which it reaches its largest temperature";
    let eta = cx.r.law("eta_max", says, &THICKEST_IN_AIR, with, |_| found);
    push(
        cx,
        part,
        (eta, limit, limit),
        (Standing::Information, "hottest"),
        None,
    );
}
