//! One viscosity-temperature curve of an oil, whatever it is known by.

use crate::quantity::convert::{celsius, number};
use crate::quantity::{KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::relation::oil::piecewise;
use crate::relation::oil::polymer::ThickenedOil;
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
    /// Base oil and polymer, each known.
    Thickened(ThickenedOil),
    /// Below the coldest point stated, through viscosities measured cold.
    Cold(Box<Joined>),
}

/// A curve with its cold end measured.
#[derive(Clone, Debug, PartialEq)]
pub struct Joined {
    /// From the joint up.
    pub above: Curve,
    /// From the joint down, through the measured points, the coldest stretch carried on.
    pub below: piecewise::Pieces,
    /// The joint: the coldest temperature stated.
    pub joint: ThermodynamicTemperature,
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
            Self::Thickened(oil) => {
                let nu = oil.nu_at(at);
                tangent(nu, at, oil.fall_at(at), form_for(nu, oil.base().form()))
            }
            Self::Cold(joined) => {
                if at < joined.joint {
                    joined.below.line_at(at)
                } else {
                    joined.above.line_at(at)
                }
            }
        }
    }

    /// Whether the lines that judge it are tangents.
    pub fn is_bent(&self) -> bool {
        !matches!(self, Self::Plain(_))
    }

    /// The same curve after a loss, the same share at every temperature; where base and polymer
    /// are known, the same share of the polymer's contribution instead, with the loss meant at
    /// 100 °C, so that the base oil is never undercut.
    ///
    /// # Panics
    /// Never: the share of the polymer lost is held between 0 and 1.
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
            Self::Thickened(oil) => {
                let p = oil.share_at(celsius(100.0)).base();
                let index = if p > 0.0 { loss * (1.0 + p) / p } else { 0.0 };
                let sheared = oil.sheared(number(index.clamp(0.0, 1.0)));
                Self::Thickened(sheared.expect("the index is held between 0 and 1"))
            }
            Self::Cold(joined) => joined.above.after_loss(loss),
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
            Self::Thickened(oil) => oil.nu_at(at),
            Self::Cold(joined) if at < joined.joint => joined.below.nu_at(at),
            Self::Cold(joined) => joined.above.nu_at(at),
        }
    }

    fn temperature_at(&self, nu: KinematicViscosity) -> Result<ThermodynamicTemperature, Misfit> {
        match self {
            Self::Plain(curve) => curve.temperature_at(nu),
            Self::Share { of, keep } => {
                of.temperature_at(KinematicViscosity::from_base(nu.base() / keep))
            }
            Self::Thickened(oil) => oil.temperature_at(nu),
            Self::Cold(joined) => {
                if nu > joined.above.nu_at(joined.joint) {
                    joined.below.temperature_at(nu)
                } else {
                    joined.above.temperature_at(nu)
                }
            }
        }
    }
}
