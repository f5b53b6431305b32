//! The value itself, without what stands behind it.

use super::fault::{Fault, Mend, place_in};
use super::misread;
use super::want::{At, Ends, Want};
use crate::problem::Code;
use crate::quantity::Kind;
use crate::quantity::parse::{Bad, Read, parse};

/// A value as read.
#[derive(Clone, Debug, PartialEq)]
pub enum Body {
    /// A quantity.
    One {
        /// The quantity.
        read: Read,
        /// How far it may be off.
        deviation: Option<Deviation>,
        /// The temperature beside it.
        at: Option<Read>,
    },
    /// From one to another, the lower first.
    Range {
        /// Lower end.
        lo: Read,
        /// Upper end.
        hi: Read,
    },
    /// Unknown, perhaps within a range.
    Unknown(Option<(Read, Read)>),
    /// Held at a value, or at an unknown one.
    Held(Box<Body>),
    /// Below or above a value.
    Bound {
        /// Above rather than below.
        above: bool,
        /// The value.
        read: Read,
    },
}

/// How far a value may be off, to both sides.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Deviation {
    /// By so much.
    Of(Read),
    /// By a share of the value.
    Share(f64),
}

impl Body {
    /// Whether the value is not known.
    pub fn is_unknown(&self) -> bool {
        match self {
            Self::Unknown(_) => true,
            Self::Held(inner) => inner.is_unknown(),
            _ => false,
        }
    }
}

/// Words that mean `unknown`.
const NOT_KNOWN: &[&str] = &[
    "?",
    "??",
    "???",
    "n/a",
    "na",
    "tbd",
    "tbc",
    "tba",
    "-",
    "--",
    "not known",
    "unk",
    "unkown",
    "see plate",
    "null",
    "~",
];
const VAGUE: &[&str] = &[
    "about ",
    "around ",
    "roughly ",
    "approx. ",
    "approx ",
    "approximately ",
    "circa ",
    "ca. ",
    "ca ",
    "c. ",
    "~",
    "≈",
];
const BELOW: &[&str] = &[
    "<=",
    "≤",
    "<",
    "under ",
    "up to ",
    "at most ",
    "max. ",
    "max ",
    "less than ",
];
const ABOVE: &[&str] = &[
    ">=",
    "≥",
    ">",
    "over ",
    "at least ",
    "min. ",
    "min ",
    "more than ",
];

/// Reads a body.
///
/// # Errors
/// The first thing wrong with it.
pub fn read(head: &str, want: &Want) -> Result<Body, Fault> {
    if head.is_empty() {
        return Err(misread::missing(want));
    }
    if let Some(rest) = opening(head, "unknown") {
        return unknown(head, rest, want);
    }
    if NOT_KNOWN.contains(&head.to_lowercase().as_str()) {
        return Err(misread::no_number(head, head, want));
    }
    if let Some(rest) = opening(head, "held at") {
        return held(head, rest, want);
    }
    for (word, above) in [("below", false), ("above", true)] {
        if let Some(rest) = opening(head, word) {
            return bound(head, rest, above, want);
        }
    }
    if let Some(fault) = bound_by_sign(head, want).or_else(|| vague(head, want)) {
        return Err(fault);
    }
    if head.contains("..") || head.contains('…') {
        return range(head, want);
    }
    one(head, want).map_err(|fault| other_range(head, want).unwrap_or(fault))
}

/// The rest behind an opening word.
fn opening<'t>(text: &'t str, word: &str) -> Option<&'t str> {
    let rest = text.strip_prefix(word)?;
    let ends = rest.is_empty() || rest.starts_with(|c: char| c.is_whitespace() || c == '(');
    ends.then(|| rest.trim_start())
}

fn unknown(head: &str, rest: &str, want: &Want) -> Result<Body, Fault> {
    if !want.unknown {
        return Err(Fault::new(
            Code::UnknownUnwanted,
            "`unknown` stands where a value must be stated",
            0..head.len(),
        )
        .why("what is not known is left out here; what then stands in for it is said by: filmwright help keys")
        .mend(Mend::new(0..head.len(), want.example()).remark("with the right figure")));
    }
    if rest.is_empty() {
        return Ok(Body::Unknown(None));
    }
    let at = place_in(head, rest);
    let inner = rest.strip_prefix('(').and_then(|r| r.strip_suffix(')'));
    let Some(inner) = inner.map(str::trim) else {
        return Err(unknown_form(head, rest));
    };
    if !inner.contains("..") && !inner.contains('…') {
        return Err(Fault::new(
            Code::UnknownForm,
            format!("\"{inner}\" is not a range"),
            at.clone(),
        )
        .why("behind `unknown` stands the range the value must lie in, as unknown (38 .. 48 K)")
        .mend(Mend::new(7..head.len(), "")));
    }
    let (lo, hi) = ends(inner, want).map_err(|f| f.shifted(place_in(head, inner).start))?;
    Ok(Body::Unknown(Some((lo, hi))))
}

fn unknown_form(head: &str, rest: &str) -> Fault {
    let at = place_in(head, rest);
    let fault = Fault::new(
        Code::UnknownForm,
        format!("\"{rest}\" behind `unknown` not understood"),
        at.clone(),
    )
    .why("a range stands in parentheses, as unknown (38 .. 48 K); anything else behind a comma");
    let bare = rest.trim_matches(['(', ')']).trim();
    if bare.contains("..") || bare.contains('…') {
        return fault.mend(Mend::new(at, format!("({bare})")));
    }
    if super::clauses::opens(rest) {
        return fault.mend(Mend::new(7..at.start, ", "));
    }
    fault.mend(Mend::new(
        7..head.len(),
        format!(", \"{}\"", rest.replace('"', "")),
    ))
}

fn held(head: &str, rest: &str, want: &Want) -> Result<Body, Fault> {
    if !want.held {
        return Err(Fault::new(
            Code::HeldUnwanted,
            "`held at` has no meaning here",
            0.."held at".len(),
        )
        .why("only the temperature of a sump can be held")
        .mend(Mend::new(
            place_in(head, &head[..head.len() - rest.len()]),
            "",
        )));
    }
    let at = head.len() - rest.len();
    let inner = Want {
        ends: Ends::One,
        held: false,
        ..*want
    };
    let body = read(rest, &inner).map_err(|f| f.shifted(at))?;
    Ok(Body::Held(Box::new(body)))
}

fn bound(head: &str, rest: &str, above: bool, want: &Want) -> Result<Body, Fault> {
    let at = head.len() - rest.len();
    let read = quantity(rest, want).map_err(|f| f.shifted(at))?;
    if want.bound {
        return Ok(Body::Bound { above, read });
    }
    Err(bound_unwanted(head, rest, want))
}

fn bound_unwanted(head: &str, rest: &str, want: &Want) -> Fault {
    Fault::new(
        Code::BoundUnwanted,
        format!("a bound found, {} is wanted", want.noun()),
        0..head.len(),
    )
    .why("only data of an oil, as its pour point, can be known as a bound")
    .mend(Mend::new(0..head.len(), rest).remark("if that is the value"))
}

/// `< -40 degC`, `max 90 degC`.
fn bound_by_sign(head: &str, want: &Want) -> Option<Fault> {
    let lower = head.to_lowercase();
    let signs = [(BELOW, "below"), (ABOVE, "above")];
    let (sign, word) = signs.iter().find_map(|(signs, word)| {
        let sign = signs.iter().find(|s| lower.starts_with(**s))?;
        Some((*sign, *word))
    })?;
    let rest = head.get(sign.len()..)?.trim_start();
    quantity(rest, want).ok()?;
    if !want.bound {
        return Some(bound_unwanted(head, rest, want));
    }
    let fault = Fault::new(
        Code::BoundForm,
        format!("\"{}\" is written as a word", sign.trim()),
        0..sign.trim_end().len(),
    );
    Some(fault.mend(Mend::new(0..head.len(), format!("{word} {rest}"))))
}

fn vague(head: &str, want: &Want) -> Option<Fault> {
    let lower = head.to_lowercase();
    let word = VAGUE.iter().find(|w| lower.starts_with(**w))?;
    let rest = head.get(word.len()..)?.trim_start();
    if read(rest, want).is_err() {
        return None;
    }
    Some(
        Fault::new(
            Code::ValueVague,
            format!(
                "\"{}\" says nothing about how far off the value may be",
                word.trim()
            ),
            0..word.trim_end().len(),
        )
        .why("write a tolerance, as 42 K +/- 3 K, or whose word it is, as 42 K, assumed")
        .mend(Mend::new(0..head.len(), rest)),
    )
}

fn range(head: &str, want: &Want) -> Result<Body, Fault> {
    let (lo, hi) = ends(head, want)?;
    if want.ends != Ends::One {
        return Ok(Body::Range { lo, hi });
    }
    let fault = Fault::new(
        Code::RangeUnwanted,
        format!("a range found, {} is wanted", want.noun()),
        0..head.len(),
    );
    if want.unknown {
        return Err(fault
            .why("a value known only to lie in a range is unknown, and weighed at both ends")
            .mend(Mend::new(0..head.len(), format!("unknown ({head})"))));
    }
    let (lo, hi) = (written(&lo), written(&hi));
    Err(fault
        .mend(Mend::new(0..head.len(), lo))
        .mend(Mend::new(0..head.len(), hi)))
}

fn written(read: &Read) -> String {
    format!("{} {}", read.value, read.unit)
        .trim_end()
        .to_owned()
}

/// Both ends of a range; the first may leave its unit to the second.
fn ends(text: &str, want: &Want) -> Result<(Read, Read), Fault> {
    let (left, right) = text
        .split_once("..")
        .or_else(|| text.split_once('…'))
        .unwrap_or((text, ""));
    let left = left.trim();
    let right = right.trim_start_matches('.').trim();
    if left.is_empty() || right.is_empty() || right.contains("..") {
        return Err(Fault::new(
            Code::RangeForm,
            format!("\"{text}\" is not a range with two ends"),
            0..text.len(),
        )
        .why("a range is written from low to high, as 38 .. 48 K")
        .mend(
            Mend::new(0..text.len(), whole_range(left, right, want)).remark("with the right ends"),
        ));
    }
    let single = Want {
        at: At::Never,
        ..*want
    };
    let hi = quantity(right, &single).map_err(|f| f.shifted(place_in(text, right).start))?;
    let lo = match parse(hi.amount.kind, left) {
        Ok(lo) => lo,
        Err(Bad::NoUnit { .. }) => {
            let with_unit = format!("{left} {}", hi.unit);
            quantity(&with_unit, &single).map_err(|f| in_bytes_of(f, left))?
        }
        Err(_) => quantity(left, &single)?,
    };
    if lo.amount.base > hi.amount.base {
        return Err(Fault::new(
            Code::RangeReversed,
            format!("{} stands before {}", written(&lo), written(&hi)),
            0..text.len(),
        )
        .why("a range is written from low to high")
        .mend(Mend::new(0..text.len(), swapped(left, right, &lo, &hi))));
    }
    Ok((lo, hi))
}

/// A fault found in a text with a unit added, in bytes of the text without.
fn in_bytes_of(mut fault: Fault, text: &str) -> Fault {
    let cut = |at: usize| at.min(text.len());
    fault.part = cut(fault.part.start)..cut(fault.part.end);
    for mend in &mut fault.mends {
        mend.part = cut(mend.part.start)..cut(mend.part.end);
    }
    fault
}

/// The example with what is there of the user's ends.
fn whole_range(left: &str, right: &str, want: &Want) -> String {
    let usable = |t: &str| quantity(t, &Want::one(want.kinds)).ok();
    match (usable(left), usable(right)) {
        (Some(one), _) | (_, Some(one)) => {
            let one = written(&one);
            format!("{one} .. {one}")
        }
        _ => {
            let one = want.kind().spec().example;
            format!("{one} .. {one}")
        }
    }
}

fn swapped(left: &str, right: &str, lo: &Read, hi: &Read) -> String {
    if lo.unit == hi.unit {
        let unit = format!(" {}", hi.unit);
        format!("{} .. {}{unit}", hi.value, lo.value)
            .trim_end()
            .to_owned()
    } else {
        format!("{right} .. {left}")
    }
}

/// `10 to 20 mm`, `10-20 mm`, `10 – 20 mm`.
fn other_range(text: &str, want: &Want) -> Option<Fault> {
    let single = Want::one(want.kinds);
    let splits = text
        .match_indices([' ', '-', '–', '—', '\u{2212}'])
        .filter(|(at, _)| *at > 0);
    for (at, sign) in splits {
        let left = text[..at].trim();
        let rest = &text[at..];
        let right = rest.trim_start();
        let right = right
            .strip_prefix("to ")
            .or_else(|| {
                right
                    .strip_prefix(['-', '–', '—'])
                    .filter(|r| sign != " " || r.starts_with(' '))
            })
            .map(str::trim);
        let Some(right) = right else { continue };
        let number = matches!(parse(want.kind(), left), Ok(_) | Err(Bad::NoUnit { .. }));
        if number && quantity(right, &single).is_ok() {
            let written = format!("{left} .. {right}");
            let instead = if want.ends == Ends::One && want.unknown {
                format!("unknown ({written})")
            } else {
                written
            };
            let fault = Fault::new(
                Code::RangeForm,
                format!("\"{text}\" is a range, which is written with two dots"),
                0..text.len(),
            );
            return Some(fault.mend(Mend::new(0..text.len(), instead)));
        }
    }
    None
}

fn one(head: &str, want: &Want) -> Result<Body, Fault> {
    let (value, at) = temperature_beside(head, want)?;
    let (value, deviation) = tolerance(head, value, want)?;
    let read = quantity(value, want).map_err(|f| f.shifted(place_in(head, value).start))?;
    if want.ends == Ends::Range {
        let end = written(&read);
        return Err(Fault::new(
            Code::RangeWanted,
            "one value found, a range is wanted",
            0..head.len(),
        )
        .why("the coldest and the hottest decide, as -18 .. 36 degC")
        .mend(Mend::new(0..head.len(), format!("{end} .. {end}")).remark("with the right ends")));
    }
    let deviation = match deviation {
        Some(text) => Some(deviation_of(head, text, &read)?),
        None => None,
    };
    Ok(Body::One {
        read,
        deviation,
        at,
    })
}

/// Parts `219 mm2/s at 40 degC`.
fn temperature_beside<'t>(head: &'t str, want: &Want) -> Result<(&'t str, Option<Read>), Fault> {
    let beside = head
        .rfind(" at ")
        .map(|at| (head[..at].trim_end(), head[at + 4..].trim_start()));
    match (want.at, beside) {
        (At::Must, None) => Err(misread::at_missing(head, want)),
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
fn tolerance<'t>(
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
fn deviation_of(head: &str, off: &str, read: &Read) -> Result<Deviation, Fault> {
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

/// A quantity of one of the kinds wanted.
pub(super) fn quantity(text: &str, want: &Want) -> Result<Read, Fault> {
    let mut first = None;
    let mut nearly = None;
    for kind in want.kinds {
        match parse(*kind, text) {
            Ok(read) => return Ok(read),
            Err(bad) => {
                let near = matches!(
                    &bad,
                    Bad::UnknownUnit {
                        nearest: Some(_),
                        ..
                    } | Bad::Impossible { .. }
                );
                if near && nearly.is_none() {
                    nearly = Some((*kind, bad));
                } else if first.is_none() {
                    first = Some((*kind, bad));
                }
            }
        }
    }
    let (kind, bad) = nearly.or(first).unwrap_or((want.kind(), Bad::Empty));
    Err(misread::fault(text, kind, &bad, want))
}
