//! Sizes and duty of a journal bearing, as far as they are known.

use super::wanted;
use crate::demand::End;
use crate::demand::context::Context;
use crate::model::part::{JournalBearing, Part};
use crate::quantity::{AngularVelocity, Force, Length, Measure, Pressure, Velocity};
use crate::relation::journal::feed::Feed;
use crate::relation::journal::film::Bearing;
use crate::relation::journal::limits::clearance::usual;
use crate::relation::journal::{Duty, Geometry, NoFilm, Route, SPECIFIC_LOAD, SURFACE_SPEED};
use crate::trace::{Known, Recorder, StepId};

/// A bearing with its duty.
#[derive(Clone, Copy)]
pub(in crate::demand) struct Shape {
    pub(in crate::demand) diameter: Known<Length>,
    pub(in crate::demand) width: Known<Length>,
    pub(in crate::demand) clearance: Known<Length>,
    pub(in crate::demand) load: Known<Force>,
    pub(in crate::demand) speed: Known<AngularVelocity>,
    /// Speed of the journal surface.
    pub(in crate::demand) surface: Known<Velocity>,
    /// Load over the projected area.
    pub(in crate::demand) pressure: Known<Pressure>,
    /// By the Reynolds solution.
    pub(in crate::demand) bearing: Bearing,
    /// Oil that the feed pressure presses through, where pressure and hole are stated.
    pushed: Option<Pushed>,
}

/// Feed pressure, diameter of the hole, and the flow they give.
type Pushed = (Known<Pressure>, Known<Length>, Feed);

/// What goes into every relation of the film, with its symbols.
pub(in crate::demand) type Sized = (
    (&'static str, Known<Force>),
    (&'static str, Known<Length>),
    (&'static str, Known<Length>),
    (&'static str, Known<Length>),
    (&'static str, Known<AngularVelocity>),
);

impl Shape {
    /// Load, diameter, width, clearance, speed.
    pub(in crate::demand) fn sized(&self) -> Sized {
        (
            ("F", self.load),
            ("D", self.diameter),
            ("B", self.width),
            ("c", self.clearance),
            ("omega", self.speed),
        )
    }

    /// How the oil gets in.
    pub(in crate::demand) fn feed(&self) -> Feed {
        self.pushed.map_or(Feed::Drawn, |(_, _, feed)| feed)
    }

    /// Steps of feed pressure and hole.
    pub(in crate::demand) fn pushed_steps(&self) -> Vec<(&'static str, StepId)> {
        let steps = |(p, d, _): Pushed| vec![("p_en", p.step), ("d_H", d.step)];
        self.pushed.map_or(Vec::new(), steps)
    }

    pub(in crate::demand) fn geometry(&self) -> Geometry {
        *self.bearing.geometry()
    }

    pub(in crate::demand) fn duty(&self) -> Duty {
        *self.bearing.duty()
    }
}

/// Width over diameter where nobody states the width. Common practice.
const WIDTH_RATIOS: (f64, f64) = (0.5, 1.0);
/// Clearance over Vogelpohl's where nobody states it: about a step of the standard either way.
const CLEARANCES: (f64, f64) = (0.7, 1.4);
/// Specific load where nobody states the load, Pa. Common practice for machines in general.
const PRESSURES: (f64, f64) = (0.5e6, 2.5e6);

const DRAWING: &str = "bearing drawing, or a rule and a feeler gauge at the next overhaul";

/// Reads the bearing; what is missing altogether is noted, and the floor is undecided.
pub(in crate::demand) fn shape<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
) -> Option<Shape> {
    let key = wanted("diameter", "D", "diameter of the shaft", DRAWING);
    let diameter = cx.take(part, key, b.diameter.as_ref());
    let how = "nameplate, or a stopwatch";
    let key = wanted("speed", "omega", "speed of the shaft", how);
    let speed = cx.take(part, key, b.speed.as_ref());
    let (Some(diameter), Some(speed)) = (diameter, speed) else {
        let because = "film: the diameter or the speed is missing";
        cx.undecided(part, End::HotFloor, because);
        return None;
    };
    let times = |k: f64| Length::from_base(diameter.value.base() * k);
    let key = wanted("width", "B", "width of the bearing", DRAWING);
    let range = (times(WIDTH_RATIOS.0), times(WIDTH_RATIOS.1));
    let why = "not stated; half to all of the diameter is common practice";
    let width = cx.or_plausible(part, key, b.width.as_ref(), range, why);
    let surface = cx.r.law(
        "U",
        "speed of the journal surface",
        &SURFACE_SPEED,
        (("omega", speed), ("D", diameter)),
        |(n, d)| crate::quantity::convert::surface_speed(n, d),
    );
    let clearance = clearance(cx, part, b, diameter, surface);
    let load = load(cx, part, b, (diameter, width));
    let found = bearing(diameter, width, clearance, load, speed);
    match found {
        Ok(bearing) => {
            let with = (("F", load), ("D", diameter), ("B", width));
            let duty = *bearing.duty();
            let geometry = *bearing.geometry();
            let says = "specific load";
            let pressure = cx.r.law("P", says, &SPECIFIC_LOAD, with, |_| {
                duty.specific_load(&geometry)
            });
            let pushed = pushed(cx, part, b, &geometry);
            Some(Shape {
                diameter,
                width,
                clearance,
                load,
                speed,
                surface,
                pressure,
                bearing,
                pushed,
            })
        }
        Err(refused) => {
            cx.undecided(part, End::HotFloor, &format!("film: {refused}"));
            None
        }
    }
}

/// Oil pressed through by the feed. Without the hole the pressure says nothing of the flow, and
/// the film is taken as cooled by what it draws in alone, which is the warmer.
fn pushed<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
    geometry: &Geometry,
) -> Option<Pushed> {
    let key = wanted(
        "feed pressure",
        "p_en",
        "feed pressure",
        "gauge at the bearing",
    );
    let pressure: Known<Pressure> = cx.maybe(part, key, b.feed_pressure.as_ref())?;
    let key = wanted("feed hole", "d_H", "diameter of the feed hole", DRAWING);
    let hole: Option<Known<Length>> = cx.maybe(part, key, b.feed_hole.as_ref());
    let Some(hole) = hole else {
        let says = "the oil that the feed pressure presses through is not counted, as the \
                    diameter of the feed hole is not stated: the film runs cooler than shown";
        cx.inform(part, says, None);
        return None;
    };
    match Feed::hole(geometry, pressure.value, hole.value) {
        Ok(feed) => Some((pressure, hole, feed)),
        Err(refused) => {
            cx.inform(part, format!("feed hole not counted: {refused}"), None);
            None
        }
    }
}

fn clearance<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
    diameter: Known<Length>,
    surface: Known<Velocity>,
) -> Known<Length> {
    let radius = diameter.value.base() / 2.0;
    let middle = usual(surface.value).base() * radius;
    let range = (
        Length::from_base(middle * CLEARANCES.0),
        Length::from_base(middle * CLEARANCES.1),
    );
    let how = "drawing, lead wire or dial gauge; half the difference of bore and shaft";
    let key = wanted("radial clearance", "c", "radial clearance", how);
    let why = "not stated; 0.7 to 1.4 times 0.0008 U^(1/4) R, common practice";
    cx.or_plausible(part, key, b.radial_clearance.as_ref(), range, why)
}

fn load<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
    (diameter, width): (Known<Length>, Known<Length>),
) -> Known<Force> {
    let area = diameter.value.base() * width.value.base();
    let range = (
        Force::from_base(area * PRESSURES.0),
        Force::from_base(area * PRESSURES.1),
    );
    let how = "weight of the rotor, belt or gear force by the maker's drawing";
    let key = wanted("load", "F", "radial load", how);
    let why = "not stated; 0.5 to 2.5 MPa over the projected area is common practice";
    cx.or_plausible(part, key, b.load.as_ref(), range, why)
}

fn bearing(
    diameter: Known<Length>,
    width: Known<Length>,
    clearance: Known<Length>,
    load: Known<Force>,
    speed: Known<AngularVelocity>,
) -> Result<Bearing, NoFilm> {
    let geometry = Geometry::new(diameter.value, width.value, clearance.value)?;
    let duty = Duty::new(load.value, speed.value)?;
    Bearing::new(geometry, duty, Route::Reynolds)
}

/// Whether the short-bearing form stands behind the numbers, in words.
pub(in crate::demand) fn note_short<R: Recorder>(cx: &mut Context<'_, '_, R>, shape: &Shape) {
    let ratio = shape.geometry().width_ratio();
    if shape.bearing.is_short() {
        cx.r.note(|| {
            format!(
                "width over diameter {:.2}, below 0.25: short-bearing form with an end \
                 correction",
                ratio.base()
            )
        });
    }
}
