//! Likely causes of what a sample shows, each with its evidence for and against.
//!
//! Every cause says what it would make of the labelled oil, for a grid of how far it has gone;
//! the figures of the sample are weighed against each (Bayes), alone and two at a time. What is
//! named carries the lines of evidence it was weighed by. Several may stand; where none stands out
//! the answer is *not decided*.

mod cause;
mod diagnose;
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
use crate::numeric::math::exp;
use crate::quantity::show::{Toward, fixed, significant};
use diagnose::bulk;
use grid::Grid;
use likelihood::Sample;
use std::collections::BTreeMap;
use std::sync::{Arc, OnceLock};
use theta::Mixed;

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
