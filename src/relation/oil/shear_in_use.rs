//! Loss by shear as an oil is used: from two samples to the time a limit is reached.
//!
//! Shear is fast early in the life of an oil and then levels off (common practice). A straight
//! line through the two samples therefore reaches a limit too early; a curve that levels off
//! reaches it later or never. Both are worked out, and the truth is expected between them.

use crate::numeric::math::{exp, ln};
use crate::numeric::root::bracketed;
use crate::quantity::{Measure, Ratio, Time};
use crate::relation::Law;

/// Loss that levels off.
pub static LEVELLING: Law = Law {
    name: "shear-in-use",
    title: "Loss by shear in use, levelling off",
    formula: "L(t) = L_end (1 - exp(-t / tau)), through two samples and nothing lost at the start",
    range: "two samples of one fill, the later one less than in proportion to its time",
    source: "common practice: early in life, then level",
};

/// Loss along a straight line.
pub static STRAIGHT: Law = Law {
    name: "shear-in-use-straight",
    title: "Loss by shear in use, carried on straight",
    formula: "L(t) = L_2 + (L_2 - L_1) (t - t_2) / (t_2 - t_1)",
    range: "two samples of one fill; the earliest the limit can be reached while the loss slows",
    source: "common practice",
};

/// A loss found after some time in use.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Sample {
    /// Time since the fill.
    pub after: Time,
    /// Share of the viscosity lost.
    pub loss: Ratio,
}

/// Why two samples say nothing.
#[derive(Clone, Copy, Debug, PartialEq, Eq, thiserror::Error)]
pub enum NoTrend {
    /// Not in order.
    #[error("the second sample must be later than the first, and the first later than the fill")]
    Order,
    /// No growing loss.
    #[error("the loss does not grow from the first sample to the second: nothing to carry on")]
    NotGrowing,
    /// Past the limit.
    #[error("the limit is passed already")]
    Passed,
}

/// When a limit is reached.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Reached {
    /// Along the straight line, time since the fill.
    pub straight: Time,
    /// Along the curve that levels off; `None` where it levels off short of the limit, or where
    /// the samples do not show a slowing loss.
    pub levelling: Option<Time>,
    /// What the levelling curve ends at; `None` where the samples do not show a slowing loss.
    pub ends_at: Option<Ratio>,
}

/// Time since the fill at which the loss reaches a limit.
///
/// # Errors
/// See [`NoTrend`].
pub fn reached(first: Sample, second: Sample, limit: Ratio) -> Result<Reached, NoTrend> {
    let (t1, t2) = (first.after.base(), second.after.base());
    let (l1, l2, most) = (first.loss.base(), second.loss.base(), limit.base());
    if !(t1 > 0.0 && t2 > t1) {
        return Err(NoTrend::Order);
    }
    if !(l1 >= 0.0 && l2 > l1) {
        return Err(NoTrend::NotGrowing);
    }
    if l2 >= most {
        return Err(NoTrend::Passed);
    }
    let straight = t2 + (most - l2) * (t2 - t1) / (l2 - l1);
    let curve = levelling((t1, l1), (t2, l2));
    let levelling = curve
        .filter(|(_, end)| *end > most)
        .map(|(tau, end)| Time::from_base(-tau * ln(1.0 - most / end)));
    Ok(Reached {
        straight: Time::from_base(straight),
        levelling,
        ends_at: curve.map(|(_, end)| Ratio::from_base(end)),
    })
}

/// Time constant and end of the levelling curve; `None` where the loss does not slow.
fn levelling((t1, l1): (f64, f64), (t2, l2): (f64, f64)) -> Option<(f64, f64)> {
    if l1 <= 0.0 || l2 / l1 >= t2 / t1 {
        return None;
    }
    // ratio of the two losses for a time constant: t2 / t1 for a long one, 1 for a short one
    let share = |t: f64, tau: f64| 1.0 - exp(-t / tau);
    let miss = |ln_tau: f64| {
        let tau = exp(ln_tau);
        share(t2, tau) / share(t1, tau) - l2 / l1
    };
    let (short, long) = (ln(t1 / 300.0), ln(t2 * 1e6));
    let tau = exp(bracketed(short, long, miss).ok()?.at);
    Some((tau, l1 / share(t1, tau)))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::number;

    fn sample(hours: f64, loss: f64) -> Sample {
        Sample {
            after: Time::from_base(hours * 3600.0),
            loss: number(loss),
        }
    }

    #[test]
    fn a_levelling_loss_is_recognised() {
        // L_end 20 %, tau 500 h
        let at = |t: f64| 0.2 * (1.0 - exp(-t / 500.0));
        let (one, two) = (sample(200.0, at(200.0)), sample(600.0, at(600.0)));
        let found = reached(one, two, number(0.18)).expect("a trend");
        let hours = |t: Time| t.base() / 3600.0;
        let true_time = -500.0 * ln(1.0 - 0.9);
        assert!((found.levelling.map_or(f64::NAN, hours) / true_time - 1.0).abs() < 1e-9);
        assert!((found.ends_at.map_or(f64::NAN, Measure::base) - 0.2).abs() < 1e-9);
        assert!(hours(found.straight) < true_time);
        // a limit beyond the end is never reached
        assert_eq!(
            reached(one, two, number(0.25)).map(|r| r.levelling),
            Ok(None)
        );
    }

    #[test]
    fn a_steady_loss_has_only_the_straight_line() {
        let found = reached(sample(100.0, 0.05), sample(200.0, 0.10), number(0.15)).expect("trend");
        assert!((found.straight.base() / 3600.0 - 300.0).abs() < 1e-9);
        assert_eq!((found.levelling, found.ends_at), (None, None));
    }

    #[test]
    fn samples_that_say_nothing_are_refused() {
        let (a, b) = (sample(100.0, 0.05), sample(200.0, 0.10));
        assert_eq!(reached(b, a, number(0.2)), Err(NoTrend::Order));
        assert_eq!(
            reached(a, sample(200.0, 0.04), number(0.2)),
            Err(NoTrend::NotGrowing)
        );
        assert_eq!(reached(a, b, number(0.1)), Err(NoTrend::Passed));
    }
}
