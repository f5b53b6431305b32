//! A point and an oil with changes laid over them.

use super::lever::{Lever, Side, Target, excess};
use crate::demand::settings::every_setting;
use crate::demand::{Demands, End, Standing, takes_grease};
use crate::judge::{Judgement, PreparedOil};
use crate::model::stated::{Between, ViscosityLimit};
use crate::model::{Point, Stated, Sump};
use crate::oil::Curves;
use crate::quantity::convert::{ZERO_CELSIUS, celsius};
use crate::quantity::{KinematicViscosity, Measure, TemperatureInterval, ThermodynamicTemperature};
use crate::relation::oil::viscosity_temperature::ViscosityCurve;
use crate::source::Origin;
use crate::source::place::{Given, Whose};
use crate::weighing::{Pair, Scales};

/// Farthest a grade is moved, VG steps: three grades.
const MOST_STEPS: f64 = 3.0;
/// Highest viscosity index looked at; above it no gear, hydraulic or circulating oil is sold.
/// Common practice.
const HIGHEST_INDEX: f64 = 250.0;
/// A heater is set no hotter than this where the rules say nothing, °C. Common practice.
const HOTTEST_SETTING_C: f64 = 65.0;

/// A point and an oil as they would be.
#[derive(Clone)]
pub(super) struct Trial<'t> {
    pub(super) scales: &'t Scales<'t>,
    /// The oil's place in the list.
    pub(super) oil: usize,
    pub(super) point: Point,
    /// The oil, where it is changed.
    pub(super) state: Option<PreparedOil>,
    /// Reserve asked, VG steps.
    pub(super) reserve: f64,
}

/// The range of a change: from what is so today towards the farthest that is looked at.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Range {
    pub(super) from: f64,
    pub(super) to: f64,
}

impl<'t> Trial<'t> {
    /// As things are.
    pub(super) fn new(scales: &'t Scales<'t>, point: &Point, oil: usize) -> Self {
        Self {
            scales,
            oil,
            point: point.clone(),
            state: None,
            reserve: scales.reserve,
        }
    }

    pub(super) fn ready(&self) -> &PreparedOil {
        self.state.as_ref().unwrap_or(&self.scales.oils[self.oil])
    }

    fn curves(&self) -> &Curves {
        &self.ready().curves
    }

    /// Viscosity of the new oil at 40 °C, m²/s.
    pub(super) fn nu40(&self) -> f64 {
        self.curves().new.nu_at(celsius(40.0)).base()
    }

    /// The highest index the base gives by itself; none where it gives any, or the oil has polymer.
    pub(super) fn natural_index(&self) -> Option<f64> {
        let curves = self.curves();
        let most = crate::oil::curves::natural_index(curves.base)?;
        (!curves.thickened).then_some(most)
    }

    /// Margins and word.
    pub(super) fn judge(&self) -> Judgement {
        let oil = self.ready();
        self.scales.judge(&self.point, oil, self.reserve)
    }

    /// Judged in full.
    pub(super) fn pair(&self) -> Pair {
        let state = self.state.as_ref();
        self.scales.pair(&self.point, self.oil, state, self.reserve)
    }

    fn demands(&self) -> Vec<Demands> {
        every_setting(&self.point, &self.scales.site.house, self.scales.rules).0
    }

    /// The range of a change; `None` where there is nothing to change.
    pub(super) fn range(&self, lever: Lever, j: &Judgement, target: Target) -> Option<Range> {
        let oil_only = !takes_grease(&self.point);
        match lever {
            Lever::Heater => oil_only.then(|| self.heater()).flatten(),
            Lever::ColdestStart => self.coldest_start(),
            Lever::StartLimit => self.start_limit(j),
            Lever::SumpRise => self.sump_rise(),
            Lever::HottestAmbient => self.hottest_ambient(),
            Lever::Cooler => oil_only.then(|| self.cooler()).flatten(),
            Lever::ShearLoss => self.shear_loss(j),
            Lever::Grade => Self::grade(j, target),
            Lever::Index => self.index(),
            Lever::Reserve => (target == Target::Reserve).then_some(Range {
                from: self.reserve,
                to: 0.0,
            }),
        }
    }

    /// The coldest start, the coldest of all settings.
    fn start_now(&self) -> Option<f64> {
        let all = self.demands();
        let starts = all.iter().filter_map(|d| d.thermal.start_coldest);
        starts.map(|k| k.value.base()).min_by(f64::total_cmp)
    }

    fn heater(&self) -> Option<Range> {
        let from = self.start_now()?;
        let to = self.hottest_setting();
        (to > from).then_some(Range { from, to })
    }

    /// The hottest a heater is set, by the rules.
    fn hottest_setting(&self) -> f64 {
        let advice = self.scales.rules.advice.get("heater-thermostat");
        let figure = advice.and_then(|a| a.figure);
        figure.map_or(celsius(HOTTEST_SETTING_C).base(), |a| a.base)
    }

    fn coldest_start(&self) -> Option<Range> {
        let from = self.start_now()?;
        let (_, hot) = self.ambient()?;
        (hot > from).then_some(Range { from, to: hot })
    }

    fn ambient(&self) -> Option<(f64, f64)> {
        let stated = self.point.ambient.as_ref()?.known()?;
        Some((stated.value.lo.base(), stated.value.hi.base()))
    }

    /// As the logarithm of the limit: the range spans decades.
    fn start_limit(&self, j: &Judgement) -> Option<Range> {
        let judged = |d: &Demands| {
            let start = |x: &crate::demand::Demand| {
                x.end == End::StartCeiling && x.standing == Standing::Judges
            };
            d.list.iter().any(start)
        };
        if takes_grease(&self.point) || !self.demands().iter().any(judged) {
            return None;
        }
        let nu = j.at_start?.nu;
        nu.is_finite().then(|| Range {
            from: crate::numeric::math::ln(nu * 1e-3),
            to: crate::numeric::math::ln(nu * 1e3),
        })
    }

    fn sump_rise(&self) -> Option<Range> {
        match &self.point.sump {
            Some(Sump::Held(_) | Sump::Across(_)) => return None,
            Some(Sump::Rise(_) | Sump::Reading { .. }) | None => {}
        }
        let all = self.demands();
        let rises = all.iter().filter_map(|d| {
            let (_, hot) = d.thermal.ambient?;
            Some(d.thermal.hottest?.value.base() - hot.value.base())
        });
        let from = rises.max_by(f64::total_cmp)?;
        (from > 0.0).then_some(Range { from, to: 0.0 })
    }

    fn hottest_ambient(&self) -> Option<Range> {
        let (cold, hot) = self.ambient()?;
        let held = matches!(self.point.sump, Some(Sump::Held(_)));
        (hot > cold && !held).then_some(Range {
            from: hot,
            to: cold,
        })
    }

    /// Running temperature at the hottest and at the coldest ambient, the hottest of all settings.
    fn running(&self) -> Option<(f64, f64)> {
        let all = self.demands();
        let ends = all.iter().filter_map(|d| {
            let cold = d.thermal.coldest?.value.base();
            Some((d.thermal.hottest?.value.base(), cold))
        });
        ends.max_by(|a, b| a.0.total_cmp(&b.0))
    }

    fn cooler(&self) -> Option<Range> {
        let (hot, cold) = self.running()?;
        let to = match self.ambient() {
            Some((least, _)) => cold.min(hot).max(least),
            None => cold.min(hot) - 40.0,
        };
        let to = match self.point.sump {
            Some(Sump::Held(_)) => to.min(hot - 40.0).max(ZERO_CELSIUS),
            _ => to,
        };
        (hot > to).then_some(Range { from: hot, to })
    }

    /// The share lost at the temperature of the governing floor.
    fn shear_loss(&self, j: &Judgement) -> Option<Range> {
        let curves = self.curves();
        if !curves.thickened {
            return None;
        }
        let at =
            ThermodynamicTemperature::from_base(j.at_hot.map_or(celsius(100.0).base(), |a| a.t));
        let severe = crate::demand::is_severe(&self.point);
        let (_, most) = curves.worn_range(severe)?;
        let from = 1.0 - most.nu_at(at).base() / curves.new.nu_at(at).base();
        (from > 0.0).then_some(Range { from, to: 0.0 })
    }

    /// Thicker where hot limits are missed, thinner where cold ones are; neither where both are.
    fn grade(j: &Judgement, target: Target) -> Option<Range> {
        let missed = |side| excess(j, side, target) < 0.0;
        let to = match (missed(Side::Hot), missed(Side::Cold)) {
            (true, false) => MOST_STEPS,
            (false, true) => -MOST_STEPS,
            _ => return None,
        };
        Some(Range { from: 0.0, to })
    }

    fn index(&self) -> Option<Range> {
        let from = self.curves().index().ok()?.base();
        (from < HIGHEST_INDEX).then_some(Range {
            from,
            to: HIGHEST_INDEX,
        })
    }

    /// With one change; `None` where it makes no sense.
    pub(super) fn with(&self, lever: Lever, at: f64) -> Option<Self> {
        let mut next = self.clone();
        next.set(self, lever, at, self.coldest_running(lever))?;
        Some(next)
    }

    /// Lays one change of `base` over this copy of it, in the place of the last of the same lever;
    /// `cold` is [`coldest_running`](Self::coldest_running) of the base. `None` where it makes no
    /// sense.
    pub(super) fn set(
        &mut self,
        base: &Self,
        lever: Lever,
        at: f64,
        cold: Option<f64>,
    ) -> Option<()> {
        let point = &mut self.point;
        match lever {
            Lever::Heater => point.heater = Some(known(at)),
            Lever::ColdestStart => point.start = Some(known(at)),
            Lever::StartLimit => {
                let nu = KinematicViscosity::from_base(crate::numeric::math::exp(at));
                let origin = Origin {
                    whose: Whose::Maker,
                    ..Origin::flag(FLAG)
                };
                let given = Given::new(ViscosityLimit::Kinematic(nu), "", origin);
                point.limits.start = Some(given);
            }
            Lever::SumpRise => {
                let rise: Stated<TemperatureInterval> = known(at);
                point.sump = Some(Sump::Rise(rise));
            }
            Lever::HottestAmbient => self.set_hottest(base, at)?,
            Lever::Cooler => {
                point.sump = Some(match base.point.sump {
                    Some(Sump::Held(_)) => Sump::Held(known(at)),
                    _ => {
                        let ends = between(cold?.min(at), at);
                        Sump::Across(Given::new(ends, "", Origin::flag(FLAG)))
                    }
                });
            }
            Lever::ShearLoss => self.state = Some(base.remade(base.curves().with_loss(at))),
            Lever::Grade => self.state = Some(base.remade(base.curves().thicker_by(at).ok()?)),
            Lever::Index => self.state = Some(base.remade(base.curves().with_index(at)?)),
            Lever::Reserve => self.reserve = at,
        }
        Some(())
    }

    /// Running temperature at the coldest ambient, which a cooler leaves where it is.
    pub(super) fn coldest_running(&self, lever: Lever) -> Option<f64> {
        let held = matches!(self.point.sump, Some(Sump::Held(_)));
        if lever != Lever::Cooler || held {
            return None;
        }
        self.running().map(|(_, cold)| cold)
    }

    fn remade(&self, curves: Curves) -> PreparedOil {
        let oil = &self.scales.site.oils[self.oil];
        PreparedOil::of(oil, curves, self.scales.rules, true)
    }

    /// Another hottest ambient; a sump stated at both ends keeps its line.
    fn set_hottest(&mut self, base: &Self, at: f64) -> Option<()> {
        let (cold, hot) = base.ambient()?;
        if let (Some(Sump::Across(range)), Some(Sump::Across(was))) =
            (&mut self.point.sump, &base.point.sump)
        {
            let (a, b) = (was.value.lo.base(), was.value.hi.base());
            let share = if hot > cold {
                (at - cold) / (hot - cold)
            } else {
                1.0
            };
            range.value.hi = ThermodynamicTemperature::from_base(a + (b - a) * share);
        }
        let given = Given::new(between(cold, at), "", Origin::flag(FLAG));
        self.point.ambient = Some(Stated::Known(given, None));
        Some(())
    }
}

/// What a changed value says of where it comes from.
const FLAG: &str = "mend";

fn known<Q: Measure>(at: f64) -> Stated<Q> {
    let given = Given::new(Q::from_base(at), "", Origin::flag(FLAG));
    Stated::Known(given, None)
}

fn between(lo: f64, hi: f64) -> Between<ThermodynamicTemperature> {
    let of = ThermodynamicTemperature::from_base;
    Between {
        lo: of(lo),
        hi: of(hi),
    }
}
