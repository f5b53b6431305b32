//! `weigh`: candidate oils against what machines need.

use crate::cli::exit::Exit;
use crate::cli::load::Loaded;
use crate::cli::session::Session;
use crate::cli::text_of::decided::season;
use crate::cli::text_of::scatter::told;
use crate::cli::text_of::weigh::{Style, one};
use crate::cli::{AsState, Format, Gate, Weigh};
use crate::decide::scatter::scatter;
use crate::decide::season::pair;
use crate::judge::Verdict;
use crate::model::Point;
use crate::results::weigh::{Scatters, Seasons, document_of, table_of};
use crate::weighing::{Scales, Settings, Weighed};

/// Runs `weigh`.
pub fn weigh(session: &mut Session<'_>, args: &Weigh) -> Exit {
    let mut loaded = match session.load(None) {
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
    let of = points.len();
    let mut all: Vec<Weighed<'_>> = Vec::with_capacity(of);
    for point in points {
        let point: &Point = point;
        all.push(scales.weigh(point));
        session.progress("weighing points", all.len(), of);
    }
    session.host.progress_end();
    let tripped: Vec<String> = session.shared.gate.map_or_else(Vec::new, |gate| {
        all.iter()
            .flat_map(|w| trips(&scales, w, gate, wanted.as_deref()))
            .collect()
    });
    let seasons = seasons(&scales, &all, args.now || wanted.is_some());
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
    let found = Found {
        all: &all,
        scatters: &scatters,
        seasons: &seasons,
    };
    let exit = print(session, &scales, loaded, found, settings);
    if exit != Exit::Done || tripped.is_empty() {
        return Ok(exit);
    }
    let more = match tripped.len() {
        n if n > GATE_NAMED => format!(" and {} more", n - GATE_NAMED),
        _ => String::new(),
    };
    let named = &tripped[..tripped.len().min(GATE_NAMED)];
    session.note(&format!("gate tripped: {}{more}", named.join(", ")));
    Ok(Exit::Gate)
}

/// Samples every oil that is printed.
fn sampled(
    session: &mut Session<'_>,
    scales: &Scales<'_>,
    all: &[Weighed<'_>],
    cases: u32,
) -> Result<Scatters, Exit> {
    let cases = session.cases(cases)?;
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

/// So many oils are named when a gate is tripped; the table has them all.
const GATE_NAMED: usize = 5;

/// The oils in use, or those asked for, that are at the level or worse: `GB-1 GEAR-220 fails`.
fn trips(
    scales: &Scales<'_>,
    w: &Weighed<'_>,
    gate: Gate,
    wanted: Option<&[usize]>,
) -> Vec<String> {
    let looked_at = |oil: usize, in_use: bool| wanted.map_or(in_use, |o| o.contains(&oil));
    let level = |v: Verdict| match v {
        Verdict::Holds => None,
        Verdict::Tight => Some(Gate::Tight),
        Verdict::Open => Some(Gate::Open),
        Verdict::Fails => Some(Gate::Fails),
    };
    let named = |oil: usize, word: &str| {
        format!("{} {} {word}", w.point.address(), scales.site.oils[oil].id)
    };
    let judged = w
        .candidates
        .iter()
        .filter(|c| looked_at(c.oil, c.in_use))
        .filter(|c| level(c.judgement.verdict).is_some_and(|l| l >= gate))
        .map(|c| {
            let verdict = c.judgement.verdict.word();
            let is = if matches!(c.judgement.verdict, Verdict::Fails) {
                ""
            } else {
                "is "
            };
            named(c.oil, &format!("{is}{verdict}"))
        });
    let barred = w.barred.iter().filter(|b| looked_at(b.oil, b.in_use));
    judged
        .chain(barred.map(|b| named(b.oil, "is barred")))
        .collect()
}

/// The pairs by season, where no single oil holds and all oils were weighed.
fn seasons(scales: &Scales<'_>, all: &[Weighed<'_>], only_some: bool) -> Seasons {
    if only_some {
        return Seasons::new();
    }
    let pairs = all.iter().enumerate();
    pairs
        .filter_map(|(n, w)| Some((n, pair(scales, w)?)))
        .collect()
}

/// Everything to be printed.
#[derive(Clone, Copy)]
struct Found<'f, 'a> {
    all: &'f [Weighed<'a>],
    scatters: &'f Scatters,
    seasons: &'f Seasons,
}

fn print(
    session: &mut Session<'_>,
    scales: &Scales<'_>,
    loaded: &Loaded,
    found: Found<'_, '_>,
    settings: Settings,
) -> Exit {
    let Found {
        all,
        scatters,
        seasons,
    } = found;
    match session.shared.format {
        Format::Json => {
            let mut head = session.head(loaded);
            head.files = session.carried(loaded);
            head.reserve = settings.reserve;
            head.as_new = !settings.worn;
            let mut parts = document_of(scales, all, scatters, seasons, &head);
            session.result_in_parts(&mut parts)
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
                    if let Some(pair) = seasons.get(&n) {
                        text.push_str(&season(scales, pair, style.width));
                    }
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
