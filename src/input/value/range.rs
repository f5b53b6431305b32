//! Ranges, and what was meant as one.

use super::body::{Body, quantity};
use super::fault::{Fault, Mend, place_in};
use super::want::{At, Ends, Want};
use crate::problem::Code;
use crate::quantity::parse::{Bad, Read, parse};

pub(super) fn range(head: &str, want: &Want) -> Result<Body, Fault> {
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

pub(super) fn written(read: &Read) -> String {
    format!("{} {}", read.value, read.unit)
        .trim_end()
        .to_owned()
}

/// Both ends of a range; the first may leave its unit to the second.
pub(super) fn ends(text: &str, want: &Want) -> Result<(Read, Read), Fault> {
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
pub(super) fn other_range(text: &str, want: &Want) -> Option<Fault> {
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
