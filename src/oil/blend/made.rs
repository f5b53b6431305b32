//! The blend as an oil of its own, so that it can be weighed like any other.

use super::part::Mix;
use super::{Component, NoBlend};
use crate::model::Oil;
use crate::model::facts::OilFacts;
use crate::model::oil::{PointsFrom, Polymer, Shear, Viscosity, ViscosityPoint};
use crate::model::rulebook::Rulebook;
use crate::model::stated::Bound;
use crate::oil::Worn;
use crate::oil::curves::{Curves, curves};
use crate::quantity::convert::celsius;
use crate::quantity::{KinematicViscosity, MassDensity, Measure, Ratio, ThermodynamicTemperature};
use crate::source::Origin;
use crate::source::place::Given;

/// The blend by Walther, with what it has of both oils.
pub(super) fn made(
    a: Component<'_>,
    b: Component<'_>,
    share: Ratio,
    mix: &Mix,
    rules: &Rulebook,
) -> Result<(Oil, Curves), NoBlend> {
    let x = share.base();
    let mostly = if x > 0.5 { b.oil } else { a.oil };
    let mut oil = mostly.clone();
    oil.id = format!("{} + {:.0} % {}", a.oil.id, 100.0 * x, b.oil.id);
    oil.name = None;
    oil.viscosity = Viscosity::Points {
        points: vec![
            point(mix.walther(celsius(40.0))?, 40.0),
            point(mix.walther(celsius(100.0))?, 100.0),
        ],
        from: PointsFrom::DataSheet,
    };
    let thickened = a.curves.thickened || b.curves.thickened;
    oil.polymer = if thickened {
        Polymer::Thickened
    } else {
        Polymer::Free
    };
    oil.shear = sheared(mix).filter(|_| thickened);
    // measured values and declarations of one oil say nothing of the blend
    oil.formulation = None;
    oil.cold_viscosity = Vec::new();
    oil.ccs = Vec::new();
    oil.mrv = Vec::new();
    oil.t150000 = None;
    oil.hths = None;
    oil.alpha = None;
    oil.vi = None;
    oil.flash_point = None;
    oil.pour_point = warmer(&a.oil.pour_point, &b.oil.pour_point);
    oil.cloud_point = warmer(&a.oil.cloud_point, &b.oil.cloud_point);
    oil.oil_limit = None;
    oil.density = density(a, b, x);
    oil.price = None;
    oil.in_stock = None;
    oil.inputs = Vec::new();
    oil.facts = facts(a.oil, b.oil);
    let mut curves = curves(&oil, rules).map_err(|misfit| NoBlend::Wright(misfit.into()))?;
    if oil.shear.is_none() && thickened {
        curves.worn = diluted(a, b, x);
    }
    Ok((oil, curves))
}

fn point(nu: KinematicViscosity, t: f64) -> ViscosityPoint {
    ViscosityPoint {
        nu: Given::new(nu, "", Origin::assumed("worked out for the blend")),
        at: celsius(t),
        tolerance: None,
    }
}

/// The worn blend, where the worn state of both is known.
fn sheared(mix: &Mix) -> Option<Shear> {
    let at = |t: f64| mix.worn(celsius(t)).map(|nu| point(nu, t));
    Some(Shear::Points {
        points: vec![at(40.0)?, at(100.0)?],
        test: Some("of the components, as their sheets state".to_owned()),
    })
}

/// Range of the loss where that of a component is not known: each its own, by volume.
fn diluted(a: Component<'_>, b: Component<'_>, x: f64) -> Worn {
    let range = |c: Component<'_>, severe: bool| {
        if let Some(range) = c.curves.loss_range(severe) {
            return range;
        }
        let t100 = celsius(100.0);
        let known = c
            .curves
            .worn_range(severe)
            .map(|(_, most)| 1.0 - most.nu_at(t100).base() / c.curves.nu_new(t100).base());
        let loss = known.unwrap_or(0.0);
        (loss, loss)
    };
    let mixed = |severe: bool| {
        let ((a0, a1), (b0, b1)) = (range(a, severe), range(b, severe));
        ((1.0 - x) * a0 + x * b0, (1.0 - x) * a1 + x * b1)
    };
    let (least, most_mild) = mixed(false);
    Worn::Between {
        least,
        most_mild,
        most_severe: mixed(true).1,
    }
}

type BoundGiven = Option<Given<Bound<ThermodynamicTemperature>>>;

/// The warmer of two; none where one is not stated.
fn warmer(a: &BoundGiven, b: &BoundGiven) -> BoundGiven {
    let (a, b) = (a.as_ref()?, b.as_ref()?);
    let warmer = if a.value.figure() >= b.value.figure() {
        a
    } else {
        b
    };
    Some(warmer.clone())
}

/// Densities at 15 °C add up by volume.
fn density(
    a: Component<'_>,
    b: Component<'_>,
    x: f64,
) -> Option<Given<(MassDensity, ThermodynamicTemperature)>> {
    let (a, b) = (a.curves.density, b.curves.density);
    if a.assumed || b.assumed {
        return None;
    }
    let rho = (1.0 - x) * a.at15.base() + x * b.at15.base();
    let value = (MassDensity::from_base(rho), celsius(15.0));
    Some(Given::new(
        value,
        "",
        Origin::assumed("by volume, of both oils"),
    ))
}

/// Additives of both; classes, approvals and declarations only where both have them.
fn facts(a: &Oil, b: &Oil) -> OilFacts {
    let (fa, fb) = (&a.facts, &b.facts);
    let additives = match (&fa.additives, &fb.additives) {
        (Some(x), Some(y)) => Some(x.union(y).copied().collect()),
        _ => None,
    };
    let both = |class: &&String| fb.classes.iter().any(|c| c.eq_ignore_ascii_case(class));
    OilFacts {
        additives,
        classes: fa.classes.iter().filter(both).cloned().collect(),
        sulphur: same(fa.sulphur, fb.sulphur),
        food_class: same(fa.food_class, fb.food_class),
        environment: same(fa.environment, fb.environment),
        fire_class: same(fa.fire_class, fb.fire_class),
        ..OilFacts::default()
    }
}

/// What both declare alike.
fn same<T: PartialEq + Copy>(x: Option<T>, y: Option<T>) -> Option<T> {
    x.filter(|x| y == Some(*x))
}
