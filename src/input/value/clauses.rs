//! What may stand behind a value: whose word it is, when, a remark, whom to ask, which test.

use super::date;
use super::fault::{Fault, Mend, place_in};
use crate::problem::{Code, suggest};
use crate::source::place::Whose;
use std::ops::Range;

/// The clauses of a value.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Clauses {
    /// Whose word, when, with what remark.
    pub origin: Option<Said>,
    /// Whom to ask.
    pub ask: Option<String>,
    /// Which test.
    pub test: Option<String>,
}

/// An origin as stated.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Said {
    /// Whose word; nobody's where there is only a remark.
    pub whose: Whose,
    /// Date or span of dates.
    pub dated: Option<String>,
    /// Remark.
    pub note: Option<String>,
}

impl Clauses {
    /// Whether nothing stands behind the value.
    pub fn is_empty(&self) -> bool {
        *self == Self::default()
    }
}

/// A text parted into value and clauses.
#[derive(Clone, Debug)]
pub struct Split {
    /// The bytes of the value.
    pub head: Range<usize>,
    /// The clauses.
    pub clauses: Clauses,
    /// The bytes of the `ask` clause.
    pub ask_at: Option<Range<usize>>,
    /// The bytes of the `test` clause.
    pub test_at: Option<Range<usize>>,
    /// What is wrong with them.
    pub faults: Vec<Fault>,
}

/// Words that are not ours but mean one of ours.
const OTHER_WORDS: &[(&str, &str)] = &[
    ("estimated", "assumed"),
    ("estimate", "assumed"),
    ("guess", "assumed"),
    ("guessed", "assumed"),
    ("est", "assumed"),
    ("assumption", "assumed"),
    ("OEM", "maker"),
    ("manufacturer", "maker"),
    ("makers", "maker"),
    ("plate", "nameplate"),
    ("rating plate", "nameplate"),
    ("reading", "measured"),
    ("vendor", "supplier"),
    ("data sheet", "supplier"),
    ("datasheet", "supplier"),
];

/// Whether a text begins with a word that opens a clause.
pub fn opens(text: &str) -> bool {
    let word = first_word(text);
    text.starts_with('"')
        || word == "ask"
        || word == "test"
        || Whose::WRITTEN.iter().any(|(w, _)| *w == word)
}

/// Parts a text at the commas that are neither in quotation marks, in parentheses, nor inside a
/// number.
pub fn split(text: &str) -> Split {
    let pieces = pieces(text);
    let mut split = Split {
        head: trimmed(text, &pieces[0]),
        clauses: Clauses::default(),
        ask_at: None,
        test_at: None,
        faults: Vec::new(),
    };
    for piece in &pieces[1..] {
        let at = trimmed(text, piece);
        let mut reading = Reading {
            split: &mut split,
            text,
            at: at.clone(),
        };
        if let Err(fault) = reading.clause(&text[at]) {
            split.faults.push(fault);
        }
    }
    split
}

/// Bytes between the commas that part a value from its clauses.
fn pieces(text: &str) -> Vec<Range<usize>> {
    let bytes = text.as_bytes();
    let (mut quoted, mut depth, mut from) = (false, 0_u32, 0);
    let mut out = Vec::new();
    for (at, byte) in bytes.iter().enumerate() {
        match byte {
            b'"' => quoted = !quoted,
            b'(' if !quoted => depth += 1,
            b')' if !quoted => depth = depth.saturating_sub(1),
            b',' if !quoted && depth == 0 && !inside_number(bytes, at) => {
                out.push(from..at);
                from = at + 1;
            }
            _ => {}
        }
    }
    out.push(from..text.len());
    out
}

fn inside_number(bytes: &[u8], at: usize) -> bool {
    let figure = |i: Option<usize>| i.and_then(|i| bytes.get(i)).is_some_and(u8::is_ascii_digit);
    figure(at.checked_sub(1)) && figure(Some(at + 1))
}

fn trimmed(text: &str, piece: &Range<usize>) -> Range<usize> {
    place_in(text, text[piece.clone()].trim())
}

fn first_word(text: &str) -> &str {
    text.split(|c: char| c.is_whitespace() || c == '"')
        .next()
        .unwrap_or("")
}

struct Reading<'s, 't> {
    split: &'s mut Split,
    text: &'t str,
    at: Range<usize>,
}

impl Reading<'_, '_> {
    fn clause(&mut self, clause: &str) -> Result<(), Fault> {
        let word = first_word(clause);
        let rest = clause[word.len()..].trim_start();
        let from = self.at.start;
        let again = |taken: bool| {
            if taken {
                Err(self.twice(clause, word))
            } else {
                Ok(())
            }
        };
        if let Some((_, whose)) = Whose::WRITTEN.iter().find(|(w, _)| *w == word) {
            let stated = self.split.clauses.origin.as_ref();
            again(stated.is_some_and(|o| o.whose != Whose::NotStated))?;
            let said = said(*whose, clause, rest).map_err(|f| f.shifted(from))?;
            let bare_note = self.split.clauses.origin.take().and_then(|o| o.note);
            self.split.clauses.origin = Some(Said {
                note: said.note.or(bare_note),
                ..said
            });
            return Ok(());
        }
        match word {
            "ask" => {
                again(self.split.clauses.ask.is_some())?;
                self.split.clauses.ask = Some(quoted(clause, rest).map_err(|f| f.shifted(from))?);
                self.split.ask_at = Some(self.at.clone());
                Ok(())
            }
            "test" => {
                again(self.split.clauses.test.is_some())?;
                self.split.clauses.test = Some(quoted(clause, rest).map_err(|f| f.shifted(from))?);
                self.split.test_at = Some(self.at.clone());
                Ok(())
            }
            "" if clause.starts_with('"') => self.note(clause),
            _ => Err(self.unknown(clause, word)),
        }
    }

    /// A remark alone joins the origin before it.
    fn note(&mut self, clause: &str) -> Result<(), Fault> {
        let note = quoted(clause, clause).map_err(|f| f.shifted(self.at.start))?;
        let origin = self.split.clauses.origin.get_or_insert(Said {
            whose: Whose::NotStated,
            dated: None,
            note: None,
        });
        if origin.note.is_some() {
            return Err(self.twice(clause, "the remark"));
        }
        origin.note = Some(note);
        Ok(())
    }

    fn twice(&self, clause: &str, word: &str) -> Fault {
        let comma = self.comma(clause);
        Fault::new(
            Code::ClauseTwice,
            format!("`{word}` stands twice"),
            self.at.clone(),
        )
        .why("a value has one origin, one remark, one person to ask")
        .mend(Mend::new(comma, ""))
    }

    /// From the comma before the clause to its end, in bytes of the whole text.
    fn comma(&self, clause: &str) -> Range<usize> {
        let before = self.text[..self.at.start].trim_end_matches([' ', ',']);
        before.len()..self.at.start + clause.len()
    }

    /// A clause that begins with no word of ours, in bytes of the whole text.
    fn unknown(&self, clause: &str, word: &str) -> Fault {
        if clause.is_empty() {
            let at = self.at.clone();
            return Fault::new(Code::ClauseUnknown, "nothing behind the comma", at)
                .mend(Mend::new(self.comma(clause), ""));
        }
        unknown_clause(clause, word).shifted(self.at.start)
    }
}

/// The same in bytes of the clause.
fn unknown_clause(clause: &str, word: &str) -> Fault {
    if date::looks_like(word) && date::read(word).is_ok() {
        return Fault::new(
            Code::ClauseUnknown,
            format!("\"{clause}\" is a date without an origin"),
            0..clause.len(),
        )
        .why("a date says when somebody stated the value: measured, maker, nameplate …")
        .mend(Mend::new(0..0, "measured "));
    }
    let fault = Fault::new(
            Code::ClauseUnknown,
            format!("\"{clause}\" behind the value not understood"),
            0..clause.len(),
        )
        .why("behind a value stand measured, maker, nameplate, register, supplier, house or assumed, with a date and a \"remark\"; or ask \"whom\"");
    let words = Whose::WRITTEN
        .iter()
        .map(|(w, _)| *w)
        .chain(["ask", "test"]);
    let meant = suggest::certain(word, words).or_else(|| {
        let other = OTHER_WORDS.iter();
        other
            .filter(|(w, _)| w.eq_ignore_ascii_case(word))
            .map(|(_, ours)| *ours)
            .next()
    });
    if let Some(ours) = meant {
        return fault.mend(Mend::new(0..word.len(), ours));
    }
    let note = clause.replace('"', "");
    fault.mend(Mend::new(0..clause.len(), format!("\"{note}\"")).remark("as a remark"))
}

/// Date and remark behind a word of origin.
fn said(whose: Whose, clause: &str, rest: &str) -> Result<Said, Fault> {
    let mut said = Said {
        whose,
        dated: None,
        note: None,
    };
    let (before, _) = rest.split_once('"').unwrap_or((rest, ""));
    let dated = before.trim();
    if !dated.is_empty() && (date::looks_like(dated) || is_month_and_year(dated)) {
        let at = place_in(clause, dated).start;
        said.dated = Some(date::read(dated).map_err(|f| f.shifted(at))?);
        let behind = rest[before.len()..].trim();
        if !behind.is_empty() {
            said.note = Some(quoted(clause, behind)?);
        }
    } else if date::looks_like(first_word(dated)) {
        // A date and loose words behind it.
        let word = first_word(dated);
        let at = place_in(clause, word).start;
        said.dated = Some(date::read(word).map_err(|f| f.shifted(at))?);
        said.note = Some(quoted(clause, rest[word.len()..].trim())?);
    } else if !rest.is_empty() {
        said.note = Some(quoted(clause, rest)?);
    }
    Ok(said)
}

fn is_month_and_year(text: &str) -> bool {
    let mut words = text.split_whitespace();
    let (first, last) = (words.next(), words.next_back());
    let year = |w: &str| w.len() == 4 && w.chars().all(|c| c.is_ascii_digit());
    last.is_some_and(year)
        && first.is_some_and(|w| w.len() >= 3 && w.chars().all(char::is_alphanumeric))
        && date::read(text).is_err_and(|f| f.mends.iter().all(|m| m.remark.is_none()))
}

/// The text in quotation marks that makes up the rest of a clause.
fn quoted(clause: &str, rest: &str) -> Result<String, Fault> {
    let place = place_in(clause, rest);
    let word = clause[..place.start].trim();
    let shown = if word.is_empty() { "a remark" } else { word };
    let Some(inner) = rest.strip_prefix('"') else {
        if rest.is_empty() {
            return Err(Fault::new(
                Code::NoteUnquoted,
                format!("nothing behind `{shown}`"),
                0..clause.len(),
            )
            .mend(
                Mend::new(clause.len()..clause.len(), " \"the plant\"").remark("or whoever knows"),
            ));
        }
        let bare = rest.replace('"', "");
        return Err(Fault::new(
            Code::NoteUnquoted,
            format!("text behind `{shown}` without quotation marks"),
            place.clone(),
        )
        .why("quotation marks show where a remark begins and ends")
        .mend(Mend::new(place, format!("\"{}\"", bare.trim()))));
    };
    match inner.split_once('"') {
        Some((text, "")) => Ok(text.to_owned()),
        Some((text, behind)) => {
            let joined = format!("{} {}", text.trim(), behind.replace('"', "").trim());
            Err(Fault::new(
                Code::NoteUnquoted,
                "text behind the quotation mark",
                place_in(clause, behind.trim()),
            )
            .why("a remark is one text in quotation marks; a comma parts it from the next clause")
            .mend(Mend::new(place, format!("\"{}\"", joined.trim()))))
        }
        None => Err(Fault::new(
            Code::NoteOpen,
            "quotation mark not closed",
            place.clone(),
        )
        .why("a # with a space before it begins a comment and cuts the text off; such a value stands in single quotes as a whole")
        .mend(Mend::new(place.end..place.end, "\""))),
    }
}
