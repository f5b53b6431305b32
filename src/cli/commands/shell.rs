//! `completions` and `man`: made from the command line itself.

mod names;
mod scripts;

use crate::cli::exit::Exit;
use crate::cli::session::Session;
use crate::cli::{Cli, Completions, Man, Names};
use clap::CommandFactory as _;
use std::fmt::Write as _;
use std::path::PathBuf;

/// Runs `completions`.
pub fn completions(session: &mut Session<'_>, args: &Completions) -> Exit {
    if let Some(kind) = args.names {
        let list = match kind {
            Names::Tags => names::tags(session),
            Names::Oils => names::oils(session),
            Names::Rules => names::rules(session),
        };
        let mut out = String::new();
        for (name, says) in list {
            let says: String = says.split_whitespace().collect::<Vec<_>>().join(" ");
            out.push_str(format!("{name}\t{says}").trim_end());
            out.push('\n');
        }
        session.host.out(&out);
        return Exit::Done;
    }
    match args.shell {
        Some(shell) => {
            let text = scripts::of(shell);
            session.result(&text)
        }
        None => Exit::Usage,
    }
}

/// Runs `man`.
pub fn man(session: &mut Session<'_>, args: &Man) -> Exit {
    let command = Cli::command();
    if let (None, Some(folder)) = (
        &args.command,
        session.shared.out.clone().filter(|o| o != "-"),
    ) {
        let folder = PathBuf::from(folder);
        let mut out = String::new();
        let mut pages = vec![("filmwright".to_owned(), page(command.clone()))];
        for sub in command.get_subcommands() {
            let name = format!("filmwright-{}", sub.get_name());
            pages.push((name.clone(), page(named(sub, &name))));
        }
        for (name, text) in pages {
            let path = folder.join(format!("{name}.1"));
            if let Err(exit) = session.put(&path, text.as_bytes()) {
                return exit;
            }
            let _ = writeln!(out, "wrote {}", path.display());
        }
        session.host.out(&out);
        return Exit::Done;
    }
    let text = match &args.command {
        None => page(command),
        Some(name) => match command.get_subcommands().find(|c| c.get_name() == name) {
            Some(sub) => page(named(sub, &format!("filmwright-{name}"))),
            None => {
                session.fail(&format!(
                    "there is no command {name}\n  write  filmwright --help lists them"
                ));
                return Exit::NoMatch;
            }
        },
    };
    session.result(&text)
}

/// A command with its own page, of which the usage names the program.
fn named(sub: &clap::Command, name: &str) -> clap::Command {
    let usage = format!("filmwright {}", sub.get_name());
    sub.clone().display_name(name).bin_name(usage)
}

/// A page, dated by nothing: the same program gives the same page.
fn page(command: clap::Command) -> String {
    let mut out = Vec::new();
    let version = concat!("filmwright ", env!("CARGO_PKG_VERSION"));
    let man = clap_mangen::Man::new(command).date("").source(version);
    match man.render(&mut out) {
        Ok(()) => String::from_utf8_lossy(&out).into_owned(),
        Err(_) => String::new(), // writing to memory does not fail
    }
}
