//! What is taken as true without anybody having stated it, numbered.

use super::case::Case;
use super::gaps::Found;
use super::inputs::named;
use super::say;
use crate::quantity::show::Toward;
use crate::report::model::Assumption;
use crate::source::Place;
use crate::source::place::Whose;
use crate::trace::How;

/// Findings on an oil that are assumptions.
const OF_OIL: [&str; 2] = ["density-assumed", "base-assumed"];

/// The assumptions of a point; their numbers go on from `last` on the sheet.
pub(super) fn assumptions(case: &Case<'_, '_>, gaps: &[Found], last: &mut u32) -> Vec<Assumption> {
    let mut all = users(case, gaps);
    for more in own(case, gaps).into_iter().chain(of_oil(case)) {
        if !all.iter().any(|a| a.taken == more.taken) {
            all.push(more);
        }
    }
    for assumption in &mut all {
        *last += 1;
        assumption.id = format!("A-{last}");
    }
    all
}

/// What the user marked as assumed.
fn users(case: &Case<'_, '_>, gaps: &[Found]) -> Vec<Assumption> {
    case.w
        .point
        .inputs
        .iter()
        .filter(|line| line.origin.whose == Whose::Assumed)
        .map(|line| Assumption {
            id: String::new(),
            taken: named(line).into(),
            because: line
                .origin
                .note
                .clone()
                .unwrap_or_else(|| format!("so marked in {}", case.stands(&line.origin.place))),
            otherwise: otherwise(case, gaps, &line.key, line.about.as_ref())
                .unwrap_or_else(|| "not tried: no range or tolerance is stated".to_owned()),
        })
        .collect()
}

/// What the program assumed in the steps behind the limits.
fn own(case: &Case<'_, '_>, gaps: &[Found]) -> Vec<Assumption> {
    let trace = &case.w.demands.trace;
    let list = &case.w.demands.middle.list;
    let results: Vec<_> = list
        .iter()
        .flat_map(|d| [d.limit_step, d.at_step])
        .flatten()
        .collect();
    let mut found: Vec<Assumption> = Vec::new();
    for step in trace.behind(&results) {
        let How::Given { origin, .. } = &step.how else {
            continue;
        };
        if origin.whose != Whose::Assumed || origin.place != Place::Program {
            continue;
        }
        let about = step
            .about
            .as_ref()
            .map_or(String::new(), |a| format!("{a}: "));
        let amount = say::amount(step.amount, case.units(), Toward::Nearest);
        let base = step.amount.base;
        let gap = gaps.iter().find(|g| {
            let near = |taken: f64| (taken - base).abs() <= 1e-9 * base.abs();
            g.input.1 == step.about && g.taken.is_some_and(near)
        });
        let by_gap = gap.and_then(|g| otherwise(case, gaps, &g.input.0, g.input.1.as_ref()));
        let taken = format!("{about}{} {amount}", step.says);
        if found.iter().any(|a| a.taken.text() == taken) {
            continue;
        }
        found.push(Assumption {
            id: String::new(),
            taken: taken.into(),
            because: say::told(
                origin
                    .note
                    .as_deref()
                    .unwrap_or("the program's own default"),
                case.units(),
            ),
            otherwise: by_gap.unwrap_or_else(|| {
                "not tried: part of the method; a house rule or a maker's limit takes its place"
                    .to_owned()
            }),
        });
    }
    found
}

/// What is assumed of the oil the sheet tells of.
fn of_oil(case: &Case<'_, '_>) -> Vec<Assumption> {
    let Some(lead) = case.lead else {
        return Vec::new();
    };
    let id = case.id(lead.oil);
    case.ready(lead.oil)
        .curves
        .findings
        .iter()
        .filter(|f| OF_OIL.contains(&f.name))
        .map(|f| Assumption {
            id: String::new(),
            taken: format!("{id}: {}", say::told(&f.says, case.units())).into(),
            because: "nothing is stated".to_owned(),
            otherwise: say::sentence(&say::told(&f.act, case.units())),
        })
        .collect()
}

/// What changes over the range of an input, where it has one.
fn otherwise(
    case: &Case<'_, '_>,
    gaps: &[Found],
    key: &str,
    about: Option<&String>,
) -> Option<String> {
    let same = |g: &&Found| g.input.0 == key && g.input.1.as_ref() == about;
    let gap = gaps.iter().find(same)?;
    let effect = gap.effect.as_ref()?;
    let id = case.lead.map_or("", |c| case.id(c.oil));
    let range = super::vary::range(effect);
    let margin = if range.is_empty() {
        String::new()
    } else {
        format!("; smallest margin {range}")
    };
    let see = if gap.row.id.is_empty() {
        String::new()
    } else {
        format!(". See {}", gap.row.id)
    };
    let words = crate::decide::gaps::effect::words(&effect.verdicts);
    Some(format!("{}: {id} {words}{margin}{see}", gap.row.plausible))
}
