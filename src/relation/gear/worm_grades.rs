//! Grades of worm gear oils by centre distance, worm speed and ambient.
//!
//! Source: ANSI/AGMA 9005-D94, cylindrical worms, and AGMA 250.04 before it, both from memory and
//! superseded. An older practice, printed beside the window and never a limit.

use crate::quantity::convert::{celsius, to_rpm};
use crate::quantity::{AngularVelocity, Length, ThermodynamicTemperature};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// The table.
pub static D94_WORM: Law = Law {
    name: "worm-agma-grade",
    title: "AGMA number of the compounded oil for a cylindrical worm",
    formula: "by centre distance, worm speed and ambient: 7 Comp below 10 degC, 8 Comp above; 7 Comp above 10 degC too for larger and faster worms",
    range: "ambient -10 to 50 degC; steel worm on bronze wheel",
    source: "ANSI/AGMA 9005-D94 (superseded, from memory)",
};

/// Up to this centre distance, in inches, the worm is slow up to this speed, r/min.
const SLOW: [(f64, f64); 5] = [
    (6.0, f64::INFINITY),
    (12.0, 450.0),
    (18.0, 300.0),
    (24.0, 250.0),
    (f64::INFINITY, 200.0),
];

/// AGMA number and its ISO viscosity grade; `None` outside the ambients of the table.
///
/// # Errors
/// A centre distance or speed that is not above zero.
pub fn compounded(
    centre_distance: Length,
    speed: AngularVelocity,
    ambient: ThermodynamicTemperature,
) -> Result<Option<(&'static str, u32)>, Outside> {
    let inches = positive("the centre distance", centre_distance)? / 0.0254;
    positive("the speed", speed)?;
    let slow_to = SLOW
        .iter()
        .find(|(to, _)| inches <= *to)
        .map_or(200.0, |(_, rpm)| *rpm);
    Ok(if ambient < celsius(-10.0) || ambient > celsius(50.0) {
        None
    } else if ambient >= celsius(10.0) && to_rpm(speed) <= slow_to {
        Some(("8 Comp", 680))
    } else {
        Some(("7 Comp", 460))
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{mm, rpm};

    /// AGMA 9005-D94, cylindrical worms (from memory).
    #[test]
    fn small_worms_take_8_comp_in_the_warm() {
        let at = |a, n, t| compounded(mm(a), rpm(n), celsius(t)).expect("a worm");
        assert_eq!(at(125.0, 1450.0, 20.0), Some(("8 Comp", 680)));
        assert_eq!(at(125.0, 1450.0, 0.0), Some(("7 Comp", 460)));
        assert_eq!(at(200.0, 1450.0, 20.0), Some(("7 Comp", 460)));
        assert_eq!(at(200.0, 400.0, 20.0), Some(("8 Comp", 680)));
        assert_eq!(at(200.0, 400.0, -20.0), None);
        assert!(compounded(mm(0.0), rpm(400.0), celsius(20.0)).is_err());
        assert!(compounded(mm(100.0), rpm(0.0), celsius(20.0)).is_err());
    }
}
