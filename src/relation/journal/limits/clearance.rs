//! The clearance a journal bearing should have.

use crate::quantity::convert::number;
use crate::quantity::{Measure, Ratio, Velocity};
use crate::relation::Law;

/// Vogelpohl's mean clearance.
pub static LAW: Law = Law {
    name: "journal-clearance",
    title: "usual mean relative clearance of a journal bearing",
    formula: "psi = 0.0008 U^(1/4), U in m/s",
    range: "a guide for metal bearings; adjust to load and shaft diameter",
    source: "Vogelpohl (from memory)",
};

/// Standardised mean relative clearances of ISO 7902-3 (from memory), thousandths.
pub const STEPS: [f64; 8] = [0.56, 0.8, 1.12, 1.32, 1.6, 1.9, 2.24, 3.15];

/// Relative clearance of [`LAW`].
pub fn usual(surface_speed: Velocity) -> Ratio {
    let u = surface_speed.base().abs();
    number(0.8e-3 * u.sqrt().sqrt())
}

/// The standardised step nearest to a relative clearance.
pub fn nearest_step(clearance: Ratio) -> Ratio {
    let wanted = clearance.base() * 1e3;
    let mut best = STEPS[0];
    for step in STEPS {
        if (step - wanted).abs() < (best - wanted).abs() {
            best = step;
        }
    }
    number(best * 1e-3)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn rises_with_the_fourth_root_of_speed() {
        // 16 m/s: twice 0.8 per mille
        let psi = usual(Velocity::from_base(16.0));
        assert!((psi.base() - 1.6e-3).abs() < 1e-15);
        assert!((nearest_step(psi).base() - 1.6e-3).abs() < 1e-15);
        assert!((nearest_step(number(5e-3)).base() - 3.15e-3).abs() < 1e-15);
    }
}
