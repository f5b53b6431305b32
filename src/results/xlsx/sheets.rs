//! The sheets of the workbook, in their order.

use super::oil_list::oil_list;
use super::steps::{about, steps};
use super::{Cell, Sheet, columns, inputs, write};
use crate::decide::gaps::{PointGaps, ranked};
use crate::demand::End;
use crate::judge::weigh::Margin;
use crate::model::stated::Stated;
use crate::model::{OilNow, Point};
use crate::quantity::kind::Unit;
use crate::quantity::show::{Toward, Units, quantity, unit_of};
use crate::quantity::{Kind, Measure};
use crate::results::csv;
use crate::results::gaps::table_of;
use crate::results::json::Head;
use crate::results::need::limit_amount;
use crate::source::SourceSet;
use crate::weighing::{Candidate, Scales, Weighed};
use rust_xlsxwriter::XlsxError;

/// What a workbook is made of.
pub struct Content<'c, 's> {
    /// The scales everything was weighed with.
    pub scales: &'c Scales<'s>,
    /// Every point with its candidates and gaps.
    pub points: &'c [PointGaps<'s>],
    /// The files read.
    pub sources: &'c SourceSet,
    /// Fingerprint, rules and date.
    pub head: &'c Head,
    /// Samples against label and need, a row each, where there are any.
    pub samples: Option<csv::Table>,
    /// Said on every page.
    pub warning: Option<&'c str>,
}

impl<'s> Content<'_, 's> {
    pub(super) fn weighed(&self) -> impl Iterator<Item = &Weighed<'s>> {
        self.points.iter().map(|p| &p.weighed)
    }
}

/// The workbook.
///
/// # Errors
/// What the writer of workbooks refuses.
pub fn workbook(content: &Content<'_, '_>) -> Result<Vec<u8>, XlsxError> {
    let sheets = [
        machines(content),
        oil_list(content),
        pairs(content),
        gaps(content),
        samples(content),
        steps(content),
        inputs::sheet(content.sources),
        about(content),
    ];
    let frame = &content.scales.site.frame;
    let title = frame.site.as_deref().unwrap_or("filmwright");
    write(&sheets, title, &content.head.date)
}

pub(super) struct Shown {
    pub(super) nu: &'static Unit,
    pub(super) t: &'static Unit,
    pub(super) volume: &'static Unit,
}

impl Shown {
    pub(super) fn of(units: Units) -> Self {
        Self {
            nu: unit_of(Kind::KinematicViscosity, units),
            t: unit_of(Kind::Temperature, units),
            volume: unit_of(Kind::Volume, units),
        }
    }
}

pub(super) fn point_cells(point: &Point) -> [Cell; 2] {
    [
        Cell::text(point.machine.clone()),
        Cell::maybe(point.point.as_deref()),
    ]
}

fn oil_now(point: &Point) -> String {
    match &point.oil_now {
        OilNow::Oil(id) => id.value.clone(),
        OilNow::Unknown => "unknown".into(),
        OilNow::Nothing => "none".into(),
    }
}

/// The verdict of the oil in use.
fn verdict_now(w: &Weighed<'_>) -> Cell {
    if let Some(c) = w.candidates.iter().find(|c| c.in_use) {
        return Cell::Verdict(c.judgement.verdict.word().into());
    }
    if w.barred.iter().any(|b| b.in_use) {
        return Cell::Verdict("barred".into());
    }
    Cell::Empty
}

fn margin(m: Option<Margin>) -> Cell {
    Cell::number(m.map(|m| m.value), 2)
}

fn machines(content: &Content<'_, '_>) -> Sheet {
    let s = Shown::of(content.scales.units);
    let (nu, t) = (s.nu.name, s.t.name);
    let mut rows = Vec::new();
    for w in content.weighed() {
        let p = w.point;
        let best = w.candidates.first();
        let mut row = point_cells(p).to_vec();
        row.push(Cell::maybe(p.title.as_deref()));
        row.push(Cell::maybe(p.area.as_deref()));
        row.push(Cell::number(p.register_row.map(f64::from), 0));
        row.push(Cell::number(Some(f64::from(p.count)), 0));
        row.push(Cell::maybe(p.lubrication.as_ref().map(|l| l.value.word())));
        row.push(fill(p, s.volume));
        for end in [true, false] {
            let ambient = p.ambient.as_ref().and_then(Stated::known).map(|g| g.value);
            let kelvin = ambient.map(|b| if end { b.lo.base() } else { b.hi.base() });
            row.push(Cell::number(kelvin.map(|k| s.t.from_base(k)), 1));
        }
        for end in [End::HotFloor, End::StartCeiling] {
            row.extend(governing(w, end, &s));
        }
        row.push(Cell::text(oil_now(p)));
        row.push(verdict_now(w));
        row.push(Cell::maybe(
            best.map(|c| content.scales.site.oils[c.oil].id.as_str()),
        ));
        row.push(best.map_or(Cell::Empty, |c| {
            Cell::Verdict(c.judgement.verdict.word().into())
        }));
        row.push(best.map_or(Cell::Empty, |c| margin(c.judgement.hot)));
        row.push(best.map_or(Cell::Empty, |c| margin(c.judgement.cold)));
        row.push(best.map_or(Cell::Empty, |c| Cell::text(c.because.join("; "))));
        row.push(Cell::text(
            p.notes
                .join(" ")
                .split_whitespace()
                .collect::<Vec<_>>()
                .join(" "),
        ));
        rows.push(row);
    }
    Sheet {
        name: "Machines",
        columns: columns(&[
            ("Machine", "", 14.0),
            ("Point", "", 12.0),
            ("Name", "", 36.0),
            ("Area", "", 18.0),
            ("Register row", "", 8.0),
            ("Count", "", 7.0),
            ("Lubrication", "", 12.0),
            ("Fill", s.volume.name, 9.0),
            ("Ambient min", t, 9.0),
            ("Ambient max", t, 9.0),
            ("Floor", nu, 10.0),
            ("Floor at", t, 9.0),
            ("Floor set by", "", 28.0),
            ("Greatest at start", nu, 10.0),
            ("Start at", t, 9.0),
            ("Start set by", "", 28.0),
            ("Oil now", "", 12.0),
            ("Verdict now", "", 11.0),
            ("Oil proposed", "", 12.0),
            ("Verdict", "", 9.0),
            ("Hot margin", "VG step", 9.0),
            ("Cold margin", "VG step", 9.0),
            ("Because", "", 60.0),
            ("Notes", "", 60.0),
        ]),
        rows,
    }
}

fn fill(p: &Point, unit: &Unit) -> Cell {
    use crate::model::machine::Fill;
    match p.fill.as_ref().and_then(Stated::known).map(|g| g.value) {
        Some(Fill::Oil(volume)) => Cell::number(Some(unit.from_base(volume.base())), 1),
        Some(Fill::Grease(mass)) => Cell::text(quantity(mass.amount(), Units::Si, Toward::Nearest)),
        None => Cell::Empty,
    }
}

/// Limit, its temperature and what sets it, of the governing demand of an end.
fn governing(w: &Weighed<'_>, end: End, s: &Shown) -> [Cell; 3] {
    let middle = &w.demands.middle;
    let Some(d) = middle.governing(end).and_then(|i| middle.list.get(i)) else {
        return [Cell::Empty, Cell::Empty, Cell::Empty];
    };
    let t = middle.governing_temperature(d);
    let limit = limit_amount(d, t).filter(|a| a.kind == Kind::KinematicViscosity);
    let part = d
        .part
        .as_ref()
        .map(|p| format!("{p}: "))
        .unwrap_or_default();
    [
        Cell::number(limit.map(|a| s.nu.from_base(a.base)), 1),
        Cell::number(t.map(|t| s.t.from_base(t)), 1),
        Cell::text(format!("{part}{}", d.says)),
    ]
}

fn pairs(content: &Content<'_, '_>) -> Sheet {
    let s = Shown::of(content.scales.units);
    let (nu, t) = (s.nu.name, s.t.name);
    let mut rows = Vec::new();
    for w in content.weighed() {
        for c in &w.candidates {
            rows.push(pair(content, w, c, &s));
        }
        for b in &w.barred {
            let mut row = pair_head(content, w, b.oil, b.in_use, "barred");
            row.extend((0..10).map(|_| Cell::Empty));
            row.push(Cell::Empty);
            row.push(Cell::text(
                b.by.iter()
                    .map(|c| format!("{}: {}", c.rule, c.says))
                    .collect::<Vec<_>>()
                    .join("; "),
            ));
            rows.push(row);
        }
    }
    Sheet {
        name: "Every oil on every machine",
        columns: columns(&[
            ("Machine", "", 14.0),
            ("Point", "", 12.0),
            ("Oil", "", 12.0),
            ("In use", "", 7.0),
            ("Verdict", "", 9.0),
            ("Hot margin", "VG step", 9.0),
            ("Cold margin", "VG step", 9.0),
            ("Above the pour point limit", "K", 10.0),
            ("Below the oil limit", "K", 10.0),
            ("Viscosity running", nu, 10.0),
            ("Running at", t, 9.0),
            ("Viscosity at start", nu, 11.0),
            ("Start at", t, 9.0),
            ("Holds from", t, 9.0),
            ("Holds to", t, 9.0),
            ("Conditions", "", 40.0),
            ("Because", "", 60.0),
        ]),
        rows,
    }
}

fn pair_head(
    content: &Content<'_, '_>,
    w: &Weighed<'_>,
    oil: usize,
    in_use: bool,
    verdict: &str,
) -> Vec<Cell> {
    let [machine, point] = point_cells(w.point);
    vec![
        machine,
        point,
        Cell::text(content.scales.site.oils[oil].id.clone()),
        Cell::text(if in_use { "yes" } else { "no" }),
        Cell::Verdict(verdict.to_owned()),
    ]
}

fn pair(content: &Content<'_, '_>, w: &Weighed<'_>, c: &Candidate, s: &Shown) -> Vec<Cell> {
    let j = &c.judgement;
    let mut row = pair_head(content, w, c.oil, c.in_use, j.verdict.word());
    row.extend([margin(j.hot), margin(j.cold)]);
    row.extend([j.pour, j.oil].map(|m| Cell::number(m.map(|m| m.value), 1)));
    for at in [j.at_hot, j.at_start] {
        row.push(Cell::number(at.map(|a| s.nu.from_base(a.nu)), 1));
        row.push(Cell::number(at.map(|a| s.t.from_base(a.t)), 1));
    }
    let nowhere = j.band.is_nowhere();
    for end in [j.band.low_end(), j.band.high_end()] {
        row.push(Cell::number(
            end.filter(|_| !nowhere).map(|t| s.t.from_base(t)),
            1,
        ));
    }
    row.push(Cell::text(
        c.conditions
            .iter()
            .map(|c| format!("{}: {}", c.rule, c.act))
            .collect::<Vec<_>>()
            .join("; "),
    ));
    row.push(Cell::text(c.because.join("; ")));
    row
}

/// The gaps in their order, as `gaps -f csv` has them.
fn gaps(content: &Content<'_, '_>) -> Sheet {
    let table = table_of(content.scales, content.points, &ranked(content.points));
    of_table("Gaps", table)
}

/// A table as a sheet: the unit at the end of a heading stands below it.
fn of_table(name: &'static str, table: csv::Table) -> Sheet {
    let wide = |heading: &str| match heading {
        "ask" | "because" | "says" => 60.0,
        "missing" | "part" | "verdicts" | "proposed" | "causes" => 28.0,
        _ => 14.0,
    };
    let column = |heading: &String| {
        const UNITS: [(&str, &str); 3] = [
            ("_vg_step", "VG step"),
            ("_mm2_s", "mm2/s"),
            ("_percent", "%"),
        ];
        let found = UNITS
            .iter()
            .find_map(|(end, unit)| Some((heading.strip_suffix(end)?, *unit)));
        let (words, unit) = found.unwrap_or((heading.as_str(), ""));
        let mut words = words.replace('_', " ");
        if let Some(first) = words.get_mut(..1) {
            first.make_ascii_uppercase();
        }
        (words, unit.to_owned(), wide(heading))
    };
    Sheet {
        name,
        columns: table.headings.iter().map(column).collect(),
        rows: table
            .rows
            .into_iter()
            .map(|row| row.into_iter().map(of_csv).collect())
            .collect(),
    }
}

fn of_csv(cell: csv::Cell) -> Cell {
    match cell {
        csv::Cell::Text(text) => Cell::Text(text),
        csv::Cell::Number(x) => {
            let whole = (x - x.round()).abs() < f64::EPSILON;
            Cell::Number(x, if whole { 0 } else { 2 })
        }
        csv::Cell::Empty => Cell::Empty,
    }
}

fn samples(content: &Content<'_, '_>) -> Sheet {
    match &content.samples {
        Some(table) => of_table("Samples", table.clone()),
        None => Sheet {
            name: "Samples",
            columns: columns(&[("Sample", "", 14.0), ("State", "", 60.0)]),
            rows: vec![vec![Cell::Empty, Cell::text("no samples were read")]],
        },
    }
}
