//! What stands beside a quantity: the temperature it holds at, and its tolerance.

use super::body::{Deviation, quantity};
use super::fault::{Fault, Mend, place_in};
use super::misread;
use super::want::{At, Ends, Want};
use crate::problem::Code;
use crate::quantity::Kind;
use crate::quantity::parse::{Read, parse};

/// Parts `219 mm2/s at 40 degC`.
pub(super) fn temperature_beside<'t>(
    head: &'t str,
    want: &Want,
) -> Result<(&'t str, Option<Read>), Fault> {
    let beside = head
        .rfind(" at ")
        .map(|at| (head[..at].trim_end(), head[at + 4..].trim_start()));
    match (want.at, beside) {
        (At::Must, None) => {
            // A unit that is wrong as well is said first.
            let value = head.split("+/-").next().unwrap_or(head).trim_end();
            quantity(value, want)?;
            Err(misread::at_missing(head, want))
        }
        (At::Never, Some((value, temperature)))
            if parse(Kind::Temperature, temperature).is_ok() =>
        {
            Err(Fault::new(
                Code::AtUnwanted,
                format!("a temperature found beside {}", want.noun()),
                place_in(head, temperature),
            )
            .why("this value does not depend on a temperature")
            .mend(Mend::new(value.len()..head.len(), "")))
        }
        (At::Must | At::May, Some((value, temperature))) => {
            if let Some(sign) = TOLERANCE_SIGNS.iter().find(|s| temperature.contains(**s)) {
                let (temperature, off) = temperature.split_once(sign).unwrap_or((temperature, ""));
                return Err(Fault::new(
                    Code::ToleranceForm,
                    "tolerance behind the temperature",
                    place_in(head, off.trim()),
                )
                .why("the tolerance of the value stands beside it, before the temperature")
                .mend(Mend::new(
                    0..head.len(),
                    format!("{value} +/- {} at {}", off.trim(), temperature.trim()),
                )));
            }
            let place = place_in(head, temperature).start;
            let only = Want::one(&[Kind::Temperature]);
            let at = quantity(temperature, &only).map_err(|f| f.shifted(place))?;
            Ok((value, Some(at)))
        }
        _ => Ok((head, None)),
    }
}

const TOLERANCE_SIGNS: &[&str] = &["+/-", "±", "+-", "-/+", "+/\u{2212}"];

/// Parts `42 K +/- 3 K`.
pub(super) fn tolerance<'t>(
    head: &str,
    value: &'t str,
    want: &Want,
) -> Result<(&'t str, Option<&'t str>), Fault> {
    let Some((sign, (value, off))) = TOLERANCE_SIGNS
        .iter()
        .find_map(|s| value.split_once(s).map(|parts| (s, parts)))
    else {
        return Ok((value, None));
    };
    let (value, off) = (value.trim(), off.trim());
    if off.is_empty() {
        let place = place_in(head, value).end;
        return Err(Fault::new(
            Code::ToleranceForm,
            format!("nothing behind {sign}"),
            0..head.len(),
        )
        .mend(Mend::new(place..head.len(), "")));
    }
    if want.ends == Ends::Range {
        let place = place_in(head, value).end;
        return Err(Fault::new(
            Code::ToleranceUnwanted,
            "a tolerance found, a range is wanted",
            0..head.len(),
        )
        .mend(Mend::new(place..head.len(), "")));
    }
    Ok((value, Some(off)))
}

/// `3 K`, `3 %`; of a temperature the tolerance is a difference.
pub(super) fn deviation_of(head: &str, off: &str, read: &Read) -> Result<Deviation, Fault> {
    let place = place_in(head, off);
    if let Ok(share) = parse(Kind::Ratio, off)
        && share.unit == "%"
        && read.unit != "%"
    {
        return positive(head, off, share.amount.base).map(Deviation::Share);
    }
    let kind = match read.amount.kind {
        Kind::Temperature => Kind::Rise,
        kind => kind,
    };
    match parse(kind, off) {
        Ok(by) => positive(head, off, by.amount.base).map(|_| Deviation::Of(by)),
        Err(bad) => {
            let unit = match kind {
                Kind::Rise => "K",
                _ => read.unit,
            };
            let number = off
                .split(|c: char| c.is_whitespace() || c.is_alphabetic())
                .next()
                .filter(|n| n.parse::<f64>().is_ok_and(f64::is_finite));
            let fault = Fault::new(
                Code::ToleranceForm,
                format!("tolerance \"{off}\" not understood"),
                place.clone(),
            )
            .why(format!(
                "{bad}; a tolerance is written in the unit of the value or in %"
            ));
            Err(match number {
                Some(n) => fault
                    .mend(Mend::new(place.clone(), format!("{n} {unit}")))
                    .mend(Mend::new(place, format!("{n} %"))),
                None => fault.mend(Mend::new(place, "5 %").remark("with the right figure")),
            })
        }
    }
}

fn positive(head: &str, off: &str, base: f64) -> Result<f64, Fault> {
    if base > 0.0 {
        return Ok(base);
    }
    let place = place_in(head, off);
    let bare = off.trim_start_matches(['-', '+', '\u{2212}']);
    let fault = Fault::new(
        Code::ToleranceForm,
        format!("a tolerance of {off} says nothing"),
        place.clone(),
    )
    .why("a tolerance counts to both sides and is larger than zero");
    Err(if base < 0.0 {
        fault.mend(Mend::new(place, bare))
    } else {
        let sign = head.find(['+', '±']).unwrap_or(place.start);
        let value = head[..sign].trim_end().len();
        fault.mend(Mend::new(value..place.end, ""))
    })
}
