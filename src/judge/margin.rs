//! The margin of one oil at one limit.

use crate::numeric::math::lg;
use crate::oil::Curve;
use crate::quantity::{KinematicViscosity, Measure, ThermodynamicTemperature, VgStep};
use crate::relation::oil::tangent::{LN_T40, ln_ln_z, parallel_nu40};
use crate::relation::oil::viscosity_temperature::{Form, Line};

/// A limit on viscosity at a temperature, ready to be compared with many lines.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Jaw {
    /// The limit, m²/s.
    pub nu: f64,
    /// Its temperature, K.
    pub t: f64,
    /// Natural logarithm of that.
    pub ln_t: f64,
    /// `ln ln Z` of the limit, short form and full form.
    w: [f64; 2],
}

impl Jaw {
    /// A limit at a temperature.
    pub fn new(nu: KinematicViscosity, at: ThermodynamicTemperature) -> Self {
        Self {
            nu: nu.base(),
            t: at.base(),
            ln_t: crate::numeric::math::ln(at.base()),
            w: [ln_ln_z(Form::Short, nu), ln_ln_z(Form::Full, nu)],
        }
    }

    /// `ln ln Z` in the form of a line.
    #[inline]
    pub fn w(&self, form: Form) -> f64 {
        match form {
            Form::Short => self.w[0],
            Form::Full => self.w[1],
        }
    }
}

/// A straight line with its viscosity at 40 °C at hand.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Straight {
    /// The line.
    pub line: Line,
    /// Its viscosity at 40 °C, m²/s.
    pub nu40: f64,
    /// `ln ln Z` of that.
    pub ln_ln_z40: f64,
}

impl Straight {
    /// Of a line.
    pub fn of(line: Line) -> Self {
        Self {
            line,
            nu40: line.nu40().base(),
            ln_ln_z40: line.ln_ln_z_at(LN_T40),
        }
    }

    /// VG steps of the line above a limit; negative below.
    #[inline]
    pub fn above(&self, jaw: &Jaw) -> VgStep {
        let form = self.line.form();
        let limit40 = parallel_nu40(form, self.line.slope_b(), jaw.w(form), jaw.ln_t);
        VgStep(6.0 * lg(self.nu40 / limit40))
    }

    /// Temperature at which the line meets a viscosity, K.
    #[inline]
    pub fn meets(&self, jaw: &Jaw) -> f64 {
        self.line.temperature_of_w(jaw.w(self.line.form()))
    }
}

/// A curve prepared for judging.
#[derive(Clone, Debug, PartialEq)]
pub enum Ready {
    /// A straight line.
    Straight(Straight),
    /// Anything else: its tangent is taken at the limit.
    Bent(Box<Curve>),
}

impl Ready {
    /// Of a curve.
    pub fn of(curve: &Curve) -> Self {
        match curve.line() {
            Some(line) => Self::Straight(Straight::of(line)),
            None => Self::Bent(Box::new(curve.clone())),
        }
    }

    /// The straight line that judges at a temperature.
    pub fn at(&self, t: f64) -> Straight {
        match self {
            Self::Straight(line) => *line,
            Self::Bent(curve) => {
                Straight::of(curve.line_at(ThermodynamicTemperature::from_base(t)))
            }
        }
    }

    /// VG steps above a limit.
    #[inline]
    pub fn above(&self, jaw: &Jaw) -> VgStep {
        match self {
            Self::Straight(line) => line.above(jaw),
            Self::Bent(_) => self.at(jaw.t).above(jaw),
        }
    }

    /// Viscosity at a temperature, m²/s.
    pub fn nu(&self, t: f64) -> f64 {
        use crate::relation::oil::viscosity_temperature::ViscosityCurve;
        let at = ThermodynamicTemperature::from_base(t);
        match self {
            Self::Straight(line) => line.line.nu_at(at).base(),
            Self::Bent(curve) => curve.nu_at(at).base(),
        }
    }

    /// Temperature at which the curve meets a viscosity, K; not finite where it never does.
    pub fn meets(&self, jaw: &Jaw) -> f64 {
        use crate::relation::oil::viscosity_temperature::ViscosityCurve;
        match self {
            Self::Straight(line) => line.meets(jaw),
            Self::Bent(curve) => curve
                .temperature_at(KinematicViscosity::from_base(jaw.nu))
                .map_or(f64::NAN, Measure::base),
        }
    }
}
