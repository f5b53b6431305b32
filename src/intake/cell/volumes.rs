//! Numbers that stand for more than themselves: gallons of which kind, masses of oil, two numbers.

use super::{Expect, Reading, Rules, to_base};
use crate::input::value::{At, Ends};
use crate::intake::units::Part;
use crate::intake::yaml;
use crate::quantity::Kind;
use crate::quantity::show::{Toward, significant};

/// Gallons, quarts and pints: both kinds, unless the file states which.
pub(super) fn gallons(
    expect: &Expect<'_>,
    rules: &Rules,
    part: Part,
    (first, second): (&str, Option<&str>),
) -> Reading {
    let sign = part.sign();
    let volume = |k: &Kind| matches!(k, Kind::Volume | Kind::VolumePerYear);
    if !expect.want.kinds.iter().any(volume) {
        let noun = expect.want.noun();
        return Reading::fault(format!("{sign} is a volume, {noun} is wanted"));
    }
    let yearly = expect.want.kinds[0] == Kind::VolumePerYear;
    let tail = if yearly { " a year" } else { "" };
    let in_m3 =
        |n: &str, unit: &str| to_base(Kind::Volume, unit, n).map(|m3| m3 / part.in_a_gallon());
    if let Some(gallon) = rules.gallon
        && second.is_none()
    {
        let Some(m3) = in_m3(first, gallon) else {
            return Reading::fault("the number is not finite");
        };
        let value = match part {
            Part::Whole => format!("{first} {gallon}"),
            Part::Quart | Part::Pint => {
                format!("{} L", significant(m3 * 1e3, 4, Toward::Nearest))
            }
        };
        return Reading {
            candidates: vec![(value.clone(), m3)],
            value: Some(format!("{value}{tail}")),
            remark: Some(format!("{first} {sign}, the map states {gallon}")),
            ..Reading::default()
        };
    }
    let (Some(us), Some(uk)) = (
        in_m3(first, "gal(US)"),
        in_m3(second.unwrap_or(first), "gal(UK)"),
    ) else {
        return Reading::fault("the number is not finite");
    };
    if us > uk {
        let last = second.unwrap_or(first);
        return Reading::fault(format!("{first} to {last} {sign} runs downwards"));
    }
    let litres = |m3: f64| significant(m3 * 1e3, 3, Toward::Nearest);
    let (lo, hi) = (litres(us), litres(uk));
    let which = format!("{first} {sign}: US ({lo} L) or UK ({hi} L)?");
    Reading {
        value: Some(format!(
            "unknown ({lo} .. {hi} L{tail}), ask {}",
            yaml::remark(&which)
        )),
        ask: Some(which),
        candidates: vec![
            (format!("{first} {sign}(US)"), us),
            (format!("{first} {sign}(UK)"), uk),
        ],
        ..Reading::default()
    }
}

/// A mass of oil as a volume.
pub(super) fn weighed(
    expect: &Expect<'_>,
    rules: &Rules,
    first: &str,
    unit: &'static str,
) -> Reading {
    let Some(kg) = to_base(Kind::Mass, unit, first) else {
        return Reading::fault("the number is not finite");
    };
    let rho = rules.density_kg_m3;
    let litres = significant(kg / rho * 1e3, 3, Toward::Nearest);
    Reading {
        value: Some(format!("{litres} L")),
        assumed: true,
        remark: Some(format!("register: {first} {unit}, at {rho} kg/m3")),
        read_as: Some(format!(
            "{first} {unit} of oil is about {litres} L at {rho} kg/m3"
        )),
        ask: Some(format!(
            "{first} {unit} stands for {}: how many litres?",
            expect.key
        )),
        candidates: vec![(format!("{litres} L"), kg / rho)],
        ..Reading::default()
    }
}

/// Two numbers: a range where the key takes one, else not known within it.
pub(super) fn range(
    expect: &Expect<'_>,
    (kind, unit): (Kind, &'static str),
    (a, b): (&str, &str),
) -> Reading {
    let (Some(low), Some(high)) = (to_base(kind, unit, a), to_base(kind, unit, b)) else {
        return Reading::fault("the number is not finite");
    };
    if low > high {
        return Reading::fault(format!("{a} to {b} runs downwards"));
    }
    let both = format!("{a} .. {b} {unit}").trim_end().to_owned();
    if expect.want.ends == Ends::Range {
        return Reading {
            value: Some(both),
            ..Reading::default()
        };
    }
    if !expect.want.unknown || expect.want.at == At::Must {
        return Reading::fault(format!("a range, {} is wanted", expect.want.noun()));
    }
    let which = format!("{a} to {b} {unit} in the register: which holds?");
    Reading {
        value: Some(format!("unknown ({both}), ask {}", yaml::remark(&which))),
        ask: Some(which),
        ..Reading::default()
    }
}
