//! The steps behind one verdict, by the relations the judge used, told to a recorder.

use super::margin::Ready;
use super::prepared::{PreparedOil, ReadyDemand, ReadyLimit, Setting};
use super::weigh::Judgement;
use crate::demand::film::FilmDemand;
use crate::demand::{Demand, End};
use crate::model::Oil;
use crate::model::oil::{Shear, Viscosity, ViscosityPoint};
use crate::oil::Worn;
use crate::quantity::convert::{celsius, kinematic, rise};
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, Measure, TemperatureInterval, ThermodynamicTemperature,
    VgStep,
};
use crate::relation::film::inverse;
use crate::relation::oil::tangent::TANGENT;
use crate::relation::oil::vg_step::{ABOVE, BELOW, CARRIED, carried_to_40, steps};
use crate::relation::oil::viscosity_temperature::VISCOSITY;
use crate::relation::sump::{CEILING_MARGIN, POUR_MARGIN, USE_MARGIN};
use crate::source::Origin;
use crate::source::place::{Given, Whose};
use crate::trace::{Both, Derivation, Known, Recorder, StepId};

/// The calculation behind one judgement.
#[derive(Clone, Debug)]
pub struct Explanation {
    /// The point's demands, then the oil at each limit.
    pub trace: Derivation,
    /// Margin of each demand that judges or asks: demand number, value, its step.
    pub margins: Vec<Explained>,
}

/// One margin explained.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Explained {
    /// Number of the demand.
    pub demand: u16,
    /// The margin: VG steps, or kelvins for pour point and oil ceiling.
    pub value: f64,
    /// The step of the margin.
    pub step: StepId,
    /// Viscosity of the oil there, where the margin is one of viscosity, with its step.
    pub nu: Option<(KinematicViscosity, StepId)>,
    /// The limit it is compared with.
    pub limit: Option<KinematicViscosity>,
    /// Temperature, K.
    pub t: f64,
    /// Whether floors were judged on the worn curve here.
    pub worn: bool,
}

/// Which of an oil's curves is meant.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Which {
    Thin,
    Thick,
    Worn,
}

/// Explains a judgement in one setting of the unknowns. `trace` and `list` are the demands of
/// that setting, `worn` the worn curve that was worst.
pub fn explain(
    trace: &Derivation,
    list: &[Demand],
    setting: &Setting,
    oil: (&Oil, &PreparedOil),
    worn: Option<&Ready>,
) -> Explanation {
    let mut told = Explanation {
        trace: trace.clone(),
        margins: Vec::new(),
    };
    let mut teller = Teller {
        oil: oil.0,
        ready: oil.1,
        worn,
        points: Vec::new(),
    };
    for ready in &setting.demands {
        let demand = &list[usize::from(ready.number)];
        if !ready.applies_to(oil.1) || !(ready.judges || ready.asks_when_unmet) {
            continue;
        }
        told.trace
            .about(|| Some(format!("{} on {}", oil.0.id, demand.says)));
        if let Some(found) = teller.one(&mut told.trace, demand, ready) {
            told.margins.push(found);
        }
    }
    told.trace.about(|| None);
    told
}

struct Teller<'a> {
    oil: &'a Oil,
    ready: &'a PreparedOil,
    worn: Option<&'a Ready>,
    points: Vec<(Which, CurveSteps)>,
}

/// Steps of the points a curve goes through.
#[derive(Clone)]
struct CurveSteps {
    nu: Vec<(&'static str, Known<KinematicViscosity>)>,
    at: Vec<(&'static str, Known<ThermodynamicTemperature>)>,
}

impl Teller<'_> {
    fn one(
        &mut self,
        d: &mut Derivation,
        demand: &Demand,
        ready: &ReadyDemand,
    ) -> Option<Explained> {
        let t = temperature(d, demand, ready);
        match &ready.limit {
            ReadyLimit::Jaw(jaw) => {
                let nu = KinematicViscosity::from_base(jaw.nu);
                let limit = known_limit(d, demand, nu);
                Some(self.viscosity(d, ready, limit, t))
            }
            ReadyLimit::Dynamic(eta) => {
                let limit = self.dynamic_limit(d, demand, DynamicViscosity::from_base(*eta), t);
                Some(self.viscosity(d, ready, limit, t))
            }
            ReadyLimit::Film(film) => self.film(d, ready, film, t),
            ReadyLimit::Pour { least, .. } => self.pour(d, ready, *least, t),
            ReadyLimit::OilsOwn => {
                let (_, most) = self.ready.ceiling?;
                Some(self.ceiling(d, ready, most, t))
            }
            ReadyLimit::AtMost(most) => Some(self.ceiling(d, ready, *most, t)),
            ReadyLimit::UseLow => self.use_low(d, ready, t),
        }
    }

    fn which(&self, ready: &ReadyDemand, nu: f64, t: f64) -> Which {
        if ready.end != End::HotFloor {
            return if ready.end == End::MakerGrade {
                Which::Thin
            } else {
                Which::Thick
            };
        }
        let jaw = super::margin::Jaw::new(
            KinematicViscosity::from_base(nu),
            ThermodynamicTemperature::from_base(t),
        );
        match self.worn {
            Some(worn) if worn.above(&jaw).0 < self.ready.thin.above(&jaw).0 => Which::Worn,
            _ => Which::Thin,
        }
    }

    fn curve(&self, which: Which) -> &Ready {
        match which {
            Which::Thin => &self.ready.thin,
            Which::Thick => &self.ready.thick,
            Which::Worn => self.worn.unwrap_or(&self.ready.thin),
        }
    }

    /// Oil and limit read at 40 °C, and the steps between.
    fn viscosity(
        &mut self,
        d: &mut Derivation,
        ready: &ReadyDemand,
        limit: Known<KinematicViscosity>,
        t: Known<ThermodynamicTemperature>,
    ) -> Explained {
        let which = self.which(ready, limit.value.base(), t.value.base());
        let curve = self.curve(which).clone();
        let nu = self.nu_at(d, which, t, says_at(which));
        let straight = curve.at(t.value.base());
        let t40 = d.assume(
            "t_40",
            "temperature of comparison",
            celsius(40.0),
            "grades are compared at 40 degC",
        );
        let nu40 = if matches!(curve, Ready::Straight(_)) {
            self.nu_at(d, which, t40, "the oil at 40 degC")
        } else {
            d.law(
                "nu_40",
                "the oil's tangent read at 40 degC",
                &TANGENT,
                (("nu", nu), ("t", t)),
                |_: (KinematicViscosity, ThermodynamicTemperature)| {
                    KinematicViscosity::from_base(straight.nu40)
                },
            )
        };
        let limit40 = d.law(
            "nu_40_limit",
            "the limit carried to 40 degC along the oil's slope",
            &CARRIED,
            (("nu_limit", limit), ("t", t), ("nu", nu)),
            |(limit, t, _): (
                KinematicViscosity,
                ThermodynamicTemperature,
                KinematicViscosity,
            )| { carried_to_40(straight.line, limit, t) },
        );
        let margin = if ready.end == End::HotFloor || ready.end == End::MakerGrade {
            d.law(
                "margin",
                "margin above the floor",
                &ABOVE,
                (("nu_40", nu40), ("nu_40_limit", limit40)),
                |(n, l)| steps(n, l),
            )
        } else {
            d.law(
                "margin",
                "margin below the ceiling",
                &BELOW,
                (("nu_40", nu40), ("nu_40_limit", limit40)),
                |(n, l)| VgStep(-steps(n, l).0),
            )
        };
        Explained {
            demand: ready.number,
            value: margin.value.0,
            step: margin.step,
            nu: Some((nu.value, nu.step)),
            limit: Some(limit.value),
            t: t.value.base(),
            worn: which == Which::Worn,
        }
    }

    fn nu_at(
        &mut self,
        d: &mut Derivation,
        which: Which,
        t: Known<ThermodynamicTemperature>,
        says: &'static str,
    ) -> Known<KinematicViscosity> {
        let points = self.points_of(d, which);
        let nu = KinematicViscosity::from_base(self.curve(which).nu(t.value.base()));
        let mut at = points.at.clone();
        at.push(("t", t));
        d.law("nu", says, &VISCOSITY, Both(points.nu, at), |_| nu)
    }

    /// Records the points of a curve once.
    fn points_of(&mut self, d: &mut Derivation, which: Which) -> CurveSteps {
        if let Some((_, steps)) = self.points.iter().find(|(w, _)| *w == which) {
            return steps.clone();
        }
        let steps = match which {
            Which::Thin | Which::Thick => self.new_points(d, which),
            Which::Worn => self.worn_points(d),
        };
        self.points.push((which, steps.clone()));
        steps
    }

    fn new_points(&self, d: &mut Derivation, which: Which) -> CurveSteps {
        let ends = match which {
            Which::Thin => self.ready.curves.thin.is_some(),
            _ => self.ready.curves.thick.is_some(),
        };
        match &self.oil.viscosity {
            Viscosity::Points { points, .. } if !ends => stated(d, points),
            _ => {
                let why = match which {
                    Which::Thin => "thin end of the grade or of the stated tolerance",
                    _ => "thick end of the grade or of the stated tolerance",
                };
                read_off(d, self.curve(which), why)
            }
        }
    }

    fn worn_points(&self, d: &mut Derivation) -> CurveSteps {
        match (&self.ready.curves.worn, &self.oil.shear) {
            (Worn::Known(_), Some(Shear::Points { points, test })) if points.len() > 1 => {
                let steps = stated(d, points);
                if let Some(test) = test {
                    d.note(|| format!("after {test}"));
                }
                steps
            }
            (Worn::Between { .. }, _) => read_off(
                d,
                self.curve(Which::Worn),
                "after the greatest plausible loss of its kind: no sheared viscosity is stated",
            ),
            _ => read_off(d, self.curve(Which::Worn), "after the stated loss"),
        }
    }

    fn dynamic_limit(
        &self,
        d: &mut Derivation,
        demand: &Demand,
        eta: DynamicViscosity,
        t: Known<ThermodynamicTemperature>,
    ) -> Known<KinematicViscosity> {
        let limit = match demand.limit_step {
            Some(step) => Known { value: eta, step },
            None => d.assume("eta_lim", "limit", eta, "rule"),
        };
        let density = self.ready.curves.density;
        let rho = d.law(
            "rho",
            "density of the oil there",
            density.law.law(),
            (("t", t),),
            |(t,)| density.at(t),
        );
        d.law(
            "nu_lim",
            "the limit as a kinematic viscosity",
            &DIVIDED,
            (("eta", limit), ("rho", rho)),
            |(e, r)| kinematic(e, r),
        )
    }

    fn film(
        &mut self,
        d: &mut Derivation,
        ready: &ReadyDemand,
        film: &FilmDemand,
        t: Known<ThermodynamicTemperature>,
    ) -> Option<Explained> {
        // the curve judged is the one with the smaller margin; the need differs little between them
        let mut best: Option<(Which, f64, KinematicViscosity)> = None;
        for which in [Which::Thin, Which::Worn] {
            if which == Which::Worn && self.worn.is_none() {
                continue;
            }
            let straight = self.curve(which).at(t.value.base());
            let need = film.viscosity_needed(straight.line, &self.ready.curves, t.value)?;
            let value = straight.above(&super::margin::Jaw::new(need, t.value)).0;
            if best.is_none_or(|(_, v, _)| value < v) {
                best = Some((which, value, need));
            }
        }
        let (which, _, need) = best?;
        let line = self.curve(which).at(t.value.base()).line;
        let oil = &self.ready.curves;
        let alpha =
            oil.pressure
                .alpha(line.parallel_through(need, t.value), oil.density, t.value)?;
        let wanted = d.assume(
            "h_wanted",
            "film asked for",
            film.wanted,
            "film ratio times roughness",
        );
        let alpha = d.law(
            "alpha",
            "pressure-viscosity coefficient at that viscosity",
            oil.pressure.law()?,
            (("t", t),),
            |_: (ThermodynamicTemperature,)| alpha,
        );
        let limit = d.law(
            "nu_min",
            "viscosity the film needs, with this oil",
            &inverse::VISCOSITY,
            (("h", wanted), ("alpha", alpha), ("t", t)),
            |_: (
                crate::quantity::Length,
                crate::quantity::PressureViscosity,
                ThermodynamicTemperature,
            )| need,
        );
        d.note(|| format!("film by {}", film.contact.law().source));
        Some(self.viscosity(d, ready, limit, t))
    }

    fn pour(
        &self,
        d: &mut Derivation,
        ready: &ReadyDemand,
        least: f64,
        t: Known<ThermodynamicTemperature>,
    ) -> Option<Explained> {
        let pour = match &self.oil.pour_point {
            Some(given) => d.given("t_pour", "pour point", &given.clone().map(|b| b.figure())),
            None => {
                let (_, hi) = self.ready.pour?;
                let t = ThermodynamicTemperature::from_base(hi);
                d.assume(
                    "t_pour",
                    "pour point",
                    t,
                    "not stated; warm end of what its base gives",
                )
            }
        };
        let least = d.assume(
            "Delta_t_least",
            "least margin",
            TemperatureInterval::from_base(least),
            "rule by lubrication, or house value",
        );
        let margin = d.law(
            "margin",
            "margin over the pour point",
            &POUR_MARGIN,
            (("t_start", t), ("t_pour", pour), ("Delta_t_least", least)),
            |(t, p, l): (
                ThermodynamicTemperature,
                ThermodynamicTemperature,
                TemperatureInterval,
            )| { TemperatureInterval::from_base(rise(t, p).base() - l.base()) },
        );
        Some(plain(ready, margin, t))
    }

    fn ceiling(
        &self,
        d: &mut Derivation,
        ready: &ReadyDemand,
        most: f64,
        t: Known<ThermodynamicTemperature>,
    ) -> Explained {
        let value = ThermodynamicTemperature::from_base(most);
        let limit = match &self.oil.oil_limit {
            Some(given) if matches!(ready.limit, ReadyLimit::OilsOwn) => {
                d.given("t_max", "limit of the oil", given)
            }
            _ if matches!(ready.limit, ReadyLimit::OilsOwn) => {
                let origin = Origin::rule(
                    format!("base stock {}", self.ready.curves.base.word()),
                    Whose::Standard,
                );
                d.given(
                    "t_max",
                    "peak limit of the base stock",
                    &Given::new(value, "", origin),
                )
            }
            _ => d.assume(
                "t_max",
                "limit stated for the point",
                value,
                "stated for the point",
            ),
        };
        let margin = d.law(
            "margin",
            "margin under the limit",
            &CEILING_MARGIN,
            (("t_max", limit), ("t", t)),
            |(m, t)| rise(m, t),
        );
        plain(ready, margin, t)
    }

    fn use_low(
        &self,
        d: &mut Derivation,
        ready: &ReadyDemand,
        t: Known<ThermodynamicTemperature>,
    ) -> Option<Explained> {
        let low = ThermodynamicTemperature::from_base(self.ready.use_range?.0);
        let low = d.assume(
            "t_low",
            "low end of the use range",
            low,
            "thickener, by the rules",
        );
        let margin = d.law(
            "margin",
            "margin over the low end",
            &USE_MARGIN,
            (("t_start", t), ("t_low", low)),
            |(t, l)| rise(t, l),
        );
        Some(plain(ready, margin, t))
    }
}

/// The temperature of a demand, by its own step where it has one.
fn temperature(
    d: &mut Derivation,
    demand: &Demand,
    ready: &ReadyDemand,
) -> Known<ThermodynamicTemperature> {
    let value = ThermodynamicTemperature::from_base(ready.t);
    match demand.at_step {
        Some(step) => Known { value, step },
        None => d.assume(
            "t",
            "temperature of comparison",
            value,
            "grades are compared there",
        ),
    }
}

/// A curve nobody stated point by point: its values at 40 and 100 °C.
fn read_off(d: &mut Derivation, curve: &Ready, why: &'static str) -> CurveSteps {
    let mut steps = CurveSteps {
        nu: Vec::new(),
        at: Vec::new(),
    };
    for (symbol, at_symbol, t) in [("nu_a", "t_a", 40.0), ("nu_b", "t_b", 100.0)] {
        let at = celsius(t);
        let nu = KinematicViscosity::from_base(curve.nu(at.base()));
        steps.nu.push((
            symbol,
            d.assume("nu", "viscosity of the curve judged", nu, why),
        ));
        steps
            .at
            .push((at_symbol, d.assume("t", "its temperature", at, why)));
    }
    steps
}

/// A dynamic limit over the density.
static DIVIDED: crate::relation::Law = crate::relation::Law {
    name: "kinematic-limit",
    title: "Kinematic viscosity of a dynamic one",
    formula: "nu = eta / rho",
    range: "any",
    source: "definition",
};

fn plain(
    ready: &ReadyDemand,
    margin: Known<TemperatureInterval>,
    t: Known<ThermodynamicTemperature>,
) -> Explained {
    Explained {
        demand: ready.number,
        value: margin.value.base(),
        step: margin.step,
        nu: None,
        limit: None,
        t: t.value.base(),
        worn: false,
    }
}

fn says_at(which: Which) -> &'static str {
    match which {
        Which::Thin => "viscosity of the oil there",
        Which::Thick => "viscosity of the new oil there",
        Which::Worn => "viscosity of the oil there, after permanent shear",
    }
}

fn known_limit(
    d: &mut Derivation,
    demand: &Demand,
    nu: KinematicViscosity,
) -> Known<KinematicViscosity> {
    match demand.limit_step {
        Some(step) => Known { value: nu, step },
        None => d.assume("nu_lim", "limit", nu, "rule"),
    }
}

fn stated(d: &mut Derivation, points: &[ViscosityPoint]) -> CurveSteps {
    let symbols = [
        ("nu_a", "t_a"),
        ("nu_b", "t_b"),
        ("nu_c", "t_c"),
        ("nu_d", "t_d"),
    ];
    let mut steps = CurveSteps {
        nu: Vec::new(),
        at: Vec::new(),
    };
    for (i, point) in points.iter().enumerate() {
        let (symbol, at_symbol) = symbols[i.min(symbols.len() - 1)];
        let at = quantity(point.at.amount(), Units::Si, Toward::Nearest);
        steps.nu.push((
            symbol,
            d.given("nu", "viscosity on the data sheet", &point.nu),
        ));
        let given = Given::new(point.at, at, point.nu.origin.clone());
        steps
            .at
            .push((at_symbol, d.given("t", "its temperature", &given)));
    }
    steps
}

/// The judgement's own margins and the explained ones agree to the last bit; checked by tests.
pub fn agrees(judgement: &Judgement, told: &Explanation) -> bool {
    [
        judgement.hot,
        judgement.cold,
        judgement.pour,
        judgement.oil,
        judgement.maker,
    ]
    .into_iter()
    .flatten()
    .all(|m| {
        told.margins
            .iter()
            .filter(|e| e.demand == m.demand)
            .any(|e| e.value.to_bits() == m.value.to_bits())
    })
}
