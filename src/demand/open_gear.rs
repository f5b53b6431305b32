//! Open gear: the film at the pitch point as for any mesh, and the grades of practice by the way
//! the lubricant is applied; a sprayed one must still spray at the coldest ambient.

use super::context::{Context, forty};
use super::{AtAmbient, Demand, End, Limit, Standing};
use crate::model::ViscosityLimit;
use crate::model::part::{OpenGear, OpenGearApplication, Part};
use crate::model::rulebook::Confidence;
use crate::quantity::convert::{celsius, mm2_s};
use crate::quantity::{KinematicViscosity, Measure};
use crate::relation::gear::grade_table::AGMA_OPEN;
use crate::relation::oil::grade::IsoGrade;
use crate::source::place::Whose;
use crate::trace::Recorder;

/// The component of practice for a dipping gear.
pub const BATH: &str = "gear_open_bath";
/// The component of practice for a sprayed or brushed gear.
pub const INTERMITTENT: &str = "gear_open_intermittent";
/// The start limit of a spray.
pub const SPRAY: &str = "start-spray";

/// Adds the demands of an open gear.
pub fn add<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, gear: &OpenGear) {
    super::gear_film::add(cx, part, &gear.mesh);
    match gear.application {
        Some(OpenGearApplication::Bath) => dipping(cx, part),
        Some(OpenGearApplication::Spray) => {
            intermittent(cx, part);
            spray(cx, part);
        }
        Some(OpenGearApplication::Brush) => intermittent(cx, part),
        None => {
            cx.fact_missing(part, "application", "look: bath, spray or brush");
            let because = "whether the gear dips, is sprayed or is brushed is not known";
            cx.undecided(part, End::HotFloor, because);
        }
    }
}

/// The grades of a component that has no window: its thinnest grade is the floor.
pub fn grades<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, id: &str) {
    match id {
        BATH => dipping(cx, part),
        INTERMITTENT => intermittent(cx, part),
        _ => {}
    }
}

fn dipping<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part) {
    let Some(rule) = cx.rules.components.get(BATH) else {
        return;
    };
    let Some(thinnest) = rule.typical_vg.iter().min().copied() else {
        return;
    };
    let Some(grade) = IsoGrade::of_number(thinnest) else {
        return;
    };
    let says = format!("thinnest usual grade of a dipping open gear, ISO VG {thinnest}");
    floor(cx, part, BATH, grade.least(), forty(), says);
}

fn intermittent<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part) {
    let Some((number, least, _)) = AGMA_OPEN.first() else {
        return;
    };
    let at_100 = AtAmbient::held(celsius(100.0).base());
    let says = format!("AGMA {number} at least at 100 degC, before any diluent");
    floor(cx, part, INTERMITTENT, mm2_s(*least), at_100, says);
    for (number, from, to) in AGMA_OPEN {
        let says = format!("AGMA {number}: {from} to {to} mm2/s at 100 degC before any diluent");
        cx.inform(part, says, None);
    }
}

/// A grade as a floor: a habit of practice, so it never fails an oil alone.
fn floor<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    id: &str,
    least: KinematicViscosity,
    at: AtAmbient,
    says: String,
) {
    let known = cx.rule_value("nu_min", "thinnest usual grade", least, id);
    let source = cx
        .rules
        .components
        .get(id)
        .map_or_else(String::new, |c| c.provenance.cited());
    cx.push(Demand {
        end: End::HotFloor,
        limit: Limit::Kinematic(least),
        limit_step: Some(known.step),
        rule: id.to_owned(),
        says,
        source,
        whose: Whose::Standard,
        confidence: Confidence::Low,
        from_window: true,
        ..cx.blank_at(Some(part.label.clone()), Some(at), None)
    });
}

/// What is sprayed must still spray at the coldest ambient, warm start or not.
fn spray<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part) {
    let Some(rule) = cx.rules.start_limits.get(SPRAY).cloned() else {
        return;
    };
    let Some(ViscosityLimit::Kinematic(most)) = rule.limit else {
        return;
    };
    let known = cx.rule_value("nu_spray", "thickest that sprays", most, SPRAY);
    let coldest = cx.thermal.ambient.map(|(cold, _)| cold.step);
    let at = coldest.map(|_| AtAmbient::AMBIENT);
    cx.push(Demand {
        end: End::StartCeiling,
        limit: Limit::Kinematic(most),
        limit_step: Some(known.step),
        rule: SPRAY.to_owned(),
        says: format!("{} at the coldest ambient", rule.part),
        source: rule.provenance.cited(),
        whose: Whose::Standard,
        confidence: rule.provenance.confidence,
        standing: Standing::Condition,
        ..cx.blank_at(Some(part.label.clone()), at, coldest)
    });
}
