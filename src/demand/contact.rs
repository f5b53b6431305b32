//! Any other contact: film ratio at least 1 unless another is asked for.

mod bodies;

use super::context::Context;
use super::film::{FilmContact, FilmDemand};
use super::inputs::Wanted;
use super::{Demand, End, Limit};
use crate::model::part::{Contact, Part};
use crate::model::rulebook::Confidence;
use crate::model::site::HouseLimit;
use crate::quantity::convert::number;
use crate::quantity::{Length, Measure, Ratio};
use crate::relation::film::body::Radii;
use crate::relation::film::groups::{LineLoad, PointLoad};
use crate::source::place::Whose;
use crate::trace::{Known, Recorder, StepId};
use bodies::{modulus, radii, sigma};

/// Id of the rule.
pub const CONTACT_RULE: &str = "contact-film";

fn wanted(key: &'static str, symbol: &'static str, says: &'static str) -> Wanted<'static> {
    super::inputs::wanted(key, symbol, says, "drawing, or a measurement on the part")
}

/// Adds the film demand of a contact.
pub fn add<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, contact: &Contact) {
    let speed = cx.take(
        part,
        wanted("entrainment speed", "u", "mean speed of the surfaces"),
        contact.entrainment_speed.as_ref(),
    );
    let modulus = modulus(cx, part, contact);
    let sigma = sigma(cx, part, contact);
    let radii = radii(cx, part, contact);
    let loads = (
        cx.maybe(
            part,
            wanted("load per length", "w", "load per length"),
            contact.load_per_length.as_ref(),
        ),
        cx.maybe(part, wanted("load", "F", "load"), contact.load.as_ref()),
    );
    let (Some(speed), Some(e)) = (speed, modulus) else {
        cx.undecided(part, End::HotFloor, "film: speed or moduli are missing");
        return;
    };
    let found = match (radii, loads) {
        (Some((rx, None)), (Some(w), _)) => Some(FilmContact::Line {
            speed: speed.value,
            load: LineLoad {
                load: w.value,
                radius: rx.value,
                modulus: e.value,
            },
        }),
        (Some((rx, Some(ry))), (_, Some(f))) => Some(FilmContact::Ellipse {
            meniscus: meniscus(cx, part, contact).map(|m| m.value),
            speed: speed.value,
            load: PointLoad {
                load: f.value,
                radii: Radii {
                    x: rx.value,
                    y: ry.value,
                },
                modulus: e.value,
            },
        }),
        _ => None,
    };
    let Some(film) = found else {
        lacks(
            cx,
            part,
            radii.map(|(_, across)| across.is_some()),
            (loads.0.is_some(), loads.1.is_some()),
        );
        cx.undecided(
            part,
            End::HotFloor,
            "film: radius and load do not make a line or a point contact",
        );
        return;
    };
    if let FilmContact::Ellipse { load, .. } = film
        && load.radii.y.base() < load.radii.x.base()
    {
        cx.undecided(
            part,
            End::HotFloor,
            "film: entrainment along the longer axis is outside the formula",
        );
        return;
    }
    push(cx, part, contact, film, sigma);
}

/// Notes what a line or a point contact still needs: its radii, or the load of its kind.
fn lacks<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    point: Option<bool>,
    (per_length, load): (bool, bool),
) {
    let lacking = match point {
        None if load && !per_length => wanted("rx", "R_x", "reduced radius along rolling"),
        None => wanted("radius", "R", "reduced radius"),
        Some(false) => wanted("load per length", "w", "load per length"),
        Some(true) => wanted("load", "F", "load"),
    };
    cx.missing(part, lacking, None);
}

fn push<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    contact: &Contact,
    film: FilmContact,
    sigma: Known<Length>,
) {
    if film.film_at_all().is_err() {
        let because = "film: a speed, load or radius is not above zero";
        cx.undecided(part, End::HotFloor, because);
        return;
    }
    let wanted = match cx.house_film(part, CONTACT_RULE) {
        Some((height, rule, source)) if contact.film_ratio.is_none() => Asked {
            height: height.value,
            step: height.step,
            says: "film height asked for by the house".to_owned(),
            rule,
            whose: Whose::House,
            source,
        },
        _ => by_ratio(cx, part, contact, sigma),
    };
    let at = cx.hot_at(part);
    let asked_for = FilmDemand {
        contact: film,
        wanted: wanted.height,
    };
    super::contact_facts::add(cx, part, contact, &asked_for, at);
    cx.push(Demand {
        end: End::HotFloor,
        limit: Limit::Film(Box::new(asked_for)),
        limit_step: Some(wanted.step),
        rule: wanted.rule,
        says: wanted.says,
        source: wanted.source,
        whose: wanted.whose,
        confidence: Confidence::Medium,
        ..cx.blank(part, at)
    });
}

/// A film asked for, and by whom.
struct Asked {
    height: Length,
    step: StepId,
    says: String,
    rule: String,
    whose: Whose,
    source: String,
}

fn by_ratio<R: Recorder>(
    cx: &Context<'_, '_, R>,
    part: &Part,
    contact: &Contact,
    sigma: Known<Length>,
) -> Asked {
    let (target, whose, source) = asked(cx, part, contact);
    Asked {
        height: Length::from_base(sigma.value.base() * target.base()),
        step: sigma.step,
        says: format!("film ratio lambda >= {}", target.base()),
        rule: CONTACT_RULE.to_owned(),
        whose,
        source,
    }
}

/// Film ratio on the part, by a house rule, or 1.
fn asked<R: Recorder>(
    cx: &Context<'_, '_, R>,
    part: &Part,
    contact: &Contact,
) -> (Ratio, Whose, String) {
    if let Some(given) = &contact.film_ratio {
        return (
            given.value,
            given.origin.whose,
            given.origin.whose.to_string(),
        );
    }
    let named = part.rule.as_ref().map(|r| r.value.as_str());
    for rule in &cx.house.rules {
        if let HouseLimit::FilmRatio(ratio) = rule.limit
            && named == Some(rule.name.as_str())
        {
            let source = rule
                .source
                .clone()
                .unwrap_or_else(|| "house rule".to_owned());
            return (number(ratio), Whose::House, source);
        }
    }
    (
        number(1.0),
        Whose::Standard,
        "common practice: lambda 1 parts boundary from mixed film".to_owned(),
    )
}

/// Where the oil stands before the contact, if somebody measured it.
fn meniscus<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    contact: &Contact,
) -> Option<Known<Length>> {
    let key = wanted(
        "inlet distance",
        "m",
        "distance of the meniscus from the centre of the contact",
    );
    cx.maybe(part, key, contact.inlet_distance.as_ref())
}
