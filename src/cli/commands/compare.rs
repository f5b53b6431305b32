//! `compare`: what moved between two states of a site, and why.

use crate::cli::exit::Exit;
use crate::cli::session::Session;
use crate::cli::text_of::compare::text;
use crate::cli::{Compare, Format};
use crate::compare::{Comparison, compare as compared};
use crate::results::compare::{document_of, table_of};
use crate::results::json::Head;
use crate::source::SourceSet;

/// Runs `compare`.
pub fn compare(session: &mut Session<'_>, args: &Compare) -> Exit {
    match run(session, args) {
        Ok(exit) | Err(exit) => exit,
    }
}

fn run(session: &mut Session<'_>, args: &Compare) -> Result<Exit, Exit> {
    let mut set = SourceSet::new();
    let old = session.state(&mut set, &args.old)?;
    let new = session.state(&mut set, &args.new)?;
    let found: Comparison = compared(&set, &old.state, &new.state).map_err(|unread| {
        session.fail(&format!(
            "{} and {} cannot be compared: {unread}",
            args.old, args.new
        ));
        Exit::Input
    })?;
    Ok(match session.shared.format {
        Format::Json => {
            let head = Head {
                inputs: String::new(),
                rules: String::new(),
                date: session.date(None),
                ..Head::default()
            };
            session.result(&document_of(&found, (&old.name, &new.name), &head))
        }
        Format::Csv => session.table(&table_of(&found)),
        Format::Text => {
            let width = session.width();
            session.result(&text(&found, args.all, &set, width))
        }
    })
}
