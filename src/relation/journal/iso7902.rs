//! The closed forms of ISO 7902-2 for the full journal bearing: a second opinion.

use super::table::FURTHEST;
use crate::numeric::math::{atan, sin};
use crate::numeric::root::bracketed;
use crate::quantity::convert::number;
use crate::quantity::{Angle, Measure, Ratio};
use crate::relation::Law;
use std::f64::consts::PI;

/// Load number of the standard.
pub static LAW: Law = Law {
    name: "journal-iso7902",
    title: "load number of a journal bearing by the closed form of ISO 7902-2",
    formula: "So = (B/D)^2 e/(2 (1 - e^2)^2) sqrt(pi^2 (1 - e^2) + 16 e^2) a1 (e - 1)/(a2 + e)",
    range: "B/D 0.25 to 1, e to 0.97; against the Reynolds solution -5 to +7 % at B/D 0.25 \
            to 0.6, up to 11 % low at 0.7 to 0.95, -3 to +5 % at 1; useless above 1",
    source: "ISO 7902-2 (from memory; error computed by the program)",
};

/// Attitude angle of the standard.
pub static ATTITUDE: Law = Law {
    name: "journal-iso7902-attitude",
    title: "attitude angle of a journal bearing by the closed form of ISO 7902-2",
    formula: "beta = (b1 + b2 e + b3 e^2 + b4 e^3 + b5 e^4) atan(pi sqrt(1 - e^2)/(2 e))",
    range: "B/D 0.25 to 1, e to 0.97; within 4.4 deg of the Reynolds solution",
    source: "ISO 7902-2 (from memory; error computed by the program)",
};

/// Side flow of the standard.
pub static SIDE_FLOW: Law = Law {
    name: "journal-iso7902-side-flow",
    title: "side flow of a journal bearing by the closed form of ISO 7902",
    formula: "Q3 = D^3 psi omega q3, q3 = (B/D - 0.223 (B/D)^3) e/4",
    range: "B/D to 1; within 1 % of the Reynolds solution to B/D 0.75, 4 % at 1",
    source: "ISO 7902-1 and -2 (from memory; error computed by the program)",
};

/// Least width ratio the closed forms are compared for.
pub const NARROWEST: f64 = 0.25;
/// Largest width ratio they may be used for.
pub const WIDEST: f64 = 1.0;

/// Whether the closed forms may be used at a width ratio.
pub fn covers(width_ratio: Ratio) -> bool {
    // a ratio of 1 worked out from two lengths may miss it by a rounding
    (NARROWEST - 1e-9..=WIDEST + 1e-9).contains(&width_ratio.base())
}

/// Value of a polynomial, constant first.
fn polynomial(coefficients: [f64; 5], x: f64) -> f64 {
    coefficients.iter().rev().fold(0.0, |sum, c| sum * x + c)
}

/// Load number of [`LAW`].
pub fn load_number(eccentricity: Ratio, width_ratio: Ratio) -> Ratio {
    let (e, b) = (eccentricity.base(), width_ratio.base());
    let a1 = polynomial([1.1642, -1.9456, 7.1161, -10.1073, 5.0141], b);
    let a2 = polynomial([-1.000_026, -0.023_634, -0.4215, -0.038_817, -0.090_551], b);
    let open = 1.0 - e * e;
    let spread = (PI * PI * open + 16.0 * e * e).sqrt();
    number(b * b * e / (2.0 * open * open) * spread * a1 * (e - 1.0) / (a2 + e))
}

/// Attitude angle of [`ATTITUDE`].
pub fn attitude(eccentricity: Ratio, width_ratio: Ratio) -> Angle {
    let (e, b) = (eccentricity.base(), width_ratio.base());
    let factors = [
        1.152_624 - 0.105_465 * b,
        -2.5905 + 0.798_745 * b,
        8.733_93 - 2.3291 * b,
        -13.3414 + 3.424_337 * b,
        6.6294 - 1.591_732 * b,
    ];
    let base = if e > 0.0 {
        atan(PI * (1.0 - e * e).sqrt() / (2.0 * e))
    } else {
        PI / 2.0
    };
    // the friction coefficient needs only the sine, and radians keep it exact
    Angle::from_base(polynomial(factors, e) * base)
}

/// Side flow variable `q3` of [`SIDE_FLOW`].
pub fn side_flow(eccentricity: Ratio, width_ratio: Ratio) -> Ratio {
    let (e, b) = (eccentricity.base(), width_ratio.base());
    number(0.25 * (b - 0.223 * b * b * b) * e)
}

/// Friction variable `f/psi`, [`super::characteristic::FRICTION`].
pub fn friction_variable(eccentricity: Ratio, width_ratio: Ratio) -> Ratio {
    let e = eccentricity.base();
    let so = load_number(eccentricity, width_ratio).base();
    let beta = attitude(eccentricity, width_ratio).base();
    number(PI / (so * (1.0 - e * e).sqrt()) + 0.5 * e * sin(beta))
}

/// Eccentricity that carries a load number, to 0.97; `None` where no film is left.
pub fn carrying(so: Ratio, width_ratio: Ratio) -> Option<Ratio> {
    let left = |e: f64| load_number(number(e), width_ratio).base() - so.base();
    bracketed(0.0, FURTHEST, left)
        .ok()
        .map(|root| number(root.at))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::relation::journal::table::Cut;

    #[test]
    fn load_rises_with_eccentricity() {
        for b in [0.25, 0.4, 0.6, 0.75, 0.9, 1.0] {
            let mut before = -1.0;
            for i in 0..=97 {
                let so = load_number(number(f64::from(i) / 100.0), number(b)).base();
                assert!(so > before, "{b} {i}");
                before = so;
            }
        }
    }

    /// The errors that the range of [`LAW`] states.
    #[test]
    fn is_as_near_the_reynolds_solution_as_said() {
        let worst = |b: f64, of: fn(Ratio, Ratio, &Cut) -> f64| {
            let cut = Cut::at(number(b)).unwrap();
            let errors = (5..=95).map(|i| of(number(f64::from(i) / 100.0), number(b), &cut));
            errors.fold((0.0_f64, 0.0_f64), |(low, high), e| {
                (low.min(e), high.max(e))
            })
        };
        let load = |e, b, cut: &Cut| {
            load_number(e, b).base() / cut.characteristic(e).unwrap().so.base() - 1.0
        };
        let angle = |e, b, cut: &Cut| {
            let solved = cut.characteristic(e).unwrap().attitude.base();
            (attitude(e, b).base() - solved).to_degrees()
        };
        let flow = |e: Ratio, b: Ratio, cut: &Cut| {
            let c = cut.characteristic(e).unwrap();
            let side = c.flow.base() * c.side_share.base() * b.base() / (8.0 * PI);
            side_flow(e, b).base() / side - 1.0
        };
        let mut loads = Vec::new();
        for b in [0.25, 0.3, 0.4, 0.5, 0.6, 0.7, 0.75, 0.8, 0.9, 0.95, 1.0] {
            loads.push((b, worst(b, load), worst(b, angle), worst(b, flow)));
        }
        for (b, (low, high), (back, ahead), _) in &loads {
            let allowed = match b {
                b if *b <= 0.6 => (-0.055, 0.07),
                b if *b < 1.0 => (-0.11, 0.005),
                _ => (-0.035, 0.05),
            };
            assert!(*low > allowed.0 && *high < allowed.1, "{b}: {low} {high}");
            assert!(*back > -4.5 && *ahead < 4.5, "{b}: {back} {ahead}");
        }
        for (b, _, _, (low, high)) in &loads {
            let allowed = if *b <= 0.75 { 0.012 } else { 0.042 };
            assert!(low.abs().max(high.abs()) < allowed, "{b}: {low} {high}");
        }
    }
}
