//! Additives, classes and declarations of an oil, for the suitability rules.

use crate::input::fields::Fields;
use crate::input::reader::Reader;
use crate::model::Oil;
use crate::model::facts::{OilFacts, exactly};
use crate::model::oil::{Polymer, Viscosity};
use crate::model::stated::{Between, Bound};
use crate::model::word::Word;
use crate::quantity::convert::celsius;
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::grade::IsoGrade;
use std::collections::BTreeSet;

/// The facts of an oil.
pub(super) fn of(reader: &mut Reader<'_>, fields: &Fields<'_>, oil: &Oil) -> OilFacts {
    OilFacts {
        id: oil.id.clone(),
        kind: Some(oil.kind),
        base: Some(oil.base.as_ref().map_or(BaseStock::MineralI, |b| b.value)),
        polymer: match oil.polymer {
            Polymer::NotSaid => None,
            Polymer::Thickened => Some(true),
            Polymer::Free => Some(false),
        },
        shear_data: oil.shear.is_some(),
        additives: set(reader, fields, "additives"),
        sulphur: one(reader, fields, "sulphur"),
        copper_strip: one(reader, fields, "copper strip"),
        classes: fields
            .names(reader, "classes")
            .into_iter()
            .map(|c| c.value)
            .collect(),
        food_class: one(reader, fields, "food class"),
        environment: one(reader, fields, "environment"),
        fire_class: one(reader, fields, "fire class"),
        flash: oil.flash_point.as_ref().map(|(f, _)| within(f.value)),
        fzg_stage: fields
            .whole(reader, "FZG stage")
            .and_then(|n| u8::try_from(n.value).ok()),
        air_release: fields.given(reader, "air release").map(|g| g.value),
        demulsibility: fields.given(reader, "demulsibility").map(|g| g.value),
        nu40: nu40(oil),
        thickener: oil
            .grease
            .as_ref()
            .and_then(|g| g.thickener.as_ref())
            .map(|t| t.value.clone()),
    }
}

/// The range a bound leaves; the open end is as far as a flash point can lie.
fn within(bound: Bound<ThermodynamicTemperature>) -> Between<ThermodynamicTemperature> {
    match bound {
        Bound::Exactly(t) => exactly(t),
        Bound::Above(t) => Between {
            lo: t,
            hi: ends(t, celsius(400.0)).1,
        },
        Bound::Below(t) => Between {
            lo: ends(celsius(-50.0), t).0,
            hi: t,
        },
    }
}

/// Two temperatures, the lower first.
fn ends(
    a: ThermodynamicTemperature,
    b: ThermodynamicTemperature,
) -> (ThermodynamicTemperature, ThermodynamicTemperature) {
    if a.base() <= b.base() { (a, b) } else { (b, a) }
}

/// The viscosity stated at 40 °C, or the middle of the grade.
fn nu40(oil: &Oil) -> Option<crate::quantity::KinematicViscosity> {
    match &oil.viscosity {
        Viscosity::Points { points, .. } => points
            .iter()
            .find(|p| (p.at.base() - celsius(40.0).base()).abs() < 0.01)
            .map(|p| p.nu.value),
        Viscosity::Grade(grade) => IsoGrade::of_number(grade.iso_vg.value).map(IsoGrade::midpoint),
    }
}

/// A word of a closed list.
pub(in crate::input) fn one<W: Word>(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    name: &str,
) -> Option<W> {
    fields
        .word(reader, name)
        .and_then(|word| W::from_word(word.value))
}

/// Several words of a closed list.
pub(in crate::input) fn set<W: Word>(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    name: &str,
) -> Option<BTreeSet<W>> {
    let words = fields.words(reader, name)?;
    Some(words.iter().filter_map(|w| W::from_word(w.value)).collect())
}
