//! What makes heat in a lubrication point: meshes, churning, bearings, seals. From it follow the
//! running temperature of each oil, and the drag by which oils differ.

mod bearing;
mod gear;
mod settle;

use super::context::Context;
use super::inputs::Wanted;
use crate::model::facts::words::Elastomer;
use crate::model::part::{Part, PartKind};
use crate::model::{Lubrication, Sump};
use crate::oil::Curves;
use crate::quantity::convert::{dynamic, number};
use crate::quantity::{
    AngularVelocity, Area, HeatTransfer, KinematicViscosity, Length, Measure, Power, Ratio,
    ThermalConductance, ThermodynamicTemperature, Torque,
};
use crate::relation::Law;
use crate::relation::bearing::friction::{self, POWER as BEARING_POWER};
use crate::relation::gear::loss::churning::{self, Stirring};
use crate::relation::gear::loss::{self, mesh_friction};
use crate::relation::gear::temperature::{Friction, OilKind, oil_factor};
use crate::relation::heat::balance::conductance;
use crate::relation::heat::seal;
use crate::relation::journal::feed::{Coolant, Feed};
use crate::relation::journal::film::{Bearing, POWER as JOURNAL_POWER};
use crate::relation::journal::heat::{Cooling, settled, still_air};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::viscosity_temperature::ViscosityCurve;
use crate::relation::thrust::pad::{LAW as PAD_LAW, Pad};
use crate::relation::thrust::shape::Shape;
use crate::trace::{Inputs, Known, Recorder, StepId};
pub use settle::{Calibrated, Drag, SUM, Settled};

/// What kind of loss.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum LossKind {
    /// Rubbing of teeth.
    Mesh,
    /// Gears that stir the oil.
    Churning,
    /// Rolling and plain bearings.
    Bearing,
    /// Lips of shaft seals.
    Seal,
}

impl LossKind {
    /// All, in the order they are shown.
    pub const ALL: [Self; 4] = [Self::Mesh, Self::Churning, Self::Bearing, Self::Seal];

    /// The word.
    pub fn word(self) -> &'static str {
        match self {
            Self::Mesh => "mesh",
            Self::Churning => "churning",
            Self::Bearing => "bearing",
            Self::Seal => "seal",
        }
    }
}

/// Steps of several kinds that go into a relation together.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct With(pub Vec<(&'static str, StepId)>);

impl Inputs for With {
    type Values = ();
    fn values(&self) {}
    fn steps(&self) -> Vec<(&'static str, StepId)> {
        self.0.clone()
    }
}

/// One thing that makes heat.
#[derive(Clone, Debug, PartialEq)]
pub struct Source {
    /// Its kind.
    pub kind: LossKind,
    /// The part.
    pub part: String,
    /// What went into it besides the oil.
    pub with: With,
    form: Form,
}

#[derive(Clone, Debug, PartialEq)]
enum Form {
    Mesh {
        power: Power,
        factor: Ratio,
        friction: Friction,
    },
    Churning(Stirring),
    Rolling {
        f0: Ratio,
        load: Torque,
        speed: AngularVelocity,
        pitch_diameter: Length,
    },
    Journal {
        bearing: Box<Bearing>,
        inlet: Inlet,
    },
    Pads {
        pad: Pad,
        ratio: Ratio,
        count: f64,
    },
    Seal(Power),
}

/// The oil that reaches a journal bearing.
#[derive(Clone, Copy, Debug, PartialEq)]
enum Inlet {
    /// The film is as warm as the sump around it.
    Sump,
    /// Oil as warm as the sump is fed, and carries the heat.
    FedAsSump,
    /// Oil of this temperature is fed, and carries the heat.
    Fed(ThermodynamicTemperature),
}

impl Inlet {
    /// The settled film, with an oil whose sump is that warm.
    fn film(
        self,
        bearing: &Bearing,
        oil: &Curves,
        sump: ThermodynamicTemperature,
    ) -> Option<(ThermodynamicTemperature, Power)> {
        let eta = |t| dynamic(oil.new.nu_at(t), oil.density.at(t));
        let inlet = match self {
            Self::Sump => return bearing.film(eta(sump)).ok().map(|f| (sump, f.power)),
            Self::FedAsSump => sump,
            Self::Fed(t) => t,
        };
        let cooling = Cooling::Oil {
            inlet,
            feed: Feed::Drawn,
            coolant: Coolant::iso7902(),
        };
        let found = settled(bearing, &cooling, eta).ok()?;
        Some((found.t_effective, found.film.power))
    }
}

impl Source {
    /// Temperature of its film, where oil is fed to it.
    fn film_at(
        &self,
        oil: &Curves,
        t: ThermodynamicTemperature,
    ) -> Option<ThermodynamicTemperature> {
        match &self.form {
            Form::Journal { bearing, inlet } if *inlet != Inlet::Sump => {
                inlet.film(bearing, oil, t).map(|(film, _)| film)
            }
            _ => None,
        }
    }

    /// The relation.
    pub fn law(&self) -> &'static Law {
        match self.form {
            Form::Mesh { .. } => &loss::MESH,
            Form::Churning(_) => &churning::POWER,
            Form::Rolling { .. } => &BEARING_POWER,
            Form::Journal { .. } => &JOURNAL_POWER,
            Form::Pads { .. } => &PAD_LAW,
            Form::Seal(_) => &seal::LAW,
        }
    }

    /// Its loss with an oil at a temperature, W; not a number where there is no film.
    fn power(&self, oil: &Curves, t: ThermodynamicTemperature) -> f64 {
        let nu = oil.new.nu_at(t);
        let eta = || dynamic(nu, oil.density.at(t));
        let base = |p: Power| p.base();
        match &self.form {
            Form::Mesh {
                power,
                factor,
                friction,
            } => {
                let friction = Friction {
                    eta: eta(),
                    oil: oil_factor(kind_of(oil.base), friction.sum_speed).unwrap_or(number(1.0)),
                    ..*friction
                };
                mesh_friction(friction)
                    .map_or(f64::NAN, |mu| loss::mesh(*power, mu, *factor).base())
            }
            Form::Churning(stirring) => {
                churning::power(Stirring { nu, ..*stirring }).map_or(f64::NAN, base)
            }
            Form::Rolling {
                f0,
                load,
                speed,
                pitch_diameter,
            } => friction::viscous(*f0, nu, *speed, *pitch_diameter)
                .map_or(f64::NAN, |m| friction::power(m, *load, *speed).base()),
            Form::Journal { bearing, inlet } => inlet
                .film(bearing, oil, t)
                .map_or(f64::NAN, |(_, power)| power.base()),
            Form::Pads { pad, ratio, count } => pad
                .film(Shape::Ratio(*ratio), eta())
                .map_or(f64::NAN, |f| f.power.base() * count),
            Form::Seal(power) => power.base(),
        }
    }
}

/// The oil as the friction of a mesh sees it.
fn kind_of(base: BaseStock) -> OilKind {
    match base {
        BaseStock::Pao | BaseStock::DiEster | BaseStock::PolyolEster => OilKind::PaoOrEster,
        BaseStock::PagWaterSoluble | BaseStock::PagOilSoluble => OilKind::Polyglycol,
        _ => OilKind::Mineral,
    }
}

/// A reading of the sump with the ambient it was taken at.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Reading {
    /// The sump.
    pub sump: Known<ThermodynamicTemperature>,
    /// The ambient.
    pub ambient: Known<ThermodynamicTemperature>,
}

/// What makes heat in a point, and what is known of its cooling.
#[derive(Clone, Debug, PartialEq)]
pub struct Losses {
    /// What makes heat.
    pub sources: Vec<Source>,
    /// The one reading with the oil in use, where the housing cools the oil.
    pub reading: Option<Reading>,
    /// Heat given off for every kelvin, from surface and heat transfer, where the surface is
    /// stated.
    pub by_surface: Option<Known<ThermalConductance>>,
    /// Heat taken by a cooler.
    pub cooler: Option<Known<Power>>,
}

/// Reads what makes heat. `None` where a part's share cannot be worked out, or nothing makes any:
/// a sum of some of the parts would mislead.
pub fn losses<R: Recorder>(cx: &mut Context<'_, '_, R>) -> Option<Losses> {
    if super::takes_grease(cx.point) {
        return None;
    }
    let parts = &cx.point.parts;
    let mut sources = Vec::new();
    for part in parts {
        if let Err(because) = of_part(cx, part, &mut sources) {
            if cx.point.losses.is_some() {
                let says = format!("losses are not worked out: {because}");
                cx.inform(part, says, None);
            }
            return None;
        }
    }
    if sources.is_empty() {
        return None;
    }
    let (by_surface, cooler) = cooling(cx);
    Some(Losses {
        sources,
        reading: reading(cx),
        by_surface,
        cooler,
    })
}

type Unknown = &'static str;

fn of_part<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    out: &mut Vec<Source>,
) -> Result<(), Unknown> {
    match &part.kind {
        PartKind::RollingBearing(b) => bearing::rolling(cx, part, b, out),
        PartKind::JournalBearing(b) => bearing::journal(cx, part, b, out),
        PartKind::ThrustBearing(b) => bearing::thrust(cx, part, b, out),
        PartKind::GearMesh(m) => gear::mesh(cx, part, m, out),
        // a window only speaks of the parts beside it
        PartKind::Component(_) if cx.point.parts.len() > 1 => Ok(()),
        PartKind::Component(_) => Err("a practice window alone says nothing of losses"),
        PartKind::WormMesh(_)
        | PartKind::OpenGear(_)
        | PartKind::Contact(_)
        | PartKind::Engine(_)
        | PartKind::Axle(_) => Err("this kind of part has no losses here"),
    }
}

/// Whether the housing cools the oil: not where a tank and a cooler elsewhere do.
fn housed<R: Recorder>(cx: &Context<'_, '_, R>) -> bool {
    !matches!(
        cx.lubrication(),
        Some(Lubrication::Circulated | Lubrication::PressureFed | Lubrication::Reservoir)
    )
}

fn reading<R: Recorder>(cx: &mut Context<'_, '_, R>) -> Option<Reading> {
    let Some(Sump::Reading { sump, ambient }) = &cx.point.sump else {
        return None;
    };
    if !housed(cx) {
        return None;
    }
    Some(Reading {
        sump: cx.r.given("t_sump", "sump, as read", sump),
        ambient: cx.r.given("t_amb", "ambient at the reading", ambient),
    })
}

type Cools = (Option<Known<ThermalConductance>>, Option<Known<Power>>);

fn cooling<R: Recorder>(cx: &mut Context<'_, '_, R>) -> Cools {
    let stated = cx.point.losses.clone().unwrap_or_default();
    let of_bearing = cx.point.parts.iter().find_map(|p| match &p.kind {
        PartKind::JournalBearing(b) => b.casing_area.clone(),
        _ => None,
    });
    let area = stated.casing_area.clone().or(of_bearing);
    let wanted = |key, symbol, says| Wanted {
        key,
        about: None,
        symbol,
        says,
        how: "drawing, or the outside of the housing with a rule",
    };
    let key = wanted("casing area", "A", "surface that gives off heat");
    let area: Option<Known<Area>> = cx.inputs.maybe(cx.r, key, known(area.as_ref()));
    let key = wanted("cooler", "P_c", "heat a cooler takes");
    let cooler = cx.inputs.maybe(cx.r, key, known(stated.cooler.as_ref()));
    let by_surface = area.filter(|_| housed(cx)).map(|area| {
        let key = wanted("heat transfer", "k", "heat transfer to the air");
        let transfer: Option<Known<HeatTransfer>> =
            cx.inputs
                .maybe(cx.r, key, known(stated.heat_transfer.as_ref()));
        let why = "the lower end of 15 to 20 W/(m2.K) in still air, ISO 7902-1 (from memory)";
        let k = transfer.unwrap_or_else(|| {
            cx.r.assume("k", "heat transfer to the air", still_air(), why)
        });
        let says = "heat given off for every kelvin";
        cx.r.law(
            "kA",
            says,
            &CONDUCTANCE,
            (("k", k), ("A", area)),
            |(k, a)| conductance(k, a),
        )
    });
    (by_surface, cooler)
}

/// A value that is stated, not one that is unknown: what is for information only is no axis.
pub(super) fn known<Q>(
    stated: Option<&crate::model::Stated<Q>>,
) -> Option<&crate::model::Stated<Q>> {
    stated.filter(|s| matches!(s, crate::model::Stated::Known(..)))
}

/// Heat a surface gives off.
static CONDUCTANCE: Law = Law {
    name: "heat-conductance",
    title: "heat a surface gives off for every kelvin",
    formula: "kA = k A",
    range: "one temperature throughout the housing",
    source: "definition",
};

/// Adds the seals of a shaft: one lip, where the seals of the housing are known to be of rubber.
fn sealed<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    shaft: Known<Length>,
    speed: Known<AngularVelocity>,
    out: &mut Vec<Source>,
) {
    let lips = housed(cx) && cx.point.facts.seals.as_ref().is_some_and(has_lips);
    let Ok(power) = seal::loss(shaft.value, speed.value) else {
        return;
    };
    if lips {
        out.push(Source {
            kind: LossKind::Seal,
            part: part.label.clone(),
            with: With(vec![("d", shaft.step), ("n", speed.step)]),
            form: Form::Seal(power),
        });
    }
}

fn has_lips(seals: &std::collections::BTreeSet<Elastomer>) -> bool {
    seals.iter().any(|s| *s != Elastomer::Labyrinth)
}

impl Losses {
    /// The losses with an oil at a temperature, W; not a number where a film fails.
    pub fn at(&self, oil: &Curves, t: ThermodynamicTemperature) -> f64 {
        self.sources.iter().map(|s| s.power(oil, t)).sum()
    }

    /// The same by kind; only those there are.
    pub fn by_kind(&self, oil: &Curves, t: ThermodynamicTemperature) -> Vec<(LossKind, Power)> {
        LossKind::ALL
            .into_iter()
            .filter(|k| self.sources.iter().any(|s| s.kind == *k))
            .map(|kind| {
                let of = self.sources.iter().filter(|s| s.kind == kind);
                let sum = of.map(|s| s.power(oil, t)).sum();
                (kind, Power::from_base(sum))
            })
            .collect()
    }

    /// Temperature of the films that oil is fed to, by part.
    pub fn films(
        &self,
        oil: &Curves,
        t: ThermodynamicTemperature,
    ) -> Vec<(String, ThermodynamicTemperature)> {
        let of = |s: &Source| Some((s.part.clone(), s.film_at(oil, t)?));
        self.sources.iter().filter_map(of).collect()
    }

    /// Viscosity of the oil at a temperature, as the losses take it: new.
    fn nu(oil: &Curves, t: ThermodynamicTemperature) -> KinematicViscosity {
        oil.new.nu_at(t)
    }
}
