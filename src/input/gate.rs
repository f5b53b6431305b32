//! What the gate refuses, in the words of a problem, with a line that gets through.

use super::reader::single_quoted;
use crate::problem::{Code, Problem, Write};
use crate::source::yaml::{self, Fault, FaultKind, Gated};
use crate::source::{NotText, Place, SourceFile, Span};

/// Reads a file through the gate.
pub fn open(file: &SourceFile) -> (Gated, Vec<Problem>) {
    let gated = yaml::read(file.id, &file.text);
    let merged: Vec<u32> = gated
        .faults
        .iter()
        .filter(|f| f.kind == FaultKind::Merge)
        .map(|f| f.span.end)
        .collect();
    let problems = gated
        .faults
        .iter()
        .filter(|f| {
            // The alias behind a merge key is part of that fault.
            let alias = matches!(f.kind, FaultKind::Alias(_));
            !(alias && merged.iter().any(|end| follows(file, *end, f.span.start)))
        })
        .map(|f| problem(file, f))
        .collect();
    (gated, problems)
}

/// Whether only a colon and spaces part two bytes.
fn follows(file: &SourceFile, end: u32, start: u32) -> bool {
    file.text
        .get(end as usize..start as usize)
        .is_some_and(|between| between.trim() == ":")
}

/// Bytes that are no text, as a problem.
pub fn not_text(file: &SourceFile, bad: NotText) -> Problem {
    match bad {
        NotText::TooLarge { size } => {
            let shown = (size + (1 << 19)) >> 20;
            Problem::new(
                Code::FileTooLarge,
                format!("the file has {shown} MiB, 64 MiB are read at most"),
                Place::Text(file.span(0, 0)),
            )
            .write(Write::words(
                "split it: oils into oils/*.yaml, machines into a site a folder",
            ))
        }
        NotText::NotUtf8 { at } => {
            let at = at as usize;
            let bad = file.text[at..].chars().next().map_or(0, char::len_utf8);
            Problem::new(
                Code::FileNotUtf8,
                "the file is not UTF-8 from here on",
                Place::Text(file.span(at, at + bad)),
            )
            .why("the same bytes mean other letters in other encodings: a ° or an ü would be lost")
            .write(Write::words(
                "save the file as UTF-8 in the editor, or: iconv -f latin1 -t utf-8 FILE",
            ))
        }
    }
}

fn problem(file: &SourceFile, fault: &Fault) -> Problem {
    let at = |code: Code, message: String| Problem::new(code, message, Place::Text(fault.span));
    match &fault.kind {
        FaultKind::Anchor(name) => at(
            Code::YamlAnchor,
            format!("anchor &{name} found, a plain value is wanted"),
        )
        .why("every value stands in one place, so that a sheet can name it; `like:` copies a machine or an oil")
        .write(Write::edit(with_space_behind(file, fault.span), "")),
        FaultKind::Alias(name) => {
            let problem = at(
                Code::YamlAlias,
                format!("alias *{name} found, a plain value is wanted"),
            )
            .why("every value stands in one place, so that a sheet can name it; `like:` copies a machine or an oil");
            match anchored(file, name) {
                Some(value) => problem.write(Write::edit(fault.span, value)),
                None => problem.write(
                    Write::edit(fault.span, single_quoted(file_slice(file, fault.span)))
                        .remark("as a text; or the value itself"),
                ),
            }
        }
        FaultKind::Merge => merge(file, fault),
        FaultKind::Tag(_) => at(
            Code::YamlTag,
            format!("tag {} found", file_slice(file, fault.span).trim()),
        )
        .why("the reader takes every value as text and needs no type before it")
        .write(Write::edit(fault.span, "")),
        FaultKind::Directive => at(Code::YamlDirective, "directive found".into())
            .why("a file for this program needs none")
            .write(Write::edit(insertion(fault.span), "# ")),
        FaultKind::SecondDocument => at(Code::YamlSecondDocument, "a second document begins here".into())
            .why("one file holds one document")
            .write(Write::edit(insertion(fault.span), "# ").remark("or move what follows to a file of its own")),
        FaultKind::Depth { limit } => at(
            Code::YamlDepth,
            format!("nested deeper than {limit} levels"),
        )
        .why("no file of this program is deeper than 8 levels; a forgotten bracket may be the reason")
        .write(Write::words("close the brackets that were opened by mistake")),
        FaultKind::KeyNotText => at(Code::KeyNotText, "a list or a record as a key".into())
            .why("a key is a name")
            .write(Write::edit(fault.span, single_quoted(file_slice(file, fault.span)))),
        FaultKind::Empty => at(Code::FileEmpty, "the file holds nothing".into())
            .write(Write::edit(fault.span, "file: site 1\n").remark("(or oils 1, samples 1, events 1), then the rest")),
        FaultKind::Syntax(syntax) => super::syntax::problem(file, fault.span, syntax),
    }
}

fn file_slice(file: &SourceFile, span: Span) -> &str {
    file.text
        .get(span.start as usize..span.end as usize)
        .unwrap_or("")
}

fn insertion(span: Span) -> Span {
    Span {
        end: span.start,
        ..span
    }
}

fn with_space_behind(file: &SourceFile, span: Span) -> Span {
    let rest = file.text.get(span.end as usize..).unwrap_or("");
    let spaces = rest.len() - rest.trim_start_matches(' ').len();
    file.span(span.start as usize, span.end as usize + spaces)
}

/// The value on the line of an anchor, where it is one plain value.
fn anchored(file: &SourceFile, name: &str) -> Option<String> {
    let sign = format!("&{name} ");
    let at = file.text.find(&sign)? + sign.len();
    let rest = file.text[at..].lines().next()?;
    let value = rest.split(" #").next()?.trim();
    let plain = !value.is_empty() && !value.starts_with(['{', '[', '|', '>']);
    plain.then(|| value.to_owned())
}

/// The key of the record an anchor stands on.
fn anchor_key<'f>(file: &'f SourceFile, name: &str) -> Option<&'f str> {
    let sign = format!("&{name}");
    let at = file.text.find(&sign)?;
    let line = file.text[..at].rsplit('\n').next()?;
    line.trim().strip_suffix(':')
}

fn merge(file: &SourceFile, fault: &Fault) -> Problem {
    let problem = Problem::new(
        Code::YamlMerge,
        "merge key << found",
        Place::Text(fault.span),
    )
    .why("copied values must be told from those stated; `like:` does that");
    let end = fault.span.end as usize;
    let rest = file.text[end..].lines().next().unwrap_or("");
    let alias = rest.trim_start_matches([':', ' ']);
    let name = alias.strip_prefix('*').map(str::trim);
    let key = name.and_then(|n| anchor_key(file, n));
    match key {
        Some(key) => {
            let whole = file.span(fault.span.start as usize, end + rest.trim_end().len());
            problem.write(Write::edit(whole, format!("like: {key}")))
        }
        None => problem.write(
            Write::edit(fault.span, "x-copied").remark("and the values themselves, or like: NAME"),
        ),
    }
}
