//! From a machine to its demands.
//!
//! A demand is one limit on one quantity at one temperature, with the rule that set it and the
//! step of the calculation behind it. Each part yields demands; the point's list is their union,
//! and the strictest at each end governs.

mod bearing_facts;
pub mod bearing_film;
pub mod component;
pub mod contact;
mod contact_facts;
pub mod context;
pub mod drive;
pub mod feed;
pub mod film;
pub mod gear_bevel;
pub mod gear_film;
pub mod gear_mesh;
pub mod governing;
mod grease_code;
mod grease_point;
pub mod inputs;
pub mod journal;
pub mod losses;
pub mod open_gear;
pub mod point;
pub mod rolling_bearing;
pub mod rules;
pub mod settings;
pub mod tested;
pub mod thermal;
pub mod thrust;
pub mod usual;
pub mod worm;

use crate::model::part::{Part, PartKind};
use crate::model::rulebook::{Confidence, Rulebook};
use crate::model::site::House;
use crate::model::{Lubrication, Point};
use crate::quantity::{Amount, DynamicViscosity, KinematicViscosity, Measure};
use crate::source::place::Whose;
use crate::trace::{Recorder, StepId};
use context::Context;
pub use inputs::{Gap, GapKind, Inputs, Instead, Scenario};
pub use settings::{PointDemands, point_demands};
pub use thermal::{AtAmbient, Thermal, thermal};

/// Which end a demand limits.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum End {
    /// Least viscosity at running temperature, hottest ambient.
    HotFloor,
    /// Greatest viscosity at running temperature, coldest ambient.
    RunningCeiling,
    /// Greatest viscosity at start.
    StartCeiling,
    /// Start temperature over pour point.
    PourMargin,
    /// Running temperature under the oil's own limit.
    OilCeiling,
    /// Grade named by the maker, compared at 40 °C with the new oil.
    MakerGrade,
}

/// The limit of a demand.
#[derive(Clone, Debug, PartialEq)]
pub enum Limit {
    /// A kinematic viscosity.
    Kinematic(KinematicViscosity),
    /// A dynamic viscosity, divided by the oil's density to be compared.
    Dynamic(DynamicViscosity),
    /// A film: the viscosity it needs is solved for each oil.
    Film(Box<film::FilmDemand>),
    /// Pour margin in kelvins: fails below the first, tight below the second.
    Pour {
        /// Least margin, K.
        least: f64,
        /// Preferred margin, K.
        preferred: f64,
    },
    /// The oil's or its base's own ceiling.
    OilsOwn,
    /// A ceiling stated for the point, K.
    Temperature(f64),
    /// The low end of a grease's use range.
    UseLow,
    /// A viscosity that a test measures: cranking, pumping, high shear.
    Tested(tested::TestedLimit),
}

/// Which oils a demand speaks of.
#[derive(Clone, Debug, PartialEq)]
pub enum For {
    /// All of them.
    All,
    /// Those that declare this additive or class.
    With(String),
    /// Those that do not.
    Without(String),
}

/// What a demand does.
#[derive(Clone, Debug, PartialEq)]
pub enum Standing {
    /// It judges.
    Judges,
    /// It was replaced by a maker's limit or a house rule; where it is the stricter and an oil
    /// does not meet it, the verdict carries a condition.
    Replaced {
        /// By what, in words.
        by: String,
    },
    /// An unmet one is a condition, never a failure.
    Condition,
    /// Printed only.
    Information,
}

/// One demand.
#[derive(Clone, Debug, PartialEq)]
pub struct Demand {
    /// Which end it limits.
    pub end: End,
    /// The limit.
    pub limit: Limit,
    /// Temperature it is judged at, as a function of ambient.
    pub at: AtAmbient,
    /// The step of that temperature at the governing ambient.
    pub at_step: Option<StepId>,
    /// The step of the limit.
    pub limit_step: Option<StepId>,
    /// Id of the rule that set it.
    pub rule: String,
    /// The part it comes from.
    pub part: Option<String>,
    /// What it asks, in words: `viscosity ratio kappa >= 1`.
    pub says: String,
    /// Standard, maker's manual, practice.
    pub source: String,
    /// Whose word the limit is.
    pub whose: Whose,
    /// How sure the rule is.
    pub confidence: Confidence,
    /// Which oils it speaks of.
    pub only: For,
    /// What it does.
    pub standing: Standing,
    /// Whether it is a practice window's.
    pub from_window: bool,
    /// Where the limit itself moves with the ambient: the figure is that of the hottest.
    pub heat: Option<Box<journal::HeatCeiling>>,
}

impl Demand {
    /// What it asks and of what: `gear mesh low-speed stage: …`. A window names its part itself.
    pub fn asks(&self) -> String {
        match &self.part {
            Some(part) if !self.says.starts_with(part.as_str()) => {
                format!("{part}: {}", self.says)
            }
            _ => self.says.clone(),
        }
    }
}

/// A figure worked out for a part that sets no limit.
#[derive(Clone, Debug, PartialEq)]
pub struct Information {
    /// The part.
    pub part: Option<String>,
    /// What it is, in words.
    pub says: String,
    /// The figure.
    pub amount: Option<Amount>,
    /// Its step.
    pub step: Option<StepId>,
}

/// A demand that cannot be worked out.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Undecided {
    /// The end it would limit.
    pub end: End,
    /// The part it comes from.
    pub part: Option<String>,
    /// What is missing.
    pub because: String,
}

/// The demands of a point in one setting of its unknowns.
#[derive(Clone, Debug)]
pub struct Demands {
    /// The demands.
    pub list: Vec<Demand>,
    /// Demands that cannot be worked out.
    pub undecided: Vec<Undecided>,
    /// Figures that set no limit.
    pub information: Vec<Information>,
    /// Temperatures of the point.
    pub thermal: Thermal,
    /// Unknowns with a range, in the order the settings count them.
    pub axes: Vec<Gap>,
    /// What is missing or assumed.
    pub gaps: Vec<Gap>,
    /// Stated inputs with a tolerance.
    pub tolerances: Vec<Gap>,
    /// What makes heat in the point, where all of it can be worked out.
    pub losses: Option<losses::Losses>,
    /// Stated inputs without one, with the usual tolerance of their kind; only where asked for.
    pub usual: Vec<Gap>,
}

impl Demands {
    /// Limits whose temperature follows an ambient that is not stated.
    fn placeless(&self) -> Vec<Undecided> {
        let judges = |d: &&Demand| d.standing == Standing::Judges && d.end != End::OilCeiling;
        let judged = self.list.iter().filter(judges);
        judged
            .filter(|d| !d.at.is_unknown() && self.governing_temperature(d).is_none())
            .map(|d| Undecided {
                end: d.end,
                part: d.part.clone(),
                because: format!("{}: the ambient range is not stated", d.says),
            })
            .collect()
    }

    /// Temperature a demand is judged at: running floors and the oil's ceiling at the hottest
    /// ambient, all others at the coldest. `None` where it is not known.
    pub fn governing_temperature(&self, demand: &Demand) -> Option<f64> {
        if demand.at.is_unknown() {
            return None;
        }
        let hot = matches!(
            demand.end,
            End::HotFloor | End::OilCeiling | End::MakerGrade
        );
        let ambient = self
            .thermal
            .ambient
            .map(|(cold, warm)| if hot { warm } else { cold });
        match ambient {
            Some(ambient) => Some(demand.at.at(ambient.value.base())),
            None if demand.at.slope == 0.0 => Some(demand.at.offset.max(demand.at.least)),
            None if demand.at.least.is_finite() => Some(demand.at.least),
            None => None,
        }
    }
}

/// Works out the demands of a point in one setting of its unknowns.
pub fn demands<R: Recorder>(
    r: &mut R,
    point: &Point,
    house: &House,
    rules: &Rulebook,
    setting: &Scenario,
) -> Demands {
    let mut inputs = Inputs::new(setting);
    let thermal = thermal(r, &mut inputs, point);
    let mut cx = Context {
        r,
        inputs: &mut inputs,
        rules,
        house,
        point,
        thermal,
        list: Vec::new(),
        undecided: Vec::new(),
        information: Vec::new(),
    };
    for part in &point.parts {
        cx.r.about(|| Some(part.label.clone()));
        of_part(&mut cx, part);
        point::stated(&mut cx, Some(part), &part.limits);
    }
    cx.r.about(|| None);
    point::stated(&mut cx, None, &point.limits);
    point::maker_grade(&mut cx);
    point::start(&mut cx);
    point::pour(&mut cx);
    point::ceiling(&mut cx);
    point::replace(&mut cx.list);
    limited_at_all(&mut cx);
    let losses = losses::losses(&mut cx);
    let Context {
        list,
        undecided,
        information,
        ..
    } = cx;
    let mut demands = Demands {
        list,
        undecided,
        information,
        thermal,
        axes: inputs.axes,
        gaps: inputs.gaps,
        tolerances: inputs.tolerances,
        losses,
        usual: inputs.usual,
    };
    let placeless = demands.placeless();
    demands.undecided.extend(placeless);
    demands
}

/// A point of which nothing limits the viscosity is not decided by that: no oil may hold on it.
fn limited_at_all<R: Recorder>(cx: &mut Context<'_, '_, R>) {
    let limits = |d: &Demand| {
        let end = matches!(
            d.end,
            End::HotFloor | End::RunningCeiling | End::StartCeiling | End::MakerGrade
        );
        end && matches!(d.standing, Standing::Judges)
    };
    // A component of the rules without a window is known to ask for none.
    let component = |p: &Part| matches!(p.kind, PartKind::Component(_));
    let known = cx.point.parts.iter().any(component);
    if !known && cx.undecided.is_empty() && !cx.list.iter().any(limits) {
        cx.undecided.push(Undecided {
            end: End::HotFloor,
            part: None,
            because: "nothing stated limits the viscosity: a part with its duty, or the maker's floor, ceiling or grade, is missing".to_owned(),
        });
    }
}

fn of_part<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part) {
    match &part.kind {
        PartKind::RollingBearing(b) => rolling_bearing::add(cx, part, b),
        PartKind::GearMesh(m) => gear_mesh::add(cx, part, m),
        PartKind::Contact(c) => contact::add(cx, part, c),
        PartKind::Component(c) => component::add(cx, part, c),
        PartKind::WormMesh(m) => worm::add(cx, part, m),
        PartKind::OpenGear(g) => open_gear::add(cx, part, g),
        PartKind::Engine(d) => drive::engine(cx, part, d),
        PartKind::Axle(d) => drive::axle(cx, part, d),
        PartKind::JournalBearing(b) => journal::add(cx, part, b),
        PartKind::ThrustBearing(b) => thrust::add(cx, part, b),
    }
}

/// Whether a point shears polymers as gears and rolling bearings do.
pub fn is_severe(point: &Point) -> bool {
    point.parts.iter().any(|p| {
        matches!(
            p.kind,
            PartKind::RollingBearing(_)
                | PartKind::GearMesh(_)
                | PartKind::WormMesh(_)
                | PartKind::OpenGear(_)
                | PartKind::Axle(_)
        )
    })
}

/// Whether a point takes grease.
pub fn takes_grease(point: &Point) -> bool {
    point
        .lubrication
        .as_ref()
        .is_some_and(|l| l.value == Lubrication::Grease)
}
