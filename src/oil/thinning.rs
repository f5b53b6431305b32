//! Temporary shear: how much of its viscosity a polymer-thickened oil keeps in a fast contact.
//!
//! The polymer's share falls with the shear rate (Cross), the base oil does not thin. Where the
//! viscosity at high shear (HTHS) is given, the fall is calibrated on it; otherwise it lies
//! between the plausible ends of its constants. Base and polymer are those of [`super::makeup`].

use super::density::Density;
use super::makeup::Makeup;
use crate::model::Oil;
use crate::quantity::convert::{celsius, dynamic, number};
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, Measure, Pressure, Ratio, ShearRate,
    ThermodynamicTemperature,
};
use crate::relation::oil::polymer::ThickenedOil;
use crate::relation::oil::temporary_shear::{
    CRITICAL_STRESS_PA, Cross, EXPONENT, HIGH_SHEAR, PLATEAU, critical_rate, share_at_high_shear,
    viscosity_ratio,
};
use crate::relation::oil::viscosity_temperature::Line;

/// Which end of what is not known.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum End {
    /// Least viscosity is lost.
    LeastLost,
    /// Most viscosity is lost.
    MostLost,
}

/// How an oil thins under shear.
#[derive(Clone, Debug, PartialEq)]
pub struct Thinning {
    /// Every combination of what may be assumed.
    cases: Vec<Case>,
    density: Density,
    /// Whether it is calibrated on the high-shear viscosity.
    pub calibrated: bool,
    /// Why a stated high-shear viscosity is not used.
    pub not_calibrated: Option<String>,
}

/// One base oil with one law of its polymer.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Case {
    /// The base oil.
    pub base: Line,
    /// The law, at the viscosity of the base at 150 °C.
    pub cross: Cross,
    /// That viscosity.
    base_150: DynamicViscosity,
}

/// What an oil keeps at a temperature and shear rate.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Kept {
    /// Viscosity under shear over that at rest.
    pub viscosity: Ratio,
    /// Viscosity of the base oil there.
    pub base: KinematicViscosity,
    /// Share of the polymer at rest.
    pub at_rest: Ratio,
    /// Share of the polymer under shear.
    pub under_shear: Ratio,
    /// Rate at which half of what can be lost is lost.
    pub critical: ShearRate,
}

impl Thinning {
    /// Of an oil; `None` where it is not thickened or nothing is known of its base.
    pub(super) fn of(oil: &Oil, makeup: &Makeup, density: Density) -> Option<Self> {
        let oils = makeup.oils();
        if oils.is_empty() {
            return None;
        }
        let mut found = Self {
            cases: Vec::new(),
            density,
            calibrated: false,
            not_calibrated: None,
        };
        if let Some(hths) = &oil.hths {
            match calibrated(&oils, hths.value, density) {
                Ok(cases) => {
                    found.cases = cases;
                    found.calibrated = true;
                    return Some(found);
                }
                Err(why) => found.not_calibrated = Some(why),
            }
        }
        found.cases = assumed(&oils, density);
        Some(found)
    }

    /// What is kept by an oil of this viscosity at rest, at one end of what is not known.
    pub fn kept(
        &self,
        at_rest: KinematicViscosity,
        at: ThermodynamicTemperature,
        rate: ShearRate,
        end: End,
    ) -> Option<Kept> {
        let all = self.cases.iter().map(|c| self.case(*c, at_rest, at, rate));
        let order = |a: &Kept, b: &Kept| a.viscosity.base().total_cmp(&b.viscosity.base());
        match end {
            End::LeastLost => all.max_by(order),
            End::MostLost => all.min_by(order),
        }
    }

    fn case(
        &self,
        case: Case,
        at_rest: KinematicViscosity,
        at: ThermodynamicTemperature,
        rate: ShearRate,
    ) -> Kept {
        let base = case.base.nu_at(at);
        let p = number((at_rest.base() / base.base() - 1.0).max(0.0));
        let eta = dynamic(base, self.density.at(at));
        let cross = case.cross.at_base_viscosity(case.base_150, eta);
        let under_shear = cross.share(p, rate);
        Kept {
            viscosity: viscosity_ratio(under_shear, p),
            base,
            at_rest: p,
            under_shear,
            critical: cross.critical_rate(),
        }
    }
}

fn eta_150(base: Line, density: Density) -> DynamicViscosity {
    let t150 = celsius(150.0);
    dynamic(base.nu_at(t150), density.at(t150))
}

/// Laws that give the measured high-shear viscosity back. A base oil thicker than the measured
/// viscosity is ruled out by it.
fn calibrated(
    oils: &[ThickenedOil],
    hths: DynamicViscosity,
    density: Density,
) -> Result<Vec<Case>, String> {
    let mut cases = Vec::new();
    let mut why = String::new();
    for oil in oils {
        let base = oil.base();
        let base_150 = eta_150(base, density);
        let at_rest = oil.share_at(celsius(150.0));
        let effective = match share_at_high_shear(hths, base_150) {
            Ok(effective) => effective,
            Err(refused) => {
                why = refused.to_string();
                continue;
            }
        };
        let kept = effective.base() / at_rest.base();
        if !(kept > 0.0 && kept < 1.0) {
            "it is not below the viscosity at rest".clone_into(&mut why);
            continue;
        }
        // a plateau above what is kept in the test is ruled out by it
        let plateaus = [PLATEAU.0.min(0.9 * kept), PLATEAU.1.min(0.9 * kept)];
        for plateau in plateaus {
            for exponent in [EXPONENT.0, EXPONENT.1] {
                let constants = (number(plateau), number(exponent));
                match Cross::calibrated(at_rest, effective, HIGH_SHEAR, constants) {
                    Ok(cross) => cases.push(Case {
                        base,
                        cross,
                        base_150,
                    }),
                    Err(refused) => why = refused.to_string(),
                }
            }
        }
    }
    if cases.is_empty() {
        Err(why)
    } else {
        Ok(cases)
    }
}

/// Laws with every plausible constant.
fn assumed(oils: &[ThickenedOil], density: Density) -> Vec<Case> {
    let mut cases = Vec::new();
    for oil in oils {
        let base = oil.base();
        let base_150 = eta_150(base, density);
        for (plateau, stress) in [
            (PLATEAU.0, CRITICAL_STRESS_PA.0),
            (PLATEAU.1, CRITICAL_STRESS_PA.1),
        ] {
            for exponent in [EXPONENT.0, EXPONENT.1] {
                let rate = critical_rate(Pressure::from_base(stress), base_150);
                let cross = Cross::new(number(plateau), rate, number(exponent));
                cases.extend(cross.ok().map(|cross| Case {
                    base,
                    cross,
                    base_150,
                }));
            }
        }
    }
    cases
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::MassDensity;
    use crate::quantity::convert::mm2_s;
    use crate::relation::oil::density::DensityLaw;
    use crate::relation::oil::polymer::Thickening;
    use crate::relation::oil::viscosity_temperature::{Point, ViscosityCurve};

    fn oil() -> ThickenedOil {
        let point = |t, nu| Point::new(celsius(t), mm2_s(nu));
        let base = Line::through(point(40.0, 40.0), point(100.0, 6.5)).expect("points fall");
        ThickenedOil::new(base, Thickening::flat(number(0.8)).expect("a share"))
    }

    fn density() -> Density {
        Density {
            at15: MassDensity::from_base(880.0),
            law: DensityLaw::LubricatingOil,
            assumed: false,
        }
    }

    fn thinning(cases: Vec<Case>) -> Thinning {
        Thinning {
            cases,
            density: density(),
            calibrated: true,
            not_calibrated: None,
        }
    }

    #[test]
    fn a_calibrated_law_gives_the_measured_viscosity_back() {
        let t150 = celsius(150.0);
        let at_rest = oil().nu_at(t150);
        let eta = dynamic(at_rest, density().at(t150)).base();
        let hths = DynamicViscosity::from_base(0.88 * eta);
        let found = thinning(calibrated(&[oil()], hths, density()).expect("a loss"));
        for end in [End::LeastLost, End::MostLost] {
            let kept = found.kept(at_rest, t150, HIGH_SHEAR, end).expect("cases");
            assert!((kept.viscosity.base() - 0.88).abs() < 1e-9);
        }
        // cooler the base is thicker, so the same rate takes more
        let cool = celsius(80.0);
        let rest = oil().nu_at(cool);
        let kept = |end| {
            found
                .kept(rest, cool, HIGH_SHEAR, end)
                .expect("cases")
                .viscosity
        };
        assert!(kept(End::MostLost) < kept(End::LeastLost));
        assert!(kept(End::LeastLost).base() < 0.88);
    }

    #[test]
    fn a_measured_viscosity_below_the_base_oil_or_above_rest_calibrates_nothing() {
        let t150 = celsius(150.0);
        let eta = |nu: KinematicViscosity| dynamic(nu, density().at(t150)).base();
        for hths in [
            0.9 * eta(oil().base().nu_at(t150)),
            1.1 * eta(oil().nu_at(t150)),
        ] {
            let found = calibrated(&[oil()], DynamicViscosity::from_base(hths), density());
            assert!(found.is_err());
        }
    }

    #[test]
    fn the_base_oil_alone_loses_nothing_and_more_is_lost_the_faster() {
        let found = thinning(assumed(&[oil()], density()));
        let t = celsius(80.0);
        let kept = |nu, rate: f64, end| {
            found
                .kept(nu, t, ShearRate(rate), end)
                .expect("cases")
                .viscosity
                .base()
        };
        let base = oil().base().nu_at(t);
        assert!((kept(base, 1e7, End::MostLost) - 1.0).abs() < 1e-12);
        let new = oil().nu_at(t);
        assert!(kept(new, 1e7, End::MostLost) < kept(new, 1e5, End::MostLost));
        assert!(kept(new, 1e9, End::MostLost) > (1.0 + 0.2 * 0.8) / 1.8 - 1e-9);
    }
}
