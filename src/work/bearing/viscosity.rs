//! `bearing-nu1`, `bearing-kappa` and `kappa-lambda`.

use super::GROUP;
use super::size::{BORE, DESIGNATION, OUTSIDE, PITCH, pitch};
use crate::quantity::{KinematicViscosity, Measure};
use crate::relation::bearing::class::BearingKind;
use crate::relation::bearing::minimum_viscosity::{MINIMUM_VISCOSITY, minimum_viscosity};
use crate::relation::bearing::reference_viscosity::{
    self, FILM_RATIO, LARGEST_KAPPA, REFERENCE_VISCOSITY, SMALLEST_KAPPA, VISCOSITY_RATIO,
};
use crate::trace::{Known, Recorder};
use crate::work::contact::{form, must};
use crate::work::{Args, Input, Refusal, Relation, Worked};

const SPEED: Input = must("speed", "speed of the rings against each other, 1480 r/min");

pub(super) const NU1: Relation = Relation {
    name: "bearing-nu1",
    group: GROUP,
    law: &REFERENCE_VISCOSITY,
    with: &[SPEED, PITCH, BORE, OUTSIDE, DESIGNATION],
    gives: &[("nu1", "viscosity needed at running temperature, mm2/s")],
    run: run_nu1,
};

fn run_nu1(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    nu1(args, worked).map(drop)
}

fn nu1(args: &mut Args, worked: &mut Worked) -> Result<Known<KinematicViscosity>, Refusal> {
    let speed = args.quantity(worked, "speed", "speed")?;
    let pitch = pitch(args, worked)?;
    let inputs = (("n", speed), ("Dpw", pitch));
    let says = "reference viscosity";
    let law = &REFERENCE_VISCOSITY;
    let nu1 = worked.trace.attempt("nu1", says, law, inputs, |(n, d)| {
        reference_viscosity::reference_viscosity(n, d)
    })?;
    worked.result("nu1", nu1, "mm2/s");
    Ok(nu1)
}

pub(super) const KAPPA: Relation = Relation {
    name: "bearing-kappa",
    group: GROUP,
    law: &VISCOSITY_RATIO,
    with: &[
        SPEED,
        PITCH,
        BORE,
        OUTSIDE,
        DESIGNATION,
        must(
            "nu",
            "viscosity of the oil at running temperature, 20 mm2/s",
        ),
    ],
    gives: &[
        ("kappa", "viscosity ratio"),
        ("nu1", "viscosity needed at running temperature, mm2/s"),
    ],
    run: run_kappa,
};

fn run_kappa(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let says = "viscosity at running temperature";
    let nu = args.quantity(worked, "nu", says)?;
    let nu1 = nu1(args, worked)?;
    let inputs = (("nu", nu), ("nu1", nu1));
    let says = "viscosity ratio";
    let law = &VISCOSITY_RATIO;
    let kappa = worked
        .trace
        .attempt("kappa", says, law, inputs, |(nu, nu1)| {
            reference_viscosity::viscosity_ratio(nu, nu1)
        })?;
    worked.result("kappa", kappa, "");
    if kappa.value.base() < SMALLEST_KAPPA {
        worked.remark("below kappa 0.1 the standard does not apply");
    } else if kappa.value.base() > LARGEST_KAPPA {
        worked.remark("above kappa 4 nothing more is gained; drag and heat rise");
    }
    Ok(())
}

pub(super) const MINIMUM: Relation = Relation {
    name: "bearing-minimum-viscosity",
    group: GROUP,
    law: &MINIMUM_VISCOSITY,
    with: &[must(
        "kind",
        "deep groove ball, cylindrical roller, spherical roller, spherical roller thrust …",
    )],
    gives: &[("nu", "least viscosity at running temperature, mm2/s")],
    run: run_minimum,
};

fn run_minimum(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let words: Vec<&'static str> = BearingKind::NAMES.iter().map(|(name, _)| *name).collect();
    let word = args.choice("kind", &words, None)?;
    let kind = BearingKind::of_name(word).expect("the word is one of the list");
    let says = "least viscosity at running temperature";
    let trace = &mut worked.trace;
    let nu = trace.law("nu", says, &MINIMUM_VISCOSITY, (), |()| {
        minimum_viscosity(kind)
    });
    worked.result("nu", nu, "mm2/s");
    worked.remark("for moderate speeds; where size and speed are known, bearing-nu1 decides");
    Ok(())
}

pub(super) const KAPPA_LAMBDA: Relation = Relation {
    name: "kappa-lambda",
    group: GROUP,
    law: &FILM_RATIO,
    with: &[
        form("kappa", "viscosity ratio", "from kappa"),
        form("lambda", "film ratio", "from lambda"),
    ],
    gives: &[
        ("lambda", "film ratio, where kappa was given"),
        ("kappa", "viscosity ratio, where lambda was given"),
    ],
    run: run_kappa_lambda,
};

fn run_kappa_lambda(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let law = &FILM_RATIO;
    if args.has("kappa") && args.has("lambda") {
        let words = "give kappa or lambda, not both";
        return Err(Refusal::new("input-contradictory", words));
    }
    if let Some(lambda) = args.maybe(worked, "lambda", "film ratio")? {
        let inputs = (("Lambda", lambda),);
        let says = "viscosity ratio it stands for";
        let kappa = worked.trace.attempt("kappa", says, law, inputs, |(l,)| {
            reference_viscosity::from_film_ratio(l)
        })?;
        worked.result("kappa", kappa, "");
        return Ok(());
    }
    let kappa = args.quantity(worked, "kappa", "viscosity ratio")?;
    let inputs = (("kappa", kappa),);
    let says = "film ratio it stands for";
    let lambda = worked.trace.attempt("Lambda", says, law, inputs, |(k,)| {
        reference_viscosity::film_ratio(k)
    })?;
    worked.result("lambda", lambda, "");
    Ok(())
}
