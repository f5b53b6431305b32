//! The film of a journal bearing under its load, at a known viscosity.

use super::characteristic::{Characteristic, friction, friction_variable, sommerfeld};
use super::table::Cut;
use super::{Duty, Geometry, NoFilm, Route, iso7902, table};
use crate::quantity::convert::{number, pascals, surface_speed};
use crate::quantity::{
    Angle, AngularVelocity, DynamicViscosity, Force, Length, Measure, Power, Pressure, Ratio,
    VolumeRate,
};
use crate::relation::Law;
use std::f64::consts::PI;

/// The film as a whole, as `work` states it.
pub static LAW: Law = Law {
    name: "journal-film",
    title: "film, attitude, friction and flow of a journal bearing",
    formula: "So = P psi^2/(eta omega); So(e, B/D) from the Reynolds equation, solved for e; \
              h_min = c (1 - e)",
    range: "full bearing with a steady load, laminar, aligned; B/D to 2 (short-bearing form \
            below 0.25), eccentricity to 0.97",
    source: "Reynolds equation with the Reynolds cavitation condition, solved and tabulated by \
             the program; closed forms of ISO 7902-2 beside it (from memory)",
};

/// Load number.
pub static LOAD_NUMBER: Law = Law {
    name: "journal-load-number",
    title: "load number of a journal bearing",
    formula: "So = P psi^2/(eta omega)",
    range: "any journal bearing",
    source: "ISO 7902-1",
};

/// Least film.
pub static LEAST_FILM: Law = Law {
    name: "journal-least-film",
    title: "least film of a journal bearing",
    formula: "h_min = c (1 - e)",
    range: "circular bearing, aligned shaft",
    source: "geometry of two eccentric circles",
};

/// Friction power.
pub static POWER: Law = Law {
    name: "journal-power",
    title: "friction power of a journal bearing",
    formula: "P_f = f F omega D/2",
    range: "laminar film",
    source: "ISO 7902-1",
};

/// Flow of oil.
pub static FLOW: Law = Law {
    name: "journal-flow",
    title: "oil drawn into the film of a journal bearing",
    formula: "Q = q c (D/2) (omega/2 pi) B, q from the Reynolds equation",
    range: "full bearing fed at the widest gap over its whole width",
    source: "Raimondi and Boyd 1958 for the form",
};

/// Oil lost at the edges.
pub static SIDE_FLOW: Law = Law {
    name: "journal-side-flow",
    title: "oil leaving a journal bearing at its edges",
    formula: "Q_s = (Q_s/Q) Q, the share from the Reynolds equation",
    range: "full bearing fed at the widest gap; what the feed must at least replace",
    source: "Raimondi and Boyd 1958 for the form",
};

/// Highest pressure.
pub static PEAK: Law = Law {
    name: "journal-peak-pressure",
    title: "highest pressure in the film of a journal bearing",
    formula: "p_max = P/(P/p_max), the share from the Reynolds equation",
    range: "rigid surfaces, constant viscosity",
    source: "Raimondi and Boyd 1958 for the form",
};

/// A bearing's film.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Film {
    /// Load number.
    pub so: Ratio,
    /// Sommerfeld number.
    pub sommerfeld: Ratio,
    /// Eccentricity over radial clearance.
    pub eccentricity: Ratio,
    /// Least film thickness.
    pub h_min: Length,
    /// Attitude angle.
    pub attitude: Angle,
    /// Friction variable `(r/c) f`.
    pub friction_variable: Ratio,
    /// Friction coefficient.
    pub friction: Ratio,
    /// Friction power.
    pub power: Power,
    /// Oil leaving at both edges, which the feed must replace.
    pub side_flow: VolumeRate,
    /// What only the Reynolds solution states.
    pub solved: Option<Inside>,
}

/// What happens inside the film.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Inside {
    /// Oil drawn in at the widest gap.
    pub flow: VolumeRate,
    /// Highest pressure.
    pub peak: Pressure,
    /// Where it is, from the widest gap.
    pub peak_at: Angle,
    /// Where the film ruptures, from the widest gap.
    pub rupture_at: Angle,
}

/// A bearing at its duty, cut out of the solution to be used: ready for many viscosities.
#[derive(Clone, Copy, Debug)]
pub struct Bearing {
    geometry: Geometry,
    duty: Duty,
    cut: Option<Cut>,
}

impl PartialEq for Bearing {
    /// The cut follows from the geometry.
    fn eq(&self, other: &Self) -> bool {
        self.geometry == other.geometry
            && self.duty == other.duty
            && self.cut.is_some() == other.cut.is_some()
    }
}

impl Bearing {
    /// Chooses the solution.
    ///
    /// # Errors
    /// A width ratio that the route does not cover.
    pub fn new(geometry: Geometry, duty: Duty, route: Route) -> Result<Self, NoFilm> {
        let ratio = geometry.width_ratio();
        let outside = |route, from, to| NoFilm::WidthRatio {
            ratio: ratio.base(),
            route,
            from,
            to,
        };
        let cut = match route {
            Route::Reynolds => {
                let outside = || outside("the Reynolds solution", 0.0, table::WIDEST);
                Some(Cut::at(ratio).ok_or_else(outside)?)
            }
            Route::Iso7902 => {
                if !iso7902::covers(ratio) {
                    let (from, to) = (iso7902::NARROWEST, iso7902::WIDEST);
                    return Err(outside("the closed form of ISO 7902-2", from, to));
                }
                None
            }
        };
        Ok(Self {
            geometry,
            duty,
            cut,
        })
    }

    /// Its sizes.
    pub fn geometry(&self) -> &Geometry {
        &self.geometry
    }

    /// Its duty.
    pub fn duty(&self) -> &Duty {
        &self.duty
    }

    /// Whether the short-bearing form stands behind the numbers.
    pub fn is_short(&self) -> bool {
        self.cut.is_some_and(|cut| cut.is_short())
    }

    /// Load number at a viscosity, [`LOAD_NUMBER`].
    pub fn load_number(&self, eta: DynamicViscosity) -> Ratio {
        let pressure = self.duty.specific_load(&self.geometry);
        let clearance = self.geometry.relative_clearance();
        load_number(pressure, clearance, eta, self.duty.speed())
    }

    /// Largest load number with a full film, at eccentricity 0.97.
    pub fn most(&self) -> Ratio {
        match &self.cut {
            Some(cut) => cut.most(),
            None => iso7902::load_number(number(table::FURTHEST), self.geometry.width_ratio()),
        }
    }

    /// Load number that holds the shaft at an eccentricity.
    ///
    /// # Errors
    /// An eccentricity outside 0 to 0.97.
    pub fn carried_at(&self, eccentricity: Ratio) -> Result<Ratio, NoFilm> {
        let asked = eccentricity.base();
        // 3 % of a clearance, subtracted from one, may miss the end by a rounding
        if !(0.0..=table::FURTHEST + 1e-12).contains(&asked) {
            return Err(self.beyond(asked));
        }
        let e = number(asked.min(table::FURTHEST));
        match &self.cut {
            Some(cut) => {
                let found = cut.characteristic(e);
                found.map(|c| c.so).ok_or_else(|| self.beyond(asked))
            }
            None => Ok(iso7902::load_number(e, self.geometry.width_ratio())),
        }
    }

    fn beyond(&self, e: f64) -> NoFilm {
        let clearance_um = self.geometry.clearance().base() * 1e6;
        NoFilm::Target {
            film_um: clearance_um * (1.0 - e),
            which: if e < 0.0 { "above 100 %" } else { "under 3 %" },
            clearance_um,
        }
    }

    /// The film at a viscosity.
    ///
    /// # Errors
    /// A film thinner than 3 % of the clearance.
    pub fn film(&self, eta: DynamicViscosity) -> Result<Film, NoFilm> {
        let so = self.load_number(eta);
        let too_thin = NoFilm::TooThin {
            so: so.base(),
            most: self.most().base(),
        };
        if let Some(cut) = &self.cut {
            let c = cut.carrying(so).ok_or(too_thin)?;
            // the load number is the bearing's own, not the table's reading of it
            return Ok(self.solved(&Characteristic { so, ..c }));
        }
        let found = iso7902::carrying(so, self.geometry.width_ratio());
        Ok(self.closed(so, found.ok_or(too_thin)?))
    }

    fn solved(&self, c: &Characteristic) -> Film {
        let mean = self.duty.specific_load(&self.geometry);
        let flow = flow(c.flow, &self.geometry, self.duty.speed());
        let mut film = self.common(c.so, c.eccentricity, c.attitude);
        film.side_flow = VolumeRate::from_base(flow.base() * c.side_share.base());
        film.solved = Some(Inside {
            flow,
            peak: peak_pressure(mean, c.mean_over_peak),
            peak_at: c.peak_at,
            rupture_at: c.rupture_at,
        });
        film
    }

    fn closed(&self, so: Ratio, eccentricity: Ratio) -> Film {
        let ratio = self.geometry.width_ratio();
        let q3 = iso7902::side_flow(eccentricity, ratio);
        let attitude = iso7902::attitude(eccentricity, ratio);
        let mut film = self.common(so, eccentricity, attitude);
        film.side_flow = side_flow_iso7902(q3, &self.geometry, self.duty.speed());
        film
    }

    fn common(&self, so: Ratio, eccentricity: Ratio, attitude: Angle) -> Film {
        let (geometry, duty) = (&self.geometry, &self.duty);
        let variable = friction_variable(so, eccentricity, attitude);
        let friction = friction(geometry.relative_clearance(), variable);
        Film {
            so,
            sommerfeld: sommerfeld(so),
            eccentricity,
            h_min: least_film(geometry.clearance(), eccentricity),
            attitude,
            friction_variable: variable,
            friction,
            power: power(friction, duty.load(), duty.speed(), geometry.diameter()),
            side_flow: VolumeRate::from_base(0.0),
            solved: None,
        }
    }
}

/// Load number of [`LOAD_NUMBER`], from specific load and relative clearance.
pub fn load_number(
    pressure: Pressure,
    clearance: Ratio,
    eta: DynamicViscosity,
    speed: AngularVelocity,
) -> Ratio {
    let psi = clearance.base();
    number(pressure.base() * psi * psi / (eta.base() * speed.base()))
}

/// Least film of [`LEAST_FILM`], from the radial clearance.
pub fn least_film(clearance: Length, eccentricity: Ratio) -> Length {
    Length::from_base(clearance.base() * (1.0 - eccentricity.base()))
}

/// Friction power of [`POWER`].
pub fn power(friction: Ratio, load: Force, speed: AngularVelocity, diameter: Length) -> Power {
    let surface = surface_speed(speed, diameter).base();
    Power::from_base(friction.base() * load.base() * surface)
}

/// Flow of [`FLOW`], from a variable over `r c N B`.
pub fn flow(variable: Ratio, geometry: &Geometry, speed: AngularVelocity) -> VolumeRate {
    let radius = geometry.diameter().base() / 2.0;
    let turns = speed.base() / (2.0 * PI);
    let unit = radius * geometry.clearance().base() * turns * geometry.width().base();
    VolumeRate::from_base(variable.base() * unit)
}

/// Highest pressure of [`PEAK`].
pub fn peak_pressure(mean: Pressure, mean_over_peak: Ratio) -> Pressure {
    pascals(mean.base() / mean_over_peak.base())
}

/// Side flow of a variable `q3`, in the unit of ISO 7902.
pub fn side_flow_iso7902(q3: Ratio, geometry: &Geometry, speed: AngularVelocity) -> VolumeRate {
    let d = geometry.diameter().base();
    let unit = d * d * d * geometry.relative_clearance().base() * speed.base();
    VolumeRate::from_base(q3.base() * unit)
}

/// The film of a bearing at a viscosity, by a route.
///
/// # Errors
/// A width ratio outside the route, or a film thinner than 3 % of the clearance.
pub fn film(
    geometry: Geometry,
    duty: Duty,
    eta: DynamicViscosity,
    route: Route,
) -> Result<Film, NoFilm> {
    Bearing::new(geometry, duty, route)?.film(eta)
}
