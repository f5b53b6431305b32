//! What is said beside the demand of a rolling bearing: its speed number, the film ratio its
//! viscosity ratio stands for, and what an EP additive may count for.

use super::context::Context;
use super::inputs::Wanted;
use crate::model::Lubrication;
use crate::model::part::{Part, RollingBearing};
use crate::quantity::convert::number;
use crate::quantity::{AngularVelocity, KinematicViscosity, Length, Measure, Ratio};
use crate::relation::bearing::contamination::{
    CONTAMINATION_FACTOR, Code, GreaseCleanliness, Method, Row, factor, grease_row, oil_row,
};
use crate::relation::bearing::life_factor::{EP_CLEANLINESS, EP_LARGEST};
use crate::relation::bearing::reference_viscosity::{FILM_RATIO, film_ratio};
use crate::relation::bearing::speed_limit::{GREASE, OIL, SPEED_NUMBER, speed_number};
use crate::trace::{Known, Recorder};

/// Adds the figures of a bearing whose size and speed are known.
pub(super) fn add<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    bearing: &RollingBearing,
    (dm, n): (Known<Length>, Known<AngularVelocity>),
    nu1: Known<KinematicViscosity>,
) {
    speed(cx, part, bearing, (dm, n));
    ep(cx, part, bearing, dm);
    if bearing.inner.is_some() {
        equivalent(cx, part);
    }
    if bearing.film_ratio.is_none() && bearing.inner.is_some() {
        super::bearing_film::inform(cx, part, bearing, n, nu1);
    }
}

/// Bore times speed against what grease and oil bear.
fn speed<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    bearing: &RollingBearing,
    (dm, n): (Known<Length>, Known<AngularVelocity>),
) {
    let key = Wanted {
        key: "bore",
        about: None,
        symbol: "d",
        says: "bore",
        how: "designation on the ring",
    };
    let Some(d) = cx.maybe(part, key, bearing.bore.as_ref()) else {
        return;
    };
    let number = cx.r.law(
        "n d",
        "speed number, mm r/min",
        &SPEED_NUMBER,
        (("d", d), ("Dpw", dm), ("n", n)),
        |(d, dm, n)| speed_number(d, dm, n),
    );
    let grease = cx.lubrication() == Some(Lubrication::Grease);
    let ((usual, most), what) = if grease {
        (GREASE, "grease")
    } else {
        (OIL, "an oil bath")
    };
    let value = number.value.base();
    let says = if value > most {
        format!(
            "speed number above the {most:.0} mm r/min that {what} is used to: ask the bearing maker"
        )
    } else if value > usual {
        format!(
            "speed number between {usual:.0} and {most:.0} mm r/min, the end of what {what} bears"
        )
    } else {
        format!("speed number, within the {usual:.0} mm r/min that {what} bears")
    };
    cx.inform(part, says, Some((number.value.amount(), number.step)));
}

/// The film ratio that the viscosity ratio asked for stands for.
fn equivalent<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part) {
    let why = "ISO 281: full credit for the film from 1 on";
    let kappa =
        cx.r.assume("kappa_min", "viscosity ratio asked for", number(1.0), why);
    let lambda = cx.r.attempt(
        "Lambda",
        "film ratio it stands for",
        &FILM_RATIO,
        (("kappa", kappa),),
        |(k,)| film_ratio(k),
    );
    if let Ok(lambda) = lambda {
        let says = "film ratio that kappa 1 stands for (kappa = Lambda^1.3); for oils other than \
                    mineral the film counts, not kappa";
        cx.inform(part, says, Some((lambda.value.amount(), lambda.step)));
    }
}

/// Whether the oil is clean enough for an EP additive to count in the life.
fn ep<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    bearing: &RollingBearing,
    dm: Known<Length>,
) {
    let stated = bearing
        .cleanliness
        .as_ref()
        .or(cx.point.cleanliness.as_ref());
    let Some(text) = stated.map(|c| c.value.clone()) else {
        return;
    };
    let Some(row) = row_of(cx.lubrication(), &text, dm.value) else {
        let says = format!("cleanliness {text}: ISO 281 has no contamination factor for it here");
        cx.inform(part, says, None);
        return;
    };
    let kappa = cx.r.assume(
        "kappa",
        "viscosity ratio",
        number(1.0),
        "at the ratio asked for",
    );
    let found = cx.r.attempt(
        "e_C",
        "contamination factor",
        &CONTAMINATION_FACTOR,
        (("kappa", kappa), ("Dpw", dm)),
        |(k, dm): (Ratio, Length)| factor(row, k, dm),
    );
    let Ok(e_c) = found else { return };
    cx.r.note(|| format!("cleanliness {text}"));
    let says = if e_c.value.base() >= EP_CLEANLINESS {
        format!(
            "contamination factor, from {EP_CLEANLINESS} on: below kappa 1 a proven EP additive \
             counts as kappa 1 in the life, up to a factor of {EP_LARGEST}"
        )
    } else {
        format!(
            "contamination factor, below {EP_CLEANLINESS}: an EP additive counts for nothing in \
             the life"
        )
    };
    cx.inform(part, says, Some((e_c.value.amount(), e_c.step)));
}

/// The row of the annex: by code for oil, by word for grease; words go with the nearest code.
fn row_of(lubrication: Option<Lubrication>, text: &str, dm: Length) -> Option<Row> {
    let word = text.trim().to_lowercase().replace('-', " ");
    if lubrication == Some(Lubrication::Grease) {
        let degree = match word.as_str() {
            "high" => GreaseCleanliness::High,
            "normal" => GreaseCleanliness::Normal,
            "slight" => GreaseCleanliness::Slight,
            "severe" => GreaseCleanliness::Severe,
            "very severe" => GreaseCleanliness::VerySevere,
            _ => return None,
        };
        return Some(grease_row(degree, dm));
    }
    let method = match lubrication {
        Some(Lubrication::Circulated | Lubrication::PressureFed) => Method::OnlineFilter,
        _ => Method::OilBath,
    };
    oil_row(method, Code::read(text)?).ok()
}
