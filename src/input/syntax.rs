//! Mistakes in the form of a file, in plain words.
//!
//! What to write is tried before it is said: a change is proposed only when the gate, reading the
//! changed text, gets past the place.

use super::reader::single_quoted;
use crate::problem::{Code, Problem, Write};
use crate::source::yaml::{self, FaultKind, Syntax};
use crate::source::{Place, SourceFile, SourceSet, Span};

/// A mistake in the form of a text as a problem.
pub(super) fn problem(file: &SourceFile, span: Span, syntax: &Syntax) -> Problem {
    let (code, message, why) = words(file, span, syntax);
    let mut problem = Problem::new(code, message, Place::Text(marked(file, span, syntax)));
    problem.why = why;
    let proven = proposals(file, span, syntax)
        .into_iter()
        .find(|write| gets_past(file, span, write));
    match proven {
        Some(write) => problem.write(write),
        None => problem.write(Write::words(
            "compare the lines above with: filmwright help files",
        )),
    }
}

fn words(file: &SourceFile, span: Span, syntax: &Syntax) -> (Code, String, Option<String>) {
    let why = |text: &str| Some(text.to_owned());
    match syntax {
        Syntax::Tab => (
            Code::YamlTab,
            "a tab in the indentation".into(),
            why("a tab is as wide as the editor pleases; spaces show what belongs together"),
        ),
        Syntax::Indent => (
            Code::YamlIndent,
            "indented differently from the lines it belongs with".into(),
            why("keys of one record begin in the same column, deeper than the name of the record"),
        ),
        Syntax::QuoteOpen => (
            Code::YamlQuoteOpen,
            "quotation mark not closed".into(),
            why("everything behind it would be one text"),
        ),
        Syntax::QuoteTail => (
            Code::YamlQuoteTail,
            "text behind the closed quotation mark".into(),
            why(
                "a value that begins with a quotation mark ends with it; a value that holds some stands in single quotes as a whole",
            ),
        ),
        Syntax::Escape => (
            Code::YamlEscape,
            "a backslash in double quotes with a letter that has no meaning".into(),
            why("in single quotes a backslash is a backslash"),
        ),
        Syntax::Bracket { open, close } => (Code::YamlBracket, bracket(*open, *close), None),
        Syntax::Colon => (
            Code::YamlColon,
            "a colon and a space inside a value".into(),
            why("they would begin a record inside the value; in single quotes they are text"),
        ),
        Syntax::ColonSpace => (
            Code::YamlColonSpace,
            "no space behind the colon".into(),
            why("only a colon followed by a space parts a key from its value"),
        ),
        Syntax::KeyWanted => (
            Code::YamlKeyWanted,
            format!(
                "\"{}\" is neither a key with a value nor an item of a list",
                slice(file, span)
            ),
            why("a line reads key: value, or begins with a dash"),
        ),
        Syntax::Character(c) => character(*c),
        Syntax::Other(words) => (Code::YamlSyntax, words.clone(), None),
    }
}

fn character(c: char) -> (Code, String, Option<String>) {
    if c.is_control() || c == '\u{feff}' {
        let message = format!("the invisible character U+{:04X} in the text", u32::from(c));
        return (Code::YamlCharacter, message, None);
    }
    let why = "in single quotes it is text".to_owned();
    (
        Code::YamlCharacter,
        format!("{c} may not begin a value"),
        Some(why),
    )
}

fn bracket(open: Option<char>, close: Option<char>) -> String {
    match (open, close) {
        (Some(open), Some(close)) => format!("{open} is closed by {close}"),
        (Some(open), None) => format!("{open} is not closed"),
        (None, Some(close)) => format!("{close} closes nothing"),
        (None, None) => "a bracket is missing".into(),
    }
}

fn slice(file: &SourceFile, span: Span) -> &str {
    file.text
        .get(span.start as usize..span.end as usize)
        .unwrap_or("")
}

/// Tabs and invisible characters themselves are marked, not what stands round them.
fn marked(file: &SourceFile, span: Span, syntax: &Syntax) -> Span {
    match syntax {
        Syntax::Tab => tabs(file, span).unwrap_or(span),
        Syntax::Character(c) if c.is_control() => {
            let at = span.start as usize;
            let (_, end) = file.line_range(file.line_of(span.start));
            let found = file.text.get(at..end).and_then(|t| t.find(*c));
            found.map_or(span, |b| file.span(at + b, at + b + c.len_utf8()))
        }
        _ => span,
    }
}

/// The blanks at the beginning of the line, or before the place, that hold a tab.
fn tabs(file: &SourceFile, span: Span) -> Option<Span> {
    let (start, end) = file.line_range(file.line_of(span.start));
    let line = &file.text[start..end];
    let blank = line.len() - line.trim_start_matches([' ', '\t']).len();
    if line[..blank].contains('\t') {
        return Some(file.span(start, start + blank));
    }
    let tab = line.find('\t')?;
    let run = line[tab..].len() - line[tab..].trim_start_matches([' ', '\t']).len();
    Some(file.span(start + tab, start + tab + run))
}

fn proposals(file: &SourceFile, span: Span, syntax: &Syntax) -> Vec<Write> {
    let at = span.start as usize;
    let line = file.line_of(span.start);
    let (_, end) = file.line_range(line);
    let insert = |at: usize, text: &str| Write::edit(file.span(at, at), text);
    match syntax {
        Syntax::Tab => tab_proposals(file, span),
        Syntax::Indent => indents(file, line),
        Syntax::QuoteOpen => {
            let mark = &file.text[at..=at];
            vec![
                insert(before_comment(file, at, end), mark),
                insert(end, mark),
            ]
        }
        Syntax::QuoteTail | Syntax::Escape | Syntax::Colon => quoted(file, span, syntax),
        Syntax::ColonSpace => {
            let colon = slice(file, span).find(':').unwrap_or(0);
            vec![insert(at + colon + 1, " ")]
        }
        Syntax::Bracket { open, close } => brackets(file, span, *open, *close),
        Syntax::Character(c) if c.is_control() || *c == '\u{feff}' => {
            let bad = file.text[at..end].find(*c).map_or(at, |b| at + b);
            vec![
                Write::edit(file.span(bad, bad + c.len_utf8()), "")
                    .said("delete the character, or type the line anew"),
            ]
        }
        Syntax::Character(',' | ']' | '}') => vec![without(file, at, end)],
        Syntax::Character(_) => {
            let to = before_comment(file, at, end);
            let value = file.text[at..to].trim_end();
            vec![Write::edit(
                file.span(at, at + value.len()),
                single_quoted(value),
            )]
        }
        Syntax::KeyWanted | Syntax::Other(_) => commented(file, line, syntax),
    }
}

/// The value of the line in single quotes.
fn quoted(file: &SourceFile, span: Span, syntax: &Syntax) -> Vec<Write> {
    let (start, end) = file.line_range(file.line_of(span.start));
    let from = value_start(file, start, span.start as usize);
    let to = before_comment(file, from, end);
    let value = file.text[from..to].trim_end();
    let whole = file.span(from, from + value.len());
    let bare = value.trim_matches(['"', '\'']);
    let first = if *syntax == Syntax::Escape {
        bare
    } else {
        value
    };
    [first, bare]
        .map(|text| Write::edit(whole, single_quoted(text)))
        .to_vec()
}

/// The line as a comment; before that, its value in single quotes where that may help.
fn commented(file: &SourceFile, line: usize, syntax: &Syntax) -> Vec<Write> {
    let (start, end) = file.line_range(line);
    let text = file.text[start..end].trim_start();
    let from = end - text.len();
    let value = value_start(file, start, end);
    let to = before_comment(file, value, end);
    let mut writes = Vec::new();
    if matches!(syntax, Syntax::Other(_)) && value > from {
        let text = single_quoted(&file.text[value..to]);
        writes.push(Write::edit(file.span(value, to), text));
    }
    writes.push(Write::edit(file.span(from, from), "# ").remark("or key: value"));
    writes
}

/// The line without one character and the blanks behind it.
fn without(file: &SourceFile, at: usize, end: usize) -> Write {
    let rest = file.text[at..end]
        .char_indices()
        .nth(1)
        .map_or(end, |(i, _)| at + i);
    let blanks = file.text[rest..end].len() - file.text[rest..end].trim_start().len();
    Write::edit(file.span(at, rest + blanks), "")
}

fn tab_proposals(file: &SourceFile, span: Span) -> Vec<Write> {
    let Some(tabs) = tabs(file, span) else {
        return Vec::new();
    };
    let blanks = slice(file, tabs);
    let widths = [2, 4, 1, 8];
    let spaces = widths.map(|w| blanks.replace('\t', &" ".repeat(w)));
    spaces.map(|s| Write::edit(tabs, s)).to_vec()
}

/// The line with each indentation in use above it, the nearest first.
fn indents(file: &SourceFile, line: usize) -> Vec<Write> {
    let (start, end) = file.line_range(line);
    let text = &file.text[start..end];
    let own = text.len() - text.trim_start().len();
    let above = (1..line).rev().map(|l| file.line(l));
    let mut levels: Vec<usize> = above
        .filter(|l| !l.trim().is_empty() && !l.trim_start().starts_with('#'))
        .take(200)
        .flat_map(|l| {
            let indent = l.len() - l.trim_start().len();
            let item = l.trim_start().starts_with("- ");
            [indent, indent + if item { 2 } else { 0 }]
        })
        .filter(|l| *l != own)
        .collect();
    levels.sort_unstable();
    levels.dedup();
    levels.sort_by_key(|l| (l.abs_diff(own), *l));
    let mut writes: Vec<Write> = levels
        .into_iter()
        .map(|l| Write::edit(file.span(start, start + own), " ".repeat(l)))
        .collect();
    // `key: - item`: the item goes to a line of its own.
    if let Some(at) = text.find(": - ") {
        let break_ = format!("\n{}", " ".repeat(own + 2));
        writes.insert(
            0,
            Write::edit(file.span(start + at + 1, start + at + 2), break_),
        );
    }
    writes
}

fn brackets(file: &SourceFile, span: Span, open: Option<char>, close: Option<char>) -> Vec<Write> {
    let at = span.start as usize;
    let (start, end) = file.line_range(file.line_of(span.start));
    let partner = |open: char| if open == '[' { "]" } else { "}" };
    match (open, close) {
        (Some(open), Some(close)) => file.text[at..]
            .find(close)
            .map(|c| Write::edit(file.span(at + c, at + c + 1), partner(open)))
            .into_iter()
            .collect(),
        (Some(open), None) => {
            let ends = before_comment(file, at, end);
            let padded = if file.text[at..].starts_with("{ ") {
                " }"
            } else {
                partner(open)
            };
            vec![
                Write::edit(file.span(ends, ends), padded),
                Write::edit(file.span(at, ends), single_quoted(&file.text[at..ends])),
            ]
        }
        _ => {
            let from = value_start(file, start, at);
            let to = before_comment(file, from, end);
            let value = &file.text[from..to];
            vec![
                without(file, at, end),
                Write::edit(file.span(from, to), single_quoted(value)),
            ]
        }
    }
}

/// Where the value of a line begins, behind its first key.
fn value_start(file: &SourceFile, start: usize, at: usize) -> usize {
    let line = &file.text[start..at];
    let colon = line.find(": ").map(|c| start + c + 1);
    let dash = line.find("- ").map(|d| start + d + 1);
    let from = colon.or(dash).unwrap_or(start);
    from + (file.text[from..].len() - file.text[from..].trim_start_matches(' ').len())
}

/// The end of a line without its comment.
fn before_comment(file: &SourceFile, from: usize, end: usize) -> usize {
    let rest = &file.text[from.min(end)..end];
    from + rest
        .find(" #")
        .map_or(rest, |c| &rest[..c])
        .trim_end()
        .len()
}

/// Whether the gate, reading the changed text, gets past the line.
fn gets_past(file: &SourceFile, span: Span, write: &Write) -> bool {
    let mut set = SourceSet::new();
    set.add(&file.path, &file.text);
    let mut write = write.clone();
    for edit in &mut write.edits {
        edit.span.file.0 = 0;
    }
    let Some((id, text)) = write.applied(&set) else {
        return false;
    };
    let line = file.line_of(span.start);
    let after = yaml::read(id, &text);
    let mut changed = SourceSet::new();
    let changed_id = changed.add(&file.path, &text);
    let changed = changed.file(changed_id);
    after
        .faults
        .iter()
        .filter(|f| matches!(f.kind, FaultKind::Syntax(_) | FaultKind::Depth { .. }))
        .all(|f| changed.is_some_and(|c| c.line_of(f.span.start) > line))
}
