//! The film at the hardest loaded element of a rolling bearing, at both races.
//!
//! Source: the kinematics of this room with the film formulas of Dowson (rollers, 1968) and of
//! Hamrock and Dowson (balls, 1977).

use super::kinematics::{Inside, Race};
use crate::quantity::{
    AngularVelocity, DynamicViscosity, Force, Length, LoadPerLength, Measure, Pressure,
    PressureViscosity, Ratio,
};
use crate::relation::Law;
use crate::relation::film::groups::{Groups, Inlet, LineLoad, PointLoad, of_ellipse, of_line};
use crate::relation::film::{ellipse, hertz, line};
use crate::relation::outside::{Outside, positive};

/// Film and pressure at one race.
pub static FILM: Law = Law {
    name: "bearing-film",
    title: "Minimum film at the hardest loaded element of a rolling bearing",
    formula: "rollers: h_min = Rx 2.65 G^0.54 U^0.7 W^-0.13; balls: h_min = Rx 3.63 U^0.68 G^0.49 W^-0.073 (1 - exp(-0.68 k))",
    range: "flooded, isothermal, pure rolling; load of the hardest loaded element",
    source: "Dowson 1968; Hamrock and Dowson 1977",
};

/// What rolls.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Element {
    /// Balls in a race of that conformity (race radius over ball diameter).
    Ball {
        /// Race radius over ball diameter.
        conformity: Ratio,
    },
    /// Rollers of that effective length.
    Roller {
        /// Length over which a roller carries.
        length: Length,
    },
}

/// Oil, speed, load and bodies of the contact looked at.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Duty {
    /// Dynamic viscosity at running temperature.
    pub eta: DynamicViscosity,
    /// Pressure-viscosity coefficient there.
    pub alpha: PressureViscosity,
    /// Speed of the rings against each other.
    pub speed: AngularVelocity,
    /// Load on the element.
    pub load: Force,
    /// Reduced modulus.
    pub modulus: Pressure,
}

/// The film at one race.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct RaceFilm {
    /// Minimum film.
    pub minimum: Length,
    /// Largest pressure.
    pub max_pressure: Pressure,
    /// Dimensionless groups.
    pub groups: Groups,
}

/// Film at one race.
///
/// # Errors
/// An input that is not above zero, or a geometry that does not exist.
pub fn at_race(
    inside: Inside,
    element: Element,
    duty: Duty,
    race: Race,
) -> Result<RaceFilm, Outside> {
    let inlet = Inlet {
        eta: duty.eta,
        alpha: duty.alpha,
        speed: inside.rolling_speed(duty.speed)?,
    };
    match element {
        Element::Ball { conformity } => {
            let contact = PointLoad {
                load: duty.load,
                radii: inside.ball_radii(race, conformity)?,
                modulus: duty.modulus,
            };
            let groups = of_ellipse(inlet, contact)?;
            let k = ellipse::ellipticity(contact.radii)?;
            let pressed = hertz::ellipse(duty.load, contact.radii, duty.modulus)?;
            Ok(RaceFilm {
                minimum: ellipse::minimum(groups, k, contact.radii.x),
                max_pressure: pressed.max_pressure,
                groups,
            })
        }
        Element::Roller { length } => {
            let per_length = duty.load.base() / positive("the element length", length)?;
            let contact = LineLoad {
                load: LoadPerLength::from_base(per_length),
                radius: inside.rolling_radius(race)?,
                modulus: duty.modulus,
            };
            let groups = of_line(inlet, contact)?;
            let pressed = hertz::line(contact.load, contact.radius, contact.modulus)?;
            Ok(RaceFilm {
                minimum: line::minimum_1968(groups, contact.radius),
                max_pressure: pressed.max_pressure,
                groups,
            })
        }
    }
}
