//! Demands of the point itself: limits somebody stated, the maker's grade, what the oil must
//! pass at start, the pour margin and the oil's own ceiling.

use super::context::{Context, forty};
use super::{AtAmbient, Demand, End, Limit, Standing};
use crate::model::machine::Limits;
use crate::model::part::{Part, PartKind};
use crate::model::rulebook::start::{Role, StatedBy};
use crate::model::rulebook::{Confidence, Entry};
use crate::model::{Lubrication, ViscosityLimit};
use crate::quantity::{Measure, TemperatureInterval};
use crate::relation::oil::grade::IsoGrade;
use crate::source::place::{Given, Whose};
use crate::trace::{Recorder, StepId};

/// Limits stated on the point or on one part.
pub fn stated<R: Recorder>(cx: &mut Context<'_, '_, R>, part: Option<&Part>, limits: &Limits) {
    let hot = match part {
        Some(part) => cx.hot_at(part),
        None => super::context::HotAt {
            at: cx.thermal.running,
            hottest: cx.thermal.hottest,
            coldest: cx.thermal.coldest,
        },
    };
    let start = (cx.thermal.start, cx.thermal.start_coldest.map(|k| k.step));
    let label = part.map(|p| p.label.clone());
    let ends = [
        (
            End::HotFloor,
            &limits.floor,
            hot.at,
            hot.hottest.map(|k| k.step),
            "floor",
        ),
        (
            End::RunningCeiling,
            &limits.ceiling,
            hot.at,
            hot.coldest.map(|k| k.step),
            "ceiling",
        ),
        (
            End::StartCeiling,
            &limits.start,
            start.0,
            start.1,
            "start limit",
        ),
    ];
    for (end, given, at, step, key) in ends {
        if let Some(given) = given {
            one(cx, label.clone(), end, given, (at, step), key);
        }
    }
}

fn one<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: Option<String>,
    end: End,
    given: &Given<ViscosityLimit>,
    (at, step): (Option<AtAmbient>, Option<StepId>),
    key: &'static str,
) {
    let (limit, limit_step) = match given.value {
        ViscosityLimit::Kinematic(nu) => {
            let known =
                cx.r.given("nu_lim", "limit stated", &given.clone().map(|_| nu));
            (Limit::Kinematic(nu), known.step)
        }
        ViscosityLimit::Dynamic(eta) => {
            let known =
                cx.r.given("eta_lim", "limit stated", &given.clone().map(|_| eta));
            (Limit::Dynamic(eta), known.step)
        }
    };
    let whose = given.origin.whose;
    let note = given.origin.note.clone();
    let source = match (&note, whose) {
        (Some(note), whose) => format!("{whose}, {note}"),
        (None, whose) => whose.to_string(),
    };
    let confidence = if whose == Whose::Assumed {
        Confidence::Low
    } else {
        Confidence::High
    };
    cx.push(Demand {
        end,
        limit,
        limit_step: Some(limit_step),
        rule: format!("stated-{}", key.replace(' ', "-")),
        says: stated_by(key, whose),
        source,
        whose,
        confidence,
        ..cx.blank_at(part, at, step)
    });
}

/// `the maker's start limit`, `measured floor`, `floor, nobody says whose`.
fn stated_by(key: &str, whose: Whose) -> String {
    match whose {
        Whose::Maker => format!("the maker's {key}"),
        Whose::Nameplate => format!("{key} on the nameplate"),
        Whose::NotStated => format!("{key} stated, nobody says whose"),
        other => format!("{other} {key}"),
    }
}

/// The grade the maker names: a floor at 40 °C, the grade's lower limit.
pub fn maker_grade<R: Recorder>(cx: &mut Context<'_, '_, R>) {
    let Some(grade) = cx.point.maker_grade.clone() else {
        return;
    };
    let Some(iso) = IsoGrade::of_number(grade.value.iso_vg) else {
        return;
    };
    let least = iso.least();
    let known = cx.r.given(
        "nu_40_min",
        "lower limit of the grade",
        &grade.clone().map(|_| least),
    );
    cx.push(Demand {
        end: End::MakerGrade,
        limit: Limit::Kinematic(least),
        limit_step: Some(known.step),
        rule: "maker-grade".to_owned(),
        says: format!("ISO VG {} at least, new", iso.number()),
        source: grade
            .origin
            .note
            .clone()
            .unwrap_or_else(|| "maker".to_owned()),
        whose: Whose::Maker,
        confidence: Confidence::High,
        ..cx.blank_at(None, Some(forty()), None)
    });
}

/// What the oil must pass or be moved by at start (practice 5a).
pub fn start<R: Recorder>(cx: &mut Context<'_, '_, R>) {
    if grease(cx.point.lubrication.as_ref().map(|l| l.value)) {
        return;
    }
    if by_grade(cx) {
        return;
    }
    let lubrication = cx.lubrication();
    let at = cx.thermal.start;
    let step = cx.thermal.start_coldest.map(|k| k.step);
    // a bath stands for bearings that turn in it; an open gear dips without any
    let dips = |p: &Part| matches!(p.kind, PartKind::OpenGear(_));
    let open = !cx.point.parts.is_empty() && cx.point.parts.iter().all(dips);
    let limits: Vec<_> = cx
        .rules
        .start_limits
        .iter()
        .filter(|l| {
            let implied = lubrication
                .is_some_and(|x| l.implied_by.contains(&x) && !(open && x == Lubrication::Bath));
            let stated = match l.stated_by {
                Some(StatedBy::Filter) => cx.point.filter,
                Some(StatedBy::GravityReturn) => cx.point.gravity_return,
                None => false,
            };
            implied || stated
        })
        .cloned()
        .collect();
    for limit in limits {
        let Some(figure) = limit.limit else { continue };
        let (boxed, known) = match figure {
            ViscosityLimit::Kinematic(nu) => (
                Limit::Kinematic(nu),
                cx.rule_value("nu_start", "greatest viscosity at start", nu, limit.id())
                    .step,
            ),
            ViscosityLimit::Dynamic(eta) => (
                Limit::Dynamic(eta),
                cx.rule_value("eta_start", "greatest viscosity at start", eta, limit.id())
                    .step,
            ),
        };
        let standing = match limit.role {
            Role::Demand => Standing::Judges,
            Role::Condition => Standing::Condition,
        };
        cx.push(Demand {
            end: End::StartCeiling,
            limit: boxed,
            limit_step: Some(known),
            rule: limit.id.clone(),
            says: format!("{} at start", limit.part),
            source: limit.provenance.cited(),
            whose: Whose::Standard,
            confidence: limit.provenance.confidence,
            standing,
            ..cx.blank_at(None, at, step)
        });
    }
}

fn grease(lubrication: Option<Lubrication>) -> bool {
    lubrication == Some(Lubrication::Grease)
}

/// Whether an engine or an axle is served, whose cold end is a matter of W grades: neither what a
/// pump may take nor the pour point is the criterion (SAE J300, SAE J306).
fn by_grade<R: Recorder>(cx: &Context<'_, '_, R>) -> bool {
    let graded = |p: &Part| matches!(p.kind, PartKind::Engine(_) | PartKind::Axle(_));
    cx.point.parts.iter().any(graded)
}

/// Start temperature over pour point: the house's, or by lubrication.
pub fn pour<R: Recorder>(cx: &mut Context<'_, '_, R>) {
    let lubrication = cx.lubrication();
    if grease(lubrication) {
        use_low(cx);
        return;
    }
    if cx.house.pour_margin.is_none() && by_grade(cx) {
        return;
    }
    let (least, preferred, rule, source, confidence, whose) = match &cx.house.pour_margin {
        Some(given) => {
            let least = given.value.base();
            let source = "house value".to_owned();
            (
                least,
                least + 5.0,
                "house pour margin".to_owned(),
                source,
                Confidence::High,
                Whose::House,
            )
        }
        None => match cx.rules.pour_margin(lubrication) {
            Some(margin) => {
                let (Some(least), Some(preferred)) = (margin.least, margin.preferred) else {
                    return;
                };
                (
                    least.base(),
                    preferred.base(),
                    margin.id.clone(),
                    margin.provenance.cited(),
                    margin.provenance.confidence,
                    Whose::Standard,
                )
            }
            None => return,
        },
    };
    let margin = TemperatureInterval::from_base(least);
    let known = cx.rule_value("dt_pour", "least margin over the pour point", margin, &rule);
    let at = cx.thermal.start;
    let step = cx.thermal.start_coldest.map(|k| k.step);
    cx.push(Demand {
        end: End::PourMargin,
        limit: Limit::Pour { least, preferred },
        limit_step: Some(known.step),
        rule,
        says: format!("start at least {least} K above the pour point, better {preferred} K"),
        source,
        whose,
        confidence,
        ..cx.blank_at(None, at, step)
    });
}

/// A grease point: the thickener's use range closes both ends.
fn use_low<R: Recorder>(cx: &mut Context<'_, '_, R>) {
    let at = cx.thermal.start;
    let step = cx.thermal.start_coldest.map(|k| k.step);
    cx.push(Demand {
        end: End::PourMargin,
        limit: Limit::UseLow,
        rule: "grease-use-range".to_owned(),
        says: "use range of the thickener, low end".to_owned(),
        source: "rules, thickeners".to_owned(),
        confidence: Confidence::Medium,
        ..cx.blank_at(None, at, step)
    });
}

/// The oil's own ceiling, and one stated for the point.
pub fn ceiling<R: Recorder>(cx: &mut Context<'_, '_, R>) {
    let at = cx.thermal.running;
    let step = cx.thermal.hottest.map(|k| k.step);
    cx.push(Demand {
        end: End::OilCeiling,
        limit: Limit::OilsOwn,
        rule: "oil-ceiling".to_owned(),
        says: "running temperature under the oil's limit".to_owned(),
        source: "supplier, or base stock".to_owned(),
        confidence: Confidence::Medium,
        ..cx.blank_at(None, at, step)
    });
    if let Some(limit) = cx.point.oil_limit.clone() {
        let known = cx.r.given("t_max", "limit stated for the oil", &limit);
        cx.push(Demand {
            end: End::OilCeiling,
            limit: Limit::Temperature(limit.value.base()),
            limit_step: Some(known.step),
            rule: "stated-oil-limit".to_owned(),
            says: stated_by("oil limit", limit.origin.whose),
            source: limit
                .origin
                .note
                .clone()
                .unwrap_or_else(|| limit.origin.whose.to_string()),
            whose: limit.origin.whose,
            confidence: Confidence::High,
            ..cx.blank_at(None, at, step)
        });
    }
}

/// Maker's limits replace worked-out and tabled ones of the same end, on the part or on the whole
/// point; the stricter stay visible. The maker's grade replaces the empirical floors.
pub fn replace(list: &mut [Demand]) {
    for end in [End::HotFloor, End::RunningCeiling, End::StartCeiling] {
        let makers: Vec<(Option<String>, String)> = list
            .iter()
            .filter(|d| d.end == end && d.whose == Whose::Maker && d.standing == Standing::Judges)
            .map(|d| (d.part.clone(), d.says.clone()))
            .collect();
        for (part, by) in makers {
            for demand in list
                .iter_mut()
                .filter(|d| d.end == end && d.whose != Whose::Maker)
            {
                let covered = part.is_none() || demand.part == part;
                if covered && is_computed(demand) {
                    demand.standing = Standing::Replaced { by: by.clone() };
                }
            }
        }
    }
    let grade = list
        .iter()
        .find(|d| d.end == End::MakerGrade)
        .map(|d| d.says.clone());
    if let Some(by) = grade {
        for demand in list
            .iter_mut()
            .filter(|d| d.end == End::HotFloor && is_empirical(d))
        {
            if demand.standing == Standing::Judges {
                demand.standing = Standing::Replaced {
                    by: format!("the maker's grade, {by}"),
                };
            }
        }
    }
}

/// A limit a rule worked out or tabled, as against one somebody stated.
fn is_computed(demand: &Demand) -> bool {
    !demand.rule.starts_with("stated-") && demand.standing != Standing::Information
}

/// The pitch-line rule and practice windows are empirical; viscosity ratio and films are not.
fn is_empirical(demand: &Demand) -> bool {
    demand.rule == super::gear_mesh::PITCH_LINE_RULE || demand.from_window
}
