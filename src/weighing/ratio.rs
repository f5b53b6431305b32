//! What the viscosity ratio of a rolling bearing says of an oil beyond its floor: below 0.1 it is
//! outside ISO 281, above 4 nothing is gained. Remarks, never limits.

use super::Condition;
use crate::demand::rolling_bearing::{KAPPA, KAPPA_RULE};
use crate::demand::{Limit, PointDemands};
use crate::judge::{PreparedOil, PreparedPoint};
use crate::model::rulebook::Rulebook;
use crate::quantity::{Measure, Ratio};
use crate::relation::bearing::reference_viscosity::SMALLEST_KAPPA;

/// The component of practice that says what bands of the ratio mean.
const BANDS: &str = "brg_rolling_kappa";
/// Ratio from which the standard counts no more.
const LARGEST_KAPPA: f64 = 4.0;

/// Remarks on an oil, one for each bearing it is far off.
pub(super) fn notes(
    demands: &PointDemands,
    ready: &PreparedPoint,
    oil: &PreparedOil,
    rules: &Rulebook,
) -> Vec<Condition> {
    let Some(setting) = ready.settings.first() else {
        return Vec::new();
    };
    let mut notes = Vec::new();
    for judged in &setting.demands {
        let demand = &demands.middle.list[usize::from(judged.number)];
        let Limit::Kinematic(need) = demand.limit else {
            continue;
        };
        if demand.rule != KAPPA_RULE || !judged.t.is_finite() {
            continue;
        }
        let reference = need.base() / KAPPA;
        let new = oil.thin.nu(judged.t) / reference;
        let worn = oil.worst(ready).worn.as_ref();
        let thinnest = worn.map_or(new, |w| new.min(w.nu(judged.t) / reference));
        let (word, at) = if thinnest < SMALLEST_KAPPA {
            ("below 0.1", 0.0)
        } else if new > LARGEST_KAPPA {
            ("above 4", new)
        } else {
            continue;
        };
        let part = demand.part.as_deref().unwrap_or("rolling bearing");
        notes.push(Condition {
            rule: BANDS.to_owned(),
            title: String::new(),
            says: format!("{part}: viscosity ratio kappa {word} with this oil."),
            act: act(rules, at),
            source: demand.source.clone(),
        });
    }
    notes
}

/// What practice says of a ratio.
fn act(rules: &Rulebook, kappa: f64) -> String {
    let bands = rules.components.get(BANDS).map(|c| c.bands.as_slice());
    let within = |from: Option<Ratio>, to: Option<Ratio>| {
        from.is_none_or(|from| kappa >= from.base()) && to.is_none_or(|to| kappa < to.base())
    };
    let band = bands.and_then(|b| b.iter().find(|band| within(band.from, band.to)));
    band.map_or_else(String::new, |band| {
        let mut text = band.act.clone();
        if let Some(first) = text.get_mut(..1) {
            first.make_ascii_uppercase();
        }
        text.push('.');
        text
    })
}
