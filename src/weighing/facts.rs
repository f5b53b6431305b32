//! What the suitability rules may ask, completed from the calculation: temperatures of a point,
//! what its parts imply, the base an oil was taken to have.

use crate::demand::PointDemands;
use crate::judge::PreparedOil;
use crate::model::facts::{OilFacts, PartGroup, PointFacts, SumpNow};
use crate::model::part::{GearType, WheelMaterial};
use crate::model::stated::Between;
use crate::model::{Oil, PartKind, Point};
use crate::quantity::convert::celsius;
use crate::quantity::{KinematicViscosity, Measure, ThermodynamicTemperature};

/// The facts of an oil: as stated, with the base and the polymer it was taken to have.
pub fn of_oil(oil: &Oil, ready: &PreparedOil) -> OilFacts {
    let mut facts = oil.facts.clone();
    facts.id.clone_from(&oil.id);
    facts.kind = Some(oil.kind);
    facts.base = Some(ready.curves.base);
    facts.polymer = Some(ready.curves.thickened);
    facts.shear_data = oil.shear.is_some();
    let nu40 = ready.curves.nu_new(celsius(40.0));
    facts.nu40 = Some(KinematicViscosity::from_base(nu40.base()));
    facts.flash = oil.flash_point.as_ref().map(|(given, _)| {
        let t = given.value.figure();
        Between { lo: t, hi: t }
    });
    facts.thickener = oil
        .grease
        .as_ref()
        .and_then(|g| g.thickener.as_ref())
        .map(|t| t.value.clone());
    facts
}

/// The facts of a point: as stated, with its parts, its temperatures and its oil in use.
pub fn of_point(point: &Point, demands: &PointDemands, now: SumpNow) -> PointFacts {
    let mut facts = point.facts.clone();
    facts.oil_now = now;
    facts.asks_for = point.asks_for.iter().map(|a| a.value.clone()).collect();
    facts.lubrication = point.lubrication.as_ref().map(|l| l.value);
    facts.filter = Some(point.filter);
    for part in &point.parts {
        part_implies(&mut facts, &part.kind);
    }
    let over = |f: &dyn Fn(&crate::demand::Demands) -> Option<f64>| {
        let all: Vec<f64> = demands.settings.iter().filter_map(f).collect();
        let lo = all.iter().copied().fold(f64::INFINITY, f64::min);
        let hi = all.iter().copied().fold(f64::NEG_INFINITY, f64::max);
        (lo <= hi).then(|| Between {
            lo: ThermodynamicTemperature::from_base(lo),
            hi: ThermodynamicTemperature::from_base(hi),
        })
    };
    facts.oil_temperature = over(&|d| d.thermal.hottest.map(|k| k.value.base()));
    facts.start_temperature = over(&|d| d.thermal.start_coldest.map(|k| k.value.base()));
    facts.part_temperature = over(&|d| {
        d.list
            .iter()
            .filter(|x| x.end == crate::demand::End::HotFloor)
            .filter_map(|x| d.governing_temperature(x))
            .chain(d.thermal.hottest.map(|k| k.value.base()))
            .max_by(f64::total_cmp)
    });
    facts
}

/// What a part says of the point by being there.
fn part_implies(facts: &mut PointFacts, kind: &PartKind) {
    let group = match kind {
        PartKind::RollingBearing(_) => PartGroup::RollingBearing,
        PartKind::GearMesh(m) if m.kind == Some(GearType::Hypoid) => PartGroup::Hypoid,
        PartKind::GearMesh(_) => PartGroup::Gear,
        PartKind::WormMesh(w) => {
            if w.wheel
                .as_ref()
                .is_some_and(|w| w.value == WheelMaterial::Bronze)
            {
                facts.yellow_metal = Some(true);
            }
            PartGroup::Worm
        }
        PartKind::OpenGear(_) => PartGroup::OpenGear,
        PartKind::JournalBearing(_) | PartKind::ThrustBearing(_) => PartGroup::PlainBearing,
        PartKind::Contact(_) => PartGroup::Contact,
        PartKind::Component(c) => {
            facts.components.push(c.id.clone());
            return;
        }
        PartKind::Engine(d) | PartKind::Axle(d) => {
            facts
                .asks_for
                .extend(d.level.iter().map(|l| l.value.clone()));
            if matches!(kind, PartKind::Engine(_)) {
                PartGroup::Engine
            } else {
                PartGroup::Axle
            }
        }
    };
    facts.serves.insert(group);
}
