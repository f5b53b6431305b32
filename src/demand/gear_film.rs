//! Film at the pitch point of a gear mesh: information, and a demand where a film ratio is asked
//! for by the maker, the house or a micropitting result.

mod pitch_point;
mod tooth;

use super::context::{Context, HotAt};
use super::film::FilmContact;
use super::gear_mesh::film_limit;
use super::inputs::wanted;
use super::{Demand, End};
use crate::model::part::{GearMesh, Part};
use crate::model::rulebook::Confidence;
use crate::model::site::HouseLimit;
use crate::quantity::convert::number;
use crate::quantity::{KinematicViscosity, Length, Measure, Ratio, ThermodynamicTemperature};
use crate::relation::film::line;
use crate::relation::film::{inverse, roughness};
use crate::relation::gear::film as tooth_film;
use crate::relation::oil::pressure_viscosity::{Family, agma_925};
use crate::source::place::Whose;
use crate::trace::Recorder;
pub(super) use pitch_point::{Pair, helix, pressure_angle, reference_diameter, steel, torque};
use pitch_point::{PitchPoint, pitch_point};
use tooth::REFERENCE_DENSITY;

/// Id of the rule.
pub const FILM_RULE: &str = "gear-film";

/// Adds the film of a mesh: information always, a demand where a ratio is asked for.
pub fn add<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, mesh: &GearMesh) {
    let asked = asked(cx, part, mesh);
    let Some(point) = pitch_point(cx, part, mesh) else {
        if asked.is_some() {
            lacks(cx, part, mesh);
            cx.undecided(
                part,
                End::HotFloor,
                "film at the pitch point: geometry or load is missing",
            );
        }
        return;
    };
    let at = tooth::temperature(cx, part, mesh, &point);
    for target in [0.7, 1.0] {
        inform(cx, part, &point, target, at);
    }
    if let Some((target, whose, rule, source)) = asked {
        let wanted = Length::from_base(point.ra.value.base() * target.base());
        cx.push(Demand {
            end: End::HotFloor,
            limit: film_limit(FilmContact::Tooth(point.contact), wanted),
            limit_step: None,
            rule,
            says: format!(
                "film ratio >= {} at the pitch point, h over mean Ra",
                target.base()
            ),
            source,
            whose,
            confidence: Confidence::Medium,
            ..cx.blank(part, at)
        });
    }
}

/// Notes what of the nameplate a film asked for still needs.
fn lacks<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, mesh: &GearMesh) {
    let nameplate = "nameplate, or drawing";
    let teeth = mesh.teeth.is_some();
    let distance = cx.has(mesh.centre_distance.as_ref());
    let sized = distance || (teeth && cx.has(mesh.normal_module.as_ref()));
    let load = cx.has(mesh.power.as_ref()) || cx.has(mesh.pinion_torque.as_ref());
    let known = [
        (teeth || cx.has(mesh.ratio.as_ref()), "ratio", "u"),
        (sized, "centre distance", "a"),
        (cx.has(mesh.face_width.as_ref()), "face width", "b"),
        (cx.has(mesh.pinion_speed.as_ref()), "pinion speed", "n1"),
        (load, "power", "P"),
    ];
    for (_, key, symbol) in known.into_iter().filter(|(known, ..)| !known) {
        cx.missing(part, wanted(key, symbol, key, nameplate), None);
    }
}

/// The film ratio asked for: on the part, or by a house rule.
fn asked<R: Recorder>(
    cx: &Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
) -> Option<(Ratio, Whose, String, String)> {
    if let Some(given) = &mesh.film_ratio {
        let source = given
            .origin
            .note
            .clone()
            .unwrap_or_else(|| given.origin.whose.to_string());
        return Some((
            given.value,
            given.origin.whose,
            FILM_RULE.to_owned(),
            source,
        ));
    }
    let named = part.rule.as_ref()?;
    cx.house
        .rules
        .iter()
        .enumerate()
        .find_map(|(i, rule)| match rule.limit {
            HouseLimit::FilmRatio(ratio) if rule.name == named.value => Some((
                number(ratio),
                Whose::House,
                format!("H-{} {}", i + 1, rule.name),
                rule.source
                    .clone()
                    .unwrap_or_else(|| "house rule".to_owned()),
            )),
            _ => None,
        })
}

/// Viscosity that a film ratio would need of a mineral oil, both forms.
fn inform<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    point: &PitchPoint,
    target: f64,
    at: HotAt,
) {
    let Some(t) = at.hottest else { return };
    let sigma = roughness::composite(point.rq.value, point.rq.value).unwrap_or(point.rq.value);
    let iso = Length::from_base(point.ra.value.base() * target);
    let agma = Length::from_base(sigma.base() * target);
    let solve = |wanted: Length, central: bool| {
        inverse::viscosity(wanted, None, |eta| {
            let alpha = agma_925(Family::Mineral, eta).map_err(|_| {
                crate::relation::outside::Outside::NoAnswer {
                    what: "alpha",
                    why: "no model",
                }
            })?;
            let groups = tooth_film::groups(eta, alpha, point.contact)?;
            Ok(if central {
                line::central_dowson_toyoda(groups, point.contact.rho_n)
            } else {
                tooth_film::minimum(groups, point.contact.rho_n, number(1.0))
            })
        })
        .ok()
    };
    let law = &inverse::VISCOSITY;
    for (wanted, central, form) in [
        (iso, false, "ISO/TS 6336-22 form, h over mean Ra"),
        (agma, true, "AGMA 925 form, central film over composite Rq"),
    ] {
        let Some(eta) = solve(wanted, central) else {
            continue;
        };
        let rho = REFERENCE_DENSITY;
        let nu = KinematicViscosity::from_base(eta.base() / rho);
        let step = cx.r.law(
            "nu",
            "viscosity a film ratio would need, mineral oil",
            law,
            (("rho_n", point.rho), ("Rq", point.rq), ("t", t)),
            |_: (Length, Length, ThermodynamicTemperature)| nu,
        );
        cx.r.note(|| format!("lambda {target}, {form}; density 860 kg/m3 at running temperature"));
        cx.inform(
            part,
            format!("viscosity that film ratio {target} would need ({form}, mineral oil)"),
            Some((nu.amount(), step.step)),
        );
    }
}
