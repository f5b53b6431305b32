//! `mend`: the smallest change that would make an oil hold.

use crate::cli::exit::Exit;
use crate::cli::session::Session;
use crate::cli::text_of::mend::one;
use crate::cli::{Format, Mend};
use crate::decide::mend::{Mend as Mended, mend as solve};
use crate::demand::takes_grease;
use crate::results::mend::{Case, document_of, table_of};
use crate::weighing::Scales;

/// Runs `mend`.
pub fn mend(session: &mut Session<'_>, args: &Mend) -> Exit {
    match run(session, args) {
        Ok(exit) | Err(exit) => exit,
    }
}

fn run(session: &mut Session<'_>, args: &Mend) -> Result<Exit, Exit> {
    let mut loaded = session.load(None)?;
    if let Some(band) = &args.band {
        loaded.set_ambient(session, band)?;
    }
    let settings = session.settings(true)?;
    let scales = Scales::new(&loaded.site, &loaded.rules, settings)
        .map_err(|(oil, misfit)| session.misfit(&oil, &misfit))?;
    let points = session.points(&loaded.site, std::slice::from_ref(&args.tag))?;
    let oils = session
        .oils(&loaded.site, std::slice::from_ref(&args.oil))?
        .unwrap_or_default();
    let mut cases: Vec<Case<'_>> = Vec::new();
    for point in points {
        for oil in &oils {
            if scales.oils[*oil].grease == takes_grease(point) {
                cases.push((point, solve(&scales, point, *oil)));
            }
        }
    }
    if cases.is_empty() {
        session.fail(&format!(
            "nothing weighed  [nothing-to-weigh]\n  {} is not weighed on {}: one is a grease and the other an oil",
            args.oil, args.tag
        ));
        return Err(Exit::NoMatch);
    }
    Ok(match session.shared.format {
        Format::Json => {
            let head = session.head(&loaded);
            session.result(&document_of(&scales, &cases, &head))
        }
        Format::Csv => session.table(&table_of(&scales, &cases)),
        Format::Text => {
            let width = session.width();
            let text: Vec<String> = cases
                .iter()
                .map(|(point, mended)| one(&scales, point, mended, width))
                .collect();
            suggest(session, &cases, args.band.is_some());
            session.result(&text.join("\n"))
        }
    })
}

/// The same change as the user may try it.
fn suggest(session: &mut Session<'_>, cases: &[Case<'_>], banded: bool) {
    let [(point, mended)] = cases else { return };
    let demo = if session.shared.demo { " --demo" } else { "" };
    let first = mended.missing().first().copied();
    let mend = first.and_then(|target| mended.of(target).find(|m| m.settings().is_some()));
    // a what-if weighs the place as it is, not another ambient
    if let Some(settings) = mend.and_then(Mended::settings).filter(|_| !banded) {
        let set: Vec<String> = settings.iter().map(|s| format!("--set \"{s}\"")).collect();
        let address = quoted(&point.address());
        session.note(&format!(
            "next: filmwright whatif {address} {}{demo}",
            set.join(" ")
        ));
    }
}

/// An address as a shell takes it.
pub fn quoted(word: &str) -> String {
    let plain = |c: char| c.is_ascii_alphanumeric() || "-_./".contains(c);
    if word.chars().all(plain) {
        word.to_owned()
    } else {
        format!("\"{word}\"")
    }
}
