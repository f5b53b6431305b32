//! What the sheet of an oil says beside its table: what is stated, grades and shear, the cold end,
//! life.

use super::oil_steps::OilSteps;
use super::say;
use crate::model::stated::{Bound, ViscosityLimit};
use crate::oil::grades::{Graded, Worn};
use crate::oil::sheet::{Loss, OilSheet as Told, PolymerSheet};
use crate::oil::start::Standing;
use crate::quantity::show::{Toward, Units, fixed, significant, unit_of};
use crate::quantity::{Kind, KinematicViscosity, Measure, Ratio, ThermodynamicTemperature, Time};
use crate::report::model::{OilLife, OilStart, minus};
use crate::trace::{Known, StepId};
use std::fmt::Write as _;

/// A word and what is said under it.
type Said = (String, String);

fn said(key: &str, text: &str) -> Said {
    (say::sentence(key), say::stopped(text))
}

/// ` (step 7)`.
fn step(steps: &OilSteps, id: StepId) -> String {
    steps
        .number(id)
        .map_or(String::new(), |n| format!(" (step {n})"))
}

fn viscosity(nu: KinematicViscosity, units: Units) -> String {
    say::viscosity(nu.base(), units, Toward::Nearest)
}

fn temperature(t: ThermodynamicTemperature, units: Units) -> String {
    say::temperature(t.base(), units)
}

fn per_cent(share: Ratio) -> String {
    format!(
        "{}\u{202f}%",
        minus(&fixed(100.0 * share.base(), 0, Toward::Nearest))
    )
}

/// A range, or the one value where both ends read alike.
fn span(a: String, b: String) -> String {
    if a == b { a } else { format!("{a} to {b}") }
}

/// What its source states.
pub(super) fn facts(t: &Told, units: Units) -> Vec<Said> {
    t.facts
        .iter()
        .map(|(key, text)| {
            // what people wrote keeps its units and is only set
            let own = matches!(*key, "source" | "note");
            let text = if own {
                say::set(text)
            } else {
                say::told(text, units)
            };
            (say::sentence(key), text)
        })
        .collect()
}

/// Index, grades new and worn, polymer and shear.
pub(super) fn grades(t: &Told, steps: &OilSteps, units: Units) -> Vec<Said> {
    let vi = |k: Known<Ratio>| {
        format!(
            "{}{}",
            fixed(k.value.base(), 0, Toward::Nearest),
            step(steps, k.step)
        )
    };
    let mut text = t.index.map_or(
        "none: the oil is too thin or too flat for one".to_owned(),
        vi,
    );
    if let Some(off) = t.index_spread {
        let _ = write!(
            text,
            "; the tests leave ±{} open",
            fixed(off.value.base(), 0, Toward::Up)
        );
    }
    if let Some(worn) = t.index_worn {
        let _ = write!(text, "; worn {}", vi(worn));
    }
    let mut all = vec![said("viscosity index", &text)];
    all.extend(
        t.grades
            .iter()
            .map(|g| (g.system.word().to_owned(), say::stopped(&graded(g)))),
    );
    if let Some(p) = &t.polymer {
        all.extend(polymer(p, steps, units));
    }
    all
}

fn graded(g: &Graded) -> String {
    let name = |grade: &Option<String>| grade.clone().unwrap_or_else(|| "no grade".to_owned());
    let new = name(&g.new);
    match &g.worn {
        None => new,
        Some(Worn::Grade(worn)) if g.leaves() == Some(true) => {
            format!(
                "{new} new, {} worn: it leaves its grade by shear",
                name(worn)
            )
        }
        Some(Worn::Grade(worn)) => format!("{new} new, {} worn", name(worn)),
        Some(Worn::AtWorst(worn)) => {
            let may = if g.leaves().is_some() {
                ": it may leave its grade"
            } else {
                ""
            };
            format!(
                "{new} new, {} at the greatest plausible loss{may}",
                name(worn)
            )
        }
    }
}

fn polymer(p: &PolymerSheet, steps: &OilSteps, units: Units) -> Vec<Said> {
    let made = if p.stated {
        "stated"
    } else {
        "estimated from its two viscosities, with a range"
    };
    let named = p.named.as_ref().map_or(String::new(), |n| format!("{n}; "));
    let mut text = match &p.base {
        None => format!("{named}base oil and polymer cannot be told apart"),
        Some(ends) => {
            let at = |(thin, thick): (Known<KinematicViscosity>, Known<KinematicViscosity>)| {
                format!(
                    "{}{}",
                    span(viscosity(thin.value, units), viscosity(thick.value, units)),
                    step(steps, thin.step)
                )
            };
            let (t40, t100) = (say::told("40 degC", units), say::told("100 degC", units));
            format!(
                "{named}base oil {made}: {} at {t40}, {} at {t100}",
                at(ends[0]),
                at(ends[1])
            )
        }
    };
    if let Some((least, most)) = p.carries {
        let carries = span(per_cent(least), per_cent(most));
        let _ = write!(
            text,
            "; the polymer carries {carries} of the viscosity at {}",
            say::told("100 degC", units)
        );
    }
    let (from, to) = p.window;
    let _ = write!(
        text,
        "; outside {} to {} the oil follows its base",
        temperature(from, units),
        temperature(to, units)
    );
    let mut all = vec![
        said("polymer", &text),
        said("lasting shear", &loss(p, steps, units)),
    ];
    if let Some((least, most)) = p.kept_150 {
        let by = if p.calibrated {
            "by the HTHS stated"
        } else {
            "no HTHS stated: a plausible range"
        };
        let range = span(per_cent(least.value), per_cent(most.value));
        let text = format!(
            "keeps {range} of its viscosity at {} and 10⁶ 1/s ({by}){}; it returns when the shear ends",
            say::told("150 degC", units),
            step(steps, least.step)
        );
        all.push(said("in contacts", &text));
    }
    all
}

fn loss(p: &PolymerSheet, steps: &OilSteps, units: Units) -> String {
    let mut text = match p.loss {
        Loss::Nothing => "no loss known".to_owned(),
        Loss::Known { at40, at100 } => {
            let index = p.index.map_or(String::new(), |i| {
                format!(
                    ", PSSI {}{}",
                    fixed(100.0 * i.value.base(), 0, Toward::Nearest),
                    step(steps, i.step)
                )
            });
            format!(
                "loses {}{} at {} and {}{} at {} for good{index}",
                per_cent(at40.value),
                step(steps, at40.step),
                say::told("40 degC", units),
                per_cent(at100.value),
                step(steps, at100.step),
                say::told("100 degC", units)
            )
        }
        Loss::Between {
            least,
            most_mild,
            most_severe,
        } => format!(
            "not known: {} to {} in engines and hydraulics, to {} in gears and rolling bearings is plausible",
            per_cent(least),
            per_cent(most_mild),
            per_cent(most_severe)
        ),
    };
    if let Some(test) = p.test_says() {
        let _ = write!(text, "; {test}");
    }
    if let Some(order) = p.order_of_tests() {
        let _ = write!(text, ". {order}");
    }
    text
}

fn bound(b: Option<Bound<ThermodynamicTemperature>>, units: Units) -> String {
    b.map_or_else(
        || "not stated".to_owned(),
        |b| b.says(|t| temperature(t, units)),
    )
}

/// The cold end.
pub(super) fn cold(t: &Told, steps: &OilSteps, units: Units) -> Vec<Said> {
    let c = &t.cold;
    let mut all = vec![said("pour point", &bound(c.pour, units))];
    if c.cloud.is_some() {
        all.push(said("cloud point", &bound(c.cloud, units)));
    }
    all.push(said("known down to", &temperature(c.coldest, units)));
    for r in &c.measured {
        let used = r.point.used.says();
        let text = format!(
            "{} at {} ({}), the line gives {}: {used}",
            say::amount(r.point.eta.amount(), units, Toward::Nearest),
            temperature(r.point.at, units),
            r.point.test.word(),
            viscosity(r.point.line, units)
        );
        all.push(said("measured", &text));
    }
    if let Some((d, at)) = &c.designation {
        let (name, how, lacks) = d.says();
        let text = format!(
            "{name}: 750\u{202f}mPa·s at {} ({how}){}{lacks}",
            temperature(at.value, units),
            step(steps, at.step)
        );
        all.push(said("ASTM D6080", &text));
    }
    all
}

/// Where it reaches the limits of a start; cold ends, rounded up.
pub(super) fn starts(t: &Told, steps: &OilSteps, units: Units) -> Vec<OilStart> {
    let unit = unit_of(Kind::Temperature, units);
    t.cold
        .starts
        .iter()
        .map(|s| {
            let limit = match s.start.limit {
                ViscosityLimit::Kinematic(nu) => nu.amount(),
                ViscosityLimit::Dynamic(eta) => eta.amount(),
            };
            let at = fixed(s.at.value.amount().in_unit(unit), 0, Toward::Up);
            OilStart {
                at: say::told(&format!("{at} {}", unit.name), Units::Si),
                limit: say::amount(limit, units, Toward::Nearest),
                below: match s.start.standing {
                    Standing::Below(by) => format!(
                        "{}\u{202f}{}",
                        say::shortfall(by, units),
                        say::difference(units)
                    ),
                    _ => String::new(),
                },
                of: s.start.part.clone(),
                step: steps.number(s.at.step).unwrap_or_default().to_owned(),
            }
        })
        .collect()
}

fn hours(t: Time) -> String {
    let shown = significant(
        t.amount().in_unit(unit_of(Kind::Time, Units::Si)),
        2,
        Toward::Down,
    );
    format!("{shown}\u{202f}h")
}

/// Seconds of a mean calendar year.
const YEAR_S: f64 = 31_556_952.0;

/// Life against temperature, both ways, as guidance.
pub(super) fn life(t: &Told, units: Units) -> (Vec<Said>, Vec<OilLife>) {
    let (basis, rows) = match &t.life {
        Err(why) => return (vec![said("no figure", &why.to_string())], Vec::new()),
        Ok(life) => life,
    };
    let mut all = vec![said(
        "guidance",
        &format!(
            "never a promise. {}, {} times mineral oil. The shorter figure is with free water and metal, the longer clean and dry",
            say::sentence(&basis.oil),
            significant(basis.multiple.base(), 2, Toward::Nearest)
        ),
    )];
    if let Some(c) = basis.calendar {
        let years = significant(c.base() / YEAR_S, 2, Toward::Down);
        all.push(said(
            "by the calendar",
            &format!("at most {years} years without analysis"),
        ));
    }
    all.push(said("by rule", &basis.rule));
    let pair = |(a, b): (Time, Time)| span(hours(a), hours(b));
    let lives = rows
        .iter()
        .map(|r| OilLife {
            at: temperature(r.at, units),
            equation: pair(r.equation),
            rule_of_ten: if r.decides {
                pair(r.rule_of_ten)
            } else {
                "\u{2013}".to_owned()
            },
            remark: if r.decides {
                String::new()
            } else {
                "other things end it before oxidation does".to_owned()
            },
        })
        .collect();
    (all, lives)
}
