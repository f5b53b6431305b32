//! `labels`: text for the labels at the fill points.

use crate::cli::exit::Exit;
use crate::cli::session::Session;
use crate::cli::text_of::labels::{Foot, text};
use crate::cli::{Format, Labels};
use crate::report::build::{Options, Run};
use crate::report::model::FillLabel;
use crate::results::csv::{Cell, Table};
use crate::results::json;
use crate::weighing::Scales;
use serde_json::json;

/// Runs `labels`.
pub fn labels(session: &mut Session<'_>, args: &Labels) -> Exit {
    match run(session, args) {
        Ok(exit) | Err(exit) => exit,
    }
}

fn run(session: &mut Session<'_>, args: &Labels) -> Result<Exit, Exit> {
    let loaded = session.load(None)?;
    let settings = session.settings(true)?;
    let points = session.points(&loaded.site, &args.tags)?;
    let scales = Scales::new(&loaded.site, &loaded.rules, settings)
        .map_err(|(oil, misfit)| session.misfit(&oil, &misfit))?;
    let head = session.head(&loaded);
    let foot = Foot {
        document: loaded.site.frame.document.clone(),
        revision: loaded.site.frame.revision.clone(),
        date: head.date.clone(),
    };
    let run = Run::new(&scales, &loaded.sources, head, Options::default());
    let all: Vec<FillLabel> = points
        .into_iter()
        .map(|p| run.label(&scales.weigh(p)))
        .collect();
    for label in all.iter().filter(|l| l.oil.is_none()) {
        session.note(&format!(
            "no label for {}: no oil is proposed there. See: filmwright weigh {}",
            label.address, label.address
        ));
    }
    let head = session.head(&loaded);
    Ok(match session.shared.format {
        Format::Text => session.result(&text(&all, &foot)),
        Format::Json => {
            let mut top = json::document("labels", &head);
            top.insert("labels".into(), json!(all));
            session.result(&json::text(top))
        }
        Format::Csv => session.table(&table(&all)),
    })
}

/// One row a label, for a label printer of one's own.
fn table(all: &[FillLabel]) -> Table {
    let headings = [
        "machine",
        "name",
        "oil",
        "oil_name",
        "fill",
        "count",
        "remove_first",
        "conditions",
    ];
    Table {
        headings: headings.map(str::to_owned).to_vec(),
        rows: all
            .iter()
            .filter(|l| l.oil.is_some())
            .map(|l| {
                vec![
                    Cell::from(l.address.as_str()),
                    Cell::from(l.title.as_str()),
                    Cell::maybe(l.oil.as_deref()),
                    Cell::from(l.oil_name.as_str()),
                    Cell::maybe(l.fill.as_deref()),
                    Cell::number(Some(f64::from(l.count))),
                    Cell::maybe(l.remove.as_deref()),
                    Cell::number(u32::try_from(l.conditions).ok().map(f64::from)),
                ]
            })
            .collect(),
    }
}
