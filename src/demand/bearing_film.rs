//! Film of a rolling bearing worked out from its inner geometry, at the hardest loaded element.

use super::context::Context;
use super::film::{FilmContact, FilmDemand};
use super::inputs::{Usual, Wanted};
use super::{Demand, End, Limit};
use crate::model::part::{InnerGeometry, Part, RollingBearing};
use crate::model::rulebook::Confidence;
use crate::quantity::convert::{degrees, number, um};
use crate::quantity::{Angle, AngularVelocity, Force, Length, Measure, Ratio};
use crate::relation::bearing::film::Element;
use crate::relation::bearing::kinematics::{Clearance, ELEMENT_LOAD, Inside, Race, element_load};
use crate::relation::film::roughness::{COMPOSITE, composite};
use crate::trace::{Known, Recorder};

/// Id of the rule.
pub const FILM_RULE: &str = "bearing-film";

fn wanted(key: &'static str, symbol: &'static str, says: &'static str) -> Wanted<'static> {
    Wanted {
        key,
        about: None,
        symbol,
        says,
        how: "bearing maker's drawing",
    }
}

/// Adds the film demand of a bearing that asks for a film ratio.
pub fn add<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    bearing: &RollingBearing,
    speed: Option<Known<AngularVelocity>>,
) {
    let Some(target) = &bearing.film_ratio else {
        return;
    };
    let found = bearing
        .inner
        .as_ref()
        .and_then(|inner| contact(cx, part, bearing, inner, speed).map(|c| (c, inner)));
    let Some((contact, inner)) = found else {
        cx.undecided(
            part,
            End::HotFloor,
            "film: inner geometry, load or speed is missing",
        );
        return;
    };
    let sigma = sigma(cx, part, inner);
    let at = cx.hot_at(part);
    cx.push(Demand {
        end: End::HotFloor,
        limit: Limit::Film(Box::new(FilmDemand {
            contact,
            wanted: Length::from_base(sigma.value.base() * target.value.base()),
        })),
        limit_step: Some(sigma.step),
        rule: FILM_RULE.to_owned(),
        says: format!(
            "film ratio lambda >= {} at the hardest loaded element",
            target.value.base()
        ),
        source: target.origin.whose.to_string(),
        whose: target.origin.whose,
        confidence: Confidence::Medium,
        ..cx.blank(part, at)
    });
}

fn contact<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    bearing: &RollingBearing,
    inner: &InnerGeometry,
    speed: Option<Known<AngularVelocity>>,
) -> Option<FilmContact> {
    let size = |cx: &mut Context<'_, '_, R>, key, symbol, says, stated| {
        cx.maybe(part, wanted(key, symbol, says), stated)
    };
    let bore = size(cx, "bore", "d", "bore", bearing.bore.as_ref())?;
    let outside = size(
        cx,
        "outside",
        "D",
        "outside diameter",
        bearing.outside.as_ref(),
    )?;
    let element = size(
        cx,
        "element diameter",
        "D_w",
        "diameter of a rolling element",
        inner.element_diameter.as_ref(),
    )?;
    let load = cx.take(
        part,
        wanted("load", "P", "equivalent load"),
        bearing.load.as_ref(),
    )?;
    let count = inner.elements.as_ref()?;
    let angle = cx.or_assume(
        part,
        wanted("contact angle", "alpha", "contact angle"),
        inner.contact_angle.as_ref(),
        Usual {
            value: degrees(0.0),
            lo: degrees(0.0),
            hi: degrees(40.0),
            why: "radial bearing, no contact angle stated",
        },
    );
    let z = cx.r.given("Z", "number of rolling elements", count);
    let ball = bearing
        .class
        .is_none_or(crate::model::part::BearingClass::is_ball);
    let clearance = Clearance::Usual;
    let q =
        cx.r.attempt(
            "Q_max",
            "load on the hardest loaded element",
            &ELEMENT_LOAD,
            (("P", load), ("Z", z), ("alpha", angle)),
            |(p, z, a): (Force, Ratio, Angle)| element_load(p, z, a, clearance),
        )
        .ok()?;
    let shape = if ball {
        let conformity = inner.conformity.as_ref().map_or(number(0.52), |c| c.value);
        Element::Ball { conformity }
    } else {
        let length = size(
            cx,
            "element length",
            "L_w",
            "effective length of a roller",
            inner.element_length.as_ref(),
        )?;
        Element::Roller {
            length: length.value,
        }
    };
    let e = super::gear_film::steel(cx);
    Some(FilmContact::Race {
        inside: Inside {
            pitch_diameter: Length::from_base(f64::midpoint(
                bore.value.base(),
                outside.value.base(),
            )),
            element_diameter: element.value,
            contact_angle: angle.value,
        },
        element: shape,
        speed: speed?.value,
        load: q.value,
        modulus: e.value,
        race: Race::Inner,
    })
}

fn sigma<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    inner: &InnerGeometry,
) -> Known<Length> {
    let usual = |value: f64, lo: f64, hi: f64| Usual {
        value: um(value),
        lo: um(lo),
        hi: um(hi),
        why: "ground and honed bearing surfaces, common practice",
    };
    let ring = cx.or_assume(
        part,
        wanted("ring roughness", "Rq1", "Rq of the ring"),
        inner.ring_roughness.as_ref(),
        usual(0.15, 0.05, 0.25),
    );
    let roll = cx.or_assume(
        part,
        wanted("element roughness", "Rq2", "Rq of the rolling elements"),
        inner.element_roughness.as_ref(),
        usual(0.08, 0.01, 0.15),
    );
    cx.r.law(
        "sigma",
        "composite roughness",
        &COMPOSITE,
        (("Rq1", ring), ("Rq2", roll)),
        |(a, b)| composite(a, b).unwrap_or(a),
    )
}
