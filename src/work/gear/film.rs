//! `gear-film`: the film at the pitch point, ISO and AGMA forms.

use super::GROUP;
use super::oil::OilAtTeeth;
use super::pair::{
    CENTRE, FACE_WIDTH, HELIX, KnownLoad, KnownPair, LOAD_FACTOR, LOAD_SHARE, MODULE, MODULUS,
    POWER, PRESSURE_ANGLE, SPEED1, TORQUE1, Z1, Z2,
};
use crate::quantity::convert::number;
use crate::quantity::{DynamicViscosity, Length, Pressure, PressureViscosity, Ratio, Velocity};
use crate::relation::Law;
use crate::relation::film::groups::Groups;
use crate::relation::film::line::central_dowson_toyoda;
use crate::relation::film::roughness::{FILM_RATIO, film_ratio};
use crate::relation::gear::film::{self, CENTRAL, GROUPS, MINIMUM, MINIMUM_RATIO, ToothContact};
use crate::trace::{Known, Recorder};
use crate::work::contact::{composite_of, form, may, must, rq_of};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const FILM: Relation = Relation {
    name: "gear-film",
    group: GROUP,
    law: &film::MINIMUM,
    with: &[
        Z1,
        Z2,
        MODULE,
        HELIX,
        PRESSURE_ANGLE,
        FACE_WIDTH,
        SPEED1,
        TORQUE1,
        POWER,
        CENTRE,
        LOAD_FACTOR,
        LOAD_SHARE,
        MODULUS,
        must("oil", "two viscosities or more, \"220 mm2/s at 40 degC\""),
        may("base", "mineral, pao, pag or ester", "mineral"),
        must("density15", "density at 15 degC, 890 kg/m3"),
        must("at", "temperature of the teeth, 80 degC"),
        form(
            "alpha",
            "pressure-viscosity coefficient there, where measured",
            "measured",
        ),
        must("ra1", "roughness Ra of the pinion flanks, 0.5 um"),
        must("ra2", "roughness Ra of the wheel flanks"),
    ],
    gives: &[
        ("h_min", "minimum film, ISO form, um"),
        ("lambda", "minimum film over mean Ra, ISO form"),
        ("h_central", "central film, AGMA form, um"),
        ("lambda_rq", "central film over composite Rq, AGMA form"),
        ("nu", "viscosity at the teeth, mm2/s"),
        ("eta", "dynamic viscosity at the teeth, mPa.s"),
        ("alpha", "pressure-viscosity coefficient, ISO form, 1/GPa"),
        ("p_h", "pressure at the pitch point, MPa"),
    ],
    run,
};

fn run(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let pair = KnownPair::read(args, worked)?;
    let load = KnownLoad::read(args, worked, &pair)?;
    let (pressure, modulus) = load.pressure(args, worked, &pair)?;
    let contact = KnownContact {
        sum_speed: load.sum_speed,
        rho_n: pair.rho_n,
        pressure,
        modulus,
    };
    let oil = OilAtTeeth::read(args, worked)?;
    let ra1 = args.quantity(worked, "ra1", "roughness Ra of the pinion flanks")?;
    let ra2 = args.quantity(worked, "ra2", "roughness Ra of the wheel flanks")?;
    minimum(worked, &contact, &oil, (ra1, ra2))?;
    central(worked, &contact, &oil, (ra1, ra2))?;
    worked.result("nu", oil.nu, "mm2/s");
    worked.result("eta", oil.eta, "mPa.s");
    worked.result("alpha", oil.alpha_iso, "1/GPa");
    worked.result("p_h", pressure, "MPa");
    worked.remark(
        "lambda (minimum film, mean Ra) and lambda_rq (central film, Rq) are not comparable",
    );
    Ok(())
}

/// The tooth contact at the pitch point.
struct KnownContact {
    sum_speed: Known<Velocity>,
    rho_n: Known<Length>,
    pressure: Known<Pressure>,
    modulus: Known<Pressure>,
}

type KnownGroups = (Known<Ratio>, Known<Ratio>, Known<Ratio>);

fn groups(
    worked: &mut Worked,
    contact: &KnownContact,
    eta: Known<DynamicViscosity>,
    alpha: Known<PressureViscosity>,
) -> Result<KnownGroups, Refusal> {
    let inputs = (
        ("eta", eta),
        ("alpha", alpha),
        ("v_sum", contact.sum_speed),
        ("rho_n", contact.rho_n),
        ("p_H", contact.pressure),
        ("E'", contact.modulus),
    );
    let trace = &mut worked.trace;
    let law = &GROUPS;
    let out = trace.attempt_all(law, inputs, |(eta, alpha, sum_speed, rho_n, p, e)| {
        let contact = ToothContact {
            sum_speed,
            rho_n,
            pressure: p,
            modulus: e,
        };
        film::groups(eta, alpha, contact)
    })?;
    Ok((
        trace.take(&out, "U", "speed parameter", |g| g.speed),
        trace.take(&out, "G", "material parameter", |g| g.material),
        trace.take(&out, "W", "load parameter", |g| g.load),
    ))
}

fn film_of(
    worked: &mut Worked,
    (u, g, w): KnownGroups,
    rho_n: Known<Length>,
    (symbol, law): (&'static str, &'static Law),
    film: fn(Groups, Length) -> Length,
) -> Known<Length> {
    let inputs = (("U", u), ("G", g), ("W", w), ("rho_n", rho_n));
    let trace = &mut worked.trace;
    let of = |(speed, material, load, rho)| {
        let groups = Groups {
            speed,
            material,
            load,
        };
        film(groups, rho)
    };
    trace.law(symbol, law.title, law, inputs, of)
}

/// Minimum film, ISO form. Both flanks move alike at the pitch point: no flash, `S` is 1.
fn minimum(
    worked: &mut Worked,
    contact: &KnownContact,
    oil: &OilAtTeeth,
    (ra1, ra2): (Known<Length>, Known<Length>),
) -> Result<(), Refusal> {
    let groups = groups(worked, contact, oil.eta, oil.alpha_iso)?;
    let law = ("h_min", &MINIMUM);
    let h = film_of(worked, groups, contact.rho_n, law, |groups, rho| {
        film::minimum(groups, rho, number(1.0))
    });
    let inputs = (("h", h), ("Ra1", ra1), ("Ra2", ra2));
    let says = "minimum film over mean Ra";
    let trace = &mut worked.trace;
    let lambda = trace.attempt("lambda", says, &MINIMUM_RATIO, inputs, |(h, a, b)| {
        film::minimum_ratio(h, a, b)
    })?;
    worked.result("h_min", h, "um");
    worked.result("lambda", lambda, "");
    Ok(())
}

fn central(
    worked: &mut Worked,
    contact: &KnownContact,
    oil: &OilAtTeeth,
    (ra1, ra2): (Known<Length>, Known<Length>),
) -> Result<(), Refusal> {
    let groups = groups(worked, contact, oil.eta, oil.alpha_agma)?;
    let law = ("h_c", &CENTRAL);
    let h = film_of(worked, groups, contact.rho_n, law, central_dowson_toyoda);
    let rq1 = rq_of(worked, ra1);
    let rq2 = rq_of(worked, ra2);
    let sigma = composite_of(worked, rq1, rq2)?;
    let inputs = (("h", h), ("sigma", sigma));
    let says = "central film over composite Rq";
    let trace = &mut worked.trace;
    let lambda = trace.attempt("lambda", says, &FILM_RATIO, inputs, |(h, s)| {
        film_ratio(h, s)
    })?;
    worked.result("h_central", h, "um");
    worked.result("lambda_rq", lambda, "");
    Ok(())
}
