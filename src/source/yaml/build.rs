//! Events of the scanner into the tree.

use super::fault::{Fault, FaultKind};
use super::{Entry, Gated, Key, MAX_DEPTH, Node, NodeKind, Scalar, Style, narrow};
use crate::source::place::{FileId, Span};
use granit_parser::{Event, Parser, ScalarStyle, StructureStyle};

/// A record or list not yet closed.
pub(super) enum Open {
    Map {
        start: usize,
        flow: bool,
        entries: Vec<Entry>,
        key: Option<Key>,
    },
    Seq {
        start: usize,
        flow: bool,
        items: Vec<Node>,
    },
}

/// The text of a merge key, and of any key that cannot be one; what stands behind it is left out.
const REFUSED_KEY: &str = "<<";

pub(super) struct Builder<'t> {
    file: FileId,
    pub(super) text: &'t str,
    pub(super) stack: Vec<Open>,
    root: Option<Node>,
    faults: Vec<Fault>,
    /// Documents begun.
    documents: usize,
    /// End of the event before.
    last_end: usize,
    /// How many of the open records and lists stand in brackets.
    bracketed: usize,
    /// Bytes of the last scalar, for mistakes that are found only behind it.
    pub(super) last_scalar: (usize, usize),
}

pub(super) fn read(file: FileId, text: &str) -> Gated {
    let options = granit_parser::options! {
        emit_anchor_events: true,
        emit_unresolved_aliases: true,
        disallow_directives: true,
        flow_nesting_limit: MAX_DEPTH + 1,
        block_nesting_limit: MAX_DEPTH + 1,
    };
    let mut builder = Builder {
        file,
        text,
        stack: Vec::new(),
        root: None,
        faults: Vec::new(),
        documents: 0,
        last_end: 0,
        bracketed: 0,
        last_scalar: (0, 0),
    };
    let mut complete = true;
    for event in Parser::new_from_str_with_options(text, options) {
        let done = match event {
            Ok((event, span)) => {
                let range = span.byte_range().unwrap_or(text.len()..text.len());
                builder.take(&event, range.start, range.end)
            }
            Err(error) => Err(Some(builder.syntax(&error))),
        };
        match done {
            Ok(()) => {}
            Err(None) => break,
            Err(Some(fault)) => {
                builder.faults.push(fault);
                complete = false;
                break;
            }
        }
    }
    builder.finish(complete)
}

impl Builder<'_> {
    /// Takes one event; `Err(None)` ends the reading, `Err(Some(_))` breaks it off.
    fn take(&mut self, event: &Event<'_>, start: usize, end: usize) -> Result<(), Option<Fault>> {
        if let Some(tag) = event.tag() {
            let name = tag.to_string();
            self.fault(FaultKind::Tag(name), self.tag_start(start), start);
        }
        match event {
            Event::DocumentStart(..) => {
                self.documents += 1;
                if self.documents > 1 {
                    self.fault(FaultKind::SecondDocument, start, end);
                    return Err(None);
                }
            }
            Event::Scalar(text, style, ..) => {
                let node = self.scalar(text, *style, start, end);
                self.place(node);
            }
            Event::Alias(_) | Event::UnresolvedAlias(_) => {
                let name = self.text.get(start + 1..end).unwrap_or("").to_owned();
                self.fault(FaultKind::Alias(name), start, end);
                self.place(Node {
                    span: self.span(start, end),
                    kind: NodeKind::Refused,
                });
            }
            Event::Anchor(_, name) => {
                self.fault(FaultKind::Anchor(name.to_string()), start, end);
                return Ok(()); // stands before its node: does not move the reading on
            }
            Event::MappingStart(style, ..) => self.open(
                Open::Map {
                    start,
                    flow: matches!(style, StructureStyle::Flow),
                    entries: Vec::new(),
                    key: None,
                },
                start,
            )?,
            Event::SequenceStart(style, ..) => self.open(
                Open::Seq {
                    start,
                    flow: matches!(style, StructureStyle::Flow),
                    items: Vec::new(),
                },
                start,
            )?,
            Event::MappingEnd | Event::SequenceEnd => self.close(end, false),
            _ => {}
        }
        self.last_end = end.max(self.last_end);
        Ok(())
    }

    fn fault(&mut self, kind: FaultKind, start: usize, end: usize) {
        let span = self.span(start, end);
        self.faults.push(Fault { kind, span });
    }

    pub(super) fn span(&self, start: usize, end: usize) -> Span {
        Span {
            file: self.file,
            start: narrow(start),
            end: narrow(end.max(start)),
        }
    }

    /// A tag stands before its value, behind the event before.
    fn tag_start(&self, start: usize) -> usize {
        self.text
            .get(self.last_end..start)
            .and_then(|between| between.find('!'))
            .map_or(start, |at| self.last_end + at)
    }

    fn scalar(&mut self, text: &str, style: ScalarStyle, start: usize, end: usize) -> Node {
        let style = match style {
            ScalarStyle::SingleQuoted => Style::Single,
            ScalarStyle::DoubleQuoted => Style::Double,
            ScalarStyle::Literal | ScalarStyle::Folded => Style::Block,
            ScalarStyle::Plain => Style::Plain,
        };
        let (start, end, text) = match style {
            Style::Plain if start == end => {
                let at = self.behind_colon(start);
                (at, at, "")
            }
            Style::Block => {
                let written = &self.text[start..end];
                let begin = self
                    .text
                    .get(self.last_end..start)
                    .and_then(|between| between.find(['|', '>']))
                    .map_or(start, |at| self.last_end + at);
                (begin, start + written.trim_end().len(), text)
            }
            _ => (start, end, text),
        };
        self.last_scalar = (start, end);
        Node {
            span: self.span(start, end),
            kind: NodeKind::Scalar(Scalar {
                text: text.to_owned(),
                style,
                in_brackets: self.bracketed > 0,
            }),
        }
    }

    /// The place a missing value would take: behind the colon of its key.
    fn behind_colon(&self, start: usize) -> usize {
        let rest = self.text.get(start..).unwrap_or("");
        let colon = rest.len() - rest.trim_start_matches(' ').len();
        if rest[colon..].starts_with(':') {
            start + colon + 1
        } else {
            start
        }
    }

    fn open(&mut self, open: Open, start: usize) -> Result<(), Option<Fault>> {
        if self.stack.len() >= MAX_DEPTH {
            return Err(Some(Fault {
                kind: FaultKind::Depth { limit: MAX_DEPTH },
                span: self.span(start, start + 1),
            }));
        }
        let (Open::Map { flow, .. } | Open::Seq { flow, .. }) = &open;
        self.bracketed += usize::from(*flow);
        self.stack.push(open);
        Ok(())
    }

    fn close(&mut self, end: usize, cut_off: bool) {
        let node = match self.stack.pop() {
            Some(Open::Map {
                start,
                flow,
                entries,
                ..
            }) => {
                self.bracketed -= usize::from(flow);
                let last = entries.last().map(|e| e.value.span.end as usize);
                let end = last.filter(|_| !flow).unwrap_or(end);
                (start, end, NodeKind::Map(entries))
            }
            Some(Open::Seq { start, flow, items }) => {
                self.bracketed -= usize::from(flow);
                let last = items.last().map(|n| n.span.end as usize);
                let end = last.filter(|_| !flow).unwrap_or(end);
                (start, end, NodeKind::Seq(items))
            }
            None => return,
        };
        // A bracketed collection ends at its bracket, any other with its last value.
        let (start, end, kind) = node;
        let node = Node {
            span: self.span(start, end),
            kind: if cut_off { NodeKind::Refused } else { kind },
        };
        self.place(node);
    }

    fn place(&mut self, node: Node) {
        match self.stack.last_mut() {
            None => self.root = Some(node),
            Some(Open::Seq { items, .. }) => items.push(node),
            Some(Open::Map { entries, key, .. }) => match key.take() {
                Some(key) if key.text == REFUSED_KEY => {}
                Some(key) => entries.push(Entry { key, value: node }),
                None => self.key(node),
            },
        }
    }

    fn key(&mut self, node: Node) {
        let span = node.span;
        let text = if let NodeKind::Scalar(s) = node.kind {
            if s.text == REFUSED_KEY && s.style == Style::Plain {
                self.fault(FaultKind::Merge, span.start as usize, span.end as usize);
            }
            s.text
        } else {
            self.fault(
                FaultKind::KeyNotText,
                span.start as usize,
                span.end as usize,
            );
            REFUSED_KEY.to_owned()
        };
        if let Some(Open::Map { key, .. }) = self.stack.last_mut() {
            *key = Some(Key { text, span });
        }
    }

    /// Closes what is open and hands the tree over.
    fn finish(mut self, complete: bool) -> Gated {
        if !complete {
            self.drop_last();
        }
        while let Some(open) = self.stack.last() {
            let (Open::Map { flow, .. } | Open::Seq { flow, .. }) = open;
            // Where a bracket is open at the break, nobody knows what belongs inside it.
            let cut_off = *flow;
            self.close(self.last_end, cut_off);
        }
        if self.root.is_none() && complete {
            self.fault(FaultKind::Empty, 0, 0);
        }
        Gated {
            root: self.root,
            complete,
            faults: self.faults,
        }
    }

    /// What stands right before a break is part of the mistake: it is not read.
    fn drop_last(&mut self) {
        let from = narrow(self.last_scalar.0);
        match self.stack.last_mut() {
            Some(Open::Map { entries, key, .. }) => {
                *key = None;
                entries.retain(|e| e.value.span.start < from);
            }
            Some(Open::Seq { items, .. }) => items.retain(|n| n.span.start < from),
            None => {}
        }
    }
}
