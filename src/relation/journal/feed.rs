//! Oil that the feed pushes through a journal bearing, and the heat oil carries.

use super::{Geometry, NoFilm};
use crate::numeric::math::ln;
use crate::quantity::{
    DynamicViscosity, Length, MassDensity, Measure, Pressure, Ratio, SpecificHeatCapacity,
    VolumeRate,
};
use crate::relation::Law;
use std::f64::consts::PI;

/// Flow through a feed hole.
pub static LAW: Law = Law {
    name: "journal-feed-hole",
    title: "oil pushed through a journal bearing by the feed pressure",
    formula: "Q_p = D^3 psi^3 p_en/eta pi (1 + e)^3/(48 ln(B/d_H) q_H), \
              q_H = 1.204 + 0.368 x - 1.046 x^2 + 1.942 x^3, x = d_H/B",
    range: "one hole opposite the load, diameter below half the width",
    source: "ISO 7902-1 and -2 (from memory; the factor pi/48 follows from radial flow in a slot)",
};

/// How oil gets in besides being drawn in by the shaft.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Feed {
    /// Only what the film draws in and loses at its edges.
    Drawn,
    /// A known flow besides.
    Besides(VolumeRate),
    /// One hole opposite the load.
    Hole {
        /// Feed pressure over that at the edges.
        pressure: Pressure,
        /// Diameter of the hole.
        diameter: Length,
    },
}

/// What carries heat away.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Coolant {
    /// Density.
    pub density: MassDensity,
    /// Specific heat.
    pub specific_heat: SpecificHeatCapacity,
}

impl Coolant {
    /// The oil of ISO 7902-1: 1.8 MJ/(m3 K), as 900 kg/m3 and 2000 J/(kg K).
    pub fn iso7902() -> Self {
        Self {
            density: MassDensity::from_base(900.0),
            specific_heat: SpecificHeatCapacity::from_base(2000.0),
        }
    }

    /// J/(m3 K).
    pub(super) fn heat_per_volume(self) -> f64 {
        self.density.base() * self.specific_heat.base()
    }
}

impl Feed {
    /// A hole opposite the load.
    ///
    /// # Errors
    /// A pressure not above zero, or a hole not between zero and half the width.
    pub fn hole(geometry: &Geometry, pressure: Pressure, hole: Length) -> Result<Self, NoFilm> {
        if pressure.base().is_nan() || pressure.base() <= 0.0 {
            let what = "the feed pressure";
            return Err(NoFilm::NotPositive { what });
        }
        let share = hole.base() / geometry.width().base();
        if !(share > 0.0 && share <= 0.5) {
            return Err(NoFilm::Hole { share });
        }
        Ok(Self::Hole {
            pressure,
            diameter: hole,
        })
    }

    /// Flow besides the side flow, at a viscosity and eccentricity.
    pub fn flow(
        &self,
        geometry: &Geometry,
        eta: DynamicViscosity,
        eccentricity: Ratio,
    ) -> VolumeRate {
        match *self {
            Self::Drawn => VolumeRate::from_base(0.0),
            Self::Besides(flow) => flow,
            Self::Hole { pressure, diameter } => {
                let x = diameter.base() / geometry.width().base();
                let hole = 1.204 + x * (0.368 + x * (-1.046 + x * 1.942));
                let gap = geometry.relative_clearance().base()
                    * geometry.diameter().base()
                    * (1.0 + eccentricity.base());
                let flow = PI / 48.0 * gap * gap * gap * pressure.base()
                    / (eta.base() * ln(1.0 / x) * hole);
                VolumeRate::from_base(flow)
            }
        }
    }
}
