//! A thrust pad under its load: the film at a viscosity, and the viscosity for a film.

use super::series;
use super::shape::{NoPad, Shape, check_aspect, shaped};
use super::slider::{STEEPEST, Slider};
use crate::numeric::root::bracketed;
use crate::quantity::convert::{number, pascals};
use crate::quantity::{
    DynamicViscosity, Force, Length, Measure, Power, Pressure, Ratio, Velocity, VolumeRate,
};
use crate::relation::Law;

/// Film of a pad.
pub static LAW: Law = Law {
    name: "thrust-pad",
    title: "film and friction of a thrust pad",
    formula: "h_out = B sqrt(W* eta U L/W), B in the direction of motion, L across",
    range: "rectangular pad, width over length 0.1 to 10, ratio m of inlet to outlet film above 1 \
            to 10; m from the pivot of a tilting pad or the taper of a fixed one",
    source: "Reynolds equation solved by the program",
};

/// Viscosity for a film.
pub static VISCOSITY: Law = Law {
    name: "thrust-pad-viscosity",
    title: "viscosity a thrust pad needs for its film",
    formula: "eta = W h_out^2/(W* U B^2 L)",
    range: "as for the film",
    source: "Reynolds equation solved by the program",
};

/// Film of a pad with a given taper.
pub static TAPER: Law = Law {
    name: "thrust-pad-taper",
    title: "film of a fixed pad from its taper",
    formula: "W = W*(1 + taper/h_out) eta U B^2 L/h_out^2, solved for h_out",
    range: "as for the film; taper the difference of inlet and outlet film",
    source: "Reynolds equation solved by the program",
};

/// One pad and what it is asked to do, sound by construction.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Pad {
    length: Length,
    width: Length,
    load: Force,
    speed: Velocity,
}

/// A pad's film.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Film {
    /// Inlet over outlet film.
    pub ratio: Ratio,
    /// Pure numbers at that ratio.
    pub numbers: Slider,
    /// Film at the outlet, the least.
    pub h_out: Length,
    /// Friction coefficient.
    pub friction: Ratio,
    /// Friction power of the pad.
    pub power: Power,
    /// Oil drawn in at the inlet.
    pub flow: VolumeRate,
    /// Highest pressure.
    pub peak: Pressure,
}

impl Pad {
    /// Checks sizes and duty: `length` in the direction of motion, `width` across, the load on
    /// this one pad, the sliding speed at the middle of its width.
    ///
    /// # Errors
    /// A size or load not above zero, a standing runner, a shape outside the range.
    pub fn new(length: Length, width: Length, load: Force, speed: Velocity) -> Result<Self, NoPad> {
        for (value, what) in [
            (length.base(), "the length of the pad"),
            (width.base(), "the width of the pad"),
            (load.base(), "the load on the pad"),
        ] {
            if value.is_nan() || value <= 0.0 {
                return Err(NoPad::NotPositive { what });
            }
        }
        if speed.base().is_nan() || speed.base() <= 0.0 {
            return Err(NoPad::Standstill);
        }
        check_aspect(number(width.base() / length.base()))?;
        Ok(Self {
            length,
            width,
            load,
            speed,
        })
    }

    /// Width over length.
    pub fn aspect(&self) -> Ratio {
        number(self.width.base() / self.length.base())
    }

    /// Load over the area.
    pub fn mean_pressure(&self) -> Pressure {
        pascals(self.load.base() / (self.width.base() * self.length.base()))
    }

    /// The pure numbers of a shape, with its ratio of films.
    ///
    /// # Errors
    /// As for [`shaped`].
    pub fn shaped(&self, shape: Shape) -> Result<(Ratio, Slider), NoPad> {
        shaped(shape, Some(self.aspect()))
    }

    /// The film at a viscosity, [`LAW`].
    ///
    /// # Errors
    /// A viscosity not above zero, or a shape outside its range.
    pub fn film(&self, shape: Shape, eta: DynamicViscosity) -> Result<Film, NoPad> {
        let (ratio, numbers) = self.shaped(shape)?;
        let carried = numbers.load.base() * self.drag(eta)? / self.load.base();
        let h_out = Length::from_base(self.length.base() * carried.sqrt());
        Ok(self.stated(ratio, numbers, h_out, eta))
    }

    /// The viscosity at which the outlet film is `h_out`, [`VISCOSITY`].
    ///
    /// # Errors
    /// A film not above zero, or a shape outside its range.
    pub fn viscosity(&self, shape: Shape, h_out: Length) -> Result<DynamicViscosity, NoPad> {
        if h_out.base().is_nan() || h_out.base() <= 0.0 {
            let what = "the film";
            return Err(NoPad::NotPositive { what });
        }
        let (_, numbers) = self.shaped(shape)?;
        let share = h_out.base() / self.length.base();
        let drag = self.load.base() * share * share / numbers.load.base();
        let eta = drag / (self.speed.base() * self.width.base());
        Ok(DynamicViscosity::from_base(eta))
    }

    /// The film of a fixed pad whose inlet lies `taper` behind its outlet, [`TAPER`].
    ///
    /// # Errors
    /// A taper or viscosity not above zero, or no film in the range.
    pub fn tapered(&self, taper: Length, eta: DynamicViscosity) -> Result<Film, NoPad> {
        if taper.base().is_nan() || taper.base() <= 0.0 {
            let what = "the taper";
            return Err(NoPad::NotPositive { what });
        }
        let drag = self.drag(eta)?;
        // load carried over load asked, as a function of the ratio m = 1 + taper/h
        let excess = |m: f64| {
            let numbers = series::pad(number(m), self.aspect());
            let share = taper.base() / (m - 1.0) / self.length.base();
            let load = numbers.map_or(f64::NAN, |n| n.load.base());
            load * drag / (share * share) / self.load.base() - 1.0
        };
        let root = bracketed(1.01, STEEPEST, excess).map_err(|_| NoPad::Taper)?;
        let (ratio, numbers) = self.shaped(Shape::Ratio(number(root.at)))?;
        let h_out = Length::from_base(taper.base() / (root.at - 1.0));
        Ok(self.stated(ratio, numbers, h_out, eta))
    }

    /// `eta U L`, N.
    fn drag(&self, eta: DynamicViscosity) -> Result<f64, NoPad> {
        if eta.base().is_nan() || eta.base() <= 0.0 {
            let what = "the viscosity";
            return Err(NoPad::NotPositive { what });
        }
        Ok(eta.base() * self.speed.base() * self.width.base())
    }

    fn stated(&self, ratio: Ratio, numbers: Slider, h: Length, eta: DynamicViscosity) -> Film {
        let (length, speed) = (self.length.base(), self.speed.base());
        let shear = eta.base() * speed / h.base();
        let force = numbers.friction.base() * shear * length * self.width.base();
        let flow = numbers.flow.base() * speed * h.base() * self.width.base();
        Film {
            ratio,
            numbers,
            h_out: h,
            friction: number(force / self.load.base()),
            power: Power::from_base(force * speed),
            flow: VolumeRate::from_base(flow),
            peak: pascals(numbers.peak.base() * shear * length / h.base()),
        }
    }
}
