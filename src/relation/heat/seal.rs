//! Power lost under the lip of a shaft seal.

use crate::quantity::convert::{to_mm, to_rpm};
use crate::quantity::{AngularVelocity, Length, Measure, Power};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// Loss of a radial lip seal.
pub static LAW: Law = Law {
    name: "seal-loss",
    title: "Power lost under the lip of a radial shaft seal",
    formula: "P = 7.69 10^-6 d^2 n",
    range: "W; shaft d in mm, n in r/min; one lip, no viscosity in it",
    source: "ISO/TR 14179-2 (from memory)",
};

/// Loss of [`LAW`].
///
/// # Errors
/// A diameter or speed that is not above zero.
pub fn loss(shaft: Length, speed: AngularVelocity) -> Result<Power, Outside> {
    positive("the diameter of the shaft", shaft)?;
    positive("the speed", speed)?;
    let d_mm = to_mm(shaft);
    Ok(Power::from_base(7.69e-6 * d_mm * d_mm * to_rpm(speed)))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{mm, rpm};

    /// By hand: `7.69e-6 x 3600 x 1500 = 41.5`.
    #[test]
    fn sixty_millimetres_at_1500() {
        let lost = loss(mm(60.0), rpm(1500.0)).map_or(f64::NAN, Measure::base);
        assert!((lost - 41.526).abs() < 1e-3, "{lost}");
    }
}
