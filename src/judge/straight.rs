//! The same judgement for oils whose curves are straight lines in the chart: nearly all.
//!
//! On one line the strictest floor is the one whose parallel lies highest at 40 °C, which needs
//! no exponential to find out; only the governing margins are worked out, by the same function
//! as everywhere. A test holds this to the general way, bit for bit.

use super::band::Band;
use super::margin::{Jaw, Ready, Straight};
use super::numbers::Numbers;
use super::prepared::{PreparedOil, ReadyDemand, ReadyLimit, Setting};
use super::weigh::{At, LOW_CONFIDENCE_REACH, Margin, Sum, ZERO, cold_data, measured};
use crate::demand::End;
use crate::relation::oil::tangent::LN_T40;

/// The straight lines of an oil in one state of wear.
#[derive(Clone, Copy)]
pub(super) struct Lines {
    thin: Straight,
    worn: Option<Straight>,
    thick: Straight,
}

/// The lines of an oil; `None` where one of its curves is bent.
pub(super) fn lines(oil: &PreparedOil, worn: Option<&Ready>) -> Option<Lines> {
    let straight = |r: &Ready| match r {
        Ready::Straight(line) => Some(*line),
        Ready::Bent(_) => None,
    };
    Some(Lines {
        thin: straight(&oil.thin)?,
        worn: match worn {
            Some(worn) => Some(straight(worn)?),
            None => None,
        },
        thick: straight(&oil.thick)?,
    })
}

/// The strictest limit of one line so far.
#[derive(Clone, Copy)]
struct Strictest<'d> {
    line: Straight,
    /// `ln ln Z` at 40 °C of the parallel through the limit; the sign turned for ceilings.
    carried: f64,
    found: Option<(&'d ReadyDemand, &'d Jaw)>,
}

impl<'d> Strictest<'d> {
    fn of(line: Straight) -> Self {
        Self {
            line,
            carried: f64::NEG_INFINITY,
            found: None,
        }
    }

    #[inline]
    fn look(&mut self, demand: &'d ReadyDemand, jaw: &'d Jaw, carried: f64) {
        if carried > self.carried {
            self.carried = carried;
            self.found = Some((demand, jaw));
        }
    }
}

/// A limit carried to 40 °C along a line, in `ln ln Z`.
#[inline]
fn carried(line: &Straight, jaw: &Jaw) -> f64 {
    jaw.w(line.line.form()) + line.line.slope_b() * (jaw.ln_t - LN_T40)
}

/// One setting of the unknowns.
pub(super) fn one(
    setting: &Setting,
    number: u16,
    oil: &PreparedOil,
    lines: Lines,
    unmet: &mut Numbers,
    asked: &mut Numbers,
) -> Sum {
    let start = setting.start.map(|(t, ln_t)| At {
        nu: lines.thick.line.nu_at_ln(ln_t),
        t,
    });
    let mut sum = Sum::begin(setting, start);
    let mut floors = [
        Some(Strictest::of(lines.thin)),
        lines.worn.map(Strictest::of),
    ];
    let mut ceiling = Strictest::of(lines.thick);
    for demand in &setting.demands {
        if !demand.applies_to(oil) {
            continue;
        }
        match (&demand.limit, demand.end) {
            (ReadyLimit::Jaw(jaw), End::HotFloor) => {
                hot(demand, jaw, &mut floors, &mut sum, unmet, asked);
            }
            (ReadyLimit::Jaw(jaw), End::RunningCeiling | End::StartCeiling) => {
                cold(demand, jaw, &mut ceiling, &mut sum, unmet, asked);
            }
            _ => measured(
                demand,
                oil,
                lines.worn.map(Ready::Straight).as_ref(),
                number,
                &mut sum,
                unmet,
                asked,
            ),
        }
    }
    for floor in floors.into_iter().flatten() {
        if let Some((demand, jaw)) = floor.found {
            let margin = Margin {
                value: floor.line.above(jaw).0,
                demand: demand.number,
                setting: number,
            };
            if sum.hot.is_none_or(|h| margin.value < h.value) {
                sum.hot = Some(margin);
                sum.at_hot = Some(At {
                    nu: floor.line.line.nu_at_ln(jaw.ln_t),
                    t: jaw.t,
                });
            }
        }
    }
    if let Some((demand, jaw)) = ceiling.found {
        let margin = Margin {
            value: -ceiling.line.above(jaw).0,
            demand: demand.number,
            setting: number,
        };
        if sum.cold.is_none_or(|c| margin.value < c.value) {
            sum.cold = Some(margin);
        }
    }
    cold_data(setting, oil, &mut sum);
    sum
}

#[inline]
fn hot<'d>(
    demand: &'d ReadyDemand,
    jaw: &'d Jaw,
    floors: &mut [Option<Strictest<'d>>; 2],
    sum: &mut Sum,
    unmet: &mut Numbers,
    asked: &mut Numbers,
) {
    let mut below = false;
    for floor in floors.iter_mut().flatten() {
        let line = floor.line;
        let at_40 = carried(&line, jaw);
        below |= at_40 > line.ln_ln_z40 && misses(at_40 - line.ln_ln_z40, || line.above(jaw).0);
        if demand.judges {
            floor.look(demand, jaw, at_40);
            sum.band = sum.band.and(Band::at_most(demand.at, line.meets(jaw)));
        }
    }
    if below {
        let lowest = || {
            let each = floors.iter().flatten().map(|f| f.line.above(jaw).0);
            each.fold(f64::INFINITY, f64::min)
        };
        missed(demand, lowest, sum, unmet, asked);
    }
}

#[inline]
fn cold<'d>(
    demand: &'d ReadyDemand,
    jaw: &'d Jaw,
    ceiling: &mut Strictest<'d>,
    sum: &mut Sum,
    unmet: &mut Numbers,
    asked: &mut Numbers,
) {
    let line = ceiling.line;
    let at_40 = carried(&line, jaw);
    let above = at_40 < line.ln_ln_z40 && misses(line.ln_ln_z40 - at_40, || -line.above(jaw).0);
    if demand.judges {
        ceiling.look(demand, jaw, -at_40);
        sum.band = sum.band.and(Band::at_least(demand.at, line.meets(jaw)));
    }
    if above {
        missed(demand, || -line.above(jaw).0, sum, unmet, asked);
    }
}

/// Whether a limit is missed by more than what counts as zero; close to it the margin decides.
#[inline]
fn misses(by: f64, margin: impl Fn() -> f64) -> bool {
    by > 1e-8 || margin() < -ZERO
}

/// A demand that is not met: it fails, asks, or is of low confidence.
#[inline]
fn missed(
    demand: &ReadyDemand,
    margin: impl Fn() -> f64,
    sum: &mut Sum,
    unmet: &mut Numbers,
    asked: &mut Numbers,
) {
    if !demand.judges {
        if demand.asks_when_unmet {
            asked.add(demand.number);
        }
    } else if demand.low_confidence && margin() >= -LOW_CONFIDENCE_REACH {
        sum.doubts.low_confidence = true;
        asked.add(demand.number);
    } else {
        sum.fails = true;
        unmet.add(demand.number);
    }
}
