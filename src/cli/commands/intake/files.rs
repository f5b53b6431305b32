//! The draft beside the file in use: written, proposed, or taken.

use crate::cli::exit::Exit;
use crate::cli::load::fingerprint;
use crate::cli::session::Session;
use crate::input::file::FileKind;
use crate::input::load::default_files;
use crate::intake::compare::{Merged, What, merge};
use crate::intake::draft::Draft;
use crate::results::intake::Outcome;
use crate::source::FileId;
use crate::source::yaml::{Node, read};
use std::path::{Path, PathBuf};

/// Ids and names of the oils of a folder.
pub(super) fn oils(session: &Session<'_>, folder: &Path) -> Vec<(String, Option<String>)> {
    let named: Vec<PathBuf> = session.shared.oils.iter().map(PathBuf::from).collect();
    let files = if named.is_empty() {
        let list = |below: &str| session.host.list(&folder.join(below)).unwrap_or_default();
        default_files(FileKind::Oils, list)
            .into_iter()
            .map(|n| folder.join(n))
            .collect()
    } else {
        named
    };
    let mut found = Vec::new();
    for path in files {
        let Ok(bytes) = session.host.read(&path) else {
            continue;
        };
        let text = String::from_utf8_lossy(&bytes).into_owned();
        let root = read(FileId(0), &text).root;
        for entry in root.iter().filter_map(Node::entries).flatten() {
            let keys = entry.value.entries();
            let name = keys.and_then(|k| k.iter().find(|e| e.key.text == "name"));
            if entry.key.text != "file" && keys.is_some() {
                let name = name.and_then(|e| e.value.text()).map(str::to_owned);
                found.push((entry.key.text.clone(), name));
            }
        }
    }
    found
}

/// Where the last draft of a file is kept.
fn last_draft(path: &Path) -> PathBuf {
    let name = path.file_name().map(PathBuf::from).unwrap_or_default();
    let folder = path.parent().unwrap_or_else(|| Path::new(""));
    folder.join(".filmwright").join("intake").join(name)
}

fn proposed(path: &Path) -> PathBuf {
    let mut name = path.as_os_str().to_owned();
    name.push(".proposed");
    PathBuf::from(name)
}

/// The first line of a proposal.
fn mark(file: &str, state: &str) -> String {
    format!("# Proposed by filmwright intake from {file}, {state}\n")
}

/// Keeps a draft: writes the file where there is none, else proposes or takes the differences.
///
/// # Errors
/// A file that cannot be read, written or compared; that has been told.
pub(super) fn keep(
    session: &mut Session<'_>,
    path: &Path,
    draft: &Draft,
    file: &str,
    state: &str,
    accept: bool,
    outcome: &mut Outcome,
) -> Result<(), Exit> {
    let shown = path.display().to_string();
    if !session.host.exists(path) || session.shared.replace {
        session.put(path, draft.yaml.as_bytes())?;
        session.put(&last_draft(path), draft.yaml.as_bytes())?;
        outcome.written.push(shown);
        return Ok(());
    }
    let stands = text(session, path)?;
    let last = session
        .host
        .exists(&last_draft(path))
        .then(|| text(session, &last_draft(path)))
        .transpose()?;
    let merged = merge(last.as_deref(), &stands, &draft.yaml).map_err(|why| {
        session.fail(&format!(
            "{shown}: {why}\n  write  filmwright check     says where; or -o ANOTHER.yaml drafts beside it"
        ));
        Exit::Input
    })?;
    let state = fingerprint(&[state.as_bytes(), stands.as_bytes()]);
    let taken = merged
        .changes
        .iter()
        .any(|c| c.what != What::Both && !(c.what == What::Gone && c.key.is_none()));
    outcome.changes.clone_from(&merged.changes);
    outcome.by_hand = merged.by_hand;
    if accept {
        return take(session, path, draft, &merged, file, &state, outcome);
    }
    if !taken {
        outcome
            .written
            .push(format!("nothing: {shown} holds all that the register says"));
        return Ok(());
    }
    let proposal = proposed(path);
    session.put(
        &proposal,
        format!("{}{}", mark(file, &state), merged.text).as_bytes(),
    )?;
    outcome.written.push(format!(
        "{}; --accept takes it into {shown}",
        proposal.display()
    ));
    Ok(())
}

/// Takes the proposal, as it was written or as it was edited since.
fn take(
    session: &mut Session<'_>,
    path: &Path,
    draft: &Draft,
    merged: &Merged,
    file: &str,
    state: &str,
    outcome: &mut Outcome,
) -> Result<(), Exit> {
    let proposal = proposed(path);
    let there = session.host.exists(&proposal);
    let new = if there {
        let text = text(session, &proposal)?;
        let Some(rest) = text.strip_prefix(mark(file, state).as_str()) else {
            session.fail(&format!(
                "{} was proposed from another state of {file}, its map or {}\n  write  delete it, run filmwright intake without --accept, look at the differences, then accept",
                proposal.display(),
                path.display()
            ));
            return Err(Exit::Input);
        };
        rest.to_owned()
    } else {
        merged.text.clone()
    };
    session.put(path, new.as_bytes())?;
    session.put(&last_draft(path), draft.yaml.as_bytes())?;
    if there {
        session.host.remove(&proposal).map_err(|error| {
            session.fail(&format!(
                "{} cannot be removed: {error}",
                proposal.display()
            ));
            Exit::File
        })?;
    }
    outcome
        .written
        .push(format!("{}, the differences taken", path.display()));
    Ok(())
}

fn text(session: &mut Session<'_>, path: &Path) -> Result<String, Exit> {
    let bytes = session.host.read(path).map_err(|error| {
        session.fail(&format!("{} cannot be read: {error}", path.display()));
        Exit::File
    })?;
    String::from_utf8(bytes).map_err(|_| {
        session.fail(&format!(
            "{} is not UTF-8 text\n  write  save it as UTF-8 in the editor",
            path.display()
        ));
        Exit::Input
    })
}
