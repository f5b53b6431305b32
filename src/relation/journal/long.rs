//! The bearing of infinite width, where nothing leaves at the edges.

use super::characteristic::Characteristic;
use crate::numeric::math::{acos, atan2, cos, sin};
use crate::numeric::root::{NoRoot, bracketed};
use crate::quantity::convert::number;
use crate::quantity::{Angle, Measure, Ratio};
use crate::relation::Law;
use std::f64::consts::PI;

/// The infinitely wide bearing.
pub static LAW: Law = Law {
    name: "journal-long",
    title: "load, attitude and flow of an infinitely wide journal bearing",
    formula: "dP/dt = 6 (H - H_r)/H^3, P = 0 at t = 0 and at the rupture H_r",
    range: "limit of large B/D, eccentricity 0.01 to 0.99; no machine has such a bearing",
    source: "Reynolds equation in one dimension with the Reynolds condition, Sommerfeld's \
             substitution; compared with the rows for infinite width of Raimondi and Boyd 1958",
};

/// Integrals of `1/H`, `1/H^2`, `1/H^3` over the angle from 0 to Sommerfeld's angle `g`.
fn integrals(e: f64, g: f64) -> [f64; 3] {
    let root = (1.0 - e * e).sqrt();
    let (s, double) = (sin(g), sin(2.0 * g));
    let (cube, fifth) = (root * root * root, root * root * root * root * root);
    [
        g / root,
        (g - e * s) / cube,
        (g * (1.0 + 0.5 * e * e) - 2.0 * e * s + 0.25 * e * e * double) / fifth,
    ]
}

fn gap(e: f64, g: f64) -> f64 {
    (1.0 - e * e) / (1.0 - e * cos(g))
}

/// The characteristic at an eccentricity; the load number is that per unit of width.
///
/// # Errors
/// [`NoRoot`] where no place of rupture is found, outside the range of [`LAW`].
pub fn characteristic(eccentricity: Ratio) -> Result<Characteristic, NoRoot> {
    let e = eccentricity.base();
    let left = |g: f64| {
        let [_, second, third] = integrals(e, g);
        second - gap(e, g) * third
    };
    let end = bracketed(PI, 2.0 * PI - 1e-9, left)?.at;
    let rupture = gap(e, end);
    let [first, second, third] = integrals(e, end);
    let part = 1.0 - rupture / (1.0 + e);
    let radial = 3.0 / (e * rupture) * part * part;
    let tangential = 6.0 / e * ((first - second) - rupture * (second - third));
    let so = 0.5 * (radial * radial + tangential * tangential).sqrt();
    let top = 2.0 * PI - end;
    let [_, second, third] = integrals(e, top);
    let angle = acos(((rupture - 1.0) / e).clamp(-1.0, 1.0));
    Ok(Characteristic {
        eccentricity,
        so: number(so),
        attitude: Angle::from_base(atan2(tangential, radial)),
        flow: number(PI * rupture),
        side_share: number(0.0),
        mean_over_peak: number(so / (6.0 * (second - rupture * third))),
        peak_at: Angle::from_base(angle),
        rupture_at: Angle::from_base(2.0 * PI - angle),
    })
}
