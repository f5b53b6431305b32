//! `audit`: samples of oils in use against label and machine.

use crate::audit::judged::Judged;
use crate::audit::{Asked, Audit as Audited, audit as run_audit};
use crate::cli::exit::Exit;
use crate::cli::load::Loaded;
use crate::cli::samples::Bottles;
use crate::cli::session::Session;
use crate::cli::text_of::audit as text;
use crate::cli::text_of::weigh::Style;
use crate::cli::{Audit, Decimal, Format, Gate};
use crate::judge::Verdict;
use crate::results::audit::{document_of, table_of};
use crate::weighing::Scales;
use jiff::civil::Date;

/// Runs `audit`.
pub fn audit(session: &mut Session<'_>, args: &Audit) -> Exit {
    match run(session, args) {
        Ok(exit) | Err(exit) => exit,
    }
}

fn run(session: &mut Session<'_>, args: &Audit) -> Result<Exit, Exit> {
    let mut loaded = session.load(None)?;
    let settings = session.settings(true)?;
    let only = only(session, &loaded, &args.tags)?;
    let asked = Asked {
        on: day_of(session, &loaded)?,
        matches: matches(session, &loaded, &args.matches)?,
        measured_shear: args.use_measured_shear,
        only,
    };
    let comma = args.decimal.map(|d| d == Decimal::Comma);
    let bottles = session.bottles(&mut loaded, comma)?;
    let scales = Scales::new(&loaded.site, &loaded.rules, settings)
        .map_err(|(oil, misfit)| session.misfit(&oil, &misfit))?;
    let tables = Bottles {
        list: Vec::new(),
        tables: bottles.tables,
    };
    let mut problems = Vec::new();
    let audited = run_audit(&scales, bottles.list, &asked, &mut problems);
    session.bottle_problems(&loaded, problems)?;
    notes(session, &tables, &audited);
    let exit = print(session, args, &scales, &loaded, &audited);
    let tripped = session
        .shared
        .gate
        .is_some_and(|gate| trips(&audited, gate));
    Ok(if exit == Exit::Done && tripped {
        Exit::Gate
    } else {
        exit
    })
}

/// Places of the points wanted; none where all are.
///
/// # Errors
/// Nothing matches; that has been told.
pub fn only(
    session: &mut Session<'_>,
    loaded: &Loaded,
    tags: &[String],
) -> Result<Vec<usize>, Exit> {
    if tags.is_empty() {
        return Ok(Vec::new());
    }
    let points = session.points(&loaded.site, tags)?;
    let all = &loaded.site.points;
    let place = |p: &crate::model::Point| all.iter().position(|q| std::ptr::eq(p, q));
    Ok(points.into_iter().filter_map(place).collect())
}

/// The day of the audit.
///
/// # Errors
/// A date that is no day; that has been told.
pub fn day_of(session: &mut Session<'_>, loaded: &Loaded) -> Result<Date, Exit> {
    let text = session.date(loaded.site.frame.reviewed.as_deref());
    text.parse().map_err(|_| {
        session.fail(&format!("{text} is not a day\n  write  --on 2026-11-02"));
        Exit::Usage
    })
}

/// `NAME=TAG`, each tag a point of the site.
fn matches(
    session: &mut Session<'_>,
    loaded: &Loaded,
    list: &[String],
) -> Result<Vec<(String, String)>, Exit> {
    let mut found = Vec::new();
    for text in list {
        let Some((name, tag)) = text.rsplit_once('=') else {
            session.fail(&format!(
                "--match {text} is no name and tag\n  write  --match \"Conv104 HD=CV-104\""
            ));
            return Err(Exit::Usage);
        };
        let (name, tag) = (name.trim(), tag.trim());
        let known = loaded.site.points.iter().any(|p| p.address() == tag);
        if !known && !tag.eq_ignore_ascii_case("new oil") {
            session.points(&loaded.site, &[tag.to_owned()])?;
        }
        found.push((name.to_owned(), tag.to_owned()));
    }
    Ok(found)
}

fn notes(session: &mut Session<'_>, bottles: &Bottles, audited: &Audited) {
    if bottles.tables.is_empty() {
        session.note("no samples: read: FILE in samples.yaml, or --samples FILE; oils in use are judged as labelled");
    }
    for (name, unused) in &bottles.tables {
        if !unused.is_empty() {
            session.note(&format!("{name}: columns not read: {}", unused.join(", ")));
        }
    }
    let unread: usize = audited.bottles.iter().map(|b| b.unread.len()).sum();
    if unread > 0 {
        session.note(&format!(
            "{unread} cells not understood, kept as remarks of their bottles"
        ));
    }
}

fn print(
    session: &mut Session<'_>,
    args: &Audit,
    scales: &Scales<'_>,
    loaded: &Loaded,
    audited: &Audited,
) -> Exit {
    match session.shared.format {
        Format::Json => {
            let head = session.head(loaded);
            session.result(&document_of(scales, audited, &head))
        }
        Format::Csv => session.table(&table_of(scales, audited)),
        Format::Text if args.unmatched => session.result(&text::unmatched(audited)),
        Format::Text => {
            let style = Style {
                marks: session.marks(),
                width: session.width(),
            };
            suggest(session, scales, audited);
            session.result(&text::whole(scales, audited, style))
        }
    }
}

fn suggest(session: &mut Session<'_>, scales: &Scales<'_>, audited: &Audited) {
    let demo = if session.shared.demo { " --demo" } else { "" };
    let failing = |j: &&Judged| j.latest && matches!(j.word(), Some("fails" | "barred"));
    let first = audited
        .findings
        .iter()
        .filter_map(|f| f.judged)
        .map(|p| &audited.judged[p])
        .find(failing);
    if let Some(point) = first.and_then(|j| j.point) {
        let address = scales.site.points[point].address();
        session.note(&format!("next: filmwright weigh {address}{demo}"));
    }
}

/// Whether any oil in use, sampled or not, is at the level or worse.
fn trips(audited: &Audited, gate: Gate) -> bool {
    let level = |v: Verdict| match v {
        Verdict::Holds => None,
        Verdict::Tight => Some(Gate::Tight),
        Verdict::Open => Some(Gate::Open),
        Verdict::Fails => Some(Gate::Fails),
    };
    let reached = |v: Option<Verdict>| v.and_then(level).is_some_and(|l| l >= gate);
    let latest = audited.judged.iter().filter(|j| j.latest);
    latest
        .clone()
        .any(|j| (j.is_barred() && !j.too_old && !j.twice) || reached(j.verdict()))
        || audited
            .unsampled
            .iter()
            .any(|u| !u.barred.is_empty() || reached(u.verdict))
}
