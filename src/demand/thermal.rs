//! Temperatures of a point as functions of the ambient: running, at a part, at start.

use super::inputs::{Inputs, Usual, Wanted};
use crate::model::{Lubrication, Point, Stated, Sump};
use crate::quantity::convert::kelvins;
use crate::quantity::{Measure, TemperatureInterval, ThermodynamicTemperature};
use crate::relation::sump;
use crate::trace::{Known, Recorder};

/// A temperature that depends on the ambient: `slope × ambient + offset`, never below `least`.
/// All in kelvins on the absolute scale.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct AtAmbient {
    /// 1 for a sump that follows the ambient, 0 for a controlled one.
    pub slope: f64,
    /// K.
    pub offset: f64,
    /// K; minus infinity where nothing holds it up.
    pub least: f64,
}

impl AtAmbient {
    /// The ambient itself.
    pub const AMBIENT: Self = Self {
        slope: 1.0,
        offset: 0.0,
        least: f64::NEG_INFINITY,
    };

    /// Nobody knows.
    pub const UNKNOWN: Self = Self {
        slope: 0.0,
        offset: f64::NAN,
        least: f64::NEG_INFINITY,
    };

    /// Whether nobody knows.
    pub fn is_unknown(self) -> bool {
        self.offset.is_nan()
    }

    /// Always the same.
    pub fn held(t: f64) -> Self {
        Self {
            slope: 0.0,
            offset: t,
            least: f64::NEG_INFINITY,
        }
    }

    /// The temperature at an ambient, K.
    pub fn at(self, ambient: f64) -> f64 {
        (self.slope * ambient + self.offset).max(self.least)
    }

    /// Raised by so many kelvins.
    #[must_use]
    pub fn raised(self, by: f64) -> Self {
        Self {
            offset: self.offset + by,
            least: self.least + by,
            ..self
        }
    }
}

/// The temperatures of a point.
#[derive(Clone, Copy, Debug)]
pub struct Thermal {
    /// Coldest and hottest ambient.
    pub ambient: Option<(
        Known<ThermodynamicTemperature>,
        Known<ThermodynamicTemperature>,
    )>,
    /// Running temperature of the sump.
    pub running: Option<AtAmbient>,
    /// Running temperature at the hottest ambient.
    pub hottest: Option<Known<ThermodynamicTemperature>>,
    /// Running temperature at the coldest ambient.
    pub coldest: Option<Known<ThermodynamicTemperature>>,
    /// Oil temperature at start.
    pub start: Option<AtAmbient>,
    /// Oil temperature at the coldest start.
    pub start_coldest: Option<Known<ThermodynamicTemperature>>,
}

const AMBIENT_HOW: &str = "site record or weather record, coldest and hottest in the place";
const SUMP_HOW: &str = "one reading of the sump with the ambient beside it, at running load";

/// Works the temperatures out.
pub fn thermal<R: Recorder>(r: &mut R, inputs: &mut Inputs<'_>, point: &Point) -> Thermal {
    r.about(|| None);
    let ambient = ambient(r, inputs, point);
    let running = running(r, inputs, point, ambient);
    let (start, start_coldest) = start(r, inputs, point, ambient);
    Thermal {
        ambient,
        running: running.map(|(curve, _, _)| curve),
        coldest: running.and_then(|(_, cold, _)| cold),
        hottest: running.and_then(|(_, _, hot)| hot),
        start,
        start_coldest,
    }
}

type Temperature = Known<ThermodynamicTemperature>;

fn ambient<R: Recorder>(
    r: &mut R,
    inputs: &mut Inputs<'_>,
    point: &Point,
) -> Option<(Temperature, Temperature)> {
    let wanted = Wanted {
        key: "ambient",
        about: None,
        symbol: "t_amb",
        says: "ambient",
        how: AMBIENT_HOW,
    };
    match &point.ambient {
        Some(Stated::Known(range, _)) => {
            let end = |value| {
                crate::source::place::Given::new(value, range.written.clone(), range.origin.clone())
            };
            let ends = (
                read("coldest ambient", "t_amb_cold", "coldest ambient"),
                read("hottest ambient", "t_amb_hot", "hottest ambient"),
            );
            let cold = inputs.read(r, ends.0, &end(range.value.lo));
            let hot = inputs.read(r, ends.1, &end(range.value.hi));
            Some((cold, hot))
        }
        Some(other) => {
            inputs.missing(
                wanted,
                other.ask().map(str::to_owned),
                Some(other.origin().clone()),
            );
            None
        }
        None => {
            inputs.missing(wanted, None, None);
            None
        }
    }
}

/// Running temperature as a function of ambient, and at the coldest and hottest ambient.
fn running<R: Recorder>(
    r: &mut R,
    inputs: &mut Inputs<'_>,
    point: &Point,
    ambient: Option<(Temperature, Temperature)>,
) -> Option<(AtAmbient, Option<Temperature>, Option<Temperature>)> {
    let rise = match &point.sump {
        Some(Sump::Held(stated)) => {
            let held = inputs.take(r, wanted_sump("sump"), Some(stated))?;
            return Some((AtAmbient::held(held.value.base()), Some(held), Some(held)));
        }
        Some(Sump::Across(range)) => return Some(across(r, inputs, ambient, range)),
        Some(Sump::Rise(stated)) => stated_rise(r, inputs, point, stated),
        Some(Sump::Reading {
            sump: read,
            ambient: taken,
        }) => {
            let sump = self::read("sump", "t_sump", "sump, as read");
            let at = self::read("at ambient", "t_amb", "ambient at the reading");
            let read = inputs.read(r, sump, read);
            let taken = inputs.read(r, at, taken);
            r.law(
                "Delta_t",
                "rise over ambient",
                &sump::RISE,
                (("t_sump", read), ("t_amb", taken)),
                |(s, a)| sump::rise_of_reading(s, a),
            )
        }
        None => plausible_rise(r, inputs, point),
    };
    let curve = AtAmbient {
        offset: rise.value.base(),
        ..AtAmbient::AMBIENT
    };
    let at = |r: &mut R, ambient: Temperature, says| {
        r.law(
            "t",
            says,
            &sump::RUNNING,
            (("t_amb", ambient), ("Delta_t", rise)),
            |(a, d)| sump::running(a, d),
        )
    };
    let cold = ambient.map(|(cold, _)| at(r, cold, "running temperature at the coldest ambient"));
    let hot = ambient.map(|(_, hot)| at(r, hot, "running temperature at the hottest ambient"));
    Some((curve, cold, hot))
}

/// A temperature of the point that is read as such.
fn read(key: &'static str, symbol: &'static str, says: &'static str) -> Wanted<'static> {
    Wanted {
        key,
        about: None,
        symbol,
        says,
        how: SUMP_HOW,
    }
}

fn wanted_sump(key: &'static str) -> Wanted<'static> {
    Wanted {
        key,
        about: None,
        symbol: if key == "sump" { "t" } else { "Delta_t" },
        says: if key == "sump" {
            "running temperature"
        } else {
            "rise over ambient"
        },
        how: SUMP_HOW,
    }
}

fn stated_rise<R: Recorder>(
    r: &mut R,
    inputs: &mut Inputs<'_>,
    point: &Point,
    stated: &Stated<TemperatureInterval>,
) -> Known<TemperatureInterval> {
    match stated {
        Stated::Unknown(..) => plausible_rise(r, inputs, point),
        _ => inputs
            .take(r, wanted_sump("sump rise"), Some(stated))
            .expect("a stated value or a range always gives a number"),
    }
}

fn plausible_rise<R: Recorder>(
    r: &mut R,
    inputs: &mut Inputs<'_>,
    point: &Point,
) -> Known<TemperatureInterval> {
    let (lo, hi) = usual_rise(point.lubrication.as_ref().map(|l| l.value));
    inputs.plausible(
        r,
        wanted_sump("sump rise"),
        (kelvins(lo), kelvins(hi)),
        "not stated; plausible for this kind of lubrication, common practice",
    )
}

/// Rise over ambient that such lubrication usually shows, K. Common practice, wide.
fn usual_rise(lubrication: Option<Lubrication>) -> (f64, f64) {
    match lubrication {
        Some(Lubrication::Splash | Lubrication::Flooded) => (20.0, 50.0),
        Some(Lubrication::Bath | Lubrication::Ring | Lubrication::Reservoir) => (15.0, 45.0),
        Some(Lubrication::Circulated | Lubrication::PressureFed) => (10.0, 35.0),
        Some(Lubrication::Grease) => (10.0, 50.0),
        _ => (10.0, 50.0),
    }
}

fn across<R: Recorder>(
    r: &mut R,
    inputs: &mut Inputs<'_>,
    ambient: Option<(Temperature, Temperature)>,
    range: &crate::source::place::Given<crate::model::Between<ThermodynamicTemperature>>,
) -> (AtAmbient, Option<Temperature>, Option<Temperature>) {
    let end = |value| {
        crate::source::place::Given::new(value, range.written.clone(), range.origin.clone())
    };
    let cold = read(
        "sump, coldest ambient",
        "t_cold",
        "running temperature at the coldest ambient",
    );
    let hot = read(
        "sump, hottest ambient",
        "t_hot",
        "running temperature at the hottest ambient",
    );
    let t_cold = inputs.read(r, cold, &end(range.value.lo));
    let t_hot = inputs.read(r, hot, &end(range.value.hi));
    let curve = match ambient {
        Some((a, b)) if b.value.base() > a.value.base() => {
            let slope =
                (t_hot.value.base() - t_cold.value.base()) / (b.value.base() - a.value.base());
            AtAmbient {
                slope,
                offset: t_cold.value.base() - slope * a.value.base(),
                least: f64::NEG_INFINITY,
            }
        }
        _ => AtAmbient::held(t_hot.value.base().max(t_cold.value.base())),
    };
    (curve, Some(t_cold), Some(t_hot))
}

/// Oil temperature at start: the coldest ambient, `start`, or the heater, whichever is warmest.
fn start<R: Recorder>(
    r: &mut R,
    inputs: &mut Inputs<'_>,
    point: &Point,
    ambient: Option<(Temperature, Temperature)>,
) -> (Option<AtAmbient>, Option<Temperature>) {
    let stated = inputs.maybe(r, wanted_start("start"), point.start.as_ref());
    let heater = inputs.maybe(r, wanted_start("heater"), point.heater.as_ref());
    let least = [stated, heater]
        .into_iter()
        .flatten()
        .map(|k| k.value.base())
        .fold(f64::NEG_INFINITY, f64::max);
    let candidates = [ambient.map(|(cold, _)| cold), stated, heater];
    let warmest = candidates
        .into_iter()
        .flatten()
        .max_by(|a, b| a.value.base().total_cmp(&b.value.base()));
    let curve = (ambient.is_some() || least.is_finite()).then_some(AtAmbient {
        least,
        ..AtAmbient::AMBIENT
    });
    (curve, warmest)
}

fn wanted_start(key: &'static str) -> Wanted<'static> {
    Wanted {
        key,
        about: None,
        symbol: "t_start",
        says: if key == "start" {
            "oil temperature at start"
        } else {
            "heater setting"
        },
        how: "thermometer in the sump before the coldest start",
    }
}

/// A usual value of a temperature difference, with its plausible range.
pub(super) fn usual_kelvins(
    value: f64,
    lo: f64,
    hi: f64,
    why: &'static str,
) -> Usual<TemperatureInterval> {
    Usual {
        value: kelvins(value),
        lo: kelvins(lo),
        hi: kelvins(hi),
        why,
    }
}
