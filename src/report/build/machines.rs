//! The table of needs, verdicts and bands, one row a lubrication point.

use super::digest::Digest;
use super::overview::of_machine;
use super::plan::{Area, On};
use super::state::State;
use super::{Report, ambient, caution, register, say};
use crate::report::draw::band::MiniBand;
use crate::report::model::{AreaSheet, Body, Caution, MachineRow, Mark, Phrase, Sheet};

/// The sheet a row stands on.
#[derive(Clone, Copy, PartialEq, Eq)]
pub(super) enum Within {
    /// Of the whole site.
    Site,
    /// Of one area, whose name need not be told again.
    Area,
}

/// The rows by state, and the axis of their bands.
pub(super) fn rows(
    report: &Report<'_>,
    machines: &[usize],
    within: Within,
) -> (Vec<MachineRow>, Option<MiniBand>) {
    let digests = |m: &usize| report.kept.machines[*m].iter();
    let axis = ambient::axis(machines.iter().flat_map(digests).filter_map(|d| d.place));
    let mut rows = Vec::new();
    for state in State::ALL {
        let mut of_state: Vec<usize> = machines
            .iter()
            .copied()
            .filter(|m| of_machine(&report.kept.machines[*m]) == state)
            .collect();
        of_state.sort_by_key(|m| (register::pressing(&report.kept.machines[*m]), *m));
        let mut first = true;
        for m in of_state {
            for digest in &report.kept.machines[m] {
                let group = first.then(|| say::sentence(state.title()));
                first = false;
                let named = match within {
                    Within::Site => [digest.title.as_str(), digest.area.as_str()],
                    Within::Area => [digest.title.as_str(), ""],
                };
                let mut row = row(report, (m, digest), rows.len(), axis, group);
                row.name = joined(&named);
                rows.push(row);
            }
        }
    }
    let head = rows
        .iter()
        .find_map(|r| r.band.as_ref())
        .map(|band| MiniBand {
            id: "band-axis".to_owned(),
            head: true,
            ..band.clone()
        });
    (rows, head)
}

fn joined(names: &[&str]) -> String {
    let told: Vec<&str> = names.iter().copied().filter(|s| !s.is_empty()).collect();
    told.join(", ")
}

fn row(
    report: &Report<'_>,
    (machine, d): (usize, &Digest),
    n: usize,
    axis: (f64, f64),
    group: Option<String>,
) -> MachineRow {
    let plan = &report.plan.machines[machine];
    let tag = match &d.point {
        Some(point) if plan.points.len() > 1 => format!("{}, {point}", plan.tag),
        _ => plan.tag.to_owned(),
    };
    let oil = d.oil.map(|o| report.oil_id(o));
    let other = oil.as_deref() != Some(d.now.as_str());
    let mark = d.mark.unwrap_or(Mark::Fails);
    let band_now = if other { d.band_now } else { None };
    let proposed = if d.oil.is_some() { d.band } else { None };
    let mini = d.place.filter(|_| d.oil.is_some() || band_now.is_some());
    let band = mini.map(|need| MiniBand {
        degrees: say::degrees(report.run.scales.units),
        ..ambient::mini(format!("band-{n}"), need, (band_now, proposed), mark, axis)
    });
    MachineRow {
        group,
        tag: Phrase::new().tag_link(tag, d.href.clone()),
        name: String::new(),
        needs: d.needs.clone(),
        oil: oil.unwrap_or_else(|| register::no_oil(d.mark).to_owned()),
        now: if other { d.now.clone() } else { String::new() },
        mark: d.mark,
        margin: d.margin.clone(),
        band,
        band_words: d.band_words.clone(),
        next: d.next.clone(),
    }
}

/// The sheet of an area.
pub(super) fn area(report: &Report<'_>, place: usize) -> Sheet {
    let plan = &report.plan;
    let Area {
        name,
        place: stands,
        number,
        machines,
    } = &plan.areas[place];
    let (rows, band_axis) = rows(report, machines, Within::Area);
    let body = AreaSheet {
        machines: rows,
        band_axis,
        caution: Caution {
            defer: vec![caution::DEFER.into()],
            before: vec![
                "What was judged and what was not stands on each machine's own sheet.".into(),
            ],
            ..Caution::default()
        },
    };
    Sheet {
        place: stands.clone(),
        number: *number,
        of: plan.of,
        name: say::sentence(name),
        subtitle: format!(
            "{} of this site",
            say::count(machines.len(), "machine", "machines")
        ),
        about: Phrase::new(),
        title: format!("{name}: oils needed and proposed"),
        nav: plan.nav(On::Area(place)),
        body: Body::Area(Box::new(body)),
    }
}
