//! Which demand governs an end where no oil is given yet: every limit is carried to 40 °C along
//! a mineral oil of VI 95, and the strictest there governs.

use super::film::{FilmContact, FilmDemand};
use super::{Demand, Demands, End, Limit, Standing};
use crate::numeric::math::{exp, ln};
use crate::numeric::root::bracketed;
use crate::oil::density::Density;
use crate::oil::pressure::PressureLaw;
use crate::quantity::convert::{celsius, dynamic, kinematic, number};
use crate::quantity::{
    Amount, Kind, KinematicViscosity, MassDensity, Measure, ThermodynamicTemperature,
};
use crate::relation::Law;
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::pressure_viscosity::Family;
use crate::relation::oil::viscosity_index;
use crate::relation::oil::viscosity_temperature::{Line, Point};

/// A limit carried to 40 °C along a mineral oil of VI 95.
pub static AT_VI_95: Law = Law {
    name: "limit-at-vi-95",
    title: "Viscosity at 40 degC of the VI 95 mineral oil that just meets the limit",
    formula: "nu_40 of the line of VI 95 through the limit",
    range: "2 to 10000 mm2/s at 40 degC",
    source: "ASTM D2270 and D341; VI 95 for comparison only",
};

/// The index of the oil limits are compared on.
pub const COMPARED_VI: f64 = 95.0;

/// The line of VI 95 with that viscosity at 40 °C.
pub fn line_of_vi_95(nu40: KinematicViscosity) -> Option<Line> {
    let nu100 = viscosity_index::nu100(nu40, number(COMPARED_VI)).ok()?;
    Line::through(
        Point::new(celsius(40.0), nu40),
        Point::new(celsius(100.0), nu100),
    )
    .ok()
}

/// Viscosity at 40 °C of the VI 95 oil that has `nu` at `at`; `None` outside 8 to 20 000 mm²/s.
pub fn carried_on_vi_95(
    nu: KinematicViscosity,
    at: ThermodynamicTemperature,
) -> Option<KinematicViscosity> {
    let excess = |ln40: f64| {
        line_of_vi_95(KinematicViscosity::from_base(exp(ln40)))
            .map_or(f64::NAN, |line| ln(line.nu_at(at).base() / nu.base()))
    };
    bracketed(ln(8e-6), ln(2e-2), excess)
        .ok()
        .map(|root| KinematicViscosity::from_base(exp(root.at)))
}

/// The limit of a demand as a viscosity at its temperature, for a mineral oil of VI 95.
pub fn as_viscosity(demand: &Demand, t: f64) -> Option<KinematicViscosity> {
    let at = ThermodynamicTemperature::from_base(t);
    match &demand.limit {
        Limit::Kinematic(nu) => Some(*nu),
        Limit::Dynamic(eta) => Some(kinematic(*eta, mineral().at(at))),
        Limit::Film(film) => film_on_mineral(film, at),
        Limit::Tested(limit) => Some(kinematic(limit.eta, mineral().at(at))),
        _ => None,
    }
}

/// The figure of a limit; a film's as the viscosity a mineral oil would need.
pub fn limit_amount(d: &Demand, t: Option<f64>) -> Option<Amount> {
    match &d.limit {
        Limit::Kinematic(nu) => Some(nu.amount()),
        Limit::Dynamic(eta) => Some(eta.amount()),
        Limit::Tested(limit) => Some(limit.eta.amount()),
        Limit::Film(_) => as_viscosity(d, t?).map(Measure::amount),
        Limit::Pour { least, .. } => Some(Amount {
            kind: Kind::Rise,
            base: *least,
        }),
        Limit::Temperature(t) => Some(Amount {
            kind: Kind::Temperature,
            base: *t,
        }),
        Limit::OilsOwn | Limit::UseLow => None,
    }
}

fn mineral() -> Density {
    Density {
        at15: MassDensity::from_base(880.0),
        law: BaseStock::MineralI.density_law(),
        assumed: true,
    }
}

/// Viscosity a film needs of a VI 95 mineral oil: the pressure-viscosity coefficient follows it.
pub fn film_on_mineral(
    film: &FilmDemand,
    at: ThermodynamicTemperature,
) -> Option<KinematicViscosity> {
    let density = mineral();
    if let FilmContact::Wedge(wedge) = film.contact {
        return Some(kinematic(wedge.needs, density.at(at)));
    }
    let excess = |ln40: f64| -> f64 {
        let Some(line) = line_of_vi_95(KinematicViscosity::from_base(exp(ln40))) else {
            return f64::NAN;
        };
        let Some(alpha) = PressureLaw::Iso(Family::Mineral).alpha(line, density, at) else {
            return f64::NAN;
        };
        film.contact
            .film_heated(
                dynamic(line.nu_at(at), density.at(at)),
                alpha,
                line.beta(at),
            )
            .map_or(f64::NAN, |h| ln(h.base() / film.wanted.base()))
    };
    let root = bracketed(ln(8e-6), ln(2e-2), excess).ok()?;
    line_of_vi_95(KinematicViscosity::from_base(exp(root.at))).map(|line| line.nu_at(at))
}

impl Demands {
    /// The number of the demand that governs an end, where no oil is given.
    pub fn governing(&self, end: End) -> Option<usize> {
        let judged: Vec<(usize, &Demand, f64)> = self
            .list
            .iter()
            .enumerate()
            .filter(|(_, d)| d.end == end && d.standing == Standing::Judges)
            .filter_map(|(i, d)| Some((i, d, self.governing_temperature(d)?)))
            .collect();
        // limits at one temperature keep their order when carried to another
        let first = judged.first()?.2;
        let carry = judged.iter().any(|(_, _, t)| t.total_cmp(&first).is_ne());
        let mut best: Option<(usize, f64)> = None;
        for (i, demand, t) in judged {
            let Some(strictness) = strictness(demand, t, carry) else {
                continue;
            };
            if best.is_none_or(|(_, s)| strictness > s) {
                best = Some((i, strictness));
            }
        }
        best.map(|(i, _)| i)
    }
}

/// The greater the stricter: a floor's viscosity, a ceiling's turned round; at 40 °C where the
/// limits compared are to be carried there.
fn strictness(demand: &Demand, t: f64, carry: bool) -> Option<f64> {
    let compared = || -> Option<f64> {
        let nu = as_viscosity(demand, t)?;
        let at = ThermodynamicTemperature::from_base(t);
        let carried = carry.then(|| carried_on_vi_95(nu, at)).flatten();
        Some(carried.map_or(nu.base(), Measure::base))
    };
    match demand.end {
        End::HotFloor | End::MakerGrade => compared(),
        End::RunningCeiling | End::StartCeiling => Some(1.0 / compared()?),
        End::PourMargin => match demand.limit {
            Limit::Pour { least, .. } => Some(least),
            _ => Some(0.0),
        },
        End::OilCeiling => match demand.limit {
            Limit::Temperature(most) => Some(-most),
            _ => Some(-f64::MAX),
        },
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{mm2_s, to_mm2_s};

    #[test]
    fn a_limit_is_carried_along_vi_95() {
        let line = line_of_vi_95(mm2_s(220.0)).expect("an oil");
        let at = celsius(78.0);
        let back = carried_on_vi_95(line.nu_at(at), at).expect("inside");
        assert!((to_mm2_s(back) - 220.0).abs() < 1e-6);
    }
}
