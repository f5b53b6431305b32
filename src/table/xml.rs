//! Events of an XML part: names without their prefix, attributes unescaped, texts put together.

use super::Fault;
use super::limits::{self, Limit};
use quick_xml::events::{BytesRef, BytesStart, Event};
use quick_xml::{Reader, XmlVersion};
use std::cell::Cell;
use std::io::BufRead;
use std::rc::Rc;

/// A part being read.
pub(super) struct Xml<R> {
    reader: Reader<R>,
    buffer: Vec<u8>,
    part: String,
    left: Rc<Cell<u64>>,
    depth: usize,
    elements: usize,
}

/// What comes next.
pub(super) enum Next {
    /// An element opens.
    Open(Tag),
    /// An element closes.
    Close(String),
    /// Text.
    Text(String),
    /// The part ends.
    End,
}

/// An opening element.
pub(super) struct Tag {
    /// Its name without prefix.
    pub(super) name: String,
    attributes: Vec<(String, String)>,
}

impl Tag {
    /// An attribute by its name without prefix.
    pub(super) fn get(&self, name: &str) -> Option<&str> {
        let found = self.attributes.iter().find(|(n, _)| n == name);
        found.map(|(_, value)| value.as_str())
    }

    /// A whole number.
    pub(super) fn number(&self, name: &str) -> Option<u32> {
        self.get(name)?.trim().parse().ok()
    }

    /// Whether an attribute says yes.
    pub(super) fn yes(&self, name: &str) -> bool {
        self.get(name).is_some_and(|v| v == "1" || v == "true")
    }
}

/// Elements nested deeper than any workbook nests them.
const DEEPEST: usize = 256;

impl<R: BufRead> Xml<R> {
    pub(super) fn new(input: R, part: &str, left: Rc<Cell<u64>>) -> Self {
        let mut reader = Reader::from_reader(input);
        reader.config_mut().expand_empty_elements = true;
        Self {
            reader,
            buffer: Vec::new(),
            part: part.to_owned(),
            left,
            depth: 0,
            elements: 0,
        }
    }

    /// The next event that says anything.
    pub(super) fn next(&mut self) -> Result<Next, Fault> {
        loop {
            self.buffer.clear();
            let event = match self.reader.read_event_into(&mut self.buffer) {
                Ok(event) => event,
                Err(_) if self.left.get() == 0 => {
                    return Err(Fault::too_large(Limit::UnpackedBytes));
                }
                Err(error) => return Err(Fault::damaged(&self.part, error)),
            };
            match event {
                Event::Start(start) => {
                    self.depth += 1;
                    self.elements += 1;
                    if self.elements > limits::ELEMENTS {
                        return Err(Fault::too_large(Limit::Elements));
                    }
                    if self.depth > DEEPEST {
                        return Err(Fault::damaged(&self.part, "elements nested too deep"));
                    }
                    let tag = tag(&start).map_err(|e| Fault::damaged(&self.part, e))?;
                    return Ok(Next::Open(tag));
                }
                Event::End(end) => {
                    self.depth = self.depth.saturating_sub(1);
                    return Ok(Next::Close(end.local_name().as_ref().to_owned()));
                }
                Event::Text(text) => return Ok(Next::Text(text.xml10_content().into_owned())),
                Event::CData(text) => return Ok(Next::Text(text.xml10_content().into_owned())),
                Event::GeneralRef(name) => {
                    let text = resolved(&name).ok_or_else(|| {
                        Fault::damaged(&self.part, format!("entity &{};", name.xml10_content()))
                    })?;
                    return Ok(Next::Text(text));
                }
                Event::Eof if self.depth > 0 => {
                    return Err(Fault::damaged(&self.part, "it breaks off"));
                }
                Event::Eof => return Ok(Next::End),
                _ => {}
            }
        }
    }
}

fn tag(start: &BytesStart<'_>) -> Result<Tag, String> {
    let mut attributes = Vec::new();
    for attribute in start.attributes().with_checks(false) {
        let attribute = attribute.map_err(|e| e.to_string())?;
        let name = attribute.key.local_name().as_ref().to_owned();
        let value = attribute
            .normalized_value(XmlVersion::Implicit1_0)
            .map_err(|e| e.to_string())?;
        attributes.push((name, value.into_owned()));
    }
    Ok(Tag {
        name: start.local_name().as_ref().to_owned(),
        attributes,
    })
}

/// Character references and the five entities of XML; others are never expanded.
fn resolved(name: &BytesRef<'_>) -> Option<String> {
    if name.is_char_ref() {
        return name.resolve_char_ref().ok().flatten().map(String::from);
    }
    let text = match name.xml10_content().as_ref() {
        "amp" => "&",
        "lt" => "<",
        "gt" => ">",
        "quot" => "\"",
        "apos" => "'",
        _ => return None,
    };
    Some(text.to_owned())
}
