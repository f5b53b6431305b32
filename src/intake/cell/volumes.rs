//! Numbers that stand for more than themselves: gallons of which kind, masses of oil, two numbers.

use super::{Expect, Reading, Rules, to_base};
use crate::input::value::{At, Ends};
use crate::intake::yaml;
use crate::quantity::Kind;
use crate::quantity::show::{Toward, significant};

/// Gallons: both, unless the file states which.
pub(super) fn gallons(
    expect: &Expect<'_>,
    rules: &Rules,
    first: &str,
    second: Option<&str>,
) -> Reading {
    if !expect
        .want
        .kinds
        .iter()
        .any(|k| matches!(k, Kind::Volume | Kind::VolumePerYear))
    {
        return Reading::fault(format!("gal is a volume, {} is wanted", expect.want.noun()));
    }
    let yearly = expect.want.kinds[0] == Kind::VolumePerYear;
    let tail = if yearly { " a year" } else { "" };
    if let Some(gallon) = rules.gallon
        && second.is_none()
    {
        return Reading {
            value: Some(format!("{first} {gallon}{tail}")),
            remark: Some(format!("{first} gal, the map states {gallon}")),
            candidates: to_base(Kind::Volume, gallon, first)
                .map(|b| vec![(format!("{first} {gallon}"), b)])
                .unwrap_or_default(),
            ..Reading::default()
        };
    }
    let litres = |n: &str, unit: &str| to_base(Kind::Volume, unit, n).map(|m3| m3 * 1e3);
    let (Some(us), Some(uk)) = (
        litres(first, "gal(US)"),
        litres(second.unwrap_or(first), "gal(UK)"),
    ) else {
        return Reading::fault("the number is not finite");
    };
    let (lo, hi) = (
        significant(us, 3, Toward::Nearest),
        significant(uk, 3, Toward::Nearest),
    );
    let which = format!("{first} gal: US ({lo} L) or UK ({hi} L)?");
    Reading {
        value: Some(format!(
            "unknown ({lo} .. {hi} L{tail}), ask {}",
            yaml::remark(&which)
        )),
        ask: Some(which),
        candidates: vec![
            (format!("{first} gal(US)"), us * 1e-3),
            (format!("{first} gal(UK)"), uk * 1e-3),
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
