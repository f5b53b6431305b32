//! Everything the causes of one labelled oil are weighed with: each at the sizes of the rules
//! (cause sizes), alone and two at a time.

use super::Cause;
use super::theta::{Mixed, Shift, Theta};
use crate::audit::profile::{ADDITIVE, Profile};
use crate::model::rulebook::CauseSize;
use crate::model::rulebook::cause::{ExpectedWhere, SizedBy, SizedCause};
use crate::numeric::math::{exp, ln};
use crate::quantity::Measure;
use crate::quantity::convert::{mm2_s, number, to_mm2_s};
use crate::relation::oil::blend::Rule;
use std::sync::Arc;

/// The settings of one labelled oil.
pub(super) struct Grid {
    pub(super) single: Vec<Theta>,
    pub(super) pairs: Vec<Theta>,
    /// Odds of a cause, any, before a figure is looked at.
    pub(super) odds: f64,
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

/// Which settings of a cause stand for it beside a second cause: every so many of its list, so that
/// the pairs stay few.
mod every {
    pub(super) const SHEAR: usize = 3;
    pub(super) const DILUTION: usize = 3;
    pub(super) const OXIDATION: usize = 5;
    pub(super) const OTHER_OIL: usize = 4;
    pub(super) const OXIDATION_BESIDE_OTHER_OIL: usize = 21;
    pub(super) const SHEAR_BESIDE_OTHER_OIL: usize = 9;
}

impl Grid {
    pub(super) fn new(
        label: &Profile,
        setting: Setting,
        others: &[Arc<Mixed>],
        sizes: &[CauseSize],
    ) -> Self {
        let of = |cause: SizedCause| -> Vec<Theta> {
            let rules = sizes.iter().filter(|s| s.cause == cause);
            rules
                .flat_map(|rule| settings(rule, label, setting, others))
                .collect()
        };
        let shear = of(SizedCause::PolymerShear);
        let dilution = of(SizedCause::Dilution);
        let oxidation = of(SizedCause::Oxidation);
        let wrong = of(SizedCause::OtherOil);
        let mut pairs = Vec::new();
        let few_shear = some(&shear, every::SHEAR);
        let few_dilution = some(&dilution, every::DILUTION);
        let few_oxidation = some(&oxidation, every::OXIDATION);
        let few_wrong = some(&wrong, every::OTHER_OIL);
        cross(&few_shear, &few_oxidation, &mut pairs);
        cross(&few_shear, &few_dilution, &mut pairs);
        cross(&few_dilution, &few_oxidation, &mut pairs);
        let oxidised = some(&oxidation, every::OXIDATION_BESIDE_OTHER_OIL);
        cross(&few_wrong, &oxidised, &mut pairs);
        let sheared = some(&shear, every::SHEAR_BESIDE_OTHER_OIL);
        cross(&few_wrong, &sheared, &mut pairs);
        let mut single = vec![Theta::none()];
        single.extend(shear);
        single.extend(dilution);
        single.extend(oxidation);
        single.extend(of(SizedCause::LightEndLoss));
        single.extend(of(SizedCause::Cracking));
        single.extend(of(SizedCause::Gas));
        single.extend(wrong);
        let odds = single.iter().skip(1).map(|t| exp(t.log_prior)).sum();
        Self {
            single,
            pairs,
            odds,
        }
    }
}

/// Every so many of a list, each standing for those left out.
fn some(list: &[Theta], step: usize) -> Vec<Theta> {
    let picked: Vec<&Theta> = list.iter().skip(step / 2).step_by(step).collect();
    let stands_for = (list.len() as f64 / (picked.len() as f64).max(1.0)).max(1.0);
    let pick = picked.into_iter().cloned();
    pick.map(|t| Theta {
        log_prior: t.log_prior + ln(stands_for),
        ..t
    })
    .collect()
}

fn cross(a: &[Theta], b: &[Theta], into: &mut Vec<Theta>) {
    for one in a {
        into.extend(b.iter().map(|other| one.with(other)));
    }
}

/// Odds of a cause in this machine with this oil; none where it is not weighed at all.
fn odds(rule: &CauseSize, label: &Profile, setting: Setting) -> Option<f64> {
    let expected = match rule.expected {
        Some(ExpectedWhere::Polymer) => label.thickened,
        Some(ExpectedWhere::Engine) => setting.engine,
        Some(ExpectedWhere::Gas) => setting.gas,
        Some(ExpectedWhere::Heated) => setting.heated,
        None => false,
    };
    let odds = if expected {
        rule.odds_expected.or(rule.odds)
    } else {
        rule.odds
    };
    odds.map(Measure::base).filter(|o| *o > 0.0)
}

/// The settings of one rule, its odds shared among them.
fn settings(
    rule: &CauseSize,
    label: &Profile,
    setting: Setting,
    others: &[Arc<Mixed>],
) -> Vec<Theta> {
    let Some(odds) = odds(rule, label, setting) else {
        return Vec::new();
    };
    match rule.cause {
        SizedCause::OtherOil => {
            let (inside, outside): (Vec<_>, Vec<_>) = others.iter().partition(|o| o.oil.is_some());
            // those of the site and those that are not: as likely in all, however many they are
            let half = |list: &[&Arc<Mixed>]| shared(wrong(rule, label, list), ln(0.5 * odds));
            let mut all = half(&inside);
            all.extend(half(&outside));
            all
        }
        SizedCause::Dilution => shared(dilution(rule, label), ln(odds)),
        _ => shared(moved(rule), ln(odds)),
    }
}

/// Shares the prior of a cause among its settings, by how common each is.
fn shared(mut thetas: Vec<Theta>, log_prior: f64) -> Vec<Theta> {
    let total: f64 = thetas.iter().map(|t| exp(t.log_prior)).sum();
    let each = log_prior - ln(total.max(1e-9));
    for theta in &mut thetas {
        theta.log_prior += each;
    }
    thetas
}

/// What every setting of a size has: how common it is, and its flash point.
struct Sized {
    size: f64,
    log_common: f64,
    flash: Shift,
}

fn each_size(rule: &CauseSize) -> impl Iterator<Item = Sized> + '_ {
    let spread = rule.flash_spread.map_or(0.0, Measure::base);
    rule.sizes.iter().enumerate().map(move |(i, size)| {
        let flash = rule.flash.get(i).or(rule.flash.first());
        Sized {
            size: size.base(),
            log_common: rule.common.get(i).map_or(0.0, |c| ln(c.base().max(1e-6))),
            flash: flash.map_or(Shift::default(), |f| Shift {
                by: f.base(),
                spread,
            }),
        }
    })
}

/// A cause that moves the viscosities by its size and by a ratio between them.
fn moved(rule: &CauseSize) -> Vec<Theta> {
    let cause = match rule.cause {
        SizedCause::PolymerShear => Cause::PolymerShear,
        SizedCause::Gas => Cause::Gas,
        SizedCause::Oxidation => Cause::Oxidation,
        SizedCause::LightEndLoss => Cause::LightEndLoss,
        SizedCause::Cracking => Cause::Cracking,
        SizedCause::Dilution | SizedCause::OtherOil => return Vec::new(),
    };
    let mut thetas = Vec::new();
    for sized in each_size(rule) {
        for ratio in rule.ratios.iter().map(|r| r.base()) {
            let d = match rule.by {
                SizedBy::Fall100 => {
                    let d100 = ln(1.0 - sized.size);
                    [ratio * d100, d100]
                }
                SizedBy::Fall40 => {
                    let d40 = ln(1.0 - sized.size);
                    [d40, ratio * d40]
                }
                SizedBy::Rise40 | SizedBy::Share => {
                    let d40 = ln(1.0 + sized.size);
                    [d40, ratio * d40]
                }
            };
            let plain = Theta {
                log_prior: sized.log_common,
                flash: sized.flash,
                ..Theta::of(cause, d, sized.size)
            };
            if rule.ageing.is_empty() {
                thetas.push(plain);
                continue;
            }
            thetas.extend(rule.ageing.iter().map(|ageing| {
                let (acid, bands) = (
                    10.0 * ageing.acid.base() * sized.size,
                    10.0 * ageing.oxidation.base() * sized.size,
                );
                Theta {
                    acid: Shift {
                        by: acid,
                        spread: 0.35 * acid + 0.05,
                    },
                    oxidation: Shift {
                        by: bands,
                        spread: 0.35 * bands + 1.0,
                    },
                    ..plain.clone()
                }
            }));
        }
    }
    thetas
}

fn dilution(rule: &CauseSize, label: &Profile) -> Vec<Theta> {
    let mut thetas = Vec::new();
    for sized in each_size(rule) {
        let share = sized.size;
        for diluent in &rule.diluents {
            let nus = [to_mm2_s(diluent.at_40), to_mm2_s(diluent.at_100)];
            let Some(d) = blended(label, nus, share) else {
                continue;
            };
            thetas.push(Theta {
                log_prior: sized.log_common,
                flash: sized.flash,
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
    thetas
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

/// Other oils in the place of a share of the labelled one.
fn wrong(rule: &CauseSize, label: &Profile, others: &[&Arc<Mixed>]) -> Vec<Theta> {
    let mut thetas = Vec::new();
    for other in others {
        let profile = &other.profile;
        let apart = (profile.ln40 - label.ln40)
            .abs()
            .max((profile.ln100 - label.ln100).abs());
        let alike = apart < 0.02 && profile.base == label.base && same_additives(label, profile);
        if alike {
            continue;
        }
        let nus = [profile.nu40(), profile.nu100()];
        for sized in each_size(rule) {
            let share = sized.size;
            let Some(d) = blended(label, nus, share) else {
                continue;
            };
            thetas.push(Theta {
                log_prior: sized.log_common,
                kept: 1.0 - share,
                mixed: Some(Arc::clone(other)),
                spread: 0.004 + 0.02 * d[0].abs().min(1.0) + 0.01 * (1.0 - share) * apart.min(1.0),
                ..Theta::of(kind_of_other(label, profile), d, share)
            });
        }
    }
    thetas
}

fn same_additives(a: &Profile, b: &Profile) -> bool {
    ADDITIVE
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
