//! Which of pressure and elasticity shape a film.
//!
//! Source: Hamrock and Dowson 1979 (elliptical), the line chart of Johnson 1970 with constants
//! for the *mean* surface speed (texts with the sum of speeds print 2.45, 1.05, 2.05, 1.65). The
//! largest of the four films counts; the borders are where two are equal.

use super::groups::Groups;
use crate::numeric::math::{atan, exp, pow};
use crate::quantity::{Length, Measure, Ratio};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};
use std::f64::consts::PI;

/// Line contacts.
pub static LINE: Law = Law {
    name: "film-regime-line",
    title: "Film of a line contact by regime",
    formula: "h = R (U / W) max(4.9, 1.66 gV^(2/3), 3.10 gE^0.8, 2.65 gV^0.54 gE^0.06)",
    range: "gV = G W^1.5 / U^0.5, gE = W / U^0.5; isothermal, flooded, smooth",
    source: "Johnson 1970; Dowson and Higginson 1966; constants for the mean speed",
};

/// Elliptical contacts.
pub static ELLIPSE: Law = Law {
    name: "film-regime",
    title: "Film of an elliptical contact by regime",
    formula: "h = Rx (U / W)^2 max(IR, 1.66 gV^(2/3) (1 - exp(-0.68 k)), 8.70 gE^0.67 (1 - 0.85 exp(-0.31 k)), 3.42 gV^0.49 gE^0.17 (1 - exp(-0.68 k)))",
    range: "gV = G W^3 / U^2, gE = W^(8/3) / U^2; isothermal, flooded, smooth, rolling along the minor axis",
    source: "Hamrock and Dowson 1979 (from memory)",
};

/// What shapes the film.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Regime {
    /// Neither: rigid bodies, constant viscosity.
    IsoviscousRigid,
    /// Pressure thickens the oil, the bodies stay stiff.
    PiezoviscousRigid,
    /// The bodies give way, the oil stays thin.
    IsoviscousElastic,
    /// Both: the usual state of bearings and gears.
    PiezoviscousElastic,
}

impl Regime {
    /// In words.
    pub fn words(self) -> &'static str {
        match self {
            Self::IsoviscousRigid => "isoviscous-rigid",
            Self::PiezoviscousRigid => "piezoviscous-rigid",
            Self::IsoviscousElastic => "isoviscous-elastic",
            Self::PiezoviscousElastic => "piezoviscous-elastic",
        }
    }
}

/// A film with the four candidates it was chosen from.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ByRegime {
    /// The largest of the four.
    pub film: Length,
    /// Its regime.
    pub regime: Regime,
    /// Viscosity parameter.
    pub g_v: Ratio,
    /// Elasticity parameter.
    pub g_e: Ratio,
    /// Film parameter of rigid bodies and constant viscosity.
    pub isoviscous_rigid: Ratio,
    /// Film parameter of rigid bodies and rising viscosity.
    pub piezoviscous_rigid: Ratio,
    /// Film parameter of yielding bodies and constant viscosity.
    pub isoviscous_elastic: Ratio,
    /// Film parameter of yielding bodies and rising viscosity.
    pub piezoviscous_elastic: Ratio,
}

/// The film of a line contact; `scale` turns a film parameter into a length.
///
/// # Errors
/// A speed or load parameter that is not above zero. A material parameter of zero is an
/// isoviscous liquid, water for instance.
pub fn line(groups: Groups, radius: Length) -> Result<ByRegime, Outside> {
    let (u, g, w) = plain(groups)?;
    let root = u.sqrt();
    let (g_v, g_e) = (g * w * w.sqrt() / root, w / root);
    let films = [
        4.9,
        1.66 * pow(g_v, 2.0 / 3.0),
        3.10 * pow(g_e, 0.8),
        2.65 * pow(g_v, 0.54) * pow(g_e, 0.06),
    ];
    Ok(largest(films, (g_v, g_e), radius.base() * u / w))
}

/// The film of an elliptical contact with the reduced radii `rx`, `ratio = Ry / Rx`.
///
/// # Errors
/// A speed or load parameter or a ratio that is not above zero.
pub fn ellipse(groups: Groups, ratio: Ratio, rx: Length) -> Result<ByRegime, Outside> {
    let (u, g, w) = plain(groups)?;
    let ratio = positive("the ratio of the radii", ratio)?;
    let k = pow(ratio, 2.0 / PI);
    let (g_v, g_e) = (g * w * w * w / (u * u), pow(w, 8.0 / 3.0) / (u * u));
    let leakage = 1.0 / (1.0 + 2.0 / (3.0 * ratio));
    let shape = 0.131 * atan(ratio / 2.0) + 1.683;
    let hard = 1.0 - exp(-0.68 * k);
    let films = [
        128.0 * ratio * leakage * leakage * shape * shape,
        1.66 * pow(g_v, 2.0 / 3.0) * hard,
        8.70 * pow(g_e, 0.67) * (1.0 - 0.85 * exp(-0.31 * k)),
        3.42 * pow(g_v, 0.49) * pow(g_e, 0.17) * hard,
    ];
    let scale = u / w;
    Ok(largest(films, (g_v, g_e), rx.base() * scale * scale))
}

fn plain(groups: Groups) -> Result<(f64, f64, f64), Outside> {
    let u = positive("the speed parameter", groups.speed)?;
    let w = positive("the load parameter", groups.load)?;
    Ok((u, groups.material.base().max(0.0), w))
}

fn largest(films: [f64; 4], (g_v, g_e): (f64, f64), scale: f64) -> ByRegime {
    let names = [
        Regime::IsoviscousRigid,
        Regime::PiezoviscousRigid,
        Regime::IsoviscousElastic,
        Regime::PiezoviscousElastic,
    ];
    let (mut best, mut regime) = (films[0], names[0]);
    for (film, name) in films.into_iter().zip(names) {
        if film > best {
            (best, regime) = (film, name);
        }
    }
    ByRegime {
        film: Length::from_base(best * scale),
        regime,
        g_v: Ratio::from_base(g_v),
        g_e: Ratio::from_base(g_e),
        isoviscous_rigid: Ratio::from_base(films[0]),
        piezoviscous_rigid: Ratio::from_base(films[1]),
        isoviscous_elastic: Ratio::from_base(films[2]),
        piezoviscous_elastic: Ratio::from_base(films[3]),
    }
}
