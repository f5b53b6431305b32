//! `compare`: what moved between two states of a site, and why.

use crate::cli::exit::Exit;
use crate::cli::session::Session;
use crate::cli::text_of::compare::text;
use crate::cli::{Compare, Format};
use crate::compare::{Comparison, compare as compared};
use crate::results::audit_change::{self, AuditChange};
use crate::results::compare::{document_of, table_of};
use crate::results::json::Head;
use crate::source::SourceSet;
use std::path::Path;

/// Runs `compare`.
pub fn compare(session: &mut Session<'_>, args: &Compare) -> Exit {
    match run(session, args) {
        Ok(exit) | Err(exit) => exit,
    }
}

fn run(session: &mut Session<'_>, args: &Compare) -> Result<Exit, Exit> {
    if let Some(change) = audits(session, args) {
        return Ok(findings(session, &change));
    }
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

/// What became of the findings, where both files are documents of audits.
fn audits(session: &Session<'_>, args: &Compare) -> Option<AuditChange> {
    let document = |name: &str| {
        let bytes = session.host.read(Path::new(name)).ok()?;
        // the format stands at the top; a document of judgements may be very long
        let top = String::from_utf8_lossy(&bytes[..bytes.len().min(400)]);
        if !top.contains("filmwright.audit") {
            return None;
        }
        audit_change::read(&String::from_utf8(bytes).ok()?)
    };
    let (old, new) = (document(&args.old)?, document(&args.new)?);
    Some(audit_change::between(&old, &new))
}

fn findings(session: &mut Session<'_>, change: &AuditChange) -> Exit {
    match session.shared.format {
        Format::Json => {
            let head = Head {
                date: session.date(None),
                ..Head::default()
            };
            session.result(&change.document(&head))
        }
        Format::Csv => session.table(&change.table()),
        Format::Text => session.result(&change.text()),
    }
}
