//! The overview: the answer for the site, what to do first, every machine by state.

use super::digest::Digest;
use super::plan::On;
use super::state::{Pressing, State};
use super::{Report, caution, first, lists, machines, register, say, site_gaps, store};
use crate::model::rulebook::caution::CautionKind;
use crate::quantity::show::{Toward, fixed};
use crate::report::model::{
    AcceptRow, Answer, AreaRow, Basis, Body, Caution, CautionNote, Overview, Phrase, Sheet,
    SignBox, SignOff,
};
use std::fmt::Write as _;

/// The overview's sheet.
pub(super) fn sheet(report: &Report<'_>) -> Sheet {
    let site = &report.run.scales.site.frame;
    let name = site.site.clone().unwrap_or_else(|| "Site".to_owned());
    let plan = &report.plan;
    let large = !plan.areas.is_empty();
    let all: Vec<usize> = (0..plan.machines.len()).collect();
    let (rows, band_axis) = if large {
        (Vec::new(), None)
    } else {
        machines::rows(report, &all, machines::Within::Site)
    };
    let lists = lists::lists(report);
    let mut list_notes = store::notes(report);
    list_notes.extend(lists.iter().flat_map(|l| l.notes(report)));
    let (answer, first, caution) = (
        answer(report),
        first::first(report),
        caution_of_site(report),
    );
    let room = register::on_first_page(report.run.options.paper, &answer, &first, &caution);
    let body = Overview {
        answer,
        first,
        caution,
        groups: register::groups(report, &all, Some(room)),
        areas: areas(report),
        machines: rows,
        band_axis,
        oils: store::oils(report),
        lists: lists.as_ref().and_then(|l| l.figure(report)),
        list_notes,
        matrix: store::matrix(report),
        gaps: site_gaps::gaps(report),
        accepted: accepted(report),
        notes: site.notes.clone(),
        basis: basis(report),
        sign: sign(report),
    };
    Sheet {
        place: plan.overview.place.clone(),
        number: plan.overview.number,
        of: plan.of,
        title: format!("{name}: oils needed and proposed, overview"),
        name,
        subtitle: "Oils needed and proposed, all machines".to_owned(),
        about: about(report),
        nav: plan.nav(On::Overview),
        body: Body::Overview(Box::new(body)),
    }
}

fn about(report: &Report<'_>) -> Phrase {
    let scales = report.run.scales;
    let machines = report.plan.machines.len();
    let points: usize = report.plan.machines.iter().map(|m| m.points.len()).sum();
    let mut text = format!(
        "{}, {} weighed",
        say::sentence(&say::count(machines, "machine", "machines")),
        say::count(scales.site.oils.len(), "oil or grease", "oils and greases")
    );
    if points > machines {
        let _ = write!(text, ", {points} lubrication points");
    }
    if points < scales.site.points.len() {
        text.push_str("; the other machines of the site were left out on request");
    }
    say::stopped(&text).into()
}

/// How many machines are in a state: a machine is as its most pressing point.
pub(super) fn in_state(report: &Report<'_>, state: State) -> usize {
    report
        .kept
        .machines
        .iter()
        .filter(|points| of_machine(points) == state)
        .count()
}

/// The state of a machine.
pub(super) fn of_machine(points: &[Digest]) -> State {
    points.iter().map(|d| d.state).min().unwrap_or_default()
}

fn answer(report: &Report<'_>) -> Answer {
    let words = [
        (State::Settled, "is settled", "are settled"),
        (State::Attention, "needs attention", "need attention"),
        (
            State::Undecided,
            "cannot be decided yet",
            "cannot be decided yet",
        ),
    ];
    let mut parts = Vec::new();
    for (state, one, many) in words {
        let n = in_state(report, state);
        if n == 0 {
            continue;
        }
        let noun = match (parts.is_empty(), n) {
            (true, 1) => " machine",
            (true, _) => " machines",
            _ => "",
        };
        let verb = if n == 1 { one } else { many };
        parts.push(format!("{}{noun} {verb}", say::number(n)));
    }
    Answer {
        mark: None,
        headline: say::stopped(&say::sentence(&parts.join(", "))),
        sentences: sentences(report),
    }
}

fn sentences(report: &Report<'_>) -> Vec<Phrase> {
    let points = report.kept.machines.iter().flatten();
    let mut proposed: Vec<usize> = points.clone().filter_map(|d| d.oil).collect();
    proposed.sort_unstable();
    proposed.dedup();
    let mut now: Vec<&str> = points
        .clone()
        .filter(|d| d.now_mark.is_some() || d.now.ends_with(", barred"))
        .map(|d| d.now.as_str())
        .collect();
    now.sort_unstable();
    now.dedup();
    let decided = points.filter(|d| d.oil.is_some()).count();
    let mut all = Vec::new();
    all.extend(in_use(report));
    if decided > 0 {
        all.push(
            format!(
                "{} proposed for {} that can be decided; {} in use today.",
                say::sentence(&are(proposed.len(), "lubricant")),
                say::count(decided, "lubrication point", "lubrication points"),
                are(now.len(), "")
            )
            .into(),
        );
    }
    all
}

/// What the oils in use come to, by how pressing that is.
fn in_use(report: &Report<'_>) -> Option<Phrase> {
    let kinds = [
        (Pressing::Barred, "is barred in"),
        (Pressing::Fails, "fails in"),
        (Pressing::NotKnown, "is not known in"),
        (Pressing::Tight, "is tight and not accepted in"),
        (Pressing::Open, "is open in"),
    ];
    let parts: Vec<String> = kinds
        .into_iter()
        .filter_map(|(kind, words)| {
            let machines = report.kept.machines.iter();
            let n = machines.filter(|p| register::pressing(p) == kind).count();
            (n > 0).then(|| format!("{words} {}", say::number(n)))
        })
        .collect();
    (!parts.is_empty()).then(|| format!("The oil in use {}.", say::list(&parts)).into())
}

/// `one lubricant is`, `four are`.
fn are(n: usize, noun: &str) -> String {
    let plural = if n == 1 || noun.is_empty() { "" } else { "s" };
    let gap = if noun.is_empty() { "" } else { " " };
    let verb = if n == 1 { "is" } else { "are" };
    format!("{}{gap}{noun}{plural} {verb}", say::number(n))
}

/// What was judged somewhere and what nowhere; the sheets say which on each machine.
fn caution_of_site(report: &Report<'_>) -> Caution {
    let of = report.plan.machines.len();
    let everywhere = |n: u32| usize::try_from(n).is_ok_and(|n| n == of);
    let named = |tally: &[(String, u32)], all: bool| -> Vec<String> {
        let mut found: Vec<&(String, u32)> = tally
            .iter()
            .filter(|(_, n)| everywhere(*n) == all)
            .collect();
        found.sort_by_key(|(_, n)| std::cmp::Reverse(*n));
        found
            .into_iter()
            .take(8)
            .map(|(what, _)| what.clone())
            .collect()
    };
    let (judged, missed) = (&report.kept.judged, &report.kept.not_judged);
    let mut here = named(judged, true);
    let some = named(judged, false);
    if !some.is_empty() {
        here.push(format!("where it applies: {}", some.join(", ")));
    }
    let mut not = named(missed, true);
    let some = named(missed, false);
    if !some.is_empty() {
        not.push(format!(
            "on some machines, where nobody stated it: {}",
            some.join(", ")
        ));
    }
    Caution {
        judged: here,
        not_judged: not,
        defer: vec![caution::DEFER.into()],
        before: vec![
            "Each change is released by the signature on its own sheet, with its conditions."
                .into(),
        ],
    }
}

fn areas(report: &Report<'_>) -> Vec<AreaRow> {
    let plan = &report.plan;
    plan.areas
        .iter()
        .map(|area| {
            let state = |s: State| {
                let n = area
                    .machines
                    .iter()
                    .filter(|m| of_machine(&report.kept.machines[**m]) == s)
                    .count();
                u32::try_from(n).unwrap_or(u32::MAX)
            };
            let tag = |m: Option<&usize>| m.map_or("", |m| plan.machines[*m].tag);
            AreaRow {
                name: area.name.clone(),
                href: plan.href(&area.place),
                tags: format!(
                    "{} to {}",
                    tag(area.machines.first()),
                    tag(area.machines.last())
                ),
                machines: u32::try_from(area.machines.len()).unwrap_or(u32::MAX),
                attention: state(State::Attention),
                undecided: state(State::Undecided),
                settled: state(State::Settled),
            }
        })
        .collect()
}

fn accepted(report: &Report<'_>) -> Vec<AcceptRow> {
    let run = &report.run;
    run.scales
        .site
        .accept
        .iter()
        .map(|a| {
            let tag = a.machine.value.as_str();
            let machine = report
                .plan
                .machines
                .iter()
                .find(|m| m.tag == tag || m.points.iter().any(|p| p.address() == tag));
            let known = |t: &Option<String>| t.clone().unwrap_or_else(|| "not stated".to_owned());
            AcceptRow {
                machine: match machine {
                    Some(m) => Phrase::new().link(tag, report.plan.href(&m.place)),
                    None => Phrase::new().tag(tag),
                },
                oil: a.oil.value.clone(),
                by: known(&a.by),
                dates: format!("{} to {}", known(&a.on), known(&a.until)),
                because: a.because.clone().unwrap_or_default(),
                stands: a.stands(&run.head.date),
            }
        })
        .collect()
}

fn basis(report: &Report<'_>) -> Basis {
    let run = &report.run;
    let plan = &report.plan;
    let reserve = fixed(run.scales.reserve, 2, Toward::Nearest);
    let lines = vec![
        Phrase::new()
            .and("Limits come from published relations, practice and makers; the formulas are on the sheet of ")
            .link("methods", plan.href(&plan.methods.place))
            .and(", the rules with their sources on that of ")
            .link("rules", plan.href(&plan.rules.place))
            .and("."),
        "Oil lines follow ASTM D341 through the stated points. A polymer-thickened oil is judged after shear when hot and as new when cold.".into(),
        format!("Reserve asked: {reserve} of a VG step; half of it where the tolerance of the oil is judged already.").into(),
        format!("Rules: {}.", run.head.rules).into(),
        "A machine that is not in the site file is not in this report. A verdict stands until load, speed, ambient, heater or oil changes.".into(),
    ];
    let cautions = run
        .scales
        .rules
        .cautions
        .iter()
        .filter(|c| c.kind == CautionKind::Deferral && c.applies.is_empty())
        .enumerate()
        .map(|(i, c)| CautionNote {
            id: format!("C-{}", i + 1),
            title: c.title.clone(),
            text: c.text.clone(),
        })
        .collect();
    Basis { lines, cautions }
}

fn sign(report: &Report<'_>) -> SignOff {
    let machines = say::count(report.plan.machines.len(), "machine", "machines");
    let client = report.run.scales.site.frame.client.as_deref();
    SignOff {
        meaning: "One signature here covers this overview only; each machine's sheet is signed on its own.".to_owned(),
        boxes: vec![
            SignBox {
                role: "Prepared".to_owned(),
                accepts: format!("{} of the site file carried, inputs as found.", say::sentence(&machines)).into(),
            },
            SignBox {
                role: "Checked".to_owned(),
                accepts: "Answers and order of work agree with the machines' sheets.".into(),
            },
            SignBox {
                role: client.map_or_else(|| "Accepted".to_owned(), |c| format!("Accepted for {c}")),
                accepts: "The order of work. No single change is released here.".into(),
            },
        ],
    }
}
