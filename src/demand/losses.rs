//! What makes heat in a lubrication point: meshes, churning, bearings, seals. From it follow the
//! running temperature of each oil, and the drag by which oils differ.

mod bearing;
mod cooling;
mod gear;
mod settle;
mod source;
mod worm;

use super::context::Context;
use super::inputs::Wanted;
use crate::model::Stated;
use crate::model::facts::words::Elastomer;
use crate::model::part::{Part, PartKind};
use crate::oil::Curves;
use crate::quantity::{
    AngularVelocity, KinematicViscosity, Length, Measure, Power, ThermalConductance,
    ThermodynamicTemperature,
};
use crate::relation::heat::seal;
use crate::relation::oil::viscosity_temperature::ViscosityCurve;
use crate::trace::{Inputs, Known, Recorder, StepId};
pub use cooling::Reading;
use cooling::{cooling, housed, reading};
pub use settle::{Calibrated, Drag, SUM, Settled};
use source::Form;
pub use source::Source;

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

/// A share of the losses that is not in the sum.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Uncounted {
    /// The part.
    pub part: String,
    /// What of it: `friction under load`.
    pub share: &'static str,
    /// Why.
    pub because: &'static str,
}

impl Uncounted {
    /// As a clause: `rolling bearing 6312, friction under load: the load is not stated`.
    pub fn says(&self) -> String {
        format!("{}, {}: {}", self.part, self.share, self.because)
    }
}

/// What makes heat in a point, and what is known of its cooling.
#[derive(Clone, Debug, PartialEq)]
pub struct Losses {
    /// What makes heat.
    pub sources: Vec<Source>,
    /// Shares that are not in the sum. With one of them the sum foretells no temperature: it is
    /// information.
    pub uncounted: Vec<Uncounted>,
    /// The one reading with the oil in use, where the housing cools the oil.
    pub reading: Option<Reading>,
    /// Heat given off for every kelvin, from surface and heat transfer, where the surface is
    /// stated and every share is counted.
    pub by_surface: Option<Known<ThermalConductance>>,
    /// Heat taken by a cooler.
    pub cooler: Option<Known<Power>>,
}

/// What is missing for a share of a part.
struct Lack {
    share: &'static str,
    because: &'static str,
    /// The input that would mend it.
    wanted: Option<Wanted<'static>>,
}

impl Lack {
    fn new(share: &'static str, because: &'static str) -> Self {
        Self {
            share,
            because,
            wanted: None,
        }
    }

    fn of(share: &'static str, because: &'static str, wanted: Wanted<'static>) -> Self {
        Self {
            wanted: Some(wanted),
            ..Self::new(share, because)
        }
    }
}

/// The shares as they are found.
struct Tally {
    /// Whether losses are asked about: by a reading that calibrates them, or by the key. Then
    /// ranges and usual values stand in for what is not stated, and what is not counted is said.
    asked: bool,
    sources: Vec<Source>,
    lacks: Vec<(String, Lack)>,
}

impl Tally {
    /// What is stated, ranges only where losses are asked about: else they are no axis.
    fn known<'s, Q>(&self, stated: Option<&'s Stated<Q>>) -> Option<&'s Stated<Q>> {
        stated.filter(|s| match s {
            Stated::Known(..) => true,
            Stated::Range(..) => self.asked,
            Stated::Unknown(..) => false,
        })
    }

    fn lacks(&mut self, part: &Part, lack: Lack) {
        self.lacks.push((part.label.clone(), lack));
    }
}

/// Reads what makes heat. `None` where nothing does, or where a share is missing and nobody asked
/// about losses.
pub fn losses<R: Recorder>(cx: &mut Context<'_, '_, R>) -> Option<Losses> {
    if super::takes_grease(cx.point) {
        return None;
    }
    let reading = reading(cx);
    let stated = cx.point.losses.is_some();
    let mut tally = Tally {
        asked: stated || reading.is_some(),
        sources: Vec::new(),
        lacks: Vec::new(),
    };
    for part in &cx.point.parts {
        if let Err(lack) = of_part(cx, part, &mut tally) {
            tally.lacks(part, lack);
        }
    }
    let told = tally.asked && (stated || !tally.sources.is_empty());
    if told {
        tell_lacks(cx, &tally);
    }
    if tally.sources.is_empty() || !(tally.asked || tally.lacks.is_empty()) {
        return None;
    }
    let (by_surface, cooler) = cooling(cx);
    let complete = tally.lacks.is_empty();
    let uncounted = tally.lacks.into_iter().map(|(part, lack)| Uncounted {
        part,
        share: lack.share,
        because: lack.because,
    });
    Some(Losses {
        sources: tally.sources,
        uncounted: uncounted.collect(),
        reading,
        by_surface: by_surface.filter(|_| complete),
        cooler,
    })
}

/// Says what is not counted, and notes what would have to be known for it.
fn tell_lacks<R: Recorder>(cx: &mut Context<'_, '_, R>, tally: &Tally) {
    for (label, lack) in &tally.lacks {
        let Some(part) = cx.point.parts.iter().find(|p| p.label == *label) else {
            continue;
        };
        let says = format!(
            "not counted in the losses, {}: {}",
            lack.share, lack.because
        );
        cx.inform(part, says, None);
        if let Some(wanted) = lack.wanted {
            cx.missing(part, wanted, None);
        }
    }
}

fn of_part<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    out: &mut Tally,
) -> Result<(), Lack> {
    const ALL: &str = "all its losses";
    match &part.kind {
        PartKind::RollingBearing(b) => bearing::rolling(cx, part, b, out),
        PartKind::JournalBearing(b) => bearing::journal(cx, part, b, out),
        PartKind::ThrustBearing(b) => bearing::thrust(cx, part, b, out),
        PartKind::GearMesh(m) => gear::mesh(cx, part, m, out),
        PartKind::WormMesh(m) => worm::mesh(cx, part, m, out),
        // a window only speaks of the parts beside it
        PartKind::Component(_) if cx.point.parts.len() > 1 => Ok(()),
        PartKind::Component(_) => Err(Lack::new(
            ALL,
            "a practice window alone says nothing of losses",
        )),
        PartKind::OpenGear(_) => Err(Lack::new(ALL, "an open gear has no sump to warm")),
        PartKind::Contact(_) => Err(Lack::new(
            ALL,
            "a single contact is not known to be the only one",
        )),
        PartKind::Engine(_) => Err(Lack::new(ALL, "combustion rules the temperature")),
        PartKind::Axle(_) => Err(Lack::new(
            ALL,
            "an axle is given by its grade, without teeth or load",
        )),
    }
}

/// Adds the seals of a shaft: one lip, where the seals of the housing are known to be of rubber.
fn sealed<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    shaft: Known<Length>,
    speed: Known<AngularVelocity>,
    out: &mut Tally,
) {
    let lips = housed(cx) && cx.point.facts.seals.as_ref().is_some_and(has_lips);
    let Ok(power) = seal::loss(shaft.value, speed.value) else {
        return;
    };
    if lips {
        out.sources.push(Source {
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
    /// Whether every share is counted.
    pub fn complete(&self) -> bool {
        self.uncounted.is_empty()
    }

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
