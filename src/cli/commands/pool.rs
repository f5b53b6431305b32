//! `pool`: the shortest oil list.

use crate::cli::exit::Exit;
use crate::cli::load::Loaded;
use crate::cli::session::Session;
use crate::cli::text_of::pool::{Style, text};
use crate::cli::{Format, Pool as Args};
use crate::decide::pool::figures::{Pool, pool as work_out};
use crate::decide::pool::{Impossible, Outcome, Terms};
use crate::results::pool::{Asked, document_of, table_of};
use crate::weighing::{Scales, Weighed};

/// Runs `pool`.
pub fn pool(session: &mut Session<'_>, args: &Args) -> Exit {
    match run(session, args) {
        Ok(exit) | Err(exit) => exit,
    }
}

fn run(session: &mut Session<'_>, args: &Args) -> Result<Exit, Exit> {
    let loaded = session.load(None)?;
    let settings = session.settings(true)?;
    let points = session.points(&loaded.site, &args.tags)?;
    let terms = terms(session, args, &loaded)?;
    let scales = Scales::new(&loaded.site, &loaded.rules, settings)
        .map_err(|(oil, misfit)| session.misfit(&oil, &misfit))?;
    let weighed: Vec<Weighed<'_>> = points.into_iter().map(|p| scales.weigh(p)).collect();
    let on = session.date(loaded.site.frame.reviewed.as_deref());
    let found = work_out(&scales, &weighed, &terms, &on).map_err(|wrong| {
        session.fail(&format!(
            "the list does not stand its own check: {wrong}\n  please report it with the site's files"
        ));
        Exit::Defect
    })?;
    let asked = Asked {
        terms: &terms,
        site_price: args.site_price,
    };
    if loaded.site.oils.is_empty() {
        session.fail(
            "no list can be made: the oil list holds no oil  [nothing-to-weigh]\n  write  oils.yaml with the oils that may be used",
        );
        return Err(Exit::NoMatch);
    }
    if found.places.is_empty() {
        session.fail(
            "no machine can be decided: no oil holds or is tight on any of them  [nothing-decided]\n  write  see why: filmwright weigh",
        );
        return Err(Exit::NoMatch);
    }
    idle(session, &scales, &found, &terms);
    let printed = print(session, &scales, &loaded, &found, &asked);
    Ok(match &found.outcome {
        Outcome::Impossible(why) => {
            impossible(session, &scales, &found, &asked, why);
            if printed == Exit::Done {
                Exit::NoMatch
            } else {
                printed
            }
        }
        _ => printed,
    })
}

fn terms(session: &mut Session<'_>, args: &Args, loaded: &Loaded) -> Result<Terms, Exit> {
    let site = &loaded.site;
    let keep = session.oils(site, &args.keep)?.unwrap_or_default();
    let drop = session.oils(site, &args.drop)?.unwrap_or_default();
    if let Some(both) = keep.iter().find(|o| drop.contains(o)) {
        session.fail(&format!(
            "{} is both kept and dropped  [list-impossible]\n  write  --keep or --drop, not both",
            site.oils[*both].id
        ));
        return Err(Exit::Usage);
    }
    if args.site_price.is_some_and(|p| !p.is_finite() || p < 0.0) {
        session
            .fail("--site-price is a sum of money a year, not negative\n  write  --site-price 250");
        return Err(Exit::Usage);
    }
    if args.at_most == Some(0) {
        session.fail("--at-most 0 leaves no oil at all  [list-impossible]\n  write  --at-most 8");
        return Err(Exit::Usage);
    }
    Ok(Terms {
        keep,
        drop,
        at_most: args.at_most,
        never_tight: args.never_tight,
        nodes: args.nodes,
    })
}

/// Warns of oils that are kept and that no machine can take.
fn idle(session: &mut Session<'_>, scales: &Scales<'_>, found: &Pool<'_, '_>, terms: &Terms) {
    for oil in &terms.keep {
        let mut all = found.places.iter().flat_map(|p| terms.offers(p));
        if all.any(|o| o.oil == *oil) {
            continue;
        }
        let of = |w: &&Weighed<'_>| w.barred.iter().any(|b| b.oil == *oil);
        let barred = found.weighed.iter().filter(of).count();
        let id = &scales.site.oils[*oil].id;
        session.note(&format!(
            "warning: {id} is kept and serves nothing: it is barred on {barred} of {} points and neither holds nor is tight on the others  [keep-idle]\n  write  pool without --keep {id}, or see why: filmwright weigh --oil {id}",
            found.weighed.len()
        ));
    }
}

/// Machines or options named in a message; more are counted.
const NAMED: usize = 6;

fn some(all: &[String], between: &str) -> String {
    let shown = all[..all.len().min(NAMED)].join(between);
    match all.len() {
        n if n > NAMED => format!("{shown} and {} more", n - NAMED),
        _ => shown,
    }
}

fn print(
    session: &mut Session<'_>,
    scales: &Scales<'_>,
    loaded: &Loaded,
    found: &Pool<'_, '_>,
    asked: &Asked<'_>,
) -> Exit {
    match session.shared.format {
        Format::Json => {
            let head = session.head(loaded);
            session.result(&document_of(scales, found, asked, &head))
        }
        Format::Csv => session.table(&table_of(scales, found)),
        Format::Text => {
            if matches!(found.outcome, Outcome::Impossible(_)) {
                return Exit::Done;
            }
            let style = Style {
                marks: session.marks(),
                width: session.width(),
            };
            let told = text(scales, found, asked, style);
            if let Some(place) = tightest(scales, found) {
                let demo = if session.shared.demo { " --demo" } else { "" };
                session.note(&format!("next: filmwright why {place}{demo}"));
            }
            session.result(&told)
        }
    }
}

/// The point with the smallest margin on the list, with its oil.
fn tightest(scales: &Scales<'_>, found: &Pool<'_, '_>) -> Option<String> {
    let solved = found.solved()?;
    let least = solved
        .picks
        .iter()
        .filter_map(|p| {
            let c = found.candidate(p.place, p.offer.oil)?;
            Some((crate::decide::pool::figures::smallest(&c.judgement)?, p))
        })
        .min_by(|a, b| a.0.total_cmp(&b.0))?;
    let pick = least.1;
    let point = found.point(pick.place);
    let oil = &scales.site.oils[pick.offer.oil].id;
    Some(format!("{} {oil}", point.point.address()))
}

/// Why there is no list, and what would give one.
fn impossible(
    session: &mut Session<'_>,
    scales: &Scales<'_>,
    found: &Pool<'_, '_>,
    asked: &Asked<'_>,
    why: &Impossible,
) {
    match why {
        Impossible::Unserved(places) => {
            let named: Vec<String> = places
                .iter()
                .map(|p| found.point(*p).point.address())
                .collect();
            let noun = if named.len() == 1 { "has" } else { "have" };
            let terms = in_words(scales, asked.terms);
            session.fail(&format!(
                "no list serves every machine: {} {noun} no oil left with {terms}  [list-impossible]\n  write  leave that out, or find what would make an oil hold: filmwright mend {} OIL",
                some(&named, ", "),
                named.first().map_or("TAG", String::as_str)
            ));
        }
        Impossible::TooShort { wanted, shortest } => session.fail(&format!(
            "no list of {wanted} serves every machine; the shortest has {shortest}, proven  [list-impossible]\n  write  --at-most {shortest}, or see what one shorter leaves out: filmwright pool"
        )),
    }
}

fn in_words(scales: &Scales<'_>, terms: &Terms) -> String {
    let mut words: Vec<String> = Vec::new();
    if terms.never_tight {
        words.push("--never-tight".to_owned());
    }
    for oil in &terms.drop {
        words.push(format!("--drop {}", scales.site.oils[*oil].id));
    }
    some(&words, " ")
}
