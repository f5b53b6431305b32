//! Losses of rolling and plain bearings.

use super::source::{Form, Inlet};
use super::{Lack, LossKind, Source, Tally, With, sealed};
use crate::demand::context::Context;
use crate::demand::inputs::{Usual, Wanted};
use crate::demand::journal::warm::Cooled;
use crate::model::part::{BearingClass, JournalBearing, Part, RollingBearing, ThrustBearing};
use crate::model::{Lubrication, Stated};
use crate::quantity::convert::number;
use crate::quantity::{Force, Measure, Ratio, Torque};
use crate::relation::bearing::friction::{self, FACTORS, FactorRow};
use crate::relation::bearing::reference_viscosity::{PITCH_DIAMETER, pitch_diameter};
use crate::trace::{Known, Recorder};

const ALL: &str = "all its losses";
const UNDER_LOAD: &str = "friction under load";

fn wanted(key: &'static str, symbol: &'static str, says: &'static str) -> Wanted<'static> {
    crate::demand::inputs::wanted(key, symbol, says, "designation, nameplate or drawing")
}

/// A rolling bearing by Palmgren. What the load takes does not depend on the oil; where the load
/// is not known and nothing stands in for it, only the friction without load is counted.
pub(super) fn rolling<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &RollingBearing,
    out: &mut Tally,
) -> Result<(), Lack> {
    let row = b.class.and_then(row);
    let row = row.ok_or(Lack::new(ALL, "the kind of bearing is not stated"))?;
    let size = wanted("bore", "d", "bore");
    let bore = cx.maybe(part, size, out.known(b.bore.as_ref()));
    let bore = bore.ok_or(Lack::of(ALL, "the bore is not stated", size))?;
    let size = wanted("outside", "D", "outside diameter");
    let outside = cx.maybe(part, size, out.known(b.outside.as_ref()));
    let outside = outside.ok_or(Lack::of(ALL, "the outside diameter is not stated", size))?;
    let turns = wanted("speed", "n", "speed of rotation");
    let speed = cx.maybe(part, turns, out.known(b.speed.as_ref()));
    let speed = speed.ok_or(Lack::of(ALL, "the speed is not stated", turns))?;
    let with = (("d", bore), ("D", outside));
    let dm =
        cx.r.attempt("Dpw", "pitch diameter", &PITCH_DIAMETER, with, |(d, o)| {
            pitch_diameter(d, o)
        })
        .map_err(|_| Lack::new(ALL, "bore and outside diameter do not fit"))?;
    let why = "Palmgren's factor of the kind, middle of its range";
    let f0 = cx.r.assume(
        "f0",
        "factor of friction without load",
        f0(cx.lubrication(), row),
        why,
    );
    let mut with = vec![("f0", f0.step), ("dm", dm.step), ("n", speed.step)];
    let torque = match under_load(cx, part, b, row, out) {
        Ok((load, f1)) => {
            let says = "friction torque of the load";
            let sized = (("f1", f1), ("P1", load), ("dm", dm));
            let law = &friction::LOAD;
            let made = cx.r.attempt("M1", says, law, sized, |(f1, p, dm)| {
                friction::load(f1, p, dm)
            });
            let torque: Known<Torque> =
                made.map_err(|_| Lack::new(ALL, "the load is not above zero"))?;
            with.insert(2, ("M1", torque.step));
            torque.value
        }
        Err(lack) => {
            out.lacks(part, lack);
            Torque::from_base(0.0)
        }
    };
    out.sources.push(Source {
        kind: LossKind::Bearing,
        part: part.label.clone(),
        with: With(with),
        form: Form::Rolling {
            f0: f0.value,
            load: torque,
            speed: speed.value,
            pitch_diameter: dm.value,
        },
    });
    sealed(cx, part, bore, speed, out);
    Ok(())
}

/// Load and its factor, each stated or usual.
fn under_load<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &RollingBearing,
    row: &'static FactorRow,
    out: &Tally,
) -> Result<(Known<Force>, Known<Ratio>), Lack> {
    let load = load(cx, part, b, out)?;
    let f1 = f1(cx, part, b, row, (load, out))?;
    Ok((load, f1))
}

/// The load as stated, or a usual share of the dynamic load rating where that is stated.
fn load<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &RollingBearing,
    out: &Tally,
) -> Result<Known<Force>, Lack> {
    let key = Wanted {
        how: "calculation of the maker; 3 to 15 % of the dynamic load rating is usual",
        ..wanted("load", "P", "equivalent load")
    };
    if let Some(load) = cx.maybe(part, key, out.known(b.load.as_ref())) {
        return Ok(load);
    }
    let rated = wanted("C", "C", "dynamic load rating");
    let rating: Option<Known<Force>> =
        cx.maybe(part, rated, out.known(b.c.as_ref()).filter(|_| out.asked));
    let lack = || {
        let because = "neither the load nor the dynamic load rating is stated";
        Lack::of(UNDER_LOAD, because, key)
    };
    let rating = rating.ok_or_else(lack)?;
    let share = |k: f64| Force::from_base(rating.value.base() * k);
    let usual = Usual {
        value: share(0.08),
        lo: share(0.03),
        hi: share(0.15),
        why: "3 to 15 % of the dynamic load rating is common practice",
    };
    Ok(cx.or_assume(part, key, b.load.as_ref(), usual))
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
    (load, out): (Known<Force>, &Tally),
) -> Result<Known<Ratio>, Lack> {
    let says = "factor of the load";
    let law = &friction::LOAD;
    if row.f1_exponent == 0.0 {
        let why = "Palmgren's factor of the kind, middle of its range";
        let middle = number(f64::midpoint(row.f1.0, row.f1.1));
        return Ok(cx.r.assume("f1", says, middle, why));
    }
    let key = wanted("C0", "C0", "static load rating");
    let stated: Option<Known<Force>> = cx.maybe(part, key, out.known(b.c0.as_ref()));
    let c0 = match stated {
        Some(c0) => c0,
        None if out.asked => {
            let times = |k: f64| Force::from_base(load.value.base() * k);
            let usual = Usual {
                value: times(10.0),
                lo: times(4.0),
                hi: times(30.0),
                why: "4 to 30 times the load is common practice",
            };
            let nobody: Option<&Stated<Force>> = None;
            cx.or_assume(part, key, nobody, usual)
        }
        None => {
            let because = "the static load rating of a ball bearing is not stated";
            return Err(Lack::of(UNDER_LOAD, because, key));
        }
    };
    cx.r.attempt("f1", says, law, (("P", load), ("C0", c0)), |(p, c0)| {
        friction::load_factor(row, p, c0)
    })
    .map_err(|_| Lack::new(UNDER_LOAD, "the static load rating is not above zero"))
}

/// A journal bearing. Where losses are asked about, the plausible sizes of its film stand in for
/// those nobody stated, as they do for its floor.
pub(super) fn journal<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    b: &JournalBearing,
    out: &mut Tally,
) -> Result<(), Lack> {
    let stated = cx.has(b.diameter.as_ref())
        && cx.has(b.width.as_ref())
        && cx.has(b.radial_clearance.as_ref())
        && cx.has(b.speed.as_ref())
        && cx.has(b.load.as_ref());
    // what is amiss has been said where the floor was looked for
    let said = cx.undecided.len();
    let shape = (stated || out.asked)
        .then(|| crate::demand::journal::shape::shape(cx, part, b))
        .flatten();
    cx.undecided.truncate(said);
    let shape = shape.ok_or(Lack::new(ALL, "sizes, load or speed are not stated"))?;
    let oil = crate::demand::journal::warm::oil(cx, part, b);
    let fed = oil.at.hottest.filter(|_| b.feed_temperature.is_some());
    let inlet = match (oil.cooled, fed) {
        (Cooled::ByHousing, _) => Inlet::Sump,
        (Cooled::ByOil, Some(t)) => Inlet::Fed(t.value, shape.feed()),
        (Cooled::ByOil, None) => Inlet::FedAsSump(shape.feed()),
    };
    let (f, d, w, c, n) = shape.sized();
    let mut with = vec![
        (f.0, f.1.step),
        (d.0, d.1.step),
        (w.0, w.1.step),
        (c.0, c.1.step),
        (n.0, n.1.step),
    ];
    with.extend(shape.pushed_steps());
    out.sources.push(Source {
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
    out: &mut Tally,
) -> Result<(), Lack> {
    let stated = cx.has(b.pad_length.as_ref())
        && cx.has(b.pad_width.as_ref())
        && cx.has(b.mean_diameter.as_ref())
        && cx.has(b.speed.as_ref())
        && cx.has(b.load.as_ref())
        && b.pads.is_some();
    let said = cx.undecided.len();
    let loaded = (stated || out.asked)
        .then(|| crate::demand::thrust::loaded(cx, part, b))
        .flatten();
    cx.undecided.truncate(said);
    let loaded = loaded.ok_or(Lack::new(ALL, "sizes, load or speed are not stated"))?;
    out.sources.push(Source {
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
