//! What a full journal bearing does, as pure numbers of eccentricity and width ratio.

use crate::numeric::math::sin;
use crate::quantity::convert::number;
use crate::quantity::{Angle, Measure, Ratio};
use crate::relation::Law;
use std::f64::consts::PI;

/// Sommerfeld number of a load number.
pub static SOMMERFELD: Law = Law {
    name: "journal-sommerfeld",
    title: "Sommerfeld number of a journal bearing",
    formula: "S = (r/c)^2 eta N/P = 1/(2 pi So), N in rev/s",
    range: "full bearing, laminar film",
    source: "Raimondi and Boyd 1958 for S, ISO 7902-1 for So; the two are the same number",
};

/// Friction coefficient of a film.
pub static FRICTION: Law = Law {
    name: "journal-friction",
    title: "friction coefficient of a journal bearing",
    formula: "f = psi (pi/(So sqrt(1 - e^2)) + (e/2) sin beta)",
    range: "full bearing, film sheared around the whole circumference",
    source: "ISO 7902-1 and Raimondi and Boyd 1958, both with shear all around",
};

/// The numbers of one bearing at one eccentricity.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Characteristic {
    /// Eccentricity over radial clearance.
    pub eccentricity: Ratio,
    /// Load number `So = P psi^2/(eta omega)`, `P` the load over width times diameter.
    pub so: Ratio,
    /// Attitude angle, from the load line to the narrowest gap.
    pub attitude: Angle,
    /// Oil drawn into the film at the widest gap, over `r c N B`.
    pub flow: Ratio,
    /// Share of that oil which leaves at the two edges.
    pub side_share: Ratio,
    /// Mean pressure `F/(B D)` over the highest pressure.
    pub mean_over_peak: Ratio,
    /// Where the highest pressure is, from the widest gap.
    pub peak_at: Angle,
    /// Where the film ruptures in the middle of the width, from the widest gap.
    pub rupture_at: Angle,
}

impl Characteristic {
    /// Sommerfeld number `S = (r/c)^2 eta N/P`.
    pub fn sommerfeld(&self) -> Ratio {
        sommerfeld(self.so)
    }

    /// Friction variable `(r/c) f`.
    pub fn friction_variable(&self) -> Ratio {
        friction_variable(self.so, self.eccentricity, self.attitude)
    }
}

/// Sommerfeld number of a load number, `S = 1/(2 pi So)`; undoes itself.
pub fn sommerfeld(so: Ratio) -> Ratio {
    number(1.0 / (2.0 * PI * so.base()))
}

/// Friction variable `(r/c) f` of [`FRICTION`].
pub fn friction_variable(so: Ratio, eccentricity: Ratio, attitude: Angle) -> Ratio {
    let e = eccentricity.base();
    let shear = PI / (so.base() * (1.0 - e * e).sqrt());
    number(shear + 0.5 * e * sin(attitude.base()))
}

/// Friction coefficient of [`FRICTION`], from the relative clearance and the friction variable.
pub fn friction(clearance: Ratio, variable: Ratio) -> Ratio {
    number(clearance.base() * variable.base())
}
