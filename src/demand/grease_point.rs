//! A greased bearing: how much grease, how often, which base oil and consistency its speed
//! wants, and what today's habit is against that. Findings about the practice, not about a
//! grease: none of them is a limit.

mod interval;

use super::context::Context;
use super::grease_code;
use super::inputs::wanted;
use crate::model::Lubrication;
use crate::model::part::{BearingClass, Part, RollingBearing};
use crate::quantity::convert::{number, to_mm2_s};
use crate::quantity::{AngularVelocity, Length, Measure, Ratio};
use crate::relation::bearing::grease::{AMOUNT, N_DM, SHARE, amount, n_dm};
use crate::source::place::Given;
use crate::trace::{Known, Recorder};

/// Adds the findings of a bearing on a grease point.
pub(super) fn add<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    bearing: &RollingBearing,
    (dm, n): (Known<Length>, Known<AngularVelocity>),
) {
    if cx.lubrication() != Some(Lubrication::Grease) {
        return;
    }
    quantity(cx, part, bearing);
    interval::times(cx, part, bearing, n);
    by_speed(cx, part, bearing, (dm, n));
    consistency(cx, part);
    grease_code::wanted(cx, part);
}

/// Grams at each regreasing, and what is put in today.
fn quantity<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, bearing: &RollingBearing) {
    let key = |k, s, says| wanted(k, s, says, "designation on the ring");
    let outside = key("outside", "D", "outside diameter");
    let outside = cx.maybe(part, outside, bearing.outside.as_ref());
    let width = key("width", "B", "width");
    let width = cx.maybe(part, width, bearing.width.as_ref());
    let (Some(outside), Some(width)) = (outside, width) else {
        let says = "amount at each regreasing: the width of the bearing is not known";
        cx.inform(part, says, None);
        return;
    };
    let found = cx.r.attempt(
        "G",
        "grease at each regreasing",
        &AMOUNT,
        (("D", outside), ("B", width)),
        |(d, b)| amount(d, b),
    );
    let Ok(need) = found else { return };
    let says = "grease at each regreasing (0.005 D B, fed from the side)";
    cx.inform(part, says, Some((need.value.amount(), need.step)));
    let today = cx.point.regrease.as_ref().and_then(|r| r.amount.clone());
    let key = wanted(
        "regrease amount",
        "G_now",
        "grease put in today",
        "the greaser",
    );
    let Some(now) = cx.maybe(part, key, today.as_ref()) else {
        return;
    };
    let share = share(cx, (now.value.base(), now), (need.value.base(), need));
    let times = share.value.base();
    let says = if times > 1.5 {
        "put in today over needed (too much grease heats a bearing)"
    } else if times < 0.67 {
        "put in today over needed (too little)"
    } else {
        "put in today over needed"
    };
    cx.inform(part, says, Some((share.value.amount(), share.step)));
}

fn share<R: Recorder, A: Measure, B: Measure>(
    cx: &mut Context<'_, '_, R>,
    (now, k_now): (f64, Known<A>),
    (need, k_need): (f64, Known<B>),
) -> Known<Ratio> {
    cx.r.law(
        "s",
        "today over what is needed",
        &SHARE,
        (("now", k_now), ("needed", k_need)),
        |_| number(now / need),
    )
}

/// Base oil and consistency that the speed wants by practice; the viscosity ratio outranks it.
fn by_speed<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    bearing: &RollingBearing,
    (dm, n): (Known<Length>, Known<AngularVelocity>),
) {
    let factor = cx.r.law(
        "n dm",
        "speed factor, mm r/min",
        &N_DM,
        (("n", n), ("Dpw", dm)),
        |(n, dm)| n_dm(n, dm),
    );
    let value = factor.value.base();
    let figure = Some((factor.value.amount(), factor.step));
    let band = cx.rules.grease_speeds.iter().find(|b| {
        b.from.is_none_or(|from| value >= from.base()) && b.to.is_none_or(|to| value < to.base())
    });
    if let Some(band) = band {
        let says = format!(
            "speed factor: base oil of {} to {} mm2/s at 40 degC, NLGI {}, by practice; the \
             viscosity ratio outranks it",
            to_mm2_s(band.nu40.lo).round(),
            to_mm2_s(band.nu40.hi).round(),
            band.nlgi.join(" or ")
        );
        cx.inform(part, says, figure);
    }
    let id = match bearing.class {
        Some(BearingClass::SphericalRoller | BearingClass::SphericalRollerThrust) => {
            "limit-spherical"
        }
        Some(c) if c.is_ball() => "limit-ball",
        Some(_) => "limit-roller",
        None => return,
    };
    if let Some(limit) = cx.rules.grease_speed_limits.get(id)
        && value > limit.at_most.base()
    {
        let says = format!(
            "speed factor above {} mm r/min, the most for {}: special grease, or oil",
            limit.at_most.base(),
            limit.what
        );
        cx.inform(part, says, figure);
    }
}

/// NLGI number by duty.
fn consistency<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part) {
    let regrease = cx.point.regrease.as_ref();
    let stands = regrease.is_some_and(|r| {
        let is =
            |g: &Option<Given<String>>, word: &str| g.as_ref().is_some_and(|g| g.value == word);
        is(&r.position, "vertical") || is(&r.vibration, "medium") || is(&r.vibration, "high")
    });
    let number = if stands { "3" } else { "2" };
    let used = cx.rules.nlgi.get(number).and_then(|n| n.usage.clone());
    let says = format!(
        "NLGI {number} for this duty ({}); 1 in short central lines, 0 to 000 in long ones",
        used.unwrap_or_else(|| "by hand".to_owned())
    );
    cx.inform(part, says, None);
}
