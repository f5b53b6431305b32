//! `film-ratio`.

use super::GROUP;
use crate::quantity::{Length, Measure};
use crate::relation::Outside;
use crate::relation::film::roughness::{self, Band};
use crate::trace::{Known, Recorder};
use crate::work::contact::{form, must, sigma};
use crate::work::{Args, Input, Refusal, Relation, Worked};

pub(super) const RQ1: Input = form("rq1", "roughness Rq of one surface, 0.4 um", "Rq");
pub(super) const RQ2: Input = form("rq2", "roughness Rq of the other", "Rq");
pub(super) const RA1: Input = form("ra1", "roughness Ra of one surface", "Ra");
pub(super) const RA2: Input = form("ra2", "roughness Ra of the other", "Ra");

pub(super) const FILM_RATIO: Relation = Relation {
    name: "film-ratio",
    group: GROUP,
    law: &roughness::FILM_RATIO,
    with: &[must("h", "film thickness, 0.5 um"), RQ1, RQ2, RA1, RA2],
    gives: &[
        ("lambda", "film ratio"),
        ("sigma", "composite roughness, um"),
        ("band", "boundary, mixed or full film"),
    ],
    run,
};

fn run(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let h: Known<Length> = args.quantity(worked, "h", "film thickness")?;
    if h.value.base() <= 0.0 {
        return Err(Outside::NotPositive {
            what: "the film thickness",
        }
        .into());
    }
    let sigma = sigma(args, worked)?;
    let inputs = (("h", h), ("sigma", sigma));
    let law = &roughness::FILM_RATIO;
    let lambda = worked
        .trace
        .attempt("lambda", "film ratio", law, inputs, |(h, s)| {
            roughness::film_ratio(h, s)
        })?;
    worked.result("lambda", lambda, "");
    worked.result("sigma", sigma, "um");
    worked.text("band", Some(Band::of(lambda.value).words().to_owned()));
    Ok(())
}
