//! The value itself, without what stands behind it.

use super::beside::{deviation_of, temperature_beside, tolerance};
use super::fault::{Fault, Mend, place_in};
use super::misread;
use super::range::{ends, other_range, range, written};
use super::want::{Ends, Want};
use crate::problem::Code;
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
