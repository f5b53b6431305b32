//! Film demands: a film height is asked for, and the viscosity it needs is solved for each oil,
//! because the pressure-viscosity coefficient and the density are the oil's own.

use crate::numeric::math::{exp, ln};
use crate::oil::Curves;
use crate::quantity::convert::{dynamic, kinematic};
use crate::quantity::{
    AngularVelocity, DynamicViscosity, Force, KinematicViscosity, Length, Measure, Pressure,
    PressureViscosity, ThermodynamicTemperature, Velocity,
};
use crate::relation::Law;
use crate::relation::bearing::film::{self as bearing, Duty, Element, at_race};
use crate::relation::bearing::kinematics::{Inside, Race};
use crate::relation::film::groups::{Inlet, LineLoad, PointLoad, of_ellipse, of_line};
use crate::relation::film::{ellipse, inverse, line};
use crate::relation::gear::film::{self as tooth, ToothContact};
use crate::relation::oil::viscosity_temperature::Line;
use crate::relation::outside::Outside;

/// A contact whose film can be worked out.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum FilmContact {
    /// Line contact, minimum film by Dowson and Higginson 1968.
    Line {
        /// Mean speed of the surfaces.
        speed: Velocity,
        /// Load, radius, modulus.
        load: LineLoad,
    },
    /// Point contact, minimum film by Hamrock and Dowson.
    Ellipse {
        /// Mean speed of the surfaces.
        speed: Velocity,
        /// Load, radii, modulus.
        load: PointLoad,
    },
    /// The hardest loaded element of a rolling bearing at one race.
    Race {
        /// The inside of the bearing.
        inside: Inside,
        /// Ball or roller.
        element: Element,
        /// Speed of the rings against each other.
        speed: AngularVelocity,
        /// Load on the element.
        load: Force,
        /// Reduced modulus.
        modulus: Pressure,
        /// Which race.
        race: Race,
    },
    /// Teeth at the pitch point, minimum film in the form of ISO/TS 6336-22.
    Tooth(ToothContact),
}

/// A film asked for.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct FilmDemand {
    /// The contact.
    pub contact: FilmContact,
    /// Least film height.
    pub wanted: Length,
}

impl FilmContact {
    /// The relation the film comes from.
    pub fn law(self) -> &'static Law {
        match self {
            Self::Line { .. } => &line::MINIMUM_1968,
            Self::Ellipse { .. } => &ellipse::MINIMUM,
            Self::Race { .. } => &bearing::FILM,
            Self::Tooth(_) => &tooth::MINIMUM,
        }
    }

    /// Reduced modulus of the contact.
    pub fn modulus(self) -> Pressure {
        match self {
            Self::Line { load, .. } => load.modulus,
            Self::Ellipse { load, .. } => load.modulus,
            Self::Race { modulus, .. } => modulus,
            Self::Tooth(contact) => contact.modulus,
        }
    }

    /// Film at a viscosity and pressure-viscosity coefficient.
    ///
    /// # Errors
    /// Inputs outside the relation.
    pub fn film(self, eta: DynamicViscosity, alpha: PressureViscosity) -> Result<Length, Outside> {
        match self {
            Self::Line { speed, load } => {
                let groups = of_line(Inlet { eta, alpha, speed }, load)?;
                Ok(line::minimum_1968(groups, load.radius))
            }
            Self::Ellipse { speed, load } => {
                let groups = of_ellipse(Inlet { eta, alpha, speed }, load)?;
                let k = ellipse::ellipticity(load.radii)?;
                Ok(ellipse::minimum(groups, k, load.radii.x))
            }
            Self::Race {
                inside,
                element,
                speed,
                load,
                modulus,
                race,
            } => {
                let duty = Duty {
                    eta,
                    alpha,
                    speed,
                    load,
                    modulus,
                };
                Ok(at_race(inside, element, duty, race)?.minimum)
            }
            Self::Tooth(contact) => {
                let groups = tooth::groups(eta, alpha, contact)?;
                let pitch_point = crate::quantity::convert::number(1.0);
                Ok(tooth::minimum(groups, contact.rho_n, pitch_point))
            }
        }
    }
}

impl FilmDemand {
    /// The film of an oil at a temperature; `None` where its pressure-viscosity coefficient is
    /// not known.
    pub fn film_of(
        &self,
        line: Line,
        oil: &Curves,
        nu: KinematicViscosity,
        at: ThermodynamicTemperature,
    ) -> Option<Length> {
        let alpha = oil
            .pressure
            .alpha(line.parallel_through(nu, at), oil.density, at)?;
        self.contact
            .film(dynamic(nu, oil.density.at(at)), alpha)
            .ok()
    }

    /// The kinematic viscosity this oil would need, slid without turning. The film is close to a
    /// power of the viscosity, so a few secant steps in the logarithms settle it; where they do
    /// not, the bracketed solution of the same equation stands (a test compares the two).
    pub fn viscosity_needed(
        &self,
        line: Line,
        oil: &Curves,
        at: ThermodynamicTemperature,
    ) -> Option<KinematicViscosity> {
        let excess = |ln_nu: f64| -> Option<f64> {
            let nu = KinematicViscosity::from_base(exp(ln_nu));
            self.film_of(line, oil, nu, at)
                .map(|h| ln(h.base() / self.wanted.base()))
        };
        let start = ln(line.nu_at(at).base());
        if let Some(ln_nu) = secant(start, excess) {
            return Some(KinematicViscosity::from_base(exp(ln_nu)));
        }
        self.viscosity_bracketed(line, oil, at)
    }

    /// The same by the bracketed root.
    pub fn viscosity_bracketed(
        &self,
        line: Line,
        oil: &Curves,
        at: ThermodynamicTemperature,
    ) -> Option<KinematicViscosity> {
        let rho = oil.density.at(at);
        oil.pressure.alpha(line, oil.density, at)?;
        inverse::viscosity(self.wanted, None, |eta| {
            let nu = kinematic(eta, rho);
            self.film_of(line, oil, nu, at).ok_or(Outside::NoAnswer {
                what: "the film",
                why: "the pressure-viscosity coefficient is not known",
            })
        })
        .ok()
        .map(|eta| kinematic(eta, rho))
    }
}

/// Secant steps from a start; `None` where they do not settle within a dozen.
fn secant(start: f64, f: impl Fn(f64) -> Option<f64>) -> Option<f64> {
    let (mut x0, mut f0) = (start, f(start)?);
    // films rise with about the 0.7th power of the viscosity
    let mut x1 = x0 - f0 / 0.7;
    for _ in 0..12 {
        let f1 = f(x1)?;
        if f1.abs() < 1e-13 {
            return Some(x1);
        }
        let slope = (f1 - f0) / (x1 - x0);
        if !slope.is_finite() || slope <= 0.05 {
            return None;
        }
        (x0, f0) = (x1, f1);
        x1 -= f1 / slope;
        if (x1 - x0).abs() < 1e-14 {
            return Some(x1);
        }
    }
    None
}
