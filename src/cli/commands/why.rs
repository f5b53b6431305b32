//! `why`: the traced steps behind one verdict.

use crate::cli::exit::Exit;
use crate::cli::session::Session;
use crate::cli::text::{folded, hanging, sentence, verdict};
use crate::cli::text_of::why::steps;
use crate::cli::{Format, Why};
use crate::quantity::show::margin;
use crate::results::json;
use crate::results::weigh::judgement;
use crate::trace::StepId;
use crate::weighing::{Barred, Candidate, Scales, Weighed};
use serde_json::Value;
use std::fmt::Write as _;

/// Runs `why`.
pub fn why(session: &mut Session<'_>, args: &Why) -> Exit {
    match run(session, args) {
        Ok(exit) | Err(exit) => exit,
    }
}

fn run(session: &mut Session<'_>, args: &Why) -> Result<Exit, Exit> {
    let loaded = session.load(None)?;
    let settings = session.settings(true)?;
    let scales = Scales::new(&loaded.site, &loaded.rules, settings)
        .map_err(|(oil, misfit)| session.misfit(&oil, &misfit))?;
    let points = session.points(&loaded.site, std::slice::from_ref(&args.tag))?;
    let oils = session
        .oils(&loaded.site, std::slice::from_ref(&args.oil))?
        .unwrap_or_default();
    let mut out = String::new();
    let mut documents = Vec::new();
    for point in points {
        let weighed = scales.weigh(point);
        for c in weighed.candidates.iter().filter(|c| oils.contains(&c.oil)) {
            documents.push(judgement(&scales, &weighed, c));
            let place = |p: &_| loaded.place(p);
            out.push_str(&told(session, &scales, &weighed, c, &place));
        }
        for b in weighed.barred.iter().filter(|b| oils.contains(&b.oil)) {
            out.push_str(&barred(session, &scales, &weighed, b));
            documents.push(crate::results::weigh::barred_row(&scales, &weighed, b));
        }
    }
    if out.is_empty() {
        session.fail(&format!(
            "{} is not weighed on {}: one is a grease and the other an oil",
            args.oil, args.tag
        ));
        return Err(Exit::NoMatch);
    }
    if session.wants(Format::Json) {
        let mut top = json::document("why", &session.head(&loaded));
        top.insert("judgements".into(), Value::Array(documents));
        return Ok(session.result(&json::text(top)));
    }
    Ok(session.result(&out))
}

fn told(
    session: &Session<'_>,
    scales: &Scales<'_>,
    w: &Weighed<'_>,
    c: &Candidate,
    place: &dyn Fn(&crate::source::place::Place) -> String,
) -> String {
    let width = session.width();
    let id = &scales.site.oils[c.oil].id;
    let mut out = format!(
        "{} with {id}: {}\n",
        w.point.address(),
        verdict(c.judgement.verdict, session.marks()).trim_start()
    );
    for reason in &c.because {
        out.push_str(&folded(reason, "  ", width));
    }
    let told = scales.explain(w, c);
    out.push_str("\n  margins\n");
    for e in &told.margins {
        let demand = &w.demands.middle.list[usize::from(e.demand)];
        let viscosity = e.nu.is_some();
        let shown = if viscosity {
            format!("{} step", margin(e.value, 2))
        } else {
            format!("{} K", margin(e.value, 1))
        };
        let step = crate::results::json::step_name(e.step);
        let _ = writeln!(out, "    {shown:<12} {} ({step})", demand.says);
    }
    for (i, condition) in c.conditions.iter().enumerate() {
        if i == 0 {
            out.push_str("\n  conditions\n");
        }
        let text = format!(
            "{} {} [{}]",
            sentence(&condition.says),
            sentence(&condition.act),
            condition.rule
        );
        out.push_str(&hanging(&format!("    {}  ", i + 1), &text, width));
    }
    out.push_str("\n  steps\n");
    let mut results: Vec<StepId> = told.margins.iter().map(|e| e.step).collect();
    results.sort();
    out.push_str(&steps(&told.trace, &results, scales.units, width, place));
    out
}

fn barred(session: &Session<'_>, scales: &Scales<'_>, w: &Weighed<'_>, b: &Barred) -> String {
    let id = &scales.site.oils[b.oil].id;
    let mut out = format!("{} with {id}: barred, no verdict\n", w.point.address());
    for by in &b.by {
        let text = format!(
            "{} {} [{}; {}]",
            sentence(&by.says),
            sentence(&by.act),
            by.rule,
            by.source
        );
        out.push_str(&folded(&text, "  ", session.width()));
    }
    out
}
