//! A loss by shear measured in one machine, laid on the other machines with the same oil.

use super::bottle::Bottle;
use super::causes::Cause;
use super::judged::Judged;
use super::units::Unit;
use crate::judge::{PreparedOil, Verdict, weigh};
use crate::model::oil::{PointsFrom, Shear, Viscosity, ViscosityPoint};
use crate::model::sample::Reading;
use crate::quantity::convert::{celsius, mm2_s};
use crate::source::Origin;
use crate::source::place::Given;
use crate::weighing::{Scales, oil_in_use};

/// A measured loss laid on another machine.
#[derive(Clone, Debug)]
pub struct Fed {
    /// The machine it is laid on, by its place in the site.
    pub point: usize,
    /// The oil, by its place in the list.
    pub oil: usize,
    /// The fill it was measured in, by its name, and its bottle.
    pub measured_in: String,
    /// Loss at 100 °C, a share.
    pub loss: f64,
    /// The verdict before: as the data sheet says.
    pub before: Verdict,
    /// The verdict with the measured loss.
    pub after: Verdict,
    /// Smallest hot margin before and after, VG steps.
    pub hot: (Option<f64>, Option<f64>),
}

/// The greatest loss measured for an oil: viscosities at 40 and 100 °C, and where.
struct Measured {
    nu: (f64, f64),
    loss: f64,
    name: String,
    point: usize,
}

/// Weighs the other machines again with the greatest loss measured for their oil.
pub(super) fn feed(
    scales: &Scales<'_>,
    units: &[Unit],
    judged: &[Judged],
    bottles: &[Bottle],
) -> Vec<Fed> {
    let mut list = Vec::new();
    for oil in 0..scales.site.oils.len() {
        let Some(measured) = greatest(oil, units, judged, bottles) else {
            continue;
        };
        let Some(sheared) = sheared(scales, oil, &measured) else {
            continue;
        };
        for (place, point) in scales.site.points.iter().enumerate() {
            let same = oil_in_use(point) == Some(scales.site.oils[oil].id.as_str());
            if !same || place == measured.point {
                continue;
            }
            let (_, ready) = scales.prepare(point);
            let before = weigh(&ready, &scales.oils[oil]);
            let after = weigh(&ready, &sheared);
            list.push(Fed {
                point: place,
                oil,
                measured_in: measured.name.clone(),
                loss: measured.loss,
                before: before.verdict,
                after: after.verdict,
                hot: (before.hot.map(|m| m.value), after.hot.map(|m| m.value)),
            });
        }
    }
    list
}

fn greatest(oil: usize, units: &[Unit], judged: &[Judged], bottles: &[Bottle]) -> Option<Measured> {
    let mut most: Option<Measured> = None;
    for unit in units {
        for j in unit.judged.iter().map(|j| &judged[*j]) {
            let shear = j
                .diagnosis
                .causes
                .iter()
                .find(|n| n.cause == Cause::PolymerShear);
            let sure = shear.is_some_and(|n| n.likelihood >= 0.5);
            if j.label.oil != Some(oil) || !sure || j.twice {
                continue;
            }
            let figures = &bottles[j.bottle].figures;
            let nu = figures
                .exact(Reading::Nu40)
                .zip(figures.exact(Reading::Nu100));
            let (Some(nu), Some(moved)) = (nu, j.change.nu100) else {
                continue;
            };
            if most.as_ref().is_none_or(|m| -moved > m.loss) {
                most = Some(Measured {
                    nu,
                    loss: -moved,
                    name: format!("{}, {}", unit.name, bottles[j.bottle].name()),
                    point: unit.point,
                });
            }
        }
    }
    most
}

fn sheared(scales: &Scales<'_>, oil: usize, measured: &Measured) -> Option<PreparedOil> {
    let mut oil = scales.site.oils[oil].clone();
    if !matches!(
        oil.viscosity,
        Viscosity::Points {
            from: PointsFrom::DataSheet | PointsFrom::Batch | PointsFrom::Measured,
            ..
        }
    ) {
        return None;
    }
    let point = |nu: f64, t: f64| ViscosityPoint {
        nu: Given::new(
            mm2_s(nu),
            "",
            Origin::assumed(format!("measured in {}", measured.name)),
        ),
        at: celsius(t),
        tolerance: None,
    };
    oil.shear = Some(Shear::Points {
        points: vec![point(measured.nu.0, 40.0), point(measured.nu.1, 100.0)],
        test: Some(format!("in service, {}", measured.name)),
    });
    PreparedOil::new(&oil, scales.rules, true).ok()
}
