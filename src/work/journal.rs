//! The rows of plain bearings: journal bearings and thrust pads.

mod film;
mod heat;
mod limits;
mod pad;
pub(crate) mod steps;
mod transition;
mod viscosity;

use super::{Args, Input, Need, Refusal, Relation, Worked};
use crate::quantity::{AngularVelocity, Force, Length};
use crate::relation::heat::balance::NoBalance;
use crate::relation::journal::heat::NoSettling;
use crate::relation::journal::{Duty, Geometry, NoFilm, Route};
use crate::relation::thrust::shape::NoPad;
use crate::trace::Known;

/// The rows of this group.
pub(super) static ROWS: &[Relation] = &[
    film::JOURNAL_FILM,
    viscosity::JOURNAL_VISCOSITY,
    heat::JOURNAL_HEAT,
    transition::JOURNAL_TRANSITION,
    limits::JOURNAL_LIMITS,
    transition::JOURNAL_PETROFF,
    pad::THRUST_PAD,
    pad::THRUST_SLIDER,
    heat::HEAT_CALIBRATION,
];

const GROUP: &str = "plain bearings";

const fn must(name: &'static str, says: &'static str) -> Input {
    Input {
        name,
        says,
        need: Need::Always,
    }
}

const fn may(name: &'static str, says: &'static str, otherwise: &'static str) -> Input {
    Input {
        name,
        says,
        need: Need::Otherwise(otherwise),
    }
}

const fn form(name: &'static str, says: &'static str, of: &'static str) -> Input {
    Input {
        name,
        says,
        need: Need::Form(of),
    }
}

const DIAMETER: Input = must("diameter", "diameter of the shaft");
const WIDTH: Input = must("width", "width of the bearing");
const CLEARANCE: Input = must(
    "clearance",
    "radial clearance, half the difference of bore and shaft: 0.12 mm",
);
const LOAD: Input = must("load", "radial load");
const SPEED: Input = must("speed", "speed of the shaft");
const METHOD_SAYS: &str = "reynolds (solved table) or iso7902 (closed form, B/D 0.25 to 1)";

macro_rules! refusals {
    ($($error:ty),+) => {$(
        impl From<$error> for Refusal {
            fn from(error: $error) -> Self {
                Self::new(error.name(), error.to_string())
            }
        }
    )+};
}

refusals!(NoFilm, NoSettling, NoBalance, NoPad);

/// A journal bearing as asked, with the checked forms of its numbers.
#[derive(Clone, Copy)]
pub(crate) struct Asked {
    diameter: Known<Length>,
    width: Known<Length>,
    clearance: Known<Length>,
    load: Known<Force>,
    speed: Known<AngularVelocity>,
    geometry: Geometry,
    duty: Duty,
}

/// Diameter, width and radial clearance.
type Sizes = (Known<Length>, Known<Length>, Known<Length>);

impl Asked {
    /// Checks numbers that the calculation knows already.
    ///
    /// # Errors
    /// What [`Geometry`] and [`Duty`] refuse.
    pub(crate) fn new(
        (diameter, width, clearance): Sizes,
        load: Known<Force>,
        speed: Known<AngularVelocity>,
    ) -> Result<Self, NoFilm> {
        Ok(Self {
            diameter,
            width,
            clearance,
            load,
            speed,
            geometry: Geometry::new(diameter.value, width.value, clearance.value)?,
            duty: Duty::new(load.value, speed.value)?,
        })
    }

    fn read(args: &mut Args, w: &mut Worked) -> Result<Self, Refusal> {
        let sizes = (
            args.quantity(w, "diameter", DIAMETER.says)?,
            args.quantity(w, "width", WIDTH.says)?,
            args.quantity(w, "clearance", "radial clearance")?,
        );
        let load = args.quantity(w, "load", LOAD.says)?;
        let speed = args.quantity(w, "speed", SPEED.says)?;
        Ok(Self::new(sizes, load, speed)?)
    }
}

/// The route chosen, or that of the row where none is.
fn route(args: &mut Args, otherwise: Route) -> Result<Route, Refusal> {
    let default = match otherwise {
        Route::Reynolds => "reynolds",
        Route::Iso7902 => "iso7902",
    };
    let word = args.choice("method", &["reynolds", "iso7902"], Some(default))?;
    Ok(if word == "reynolds" {
        Route::Reynolds
    } else {
        Route::Iso7902
    })
}
