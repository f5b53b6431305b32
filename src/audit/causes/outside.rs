//! Oils that are not on the site, from the rules (foreign oils): one of every usual grade and kind,
//! so that a wrong oil is recognised even where nobody has its data sheet.

use super::theta::Mixed;
use crate::audit::profile::{Expected, From, Profile};
use crate::audit::scatter::in_unit;
use crate::model::rulebook::ForeignOil;
use crate::model::rulebook::cause::{ForeignFigure, Spread};
use crate::numeric::math::ln;
use crate::quantity::Measure;
use crate::quantity::convert::{mm2_s, to_mm2_s};
use crate::relation::oil::viscosity_index;
use std::sync::Arc;

/// Every grade of every kind.
pub(super) fn oils<'r>(rules: impl IntoIterator<Item = &'r ForeignOil>) -> Vec<Arc<Mixed>> {
    let mut all = Vec::new();
    for rule in rules {
        all.extend(rule.grades.iter().filter_map(|grade| one(rule, *grade)));
    }
    all
}

fn one(rule: &ForeignOil, grade: u32) -> Option<Arc<Mixed>> {
    let nu40 = f64::from(grade);
    let nu100 = to_mm2_s(viscosity_index::nu100(mm2_s(nu40), rule.index).ok()?);
    let figures = rule.figures.iter().map(|f| {
        let value = at_grade(f, nu40);
        let spread = match f.spread {
            Spread::By(amount) => in_unit(f.reading, amount),
            Spread::Share(share) => share.base() * value,
        };
        let expected = Expected {
            value,
            spread,
            from: From::Usual,
        };
        (f.reading, expected)
    });
    Some(Arc::new(Mixed {
        profile: Arc::new(Profile {
            ln40: ln(nu40),
            ln100: ln(nu100),
            viscosity_from: From::Usual,
            vi: Some(rule.index.base()),
            figures: figures.collect(),
            base: rule.base,
            thickened: rule.thickened,
            test_loss: None,
        }),
        oil: None,
        says: format!("{}, VG {grade}", rule.name).into(),
    }))
}

/// A figure at a grade, along the logarithm of the viscosity through VG 32 and VG 460.
fn at_grade(figure: &ForeignFigure, nu40: f64) -> f64 {
    let thin = in_unit(figure.reading, figure.value);
    let Some(thick) = figure.at_460 else {
        return thin;
    };
    let thick = in_unit(figure.reading, thick);
    thin + (thick - thin) * ln(nu40 / 32.0) / ln(460.0 / 32.0)
}
