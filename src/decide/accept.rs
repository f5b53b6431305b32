//! Tight verdicts somebody accepts by name, for a time.

use crate::judge::Verdict;
use crate::model::Site;
use crate::model::site::Acceptance;
use crate::weighing::Weighed;

/// The acceptance in force on a day for the oil in use of a point, where that is tight.
pub fn accepted<'s>(site: &'s Site, weighed: &Weighed<'_>, on: &str) -> Option<&'s Acceptance> {
    let c = weighed.in_use()?;
    if c.judgement.verdict != Verdict::Tight {
        return None;
    }
    let id = &site.oils[c.oil].id;
    let address = weighed.point.address();
    site.accept.iter().find(|a| {
        let here = a.machine.value == address || a.machine.value == weighed.point.machine;
        here && a.oil.value == *id && a.stands(on)
    })
}
