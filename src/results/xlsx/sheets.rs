//! The sheets of the workbook, in their order.

use super::{Cell, Sheet, columns, inputs, write};
use crate::decide::gaps::{PointGaps, ranked};
use crate::demand::End;
use crate::judge::weigh::Margin;
use crate::model::oil::{Oil, Viscosity};
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
use crate::trace::{How, StepId};
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
    fn weighed(&self) -> impl Iterator<Item = &Weighed<'s>> {
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

struct Shown {
    nu: &'static Unit,
    t: &'static Unit,
    volume: &'static Unit,
}

impl Shown {
    fn of(units: Units) -> Self {
        Self {
            nu: unit_of(Kind::KinematicViscosity, units),
            t: unit_of(Kind::Temperature, units),
            volume: unit_of(Kind::Volume, units),
        }
    }
}

fn point_cells(point: &Point) -> [Cell; 2] {
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

fn oil_list(content: &Content<'_, '_>) -> Sheet {
    let s = Shown::of(content.scales.units);
    let site = content.scales.site;
    let rows = site
        .oils
        .iter()
        .enumerate()
        .map(|(i, oil)| oil_row(content, i, oil, &s))
        .collect();
    Sheet {
        name: "Oil list",
        columns: columns(&[
            ("Oil", "", 12.0),
            ("Name", "", 40.0),
            ("Kind", "", 11.0),
            ("Base", "", 16.0),
            ("Viscosity at 40", s.nu.name, 11.0),
            ("Viscosity at 100", s.nu.name, 11.0),
            ("Points", "", 16.0),
            ("Pour point", s.t.name, 10.0),
            ("Flash point", s.t.name, 10.0),
            ("In stock", s.volume.name, 9.0),
            ("Points that hold it today", "", 10.0),
            ("Holds or tight on", "points", 10.0),
            ("Fails on", "points", 10.0),
            ("Open on", "points", 10.0),
            ("Barred on", "points", 10.0),
            ("Source", "", 34.0),
            ("Note", "", 40.0),
        ]),
        rows,
    }
}

fn oil_row(content: &Content<'_, '_>, index: usize, oil: &Oil, s: &Shown) -> Vec<Cell> {
    use crate::judge::Verdict;
    let curve = |t: f64| {
        let at = crate::quantity::convert::celsius(t);
        Some(s.nu.from_base(content.scales.oils[index].curves.nu_new(at).base()))
    };
    let count = |is: &dyn Fn(&Candidate) -> bool| {
        let n = content
            .weighed()
            .filter(|w| w.candidates.iter().any(|c| c.oil == index && is(c)))
            .count();
        Cell::number(Some(n as f64), 0)
    };
    let held = content
        .weighed()
        .filter(|w| matches!(&w.point.oil_now, OilNow::Oil(id) if id.value == oil.id))
        .count();
    let barred = content
        .weighed()
        .filter(|w| w.barred.iter().any(|b| b.oil == index))
        .count();
    let from = match &oil.viscosity {
        Viscosity::Points { .. } => "points",
        _ => "grade",
    };
    vec![
        Cell::text(oil.id.clone()),
        Cell::maybe(oil.name.as_deref()),
        Cell::text(oil.kind.word()),
        Cell::text(
            oil.base
                .as_ref()
                .map_or("not stated".to_owned(), |b| b.written.clone()),
        ),
        Cell::number(curve(40.0), 2),
        Cell::number(curve(100.0), 3),
        Cell::text(from),
        bound(oil.pour_point.as_ref().map(|g| g.written.as_str()), s.t),
        bound(
            oil.flash_point.as_ref().map(|(g, _)| g.written.as_str()),
            s.t,
        ),
        Cell::number(
            oil.in_stock
                .as_ref()
                .map(|g| s.volume.from_base(g.value.base())),
            0,
        ),
        Cell::number(Some(held as f64), 0),
        count(&|c| matches!(c.judgement.verdict, Verdict::Holds | Verdict::Tight)),
        count(&|c| c.judgement.verdict == Verdict::Fails),
        count(&|c| c.judgement.verdict == Verdict::Open),
        Cell::number(Some(barred as f64), 0),
        Cell::maybe(oil.source.as_deref()),
        Cell::maybe(oil.note.as_deref()),
    ]
}

/// A temperature as a number; a bound, which is none, as text.
fn bound(written: Option<&str>, unit: &Unit) -> Cell {
    let Some(written) = written else {
        return Cell::Empty;
    };
    match crate::quantity::parse::parse(
        Kind::Temperature,
        written
            .split(" COC")
            .next()
            .unwrap_or(written)
            .trim_end_matches(" PMCC"),
    ) {
        Ok(read) => Cell::number(Some(unit.from_base(read.amount.base)), 0),
        Err(_) => Cell::text(written),
    }
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
        let (words, unit) = match heading.strip_suffix("_vg_step") {
            Some(words) => (words, "VG step"),
            None => (heading.as_str(), ""),
        };
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

/// The steps behind the oil in use and the oil proposed.
fn steps(content: &Content<'_, '_>) -> Sheet {
    let mut rows = Vec::new();
    for w in content.weighed() {
        let shown = w
            .candidates
            .iter()
            .enumerate()
            .filter(|(i, c)| *i == 0 || c.in_use);
        for (_, c) in shown {
            let told = content.scales.explain(w, c);
            let mut results: Vec<StepId> = told.margins.iter().map(|e| e.step).collect();
            results.dedup();
            for step in told.trace.behind(&results) {
                rows.push(step_row(content, w, c, step, &told.trace));
            }
        }
    }
    Sheet {
        name: "Steps",
        columns: columns(&[
            ("Machine", "", 14.0),
            ("Point", "", 12.0),
            ("Oil", "", 12.0),
            ("Step", "", 7.0),
            ("What", "", 44.0),
            ("About", "", 24.0),
            ("Symbol", "", 10.0),
            ("Result", "in the next column", 12.0),
            ("Unit", "", 10.0),
            ("Formula, or value as written", "", 50.0),
            ("With", "", 30.0),
            ("Source", "", 40.0),
            ("Remarks", "", 40.0),
        ]),
        rows,
    }
}

fn step_row(
    content: &Content<'_, '_>,
    w: &Weighed<'_>,
    c: &Candidate,
    step: &crate::trace::Step,
    trace: &crate::trace::Derivation,
) -> Vec<Cell> {
    let [machine, point] = point_cells(w.point);
    let unit = unit_of(step.amount.kind, content.scales.units);
    let name = |id: &StepId| format!("s{}", id.0 + 1);
    let (formula, with, source) = match &step.how {
        How::Law { law, with } => {
            let with: Vec<String> = with
                .iter()
                .filter(|(_, id)| trace.step(*id).is_some())
                .map(|(symbol, id)| format!("{symbol} = {}", name(id)))
                .collect();
            (
                law.formula.to_owned(),
                with.join(", "),
                law.source.to_owned(),
            )
        }
        How::Given { written, origin } => (written.clone(), String::new(), origin.words()),
    };
    vec![
        machine,
        point,
        Cell::text(content.scales.site.oils[c.oil].id.clone()),
        Cell::text(name(&step.id)),
        Cell::text(step.says.to_string()),
        Cell::maybe(step.about.as_deref()),
        Cell::text(step.symbol),
        Cell::number(Some(step.amount.in_unit(unit)), 3),
        Cell::text(unit.name),
        Cell::text(formula),
        Cell::text(with),
        Cell::text(source),
        Cell::text(step.notes.join("; ")),
    ]
}

fn about(content: &Content<'_, '_>) -> Sheet {
    let frame = &content.scales.site.frame;
    let mut rows: Vec<Vec<Cell>> = Vec::new();
    let mut say = |what: &str, text: Option<String>| {
        if let Some(text) = text {
            rows.push(vec![Cell::text(what), Cell::text(text)]);
        }
    };
    say("Site", frame.site.clone());
    say("Client", frame.client.clone());
    say("Document", frame.document.clone());
    say("Revision", frame.revision.clone());
    say("Author", frame.author.clone());
    say("Status", frame.status.clone());
    say("Warning", content.warning.map(str::to_owned));
    say("Date of judgement", Some(content.head.date.clone()));
    say(
        "Program",
        Some(concat!("filmwright ", env!("CARGO_PKG_VERSION")).to_owned()),
    );
    say("Rules", Some(content.head.rules.clone()));
    say(
        "Fingerprint of all inputs and rules",
        Some(content.head.inputs.clone()),
    );
    for file in content.sources.files() {
        say("File read", Some(file.path.clone()));
    }
    for (word, means) in [
        (
            "holds",
            "every limit is met over the whole ambient band, and the reserve is kept",
        ),
        ("tight", "every limit is met, the reserve is not kept"),
        ("fails", "at least one limit is not met"),
        (
            "open",
            "an input is missing, and its plausible range lies on both sides of a limit",
        ),
        (
            "barred",
            "a suitability rule bars the oil here; it is not weighed",
        ),
        (
            "VG step",
            "one grade of ISO 3448; margins are slid along the oil's own line and read at 40 degC",
        ),
    ] {
        say(word, Some(means.to_owned()));
    }
    say(
        "Numbers",
        Some("unrounded; the number format rounds what is shown".to_owned()),
    );
    say(
        "Putting the files together again",
        Some("filmwright intake THIS.xlsx --sheet Inputs -o site.yaml; with --makes oils -o oils.yaml".to_owned()),
    );
    Sheet {
        name: "About",
        columns: columns(&[("What", "", 34.0), ("", "", 100.0)]),
        rows,
    }
}
