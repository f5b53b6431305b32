//! Plain journal bearings: full bearings with a steady load, fed at the widest gap.
//!
//! [`table`] answers for the film, from the Reynolds equation solved in [`reynolds`]; [`iso7902`]
//! gives the closed forms of the standard as a second opinion. [`film`] and [`viscosity`] put
//! either to use, [`heat`] finds the temperature at which losses and cooling agree, [`limits`]
//! and [`transition`] say how thin the film may be.

pub mod characteristic;
pub mod feed;
pub mod film;
pub mod heat;
pub mod iso7902;
pub mod limits;
pub mod long;
pub mod petroff;
pub mod reynolds;
pub mod short;
pub mod table;
pub mod temperature_rise;
pub mod transition;
pub mod viscosity;
pub mod warming;

use crate::quantity::convert::{number, pascals};
use crate::quantity::{AngularVelocity, Area, Force, Length, Measure, Pressure, Ratio, Velocity};
use crate::relation::Law;

/// Load over the projected area.
pub static SPECIFIC_LOAD: Law = Law {
    name: "journal-specific-load",
    title: "specific load of a journal bearing",
    formula: "P = F/(D B)",
    range: "any journal bearing",
    source: "definition, ISO 7902-1",
};

/// Speed of the journal surface.
pub static SURFACE_SPEED: Law = Law {
    name: "journal-surface-speed",
    title: "speed of the surface of a journal",
    formula: "U = omega D/2",
    range: "any journal bearing",
    source: "definition",
};

/// Relative clearance.
pub static RELATIVE_CLEARANCE: Law = Law {
    name: "journal-relative-clearance",
    title: "relative clearance of a journal bearing",
    formula: "psi = c/(D/2), c the radial clearance",
    range: "any journal bearing",
    source: "definition, ISO 7902-1",
};

/// Which solution of the film stands behind a number.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Route {
    /// The Reynolds equation, solved and tabulated: width ratio to 2.
    Reynolds,
    /// The closed forms of ISO 7902-2: width ratio 0.25 to 1.
    Iso7902,
}

/// Sizes of a bearing, sound by construction.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Geometry {
    diameter: Length,
    width: Length,
    clearance: Length,
}

/// What a bearing is asked to do.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Duty {
    load: Force,
    speed: AngularVelocity,
}

/// Why no film can be stated.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum NoFilm {
    /// A size that cannot be.
    #[error("{what} must be above zero")]
    NotPositive {
        /// Which.
        what: &'static str,
    },
    /// A clearance that is no clearance.
    #[error(
        "the radial clearance {clearance_um:.0} um is not below the radius {radius_um:.0} um; \
         usual is 0.05 to 0.2 % of the diameter, half the difference of bore and shaft"
    )]
    ClearanceBeyondRadius {
        /// Radial clearance, micrometres.
        clearance_um: f64,
        /// Radius, micrometres.
        radius_um: f64,
    },
    /// The shaft stands.
    #[error("a standing shaft carries no hydrodynamic film; give the speed it turns at")]
    Standstill,
    /// No load.
    #[error("without a load the shaft runs in the middle and its film is the clearance")]
    NoLoad,
    /// Wider than the solution covers.
    #[error("width over diameter is {ratio:.2}; {route} covers {from} to {to}")]
    WidthRatio {
        /// Width over diameter.
        ratio: f64,
        /// The solution asked.
        route: &'static str,
        /// Least.
        from: f64,
        /// Most.
        to: f64,
    },
    /// The film is thinner than the solutions cover.
    #[error(
        "the film carries load number {most:.3} at eccentricity 0.97 and is asked for {so:.3}: \
         under 3 % of the clearance is left, which is no full film"
    )]
    TooThin {
        /// Load number asked for.
        so: f64,
        /// Load number at the largest eccentricity.
        most: f64,
    },
    /// A feed hole that is no hole in the width.
    #[error("a feed hole of {share:.2} of the width; it must lie above 0 and not above 0.5")]
    Hole {
        /// Diameter over width.
        share: f64,
    },
    /// A film target that no eccentricity meets.
    #[error(
        "a film of {film_um:.1} um is {which} of a radial clearance of {clearance_um:.1} um; \
         between 3 % and 100 % of it can be had"
    )]
    Target {
        /// The film asked for, micrometres.
        film_um: f64,
        /// "above" or "under 3 %".
        which: &'static str,
        /// Radial clearance, micrometres.
        clearance_um: f64,
    },
}

impl NoFilm {
    /// Kebab-case name for messages.
    pub fn name(&self) -> &'static str {
        match self {
            Self::NotPositive { .. } => "size-not-positive",
            Self::ClearanceBeyondRadius { .. } => "clearance-beyond-radius",
            Self::Standstill => "shaft-stands",
            Self::NoLoad => "load-zero",
            Self::WidthRatio { .. } => "width-ratio-out-of-range",
            Self::TooThin { .. } => "film-too-thin",
            Self::Hole { .. } => "feed-hole-out-of-range",
            Self::Target { .. } => "film-target-impossible",
        }
    }
}

impl Geometry {
    /// Checks the sizes; `clearance` is radial: half the difference of bore and shaft.
    ///
    /// # Errors
    /// A size not above zero, or a clearance not below the radius.
    pub fn new(diameter: Length, width: Length, clearance: Length) -> Result<Self, NoFilm> {
        let sizes = [
            (diameter, "the diameter"),
            (width, "the width"),
            (clearance, "the radial clearance"),
        ];
        for (size, what) in sizes {
            if size.base().is_nan() || size.base() <= 0.0 {
                return Err(NoFilm::NotPositive { what });
            }
        }
        let radius = diameter.base() / 2.0;
        if clearance.base() >= radius {
            return Err(NoFilm::ClearanceBeyondRadius {
                clearance_um: clearance.base() * 1e6,
                radius_um: radius * 1e6,
            });
        }
        Ok(Self {
            diameter,
            width,
            clearance,
        })
    }

    /// Diameter of the shaft.
    pub fn diameter(&self) -> Length {
        self.diameter
    }

    /// Width of the bearing.
    pub fn width(&self) -> Length {
        self.width
    }

    /// Radial clearance.
    pub fn clearance(&self) -> Length {
        self.clearance
    }

    /// Width over diameter, `B/D`.
    pub fn width_ratio(&self) -> Ratio {
        number(self.width.base() / self.diameter.base())
    }

    /// Relative clearance of [`RELATIVE_CLEARANCE`].
    pub fn relative_clearance(&self) -> Ratio {
        number(2.0 * self.clearance.base() / self.diameter.base())
    }

    /// Projected area, width times diameter.
    pub fn projected_area(&self) -> Area {
        Area::from_base(self.width.base() * self.diameter.base())
    }
}

impl Duty {
    /// Checks load and speed; the sense of turning does not matter.
    ///
    /// # Errors
    /// A standing shaft, or a load not above zero.
    pub fn new(load: Force, speed: AngularVelocity) -> Result<Self, NoFilm> {
        if speed.base().is_nan() || speed.base() <= 0.0 {
            return Err(NoFilm::Standstill);
        }
        if load.base().is_nan() || load.base() <= 0.0 {
            return Err(NoFilm::NoLoad);
        }
        Ok(Self { load, speed })
    }

    /// Radial load.
    pub fn load(&self) -> Force {
        self.load
    }

    /// Speed of the shaft.
    pub fn speed(&self) -> AngularVelocity {
        self.speed
    }

    /// Load over the projected area, [`SPECIFIC_LOAD`].
    pub fn specific_load(&self, geometry: &Geometry) -> Pressure {
        pascals(self.load.base() / geometry.projected_area().base())
    }

    /// Speed of the journal surface.
    pub fn surface_speed(&self, geometry: &Geometry) -> Velocity {
        crate::quantity::convert::surface_speed(self.speed, geometry.diameter)
    }
}
