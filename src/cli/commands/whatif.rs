//! `whatif`: weighs again with changed values, files untouched.

use crate::cli::exit::Exit;
use crate::cli::load::Loaded;
use crate::cli::session::Session;
use crate::cli::text_of::whatif::text;
use crate::cli::{Format, Whatif};
use crate::decide::whatif::{Change, change};
use crate::input::overlay::About;
use crate::model::Point;
use crate::results::whatif::{document_of, table_of};
use crate::source::place::Whose;
use crate::weighing::Scales;

/// Runs `whatif`.
pub fn whatif(session: &mut Session<'_>, args: &Whatif) -> Exit {
    match run(session, args) {
        Ok(exit) | Err(exit) => exit,
    }
}

fn run(session: &mut Session<'_>, args: &Whatif) -> Result<Exit, Exit> {
    // the files' own warnings are told once, with the changed values laid over them
    let quiet = std::mem::replace(&mut session.shared.quiet, true);
    let before = session.load(None);
    session.shared.quiet = quiet;
    let before = before?;
    let points = session.points(&before.site, std::slice::from_ref(&args.tag))?;
    let targets: Vec<String> = points.iter().map(|p| p.address()).collect();
    let texts: Vec<String> = args.set.iter().map(|t| with_origin(t, &points)).collect();
    let wanted = session.oils(&before.site, &args.oil)?;
    let wanted: Option<Vec<String>> = wanted.map(|places| {
        let id = |i: &usize| before.site.oils[*i].id.clone();
        places.iter().map(id).collect()
    });
    // a part with a name of its own is called by its kind as well
    let named = points.iter().flat_map(|p| &p.parts).map(|p| &p.label);
    let by_kind = points.iter().flat_map(|p| &p.inputs);
    let by_kind = by_kind.filter_map(|line| line.about.as_ref());
    let about = About {
        targets: targets.clone(),
        parts: named.chain(by_kind).cloned().collect(),
        oils: wanted.clone().unwrap_or_else(|| {
            let all = before.site.oils.iter();
            all.map(|o| o.id.clone()).collect()
        }),
    };
    let after = session.load(Some((&about, &texts)))?;
    let mut changes = compared(session, &before, &after, &targets)?;
    if let Some(wanted) = wanted {
        for change in &mut changes {
            change.oils.retain(|o| wanted.contains(&o.oil));
        }
    }
    Ok(match session.shared.format {
        Format::Json => {
            let head = session.head(&before);
            let units = session.units();
            session.result(&document_of(&changes, &args.set, units, &head))
        }
        Format::Csv => session.table(&table_of(&changes)),
        Format::Text => {
            let (units, width) = (session.units(), session.width());
            session.result(&text(&changes, units, width))
        }
    })
}

/// Weighs the points before and after.
fn compared(
    session: &mut Session<'_>,
    before: &Loaded,
    after: &Loaded,
    targets: &[String],
) -> Result<Vec<Change>, Exit> {
    let settings = session.settings(true)?;
    let scales = |session: &mut Session<'_>, loaded| -> Result<Scales<'_>, Exit> {
        let loaded: &Loaded = loaded;
        Scales::new(&loaded.site, &loaded.rules, settings)
            .map_err(|(oil, misfit)| session.misfit(&oil, &misfit))
    };
    let (was, is) = (scales(session, before)?, scales(session, after)?);
    let at = |loaded: &Loaded, address: &String| {
        loaded
            .site
            .points
            .iter()
            .position(|p| p.address() == *address)
    };
    Ok(targets
        .iter()
        .filter_map(|address| {
            let old = was.weigh(&before.site.points[at(before, address)?]);
            let new = is.weigh(&after.site.points[at(after, address)?]);
            Some(change((&was, &old), (&is, &new)))
        })
        .collect())
}

/// Keys whose origin decides what a limit does: the maker's replaces the computed one.
const LIMITS: [&str; 4] = ["floor", "ceiling", "start limit", "oil limit"];

/// A limit without an origin of its own keeps the one it has in the file.
fn with_origin(text: &str, points: &[&Point]) -> String {
    let Some((name, value)) = text.split_once('=') else {
        return text.to_owned();
    };
    let (part, key) = match name.rsplit_once(':') {
        Some((part, key)) => (Some(part.trim()), key),
        None => (None, name),
    };
    let key = key.trim().replace('_', " ");
    if value.contains(',') || !LIMITS.contains(&key.as_str()) {
        return text.to_owned();
    }
    let stands = points.iter().flat_map(|p| &p.inputs).find(|line| {
        line.key == key
            && part.is_none_or(|p| line.about.as_deref().is_some_and(|a| a.ends_with(p)))
    });
    let whose = stands.map(|line| line.origin.whose);
    let word = Whose::WRITTEN.iter().find(|(_, w)| Some(*w) == whose);
    match word {
        Some((word, _)) => format!("{text}, {word}"),
        None => text.to_owned(),
    }
}
