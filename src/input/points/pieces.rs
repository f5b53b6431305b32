//! A list in brackets, put together again where commas in remarks have split it.

use crate::input::fields::Slot;
use crate::input::fields::words::value_wanted;
use crate::input::reader::Reader;
use crate::input::value::{Clauses, clauses};
use crate::source::Span;
use crate::source::yaml::{Node, NodeKind, Scalar, Style};

/// One item of a list: a node of its own, that may cover several of the file.
#[derive(Clone, Debug)]
pub struct Piece {
    /// The node.
    pub node: Node,
}

impl Piece {
    /// Its text.
    pub fn text(&self) -> &str {
        self.node.text().unwrap_or("")
    }
}

/// The items of a list with the clauses that stand behind the whole of it.
///
/// A clause between items belongs to the item before it, behind the last one to the list.
pub fn pieces(reader: &mut Reader<'_>, slot: &Slot<'_>) -> Option<(Vec<Piece>, Clauses)> {
    let single = slot.node.text().is_some();
    let nodes: Vec<&Node> = if single {
        vec![slot.node]
    } else if let Some(items) = slot.node.items() {
        items.iter().collect()
    } else {
        value_wanted(reader, slot);
        return None;
    };
    let mut found: Vec<Piece> = Vec::new();
    let mut pending: Vec<Node> = Vec::new();
    for node in joined(reader, &nodes) {
        let Some(text) = node.text() else {
            let inner = Slot {
                node: &node,
                ..slot.clone()
            };
            value_wanted(reader, &inner);
            return None;
        };
        if !single && is_clause(&node, text) {
            pending.push(node);
            continue;
        }
        if let Some(last) = found.last_mut()
            && !pending.is_empty()
        {
            last.node = spanning(reader, &last.node, pending.last().unwrap_or(&node));
        }
        pending.clear();
        found.push(Piece { node });
    }
    let whole = behind(reader, slot, &pending)?;
    Some((found, whole))
}

fn is_clause(node: &Node, text: &str) -> bool {
    let quoted = matches!(&node.kind, NodeKind::Scalar(s) if s.style == Style::Double);
    let value = text.starts_with(|c: char| c.is_ascii_digit()) || super::grade::opens(text);
    clauses::opens(text) || (quoted && !value && !text.starts_with("VI "))
}

/// The clauses behind a list.
fn behind(reader: &mut Reader<'_>, slot: &Slot<'_>, pending: &[Node]) -> Option<Clauses> {
    let (Some(first), Some(last)) = (pending.first(), pending.last()) else {
        return Some(Clauses::default());
    };
    let node = spanning(reader, first, last);
    let text = format!(", {}", node.text().unwrap_or(""));
    let split = clauses::split(&text);
    if split.faults.is_empty() {
        return Some(split.clauses);
    }
    let mut faults = split.faults;
    for fault in &mut faults {
        let back = |at: usize| at.saturating_sub(2);
        fault.part = back(fault.part.start)..back(fault.part.end);
        for mend in &mut fault.mends {
            mend.part = back(mend.part.start)..back(mend.part.end);
        }
    }
    reader.faults(&node, faults, &slot.within);
    None
}

/// Joins items that a comma inside a remark or a number has split.
fn joined(reader: &Reader<'_>, nodes: &[&Node]) -> Vec<Node> {
    let mut out: Vec<Node> = Vec::new();
    for node in nodes {
        let join = out
            .last()
            .is_some_and(|before| open_quote(before) || split_number(reader, before, node));
        match out.last_mut() {
            Some(before) if join => *before = spanning(reader, before, node),
            _ => out.push((*node).clone()),
        }
    }
    out
}

fn open_quote(node: &Node) -> bool {
    matches!(&node.kind, NodeKind::Scalar(s) if s.style == Style::Plain && s.text.matches('"').count() % 2 == 1)
}

/// `26,4 mm2/s`: figures on both sides of a comma without a space.
fn split_number(reader: &Reader<'_>, before: &Node, node: &Node) -> bool {
    let between = Span {
        start: before.span.end,
        end: node.span.start,
        ..node.span
    };
    let figures = |text: Option<&str>, at_end: bool| {
        let text = text.unwrap_or("");
        let c = if at_end {
            text.chars().next_back()
        } else {
            text.chars().next()
        };
        c.is_some_and(|c| c.is_ascii_digit())
    };
    reader.set.slice(between) == "," && figures(before.text(), true) && figures(node.text(), false)
}

/// One text from the beginning of a node to the end of another, as it stands in the file.
fn spanning(reader: &Reader<'_>, first: &Node, last: &Node) -> Node {
    let span = Span {
        end: last.span.end,
        ..first.span
    };
    Node {
        span,
        kind: NodeKind::Scalar(Scalar {
            text: reader.set.slice(span).to_owned(),
            style: Style::Plain,
            in_brackets: true,
        }),
    }
}
