//! Base oil and polymer of an oil, where its maker states them.

use super::line::line;
use super::viscosity::{Density, say_density};
use crate::input::fields::Fields;
use crate::input::points;
use crate::input::reader::Reader;
use crate::model::oil::{Formulation, OilKind};

/// What the oil is made of; nothing for a grease, whose base oil is its viscosity.
pub(super) fn formulation(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    kind: OilKind,
    density: &Density,
) -> Option<Formulation> {
    let polymer = fields.given_text(reader, "polymer");
    let mut base_points = Vec::new();
    if kind != OilKind::Grease
        && let Some(slot) = fields.get("base oil")
    {
        let listed = points::read(reader, slot, Some(&density.dense));
        if !listed.faulty {
            say_density(reader, slot, &listed, density);
            base_points = line(reader, slot, &listed).unwrap_or_default();
        }
    }
    (polymer.is_some() || !base_points.is_empty()).then_some(Formulation {
        base_points,
        polymer,
    })
}
