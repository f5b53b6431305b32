//! The temperature at which a journal bearing settles.
//!
//! Either oil carries the heat away (pressure feed, circulation) or the housing gives it to the
//! air (ring, bath). In both the film is worked out at the effective temperature, and the balance
//! has one root, since losses fall and cooling rises with temperature.

use super::NoFilm;
use super::feed::{Coolant, Feed};
use super::film::{Bearing, Film};
use crate::numeric::math::ln;
use crate::numeric::root::bracketed;
use crate::quantity::convert::{celsius, to_celsius};
use crate::quantity::{
    Area, DynamicViscosity, HeatTransfer, Measure, Power, ThermodynamicTemperature, VolumeRate,
};
use crate::relation::Law;
use crate::relation::heat::balance::{self, NoBalance, Surroundings};

/// The balance as a whole, as `work` states it.
pub static LAW: Law = Law {
    name: "journal-heat",
    title: "effective temperature of a journal bearing from losses and cooling",
    formula: "oil: T_ex = T_in + P_f/(rho c_p (Q3 + Qp)), T_eff = (T_in + T_ex)/2; \
              air: T_eff = T_amb + P_f/(k A)",
    range: "steady running, laminar film with one viscosity; film not under 3 % of the clearance",
    source: "ISO 7902-1 for the balance, its rho c_p of 1.8 MJ/(m3 K) and its k of 15 to 20 \
             W/(m2 K) (from memory)",
};

/// What takes the heat away.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Cooling {
    /// The oil that flows through.
    Oil {
        /// Temperature at which it is fed.
        inlet: ThermodynamicTemperature,
        /// How it is fed.
        feed: Feed,
        /// What it carries.
        coolant: Coolant,
    },
    /// The air around the housing.
    Air {
        /// Its temperature.
        ambient: ThermodynamicTemperature,
        /// Surface that gives heat off.
        area: Area,
        /// Heat transfer coefficient.
        transfer: HeatTransfer,
    },
}

/// A settled bearing.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Settled {
    /// Effective temperature of the film.
    pub t_effective: ThermodynamicTemperature,
    /// Viscosity there.
    pub eta: DynamicViscosity,
    /// The film there.
    pub film: Film,
    /// Temperature at which the oil leaves, and its flow, where oil carries the heat.
    pub outlet: Option<(ThermodynamicTemperature, VolumeRate)>,
    /// Heat removed less heat made, W: what rounding leaves.
    pub unbalanced: Power,
}

/// Why a bearing does not settle.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum NoSettling {
    /// The film fails before it gets warm.
    #[error("already at {start:.0} degC: {film}")]
    Cold {
        /// Temperature of the oil fed or of the air, degC.
        start: f64,
        /// What fails.
        film: NoFilm,
    },
    /// The film thins out before cooling catches up.
    #[error("{balance}; hotter, under 3 % of the clearance would be left")]
    Thins {
        /// What is missing.
        balance: NoBalance,
    },
    /// Cooling does not catch up below the hottest temperature looked at.
    #[error(transparent)]
    Hot(#[from] NoBalance),
}

impl NoSettling {
    /// Kebab-case name for messages.
    pub fn name(&self) -> &'static str {
        match self {
            Self::Cold { film, .. } => film.name(),
            Self::Thins { .. } => "film-too-thin",
            Self::Hot(balance) => balance.name(),
        }
    }
}

/// Hottest film looked at, degC.
const HOTTEST: f64 = 250.0;

/// Usual surface of a pedestal, 15 to 20 times the projected area; the lower end.
/// Common practice.
pub fn pedestal_area(projected: Area) -> Area {
    Area::from_base(15.0 * projected.base())
}

/// Lower end of the usual heat transfer in still air, ISO 7902-1 (from memory).
pub fn still_air() -> HeatTransfer {
    HeatTransfer::from_base(15.0)
}

/// The balance of [`LAW`]; `eta` gives the viscosity at a temperature and must fall with it.
///
/// # Errors
/// [`NoSettling`] where the film is too thin, or cooling too weak, at every temperature.
pub fn settled(
    bearing: &Bearing,
    cooling: &Cooling,
    eta: impl Fn(ThermodynamicTemperature) -> DynamicViscosity,
) -> Result<Settled, NoSettling> {
    let start = match cooling {
        Cooling::Oil { inlet, .. } => *inlet,
        Cooling::Air { ambient, .. } => *ambient,
    };
    let (hottest, thins) = hottest(bearing, start, &eta)?;
    let found = match cooling {
        Cooling::Oil { feed, coolant, .. } => {
            by_oil(bearing, (start, hottest), feed, *coolant, &eta)
        }
        Cooling::Air { area, transfer, .. } => {
            let surroundings = Surroundings {
                ambient: start,
                conductance: balance::conductance(*transfer, *area),
                hottest,
            };
            balance::settled(&surroundings, |t| losses(bearing, eta(t)))
        }
    };
    let t_effective = found.map_err(|balance| match (thins, balance) {
        (true, NoBalance::TooHot { .. }) => NoSettling::Thins { balance },
        _ => NoSettling::Hot(balance),
    })?;
    let eta = eta(t_effective);
    let film = bearing.film(eta).map_err(|film| NoSettling::Cold {
        start: to_celsius(start),
        film,
    })?;
    Ok(stated(bearing, cooling, t_effective, eta, film))
}

/// Losses at a viscosity; not a number where there is no film.
fn losses(bearing: &Bearing, eta: DynamicViscosity) -> Power {
    let film = bearing.film(eta);
    Power::from_base(film.map_or(f64::NAN, |f| f.power.base()))
}

/// The hottest temperature with a full film, and whether the film is what ends it.
fn hottest(
    bearing: &Bearing,
    start: ThermodynamicTemperature,
    eta: &impl Fn(ThermodynamicTemperature) -> DynamicViscosity,
) -> Result<(ThermodynamicTemperature, bool), NoSettling> {
    let cold = |film| NoSettling::Cold {
        start: to_celsius(start),
        film,
    };
    bearing.film(eta(start)).map_err(cold)?;
    let most = bearing.most().base();
    let left = |t: f64| {
        let so = bearing.load_number(eta(ThermodynamicTemperature::from_base(t)));
        ln(so.base() / most)
    };
    let end = celsius(HOTTEST).base();
    if left(end) <= 0.0 {
        return Ok((celsius(HOTTEST), false));
    }
    // a millionth of a kelvin on the safe side of the last film
    let last = bracketed(start.base(), end, left).map_or(start.base(), |root| root.at - 1e-6);
    let hottest = ThermodynamicTemperature::from_base(last.max(start.base()));
    Ok((hottest, true))
}

/// Effective temperature where the oil carries the heat away.
fn by_oil(
    bearing: &Bearing,
    (inlet, hottest): (ThermodynamicTemperature, ThermodynamicTemperature),
    feed: &Feed,
    coolant: Coolant,
    eta: &impl Fn(ThermodynamicTemperature) -> DynamicViscosity,
) -> Result<ThermodynamicTemperature, NoBalance> {
    // heat removed less heat made; the oil leaves twice as far above the inlet as the film is
    let sides = |t: f64| {
        let eta = eta(ThermodynamicTemperature::from_base(t));
        let Ok(film) = bearing.film(eta) else {
            return (f64::NAN, f64::NAN);
        };
        let flow = through(bearing, feed, eta, &film).base();
        let removed = coolant.heat_per_volume() * flow * 2.0 * (t - inlet.base());
        (removed, film.power.base())
    };
    let left = |t: f64| {
        let (removed, made) = sides(t);
        removed - made
    };
    if hottest.base() <= inlet.base() {
        return Err(NoBalance::Surroundings {
            ambient: to_celsius(inlet),
            hottest: to_celsius(hottest),
        });
    }
    let root = bracketed(inlet.base(), hottest.base(), left).map_err(|_| {
        let (removed, losses) = sides(hottest.base());
        NoBalance::TooHot {
            hottest: to_celsius(hottest),
            losses,
            removed,
        }
    })?;
    Ok(ThermodynamicTemperature::from_base(root.at))
}

/// Oil that passes the bearing: side flow and what the feed adds.
fn through(bearing: &Bearing, feed: &Feed, eta: DynamicViscosity, film: &Film) -> VolumeRate {
    let besides = feed.flow(bearing.geometry(), eta, film.eccentricity);
    VolumeRate::from_base(film.side_flow.base() + besides.base())
}

fn stated(
    bearing: &Bearing,
    cooling: &Cooling,
    t_effective: ThermodynamicTemperature,
    eta: DynamicViscosity,
    film: Film,
) -> Settled {
    let (outlet, removed) = match cooling {
        Cooling::Oil {
            inlet,
            feed,
            coolant,
        } => {
            let flow = through(bearing, feed, eta, &film);
            let warming = 2.0 * (t_effective.base() - inlet.base());
            let outlet = ThermodynamicTemperature::from_base(inlet.base() + warming);
            let removed = coolant.heat_per_volume() * flow.base() * warming;
            (Some((outlet, flow)), removed)
        }
        Cooling::Air {
            ambient,
            area,
            transfer,
        } => {
            let ka = balance::conductance(*transfer, *area).base();
            (None, ka * (t_effective.base() - ambient.base()))
        }
    };
    Settled {
        t_effective,
        eta,
        film,
        outlet,
        unbalanced: Power::from_base(removed - film.power.base()),
    }
}
