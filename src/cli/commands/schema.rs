//! `schema`: JSON Schemas for editors.

use crate::cli::Schema;
use crate::cli::exit::Exit;
use crate::cli::session::Session;
use crate::input::file::FileKind;
use crate::input::schema::files;
use std::fmt::Write as _;

/// Runs `schema`.
pub fn schema(session: &mut Session<'_>, args: &Schema) -> Exit {
    if args.write {
        let folder = session.folder().join(".filmwright");
        let mut out = String::new();
        for (name, text) in files() {
            let path = folder.join(name);
            if let Err(exit) = session.put(&path, text.as_bytes()) {
                return exit;
            }
            let _ = writeln!(out, "wrote {}", path.display());
        }
        session.host.out(&out);
        return Exit::Done;
    }
    let mut words: Vec<&str> = FileKind::ALL.iter().map(|k| k.word()).collect();
    words.push("rules");
    let Some(kind) = &args.kind else {
        session.fail(&format!(
            "no kind of file is named\n  write  filmwright schema KIND, one of {}; or filmwright schema --write",
            words.join(", ")
        ));
        return Exit::Usage;
    };
    let name = format!("{kind}.schema.json");
    match files().into_iter().find(|(n, _)| *n == name) {
        Some((_, text)) => session.result(&text),
        None => {
            session.fail(&format!(
                "{kind} is no kind of file\n  write  one of {}",
                words.join(", ")
            ));
            Exit::NoMatch
        }
    }
}
