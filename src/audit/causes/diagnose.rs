//! The causes that change the oil itself, named by the settings that fit a sample.

use super::evidence::{self, Evidence};
use super::grid::Grid;
use super::likelihood::Sample;
use super::theta::Theta;
use super::{Cause, Diagnosis, Named, OtherOil, order};
use crate::audit::bottle::Figures;
use crate::audit::profile::Profile;
use crate::model::sample::Reading;
use crate::numeric::math::{exp, ln};
use std::collections::BTreeMap;
use std::sync::Arc;

/// Odds against the unchanged oil from which on something is the matter.
const CHANGED: f64 = 0.7;

/// How many times the figures must have raised those odds: what was to be expected before any
/// figure was looked at accuses nobody.
const RAISED: f64 = 1.8;

/// Causes less likely than this are not named.
const NAMED: f64 = 0.12;

/// Settings whose viscosities fit so much worse than the best are not looked at further.
const REACH: f64 = 12.0;

/// A setting that was looked at.
struct Looked<'g> {
    theta: &'g Theta,
    log: f64,
}

fn look<'g>(thetas: &'g [Theta], sample: &Sample, best: &mut f64, into: &mut Vec<Looked<'g>>) {
    for theta in thetas {
        // the unchanged oil is always weighed
        if theta.causes[0].is_some() && sample.is_far(theta) {
            continue;
        }
        let nu = theta.log_prior + sample.viscosity(theta);
        if nu < *best - REACH {
            continue;
        }
        let log = nu + sample.rest(theta);
        *best = best.max(nu.min(log + 4.0));
        into.push(Looked { theta, log });
    }
}

/// The causes that change the oil itself.
pub(super) fn bulk(
    grid: &Grid,
    sample: &Sample,
    figures: &Figures,
    profile: &Profile,
) -> Diagnosis {
    let mut looked = Vec::new();
    let mut best = f64::NEG_INFINITY;
    look(&grid.single, sample, &mut best, &mut looked);
    let none = looked
        .iter()
        .find(|l| l.theta.causes[0].is_none())
        .map_or(f64::NEG_INFINITY, |l| l.log);
    let top = looked
        .iter()
        .map(|l| l.log)
        .fold(f64::NEG_INFINITY, f64::max);
    if top > none + 1.0 {
        look(&grid.pairs, sample, &mut best, &mut looked);
    }
    let error = error_log(sample);
    let top = looked.iter().map(|l| l.log).fold(error, f64::max);
    let mut total = exp(error - top);
    let mut of_none = 0.0;
    let mut by_cause: BTreeMap<Cause, f64> = BTreeMap::new();
    by_cause.insert(Cause::LabError, total);
    let mut other_oil = 0.0;
    for l in &looked {
        let weight = exp(l.log - top);
        total += weight;
        if l.theta.causes[0].is_none() {
            of_none += weight;
        }
        for cause in l.theta.causes.into_iter().flatten() {
            *by_cause.entry(cause).or_default() += weight;
        }
        if l.theta
            .causes
            .into_iter()
            .flatten()
            .any(Cause::is_other_oil)
        {
            other_oil += weight;
        }
    }
    let none = (of_none / total).max(1e-12);
    let mut found = Diagnosis {
        other_oil: other_oil / total,
        ..Diagnosis::default()
    };
    let odds = (1.0 - none) / none;
    if odds < CHANGED || odds < RAISED * grid.odds {
        return found;
    }
    // lighter, heavier and strange oils together against the rest, so that one wrong oil is not
    // lost among its many names
    let likeliest = by_cause.values().copied().fold(0.0, f64::max) / total;
    found.undecided = likeliest < 0.5 && found.other_oil < 0.5;
    let named = by_cause
        .into_iter()
        .map(|(c, w)| (c, w / total))
        .filter(|(_, p)| *p >= NAMED);
    for (cause, likelihood) in named {
        found
            .causes
            .push(name(cause, likelihood, none, &looked, sample, profile));
    }
    found.would_tell = would_tell(&found.causes, figures, profile);
    found
}

/// Viscosities that fit nothing: uniform over a factor of twenty each way, rare.
fn error_log(sample: &Sample) -> f64 {
    let none = Theta::none();
    let density = -ln(6.0);
    let n = sample.nu.iter().flatten().count();
    -6.5 + n as f64 * density + sample.rest(&none)
}

fn name(
    cause: Cause,
    likelihood: f64,
    none: f64,
    looked: &[Looked<'_>],
    sample: &Sample,
    profile: &Profile,
) -> Named {
    let with = looked
        .iter()
        .filter(|l| l.theta.causes.contains(&Some(cause)));
    let alone_first = |l: &&Looked<'_>| {
        l.log
            + if l.theta.causes[1].is_none() {
                1.0
            } else {
                0.0
            }
    };
    let best = with
        .clone()
        .max_by(|a, b| alone_first(a).total_cmp(&alone_first(b)));
    let mut evidence = best.map_or(Vec::new(), |l| {
        evidence::of(cause, l.theta, sample, profile)
    });
    if cause == Cause::LabError && best.is_none() {
        evidence = vec![Evidence::speaks_for(
            "nu40",
            "no cause and no mixture gives these viscosities together".to_owned(),
            3.0,
        )];
    }
    order(&mut evidence);
    Named {
        cause,
        likelihood,
        strength: ln(likelihood / none).min(12.0),
        size: best.map(|l| l.theta.size),
        evidence,
        oils: if cause.is_other_oil() {
            other_oils(with)
        } else {
            Vec::new()
        },
    }
}

/// Oils that would do, each at its likeliest share; three at most.
fn other_oils<'l, 'g: 'l>(with: impl Iterator<Item = &'l Looked<'g>>) -> Vec<OtherOil> {
    /// Weight, weight times share, weight again for the mean.
    type Sums = (f64, f64, f64);
    let mut all: BTreeMap<(Option<usize>, Arc<str>), Sums> = BTreeMap::new();
    let list: Vec<&Looked<'_>> = with.collect();
    let top = list.iter().map(|l| l.log).fold(f64::NEG_INFINITY, f64::max);
    let mut total = 0.0;
    for l in list {
        let Some(mixed) = &l.theta.mixed else {
            continue;
        };
        let weight = exp(l.log - top);
        total += weight;
        let entry = all
            .entry((mixed.oil, mixed.says.clone()))
            .or_insert((0.0, 0.0, 0.0));
        entry.0 += weight;
        entry.1 += weight * (1.0 - l.theta.kept);
        entry.2 += weight;
    }
    let mut oils: Vec<OtherOil> = all
        .into_iter()
        .map(|((oil, says), (weight, share, sum))| OtherOil {
            oil,
            says: says.to_string(),
            share: share / sum,
            likelihood: weight / total,
        })
        .collect();
    oils.sort_by(|a, b| {
        b.likelihood
            .total_cmp(&a.likelihood)
            .then_with(|| a.says.cmp(&b.says))
    });
    oils.truncate(3);
    oils
}

/// Readings that are missing and in which the named causes differ.
fn would_tell(causes: &[Named], figures: &Figures, profile: &Profile) -> Vec<Reading> {
    let has = |r: Reading| figures.get(r).is_some();
    let any = |list: &[Cause]| causes.iter().any(|n| list.contains(&n.cause));
    let other = causes.iter().any(|n| n.cause.is_other_oil());
    let mut missing = Vec::new();
    for reading in [Reading::Nu40, Reading::Nu100] {
        if figures.exact(reading).is_none() {
            missing.push(reading);
        }
    }
    let wanted = [
        (
            Reading::Flash,
            any(&[
                Cause::Dilution,
                Cause::Cracking,
                Cause::LightEndLoss,
                Cause::Gas,
            ]),
        ),
        (Reading::AcidNumber, any(&[Cause::Oxidation])),
        (Reading::Oxidation, any(&[Cause::Oxidation])),
        (
            Reading::Zn,
            other && profile.figures.contains_key(&Reading::Zn),
        ),
        (
            Reading::P,
            other && profile.figures.contains_key(&Reading::P),
        ),
    ];
    missing.extend(
        wanted
            .into_iter()
            .filter(|(r, w)| *w && !has(*r))
            .map(|(r, _)| r),
    );
    missing
}
