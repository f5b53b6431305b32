//! Why a text is not the quantity wanted, in the reader's words, with what to write.

use super::clauses;
use super::fault::{Fault, Mend, place_in};
use super::want::Want;
use crate::problem::Code;
use crate::quantity::Kind;
use crate::quantity::parse::Bad;

/// A fault for each way a text can fail to be a quantity.
pub(super) fn fault(text: &str, kind: Kind, bad: &Bad, want: &Want) -> Fault {
    let all = 0..text.len();
    let noun = want.noun();
    match bad {
        Bad::Empty => missing(want),
        Bad::NotANumber { .. } => no_number(text, text, want),
        Bad::NotFinite { .. } => instead(
            Fault::new(Code::NumberNotFinite, "not a finite number", all),
            text,
            want,
        ),
        Bad::NoUnit { number } => no_unit(text, number, want),
        Bad::DecimalComma { instead } => Fault::new(
            Code::DecimalComma,
            format!("\"{text}\" has a decimal comma"),
            all.clone(),
        )
        .why("numbers are written with a decimal point; a comma parts a value from what stands behind it")
        .mend(Mend::new(all, instead)),
        Bad::ThousandsComma { instead } => Fault::new(
            Code::ThousandsComma,
            format!("\"{text}\" has a comma in the number"),
            all.clone(),
        )
        .why("thousands are not parted, so that no comma can be taken for a decimal point")
        .mend(Mend::new(all, instead)),
        Bad::UnknownUnit {
            unit,
            nearest,
            number,
        } => unknown_unit(text, kind, (number, unit), *nearest, want),
        Bad::OtherKind { unit, is, kind: other, .. } => other_kind(text, unit, is, *other, want),
        Bad::RiseNotTemperature { number, unit } => Fault::new(
            Code::RiseNotTemperature,
            "this is a temperature, a temperature rise is wanted",
            all.clone(),
        )
        .why(format!(
            "{number} {unit} could mean {number} K above ambient, or a sump at {number} {}",
            unit.trim_start_matches("deg").trim_start_matches('°').replace('C', "°C").replace('F', "°F")
        ))
        .mend(Mend::new(all, rise(number, unit))),
        Bad::WhichGallon { number } => which_gallon(text, number),
        Bad::Impossible { shown, .. } => instead(
            Fault::new(
                Code::ValueImpossible,
                format!("{shown} is not possible, {noun} is wanted"),
                all,
            ),
            text,
            want,
        ),
    }
}

fn rise(number: &str, unit: &str) -> String {
    if unit.contains('F') {
        format!("{number} degF difference")
    } else {
        format!("{number} K")
    }
}

fn which_gallon(text: &str, number: &str) -> Fault {
    let all = 0..text.len();
    Fault::new(
        Code::GallonWhich,
        "a gallon may be the US or the UK one",
        all.clone(),
    )
    .why("a UK gallon is a fifth larger: 4.55 L against 3.79 L")
    .mend(Mend::new(all.clone(), gallons(text, number, "US")))
    .mend(Mend::new(all, gallons(text, number, "UK")))
}

fn gallons(text: &str, number: &str, which: &str) -> String {
    let year = if text.ends_with("a year") {
        " a year"
    } else {
        ""
    };
    format!("{number} gal({which}){year}")
}

/// No value at all.
pub(super) fn missing(want: &Want) -> Fault {
    let fault = Fault::new(
        Code::ValueMissing,
        format!("no value, {} is wanted", want.noun()),
        0..0,
    );
    instead(fault, "", want)
}

/// No number at the beginning.
pub(super) fn no_number(text: &str, shown: &str, want: &Want) -> Fault {
    let fault = Fault::new(
        Code::NumberWanted,
        format!("\"{shown}\" found, {} is wanted", want.noun()),
        0..text.len(),
    );
    instead(fault, text, want)
}

/// `unknown` where it is understood, else an example.
fn instead(fault: Fault, text: &str, want: &Want) -> Fault {
    let all = 0..text.len();
    let example = Mend::new(all.clone(), want.example()).remark("with the right figure");
    if want.unknown {
        fault.mend(Mend::new(all, "unknown")).mend(example)
    } else {
        fault.mend(example)
    }
}

fn no_unit(text: &str, number: &str, want: &Want) -> Fault {
    let all = 0..text.len();
    let fault = Fault::new(Code::UnitMissing, "no unit", all.clone());
    let units = want.kind().spec().units;
    let first = units.first().map_or("", |u| u.name);
    if want.kind() == Kind::Temperature {
        return fault
            .mend(Mend::new(all.clone(), format!("{number} degC")))
            .mend(Mend::new(all, format!("{number} degF")));
    }
    let mend = Mend::new(all, format!("{number} {first}"));
    let others: Vec<&str> = units.iter().skip(1).map(|u| u.name).collect();
    fault.mend(match others.as_slice() {
        [] => mend,
        [one] => mend.remark(format!("({one} is also understood)")),
        [init @ .., last] => {
            let listed = init.join(", ");
            mend.remark(format!("({listed} and {last} are also understood)"))
        }
    })
}

fn unknown_unit(
    text: &str,
    kind: Kind,
    (number, unit): (&str, &str),
    nearest: Option<&'static str>,
    want: &Want,
) -> Fault {
    if let Some(fault) = digits_parted(text, number, unit, kind) {
        return fault;
    }
    if let Some(fault) = comma_forgotten(text, unit, want) {
        return fault;
    }
    let at = place_of(text, unit);
    let fault = Fault::new(
        Code::UnitUnknown,
        format!("unit \"{unit}\" not known"),
        at.clone(),
    );
    if let Some(nearest) = nearest {
        return fault.mend(Mend::new(at, nearest));
    }
    let units: Vec<&str> = want
        .kinds
        .iter()
        .flat_map(|k| k.spec().units)
        .map(|u| u.name)
        .filter(|n| !n.is_empty())
        .collect();
    let first = want.kind().spec().units.first().map_or("", |u| u.name);
    let fault = fault.why(format!("{} takes {}", want.noun(), units.join(", ")));
    let start = text[..at.start].trim_end().len();
    if first.is_empty() {
        return fault.mend(Mend::new(start..text.len(), ""));
    }
    fault.mend(Mend::new(start..text.len(), format!(" {first}")).remark("if that is the unit"))
}

/// `25 000 mm2/s`, `25'000 mm2/s`: thousands parted by a space or a stroke.
fn digits_parted(text: &str, number: &str, unit: &str, kind: Kind) -> Option<Fault> {
    let bare = unit.trim_start_matches(['\'', '’', ' ']);
    let digits: String = bare.chars().take_while(char::is_ascii_digit).collect();
    if digits.len() != 3 {
        return None;
    }
    let rest = bare[digits.len()..].trim();
    let joined = format!("{number}{digits} {rest}");
    let joined = joined.trim_end();
    let fine = crate::quantity::parse::parse(kind, joined).is_ok();
    let mend = Mend::new(0..text.len(), joined);
    fine.then(|| {
        Fault::new(
            Code::ThousandsComma,
            format!("\"{text}\" has a gap in the number"),
            0..text.len(),
        )
        .why("thousands are not parted, so that no gap can hide a missing figure")
        .mend(mend)
    })
}

/// `42 K measured 2026-07-18`, `42 K (one reading)`: a clause without its comma.
fn comma_forgotten(text: &str, unit: &str, want: &Want) -> Option<Fault> {
    let known = |name: &str| want.kinds.iter().any(|k| k.unit(name).is_some());
    let cuts: Vec<usize> = unit
        .match_indices([' ', '(', '"'])
        .map(|(at, _)| at)
        .collect();
    let cut = cuts
        .into_iter()
        .rev()
        .find(|at| known(unit[..*at].trim()))?;
    let rest = unit[cut..].trim();
    let place = place_of(text, rest);
    let fault = Fault::new(
        Code::ClauseUnknown,
        format!("\"{rest}\" behind the unit without a comma"),
        place.clone(),
    );
    let before = text[..place.start].trim_end().len();
    if clauses::opens(rest) {
        return Some(fault.mend(Mend::new(before..place.start, ", ")));
    }
    let inner = rest.trim_matches(['(', ')']).replace('"', "");
    if clauses::opens(&inner) {
        return Some(fault.mend(Mend::new(before..place.end, format!(", {inner}"))));
    }
    let mend = Mend::new(before..place.end, format!(", \"{inner}\""));
    Some(fault.mend(mend.remark("as a remark")))
}

fn other_kind(text: &str, unit: &str, is: &str, other: Kind, want: &Want) -> Fault {
    let at = place_of(text, unit);
    let fault = Fault::new(
        Code::UnitOther,
        format!("\"{unit}\" is {is}, {} is wanted", want.noun()),
        at.clone(),
    );
    let fault = match (other, want.kind()) {
        (Kind::DynamicViscosity, Kind::KinematicViscosity) => {
            fault.why("mPa.s divided by the density in g/cm3 gives mm2/s")
        }
        (Kind::KinematicViscosity, Kind::DynamicViscosity) => {
            fault.why("mm2/s times the density in g/cm3 gives mPa.s")
        }
        (Kind::Rise, Kind::Temperature) => {
            fault.why("a difference says nothing about where the temperature lies")
        }
        (Kind::Force, Kind::Mass) | (Kind::Mass, Kind::Force) => fault.why("1 kg weighs 9.81 N"),
        _ => fault,
    };
    let first = want.kind().spec().units.first().map_or("", |u| u.name);
    let start = text[..at.start].trim_end().len();
    let value = format!(" {first}");
    let unit = Mend::new(start..text.len(), value.trim_end()).remark("if that is the unit");
    let fault = fault.mend(unit);
    if want.unknown {
        return fault.mend(Mend::new(0..text.len(), "unknown"));
    }
    fault
}

/// A viscosity without its temperature.
pub(super) fn at_missing(head: &str, want: &Want) -> Fault {
    let at = head.len();
    let usual = match want.kind() {
        Kind::Density => " at 15 degC",
        Kind::Ratio => " at 100 degC",
        _ => " at 40 degC",
    };
    Fault::new(
        Code::AtMissing,
        format!("no temperature beside {}", want.noun()),
        0..at,
    )
    .why("viscosity and density mean something only together with their temperature")
    .mend(Mend::new(at..at, usual).remark("or the temperature it holds at"))
}

/// Bytes of the last occurrence of a piece that was cut from a text, perhaps a copy.
fn place_of(text: &str, piece: &str) -> std::ops::Range<usize> {
    text.rfind(piece)
        .map_or_else(|| place_in(text, text), |at| at..at + piece.len())
}
