//! The temperature a candidate runs at by its own losses: a thicker oil runs hotter than the one
//! the reading was taken with. Floors take the warmer of the two.

use super::margin::Jaw;
use super::prepared::{PreparedOil, PreparedPoint, ReadyDemand, ReadyLimit, Setting};
use crate::demand::losses::{Calibrated, Drag, Losses, Settled, Uncounted};
use crate::demand::{AtAmbient, Demands, End};
use crate::oil::Curves;
use crate::quantity::{KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::relation::heat::balance::NoBalance;
use crate::trace::{Known, Recorder, StepId};
use std::borrow::Cow;

/// Losses of a point, calibrated on the reading with the oil in use.
#[derive(Clone, Debug)]
pub struct Own {
    losses: Losses,
    calibrated: Calibrated,
    /// Coldest and hottest ambient.
    ambient: (ThermodynamicTemperature, ThermodynamicTemperature),
    /// The sump as read, carried to every ambient.
    read: AtAmbient,
}

/// How a candidate's temperature came about.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Moved {
    /// By the reading at the hottest ambient, K.
    pub read: f64,
    /// By its losses there, K.
    pub losses: f64,
}

impl Own {
    /// Of one setting of a point's unknowns. `None` without a reading, an ambient or a balance.
    pub fn of(demands: &Demands, in_use: &Curves) -> Option<Self> {
        let losses = demands.losses.as_ref()?;
        let calibrated = losses.calibrate(in_use).ok().flatten()?;
        let (cold, hot) = demands.thermal.ambient?;
        Some(Self {
            losses: losses.clone(),
            calibrated,
            ambient: (cold.value, hot.value),
            read: demands.thermal.running?,
        })
    }

    /// The cooling.
    pub fn calibrated(&self) -> Calibrated {
        self.calibrated
    }

    fn settle(&self, oil: &Curves, ambient: ThermodynamicTemperature) -> Result<f64, NoBalance> {
        let settled = self
            .losses
            .settle(oil, self.calibrated.conductance, ambient)?;
        Ok(settled.t.base())
    }

    /// Temperatures of an oil at the hottest ambient.
    ///
    /// # Errors
    /// Losses that its housing cannot give off.
    pub fn temperatures(&self, oil: &Curves) -> Result<Moved, NoBalance> {
        let (_, hot) = self.ambient;
        Ok(Moved {
            read: self.read.at(hot.base()),
            losses: self.settle(oil, hot)?,
        })
    }

    /// A setting with its hot floors at the temperature of this oil; `None` where the reading is
    /// the warmer, or no balance is found.
    fn moved(&self, setting: &Setting, oil: &Curves) -> Option<Setting> {
        let moved = self.temperatures(oil).ok()?;
        if moved.losses <= moved.read {
            return None;
        }
        let at = self.at_every_ambient(oil, moved);
        let mut setting = setting.clone();
        for demand in &mut setting.demands {
            let follows = demand.end == End::HotFloor && demand.at.slope != 0.0;
            if follows {
                shift(demand, moved, (self.read, at));
            }
        }
        setting.own = None;
        Some(setting)
    }

    /// Straight between the coldest and the hottest ambient: a thick oil rises more when it is
    /// cold, so that the line is flatter than that of a constant rise.
    fn at_every_ambient(&self, oil: &Curves, moved: Moved) -> AtAmbient {
        let (cold, hot) = (self.ambient.0.base(), self.ambient.1.base());
        let constant = self.read.raised(moved.losses - moved.read);
        if hot - cold < 1e-6 {
            return constant;
        }
        let Ok(t_cold) = self.settle(oil, self.ambient.0) else {
            return constant;
        };
        let slope = (moved.losses - t_cold) / (hot - cold);
        AtAmbient {
            slope,
            offset: moved.losses - slope * hot,
            ..constant
        }
    }
}

/// A demand moved from the temperature by the reading to that by the losses.
fn shift(demand: &mut ReadyDemand, moved: Moved, (read, at): (AtAmbient, AtAmbient)) {
    let before = demand.t;
    demand.t = before + (moved.losses - moved.read);
    demand.at = AtAmbient {
        slope: demand.at.slope + (at.slope - read.slope),
        offset: demand.at.offset + (at.offset - read.offset),
        least: demand.at.least,
    };
    demand.moved = Some(Shift { before, by: moved });
    if let ReadyLimit::Jaw(jaw) = &demand.limit {
        let nu = KinematicViscosity::from_base(jaw.nu);
        demand.limit = ReadyLimit::Jaw(Jaw::new(nu, ThermodynamicTemperature::from_base(demand.t)));
    }
}

/// What moved a demand, for the steps.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Shift {
    /// Its temperature before, K.
    pub before: f64,
    /// By what.
    pub by: Moved,
}

impl PreparedPoint {
    /// Lets candidates run at the temperature of their own losses, calibrated on the reading with
    /// the oil in use.
    pub fn run_by_losses(&mut self, settings: &[Demands], in_use: &Curves) {
        for (setting, demands) in self.settings.iter_mut().zip(settings) {
            setting.own = Own::of(demands, in_use).map(Box::new);
        }
    }

    /// The point as one oil meets it: floors at the temperature of its losses where that is the
    /// warmer.
    pub fn for_oil(&self, oil: &PreparedOil) -> Cow<'_, Self> {
        if self.settings.iter().all(|s| s.own.is_none()) {
            return Cow::Borrowed(self);
        }
        let mut point = self.clone();
        for setting in &mut point.settings {
            let moved = setting
                .own
                .as_ref()
                .and_then(|own| own.moved(setting, &oil.curves));
            match moved {
                Some(moved) => *setting = moved,
                None => setting.own = None,
            }
        }
        Cow::Owned(point)
    }
}

/// The running temperature of an oil, and what it costs.
#[derive(Clone, Debug, PartialEq)]
pub struct Running {
    /// Sump by the reading, or as stated, at the hottest ambient, K.
    pub stated: Option<f64>,
    /// By its losses at the hottest ambient, K.
    pub by_losses: Option<f64>,
    /// Whether the losses are calibrated on a reading: otherwise for information only.
    pub calibrated: bool,
    /// Shares of the losses that are not in the sum: with one of them it is for information only.
    pub uncounted: Vec<Uncounted>,
    /// What it costs in the middle of the ambient range.
    pub drag: Drag,
    /// Energy a year, kWh, where the running hours are stated.
    pub energy_kwh: Option<f64>,
    /// Drag over that of the oil in use, W.
    pub over_in_use: Option<f64>,
}

impl Running {
    /// What the losses stand on, and what is not among them, as sentences.
    pub fn stands_on(&self, ambient: &str) -> String {
        let says = if self.calibrated {
            "Running temperature at the hottest ambient by losses, calibrated on the reading with \
             the oil in use; floors take the warmer."
        } else if self.uncounted.is_empty() {
            "Losses for information: no reading of the sump with the oil in use to calibrate them \
             on."
        } else {
            "Losses for information: a part of them is not known, so that they foretell no \
             temperature."
        };
        let mut text = format!("{says} Drag at {ambient} ambient.");
        if !self.uncounted.is_empty() {
            let all: Vec<String> = self.uncounted.iter().map(Uncounted::says).collect();
            text.push_str(" Not counted: ");
            text.push_str(&all.join("; "));
            text.push('.');
        }
        text
    }

    /// With what it costs over the oil in use.
    #[must_use]
    pub fn over(mut self, in_use: Option<&Self>) -> Self {
        let mine = self.drag.total.base();
        self.over_in_use = in_use.map(|now| mine - now.drag.total.base());
        self
    }

    /// The temperature floors are judged at, K.
    pub fn used(&self) -> Option<f64> {
        match (self.stated, self.by_losses) {
            (Some(stated), Some(losses)) if self.calibrated => Some(stated.max(losses)),
            (stated, _) => stated,
        }
    }
}

/// Works out how an oil runs at a point. `None` where its losses are not known.
pub fn running(
    demands: &Demands,
    own: Option<&Own>,
    oil: &Curves,
    hours_a_year: Option<f64>,
) -> Option<Running> {
    let losses = demands.losses.as_ref()?;
    let conductance = own
        .map(|own| own.calibrated().conductance)
        .or(losses.by_surface.map(|k| k.value));
    let stated = demands.thermal.hottest.map(|k| k.value.base());
    let settle = |ambient: ThermodynamicTemperature| {
        conductance.and_then(|k| losses.settle(oil, k, ambient).ok())
    };
    let ends = demands.thermal.ambient.map(|(c, h)| (c.value, h.value));
    let by_losses = ends.and_then(|(_, hot)| settle(hot)).map(|s| s.t.base());
    let middle =
        ends.map(|(c, h)| ThermodynamicTemperature::from_base(f64::midpoint(c.base(), h.base())));
    let as_stated = |ambient: ThermodynamicTemperature| {
        demands.thermal.running.map(|at| Settled {
            ambient,
            t: ThermodynamicTemperature::from_base(at.at(ambient.base())),
        })
    };
    let at = middle.and_then(|m| settle(m).or_else(|| as_stated(m)))?;
    let drag = losses.drag(oil, at);
    if !drag.total.base().is_finite() {
        return None;
    }
    Some(Running {
        stated,
        by_losses,
        calibrated: own.is_some(),
        uncounted: losses.uncounted.clone(),
        over_in_use: None,
        energy_kwh: hours_a_year.map(|h| drag.total.base() * h / 1000.0),
        drag,
    })
}

/// What the steps of a candidate's own temperature are told from.
pub struct OwnSteps<'a> {
    /// The demands whose steps stand in the record.
    pub demands: &'a Demands,
    /// The oil in use, with which the reading was taken.
    pub in_use: Option<&'a Curves>,
}

/// Both temperatures of a candidate at the hottest ambient, with their steps.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct OwnTemperatures {
    /// By the reading.
    pub by_reading: Known<ThermodynamicTemperature>,
    /// By its losses.
    pub by_losses: Known<ThermodynamicTemperature>,
}

/// What was told of how a candidate runs.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Told {
    /// Both temperatures, where the losses are calibrated.
    pub temperatures: Option<OwnTemperatures>,
    /// The steps of what is shown: temperature by losses, losses together.
    pub shown: Vec<StepId>,
}

impl OwnSteps<'_> {
    /// Tells the losses of the oil in use at the reading, the cooling that follows, the
    /// temperature this oil settles at in the hottest ambient, and what it costs in the middle.
    pub fn tell<R: Recorder>(&self, r: &mut R, oil: &Curves) -> Told {
        self.told(r, oil).unwrap_or_default()
    }

    fn told<R: Recorder>(&self, r: &mut R, oil: &Curves) -> Option<Told> {
        let losses = self.demands.losses.as_ref()?;
        let (cold, hot) = self.demands.thermal.ambient?;
        let own = self.in_use.and_then(|oil| Own::of(self.demands, oil));
        let cooling = match (&own, self.in_use) {
            (Some(own), Some(in_use)) => losses.tell_cooling(r, in_use, own.calibrated()),
            _ => losses.by_surface,
        };
        let mut told = Told::default();
        let middle =
            ThermodynamicTemperature::from_base(f64::midpoint(cold.value.base(), hot.value.base()));
        let says = "middle of the ambient range";
        let middle = r.assume("t_amb", says, middle, "for what oils cost over a year");
        let settle = |ambient: ThermodynamicTemperature| {
            let settled = losses.settle(oil, cooling?.value, ambient);
            settled.ok().map(|s| s.t)
        };
        if let (Some(cooling), Some(t)) = (cooling, settle(hot.value)) {
            let by_losses = losses.tell_settled(r, cooling, hot, t);
            told.shown.push(by_losses.step);
            told.temperatures =
                own.and(self.demands.thermal.hottest)
                    .map(|by_reading| OwnTemperatures {
                        by_reading,
                        by_losses,
                    });
        }
        let there = match (cooling, settle(middle.value)) {
            (Some(cooling), Some(t)) => losses.tell_settled(r, cooling, middle, t),
            _ => {
                let at = self.demands.thermal.running?.at(middle.value.base());
                let t = ThermodynamicTemperature::from_base(at);
                let says = "running temperature in the middle of the ambient range";
                r.assume("t", says, t, "as stated for the sump")
            }
        };
        told.shown.push(losses.tell(r, oil, there).step);
        Some(told)
    }
}
