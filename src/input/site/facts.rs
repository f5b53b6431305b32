//! Materials, surroundings and duty of a point, for the suitability rules.

use super::Scene;
use crate::input::fields::Fields;
use crate::input::oils::{one, set};
use crate::input::reader::Reader;
use crate::model::facts::{Backstop, PartGroup, PointFacts, SumpNow, WaterEntry, exactly};
use crate::model::machine::{OilNow, Point};
use crate::model::part::{GearType, PartKind, WheelMaterial};
use crate::model::stated::{Between, Stated};
use crate::model::word::Word;
use crate::quantity::ThermodynamicTemperature;
use crate::source::place::Given;

/// The facts stated for a point; its parts add theirs with [`from_parts`].
pub(super) fn of(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    scene: &Scene<'_, '_>,
    oil_now: &OilNow,
) -> PointFacts {
    let mut yes = |name: &str| fields.yes_no(reader, name).map(|g| g.value);
    let (yellow_metal, silver, zinc_plated) =
        (yes("yellow metal"), yes("silver"), yes("zinc plated"));
    let (wet_clutch, breathing_air, oxygen) =
        (yes("wet clutch"), yes("breathing air"), yes("oxygen"));
    let filter = yes("filter");
    let (wet, food_zone) = (yes("wet"), yes("food zone"));
    let (water_protection, fire_zone) = (yes("water protection"), yes("fire zone"));
    fields.word(reader, "shock");
    check_area(reader, fields);
    PointFacts {
        oil_now: sump_now(scene, oil_now),
        yellow_metal,
        silver,
        zinc_plated,
        backstop: either::<Backstop>(reader, fields, "backstop"),
        wet_clutch,
        breathing_air,
        oxygen,
        water_entry: either::<WaterEntry>(reader, fields, "water entry"),
        seals: set(reader, fields, "seals"),
        inside_paint: one(reader, fields, "inside paint"),
        sight_glass: one(reader, fields, "sight glass"),
        filter,
        food_class: one(reader, fields, "food class"),
        environment: one(reader, fields, "environment"),
        fire_class: one(reader, fields, "fire class"),
        wet,
        food_zone,
        water_protection,
        fire_zone,
        hot_surface: hot_surface(reader, fields),
        ..PointFacts::default()
    }
}

/// What an area states about its surroundings.
pub(super) fn check_area(reader: &mut Reader<'_>, fields: &Fields<'_>) {
    fields.word(reader, "exposure");
    dust(reader, fields);
    for name in ["wet", "food zone", "water protection", "fire zone"] {
        fields.yes_no(reader, name);
    }
    hot_surface(reader, fields);
}

/// How dusty the place is.
pub(super) fn dust(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Option<Given<String>> {
    fields
        .yes_no_or(reader, "dust")
        .map(|g| g.map(str::to_owned))
}

fn hot_surface(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
) -> Option<Between<ThermodynamicTemperature>> {
    match fields.stated::<ThermodynamicTemperature>(reader, "hot surface")? {
        Stated::Known(given, _) => Some(exactly(given.value)),
        Stated::Range(given, _) => Some(given.value),
        Stated::Unknown(..) => None,
    }
}

fn either<W: Word>(reader: &mut Reader<'_>, fields: &Fields<'_>, name: &str) -> Option<W> {
    fields
        .yes_no_or(reader, name)
        .and_then(|word| W::from_word(word.value))
}

fn sump_now(scene: &Scene<'_, '_>, now: &OilNow) -> SumpNow {
    match now {
        OilNow::Nothing => SumpNow::Nothing,
        OilNow::Unknown => SumpNow::Unknown,
        OilNow::Oil(id) => match scene.oil_places.get(id.value.as_str()) {
            Some(at) => SumpNow::Oil(Box::new(scene.oils[*at].facts.clone())),
            None => SumpNow::Unknown,
        },
    }
}

/// What the parts of a point say about it.
pub(super) fn from_parts(point: &mut Point) {
    let facts = &mut point.facts;
    facts.lubrication = point.lubrication.as_ref().map(|l| l.value);
    facts.asks_for = point.asks_for.iter().map(|a| a.value.clone()).collect();
    for part in &point.parts {
        let group = match &part.kind {
            PartKind::RollingBearing(_) => PartGroup::RollingBearing,
            PartKind::GearMesh(mesh) if mesh.kind == Some(GearType::Hypoid) => PartGroup::Hypoid,
            PartKind::GearMesh(_) => PartGroup::Gear,
            PartKind::WormMesh(worm) => {
                let wheel = worm.wheel.as_ref().map(|w| w.value);
                if wheel == Some(WheelMaterial::Bronze) {
                    facts.yellow_metal = Some(true);
                }
                PartGroup::Worm
            }
            PartKind::OpenGear(_) => PartGroup::OpenGear,
            PartKind::JournalBearing(_) | PartKind::ThrustBearing(_) => PartGroup::PlainBearing,
            PartKind::Contact(_) => PartGroup::Contact,
            PartKind::Engine(_) => PartGroup::Engine,
            PartKind::Axle(_) => PartGroup::Axle,
            PartKind::Component(component) => {
                facts.components.push(component.id.clone());
                continue;
            }
        };
        facts.serves.insert(group);
    }
}
