//! Inputs that several relations of contacts share: moduli, radii, roughness.

use super::{Args, Input, Need, Refusal, Worked};
use crate::quantity::{Angle, Length, Measure, Pressure, Ratio};
use crate::relation::film::body::{
    self, Material, Principal, REDUCED_MODULUS, REDUCED_RADIUS, Radii, SKEWED_RADII,
};
use crate::relation::film::roughness::{COMPOSITE, RQ_FROM_RA, composite, rq_from_ra};
use crate::trace::{Known, Recorder};

/// An input that must be given.
pub(super) const fn must(name: &'static str, says: &'static str) -> Input {
    Input {
        name,
        says,
        need: Need::Always,
    }
}

/// An input that something stands in for.
pub(super) const fn may(name: &'static str, says: &'static str, otherwise: &'static str) -> Input {
    Input {
        name,
        says,
        need: Need::Otherwise(otherwise),
    }
}

/// An input of one way of giving the same thing.
pub(super) const fn form(name: &'static str, says: &'static str, way: &'static str) -> Input {
    Input {
        name,
        says,
        need: Need::Form(way),
    }
}

/// Reduced modulus: given, or from the materials, or steel on steel.
pub(super) fn modulus(args: &mut Args, worked: &mut Worked) -> Result<Known<Pressure>, Refusal> {
    if args.has("E_reduced") {
        return args.quantity(worked, "E_reduced", "reduced modulus E'");
    }
    let steel = Material::steel();
    let youngs1 = args.maybe(worked, "E1", "Young's modulus of the first body")?;
    let youngs1 = youngs1.unwrap_or_else(|| {
        let why = "bearing and gear steel";
        let says = "Young's modulus of the first body";
        worked.trace.assume("E1", says, steel.youngs, why)
    });
    let poisson1 = args.maybe(worked, "poisson1", "Poisson's ratio of the first body")?;
    let poisson1 = poisson1.unwrap_or_else(|| {
        let says = "Poisson's ratio of the first body";
        worked
            .trace
            .assume("nu1", says, steel.poisson, "as of steel")
    });
    // One body given means both are of it.
    let youngs2 = args.maybe(worked, "E2", "Young's modulus of the second body")?;
    let poisson2 = args.maybe(worked, "poisson2", "Poisson's ratio of the second body")?;
    let inputs = (
        ("E1", youngs1),
        ("nu1", poisson1),
        ("E2", youngs2.unwrap_or(youngs1)),
        ("nu2", poisson2.unwrap_or(poisson1)),
    );
    let says = "reduced modulus";
    let known = worked.trace.attempt(
        "E'",
        says,
        &REDUCED_MODULUS,
        inputs,
        |(e1, nu1, e2, nu2)| {
            let one = Material {
                youngs: e1,
                poisson: nu1,
            };
            let other = Material {
                youngs: e2,
                poisson: nu2,
            };
            body::reduced_modulus(one, other)
        },
    )?;
    Ok(known)
}

/// Reduced radius of a line contact: `radius`, or the bodies' `r1x` and `r2x`.
pub(super) fn radius(args: &mut Args, worked: &mut Worked) -> Result<Known<Length>, Refusal> {
    if args.has("radius") {
        return args.quantity(worked, "radius", "reduced radius");
    }
    if !args.has("r1x") {
        return Err(Refusal::new(
            "input-missing",
            "radius is missing; write radius=\"12 mm\" (reduced), or r1x and r2x of the bodies",
        ));
    }
    plane(args, worked, ("r1x", "r2x"), "R")
}

fn plane(
    args: &mut Args,
    worked: &mut Worked,
    (first, second): (&'static str, &'static str),
    symbol: &'static str,
) -> Result<Known<Length>, Refusal> {
    let one = args.quantity(worked, first, "radius of the first body")?;
    let says = "reduced radius";
    let law = &REDUCED_RADIUS;
    Ok(
        match args.maybe(worked, second, "radius of the second body")? {
            Some(other) => worked.trace.attempt(
                symbol,
                says,
                law,
                (("r1", one), ("r2", other)),
                |(a, b)| body::reduced_radius(a, Some(b)),
            )?,
            None => worked
                .trace
                .attempt(symbol, says, law, (("r1", one),), |(a,)| {
                    body::reduced_radius(a, None)
                })?,
        },
    )
}

/// Whether the inputs describe an elliptical contact.
pub(super) fn is_elliptical(args: &mut Args) -> bool {
    args.has("rx") || args.has("ry") || args.has("r1y")
}

/// Reduced radii of an elliptical contact: `rx` and `ry`, or the bodies' four radii.
pub(super) fn radii(
    args: &mut Args,
    worked: &mut Worked,
) -> Result<(Known<Length>, Known<Length>), Refusal> {
    if args.has("rx") || args.has("ry") {
        let x = args.quantity(worked, "rx", "reduced radius in the rolling direction")?;
        let y = args.quantity(worked, "ry", "reduced radius across it")?;
        return Ok((x, y));
    }
    if !args.has("r1x") {
        return Err(Refusal::new(
            "input-missing",
            "rx is missing; write rx=\"8 mm\" ry=\"40 mm\" (reduced), or r1x, r2x, r1y, r2y of the bodies",
        ));
    }
    match args.maybe::<Angle>(worked, "angle", "angle between the bodies' planes")? {
        Some(angle) => turned(args, worked, angle),
        None => Ok((
            plane(args, worked, ("r1x", "r2x"), "Rx")?,
            plane(args, worked, ("r1y", "r2y"), "Ry")?,
        )),
    }
}

fn turned(
    args: &mut Args,
    worked: &mut Worked,
    angle: Known<Angle>,
) -> Result<(Known<Length>, Known<Length>), Refusal> {
    let mut of = |key, says| -> Result<Known<Length>, Refusal> {
        let flat = Length::from_base(f64::INFINITY);
        match args.maybe(worked, key, says)? {
            Some(radius) => Ok(radius),
            None => Ok(worked.trace.assume(key, says, flat, "flat, none given")),
        }
    };
    let a1 = of("r1x", "radius of the first body")?;
    let a2 = of("r1y", "radius of the first body, in its other plane")?;
    let b1 = of("r2x", "radius of the second body")?;
    let b2 = of("r2y", "radius of the second body, in its other plane")?;
    let inputs = (
        ("r1", a1),
        ("r1'", a2),
        ("r2", b1),
        ("r2'", b2),
        ("theta", angle),
    );
    let pair = worked.trace.attempt_all(
        &SKEWED_RADII,
        inputs,
        |(first1, second1, first2, second2, theta)| {
            let one = Principal {
                first: first1,
                second: second1,
            };
            let other = Principal {
                first: first2,
                second: second2,
            };
            body::skewed(one, other, theta)
        },
    )?;
    Ok((
        worked
            .trace
            .take(&pair, "Rx", "smaller reduced radius", |r: Radii| r.x),
        worked
            .trace
            .take(&pair, "Ry", "larger reduced radius", |r: Radii| r.y),
    ))
}

/// Composite roughness from `rq1` and `rq2`, or from `ra1` and `ra2`.
pub(super) fn sigma(args: &mut Args, worked: &mut Worked) -> Result<Known<Length>, Refusal> {
    let one = rq(args, worked, ("rq1", "ra1"))?;
    let other = rq(args, worked, ("rq2", "ra2"))?;
    Ok(composite_of(worked, one, other)?)
}

/// Composite roughness of two known ones.
pub(super) fn composite_of(
    worked: &mut Worked,
    one: Known<Length>,
    other: Known<Length>,
) -> Result<Known<Length>, crate::relation::Outside> {
    worked.trace.attempt(
        "sigma",
        "composite roughness",
        &COMPOSITE,
        (("Rq1", one), ("Rq2", other)),
        |(a, b)| composite(a, b),
    )
}

fn rq(
    args: &mut Args,
    worked: &mut Worked,
    (rq, ra): (&'static str, &'static str),
) -> Result<Known<Length>, Refusal> {
    if !args.has(rq) && args.has(ra) {
        let ra = args.quantity(worked, ra, "roughness Ra")?;
        return Ok(rq_of(worked, ra));
    }
    args.quantity(worked, rq, "roughness Rq")
}

/// Rq of a known Ra.
pub(super) fn rq_of(worked: &mut Worked, ra: Known<Length>) -> Known<Length> {
    let says = "roughness Rq from Ra";
    worked
        .trace
        .law("Rq", says, &RQ_FROM_RA, (("Ra", ra),), |(ra,)| {
            rq_from_ra(ra)
        })
}

/// A pure number as a known default.
pub(super) fn default_number(
    worked: &mut Worked,
    symbol: &'static str,
    says: &'static str,
    value: f64,
    why: &'static str,
) -> Known<Ratio> {
    worked
        .trace
        .assume(symbol, says, Ratio::from_base(value), why)
}
