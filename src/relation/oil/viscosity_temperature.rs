//! Viscosity and temperature: the straight line of ASTM D341,
//! `lg lg Z = A - B lg T`, after Walther and Ubbelohde.
//!
//! Holds for a homogeneous liquid, from the cloud point up to the initial boiling point, 0.21 to
//! 2e7 mm²/s. Between its points a line is good to 1 to 3 % for hydrocarbons; 40 K below the
//! lowest it may be wrong by 10 to 25 % either way, before wax or polymer.
//!
//! `Z` is `nu + 0.7` where every point is at least 2 mm²/s, and the full form of [`d341_z`]
//! otherwise; a line is fitted and evaluated with the same `Z` everywhere.
//!
//! [`d341_z`]: super::d341_z

mod fit;

pub(super) use fit::in_order;
pub use fit::{Point, Weights};

use super::d341_z;
use crate::numeric::math::{exp, ln};
use crate::quantity::convert::{celsius, mm2_s, number, to_mm2_s};
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{
    KinematicViscosity, Measure, Ratio, TemperatureCoefficient, ThermodynamicTemperature,
};
use crate::relation::Law;
use std::f64::consts::LN_10;

/// Constants of the line through points.
pub static LINE: Law = Law {
    name: "viscosity-line",
    title: "Line of viscosity over temperature through measured points",
    formula: "B = (W1 - W2) / (lg T2 - lg T1), A = W1 + B lg T1, W = lg lg Z; more than two points: \
              least squares with weights (Z ln Z / (nu dZ/dnu))^2",
    range: "0.21 to 2e7 mm2/s, homogeneous liquid between cloud point and boiling point",
    source: "ASTM D341; weights derived so that the per-cent error is least",
};

/// Viscosity of the line at a temperature.
pub static VISCOSITY: Law = Law {
    name: "viscosity-at",
    title: "Viscosity at a temperature",
    formula: "lg lg Z = A - B lg T, Z = nu + 0.7 (all points 2 mm2/s or more), else \
              Z = nu + 0.7 + exp(-1.47 - 1.84 nu - 0.51 nu^2)",
    range: "0.21 to 2e7 mm2/s, homogeneous liquid between cloud point and boiling point",
    source: "ASTM D341-09 to -20; the limits are from memory",
};

/// Temperature at which the line has a viscosity.
pub static TEMPERATURE: Law = Law {
    name: "temperature-at",
    title: "Temperature at which an oil has a viscosity",
    formula: "T = 10^((A - lg lg Z) / B)",
    range: "0.21 to 2e7 mm2/s, homogeneous liquid between cloud point and boiling point",
    source: "ASTM D341-09 to -20, solved for the temperature",
};

/// Temperature coefficient of viscosity of the line.
pub static BETA: Law = Law {
    name: "temperature-coefficient",
    title: "Temperature coefficient of viscosity",
    formula: "beta = B Z ln Z / (T nu dZ/dnu)",
    range: "as the line",
    source: "ASTM D341, differentiated; the change of density, 1 to 3 % of beta, is left out",
};

/// Lowest viscosity the standard covers, mm²/s (from memory).
pub const LOWEST_MM2_S: f64 = 0.21;
/// Highest viscosity the standard covers, mm²/s (from memory).
pub const HIGHEST_MM2_S: f64 = 2e7;
/// From here up the short form is used, mm²/s.
pub const SHORT_FORM_FROM_MM2_S: f64 = 2.0;

const LN_LN_10: f64 = 0.834_032_445_247_956_1;

/// Which `Z` a line uses.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Form {
    /// `nu + 0.7`.
    Short,
    /// `nu + 0.7 + exp(-1.47 - 1.84 nu - 0.51 nu²)`.
    Full,
}

/// Why there is no line, or no answer on it.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum Misfit {
    /// Fewer than two points.
    #[error("one viscosity alone gives no line: two at different temperatures are needed")]
    TooFew,
    /// Two points at one temperature.
    #[error("{} is given twice", shown(*at))]
    SameTemperature {
        /// The temperature.
        at: ThermodynamicTemperature,
    },
    /// A viscosity the standard does not cover.
    #[error("{} is outside {lowest} to 2e7 mm2/s, where this line has a meaning", shown(*nu))]
    OutOfRange {
        /// The viscosity.
        nu: KinematicViscosity,
        /// Lowest the line covers, mm²/s.
        lowest: f64,
    },
    /// The oil would thicken as it warms.
    #[error("{} at {} is not thinner than {} at {}: values exchanged or mistyped",
        shown(hot.nu), shown(hot.at), shown(cold.nu), shown(cold.at))]
    UpsideDown {
        /// The colder point.
        cold: Point,
        /// The warmer point.
        hot: Point,
    },
    /// A line that does not fall.
    #[error("the slope B is {0}; it must be above zero")]
    Slope(f64),
}

fn shown<Q: Measure>(q: Q) -> String {
    quantity(q.amount(), Units::Si, Toward::Nearest)
}

/// A curve of viscosity over temperature.
pub trait ViscosityCurve {
    /// Kinematic viscosity at a temperature.
    fn nu_at(&self, at: ThermodynamicTemperature) -> KinematicViscosity;

    /// Temperature at which it has a viscosity.
    ///
    /// # Errors
    /// [`Misfit::OutOfRange`].
    fn temperature_at(&self, nu: KinematicViscosity) -> Result<ThermodynamicTemperature, Misfit>;
}

/// A line of ASTM D341.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Line {
    a: f64,
    b: f64,
    form: Form,
}

impl Line {
    /// From published constants, logarithms to base ten and kelvins from 273.15. Constants made
    /// with 273 instead give another line.
    ///
    /// # Errors
    /// [`Misfit::Slope`] where `b` is not above zero.
    pub fn from_constants(a: Ratio, b: Ratio, form: Form) -> Result<Self, Misfit> {
        if b.base() > 0.0 && a.base().is_finite() && b.base().is_finite() {
            let (a, b) = (a.base(), b.base());
            return Ok(Self { a, b, form });
        }
        Err(Misfit::Slope(b.base()))
    }

    /// Through two points.
    ///
    /// # Errors
    /// See [`Misfit`].
    pub fn through(one: Point, other: Point) -> Result<Self, Misfit> {
        Self::fit(&[one, other], Weights::PerCent)
    }

    /// Intercept `A`.
    pub fn intercept(self) -> Ratio {
        number(self.a)
    }

    /// Slope `B`: 3.4 to 4.6 for mineral oils, 2.2 to 3.5 for PAO, esters and PAG, 1 to 2 for
    /// silicones (computed from typical data). Outside 1 to 5 the data are suspect.
    pub fn slope(self) -> Ratio {
        number(self.b)
    }

    /// The form of `Z`.
    pub fn form(self) -> Form {
        self.form
    }

    /// `Z` at a temperature.
    pub fn z_at(self, at: ThermodynamicTemperature) -> Ratio {
        number(exp(self.ln_z(ln(at.base()))))
    }

    /// Kinematic viscosity at a temperature. Rises to infinity where the line passes the range of
    /// numbers; below 0.21 mm²/s the figure has no standing.
    pub fn nu_at(self, at: ThermodynamicTemperature) -> KinematicViscosity {
        KinematicViscosity::from_base(self.nu_at_ln(ln(at.base())))
    }

    /// The same from the natural logarithm of the temperature in kelvins, m²/s: the form for many
    /// evaluations at one temperature. Same bits as [`Line::nu_at`].
    #[inline]
    pub(crate) fn nu_at_ln(self, ln_t: f64) -> f64 {
        let y = exp(self.ln_z(ln_t)) - 0.7;
        match self.form {
            Form::Short => y * 1e-6,
            Form::Full => d341_z::undo(y) * 1e-6,
        }
    }

    /// Natural logarithm of `Z`: `lg lg Z = A - B lg T` in natural logarithms.
    #[inline]
    fn ln_z(self, ln_t: f64) -> f64 {
        exp(self.a * LN_10 + LN_LN_10 - self.b * ln_t)
    }

    /// Temperature at which the line has a viscosity.
    ///
    /// # Errors
    /// [`Misfit::OutOfRange`].
    pub fn temperature_at(
        self,
        nu: KinematicViscosity,
    ) -> Result<ThermodynamicTemperature, Misfit> {
        let nu_mm2_s = to_mm2_s(nu);
        let lowest = match self.form {
            Form::Short => 0.31,
            Form::Full => LOWEST_MM2_S,
        };
        if !(lowest * (1.0 - 1e-9)..=HIGHEST_MM2_S * (1.0 + 1e-9)).contains(&nu_mm2_s) {
            return Err(Misfit::OutOfRange { nu, lowest });
        }
        let ln_t = (self.a * LN_10 + LN_LN_10 - ln(ln(self.form.z(nu_mm2_s)))) / self.b;
        Ok(ThermodynamicTemperature::from_base(exp(ln_t)))
    }

    /// The line of slope `b` through a viscosity at a temperature.
    pub(super) fn with_slope(
        nu: KinematicViscosity,
        at: ThermodynamicTemperature,
        b: f64,
        form: Form,
    ) -> Self {
        let k = ln(ln(form.z(to_mm2_s(nu)))) + b * ln(at.base());
        Self {
            a: (k - LN_LN_10) / LN_10,
            b,
            form,
        }
    }

    /// The parallel of this line through a viscosity at a temperature: the line slid, without
    /// turning it, until it touches a limit.
    #[must_use]
    pub fn parallel_through(self, nu: KinematicViscosity, at: ThermodynamicTemperature) -> Self {
        Self::with_slope(nu, at, self.b, self.form)
    }

    /// Slope `B` as a plain number, for many evaluations.
    #[inline]
    pub(crate) fn slope_b(self) -> f64 {
        self.b
    }

    /// `ln ln Z` of the line at a temperature, from the logarithm of that.
    #[inline]
    pub(crate) fn ln_ln_z_at(self, ln_t: f64) -> f64 {
        self.a * LN_10 + LN_LN_10 - self.b * ln_t
    }

    /// Temperature, K, at which the line has the viscosity whose `ln ln Z` is `w`.
    #[inline]
    pub(crate) fn temperature_of_w(self, w: f64) -> f64 {
        exp((self.a * LN_10 + LN_LN_10 - w) / self.b)
    }

    /// Viscosity at 40 °C.
    pub fn nu40(self) -> KinematicViscosity {
        self.nu_at(celsius(40.0))
    }

    /// Viscosity at 100 °C.
    pub fn nu100(self) -> KinematicViscosity {
        self.nu_at(celsius(100.0))
    }

    /// Temperature coefficient of viscosity, `-d ln nu / dT`, 1/K; stands for `-d ln eta / dT`,
    /// from which it differs by the expansion of the oil, 0.0007 to 0.001 1/K.
    pub fn beta(self, at: ThermodynamicTemperature) -> TemperatureCoefficient {
        let t_k = at.base();
        let ln_z = self.ln_z(ln(t_k));
        let nu_mm2_s = to_mm2_s(self.nu_at(at));
        let rise = exp(ln_z) / (nu_mm2_s * self.form.dz(nu_mm2_s));
        TemperatureCoefficient(self.b * ln_z * rise / t_k)
    }

    /// How far the line lies from each point, line over point less one.
    pub fn residuals(self, points: &[Point]) -> Vec<Ratio> {
        points
            .iter()
            .map(|p| number(self.nu_at(p.at).base() / p.nu.base() - 1.0))
            .collect()
    }
}

impl ViscosityCurve for Line {
    fn nu_at(&self, at: ThermodynamicTemperature) -> KinematicViscosity {
        (*self).nu_at(at)
    }

    fn temperature_at(&self, nu: KinematicViscosity) -> Result<ThermodynamicTemperature, Misfit> {
        (*self).temperature_at(nu)
    }
}

impl Form {
    /// The form for a set of points: short where none is below 2 mm²/s.
    pub fn of(points: &[Point]) -> Self {
        let short = SHORT_FORM_FROM_MM2_S * (1.0 - 1e-12);
        if points.iter().all(|p| to_mm2_s(p.nu) >= short) {
            Self::Short
        } else {
            Self::Full
        }
    }

    pub(super) fn z(self, nu_mm2_s: f64) -> f64 {
        match self {
            Self::Short => nu_mm2_s + 0.7,
            Self::Full => nu_mm2_s + 0.7 + d341_z::correction(nu_mm2_s),
        }
    }

    pub(super) fn dz(self, nu_mm2_s: f64) -> f64 {
        match self {
            Self::Short => 1.0,
            Self::Full => d341_z::slope(nu_mm2_s),
        }
    }

    /// Viscosity of a `Z` of this form.
    pub(super) fn undo(self, z: f64) -> KinematicViscosity {
        match self {
            Self::Short => mm2_s(z - 0.7),
            Self::Full => mm2_s(d341_z::undo(z - 0.7)),
        }
    }
}
