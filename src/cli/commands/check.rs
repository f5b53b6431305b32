//! `check`: reads all files, reports, runs nothing but the verdicts the user expects.

use crate::cli::Format;
use crate::cli::exit::Exit;
use crate::cli::load::Loaded;
use crate::cli::session::Session;
use crate::results::csv::{Cell, Table};
use crate::weighing::{Scales, Settings, Weighed};
use std::fmt::Write as _;

/// Runs `check`.
pub fn check(session: &mut Session<'_>) -> Exit {
    let mut loaded = match session.load(None) {
        Ok(loaded) => loaded,
        Err(exit) => return exit,
    };
    if let Err(exit) = session.bottles(&mut loaded, None) {
        return exit;
    }
    let site = &loaded.site;
    let mut unmet = Vec::new();
    if !site.expect.is_empty() {
        let settings = Settings {
            units: session.units(),
            ..Settings::default()
        };
        let scales = match Scales::new(site, &loaded.rules, settings) {
            Ok(scales) => scales,
            Err((oil, misfit)) => return session.misfit(&oil, &misfit),
        };
        for expected in &site.expect {
            let address = &expected.machine.value;
            for point in site.points.iter().filter(|p| p.address() == *address) {
                let weighed = scales.weigh(point);
                let is = word_of(&scales, &weighed, &expected.oil.value);
                if is != expected.verdict.value {
                    let place = loaded.place(&expected.verdict.origin.place);
                    unmet.push(format!(
                        "{place}: {address} with {}: {} expected, it is {is}",
                        expected.oil.value, expected.verdict.value
                    ));
                }
            }
        }
    }
    if session.wants(Format::Json) {
        let text = loaded.problems_json(&unmet);
        session.result(&text);
    } else if session.wants(Format::Csv) {
        session.table(&table(&loaded, &unmet));
    } else {
        let mut text = format!(
            "{} with {}, {} read\n",
            counted(loaded.machines(), "machine"),
            counted(site.points.len(), "lubrication point"),
            counted(site.oils.len(), "oil")
        );
        for line in &unmet {
            let _ = writeln!(text, "not as expected  {line}");
        }
        session.result(&text);
    }
    if unmet.is_empty() {
        Exit::Done
    } else {
        Exit::Input
    }
}

/// Problems and unmet expectations as a table.
fn table(loaded: &Loaded, unmet: &[String]) -> Table {
    let maybe = |t: &Option<String>| Cell::maybe(t.as_deref());
    let mut rows: Vec<Vec<Cell>> = loaded
        .problems
        .sorted()
        .into_iter()
        .map(|p| {
            vec![
                Cell::from(p.severity.word()),
                Cell::from(p.code.as_str()),
                Cell::from(loaded.place(&p.place).as_str()),
                maybe(&p.within),
                Cell::from(p.message.as_str()),
                maybe(&p.why),
            ]
        })
        .collect();
    rows.extend(unmet.iter().map(|line| {
        let mut row = vec![Cell::from("not as expected")];
        row.extend([Cell::Empty, Cell::Empty, Cell::Empty]);
        row.extend([Cell::from(line.as_str()), Cell::Empty]);
        row
    }));
    let headings = ["severity", "name", "place", "within", "message", "why"];
    Table {
        headings: headings.map(str::to_owned).to_vec(),
        rows,
    }
}

/// The word of one oil on a weighed point.
pub fn word_of(scales: &Scales<'_>, weighed: &Weighed<'_>, oil: &str) -> String {
    let is = |i: usize| scales.site.oils[i].id == oil;
    if let Some(c) = weighed.candidates.iter().find(|c| is(c.oil)) {
        return c.judgement.verdict.word().to_owned();
    }
    if weighed.barred.iter().any(|b| is(b.oil)) {
        return "barred".to_owned();
    }
    "not weighed".to_owned()
}

fn counted(n: usize, of: &str) -> String {
    let s = if n == 1 { "" } else { "s" };
    format!("{n} {of}{s}")
}
