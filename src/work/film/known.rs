//! Contacts, inlets and groups as known numbers, and the inputs they are read from.

use crate::quantity::{
    DynamicViscosity, Force, Length, LoadPerLength, Pressure, PressureViscosity, Ratio, Velocity,
};
use crate::relation::film::body::Radii;
use crate::relation::film::ellipse;
use crate::relation::film::groups::{
    self, ELLIPSE_GROUPS, Groups, Inlet, LINE_GROUPS, LineLoad, PointLoad,
};
use crate::trace::{Known, Outcome, Recorder};
use crate::work::contact::{modulus, must, radii, radius};
use crate::work::{Args, Input, Refusal, Worked};

pub(super) const ETA: Input = must(
    "eta",
    "dynamic viscosity at the inlet temperature, 30 mPa.s",
);
pub(super) const ALPHA: Input = must("alpha", "pressure-viscosity coefficient there, 18 1/GPa");
pub(super) const SPEED: Input = must(
    "speed",
    "mean of the two surface speeds relative to the contact",
);

/// The three groups, each with its step.
#[derive(Clone, Copy)]
pub(super) struct KnownGroups {
    pub(super) speed: Known<Ratio>,
    pub(super) material: Known<Ratio>,
    pub(super) load: Known<Ratio>,
}

impl KnownGroups {
    fn taken(worked: &mut Worked, outcome: &Outcome<Groups>) -> Self {
        let trace = &mut worked.trace;
        Self {
            speed: trace.take(outcome, "U", "speed parameter", |g| g.speed),
            material: trace.take(outcome, "G", "material parameter", |g| g.material),
            load: trace.take(outcome, "W", "load parameter", |g| g.load),
        }
    }

    pub(super) fn state(self, worked: &mut Worked) {
        worked.result("U", self.speed, "");
        worked.result("G", self.material, "");
        worked.result("W", self.load, "");
    }

    pub(super) fn plain(self) -> Groups {
        Groups {
            speed: self.speed.value,
            material: self.material.value,
            load: self.load.value,
        }
    }
}

/// The oil at the inlet, as known.
#[derive(Clone, Copy)]
pub(super) struct KnownInlet {
    pub(super) eta: Known<DynamicViscosity>,
    pub(super) alpha: Known<PressureViscosity>,
    pub(super) speed: Known<Velocity>,
}

impl KnownInlet {
    pub(super) fn read(args: &mut Args, worked: &mut Worked) -> Result<Self, Refusal> {
        Ok(Self {
            eta: args.quantity(worked, "eta", "dynamic viscosity at the inlet")?,
            alpha: args.quantity(worked, "alpha", "pressure-viscosity coefficient")?,
            speed: args.quantity(worked, "speed", "mean rolling speed")?,
        })
    }
}

/// A line contact as known.
#[derive(Clone, Copy)]
pub(super) struct KnownLine {
    pub(super) load: Known<LoadPerLength>,
    pub(super) radius: Known<Length>,
    pub(super) modulus: Known<Pressure>,
}

impl KnownLine {
    pub(super) fn read(args: &mut Args, worked: &mut Worked) -> Result<Self, Refusal> {
        Ok(Self {
            load: args.quantity(worked, "load", "load per length")?,
            radius: radius(args, worked)?,
            modulus: modulus(args, worked)?,
        })
    }

    pub(super) fn plain(self) -> LineLoad {
        LineLoad {
            load: self.load.value,
            radius: self.radius.value,
            modulus: self.modulus.value,
        }
    }

    pub(super) fn groups(
        self,
        worked: &mut Worked,
        inlet: KnownInlet,
    ) -> Result<KnownGroups, Refusal> {
        let inputs = (
            ("eta", inlet.eta),
            ("alpha", inlet.alpha),
            ("u", inlet.speed),
            ("w", self.load),
            ("R", self.radius),
            ("E'", self.modulus),
        );
        let outcome = worked.trace.attempt_all(
            &LINE_GROUPS,
            inputs,
            |(eta, alpha, speed, load, radius, modulus)| {
                let inlet = Inlet { eta, alpha, speed };
                let contact = LineLoad {
                    load,
                    radius,
                    modulus,
                };
                groups::of_line(inlet, contact)
            },
        )?;
        Ok(KnownGroups::taken(worked, &outcome))
    }
}

/// An elliptical contact as known.
#[derive(Clone, Copy)]
pub(super) struct KnownEllipse {
    pub(super) load: Known<Force>,
    pub(super) rx: Known<Length>,
    pub(super) ry: Known<Length>,
    pub(super) modulus: Known<Pressure>,
}

impl KnownEllipse {
    pub(super) fn read(args: &mut Args, worked: &mut Worked) -> Result<Self, Refusal> {
        let load = args.quantity(worked, "load", "load")?;
        let (rx, ry) = radii(args, worked)?;
        let modulus = modulus(args, worked)?;
        Ok(Self {
            load,
            rx,
            ry,
            modulus,
        })
    }

    pub(super) fn plain(self) -> PointLoad {
        PointLoad {
            load: self.load.value,
            radii: Radii {
                x: self.rx.value,
                y: self.ry.value,
            },
            modulus: self.modulus.value,
        }
    }

    pub(super) fn groups(
        self,
        worked: &mut Worked,
        inlet: KnownInlet,
    ) -> Result<KnownGroups, Refusal> {
        let inputs = (
            ("eta", inlet.eta),
            ("alpha", inlet.alpha),
            ("u", inlet.speed),
            ("F", self.load),
            ("Rx", self.rx),
            ("Ry", self.ry),
            ("E'", self.modulus),
        );
        let outcome = worked.trace.attempt_all(
            &ELLIPSE_GROUPS,
            inputs,
            |(eta, alpha, speed, load, x, y, modulus)| {
                let inlet = Inlet { eta, alpha, speed };
                let contact = PointLoad {
                    load,
                    radii: Radii { x, y },
                    modulus,
                };
                groups::of_ellipse(inlet, contact)
            },
        )?;
        Ok(KnownGroups::taken(worked, &outcome))
    }

    pub(super) fn ellipticity(self, worked: &mut Worked) -> Result<Known<Ratio>, Refusal> {
        let inputs = (("Rx", self.rx), ("Ry", self.ry));
        let law = &ellipse::ELLIPTICITY;
        let k = worked
            .trace
            .attempt("k", "ellipticity", law, inputs, |(x, y)| {
                ellipse::ellipticity(Radii { x, y })
            })?;
        Ok(k)
    }
}

/// A published fit of a line contact's film.
pub(super) type LineFilm = fn(Groups, Length) -> Length;
/// A published fit of an elliptical contact's film.
pub(super) type EllipseFilm = fn(Groups, Ratio, Length) -> Length;
