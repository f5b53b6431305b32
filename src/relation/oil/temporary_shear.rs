//! Temporary shear: the polymer's contribution falls while the oil is sheared fast, and returns.
//!
//! A second plateau is not always there. Exponents of 0.6 to 1 and a plateau of 0.2 to 0.6 are
//! common practice. Ordinary multigrades keep 0.85 to 0.95 of their viscosity at 150 °C and
//! 1e6 1/s, wide ones 0.80 (common practice).

use crate::numeric::math::pow;
use crate::quantity::convert::number;
use crate::quantity::{DynamicViscosity, Measure, Ratio, ShearRate, Time};
use crate::relation::Law;

/// Cross, on the polymer's share.
pub static CROSS: Law = Law {
    name: "temporary-shear",
    title: "Share of the polymer left under shear",
    formula: "P = P0 (f + (1 - f) / (1 + (g / g_c)^m))",
    range: "polymer-thickened oil; m 0.6 to 1, f 0.2 to 0.6 (common practice)",
    source: "Cross, applied to the polymer's share",
};

/// Viscosity left under shear.
pub static RATIO: Law = Law {
    name: "temporary-shear-ratio",
    title: "Viscosity under shear over viscosity at rest",
    formula: "eta / eta_0 = (1 + P) / (1 + P0)",
    range: "polymer-thickened oil whose base oil does not thin",
    source: "definition of the share",
};

/// Carreau-Yasuda.
pub static CARREAU: Law = Law {
    name: "carreau",
    title: "Viscosity under shear after Carreau and Yasuda",
    formula: "eta = eta_inf + (eta_0 - eta_inf) (1 + (lambda g)^a)^((n - 1) / a)",
    range: "n 0 to 1, a above 0",
    source: "Carreau; Yasuda; textbook form",
};

/// Share effective in the high-shear test.
pub static FROM_HTHS: Law = Law {
    name: "thickening-at-high-shear",
    title: "Share of the polymer effective at 150 degC and 1e6 1/s",
    formula: "P_eff = HTHS / eta_base(150 degC) - 1",
    range: "polymer-thickened oil",
    source: "definition; HTHS by ASTM D4683, D4741 or D5481",
};

/// Why there is no figure under shear.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum RateError {
    /// A parameter out of its range.
    #[error("{what} is {value}; it must be {range}")]
    Parameter {
        /// Which.
        what: &'static str,
        /// Its value.
        value: f64,
        /// What it may be.
        range: &'static str,
    },
    /// The high-shear viscosity is below the base oil's.
    #[error("the HTHS viscosity is below that of the base oil: one of them is wrong")]
    BelowBase,
    /// No critical rate gives the measured loss.
    #[error(
        "the polymer keeps {kept:.2} of its share at high shear, outside {plateau:.2} to 1: \
        no critical rate gives that"
    )]
    NotReached {
        /// What is kept.
        kept: f64,
        /// The plateau assumed.
        plateau: f64,
    },
}

/// How a polymer's share falls with shear rate.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Cross {
    plateau: f64,
    critical_rate: f64,
    exponent: f64,
}

impl Cross {
    /// From the share of the contribution that is never lost, the rate at which half of the rest
    /// is gone, and the exponent.
    ///
    /// # Errors
    /// [`RateError::Parameter`].
    pub fn new(plateau: Ratio, critical: ShearRate, exponent: Ratio) -> Result<Self, RateError> {
        checked("the plateau", plateau.base(), 0.0..=1.0, "between 0 and 1")?;
        checked("the exponent", exponent.base(), 1e-3..=10.0, "above 0")?;
        checked(
            "the critical rate",
            critical.base(),
            f64::MIN_POSITIVE..=f64::MAX,
            "above 0",
        )?;
        Ok(Self {
            plateau: plateau.base(),
            critical_rate: critical.base(),
            exponent: exponent.base(),
        })
    }

    /// Fitted to the share `effective` that is left of `at_rest` at a rate, as in the high-shear
    /// test, with plateau and exponent assumed.
    ///
    /// # Errors
    /// [`RateError::NotReached`] where the measured loss is outside what the plateau allows.
    pub fn calibrated(
        at_rest: Ratio,
        effective: Ratio,
        rate: ShearRate,
        assumed: (Ratio, Ratio),
    ) -> Result<Self, RateError> {
        let (plateau, exponent) = (assumed.0.base(), assumed.1.base());
        let kept = effective.base() / at_rest.base();
        let spread = (1.0 - plateau) / (kept - plateau) - 1.0;
        if !(kept > plateau && kept < 1.0) {
            return Err(RateError::NotReached { kept, plateau });
        }
        let critical = rate.base() / pow(spread, 1.0 / exponent);
        Self::new(assumed.0, ShearRate(critical), assumed.1)
    }

    /// The same polymer in a base oil of another viscosity: the critical rate falls as the base
    /// thickens, at nearly constant stress.
    #[must_use]
    pub fn at_base_viscosity(self, was: DynamicViscosity, is: DynamicViscosity) -> Self {
        let critical_rate = self.critical_rate * was.base() / is.base();
        Self {
            critical_rate,
            ..self
        }
    }

    /// The rate at which half of what can be lost is lost.
    pub fn critical_rate(self) -> ShearRate {
        ShearRate(self.critical_rate)
    }

    /// Share of the polymer's contribution left at a rate, one at rest.
    pub fn kept(self, rate: ShearRate) -> Ratio {
        let lost = pow(rate.base() / self.critical_rate, self.exponent);
        number(self.plateau + (1.0 - self.plateau) / (1.0 + lost))
    }

    /// The polymer's share at a rate.
    pub fn share(self, at_rest: Ratio, rate: ShearRate) -> Ratio {
        number(at_rest.base() * self.kept(rate).base())
    }
}

/// Viscosity under shear over that at rest, from the polymer's shares.
pub fn viscosity_ratio(under_shear: Ratio, at_rest: Ratio) -> Ratio {
    number((1.0 + under_shear.base()) / (1.0 + at_rest.base()))
}

/// The polymer's share that the high-shear test found: HTHS over the base oil's viscosity at
/// 150 °C, less one.
///
/// # Errors
/// [`RateError::BelowBase`].
pub fn share_at_high_shear(
    hths: DynamicViscosity,
    base_at_150: DynamicViscosity,
) -> Result<Ratio, RateError> {
    if hths < base_at_150 {
        return Err(RateError::BelowBase);
    }
    Ok(number(hths.base() / base_at_150.base() - 1.0))
}

/// Viscosity over shear rate after Carreau and Yasuda.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Carreau {
    /// At rest.
    pub at_rest: DynamicViscosity,
    /// At rates without limit; often taken as the base oil's.
    pub at_limit: DynamicViscosity,
    /// Relaxation time.
    pub time: Time,
    /// Power-law exponent, 0 to 1.
    pub n: Ratio,
    /// Breadth of the transition; 2 is Carreau's own.
    pub a: Ratio,
}

impl Carreau {
    /// Viscosity at a rate.
    ///
    /// # Errors
    /// [`RateError::Parameter`].
    pub fn viscosity(&self, rate: ShearRate) -> Result<DynamicViscosity, RateError> {
        let (n, a) = (self.n.base(), self.a.base());
        checked("n", n, 0.0..=1.0, "between 0 and 1")?;
        checked("a", a, 1e-3..=100.0, "above 0")?;
        let (zero, limit) = (self.at_rest.base(), self.at_limit.base());
        let fall = pow(1.0 + pow(self.time.base() * rate.base(), a), (n - 1.0) / a);
        Ok(DynamicViscosity::from_base(limit + (zero - limit) * fall))
    }
}

fn checked(
    what: &'static str,
    value: f64,
    within: std::ops::RangeInclusive<f64>,
    range: &'static str,
) -> Result<(), RateError> {
    if within.contains(&value) {
        return Ok(());
    }
    Err(RateError::Parameter { what, value, range })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn calibration_returns_the_measured_share() {
        let rate = ShearRate(1e6);
        let assumed = (number(0.3), number(0.8));
        let cross = Cross::calibrated(number(0.9), number(0.6), rate, assumed).expect("in range");
        assert!((cross.share(number(0.9), rate).base() - 0.6).abs() < 1e-12);
        assert!(cross.share(number(0.9), ShearRate(1e8)).base() > 0.27);
        let none = Cross::calibrated(number(0.9), number(0.2), rate, assumed);
        assert!(matches!(none, Err(RateError::NotReached { .. })));
    }

    #[test]
    fn carreau_runs_between_its_plateaus() {
        let eta = DynamicViscosity::from_base;
        let oil = Carreau {
            at_rest: eta(0.01),
            at_limit: eta(0.006),
            time: Time::from_base(1e-6),
            n: number(0.6),
            a: number(2.0),
        };
        let at = |g: f64| oil.viscosity(ShearRate(g)).map_or(f64::NAN, Measure::base);
        assert!((at(0.0) - 0.01).abs() < 1e-15);
        assert!(at(1e5) > at(1e6) && at(1e6) > at(1e8) && at(1e8) > 0.006);
        // (1 + 1)^((0.6 - 1) / 2) = 2^-0.2 = 0.870551 of the span at lambda g = 1
        assert!((at(1e6) - (0.006 + 0.004 * 0.870_550_563)).abs() < 1e-11);
    }
}
