//! What a figure of a part may be: a size above zero, within what machines have. A figure outside
//! is refused by name instead of running through the relations to a limit that means nothing.

use super::{Fields, Slot};
use crate::input::keys::{self, Record, part};
use crate::input::reader::Reader;
use crate::input::value::{Body, Value};
use crate::problem::{Code, Write};
use crate::quantity::convert::{celsius, degrees, rpm};
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{Amount, Kind, Measure};
use crate::source::Span;

/// Least and greatest, base units.
type Ends = (f64, f64);

/// What a figure is measured against.
struct Bounds {
    ends: Ends,
    /// Whether the sign is that of a hollow body: only the size is looked at.
    signed: bool,
}

/// Records whose reader says itself what is wrong with a size that is not above zero.
fn says_itself(record: &Record) -> bool {
    let own = [&part::JOURNAL_BEARING, &part::THRUST_BEARING];
    own.iter().any(|r| std::ptr::eq(*r, record))
}

fn is_part(record: &Record) -> bool {
    let kinds = part::KINDS.iter().map(|k| k.record);
    kinds
        .chain([&part::BEARING_SIZES])
        .any(|r| std::ptr::eq(r, record))
}

/// Whether a figure of a part can be; it is reported where it cannot.
pub(super) fn possible(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    slot: &Slot<'_>,
    value: &Value,
) -> bool {
    if !is_part(fields.record) {
        return true;
    }
    let figures: Vec<Amount> = match &value.body {
        Body::One { read, .. } => vec![read.amount],
        Body::Unknown(Some((lo, hi))) => vec![lo.amount, hi.amount],
        _ => Vec::new(),
    };
    let own =
        says_itself(fields.record) && !matches!(slot.key.name, "shaft roughness" | "feed pressure");
    for amount in figures {
        let Some(bounds) = bounds(slot.key.name, amount.kind) else {
            continue;
        };
        if own && amount.base <= 0.0 && bounds.ends.0 > 0.0 {
            continue;
        }
        if !within(amount, &bounds) {
            report(reader, slot, amount, &bounds);
            return false;
        }
    }
    true
}

/// Ends are met by a hair either way.
fn within(amount: Amount, bounds: &Bounds) -> bool {
    let (lo, hi) = bounds.ends;
    let size = if bounds.signed {
        amount.base.abs()
    } else {
        amount.base
    };
    let hair = 1e-9 * size.abs();
    size >= lo - hair && size <= hi + hair
}

fn report(reader: &mut Reader<'_>, slot: &Slot<'_>, amount: Amount, bounds: &Bounds) {
    let name = slot.key.name;
    let (lo, hi) = bounds.ends;
    let told = |base: f64| quantity(Amount { base, ..amount }, Units::Si, Toward::Nearest);
    let what = if amount.base == 0.0 && lo > 0.0 {
        format!("{name} is zero")
    } else if amount.base < 0.0 && lo >= 0.0 {
        format!("{name} is below zero")
    } else if amount.base < lo {
        format!("{name} is too small to be one")
    } else {
        format!("{name} is too large to be one")
    };
    let why = match (amount.kind, amount.base <= 0.0 && lo > 0.0) {
        (Kind::RotationalSpeed | Kind::Velocity, true) => {
            "what stands still draws no oil in; give the speed it runs at".to_owned()
        }
        _ => format!("it lies between {} and {}", told(lo), told(hi)),
    };
    let example = keys::example(slot.key);
    let span: Span = slot.node.span;
    let problem = reader
        .at(Code::ValueImpossible, what, span, &slot.within)
        .why(why)
        .write(Write::edit(span, example).remark("with the right figure"));
    reader.report(problem);
}

/// What machines have, wide enough for every one and narrow enough for a slip of units.
fn bounds(name: &str, kind: Kind) -> Option<Bounds> {
    let ends = match kind {
        Kind::Length if name.contains("roughness") => (1e-9, 1e-3),
        Kind::Length if matches!(name, "r1x" | "r2x" | "r1y" | "r2y") => {
            return Some(Bounds {
                ends: (1e-5, 1e7),
                signed: true,
            });
        }
        Kind::Length if matches!(name, "radius" | "rx" | "ry") => (1e-5, 1e7),
        Kind::Length if name.contains("clearance") || name == "inlet distance" => (1e-7, 50.0),
        Kind::Length => (1e-5, 50.0),
        Kind::Force => (1e-3, 1e9),
        Kind::RotationalSpeed => (rpm(1e-4).base(), rpm(1e6).base()),
        Kind::Power => (1e-3, 1e9),
        Kind::Torque => (1e-6, 1e9),
        Kind::Velocity => (1e-6, 1e3),
        Kind::Pressure if name.starts_with('E') => (1e5, 2e12),
        Kind::Pressure => (100.0, 1e9),
        Kind::Area => (1e-5, 1e5),
        Kind::LoadPerLength => (1e-3, 1e10),
        Kind::DynamicViscosity if name == "HTHS at least" => (1e-4, 1.0),
        Kind::Angle => angle(name),
        Kind::Ratio => number(name)?,
        Kind::Rise => (-100.0, 200.0),
        Kind::Temperature => (celsius(-60.0).base(), celsius(300.0).base()),
        _ => return None,
    };
    Some(Bounds {
        ends,
        signed: false,
    })
}

fn angle(name: &str) -> Ends {
    let (lo, hi) = match name {
        "helix" => (0.0, 60.0),
        "pressure angle" => (5.0, 45.0),
        "lead angle" => (0.1, 89.0),
        _ => (0.0, 90.0),
    };
    (degrees(lo).base(), degrees(hi).base())
}

fn number(name: &str) -> Option<Ends> {
    Some(match name {
        "ratio" => (1e-3, 1e4),
        "film ratio" => (1e-3, 100.0),
        "application factor" => (0.5, 10.0),
        "conformity" => (0.5, 1.0),
        "slide-roll" => (0.0, 100.0),
        "poisson1" | "poisson2" => (0.0, 0.5),
        _ => return None,
    })
}
