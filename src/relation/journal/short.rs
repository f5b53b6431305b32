//! The short bearing: the limit of small width ratio, where oil flows mainly to the edges.

use super::characteristic::Characteristic;
use crate::numeric::math::{acos, atan2};
use crate::quantity::convert::number;
use crate::quantity::{Angle, Measure, Ratio};
use crate::relation::Law;
use std::f64::consts::PI;

/// Load of a short bearing.
pub static LAW: Law = Law {
    name: "journal-short",
    title: "load number of a short journal bearing",
    formula: "So = (B/D)^2 e sqrt(pi^2 (1 - e^2) + 16 e^2)/(2 (1 - e^2)^2)",
    range: "limit of small B/D with a film from 0 to 180 deg; at B/D 0.25 it gives 1 to 13 % more \
            load than the Reynolds solution to e 0.7, and twice as much at e 0.97",
    source: "DuBois and Ocvirk 1953 (short bearing, half film); formula from memory",
};

/// Load number of [`LAW`]; `S` follows by [`super::characteristic::sommerfeld`].
pub fn load_number(eccentricity: Ratio, width_ratio: Ratio) -> Ratio {
    let (e, b) = (eccentricity.base(), width_ratio.base());
    let open = 1.0 - e * e;
    let spread = (PI * PI * open + 16.0 * e * e).sqrt();
    number(b * b * e * spread / (2.0 * open * open))
}

/// Everything else of the same limit: attitude `atan(pi sqrt(1 - e^2)/(4 e))`, oil drawn in
/// `pi (1 + e)`, all that the narrowing gap displaces leaving at the edges, and the peak of
/// `e sin t/(1 + e cos t)^3`, which is two thirds above its mean over the width.
pub fn characteristic(eccentricity: Ratio, width_ratio: Ratio) -> Characteristic {
    let e = eccentricity.base();
    let so = load_number(eccentricity, width_ratio);
    let root = (1.0 - e * e).sqrt();
    let peak_cosine = if e < 1e-6 {
        -3.0 * e
    } else {
        (1.0 - (1.0 + 24.0 * e * e).sqrt()) / (4.0 * e)
    };
    let gap = 1.0 + e * peak_cosine;
    let sine = (1.0 - peak_cosine * peak_cosine).sqrt();
    // P(t, Z = 0) = 3 b^2 e sin t/H^3; So over that, with the common b^2 e taken out
    let spread = (PI * PI * root * root + 16.0 * e * e).sqrt();
    let load = spread / (2.0 * root * root * root * root);
    Characteristic {
        eccentricity,
        so,
        attitude: Angle::from_base(atan2(PI * root, 4.0 * e)),
        flow: number(PI * (1.0 + e)),
        side_share: number(2.0 * e / (1.0 + e)),
        mean_over_peak: number(load * gap * gap * gap / (3.0 * sine)),
        peak_at: Angle::from_base(acos(peak_cosine)),
        rupture_at: Angle::from_base(PI),
    }
}

#[cfg(test)]
mod tests {
    use super::super::characteristic::sommerfeld;
    use super::*;

    #[test]
    fn is_near_the_published_quarter_width_row() {
        // S of L/D 1/4, e 0.6: 1.07 (Raimondi and Boyd 1958, from memory); the limit is 6 % lower
        let s = sommerfeld(load_number(number(0.6), number(0.25))).base();
        assert!((s / 1.07 - 1.0).abs() < 0.1, "{s}");
    }

    #[test]
    fn peak_share_is_the_integral_of_its_own_profile() {
        // So = 1/2 of the load of P over the half width, whose parabola has the mean 2/3
        const STEPS: u32 = 20_000;
        let e = 0.55_f64;
        let (mut wr, mut wt, mut top) = (0.0, 0.0, 0.0_f64);
        for step in 0..STEPS {
            let width = PI / f64::from(STEPS);
            let angle = width * (f64::from(step) + 0.5);
            let gap = 1.0 + e * libm::cos(angle);
            let ridge = 3.0 * e * libm::sin(angle) / (gap * gap * gap);
            top = top.max(ridge);
            wr -= ridge * 2.0 / 3.0 * libm::cos(angle) * width;
            wt += ridge * 2.0 / 3.0 * libm::sin(angle) * width;
        }
        let so = 0.5 * (wr * wr + wt * wt).sqrt();
        let c = characteristic(number(e), number(1.0));
        assert!((c.so.base() / so - 1.0).abs() < 1e-6);
        assert!((c.attitude.base() - libm::atan2(wt, wr)).abs() < 1e-6);
        assert!((c.mean_over_peak.base() / (so / top) - 1.0).abs() < 1e-6);
    }
}
