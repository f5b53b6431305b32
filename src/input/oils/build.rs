//! One oil from its values.

use super::{facts, formulation, other, shear, viscosity};
use crate::input::convert::Dense;
use crate::input::fields::Fields;
use crate::input::reader::Reader;
use crate::model::Oil;
use crate::model::oil::{Grease, OilKind, PointsFrom, Polymer, Viscosity};
use crate::model::rulebook::Rulebook;
use crate::quantity::{MassDensity, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;
use crate::source::place::Given;
use crate::source::yaml::Entry;

/// The oil, unless its viscosity cannot be read: then that is reported.
pub(super) fn oil(
    reader: &mut Reader<'_>,
    id: &str,
    entry: &Entry,
    fields: &Fields<'_>,
    rules: &Rulebook,
) -> Option<Oil> {
    let kind = kind(reader, fields);
    let (base, polymer) = other::base(reader, fields);
    let density = other::beside(reader, fields, "density");
    let dense = dense(density.as_ref(), base.as_ref(), rules);
    let sheet = viscosity::Sheet {
        entry,
        fields,
        kind,
        has_base: base.is_some(),
    };
    let viscosity = viscosity::viscosity(reader, &sheet, &dense);
    let worn = shear::shear(reader, fields, &dense, viscosity.as_ref());
    let formulation = formulation::formulation(reader, fields, kind, &dense);
    let grease = (kind == OilKind::Grease).then(|| grease(reader, fields));
    let mut oil = Oil {
        id: id.to_owned(),
        name: fields.text(reader, "name"),
        source: fields.text(reader, "source"),
        note: fields.text(reader, "note"),
        kind,
        base,
        polymer,
        // Where it could not be read the oil is not kept, but the rest of it is read.
        viscosity: viscosity.clone().unwrap_or(UNREAD),
        shear: worn,
        formulation,
        cold_viscosity: other::cold(reader, fields, "cold viscosity"),
        ccs: other::cold(reader, fields, "CCS"),
        mrv: other::cold(reader, fields, "MRV"),
        yield_stress: other::beside(reader, fields, "yield stress"),
        t150000: fields.given(reader, "t150000"),
        hths: fields.given(reader, "HTHS"),
        pour_point: fields.bound(reader, "pour point"),
        cloud_point: fields.bound(reader, "cloud point"),
        flash_point: other::flash(reader, fields),
        oil_limit: fields.given(reader, "oil limit"),
        density,
        alpha: other::beside(reader, fields, "alpha"),
        vi: fields.given(reader, "VI"),
        facts: crate::model::facts::OilFacts::default(),
        price: other::price(reader, fields),
        in_stock: fields.given(reader, "in stock"),
        grease,
        inputs: other::inputs(reader, fields),
        origin: fields.origin(),
    };
    oil.facts = facts::of(reader, fields, &oil);
    other::unusual(reader, fields, &oil);
    let silent = ["sheared", "shear loss", "PSSI"]
        .iter()
        .all(|k| fields.lacks(k));
    if polymer == Polymer::Thickened && silent {
        shear::no_shear(reader, fields, &oil);
    }
    viscosity.is_some().then_some(oil)
}

const UNREAD: Viscosity = Viscosity::Points {
    points: Vec::new(),
    from: PointsFrom::DataSheet,
};

/// The stated density, else one typical of the base.
fn dense(
    stated: Option<&Given<(MassDensity, ThermodynamicTemperature)>>,
    base: Option<&Given<BaseStock>>,
    rules: &Rulebook,
) -> viscosity::Density {
    let stock = base.map_or(BaseStock::MineralI, |b| b.value);
    let rho15 = match stated {
        Some(given) => other::at_15(given.value, stock),
        None => rules.typical_density(stock),
    };
    let law = stock.density_law();
    viscosity::Density {
        dense: Dense { rho15, law },
        assumed: stated.is_none(),
    }
}

fn kind(reader: &mut Reader<'_>, fields: &Fields<'_>) -> OilKind {
    let word = fields.word(reader, "kind").map(|w| w.value);
    OilKind::WRITTEN
        .iter()
        .find(|(w, _)| Some(*w) == word)
        .map_or(OilKind::Other, |(_, kind)| *kind)
}

fn grease(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Grease {
    Grease {
        thickener: fields.given_text(reader, "thickener"),
        nlgi: fields.given_text(reader, "NLGI"),
        dropping_point: fields.bound(reader, "dropping point"),
        code: fields.given_text(reader, "code"),
    }
}
