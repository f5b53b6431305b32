//! A component with a practice window: floor, running ceiling, start ceiling as it gives them.

use super::context::{Context, forty};
use super::{AtAmbient, Demand, End, Limit, Standing};
use crate::model::part::{Component, Part, PartKind};
use crate::model::rulebook::component::{Component as Window, WindowLimit};
use crate::model::{Lubrication, ViscosityLimit};
use crate::quantity::Measure;
use crate::source::place::Whose;
use crate::trace::{Recorder, StepId};

/// Adds the demands of a component.
pub fn add<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, component: &Component) {
    let Some(window) = cx.rules.components.get(&component.id).cloned() else {
        cx.undecided(part, End::HotFloor, "no such component in the rules");
        return;
    };
    window_demands(cx, part, &window);
    if let Some(base) = window.base_oil {
        grease_window(cx, part, &window, (base.lo, base.hi));
    }
    super::open_gear::grades(cx, part, &window.id);
    needs_a_part(cx, part, &window);
    typical(cx, part, &window);
    if let Some(prefer) = window.prefer {
        let ends = [prefer.lo, prefer.hi].map(shown);
        cx.inform(
            part,
            format!("preferred {} to {} while running", ends[0], ends[1]),
            None,
        );
    }
    if let Some(way) = &window.choose_by {
        cx.inform(part, format!("chosen by: {way}"), None);
    }
    super::feed::add(cx, part, component, &window);
}

/// A window that hangs on figures only a part of its kind carries says so, where no such part
/// stands beside it: without them it would limit nothing in silence.
fn needs_a_part<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, window: &Window) {
    let meshes = |p: &Part| matches!(p.kind, PartKind::GearMesh(_));
    let by_speed = matches!(window.min, Some(WindowLimit::TimesReference { .. }));
    if by_speed && !cx.point.parts.iter().any(meshes) {
        let because = "its window follows the pitch-line speed: describe it as `gear mesh` with \
                       `pitch-line speed`";
        cx.undecided(part, End::HotFloor, because);
    }
    let says_nothing =
        window.min.is_none() && window.base_oil.is_none() && window.typical_vg.is_empty();
    let only_ratio = says_nothing && window.formula.as_deref() == Some("bearing-kappa");
    if only_ratio && !ratio_is_known(cx) {
        let because = "it is judged by its viscosity ratio: describe it as `rolling bearing` with \
                       sizes and speed";
        cx.undecided(part, End::HotFloor, because);
    }
}

/// Usual grades, printed.
fn typical<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, window: &Window) {
    let numbers: Vec<String> = window.typical_vg.iter().map(u32::to_string).collect();
    if !numbers.is_empty() {
        let says = format!("usual grades: ISO VG {}", numbers.join(", "));
        cx.inform(part, says, None);
    }
    if !window.typical.is_empty() {
        let says = format!("usual grades: {}", window.typical.join(", "));
        cx.inform(part, says, None);
    }
    if let Some(least) = window.short_term_min {
        let says =
            "least for minutes only, at low pressure and limited speed, by leave of the maker";
        let known = cx.rule_value("nu_short", "least for minutes", least, &window.id);
        cx.inform(part, says, Some((least.amount(), known.step)));
    }
    if let Some(most) = window.short_term_start {
        let says = "greatest at start for minutes only, by leave of the maker";
        let known = cx.rule_value(
            "nu_short",
            "greatest at start for minutes",
            most,
            &window.id,
        );
        cx.inform(part, says, Some((most.amount(), known.step)));
    }
}

fn shown(limit: WindowLimit) -> String {
    use crate::quantity::show::{Toward, Units, quantity};
    match limit {
        WindowLimit::Fixed(ViscosityLimit::Kinematic(nu)) => {
            quantity(nu.amount(), Units::Si, Toward::Nearest)
        }
        WindowLimit::Fixed(ViscosityLimit::Dynamic(eta)) => {
            quantity(eta.amount(), Units::Si, Toward::Nearest)
        }
        WindowLimit::TimesReference { factor, .. } => {
            format!("{} times the pitch-line reference", factor.base())
        }
    }
}

/// Whether a worked-out viscosity ratio stands beside a window that only restates it.
fn ratio_is_known<R: Recorder>(cx: &Context<'_, '_, R>) -> bool {
    cx.point.parts.iter().any(|p| match &p.kind {
        PartKind::RollingBearing(b) => {
            cx.has(b.bore.as_ref()) && cx.has(b.outside.as_ref()) && cx.has(b.speed.as_ref())
        }
        _ => false,
    })
}

/// The window of one component, for a part that is of its kind.
pub(super) fn by_id<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, id: &str) {
    if let Some(window) = cx.rules.components.get(id).cloned() {
        window_demands(cx, part, &window);
    }
}

/// Adds the limits of a window: floor, running ceiling, start ceiling.
pub(super) fn window_demands<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    window: &Window,
) {
    let informs = window.restates && ratio_is_known(cx);
    let hot = cx.hot_at(part);
    let start = (cx.thermal.start, cx.thermal.start_coldest.map(|k| k.step));
    if let Some(WindowLimit::Fixed(limit)) = window.min {
        let standing = if informs {
            Standing::Information
        } else {
            Standing::Judges
        };
        let place = (hot.at, hot.hottest.map(|k| k.step));
        push(
            cx,
            part,
            window,
            End::HotFloor,
            limit,
            place,
            standing,
            "least while running",
        );
    }
    if let Some(WindowLimit::Fixed(limit)) = window.max_run {
        let standing = if window.max_run_is_note {
            Standing::Information
        } else {
            Standing::Judges
        };
        let place = (hot.at, hot.coldest.map(|k| k.step));
        push(
            cx,
            part,
            window,
            End::RunningCeiling,
            limit,
            place,
            standing,
            "greatest at full speed",
        );
    }
    let fed = matches!(
        cx.lubrication(),
        Some(Lubrication::Circulated | Lubrication::PressureFed)
    );
    let at_start = if fed {
        window.max_start_pump_fed.or(window.max_start)
    } else {
        window.max_start
    };
    if let Some(WindowLimit::Fixed(limit)) = at_start {
        push(
            cx,
            part,
            window,
            End::StartCeiling,
            limit,
            start,
            Standing::Judges,
            "greatest at start",
        );
    }
}

#[expect(clippy::too_many_arguments, reason = "one row of a window")]
fn push<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    window: &Window,
    end: End,
    limit: ViscosityLimit,
    (at, step): (Option<AtAmbient>, Option<StepId>),
    standing: Standing,
    says: &str,
) {
    let (boxed, limit_step) = match limit {
        ViscosityLimit::Kinematic(nu) => (
            Limit::Kinematic(nu),
            cx.rule_value("nu_lim", "limit of the practice window", nu, &window.id)
                .step,
        ),
        ViscosityLimit::Dynamic(eta) => (
            Limit::Dynamic(eta),
            cx.rule_value("eta_lim", "limit of the practice window", eta, &window.id)
                .step,
        ),
    };
    cx.push(Demand {
        end,
        limit: boxed,
        limit_step: Some(limit_step),
        rule: window.id.clone(),
        says: format!("{}: {says}", window.name),
        source: window.provenance.cited(),
        whose: Whose::Standard,
        confidence: window.provenance.confidence,
        standing,
        from_window: true,
        ..cx.blank_at(Some(part.label.clone()), at, step)
    });
}

/// A grease for this component has its base oil within these at 40 °C.
fn grease_window<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    window: &Window,
    (lo, hi): (
        crate::quantity::KinematicViscosity,
        crate::quantity::KinematicViscosity,
    ),
) {
    let place = (Some(forty()), None);
    let says = [
        (End::HotFloor, lo, "base oil at 40 degC, least"),
        (End::RunningCeiling, hi, "base oil at 40 degC, greatest"),
    ];
    for (end, nu, says) in says {
        let limit = ViscosityLimit::Kinematic(nu);
        push(cx, part, window, end, limit, place, Standing::Judges, says);
    }
}
