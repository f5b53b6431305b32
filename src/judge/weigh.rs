//! One oil on one point: margins and the word.

use super::band::Band;
use super::margin::{Jaw, Ready};
use super::numbers::Numbers;
use super::prepared::{PreparedOil, PreparedPoint, ReadyDemand, ReadyLimit, Setting, Variant};
use super::straight;
use super::verdict::Verdict;
use crate::demand::End;
use crate::demand::journal::HeatCeiling;
use crate::demand::tested::TestedLimit;
use crate::quantity::convert::dynamic;
use crate::quantity::{KinematicViscosity, Measure, ThermodynamicTemperature};

/// A margin with the demand it belongs to.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Margin {
    /// VG steps, or kelvins for pour point and oil ceiling.
    pub value: f64,
    /// Number of the demand in the point's list.
    pub demand: u16,
    /// Number of the setting of unknowns it was worst in.
    pub setting: u16,
}

/// Viscosity on the line judged, with its temperature: m²/s and K.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct At {
    /// m²/s.
    pub nu: f64,
    /// K.
    pub t: f64,
}

/// What weighing one oil on one point gives.
#[derive(Clone, Debug, PartialEq)]
pub struct Judgement {
    /// The word.
    pub verdict: Verdict,
    /// Smallest margin of the hot floors.
    pub hot: Option<Margin>,
    /// Smallest margin of running and start ceilings.
    pub cold: Option<Margin>,
    /// Start over pour point, K from the limit at which it fails.
    pub pour: Option<Margin>,
    /// Under the oil's ceiling, K from the limit at which it fails.
    pub oil: Option<Margin>,
    /// Against the grade the maker names.
    pub maker: Option<Margin>,
    /// Where every demand is met.
    pub band: Band,
    /// At the governing hot demand.
    pub at_hot: Option<At>,
    /// At the start temperature, thick end.
    pub at_start: Option<At>,
    /// Demands not met that make it fail.
    pub unmet: Numbers,
    /// Demands not met that only ask: replaced ones, low confidence, review limits.
    pub asked: Numbers,
    /// Why it is open or capped, beyond the margins.
    pub doubts: Doubts,
    /// Reserve asked of this oil, VG steps.
    pub reserve: f64,
    /// Settings of the unknowns in which it fails, and how many there are.
    pub failing_settings: (u16, u16),
}

/// What keeps a verdict from being more than open or tight.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
#[expect(
    clippy::struct_excessive_bools,
    reason = "independent reasons, several may stand"
)]
pub struct Doubts {
    /// A demand cannot be worked out: an input is missing.
    pub undecided: bool,
    /// A demand of low confidence is not met.
    pub low_confidence: bool,
    /// Start close to the pour point, or below the cloud point, of a waxy oil not measured cold.
    pub wax: bool,
    /// Start more than 60 K below the lowest point stated.
    pub far_below: bool,
    /// Start below the window of a polymer known only by finished points.
    pub window: bool,
    /// The range of an unknown includes both sides of a limit.
    pub straddles: bool,
    /// The pour point is not stated and the range of its base includes both sides.
    pub pour_unknown: bool,
    /// A film is asked for and the oil's pressure-viscosity coefficient is not known.
    pub alpha_unknown: bool,
    /// Between least and preferred pour margin.
    pub pour_close: bool,
    /// Above the base's continuous limit.
    pub above_continuous: bool,
    /// A viscosity that only a test gives would decide, and the oil does not state it.
    pub untested: bool,
}

/// One setting's result.
#[derive(Clone, Debug)]
pub(super) struct Sum {
    pub(super) fails: bool,
    pub(super) doubts: Doubts,
    pub(super) hot: Option<Margin>,
    pub(super) cold: Option<Margin>,
    pub(super) pour: Option<Margin>,
    pub(super) oil: Option<Margin>,
    pub(super) maker: Option<Margin>,
    pub(super) band: Band,
    pub(super) at_hot: Option<At>,
    pub(super) at_start: Option<At>,
}

/// Demands of low confidence fail only when missed by more than this, VG steps.
pub(super) const LOW_CONFIDENCE_REACH: f64 = 2.0;
/// A margin this close to zero is zero, and met.
pub(super) const ZERO: f64 = 1e-9;

/// Weighs an oil on a point.
///
/// # Panics
/// Never: a point always has at least one setting.
pub fn weigh(point: &PreparedPoint, oil: &PreparedOil) -> Judgement {
    weigh_by(point, oil, true)
}

/// The same without the short cut for straight lines; gives the same bits (tested).
///
/// # Panics
/// Never: a point always has at least one setting.
pub fn weigh_generally(point: &PreparedPoint, oil: &PreparedOil) -> Judgement {
    weigh_by(point, oil, false)
}

fn weigh_by(point: &PreparedPoint, oil: &PreparedOil, short_cut: bool) -> Judgement {
    let point = &*point.for_oil(oil);
    let mut total: Option<Judgement> = None;
    let variants = oil.variants(point);
    for (number, setting) in point.settings.iter().enumerate() {
        for variant in variants {
            let number = u16::try_from(number).unwrap_or(u16::MAX);
            let (mut unmet, mut asked) = (Numbers::default(), Numbers::default());
            let state = (oil, variant);
            let sum = match straight::lines(oil, variant.worn.as_ref()) {
                Some(lines) if short_cut => {
                    straight::one(setting, number, state, lines, &mut unmet, &mut asked)
                }
                _ => one(setting, number, state, &mut unmet, &mut asked),
            };
            match &mut total {
                None => total = Some(begin(sum, unmet, asked, oil.reserve(point.reserve))),
                Some(total) => combine(total, sum, unmet, asked),
            }
        }
    }
    let mut judgement = total.expect("a point has at least one setting");
    judgement.verdict = word(&judgement);
    judgement
}

fn begin(sum: Sum, unmet: Numbers, asked: Numbers, reserve: f64) -> Judgement {
    Judgement {
        verdict: Verdict::Holds,
        hot: sum.hot,
        cold: sum.cold,
        pour: sum.pour,
        oil: sum.oil,
        maker: sum.maker,
        band: sum.band,
        at_hot: sum.at_hot,
        at_start: sum.at_start,
        unmet,
        asked,
        doubts: sum.doubts,
        reserve,
        failing_settings: (u16::from(sum.fails), 1),
    }
}

/// Adds another setting: the worse end of each margin, both sets of reasons.
fn combine(total: &mut Judgement, sum: Sum, unmet: Numbers, asked: Numbers) {
    if lower(sum.hot, total.hot) {
        (total.hot, total.at_hot) = (sum.hot, sum.at_hot);
    }
    if lower(sum.cold, total.cold) {
        (total.cold, total.at_start) = (sum.cold, sum.at_start);
    }
    for (mine, other) in [
        (&mut total.pour, sum.pour),
        (&mut total.oil, sum.oil),
        (&mut total.maker, sum.maker),
    ] {
        if lower(other, *mine) {
            *mine = other;
        }
    }
    total.band = total.band.and(sum.band);
    total.doubts = total.doubts.and(sum.doubts);
    total.failing_settings.0 += u16::from(sum.fails);
    total.failing_settings.1 += 1;
    total.unmet.add_all(&unmet);
    total.asked.add_all(&asked);
}

fn lower(new: Option<Margin>, old: Option<Margin>) -> bool {
    match (new, old) {
        (Some(new), Some(old)) => new.value < old.value,
        (Some(_), None) => true,
        _ => false,
    }
}

/// The word, from margins and doubts: computed, never stored beside them.
fn word(j: &Judgement) -> Verdict {
    let (failing, all) = j.failing_settings;
    if failing == all {
        return Verdict::Fails;
    }
    let d = j.doubts;
    let unknown = d.pour_unknown || d.alpha_unknown || d.untested;
    if failing > 0 || d.undecided || d.low_confidence || d.wax || unknown {
        return Verdict::Open;
    }
    let smallest = [j.hot, j.cold]
        .into_iter()
        .flatten()
        .map(|m| m.value)
        .fold(f64::INFINITY, f64::min);
    if smallest < j.reserve || d.far_below || d.window || d.pour_close || d.above_continuous {
        return Verdict::Tight;
    }
    Verdict::Holds
}

impl Doubts {
    fn and(self, other: Self) -> Self {
        Self {
            undecided: self.undecided || other.undecided,
            low_confidence: self.low_confidence || other.low_confidence,
            wax: self.wax || other.wax,
            far_below: self.far_below || other.far_below,
            window: self.window || other.window,
            straddles: self.straddles || other.straddles,
            pour_unknown: self.pour_unknown || other.pour_unknown,
            alpha_unknown: self.alpha_unknown || other.alpha_unknown,
            pour_close: self.pour_close || other.pour_close,
            above_continuous: self.above_continuous || other.above_continuous,
            untested: self.untested || other.untested,
        }
    }
}

/// One setting of the unknowns, for curves of any form.
fn one(
    setting: &Setting,
    number: u16,
    (oil, variant): (&PreparedOil, &Variant),
    unmet: &mut Numbers,
    asked: &mut Numbers,
) -> Sum {
    let start = setting.start.map(|(t, _)| At {
        nu: oil.thick.nu(t),
        t,
    });
    let mut sum = Sum::begin(setting, start);
    for demand in &setting.demands {
        if demand.applies_to(oil) {
            measured(demand, oil, variant, number, &mut sum, unmet, asked);
        }
    }
    cold_data(setting, oil, &mut sum);
    sum
}

impl Sum {
    /// Nothing looked at yet.
    pub(super) fn begin(setting: &Setting, at_start: Option<At>) -> Self {
        Self {
            fails: false,
            doubts: Doubts {
                undecided: setting.undecided,
                ..Doubts::default()
            },
            hot: None,
            cold: None,
            pour: None,
            oil: None,
            maker: None,
            band: Band::OPEN,
            at_hot: None,
            at_start,
        }
    }
}

/// One demand, measured and noted.
pub(super) fn measured(
    demand: &ReadyDemand,
    oil: &PreparedOil,
    variant: &Variant,
    setting: u16,
    sum: &mut Sum,
    unmet: &mut Numbers,
    asked: &mut Numbers,
) {
    let Some(found) = measure(demand, oil, variant, &mut sum.doubts) else {
        return;
    };
    let met = found.value >= -ZERO;
    if !demand.judges {
        if !met && demand.asks_when_unmet {
            asked.add(demand.number);
        }
        return;
    }
    sum.band = sum.band.and(found.band);
    let margin = Margin {
        value: found.value,
        demand: demand.number,
        setting,
    };
    note(sum, demand.end, margin, found.at);
    if met {
        return;
    }
    let far = found.steps && found.value < -LOW_CONFIDENCE_REACH;
    if demand.low_confidence && !far {
        sum.doubts.low_confidence = true;
        asked.add(demand.number);
    } else {
        sum.fails = true;
        unmet.add(demand.number);
    }
}

fn note(sum: &mut Sum, end: End, margin: Margin, at: Option<At>) {
    let slot = match end {
        End::HotFloor => &mut sum.hot,
        End::RunningCeiling | End::StartCeiling => &mut sum.cold,
        End::PourMargin => &mut sum.pour,
        End::OilCeiling => &mut sum.oil,
        End::MakerGrade => &mut sum.maker,
    };
    if lower(Some(margin), *slot) {
        *slot = Some(margin);
        if end == End::HotFloor {
            sum.at_hot = at;
        }
    }
}

/// Margins of the hot floors that judge, in VG steps, with the number of the demand.
pub(super) fn floor_margins(
    setting: &Setting,
    oil: &PreparedOil,
    variant: &Variant,
) -> Vec<(f64, u16)> {
    let mut doubts = Doubts::default();
    let floors = setting.demands.iter();
    let floors = floors.filter(|d| d.end == End::HotFloor && d.judges && d.applies_to(oil));
    floors
        .filter_map(|d| measure(d, oil, variant, &mut doubts).map(|f| (f.value, d.number)))
        .collect()
}

/// A margin found, with the ambients at which it is not negative.
struct Found {
    value: f64,
    steps: bool,
    band: Band,
    at: Option<At>,
}

fn measure(
    demand: &ReadyDemand,
    oil: &PreparedOil,
    variant: &Variant,
    doubts: &mut Doubts,
) -> Option<Found> {
    let worn = variant.worn.as_ref();
    match &demand.limit {
        ReadyLimit::Jaw(jaw) => Some(match demand.end {
            End::HotFloor => floor(demand, jaw, &oil.thin, worn),
            End::MakerGrade => maker_grade(jaw, &oil.thin),
            _ => ceiling(demand, jaw, &oil.thick),
        }),
        ReadyLimit::Dynamic(eta) => {
            let at = ThermodynamicTemperature::from_base(demand.t);
            let nu = KinematicViscosity::from_base(eta / oil.curves.density.at(at).base());
            let jaw = Jaw::new(nu, at);
            Some(match demand.end {
                End::HotFloor => floor(demand, &jaw, &oil.thin, worn),
                _ => match &demand.heat {
                    Some(heat) => heated(&jaw, heat, oil),
                    None => ceiling(demand, &jaw, &oil.thick),
                },
            })
        }
        ReadyLimit::Film(film) => {
            let found = super::prepared::film_margin(demand, film, oil, variant);
            doubts.alpha_unknown |= found.is_none();
            found.map(|(value, band, at)| Found {
                value,
                steps: true,
                band,
                at: Some(at),
            })
        }
        ReadyLimit::Pour { least, preferred } => pour(demand, (*least, *preferred), oil, doubts),
        ReadyLimit::OilsOwn => oils_own(demand, oil, doubts),
        ReadyLimit::AtMost(most) => Some(Found {
            value: most - demand.t,
            steps: false,
            band: Band::at_most(demand.at, *most),
            at: None,
        }),
        ReadyLimit::Tested(limit) => tested(demand, *limit, oil, variant, doubts),
        ReadyLimit::UseLow => {
            let low = oil.use_range?.0;
            Some(Found {
                value: demand.t - low,
                steps: false,
                band: Band::at_least(demand.at, low),
                at: None,
            })
        }
    }
}

/// A viscosity by a test; where only a line that says nothing of it is at hand, the oil is neither
/// failed nor passed by it.
fn tested(
    demand: &ReadyDemand,
    limit: TestedLimit,
    oil: &PreparedOil,
    variant: &Variant,
    doubts: &mut Doubts,
) -> Option<Found> {
    let found = super::tested::measure(demand, limit, oil, variant);
    doubts.untested |= found.unknown;
    (!found.unknown).then_some(Found {
        value: found.value,
        steps: true,
        band: found.band,
        at: (demand.end == End::HotFloor).then_some(At {
            nu: found.nu.base(),
            t: demand.t,
        }),
    })
}

/// Floors are judged on the thinner of thin end and worn.
fn floor(demand: &ReadyDemand, jaw: &Jaw, thin: &Ready, worn: Option<&Ready>) -> Found {
    let one = |curve: &Ready| {
        let meets = curve.meets(jaw);
        let band = if meets.is_nan() {
            Band::OPEN
        } else {
            Band::at_most(demand.at, meets)
        };
        (curve.above(jaw).0, band)
    };
    let (mut value, mut band) = one(thin);
    let mut judged = thin;
    if let Some(worn) = worn {
        let (lower, worn_band) = one(worn);
        band = band.and(worn_band);
        if lower < value {
            (value, judged) = (lower, worn);
        }
    }
    Found {
        value,
        steps: true,
        band,
        at: Some(At {
            nu: judged.nu(jaw.t),
            t: jaw.t,
        }),
    }
}

fn ceiling(demand: &ReadyDemand, jaw: &Jaw, thick: &Ready) -> Found {
    let meets = thick.meets(jaw);
    let band = if meets.is_nan() {
        Band::OPEN
    } else {
        Band::at_least(demand.at, meets)
    };
    Found {
        value: -thick.above(jaw).0,
        steps: true,
        band,
        at: None,
    }
}

/// A bearing that gets too hot: fed hot it has little room, fed cold the oil is thick.
fn heated(jaw: &Jaw, heat: &HeatCeiling, oil: &PreparedOil) -> Found {
    let eta = |t: ThermodynamicTemperature| {
        let nu = KinematicViscosity::from_base(oil.thick.nu(t.base()));
        dynamic(nu, oil.curves.density.at(t))
    };
    Found {
        value: -oil.thick.above(jaw).0,
        steps: true,
        band: Band::around(heat.ambient, |ambient| heat.excess(ambient, eta)),
        at: None,
    }
}

/// Compared at 40 °C whatever the ambient: it limits no band.
fn maker_grade(jaw: &Jaw, thin: &Ready) -> Found {
    Found {
        value: thin.above(jaw).0,
        steps: true,
        band: Band::OPEN,
        at: None,
    }
}

fn pour(
    demand: &ReadyDemand,
    (least, preferred): (f64, f64),
    oil: &PreparedOil,
    doubts: &mut Doubts,
) -> Option<Found> {
    let (lo, hi) = oil.pour?;
    let (best, worst) = (demand.t - lo - least, demand.t - hi - least);
    if worst < -ZERO && best >= -ZERO {
        doubts.pour_unknown = true;
    }
    if worst >= -ZERO && worst < preferred - least - ZERO {
        doubts.pour_close = true;
    }
    // an unstated pour point fails only where no pour point of its base would do
    let value = if oil.pour_stated || best < -ZERO {
        worst.min(best)
    } else {
        worst.max(0.0)
    };
    Some(Found {
        value,
        steps: false,
        band: Band::at_least(demand.at, hi + least),
        at: None,
    })
}

fn oils_own(demand: &ReadyDemand, oil: &PreparedOil, doubts: &mut Doubts) -> Option<Found> {
    let (continuous, most) = oil.ceiling?;
    doubts.above_continuous |= continuous.is_some_and(|c| demand.t > c + ZERO);
    Some(Found {
        value: most - demand.t,
        steps: false,
        band: Band::at_most(demand.at, most),
        at: None,
    })
}

/// How far cold start verdicts may be carried by the data (interface, settled question 3).
pub(super) fn cold_data(setting: &Setting, oil: &PreparedOil, sum: &mut Sum) {
    let Some((start, _)) = setting.start.filter(|_| setting.has_start_ceiling) else {
        return;
    };
    let d = &mut sum.doubts;
    d.wax |= oil.wax_doubt(start);
    d.far_below |= start < oil.lowest - 60.0 - ZERO;
    d.window |= oil.window_doubt(start);
}
