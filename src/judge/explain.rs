//! The steps behind one verdict, by the relations the judge used, told to a recorder.

mod curve;
mod film;
mod tested;

use super::margin::Ready;
use super::own::{OwnSteps, OwnTemperatures};
use super::prepared::{PreparedOil, ReadyDemand, ReadyLimit, Setting, Variant};
use super::weigh::Judgement;
use crate::demand::{Demand, End};
use crate::model::Oil;
use crate::oil::thinning::End as ShearEnd;
use crate::oil::told::LineSteps;
use crate::quantity::convert::{celsius, kinematic, rise};
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, Measure, TemperatureInterval, ThermodynamicTemperature,
    VgStep,
};
use crate::relation::oil::tangent::TANGENT;
use crate::relation::oil::vg_step::{ABOVE, BELOW, CARRIED, carried_to_40, steps};
use crate::relation::sump::{CEILING_MARGIN, POUR_MARGIN, USE_MARGIN};
use crate::source::Origin;
use crate::source::place::{Given, Whose};
use crate::trace::{Derivation, Known, Recorder, StepId};

/// The calculation behind one judgement.
#[derive(Clone, Debug)]
pub struct Explanation {
    /// The point's demands, then the oil at each limit.
    pub trace: Derivation,
    /// Margin of each demand that judges or asks: demand number, value, its step.
    pub margins: Vec<Explained>,
    /// Steps of how the oil runs: its temperature by losses, and the losses.
    pub running: Vec<StepId>,
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
    New,
    Thin,
    Thick,
    Worn,
}

/// Explains a judgement in one setting of the unknowns. `trace` and `list` are the demands of
/// that setting, `variant` the worst of what is not known of the oil's polymer.
pub fn explain(
    trace: &Derivation,
    list: &[Demand],
    setting: &Setting,
    oil: (&Oil, &PreparedOil),
    variant: &Variant,
    own: Option<&OwnSteps<'_>>,
) -> Explanation {
    let mut told = Explanation {
        trace: trace.clone(),
        margins: Vec::new(),
        running: Vec::new(),
    };
    told.trace
        .about(|| Some(format!("{} by its losses", oil.0.id)));
    let running = own.map(|own| own.tell(&mut told.trace, &oil.1.curves));
    let running = running.unwrap_or_default();
    told.running = running.shown;
    let mut teller = Teller {
        own: running.temperatures,
        oil: oil.0,
        ready: oil.1,
        worn: variant.worn.as_ref(),
        variant,
        under_shear: variant.under_shear,
        new: Ready::of(&oil.1.curves.new),
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
    own: Option<OwnTemperatures>,
    oil: &'a Oil,
    ready: &'a PreparedOil,
    worn: Option<&'a Ready>,
    variant: &'a Variant,
    under_shear: ShearEnd,
    new: Ready,
    points: Vec<(Which, LineSteps)>,
}

impl Teller<'_> {
    fn one(
        &mut self,
        d: &mut Derivation,
        demand: &Demand,
        ready: &ReadyDemand,
    ) -> Option<Explained> {
        let t = self.temperature(d, demand, ready);
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
            ReadyLimit::Film(film) => self.film(d, demand, ready, film, t),
            ReadyLimit::Pour { least, .. } => self.pour(d, ready, *least, t),
            ReadyLimit::OilsOwn => {
                let (_, most) = self.ready.ceiling?;
                Some(self.ceiling(d, ready, most, t))
            }
            ReadyLimit::AtMost(most) => Some(self.ceiling(d, ready, *most, t)),
            ReadyLimit::UseLow => self.use_low(d, ready, t),
            ReadyLimit::Tested(limit) => self.tested(d, demand, ready, *limit, t),
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
            Which::New => &self.new,
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
        self.viscosity_on(d, ready, limit, t, which)
    }

    /// The same on one of the curves.
    fn viscosity_on(
        &mut self,
        d: &mut Derivation,
        ready: &ReadyDemand,
        limit: Known<KinematicViscosity>,
        t: Known<ThermodynamicTemperature>,
        which: Which,
    ) -> Explained {
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

impl Teller<'_> {
    /// The temperature of a demand, moved to that of the oil's own losses where that is the
    /// warmer.
    fn temperature(
        &self,
        d: &mut Derivation,
        demand: &Demand,
        ready: &ReadyDemand,
    ) -> Known<ThermodynamicTemperature> {
        let Some((shift, own)) = ready.moved.zip(self.own) else {
            return temperature(d, demand, ready.t);
        };
        let before = temperature(d, demand, shift.before);
        let after = ThermodynamicTemperature::from_base(ready.t);
        d.law(
            "t",
            "temperature there with this oil, the warmer",
            &MOVED,
            (
                ("t", before),
                ("t_losses", own.by_losses),
                ("t_read", own.by_reading),
            ),
            |_: (
                ThermodynamicTemperature,
                ThermodynamicTemperature,
                ThermodynamicTemperature,
            )| after,
        )
    }
}

/// A temperature moved from that of the reading to that of the losses.
static MOVED: crate::relation::Law = crate::relation::Law {
    name: "temperature-by-losses",
    title: "Temperature with an oil that runs hotter than the one the reading was taken with",
    formula: "t = t + t_losses - t_read",
    range: "where the losses give the warmer",
    source: "heat balance calibrated on the reading",
};

/// The temperature of a demand, by its own step where it has one.
fn temperature(d: &mut Derivation, demand: &Demand, t: f64) -> Known<ThermodynamicTemperature> {
    let value = ThermodynamicTemperature::from_base(t);
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
        Which::New | Which::Thin => "viscosity of the oil there",
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
