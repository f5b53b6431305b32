//! What each cause would make of an oil: its viscosities, flash point, acid number and additive
//! elements, for a grid of how far it has gone.
//!
//! The directions are those of the rules (diagnosis); the sizes are orders of magnitude from
//! common practice, wide enough that a cause is recognised by how its figures move together and
//! not by one of them. Each setting of the grid is a [`Theta`].

use super::Cause;
use crate::audit::profile::Profile;
use crate::numeric::math::{exp, ln};
use crate::quantity::Measure;
use crate::quantity::convert::{mm2_s, number, to_mm2_s};
use crate::relation::oil::blend::Rule;
use std::sync::Arc;

/// A shift of a figure, with how far it may lie from it.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub(super) struct Shift {
    pub(super) by: f64,
    pub(super) spread: f64,
}

/// An oil mixed in.
#[derive(Clone, Debug)]
pub(super) struct Mixed {
    /// Its profile.
    pub(super) profile: Arc<Profile>,
    /// Its place in the oil list; none for an oil that is not on the site.
    pub(super) oil: Option<usize>,
    /// What it is, where it is not on the site.
    pub(super) says: Arc<str>,
}

/// One setting of one cause, or of two at once.
#[derive(Clone, Debug)]
pub(super) struct Theta {
    pub(super) causes: [Option<Cause>; 2],
    pub(super) log_prior: f64,
    /// Change of ln nu at 40 and at 100 °C.
    pub(super) d: [f64; 2],
    /// How far the model may be off, as a share of the viscosity.
    pub(super) spread: f64,
    /// Flash point, K.
    pub(super) flash: Shift,
    /// Acid number, mg KOH/g.
    pub(super) acid: Shift,
    /// Oxidation, absorbance per cm.
    pub(super) oxidation: Shift,
    /// Fuel, %.
    pub(super) fuel: Shift,
    /// Share of the labelled oil left.
    pub(super) kept: f64,
    /// The oil mixed in; its share is what is not kept.
    pub(super) mixed: Option<Arc<Mixed>>,
    /// How far it has gone: a share lost, a share mixed in, a rise.
    pub(super) size: f64,
}

impl Theta {
    pub(super) fn none() -> Self {
        Self {
            causes: [None, None],
            log_prior: 0.0,
            d: [0.0, 0.0],
            spread: 0.003,
            flash: Shift::default(),
            acid: Shift {
                by: 0.03,
                spread: 0.08,
            },
            oxidation: Shift {
                by: 1.0,
                spread: 2.0,
            },
            fuel: Shift {
                by: 0.1,
                spread: 0.2,
            },
            kept: 1.0,
            mixed: None,
            size: 0.0,
        }
    }

    fn of(cause: Cause, d: [f64; 2], size: f64) -> Self {
        Self {
            causes: [Some(cause), None],
            d,
            size,
            spread: 0.004 + 0.05 * d[0].abs().max(d[1].abs()),
            ..Self::none()
        }
    }

    /// Both at once.
    fn with(&self, other: &Self) -> Self {
        let both = |a: Shift, b: Shift, none: Shift| Shift {
            by: a.by + b.by - none.by,
            spread: a.spread.max(b.spread),
        };
        let none = Self::none();
        Self {
            causes: [self.causes[0], other.causes[0]],
            log_prior: self.log_prior + other.log_prior + PAIR,
            d: [self.d[0] + other.d[0], self.d[1] + other.d[1]],
            spread: self.spread + other.spread,
            flash: both(self.flash, other.flash, none.flash),
            acid: both(self.acid, other.acid, none.acid),
            oxidation: both(self.oxidation, other.oxidation, none.oxidation),
            fuel: both(self.fuel, other.fuel, none.fuel),
            kept: self.kept * other.kept,
            mixed: self.mixed.clone().or_else(|| other.mixed.clone()),
            size: self.size,
        }
    }
}

/// Two causes at once are less common than either, but more common than chance.
const PAIR: f64 = 1.0;

/// Everything the causes of one labelled oil are weighed with.
pub(super) struct Grid {
    pub(super) single: Vec<Theta>,
    pub(super) pairs: Vec<Theta>,
}

/// What of the machine and the oil makes a cause more or less to be expected.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord)]
pub struct Setting {
    /// The oil is an engine oil, or the machine an engine.
    pub engine: bool,
    /// The machine handles gas that dissolves in oil.
    pub gas: bool,
    /// The oil is heated by a sheath or a hot surface.
    pub heated: bool,
}

impl Grid {
    pub(super) fn new(label: &Profile, setting: Setting, others: &[Arc<Mixed>]) -> Self {
        let shear = shear(label);
        let dilution = dilution(label, setting);
        let oxidation = oxidation();
        let wrong = wrong(label, others);
        let mut pairs = Vec::new();
        let some = |list: &[Theta], step: usize| -> Vec<Theta> {
            let n = (list.len().div_ceil(step.max(1)) as f64).max(1.0);
            let thin = (n / (list.len() as f64).max(1.0)).max(1e-9);
            let pick = list.iter().skip(step / 2).step_by(step.max(1)).cloned();
            pick.map(|t| Theta {
                log_prior: t.log_prior - ln(thin),
                ..t
            })
            .collect()
        };
        let (few_shear, few_dilution, few_oxidation) =
            (some(&shear, 3), some(&dilution, 3), some(&oxidation, 5));
        let few_wrong = some(&wrong, 4);
        cross(&few_shear, &few_oxidation, &mut pairs);
        cross(&few_shear, &few_dilution, &mut pairs);
        cross(&few_dilution, &few_oxidation, &mut pairs);
        cross(&few_wrong, &some(&oxidation, 21), &mut pairs);
        cross(&few_wrong, &some(&shear, 9), &mut pairs);
        let mut single = vec![Theta::none()];
        single.extend(shear);
        single.extend(dilution);
        single.extend(oxidation);
        single.extend(light_ends());
        single.extend(cracking(setting));
        if setting.gas {
            single.extend(gas());
        }
        single.extend(wrong);
        Self { single, pairs }
    }
}

fn cross(a: &[Theta], b: &[Theta], into: &mut Vec<Theta>) {
    for one in a {
        into.extend(b.iter().map(|other| one.with(other)));
    }
}

/// Shares the prior of a cause among its settings.
fn shared(mut thetas: Vec<Theta>, log_prior: f64) -> Vec<Theta> {
    let each = log_prior - ln((thetas.len() as f64).max(1.0));
    for theta in &mut thetas {
        theta.log_prior += each;
    }
    thetas
}

/// The polymer cut: at 100 °C it falls as much or more than at 40, nothing else moves. The
/// fixture of practice 46.5 to 36.4 with 9.1 to 6.75 has a ratio of 0.82; one share lost at every
/// temperature is 1.
fn shear(label: &Profile) -> Vec<Theta> {
    let mut thetas = Vec::new();
    for loss in [
        0.03, 0.045, 0.06, 0.08, 0.1, 0.13, 0.17, 0.22, 0.28, 0.36, 0.45,
    ] {
        for ratio in [0.62, 0.75, 0.84, 0.93, 1.0] {
            let d100 = ln(1.0 - loss);
            thetas.push(Theta::of(Cause::PolymerShear, [ratio * d100, d100], loss));
        }
    }
    // without a polymer there is nothing to cut
    shared(thetas, if label.thickened { -2.4 } else { -9.0 })
}

/// Viscosities of what dilutes, mm²/s at 40 and 100 °C: solvent, diesel fuel, heating oil.
const DILUENTS: [[f64; 2]; 3] = [[1.0, 0.55], [2.5, 1.05], [4.0, 1.45]];

fn dilution(label: &Profile, setting: Setting) -> Vec<Theta> {
    let mut thetas = Vec::new();
    for share in [
        0.01, 0.015, 0.02, 0.03, 0.04, 0.055, 0.075, 0.1, 0.14, 0.2, 0.3,
    ] {
        for diluent in DILUENTS {
            let Some(d) = blended(label, diluent, share) else {
                continue;
            };
            // a per cent or two take the flash point down by 20 to 40 K, more take it little
            // further (common practice; 4.5 % took 52 K in the demonstration)
            let flash = -70.0 * (1.0 - exp(-share / 0.03));
            thetas.push(Theta {
                flash: Shift {
                    by: flash,
                    spread: 15.0,
                },
                fuel: Shift {
                    by: 100.0 * share,
                    spread: 25.0 * share + 0.3,
                },
                kept: 1.0 - share,
                spread: 0.006 + 0.08 * d[0].abs(),
                ..Theta::of(Cause::Dilution, d, share)
            });
        }
    }
    shared(thetas, if setting.engine { -1.8 } else { -2.6 })
}

/// Change of ln nu by a share of another fluid, by the blend relation at each temperature.
fn blended(label: &Profile, other: [f64; 2], share: f64) -> Option<[f64; 2]> {
    let own = [label.nu40(), label.nu100()];
    let mut d = [0.0; 2];
    for ((d, own), other) in d.iter_mut().zip(own).zip(other) {
        let nus = [mm2_s(own), mm2_s(other)];
        let blend = Rule::Walther
            .blend(&[number(1.0 - share), number(share)], &nus)
            .ok()?;
        *d = ln(to_mm2_s(blend) / own);
    }
    Some(d)
}

/// The oil thickens more at 40 °C than at 100, acids and carbonyls rise. The fixture of practice
/// 46.9 to 54.6 with 7.0 to 7.55, acid number up by 1.3 and 18 absorbances per cm.
fn oxidation() -> Vec<Theta> {
    let mut thetas = Vec::new();
    for rise in [0.02, 0.035, 0.055, 0.08, 0.12, 0.17, 0.24, 0.33, 0.45] {
        for ratio in [0.4, 0.5, 0.6, 0.72] {
            for (acid, bands) in [(1.5, 45.0), (4.0, 80.0), (9.0, 130.0), (20.0, 300.0)] {
                thetas.push(Theta {
                    acid: Shift {
                        by: acid * rise,
                        spread: 0.35 * acid * rise + 0.05,
                    },
                    oxidation: Shift {
                        by: bands * rise,
                        spread: 0.35 * bands * rise + 1.0,
                    },
                    flash: Shift {
                        by: 3.0,
                        spread: 5.0,
                    },
                    ..Theta::of(Cause::Oxidation, [rise, ratio * rise], rise)
                });
            }
        }
    }
    shared(thetas, -2.6)
}

fn light_ends() -> Vec<Theta> {
    let mut thetas = Vec::new();
    for (rise, flash) in [
        (0.03, 6.0),
        (0.06, 12.0),
        (0.1, 18.0),
        (0.16, 25.0),
        (0.25, 35.0),
    ] {
        for ratio in [0.72, 0.82, 0.92] {
            thetas.push(Theta {
                flash: Shift {
                    by: flash,
                    spread: 6.0,
                },
                ..Theta::of(Cause::LightEndLoss, [rise, ratio * rise], rise)
            });
        }
    }
    shared(thetas, -5.0)
}

fn cracking(setting: Setting) -> Vec<Theta> {
    let mut thetas = Vec::new();
    for (fall, flash) in [
        (0.03, -25.0),
        (0.06, -40.0),
        (0.1, -55.0),
        (0.17, -70.0),
        (0.28, -85.0),
    ] {
        for ratio in [0.78, 0.88] {
            thetas.push(Theta {
                flash: Shift {
                    by: flash,
                    spread: 12.0,
                },
                acid: Shift {
                    by: 0.15,
                    spread: 0.2,
                },
                ..Theta::of(Cause::Cracking, [-fall, -ratio * fall], fall)
            });
        }
    }
    shared(thetas, if setting.heated { -4.0 } else { -5.5 })
}

fn gas() -> Vec<Theta> {
    let mut thetas = Vec::new();
    for fall in [0.06, 0.12, 0.2, 0.32, 0.5] {
        for ratio in [0.5, 0.65, 0.8] {
            thetas.push(Theta {
                flash: Shift {
                    by: -8.0,
                    spread: 8.0,
                },
                ..Theta::of(Cause::Gas, [-fall, -ratio * fall], fall)
            });
        }
    }
    shared(thetas, -3.0)
}

/// Shares of another oil that are tried.
const SHARES: [f64; 12] = [
    0.03, 0.05, 0.08, 0.11, 0.15, 0.2, 0.27, 0.35, 0.45, 0.6, 0.8, 1.0,
];

/// Other oils: those of the site, and as likely in all one that is not on the site.
fn wrong(label: &Profile, others: &[Arc<Mixed>]) -> Vec<Theta> {
    let (mut inside, mut outside) = (Vec::new(), Vec::new());
    for other in others {
        let profile = &other.profile;
        let apart = (profile.ln40 - label.ln40)
            .abs()
            .max((profile.ln100 - label.ln100).abs());
        let alike = apart < 0.02 && profile.base == label.base && same_additives(label, profile);
        if alike {
            continue;
        }
        for share in SHARES {
            let nus = [profile.nu40(), profile.nu100()];
            let Some(d) = blended(label, nus, share) else {
                continue;
            };
            let theta = Theta {
                kept: 1.0 - share,
                mixed: Some(other.clone()),
                spread: 0.004 + 0.02 * d[0].abs().min(1.0) + 0.01 * (1.0 - share) * apart.min(1.0),
                ..Theta::of(kind_of_other(label, profile), d, share)
            };
            if other.oil.is_some() {
                inside.push(theta);
            } else {
                outside.push(theta);
            }
        }
    }
    let mut all = shared(inside, -2.8);
    all.extend(shared(outside, -2.8));
    all
}

fn same_additives(a: &Profile, b: &Profile) -> bool {
    super::super::profile::ADDITIVE
        .iter()
        .all(|e| match (a.figures.get(e), b.figures.get(e)) {
            (Some(a), Some(b)) => (a.value - b.value).abs() <= 2.0 * (a.spread + b.spread),
            _ => true,
        })
}

/// What another oil is called beside the labelled one.
fn kind_of_other(label: &Profile, other: &Profile) -> Cause {
    use crate::relation::oil::base_stock::BaseStock as B;
    let strange = |b: B| matches!(b, B::PagWaterSoluble | B::PagOilSoluble | B::Vegetable);
    if strange(other.base) && !strange(label.base) {
        return Cause::Admixture;
    }
    match other.ln40 - label.ln40 {
        d if d < -0.04 => Cause::LighterOil,
        d if d > 0.04 => Cause::HeavierOil,
        _ => Cause::LikeOil,
    }
}

/// Share of another oil that gives a viscosity at 40 °C, by the blend relation.
pub(super) fn share_by_viscosity(label: &Profile, other: &Profile, nu40: f64) -> Option<f64> {
    let fraction = Rule::Walther.fraction(mm2_s(other.nu40()), mm2_s(label.nu40()), mm2_s(nu40));
    fraction.ok().map(Measure::base)
}
