//! Blends and top-ups of two oils: whether they mix, what they become, and the share for a target.
//!
//! Base oils are blended by the rule of Walther, temperature by temperature, and by the method of
//! Wright, line by line; the two disagree the more the further the components lie apart. The
//! polymer is not blended with the oil but carried apart, each diluted (common practice; ASTM
//! D7152 leaves polymer-thickened oils out).

mod made;
mod part;
mod told;

use super::curves::Curves;
use super::findings::{Finding, finding};
use crate::model::Oil;
use crate::model::facts::Mark;
use crate::model::rulebook::Rulebook;
use crate::numeric::root::bracketed;
use crate::quantity::convert::{celsius, number};
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{KinematicViscosity, Measure, Ratio, ThermodynamicTemperature};
use crate::relation::oil::blend::BlendError;
use crate::relation::oil::blend_wright::WrightError;
use crate::relation::oil::grade::IsoGrade;
use crate::relation::oil::viscosity_index;
use crate::trace::{Derivation, Known};
pub use part::End;
use part::{Mix, Part};

/// One oil of a blend.
#[derive(Clone, Copy, Debug)]
pub struct Component<'o> {
    /// As stated.
    pub oil: &'o Oil,
    /// Its curves.
    pub curves: &'o Curves,
}

/// Why there is no blend.
#[derive(Clone, Debug, PartialEq, thiserror::Error)]
pub enum NoBlend {
    /// They do not mix.
    #[error(
        "{a} ({a_base}) and {b} ({b_base}) do not mix: no viscosity is worked out [{source_of}]"
    )]
    Immiscible {
        /// One oil.
        a: String,
        /// Its base.
        a_base: &'static str,
        /// The other.
        b: String,
        /// Its base.
        b_base: &'static str,
        /// Where that is written.
        source_of: String,
    },
    /// Nobody says whether they mix.
    #[error("the rules do not say whether {0} and {1} mix")]
    NotSaid(&'static str, &'static str),
    /// A grease.
    #[error("{0} is a grease: greases are not blended here")]
    Grease(String),
    /// Not between 0 and 1.
    #[error("a share of {:.1} % cannot be: it lies between 0 and 100 %", 100.0 * .0)]
    Share(f64),
    /// A component the rule does not cover.
    #[error(transparent)]
    Walther(#[from] BlendError),
    /// The lines do not blend.
    #[error(transparent)]
    Wright(#[from] WrightError),
    /// The target is not between the two.
    #[error("{} at {} lies outside the two oils, {} and {}: no share of one reaches it",
        shown(*.target), degrees(*.at), shown(*.a), shown(*.b))]
    Target {
        /// Wanted.
        target: KinematicViscosity,
        /// At.
        at: ThermodynamicTemperature,
        /// One oil there.
        a: KinematicViscosity,
        /// The other.
        b: KinematicViscosity,
    },
}

fn shown(nu: KinematicViscosity) -> String {
    quantity(nu.amount(), Units::Si, Toward::Nearest)
}

fn degrees(t: ThermodynamicTemperature) -> String {
    quantity(t.amount(), Units::Si, Toward::Nearest)
}

/// A blend by one rule: what it is at 40 and 100 °C.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Became {
    /// At 40 °C.
    pub nu40: Known<KinematicViscosity>,
    /// At 100 °C.
    pub nu100: Known<KinematicViscosity>,
    /// Viscosity index; `None` below 2 mm²/s at 100 °C.
    pub index: Option<Known<Ratio>>,
    /// ISO grade; `None` between the grades.
    pub grade: Option<u32>,
}

/// Two oils blended.
#[derive(Clone, Debug)]
pub struct Blend {
    /// The oil in the sump.
    pub a: String,
    /// The oil added.
    pub b: String,
    /// Share of the one added, by volume.
    pub share: Ratio,
    /// How they mix.
    pub mixing: Mark,
    /// Where that is written.
    pub mixing_source: String,
    /// By Walther.
    pub walther: Became,
    /// By Wright.
    pub wright: Became,
    /// Wright over Walther, less one, at 40 and 100 °C.
    pub disagreement: (Ratio, Ratio),
    /// At the other temperatures asked for: Walther, Wright.
    pub at: Vec<(
        ThermodynamicTemperature,
        Known<KinematicViscosity>,
        Known<KinematicViscosity>,
    )>,
    /// How far the split of base and polymer moves the viscosity at 40 °C: thinner base, thicker.
    pub by_split: Option<(KinematicViscosity, KinematicViscosity)>,
    /// The blend as an oil that can be weighed, with its curves.
    pub oil: Oil,
    /// Its curves.
    pub curves: Curves,
    /// What must be known of it.
    pub findings: Vec<Finding>,
    /// The calculation.
    pub steps: Derivation,
}

/// Blends two oils: `share` of `b`, by volume, into `a`.
///
/// # Errors
/// See [`NoBlend`].
pub fn blend(
    a: Component<'_>,
    b: Component<'_>,
    share: Ratio,
    rules: &Rulebook,
    asked: &[ThermodynamicTemperature],
) -> Result<Blend, NoBlend> {
    let (mixing, mixing_source) = mixing(a, b, rules)?;
    if !(0.0..=1.0).contains(&share.base()) {
        return Err(NoBlend::Share(share.base()));
    }
    // the thicker base needs the least polymer to explain the oil: the milder assumption speaks
    let mix = Mix::new(&Part::of(a.curves), &Part::of(b.curves), share, End::Thick)?;
    let thin = Mix::new(&Part::of(a.curves), &Part::of(b.curves), share, End::Thin)?;
    let mut told = told::Told::new(a, b, share);
    let walther = told.walther(&mix)?;
    let wright = told.wright(&mix)?;
    let at = asked
        .iter()
        .map(|t| told.at(&mix, *t))
        .collect::<Result<_, _>>()?;
    let off = |w: Known<KinematicViscosity>, other: Known<KinematicViscosity>| {
        number(other.value.base() / w.value.base() - 1.0)
    };
    let t40 = celsius(40.0);
    let (thin40, thick40) = (thin.walther(t40)?, mix.walther(t40)?);
    let by_split = mix.estimated.then_some(if thin40 <= thick40 {
        (thin40, thick40)
    } else {
        (thick40, thin40)
    });
    let (oil, curves) = made::made(a, b, share, &mix, rules)?;
    let mut findings = about(a, b, &mix, mixing, &walther, &wright);
    findings.extend(
        curves
            .findings
            .iter()
            .filter(|f| f.name.starts_with("grade"))
            .cloned(),
    );
    Ok(Blend {
        a: a.oil.id.clone(),
        b: b.oil.id.clone(),
        share,
        mixing,
        mixing_source,
        disagreement: (
            off(walther.nu40, wright.nu40),
            off(walther.nu100, wright.nu100),
        ),
        walther,
        wright,
        at,
        by_split,
        oil,
        curves,
        findings,
        steps: told.d,
    })
}

/// Share of `b` at which the blend has a viscosity at a temperature: by Walther, by Wright.
///
/// # Errors
/// See [`NoBlend`].
pub fn share_for(
    a: Component<'_>,
    b: Component<'_>,
    target: KinematicViscosity,
    at: ThermodynamicTemperature,
    rules: &Rulebook,
) -> Result<(Ratio, Ratio), NoBlend> {
    mixing(a, b, rules)?;
    let (parts_a, parts_b) = (Part::of(a.curves), Part::of(b.curves));
    let mix = |x: f64| Mix::new(&parts_a, &parts_b, number(x), End::Thick);
    let (nu_a, nu_b) = (mix(0.0)?.walther(at)?, mix(1.0)?.walther(at)?);
    let outside = NoBlend::Target {
        target,
        at,
        a: nu_a,
        b: nu_b,
    };
    if !((nu_a < target && target < nu_b) || (nu_b < target && target < nu_a)) {
        return Err(outside);
    }
    let walther = |x: f64| {
        let nu = mix(x).and_then(|m| m.walther(at).map_err(NoBlend::from));
        nu.map_or(f64::NAN, Measure::base) - target.base()
    };
    let wright = |x: f64| {
        let nu = mix(x).and_then(|m| m.wright(at).map_err(NoBlend::from));
        nu.map_or(f64::NAN, Measure::base) - target.base()
    };
    let root = |f: &dyn Fn(f64) -> f64| bracketed(0.0, 1.0, f).map(|r| number(r.at));
    match (root(&walther), root(&wright)) {
        (Ok(by_walther), Ok(by_wright)) => Ok((by_walther, by_wright)),
        _ => Err(outside),
    }
}

/// How two oils mix by the rules.
///
/// # Errors
/// [`NoBlend::Immiscible`], [`NoBlend::NotSaid`], [`NoBlend::Grease`].
pub fn mixing(
    a: Component<'_>,
    b: Component<'_>,
    rules: &Rulebook,
) -> Result<(Mark, String), NoBlend> {
    use crate::model::oil::OilKind;
    use crate::model::rulebook::compatibility::mark;
    for one in [a, b] {
        if one.oil.kind == OilKind::Grease {
            return Err(NoBlend::Grease(one.oil.id.clone()));
        }
    }
    let (base_a, base_b) = (a.curves.base, b.curves.base);
    let not_said = || NoBlend::NotSaid(base_a.word(), base_b.word());
    let row = |base| rules.base_stock(base).map(|s| s.mixing_row.as_str());
    let (row_a, row_b) = (
        row(base_a).ok_or_else(not_said)?,
        row(base_b).ok_or_else(not_said)?,
    );
    let rule = rules.mixing.get(row_a).ok_or_else(not_said)?;
    let found = mark(&rule.marks, row_b).ok_or_else(not_said)?;
    let source = rule.provenance.cited();
    if found == Mark::Bad {
        return Err(NoBlend::Immiscible {
            a: a.oil.id.clone(),
            a_base: base_a.word(),
            b: b.oil.id.clone(),
            b_base: base_b.word(),
            source_of: source,
        });
    }
    Ok((found, source))
}

/// Viscosities further apart than this are beyond both rules.
const RATIO_COVERED: f64 = 10.0;

fn about(
    a: Component<'_>,
    b: Component<'_>,
    mix: &Mix,
    mixing: Mark,
    walther: &Became,
    wright: &Became,
) -> Vec<Finding> {
    let mut found = Vec::new();
    if mixing == Mark::Care {
        found.push(finding(
            "blend-of-another-nature",
            format!(
                "{} and {} blend and lose properties of both",
                a.curves.base.word(),
                b.curves.base.word()
            ),
            "only in need, not as a plan",
        ));
    }
    found.push(finding(
        "blend-additives",
        "that the base oils mix does not say that the additives agree".to_owned(),
        "a laboratory blend of 10, 50 and 90 % at 60 to 65 degC for days first: look, filter, foam, water",
    ));
    let apart = mix.apart(celsius(40.0));
    if apart > RATIO_COVERED {
        found.push(finding(
            "blend-far-apart",
            format!(
                "the base oils lie {apart:.0} times apart at 40 degC: beyond about ten neither rule \
                 should be relied on; by Walther {}, by Wright {} at 40 degC",
                shown(walther.nu40.value),
                shown(wright.nu40.value)
            ),
            "measure a blend before relying on it",
        ));
    }
    if mix.estimated {
        found.push(finding(
            "blend-polymer-estimated",
            "base oil and polymer are split by assumption; the polymer is carried apart, diluted, \
             which holds to first order"
                .to_owned(),
            "ask the supplier for the viscosity of the base oil",
        ));
    }
    if mix.whole_polymer {
        found.push(finding(
            "blend-polymer-whole",
            "one of the oils is polymer-thickened and its base cannot be estimated: it is blended \
             as if it were base oil, which the blending rules do not cover"
                .to_owned(),
            "measure a blend before relying on it",
        ));
    }
    found
}

/// The ISO grade of a viscosity.
fn grade(nu40: KinematicViscosity) -> Option<u32> {
    IsoGrade::of_viscosity(nu40).map(IsoGrade::number)
}

/// The index of two viscosities.
fn index(nu40: KinematicViscosity, nu100: KinematicViscosity) -> Option<Ratio> {
    viscosity_index::index(nu40, nu100).ok()
}
