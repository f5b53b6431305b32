//! Gear mesh: the pitch-line rule as the floor; the film at the pitch point worked out wherever
//! geometry and load allow, a demand only where a film ratio is asked for.

use super::context::Context;
use super::film::{FilmContact, FilmDemand};
use super::inputs::wanted;
use super::{Demand, End, For, Limit, Standing};
use crate::model::part::{GearMesh, GearType, Part};
use crate::model::rulebook::Confidence;
use crate::model::site::HouseLimit;
use crate::quantity::convert::surface_speed;
use crate::quantity::{AngularVelocity, Length, Measure, Ratio, Velocity};
use crate::relation::gear::pitch_point::{PITCH_DIAMETER, PITCH_SPEED, pitch_diameter};
use crate::relation::gear::viscosity_rule::{
    AT_40, FLOOR, RUNNING, at_40, beyond_range, floor, running,
};
use crate::source::place::Whose;
use crate::trace::{Known, Recorder};

/// Id of the rule.
pub const PITCH_LINE_RULE: &str = "gear-pitch-line";
/// The component of practice whose window a hypoid mesh takes beside it.
pub const HYPOID: &str = "gear_hypoid_axle";

/// Adds the demands of a gear mesh.
pub fn add<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, mesh: &GearMesh) {
    match pitch_line_speed(cx, part, mesh) {
        Some(v) => rule(cx, part, v),
        None => {
            let how = "pinion speed, centre distance and ratio from the nameplate";
            let wanted = wanted("pitch-line speed", "v", "pitch-line speed", how);
            let ask = mesh
                .pitch_line_speed
                .as_ref()
                .and_then(|s| s.ask().map(str::to_owned));
            cx.missing(part, wanted, ask);
            cx.undecided(part, End::HotFloor, "pitch-line speed is not known");
        }
    }
    if mesh.kind == Some(GearType::Hypoid) {
        hypoid(cx, part);
        return;
    }
    super::gear_film::add(cx, part, mesh);
}

/// A hypoid mesh slides along its teeth: the film of a cylindrical mesh says nothing, the window
/// of hypoid axles stands beside the pitch-line rule, and its cold limit starves the pinion
/// bearings.
fn hypoid<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part) {
    let says = "hypoid: sliding along the teeth rules; the film of a cylindrical mesh says \
                nothing here, the EP level of the oil decides";
    cx.inform(part, says, None);
    super::component::by_id(cx, part, HYPOID);
}

/// Stated, or from pinion speed and pitch diameter.
fn pitch_line_speed<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
) -> Option<Known<Velocity>> {
    let stated = wanted(
        "pitch-line speed",
        "v",
        "pitch-line speed",
        "nameplate or drawing",
    );
    if let Some(v) = cx.maybe(part, stated, mesh.pitch_line_speed.as_ref()) {
        return Some(v);
    }
    let n = pinion_speed(cx, part, mesh)?;
    let d = pinion_diameter(cx, part, mesh)?;
    Some(cx.r.law(
        "v",
        "pitch-line speed",
        &PITCH_SPEED,
        (("n1", n), ("d1", d)),
        |(n, d)| surface_speed(n, d),
    ))
}

/// Pinion speed, where stated.
pub(super) fn pinion_speed<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
) -> Option<Known<AngularVelocity>> {
    let key = wanted("pinion speed", "n1", "pinion speed", "nameplate");
    cx.maybe(part, key, mesh.pinion_speed.as_ref())
}

/// Ratio, stated or from the teeth.
pub(super) fn ratio<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
) -> Option<Known<Ratio>> {
    let key = wanted("ratio", "u", "ratio", "nameplate or count of teeth");
    if let Some(u) = cx.maybe(part, key, mesh.ratio.as_ref()) {
        return Some(u);
    }
    let teeth = mesh.teeth.as_ref()?;
    let given = teeth
        .clone()
        .map(|(z1, z2)| crate::quantity::convert::number(f64::from(z2) / f64::from(z1.max(1))));
    Some(cx.r.given("u", "ratio, from the teeth", &given))
}

/// Pitch diameter of the pinion: from centre distance and ratio, or from module and teeth.
pub(super) fn pinion_diameter<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
) -> Option<Known<Length>> {
    let key = wanted(
        "centre distance",
        "a",
        "centre distance",
        "drawing or a rule",
    );
    if let (Some(a), Some(u)) = (
        cx.maybe(part, key, mesh.centre_distance.as_ref()),
        ratio(cx, part, mesh),
    ) {
        return cx
            .r
            .attempt(
                "d1",
                "pitch diameter of the pinion",
                &PITCH_DIAMETER,
                (("a", a), ("u", u)),
                |(a, u)| pitch_diameter(a, u),
            )
            .ok();
    }
    super::gear_film::reference_diameter(cx, part, mesh)
}

/// The floor by pitch-line speed, with the published figure at 40 °C beside it.
pub(super) fn rule<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, v: Known<Velocity>) {
    let reference = cx.r.attempt(
        "nu_ref",
        "reference viscosity at running temperature",
        &RUNNING,
        (("v", v),),
        |(v,)| running(v),
    );
    let Ok(reference) = reference else {
        cx.undecided(part, End::HotFloor, "the mesh stands still");
        return;
    };
    if beyond_range(v.value) {
        cx.r.note(|| "outside 0.5 to 50 m/s, where the rule is usually used".to_owned());
    }
    if let Ok(nu40) = cx.r.attempt(
        "nu40",
        "published rule, viscosity at 40 degC",
        &AT_40,
        (("v", v),),
        |(v,)| at_40(v),
    ) {
        let says = "published pitch-line rule, for a VI near 95 and a sump near 60 degC";
        cx.inform(part, says, Some((nu40.value.amount(), nu40.step)));
    }
    let house = cx.house_rule(part, PITCH_LINE_RULE);
    let (limit, rule_name, source, whose, says) = match &house {
        Some((number, rule)) if matches!(rule.limit, HouseLimit::ShareOfReference(_)) => {
            let HouseLimit::ShareOfReference(share) = rule.limit else {
                return;
            };
            let nu = crate::quantity::KinematicViscosity::from_base(
                reference.value.base() * share.base(),
            );
            let known = cx.rule_value("nu_min", "floor of the house rule", nu, &rule.name);
            (
                known,
                format!("H-{number} {}", rule.name),
                rule.source
                    .clone()
                    .unwrap_or_else(|| "house rule".to_owned()),
                Whose::House,
                format!(
                    "{} times the reference viscosity of the pitch-line speed",
                    share.base()
                ),
            )
        }
        _ => {
            let known = cx.r.law(
                "nu_min",
                "least viscosity at running temperature",
                &FLOOR,
                (("nu", reference),),
                |(nu,)| floor(nu),
            );
            (
                known,
                PITCH_LINE_RULE.to_owned(),
                "pitch-line rule of gear handbooks, restated at running temperature".to_owned(),
                Whose::Standard,
                "0.7 times the reference viscosity of the pitch-line speed".to_owned(),
            )
        }
    };
    let at = cx.hot_at(part);
    cx.push(Demand {
        end: End::HotFloor,
        limit: Limit::Kinematic(limit.value),
        limit_step: Some(limit.step),
        rule: rule_name,
        says,
        source,
        whose,
        confidence: Confidence::Medium,
        only: For::All,
        standing: Standing::Judges,
        ..cx.blank(part, at)
    });
}

/// A film demand at the pitch point.
pub(super) fn film_limit(contact: FilmContact, wanted: Length) -> Limit {
    Limit::Film(Box::new(FilmDemand { contact, wanted }))
}
