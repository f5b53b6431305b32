//! `work`: one relation at a time, or a batch of them.

use crate::cli::exit::Exit;
use crate::cli::session::Session;
use crate::cli::text_of::work as text;
use crate::cli::{Format, Work};
use crate::work::{Args, Refusal, batch, relation, relations, run};
use std::path::Path;

/// Runs `work`.
pub fn work(session: &mut Session<'_>, args: &Work) -> Exit {
    if let Some(file) = &args.batch {
        return in_batch(session, file);
    }
    let Some(name) = &args.relation else {
        let all: Vec<_> = relations().collect();
        return if session.wants(Format::Json) {
            session.result(&text::register(&all))
        } else if session.wants(Format::Csv) {
            session.table(&text::csv_table(&all))
        } else {
            session.result(&text::list(&all))
        };
    };
    let relation = match relation(name) {
        Ok(relation) => relation,
        Err(refusal) => return refused(session, &refusal, Exit::NoMatch),
    };
    if args.with.is_empty() {
        let about = text::about(relation, session.width());
        return session.result(&about);
    }
    if session.wants(Format::Json) {
        let (line, without_answer) = match Args::from_pairs(&args.with) {
            Ok(given) => batch::answer(relation.name, given),
            Err(refusal) => return refused(session, &refusal, Exit::Usage),
        };
        let exit = session.result(&format!("{line}\n"));
        return if without_answer { Exit::Input } else { exit };
    }
    match Args::from_pairs(&args.with).and_then(|given| run(relation.name, given)) {
        Ok(worked) => {
            let out = text::worked(&worked, session.units(), session.width());
            session.result(&out)
        }
        Err(refusal) => refused(session, &refusal, Exit::Input),
    }
}

fn refused(session: &mut Session<'_>, refusal: &Refusal, exit: Exit) -> Exit {
    session.fail(&format!("{}  [{}]", refusal.message, refusal.name));
    exit
}

fn in_batch(session: &mut Session<'_>, file: &str) -> Exit {
    let bytes = if file == "-" {
        session.host.input()
    } else {
        session.host.read(Path::new(file))
    };
    let bytes = match bytes {
        Ok(bytes) => bytes,
        Err(error) => {
            session.fail(&format!("{file} cannot be read: {error}"));
            return Exit::File;
        }
    };
    let text = String::from_utf8_lossy(&bytes);
    let done = batch::run_batch(text.lines());
    let exit = session.result(&done.text());
    if exit == Exit::Done && done.refused > 0 {
        Exit::Input
    } else {
        exit
    }
}
