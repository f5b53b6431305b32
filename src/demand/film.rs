//! Film demands: a film height is asked for, and the viscosity it needs is solved for each oil,
//! because the pressure-viscosity coefficient and the density are the oil's own.

use crate::numeric::math::{exp, ln};
use crate::oil::Curves;
use crate::oil::thinning::{End as ShearEnd, Kept};
use crate::quantity::convert::{dynamic, kinematic, number};
use crate::quantity::{
    AngularVelocity, DynamicViscosity, Force, KinematicViscosity, Length, Measure, Pressure,
    PressureViscosity, Ratio, ShearRate, TemperatureCoefficient, ThermodynamicTemperature,
    Velocity,
};
use crate::relation::Law;
use crate::relation::bearing::film::{self as bearing, Duty, Element, at_race};
use crate::relation::bearing::kinematics::{Inside, Race};
use crate::relation::film::groups::{Inlet, LineLoad, PointLoad, of_ellipse, of_line};
use crate::relation::film::regime::{self, Regime};
use crate::relation::film::{ellipse, hertz, inverse, line, starvation, thermal};
use crate::relation::gear::film::{self as tooth, ToothContact};
use crate::relation::oil::temporary_shear::contact_rate;
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
        /// Distance of the meniscus from the centre of the contact; flooded where none.
        meniscus: Option<Length>,
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
    /// A shaft or a pad on a wedge of oil.
    Wedge(Wedge),
}

/// A hydrodynamic film: its pressures are too low to thicken the oil, so the viscosity it needs
/// is the same for every oil and known beforehand.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Wedge {
    /// Viscosity at which the film reaches what is wanted.
    pub needs: DynamicViscosity,
    /// Sliding speed.
    pub speed: Velocity,
    /// The relation it comes from.
    pub law: &'static Law,
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
            Self::Wedge(wedge) => wedge.law,
        }
    }

    /// Reduced modulus of the contact; `None` for a wedge, whose surfaces do not give way.
    pub fn modulus(self) -> Option<Pressure> {
        match self {
            Self::Line { load, .. } => Some(load.modulus),
            Self::Ellipse { load, .. } => Some(load.modulus),
            Self::Race { modulus, .. } => Some(modulus),
            Self::Tooth(contact) => Some(contact.modulus),
            Self::Wedge(_) => None,
        }
    }

    /// Speed that shears the oil: mean speed of the surfaces that draw it in, sliding speed of a
    /// wedge; `None` for a geometry without one.
    pub fn speed(self) -> Option<Velocity> {
        match self {
            Self::Line { speed, .. } | Self::Ellipse { speed, .. } => Some(speed),
            Self::Race { inside, speed, .. } => inside.rolling_speed(speed).ok(),
            Self::Tooth(contact) => Some(Velocity::from_base(0.5 * contact.sum_speed.base())),
            Self::Wedge(wedge) => Some(wedge.speed),
        }
    }

    /// Film at a viscosity and pressure-viscosity coefficient. That of a wedge is never asked
    /// for: only whether it has the viscosity it needs.
    ///
    /// # Errors
    /// Inputs outside the relation.
    pub fn film(self, eta: DynamicViscosity, alpha: PressureViscosity) -> Result<Length, Outside> {
        match self {
            Self::Line { speed, load } => {
                let groups = of_line(Inlet { eta, alpha, speed }, load)?;
                Ok(line::minimum_1968(groups, load.radius))
            }
            Self::Ellipse {
                speed,
                load,
                meniscus,
            } => {
                let inlet = Inlet { eta, alpha, speed };
                let groups = of_ellipse(inlet, load)?;
                let k = ellipse::ellipticity(load.radii)?;
                let film = ellipse::minimum(groups, k, load.radii.x);
                match meniscus {
                    Some(distance) => Ok(starved_film(inlet, load, film, distance)?),
                    None => Ok(film),
                }
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
            Self::Wedge(_) => Err(Outside::NoAnswer {
                what: "the film of a wedge",
                why: "its need is told as a viscosity",
            }),
        }
    }
}

/// What is left of a minimum film with the meniscus so far from the centre.
fn starved_film(
    inlet: Inlet,
    load: PointLoad,
    minimum: Length,
    distance: Length,
) -> Result<Length, Outside> {
    let groups = of_ellipse(inlet, load)?;
    let k = ellipse::ellipticity(load.radii)?;
    let central = ellipse::central(groups, k, load.radii.x);
    let contact = hertz::ellipse(load.load, load.radii, load.modulus)?;
    let flooded = starvation::Films { central, minimum };
    let needed = starvation::flooded_distance(flooded, load.radii.x, contact.a_x)?;
    let m = number(distance.base() / contact.a_x.base());
    Ok(starvation::starved(flooded, needed, m)?.minimum)
}

impl FilmContact {
    /// The regime the film belongs to by the charts, where the largest of four films counts;
    /// `None` for contacts whose standard has but one formula.
    pub fn regime(self, eta: DynamicViscosity, alpha: PressureViscosity) -> Option<Regime> {
        let by = match self {
            Self::Line { speed, load } => {
                let groups = of_line(Inlet { eta, alpha, speed }, load).ok()?;
                regime::line(groups, load.radius).ok()?
            }
            Self::Ellipse { speed, load, .. } => {
                let groups = of_ellipse(Inlet { eta, alpha, speed }, load).ok()?;
                regime::ellipse(groups, load.radii.ratio().ok()?, load.radii.x).ok()?
            }
            Self::Race { .. } | Self::Tooth(_) | Self::Wedge(_) => return None,
        };
        Some(by.regime)
    }

    /// Thermal loading parameter of the inlet; `None` for contacts whose standard leaves heating
    /// out.
    pub fn heating(self, eta: DynamicViscosity, beta: TemperatureCoefficient) -> Option<Ratio> {
        let (Self::Line { speed, .. } | Self::Ellipse { speed, .. }) = self else {
            return None;
        };
        thermal::parameter(beta, eta, speed, thermal::usual_conductivity()).ok()
    }

    /// Whether speed, load and size make a film at all, whatever the oil.
    ///
    /// # Errors
    /// What is not above zero.
    pub fn film_at_all(self) -> Result<Length, Outside> {
        self.film(
            DynamicViscosity::from_base(0.02),
            PressureViscosity::from_base(2e-8),
        )
    }

    /// Largest pressure of the contact.
    pub fn pressure(self) -> Option<Pressure> {
        match self {
            Self::Line { load, .. } => hertz::line(load.load, load.radius, load.modulus)
                .ok()
                .map(|c| c.max_pressure),
            Self::Ellipse { load, .. } => hertz::ellipse(load.load, load.radii, load.modulus)
                .ok()
                .map(|c| c.max_pressure),
            Self::Race { .. } | Self::Tooth(_) | Self::Wedge(_) => None,
        }
    }

    /// Film at a viscosity, thinned by the heating of the inlet after Murch and Wilson, who keep
    /// it rising with viscosity everywhere.
    ///
    /// # Errors
    /// Inputs outside the relation.
    pub fn film_heated(
        self,
        eta: DynamicViscosity,
        alpha: PressureViscosity,
        beta: TemperatureCoefficient,
    ) -> Result<Length, Outside> {
        let film = self.film(eta, alpha)?;
        Ok(match self.heating(eta, beta) {
            Some(l) => thermal::thinned(film, thermal::murch_wilson(l)),
            None => film,
        })
    }
}

/// An oil as a film demand meets it: at a temperature, thinned by the shear of the contact.
#[derive(Clone, Copy, Debug)]
pub struct InContact<'o> {
    /// Its data.
    pub oil: &'o Curves,
    /// Its line there.
    pub line: Line,
    /// The temperature.
    pub at: ThermodynamicTemperature,
    /// Share of its viscosity that it keeps under the shear of the contact; 1 without polymer.
    pub kept: Ratio,
}

impl FilmDemand {
    /// Shear rate at the inlet once the wanted film is reached.
    pub fn shear_rate(&self) -> Option<ShearRate> {
        self.contact
            .speed()
            .map(|speed| contact_rate(speed, self.wanted))
    }

    /// What a polymer-thickened oil of this viscosity keeps in the contact; `None` for an oil
    /// that does not thin, or of whose polymer nothing is known.
    pub fn thinned(
        &self,
        oil: &Curves,
        nu: KinematicViscosity,
        at: ThermodynamicTemperature,
        end: ShearEnd,
    ) -> Option<Kept> {
        oil.thinning.as_ref()?.kept(nu, at, self.shear_rate()?, end)
    }

    /// An oil of a line at a temperature as this contact meets it.
    pub fn meet<'o>(
        &self,
        oil: &'o Curves,
        line: Line,
        at: ThermodynamicTemperature,
        end: ShearEnd,
    ) -> InContact<'o> {
        let kept = self.thinned(oil, line.nu_at(at), at, end);
        InContact {
            oil,
            line,
            at,
            kept: kept.map_or(number(1.0), |k| k.viscosity),
        }
    }

    /// The film of an oil of that viscosity at rest; `None` where its pressure-viscosity
    /// coefficient is not known.
    pub fn film_of(&self, met: InContact<'_>, nu: KinematicViscosity) -> Option<Length> {
        let (oil, at) = (met.oil, met.at);
        let line = met.line.parallel_through(nu, at);
        let alpha = oil.pressure.alpha(line, oil.density, at)?;
        let under_shear = KinematicViscosity::from_base(nu.base() * met.kept.base());
        self.contact
            .film_heated(
                dynamic(under_shear, oil.density.at(at)),
                alpha,
                line.beta(at),
            )
            .ok()
    }

    /// Positive where the oil of that viscosity at rest reaches the wanted film, negative where
    /// it does not; `None` as for [`FilmDemand::film_of`].
    pub fn excess_of(&self, met: InContact<'_>, nu: KinematicViscosity) -> Option<f64> {
        if let FilmContact::Wedge(wedge) = self.contact {
            return Some(ln(nu.base() / wedge_need(wedge, met).base()));
        }
        self.film_of(met, nu).map(|h| h.base() - self.wanted.base())
    }

    /// The kinematic viscosity at rest this oil would need, slid without turning. The film is
    /// close to a power of the viscosity, so a few secant steps in the logarithms settle it;
    /// where they do not, the bracketed solution of the same equation stands (a test compares
    /// the two).
    pub fn viscosity_needed(&self, met: InContact<'_>) -> Option<KinematicViscosity> {
        if let FilmContact::Wedge(wedge) = self.contact {
            return Some(wedge_need(wedge, met));
        }
        let excess = |ln_nu: f64| -> Option<f64> {
            let nu = KinematicViscosity::from_base(exp(ln_nu));
            self.film_of(met, nu)
                .map(|h| ln(h.base() / self.wanted.base()))
        };
        let start = ln(met.line.nu_at(met.at).base());
        if let Some(ln_nu) = secant(start, excess) {
            return Some(KinematicViscosity::from_base(exp(ln_nu)));
        }
        self.viscosity_bracketed(met)
    }

    /// The same by the bracketed root.
    pub fn viscosity_bracketed(&self, met: InContact<'_>) -> Option<KinematicViscosity> {
        let rho = met.oil.density.at(met.at);
        met.oil.pressure.alpha(met.line, met.oil.density, met.at)?;
        inverse::viscosity(self.wanted, None, |eta| {
            let nu = kinematic(eta, rho);
            self.film_of(met, nu).ok_or(Outside::NoAnswer {
                what: "the film",
                why: "the pressure-viscosity coefficient is not known",
            })
        })
        .ok()
        .map(|eta| kinematic(eta, rho))
    }
}

/// What a wedge needs of an oil at rest: the more, the more it loses under shear.
fn wedge_need(wedge: Wedge, met: InContact<'_>) -> KinematicViscosity {
    let under_shear = kinematic(wedge.needs, met.oil.density.at(met.at));
    KinematicViscosity::from_base(under_shear.base() / met.kept.base())
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
