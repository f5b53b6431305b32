//! `weigh`: candidate oils against what machines need.

use crate::cli::exit::Exit;
use crate::cli::load::Loaded;
use crate::cli::session::Session;
use crate::cli::text_of::scatter::told;
use crate::cli::text_of::weigh::{Style, one};
use crate::cli::{AsState, Format, Gate, Weigh};
use crate::decide::scatter::scatter;
use crate::judge::Verdict;
use crate::model::Point;
use crate::results::weigh::{Scatters, document_of, table_of};
use crate::weighing::{Scales, Settings, Weighed};

/// Runs `weigh`.
pub fn weigh(session: &mut Session<'_>, args: &Weigh) -> Exit {
    let mut loaded = match session.load(&[]) {
        Ok(loaded) => loaded,
        Err(exit) => return exit,
    };
    if let Some(band) = &args.band
        && let Err(exit) = loaded.set_ambient(session, band)
    {
        return exit;
    }
    let settings = match session.settings(args.state == AsState::Worn) {
        Ok(settings) => settings,
        Err(exit) => return exit,
    };
    match run(session, args, &loaded, settings) {
        Ok(exit) | Err(exit) => exit,
    }
}

fn run(
    session: &mut Session<'_>,
    args: &Weigh,
    loaded: &Loaded,
    settings: Settings,
) -> Result<Exit, Exit> {
    let points = session.points(&loaded.site, &args.tags)?;
    let wanted = session.oils(&loaded.site, &args.oil)?;
    let scales = Scales::new(&loaded.site, &loaded.rules, settings)
        .map_err(|(oil, misfit)| session.misfit(&oil, &misfit))?;
    let mut all: Vec<Weighed<'_>> = points
        .into_iter()
        .map(|p: &Point| scales.weigh(p))
        .collect();
    let tripped = args_gate(session)
        .is_some_and(|gate| all.iter().any(|w| trips(w, gate, wanted.as_deref())));
    for w in &mut all {
        w.candidates
            .retain(|c| wanted.as_ref().is_none_or(|o| o.contains(&c.oil)));
        w.barred
            .retain(|b| wanted.as_ref().is_none_or(|o| o.contains(&b.oil)));
        if args.now {
            w.candidates.retain(|c| c.in_use);
            w.barred.retain(|b| b.in_use);
        }
    }
    let scatters = match args.scatter {
        Some(cases) => sampled(session, &scales, &all, cases)?,
        None => Scatters::new(),
    };
    let exit = print(session, &scales, loaded, &all, &scatters);
    Ok(if exit == Exit::Done && tripped {
        Exit::Gate
    } else {
        exit
    })
}

/// Most cases sampled for one oil.
const MOST_CASES: u32 = 1_000_000;

/// Samples every oil that is printed.
fn sampled(
    session: &mut Session<'_>,
    scales: &Scales<'_>,
    all: &[Weighed<'_>],
    cases: u32,
) -> Result<Scatters, Exit> {
    if cases == 0 || cases > MOST_CASES {
        session.fail(&format!(
            "--scatter {cases} is not a number of cases from 1 to {MOST_CASES}\n  write  --scatter 1000"
        ));
        return Err(Exit::Usage);
    }
    let mut found = Scatters::new();
    for (n, w) in all.iter().enumerate() {
        for c in &w.candidates {
            if let Some(s) = scatter(scales, w, c.oil, cases) {
                found.insert((n, c.oil), s);
            }
        }
    }
    Ok(found)
}

fn args_gate(session: &Session<'_>) -> Option<Gate> {
    session.shared.gate
}

/// Whether the oil in use, or one asked for, is at the level or worse.
fn trips(w: &Weighed<'_>, gate: Gate, wanted: Option<&[usize]>) -> bool {
    let looked_at = |oil: usize, in_use: bool| wanted.map_or(in_use, |o| o.contains(&oil));
    let level = |v: Verdict| match v {
        Verdict::Holds => None,
        Verdict::Tight => Some(Gate::Tight),
        Verdict::Open => Some(Gate::Open),
        Verdict::Fails => Some(Gate::Fails),
    };
    w.candidates
        .iter()
        .filter(|c| looked_at(c.oil, c.in_use))
        .any(|c| level(c.judgement.verdict).is_some_and(|l| l >= gate))
        || w.barred.iter().any(|b| looked_at(b.oil, b.in_use))
}

fn print(
    session: &mut Session<'_>,
    scales: &Scales<'_>,
    loaded: &Loaded,
    all: &[Weighed<'_>],
    scatters: &Scatters,
) -> Exit {
    match session.shared.format {
        Format::Json => {
            let head = session.head(loaded);
            session.result(&document_of(scales, all, scatters, &head))
        }
        Format::Csv => session.table(&table_of(scales, all, scatters)),
        Format::Text => {
            let style = Style {
                marks: session.marks(),
                width: session.width(),
            };
            let text: Vec<String> = all
                .iter()
                .enumerate()
                .map(|(n, w)| {
                    let mut text = one(scales, w, style);
                    text.push_str(&told(scales, (n, w), scatters, style.width));
                    text
                })
                .collect();
            suggest(session, scales, all);
            session.result(&text.join("\n"))
        }
    }
}

fn suggest(session: &mut Session<'_>, scales: &Scales<'_>, all: &[Weighed<'_>]) {
    if let Some(w) = all.first()
        && let Some(best) = w.candidates.first()
    {
        let oil = &scales.site.oils[best.oil].id;
        let demo = if session.shared.demo { " --demo" } else { "" };
        session.note(&format!(
            "next: filmwright why {} {oil}{demo}",
            w.point.address()
        ));
    }
}
