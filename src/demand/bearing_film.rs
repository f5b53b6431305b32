//! Film of a rolling bearing worked out from its inner geometry, at the hardest loaded element.

use super::context::Context;
use super::film::{FilmContact, FilmDemand};
use super::inputs::{Usual, Wanted};
use super::{Demand, End, Limit};
use crate::model::part::{InnerGeometry, Part, RollingBearing};
use crate::model::rulebook::Confidence;
use crate::quantity::convert::{degrees, number, um};
use crate::quantity::{
    Angle, AngularVelocity, Force, KinematicViscosity, Length, Measure, Ratio,
    ThermodynamicTemperature,
};
use crate::relation::bearing::film::Element;
use crate::relation::bearing::kinematics::{Clearance, ELEMENT_LOAD, Inside, Race, element_load};
use crate::relation::bearing::reference_viscosity::{VISCOSITY_RATIO, viscosity_ratio};
use crate::relation::film::inverse;
use crate::relation::film::roughness::{COMPOSITE, composite};
use crate::trace::{Known, Recorder};

/// Id of the rule.
pub const FILM_RULE: &str = "bearing-film";

fn wanted(key: &'static str, symbol: &'static str, says: &'static str) -> Wanted<'static> {
    super::inputs::wanted(key, symbol, says, "bearing maker's drawing")
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
        lacks(cx, part, bearing);
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

/// Notes what of the inner geometry a film asked for still needs.
fn lacks<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, bearing: &RollingBearing) {
    let inner = bearing.inner.clone().unwrap_or_default();
    let roller = bearing.class.is_some_and(|class| !class.is_ball());
    let known = [
        (cx.has(bearing.load.as_ref()), "load", "P"),
        (inner.elements.is_some(), "elements", "Z"),
        (
            cx.has(inner.element_diameter.as_ref()),
            "element diameter",
            "D_w",
        ),
        (
            !roller || cx.has(inner.element_length.as_ref()),
            "element length",
            "L_w",
        ),
    ];
    for (_, key, symbol) in known.into_iter().filter(|(known, ..)| !known) {
        cx.missing(part, wanted(key, symbol, key), None);
    }
}

/// The film of a bearing that asks for none: what a mineral oil would need for a film ratio of 1
/// at the hardest loaded element, and the viscosity ratio it would then have.
pub(super) fn inform<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    bearing: &RollingBearing,
    speed: Known<AngularVelocity>,
    nu1: Known<KinematicViscosity>,
) {
    let Some(inner) = bearing.inner.as_ref() else {
        return;
    };
    if bearing.load.is_none() {
        return;
    }
    let Some(t) = cx.hot_at(part).hottest else {
        return;
    };
    let Some(contact) = contact(cx, part, bearing, inner, Some(speed)) else {
        return;
    };
    let sigma = sigma(cx, part, inner);
    let film = FilmDemand {
        contact,
        wanted: sigma.value,
    };
    let Some(nu) = super::governing::film_on_mineral(&film, t.value) else {
        return;
    };
    let need = cx.r.law(
        "nu",
        "viscosity a film ratio of 1 would need of a mineral oil",
        &inverse::VISCOSITY,
        (("sigma", sigma), ("t", t)),
        |_: (Length, ThermodynamicTemperature)| nu,
    );
    let says = "viscosity a mineral oil of VI 95 needs for a film ratio of 1 at the hardest \
                loaded element (Hamrock and Dowson)";
    cx.inform(part, says, Some((nu.amount(), need.step)));
    let kappa = cx.r.attempt(
        "kappa",
        "viscosity ratio of that oil",
        &VISCOSITY_RATIO,
        (("nu", need), ("nu1", nu1)),
        |(nu, nu1)| viscosity_ratio(nu, nu1),
    );
    if let Ok(kappa) = kappa {
        let says = "viscosity ratio of that oil, against 1 by kappa = Lambda^1.3";
        cx.inform(part, says, Some((kappa.value.amount(), kappa.step)));
    }
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
