//! Files into a site: the gate, the kind of each file, then oils, then the site.

use super::file::FileKind;
use super::keys::spelt;
use super::overlay::Overlay;
use super::reader::Reader;
use super::site::Known;
use super::{gate, oils, samples, site};
use crate::model::rulebook::Rulebook;
use crate::model::{Oil, Site};
use crate::problem::{Code, Problem, Problems, Reported, Write, suggest};
use crate::relation::bearing::designation::DimensionTable;
use crate::source::yaml::{Entry, Fault, FaultKind, Node, NodeKind};
use crate::source::{FileId, Place, SourceFile, SourceSet, Span};

/// A file that went through the gate.
#[derive(Clone, Debug)]
pub struct Tree {
    /// Its number in the source set.
    pub file: FileId,
    /// What it is read as.
    pub kind: FileKind,
    /// What it holds, as far as it could be read.
    pub root: Option<Node>,
    /// Whether it was read to its end.
    pub complete: bool,
}

/// Takes a file in and sends it through the gate.
pub fn take(
    set: &mut SourceSet,
    kind: FileKind,
    path: &str,
    bytes: &[u8],
    problems: &mut Problems,
) -> Tree {
    let (file, bad) = set.add_bytes(path, bytes);
    let unread = Tree {
        file,
        kind,
        root: None,
        complete: false,
    };
    let Some(source) = set.file(file) else {
        return unread;
    };
    if let Some(bad) = bad {
        problems.error(gate::not_text(source, bad));
        return unread;
    }
    let (gated, found) = gate::open(source);
    let cut_out = |f: &Fault| matches!(f.kind, FaultKind::Merge | FaultKind::Alias(_));
    let complete = gated.complete && !gated.faults.iter().any(cut_out);
    for problem in found {
        problems.error(problem);
    }
    let root = gated
        .root
        .filter(|root| heading(source, kind, root, problems));
    Tree {
        file,
        kind,
        complete: complete && root.is_some(),
        root,
    }
}

/// The files read where none is named: `oils.yaml` and `oils/*.yaml`, for each kind.
pub fn default_files(kind: FileKind, list: impl Fn(&str) -> Vec<String>) -> Vec<String> {
    let name = kind.default_name();
    let yaml = |n: &String| {
        n.rsplit_once('.')
            .is_some_and(|(_, end)| end == "yaml" || end == "yml")
    };
    let mut found: Vec<String> = list("").into_iter().filter(|n| *n == name).collect();
    let mut split: Vec<String> = list(kind.word()).into_iter().filter(yaml).collect();
    split.sort();
    found.extend(split.into_iter().map(|n| format!("{}/{n}", kind.word())));
    found
}

/// A problem for a file that is needed and not there.
pub fn missing(kind: FileKind, folder: &str) -> Problem {
    let message = format!("no {} in {folder}", kind.default_name());
    Problem::new(Code::FileMissing, message, Place::Program)
        .why("the folder with the site file is the site; -C names another")
        .write(Write::words(
            "filmwright new  lays down a starter folder; --demo takes the built-in works",
        ))
}

/// What a site is read with.
pub struct With<'w> {
    /// The rules.
    pub rules: &'w Rulebook,
    /// Dimensions of rolling bearings.
    pub bearings: &'w DimensionTable,
    /// Ids of the rules by which limits are worked out, which a house rule may replace.
    pub calculated: &'w [&'w str],
}

/// Reads the site and its oils; every problem of every file is reported before it fails.
///
/// # Errors
/// [`Reported`] where any error was found, now or while the files were taken in.
pub fn load<'t>(
    set: &SourceSet,
    trees: &'t [Tree],
    with: &With<'_>,
    overlays: &[Overlay<'t>],
    problems: &mut Problems,
) -> Result<Site, Reported> {
    let complete = |kind: FileKind| trees.iter().filter(|t| t.kind == kind).all(|t| t.complete);
    let mut reader = Reader::new(set, problems);
    let oils = oils_of(&mut reader, trees, with.rules);
    let known = Known {
        rules: with.rules,
        bearings: with.bearings,
        calculated: with.calculated,
        complete: complete(FileKind::Site) && complete(FileKind::Oils),
        has_oils: trees.iter().any(|t| t.kind == FileKind::Oils),
    };
    let root = merged(trees);
    let site = root.map(|root| {
        // The merged tree lives as long as the site is read; overlays have their own trees.
        let overlays: Vec<Overlay<'_>> = overlays.to_vec();
        site::read(&mut reader, &root, oils, &known, &overlays)
    });
    let site = beside(&mut reader, trees, site, known.complete && known.has_oils);
    match (problems.failed(), site) {
        (Some(reported), _) => Err(reported),
        (None, Some(site)) => Ok(site),
        (None, None) => Err(problems.error(missing(FileKind::Site, "the folder"))),
    }
}

/// Reads the maps of samples and the events, and puts them into the site where there is one.
fn beside(
    reader: &mut Reader<'_>,
    trees: &[Tree],
    site: Option<Site>,
    complete: bool,
) -> Option<Site> {
    let (mut maps, mut events) = (Vec::new(), Vec::new());
    let names = site
        .as_ref()
        .filter(|_| complete)
        .map(|site| samples::Names {
            points: &site.points,
            oils: site.oils.iter().map(|o| o.id.as_str()).collect(),
        });
    for tree in trees {
        match (&tree.root, tree.kind) {
            (Some(root), FileKind::Samples) => {
                maps.push(samples::map(reader, root, names.as_ref()));
            }
            (Some(root), FileKind::Events) => {
                events.extend(samples::events(reader, root, names.as_ref()));
            }
            _ => {}
        }
    }
    drop(names);
    let mut site = site?;
    site.samples = maps;
    site.events = events;
    Some(site)
}

/// Reads only the oils.
///
/// # Errors
/// [`Reported`] where any error was found.
pub fn load_oils(
    set: &SourceSet,
    trees: &[Tree],
    rules: &Rulebook,
    problems: &mut Problems,
) -> Result<Vec<Oil>, Reported> {
    let mut reader = Reader::new(set, problems);
    let oils = oils_of(&mut reader, trees, rules);
    match problems.failed() {
        Some(reported) => Err(reported),
        None => Ok(oils),
    }
}

fn oils_of(reader: &mut Reader<'_>, trees: &[Tree], rules: &Rulebook) -> Vec<Oil> {
    let files: Vec<&Tree> = trees.iter().filter(|t| t.kind == FileKind::Oils).collect();
    let complete = files.iter().all(|t| t.complete);
    let roots: Vec<&Node> = files.iter().filter_map(|t| t.root.as_ref()).collect();
    oils::read(reader, &roots, rules, complete)
}

/// The site files as one: areas, machines and lists joined, everything else stated once.
fn merged(trees: &[Tree]) -> Option<Node> {
    let mut roots = trees
        .iter()
        .filter(|t| t.kind == FileKind::Site)
        .filter_map(|t| t.root.clone());
    let mut first = roots.next()?;
    let NodeKind::Map(entries) = &mut first.kind else {
        return Some(first);
    };
    for root in roots {
        let NodeKind::Map(more) = root.kind else {
            continue;
        };
        for entry in more {
            join(entries, entry);
        }
    }
    Some(first)
}

fn join(entries: &mut Vec<Entry>, entry: Entry) {
    let name = spelt(&entry.key.text);
    let same = entries.iter_mut().find(|e| spelt(&e.key.text) == name);
    let Some(same) = same else {
        entries.push(entry);
        return;
    };
    match (&mut same.value.kind, entry.value.kind) {
        (NodeKind::Map(known), NodeKind::Map(more)) if name == "areas" || name == "machines" => {
            known.extend(more);
        }
        (NodeKind::Seq(known), NodeKind::Seq(more)) if name == "accept" || name == "expect" => {
            known.extend(more);
        }
        (_, kind) if name != "file" => {
            // Stated twice: the record says so.
            let value = Node {
                span: entry.value.span,
                kind,
            };
            entries.push(Entry {
                key: entry.key,
                value,
            });
        }
        _ => {}
    }
}

/// Checks what stands behind `file:`; whether the file can be read as that kind.
fn heading(file: &SourceFile, kind: FileKind, root: &Node, problems: &mut Problems) -> bool {
    let Some(entries) = root.entries() else {
        problems.error(no_record(file, kind, root));
        return false;
    };
    let entry = entries.iter().find(|e| e.key.text == "file");
    let Some(entry) = entry else {
        let start = entries.first().map_or(root.span, |e| e.key.span);
        let problem = Problem::new(
            Code::FileKindMissing,
            "the file does not say what it is",
            Place::Text(start),
        )
        .why("its first line names the kind of file and the edition of the format")
        .write(first_line(file, root, kind));
        problems.error(problem);
        return true;
    };
    match kind_problem(kind, entry) {
        None => true,
        Some(problem) => {
            let other = problem.code == Code::FileKindOther;
            problems.error(problem);
            !other
        }
    }
}

fn first_line(file: &SourceFile, root: &Node, kind: FileKind) -> Write {
    let start = root.span.start as usize;
    let bracketed = file.text[start..].starts_with('{');
    let line = format!("file: {}", kind.heading());
    if bracketed {
        let at = file.span(start + 1, start + 1);
        return Write::edit(at, format!(" {line},")).said(line);
    }
    let at = Span {
        end: root.span.start,
        ..root.span
    };
    Write::edit(at, format!("{line}\n")).said(line)
}

fn no_record(file: &SourceFile, kind: FileKind, root: &Node) -> Problem {
    let (start, end) = file.line_range(file.line_of(root.span.start));
    let from = (root.span.start as usize).max(start);
    let problem = Problem::new(
        Code::RecordWanted,
        "the file is no record of keys",
        Place::Text(file.span(from, end.max(from))),
    )
    .why("it begins with file: and the kind of file");
    let text = file
        .text
        .get(root.span.start as usize..root.span.end as usize);
    let commented: Vec<String> = text
        .unwrap_or("")
        .lines()
        .map(|l| format!("# {l}"))
        .collect();
    let whole = format!("file: {}\n{}", kind.heading(), commented.join("\n"));
    problem.write(
        Write::edit(root.span, whole)
            .said(format!("file: {}", kind.heading()))
            .remark("and keys with values below it"),
    )
}

fn kind_problem(kind: FileKind, entry: &Entry) -> Option<Problem> {
    let text = entry.value.text().unwrap_or("").trim();
    let span = entry.value.span;
    let right = Write::edit(
        span,
        if entry.value.is_blank() {
            format!(" {}", kind.heading())
        } else {
            kind.heading()
        },
    );
    let at = |code: Code, message: String| Problem::new(code, message, Place::Text(span));
    let (word, edition) = match text.split_once(' ') {
        Some((word, edition)) => (word, edition.trim()),
        None => (text, ""),
    };
    let words = FileKind::ALL.iter().map(|k| k.word());
    let Some(found) = FileKind::ALL.iter().find(|k| k.word() == word) else {
        let mut problem = at(
            Code::FileKindUnknown,
            format!("\"{text}\" is no kind of file"),
        )
        .why("there are site, oils, samples and events, each with the edition of its format");
        problem.did_you_mean = suggest::certain(word, words).map(str::to_owned);
        return Some(problem.write(right));
    };
    if *found != kind {
        return Some(
            at(
                Code::FileKindOther,
                format!("this is a {word} file, a file that begins with {} is read here", kind.heading()),
            )
            .why("which kind is read where is told by the name of the file, or by --site, --oils, --samples")
            .write(right.remark("if that is what it holds")),
        );
    }
    if edition != FileKind::EDITION.to_string() {
        let message = if edition.is_empty() {
            format!("no edition behind {word}")
        } else {
            format!("edition \"{edition}\" of the format, this program reads edition 1")
        };
        return Some(at(Code::FileEdition, message).write(right));
    }
    None
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn files_are_found_by_their_names() {
        let list = |folder: &str| -> Vec<String> {
            let names: &[&str] = match folder {
                "" => &["oils.yaml", "oils/", "site.yaml", "notes.yaml"],
                "oils" => &["b.yaml", "a.yaml", "readme.md"],
                _ => &[],
            };
            names.iter().map(ToString::to_string).collect()
        };
        assert_eq!(
            default_files(FileKind::Oils, list),
            ["oils.yaml", "oils/a.yaml", "oils/b.yaml"]
        );
        assert_eq!(default_files(FileKind::Site, list), ["site.yaml"]);
        assert!(default_files(FileKind::Samples, list).is_empty());
    }
}
