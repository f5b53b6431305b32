//! Words, names, days and texts of a record.

use super::misplaced::listed;
use super::{Fields, Slot};
use crate::input::keys::{Form, example};
use crate::input::reader::{Reader, as_plain};
use crate::input::value::fault::place_in;
use crate::input::value::{self, Clauses, Fault, Mend, clauses, date};
use crate::problem::{Code, Write, suggest};
use crate::source::Span;
use crate::source::place::Given;
use crate::source::yaml::Node;

impl Fields<'_> {
    /// A text as it stands.
    pub fn text(&self, reader: &mut Reader<'_>, name: &str) -> Option<String> {
        let slot = self.get(name)?;
        let text = slot.text(reader)?;
        Some(text.trim().to_owned())
    }

    /// A text, perhaps with an origin behind it.
    pub fn given_text(&self, reader: &mut Reader<'_>, name: &str) -> Option<Given<String>> {
        let slot = self.get(name)?;
        let text = slot.text(reader)?;
        let (head, clauses) = parted(text);
        let origin = slot.origin(&clauses);
        Some(Given::new(head.clone(), head, origin))
    }

    /// One of the words of the key.
    pub fn word(&self, reader: &mut Reader<'_>, name: &str) -> Option<Given<&'static str>> {
        let slot = self.get(name)?;
        let text = slot.text(reader)?;
        let (head, clauses) = slot.parted_strictly(reader, text)?;
        let word = slot.known_word(reader, text, &head)?;
        Some(Given::new(word, head, slot.origin(&clauses)))
    }

    /// One or several of the words of the key.
    pub fn words(&self, reader: &mut Reader<'_>, name: &str) -> Option<Vec<Given<&'static str>>> {
        let slot = self.get(name)?;
        let mut found = Vec::new();
        for (node, text) in slot.items(reader)? {
            let (head, clauses) = parted(&text);
            for piece in pieces(&head) {
                let one = Slot {
                    node,
                    ..slot.clone()
                };
                if let Some(word) = one.known_word(reader, &text, &piece) {
                    found.push(Given::new(word, piece, one.origin(&clauses)));
                }
            }
        }
        Some(found)
    }

    /// Names: one, or a list of them.
    pub fn names(&self, reader: &mut Reader<'_>, name: &str) -> Vec<Given<String>> {
        let Some(slot) = self.get(name) else {
            return Vec::new();
        };
        let mut found = Vec::new();
        for (node, text) in slot.items(reader).unwrap_or_default() {
            let (head, clauses) = parted(&text);
            let one = Slot {
                node,
                ..slot.clone()
            };
            for piece in pieces(&head) {
                let origin = one.origin(&clauses);
                found.push(Given::new(piece.clone(), piece, origin));
            }
        }
        found
    }

    /// Yes or no; `unknown` is as good as unstated.
    pub fn yes_no(&self, reader: &mut Reader<'_>, name: &str) -> Option<Given<bool>> {
        let word = self.yes_no_or(reader, name)?;
        let yes = word.value == "yes";
        Some(word.map(|_| yes))
    }

    /// Yes, no, or a word of the key.
    pub fn yes_no_or(&self, reader: &mut Reader<'_>, name: &str) -> Option<Given<&'static str>> {
        let slot = self.get(name)?;
        let text = slot.text(reader)?;
        let (head, clauses) = slot.parted_strictly(reader, text)?;
        let more = match slot.key.form {
            Form::YesNoOr(words) => words,
            _ => &[],
        };
        let mut known = ["yes", "no"].iter().chain(more.iter()).copied();
        if let Some(word) = known.find(|w| w.eq_ignore_ascii_case(&head)) {
            return Some(Given::new(word, head, slot.origin(&clauses)));
        }
        if head != "unknown" {
            slot.yes_no_wanted(reader, text, &head, more);
        }
        None
    }

    /// A whole number above zero.
    pub fn whole(&self, reader: &mut Reader<'_>, name: &str) -> Option<Given<u32>> {
        let slot = self.get(name)?;
        let text = slot.text(reader)?;
        let (head, clauses) = slot.parted_strictly(reader, text)?;
        match head.parse::<u32>() {
            Ok(number) if number > 0 => Some(Given::new(number, head, slot.origin(&clauses))),
            _ => {
                let at = place_in(text, text.get(..head.len()).unwrap_or(text));
                let whole = head.parse::<f64>().ok().map(f64::round);
                let instead = match whole {
                    Some(n) if (1.0..1e9).contains(&n) => format!("{n}"),
                    _ => "1".into(),
                };
                let fault = Fault::new(
                    Code::NumberNotWhole,
                    format!("\"{head}\" found, a whole number above zero is wanted"),
                    at.clone(),
                )
                .mend(Mend::new(at, instead).remark("or the right number"));
                reader.faults(slot.node, vec![fault], &slot.within);
                None
            }
        }
    }

    /// A day, year, month and day.
    pub fn day(&self, reader: &mut Reader<'_>, name: &str) -> Option<String> {
        let slot = self.get(name)?;
        let text = slot.text(reader)?;
        match date::day(text.trim()) {
            Ok(_) => Some(text.trim().to_owned()),
            Err(fault) => {
                reader.faults(slot.node, vec![fault], &slot.within);
                None
            }
        }
    }
}

impl<'t> Slot<'t> {
    /// Value and clauses; a clause that is none is reported.
    pub fn parted_strictly(
        &self,
        reader: &mut Reader<'_>,
        text: &str,
    ) -> Option<(String, Clauses)> {
        match value::read_words(text) {
            Ok(parts) => Some(parts),
            Err(faults) => {
                reader.faults(self.node, faults, &self.within);
                None
            }
        }
    }

    /// The texts of a list, or the one text; anything deeper is reported. Trailing clauses of a
    /// bracketed list stand behind its last text.
    pub fn items(&self, reader: &mut Reader<'_>) -> Option<Vec<(&'t Node, String)>> {
        if let Some(text) = self.node.text() {
            return Some(vec![(self.node, text.to_owned())]);
        }
        let Some(items) = self.node.items() else {
            value_wanted(reader, self);
            return None;
        };
        let mut texts: Vec<(&'t Node, String)> = Vec::new();
        for item in items {
            let Some(text) = item.text() else {
                let inner = Slot {
                    node: item,
                    ..self.clone()
                };
                value_wanted(reader, &inner);
                continue;
            };
            match texts.last_mut() {
                Some((_, before)) if clauses::opens(text) => {
                    before.push_str(", ");
                    before.push_str(text);
                }
                _ => texts.push((item, text.to_owned())),
            }
        }
        Some(texts)
    }

    /// The word of the key's list that is written, in whatever case.
    fn known_word(&self, reader: &mut Reader<'_>, text: &str, word: &str) -> Option<&'static str> {
        let (Form::Word(words) | Form::Words(words)) = self.key.form else {
            debug_assert!(false, "{} takes no word", self.key.name);
            return None;
        };
        let known = words.iter().copied();
        if let Some(found) = known.clone().find(|w| w.eq_ignore_ascii_case(word)) {
            return Some(found);
        }
        let at = text
            .find(word)
            .map_or(0..text.len(), |at| at..at + word.len());
        let meant = suggest::certain(word, known);
        let mut fault = Fault::new(
            Code::WordUnknown,
            format!("\"{word}\" not understood as `{}`", self.key.name),
            at.clone(),
        )
        .why(format!("understood are {}", listed(words)));
        let proposals: Vec<&str> = match meant {
            Some(meant) => vec![meant],
            None if words.len() <= 3 => words.to_vec(),
            None => words.iter().copied().filter(|w| *w == "other").collect(),
        };
        for proposal in &proposals {
            let mend = Mend::new(at.clone(), *proposal);
            fault = fault.mend(if *proposal == "other" {
                mend.remark("or one of these words")
            } else {
                mend
            });
        }
        let nothing_near = proposals.is_empty();
        let mut problem = reader.carried(self.node, fault, &self.within);
        if nothing_near {
            // to name one of many at random could state what is not true
            let aside = Write::edit(self.name.span, format!("x-{}", self.key.name));
            problem
                .write
                .push(aside.remark("keeps it as a remark; or write one of these words"));
        }
        problem.did_you_mean = meant.map(str::to_owned);
        reader.report(problem);
        None
    }

    fn yes_no_wanted(&self, reader: &mut Reader<'_>, text: &str, head: &str, more: &[&str]) {
        let at = place_in(text, text.get(..head.len()).unwrap_or(text));
        let lower = head.to_lowercase();
        let meant = match lower.as_str() {
            "true" | "y" | "on" | "1" | "x" | "ja" | "oui" => Some("yes"),
            "false" | "n" | "off" | "0" | "nein" | "non" | "none" => Some("no"),
            _ => suggest::certain(head, more.iter().copied()),
        };
        let mut known = vec!["yes", "no"];
        known.extend(more);
        let fault = Fault::new(
            Code::YesNoWanted,
            format!("\"{head}\" found, yes or no is wanted"),
            at.clone(),
        )
        .why(format!("understood are {} and unknown", known.join(", ")));
        let fault = match meant {
            Some(meant) => fault.mend(Mend::new(at, meant)),
            None => fault
                .mend(Mend::new(at.clone(), "yes"))
                .mend(Mend::new(at.clone(), "no"))
                .mend(Mend::new(at, "unknown")),
        };
        reader.faults(self.node, vec![fault], &self.within);
    }
}

/// A list or a record where one value is wanted.
pub fn value_wanted(reader: &mut Reader<'_>, slot: &Slot<'_>) {
    let found = match slot.node.items() {
        Some(_) => "a list",
        None if slot.node.entries().is_some() => "a record",
        None => return, // refused by the gate, and said there
    };
    let first = slot
        .node
        .items()
        .and_then(|items| items.iter().find_map(Node::text));
    let inner = slot
        .node
        .entries()
        .and_then(|e| e.iter().find_map(|e| e.value.text()));
    let value = first.or(inner).filter(|t| !t.is_empty());
    let example = example(slot.key);
    let text = as_plain(value.unwrap_or(&example), false);
    let bracketed = reader.set.slice(slot.node.span).starts_with(['[', '{']);
    let write = if bracketed {
        Write::edit(slot.node.span, text)
    } else {
        Write::edit(behind_colon(reader, slot), format!(" {text}"))
    };
    let found = format!(
        "{found} found behind `{}`, one value is wanted",
        slot.key.name
    );
    let span = super::first_line(reader, slot.node);
    let problem = reader
        .at(Code::ValueWanted, found, span, &slot.within)
        .why(format!("it takes {}", slot.key.form.says()))
        .write(write);
    reader.report(problem);
}

/// From behind the colon to the end of the value, so that a block moves up to its key.
fn behind_colon(reader: &Reader<'_>, slot: &Slot<'_>) -> Span {
    let text = reader.source(slot.node);
    let from = slot.name.span.end as usize;
    let colon = text.get(from..).and_then(|t| t.find(':')).unwrap_or(0);
    let start = u32::try_from(from + colon + 1).unwrap_or(slot.node.span.start);
    Span {
        start: start.min(slot.node.span.start),
        ..slot.node.span
    }
}

/// Value and clauses where every piece behind a comma opens a clause; else the text as it is.
pub fn parted(text: &str) -> (String, Clauses) {
    let split = clauses::split(text);
    let mut head_end = split.head.end;
    if split.faults.is_empty() {
        return (text[split.head].to_owned(), split.clauses);
    }
    // Commas that belong to the text: only the last pieces may be clauses.
    let mut clauses = Clauses::default();
    let mut at = text.len();
    while let Some(comma) = text[..at].rfind(',') {
        let tail = format!("x{}", &text[comma..]);
        let tried = clauses::split(&tail);
        if !tried.faults.is_empty() || !clauses::opens(text[comma + 1..].trim()) {
            break;
        }
        clauses = tried.clauses;
        at = comma;
        head_end = comma;
    }
    if at == text.len() {
        head_end = text.len();
    }
    (text[..head_end].trim().to_owned(), clauses)
}

/// The names of a text that lists several.
fn pieces(head: &str) -> Vec<String> {
    head.split(',')
        .map(|p| p.trim().trim_matches('"').to_owned())
        .filter(|p| !p.is_empty())
        .collect()
}
