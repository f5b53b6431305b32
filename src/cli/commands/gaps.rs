//! `gaps`: missing and assumed data ranked by what they would decide.

use crate::cli::exit::Exit;
use crate::cli::session::Session;
use crate::cli::text_of::gaps::{letter, text};
use crate::cli::{Format, Gaps};
use crate::decide::gaps::letter::questions;
use crate::decide::gaps::{of_points, ranked};
use crate::results::gaps::{document_of, letter_of, table_of};
use crate::weighing::Scales;

/// Questions of a letter where no number is given.
const QUESTIONS: usize = 5;

/// Runs `gaps`.
pub fn gaps(session: &mut Session<'_>, args: &Gaps) -> Exit {
    match run(session, args) {
        Ok(exit) | Err(exit) => exit,
    }
}

fn run(session: &mut Session<'_>, args: &Gaps) -> Result<Exit, Exit> {
    if args.letter == Some(Some(0)) {
        session.fail("--letter 0 would ask nothing\n  write  --letter 5");
        return Err(Exit::Usage);
    }
    let loaded = session.load(None)?;
    let settings = session.settings(true)?;
    let scales = Scales::new(&loaded.site, &loaded.rules, settings)
        .map_err(|(oil, misfit)| session.misfit(&oil, &misfit))?;
    let points = session.points(&loaded.site, &args.tags)?;
    if loaded.site.oils.is_empty() {
        session.note("warning: the oil list holds no oil: what a verdict would wait for, and what the rules ask of an oil, is not among the gaps  [nothing-to-weigh]\n  write  oils.yaml with the oils that may be used");
    }
    let all = of_points(&scales, points);
    let order = ranked(&all);
    let head = session.head(&loaded);
    if let Some(most) = args.letter {
        let asked = questions(&scales, &all, &order, most.unwrap_or(QUESTIONS));
        return Ok(match session.shared.format {
            Format::Json => session.result(&letter_of(&asked, &head)),
            _ => {
                let width = session.width();
                session.result(&letter(&loaded.site, &asked, width))
            }
        });
    }
    Ok(match session.shared.format {
        Format::Json => session.result(&document_of(&scales, &all, &order, &head)),
        Format::Csv => session.table(&table_of(&scales, &all, &order)),
        Format::Text => {
            let width = session.width();
            let demo = if session.shared.demo { " --demo" } else { "" };
            if !order.is_empty() {
                session.note(&format!("next: filmwright gaps --letter{demo}"));
            }
            session.result(&text(&scales, &all, &order, args.all, width))
        }
    })
}
