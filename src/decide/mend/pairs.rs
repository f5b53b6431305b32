//! Two changes that together make an oil hold, where no single one does.

use super::lever::{Lever, Side, Target, excess};
use super::trial::{Range, Trial};
use super::{Change, Mend, acts, smallest, verified};
use crate::judge::Judgement;

/// Two changes, one for each side; of those that do, the pair of least trouble.
pub(super) fn cheapest(trial: &Trial<'_>, j: &Judgement, target: Target) -> Option<Mend> {
    let mut pairs: Vec<(u8, Lever, Lever)> = Vec::new();
    for hot in Lever::ALL {
        for cold in Lever::ALL {
            if matches!(hot.side(), Side::Hot) && matches!(cold.side(), Side::Cold) {
                pairs.push((hot.effort() + cold.effort(), hot, cold));
            }
        }
    }
    // a higher index mends one side, the machine the other
    for machine in [
        Lever::Heater,
        Lever::ColdestStart,
        Lever::SumpRise,
        Lever::Cooler,
    ] {
        pairs.push((
            Lever::Index.effort() + machine.effort(),
            Lever::Index,
            machine,
        ));
    }
    // a neighbouring grade for one side, the machine for the other
    for machine in Lever::ALL {
        if matches!(machine.side(), Side::Hot | Side::Cold) && !machine.of_oil() {
            pairs.push((
                Lever::Grade.effort() + machine.effort(),
                Lever::Grade,
                machine,
            ));
        }
    }
    pairs.sort();
    pairs.into_iter().find_map(|(_, first, second)| {
        let changes = match first {
            Lever::Grade | Lever::Index => after_other(trial, j, first, second, target),
            _ => one_after_other(trial, j, first, second, target),
        };
        verified(trial, changes?, target).ok()
    })
}

/// Solves each of two changes for its own side, the second on top of the first.
fn one_after_other(
    trial: &Trial<'_>,
    j: &Judgement,
    first: Lever,
    second: Lever,
    target: Target,
) -> Option<Vec<Change>> {
    let one = own_side(trial, j, first, target)?;
    let next = trial.with(first, one.to)?;
    Some(vec![one, on_top(&next, second, target)?])
}

/// Solves a change on top of another.
fn on_top(next: &Trial<'_>, lever: Lever, target: Target) -> Option<Change> {
    own_side(next, &next.judge(), lever, target)
}

/// The smallest change that mends the side it acts on; none where nothing is missed there.
fn own_side(trial: &Trial<'_>, j: &Judgement, lever: Lever, target: Target) -> Option<Change> {
    let range = trial.range(lever, j, target)?;
    if !acts(j, lever, target) {
        return None;
    }
    Some(Change {
        lever,
        from: range.from,
        to: smallest(trial, lever, range, lever.side(), target)?,
    })
}

/// A change of the oil for the side the machine's change does not act on, then the machine's.
fn after_other(
    trial: &Trial<'_>,
    j: &Judgement,
    oil: Lever,
    machine: Lever,
    target: Target,
) -> Option<Vec<Change>> {
    let (side, to) = match machine.side() {
        Side::Cold => (Side::Hot, 3.0),
        Side::Hot => (Side::Cold, -3.0),
        Side::Both => return None,
    };
    if excess(j, side, target) >= 0.0 {
        return None;
    }
    let range = match oil {
        Lever::Grade => Range { from: 0.0, to },
        _ => trial.range(oil, j, target)?,
    };
    let one = Change {
        lever: oil,
        from: range.from,
        to: smallest(trial, oil, range, side, target)?,
    };
    let next = trial.with(oil, one.to)?;
    Some(vec![one, on_top(&next, machine, target)?])
}
