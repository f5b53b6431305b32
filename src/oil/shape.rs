//! The new oil as stated: through its points, or by its grade.

use super::curve::Curve;
use crate::model::oil::{Formulation, GradeOnly, Oil, PointsFrom, Viscosity, ViscosityPoint};
use crate::model::rulebook::Rulebook;
use crate::quantity::convert::{celsius, number};
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{KinematicViscosity, Measure, Ratio, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::grade::IsoGrade;
use crate::relation::oil::piecewise::{self, RESIDUAL_LIMIT};
use crate::relation::oil::polymer::{Level, ThickenedOil, Thickening};
use crate::relation::oil::viscosity_index;
use crate::relation::oil::viscosity_temperature::{Line, Misfit, Point, ViscosityCurve, Weights};

/// New oil with the ends of its tolerance.
pub(super) struct Shape {
    pub(super) new: Curve,
    pub(super) thin: Option<Curve>,
    pub(super) thick: Option<Curve>,
    pub(super) tolerance_judged: bool,
    pub(super) measured: bool,
    pub(super) residuals: Vec<Ratio>,
    /// The finished oil by base and polymer, where both are stated and agree with its points.
    pub(super) made_of: Option<ThickenedOil>,
    /// Why stated base and polymer are not used.
    pub(super) not_made: Option<String>,
}

/// The new oil by its points or its grade.
pub(super) fn shape(oil: &Oil, base: BaseStock, rules: &Rulebook) -> Result<Shape, Misfit> {
    match &oil.viscosity {
        Viscosity::Points { points, from } => {
            let mut shape = by_points(points, *from)?;
            if let Some(formulation) = &oil.formulation {
                shape.by_formulation(points, formulation);
            }
            Ok(shape)
        }
        Viscosity::Grade(grade) => by_grade(grade, base, rules),
    }
}

/// Points as a curve is fitted to, each moved by a factor.
pub(super) fn plain(
    points: &[ViscosityPoint],
    moved: impl Fn(&ViscosityPoint) -> f64,
) -> Vec<Point> {
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
        made_of: None,
        not_made: None,
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
        made_of: None,
        not_made: None,
    })
}

/// Window of a polymer where none is given: 0 to 100 °C (engineering judgement).
pub(super) fn window() -> (ThermodynamicTemperature, ThermodynamicTemperature) {
    (celsius(POLYMER_WINDOW_FROM_C), celsius(POLYMER_WINDOW_TO_C))
}

/// Lower end of a polymer's temperature window where none is given, °C (engineering judgement).
pub const POLYMER_WINDOW_FROM_C: f64 = 0.0;
/// Upper end of a polymer's temperature window where none is given, °C (engineering judgement).
pub const POLYMER_WINDOW_TO_C: f64 = 100.0;

impl Shape {
    /// Takes base and polymer in the place of the line, where they are stated and give the
    /// finished oil back.
    fn by_formulation(&mut self, points: &[ViscosityPoint], formulation: &Formulation) {
        if formulation.base_points.is_empty() {
            return;
        }
        let finished = |factor: f64| plain(points, |p| 1.0 + factor * p.tolerance.unwrap_or(0.0));
        let base = match Line::fit(&plain(&formulation.base_points, |_| 1.0), Weights::PerCent) {
            Ok(line) => line,
            Err(misfit) => {
                self.not_made = Some(format!("the points of the base oil make no line: {misfit}"));
                return;
            }
        };
        match thickened(base, &finished(0.0)) {
            Ok(oil) => {
                let end = |end: &mut Option<Curve>, factor: f64| {
                    if let (Some(curve), Ok(oil)) = (end, thickened(base, &finished(factor))) {
                        *curve = Curve::Thickened(oil);
                    }
                };
                end(&mut self.thin, -1.0);
                end(&mut self.thick, 1.0);
                self.new = Curve::Thickened(oil);
                self.made_of = Some(oil);
            }
            Err(why) => self.not_made = Some(why),
        }
    }
}

/// The oil of a base that has the viscosities of the coldest and the hottest of its points.
fn thickened(base: Line, finished: &[Point]) -> Result<ThickenedOil, String> {
    let share = |p: &Point| Level {
        p: number(p.nu.base() / base.nu_at(p.at).base() - 1.0),
        at: p.at,
    };
    let (Some(cold), Some(hot)) = (finished.first(), finished.last()) else {
        return Err("the finished oil has no points".to_owned());
    };
    let shares = Thickening::through(window(), share(cold), share(hot))
        .map_err(|why| format!("base and finished oil do not agree: {why}"))?;
    let oil = ThickenedOil::new(base, shares);
    let misses = |p: &&Point| (oil.nu_at(p.at).base() / p.nu.base() - 1.0).abs() > RESIDUAL_LIMIT;
    match finished.iter().find(misses) {
        None => Ok(oil),
        Some(p) => Err(format!(
            "base and polymer together miss the finished oil at {} by more than 3 %",
            quantity(p.at.amount(), Units::Si, Toward::Nearest)
        )),
    }
}
