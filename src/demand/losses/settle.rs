//! The temperature at which losses and cooling agree, for one oil.

use super::{LossKind, Losses, With};
use crate::oil::Curves;
use crate::quantity::convert::celsius;
use crate::quantity::{Measure, Power, ThermalConductance, ThermodynamicTemperature};
use crate::relation::Law;
use crate::relation::heat::balance::{
    CALIBRATION, LAW, NoBalance, Surroundings, calibrated, settled,
};
use crate::trace::{Known, Recorder};

/// Losses together.
pub static SUM: Law = Law {
    name: "losses-sum",
    title: "losses of a lubrication point together",
    formula: "P_V = P_mesh + P_churning + P_bearing + P_seal",
    range: "those of the parts stated",
    source: "ISO/TR 14179, as a sum",
};

/// Hottest oil looked at, degC.
const HOTTEST: f64 = 200.0;

/// A point whose cooling is known from the reading with the oil in use.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Calibrated {
    /// Heat given off for every kelvin.
    pub conductance: ThermalConductance,
}

/// An oil settled at an ambient.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Settled {
    /// The ambient.
    pub ambient: ThermodynamicTemperature,
    /// Temperature of the oil.
    pub t: ThermodynamicTemperature,
}

/// What an oil costs in power.
#[derive(Clone, Debug, PartialEq)]
pub struct Drag {
    /// Ambient it is worked out at.
    pub ambient: ThermodynamicTemperature,
    /// Temperature of the oil then.
    pub t: ThermodynamicTemperature,
    /// Losses by kind.
    pub by_kind: Vec<(LossKind, Power)>,
    /// Losses together.
    pub total: Power,
    /// Temperature of the films that oil is fed to, by part.
    pub films: Vec<(String, ThermodynamicTemperature)>,
}

impl Losses {
    fn cooler_w(&self) -> f64 {
        self.cooler.map_or(0.0, |c| c.value.base())
    }

    /// The cooling that gives the reading back with the oil in use. `None` without a reading, or
    /// where a share is not counted: cooling found from too small a sum would make a thicker oil
    /// too hot.
    ///
    /// # Errors
    /// A reading that says nothing about cooling.
    pub fn calibrate(&self, in_use: &Curves) -> Result<Option<Calibrated>, NoBalance> {
        let Some(reading) = self.reading.filter(|_| self.complete()) else {
            return Ok(None);
        };
        let (t, ambient) = (reading.sump.value, reading.ambient.value);
        let net = Power::from_base(self.at(in_use, t) - self.cooler_w());
        let conductance = calibrated(ambient, t, net)?;
        Ok(Some(Calibrated { conductance }))
    }

    /// The temperature at which an oil settles at an ambient.
    ///
    /// # Errors
    /// Losses that exceed the cooling at every temperature with a full film.
    pub fn settle(
        &self,
        oil: &Curves,
        conductance: ThermalConductance,
        ambient: ThermodynamicTemperature,
    ) -> Result<Settled, NoBalance> {
        let surroundings = Surroundings {
            ambient,
            conductance,
            hottest: self.hottest(oil, ambient),
        };
        let t = settled(&surroundings, |t| {
            let net = self.at(oil, t) - self.cooler_w();
            // more cooling than loss only means that the cooler idles
            Power::from_base(if net < 0.0 { 0.0 } else { net })
        })?;
        Ok(Settled { ambient, t })
    }

    /// The hottest oil with a full film in every plain bearing.
    fn hottest(&self, oil: &Curves, ambient: ThermodynamicTemperature) -> ThermodynamicTemperature {
        let has_film = |t: f64| {
            self.at(oil, ThermodynamicTemperature::from_base(t))
                .is_finite()
        };
        let (mut film, mut none) = (ambient.base(), celsius(HOTTEST).base());
        if has_film(none) || !has_film(film) {
            return celsius(HOTTEST);
        }
        for _ in 0..50 {
            let middle = f64::midpoint(film, none);
            if has_film(middle) {
                film = middle;
            } else {
                none = middle;
            }
        }
        ThermodynamicTemperature::from_base(film)
    }

    /// What an oil costs at an ambient and a temperature.
    pub fn drag(&self, oil: &Curves, at: Settled) -> Drag {
        let by_kind = self.by_kind(oil, at.t);
        let total = by_kind.iter().map(|(_, p)| p.base()).sum();
        Drag {
            ambient: at.ambient,
            t: at.t,
            by_kind,
            total: Power::from_base(total),
            films: self.films(oil, at.t),
        }
    }

    /// Tells the losses of an oil at a temperature, by source and together.
    pub fn tell<R: Recorder>(
        &self,
        r: &mut R,
        oil: &Curves,
        t: Known<ThermodynamicTemperature>,
    ) -> Known<Power> {
        let nu = r.law(
            "nu",
            "viscosity of the oil there, new",
            &crate::relation::oil::viscosity_temperature::VISCOSITY,
            (("t", t),),
            |(t,)| Self::nu(oil, t),
        );
        let mut sum = Vec::new();
        for source in &self.sources {
            let mut with = source.with.clone();
            with.0.push(("nu", nu.step));
            let power = Power::from_base(source.power(oil, t.value));
            let says = match source.kind {
                LossKind::Mesh => "power lost in the mesh",
                LossKind::Churning => "power lost in churning",
                LossKind::Bearing => "power lost in a bearing",
                LossKind::Seal => "power lost under a seal",
            };
            let known = r.law("P", says, source.law(), with, |()| power);
            r.note(|| source.part.clone());
            sum.push(("P", known.step));
        }
        let total = Power::from_base(self.at(oil, t.value));
        r.law("P_V", "losses together", &SUM, With(sum), |()| total)
    }

    /// Tells how the cooling follows from the reading.
    pub fn tell_cooling<R: Recorder>(
        &self,
        r: &mut R,
        in_use: &Curves,
        found: Calibrated,
    ) -> Option<Known<ThermalConductance>> {
        let reading = self.reading?;
        let losses = self.tell(r, in_use, reading.sump);
        let mut with = With(vec![
            ("P_V", losses.step),
            ("T_read", reading.sump.step),
            ("T_amb", reading.ambient.step),
        ]);
        if let Some(cooler) = self.cooler {
            with.0.push(("P_c", cooler.step));
        }
        let says = "heat given off for every kelvin, from the reading with the oil in use";
        Some(r.law("kA", says, &CALIBRATION, with, |()| found.conductance))
    }

    /// Tells the temperature an oil settles at.
    pub fn tell_settled<R: Recorder>(
        &self,
        r: &mut R,
        conductance: Known<ThermalConductance>,
        ambient: Known<ThermodynamicTemperature>,
        t: ThermodynamicTemperature,
    ) -> Known<ThermodynamicTemperature> {
        let mut with = With(vec![("kA", conductance.step), ("T_amb", ambient.step)]);
        for source in &self.sources {
            with.0.extend(source.with.0.iter().copied());
        }
        let says = "running temperature with this oil, from its losses";
        r.law("t_losses", says, &LAW, with, |()| t)
    }
}
