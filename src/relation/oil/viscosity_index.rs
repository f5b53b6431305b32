//! Viscosity index: ASTM D2270, ISO 2909.
//!
//! `Y` is the viscosity at 100 °C, `U` that at 40 °C; `L` and `H` are the viscosities at 40 °C of
//! the reference oils of index 0 and 100 with the same `Y`. Below 2 mm²/s at 100 °C the index is
//! not defined; below about 3 it is erratic. It says nothing of the oil below 40 °C.

use super::d2270_table::ROWS;
use crate::numeric::math::{lg, power_of_ten};
use crate::numeric::root::bracketed;
use crate::quantity::convert::{mm2_s, number, to_mm2_s};
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{KinematicViscosity, Measure, Ratio};
use crate::relation::Law;

/// Reference oils of the same viscosity at 100 °C.
pub static REFERENCES: Law = Law {
    name: "index-references",
    title: "Viscosities at 40 degC of the reference oils of index 0 and 100",
    formula: "table of Y, L, H with straight lines between rows; above Y = 70: \
              L = 0.8353 Y^2 + 14.67 Y - 216, H = 0.1684 Y^2 + 11.85 Y - 97",
    range: "Y 2 mm2/s or more",
    source: "ASTM D2270 Table 1 and equations; ISO 2909",
};

/// The index.
pub static INDEX: Law = Law {
    name: "viscosity-index",
    title: "Viscosity index",
    formula: "U >= H: VI = 100 (L - U) / (L - H); U < H: VI = (10^N - 1) / 0.00715 + 100, \
              N = lg(H / U) / lg Y",
    range: "Y 2 mm2/s or more",
    source: "ASTM D2270 procedures A and B; ISO 2909",
};

/// The index as reported.
pub static WHOLE: Law = Law {
    name: "viscosity-index-rounded",
    title: "Viscosity index as reported",
    formula: "nearest whole number, halves to the even one",
    range: "any index",
    source: "ASTM E29 as called by D2270 (from memory)",
};

/// Viscosity at 40 °C from that at 100 °C and the index.
pub static NU40: Law = Law {
    name: "nu40-from-index",
    title: "Viscosity at 40 degC from that at 100 degC and the index",
    formula: "VI <= 100: U = L - VI (L - H) / 100; VI > 100: U = H / Y^N, \
              N = lg(1 + 0.00715 (VI - 100))",
    range: "Y 2 mm2/s or more",
    source: "ASTM D2270 solved for U",
};

/// Viscosity at 100 °C from that at 40 °C and the index.
pub static NU100: Law = Law {
    name: "nu100-from-index",
    title: "Viscosity at 100 degC from that at 40 degC and the index",
    formula: "the Y at which U(Y, VI) equals the viscosity at 40 degC",
    range: "index -100 to 500, where U rises with Y; solutions of 2 mm2/s or more",
    source: "ASTM D2270 solved for Y by bracketing",
};

/// Below this viscosity at 100 °C, mm²/s, the index is not defined.
pub const LOWEST_Y_MM2_S: f64 = 2.0;
const INDEX_RANGE: std::ops::RangeInclusive<f64> = -100.0..=500.0;
const TABLE_ENDS_AT: f64 = 70.0;

/// Why there is no index, or no viscosity for it.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum IndexError {
    /// Too thin.
    #[error("the viscosity index is not defined below 2 mm2/s at 100 degC, this is {}",
        shown(*nu100))]
    NotDefined {
        /// Viscosity at 100 °C.
        nu100: KinematicViscosity,
    },
    /// No oil of the index is so thin.
    #[error("no oil of index {vi:.1} has {} at 40 degC: the thinnest with 2 mm2/s at 100 degC \
        has {}", shown(*nu40), shown(*thinnest))]
    NoSolution {
        /// Viscosity at 40 °C.
        nu40: KinematicViscosity,
        /// The index.
        vi: f64,
        /// Viscosity at 40 °C of the oil of that index with 2 mm²/s at 100 °C.
        thinnest: KinematicViscosity,
    },
    /// An index outside the range in which the relation can be solved.
    #[error("index {0} is outside -100 to 500")]
    IndexOutOfRange(f64),
}

fn shown(nu: KinematicViscosity) -> String {
    quantity(nu.amount(), Units::Si, Toward::Nearest)
}

/// The reference oils with some viscosity at 100 °C.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct References {
    /// Viscosity at 40 °C of the oil of index 0.
    pub l: KinematicViscosity,
    /// Viscosity at 40 °C of the oil of index 100.
    pub h: KinematicViscosity,
}

/// Reference oils of the same viscosity at 100 °C. The table serves up to and including 70 mm²/s,
/// where the equations above it differ by 0.03 %.
///
/// # Errors
/// [`IndexError::NotDefined`] below 2 mm²/s.
pub fn references(nu100: KinematicViscosity) -> Result<References, IndexError> {
    let (l, h) = l_h(defined(nu100)?);
    Ok(References {
        l: mm2_s(l),
        h: mm2_s(h),
    })
}

/// `Y`, once it is known to be in range; what unit conversion left of 2 counts as 2.
fn defined(nu100: KinematicViscosity) -> Result<f64, IndexError> {
    let y = to_mm2_s(nu100);
    if y < LOWEST_Y_MM2_S * (1.0 - 1e-12) || !y.is_finite() {
        return Err(IndexError::NotDefined { nu100 });
    }
    Ok(y.max(LOWEST_Y_MM2_S))
}

fn l_h(y: f64) -> (f64, f64) {
    if y > TABLE_ENDS_AT * (1.0 + 1e-12) {
        let l = y * (0.8353 * y + 14.67) - 216.0;
        let h = y * (0.1684 * y + 11.85) - 97.0;
        return (l, h);
    }
    let i = ROWS.partition_point(|r| r.0 <= y).clamp(1, ROWS.len() - 1);
    let ((y0, l0, h0), (y1, l1, h1)) = (ROWS[i - 1], ROWS[i]);
    let share = ((y - y0) / (y1 - y0)).min(1.0);
    (l0 + share * (l1 - l0), h0 + share * (h1 - h0))
}

/// Viscosity index, unrounded.
///
/// # Errors
/// [`IndexError::NotDefined`] below 2 mm²/s at 100 °C.
pub fn index(nu40: KinematicViscosity, nu100: KinematicViscosity) -> Result<Ratio, IndexError> {
    let y = defined(nu100)?;
    let u = to_mm2_s(nu40);
    let (l, h) = l_h(y);
    let vi = if u >= h {
        100.0 * (l - u) / (l - h)
    } else {
        (power_of_ten(lg(h / u) / lg(y)) - 1.0) / 0.00715 + 100.0
    };
    Ok(number(vi))
}

/// The index as reported: a whole number, halves to the even one. A value within 1e-9 of a half
/// counts as the half, so that the noise of the last digits does not decide.
pub fn whole(vi: Ratio) -> Ratio {
    let vi = vi.base();
    let below = vi.floor();
    let rest = vi - below;
    let up = if (rest - 0.5).abs() < 1e-9 {
        (below / 2.0).fract() != 0.0
    } else {
        rest > 0.5
    };
    number(if up { below + 1.0 } else { below })
}

/// Viscosity at 40 °C from that at 100 °C and the index.
///
/// # Errors
/// [`IndexError::NotDefined`] below 2 mm²/s at 100 °C.
pub fn nu40(nu100: KinematicViscosity, vi: Ratio) -> Result<KinematicViscosity, IndexError> {
    Ok(mm2_s(u_of(defined(nu100)?, vi.base())))
}

fn u_of(y: f64, vi: f64) -> f64 {
    let (l, h) = l_h(y);
    if vi <= 100.0 {
        l - vi * (l - h) / 100.0
    } else {
        h / power_of_ten(lg(1.0 + 0.00715 * (vi - 100.0)) * lg(y))
    }
}

/// Viscosity at 100 °C from that at 40 °C and the index.
///
/// # Errors
/// [`IndexError::NoSolution`] where the oil would be below 2 mm²/s at 100 °C;
/// [`IndexError::IndexOutOfRange`].
pub fn nu100(nu40: KinematicViscosity, vi: Ratio) -> Result<KinematicViscosity, IndexError> {
    let (u, vi) = (to_mm2_s(nu40), vi.base());
    if !INDEX_RANGE.contains(&vi) {
        return Err(IndexError::IndexOutOfRange(vi));
    }
    let thinnest = u_of(LOWEST_Y_MM2_S, vi);
    if u < thinnest * (1.0 - 1e-12) {
        let thinnest = mm2_s(thinnest);
        return Err(IndexError::NoSolution { nu40, vi, thinnest });
    }
    // U exceeds Y for every index in range, so Y = U is past the root.
    let root = bracketed(LOWEST_Y_MM2_S, u.max(3.0), |y| u_of(y, vi) - u);
    Ok(mm2_s(root.map_or(LOWEST_Y_MM2_S, |r| r.at)))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_relation_rises_with_y_for_every_index_it_is_solved_for() {
        for vi in -10..=50 {
            let vi = f64::from(vi) * 10.0;
            let mut last = 0.0;
            for i in 0..4000 {
                let y = 2.0 * power_of_ten(f64::from(i) / 1000.0);
                let u = u_of(y, vi);
                assert!(u > last, "U falls at Y {y}, index {vi}");
                assert!(u > y, "U below Y at Y {y}, index {vi}");
                last = u;
            }
        }
    }

    #[test]
    fn table_and_equations_nearly_meet() {
        let (at, above) = (l_h(70.0), l_h(70.000_001));
        assert!((at.0 - 4905.0).abs() < 1e-9 && (at.1 - 1558.0).abs() < 1e-9);
        assert!((above.0 / at.0 - 1.0).abs() < 3e-4 && (above.1 / at.1 - 1.0).abs() < 3e-4);
    }

    #[test]
    fn halves_go_to_the_even_number() {
        for (vi, whole_vi) in [
            (89.5, 90.0),
            (90.5, 90.0),
            (127.5, 128.0),
            (128.5, 128.0),
            (95.0, 95.0),
            (-0.5, 0.0),
            (-1.5, -2.0),
            (-2.5, -2.0),
            (92.43, 92.0),
        ] {
            let got = whole(number(vi)).base();
            assert!((got - whole_vi).abs() < 1e-12, "{vi}: {got}");
        }
    }
}
