//! Points and oils made ready once, so that a pair costs a few exponentials.

use super::band::Band;
use super::margin::{Jaw, Ready};
use super::own::{Own, Shift};
use super::tested::{TestedPoint, points};
use super::weigh::At;
use crate::demand::film::FilmDemand;
use crate::demand::journal::HeatCeiling;
use crate::demand::tested::TestedLimit;
use crate::demand::{AtAmbient, Demand, Demands, End, For, Limit, Standing};
use crate::model::Oil;
use crate::model::oil::OilKind;
use crate::model::rulebook::{Confidence, Rulebook};
use crate::oil::cold::Used;
use crate::oil::thinning::End as ShearEnd;
use crate::oil::{Curves, curves, grease_code};
use crate::quantity::{KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::relation::oil::viscosity_temperature::Misfit;

/// A limit ready to be compared.
#[derive(Clone, Debug)]
pub enum ReadyLimit {
    /// A kinematic viscosity at a temperature.
    Jaw(Jaw),
    /// A dynamic viscosity, Pa·s.
    Dynamic(f64),
    /// A film, solved for each oil.
    Film(Box<FilmDemand>),
    /// Kelvins over the pour point.
    Pour {
        /// Least.
        least: f64,
        /// Preferred.
        preferred: f64,
    },
    /// The oil's own ceiling.
    OilsOwn,
    /// A temperature not to be passed, K.
    AtMost(f64),
    /// The low end of a grease's use range.
    UseLow,
    /// A viscosity that a test measures.
    Tested(TestedLimit),
}

/// A demand made ready.
#[derive(Clone, Debug)]
pub struct ReadyDemand {
    /// Its number in the point's list.
    pub number: u16,
    /// Which end.
    pub end: End,
    /// The limit.
    pub limit: ReadyLimit,
    /// Temperature as a function of ambient.
    pub at: AtAmbient,
    /// Temperature at the governing ambient, K.
    pub t: f64,
    /// Whether an unmet one only makes the verdict open.
    pub low_confidence: bool,
    /// Whether it judges at all.
    pub judges: bool,
    /// Whether an unmet one that does not judge becomes a condition.
    pub asks_when_unmet: bool,
    /// Where the limit itself moves with the ambient.
    pub heat: Option<Box<HeatCeiling>>,
    /// What moved it to the temperature of an oil's own losses.
    pub moved: Option<Shift>,
    only: For,
}

impl ReadyDemand {
    /// Whether it applies to an oil.
    pub fn applies_to(&self, oil: &PreparedOil) -> bool {
        match &self.only {
            For::All => true,
            For::With(tag) => oil.declares(tag),
            For::Without(tag) => !oil.declares(tag),
        }
    }
}

/// One setting of a point's unknowns.
#[derive(Clone, Debug)]
pub struct Setting {
    /// The demands that can be worked out.
    pub demands: Vec<ReadyDemand>,
    /// Whether one cannot.
    pub undecided: bool,
    /// Oil temperature at the coldest start, K, and its logarithm.
    pub start: Option<(f64, f64)>,
    /// Whether anything limits viscosity at start that is read from the oil's curve.
    pub has_start_ceiling: bool,
    /// Losses that make each oil run at a temperature of its own.
    pub own: Option<Box<Own>>,
}

/// A point made ready.
#[derive(Clone, Debug)]
pub struct PreparedPoint {
    /// Settings of its unknowns; one where nothing is unknown.
    pub settings: Vec<Setting>,
    /// Whether it shears polymers as gears and rolling bearings do.
    pub severe: bool,
    /// Whether a film is asked for somewhere.
    pub films: bool,
    /// Reserve asked on this site, VG steps.
    pub reserve: f64,
}

impl PreparedPoint {
    /// From the demands in each setting.
    pub fn new(settings: &[Demands], severe: bool, reserve: f64) -> Self {
        let settings: Vec<Setting> = settings.iter().map(setting).collect();
        let film = |d: &ReadyDemand| matches!(d.limit, ReadyLimit::Film(_));
        Self {
            films: settings.iter().any(|s| s.demands.iter().any(film)),
            settings,
            severe,
            reserve,
        }
    }
}

fn setting(demands: &Demands) -> Setting {
    let ready: Vec<ReadyDemand> = demands
        .list
        .iter()
        .enumerate()
        .filter_map(|(n, d)| ready(n, d, demands))
        .collect();
    Setting {
        has_start_ceiling: ready.iter().any(|d| {
            let by_line = !matches!(d.limit, ReadyLimit::Tested(_));
            d.end == End::StartCeiling && d.judges && by_line
        }),
        demands: ready,
        own: None,
        undecided: !demands.undecided.is_empty(),
        start: demands.thermal.start_coldest.map(|k| {
            let t = k.value.base();
            (t, crate::numeric::math::ln(t))
        }),
    }
}

fn ready(number: usize, demand: &Demand, demands: &Demands) -> Option<ReadyDemand> {
    let t = demands.governing_temperature(demand)?;
    let at = ThermodynamicTemperature::from_base(t);
    let limit = match &demand.limit {
        Limit::Kinematic(nu) => ReadyLimit::Jaw(Jaw::new(*nu, at)),
        Limit::Dynamic(eta) => ReadyLimit::Dynamic(eta.base()),
        Limit::Film(film) => ReadyLimit::Film(film.clone()),
        Limit::Pour { least, preferred } => ReadyLimit::Pour {
            least: *least,
            preferred: *preferred,
        },
        Limit::OilsOwn => ReadyLimit::OilsOwn,
        Limit::Temperature(most) => ReadyLimit::AtMost(*most),
        Limit::UseLow => ReadyLimit::UseLow,
        Limit::Tested(limit) => ReadyLimit::Tested(*limit),
    };
    Some(ReadyDemand {
        number: u16::try_from(number).unwrap_or(u16::MAX),
        end: demand.end,
        limit,
        at: demand.at,
        t,
        low_confidence: demand.confidence == Confidence::Low,
        judges: demand.standing == Standing::Judges,
        moved: None,
        heat: demand.heat.clone(),
        asks_when_unmet: !matches!(demand.standing, Standing::Judges | Standing::Information),
        only: demand.only.clone(),
    })
}

/// An oil made ready.
#[derive(Clone, Debug)]
pub struct PreparedOil {
    /// Its curves and data.
    pub curves: Curves,
    /// Thin end of the new oil.
    pub thin: Ready,
    /// Thick end of the new oil.
    pub thick: Ready,
    /// Lowest temperature anything was stated at, K.
    pub lowest: f64,
    /// Lower end of the polymer's window where the oil is known by two finished points, K.
    pub window_end: Option<f64>,
    /// Pour point, K: both ends of its base's range where it is not stated.
    pub pour: Option<(f64, f64)>,
    /// Whether the pour point is stated.
    pub pour_stated: bool,
    /// Continuous limit (tight above) and the one not to be passed, K.
    pub ceiling: Option<(Option<f64>, f64)>,
    /// Use range of a grease, K.
    pub use_range: Option<(f64, f64)>,
    /// Whether it is a grease.
    pub grease: bool,
    /// What it says by the tests that grades are made by.
    pub tested: Vec<TestedPoint>,
    tags: Vec<String>,
    cloud: Option<f64>,
    waxy: bool,
    coldest_measured: Option<f64>,
    variants: Variants,
}

/// The ends of what is not known of an oil's polymer, the worse last.
#[derive(Clone, Debug)]
struct Variants {
    /// In engines and hydraulics.
    mild: Vec<Variant>,
    /// In gears and rolling bearings.
    severe: Vec<Variant>,
    /// Whether they differ by what is lost under the shear of a film alone.
    film_only: bool,
}

/// One end of what is not known of an oil's polymer.
#[derive(Clone, Debug)]
pub struct Variant {
    /// The worn curve floors are judged on; none where nothing is lost for good.
    pub worn: Option<Ready>,
    /// What it loses for the time it is under the shear of a film.
    pub under_shear: ShearEnd,
}

impl PreparedOil {
    /// From an oil. `worn`: whether floors are judged after permanent shear.
    ///
    /// # Errors
    /// Points that make no curve.
    pub fn new(oil: &Oil, rules: &Rulebook, worn: bool) -> Result<Self, Misfit> {
        Ok(Self::of(oil, curves(oil, rules)?, rules, worn))
    }

    /// From an oil whose curves are at hand.
    pub fn of(oil: &Oil, curves: Curves, rules: &Rulebook, worn: bool) -> Self {
        let thin = Ready::of(curves.thin.as_ref().unwrap_or(&curves.new));
        let thick = Ready::of(&curves.ceiling());
        let stock = rules.base_stock(curves.base);
        let measured = curves
            .cold_points
            .iter()
            .filter(|p| p.used != Used::Crosses)
            .map(|p| p.at.base())
            .min_by(f64::total_cmp);
        let variants = Variants {
            mild: variants(&curves, false, worn),
            severe: variants(&curves, true, worn),
            film_only: !worn || curves.loss_range(true).is_none(),
        };
        let stated_pour = oil.pour_point.as_ref().map(|p| p.value.figure().base());
        let pour = stated_pour
            .map(|p| (p, p))
            .or_else(|| stock.map(|s| (s.pour.lo.base(), s.pour.hi.base())));
        let ceiling = match &oil.oil_limit {
            Some(limit) => Some((None, limit.value.base())),
            None => stock.map(|s| (Some(s.continuous.base()), s.peak.base())),
        };
        Self {
            lowest: curves.lowest.base().min(measured.unwrap_or(f64::INFINITY)),
            window_end: curves.window_end.map(Measure::base),
            pour,
            pour_stated: stated_pour.is_some(),
            ceiling,
            use_range: grease_code::use_range(oil, rules).map(|(lo, hi)| (lo.base(), hi.base())),
            grease: oil.kind == OilKind::Grease,
            tested: points(oil),
            tags: tags(oil),
            cloud: oil.cloud_point.as_ref().map(|c| c.value.figure().base()),
            waxy: stock.is_some_and(|s| s.wax_bearing),
            coldest_measured: measured,
            variants,
            thin,
            thick,
            curves,
        }
    }

    /// The ends of what is not known of its polymer, the worse last: permanent loss, and
    /// temporary loss where the point asks for a film.
    pub fn variants(&self, point: &PreparedPoint) -> &[Variant] {
        let all = self.all(point);
        if self.variants.film_only && !point.films {
            &all[all.len() - 1..]
        } else {
            all
        }
    }

    /// The worst of them.
    pub fn worst(&self, point: &PreparedPoint) -> &Variant {
        let all = self.all(point);
        &all[all.len() - 1]
    }

    fn all(&self, point: &PreparedPoint) -> &[Variant] {
        if point.severe {
            &self.variants.severe
        } else {
            &self.variants.mild
        }
    }

    /// Reserve asked, VG steps: half where the tolerance is judged already or points are measured.
    pub fn reserve(&self, site: f64) -> f64 {
        if self.curves.half_reserve {
            0.5 * site
        } else {
            site
        }
    }

    /// Whether the oil declares an additive or a class.
    pub fn declares(&self, tag: &str) -> bool {
        self.tags.iter().any(|t| t.eq_ignore_ascii_case(tag))
    }

    /// Start below the polymer's window of an oil known by two finished points alone: its line
    /// says little there, and nobody measured it there.
    pub fn window_doubt(&self, start: f64) -> bool {
        let measured = self.coldest_measured.is_some_and(|m| m <= start + 1e-9);
        !measured && self.window_end.is_some_and(|end| start < end - 1e-9)
    }

    /// Start so close to the pour point, or below the cloud point, that a waxy oil's line says
    /// nothing and nobody measured it there.
    pub fn wax_doubt(&self, start: f64) -> bool {
        if !self.waxy || self.coldest_measured.is_some_and(|m| m <= start + 1e-9) {
            return false;
        }
        let near_pour = self.pour.is_some_and(|(_, hi)| start <= hi + 10.0 + 1e-9);
        near_pour || self.cloud.is_some_and(|c| start < c - 1e-9)
    }
}

fn tags(oil: &Oil) -> Vec<String> {
    use crate::model::word::Word;
    let additives = oil
        .facts
        .additives
        .iter()
        .flatten()
        .map(|a| a.word().to_owned());
    oil.facts.classes.iter().cloned().chain(additives).collect()
}

/// Least and greatest of what may be lost go together: what is wanted are the ends.
fn variants(curves: &Curves, severe: bool, worn: bool) -> Vec<Variant> {
    let curve = |loss: f64| {
        let curve = worn.then(|| curves.worn_after(loss)).flatten();
        curve.map(|c| Ready::of(&c))
    };
    let range = worn.then(|| curves.loss_range(severe)).flatten();
    let (least, most) = range.unwrap_or((0.0, 0.0));
    let end = |loss: f64, under_shear| Variant {
        worn: curve(loss),
        under_shear,
    };
    if range.is_none() && curves.thinning.is_none() {
        return vec![end(0.0, ShearEnd::MostLost)];
    }
    vec![
        end(least, ShearEnd::LeastLost),
        end(most, ShearEnd::MostLost),
    ]
}

/// Margin, band and viscosity at a film demand: the limit is solved for this oil. `None` where
/// its pressure-viscosity coefficient is not known.
pub fn film_margin(
    demand: &ReadyDemand,
    film: &FilmDemand,
    oil: &PreparedOil,
    variant: &Variant,
) -> Option<(f64, Band, At)> {
    let met = |t: f64, curve: &Ready| {
        let at = ThermodynamicTemperature::from_base(t);
        film.meet(&oil.curves, curve.at(t).line, at, variant.under_shear)
    };
    let margin_at = |t: f64, curve: &Ready| -> Option<(f64, f64)> {
        let need = film.viscosity_needed(met(t, curve))?;
        let jaw = Jaw::new(need, ThermodynamicTemperature::from_base(t));
        Some((curve.at(t).above(&jaw).0, curve.nu(t)))
    };
    let mut best: Option<(f64, Band, At)> = None;
    for curve in std::iter::once(&oil.thin).chain(variant.worn.as_ref()) {
        let (value, nu) = margin_at(demand.t, curve)?;
        // where the oil's own film reaches the wanted one, no viscosity need be solved for
        let band = Band::by_root(true, |ambient| {
            let t = demand.at.at(ambient);
            let nu = KinematicViscosity::from_base(curve.nu(t));
            film.excess_of(met(t, curve), nu).unwrap_or(-1.0)
        });
        best = Some(match best {
            Some((v, b, at)) if v <= value => (v, b.and(band), at),
            Some((_, b, _)) => (value, b.and(band), At { nu, t: demand.t }),
            None => (value, band, At { nu, t: demand.t }),
        });
    }
    best
}
