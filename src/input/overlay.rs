//! Values of the command line laid over those of the files: `whatif TAG --set KEY=VALUE`.
//!
//! Each value becomes a line of a virtual file, so that it is read, checked and shown by the same
//! code as any other, and says that it comes from the command line.

mod aim;
mod put;

pub use aim::About;

use super::fields::{Fields, Slot};
use super::keys::machine::MACHINE;
use super::keys::{self, TOGETHER};
use super::load::Tree;
use super::reader::{Reader, as_plain};
use crate::problem::{Code, Problem, Problems, Reported, Write};
use crate::source::yaml::{self, Entry, Node, NodeKind};
use crate::source::{COMMAND_LINE, FileId, Place, SourceSet};
use aim::Aim;
use std::fmt::Write as _;

/// A value laid over those of some points.
#[derive(Clone, Debug)]
pub struct Overlay<'t> {
    /// Tags or addresses of the points.
    pub targets: Vec<String>,
    /// The part it is for, where the user names one.
    pub part: Option<String>,
    /// Key and value.
    pub entry: &'t Entry,
}

/// Values of the command line as a text: one file, one line a value.
#[derive(Clone, Debug)]
pub struct Settings {
    /// Its number in the source set.
    pub file: FileId,
    /// Its tree: one entry a value.
    pub root: Node,
    /// The name before the key of each value, in the order of the entries.
    names: Vec<Option<String>>,
    /// What each value is for, once that has been found; those for anything else than the points
    /// have gone into the trees.
    aims: Vec<(Entry, Aim)>,
}

impl Settings {
    /// The values laid over the points of some tags or addresses.
    pub fn over(&self, targets: &[String]) -> Vec<Overlay<'_>> {
        self.aims
            .iter()
            .filter_map(|(entry, aim)| match aim {
                Aim::Point(part) => Some(Overlay {
                    targets: targets.to_vec(),
                    part: part.clone(),
                    entry,
                }),
                _ => None,
            })
            .collect()
    }

    /// Finds what each value is for, and puts those that are not for the points into the trees of
    /// the files.
    ///
    /// # Errors
    /// A name or key that nothing has, or several things have; all are reported.
    pub fn put(
        &mut self,
        set: &SourceSet,
        trees: &mut [Tree],
        about: &About,
        problems: &mut Problems,
    ) -> Result<(), Reported> {
        let entries = self.root.entries().unwrap_or_default().to_vec();
        for (entry, name) in entries.iter().zip(&self.names) {
            let value = set.slice(entry.value.span);
            let found = aim::aim(problems, (name.as_deref(), entry), value, (about, trees));
            for aim in found.map_or(Vec::new(), |aim| aim.of_records(entry, about)) {
                put::put(trees, &aim, entry);
                self.aims.push((entry.clone(), aim));
            }
        }
        problems.failed().map_or(Ok(()), Err)
    }
}

/// Reads `KEY=VALUE` texts; a value of something else than the points is written
/// `NAME: KEY=VALUE`, with the name of a part, an oil, an area, a machine, `house` or a house rule.
///
/// # Errors
/// A text of another form.
pub fn settings(
    set: &mut SourceSet,
    texts: &[String],
    problems: &mut Problems,
) -> Result<Settings, Reported> {
    let mut lines = String::new();
    let mut names = Vec::new();
    for text in texts {
        let Some((key, value)) = text.split_once('=') else {
            return Err(problems.error(no_pair(text)));
        };
        let (name, key) = match key.rsplit_once(':') {
            Some((name, key)) => (Some(name.trim().to_owned()), key.trim()),
            None => (None, key.trim()),
        };
        let value = value.trim();
        if key.is_empty() || value.is_empty() || key.contains('\n') || value.contains('\n') {
            return Err(problems.error(no_pair(text)));
        }
        let bracketed = value.starts_with(['[', '{']);
        let value = if bracketed {
            value.to_owned()
        } else {
            as_plain(value, false)
        };
        let _ = writeln!(lines, "{}: {value}", as_plain(key, false));
        names.push(name);
    }
    let file = set.add(COMMAND_LINE, &lines);
    let gated = yaml::read(file, &lines);
    let whole = gated.complete && gated.faults.is_empty();
    match gated.root {
        Some(root) if whole && root.entries().map(<[Entry]>::len) == Some(names.len()) => {
            Ok(Settings {
                file,
                root,
                names,
                aims: Vec::new(),
            })
        }
        _ => Err(problems.error(no_pair(&texts.join(" ")))),
    }
}

fn no_pair(text: &str) -> Problem {
    Problem::new(
        Code::SetForm,
        format!("\"{text}\" is not KEY=VALUE"),
        Place::Flag("--set"),
    )
    .why("any input by the name it has in the file; a value of a part, an oil, an area or the house has that name before it")
    .write(Write::words(
        "--set \"sump rise=48 K\"  or  --set \"rolling bearing 22220: speed=250 r/min\"",
    ))
}

/// Lays the values over a point; those that belong to its parts come back.
pub(super) fn apply<'o, 't>(
    fields: &mut Fields<'t>,
    overlays: &'o [Overlay<'t>],
    (tag, address): (&str, &str),
) -> Vec<&'o Overlay<'t>> {
    let mut of_parts = Vec::new();
    for overlay in overlays {
        let meant = |target: &String| target == tag || target == address;
        if !overlay.targets.iter().any(meant) {
            continue;
        }
        let of_point = overlay.part.is_none() && MACHINE.key(&overlay.entry.key.text).is_some();
        if of_point {
            put(fields, overlay.entry);
        } else {
            of_parts.push(overlay);
        }
    }
    of_parts
}

/// Puts one value in, in place of what stated the same.
pub(super) fn put<'t>(fields: &mut Fields<'t>, entry: &'t Entry) {
    let Some(key) = fields.record.key(&entry.key.text) else {
        return;
    };
    let reading = ["sump", "at ambient"];
    for group in TOGETHER.iter().filter(|g| g.contains(&key.name)) {
        for name in *group {
            let part_of_one = reading.contains(&key.name) && reading.contains(name);
            if !part_of_one && fields.record.key(name).is_some() {
                fields.remove(name);
            }
        }
    }
    if !matches!(entry.value.kind, NodeKind::Refused) {
        fields.put(Slot {
            key,
            name: &entry.key,
            node: &entry.value,
            inherited: None,
            within: fields.within.clone(),
            source: None,
        });
    }
}

/// Lays values over the parts they belong to; each must fit exactly one.
pub(super) fn over_parts<'t>(
    reader: &mut Reader<'_>,
    parts: &mut [(String, Fields<'t>)],
    overlays: &[&Overlay<'t>],
    address: &str,
) {
    for overlay in overlays {
        let key = overlay.entry.key.text.as_str();
        let fits = |(label, fields): &(String, Fields<'_>)| {
            let named = overlay.part.as_ref().is_none_or(|p| {
                let own = fields.get("name").and_then(|slot| slot.node.text());
                label == p
                    || label.ends_with(&format!(" {p}"))
                    || own.is_some_and(|n| n.trim() == p)
            });
            named && fields.record.key(key).is_some()
        };
        let places: Vec<usize> = (0..parts.len()).filter(|i| fits(&parts[*i])).collect();
        match places.as_slice() {
            [one] => put(&mut parts[*one].1, overlay.entry),
            [] => none(reader, overlay, address),
            several => {
                let labels: Vec<String> = several.iter().map(|i| parts[*i].0.clone()).collect();
                which(reader, overlay, address, &labels);
            }
        }
    }
}

fn none(reader: &mut Reader<'_>, overlay: &Overlay<'_>, address: &str) {
    let key = &overlay.entry.key;
    let whose = overlay.part.as_deref().unwrap_or(address);
    let mut problem = reader
        .at(
            Code::KeyUnknown,
            format!("{whose} has nothing called \"{}\"", key.text),
            key.span,
            address,
        )
        .why("the keys of machines, parts, oils, areas and the house are listed by: filmwright help keys");
    if let Some(meant) = meant(&key.text) {
        problem = problem
            .did_you_mean(meant)
            .write(Write::edit(key.span, meant));
    } else {
        let words = "--set \"KEY=VALUE\" with a key of the machine or of one of its parts, or with the name of an oil, an area or `house` before it";
        problem = problem.write(Write::words(words));
    }
    reader.report(problem);
}

/// The key certainly meant, of a machine before any other.
fn meant(written: &str) -> Option<&'static str> {
    let of_all = || keys::records().into_iter().find_map(|r| r.meant(written));
    MACHINE.meant(written).or_else(of_all)
}

fn which(reader: &mut Reader<'_>, overlay: &Overlay<'_>, address: &str, labels: &[String]) {
    let key = overlay.entry.key.text.as_str();
    let value = reader.set.slice(overlay.entry.value.span).to_owned();
    let problem = reader
        .at(
            Code::SetWhich,
            format!("`{key}` belongs to {} parts of {address}", labels.len()),
            overlay.entry.key.span,
            address,
        )
        .why("the name of the part stands before the key");
    let problem = labels.iter().take(4).fold(problem, |p, label| {
        p.write(Write::words(format!("--set \"{label}: {key}={value}\"")))
    });
    reader.report(problem);
}
