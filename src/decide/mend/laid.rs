//! One change laid over a trial again and again, as a root is sought.

use super::lever::{Lever, Side, Target, excess};
use super::trial::Trial;
use crate::judge::{PreparedPoint, weigh};

/// A trial and a copy of it that takes the change: only what the change touches is made anew.
pub(super) struct Laid<'a, 't> {
    base: &'a Trial<'t>,
    next: Trial<'t>,
    lever: Lever,
    /// Running temperature at the coldest ambient, where the change needs it.
    cold: Option<f64>,
    /// The point made ready, where the change is one of the oil.
    ready: Option<PreparedPoint>,
}

impl<'a, 't> Laid<'a, 't> {
    /// A change of `lever`, not laid yet.
    pub(super) fn new(base: &'a Trial<'t>, lever: Lever) -> Self {
        let ready = lever
            .of_oil()
            .then(|| base.scales.ready(&base.point, base.reserve));
        Self {
            base,
            next: base.clone(),
            lever,
            cold: base.coldest_running(lever),
            ready,
        }
    }

    /// What is left over a target on one side with the change at `at`; far below where the change
    /// makes no sense.
    pub(super) fn excess(&mut self, at: f64, side: Side, target: Target) -> f64 {
        if self
            .next
            .set(self.base, self.lever, at, self.cold)
            .is_none()
        {
            return -1e9;
        }
        let judged = match &self.ready {
            Some(point) => weigh(point, self.next.ready()),
            None => self.next.judge(),
        };
        excess(&judged, side, target)
    }
}
