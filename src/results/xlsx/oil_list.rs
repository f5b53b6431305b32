//! The sheet of oils.

use super::sheets::{Content, Shown};
use super::{Cell, Sheet, columns};
use crate::model::OilNow;
use crate::model::oil::{Oil, Viscosity};
use crate::quantity::kind::Unit;
use crate::quantity::{Kind, Measure};
use crate::weighing::Candidate;

pub(super) fn oil_list(content: &Content<'_, '_>) -> Sheet {
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
        Viscosity::Grade(_) => "grade",
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
