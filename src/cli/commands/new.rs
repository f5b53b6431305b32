//! `new`: a starter folder.

use crate::assets;
use crate::cli::New;
use crate::cli::exit::Exit;
use crate::cli::session::Session;
use std::path::{Path, PathBuf};

/// Runs `new`.
pub fn new(session: &mut Session<'_>, args: &New) -> Exit {
    let folder = PathBuf::from(args.folder.as_deref().unwrap_or("."));
    let mut written = Vec::new();
    for file in assets::templates("starter") {
        let name = file.path.trim_start_matches("starter/");
        let exit = lay_down(session, &folder.join(name), &file.text, &mut written);
        if exit != Exit::Done {
            return exit;
        }
    }
    for (name, text) in crate::input::schema::files() {
        let path = folder.join(".filmwright").join(name);
        match session.host.write(&path, text.as_bytes()) {
            Ok(()) => written.push(path),
            Err(error) => return failed(session, &path, &error),
        }
    }
    if args.with_rules {
        for file in assets::builtin_rules().files {
            let name = file.path.trim_start_matches(assets::BUILT_IN);
            let path = folder.join("rules").join(name);
            let exit = lay_down(session, &path, &file.text, &mut written);
            if exit != Exit::Done {
                return exit;
            }
        }
    }
    for path in &written {
        session.host.out(&format!("wrote {}\n", path.display()));
    }
    session.note("next: filmwright weigh GB-1");
    Exit::Done
}

fn lay_down(
    session: &mut Session<'_>,
    path: &Path,
    text: &str,
    written: &mut Vec<PathBuf>,
) -> Exit {
    if session.host.exists(path) && !session.shared.replace {
        session.fail(&format!(
            "{} exists; nothing of it was changed\n  write  --replace to replace it, or name another folder",
            path.display()
        ));
        return Exit::File;
    }
    match session.host.write(path, text.as_bytes()) {
        Ok(()) => {
            written.push(path.to_path_buf());
            Exit::Done
        }
        Err(error) => failed(session, path, &error),
    }
}

fn failed(session: &mut Session<'_>, path: &Path, error: &std::io::Error) -> Exit {
    session.fail(&format!("{} cannot be written: {error}", path.display()));
    Exit::File
}
