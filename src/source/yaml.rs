//! YAML as a tree in which every key and value knows its bytes.
//!
//! The gate of every file: anchors, aliases, merge keys, tags, directives, second documents and
//! nesting beyond [`MAX_DEPTH`] are refused, each with its place, so that every value has one
//! origin and no file can blow up. Every scalar stays text: `no` is not a truth value, `12:30`
//! not a number, `0104` keeps its zero. What the text is, the reader decides.

mod build;
mod fault;
mod offence;

pub use fault::{Fault, FaultKind, Syntax};

use super::place::{FileId, Span};
use std::ops::Range;

/// Records and lists may be nested this deep.
pub const MAX_DEPTH: usize = 64;

/// A value with its bytes.
#[derive(Clone, Debug, PartialEq)]
pub struct Node {
    /// Where it stands; quotation marks and brackets included.
    pub span: Span,
    /// What it is.
    pub kind: NodeKind,
}

/// What a value is.
#[derive(Clone, Debug, PartialEq)]
pub enum NodeKind {
    /// Text.
    Scalar(Scalar),
    /// Keys with values, in the order written.
    Map(Vec<Entry>),
    /// Values in the order written.
    Seq(Vec<Node>),
    /// Something the gate refused; already reported.
    Refused,
}

/// A text.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Scalar {
    /// As read: without quotation marks, escapes resolved, lines folded.
    pub text: String,
    /// How it was written.
    pub style: Style,
    /// Whether it stands in a list or record in brackets, where a comma would end it.
    pub in_brackets: bool,
}

/// How a text was written.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Style {
    /// Without quotation marks.
    Plain,
    /// In single quotes.
    Single,
    /// In double quotes.
    Double,
    /// As a block, `|` or `>`.
    Block,
}

/// A key.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Key {
    /// Its text.
    pub text: String,
    /// Where it stands.
    pub span: Span,
}

/// A key with its value.
#[derive(Clone, Debug, PartialEq)]
pub struct Entry {
    /// The key.
    pub key: Key,
    /// The value.
    pub value: Node,
}

/// A text read through the gate.
#[derive(Clone, Debug)]
pub struct Gated {
    /// The tree, as far as it could be read; `None` where the file holds nothing.
    pub root: Option<Node>,
    /// Whether the whole file was read.
    pub complete: bool,
    /// What was refused.
    pub faults: Vec<Fault>,
}

/// Reads a text into a tree, with everything the gate refuses.
pub fn read(file: FileId, text: &str) -> Gated {
    build::read(file, text)
}

impl Node {
    /// The text, if it is one.
    pub fn text(&self) -> Option<&str> {
        match &self.kind {
            NodeKind::Scalar(s) => Some(&s.text),
            _ => None,
        }
    }

    /// The entries, if it is a record.
    pub fn entries(&self) -> Option<&[Entry]> {
        match &self.kind {
            NodeKind::Map(entries) => Some(entries),
            _ => None,
        }
    }

    /// The items, if it is a list.
    pub fn items(&self) -> Option<&[Node]> {
        match &self.kind {
            NodeKind::Seq(items) => Some(items),
            _ => None,
        }
    }

    /// Whether nothing was written: `key:` with an empty rest of the line.
    pub fn is_blank(&self) -> bool {
        matches!(&self.kind, NodeKind::Scalar(s) if s.text.is_empty() && s.style == Style::Plain)
    }

    /// The bytes of a part of the text, given by its bytes in the text as read; the whole value
    /// where escapes or folding hide the way back.
    pub fn part(&self, source: &str, part: Range<usize>) -> Span {
        let NodeKind::Scalar(scalar) = &self.kind else {
            return self.span;
        };
        let written = source
            .get(self.span.start as usize..self.span.end as usize)
            .unwrap_or("");
        let ends = match scalar.style {
            Style::Plain => way_back(&scalar.text, written, part),
            Style::Single | Style::Double => written
                .get(1..written.len().saturating_sub(1))
                .and_then(|inner| way_back(&scalar.text, inner, part))
                .map(|(from, to)| (from + 1, to + 1)),
            Style::Block => None,
        };
        match ends {
            Some((from, to)) => Span {
                file: self.span.file,
                start: self.span.start + narrow(from),
                end: self.span.start + narrow(to),
            },
            None => self.span,
        }
    }
}

/// Bytes in the text as written for bytes in the text as read, where the two differ at most by
/// line breaks folded into a space.
fn way_back(read: &str, written: &str, part: Range<usize>) -> Option<(usize, usize)> {
    if read == written {
        return Some((part.start, part.end));
    }
    let mut at = Vec::with_capacity(read.len() + 1);
    let mut rest = written.char_indices().peekable();
    for c in read.chars() {
        let (from, w) = rest.next()?;
        let folded = c.is_whitespace() && w.is_whitespace();
        if c != w && !folded {
            return None;
        }
        at.extend(std::iter::repeat_n(from, c.len_utf8()));
        while folded && w != c && rest.peek().is_some_and(|(_, w)| w.is_whitespace()) {
            rest.next();
        }
    }
    at.push(written.len());
    let end = part.end.checked_sub(1).map_or(0, |last| {
        let from = at.get(last).copied().unwrap_or(0);
        from + written[from..].chars().next().map_or(0, char::len_utf8)
    });
    Some((*at.get(part.start)?, end.max(*at.get(part.start)?)))
}

fn narrow(at: usize) -> u32 {
    u32::try_from(at).unwrap_or(u32::MAX)
}

#[cfg(test)]
mod tests;
