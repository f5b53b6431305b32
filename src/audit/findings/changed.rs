//! What became of the oil itself: its causes, or that they are not decided.

use super::{Finding, label, plain, sentence};
use crate::audit::Audit;
use crate::audit::causes::{Cause, Named};
use crate::audit::limits::Level;
use crate::audit::units::Unit;
use crate::quantity::show::{Toward, fixed};
use crate::weighing::Scales;
use std::fmt::Write as _;

/// Another oil, or the labelled one changed: what it is likely to be.
#[expect(clippy::too_many_lines, reason = "one sentence after the other")]
pub(super) fn changed(
    audit: &Audit,
    unit: &Unit,
    place: usize,
    scales: &Scales<'_>,
) -> Option<Finding> {
    let j = &audit.judged[place];
    let first = j.diagnosis.causes.first();
    let viscosity = j.against.iter().filter(|a| a.on.starts_with("viscosity"));
    let level = viscosity.map(|a| a.level).max().unwrap_or_default();
    let named: Vec<&Named> = j
        .diagnosis
        .causes
        .iter()
        .filter(|n| n.likelihood >= 0.5)
        .collect();
    if first.is_none() && level == Level::Fine {
        return None;
    }
    let urgent = named.iter().any(|n| {
        matches!(
            n.cause,
            Cause::CopperAttack | Cause::CoolingWater | Cause::Cracking | Cause::Dilution
        )
    });
    let level = match level {
        Level::Act => Level::Act,
        _ if urgent => Level::Act,
        _ => Level::Watch,
    };
    let title = match first {
        Some(_) if j.diagnosis.undecided => "Changed, and the cause is not decided".to_owned(),
        Some(n) => sentence(n.cause.says()),
        None => "Changed, and no cause stands out".to_owned(),
    };
    let moved = match (j.change.nu40, j.change.nu100) {
        (Some(a), Some(b)) => format!(
            "{} at 40 degC, {} at 100 degC against new {}",
            share(a),
            share(b),
            label(j, scales)
        ),
        (Some(a), None) => format!(
            "{} at 40 degC against new {}; 100 degC was not measured",
            share(a),
            label(j, scales)
        ),
        (None, Some(b)) => format!(
            "{} at 100 degC against new {}; 40 degC was not measured",
            share(b),
            label(j, scales)
        ),
        (None, None) => "no viscosity was measured".to_owned(),
    };
    let mut text = format!("{}.", sentence(&moved));
    if j.diagnosis.undecided {
        let names: Vec<String> = j
            .diagnosis
            .causes
            .iter()
            .map(|n| n.cause.says().to_owned())
            .collect();
        let _ = write!(text, " Not decided between {}.", names.join(", "));
    }
    if let Some(oils) = first.map(|n| &n.oils).filter(|o| !o.is_empty()) {
        let listed: Vec<String> = oils
            .iter()
            .map(|o| {
                format!(
                    "{} (about {} %)",
                    o.says,
                    fixed(100.0 * o.share, 0, Toward::Nearest)
                )
            })
            .collect();
        let _ = write!(text, " Likely mixed in: {}.", listed.join("; "));
    }
    if !j.diagnosis.would_tell.is_empty() {
        let names: Vec<&str> = j.diagnosis.would_tell.iter().map(|r| r.says()).collect();
        let _ = write!(text, " Not measured, and would tell: {}.", names.join(", "));
    }
    let act = match first {
        Some(_) if j.diagnosis.undecided => {
            "have the missing figures measured, or send the sample for infrared against new oil"
        }
        Some(n) => n.cause.act(),
        None => "sample again, with acid number, flash point and elements",
    };
    let urgency = if level == Level::Act { 10.0 } else { 30.0 };
    Some(plain(
        unit, place, "changed", level, urgency, &title, text, act,
    ))
}

fn share(x: f64) -> String {
    let text = fixed(100.0 * x, 1, Toward::Nearest);
    if x > 0.0 && text != "0.0" {
        format!("+{text} %")
    } else {
        format!("{text} %")
    }
}
