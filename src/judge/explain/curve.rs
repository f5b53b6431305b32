//! The steps of a viscosity read off one of an oil's curves, by the form the curve has.

use super::{Teller, Which};
use crate::judge::margin::Ready;
use crate::model::oil::{Shear, Viscosity, ViscosityPoint};
use crate::oil::Worn;
use crate::oil::curve::Curve;
use crate::oil::told::{LineSteps, lost, measured_cold, thickened};
use crate::quantity::convert::{celsius, number};
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::relation::Law;
use crate::relation::oil::piecewise::PIECEWISE;
use crate::relation::oil::viscosity_temperature::VISCOSITY;
use crate::source::place::Given;
use crate::trace::{Both, Derivation, Known, Recorder};

type Nu = Known<KinematicViscosity>;
type At = Known<ThermodynamicTemperature>;

impl Teller<'_> {
    /// Viscosity of one of the curves.
    pub(super) fn nu_at(
        &mut self,
        d: &mut Derivation,
        which: Which,
        t: At,
        says: &'static str,
    ) -> Nu {
        let bent = match self.curve(which) {
            Ready::Straight(_) => None,
            Ready::Bent(curve) => Some(curve.clone()),
        };
        match bent.as_deref() {
            Some(Curve::Thickened(oil)) => thickened(d, oil, t, says),
            Some(Curve::Share { keep, .. }) => self.after_loss(d, which, 1.0 - keep, t, says),
            Some(Curve::Cold(joined)) if t.value < joined.joint => {
                let joint = d.assume(
                    "t",
                    "coldest temperature stated",
                    joined.joint,
                    "measured viscosities take over below it",
                );
                let at_joint = self.nu_at(d, which, joint, "the oil at the coldest point stated");
                let curves = &self.ready.curves;
                let cold = (
                    joined.as_ref(),
                    curves.cold_points.as_slice(),
                    curves.density,
                );
                measured_cold(d, cold, (joint, at_joint), t, says)
            }
            Some(Curve::Cold(joined)) => match &joined.above {
                Curve::Thickened(oil) => thickened(d, oil, t, says),
                Curve::Plain(_) if joined.above.line().is_some() => {
                    self.through_points(d, which, t, says, &VISCOSITY)
                }
                _ => self.through_points(d, which, t, says, &PIECEWISE),
            },
            Some(Curve::Plain(_)) => self.through_points(d, which, t, says, &PIECEWISE),
            None => self.through_points(d, which, t, says, &VISCOSITY),
        }
    }

    /// On lines through points.
    fn through_points(
        &mut self,
        d: &mut Derivation,
        which: Which,
        t: At,
        says: &'static str,
        law: &'static Law,
    ) -> Nu {
        let points = self.points_of(d, which);
        let nu = KinematicViscosity::from_base(self.curve(which).nu(t.value.base()));
        let mut at = points.at.clone();
        at.push(("t", t));
        d.law("nu", says, law, Both(points.nu, at), |_| nu)
    }

    /// The new oil less a share.
    fn after_loss(
        &mut self,
        d: &mut Derivation,
        which: Which,
        share: f64,
        t: At,
        says: &'static str,
    ) -> Nu {
        let nu = KinematicViscosity::from_base(self.curve(which).nu(t.value.base()));
        let new = self.nu_at(d, Which::New, t, "viscosity of the new oil there");
        let why = match self.ready.curves.worn {
            Worn::Between { .. } => {
                "greatest plausible loss of its kind: no sheared viscosity is stated"
            }
            _ => "by the shear data stated",
        };
        lost(d, self.oil, new, (number(share), why), (says, nu))
    }

    /// Records the points of a curve once.
    fn points_of(&mut self, d: &mut Derivation, which: Which) -> LineSteps {
        if let Some((_, steps)) = self.points.iter().find(|(w, _)| *w == which) {
            return steps.clone();
        }
        let steps = match which {
            Which::New | Which::Thin | Which::Thick => self.new_points(d, which),
            Which::Worn => self.worn_points(d),
        };
        self.points.push((which, steps.clone()));
        steps
    }

    fn new_points(&self, d: &mut Derivation, which: Which) -> LineSteps {
        let ends = match which {
            Which::Thin => self.ready.curves.thin.is_some(),
            Which::Thick => self.ready.curves.thick.is_some(),
            _ => false,
        };
        match &self.oil.viscosity {
            Viscosity::Points { points, .. } if !ends => stated(d, points),
            _ => {
                let why = match which {
                    Which::Thin => "thin end of the grade or of the stated tolerance",
                    Which::Thick => "thick end of the grade or of the stated tolerance",
                    _ => "middle of the grade",
                };
                read_off(d, self.curve(which), why)
            }
        }
    }

    fn worn_points(&self, d: &mut Derivation) -> LineSteps {
        match (&self.ready.curves.worn, &self.oil.shear) {
            (Worn::Known(_), Some(Shear::Points { points, test })) if points.len() > 1 => {
                let steps = stated(d, points);
                if let Some(test) = test {
                    d.note(|| format!("after {test}"));
                }
                steps
            }
            _ => read_off(d, self.curve(Which::Worn), "by the shear data stated"),
        }
    }
}

/// A curve nobody stated point by point: its values at 40 and 100 °C.
fn read_off(d: &mut Derivation, curve: &Ready, why: &'static str) -> LineSteps {
    let mut steps = LineSteps {
        nu: Vec::new(),
        at: Vec::new(),
    };
    for (symbol, at_symbol, t) in [("nu_a", "t_a", 40.0), ("nu_b", "t_b", 100.0)] {
        let at = celsius(t);
        let nu = KinematicViscosity::from_base(curve.nu(at.base()));
        steps.nu.push((
            symbol,
            d.assume("nu", "viscosity of the curve judged", nu, why),
        ));
        steps
            .at
            .push((at_symbol, d.assume("t", "its temperature", at, why)));
    }
    steps
}

fn stated(d: &mut Derivation, points: &[ViscosityPoint]) -> LineSteps {
    let symbols = [
        ("nu_a", "t_a"),
        ("nu_b", "t_b"),
        ("nu_c", "t_c"),
        ("nu_d", "t_d"),
    ];
    let mut steps = LineSteps {
        nu: Vec::new(),
        at: Vec::new(),
    };
    for (i, point) in points.iter().enumerate() {
        let (symbol, at_symbol) = symbols[i.min(symbols.len() - 1)];
        let at = quantity(point.at.amount(), Units::Si, Toward::Nearest);
        steps.nu.push((
            symbol,
            d.given("nu", "viscosity on the data sheet", &point.nu),
        ));
        let given = Given::new(point.at, at, point.nu.origin.clone());
        steps
            .at
            .push((at_symbol, d.given("t", "its temperature", &given)));
    }
    steps
}
