//! Oils that are not on the site: one of every usual grade and kind, so that a wrong oil is
//! recognised even where nobody has its data sheet.

use super::theta::Mixed;
use crate::audit::profile::{Expected, From, Profile};
use crate::model::sample::Reading;
use crate::numeric::math::ln;
use crate::quantity::convert::{mm2_s, number, to_mm2_s};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::viscosity_index;
use std::collections::BTreeMap;
use std::sync::Arc;

/// A kind of oil: name, base, viscosity index, zinc, phosphorus and calcium in ppm, acid number
/// and flash point rising from the thin grades to the thick (common practice, orders of size).
struct Sort {
    name: &'static str,
    base: BaseStock,
    vi: f64,
    zinc: f64,
    phosphorus: f64,
    calcium: f64,
    acid: f64,
    grades: &'static [f64],
    thickened: bool,
}

const WIDE: &[f64] = &[
    10.0, 15.0, 22.0, 32.0, 46.0, 68.0, 100.0, 150.0, 220.0, 320.0, 460.0, 680.0,
];

const SORTS: &[Sort] = &[
    Sort {
        name: "mineral oil without zinc",
        base: BaseStock::MineralI,
        vi: 98.0,
        zinc: 2.0,
        phosphorus: 40.0,
        calcium: 5.0,
        acid: 0.2,
        grades: WIDE,
        thickened: false,
    },
    Sort {
        name: "mineral hydraulic oil with zinc",
        base: BaseStock::MineralI,
        vi: 102.0,
        zinc: 420.0,
        phosphorus: 360.0,
        calcium: 40.0,
        acid: 0.6,
        grades: &[10.0, 15.0, 22.0, 32.0, 46.0, 68.0, 100.0, 150.0],
        thickened: false,
    },
    Sort {
        name: "mineral EP gear oil",
        base: BaseStock::MineralI,
        vi: 96.0,
        zinc: 5.0,
        phosphorus: 280.0,
        calcium: 5.0,
        acid: 0.8,
        grades: &[68.0, 100.0, 150.0, 220.0, 320.0, 460.0, 680.0],
        thickened: false,
    },
    Sort {
        name: "hydraulic oil of high viscosity index",
        base: BaseStock::MineralI,
        vi: 155.0,
        zinc: 380.0,
        phosphorus: 320.0,
        calcium: 40.0,
        acid: 0.6,
        grades: &[15.0, 22.0, 32.0, 46.0, 68.0, 100.0],
        thickened: true,
    },
    Sort {
        name: "synthetic oil (PAO)",
        base: BaseStock::Pao,
        vi: 145.0,
        zinc: 5.0,
        phosphorus: 150.0,
        calcium: 5.0,
        acid: 0.4,
        grades: WIDE,
        thickened: false,
    },
    Sort {
        name: "multigrade engine oil",
        base: BaseStock::MineralII,
        vi: 138.0,
        zinc: 1150.0,
        phosphorus: 1000.0,
        calcium: 2200.0,
        acid: 2.2,
        grades: &[70.0, 90.0, 108.0, 130.0],
        thickened: true,
    },
    Sort {
        name: "ester oil",
        base: BaseStock::PolyolEster,
        vi: 185.0,
        zinc: 2.0,
        phosphorus: 100.0,
        calcium: 3.0,
        acid: 0.5,
        grades: &[32.0, 46.0, 68.0, 100.0],
        thickened: false,
    },
    Sort {
        name: "polyglycol",
        base: BaseStock::PagWaterSoluble,
        vi: 225.0,
        zinc: 2.0,
        phosphorus: 60.0,
        calcium: 2.0,
        acid: 0.3,
        grades: &[68.0, 150.0, 220.0, 320.0, 460.0],
        thickened: false,
    },
    Sort {
        name: "vegetable oil",
        base: BaseStock::Vegetable,
        vi: 210.0,
        zinc: 2.0,
        phosphorus: 50.0,
        calcium: 3.0,
        acid: 0.8,
        grades: &[32.0, 46.0, 68.0],
        thickened: false,
    },
];

/// The oils not on the site.
pub(super) fn oils() -> Vec<Arc<Mixed>> {
    let mut all = Vec::new();
    for sort in SORTS {
        for grade in sort.grades {
            all.extend(one(sort, *grade));
        }
    }
    all
}

fn one(sort: &Sort, nu40: f64) -> Option<Arc<Mixed>> {
    let nu100 = to_mm2_s(viscosity_index::nu100(mm2_s(nu40), number(sort.vi)).ok()?);
    let mut figures = BTreeMap::new();
    let mut put = |reading, value: f64, spread: f64| {
        figures.insert(
            reading,
            Expected {
                value,
                spread,
                from: From::Usual,
            },
        );
    };
    let about = |value: f64| 0.45 * value + 6.0;
    put(Reading::Zn, sort.zinc, about(sort.zinc));
    put(Reading::P, sort.phosphorus, 0.7 * sort.phosphorus + 10.0);
    put(Reading::Ca, sort.calcium, about(sort.calcium));
    put(Reading::AcidNumber, sort.acid, 0.4 * sort.acid + 0.1);
    put(Reading::Flash, 160.0 + 16.0 * ln(nu40), 15.0);
    let density = match sort.base {
        BaseStock::PagWaterSoluble => (1050.0, 20.0),
        BaseStock::PolyolEster | BaseStock::Vegetable => (925.0, 12.0),
        BaseStock::Pao => (850.0, 10.0),
        _ => (878.0, 12.0),
    };
    put(Reading::Density, density.0, density.1);
    let says = format!("{}, VG {nu40}", sort.name);
    Some(Arc::new(Mixed {
        profile: Arc::new(Profile {
            ln40: ln(nu40),
            ln100: ln(nu100),
            viscosity_from: From::Usual,
            vi: Some(sort.vi),
            figures,
            base: sort.base,
            thickened: sort.thickened,
            test_loss: None,
        }),
        oil: None,
        says: says.into(),
    }))
}
