//! Losses of rolling and plain bearings.

use super::{Form, Inlet, LossKind, Source, Unknown, With, known, sealed};
use crate::demand::context::Context;
use crate::demand::inputs::Wanted;
use crate::demand::journal::warm::Cooled;
use crate::model::Lubrication;
use crate::model::part::{BearingClass, JournalBearing, Part, RollingBearing, ThrustBearing};
use crate::quantity::convert::number;
use crate::quantity::{Force, Measure, Ratio, Torque};
use crate::relation::bearing::friction::{self, FACTORS, FactorRow};
use crate::relation::bearing::reference_viscosity::{PITCH_DIAMETER, pitch_diameter};
use crate::trace::{Known, Recorder};

fn wanted(key: &'static str, symbol: &'static str, says: &'static str) -> Wanted<'static> {
    Wanted {
        key,
        about: None,
        symbol,
        says,
        how: "designation, nameplate or drawing",
    }
}

/// A rolling bearing by Palmgren. Its load counts as stated; what the load takes does not depend
/// on the oil.
pub(super) fn rolling<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &RollingBearing,
    out: &mut Vec<Source>,
) -> Result<(), Unknown> {
    let row = b
        .class
        .and_then(row)
        .ok_or("the kind of a rolling bearing is missing")?;
    let bore = cx.maybe(part, wanted("bore", "d", "bore"), known(b.bore.as_ref()));
    let outside = cx.maybe(
        part,
        wanted("outside", "D", "outside diameter"),
        known(b.outside.as_ref()),
    );
    let speed = cx.maybe(
        part,
        wanted("speed", "n", "speed of rotation"),
        known(b.speed.as_ref()),
    );
    let load = cx.maybe(
        part,
        wanted("load", "P", "equivalent load"),
        known(b.load.as_ref()),
    );
    let (Some(bore), Some(outside), Some(speed)) = (bore, outside, speed) else {
        return Err("the size or the speed of a rolling bearing is missing");
    };
    let load: Known<Force> = load.ok_or("the load of a rolling bearing is missing")?;
    let with = (("d", bore), ("D", outside));
    let says = "pitch diameter";
    let dm =
        cx.r.attempt("Dpw", says, &PITCH_DIAMETER, with, |(d, o)| {
            pitch_diameter(d, o)
        })
        .map_err(|_| "the size of a rolling bearing cannot be")?;
    let why = "Palmgren's factor of the kind, middle of its range";
    let f0 = cx.r.assume(
        "f0",
        "factor of friction without load",
        f0(cx.lubrication(), row),
        why,
    );
    let f1 = f1(cx, part, b, row, load)?;
    let law = &friction::LOAD;
    let says = "friction torque of the load";
    let with = (("f1", f1), ("P1", load), ("dm", dm));
    let torque: Known<Torque> =
        cx.r.attempt("M1", says, law, with, |(f1, p, dm)| {
            friction::load(f1, p, dm)
        })
        .map_err(|_| "the load of a rolling bearing cannot be")?;
    out.push(Source {
        kind: LossKind::Bearing,
        part: part.label.clone(),
        with: With(vec![
            ("f0", f0.step),
            ("dm", dm.step),
            ("M1", torque.step),
            ("n", speed.step),
        ]),
        form: Form::Rolling {
            f0: f0.value,
            load: torque.value,
            speed: speed.value,
            pitch_diameter: dm.value,
        },
    });
    sealed(cx, part, bore, speed, out);
    Ok(())
}

/// The factors of a class.
fn row(class: BearingClass) -> Option<&'static FactorRow> {
    let kind = match class {
        BearingClass::CylindricalRollerThrust => return None,
        other => other.word(),
    };
    FACTORS.iter().find(|row| row.kind == kind)
}

/// Middle of the factor for how the oil gets there.
fn f0(lubrication: Option<Lubrication>, row: &FactorRow) -> Ratio {
    let by_mist = matches!(lubrication, Some(Lubrication::Mist | Lubrication::Drip));
    let range = if by_mist {
        row.mist.or(row.bath)
    } else {
        row.bath
    };
    let (lo, hi) = range.unwrap_or((2.0, 4.0));
    number(f64::midpoint(lo, hi))
}

fn f1<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &RollingBearing,
    row: &'static FactorRow,
    load: Known<Force>,
) -> Result<Known<Ratio>, Unknown> {
    let says = "factor of the load";
    let law = &friction::LOAD;
    if row.f1_exponent == 0.0 {
        let why = "Palmgren's factor of the kind, middle of its range";
        let middle = number(f64::midpoint(row.f1.0, row.f1.1));
        return Ok(cx.r.assume("f1", says, middle, why));
    }
    let c0 = cx.maybe(
        part,
        wanted("C0", "C0", "static load rating"),
        known(b.c0.as_ref()),
    );
    let c0: Known<Force> = c0.ok_or("the static load rating of a ball bearing is missing")?;
    cx.r.attempt("f1", says, law, (("P", load), ("C0", c0)), |(p, c0)| {
        friction::load_factor(row, p, c0)
    })
    .map_err(|_| "the static load rating of a ball bearing cannot be")
}

/// A journal bearing whose sizes and duty are stated.
pub(super) fn journal<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
    out: &mut Vec<Source>,
) -> Result<(), Unknown> {
    let stated = cx.has(b.diameter.as_ref())
        && cx.has(b.width.as_ref())
        && cx.has(b.radial_clearance.as_ref())
        && cx.has(b.speed.as_ref())
        && cx.has(b.load.as_ref());
    // what is amiss has been said where the floor was looked for
    let said = cx.undecided.len();
    let shape = stated
        .then(|| crate::demand::journal::shape::shape(cx, part, b))
        .flatten();
    cx.undecided.truncate(said);
    let shape = shape.ok_or("sizes, load or speed of a journal bearing are missing")?;
    let oil = crate::demand::journal::warm::oil(cx, part, b);
    let fed = oil.at.hottest.filter(|_| b.feed_temperature.is_some());
    let inlet = match (oil.cooled, fed) {
        (Cooled::ByHousing, _) => Inlet::Sump,
        (Cooled::ByOil, Some(t)) => Inlet::Fed(t.value),
        (Cooled::ByOil, None) => Inlet::FedAsSump,
    };
    let (f, d, w, c, n) = shape.sized();
    let with = vec![
        (f.0, f.1.step),
        (d.0, d.1.step),
        (w.0, w.1.step),
        (c.0, c.1.step),
        (n.0, n.1.step),
    ];
    out.push(Source {
        kind: LossKind::Bearing,
        part: part.label.clone(),
        with: With(with),
        form: Form::Journal {
            bearing: Box::new(shape.bearing),
            inlet,
        },
    });
    sealed(cx, part, shape.diameter, shape.speed, out);
    Ok(())
}

/// The pads of a thrust bearing.
pub(super) fn thrust<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &ThrustBearing,
    out: &mut Vec<Source>,
) -> Result<(), Unknown> {
    let stated = cx.has(b.pad_length.as_ref())
        && cx.has(b.pad_width.as_ref())
        && cx.has(b.mean_diameter.as_ref())
        && cx.has(b.speed.as_ref())
        && cx.has(b.load.as_ref())
        && b.pads.is_some();
    let said = cx.undecided.len();
    let loaded = stated
        .then(|| crate::demand::thrust::loaded(cx, part, b))
        .flatten();
    cx.undecided.truncate(said);
    let loaded = loaded.ok_or("sizes, load or speed of a thrust bearing are missing")?;
    out.push(Source {
        kind: LossKind::Bearing,
        part: part.label.clone(),
        with: With(vec![
            ("W", loaded.load.step),
            ("U", loaded.speed.step),
            ("B", loaded.length.step),
            ("L", loaded.width.step),
            ("m", loaded.ratio.step),
            ("z", loaded.pads.step),
        ]),
        form: Form::Pads {
            pad: loaded.pad,
            ratio: loaded.ratio.value,
            count: loaded.pads.value.base(),
        },
    });
    Ok(())
}
