//! The values of a point, one by one.

use crate::input::fields::{Fields, Slot, quantities};
use crate::input::keys::Form;
use crate::input::keys::machine::{LOSSES, REGREASE, USED_OIL};
use crate::input::points::{Piece, grade_of};
use crate::input::reader::Reader;
use crate::model::machine::{Fill, Losses, Lubrication, MakerGrade, OwnLimit, Regrease};
use crate::model::rulebook::used_oil::Reading as On;
use crate::model::stated::{Between, Stated};
use crate::problem::{Code, Write, suggest};
use crate::quantity::{
    AcidNumber, Amount, HoursPerYear, Kind, Mass, Measure, Ratio, TemperatureInterval,
    ThermodynamicTemperature, Volume, VolumePerYear,
};
use crate::source::place::Given;

pub(super) fn fill(amount: Amount) -> Option<Fill> {
    match amount.kind {
        Kind::Mass => Some(Fill::Grease(Mass::from_base(amount.base))),
        _ => amount.as_measure::<Volume>().map(Fill::Oil),
    }
}

/// `80 L` behind `annual use` is a year's.
pub(super) fn a_year(amount: Amount) -> Option<VolumePerYear> {
    matches!(amount.kind, Kind::VolumePerYear | Kind::Volume).then_some(VolumePerYear(amount.base))
}

/// `8000 h` behind `running hours` is a year's.
pub(super) fn running_hours(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
) -> Option<Stated<HoursPerYear>> {
    let make = |amount: Amount| match amount.kind {
        Kind::Time => Some(HoursPerYear(amount.base / 3600.0)),
        _ => amount.as_measure(),
    };
    let stated: Stated<HoursPerYear> = fields.stated_as(reader, "running hours", make)?;
    if let Some(given) = stated.known()
        && given.value.0 > 8784.0
    {
        let slot = fields.get("running hours")?;
        let problem = reader
            .at(
                Code::ValueImpossible,
                format!("{} is more than a year has", given.written),
                slot.node.span,
                &slot.within,
            )
            .write(Write::edit(slot.node.span, "8760 h a year").remark("at most"));
        reader.report(problem);
        return None;
    }
    Some(stated)
}

pub(super) fn lubrication(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
) -> Option<Given<Lubrication>> {
    let word = fields.word(reader, "lubrication")?;
    let found = Lubrication::WRITTEN
        .iter()
        .find(|(w, _)| *w == word.value)?;
    Some(word.map(|_| found.1))
}

pub(super) fn yes(reader: &mut Reader<'_>, fields: &Fields<'_>, name: &str) -> bool {
    fields.yes_no(reader, name).is_some_and(|g| g.value)
}

/// A heater that is `none` is none.
pub(super) fn heater(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
) -> Option<Stated<ThermodynamicTemperature>> {
    let slot = fields.get("heater")?;
    let none = slot.node.text().is_some_and(|t| t.trim() == "none");
    if none {
        None
    } else {
        fields.stated(reader, "heater")
    }
}

/// Twelve ranges, January first.
pub(super) fn monthly(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
) -> Option<Vec<Given<Between<ThermodynamicTemperature>>>> {
    let slot = fields.get("monthly ambient")?;
    let Form::Monthly(want) = slot.key.form else {
        return None;
    };
    let items = slot.items(reader)?;
    if items.len() != 12 {
        let texts: Vec<&str> = items.iter().map(|(_, t)| t.as_str()).collect();
        let filled: Vec<&str> = texts
            .iter()
            .copied()
            .chain(std::iter::repeat(
                texts.last().copied().unwrap_or("0 .. 20 degC"),
            ))
            .take(12)
            .collect();
        let problem = reader
            .at(
                Code::MonthsTwelve,
                format!("{} ranges found, twelve are wanted", items.len()),
                slot.node.span,
                &slot.within,
            )
            .why("one for each month, January first")
            .write(
                Write::edit(slot.node.span, format!("[{}]", filled.join(", ")))
                    .remark("with the right figures"),
            );
        reader.report(problem);
        return None;
    }
    let mut ranges = Vec::new();
    for (node, _) in items {
        let month = Slot {
            node,
            ..slot.clone()
        };
        let value = month.value_as(reader, &want);
        let range = value.and_then(|v| quantities::range_of(reader, &month, v));
        if let Some(Stated::Known(range, _)) = range {
            ranges.push(range);
        }
    }
    (ranges.len() == 12).then_some(ranges)
}

pub(super) fn maker_grade(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
) -> Option<Given<MakerGrade>> {
    let slot = fields.get("maker grade")?;
    slot.text(reader)?;
    let piece = Piece {
        node: slot.node.clone(),
    };
    let (grade, _) = grade_of(reader, slot, &piece)?;
    let iso_vg = grade.value.as_floor()?;
    Some(grade.map(|_| MakerGrade { iso_vg }))
}

pub(super) fn losses(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Option<Losses> {
    let slot = fields.get("losses")?;
    let inner = Fields::read(reader, slot.node, &LOSSES, &slot.within);
    Some(Losses {
        casing_area: inner.stated(reader, "casing area"),
        heat_transfer: inner.stated(reader, "heat transfer"),
        cooler: inner.stated(reader, "cooler"),
    })
}

pub(super) fn regrease(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Option<Regrease> {
    let slot = fields.get("regrease")?;
    let inner = Fields::read(reader, slot.node, &REGREASE, &slot.within);
    Some(Regrease {
        amount: inner.stated(reader, "amount"),
        interval: inner.stated(reader, "interval"),
        position: inner.word(reader, "position").map(|w| w.map(str::to_owned)),
        vibration: inner
            .word(reader, "vibration")
            .map(|w| w.map(str::to_owned)),
    })
}

/// Limits of the oil in use: `watch .. act` of each reading.
pub(super) fn used_oil(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Vec<OwnLimit> {
    let Some(slot) = fields.get("used oil") else {
        return Vec::new();
    };
    let inner = Fields::read(reader, slot.node, &USED_OIL, &slot.within);
    let mut found = Vec::new();
    let viscosity = vec![On::ViscosityChange40, On::ViscosityChange100];
    own_limit::<Ratio>(reader, &inner, "viscosity change", viscosity, &mut found);
    own_limit::<AcidNumber>(
        reader,
        &inner,
        "acid number rise",
        vec![On::AcidNumberRise],
        &mut found,
    );
    own_limit::<AcidNumber>(
        reader,
        &inner,
        "acid number",
        vec![On::AcidNumber],
        &mut found,
    );
    own_limit::<Ratio>(reader, &inner, "water", vec![On::Water], &mut found);
    own_limit::<TemperatureInterval>(
        reader,
        &inner,
        "flash drop",
        vec![On::FlashDrop],
        &mut found,
    );
    own_limit::<Ratio>(
        reader,
        &inner,
        "oxidation rise",
        vec![On::OxidationRise],
        &mut found,
    );
    own_limit::<Ratio>(reader, &inner, "fuel", vec![On::Fuel], &mut found);
    own_limit::<Ratio>(reader, &inner, "soot", vec![On::Soot], &mut found);
    found
}

fn own_limit<Q: Measure>(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    name: &str,
    on: Vec<On>,
    into: &mut Vec<OwnLimit>,
) {
    if let Some(Stated::Known(given, _)) = fields.range::<Q>(reader, name) {
        into.push(OwnLimit {
            on,
            watch: given.value.lo.amount(),
            act: given.value.hi.amount(),
            origin: given.origin,
        });
    }
}

/// Names of warnings; one that does not exist would silence nothing.
pub(super) fn allow(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Vec<String> {
    let Some(slot) = fields.get("allow") else {
        return Vec::new();
    };
    let names = fields.names(reader, "allow");
    for name in &names {
        if Code::named(&name.value).is_none() {
            let codes = Code::ALL.iter().map(|c| c.as_str());
            let meant = suggest::certain(&name.value, codes).unwrap_or("rule-range");
            let place = match &name.origin.place {
                crate::source::Place::Text(span) => *span,
                _ => slot.node.span,
            };
            let problem = reader
                .at(
                    Code::WordUnknown,
                    format!("there is no warning {}", name.value),
                    place,
                    &slot.within,
                )
                .why("the name of a warning stands in brackets behind it")
                .write(Write::edit(place, meant));
            reader.report(problem);
        }
    }
    names.into_iter().map(|n| n.value).collect()
}
