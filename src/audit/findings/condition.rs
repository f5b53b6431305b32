//! Figures over their limits, dirt, metals, and where the trend leads.

use super::{Finding, plain, sentence, trend_words};
use crate::audit::Audit;
use crate::audit::causes::Cause;
use crate::audit::limits::Level;
use crate::audit::readings::Against;
use crate::audit::trend::Trend;
use crate::audit::units::Unit;

/// Water, acids, cleanliness and the other figures against their limits.
pub(super) fn condition(audit: &Audit, unit: &Unit, place: usize) -> Vec<Finding> {
    let j = &audit.judged[place];
    let mut list = Vec::new();
    let over: Vec<&Against> = j
        .against
        .iter()
        .filter(|a| a.level > Level::Fine && !a.on.starts_with("viscosity"))
        .collect();
    if let Some(level) = over.iter().map(|a| a.level).max() {
        let says: Vec<String> = over.iter().map(|a| limit_words(a)).collect();
        let water_named = j
            .diagnosis
            .causes
            .iter()
            .any(|n| matches!(n.cause, Cause::Water | Cause::CoolingWater));
        let act = if water_named {
            Cause::Water.act()
        } else {
            "sample again soon; plan the oil change where it is confirmed"
        };
        list.push(plain(
            unit,
            place,
            "over-limit",
            level,
            15.0,
            "Figures over their limits",
            format!("{}.", sentence(&says.join("; "))),
            act,
        ));
    }
    if let Some(clean) = j.clean.as_ref().filter(|c| c.level > Level::Fine)
        && let Some((target, part, _)) = &clean.target
    {
        let over = clean.over.unwrap_or(0);
        let counted = if clean.from_counts {
            ", from counts"
        } else {
            ""
        };
        let codes = if over == 1 { "code" } else { "codes" };
        list.push(plain(unit, place, "cleanliness", clean.level, 25.0, "Dirtier than its strictest part asks",
            format!("Cleanliness {}{counted} against {target} ({part}): {over} {codes} over, each of which doubles the particles.", clean.code),
            &format!("filter to {target}; no oil change for that")));
    }
    list
}

fn limit_words(a: &Against) -> String {
    format!(
        "{}: {} (rule {}, {})",
        a.says,
        a.level.word(),
        a.limit.rule,
        a.limit.source
    )
}

pub(super) fn trend(unit: &Unit, place: usize) -> Option<Finding> {
    let Trend::Moves(m) = &unit.trend else {
        return None;
    };
    let title = if m.slope < 0.0 {
        "Thinning"
    } else {
        "Thickening"
    };
    Some(plain(
        unit,
        place,
        "trend",
        Level::Watch,
        35.0,
        title,
        format!("{}.", sentence(&trend_words(&unit.trend))),
        "sample again in a quarter; plan the oil change before the earlier date",
    ))
}

pub(super) fn metals(unit: &Unit, place: usize) -> Option<Finding> {
    let first = unit.rises.first()?;
    let says: Vec<&str> = unit.rises.iter().map(|r| r.says.as_str()).collect();
    let urgent = unit.rises.iter().any(|r| r.urgent);
    let level = if urgent { Level::Act } else { Level::Watch };
    Some(plain(
        unit,
        place,
        "metals",
        level,
        33.0,
        &format!("{} rises", sentence(first.element.says())),
        format!("{}.", sentence(&says.join("; "))),
        "look at the parts named; halve the sampling interval",
    ))
}
