//! Engines and axles: from the coldest start to the W grade, from the hot grade or the duty to
//! the viscosity at 100 °C and under high shear. Limits are those of SAE J300 and SAE J306.

use super::context::Context;
use super::inputs::Wanted;
use super::tested::{GradeTest, TestedLimit};
use super::{AtAmbient, Demand, End, Limit};
use crate::model::part::{Drive, Part};
use crate::model::rulebook::Confidence;
use crate::quantity::convert::{celsius, to_celsius};
use crate::quantity::{DynamicViscosity, KinematicViscosity, Measure};
use crate::relation::oil::{sae_engine, sae_gear};
use crate::source::place::{Given, Whose};
use crate::trace::{Recorder, StepId};

/// Id of the engine rules.
pub const ENGINE_RULE: &str = "sae-engine-grade";
/// Id of the axle rules.
pub const AXLE_RULE: &str = "sae-gear-grade";
/// Component of practice that holds the least high-shear viscosity by duty.
const ENGINE: &str = "engine_oil";

/// Whose word a limit is and how sure it is.
struct Word {
    whose: Whose,
    confidence: Confidence,
    source: &'static str,
}

const BY_DUTY: Word = Word {
    whose: Whose::Standard,
    confidence: Confidence::Medium,
    source: "SAE J300; duties by common practice",
};

fn word_of(given: &Given<String>, source: &'static str) -> Word {
    Word {
        whose: given.origin.whose,
        confidence: Confidence::High,
        source,
    }
}

/// The hot half of a grade: `40` of `SAE 15W-40`.
fn hot_part(text: &str) -> &str {
    let plain = text.trim().trim_start_matches("SAE").trim();
    plain.rsplit('-').next().unwrap_or(plain).trim()
}

/// The winter half: `15W` of `SAE 15W-40`.
fn winter_part(text: &str) -> Option<&str> {
    let plain = text.trim().trim_start_matches("SAE").trim();
    plain.split('-').map(str::trim).find(|p| p.ends_with('W'))
}

/// Adds the demands of an engine.
pub fn engine<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, drive: &Drive) {
    let winter = crank(cx, part);
    let duty = duty(cx, part, drive);
    let least = drive.hths_at_least.as_ref().map(|h| h.value).or(duty);
    let asked = drive.hot_grade.as_ref();
    let found = asked.and_then(|g| {
        sae_engine::HOT
            .iter()
            .find(|h| h.name == hot_part(&g.value))
    });
    if let (Some(given), None) = (asked, found) {
        let because = format!("hot grade {} is no grade of SAE J300", given.value);
        cx.undecided(part, End::HotFloor, &because);
    }
    let own = asked
        .and_then(|g| winter_part(&g.value))
        .and_then(|name| sae_engine::WINTER.iter().find(|w| w.name == name));
    if let Some(w) = own {
        let cranks = w.cranking();
        let at = AtAmbient::held(cranks.at.base());
        let says = format!(
            "cranking viscosity of SAE {} at its own temperature",
            w.name
        );
        let words = (ENGINE_RULE, says, "SAE J300");
        tested(
            cx,
            part,
            GradeTest::Cranking,
            cranks.eta,
            (Some(at), None),
            words,
        );
    }
    let word = asked.map_or(BY_DUTY, |g| word_of(g, "SAE J300"));
    let by_duty = least.and_then(|eta| {
        let enough = |h: &&sae_engine::HotGrade| h.hths_least(winter).base() >= eta.base() - 1e-9;
        sae_engine::HOT.iter().find(enough)
    });
    let Some(grade) = found.or(by_duty) else {
        if asked.is_none() {
            no_grade(cx, part);
        }
        return;
    };
    let nu = grade.nu100_least();
    let says = format!("SAE {} at 100 degC, at least", grade.name);
    at_100(cx, part, End::HotFloor, nu, (ENGINE_RULE, says, &word));
    if found.is_some() {
        let says = format!("SAE {} at 100 degC, at most", grade.name);
        let nu = grade.nu100_below();
        at_100(
            cx,
            part,
            End::RunningCeiling,
            nu,
            (ENGINE_RULE, says, &word),
        );
    }
    high_shear(
        cx,
        part,
        drive,
        least.unwrap_or_else(|| grade.hths_least(winter)),
    );
}

fn no_grade<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part) {
    let wanted = Wanted {
        key: "hot grade",
        about: None,
        symbol: "",
        says: "SAE grade at running temperature",
        how: "engine maker's manual",
    };
    cx.missing(part, wanted, None);
    let because = "neither hot grade nor duty is known: state `hot grade` or `duty`";
    cx.undecided(part, End::HotFloor, because);
}

/// The least high-shear viscosity of a duty.
fn duty<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    drive: &Drive,
) -> Option<DynamicViscosity> {
    let given = drive.duty.as_ref()?;
    let folded = |text: &str| text.trim().to_lowercase().replace(['-', '_'], " ");
    let known = cx
        .rules
        .components
        .get(ENGINE)
        .map(|c| c.high_shear.clone());
    let known = known.unwrap_or_default();
    let found = known
        .iter()
        .find(|(d, _)| folded(d) == folded(&given.value));
    if found.is_none() {
        let words: Vec<&str> = known.iter().map(|(d, _)| d.as_str()).collect();
        let because = format!("duty {} is none of: {}", given.value, words.join(", "));
        cx.undecided(part, End::HotFloor, &because);
    }
    found.map(|(_, eta)| *eta)
}

/// Cranking and pumping at the coldest start, by the warmest W grade that serves it.
fn crank<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
) -> Option<&'static sae_engine::WinterGrade> {
    let Some(start) = cx.thermal.start_coldest else {
        let because = "cranking: the temperature of the coldest start is not known";
        cx.undecided(part, End::StartCeiling, because);
        return None;
    };
    let serves = |w: &&sae_engine::WinterGrade| w.cranking().at.base() <= start.value.base() + 1e-9;
    let Some(winter) = sae_engine::WINTER.iter().rev().find(serves) else {
        let because = "cranking: colder than SAE 0W is made for; heat the engine";
        cx.undecided(part, End::StartCeiling, because);
        return None;
    };
    let (cranks, pumps) = (winter.cranking(), winter.pumping());
    cx.inform(
        part,
        format!(
            "W grade for this start: {} or colder (cranked at {:.0} degC, pumped at {:.0} degC)",
            winter.name,
            to_celsius(cranks.at),
            to_celsius(pumps.at)
        ),
        Some((start.value.amount(), start.step)),
    );
    let says = format!("cranking viscosity of SAE {}", winter.name);
    cold(
        cx,
        part,
        GradeTest::Cranking,
        cranks.eta,
        (ENGINE_RULE, says, "SAE J300"),
    );
    let says = "pumping viscosity of every W grade".to_owned();
    cold(
        cx,
        part,
        GradeTest::Pumping,
        pumps.eta,
        (ENGINE_RULE, says, "SAE J300"),
    );
    Some(winter)
}

/// Adds the demands of an axle.
pub fn axle<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, drive: &Drive) {
    let limit = DynamicViscosity::from_base(150.0);
    let says = "150 000 mPa.s, at most".to_owned();
    cold(
        cx,
        part,
        GradeTest::Axle,
        limit,
        (AXLE_RULE, says, "SAE J306"),
    );
    if let Some(start) = cx.thermal.start_coldest {
        let serves =
            |w: &&sae_gear::WinterGrade| w.t150000_most().base() <= start.value.base() + 1e-9;
        let says = match sae_gear::WINTER.iter().rev().find(serves) {
            Some(w) => format!("W grade for this start: {} or colder", w.name),
            None => "colder than SAE 70W is made for: warm the axle".to_owned(),
        };
        cx.inform(part, says, Some((start.value.amount(), start.step)));
    } else {
        let because = "cold end: the temperature of the coldest start is not known";
        cx.undecided(part, End::StartCeiling, because);
    }
    let Some(given) = &drive.hot_grade else {
        super::component::by_id(cx, part, super::gear_mesh::HYPOID);
        return;
    };
    let Some(grade) = sae_gear::HOT
        .iter()
        .find(|h| h.name == hot_part(&given.value))
    else {
        let because = format!("hot grade {} is no grade of SAE J306", given.value);
        cx.undecided(part, End::HotFloor, &because);
        return;
    };
    let word = word_of(given, "SAE J306");
    let says = format!("SAE {} at 100 degC, at least, new and sheared", grade.name);
    at_100(
        cx,
        part,
        End::HotFloor,
        grade.nu100_least(),
        (AXLE_RULE, says, &word),
    );
    if let Some(most) = grade.nu100_below() {
        let says = format!("SAE {} at 100 degC, at most", grade.name);
        at_100(
            cx,
            part,
            End::RunningCeiling,
            most,
            (AXLE_RULE, says, &word),
        );
    }
    if let Some(w) =
        winter_part(&given.value).and_then(|name| sae_gear::WINTER.iter().find(|w| w.name == name))
    {
        let at = AtAmbient::held(w.t150000_most().base());
        let says = format!("150 000 mPa.s at the temperature of SAE {}", w.name);
        let place = (Some(at), None);
        tested(
            cx,
            part,
            GradeTest::Axle,
            limit,
            place,
            (AXLE_RULE, says, "SAE J306"),
        );
    }
}

/// A kinematic limit at 100 °C.
fn at_100<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    end: End,
    nu: KinematicViscosity,
    (rule, says, word): (&str, String, &Word),
) {
    let known = cx.rule_value("nu_100", "limit of the grade at 100 degC", nu, rule);
    cx.push(Demand {
        end,
        limit: Limit::Kinematic(nu),
        limit_step: Some(known.step),
        rule: rule.to_owned(),
        says,
        source: word.source.to_owned(),
        whose: word.whose,
        confidence: word.confidence,
        ..cx.blank_at(
            Some(part.label.clone()),
            Some(AtAmbient::held(celsius(100.0).base())),
            None,
        )
    });
}

fn high_shear<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    drive: &Drive,
    least: DynamicViscosity,
) {
    let known = match &drive.hths_at_least {
        Some(given) => cx.r.given("eta_hs", "least viscosity at high shear", given),
        None => cx.rule_value(
            "eta_hs",
            "least viscosity at high shear",
            least,
            ENGINE_RULE,
        ),
    };
    let (whose, confidence) = match &drive.hths_at_least {
        Some(given) => (given.origin.whose, Confidence::High),
        None => (Whose::Standard, Confidence::Medium),
    };
    cx.push(Demand {
        end: End::HotFloor,
        limit: Limit::Tested(TestedLimit {
            test: GradeTest::HighShear,
            eta: least,
        }),
        limit_step: Some(known.step),
        rule: ENGINE_RULE.to_owned(),
        says: "viscosity at 150 degC under high shear, at least".to_owned(),
        source: "SAE J300; duties by common practice".to_owned(),
        whose,
        confidence,
        ..cx.blank_at(
            Some(part.label.clone()),
            Some(AtAmbient::held(celsius(150.0).base())),
            None,
        )
    });
}

/// A cold limit at the temperature of the coldest start.
fn cold<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    test: GradeTest,
    most: DynamicViscosity,
    words: (&str, String, &str),
) {
    let place = (cx.thermal.start, cx.thermal.start_coldest.map(|k| k.step));
    tested(cx, part, test, most, place, words);
}

fn tested<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    test: GradeTest,
    most: DynamicViscosity,
    (at, step): (Option<AtAmbient>, Option<StepId>),
    (rule, says, source): (&str, String, &str),
) {
    let known = cx.rule_value("eta_lim", "greatest viscosity cold", most, rule);
    cx.push(Demand {
        end: End::StartCeiling,
        limit: Limit::Tested(TestedLimit { test, eta: most }),
        limit_step: Some(known.step),
        rule: rule.to_owned(),
        says,
        source: source.to_owned(),
        whose: Whose::Standard,
        confidence: Confidence::High,
        ..cx.blank_at(Some(part.label.clone()), at, step)
    });
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn grades_come_apart() {
        assert_eq!(hot_part("SAE 15W-40"), "40");
        assert_eq!(hot_part("90"), "90");
        assert_eq!(winter_part("80W-90"), Some("80W"));
        assert_eq!(winter_part("40"), None);
    }
}
