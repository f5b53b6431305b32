//! Likely causes of what a sample shows, each with its evidence for and against.
//!
//! Every cause says what it would make of the labelled oil, for a grid of how far it has gone;
//! the figures of the sample are weighed against each (Bayes), alone and two at a time. What is
//! named carries the lines of evidence it was weighed by. Several may stand; where none stands out
//! the answer is *not decided*.

mod cause;
mod evidence;
mod grid;
mod likelihood;
mod outside;
mod side;
mod theta;

pub use cause::Cause;
pub use evidence::Evidence;
pub use grid::Setting;
pub use side::Around;

use super::bottle::Figures;
use super::profile::Profile;
use super::scatter::Scatter;
use crate::model::rulebook::{CauseSize, Rulebook};
use crate::model::sample::Reading;
use crate::numeric::math::{exp, ln};
use crate::quantity::show::{Toward, fixed, significant};
use grid::Grid;
use likelihood::Sample;
use std::collections::BTreeMap;
use std::sync::{Arc, OnceLock};
use theta::{Mixed, Theta};

/// Another oil that fits, with the share of it.
#[derive(Clone, Debug, PartialEq)]
pub struct OtherOil {
    /// Its place in the oil list; none for one that is not on the site.
    pub oil: Option<usize>,
    /// What it is.
    pub says: String,
    /// The likely share.
    pub share: f64,
    /// How likely it is among the oils that would do.
    pub likelihood: f64,
}

/// A cause named.
#[derive(Clone, Debug, PartialEq)]
pub struct Named {
    /// The cause.
    pub cause: Cause,
    /// Likelihood, 0 to 1.
    pub likelihood: f64,
    /// Strength of the evidence over that for unchanged oil, natural logarithm of the odds.
    pub strength: f64,
    /// How far it has gone: a share lost, a share mixed in, a rise; none where that has no number.
    pub size: Option<f64>,
    /// Evidence, the weightiest first; for where its weight is positive.
    pub evidence: Vec<Evidence>,
    /// Oils that would do, the likeliest first, for causes that are another oil.
    pub oils: Vec<OtherOil>,
}

impl Named {
    fn by_signs(cause: Cause, strength: f64, mut evidence: Vec<Evidence>) -> Self {
        order(&mut evidence);
        Self {
            cause,
            likelihood: 1.0 - 1.0 / (1.0 + exp(strength)),
            strength,
            size: None,
            evidence,
            oils: Vec::new(),
        }
    }

    /// How sure it is, in a word.
    pub fn word(&self) -> &'static str {
        match self.likelihood {
            l if l >= 0.9 => "clear",
            l if l >= 0.5 => "likely",
            _ => "possible",
        }
    }
}

fn order(evidence: &mut [Evidence]) {
    evidence.sort_by(|a, b| {
        b.weight
            .abs()
            .total_cmp(&a.weight.abs())
            .then_with(|| a.on.cmp(&b.on))
    });
}

/// What the figures of a sample say.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Diagnosis {
    /// Causes, the likeliest first.
    pub causes: Vec<Named>,
    /// Whether something is the matter and no cause stands out.
    pub undecided: bool,
    /// Readings not measured that would tell causes apart.
    pub would_tell: Vec<Reading>,
    /// How likely it is that another oil is in the machine.
    pub other_oil: f64,
}

/// The grids of the labelled oils of a site, made when first asked for.
pub struct Causes {
    oils: Vec<Arc<Mixed>>,
    outside: Vec<Arc<Mixed>>,
    sizes: Vec<CauseSize>,
    grids: BTreeMap<(usize, Setting), OnceLock<Grid>>,
    scatter: Scatter,
}

/// Odds against the unchanged oil from which on something is the matter.
const CHANGED: f64 = 0.7;
/// How many times the figures must have raised those odds: what was to be expected before any
/// figure was looked at accuses nobody.
const RAISED: f64 = 1.8;
/// Causes less likely than this are not named.
const NAMED: f64 = 0.12;
/// Settings whose viscosities fit so much worse than the best are not looked at further.
const REACH: f64 = 12.0;

impl Causes {
    /// From the profiles of the site's oils, with their names and whether they are greases.
    pub fn new(profiles: &[(String, Profile, bool)], scatter: Scatter, rules: &Rulebook) -> Self {
        let mixed = |(i, (name, profile, grease)): (usize, &(String, Profile, bool))| {
            (!grease).then(|| {
                Arc::new(Mixed {
                    profile: Arc::new(profile.clone()),
                    oil: Some(i),
                    says: name.as_str().into(),
                })
            })
        };
        let settings = [false, true].into_iter().flat_map(|engine| {
            [false, true].into_iter().flat_map(move |gas| {
                [false, true].into_iter().map(move |heated| Setting {
                    engine,
                    gas,
                    heated,
                })
            })
        });
        let keys = settings.flat_map(|s| (0..profiles.len()).map(move |i| (i, s)));
        Self {
            oils: profiles.iter().enumerate().filter_map(mixed).collect(),
            outside: outside::oils(rules.foreign_oils.iter()),
            sizes: rules.cause_sizes.iter().cloned().collect(),
            grids: keys.map(|k| (k, OnceLock::new())).collect(),
            scatter,
        }
    }

    /// How far figures may be off.
    pub fn scatter(&self) -> &Scatter {
        &self.scatter
    }

    /// Weighs a sample against its labelled oil, by that oil's place in the list; `own` is its
    /// profile where figures of new oil stand beside the sample.
    pub fn weigh(
        &self,
        figures: &Figures,
        label: Option<(usize, &Profile, bool)>,
        setting: Setting,
        around: &Around<'_>,
    ) -> Diagnosis {
        let mut side = side::causes(figures, label.map(|(_, p, _)| p), around);
        let Some((oil, profile, own_viscosity)) = label else {
            side.sort_by(by_strength);
            return Diagnosis {
                causes: side,
                ..Diagnosis::default()
            };
        };
        if let Some(wrong) = upside_down(figures) {
            return Diagnosis {
                causes: vec![wrong],
                ..Diagnosis::default()
            };
        }
        let sample = Sample::new(figures, profile, &self.scatter);
        if sample.is_empty() {
            side.sort_by(by_strength);
            return Diagnosis {
                causes: side,
                ..Diagnosis::default()
            };
        }
        let fresh;
        let grid = match self.grids.get(&(oil, setting)) {
            // a new-oil viscosity beside the sample has a grid of its own
            Some(cell) if !own_viscosity => cell.get_or_init(|| self.grid(profile, setting)),
            _ => {
                fresh = self.grid(profile, setting);
                &fresh
            }
        };
        let mut found = bulk(grid, &sample, figures, profile);
        found.causes.extend(side);
        found.causes.sort_by(by_strength);
        found
    }

    fn grid(&self, profile: &Profile, setting: Setting) -> Grid {
        let others: Vec<Arc<Mixed>> = self.oils.iter().chain(&self.outside).cloned().collect();
        Grid::new(profile, setting, &others, &self.sizes)
    }
}

fn by_strength(a: &Named, b: &Named) -> std::cmp::Ordering {
    b.likelihood
        .total_cmp(&a.likelihood)
        .then_with(|| b.strength.total_cmp(&a.strength))
        .then_with(|| a.cause.cmp(&b.cause))
}

/// Viscosities that no oil and no mixture has.
fn upside_down(figures: &Figures) -> Option<Named> {
    let (nu40, nu100) = (
        figures.exact(Reading::Nu40)?,
        figures.exact(Reading::Nu100)?,
    );
    let vi = super::profile::index(nu40, nu100);
    let sane =
        nu100 < 0.75 * nu40 && (nu100 < 2.0 || vi.is_some_and(|v| (-60.0..=450.0).contains(&v)));
    if sane {
        return None;
    }
    let show = |v| significant(v, 3, Toward::Nearest);
    let index = vi.map_or("no viscosity index".to_owned(), |v| {
        format!("a viscosity index of {}", fixed(v, 0, Toward::Nearest))
    });
    let says = format!(
        "{} mm2/s at 40 degC with {} at 100 degC have {index}, which no oil and no mixture of oils gives",
        show(nu40),
        show(nu100)
    );
    Some(Named::by_signs(
        Cause::LabError,
        8.0,
        vec![Evidence::speaks_for("VI", says, 8.0)],
    ))
}

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
fn bulk(grid: &Grid, sample: &Sample, figures: &Figures, profile: &Profile) -> Diagnosis {
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
