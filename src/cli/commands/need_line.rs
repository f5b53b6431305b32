//! `need` without any file: one bearing, mesh or component from the command line. The values are
//! written into a site of one machine and read by the same reader.

use crate::cli::exit::Exit;
use crate::cli::session::Session;
use crate::cli::text::hanging;
use crate::cli::{Format, Need};
use crate::demand::{Demand, End, PointDemands, point_demands};
use crate::input::file::FileKind;
use crate::input::load::{self as reader, With};
use crate::problem::Problems;
use crate::quantity::Measure;
use crate::quantity::show::{Toward, quantity};
use crate::relation::bearing::designation::DimensionTable;
use crate::results::need::{document_of, limit_amount, table_of};
use crate::source::SourceSet;
use crate::trace::How;
use std::fmt::Write as _;

/// Runs `need` on what the options say.
pub fn need_line(session: &mut Session<'_>, args: &Need) -> Exit {
    match run(session, args) {
        Ok(exit) | Err(exit) => exit,
    }
}

fn run(session: &mut Session<'_>, args: &Need) -> Result<Exit, Exit> {
    let rules = session.rules(None)?;
    let text = site_text(args);
    let mut sources = SourceSet::new();
    let mut problems = Problems::new();
    let name = crate::source::COMMAND_LINE;
    let tree = reader::take(
        &mut sources,
        FileKind::Site,
        name,
        text.as_bytes(),
        &mut problems,
    );
    let with = With {
        rules: &rules,
        bearings: DimensionTable::built_in(),
        calculated: &[],
    };
    let site = reader::load(&sources, &[tree], &with, &[], &mut problems);
    let Ok(site) = site else {
        return Err(session.told(&sources, &problems));
    };
    let point = &site.points[0];
    let demands = point_demands(point, &site.house, &rules);
    Ok(match session.shared.format {
        Format::Json => {
            let head = session.head_of(&site, &text);
            session.result(&document_of(
                &[(point, demands)],
                None,
                &head,
                session.units(),
            ))
        }
        Format::Csv => session.table(&table_of(&[(point, demands)], session.units())),
        Format::Text => {
            let out = answer(session, &demands, args);
            session.result(&out)
        }
    })
}

/// The options as a site file.
fn site_text(args: &Need) -> String {
    let mut text = String::from("file: site 1\nmachines:\n  command line:\n");
    if let Some(sump) = &args.sump {
        let _ = writeln!(text, "    sump: held at {sump}");
    }
    if let Some(start) = &args.start {
        let _ = writeln!(text, "    start: {start}");
    }
    text.push_str("    parts:\n");
    let mut part = |key: &str, value: &str, speed: Option<(&str, &String)>| {
        let _ = writeln!(text, "      - {key}: {value}");
        if let Some((key, speed)) = speed {
            let _ = writeln!(text, "        {key}: {speed}");
        }
    };
    if let Some(bearing) = &args.bearing {
        part(
            "rolling bearing",
            &size(bearing),
            args.speed.as_ref().map(|s| ("speed", s)),
        );
    }
    if let Some(gear) = &args.gear {
        part("gear mesh", "as stated", Some(("pitch-line speed", gear)));
    }
    if let Some(component) = &args.component {
        part("component", component, None);
    }
    text
}

/// A designation, or `100x180 mm` as a size.
fn size(bearing: &str) -> String {
    let plain = bearing.trim().trim_end_matches("mm").trim();
    match plain.split_once(['x', 'X', '\u{d7}']) {
        Some((bore, outside))
            if bore.trim().parse::<f64>().is_ok() && outside.trim().parse::<f64>().is_ok() =>
        {
            format!(
                "{{ bore: {} mm, outside: {} mm }}",
                bore.trim(),
                outside.trim()
            )
        }
        _ => bearing.to_owned(),
    }
}

fn answer(session: &Session<'_>, demands: &PointDemands, args: &Need) -> String {
    let units = session.units();
    let governing = demands
        .middle
        .list
        .iter()
        .enumerate()
        .filter(|(i, d)| d.end == End::HotFloor && governs_without_temperature(demands, *i, d));
    let mut out = String::new();
    for (_, demand) in governing {
        let Some(limit) = limit_amount(demand, None)
            .or_else(|| limit_amount(demand, demands.middle.governing_temperature(demand)))
        else {
            continue;
        };
        let temperature = match demands.middle.governing_temperature(demand) {
            Some(t) => quantity(
                crate::quantity::ThermodynamicTemperature::from_base(t).amount(),
                units,
                Toward::Nearest,
            ),
            None => "running temperature".to_owned(),
        };
        let _ = writeln!(
            out,
            "needs at least {} at {temperature}\n",
            quantity(limit, units, Toward::Up)
        );
        let width = session.width();
        out.push_str(&hanging("  set by   ", &demand.asks(), width));
        let mut lead = "  rule     ";
        for line in formulas(demands, demand) {
            out.push_str(&hanging(lead, &line, width));
            lead = "           ";
        }
        out.push_str(&hanging("  source   ", &demand.source, width));
    }
    if out.is_empty() {
        out.push_str("nothing can be worked out from this\n\n");
        for u in &demands.middle.undecided {
            let _ = writeln!(out, "  missing  {}", u.because);
        }
    }
    let mut absent = Vec::new();
    if args.sump.is_none() {
        absent.push("running temperature: add --sump");
    }
    if args.start.is_none() {
        absent.push("cold start: add --start");
    }
    if !absent.is_empty() {
        out.push_str(&hanging("  not in   ", &absent.join(", "), session.width()));
    }
    out
}

/// Where the sump is not given, no demand has a temperature; the highest floor then speaks.
fn governs_without_temperature(demands: &PointDemands, i: usize, demand: &Demand) -> bool {
    if demands.middle.governing(End::HotFloor).is_some() {
        return demands.middle.governing(End::HotFloor) == Some(i);
    }
    let figure = |d: &Demand| limit_amount(d, None).map_or(0.0, |a| a.base);
    let mine = figure(demand);
    mine > 0.0
        && demands
            .middle
            .list
            .iter()
            .filter(|d| d.end == End::HotFloor)
            .all(|d| figure(d) <= mine)
}

/// The formulas behind a limit with their numbers put in.
fn formulas(demands: &PointDemands, demand: &Demand) -> Vec<String> {
    let fixed = || vec!["a fixed limit".to_owned()];
    let Some(step) = demand.limit_step.and_then(|s| demands.trace.step(s)) else {
        return fixed();
    };
    let mut shown = Vec::new();
    for step in demands.trace.behind(&[step.id]) {
        if let How::Law { law, with } = &step.how {
            let inputs: Vec<String> = with
                .iter()
                .filter_map(|(symbol, id)| {
                    let amount = demands.trace.step(*id)?.amount;
                    Some(format!(
                        "{symbol} = {}",
                        quantity(amount, crate::quantity::show::Units::Si, Toward::Nearest)
                    ))
                })
                .collect();
            shown.push(format!("{} with {}", law.formula, inputs.join(", ")));
        }
    }
    if shown.is_empty() {
        return fixed();
    }
    shown
}
