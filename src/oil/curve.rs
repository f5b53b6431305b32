//! One viscosity-temperature curve of an oil, whatever it is known by.

use crate::quantity::{KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::relation::oil::piecewise;
use crate::relation::oil::tangent::{fall, tangent};
use crate::relation::oil::viscosity_temperature::{Form, Line, Misfit, ViscosityCurve};

/// A curve of kinematic viscosity over temperature.
#[derive(Clone, Debug, PartialEq)]
pub enum Curve {
    /// One line of ASTM D341, or lines between neighbouring points.
    Plain(piecewise::Curve),
    /// A plain curve times a share, the same at every temperature.
    Share {
        /// The curve.
        of: piecewise::Curve,
        /// The share kept, above 0, at most 1.
        keep: f64,
    },
}

impl Curve {
    /// Where it is one straight line in the chart, that line.
    pub fn line(&self) -> Option<Line> {
        match self {
            Self::Plain(piecewise::Curve::Line(line)) => Some(*line),
            _ => None,
        }
    }

    /// The line itself where the curve is straight, its tangent elsewhere.
    pub fn line_at(&self, at: ThermodynamicTemperature) -> Line {
        match self {
            Self::Plain(curve) => curve.line_at(at),
            Self::Share { of, keep } => {
                let line = of.line_at(at);
                let nu = KinematicViscosity::from_base(line.nu_at(at).base() * keep);
                tangent(nu, at, fall(line, at), form_for(nu, line.form()))
            }
        }
    }

    /// Whether the lines that judge it are tangents.
    pub fn is_bent(&self) -> bool {
        !matches!(self, Self::Plain(_))
    }

    /// The same curve after a uniform loss.
    #[must_use]
    pub fn after_loss(&self, loss: f64) -> Self {
        match self {
            Self::Plain(curve) if loss > 0.0 => Self::Share {
                of: curve.clone(),
                keep: 1.0 - loss,
            },
            Self::Share { of, keep } => Self::Share {
                of: of.clone(),
                keep: keep * (1.0 - loss),
            },
            Self::Plain(_) => self.clone(),
        }
    }
}

/// Below 2 mm²/s the short form has no standing.
fn form_for(nu: KinematicViscosity, form: Form) -> Form {
    if nu.base() < 2e-6 { Form::Full } else { form }
}

impl ViscosityCurve for Curve {
    fn nu_at(&self, at: ThermodynamicTemperature) -> KinematicViscosity {
        match self {
            Self::Plain(curve) => curve.nu_at(at),
            Self::Share { of, keep } => KinematicViscosity::from_base(of.nu_at(at).base() * keep),
        }
    }

    fn temperature_at(&self, nu: KinematicViscosity) -> Result<ThermodynamicTemperature, Misfit> {
        match self {
            Self::Plain(curve) => curve.temperature_at(nu),
            Self::Share { of, keep } => {
                of.temperature_at(KinematicViscosity::from_base(nu.base() / keep))
            }
        }
    }
}
