//! Problems as people read them: what, where, the user's own line with the place marked, why,
//! what to write. The snippet is drawn by the snippet library, the words around it are ours.

use super::{Problem, Problems, Severity, Write};
use crate::source::place::Cell;
use crate::source::{COMMAND_LINE, Place, SourceFile, SourceSet, Span};
use annotate_snippets::{AnnotationKind, Group, Level, Renderer, Snippet};
use std::fmt::Write as _;

/// How many problems of one file are printed before the rest are only counted.
pub const SHOWN_PER_FILE: usize = 20;

/// How wide and how coloured.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Look {
    /// Columns of the terminal; 80 where there is none.
    pub width: usize,
    /// Whether to colour the mark and the severity.
    pub colour: bool,
}

impl Default for Look {
    fn default() -> Self {
        Self {
            width: 80,
            colour: false,
        }
    }
}

/// Spaces between two things on one line that are not one sentence.
const GAP: &str = "      ";
/// Column at which the name in brackets begins, where the message leaves room.
const NAME_COLUMN: usize = 64;
/// Columns taken by the words `why`, `write` and their like.
const HANG: usize = 9;

/// All problems in the order of files and places, at most [`SHOWN_PER_FILE`] of one file.
pub fn all(set: &SourceSet, problems: &Problems, look: Look) -> String {
    let mut out = String::new();
    let sorted = problems.sorted();
    let file_of = |p: &Problem| p.position().0;
    for group in sorted.chunk_by(|a, b| file_of(a) == file_of(b)) {
        for problem in group.iter().take(SHOWN_PER_FILE) {
            out.push_str(&one(set, problem, look));
            out.push('\n');
        }
        if let Some(more) = group.len().checked_sub(SHOWN_PER_FILE).filter(|n| *n > 0) {
            let path = file_of(group[0])
                .and_then(|id| set.files().get(id as usize))
                .map_or("", |f| f.path.as_str());
            let _ = writeln!(out, "and {more} more in {path}\n");
        }
    }
    out
}

/// One problem, ending with a line break.
pub fn one(set: &SourceSet, problem: &Problem, look: Look) -> String {
    let mut out = head(problem, look);
    out.push_str(&where_it_is(set, problem, look));
    sentence(&mut out, "why", problem.why.as_deref(), look);
    sentence(&mut out, "so", problem.so.as_deref(), look);
    out.push_str(&writes(set, &problem.write, look));
    sentence(&mut out, "ask", problem.ask.as_deref(), look);
    out
}

fn head(problem: &Problem, look: Look) -> String {
    let word = problem.severity.word();
    let plain = format!("{word}: {}", problem.message);
    let pad = NAME_COLUMN
        .saturating_sub(plain.chars().count())
        .max(GAP.len());
    let name = problem.code.as_str();
    let shown = if look.colour {
        let colour = match problem.severity {
            Severity::Error => "31",
            Severity::Warning => "33",
            Severity::Note => "34",
        };
        format!("\u{1b}[1;{colour}m{word}\u{1b}[0m: {}", problem.message)
    } else {
        plain
    };
    format!("{shown}{:pad$}[{name}]\n", "")
}

fn where_it_is(set: &SourceSet, problem: &Problem, look: Look) -> String {
    let mut tail = String::new();
    for (place, says) in &problem.related {
        let _ = write!(tail, " and {}", set.shown(place));
        if !says.is_empty() {
            let _ = write!(tail, " ({says})");
        }
    }
    if let Some(within) = &problem.within {
        let _ = write!(tail, "  {within}");
    }
    if let Some(meant) = &problem.did_you_mean {
        let _ = write!(tail, "{GAP}did you mean \"{meant}\"?");
    }
    match &problem.place {
        Place::Text(span) => match set.file(span.file) {
            Some(file) => snippet(file, *span, problem, look, &tail),
            None => String::new(),
        },
        Place::Cell(cell) => format!("{}{tail}\n", cell_place(set, cell)),
        Place::Program if tail.trim().is_empty() => String::new(),
        Place::Program => format!("  {}\n", tail.trim_start()),
        place @ (Place::Rule(_) | Place::Flag(_)) => format!("  {}{tail}\n", set.shown(place)),
    }
}

fn cell_place(set: &SourceSet, cell: &Cell) -> String {
    format!("  {}", set.shown(&Place::Cell(cell.clone())))
}

/// The user's line with the place marked, as the library draws it, the tail behind the place.
fn snippet(file: &SourceFile, span: Span, problem: &Problem, look: Look, tail: &str) -> String {
    let renderer = if look.colour {
        Renderer::styled()
    } else {
        Renderer::plain()
    };
    let line = file.line_of(span.start);
    let (start, end) = file.line_range(line);
    // Only the first line is drawn: a record of many lines is named by its beginning.
    let inside = |at: u32| file.boundary(at).clamp(start, end) - start;
    let from = inside(span.start);
    let to = inside(span.end).max(from);
    let mut mark = AnnotationKind::Primary.span(from..to);
    if let Some(label) = &problem.label {
        mark = mark.label(label.as_str());
    }
    let level = match problem.severity {
        Severity::Error => Level::ERROR,
        Severity::Warning => Level::WARNING,
        Severity::Note => Level::NOTE,
    };
    let shown = file.line(line);
    let path = if file.path == COMMAND_LINE {
        format!("<{COMMAND_LINE}>")
    } else {
        file.path.clone()
    };
    let source = Snippet::source(shown)
        .line_start(line)
        .path(path.as_str())
        .annotation(mark);
    let drawn = renderer
        .term_width(look.width.max(60))
        .render(&[Group::with_level(level).element(source)]);
    let (place, rest) = drawn.split_once('\n').unwrap_or((drawn.as_str(), ""));
    format!("{}{tail}\n{}\n", place.trim_end(), rest.trim_end())
}

fn sentence(out: &mut String, word: &str, text: Option<&str>, look: Look) {
    if let Some(text) = text {
        let room = look.width.saturating_sub(HANG).max(30);
        for (i, line) in wrapped(text, room).iter().enumerate() {
            let word = if i == 0 { word } else { "" };
            let _ = writeln!(out, "  {word:<6} {line}");
        }
    }
}

/// The mended lines: alternatives on one line where they are short.
fn writes(set: &SourceSet, writes: &[Write], look: Look) -> String {
    let shown: Vec<Vec<String>> = writes.iter().map(|w| w.shown(set)).collect();
    let single = shown.iter().all(|lines| lines.len() == 1);
    let joined = shown
        .iter()
        .flatten()
        .cloned()
        .collect::<Vec<_>>()
        .join("        or        ");
    let remarks = writes.iter().any(|w| w.remark.is_some());
    let mut out = String::new();
    if single && writes.len() > 1 && !remarks && joined.chars().count() + HANG <= look.width {
        let _ = writeln!(out, "  write  {joined}");
        return out;
    }
    for (i, (write, lines)) in writes.iter().zip(&shown).enumerate() {
        let word = if i == 0 { "write" } else { "or" };
        for (j, line) in lines.iter().enumerate() {
            let word = if j == 0 { word } else { "" };
            let last = j + 1 == lines.len();
            let remark = write.remark.as_deref().filter(|_| last);
            let _ = write!(out, "  {word:<6} {line}");
            out.push_str(&beside(line, remark, look));
            out.push('\n');
        }
    }
    out
}

/// A remark behind a line where it fits, else below it.
fn beside(line: &str, remark: Option<&str>, look: Look) -> String {
    let Some(remark) = remark else {
        return String::new();
    };
    let taken = HANG + line.chars().count() + GAP.len();
    if taken + remark.chars().count() <= look.width.max(90) {
        return format!("{GAP}{remark}");
    }
    let room = look.width.saturating_sub(HANG).max(30);
    wrapped(remark, room)
        .iter()
        .fold(String::new(), |mut out, line| {
            let _ = write!(out, "\n{:HANG$}{line}", "");
            out
        })
}

/// Words filled into lines of so many columns; a word longer than that stands alone.
fn wrapped(text: &str, room: usize) -> Vec<String> {
    let mut lines = Vec::new();
    let mut line = String::new();
    for word in text.split(' ') {
        let fits = line.chars().count() + 1 + word.chars().count() <= room;
        if !line.is_empty() && !fits {
            lines.push(std::mem::take(&mut line));
        }
        if !line.is_empty() {
            line.push(' ');
        }
        line.push_str(word);
    }
    lines.push(line);
    lines
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::problem::Code;

    fn set() -> SourceSet {
        let mut set = SourceSet::new();
        set.add(
            "site.yaml",
            "machines:\n  CV-104:\n    sump rise: 42 degC\n",
        );
        set
    }

    fn span(set: &SourceSet, text: &str) -> Span {
        let file = &set.files()[0];
        let at = file.text.find(text).expect("in the file");
        file.span(at, at + text.len())
    }

    #[test]
    fn says_what_where_why_and_what_to_write() {
        let set = set();
        let place = span(&set, "42 degC");
        let problem = Problem::new(
            Code::RiseNotTemperature,
            "this is a temperature, a temperature rise is wanted",
            Place::Text(place),
        )
        .within("CV-104")
        .why("42 degC could mean 42 K above ambient, or a sump at 42 °C")
        .write(Write::edit(place, "42 K"))
        .write(Write::edit(
            span(&set, "sump rise: 42 degC"),
            "sump: 42 degC",
        ));
        let want = "\
error: this is a temperature, a temperature rise is wanted      [rise-not-temperature]
 --> site.yaml:3:16  CV-104
  |
3 |     sump rise: 42 degC
  |                ^^^^^^^
  why    42 degC could mean 42 K above ambient, or a sump at 42 °C
  write  sump rise: 42 K        or        sump: 42 degC
";
        assert_eq!(one(&set, &problem, Look::default()), want);
    }

    #[test]
    fn counts_what_it_does_not_print() {
        let set = set();
        let mut problems = Problems::new();
        for at in 0..25 {
            let place = Place::Text(set.files()[0].span(at, at + 1));
            problems.error(Problem::new(Code::UnitMissing, "no unit", place));
        }
        let text = all(&set, &problems, Look::default());
        assert_eq!(text.matches("[unit-missing]").count(), 20);
        assert!(text.contains("and 5 more in site.yaml"));
    }

    #[test]
    fn wraps_sentences_and_keeps_lines_to_be_copied() {
        let lines = wrapped("one two three four", 9);
        assert_eq!(lines, ["one two", "three", "four"]);
    }
}
