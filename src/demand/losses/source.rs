//! One thing that makes heat, and how much with an oil at a temperature.

use super::{LossKind, With};
use crate::oil::Curves;
use crate::quantity::convert::{dynamic, number};
use crate::quantity::{
    AngularVelocity, Length, Measure, Power, Ratio, ThermodynamicTemperature, Torque,
};
use crate::relation::Law;
use crate::relation::bearing::friction::{self, POWER as BEARING_POWER};
use crate::relation::gear::loss::churning::{self, Stirring};
use crate::relation::gear::loss::{self, mesh_friction};
use crate::relation::gear::temperature::{Friction, OilKind, oil_factor};
use crate::relation::gear::worm::LOSS as WORM_LOSS;
use crate::relation::heat::seal;
use crate::relation::journal::feed::{Coolant, Feed};
use crate::relation::journal::film::{Bearing, POWER as JOURNAL_POWER};
use crate::relation::journal::heat::{Cooling, settled};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::viscosity_temperature::ViscosityCurve;
use crate::relation::thrust::pad::{LAW as PAD_LAW, Pad};
use crate::relation::thrust::shape::Shape;

/// One thing that makes heat.
#[derive(Clone, Debug, PartialEq)]
pub struct Source {
    /// Its kind.
    pub kind: LossKind,
    /// The part.
    pub part: String,
    /// What went into it besides the oil.
    pub with: With,
    pub(super) form: Form,
}

#[derive(Clone, Debug, PartialEq)]
pub(super) enum Form {
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
    /// A worm loses by its sliding speed, the same with every mineral oil.
    Worm(Power),
}

/// The oil that reaches a journal bearing.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) enum Inlet {
    /// The film is as warm as the sump around it.
    Sump,
    /// Oil as warm as the sump is fed, and carries the heat.
    FedAsSump(Feed),
    /// Oil of this temperature is fed, and carries the heat.
    Fed(ThermodynamicTemperature, Feed),
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
        let (inlet, feed) = match self {
            Self::Sump => return bearing.film(eta(sump)).ok().map(|f| (sump, f.power)),
            Self::FedAsSump(feed) => (sump, feed),
            Self::Fed(t, feed) => (t, feed),
        };
        let cooling = Cooling::Oil {
            inlet,
            feed,
            coolant: Coolant::iso7902(),
        };
        let found = settled(bearing, &cooling, eta).ok()?;
        Some((found.t_effective, found.film.power))
    }
}

impl Source {
    /// Temperature of its film, where oil is fed to it.
    pub(super) fn film_at(
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
            Form::Worm(_) => &WORM_LOSS,
        }
    }

    /// Its loss with an oil at a temperature, W; not a number where there is no film.
    pub(super) fn power(&self, oil: &Curves, t: ThermodynamicTemperature) -> f64 {
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
            Form::Seal(power) | Form::Worm(power) => power.base(),
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
