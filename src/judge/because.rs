//! One sentence for each reason behind a verdict: limit, amount, end.

use super::margin::Ready;
use super::prepared::{PreparedOil, PreparedPoint, ReadyDemand, ReadyLimit, Setting};
use super::verdict::Verdict;
use super::weigh::{Judgement, Margin};
use crate::demand::tested::{GradeTest, TestedLimit};
use crate::demand::{Demand, End, PointDemands};
use crate::quantity::convert::{celsius, dynamic};
use crate::quantity::show::{Toward, Units, margin, quantity};
use crate::quantity::{Amount, Kind, KinematicViscosity, Measure, ThermodynamicTemperature};

/// Why a verdict is what it is, the main reason first.
pub fn because(
    point: &PointDemands,
    ready: &PreparedPoint,
    oil: &PreparedOil,
    j: &Judgement,
    units: Units,
) -> Vec<String> {
    let teller = Teller {
        point,
        settings: &ready.settings,
        ready,
        oil,
        units,
    };
    match j.verdict {
        Verdict::Holds => vec![holds(j)],
        Verdict::Tight => teller.tight(j),
        Verdict::Open => teller.open(j),
        Verdict::Fails => teller.fails(j),
    }
}

fn holds(j: &Judgement) -> String {
    match (j.hot, j.cold) {
        (Some(_), Some(_)) => "every limit met at both ends, reserve kept".to_owned(),
        (Some(_), None) => "every limit met hot, reserve kept; nothing limits it cold".to_owned(),
        (None, Some(_)) => "every limit met cold, reserve kept; nothing limits it hot".to_owned(),
        (None, None) => "no viscosity limit applies".to_owned(),
    }
}

struct Teller<'a> {
    point: &'a PointDemands,
    settings: &'a [Setting],
    ready: &'a PreparedPoint,
    oil: &'a PreparedOil,
    units: Units,
}

impl Teller<'_> {
    fn demand(&self, m: Margin) -> &Demand {
        &self.point.settings[usize::from(m.setting)].list[usize::from(m.demand)]
    }

    fn temperature(&self, t: f64) -> String {
        quantity(
            ThermodynamicTemperature::from_base(t).amount(),
            self.units,
            Toward::Nearest,
        )
    }

    fn tight(&self, j: &Judgement) -> Vec<String> {
        let mut reasons = Vec::new();
        for (m, word) in [(j.hot, "hot"), (j.cold, "cold")] {
            let Some(m) = m.filter(|m| m.value < j.reserve) else {
                continue;
            };
            reasons.push(format!(
                "{word} margin {} step, {} asked: {}",
                margin(m.value, 2),
                j.reserve,
                self.demand(m).says
            ));
        }
        self.caps(j, &mut reasons);
        reasons
    }

    /// What keeps an oil from more than tight beside its margins.
    fn caps(&self, j: &Judgement, reasons: &mut Vec<String>) {
        let d = j.doubts;
        if d.far_below {
            let t = self.temperature(self.oil.lowest);
            reasons.push(format!(
                "the start lies more than 60 K below {t}, the lowest point stated: tight at best"
            ));
        }
        if d.window {
            reasons.push(
                "polymer-thickened and known by two points only: below its window, tight at best"
                    .to_owned(),
            );
        }
        if d.pour_close {
            reasons.push("the pour margin is met, the preferred one is not".to_owned());
        }
        if d.above_continuous {
            reasons.push("hotter than the base stock likes for a long life".to_owned());
        }
    }

    fn fails(&self, j: &Judgement) -> Vec<String> {
        let mut reasons: Vec<(f64, String)> = Vec::new();
        for number in j.unmet.iter() {
            if let Some((size, says)) = self.unmet(number) {
                reasons.push((size, says));
            }
        }
        reasons.sort_by(|a, b| b.0.total_cmp(&a.0).then_with(|| a.1.cmp(&b.1)));
        reasons.into_iter().map(|r| r.1).collect()
    }

    /// The worst case of one unmet demand: how far off, and the sentence.
    fn unmet(&self, number: u16) -> Option<(f64, String)> {
        let mut worst: Option<(f64, String)> = None;
        for (setting, demands) in self.settings.iter().zip(&self.point.settings) {
            let Some(ready) = setting.demands.iter().find(|d| d.number == number) else {
                continue;
            };
            let demand = &demands.list[usize::from(number)];
            let (size, says) = match &ready.limit {
                ReadyLimit::Pour { least, .. } => {
                    let (_, hi) = self.oil.pour?;
                    let short = hi + least - ready.t;
                    let (pour, start) = (self.temperature(hi), self.temperature(ready.t));
                    (
                        short,
                        format!(
                            "pour point {pour}, start {start}: {short:.0} K short of the {least:.0} K margin"
                        ),
                    )
                }
                ReadyLimit::OilsOwn => {
                    let (_, most) = self.oil.ceiling?;
                    let (t, most) = (self.temperature(ready.t), self.temperature(most));
                    (
                        0.0,
                        format!("runs at {t}, hotter than the {most} limit of the oil"),
                    )
                }
                ReadyLimit::AtMost(most) => {
                    let (t, most) = (self.temperature(ready.t), self.temperature(*most));
                    (
                        0.0,
                        format!("runs at {t}, hotter than the {most} stated for it"),
                    )
                }
                ReadyLimit::UseLow => {
                    let low = self.temperature(self.oil.use_range?.0);
                    (
                        0.0,
                        format!("colder than the {low} its thickener is good for"),
                    )
                }
                ReadyLimit::Tested(limit) => self.tested(*limit, ready, demand),
                limit => self.viscosity(limit, ready.end, ready.t, demand)?,
            };
            if worst.as_ref().is_none_or(|(s, _)| size > *s) {
                worst = Some((size, says));
            }
        }
        worst
    }

    /// A viscosity by a test, in the unit of the test.
    fn tested(&self, limit: TestedLimit, ready: &ReadyDemand, demand: &Demand) -> (f64, String) {
        let worst = self.oil.worst(self.ready);
        let found = super::tested::measure(ready, limit, self.oil, worst);
        let at = ThermodynamicTemperature::from_base(ready.t);
        let eta = dynamic(found.nu, self.oil.curves.density.at(at));
        let hot = limit.test == GradeTest::HighShear;
        let (less, own, need) = if hot {
            ("at least", Toward::Down, Toward::Up)
        } else {
            ("at most", Toward::Up, Toward::Down)
        };
        let text = format!(
            "{} at {}: {}, {less} {} ({})",
            limit.test.fault(),
            self.temperature(ready.t),
            quantity(eta.amount(), self.units, own),
            quantity(limit.eta.amount(), self.units, need),
            demand.says
        );
        let ratio = eta.base() / limit.eta.base();
        (if hot { 1.0 / ratio } else { ratio }, text)
    }

    fn viscosity(
        &self,
        limit: &ReadyLimit,
        end: End,
        t: f64,
        demand: &Demand,
    ) -> Option<(f64, String)> {
        let at = ThermodynamicTemperature::from_base(t);
        let need = match limit {
            ReadyLimit::Jaw(jaw) => jaw.nu,
            ReadyLimit::Dynamic(eta) => eta / self.oil.curves.density.at(at).base(),
            ReadyLimit::Film(film) => {
                let worst = self.oil.worst(self.ready);
                let curve = worst.worn.as_ref().unwrap_or(&self.oil.thin);
                let met = film.meet(&self.oil.curves, curve.at(t).line, at, worst.under_shear);
                film.viscosity_needed(met)?.base()
            }
            _ => return None,
        };
        let floor = matches!(end, End::HotFloor | End::MakerGrade);
        let worn = self.worst_worn();
        let nu = if floor {
            worn.map_or(f64::INFINITY, |w| w.nu(t))
                .min(self.oil.thin.nu(t))
        } else {
            self.oil.thick.nu(t)
        };
        let sheared = floor && nu < self.oil.thin.nu(t);
        let shown = |nu: f64, toward| {
            quantity(
                Amount {
                    kind: Kind::KinematicViscosity,
                    base: KinematicViscosity::from_base(nu).base(),
                },
                self.units,
                toward,
            )
        };
        let there = if (t - celsius(40.0).base()).abs() < 1e-9 && end == End::MakerGrade {
            "at 40 degC".to_owned()
        } else {
            format!("at {}", self.temperature(t))
        };
        let state = if sheared { ", after shear" } else { "" };
        let taken = self.taken(limit, t, nu);
        let text = if floor {
            format!(
                "too thin {there}{state}: {}, at least {}{taken} ({})",
                shown(nu, Toward::Down),
                shown(need, Toward::Up),
                demand.says
            )
        } else {
            format!(
                "too thick {there}: {}, at most {} ({})",
                shown(nu, Toward::Up),
                shown(need, Toward::Down),
                demand.says
            )
        };
        let size = if floor { need / nu } else { nu / need };
        Some((size, text))
    }

    /// What the shear of a film takes for a while, in words; nothing for other limits.
    fn taken(&self, limit: &ReadyLimit, t: f64, nu: f64) -> String {
        let ReadyLimit::Film(film) = limit else {
            return String::new();
        };
        let at = ThermodynamicTemperature::from_base(t);
        let nu = KinematicViscosity::from_base(nu);
        let end = self.oil.worst(self.ready).under_shear;
        film.thinned(&self.oil.curves, nu, at, end)
            .map_or_else(String::new, |kept| {
                let lost = 100.0 * (1.0 - kept.viscosity.base());
                format!(" at rest, of which the contact takes {lost:.0} % for a while")
            })
    }

    fn worst_worn(&self) -> Option<&Ready> {
        self.oil.worst(self.ready).worn.as_ref()
    }

    fn open(&self, j: &Judgement) -> Vec<String> {
        let d = j.doubts;
        let mut reasons = Vec::new();
        if j.failing_settings.0 > 0 {
            reasons.extend(
                self.fails(j)
                    .into_iter()
                    .map(|r| format!("at one end of what is not known: {r}")),
            );
        }
        if d.undecided {
            for (setting, _) in self.point.settings.iter().zip(self.settings) {
                for u in &setting.undecided {
                    let part = u.part.as_ref().map_or(String::new(), |p| format!("{p}: "));
                    let says = format!("{part}{}", u.because);
                    if !reasons.contains(&says) {
                        reasons.push(says);
                    }
                }
            }
        }
        if d.low_confidence {
            for number in j.asked.iter() {
                if let Some((_, says)) = self.unmet(number) {
                    reasons.push(format!(
                        "not met, and the rule is of low confidence: {says}"
                    ));
                }
            }
        }
        if d.wax {
            reasons.push(
                "start within 10 K of the pour point, or below the cloud point, of a waxy oil: \
                 the line says nothing there and no measured cold viscosity is given"
                    .to_owned(),
            );
        }
        if d.pour_unknown {
            reasons.push("the pour point is not stated and would decide".to_owned());
        }
        if d.untested {
            reasons.extend(self.untested());
        }
        if d.alpha_unknown {
            reasons.push(
                "a film is asked for and the pressure-viscosity coefficient of this oil is not known"
                    .to_owned(),
            );
        }
        reasons
    }

    /// What must be asked for where only a test decides.
    fn untested(&self) -> Vec<String> {
        let worst = self.oil.worst(self.ready);
        let mut reasons = Vec::new();
        for ready in &self.ready.settings {
            for demand in &ready.demands {
                let ReadyLimit::Tested(limit) = &demand.limit else {
                    continue;
                };
                if super::tested::measure(demand, *limit, self.oil, worst).unknown {
                    let says = format!(
                        "{} is not stated, and the line of a polymer-thickened oil says nothing \
                         of it: ask the supplier",
                        limit.test.ask()
                    );
                    if !reasons.contains(&says) {
                        reasons.push(says);
                    }
                }
            }
        }
        reasons
    }
}
