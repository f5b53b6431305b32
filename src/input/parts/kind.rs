//! What a part is: the key it begins with.

use crate::input::keys::part::{KINDS, PartKey};
use crate::input::keys::{is_private, spelt};
use crate::input::reader::{Reader, as_plain};
use crate::problem::{Code, Write, suggest};
use crate::source::yaml::{Entry, Node, NodeKind};
use crate::source::{Place, Span};

/// The kind of a part, or a message.
pub(super) fn of(reader: &mut Reader<'_>, node: &Node, within: &str) -> Option<&'static PartKey> {
    let Some(entries) = node.entries() else {
        if !matches!(node.kind, NodeKind::Refused) {
            no_record(reader, node, within);
        }
        return None;
    };
    let found: Vec<(&'static PartKey, &Entry)> = entries
        .iter()
        .filter_map(|e| Some((kind_of(&e.key.text)?, e)))
        .collect();
    match found.as_slice() {
        [] => {
            missing(reader, node, entries, within);
            None
        }
        [(kind, _)] => Some(kind),
        [(kind, first), (other, second), ..] => {
            if kind.first == other.first {
                return Some(kind); // the same key twice is said by the record
            }
            twice(reader, node, (first, second), within);
            None
        }
    }
}

fn kind_of(key: &str) -> Option<&'static PartKey> {
    let name = spelt(key);
    KINDS.iter().find(|k| k.first == name)
}

/// How a part is called: its kind and what stands behind it.
pub(super) fn label(reader: &Reader<'_>, node: &Node, key: &PartKey) -> String {
    let value = node
        .entries()
        .and_then(|e| e.iter().find(|e| spelt(&e.key.text) == key.first))
        .map(|e| &e.value);
    let Some(value) = value else {
        return key.first.to_owned();
    };
    if let Some(text) = value.text() {
        let (head, _) = crate::input::fields::words::parted(text);
        return format!("{} {head}", key.first).trim_end().to_owned();
    }
    let size = |name: &str| {
        let entries = value.entries()?;
        let entry = entries.iter().find(|e| spelt(&e.key.text) == name)?;
        let text = entry.value.text().filter(|t| !t.is_empty());
        text.map(str::to_owned)
    };
    match (size("bore"), size("outside")) {
        (Some(bore), Some(outside)) => {
            let bore = bore.trim_end_matches(" mm").to_owned();
            format!("{} {bore} x {outside}", key.first)
        }
        _ => {
            let line = reader.set.file(node.span.file);
            let line = line.map_or(0, |f| f.line_of(node.span.start));
            format!("{} in line {line}", key.first)
        }
    }
}

fn no_record(reader: &mut Reader<'_>, node: &Node, within: &str) {
    let text = node.text().unwrap_or("22220");
    let value = as_plain(text, true);
    let span = crate::input::fields::first_line(reader, node);
    let problem = reader
        .at(
            Code::PartKindMissing,
            "a part that does not say what it is",
            span,
            within,
        )
        .why(kinds())
        .write(
            Write::edit(node.span, format!("rolling bearing: {value}")).remark("or another kind"),
        );
    reader.report(problem);
}

fn kinds() -> String {
    let names: Vec<&str> = KINDS.iter().map(|k| k.first).collect();
    format!("a part begins with one of {}", names.join(", "))
}

/// A kind that is only misspelt.
fn misspelt(reader: &mut Reader<'_>, entries: &[Entry], within: &str) -> bool {
    let firsts = || KINDS.iter().map(|k| k.first);
    let meant = entries
        .iter()
        .find_map(|e| suggest::certain(&spelt(&e.key.text), firsts()).map(|m| (e, m)));
    let found = meant.is_some();
    if let Some((entry, meant)) = meant {
        let problem = reader
            .at(
                Code::PartKindMissing,
                format!("unknown kind of part \"{}\"", entry.key.text),
                entry.key.span,
                within,
            )
            .did_you_mean(meant)
            .write(Write::edit(entry.key.span, meant));
        reader.report(problem);
    }
    found
}

fn missing(reader: &mut Reader<'_>, node: &Node, entries: &[Entry], within: &str) {
    if misspelt(reader, entries, within) {
        return;
    }
    // The kind that has all the keys written, if one has.
    let knows = |k: &&PartKey| {
        entries
            .iter()
            .all(|e| is_private(&e.key.text) || k.record.key(&e.key.text).is_some())
    };
    let kind = KINDS.iter().find(knows).map_or("component", |k| k.first);
    let value = match kind {
        "rolling bearing" => "22220",
        "component" => "gear_parallel_bevel",
        _ => "NAME",
    };
    let at = Span {
        end: node.span.start,
        ..node.span
    };
    let bracketed = reader.set.slice(node.span).starts_with('{');
    let line = format!("{kind}: {value}");
    let write = if bracketed {
        let behind = Span {
            start: at.start + 1,
            end: at.start + 1,
            ..at
        };
        Write::edit(behind, format!(" {line},"))
    } else {
        let source = reader.source(node);
        let column = source[..node.span.start as usize]
            .rsplit('\n')
            .next()
            .map_or(0, |l| l.chars().count());
        Write::edit(at, format!("{line}\n{}", " ".repeat(column)))
    };
    let span = crate::input::fields::first_line(reader, node);
    let problem = reader
        .at(
            Code::PartKindMissing,
            "a part that does not say what it is",
            span,
            within,
        )
        .why(kinds())
        .write(write.remark("or another kind"));
    reader.report(problem);
}

fn twice(reader: &mut Reader<'_>, node: &Node, (first, second): (&Entry, &Entry), within: &str) {
    let problem = reader
        .at(
            Code::PartKindTwice,
            format!(
                "one part is both `{}` and `{}`",
                spelt(&first.key.text),
                spelt(&second.key.text)
            ),
            first.key.span,
            within,
        )
        .related(Place::Text(second.key.span), "")
        .why("each part begins with a dash of its own");
    let source = reader.source(node);
    let begin = |at: u32| source[..at as usize].rfind('\n').map_or(0, |b| b + 1);
    let (first_line, second_line) = (begin(node.span.start), begin(second.key.span.start));
    let column = node.span.start as usize - first_line;
    let dashed = source[first_line..].trim_start().starts_with('-');
    let write = if dashed && second_line > first_line && column >= 2 {
        let before = Span {
            start: u32::try_from(second_line).unwrap_or(second.key.span.start),
            end: second.key.span.start,
            ..second.key.span
        };
        Write::edit(before, format!("{}- ", " ".repeat(column - 2)))
    } else {
        let private = format!("x-{}", second.key.text);
        Write::edit(second.key.span, private).remark("and a part of its own")
    };
    reader.report(problem.write(write));
}
