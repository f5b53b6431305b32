//! `bearing-film`: the film at the hardest loaded element.

use super::GROUP;
use crate::quantity::{AngularVelocity, Force, Length, Measure, Pressure, Ratio};
use crate::relation::bearing::film::{self, Duty, Element, RaceFilm, at_race};
use crate::relation::bearing::kinematics::{
    Clearance, ELEMENT_LOAD, Inside, ROLLING_SPEED, Race, element_load,
};
use crate::relation::film::roughness::{FILM_RATIO, film_ratio};
use crate::trace::{Known, Recorder};
use crate::work::contact::{composite_of, form, may, modulus, must};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const FILM: Relation = Relation {
    name: "bearing-film",
    group: GROUP,
    law: &film::FILM,
    with: &[
        must("element", "ball or roller"),
        must("pitch_diameter", "pitch diameter, 105 mm"),
        must("element_diameter", "diameter of a ball or roller, 18 mm"),
        form(
            "element_length",
            "length over which a roller carries, 18 mm",
            "roller",
        ),
        form("conformity", "race radius over ball diameter, 0.52", "ball"),
        may("contact_angle", "contact angle", "0 deg"),
        must("speed", "speed of the rings against each other, 985 r/min"),
        form("load", "radial load of one row, 32 kN", "bearing load"),
        form(
            "elements",
            "number of elements in the row, 14",
            "bearing load",
        ),
        form(
            "element_load",
            "load on the hardest loaded element, 11.4 kN",
            "element load",
        ),
        must("eta", "dynamic viscosity at running temperature, 32 mPa.s"),
        must("alpha", "pressure-viscosity coefficient there, 18 1/GPa"),
        may(
            "ring_roughness",
            "Rq of the rings; film ratios only with both",
            "none",
        ),
        may("element_roughness", "Rq of the elements", "none"),
        may(
            "E_reduced",
            "reduced modulus, or E1, poisson1 …",
            "steel on steel",
        ),
    ],
    gives: &[
        ("u", "mean rolling speed, m/s"),
        ("q_max", "load on the hardest loaded element, N"),
        ("h_inner", "minimum film at the inner race, um"),
        ("h_outer", "minimum film at the outer race, um"),
        ("p_inner", "largest pressure at the inner race, MPa"),
        ("p_outer", "largest pressure at the outer race, MPa"),
        ("lambda_inner", "film ratio at the inner race"),
        ("lambda_outer", "film ratio at the outer race"),
    ],
    run,
};

/// What the films at both races are worked out from.
struct Known4 {
    inside: Inside,
    element: Element,
    speed: Known<AngularVelocity>,
    load: Known<Force>,
    modulus: Known<Pressure>,
}

fn run(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let (inside, dm, dw) = inside(args, worked)?;
    let element = element(args, worked)?;
    let speed: Known<AngularVelocity> = args.quantity(worked, "speed", "speed")?;
    let inputs = (("dm", dm), ("Dw", dw), ("omega", speed));
    let says = "mean rolling speed";
    let u = worked
        .trace
        .attempt("u", says, &ROLLING_SPEED, inputs, |(dm, dw, n)| {
            let mut inside = inside;
            (inside.pitch_diameter, inside.element_diameter) = (dm, dw);
            inside.rolling_speed(n)
        })?;
    worked.result("u", u, "m/s");
    let load = hardest(args, worked, inside)?;
    worked.result("q_max", load, "N");
    let known = Known4 {
        inside,
        element,
        speed,
        load,
        modulus: modulus(args, worked)?,
    };
    films(args, worked, &known)
}

fn inside(
    args: &mut Args,
    worked: &mut Worked,
) -> Result<(Inside, Known<Length>, Known<Length>), Refusal> {
    let dm: Known<Length> = args.quantity(worked, "pitch_diameter", "pitch diameter")?;
    let dw: Known<Length> = args.quantity(worked, "element_diameter", "element diameter")?;
    let angle = args.maybe(worked, "contact_angle", "contact angle")?;
    let inside = Inside {
        pitch_diameter: dm.value,
        element_diameter: dw.value,
        contact_angle: angle.map_or(Measure::from_base(0.0), |a| a.value),
    };
    Ok((inside, dm, dw))
}

fn element(args: &mut Args, worked: &mut Worked) -> Result<Element, Refusal> {
    if args.choice("element", &["ball", "roller"], None)? == "ball" {
        let says = "race radius over ball diameter";
        let conformity: Known<Ratio> = args.quantity(worked, "conformity", says)?;
        return Ok(Element::Ball {
            conformity: conformity.value,
        });
    }
    let says = "length over which a roller carries";
    let length: Known<Length> = args.quantity(worked, "element_length", says)?;
    Ok(Element::Roller {
        length: length.value,
    })
}

fn hardest(args: &mut Args, worked: &mut Worked, inside: Inside) -> Result<Known<Force>, Refusal> {
    let says = "load on the hardest loaded element";
    if args.has("element_load") {
        return args.quantity(worked, "element_load", says);
    }
    let radial = args.quantity(worked, "load", "radial load of one row")?;
    let elements = args.quantity(worked, "elements", "number of elements in the row")?;
    let inputs = (("Fr", radial), ("Z", elements));
    let angle = inside.contact_angle;
    let load = worked
        .trace
        .attempt("Q", says, &ELEMENT_LOAD, inputs, |(f, z)| {
            element_load(f, z, angle, Clearance::Usual)
        })?;
    Ok(load)
}

fn films(args: &mut Args, worked: &mut Worked, known: &Known4) -> Result<(), Refusal> {
    let eta = args.quantity(worked, "eta", "dynamic viscosity")?;
    let alpha = args.quantity(worked, "alpha", "pressure-viscosity coefficient")?;
    let ring = args.maybe(worked, "ring_roughness", "roughness of the rings, Rq")?;
    let rolling = args.maybe(worked, "element_roughness", "roughness of the elements, Rq")?;
    let sigma = match (ring, rolling) {
        (Some(ring), Some(rolling)) => Some(composite_of(worked, ring, rolling)?),
        (None, None) => None,
        _ => {
            let words = "a film ratio needs both ring_roughness and element_roughness";
            return Err(Refusal::new("input-missing", words));
        }
    };
    for (race, film, pressure, ratio) in [
        (Race::Inner, "h_inner", "p_inner", "lambda_inner"),
        (Race::Outer, "h_outer", "p_outer", "lambda_outer"),
    ] {
        let inputs = (
            ("eta", eta),
            ("alpha", alpha),
            ("omega", known.speed),
            ("Q", known.load),
            ("E'", known.modulus),
        );
        let outcome = worked.trace.attempt_all(
            &film::FILM,
            inputs,
            |(eta, alpha, speed, load, modulus)| {
                let duty = Duty {
                    eta,
                    alpha,
                    speed,
                    load,
                    modulus,
                };
                at_race(known.inside, known.element, duty, race)
            },
        )?;
        let trace = &mut worked.trace;
        let says = "minimum film";
        let h = trace.take(&outcome, "h_min", says, |f: RaceFilm| f.minimum);
        let says = "largest pressure";
        let p = trace.take(&outcome, "p_max", says, |f: RaceFilm| f.max_pressure);
        worked.result(film, h, "um");
        worked.result(pressure, p, "MPa");
        if let Some(sigma) = sigma {
            let inputs = (("h", h), ("sigma", sigma));
            let says = "film ratio";
            let lambda = worked
                .trace
                .attempt("lambda", says, &FILM_RATIO, inputs, |(h, s)| {
                    film_ratio(h, s)
                })?;
            worked.result(ratio, lambda, "");
        }
    }
    Ok(())
}
