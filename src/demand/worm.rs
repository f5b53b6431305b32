//! Worm and wheel: the practice window as the limits; sliding speed, friction, efficiency and the
//! older guides beside it.

use super::component::window_demands;
use super::context::Context;
use super::inputs::{Usual, Wanted};
use super::{End, Undecided};
use crate::model::part::{Part, WheelMaterial, WormMesh};
use crate::quantity::convert::degrees;
use crate::quantity::{Angle, AngularVelocity, Length, Measure, Ratio, Velocity};
use crate::relation::gear::worm::{
    EFFICIENCY, FRICTION, LEAD, LOSS, SLIDING, USUAL_DIAMETER, VISCOSITY_GUIDE, efficiency,
    friction, lead_angle, loss, sliding_speed, usual_diameter, viscosity_guide,
};
use crate::relation::gear::worm_grades::{D94_WORM, compounded};
use crate::trace::{Known, Recorder};

/// The component of practice whose window a worm takes.
pub const WINDOW: &str = "gear_worm";

fn wanted(
    key: &'static str,
    symbol: &'static str,
    says: &'static str,
    how: &'static str,
) -> Wanted<'static> {
    Wanted {
        key,
        about: None,
        symbol,
        says,
        how,
    }
}

/// Adds the demands of a worm mesh.
pub fn add<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, mesh: &WormMesh) {
    limits(cx, part, mesh);
    let distance = cx.maybe(
        part,
        wanted(
            "centre distance",
            "a",
            "centre distance",
            "nameplate, or a rule",
        ),
        mesh.centre_distance.as_ref(),
    );
    let speed = cx.take(
        part,
        wanted(
            "worm speed",
            "n1",
            "speed of the worm",
            "nameplate of the motor",
        ),
        mesh.worm_speed.as_ref(),
    );
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
    let key = wanted("lead angle", "gamma", "lead angle", "drawing");
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
    (diameter, speed, gamma): (Known<Length>, Known<AngularVelocity>, Known<Angle>),
) {
    let v = cx.r.attempt(
        "v_g",
        "sliding speed",
        &SLIDING,
        (("d1", diameter), ("n1", speed), ("gamma", gamma)),
        |(d, n, g)| sliding_speed(d, n, g),
    );
    let Ok(v) = v else {
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
    losses(cx, part, mesh, (v, gamma));
}

/// Efficiency of the mesh, and the power it turns into heat where the power is known.
fn losses<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &WormMesh,
    (v, gamma): (Known<Velocity>, Known<Angle>),
) {
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
    let Ok(eta) = eta else {
        let says = "friction locks the mesh with this lead angle: no efficiency can be given";
        cx.inform(part, says, Some((mu.value.amount(), mu.step)));
        return;
    };
    let says = "efficiency of the mesh, mineral oil; polyglycol runs some per cent better";
    cx.inform(part, says, Some((eta.value.amount(), eta.step)));
    let power = cx.maybe(
        part,
        wanted("power", "P", "input power", "nameplate of the motor"),
        mesh.power.as_ref(),
    );
    if let Some(p) = power {
        let lost = cx.r.law(
            "P_V",
            "power the mesh turns into heat",
            &LOSS,
            (("P", p), ("eta", eta)),
            |(p, eta)| loss(p, eta),
        );
        cx.inform(
            part,
            "power the mesh turns into heat",
            Some((lost.value.amount(), lost.step)),
        );
    }
}
