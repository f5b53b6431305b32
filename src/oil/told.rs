//! Steps that sheets and judgements tell alike: a polymer-thickened oil, a loss by shear, a curve
//! through viscosities measured cold.

use super::cold::{ColdPoint, Used};
use super::curve::Joined;
use super::density::Density;
use crate::model::oil::{Oil, Shear};
use crate::quantity::convert::kinematic;
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, MassDensity, Ratio, ThermodynamicTemperature,
};
use crate::relation::oil::density::DYNAMIC_VISCOSITY;
use crate::relation::oil::piecewise::PIECEWISE;
use crate::relation::oil::polymer::{FINISHED, ThickenedOil, finished};
use crate::relation::oil::shear::UNIFORM;
use crate::relation::oil::viscosity_temperature::ViscosityCurve;
use crate::trace::{Both, Known, Recorder};

type Nu = Known<KinematicViscosity>;
type At = Known<ThermodynamicTemperature>;

/// The points of a line, recorded once.
#[derive(Clone, Debug, Default)]
pub struct LineSteps {
    /// Viscosities.
    pub nu: Vec<(&'static str, Nu)>,
    /// Their temperatures.
    pub at: Vec<(&'static str, At)>,
}

/// A thickened oil at a temperature, from its base and what its polymer adds.
pub fn thickened(d: &mut impl Recorder, oil: &ThickenedOil, t: At, says: &'static str) -> Nu {
    let base = d.assume(
        "nu_base",
        "base oil there",
        oil.base().nu_at(t.value),
        "on the line of the base oil stated",
    );
    let p = d.assume(
        "P",
        "share by which the polymer thickens it there",
        oil.share_at(t.value),
        "by base oil and finished oil, less what shear has taken",
    );
    d.law(
        "nu",
        says,
        &FINISHED,
        Both((("nu_base", base),), (("P", p),)),
        |((base,), (p,)): ((KinematicViscosity,), (Ratio,))| finished(base, p),
    )
}

/// A share lost at every temperature: as stated, else assumed with a reason.
pub fn lost(
    d: &mut impl Recorder,
    oil: &Oil,
    new: Nu,
    (share, why): (Ratio, &'static str),
    (says, nu): (&'static str, KinematicViscosity),
) -> Nu {
    let share = match &oil.shear {
        Some(Shear::Loss { loss, .. }) => d.given("PVL", "loss by shear stated", loss),
        _ => d.assume("PVL", "loss by shear", share, why),
    };
    d.law(
        "nu",
        says,
        &UNIFORM,
        Both((("nu", new),), (("PVL", share),)),
        |_: ((KinematicViscosity,), (Ratio,))| nu,
    )
}

/// Below the joint, through viscosities measured cold; `at_joint` is the oil where both meet.
pub fn measured_cold(
    d: &mut impl Recorder,
    (joined, points, density): (&Joined, &[ColdPoint], Density),
    (joint, at_joint): (At, Nu),
    t: At,
    says: &'static str,
) -> Nu {
    let nu = joined.below.nu_at(t.value);
    let mut steps = LineSteps {
        nu: vec![("nu_joint", at_joint)],
        at: vec![("t_joint", joint)],
    };
    for p in points.iter().filter(|p| p.used == Used::Yes) {
        let at = d.assume(
            "t",
            "temperature of a cold measurement",
            p.at,
            p.test.word(),
        );
        let rho = d.law(
            "rho",
            "density there",
            density.law.law(),
            (("t", at),),
            |(t,)| density.at(t),
        );
        let eta = d.assume("eta", "viscosity measured cold", p.eta, p.test.word());
        let over = d.law(
            "nu",
            "the same over the density",
            &DYNAMIC_VISCOSITY,
            (("eta", eta), ("rho", rho)),
            |(eta, rho): (DynamicViscosity, MassDensity)| kinematic(eta, rho),
        );
        steps.nu.push(("nu_cold", over));
        steps.at.push(("t_cold", at));
    }
    steps.at.push(("t", t));
    d.law("nu", says, &PIECEWISE, Both(steps.nu, steps.at), |_| nu)
}
