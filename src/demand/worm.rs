//! Worm and wheel: the practice window as the limits; sliding speed, friction, efficiency and the
//! older guides beside it.

use super::component::window_demands;
use super::context::Context;
use super::inputs::{Usual, Wanted, wanted};
use super::{End, Undecided};
use crate::model::part::{Part, WheelMaterial, WormMesh};
use crate::quantity::convert::degrees;
use crate::quantity::{Angle, AngularVelocity, Length, Measure, Power, Ratio, Velocity};
use crate::relation::gear::worm::{
    EFFICIENCY, FRICTION, LEAD, LOSS, SLIDING, USUAL_DIAMETER, VISCOSITY_GUIDE, efficiency,
    friction, lead_angle, loss, sliding_speed, usual_diameter, viscosity_guide,
};
use crate::relation::gear::worm_grades::{D94_WORM, compounded};
use crate::trace::{Known, Recorder};

/// The component of practice whose window a worm takes.
pub const WINDOW: &str = "gear_worm";

const DISTANCE: Wanted<'static> = wanted(
    "centre distance",
    "a",
    "centre distance",
    "nameplate, or a rule",
);
const SPEED: Wanted<'static> = wanted(
    "worm speed",
    "n1",
    "speed of the worm",
    "nameplate of the motor",
);
const LEAD_ANGLE: Wanted<'static> = wanted("lead angle", "gamma", "lead angle", "drawing");

/// Adds the demands of a worm mesh.
pub fn add<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, mesh: &WormMesh) {
    limits(cx, part, mesh);
    let distance = cx.maybe(part, DISTANCE, mesh.centre_distance.as_ref());
    let speed = cx.take(part, SPEED, mesh.worm_speed.as_ref());
    let Some(speed) = speed else { return };
    older_grade(cx, part, distance, speed);
    let Some(diameter) = diameter(cx, part, mesh, distance) else {
        return;
    };
    let gamma = lead(cx, part, mesh, (distance, diameter));
    slide(cx, part, mesh, (diameter, speed, gamma));
}

/// The window of practice, for a wheel of metal.
fn limits<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, mesh: &WormMesh) {
    let wheel = mesh.wheel.as_ref().map(|w| w.value);
    if wheel == Some(WheelMaterial::Plastic) {
        let because = "no practice window for a plastic wheel: state the maker's `floor`";
        cx.undecided(part, End::HotFloor, because);
        return;
    }
    if wheel.is_none() {
        cx.fact_missing(part, "wheel", "parts list, or the colour of the wheel");
    }
    match cx.rules.components.get(WINDOW).cloned() {
        Some(window) => window_demands(cx, part, &window),
        None => cx.undecided.push(Undecided {
            end: End::HotFloor,
            part: Some(part.label.clone()),
            because: format!("the rules hold no component {WINDOW}"),
        }),
    }
    if matches!(wheel, Some(WheelMaterial::Steel | WheelMaterial::CastIron)) {
        let says = "the window is that of a bronze wheel; wheels of iron or steel want EP and \
                    the maker's word";
        cx.inform(part, says, None);
    }
}

/// Number of the compounded oil by the superseded table.
fn older_grade<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    distance: Option<Known<Length>>,
    speed: Known<AngularVelocity>,
) {
    let (Some(a), Some((_, hot))) = (distance, cx.thermal.ambient) else {
        return;
    };
    let Ok(Some((number, vg))) = compounded(a.value, speed.value, hot.value) else {
        return;
    };
    let says = format!(
        "AGMA {number} (ISO VG {vg}) by {}; polyglycol one grade thinner",
        D94_WORM.source
    );
    cx.inform(part, says, None);
}

/// Mean diameter of the worm: stated, or what is usual for the centre distance.
fn diameter<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &WormMesh,
    distance: Option<Known<Length>>,
) -> Option<Known<Length>> {
    let key = wanted(
        "worm diameter",
        "d1",
        "mean diameter of the worm",
        "a rule across the worm, or the drawing",
    );
    if cx.has(mesh.worm_diameter.as_ref()) {
        return cx.take(part, key, mesh.worm_diameter.as_ref());
    }
    let Some(a) = distance else {
        cx.missing(part, key, None);
        return None;
    };
    let (value, lo, hi) = usual_diameter(a.value).ok()?;
    let usual = Usual {
        value,
        lo,
        hi,
        why: USUAL_DIAMETER.formula,
    };
    Some(cx.or_assume(part, key, mesh.worm_diameter.as_ref(), usual))
}

/// Lead angle: stated, or from centre distance and ratio, or what is usual for the ratio.
fn lead<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &WormMesh,
    (distance, diameter): (Option<Known<Length>>, Known<Length>),
) -> Known<Angle> {
    let key = LEAD_ANGLE;
    if cx.has(mesh.lead_angle.as_ref())
        && let Some(gamma) = cx.take(part, key, mesh.lead_angle.as_ref())
    {
        return gamma;
    }
    let ratio = cx.maybe(
        part,
        wanted("ratio", "u", "ratio", "nameplate"),
        mesh.ratio.as_ref(),
    );
    if let (Some(a), Some(u)) = (distance, ratio) {
        let found = cx.r.attempt(
            "gamma",
            "lead angle",
            &LEAD,
            (("a", a), ("d1", diameter), ("u", u)),
            |(a, d, u)| lead_angle(a, d, u),
        );
        if let Ok(gamma) = found {
            return gamma;
        }
    }
    let slow = ratio.is_none_or(|u| u.value.base() >= 25.0);
    let (value, lo, hi) = if slow {
        (4.5, 2.0, 8.0)
    } else {
        (14.0, 6.0, 30.0)
    };
    let usual = Usual {
        value: degrees(value),
        lo: degrees(lo),
        hi: degrees(hi),
        why: "usual for the ratio; one or two threads from 25 on",
    };
    cx.or_assume(part, key, mesh.lead_angle.as_ref(), usual)
}

/// Sliding speed and what follows from it.
fn slide<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &WormMesh,
    (diameter, speed, gamma): Sized,
) {
    let Some(v) = sliding(cx, (diameter, speed, gamma)) else {
        cx.undecided(part, End::HotFloor, "the worm stands still or has no size");
        return;
    };
    cx.inform(part, "sliding speed", Some((v.value.amount(), v.step)));
    let guide = cx.r.attempt(
        "nu40",
        "guide to the viscosity at 40 degC",
        &VISCOSITY_GUIDE,
        (("v_g", v),),
        |(v,)| viscosity_guide(v, false),
    );
    if let Ok(nu) = guide {
        let says = "guide to the viscosity at 40 degC by sliding speed (textbooks, from memory)";
        cx.inform(part, says, Some((nu.value.amount(), nu.step)));
    }
    let eta = match efficient(cx, (v, gamma)) {
        Ok(eta) => eta,
        Err(mu) => {
            let says = "friction locks the mesh with this lead angle: no efficiency can be given";
            cx.inform(part, says, Some((mu.value.amount(), mu.step)));
            return;
        }
    };
    let says = "efficiency of the mesh, mineral oil; polyglycol runs some per cent better";
    cx.inform(part, says, Some((eta.value.amount(), eta.step)));
    if let Some((_, lost)) = into_heat(cx, part, mesh, eta) {
        let figure = Some((lost.value.amount(), lost.step));
        cx.inform(part, "power the mesh turns into heat", figure);
    }
}

/// Mean diameter of the worm, its speed, its lead angle.
type Sized = (Known<Length>, Known<AngularVelocity>, Known<Angle>);

fn sliding<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    (diameter, speed, gamma): Sized,
) -> Option<Known<Velocity>> {
    let found = cx.r.attempt(
        "v_g",
        "sliding speed",
        &SLIDING,
        (("d1", diameter), ("n1", speed), ("gamma", gamma)),
        |(d, n, g)| sliding_speed(d, n, g),
    );
    found.ok()
}

/// Efficiency of the mesh; the friction where it locks.
fn efficient<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    (v, gamma): (Known<Velocity>, Known<Angle>),
) -> Result<Known<Ratio>, Known<Ratio>> {
    let mu = cx.r.law(
        "mu",
        "coefficient of friction of the mesh",
        &FRICTION,
        (("v_g", v),),
        |(v,)| friction(v),
    );
    let alpha = cx.r.assume(
        "alpha_n",
        "normal pressure angle",
        degrees(20.0),
        "usual for worms; 14.5 to 25 deg changes little",
    );
    let eta = cx.r.attempt(
        "eta",
        "efficiency of the mesh",
        &EFFICIENCY,
        (("gamma", gamma), ("alpha_n", alpha), ("mu", mu)),
        |(g, a, mu): (Angle, Angle, Ratio)| efficiency(g, a, mu),
    );
    eta.map_err(|_| mu)
}

const POWER: Wanted<'static> = wanted("power", "P", "input power", "nameplate of the motor");

/// Input power and what of it the mesh turns into heat, where the power is known.
fn into_heat<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &WormMesh,
    eta: Known<Ratio>,
) -> Option<(Known<Power>, Known<Power>)> {
    let power = cx.maybe(part, POWER, mesh.power.as_ref())?;
    let lost = cx.r.law(
        "P_V",
        "power the mesh turns into heat",
        &LOSS,
        (("P", power), ("eta", eta)),
        |(p, eta)| loss(p, eta),
    );
    Some((power, lost))
}

/// Power a worm mesh turns into heat.
pub(super) struct Lost {
    pub(super) power: Known<Power>,
    pub(super) efficiency: Known<Ratio>,
    pub(super) heat: Power,
}

/// The loss of a worm mesh, where its speed and power are known.
///
/// # Errors
/// The input that is missing, with why.
pub(super) fn lost<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &WormMesh,
) -> Result<Lost, (&'static str, Wanted<'static>)> {
    let distance = cx.maybe(part, DISTANCE, mesh.centre_distance.as_ref());
    let speed = cx.maybe(part, SPEED, mesh.worm_speed.as_ref());
    let speed = speed.ok_or(("the speed of the worm is not stated", SPEED))?;
    let unsized_worm = (
        "neither worm diameter nor centre distance is stated",
        DISTANCE,
    );
    let diameter = diameter(cx, part, mesh, distance).ok_or(unsized_worm)?;
    let gamma = lead(cx, part, mesh, (distance, diameter));
    let v = sliding(cx, (diameter, speed, gamma));
    let v = v.ok_or(("the worm stands still or has no size", SPEED))?;
    let efficiency = efficient(cx, (v, gamma));
    let efficiency = efficiency.map_err(|_| ("friction locks the mesh", LEAD_ANGLE))?;
    let heat = into_heat(cx, part, mesh, efficiency);
    let (power, lost) = heat.ok_or(("the power is not stated", POWER))?;
    Ok(Lost {
        power,
        efficiency,
        heat: lost.value,
    })
}
