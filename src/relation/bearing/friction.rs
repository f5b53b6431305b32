//! Friction torque of a rolling bearing.
//!
//! Source: Palmgren; factors as collected by Harris, *Rolling Bearing Analysis* (from memory).
//! Tables of `f0` differ by a factor of two between sources.

use crate::numeric::math::{cbrt, pow};
use crate::quantity::convert::{to_mm, to_mm2_s, to_rpm};
use crate::quantity::{
    AngularVelocity, Force, KinematicViscosity, Length, Measure, Power, Ratio, Torque,
};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// The torque that viscosity and speed cause.
pub static VISCOUS: Law = Law {
    name: "bearing-friction",
    title: "Load-free friction torque of a rolling bearing",
    formula: "M0 = 10^-7 f0 (nu n)^(2/3) dm^3; M0 = 160 10^-7 f0 dm^3 where nu n is below 2000",
    range: "M0 in N.mm, nu in mm2/s at running temperature, n in r/min, dm in mm",
    source: "Palmgren, in Harris, Rolling Bearing Analysis",
};

/// The torque that load causes.
pub static LOAD: Law = Law {
    name: "bearing-friction-load",
    title: "Load-dependent friction torque of a rolling bearing",
    formula: "M1 = f1 P1 dm",
    range: "P1 the load that counts for friction",
    source: "Palmgren, in Harris, Rolling Bearing Analysis",
};

/// The power lost.
pub static POWER: Law = Law {
    name: "bearing-friction-power",
    title: "Power lost in a rolling bearing",
    formula: "P = (M0 + M1) omega",
    range: "without seals and splash",
    source: "mechanics",
};

/// Friction torque without load.
///
/// # Errors
/// A factor, viscosity, speed or diameter that is not above zero.
pub fn viscous(
    f0: Ratio,
    nu: KinematicViscosity,
    speed: AngularVelocity,
    pitch_diameter: Length,
) -> Result<Torque, Outside> {
    let f0 = positive("f0", f0)?;
    positive("the viscosity", nu)?;
    positive("the speed", speed)?;
    positive("the pitch diameter", pitch_diameter)?;
    let product = to_mm2_s(nu) * to_rpm(speed);
    let dm_mm = to_mm(pitch_diameter);
    let cube = dm_mm * dm_mm * dm_mm;
    let torque_nmm = if product < 2000.0 {
        160e-7 * f0 * cube
    } else {
        1e-7 * f0 * cbrt(product * product) * cube
    };
    Ok(Torque::from_base(torque_nmm * 1e-3))
}

/// Friction torque of the load.
///
/// # Errors
/// A diameter that is not above zero, a negative factor or load.
pub fn load(f1: Ratio, load: Force, pitch_diameter: Length) -> Result<Torque, Outside> {
    let dm = positive("the pitch diameter", pitch_diameter)?;
    let product = f1.base() * load.base();
    if product.is_nan() || product < 0.0 {
        return Err(Outside::NotPositive {
            what: "f1 times the load",
        });
    }
    Ok(Torque::from_base(product * dm))
}

/// Power lost.
pub fn power(viscous: Torque, load: Torque, speed: AngularVelocity) -> Power {
    Power::from_base((viscous.base() + load.base()) * speed.base())
}

/// `f1` of a kind whose factor depends on the load: `a (P0 / C0)^b`.
///
/// # Errors
/// A static rating that is not above zero.
pub fn load_factor(row: &FactorRow, load: Force, static_rating: Force) -> Result<Ratio, Outside> {
    let c0 = positive("the static load rating", static_rating)?;
    let share = load.base().max(0.0) / c0;
    Ok(Ratio::from_base(row.f1.1 * pow(share, row.f1_exponent)))
}

/// Factors of one kind of bearing; each a lowest and a highest value.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct FactorRow {
    /// The kind, in words.
    pub kind: &'static str,
    /// Grease; `None` where the kind is not run so.
    pub grease: Option<(f64, f64)>,
    /// Oil mist.
    pub mist: Option<(f64, f64)>,
    /// Oil bath.
    pub bath: Option<(f64, f64)>,
    /// Oil bath with a vertical shaft, or oil jet.
    pub jet: Option<(f64, f64)>,
    /// Factor of the load, before its exponent.
    pub f1: (f64, f64),
    /// Exponent of load over static rating; zero where the factor is constant.
    pub f1_exponent: f64,
}

/// A row of the table, the columns in the order of [`FactorRow`].
const fn row(
    kind: &'static str,
    f0: [Option<(f64, f64)>; 4],
    f1: (f64, f64),
    f1_exponent: f64,
) -> FactorRow {
    let [grease, mist, bath, jet] = f0;
    FactorRow {
        kind,
        grease,
        mist,
        bath,
        jet,
        f1,
        f1_exponent,
    }
}

/// Friction factors by kind (from memory; spherical rollers unsure).
pub const FACTORS: &[FactorRow] = &[
    row(
        "deep groove ball",
        [
            Some((0.7, 2.0)),
            Some((1.0, 1.0)),
            Some((2.0, 2.0)),
            Some((4.0, 4.0)),
        ],
        (0.0004, 0.0006),
        0.55,
    ),
    row(
        "self-aligning ball",
        [
            Some((1.5, 2.0)),
            Some((0.7, 1.0)),
            Some((1.5, 2.0)),
            Some((3.0, 4.0)),
        ],
        (0.0003, 0.0003),
        0.4,
    ),
    row(
        "angular contact ball",
        [
            Some((2.0, 2.0)),
            Some((1.7, 1.7)),
            Some((3.3, 3.3)),
            Some((6.6, 6.6)),
        ],
        (0.001, 0.001),
        0.33,
    ),
    row(
        "thrust ball",
        [
            Some((5.5, 5.5)),
            Some((0.8, 0.8)),
            Some((1.5, 1.5)),
            Some((3.0, 3.0)),
        ],
        (0.0008, 0.0012),
        0.33,
    ),
    row(
        "cylindrical roller",
        [
            Some((0.6, 1.0)),
            Some((1.5, 2.8)),
            Some((2.2, 4.0)),
            Some((2.2, 4.0)),
        ],
        (0.0002, 0.0004),
        0.0,
    ),
    row(
        "cylindrical roller, full complement",
        [Some((5.0, 10.0)), None, Some((5.0, 10.0)), None],
        (0.00055, 0.00055),
        0.0,
    ),
    row(
        "needle roller",
        [
            Some((12.0, 12.0)),
            Some((6.0, 6.0)),
            Some((12.0, 12.0)),
            Some((24.0, 24.0)),
        ],
        (0.002, 0.002),
        0.0,
    ),
    row(
        "tapered roller",
        [
            Some((6.0, 6.0)),
            Some((3.0, 3.0)),
            Some((6.0, 6.0)),
            Some((8.0, 10.0)),
        ],
        (0.0004, 0.0004),
        0.0,
    ),
    row(
        "spherical roller",
        [
            Some((3.5, 7.0)),
            Some((1.7, 3.5)),
            Some((3.5, 7.0)),
            Some((7.0, 14.0)),
        ],
        (0.0002, 0.0005),
        0.0,
    ),
    row(
        "spherical roller thrust",
        [None, None, Some((2.5, 5.0)), Some((5.0, 10.0))],
        (0.00023, 0.0005),
        0.0,
    ),
];
