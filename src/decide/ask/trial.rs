//! An oil that is not on the list, weighed as if it were.

use super::contents::Contents;
use crate::demand::End;
use crate::judge::{Judgement, PreparedOil, Verdict, weigh};
use crate::model::Oil;
use crate::model::oil::{
    DynamicPoint, GradeOnly, Grease, OilKind, PointsFrom, Polymer, Shear, Viscosity, ViscosityPoint,
};
use crate::model::stated::Bound;
use crate::quantity::convert::{celsius, number};
use crate::quantity::{DynamicViscosity, KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::viscosity_index;
use crate::source::Origin;
use crate::source::place::Given;
use crate::weighing::{Scales, Weighed};

/// A point, and a base stock with what the oil declares.
pub(super) struct Trial<'t, 'a> {
    scales: &'t Scales<'a>,
    weighed: &'t Weighed<'a>,
    pub(super) base: BaseStock,
    contents: &'t Contents,
    /// Whether its viscosity is measured at the coldest start as well.
    measured_cold: bool,
}

impl<'t, 'a> Trial<'t, 'a> {
    pub(super) fn new(
        scales: &'t Scales<'a>,
        weighed: &'t Weighed<'a>,
        base: BaseStock,
        contents: &'t Contents,
        measured_cold: bool,
    ) -> Self {
        Self {
            scales,
            weighed,
            base,
            contents,
            measured_cold,
        }
    }

    /// The coldest start, K; none where nothing is judged there.
    pub(super) fn coldest_start(&self) -> Option<f64> {
        let settings = self.weighed.ready.settings.iter();
        settings
            .filter(|s| s.has_start_ceiling)
            .filter_map(|s| s.start.map(|(t, _)| t))
            .min_by(f64::total_cmp)
    }

    /// Viscosity of such an oil at the coldest start, at its thick end, Pa·s.
    pub(super) fn cold_viscosity(&self, grade: u32, vi: f64) -> Option<(f64, f64)> {
        let t = self.coldest_start().filter(|_| self.measured_cold)?;
        let oil = self.oil(grade, vi, None, None, None);
        let ready = PreparedOil::new(&oil, self.scales.rules, true).ok()?;
        let at = ThermodynamicTemperature::from_base(t);
        Some((t, ready.thick.nu(t) * ready.curves.density.at(at).base()))
    }

    /// Whether shear on the point is that of gears and rolling bearings.
    pub(super) fn severe(&self) -> bool {
        self.weighed.ready.severe
    }

    /// Whether a demand of the point asks for a pour point.
    pub(super) fn asks_pour(&self) -> bool {
        self.has(End::PourMargin) || self.has(End::StartCeiling)
    }

    /// Whether a floor is judged that shear could reach.
    pub(super) fn has_floor(&self) -> bool {
        self.has(End::HotFloor)
    }

    fn has(&self, end: End) -> bool {
        let settings = self.weighed.ready.settings.iter();
        settings
            .flat_map(|s| &s.demands)
            .any(|d| d.end == end && d.judges)
    }

    /// Whether such an oil holds. Without a pour point, one far below every start.
    pub(super) fn holds(&self, grade: u32, vi: f64, pour: Option<f64>, loss: Option<f64>) -> bool {
        self.weigh(grade, vi, pour, loss)
            .is_some_and(|j| j.verdict == Verdict::Holds)
    }

    /// Weighs such an oil; none where its figures make no curve.
    pub(super) fn weigh(
        &self,
        grade: u32,
        vi: f64,
        pour: Option<f64>,
        loss: Option<f64>,
    ) -> Option<Judgement> {
        let cold = self.cold_viscosity(grade, vi);
        let oil = self.oil(grade, vi, pour, loss, cold);
        let ready = PreparedOil::new(&oil, self.scales.rules, true).ok()?;
        Some(weigh(&self.weighed.ready, &ready))
    }

    /// Weighs a grease on a base oil of so much at 40 degC, m²/s, by the certificate of the batch;
    /// none where that makes no curve.
    pub(super) fn weigh_base_oil(&self, nu40: f64, vi: f64) -> Option<Judgement> {
        let nu40 = KinematicViscosity::from_base(nu40);
        let nu100 = viscosity_index::nu100(nu40, number(vi)).ok()?;
        let point = |nu: KinematicViscosity, at: f64| ViscosityPoint {
            nu: asked(nu),
            at: celsius(at),
            tolerance: None,
        };
        let oil = Oil {
            viscosity: Viscosity::Points {
                points: vec![point(nu40, 40.0), point(nu100, 100.0)],
                from: PointsFrom::Batch,
            },
            ..self.oil(100, vi, None, None, None)
        };
        let ready = PreparedOil::new(&oil, self.scales.rules, true).ok()?;
        Some(weigh(&self.weighed.ready, &ready))
    }

    fn oil(
        &self,
        grade: u32,
        vi: f64,
        pour: Option<f64>,
        loss: Option<f64>,
        cold: Option<(f64, f64)>,
    ) -> Oil {
        let measured = cold.map(|(t, eta)| {
            asked(DynamicPoint {
                eta: DynamicViscosity::from_base(eta),
                at: ThermodynamicTemperature::from_base(t),
            })
        });
        let pour = pour.map_or_else(|| celsius(-90.0), ThermodynamicTemperature::from_base);
        Oil {
            id: "the oil asked for".to_owned(),
            name: None,
            source: None,
            note: None,
            kind: self.contents.facts.kind.unwrap_or(OilKind::Other),
            base: Some(asked(self.base)),
            polymer: if loss.is_some() {
                Polymer::Thickened
            } else {
                Polymer::Free
            },
            viscosity: Viscosity::Grade(Box::new(GradeOnly {
                iso_vg: asked(grade),
                vi: Some(asked(number(vi))),
            })),
            shear: loss.map(|loss| Shear::Loss {
                loss: asked(number(loss)),
                at: celsius(100.0),
                test: None,
            }),
            formulation: None,
            cold_viscosity: measured.into_iter().collect(),
            ccs: Vec::new(),
            mrv: Vec::new(),
            yield_stress: None,
            t150000: None,
            hths: None,
            pour_point: Some(asked(Bound::Exactly(pour))),
            cloud_point: None,
            flash_point: None,
            oil_limit: None,
            density: None,
            alpha: None,
            vi: None,
            facts: self.contents.facts.clone(),
            price: None,
            in_stock: None,
            grease: self.contents.facts.thickener.as_ref().map(|id| Grease {
                thickener: Some(asked(id.clone())),
                nlgi: None,
                dropping_point: None,
                code: None,
            }),
            inputs: Vec::new(),
            origin: Origin::assumed("solved for"),
        }
    }
}

fn asked<T>(value: T) -> Given<T> {
    Given::new(value, "", Origin::assumed("solved for"))
}
