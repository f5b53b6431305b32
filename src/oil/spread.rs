//! How far the viscosity of an oil may be off at a temperature: the tolerance of its grade or of
//! its points, else the reproducibility of the tests its data sheet rests on.

use super::curve::Curve;
use super::curves::Curves;
use crate::model::oil::{Oil, Viscosity};
use crate::quantity::convert::number;
use crate::quantity::{KinematicViscosity, Measure, Ratio, ThermodynamicTemperature};
use crate::relation::oil::piecewise;
use crate::relation::oil::uncertainty::{factor, of_one_result};
use crate::relation::oil::viscosity_temperature::{Point, ViscosityCurve};

/// What the spread of an oil rests on.
#[derive(Clone, Debug, PartialEq)]
pub enum Spread {
    /// Thin and thick end: a grade, or tolerances stated. They are judged.
    Ends,
    /// The reproducibility of the tests, carried along the line. It is drawn, not judged: the
    /// reserve covers it.
    Tests {
        /// The curve of the stated points.
        curve: piecewise::Curve,
        /// The points with their tolerance.
        points: Vec<(Point, Ratio)>,
    },
}

/// The spread of an oil; `None` where its points make no curve of their own.
pub fn spread(oil: &Oil, curves: &Curves) -> Option<Spread> {
    if curves.thin.is_some() && curves.thick.is_some() {
        return Some(Spread::Ends);
    }
    let Viscosity::Points { points, .. } = &oil.viscosity else {
        return None;
    };
    let points: Vec<(Point, Ratio)> = points
        .iter()
        .map(|p| (Point::new(p.at, p.nu.value), of_one_result(p.at)))
        .collect();
    let plain: Vec<Point> = points.iter().map(|(p, _)| *p).collect();
    let curve = match &curves.new {
        Curve::Plain(curve) => curve.clone(),
        _ => piecewise::Curve::through(&plain).ok()?.0,
    };
    Some(Spread::Tests { curve, points })
}

impl Spread {
    /// The factor up and down at a temperature; 1 at the ends themselves.
    pub fn factor(&self, at: ThermodynamicTemperature) -> Option<Ratio> {
        match self {
            Self::Ends => Some(number(1.0)),
            Self::Tests { curve, points } => factor(curve, points, at).ok(),
        }
    }

    /// Thin and thick limit of the new oil at a temperature.
    pub fn band(
        &self,
        curves: &Curves,
        at: ThermodynamicTemperature,
    ) -> Option<(KinematicViscosity, KinematicViscosity)> {
        match (self, &curves.thin, &curves.thick) {
            (Self::Ends, Some(thin), Some(thick)) => Some((thin.nu_at(at), thick.nu_at(at))),
            _ => {
                let (nu, factor) = (curves.new.nu_at(at).base(), self.factor(at)?.base());
                let of = KinematicViscosity::from_base;
                Some((of(nu / factor), of(nu * factor)))
            }
        }
    }
}
