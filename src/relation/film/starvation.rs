//! What is left of a film when the oil meniscus stands too close to the contact.
//!
//! Source: Hamrock and Dowson 1977, part IV (from memory).

use crate::numeric::math::pow;
use crate::quantity::{Length, Measure, Ratio};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// The distance that floods the contact.
pub static FLOODED: Law = Law {
    name: "film-flooded-distance",
    title: "Inlet distance that floods an elliptical contact",
    formula: "m_c = 1 + 3.06 ((Rx / b)^2 H_c)^0.58; m_min = 1 + 3.34 ((Rx / b)^2 H_min)^0.56",
    range: "b the semi-axis in the rolling direction, H the flooded film over Rx",
    source: "Hamrock and Dowson 1977, part IV (from memory)",
};

/// The starved film.
pub static STARVED: Law = Law {
    name: "film-starved",
    title: "Film of a starved elliptical contact",
    formula: "h_c = h_c0 ((m - 1) / (m_c - 1))^0.29; h_min = h_min0 ((m - 1) / (m_min - 1))^0.25",
    range: "inlet distance m, in semi-axes from the centre, above 1 and below the flooded distance",
    source: "Hamrock and Dowson 1977, part IV (from memory)",
};

/// Central and minimum film together.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Films {
    /// In the centre.
    pub central: Length,
    /// At the thinnest place.
    pub minimum: Length,
}

/// Inlet distances, in semi-axes from the centre, from which on the contact counts as flooded.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct FloodedDistance {
    /// For the central film.
    pub central: Ratio,
    /// For the minimum film.
    pub minimum: Ratio,
}

/// Distances that flood a contact of semi-axis `b` in the rolling direction.
///
/// # Errors
/// A length that is not above zero.
pub fn flooded_distance(films: Films, rx: Length, b: Length) -> Result<FloodedDistance, Outside> {
    let r = positive("the reduced radius in the rolling direction", rx)?;
    let b = positive("the semi-axis in the rolling direction", b)?;
    let scale = (r / b) * (r / b);
    let h_c = positive("the central film", films.central)? / r;
    let h_min = positive("the minimum film", films.minimum)? / r;
    Ok(FloodedDistance {
        central: Ratio::from_base(1.0 + 3.06 * pow(scale * h_c, 0.58)),
        minimum: Ratio::from_base(1.0 + 3.34 * pow(scale * h_min, 0.56)),
    })
}

/// Films left when the meniscus stands `m` semi-axes before the centre; a flooded contact keeps
/// its film.
///
/// # Errors
/// A meniscus inside the contact.
pub fn starved(flooded: Films, distance: FloodedDistance, m: Ratio) -> Result<Films, Outside> {
    let m = m.base();
    if m <= 1.0 {
        return Err(Outside::Range {
            what: "the inlet distance",
            value: m,
            needs: "the meniscus stands before the contact, more than 1 semi-axis from its centre",
        });
    }
    let left = |star: Ratio, exponent: f64| {
        if m >= star.base() {
            1.0
        } else {
            pow((m - 1.0) / (star.base() - 1.0), exponent)
        }
    };
    Ok(Films {
        central: Length::from_base(flooded.central.base() * left(distance.central, 0.29)),
        minimum: Length::from_base(flooded.minimum.base() * left(distance.minimum, 0.25)),
    })
}
