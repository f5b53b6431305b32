//! What would change the verdicts: the smallest change that makes each oil hold, and what would
//! unsettle the proposal.

use super::case::Case;
use super::gaps::{Found, Weight};
use super::say;
use crate::decide::ask::{Ask, NO_GREASE, Specification, ask};
use crate::decide::gaps::effect::words;
use crate::decide::mend::lever::Target;
use crate::decide::mend::{Mended, mend};
use crate::decide::scatter::scatter;
use crate::judge::Verdict;
use crate::quantity::show::{Toward, fixed};
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::report::model::{ChangeRow, Changes, Phrase};
use crate::results::scatter::named;
use crate::weighing::Candidate;

/// Oils told of on a sheet at most.
const ROWS: usize = 8;
/// Beyond so many machines only the oil told of and the one in use are mended: a sheet must not
/// cost more than its weighing.
const FULL: usize = 60;

/// The section; none where nothing was weighed.
pub(super) fn changes(case: &Case<'_, '_>, gaps: &[Found], machines: usize) -> Option<Changes> {
    case.lead?;
    let told = mended(case, machines);
    let left = short(case).len() - told.len();
    let mut rows: Vec<ChangeRow> = told.into_iter().filter_map(|c| row(case, c)).collect();
    if left > 0 {
        rows.push(elsewhere(case, left));
    }
    let unsettles = unsettles(case, gaps);
    let ask_for = ask_for(case, machines);
    let any = !rows.is_empty() || !unsettles.is_empty() || !ask_for.is_empty();
    any.then_some(Changes {
        rows,
        unsettles,
        ask_for,
    })
}

/// The oil to ask for, where no oil on the list holds; on large sites the command tells it.
fn ask_for(case: &Case<'_, '_>, machines: usize) -> Vec<Phrase> {
    let holds = |c: &Candidate| c.judgement.verdict == Verdict::Holds;
    if case.w.candidates.iter().any(holds) {
        return Vec::new();
    }
    let command = format!("filmwright need {} --ask", case.w.point.address());
    if machines > FULL {
        return vec![format!("Printed by: {command}").into()];
    }
    match ask(case.run.scales, case.w) {
        Ask::Specification(spec) => specification(case, &spec),
        Ask::Undecided(why) => {
            let text = format!("nothing yet, this has to be known first: {}", say::set(&why));
            vec![say::stopped(&say::sentence(&text)).into()]
        }
        Ask::NoRoom { vi } => vec![
            format!("No oil of one grade holds here, up to a viscosity index of {vi:.0}: the limits leave no room.").into(),
        ],
        Ask::NoGrease => vec![say::stopped(&say::sentence(NO_GREASE)).into()],
    }
}

/// A specification in sentences; it was weighed on the point and holds.
fn specification(case: &Case<'_, '_>, spec: &Specification) -> Vec<Phrase> {
    let test = spec.shear_test(case.run.scales.rules);
    let degrees = |t: f64| {
        let at = ThermodynamicTemperature::from_base(t).amount();
        say::amount(at, case.units(), Toward::Down)
    };
    let lines = spec.lines(&test, degrees).into_iter();
    let lines = lines.map(|l| say::stopped(&say::sentence(&say::set(&l))));
    let conditions = spec.contents.conditions.iter().map(|(_, says)| {
        say::stopped(&say::sentence(&format!(
            "on the condition: {}",
            say::set(says)
        )))
    });
    lines
        .chain(conditions)
        .chain(["Such an oil was weighed here and holds, reserve kept.".to_owned()])
        .map(Phrase::from)
        .collect()
}

/// Where the changes of the oils that have no row are found.
fn elsewhere(case: &Case<'_, '_>, left: usize) -> ChangeRow {
    let noun = if left == 1 { "oil" } else { "oils" };
    ChangeRow {
        letter: String::new(),
        oil: format!("{left} other {noun}"),
        covers: String::new(),
        change: Phrase::new().and(format!(
            "Not worked out here; found by: filmwright mend {} OIL",
            case.w.point.address()
        )),
        then: String::new(),
    }
}

/// The oils that do not hold and that a change could be solved for.
fn short<'c>(case: &Case<'c, '_>) -> Vec<&'c Candidate> {
    let weighed = case.w.candidates.iter();
    weighed
        .filter(|c| c.judgement.verdict != Verdict::Holds)
        .filter(|c| !c.judgement.doubts.undecided)
        .collect()
}

/// The oils worth mending, in the order of the table: those that do not hold.
fn mended<'c>(case: &Case<'c, '_>, machines: usize) -> Vec<&'c Candidate> {
    let most = if machines > FULL { 0 } else { ROWS };
    let first = |c: &Candidate| c.in_use || case.is_lead(c);
    let short = short(case);
    let mut left = most.saturating_sub(short.iter().filter(|c| first(c)).count());
    short
        .into_iter()
        .filter(|c| {
            let room = left > 0;
            if !first(c) && room {
                left -= 1;
            }
            first(c) || room
        })
        .collect()
}

fn row(case: &Case<'_, '_>, c: &Candidate) -> Option<ChangeRow> {
    let found = mend(case.run.scales, case.w.point, c.oil);
    let target = found.missing().first().copied()?;
    let change = change(case, &found, target)?;
    let best = found
        .of(Target::Reserve)
        .next()
        .or_else(|| found.of(target).next());
    Some(ChangeRow {
        letter: case.letter(c),
        oil: case.id(c.oil).to_owned(),
        covers: say::band(c.judgement.band, case.degrees()),
        change,
        then: best.map_or(String::new(), |m| then(&m.then)),
    })
}

/// The change of least trouble: for the bare limits, and for the reserve where that asks for more.
fn change(case: &Case<'_, '_>, found: &Mended, target: Target) -> Option<Phrase> {
    let said = |target| {
        let mend = found.of(target).next()?;
        Some(say::set(&mend.words(case.units())))
    };
    let (met, full) = (said(target), said(Target::Reserve));
    Some(match (target, met, full) {
        (Target::Reserve, _, Some(full)) => say::sentence(&full).into(),
        (Target::Met, Some(met), Some(full)) => Phrase::new()
            .and(format!("Every limit met: {met}. "))
            .and(format!("Full reserve: {full}.")),
        (Target::Met, Some(met), None) => Phrase::new().and(format!(
            "Every limit met: {met}. Full reserve: nothing tried."
        )),
        (Target::Met, None, Some(full)) => format!("Full reserve: {full}.").into(),
        (_, None, None) if c_fails(found) => "No change tried, alone or two together.".into(),
        _ => return None,
    })
}

/// Whether the oil fails as things are: only then is it worth a line that nothing helps.
fn c_fails(found: &Mended) -> bool {
    found
        .now
        .as_ref()
        .is_ok_and(|now| now.in_use && now.judgement.verdict == Verdict::Fails)
}

fn then(c: &Candidate) -> String {
    let j = &c.judgement;
    let mut parts = vec![j.verdict.word().to_owned()];
    for (m, word) in [(j.hot, "hot"), (j.cold, "cold")] {
        if let Some(m) = m {
            parts.push(format!("{} {word}", say::steps(m.value, 1)));
        }
    }
    parts.join(", ")
}

/// What would unsettle the proposal: weather beyond its band, and gaps that decide.
fn unsettles(case: &Case<'_, '_>, gaps: &[Found]) -> Vec<Phrase> {
    let Some(lead) = case.lead.filter(|_| case.proposed) else {
        return Vec::new();
    };
    let id = case.id(lead.oil);
    let mut all: Vec<Phrase> = Vec::new();
    let band = lead.judgement.band;
    let degrees = case.degrees();
    let mut ends = Vec::new();
    if let Some(low) = band.low_end() {
        let low = degrees.figure_up(say::celsius(low));
        ends.push(format!("below {low}\u{202f}{}", degrees.unit()));
    }
    if let Some(high) = band.high_end() {
        let high = degrees.figure_down(say::celsius(high));
        ends.push(format!("above {high}\u{202f}{}", degrees.unit()));
    }
    if !ends.is_empty() {
        let ends = ends.join(" or ");
        all.push(format!("An ambient {ends}: {id} no longer meets every limit.").into());
    }
    all.extend(sampled(case, lead));
    for gap in gaps.iter().filter(|g| g.weight <= Weight::Verdict) {
        let Some(effect) = &gap.effect else { continue };
        let turned = if gap.weight == Weight::Oil {
            let names: Vec<&str> = effect
                .proposed
                .iter()
                .map(|o| o.map_or("none", |o| case.id(o)))
                .collect();
            names.join(" or ")
        } else if effect.verdicts.len() > 1 {
            format!("{id} {}", words(&effect.verdicts))
        } else {
            continue;
        };
        let says = format!("{}, {}: {turned}.", gap.row.missing, gap.row.plausible);
        all.push(say::sentence(&says).into());
    }
    all
}

/// How sure the verdict is, where cases are to be sampled.
fn sampled(case: &Case<'_, '_>, lead: &Candidate) -> Option<Phrase> {
    let cases = case.run.options.scatter?;
    let s = scatter(case.run.scales, case.w, lead.oil, cases)?;
    let percent = |share: f64, toward| fixed(100.0 * share, 1, toward);
    let most: Vec<String> = s
        .most()
        .iter()
        .map(|i| {
            format!(
                "{} ({}\u{202f}%)",
                named(i),
                percent(i.matters, Toward::Nearest)
            )
        })
        .collect();
    let matters = if most.is_empty() {
        String::new()
    } else {
        format!(" What matters most: {}.", say::list(&most))
    };
    let text = format!(
        "Of {cases} cases within the tolerances, stated or usual, {} meets every limit in {}\u{202f}% (95\u{202f}% interval {} to {}\u{202f}%).{matters} The verdict stands as it is.",
        case.id(lead.oil),
        percent(s.share(), Toward::Down),
        percent(s.interval.0, Toward::Down),
        percent(s.interval.1, Toward::Up),
    );
    Some(text.into())
}
