//! Temperatures at which an oil reaches the limits of a cold start, and its low-temperature
//! designation.

use super::cold::{ColdTest, Used};
use super::curve::Curve;
use super::curves::Curves;
use crate::model::oil::{Oil, OilKind};
use crate::model::rulebook::Rulebook;
use crate::model::stated::ViscosityLimit;
use crate::quantity::convert::celsius;
use crate::quantity::{DynamicViscosity, Measure, Ratio, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::d6080;
use crate::relation::oil::sae_engine::Measured;
use crate::relation::oil::sae_gear::J306;
use crate::relation::oil::start_limit::{Density, temperature_at_dynamic};
use crate::relation::oil::viscosity_index;
use crate::relation::oil::viscosity_temperature::{Misfit, ViscosityCurve};

/// How a temperature on a curve stands to what is known of the oil.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Standing {
    /// A point stated there.
    Stated,
    /// Measured cold, or between points measured cold and stated ones.
    Measured,
    /// Between stated points.
    Between,
    /// Carried on below the lowest point known, by so many kelvins.
    Below(f64),
    /// Carried on above the highest point, by so many kelvins.
    Above(f64),
}

impl Curves {
    /// Coldest temperature anything was measured at, points stated included.
    pub fn coldest_known(&self) -> ThermodynamicTemperature {
        let used = self.cold_points.iter().filter(|p| p.used == Used::Yes);
        let coldest = used.map(|p| p.at.base()).fold(self.lowest.base(), f64::min);
        ThermodynamicTemperature::from_base(coldest)
    }

    /// How a temperature stands to what is known; `stated` are the temperatures of the points.
    pub fn standing(
        &self,
        at: ThermodynamicTemperature,
        stated: &[ThermodynamicTemperature],
    ) -> Standing {
        let near = |t: f64| (t - at.base()).abs() < 1e-6;
        if stated.iter().any(|t| near(t.base())) {
            return Standing::Stated;
        }
        let coldest = self.coldest_known().base();
        if at.base() > self.highest.base() {
            return Standing::Above(at.base() - self.highest.base());
        }
        if at.base() >= self.lowest.base() {
            return Standing::Between;
        }
        if at.base() >= coldest - 1e-6 {
            return Standing::Measured;
        }
        Standing::Below(coldest - at.base())
    }
}

/// A limit of a cold start and the temperature at which the oil reaches it.
#[derive(Clone, Debug, PartialEq)]
pub struct StartAt {
    /// What has the limit.
    pub part: String,
    /// The limit.
    pub limit: ViscosityLimit,
    /// Temperature at which the new oil has that viscosity.
    pub at: ThermodynamicTemperature,
    /// How that temperature stands to what is known.
    pub standing: Standing,
    /// Id of the rule.
    pub rule: String,
    /// Its sources.
    pub source: String,
}

/// Temperature at which a curve has a limit.
///
/// # Errors
/// [`Misfit::OutOfRange`] where it never does.
pub fn reaches(
    curves: &Curves,
    curve: &Curve,
    limit: ViscosityLimit,
) -> Result<ThermodynamicTemperature, Misfit> {
    match limit {
        ViscosityLimit::Kinematic(nu) => curve.temperature_at(nu),
        ViscosityLimit::Dynamic(eta) => temperature_at_dynamic(
            curve,
            Density {
                rho15: curves.density.at15,
                law: curves.density.law,
            },
            eta,
        ),
    }
}

/// Where the new oil reaches each start limit of the rules, warmest first; limits in mPa·s are
/// those of engines and count for their oils.
pub fn start_temperatures(oil: &Oil, curves: &Curves, rules: &Rulebook) -> Vec<StartAt> {
    let engine = oil.kind == OilKind::Engine;
    let mut found: Vec<StartAt> = rules
        .start_limits
        .iter()
        .filter_map(|rule| {
            let limit = rule.limit?;
            if matches!(limit, ViscosityLimit::Dynamic(_)) && !engine {
                return None;
            }
            let at = reaches(curves, curves.best_new(), limit).ok()?;
            Some(StartAt {
                part: rule.part.clone(),
                limit,
                at,
                standing: curves.standing(at, &[]),
                rule: rule.id.clone(),
                source: rule.provenance.cited(),
            })
        })
        .collect();
    if matches!(oil.kind, OilKind::Axle | OilKind::Gear) {
        found.extend(axle(curves));
    }
    found.sort_by(|a, b| {
        b.at.base()
            .total_cmp(&a.at.base())
            .then(a.rule.cmp(&b.rule))
    });
    found
}

/// Where axle pinion bearings starve.
fn axle(curves: &Curves) -> Option<StartAt> {
    let limit = ViscosityLimit::Dynamic(DynamicViscosity::from_base(150.0));
    let at = reaches(curves, curves.best_new(), limit).ok()?;
    Some(StartAt {
        part: "axle pinion bearing, where it starves".to_owned(),
        limit,
        at,
        standing: curves.standing(at, &[]),
        rule: "sae-j306".to_owned(),
        source: J306.source.to_owned(),
    })
}

/// The low-temperature designation of a hydraulic fluid.
#[derive(Clone, Debug, PartialEq)]
pub struct ColdDesignation {
    /// Temperature of 750 mPa·s.
    pub t750: ThermodynamicTemperature,
    /// Whether it lies between measured points, as the practice wants, or is read off the curve.
    pub measured: bool,
    /// Low-temperature grade; `None` where it is too thick for one.
    pub grade: Option<&'static str>,
    /// The whole designation, where everything it needs is known.
    pub whole: Option<String>,
    /// Why the whole one is not given.
    pub lacks: Option<String>,
}

impl ColdDesignation {
    /// Its name, how it was found, and what the whole one lacks (or nothing).
    pub fn says(&self) -> (String, &'static str, String) {
        let name = match (&self.whole, self.grade) {
            (Some(whole), _) => whole.clone(),
            (None, Some(grade)) => grade.to_owned(),
            (None, None) => "no low-temperature grade".to_owned(),
        };
        let how = if self.measured {
            "measured"
        } else {
            "read off the line, not measured"
        };
        let lacks = self.lacks.as_ref();
        let lacks = lacks.map_or(String::new(), |l| format!("; whole designation: {l}"));
        (name, how, lacks)
    }
}

/// Designation of a hydraulic oil by ASTM D6080; `None` for other kinds and for fluids with water.
pub fn designation(oil: &Oil, curves: &Curves, rules: &Rulebook) -> Option<ColdDesignation> {
    let hydraulic = oil.kind == OilKind::Hydraulic;
    if !hydraulic || curves.base == BaseStock::WaterGlycol {
        return None;
    }
    let low_shear: Vec<Measured> = curves
        .cold_points
        .iter()
        .filter(|p| p.test == ColdTest::LowShear)
        .map(|p| Measured {
            at: p.at,
            eta: p.eta,
        })
        .collect();
    let (t750, measured) = match d6080::t750(&low_shear) {
        Ok(t) => (t, true),
        Err(_) => {
            let eta = DynamicViscosity::from_base(0.75);
            let limit = ViscosityLimit::Dynamic(eta);
            (reaches(curves, curves.best_new(), limit).ok()?, false)
        }
    };
    let whole = whole(oil, curves, rules, measured.then_some(t750));
    Some(ColdDesignation {
        t750,
        measured,
        grade: d6080::low_grade(t750),
        whole: whole.as_ref().ok().cloned(),
        lacks: whole.err(),
    })
}

/// The whole designation rests on measured cold viscosities and on the sonic test.
fn whole(
    oil: &Oil,
    curves: &Curves,
    rules: &Rulebook,
    t750: Option<ThermodynamicTemperature>,
) -> Result<String, String> {
    let t750 = t750.ok_or("wants viscosities measured by ASTM D2983 around 750 mPa.s")?;
    if curves.loss_range(false).is_some() {
        return Err("wants the viscosity after the sonic shear test".to_owned());
    }
    let sonic = match &oil.shear {
        None => true,
        Some(shear) => {
            let test = shear.test().and_then(|t| rules.shear_test(t));
            test.is_some_and(|t| t.id == "sonic")
        }
    };
    if !sonic {
        return Err("wants the sonic shear test, the loss stated is of another one".to_owned());
    }
    let worn = curves.worn_range(false).map(|(_, most)| most);
    let at = |t: f64| {
        let t = celsius(t);
        worn.as_ref().map_or(curves.new.nu_at(t), |w| w.nu_at(t))
    };
    let index: Ratio =
        viscosity_index::index(at(40.0), at(100.0)).map_err(|why| why.to_string())?;
    let new40 = curves.new.nu_at(celsius(40.0));
    d6080::designation(new40, t750, at(40.0), index).map_err(|why| why.to_string())
}
