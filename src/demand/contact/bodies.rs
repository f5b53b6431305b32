//! The two bodies of a contact: modulus, reduced radii, roughness.

use super::wanted;
use crate::demand::context::Context;
use crate::demand::gear_film;
use crate::demand::inputs::Usual;
use crate::model::Stated;
use crate::model::part::{Contact, Part};
use crate::quantity::convert::{number, um};
use crate::quantity::{Angle, Length, Measure, Pressure};
use crate::relation::film::body::{
    Material, Principal, REDUCED_MODULUS, REDUCED_RADIUS, Radii, SKEWED_RADII, reduced_modulus,
    reduced_radius, skewed,
};
use crate::relation::film::roughness::{COMPOSITE, composite};
use crate::trace::{Known, Recorder};

pub(super) fn modulus<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    contact: &Contact,
) -> Option<Known<Pressure>> {
    if contact.modulus.iter().all(Option::is_none) {
        return Some(gear_film::steel(cx));
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

/// Reduced radius along rolling, and across it for a point contact.
pub(super) type ReducedRadii = (Known<Length>, Option<Known<Length>>);

/// Reduced radii: stated as such, or from the radii of the bodies.
pub(super) fn radii<R: Recorder>(
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

pub(super) fn sigma<R: Recorder>(
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
