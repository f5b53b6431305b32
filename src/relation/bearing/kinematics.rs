//! Speeds, radii and load inside a rolling bearing.
//!
//! Source: Hamrock, *Fundamentals of Fluid Film Lubrication*; Harris, *Rolling Bearing Analysis*.
//! The rolling speed agrees with the cylindrical roller example of NASA RP-1126 (10.061 m/s).

use crate::numeric::math::cos;
use crate::quantity::{Angle, AngularVelocity, Force, Length, Measure, Ratio, Velocity};
use crate::relation::Law;
use crate::relation::film::body::Radii;
use crate::relation::outside::{Outside, positive, within};

/// Rolling speed in the contacts.
pub static ROLLING_SPEED: Law = Law {
    name: "bearing-rolling-speed",
    title: "Mean rolling speed in both contacts of a rolling bearing",
    formula: "u = dm (1 - gamma^2) omega / 4; gamma = Dw cos(a) / dm",
    range: "pure rolling; omega the speed of the rings against each other",
    source: "Hamrock, Fundamentals of Fluid Film Lubrication; Harris, Rolling Bearing Analysis",
};

/// Reduced radii.
pub static RADII: Law = Law {
    name: "bearing-radii",
    title: "Reduced radii in the contacts of a rolling bearing",
    formula: "Rx = Dw (1 - gamma) / 2 (inner) or Dw (1 + gamma) / 2 (outer); Ry = f Dw / (2 f - 1)",
    range: "f race radius over ball diameter, above 0.5; rollers have no Ry",
    source: "Hamrock, Fundamentals of Fluid Film Lubrication",
};

/// Load on the hardest loaded element.
pub static ELEMENT_LOAD: Law = Law {
    name: "bearing-element-load",
    title: "Load on the hardest loaded element of a radial bearing",
    formula: "Q = s Fr / (Z cos(a))",
    range: "s 5 with usual clearance; 4.37 (ball) or 4.08 (roller) without",
    source: "Stribeck 1901; Harris, Rolling Bearing Analysis",
};

/// What the inside of a bearing looks like.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Inside {
    /// Pitch diameter.
    pub pitch_diameter: Length,
    /// Diameter of a ball or roller.
    pub element_diameter: Length,
    /// Contact angle.
    pub contact_angle: Angle,
}

/// Which race.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Race {
    /// The inner ring's.
    Inner,
    /// The outer ring's.
    Outer,
}

impl Inside {
    /// `gamma = Dw cos(a) / dm`.
    ///
    /// # Errors
    /// A diameter that is not above zero, or elements that do not fit on the pitch circle.
    pub fn gamma(self) -> Result<Ratio, Outside> {
        let dm = positive("the pitch diameter", self.pitch_diameter)?;
        let dw = positive("the element diameter", self.element_diameter)?;
        let gamma = dw * cos(self.contact_angle.base()) / dm;
        let needs = "elements are smaller than the pitch circle";
        within(
            "element diameter over pitch diameter",
            Ratio::from_base(gamma),
            (0.0, 0.999_999),
            needs,
        )
        .map(Ratio::from_base)
    }

    /// Mean rolling speed at both races, for a speed of the rings against each other.
    ///
    /// # Errors
    /// As [`Inside::gamma`].
    pub fn rolling_speed(self, speed: AngularVelocity) -> Result<Velocity, Outside> {
        let gamma = self.gamma()?.base();
        let dm = self.pitch_diameter.base();
        Ok(Velocity::from_base(
            dm * (1.0 - gamma * gamma) * speed.base().abs() / 4.0,
        ))
    }

    /// Reduced radius in the rolling direction.
    ///
    /// # Errors
    /// As [`Inside::gamma`].
    pub fn rolling_radius(self, race: Race) -> Result<Length, Outside> {
        let gamma = self.gamma()?.base();
        let side = match race {
            Race::Inner => 1.0 - gamma,
            Race::Outer => 1.0 + gamma,
        };
        Ok(Length::from_base(self.element_diameter.base() * side / 2.0))
    }

    /// Reduced radii of a ball in a race of that conformity (race radius over ball diameter).
    ///
    /// # Errors
    /// As [`Inside::gamma`], or a race as tight as the ball.
    pub fn ball_radii(self, race: Race, conformity: Ratio) -> Result<Radii, Outside> {
        let f = conformity.base();
        if f.is_nan() || f <= 0.5 {
            return Err(Outside::Range {
                what: "race radius over ball diameter",
                value: f,
                needs: "a race is wider than its ball, above 0.5",
            });
        }
        let dw = self.element_diameter.base();
        Ok(Radii {
            x: self.rolling_radius(race)?,
            y: Length::from_base(f * dw / (2.0 * f - 1.0)),
        })
    }
}

/// How the radial load spreads over the elements.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Clearance {
    /// The usual radial clearance.
    Usual,
    /// No clearance, balls.
    NoneBall,
    /// No clearance, rollers.
    NoneRoller,
}

/// Load on the hardest loaded element of a row.
///
/// # Errors
/// A load or a number of elements that is not above zero, or a contact angle of a right angle.
pub fn element_load(
    radial: Force,
    elements: Ratio,
    contact_angle: Angle,
    clearance: Clearance,
) -> Result<Force, Outside> {
    let f = positive("the radial load", radial)?;
    let z = positive("the number of elements", elements)?;
    let share = positive(
        "the cosine of the contact angle",
        Ratio::from_base(cos(contact_angle.base())),
    )?;
    let s = match clearance {
        Clearance::Usual => 5.0,
        Clearance::NoneBall => 4.37,
        Clearance::NoneRoller => 4.08,
    };
    Ok(Force::from_base(s * f / (z * share)))
}
