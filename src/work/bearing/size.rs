//! How big a bearing is and of which class, however it was said.

use crate::input::bearing_table::designated;
use crate::quantity::Length;
use crate::relation::bearing::class::RatingClass;
use crate::relation::bearing::reference_viscosity::{PITCH_DIAMETER, pitch_diameter};
use crate::source::Origin;
use crate::source::place::Given;
use crate::trace::{Known, Recorder};
use crate::work::contact::{form, must};
use crate::work::{Args, Input, Refusal, Worked};

pub(super) const PITCH: Input = form("pitch_diameter", "pitch diameter, 140 mm", "pitch circle");
pub(super) const BORE: Input = form("bore", "bore, 100 mm", "dimensions");
pub(super) const OUTSIDE: Input = form("outside", "outside diameter, 180 mm", "dimensions");
pub(super) const DESIGNATION: Input = form(
    "designation",
    "number of the bearing, 22220 EK C3",
    "designation",
);

/// Pitch diameter: stated, or from bore and outside diameter, or from the designation.
pub(super) fn pitch(args: &mut Args, worked: &mut Worked) -> Result<Known<Length>, Refusal> {
    if args.has("pitch_diameter") {
        return args.quantity(worked, "pitch_diameter", "pitch diameter");
    }
    let (bore, outside) = if args.has("designation") {
        of_designation(args, worked)?
    } else if args.has("bore") || args.has("outside") {
        (
            args.quantity(worked, "bore", "bore")?,
            args.quantity(worked, "outside", "outside diameter")?,
        )
    } else {
        return Err(Refusal::new(
            "input-missing",
            "pitch_diameter is missing; write pitch_diameter=\"140 mm\", or bore and outside, or designation",
        ));
    };
    let inputs = (("d", bore), ("D", outside));
    let says = "pitch diameter, estimated";
    let law = &PITCH_DIAMETER;
    let known = worked
        .trace
        .attempt("Dpw", says, law, inputs, |(d, outside)| {
            pitch_diameter(d, outside)
        })?;
    Ok(known)
}

fn of_designation(
    args: &mut Args,
    worked: &mut Worked,
) -> Result<(Known<Length>, Known<Length>), Refusal> {
    let text = args.text("designation", "\"22220 EK C3\"")?;
    let bearing =
        designated(&text).map_err(|e| Refusal::new("designation-unknown", e.to_string()))?;
    worked.remark(format!("read as a {} bearing", bearing.kind.name()));
    let mut known = |symbol, says, length: Length| {
        let given = Given::new(length, text.as_str(), Origin::flag("designation"));
        worked.trace.given(symbol, says, &given)
    };
    Ok((
        known("d", "bore by the designation", bearing.bore),
        known("D", "outside diameter by the designation", bearing.outside),
    ))
}

/// The rating class.
pub(super) fn class(args: &mut Args) -> Result<RatingClass, Refusal> {
    let word = args.choice("class", RatingClass::WORDS, None)?;
    Ok(RatingClass::of_word(word).expect("the word is one of the list"))
}

pub(super) const CLASS: Input = must(
    "class",
    "radial-ball, radial-roller, thrust-ball or thrust-roller",
);

/// Whether a truth value is a yes.
pub(super) fn yes(args: &mut Args, key: &str) -> Result<bool, Refusal> {
    Ok(args.choice(key, &["yes", "no"], Some("no"))? == "yes")
}
