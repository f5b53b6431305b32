//! The film of a journal bearing, step by step, told to any recorder: the rows of `work` and the
//! demands of a machine's bearing name the same numbers.

use super::Asked;
use crate::quantity::{
    Angle, DynamicViscosity, Length, Measure, Power, Pressure, Ratio, VolumeRate,
};
use crate::relation::journal::characteristic::{self, FRICTION, SOMMERFELD};
use crate::relation::journal::film::{self, FLOW, LEAST_FILM, LOAD_NUMBER, PEAK, POWER, SIDE_FLOW};
use crate::relation::journal::limits::whirl;
use crate::relation::journal::table::{self, Cut};
use crate::relation::journal::{
    Geometry, NoFilm, RELATIVE_CLEARANCE, Route, SPECIFIC_LOAD, iso7902,
};
use crate::trace::{Inputs, Known, Recorder, StepId};
use crate::work::Worked;

/// Steps of several kinds that go into a relation together, where what was read decides which.
#[derive(Clone, Default)]
pub(crate) struct Recorded(pub(crate) Vec<(&'static str, StepId)>);

impl Recorded {
    /// With those of the bearing itself.
    pub(crate) fn and(mut self, asked: &Asked) -> Self {
        self.0.extend([
            ("F", asked.load.step),
            ("omega", asked.speed.step),
            ("D", asked.diameter.step),
            ("B", asked.width.step),
            ("c", asked.clearance.step),
        ]);
        self
    }
}

impl Inputs for Recorded {
    type Values = ();
    fn values(&self) {}
    fn steps(&self) -> Vec<(&'static str, StepId)> {
        self.0.clone()
    }
}

/// Numbers that do not depend on the oil.
#[derive(Clone, Copy)]
pub(crate) struct Basics {
    pub(crate) pressure: Known<Pressure>,
    pub(crate) psi: Known<Ratio>,
}

/// The film at a viscosity.
pub(crate) struct Film {
    pub(crate) pressure: Known<Pressure>,
    pub(crate) so: Known<Ratio>,
    pub(crate) eccentricity: Known<Ratio>,
    pub(crate) attitude: Known<Angle>,
    pub(crate) h_min: Known<Length>,
    pub(crate) variable: Known<Ratio>,
    pub(crate) friction: Known<Ratio>,
    pub(crate) power: Known<Power>,
    pub(crate) side_flow: Known<VolumeRate>,
    pub(crate) inside: Option<Inside>,
}

/// What only the solved table tells.
pub(crate) struct Inside {
    pub(crate) flow: Known<VolumeRate>,
    pub(crate) peak: Known<Pressure>,
    pub(crate) peak_at: Known<Angle>,
    pub(crate) rupture_at: Known<Angle>,
}

/// Specific load and relative clearance.
pub(crate) fn basics(trace: &mut impl Recorder, asked: &Asked) -> Basics {
    let (geometry, duty) = (asked.geometry, asked.duty);
    let with = (("F", asked.load), ("D", asked.diameter), ("B", asked.width));
    let pressure = trace.law("P", "specific load", &SPECIFIC_LOAD, with, |_| {
        duty.specific_load(&geometry)
    });
    let with = (("c", asked.clearance), ("D", asked.diameter));
    let says = "relative clearance";
    let psi = trace.law("psi", says, &RELATIVE_CLEARANCE, with, |_| {
        geometry.relative_clearance()
    });
    Basics { pressure, psi }
}

/// The film at a viscosity, by a route.
pub(crate) fn film(
    trace: &mut impl Recorder,
    asked: &Asked,
    eta: Known<DynamicViscosity>,
    route: Route,
) -> Result<Film, NoFilm> {
    // refuses what the chain below cannot say
    film::Bearing::new(asked.geometry, asked.duty, route)?.film(eta.value)?;
    let basics = basics(trace, asked);
    let with = (
        ("P", basics.pressure),
        ("psi", basics.psi),
        ("eta", eta),
        ("omega", asked.speed),
    );
    let so = trace.law(
        "So",
        "load number",
        &LOAD_NUMBER,
        with,
        |(p, psi, eta, n)| film::load_number(p, psi, eta, n),
    );
    match route {
        Route::Reynolds => Ok(solved(trace, asked, &basics, so)),
        Route::Iso7902 => Ok(closed(trace, asked, &basics, so)),
    }
}

fn solved(trace: &mut impl Recorder, asked: &Asked, basics: &Basics, so: Known<Ratio>) -> Film {
    let geometry = asked.geometry;
    let with = (("So", so), ("D", asked.diameter), ("B", asked.width));
    let found = trace.apply(&table::LAW, with, |(so, _, _)| {
        let cut = Cut::at(geometry.width_ratio());
        cut.and_then(|cut| cut.carrying(so))
            .expect("the film has been found before")
    });
    let eccentricity = trace.take(&found, "e", "eccentricity", |c| c.eccentricity);
    let attitude = trace.take(&found, "beta", "attitude angle", |c| c.attitude);
    let says = "oil drawn in, over r c N B";
    let q = trace.take(&found, "q", says, |c| c.flow);
    let says = "share of it lost at the edges";
    let share = trace.take(&found, "Q_s/Q", says, |c| c.side_share);
    let says = "mean over highest pressure";
    let mean_over_peak = trace.take(&found, "P/p_max", says, |c| c.mean_over_peak);
    let says = "place of the highest pressure, from the widest gap";
    let peak_at = trace.take(&found, "t_max", says, |c| c.peak_at);
    let says = "place where the film ruptures, from the widest gap";
    let rupture_at = trace.take(&found, "t_r", says, |c| c.rupture_at);
    let with = (
        ("q", q),
        ("c", asked.clearance),
        ("D", asked.diameter),
        ("B", asked.width),
        ("omega", asked.speed),
    );
    let flow = trace.law("Q", "oil drawn in", &FLOW, with, |(q, .., n)| {
        film::flow(q, &geometry, n)
    });
    let with = (("Q", flow), ("Q_s/Q", share));
    let says = "oil lost at the edges";
    let side_flow = trace.law("Q_s", says, &SIDE_FLOW, with, |(flow, share)| {
        VolumeRate::from_base(flow.base() * share.base())
    });
    let with = (("P", basics.pressure), ("P/p_max", mean_over_peak));
    let says = "highest pressure in the film";
    let peak = trace.law("p_max", says, &PEAK, with, |(p, share)| {
        film::peak_pressure(p, share)
    });
    let inside = Inside {
        flow,
        peak,
        peak_at,
        rupture_at,
    };
    finished(
        trace,
        asked,
        basics,
        Found {
            so,
            eccentricity,
            attitude,
            side_flow,
            inside: Some(inside),
        },
    )
}

fn closed(trace: &mut impl Recorder, asked: &Asked, basics: &Basics, so: Known<Ratio>) -> Film {
    let geometry = asked.geometry;
    let ratio = geometry.width_ratio();
    let with = (("So", so), ("D", asked.diameter), ("B", asked.width));
    let eccentricity = trace.law("e", "eccentricity", &iso7902::LAW, with, |(so, _, _)| {
        iso7902::carrying(so, ratio).expect("the film has been found before")
    });
    let with = (
        ("e", eccentricity),
        ("D", asked.diameter),
        ("B", asked.width),
    );
    let law = &iso7902::ATTITUDE;
    let attitude = trace.law("beta", "attitude angle", law, with, |(e, _, _)| {
        iso7902::attitude(e, ratio)
    });
    let with = (
        ("e", eccentricity),
        ("D", asked.diameter),
        ("B", asked.width),
        ("psi", basics.psi),
        ("omega", asked.speed),
    );
    let law = &iso7902::SIDE_FLOW;
    let side_flow = trace.law("Q3", "oil lost at the edges", law, with, |(e, .., n)| {
        film::side_flow_iso7902(iso7902::side_flow(e, ratio), &geometry, n)
    });
    finished(
        trace,
        asked,
        basics,
        Found {
            so,
            eccentricity,
            attitude,
            side_flow,
            inside: None,
        },
    )
}

/// What either route finds of its own.
struct Found {
    so: Known<Ratio>,
    eccentricity: Known<Ratio>,
    attitude: Known<Angle>,
    side_flow: Known<VolumeRate>,
    inside: Option<Inside>,
}

fn finished(trace: &mut impl Recorder, asked: &Asked, basics: &Basics, found: Found) -> Film {
    let (so, eccentricity, attitude) = (found.so, found.eccentricity, found.attitude);
    let with = (("c", asked.clearance), ("e", eccentricity));
    let h_min = trace.law("h_min", "least film", &LEAST_FILM, with, |(c, e)| {
        film::least_film(c, e)
    });
    let with = (("So", so), ("e", eccentricity), ("beta", attitude));
    let says = "friction variable f/psi";
    let variable = trace.law("f/psi", says, &FRICTION, with, |(so, e, beta)| {
        characteristic::friction_variable(so, e, beta)
    });
    let with = (("psi", basics.psi), ("f/psi", variable));
    let friction = trace.law("f", "friction coefficient", &FRICTION, with, |(psi, v)| {
        characteristic::friction(psi, v)
    });
    let with = (
        ("f", friction),
        ("F", asked.load),
        ("omega", asked.speed),
        ("D", asked.diameter),
    );
    let power = trace.law("P_f", "friction power", &POWER, with, |(f, load, n, d)| {
        film::power(f, load, n, d)
    });
    Film {
        pressure: basics.pressure,
        so,
        eccentricity,
        attitude,
        h_min,
        variable,
        friction,
        power,
        side_flow: found.side_flow,
        inside: found.inside,
    }
}

/// Sommerfeld number of a load number.
pub(crate) fn sommerfeld(trace: &mut impl Recorder, so: Known<Ratio>) -> Known<Ratio> {
    let with = (("So", so),);
    trace.law("S", "Sommerfeld number", &SOMMERFELD, with, |(so,)| {
        characteristic::sommerfeld(so)
    })
}

/// Remarks on where a film stands.
pub(crate) fn remarks(w: &mut Worked, geometry: &Geometry, eccentricity: Ratio) {
    let ratio = geometry.width_ratio().base();
    if ratio < table::SHORT {
        w.remark(format!(
            "width over diameter is {ratio:.2}, below 0.25: the short-bearing form, with an end \
             correction from the solved table"
        ));
    }
    if whirl::is_possible(eccentricity) {
        w.remark(format!(
            "eccentricity {:.2} is under 0.5: a light, fast rotor may whirl in its oil; a thinner \
             oil would hold it better",
            eccentricity.base()
        ));
    }
}

/// Remark on what the closed form of the standard is worth at a width ratio it covers.
pub(crate) fn error_of_closed_form(w: &mut Worked, geometry: &Geometry) {
    let error = match geometry.width_ratio().base() {
        b if b <= 0.65 => "within -5 and +7 %",
        b if b < 0.98 => "from 11 % below to level",
        _ => "within -3 and +5 %",
    };
    w.remark(format!(
        "load by the closed form of ISO 7902-2: {error} of the Reynolds solution at this width"
    ));
}
