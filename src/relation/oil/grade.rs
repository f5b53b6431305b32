//! Viscosity grades of industrial oils: ISO 3448.

use crate::quantity::KinematicViscosity;
use crate::quantity::convert::{mm2_s, to_mm2_s};
use crate::relation::Law;

/// The ISO viscosity classification.
pub static ISO_3448: Law = Law {
    name: "iso-grade",
    title: "ISO viscosity grade",
    formula: "the grade whose midpoint is within 10 % of nu40, limits included; none in the gaps",
    range: "1.98 to 3520 mm2/s at 40 degC",
    source: "ISO 3448; grades 2200 and 3200 from memory",
};

/// Number and midpoint at 40 °C, mm²/s. The four thinnest are not their own midpoints.
static GRADES: [(u32, f64); 20] = [
    (2, 2.2),
    (3, 3.2),
    (5, 4.6),
    (7, 6.8),
    (10, 10.0),
    (15, 15.0),
    (22, 22.0),
    (32, 32.0),
    (46, 46.0),
    (68, 68.0),
    (100, 100.0),
    (150, 150.0),
    (220, 220.0),
    (320, 320.0),
    (460, 460.0),
    (680, 680.0),
    (1000, 1000.0),
    (1500, 1500.0),
    (2200, 2200.0),
    (3200, 3200.0),
];

/// What unit conversion and `0.9 × 46` may leave of a limit.
pub(super) const NOISE: f64 = 1e-9;

/// A grade of ISO 3448.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct IsoGrade {
    row: usize,
}

impl IsoGrade {
    /// Every grade, thinnest first.
    pub fn all() -> impl DoubleEndedIterator<Item = Self> {
        (0..GRADES.len()).map(|row| Self { row })
    }

    /// The grade of that number; `None` where the standard has none, as for 45.
    pub fn of_number(number: u32) -> Option<Self> {
        Self::all().find(|g| g.number() == number)
    }

    /// The grade an oil has by its viscosity at 40 °C; `None` in the gaps between grades and
    /// outside the classification. Nothing is rounded to the nearest.
    pub fn of_viscosity(nu40: KinematicViscosity) -> Option<Self> {
        let nu = to_mm2_s(nu40);
        Self::all().find(|g| {
            let mid = GRADES[g.row].1;
            nu >= 0.9 * mid * (1.0 - NOISE) && nu <= 1.1 * mid * (1.0 + NOISE)
        })
    }

    /// The number.
    pub fn number(self) -> u32 {
        GRADES[self.row].0
    }

    /// Midpoint at 40 °C.
    pub fn midpoint(self) -> KinematicViscosity {
        mm2_s(GRADES[self.row].1)
    }

    /// Lowest viscosity at 40 °C, included.
    pub fn least(self) -> KinematicViscosity {
        mm2_s(0.9 * GRADES[self.row].1)
    }

    /// Highest viscosity at 40 °C, included.
    pub fn most(self) -> KinematicViscosity {
        mm2_s(1.1 * GRADES[self.row].1)
    }

    /// The next thicker grade.
    pub fn thicker(self) -> Option<Self> {
        let row = self.row + 1;
        (row < GRADES.len()).then_some(Self { row })
    }

    /// The next thinner grade.
    pub fn thinner(self) -> Option<Self> {
        self.row.checked_sub(1).map(|row| Self { row })
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn grades_never_overlap_and_hold_their_own_limits() {
        for grade in IsoGrade::all() {
            for nu in [grade.least(), grade.midpoint(), grade.most()] {
                assert_eq!(IsoGrade::of_viscosity(nu), Some(grade));
            }
            if let Some(next) = grade.thicker() {
                assert!(grade.most() < next.least());
                assert_eq!(next.thinner(), Some(grade));
                let gap = mm2_s(0.5 * (to_mm2_s(grade.most()) + to_mm2_s(next.least())));
                assert_eq!(IsoGrade::of_viscosity(gap), None);
            }
        }
        assert_eq!(IsoGrade::of_number(45), None);
    }
}
