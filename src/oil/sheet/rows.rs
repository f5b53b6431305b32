//! The oil at one temperature.

use super::teller::Teller;
use super::{Row, SpreadOf};
use crate::oil::curves::Capped;
use crate::oil::spread::Spread;
use crate::oil::start::Standing;
use crate::oil::told::{lost, measured_cold, thickened};
use crate::oil::{Curve, Worn};
use crate::quantity::convert::{dynamic, number};
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{
    KinematicViscosity, MassDensity, Measure, PressureViscosity, Ratio, ThermodynamicTemperature,
};
use crate::relation::oil::density::DYNAMIC_VISCOSITY;
use crate::relation::oil::uncertainty::{CARRIED, REPRODUCIBILITY, of_one_result};
use crate::relation::oil::viscosity_temperature::VISCOSITY;
use crate::trace::{Both, Known, Recorder};

type Nu = Known<KinematicViscosity>;
type At = Known<ThermodynamicTemperature>;

impl Teller<'_> {
    /// One row of the sheet.
    pub(super) fn row(&mut self, at: ThermodynamicTemperature) -> Row {
        let t = self.asked(at);
        let new = self.nu_new(t, "viscosity of the new oil");
        let cold = self.measured_cold(t);
        let ends = self.ends(t, new);
        let worn = self.worn(t, new);
        let density = self.density(t);
        let best = cold.unwrap_or(new);
        let dynamic = self.d.law(
            "eta",
            "dynamic viscosity of the new oil",
            &DYNAMIC_VISCOSITY,
            (("nu", best), ("rho", density)),
            |(nu, rho): (KinematicViscosity, MassDensity)| dynamic(nu, rho),
        );
        let standing = self.curves.standing(at, &self.stated);
        Row {
            at,
            new,
            cold,
            ends,
            worn,
            base: self.base(at),
            density,
            dynamic,
            alpha: self.alpha(t, new),
            standing,
            remarks: self.remarks(at, standing),
        }
    }

    pub(super) fn density(&mut self, t: At) -> Known<MassDensity> {
        let density = self.curves.density;
        self.d
            .law("rho", "density", density.law.law(), (("t", t),), |(t,)| {
                density.at(t)
            })
    }

    fn alpha(&mut self, t: At, nu: Nu) -> Option<Known<PressureViscosity>> {
        let (curves, at) = (self.curves, t.value);
        let law = curves.pressure.law()?;
        let line = curves.new.line_at(at);
        let alpha = curves.pressure.alpha(line, curves.density, at)?;
        Some(self.d.law(
            "alpha",
            "pressure-viscosity coefficient",
            law,
            Both((("nu", nu),), (("t", t),)),
            |_: ((KinematicViscosity,), (ThermodynamicTemperature,))| alpha,
        ))
    }

    /// Through viscosities measured cold, below the coldest point stated.
    fn measured_cold(&mut self, t: At) -> Option<Nu> {
        let Some(Curve::Cold(joined)) = &self.curves.cold else {
            return None;
        };
        if t.value >= joined.joint {
            return None;
        }
        let joint = self.asked(joined.joint);
        let at_joint = self.nu_new(joint, "the new oil at the coldest point stated");
        let density = self.curves.density;
        let cold = (joined.as_ref(), self.curves.cold_points.as_slice(), density);
        let says = "viscosity of the new oil through measured cold points";
        Some(measured_cold(&mut self.d, cold, (joint, at_joint), t, says))
    }

    /// Thin and thick: ends of the grade or of stated tolerances, else the tests' own spread.
    fn ends(&mut self, t: At, nu: Nu) -> Option<(Nu, Nu)> {
        let spread = self.spread.clone()?;
        let (low, high) = spread.band(self.curves, t.value)?;
        if spread == Spread::Ends {
            let mut end = |nu, says| {
                let of = self
                    .d
                    .assume("t", "temperature", t.value, "ends of grade or tolerance");
                self.d.law(
                    "nu",
                    says,
                    &VISCOSITY,
                    (("t", of),),
                    |_: (ThermodynamicTemperature,)| nu,
                )
            };
            return Some((
                end(low, "thin end of the new oil"),
                end(high, "thick end of the new oil"),
            ));
        }
        let share = self.d.law(
            "R_1",
            "how far one result lies from the mean of many",
            &REPRODUCIBILITY,
            (("t", t),),
            |(t,): (ThermodynamicTemperature,)| of_one_result(t),
        );
        let factor = spread.factor(t.value)?;
        let factor = self.d.law(
            "f",
            "the same carried along the line, a factor up and down",
            &CARRIED,
            Both((("R", share),), (("t", t),)),
            |_: ((Ratio,), (ThermodynamicTemperature,))| factor,
        );
        let mut end = |value, says| {
            self.d.law(
                "nu",
                says,
                &CARRIED,
                Both((("nu", nu),), (("f", factor),)),
                |_: ((KinematicViscosity,), (Ratio,))| value,
            )
        };
        Some((
            end(low, "thin limit by the tests"),
            end(high, "thick limit by the tests"),
        ))
    }

    pub(super) fn spread_of(&self) -> SpreadOf {
        match &self.spread {
            Some(Spread::Ends) => SpreadOf::Ends,
            Some(Spread::Tests { .. }) => SpreadOf::Tests,
            None => SpreadOf::Nothing,
        }
    }

    /// Worn, at the least and the greatest loss.
    pub(super) fn worn(&mut self, t: At, new: Nu) -> Option<(Nu, Nu)> {
        let curves = self.curves;
        let (least, most) = curves.worn_range(true)?;
        if let Some((lo, hi)) = curves.loss_range(true) {
            let least = self.lost(new, lo, &least, t, "least plausible loss");
            return Some((
                least,
                self.lost(new, hi, &most, t, "greatest plausible loss"),
            ));
        }
        let nu = most.nu_at(t.value);
        let worn = match (&curves.worn, self.sheared.clone()) {
            (Worn::Known(Curve::Plain(_)), Some(points)) => {
                let mut at = points.at.clone();
                at.push(("t", t));
                self.d.law(
                    "nu_worn",
                    "viscosity after shear",
                    &VISCOSITY,
                    Both(points.nu, at),
                    |_| nu,
                )
            }
            (Worn::Known(Curve::Thickened(made)), _) => {
                thickened(&mut self.d, made, t, "viscosity after shear")
            }
            _ => {
                let lost = 1.0 - nu.base() / new.value.base();
                self.lost(new, lost, &most, t, "stated loss")
            }
        };
        if most.crosses(t.value) {
            self.d.note(|| {
                "the sheared line would pass the new one here: the new one is taken".to_owned()
            });
        }
        Some((worn, worn))
    }

    fn lost(&mut self, new: Nu, share: f64, worn: &Capped<'_>, t: At, why: &'static str) -> Nu {
        let nu = worn.nu_at(t.value);
        lost(
            &mut self.d,
            self.oil,
            new,
            (number(share), why),
            ("viscosity after shear", nu),
        )
    }

    /// Base oil, thinner and thicker, never above what shear leaves: where an estimate would
    /// pass the line of the finished oil, it is the line that is too thin there.
    fn base(
        &self,
        at: ThermodynamicTemperature,
    ) -> Option<(KinematicViscosity, KinematicViscosity)> {
        let oils = self.curves.makeup.oils();
        let (first, last) = (oils.first()?, oils.last()?);
        let most = match self.curves.worn_range(true) {
            Some((_, worn)) => worn.nu_at(at),
            None => self.curves.nu_new(at),
        };
        let held = |nu: KinematicViscosity| if nu > most { most } else { nu };
        let (a, b) = (held(first.base().nu_at(at)), held(last.base().nu_at(at)));
        Some(if a <= b { (a, b) } else { (b, a) })
    }

    /// What else must be said of a value at that temperature.
    fn remarks(&self, at: ThermodynamicTemperature, standing: Standing) -> Vec<String> {
        let mut says = Vec::new();
        let shown = |k: f64| format!("{k:.0} K");
        match standing {
            Standing::Below(by) => {
                let doubt = if by > 60.0 { ": tight at best" } else { "" };
                says.push(format!("extrapolated {}{doubt}", shown(by)));
            }
            Standing::Above(by) => {
                says.push(format!(
                    "extrapolated {} above the highest point",
                    shown(by)
                ));
            }
            Standing::Stated | Standing::Measured | Standing::Between => {}
        }
        if matches!(standing, Standing::Below(_)) {
            if self.curves.window_end.is_some_and(|end| at < end) {
                says.push("below the polymer's window: thicker than this line".to_owned());
            }
            if let Some(why) = self.wax(at) {
                says.push(why);
            }
        }
        says
    }

    /// Close to the pour point or below the cloud point of a waxy oil the line has no meaning.
    fn wax(&self, at: ThermodynamicTemperature) -> Option<String> {
        let stock = self.rules.base_stock(self.curves.base)?;
        if !stock.wax_bearing {
            return None;
        }
        let cloud = self.oil.cloud_point.as_ref().map(|c| c.value.figure());
        let pour = self.oil.pour_point.as_ref().map(|p| p.value.figure());
        let shown = |t: ThermodynamicTemperature| quantity(t.amount(), Units::Si, Toward::Nearest);
        if let Some(cloud) = cloud.filter(|c| at < *c) {
            return Some(format!(
                "below the cloud point ({}): the line does not hold",
                shown(cloud)
            ));
        }
        let pour = pour?;
        let near = at.base() < pour.base() + 10.0;
        near.then(|| {
            format!(
                "within 10 K of the pour point ({}) or below it: the line does not hold",
                shown(pour)
            )
        })
    }
}
