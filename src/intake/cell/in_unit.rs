//! The number or numbers of a cell in the unit of the cell, of the column, or the usual one.

use super::volumes::{gallons, range, weighed};
use super::{Expect, Reading, Rules, plausible, to_base};
use crate::intake::parsed::Parsed;
use crate::intake::units::Unit;
use crate::quantity::Kind;
use crate::quantity::show::{Toward, significant};

/// The unit a bare number is taken in where the column names none.
fn usual(kinds: &[Kind], grease: bool, number: &str) -> Option<&'static str> {
    Some(match kinds.first()? {
        Kind::Volume if grease && kinds.contains(&Kind::Mass) => "g",
        Kind::Force | Kind::Efflux | Kind::LoadPerLength => return None,
        Kind::Density => {
            if number.parse::<f64>().is_ok_and(|v| v < 10.0) {
                "g/cm3"
            } else {
                "kg/m3"
            }
        }
        kind => kind.spec().units[0].name,
    })
}

/// The number or numbers in the unit of the cell, of the column, or the usual one.
pub(super) fn in_unit(
    parsed: &Parsed,
    expect: &Expect<'_>,
    rules: &Rules,
    (first, second): (String, Option<String>),
) -> Reading {
    let kinds = expect.want.kinds;
    let degree_alone = parsed
        .strange
        .as_deref()
        .is_some_and(|s| matches!(s, "°" | "º" | "deg" | "o"))
        && kinds.contains(&Kind::Temperature);
    if let Some(strange) = &parsed.strange
        && !degree_alone
    {
        return Reading::fault(format!(
            "\"{strange}\" is no unit of {}",
            expect.want.noun()
        ));
    }
    let from_column = parsed.unit.is_none();
    let unit = match parsed.unit.or(expect.unit) {
        Some(Unit::Gallon(part)) => {
            return gallons(expect, rules, part, (&first, second.as_deref()));
        }
        Some(Unit::Of(kind, unit)) if kinds.contains(&kind) => Some((kind, unit)),
        Some(Unit::Of(kind, unit)) if same_dimension(kind, kinds) => {
            Some((kinds[0], respelt(kind, unit)))
        }
        Some(Unit::Of(kind, unit)) => {
            return Reading::fault(format!(
                "{unit} is {}, {} is wanted",
                kind.spec().noun,
                expect.want.noun()
            ));
        }
        None => None,
    };
    match unit {
        Some((Kind::Mass, unit)) if kinds[0] == Kind::Volume && !expect.grease => {
            weighed(expect, rules, &first, unit)
        }
        Some((kind, unit)) => stated(parsed, expect, (kind, unit), (first, second), from_column),
        None if kinds[0] == Kind::Ratio => {
            stated(parsed, expect, (Kind::Ratio, ""), (first, second), false)
        }
        None => bare(parsed, expect, (first, second), degree_alone),
    }
}

/// A volume is as good as a volume a year, and so on, where the column says so.
fn same_dimension(kind: Kind, kinds: &[Kind]) -> bool {
    matches!(
        (kinds.first(), kind),
        (Some(Kind::VolumePerYear), Kind::Volume)
            | (Some(Kind::HoursPerYear), Kind::Time)
            | (Some(Kind::Rise), Kind::Temperature)
    )
}

fn respelt(kind: Kind, unit: &'static str) -> &'static str {
    match (kind, unit) {
        (Kind::Volume, "gal(US)") => "gal(US) a year",
        (Kind::Volume, "gal(UK)") => "gal(UK) a year",
        (Kind::Volume, _) => "L a year",
        (Kind::Time, _) => "h a year",
        (Kind::Temperature, "degF") => "degF difference",
        (Kind::Temperature, _) => "K",
        _ => unit,
    }
}

/// A value whose unit is known.
fn stated(
    parsed: &Parsed,
    expect: &Expect<'_>,
    (kind, unit): (Kind, &'static str),
    (first, second): (String, Option<String>),
    from_column: bool,
) -> Reading {
    let base = |n: &str| to_base(kind, unit, n);
    let Some(amount) = base(&first) else {
        return Reading::fault("the number is not finite");
    };
    let spec = kind.spec();
    if amount < spec.possible.0 || amount > spec.possible.1 {
        return Reading::fault(format!("{first} {unit} is not possible for {}", spec.noun));
    }
    let join = |n: &str| format!("{n} {unit}").trim_end().to_owned();
    if let Some(second) = second {
        return range(expect, (kind, unit), (&first, &second));
    }
    if let Some(bound) = parsed.bound {
        return if expect.want.bound {
            Reading {
                value: Some(format!("{bound} {}", join(&first))),
                ..Reading::default()
            }
        } else {
            Reading::fault(format!("a bound, {} is wanted", expect.want.noun()))
        };
    }
    let mut reading = Reading {
        value: Some(join(&first)),
        candidates: vec![(join(&first), amount)],
        ..Reading::default()
    };
    if let (Kind::Temperature, Some((lo, hi))) = (kind, plausible(expect.key)) {
        let celsius = amount - 273.15;
        if !(lo..=hi).contains(&celsius) {
            outside(&mut reading, &first, unit, (lo, hi), from_column);
        }
    }
    reading
}

/// A temperature outside what can be: in a column of degC perhaps degF.
fn outside(
    reading: &mut Reading,
    number: &str,
    unit: &str,
    (lo, hi): (f64, f64),
    from_column: bool,
) {
    let fahrenheit = to_base(Kind::Temperature, "degF", number).map(|k| k - 273.15);
    match fahrenheit.filter(|f| (lo..=hi).contains(f)) {
        Some(f) if from_column && unit == "degC" => {
            let f = significant(f, 4, Toward::Nearest);
            reading.value = None;
            reading.missing = true;
            reading.candidates.clear();
            reading.fault = Some(format!(
                "{number} degC is outside {lo} to {hi} degC; {number} degF would be {f} degC"
            ));
            reading.ask = Some(format!("is {number} in degF?"));
        }
        _ => {
            reading.ask = Some(format!(
                "{number} {unit} is outside {lo} to {hi} degC: is it right?"
            ));
        }
    }
}

/// A number without a unit anywhere.
fn bare(
    parsed: &Parsed,
    expect: &Expect<'_>,
    (first, second): (String, Option<String>),
    degree_alone: bool,
) -> Reading {
    let kinds = expect.want.kinds;
    let Some(unit) = usual(kinds, expect.grease, &first) else {
        return Reading::fault(format!(
            "no unit; {} is wanted, as {}",
            expect.want.noun(),
            expect.want.example()
        ));
    };
    let kind = kinds
        .iter()
        .copied()
        .find(|k| k.unit(unit).is_some())
        .unwrap_or(kinds[0]);
    let mut unit = unit;
    let mut ask = None;
    if let (Kind::Temperature, Some((lo, hi))) = (kind, plausible(expect.key))
        && let Ok(n) = first.parse::<f64>()
        && !(lo..=hi).contains(&n)
    {
        let as_f = (n - 32.0) / 1.8;
        if !(lo..=hi).contains(&as_f) {
            return Reading {
                ask: Some(format!(
                    "{first} without a unit is outside what can be: which unit?"
                )),
                ..Reading::fault(format!(
                    "{first} is outside {lo} to {hi} degC in degC and in degF"
                ))
            };
        }
        unit = "degF";
        let c = significant(as_f, 3, Toward::Nearest);
        ask = Some(format!(
            "{first} without a unit: {first} degC is outside {lo} to {hi} degC, {first} degF is {c} degC; is it degF?"
        ));
    }
    let mut reading = stated(parsed, expect, (kind, unit), (first.clone(), second), false);
    if reading.fault.is_none() {
        reading.assumed = true;
        reading.unitless = ask.is_none() && !degree_alone;
        if degree_alone {
            reading.fault = Some(format!(
                "no scale behind the degree sign: read as {first} degC"
            ));
        } else {
            reading.read_as = Some(format!("read as {first} {unit}").trim_end().to_owned());
        }
        reading.remark = Some(format!("register: {first} without a unit"));
        if ask.is_some() {
            reading.ask = ask;
        }
    }
    reading
}
