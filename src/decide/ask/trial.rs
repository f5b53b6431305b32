//! An oil that is not on the list, weighed as if it were.

use super::contents::Contents;
use crate::demand::End;
use crate::judge::{Judgement, PreparedOil, Verdict, weigh};
use crate::model::Oil;
use crate::model::oil::{GradeOnly, OilKind, Polymer, Shear, Viscosity};
use crate::model::stated::Bound;
use crate::quantity::convert::{celsius, number};
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;
use crate::source::Origin;
use crate::source::place::Given;
use crate::weighing::{Scales, Weighed};

/// A point, and a base stock with what the oil declares.
pub(super) struct Trial<'t, 'a> {
    scales: &'t Scales<'a>,
    weighed: &'t Weighed<'a>,
    pub(super) base: BaseStock,
    contents: &'t Contents,
}

impl<'t, 'a> Trial<'t, 'a> {
    pub(super) fn new(
        scales: &'t Scales<'a>,
        weighed: &'t Weighed<'a>,
        base: BaseStock,
        contents: &'t Contents,
    ) -> Self {
        Self {
            scales,
            weighed,
            base,
            contents,
        }
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
        let oil = self.oil(grade, vi, pour, loss);
        let ready = PreparedOil::new(&oil, self.scales.rules, true).ok()?;
        Some(weigh(&self.weighed.ready, &ready))
    }

    fn oil(&self, grade: u32, vi: f64, pour: Option<f64>, loss: Option<f64>) -> Oil {
        let pour = pour.map_or_else(|| celsius(-90.0), ThermodynamicTemperature::from_base);
        Oil {
            id: "the oil asked for".to_owned(),
            name: None,
            source: None,
            note: None,
            kind: OilKind::Other,
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
            cold_viscosity: Vec::new(),
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
            grease: None,
            inputs: Vec::new(),
            origin: Origin::assumed("solved for"),
        }
    }
}

fn asked<T>(value: T) -> Given<T> {
    Given::new(value, "", Origin::assumed("solved for"))
}
