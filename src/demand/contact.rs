//! Any other contact: film ratio at least 1 unless another is asked for.

use super::context::Context;
use super::film::{FilmContact, FilmDemand};
use super::inputs::{Usual, Wanted};
use super::{Demand, End, Limit};
use crate::model::Stated;
use crate::model::part::{Contact, Part};
use crate::model::rulebook::Confidence;
use crate::model::site::HouseLimit;
use crate::quantity::convert::{number, um};
use crate::quantity::{Angle, Length, Measure, Pressure, Ratio};
use crate::relation::film::body::{
    Material, Principal, REDUCED_MODULUS, REDUCED_RADIUS, Radii, SKEWED_RADII, reduced_modulus,
    reduced_radius, skewed,
};
use crate::relation::film::groups::{LineLoad, PointLoad};
use crate::relation::film::roughness::{COMPOSITE, composite};
use crate::source::place::Whose;
use crate::trace::{Known, Recorder, StepId};

/// Id of the rule.
pub const CONTACT_RULE: &str = "contact-film";

fn wanted(key: &'static str, symbol: &'static str, says: &'static str) -> Wanted<'static> {
    Wanted {
        key,
        about: None,
        symbol,
        says,
        how: "drawing, or a measurement on the part",
    }
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

fn modulus<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    contact: &Contact,
) -> Option<Known<Pressure>> {
    if contact.modulus.iter().all(Option::is_none) {
        return Some(super::gear_film::steel(cx));
    }
    let mut material = |i: usize| -> Option<(Material, Known<Pressure>)> {
        let (key, symbol) = if i == 0 { ("E1", "E1") } else { ("E2", "E2") };
        let stated = contact.modulus[i].as_ref();
        let youngs = cx.take(part, wanted(key, symbol, "Young's modulus"), stated)?;
        let poisson = match &contact.poisson[i] {
            Some(Stated::Known(given, _)) => given.value,
            _ => number(0.3),
        };
        Some((
            Material {
                youngs: youngs.value,
                poisson,
            },
            youngs,
        ))
    };
    let (one, k1) = material(0)?;
    let (two, k2) = match material(1) {
        Some(other) => other,
        None => (one, k1),
    };
    cx.r.attempt(
        "E",
        "reduced modulus",
        &REDUCED_MODULUS,
        (("E1", k1), ("E2", k2)),
        |_: (Pressure, Pressure)| reduced_modulus(one, two),
    )
    .ok()
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

type ReducedRadii = (Known<Length>, Option<Known<Length>>);

/// Reduced radii: stated as such, or from the radii of the bodies.
fn radii<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    contact: &Contact,
) -> Option<ReducedRadii> {
    if let Some(r) = cx.maybe(
        part,
        wanted("radius", "R", "reduced radius"),
        contact.radius.as_ref(),
    ) {
        return Some((r, None));
    }
    let rx = cx.maybe(
        part,
        wanted("rx", "Rx", "reduced radius along rolling"),
        contact.rx.as_ref(),
    );
    if let Some(rx) = rx {
        let ry = cx.maybe(
            part,
            wanted("ry", "Ry", "reduced radius across rolling"),
            contact.ry.as_ref(),
        );
        return Some((rx, ry));
    }
    let turned = wanted("angle", "theta", "angle between the planes of the bodies");
    if let Some(angle) = cx.maybe(part, turned, contact.angle.as_ref()) {
        return skewed_radii(cx, part, contact, angle);
    }
    let rx = pair(
        cx,
        part,
        contact,
        (0, 1),
        ("r1x", "r2x"),
        "reduced radius along rolling",
    )?;
    let ry = pair(
        cx,
        part,
        contact,
        (2, 3),
        ("r1y", "r2y"),
        "reduced radius across rolling",
    );
    Some((rx, ry))
}

/// Reduced radii of bodies turned against each other; a body's second radius is flat where it is
/// not stated, and rolling is taken along the smaller reduced radius.
fn skewed_radii<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    contact: &Contact,
    angle: Known<Angle>,
) -> Option<ReducedRadii> {
    let mut of = |i: usize, key: &'static str, says: &'static str| match &contact.bodies[i] {
        Some(stated) => cx.take(part, wanted(key, key, says), Some(stated)),
        None => {
            let flat = Length::from_base(f64::INFINITY);
            Some(cx.r.assume(key, says, flat, "flat, none stated"))
        }
    };
    let a1 = of(0, "r1x", "radius of the first body")?;
    let a2 = of(2, "r1y", "radius of the first body, in its other plane")?;
    let b1 = of(1, "r2x", "radius of the second body")?;
    let b2 = of(3, "r2y", "radius of the second body, in its other plane")?;
    let made =
        cx.r.attempt_all(
            &SKEWED_RADII,
            (
                ("r1", a1),
                ("r1'", a2),
                ("r2", b1),
                ("r2'", b2),
                ("theta", angle),
            ),
            |(a1, a2, b1, b2, theta): (Length, Length, Length, Length, Angle)| {
                let body = |first, second| Principal { first, second };
                skewed(body(a1, a2), body(b1, b2), theta)
            },
        )
        .ok()?;
    let x =
        cx.r.take(&made, "Rx", "smaller reduced radius", |r: Radii| r.x);
    cx.r.note(|| "rolling is taken along the smaller reduced radius".to_owned());
    let y =
        cx.r.take(&made, "Ry", "larger reduced radius", |r: Radii| r.y);
    Some((x, Some(y)))
}

fn pair<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    contact: &Contact,
    (i, j): (usize, usize),
    (first, second): (&'static str, &'static str),
    says: &'static str,
) -> Option<Known<Length>> {
    let a = cx.maybe(
        part,
        wanted(first, first, "radius of the first body"),
        contact.bodies[i].as_ref(),
    )?;
    let b = cx.maybe(
        part,
        wanted(second, second, "radius of the second body"),
        contact.bodies[j].as_ref(),
    );
    let law = &REDUCED_RADIUS;
    match b {
        Some(b) => {
            cx.r.attempt("R", says, law, (("r1", a), ("r2", b)), |(a, b)| {
                reduced_radius(a, Some(b))
            })
            .ok()
        }
        None => {
            cx.r.attempt("R", says, law, (("r1", a),), |(a,)| reduced_radius(a, None))
                .ok()
        }
    }
}

fn sigma<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    contact: &Contact,
) -> Known<Length> {
    let mut rough = |i: usize| {
        let (key, symbol) = if i == 0 {
            ("roughness 1", "Rq1")
        } else {
            ("roughness 2", "Rq2")
        };
        let why = "ground surface, Rq; 0.1 to 0.5 um is common practice";
        let usual = Usual {
            value: um(0.25),
            lo: um(0.1),
            hi: um(0.5),
            why,
        };
        cx.or_assume(
            part,
            wanted(key, symbol, "roughness"),
            contact.roughness[i].as_ref(),
            usual,
        )
    };
    let (a, b) = (rough(0), rough(1));
    cx.r.law(
        "sigma",
        "composite roughness",
        &COMPOSITE,
        (("Rq1", a), ("Rq2", b)),
        |(a, b)| composite(a, b).unwrap_or(a),
    )
}
