//! Findings about the fluid itself: base, density, and what ASTM D341 does not cover.

use super::{Finding, finding};
use crate::model::Oil;
use crate::oil::curves::Curves;
use crate::oil::pressure::PressureLaw;
use crate::quantity::Measure;
use crate::quantity::convert::celsius;
use crate::quantity::show::{Toward, Units, quantity};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::viscosity_temperature::ViscosityCurve;

pub(super) fn findings(found: &mut Vec<Finding>, oil: &Oil, curves: &Curves) {
    if curves.density.assumed {
        let rho = quantity(curves.density.at15.amount(), Units::Si, Toward::Nearest);
        found.push(finding(
            "density-assumed",
            format!("no density stated; {rho} at 15 degC is typical of the base"),
            "take the density from the data sheet",
        ));
    }
    if curves.base_assumed {
        found.push(finding(
            "base-assumed",
            "no base stock stated; mineral Group I assumed".to_owned(),
            "ask the supplier for the base stock",
        ));
    }
    let density = curves.density;
    if !density.law.covers(density.at15, celsius(15.0)) {
        let rho = quantity(density.at15.amount(), Units::Si, Toward::Nearest);
        found.push(finding(
            "density-outside",
            format!("{rho} at 15 degC is outside the tables its base is carried by"),
            "check density and base",
        ));
    }
    scope(found, curves);
    if curves.pressure == PressureLaw::Unknown {
        found.push(finding(
            "alpha-unknown",
            format!(
                "no correlation of the pressure-viscosity coefficient holds for {}: films are not \
                 worked out",
                curves.base.word()
            ),
            "state a measured `alpha` with its temperature",
        ));
    }
    thin(found, oil, curves);
}

/// The line is a standard of hydrocarbon liquids.
fn scope(found: &mut Vec<Finding>, curves: &Curves) {
    let why = match curves.base {
        BaseStock::Silicone => {
            "silicones bend on the chart: two points carry 20 % of error 40 K below the lower one"
        }
        BaseStock::Pfpe => "perfluorinated oils lie outside the standard of the line",
        BaseStock::WaterGlycol => {
            "a water-glycol loses water in service and thickens with it; the line is that of the \
             water it was sold with"
        }
        BaseStock::PagWaterSoluble => {
            "a polyglycol that takes up water thins with it; the line is that of the dry fluid"
        }
        BaseStock::PhosphateEster => "phosphate esters lie outside the standard of the line",
        _ => return,
    };
    found.push(finding(
        "line-scope",
        format!("ASTM D341 is a standard of hydrocarbon liquids: {why}"),
        "state more than two points, over the whole range it is used in",
    ));
}

/// Below 2 mm²/s an index is not defined and the full form of the line counts.
fn thin(found: &mut Vec<Finding>, oil: &Oil, curves: &Curves) {
    let nu100 = curves.new.nu_at(celsius(100.0));
    if nu100.base() < 2e-6 && oil.vi.is_some() {
        found.push(finding(
            "index-undefined",
            "a viscosity index is not defined below 2 mm2/s at 100 degC".to_owned(),
            "leave the index out; the two viscosities say all",
        ));
    }
}
