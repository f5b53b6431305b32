//! The four curves of an oil: new, thin end, thick end, worn.

use super::curve::Curve;
use super::density::{Density, density};
use super::findings::{Finding, findings};
use super::pressure::{PressureLaw, pressure_law};
use crate::model::oil::{
    GradeOnly, Oil, OilKind, PointsFrom, Polymer, Shear, Viscosity, ViscosityPoint,
};
use crate::model::rulebook::Rulebook;
use crate::quantity::convert::{celsius, number};
use crate::quantity::{KinematicViscosity, Measure, Ratio, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::grade::IsoGrade;
use crate::relation::oil::piecewise;
use crate::relation::oil::viscosity_index;
use crate::relation::oil::viscosity_temperature::{Misfit, Point, ViscosityCurve};

/// What is left after permanent shear.
#[derive(Clone, Debug, PartialEq)]
pub enum Worn {
    /// Nothing is lost: no polymer.
    AsNew,
    /// Known, by points, by a stated loss or by formulation and index.
    Known(Curve),
    /// Lost somewhere between these shares of the viscosity, the same at every temperature;
    /// which machine it runs in decides the upper one.
    Between {
        /// Least loss.
        least: f64,
        /// Greatest loss in engines and hydraulics.
        most_mild: f64,
        /// Greatest loss in gears and rolling bearings.
        most_severe: f64,
    },
}

/// An oil ready to be judged.
#[derive(Clone, Debug, PartialEq)]
pub struct Curves {
    /// Its id.
    pub id: String,
    /// New.
    pub new: Curve,
    /// New, at the thin end of its tolerance, where it has one.
    pub thin: Option<Curve>,
    /// New, at the thick end.
    pub thick: Option<Curve>,
    /// After permanent shear.
    pub worn: Worn,
    /// Whether half the reserve is asked: the tolerance is judged already, or the points are
    /// measured.
    pub half_reserve: bool,
    /// Lowest temperature anything was stated at.
    pub lowest: ThermodynamicTemperature,
    /// Highest temperature anything was stated at.
    pub highest: ThermodynamicTemperature,
    /// Below this the finished points alone say little: the polymer's window ends there.
    pub window_end: Option<ThermodynamicTemperature>,
    /// Base stock; mineral Group I where nobody says.
    pub base: BaseStock,
    /// Whether the base was assumed.
    pub base_assumed: bool,
    /// Whether it is or counts as polymer-thickened.
    pub thickened: bool,
    /// Density.
    pub density: Density,
    /// Pressure-viscosity coefficient.
    pub pressure: PressureLaw,
    /// What does not add up.
    pub findings: Vec<Finding>,
}

impl Curves {
    /// Kinematic viscosity of the new oil.
    pub fn nu_new(&self, at: ThermodynamicTemperature) -> KinematicViscosity {
        self.new.nu_at(at)
    }

    /// The curve floors are judged on, after a given loss where the loss is not known.
    pub fn worn_after(&self, loss: f64) -> Option<Curve> {
        match &self.worn {
            Worn::AsNew => None,
            Worn::Known(curve) => Some(curve.clone()),
            Worn::Between { .. } => Some(self.new.after_loss(loss)),
        }
    }

    /// Least and greatest loss in such a machine; `None` where the worn curve is known.
    pub fn loss_range(&self, severe: bool) -> Option<(f64, f64)> {
        match self.worn {
            Worn::Between {
                least,
                most_mild,
                most_severe,
            } => Some((least, if severe { most_severe } else { most_mild })),
            _ => None,
        }
    }
}

/// Highest VI a base gives by itself; `None` where it gives any.
pub(super) fn natural_index(base: BaseStock) -> Option<f64> {
    match base {
        BaseStock::MineralI | BaseStock::MineralII => Some(120.0),
        BaseStock::Naphthenic => Some(120.0),
        BaseStock::MineralIII => Some(145.0),
        BaseStock::Pao => Some(180.0),
        BaseStock::DiEster | BaseStock::PolyolEster => Some(200.0),
        _ => None,
    }
}

/// Builds the curves of an oil.
///
/// # Errors
/// [`Misfit`] where its points make no curve; the reader refuses such oils with their place.
pub fn curves(oil: &Oil, rules: &Rulebook) -> Result<Curves, Misfit> {
    let base = oil.base.as_ref().map_or(BaseStock::MineralI, |b| b.value);
    let shape = shape(oil, base, rules)?;
    let vi = index_of(&shape.new);
    let thickened = counts_as_thickened(oil, base, vi);
    let worn = worn(oil, &shape.new, thickened)?;
    let two_finished_points = match &oil.viscosity {
        Viscosity::Points { points, .. } => points.len() == 2,
        Viscosity::Grade(_) => true,
    };
    let window_end = (thickened && two_finished_points && oil.formulation.is_none())
        .then(|| celsius(POLYMER_WINDOW_FROM_C));
    let (lowest, highest) = stated_range(oil);
    let density = density(oil, base, rules);
    let pressure = pressure_law(oil, base);
    let mut built = Curves {
        id: oil.id.clone(),
        new: shape.new,
        thin: shape.thin,
        thick: shape.thick,
        worn,
        half_reserve: shape.tolerance_judged || shape.measured,
        lowest,
        highest,
        window_end,
        base,
        base_assumed: oil.base.is_none(),
        thickened,
        density,
        pressure,
        findings: Vec::new(),
    };
    built.findings = findings(oil, &built, shape.residuals, vi);
    Ok(built)
}

/// Lower end of a polymer's temperature window where none is given, °C (engineering judgement).
pub const POLYMER_WINDOW_FROM_C: f64 = 0.0;
/// Upper end of a polymer's temperature window where none is given, °C (engineering judgement).
pub const POLYMER_WINDOW_TO_C: f64 = 100.0;

struct Shape {
    new: Curve,
    thin: Option<Curve>,
    thick: Option<Curve>,
    tolerance_judged: bool,
    measured: bool,
    residuals: Vec<Ratio>,
}

fn shape(oil: &Oil, base: BaseStock, rules: &Rulebook) -> Result<Shape, Misfit> {
    match &oil.viscosity {
        Viscosity::Points { points, from } => by_points(points, *from),
        Viscosity::Grade(grade) => by_grade(grade, base, rules),
    }
}

fn plain(points: &[ViscosityPoint], moved: impl Fn(&ViscosityPoint) -> f64) -> Vec<Point> {
    points
        .iter()
        .map(|p| {
            Point::new(
                p.at,
                KinematicViscosity::from_base(p.nu.value.base() * moved(p)),
            )
        })
        .collect()
}

fn by_points(points: &[ViscosityPoint], from: PointsFrom) -> Result<Shape, Misfit> {
    let curve = |factor: f64| {
        piecewise::Curve::through(&plain(points, |p| {
            1.0 + factor * p.tolerance.unwrap_or(0.0)
        }))
    };
    let (new, residuals) = curve(0.0)?;
    let stated = points.iter().any(|p| p.tolerance.is_some_and(|t| t > 0.0));
    let end = |factor: f64| -> Result<Option<Curve>, Misfit> {
        if stated {
            Ok(Some(Curve::Plain(curve(factor)?.0)))
        } else {
            Ok(None)
        }
    };
    Ok(Shape {
        thin: end(-1.0)?,
        thick: end(1.0)?,
        new: Curve::Plain(new),
        tolerance_judged: stated,
        measured: from != PointsFrom::DataSheet,
        residuals,
    })
}

fn by_grade(grade: &GradeOnly, base: BaseStock, rules: &Rulebook) -> Result<Shape, Misfit> {
    let limits = IsoGrade::of_number(grade.iso_vg.value).ok_or(Misfit::TooFew)?;
    let range = rules.vi_range(base);
    let (nominal, low) = match &grade.vi {
        Some(vi) => (vi.value.base(), vi.value.base()),
        None => (0.5 * (range.0 + range.1), range.0),
    };
    let line = |nu40: KinematicViscosity, vi: f64| -> Result<Curve, Misfit> {
        let nu100 = viscosity_index::nu100(nu40, number(vi)).map_err(|_| Misfit::OutOfRange {
            nu: nu40,
            lowest: 2.0,
        })?;
        let points = [
            Point::new(celsius(40.0), nu40),
            Point::new(celsius(100.0), nu100),
        ];
        Ok(Curve::Plain(piecewise::Curve::through(&points)?.0))
    };
    Ok(Shape {
        new: line(limits.midpoint(), nominal)?,
        thin: Some(line(limits.least(), low)?),
        thick: Some(line(limits.most(), low)?),
        tolerance_judged: true,
        measured: false,
        residuals: Vec::new(),
    })
}

/// VI from the curve at 40 and 100 °C; not a number below 2 mm²/s at 100 °C.
fn index_of(curve: &Curve) -> Option<f64> {
    viscosity_index::index(curve.nu_at(celsius(40.0)), curve.nu_at(celsius(100.0)))
        .ok()
        .map(Measure::base)
}

fn counts_as_thickened(oil: &Oil, base: BaseStock, vi: Option<f64>) -> bool {
    match oil.polymer {
        Polymer::Thickened => true,
        Polymer::Free => false,
        Polymer::NotSaid => {
            let above = natural_index(base).is_some_and(|most| vi.is_some_and(|vi| vi > most));
            oil.shear.is_some() || above || oil.facts.classes.iter().any(|c| implies_polymer(c))
        }
    }
}

/// High-VI hydraulic classes and multigrades are made with polymer unless the maker says not.
pub(super) fn implies_polymer(class: &str) -> bool {
    let class = class.trim();
    let multigrade = class
        .trim_start_matches("SAE ")
        .split_once('-')
        .is_some_and(|(cold, hot)| cold.ends_with(['W', 'w']) && hot.parse::<u32>().is_ok());
    class.eq_ignore_ascii_case("HV") || class.eq_ignore_ascii_case("HVLP") || multigrade
}

fn worn(oil: &Oil, new: &Curve, thickened: bool) -> Result<Worn, Misfit> {
    if !thickened && oil.shear.is_none() {
        return Ok(Worn::AsNew);
    }
    let after = |kept: f64| new.after_loss(1.0 - kept);
    match &oil.shear {
        Some(Shear::Points { points, .. }) => worn_points(points, new),
        Some(Shear::Loss { loss, .. }) => Ok(Worn::Known(after(1.0 - loss.value.base()))),
        Some(Shear::Pssi { pssi, .. }) => by_index(oil, new, pssi.value.base()),
        None => Ok(Worn::Between {
            least: 0.0,
            most_mild: if oil.kind == OilKind::Gear {
                PLAUSIBLE_LOSS_SEVERE
            } else {
                PLAUSIBLE_LOSS_MILD
            },
            most_severe: PLAUSIBLE_LOSS_SEVERE,
        }),
    }
}

/// Plausible permanent loss of an unknown polymer in engines and hydraulics, common practice.
pub const PLAUSIBLE_LOSS_MILD: f64 = 0.15;
/// Plausible permanent loss of an unknown polymer in gears and rolling bearings, common practice.
pub const PLAUSIBLE_LOSS_SEVERE: f64 = 0.25;

fn worn_points(points: &[ViscosityPoint], new: &Curve) -> Result<Worn, Misfit> {
    if let [only] = points {
        let kept = only.nu.value.base() / new.nu_at(only.at).base();
        return Ok(Worn::Known(new.after_loss(1.0 - kept)));
    }
    let (curve, _) = piecewise::Curve::through(&plain(points, |_| 1.0))?;
    Ok(Worn::Known(Curve::Plain(curve)))
}

/// From a stability index: exactly where the base is stated, else a range of losses.
fn by_index(oil: &Oil, new: &Curve, pssi: f64) -> Result<Worn, Misfit> {
    let t100 = celsius(100.0);
    let base100 = match &oil.formulation {
        Some(f) if f.base_points.len() >= 2 => {
            let base = piecewise::Curve::through(&plain(&f.base_points, |_| 1.0))?.0;
            Some(base.nu_at(t100).base())
        }
        _ => None,
    };
    let new100 = new.nu_at(t100).base();
    if let Some(base100) = base100 {
        let share = (new100 - base100) / new100;
        return Ok(Worn::Known(new.after_loss(pssi * share.max(0.0))));
    }
    // unknown base: the polymer carries between nothing and 60 % of the viscosity at 100 °C
    Ok(Worn::Between {
        least: 0.0,
        most_mild: pssi * 0.6,
        most_severe: pssi * 0.6,
    })
}

fn stated_range(oil: &Oil) -> (ThermodynamicTemperature, ThermodynamicTemperature) {
    match &oil.viscosity {
        Viscosity::Points { points, .. } => {
            let mut all: Vec<f64> = points.iter().map(|p| p.at.base()).collect();
            all.sort_by(f64::total_cmp);
            (
                ThermodynamicTemperature::from_base(all[0]),
                ThermodynamicTemperature::from_base(all[all.len() - 1]),
            )
        }
        Viscosity::Grade(_) => (celsius(40.0), celsius(40.0)),
    }
}
