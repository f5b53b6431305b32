//! The steps of a limit on a viscosity that a test measures.

use super::{Explained, Teller};
use crate::demand::Demand;
use crate::demand::tested::{GradeTest, TestedLimit};
use crate::judge::prepared::ReadyDemand;
use crate::judge::tested::{CARRIED_POINT, TestedPoint, measure, reading};
use crate::quantity::convert::kinematic;
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, Measure, ThermodynamicTemperature, VgStep,
};
use crate::relation::oil::tangent::TANGENT;
use crate::relation::oil::vg_step::{ABOVE, BELOW, CARRIED, steps};
use crate::trace::{Derivation, Known, Recorder};

impl Teller<'_> {
    pub(super) fn tested(
        &mut self,
        d: &mut Derivation,
        demand: &Demand,
        ready: &ReadyDemand,
        limit: TestedLimit,
        t: Known<ThermodynamicTemperature>,
    ) -> Option<Explained> {
        if measure(ready, limit, self.ready, self.variant).unknown {
            return None;
        }
        let bound = self.dynamic_limit(d, demand, limit.eta, t);
        let read = reading(limit, t.value.base(), self.ready, self.worn);
        let line = read.line;
        let Some(point) = read.point else {
            let which = self.which(ready, bound.value.base(), t.value.base());
            return Some(self.viscosity_on(d, ready, bound, t, which));
        };
        let nu = self.point(d, point, line.line.nu_at(t.value), t);
        let nu40 = d.law(
            "nu_40",
            "the oil's tangent read at 40 degC",
            &TANGENT,
            (("nu", nu), ("t", t)),
            |_: (KinematicViscosity, ThermodynamicTemperature)| {
                KinematicViscosity::from_base(line.nu40)
            },
        );
        let limit40 = d.law(
            "nu_40_limit",
            "the limit carried to 40 degC along the oil's slope",
            &CARRIED,
            (("nu_limit", bound), ("t", t)),
            |(nu, t): (KinematicViscosity, ThermodynamicTemperature)| {
                line.line.parallel_through(nu, t).nu40()
            },
        );
        let hot = limit.test == GradeTest::HighShear;
        let margin = d.law(
            "margin",
            "margin against the limit",
            if hot { &ABOVE } else { &BELOW },
            (("nu_40", nu40), ("nu_40_limit", limit40)),
            |(n, l)| {
                let above = steps(n, l).0;
                VgStep(if hot { above } else { -above })
            },
        );
        Some(Explained {
            demand: ready.number,
            value: margin.value.0,
            step: margin.step,
            nu: Some((nu.value, nu.step)),
            limit: Some(bound.value),
            t: t.value.base(),
            worn: false,
        })
    }

    /// The tested viscosity, and the same at the temperature of the demand.
    fn point(
        &self,
        d: &mut Derivation,
        point: TestedPoint,
        there: KinematicViscosity,
        t: Known<ThermodynamicTemperature>,
    ) -> Known<KinematicViscosity> {
        let at = d.assume(
            "t_test",
            "temperature of the test",
            ThermodynamicTemperature::from_base(point.t),
            point.by.word(),
        );
        let eta = d.assume(
            "eta_test",
            "viscosity by the test",
            point.eta,
            point.by.word(),
        );
        let density = self.ready.curves.density;
        let nu = d.law(
            "nu_test",
            "the same as a kinematic viscosity",
            density.law.law(),
            (("eta", eta), ("t_test", at)),
            |(eta, at): (DynamicViscosity, ThermodynamicTemperature)| {
                kinematic(eta, density.at(at))
            },
        );
        d.law(
            "nu",
            "viscosity of the oil there by the test",
            &CARRIED_POINT,
            (("nu_test", nu), ("t_test", at), ("t", t)),
            |_: (
                KinematicViscosity,
                ThermodynamicTemperature,
                ThermodynamicTemperature,
            )| there,
        )
    }
}
