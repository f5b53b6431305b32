//! `need`: what a machine needs, from files or from one line.

use crate::cli::exit::Exit;
use crate::cli::session::Session;
use crate::cli::text_of::decided::ask as ask_text;
use crate::cli::text_of::need::{one, origins};
use crate::cli::{Format, Need};
use crate::decide::ask::{Ask, ask};
use crate::demand::{PointDemands, point_demands};
use crate::model::Point;
use crate::results::csv::{Cell, Table};
use crate::results::decided::{ask as ask_value, asks_table};
use crate::results::need::{document_of, table_of};
use crate::weighing::{Scales, Settings, Weighed};

/// Runs `need`.
pub fn need(session: &mut Session<'_>, args: &Need) -> Exit {
    let without_files = args.bearing.is_some() || args.gear.is_some() || args.component.is_some();
    if without_files {
        return super::need_line::need_line(session, args);
    }
    match from_files(session, args) {
        Ok(exit) | Err(exit) => exit,
    }
}

fn from_files(session: &mut Session<'_>, args: &Need) -> Result<Exit, Exit> {
    let loaded = session.load(None)?;
    if args.list && session.wants(Format::Csv) {
        let rows = loaded.site.points.iter().map(|p| {
            vec![
                Cell::from(p.machine.as_str()),
                Cell::maybe(p.point.as_deref()),
                Cell::maybe(p.title.as_deref()),
                Cell::maybe(p.area.as_deref()),
            ]
        });
        let table = Table {
            headings: ["machine", "point", "name", "area"]
                .map(str::to_owned)
                .to_vec(),
            rows: rows.collect(),
        };
        return Ok(session.table(&table));
    }
    if args.list {
        let mut lines = String::new();
        for p in &loaded.site.points {
            let title = p.title.as_deref().unwrap_or("");
            lines.push_str(format!("{}  {title}", p.address()).trim_end());
            lines.push('\n');
        }
        return Ok(session.result(&lines));
    }
    let points = session.points(&loaded.site, &args.tags)?;
    let settings = Settings {
        units: session.units(),
        ..Settings::default()
    };
    let scales = Scales::new(&loaded.site, &loaded.rules, settings)
        .map_err(|(oil, misfit)| session.misfit(&oil, &misfit))?;
    let of = points.len();
    let mut all: Vec<(&Point, PointDemands)> = Vec::with_capacity(of);
    for point in points {
        session.progress("working out points", all.len(), of);
        let demands = point_demands(point, &loaded.site.house, &loaded.rules);
        all.push((point, demands));
    }
    let asked = if args.ask {
        asked(session, &scales, &all)
    } else {
        Vec::new()
    };
    session.host.progress_end();
    Ok(match session.shared.format {
        Format::Json => {
            let head = session.head(&loaded);
            let asks: Vec<_> = asked
                .iter()
                .map(|(w, a)| ask_value(&scales, w, a))
                .collect();
            let asks = args.ask.then_some(asks);
            session.result(&document_of(&all, asks, &head, session.units()))
        }
        Format::Csv if args.ask => session.table(&asks_table(&scales, &asked)),
        Format::Csv => session.table(&table_of(&all, session.units())),
        Format::Text => {
            let width = session.width();
            let mut parts: Vec<String> = Vec::new();
            for (n, (point, demands)) in all.iter().enumerate() {
                let mut text = one(&scales, point, demands, width);
                if session.shared.verbose {
                    text.push_str(&origins(point, |place| loaded.place(place)));
                }
                if let Some((weighed, found)) = asked.get(n) {
                    text.push_str(&ask_text(&scales, weighed, found, width));
                }
                parts.push(text);
            }
            if let [(point, _)] = all.as_slice() {
                let demo = if session.shared.demo { " --demo" } else { "" };
                session.note(&format!("next: filmwright weigh {}{demo}", point.address()));
            }
            session.result(&parts.join("\n"))
        }
    })
}

/// The oil to ask for on each point.
fn asked<'a>(
    session: &mut Session<'_>,
    scales: &Scales<'a>,
    all: &[(&'a Point, PointDemands)],
) -> Vec<(Weighed<'a>, Ask)> {
    let mut asked = Vec::with_capacity(all.len());
    for (point, _) in all {
        session.progress("weighing points", asked.len(), all.len());
        let weighed = scales.weigh(point);
        let found = ask(scales, &weighed);
        asked.push((weighed, found));
    }
    asked
}
