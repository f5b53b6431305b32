//! What is sampled, and how each is spread.

use super::{Basis, Role, Sampled, Shape};
use crate::demand::{Gap, GapKind, Scenario, demands, is_severe};
use crate::model::oil::{PointsFrom, Viscosity};
use crate::oil::worn::Worn;
use crate::quantity::convert::celsius;
use crate::quantity::{Amount, Kind, Measure};
use crate::relation::oil::uncertainty::of_one_result;
use crate::trace::Silent;
use crate::weighing::{Scales, Weighed};

/// Data-sheet viscosities are typical values; batches lie about so far off. Common practice.
const DATA_SHEET: f64 = 0.05;
/// A grade lies anywhere within this of its middle (ISO 3448).
const GRADE: f64 = 0.10;

/// What is sampled: unknowns, assumptions, stated and usual tolerances, the oil.
pub(super) fn sampled(scales: &Scales<'_>, w: &Weighed<'_>, oil: usize) -> Vec<Sampled> {
    let listing = Scenario {
        list_usual: true,
        ..Scenario::middle()
    };
    let house = &scales.site.house;
    let all = demands(&mut Silent, w.point, house, scales.rules, &listing);
    let mut inputs = Vec::new();
    for (i, gap) in all.axes.iter().enumerate() {
        inputs.extend(of_gap(gap, Basis::Unknown, Role::Axis(i)));
    }
    for (gaps, basis) in [
        (&all.gaps, Basis::Assumed),
        (&all.tolerances, Basis::Stated),
        (&all.usual, Basis::Usual),
    ] {
        for gap in gaps {
            inputs.extend(of_gap(gap, basis, Role::Instead));
        }
    }
    inputs.extend(of_oil(scales, w, oil));
    inputs
}

fn of_gap(gap: &Gap, basis: Basis, role: Role) -> Option<Sampled> {
    let (ends, shape) = match (&gap.kind, basis) {
        (GapKind::Range(lo, hi), _) => ((*lo, *hi), Shape::Even),
        (GapKind::Assumed { taken, lo, hi }, Basis::Assumed) => {
            ((*lo, *hi), Shape::Peak(taken.base))
        }
        (GapKind::Assumed { lo, hi, .. }, _) => ((*lo, *hi), Shape::Bell),
        (GapKind::Word { .. } | GapKind::Missing | GapKind::Fact, _) => return None,
    };
    Some(Sampled {
        key: gap.key.clone(),
        about: gap.about.clone(),
        basis,
        ends,
        matters: 0.0,
        shape,
        role,
    })
}

/// The oil's own spread: its viscosity as a share, and a loss that is not known.
fn of_oil(scales: &Scales<'_>, w: &Weighed<'_>, oil: usize) -> Vec<Sampled> {
    let curves = &scales.oils[oil].curves;
    let share = |x: f64| Amount {
        kind: Kind::Ratio,
        base: x,
    };
    let (by, shape) = match &scales.site.oils[oil].viscosity {
        Viscosity::Grade(_) => (GRADE, Shape::Even),
        Viscosity::Points { points, from } => {
            let stated = points.iter().filter_map(|p| p.tolerance);
            let stated = stated.max_by(f64::total_cmp);
            let typical = match from {
                PointsFrom::DataSheet => DATA_SHEET,
                PointsFrom::Batch | PointsFrom::Measured => of_one_result(celsius(40.0)).base(),
            };
            (stated.unwrap_or(typical), Shape::Bell)
        }
    };
    let sampled = |key: &str, ends: (f64, f64), shape, role| Sampled {
        key: key.to_owned(),
        about: Some(scales.site.oils[oil].id.clone()),
        basis: Basis::Oil,
        ends: (share(ends.0), share(ends.1)),
        matters: 0.0,
        shape,
        role,
    };
    let mut all = vec![sampled(
        "viscosity",
        (1.0 - by, 1.0 + by),
        shape,
        Role::Viscosity,
    )];
    if let Worn::Between { .. } = curves.worn
        && let Some(range) = curves.loss_range(is_severe(w.point))
    {
        all.push(sampled(
            "permanent shear loss",
            range,
            Shape::Even,
            Role::Loss,
        ));
    }
    all
}
