//! One bottle judged: whose oil, how far changed, whether it serves, and why.

mod sample;

pub use sample::{Clean, Judged, Label};

use super::bottle::Bottle;
use super::causes::{Around, Causes, Diagnosis, Setting};
use super::limits::{Level, Limits, usual_place};
use super::profile::{From, Profile};
use super::readings::Change;
use super::scatter::Scatter;
use super::serves::{self, Serves};
use super::whose::Whose;
use super::{Unsampled, readings, whose};
use crate::judge::PreparedPoint;
use crate::model::facts::{PointFacts, SumpNow};
use crate::model::oil::OilKind;
use crate::model::rulebook::used_oil::Reading as On;
use crate::model::word::Word;
use crate::model::{Oil, Point};
use crate::oil::worn::PLAUSIBLE_LOSS_MILD;
use crate::problem::{Code as ProblemCode, Problem, Write};
use crate::quantity::Measure;
use crate::source::Place;
use crate::weighing::{Condition, Scales, Weighed, facts, oil_in_use};
use jiff::civil::Date;
use std::collections::BTreeMap;
use std::sync::{Arc, PoisonError, RwLock};

/// Everything about a point and a label that its bottles share.
struct Pair<'a> {
    weighed: Option<Weighed<'a>>,
    ready: Option<PreparedPoint>,
    limits: Limits,
    allowed: f64,
    barred: Vec<Condition>,
    frame: Oil,
    setting: Setting,
    yellow_metal: Option<bool>,
    water_entry: Option<&'static str>,
}

/// Pairs by the places of point and labelled oil.
type Pairs<'a> = BTreeMap<(Option<usize>, Option<usize>), Arc<Pair<'a>>>;

/// Judges bottles.
pub struct Auditor<'s, 'a> {
    /// Oils and rules made ready.
    pub scales: &'s Scales<'a>,
    bottles: &'s [Bottle],
    profiles: Vec<Profile>,
    causes: Causes,
    on: Date,
    pairs: RwLock<Pairs<'a>>,
    oils: BTreeMap<String, usize>,
}

impl<'s, 'a> Auditor<'s, 'a> {
    /// Makes ready what all bottles share; new-oil bottles become the baselines of their oils.
    pub fn new(scales: &'s Scales<'a>, bottles: &'s [Bottle], new_oil: &[usize], on: Date) -> Self {
        let site = scales.site;
        let scatter = Scatter::new(scales.rules);
        let oils: BTreeMap<String, usize> = site
            .oils
            .iter()
            .enumerate()
            .map(|(i, o)| (o.id.to_lowercase(), i))
            .collect();
        let mut profiles: Vec<Profile> = site
            .oils
            .iter()
            .enumerate()
            .map(|(i, oil)| {
                let (ready, facts) = (&scales.oils[i], &scales.facts[i]);
                Profile::of(oil, ready, facts, scales.rules, &scales.suitability)
            })
            .collect();
        let mut fresh: Vec<&Bottle> = new_oil.iter().map(|i| &bottles[*i]).collect();
        fresh.sort_by_key(|b| (b.drawn, b.place.row));
        for bottle in fresh {
            let label = bottle
                .label
                .as_deref()
                .and_then(|l| find_oil(&oils, site, l));
            if let Some(oil) = label {
                let from = From::NewOil(bottle.place.row);
                profiles[oil] = profiles[oil].clone().with(&bottle.figures, from, &scatter);
            }
        }
        let named: Vec<(String, Profile, bool)> = site
            .oils
            .iter()
            .zip(&profiles)
            .map(|(o, p)| (o.id.clone(), p.clone(), o.kind == OilKind::Grease))
            .collect();
        Self {
            scales,
            bottles,
            causes: Causes::new(&named, scatter, scales.rules),
            profiles,
            on,
            pairs: RwLock::new(BTreeMap::new()),
            oils,
        }
    }

    /// The profile of an oil of the list.
    pub fn profile(&self, oil: usize) -> &Profile {
        &self.profiles[oil]
    }

    /// How far figures may be off.
    pub fn scatter(&self) -> &Scatter {
        self.causes.scatter()
    }

    fn label(&self, bottle: &Bottle, point: Option<&Point>) -> Label {
        let holds = point
            .and_then(oil_in_use)
            .and_then(|id| find_oil(&self.oils, self.scales.site, id));
        match &bottle.label {
            Some(written) => {
                let oil = find_oil(&self.oils, self.scales.site, written);
                Label {
                    written: Some(written.clone()),
                    oil,
                    from_machine: false,
                    machine_holds: holds.filter(|h| oil.is_some_and(|o| o != *h)),
                }
            }
            None => Label {
                written: None,
                oil: holds,
                from_machine: holds.is_some(),
                machine_holds: None,
            },
        }
    }

    /// Judges one bottle.
    pub fn judge(&self, bottle: usize, point: Option<usize>) -> Judged {
        let b = &self.bottles[bottle];
        let site = self.scales.site;
        let at = point.map(|p| &site.points[p]);
        let label = self.label(b, at);
        let pair = self.pair(point, label.oil);
        let profile = label.oil.map(|oil| {
            if b.new.is_empty() {
                std::borrow::Cow::Borrowed(&self.profiles[oil])
            } else {
                let beside =
                    self.profiles[oil]
                        .clone()
                        .with(&b.new, From::Beside, self.causes.scatter());
                std::borrow::Cow::Owned(beside)
            }
        });
        let profile = profile.as_deref();
        let change = profile.map_or_else(Change::default, |p| Change::of(&b.figures, p));
        let (moved, mut against) = match profile {
            Some(_) => readings::viscosity(&change, &pair.limits),
            None => (None, Vec::new()),
        };
        against.extend(readings::others(&b.figures, profile, &pair.limits));
        let clean = clean(b, &pair.limits);
        let around = self.around(&pair, label.oil, clean.as_ref());
        let own = profile.is_some_and(|p| p.viscosity_from == From::Beside);
        let weighed_with = label.oil.zip(profile).map(|(oil, p)| (oil, p, own));
        let diagnosis = if b.shifted {
            Diagnosis::default()
        } else {
            self.causes
                .weigh(&b.figures, weighed_with, pair.setting, &around)
        };
        let (whose, why_not_known) = match (profile, &label) {
            _ if b.shifted => (Whose::NotKnown, Some("the row was not read".to_owned())),
            (Some(_), _) => whose::of(&diagnosis, moved),
            (
                None,
                Label {
                    written: Some(w), ..
                },
            ) => (
                Whose::NotKnown,
                Some(format!("the label \"{w}\" is not in the oil list")),
            ),
            (None, _) => (
                Whose::NotKnown,
                Some("nobody knows the oil in use".to_owned()),
            ),
        };
        let age_days = b
            .drawn
            .and_then(|d| d.until(self.on).ok())
            .map(|s| s.get_days());
        let oldest = site.house.sample_age.value.base() / 86_400.0;
        Judged {
            bottle,
            point,
            serves: self.serves(b, &pair, label.oil),
            baseline: profile.map(|p| p.viscosity_from),
            label,
            change,
            against,
            clean,
            whose,
            why_not_known,
            barred: pair.barred.clone(),
            diagnosis,
            too_old: age_days.is_some_and(|d| f64::from(d) > oldest.round()),
            age_days,
            twice: false,
            latest: false,
        }
    }

    fn around(
        &self,
        pair: &Pair<'_>,
        oil: Option<usize>,
        clean: Option<&Clean>,
    ) -> Around<'static> {
        let watch = |on: On| pair.limits.high(on).and_then(|l| l.watch.or(l.act));
        Around {
            water_watch: watch(On::Water).or(Some(GENERAL_WATER_PPM)),
            soot_watch: pair.setting.engine.then(|| watch(On::Soot)).flatten(),
            acid_watch: watch(On::AcidNumberRise),
            yellow_metal: pair.yellow_metal,
            sulphur: oil.and_then(|o| self.scales.facts[o].sulphur),
            codes_over: clean.and_then(|c| c.over),
            water_entry: pair.water_entry,
        }
    }

    fn serves(&self, b: &Bottle, pair: &Pair<'_>, oil: Option<usize>) -> Option<Serves> {
        let (weighed, ready) = (pair.weighed.as_ref()?, pair.ready.as_ref()?);
        if b.shifted {
            return None;
        }
        let curves = oil.map(|o| &self.scales.oils[o].curves);
        let (line, slope) = serves::line(&b.figures, curves)?;
        let by = serves::Against {
            demands: &weighed.demands,
            ready,
            allowed: pair.allowed,
            rules: self.scales.rules,
            units: self.scales.units,
        };
        serves::judge(&pair.frame, line, slope, &b.name(), &by)
    }

    /// What the bottles of a point and a label share.
    fn pair(&self, point: Option<usize>, oil: Option<usize>) -> Arc<Pair<'a>> {
        let known = self.pairs.read().unwrap_or_else(PoisonError::into_inner);
        if let Some(pair) = known.get(&(point, oil)) {
            return pair.clone();
        }
        drop(known);
        let pair = Arc::new(self.make_pair(point, oil));
        let mut known = self.pairs.write().unwrap_or_else(PoisonError::into_inner);
        known.entry((point, oil)).or_insert(pair).clone()
    }

    fn make_pair(&self, point: Option<usize>, oil: Option<usize>) -> Pair<'a> {
        let (scales, site) = (self.scales, self.scales.site);
        let at: Option<&'a Point> = point.map(|p| &site.points[p]);
        let weighed = at.map(|p| scales.weigh_where(p, |i| Some(i) == oil));
        let place = match (&weighed, oil) {
            (Some(w), _) => facts::of_point(w.point, &w.demands, SumpNow::Unknown),
            (None, Some(oil)) => PointFacts {
                serves: usual_place(site.oils[oil].kind).into_iter().collect(),
                ..PointFacts::default()
            },
            (None, None) => PointFacts::default(),
        };
        let card = scales.suitability.point(&place);
        let oil_card = oil.map(|o| scales.suitability.oil(&scales.facts[o]));
        let limits = Limits::of(
            scales.rules,
            &scales.suitability,
            &card,
            oil_card.as_ref(),
            at,
        );
        let low = limits
            .low(On::ViscosityChange40)
            .or(limits.low(On::ViscosityChange100));
        let allowed = low
            .and_then(|l| l.act)
            .unwrap_or(PLAUSIBLE_LOSS_MILD)
            .min(0.5);
        let barred = weighed.as_ref().map_or(Vec::new(), |w| {
            w.barred.iter().flat_map(|b| b.by.iter().cloned()).collect()
        });
        let label = oil.map(|o| &site.oils[o]);
        Pair {
            ready: weighed.as_ref().map(|w| serves::in_use(&w.ready, allowed)),
            barred,
            limits,
            allowed,
            frame: serves::frame(label),
            setting: setting(at, label),
            yellow_metal: place.yellow_metal,
            water_entry: at.and(place.water_entry).map(Word::word),
            weighed,
        }
    }

    /// An oil in use without a sample; none for grease points and empty machines.
    pub fn unsampled(&self, point: usize) -> Option<Unsampled> {
        let at = &self.scales.site.points[point];
        if crate::demand::takes_grease(at) || at.oil_now == crate::model::OilNow::Nothing {
            return None;
        }
        let oil = oil_in_use(at).and_then(|id| find_oil(&self.oils, self.scales.site, id));
        let pair = self.pair(Some(point), oil);
        let candidate = pair.weighed.as_ref().and_then(|w| w.candidates.first());
        Some(Unsampled {
            point,
            oil,
            verdict: candidate.map(|c| c.judgement.verdict),
            barred: pair.barred.clone(),
            because: candidate.map_or(Vec::new(), |c| c.because.clone()),
        })
    }

    /// The demands of a point with a label, for the worked example of the sheet.
    pub fn limits_of(&self, point: Option<usize>, oil: Option<usize>) -> Limits {
        self.pair(point, oil).limits.clone()
    }
}

/// Water from which it counts where no limit of a class applies, ppm (common practice).
const GENERAL_WATER_PPM: f64 = 500.0;

/// An oil by its id, whatever the case.
fn find_oil(
    oils: &BTreeMap<String, usize>,
    site: &crate::model::Site,
    written: &str,
) -> Option<usize> {
    let written = written.trim();
    oils.get(&written.to_lowercase()).copied().or_else(|| {
        let named = |o: &Oil| {
            o.name
                .as_deref()
                .is_some_and(|n| n.trim().eq_ignore_ascii_case(written))
        };
        site.oils.iter().position(named)
    })
}

/// What of the machine and the oil makes a cause more or less to be expected.
fn setting(point: Option<&Point>, oil: Option<&Oil>) -> Setting {
    use crate::model::PartKind;
    let is =
        |f: &dyn Fn(&PartKind) -> bool| point.is_some_and(|p| p.parts.iter().any(|x| f(&x.kind)));
    let component =
        |name: &str| is(&|k| matches!(k, PartKind::Component(c) if c.id.contains(name)));
    Setting {
        engine: is(&|k| matches!(k, PartKind::Engine(_)))
            || component("engine")
            || oil.is_some_and(|o| o.kind == OilKind::Engine),
        gas: component("refrig") || component("gas"),
        heated: point.is_some_and(|p| p.heater.is_some() || p.heater_power.is_some()),
    }
}

fn clean(bottle: &Bottle, limits: &Limits) -> Option<Clean> {
    let (code, from_counts) = bottle.cleanliness?;
    let over = limits
        .cleanliness
        .as_ref()
        .and_then(|(target, ..)| code.over(*target));
    let level = match over {
        Some(over) if over >= ACT_CODES => Level::Act,
        Some(over) if over > 0 => Level::Watch,
        _ => Level::Fine,
    };
    Some(Clean {
        code,
        from_counts,
        target: limits.cleanliness.clone(),
        over,
        level,
    })
}

/// Codes over the target from which it is acted on: eight times the particles (judgement of
/// practice; a code more doubles them).
const ACT_CODES: i16 = 3;

/// Labels that are no oil of the list, each told once.
pub(super) fn tell_labels(judged: &[Judged], bottles: &[Bottle], problems: &mut Vec<Problem>) {
    let mut seen = std::collections::BTreeSet::new();
    for j in judged {
        let (Some(written), None) = (&j.label.written, j.label.oil) else {
            continue;
        };
        if !seen.insert(written.to_lowercase()) {
            continue;
        }
        let b = &bottles[j.bottle];
        let problem = Problem::new(
            ProblemCode::LabelUnknown,
            format!("the oil \"{written}\" on the label is not in the oil list"),
            Place::Cell(b.place.clone()),
        )
        .within(format!("row {}, {}", b.place.row, b.machine))
        .so("its samples are compared with no new oil")
        .write(Write::words(
            "the id of the oil as in oils.yaml, or a record of it there",
        ));
        problems.push(problem);
    }
}
