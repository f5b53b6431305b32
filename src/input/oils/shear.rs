//! What permanent shear leaves of an oil, stated in one of three ways.

use super::line::line;
use super::viscosity::{Density, say_density};
use crate::input::fields::{Fields, Slot};
use crate::input::points::{self, Listed};
use crate::input::reader::Reader;
use crate::input::value::Body;
use crate::model::Oil;
use crate::model::oil::{Shear, Viscosity};
use crate::problem::{Code, Write};
use crate::quantity::{Measure, Ratio};
use crate::source::Place;
use crate::source::place::Given;

/// What permanent shear leaves, stated in one of three ways.
pub(super) fn shear(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    density: &Density,
    new: Option<&Viscosity>,
) -> Option<Shear> {
    let ways = ["sheared", "shear loss", "PSSI"];
    let stated: Vec<&Slot<'_>> = ways.iter().filter_map(|k| fields.get(k)).collect();
    if let [first, second, ..] = stated.as_slice() {
        stated_twice(reader, first, second, "one test says what shear leaves");
        return None;
    }
    let slot = stated.first()?;
    match slot.key.name {
        "sheared" => {
            let listed = points::read(reader, slot, Some(&density.dense));
            if listed.faulty {
                return None;
            }
            say_density(reader, slot, &listed, density);
            let points = line(reader, slot, &listed)?;
            thinner(reader, slot, &listed, new);
            Some(Shear::Points {
                points,
                test: listed.test,
            })
        }
        "shear loss" => loss(reader, slot),
        _ => pssi(reader, slot),
    }
}

/// Two ways of stating one thing.
pub(in crate::input) fn stated_twice(
    reader: &mut Reader<'_>,
    first: &Slot<'_>,
    second: &Slot<'_>,
    why: &str,
) {
    let private = format!("x-{}", second.name.text);
    let problem = reader
        .at(
            Code::StatedTwice,
            format!("`{}` and `{}` both stated", first.key.name, second.key.name),
            first.name.span,
            &first.within,
        )
        .related(Place::Text(second.name.span), "")
        .why(why)
        .write(
            Write::edit(second.name.span, private).remark("keeps it as a remark; or delete one"),
        );
    reader.report(problem);
}

/// A sheared oil cannot be thicker than the new one.
fn thinner(reader: &mut Reader<'_>, slot: &Slot<'_>, listed: &Listed, new: Option<&Viscosity>) {
    let Some(Viscosity::Points { points, .. }) = new else {
        return;
    };
    for (sheared, piece) in listed.points.iter().zip(&listed.at) {
        let same = points
            .iter()
            .find(|p| (p.at.base() - sheared.at.base()).abs() < 1e-6);
        let Some(new) = same.filter(|p| sheared.nu.value.base() > p.nu.value.base()) else {
            continue;
        };
        let written = new.nu.written.clone();
        let problem = reader
            .at(
                Code::ShearedThicker,
                format!("sheared thicker than new, {written}"),
                piece.node.span,
                &slot.within,
            )
            .why("shear breaks polymer and thins the oil; new and sheared may be exchanged")
            .write(Write::edit(piece.node.span, written).remark("at most; or the right figure"));
        reader.report(problem);
    }
}

fn loss(reader: &mut Reader<'_>, slot: &Slot<'_>) -> Option<Shear> {
    let value = slot.value(reader)?;
    let origin = slot.origin(&value.clauses);
    let Body::One {
        read, at: Some(at), ..
    } = value.body
    else {
        return None;
    };
    let loss = share(
        reader,
        slot,
        read.amount.base,
        "a share of the viscosity lost",
    )?;
    Some(Shear::Loss {
        loss: Given::new(Ratio::from_base(loss), value.written, origin),
        at: at.amount.as_measure()?,
        test: value.clauses.test,
    })
}

fn pssi(reader: &mut Reader<'_>, slot: &Slot<'_>) -> Option<Shear> {
    let value = slot.value(reader)?;
    let origin = slot.origin(&value.clauses);
    let Body::One { read, .. } = value.body else {
        return None;
    };
    // The index is customarily written as a number of per cent.
    let as_share = if read.unit == "%" {
        read.amount.base
    } else {
        read.amount.base / 100.0
    };
    let pssi = share(reader, slot, as_share, "a stability index")?;
    Some(Shear::Pssi {
        pssi: Given::new(Ratio::from_base(pssi), value.written, origin),
        test: value.clauses.test,
    })
}

fn share(reader: &mut Reader<'_>, slot: &Slot<'_>, share: f64, what: &str) -> Option<f64> {
    if (0.0..1.0).contains(&share) {
        return Some(share);
    }
    let text = slot.node.text().unwrap_or("");
    let example = if slot.key.name == "PSSI" {
        "25"
    } else {
        "26 % at 100 degC"
    };
    let clauses = text.find(", ").map_or("", |at| &text[at..]);
    let problem = reader
        .at(
            Code::ValueImpossible,
            format!("{what} lies between 0 and 100 %"),
            slot.node.span,
            &slot.within,
        )
        .write(
            Write::edit(slot.node.span, format!("{example}{clauses}"))
                .remark("with the right figure"),
        );
    reader.report(problem);
    None
}

/// A polymer-thickened oil without any figure after shear.
pub(super) fn no_shear(reader: &mut Reader<'_>, fields: &Fields<'_>, oil: &Oil) {
    let slot = fields.get("viscosity").or_else(|| fields.get("base"));
    let Some(slot) = slot else { return };
    let hot = match &oil.viscosity {
        Viscosity::Points { points, .. } => points.last().map(|p| p.nu.written.clone()),
        Viscosity::Grade(grade) => Some(grade.iso_vg.written.clone()),
    };
    let hot = hot.unwrap_or_default();
    let note = reader
        .at(
            Code::ShearMissing,
            format!("{hot} was used as new; no sheared value"),
            slot.node.span,
            &slot.within,
        )
        .so("hot verdicts with this oil are judged over the plausible loss of its class")
        .ask("supplier for viscosity after a 20 h shear test");
    reader.report(note);
}
