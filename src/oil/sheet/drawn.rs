//! Lines of an oil for the figure: what each is, and where it is carried beyond what is known.

use super::teller::Teller;
use crate::oil::curve::Curve;
use crate::quantity::convert::{celsius, to_celsius};
use crate::quantity::{KinematicViscosity, ThermodynamicTemperature};
use crate::relation::oil::viscosity_temperature::ViscosityCurve;

/// What a line stands for.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum LineOf {
    /// New oil, by its points.
    New,
    /// New oil, through viscosities measured cold.
    Cold,
    /// Thin end or limit of the new oil.
    Thin,
    /// Thick end or limit of the new oil.
    Thick,
    /// Worn, at the least loss where the loss is not known.
    WornLeast,
    /// Worn, at the greatest loss.
    Worn,
    /// Base oil, thinner estimate.
    BaseThin,
    /// Base oil, thicker estimate; left out where the base is stated.
    BaseThick,
    /// By base and polymer, thinner base: how the oil runs outside the polymer's window.
    ByParts,
}

impl LineOf {
    /// In words.
    pub fn word(self) -> &'static str {
        match self {
            Self::New => "new",
            Self::Cold => "new, measured cold",
            Self::Thin => "thin end",
            Self::Thick => "thick end",
            Self::WornLeast => "worn, least loss",
            Self::Worn => "worn",
            Self::BaseThin => "base oil, thinner estimate",
            Self::BaseThick => "base oil, thicker estimate",
            Self::ByParts => "by base oil and polymer",
        }
    }
}

/// One reading of a line.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Reading {
    /// Temperature.
    pub at: ThermodynamicTemperature,
    /// Viscosity.
    pub nu: KinematicViscosity,
    /// Whether it lies outside what is stated or measured.
    pub extrapolated: bool,
}

/// One line of the figure, cold to hot.
#[derive(Clone, Debug, PartialEq)]
pub struct DrawnLine {
    /// What it is.
    pub of: LineOf,
    /// Its readings.
    pub readings: Vec<Reading>,
}

/// Hottest temperature drawn, °C.
const TO_C: f64 = 120.0;
/// Step of the readings, K.
const STEP_K: f64 = 5.0;

/// The lines of an oil.
pub(super) fn lines(teller: &Teller<'_>) -> Vec<DrawnLine> {
    let curves = teller.curves;
    let (from, to) = range(teller);
    let known = (curves.coldest_known(), curves.highest);
    let draw = |of: LineOf,
                low: ThermodynamicTemperature,
                nu: &dyn Fn(ThermodynamicTemperature) -> KinematicViscosity| {
        let mut readings = Vec::new();
        let mut t = from;
        while t <= to + 1e-9 {
            let at = celsius(t);
            readings.push(Reading {
                at,
                nu: nu(at),
                extrapolated: at < low || at > known.1,
            });
            t += STEP_K;
        }
        DrawnLine { of, readings }
    };
    let by = |of, curve: &Curve| draw(of, curves.lowest, &|at| curve.nu_at(at));
    let mut all = vec![by(LineOf::New, &curves.new)];
    if let Some(cold) = &curves.cold {
        all.push(draw(LineOf::Cold, known.0, &|at| cold.nu_at(at)));
    }
    if let Some(spread) = &teller.spread {
        for (of, thick) in [(LineOf::Thin, false), (LineOf::Thick, true)] {
            let end = |at| {
                let band = spread.band(curves, at);
                band.map_or(curves.new.nu_at(at), |(lo, hi)| if thick { hi } else { lo })
            };
            all.push(draw(of, curves.lowest, &end));
        }
    }
    if let Some((least, most)) = curves.worn_range(true) {
        if curves.loss_range(true).is_some() {
            all.push(draw(LineOf::WornLeast, curves.lowest, &|at| {
                least.nu_at(at)
            }));
        }
        all.push(draw(LineOf::Worn, curves.lowest, &|at| most.nu_at(at)));
    }
    let oils = curves.makeup.oils();
    for (oil, of) in oils.iter().zip([LineOf::BaseThin, LineOf::BaseThick]) {
        let mut line = draw(of, curves.lowest, &|at| oil.base().nu_at(at));
        // an estimate that passes the finished oil is not drawn on: there the line is too thin
        line.readings.retain(|r| r.nu <= curves.new.nu_at(r.at));
        all.push(line);
    }
    if let (Some(oil), None) = (oils.first(), &curves.cold) {
        all.push(draw(LineOf::ByParts, curves.lowest, &|at| oil.nu_at(at)));
    }
    all
}

/// From 10 K below the coldest of pour point, points and -20 °C to 120 °C, °C.
fn range(teller: &Teller<'_>) -> (f64, f64) {
    let pour = teller.oil.pour_point.as_ref().map(|p| p.value.figure());
    let coldest = pour
        .into_iter()
        .chain([teller.curves.coldest_known(), celsius(-20.0)])
        .map(to_celsius)
        .fold(f64::INFINITY, f64::min);
    let from = ((coldest - 10.0) / STEP_K).floor() * STEP_K;
    let to = TO_C.max(to_celsius(teller.curves.highest));
    (from, to)
}
