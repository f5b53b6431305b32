//! The cold end of an oil: measured viscosities come before the line.
//!
//! Between measured points, and between the coldest of them and the coldest point stated, the
//! curve is straight in the coordinates of ASTM D341; below the coldest it is carried on. The
//! mini-rotary test shears slowly after slow cooling and stands for the oil at rest; the cranking
//! test shears fast and reads low, so it counts only where it is thicker than the line.

use super::curve::{Curve, Joined};
use super::density::Density;
use crate::model::Oil;
use crate::quantity::convert::kinematic;
use crate::quantity::{DynamicViscosity, KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::relation::oil::piecewise::Pieces;
use crate::relation::oil::viscosity_temperature::{Point, ViscosityCurve};

/// The test a viscosity was measured cold by.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum ColdTest {
    /// Low shear: ASTM D2983 and the like.
    LowShear,
    /// The temperature of 150 000 mPa·s by ASTM D2983.
    Limit150000,
    /// Mini-rotary viscometer, ASTM D4684.
    MiniRotary,
    /// Cranking simulator, ASTM D5293.
    Cranking,
}

impl ColdTest {
    /// The test in words.
    pub fn word(self) -> &'static str {
        match self {
            Self::LowShear => "low shear, ASTM D2983 or alike",
            Self::Limit150000 => "ASTM D2983, 150 000 mPa.s",
            Self::MiniRotary => "mini-rotary, ASTM D4684",
            Self::Cranking => "cranking simulator, ASTM D5293",
        }
    }
}

/// A viscosity measured cold.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ColdPoint {
    /// The test.
    pub test: ColdTest,
    /// Temperature.
    pub at: ThermodynamicTemperature,
    /// As measured.
    pub eta: DynamicViscosity,
    /// Over the density there.
    pub nu: KinematicViscosity,
    /// The line through the stated points there.
    pub line: KinematicViscosity,
    /// How it is used.
    pub used: Used,
}

/// Whether the cold curve goes through a measured point.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Used {
    /// It does.
    Yes,
    /// Warmer than the coldest point stated: only compared with the line.
    Within,
    /// A cranking viscosity thinner than the line: it says nothing of the oil at rest.
    ThinnerThanLine,
    /// The oil would thin as it cools, or another test stands at that temperature.
    Crosses,
}

impl Used {
    /// How the reading is used, in words.
    pub fn says(self) -> &'static str {
        match self {
            Self::Yes => "used",
            Self::Within => "compared only: warmer than the coldest point stated",
            Self::ThinnerThanLine => "not used: sheared fast, it reads low",
            Self::Crosses => "not used: it does not fit the others",
        }
    }
}

/// Everything measured cold, coldest first, with how it is used.
pub(super) fn points(
    oil: &Oil,
    new: &Curve,
    density: Density,
    coldest_stated: ThermodynamicTemperature,
) -> Vec<ColdPoint> {
    let mut all: Vec<ColdPoint> = Vec::new();
    let measured = |test, list: &[crate::source::place::Given<crate::model::oil::DynamicPoint>]| {
        list.iter()
            .map(move |p| (test, p.value.at, p.value.eta))
            .collect::<Vec<_>>()
    };
    let mut found = measured(ColdTest::LowShear, &oil.cold_viscosity);
    if let Some(t) = &oil.t150000 {
        found.push((
            ColdTest::Limit150000,
            t.value,
            DynamicViscosity::from_base(150.0),
        ));
    }
    found.extend(measured(ColdTest::MiniRotary, &oil.mrv));
    found.extend(measured(ColdTest::Cranking, &oil.ccs));
    let joint = Point::new(coldest_stated, new.nu_at(coldest_stated));
    let mut kept: Vec<Point> = vec![joint];
    for (test, at, eta) in found {
        let nu = kinematic(eta, density.at(at));
        let line = new.nu_at(at);
        let used = if at >= coldest_stated {
            Used::Within
        } else if test == ColdTest::Cranking && nu <= line {
            Used::ThinnerThanLine
        } else if falls(&kept, Point::new(at, nu)) {
            kept.push(Point::new(at, nu));
            Used::Yes
        } else {
            Used::Crosses
        };
        all.push(ColdPoint {
            test,
            at,
            eta,
            nu,
            line,
            used,
        });
    }
    all.sort_by(|a, b| {
        a.at.base()
            .total_cmp(&b.at.base())
            .then(a.test.cmp(&b.test))
    });
    all
}

/// Whether the oil still thins from each point to the next with one more.
fn falls(kept: &[Point], one: Point) -> bool {
    kept.iter().all(|p| {
        let apart = (p.at.base() - one.at.base()).abs() > 0.5;
        apart && ((p.at < one.at) == (p.nu > one.nu))
    })
}

/// The curve whose cold end goes through the measured points; `None` where none is used.
pub(super) fn joined(
    above: &Curve,
    points: &[ColdPoint],
    joint: ThermodynamicTemperature,
) -> Option<Curve> {
    let mut through: Vec<Point> = points
        .iter()
        .filter(|p| p.used == Used::Yes)
        .map(|p| Point::new(p.at, p.nu))
        .collect();
    if through.is_empty() {
        return None;
    }
    through.push(Point::new(joint, above.nu_at(joint)));
    let below = Pieces::through(&through).ok()?;
    Some(Curve::Cold(Box::new(Joined {
        above: above.clone(),
        below,
        joint,
    })))
}
