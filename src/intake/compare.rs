//! A new draft against the file in use and the last draft: what the register changed, what was
//! changed by hand, and both together without losing either.
//!
//! The unit of comparison is a key of a record: a fill, a list of parts, a note. A key the register
//! changed and nobody touched is taken over; a key changed by hand stays as it is, and what the
//! register now says is told.

mod records;

use super::yaml::scalar;
use crate::source::Span;
use crate::source::yaml::Entry;
use records::{Path, Read};
use std::collections::BTreeMap;

/// What happened to a key or record.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum What {
    /// New in the register.
    Added,
    /// Changed in the register.
    Changed,
    /// No longer in the register.
    Gone,
    /// Changed in the register and by hand: what stands by hand is kept.
    Both,
}

impl What {
    /// Its word.
    pub const fn word(self) -> &'static str {
        match self {
            Self::Added => "added",
            Self::Changed => "changed",
            Self::Gone => "gone",
            Self::Both => "changed by hand and in the register",
        }
    }
}

/// One difference.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Change {
    /// What happened.
    pub what: What,
    /// The record: a tag, an id, an area.
    pub record: String,
    /// The key; none for the whole record.
    pub key: Option<String>,
    /// What the last intake drafted.
    pub before: Option<String>,
    /// What stands in the file.
    pub stands: Option<String>,
    /// What the register now says.
    pub now: Option<String>,
}

/// The outcome of a comparison.
#[derive(Clone, Debug, Default)]
pub struct Merged {
    /// The file with everything taken that nobody changed by hand.
    pub text: String,
    /// Differences, in the order of the file.
    pub changes: Vec<Change>,
    /// Keys that differ from the last draft by hand alone: they stay.
    pub by_hand: usize,
}

/// Why a file cannot be compared.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
pub enum Unmerged {
    /// The file in use does not read.
    #[error("{0} does not read as YAML")]
    NotRead(&'static str),
    /// The changes cannot be written into the file as it is written.
    #[error("the differences cannot be written into this file as it is laid out")]
    Layout,
}

/// A change of text: bytes of the file in use and what comes in their place.
struct Edit {
    start: usize,
    end: usize,
    text: String,
}

/// Compares a new draft with the file in use and the last draft.
///
/// # Errors
/// [`Unmerged`] where the file does not read, or the outcome would not read back as meant.
pub fn merge(last: Option<&str>, stands: &str, new: &str) -> Result<Merged, Unmerged> {
    let last = last.map(|t| Read::new(t, "the last draft")).transpose()?;
    let stands = Read::new(stands, "the file in use")?;
    let new = Read::new(new, "the new draft")?;
    let before = last.as_ref().map(Read::values).unwrap_or_default();
    let (mine, theirs) = (stands.values(), new.values());
    let mut work = Work {
        stands: &stands,
        new: &new,
        edits: Vec::new(),
        changes: Vec::new(),
        wanted: mine.clone(),
        by_hand: 0,
    };
    for (section, name) in new.records() {
        let known_before = last
            .as_ref()
            .is_some_and(|l| l.record(&section, &name).is_some());
        if stands.record(&section, &name).is_none() && !known_before {
            work.add_record(&section, &name, &theirs);
        }
    }
    if let Some(last) = &last {
        for (section, name) in last.records() {
            let gone =
                new.record(&section, &name).is_none() && stands.record(&section, &name).is_some();
            if gone {
                work.changes.push(Change {
                    what: What::Gone,
                    record: name,
                    key: None,
                    before: None,
                    stands: None,
                    now: None,
                });
            }
        }
    }
    let added: Vec<(String, String)> = new
        .records()
        .into_iter()
        .filter(|(s, n)| stands.record(s, n).is_none())
        .collect();
    let mut paths: Vec<&Path> = theirs
        .keys()
        .chain(before.keys())
        .chain(mine.keys())
        .collect();
    paths.sort();
    paths.dedup();
    for path in paths {
        let whole_gone = new.record(&path.0, &path.1).is_none();
        if whole_gone || added.iter().any(|(s, n)| *s == path.0 && *n == path.1) {
            continue;
        }
        work.key(path, before.get(path), mine.get(path), theirs.get(path))?;
    }
    let text = work.applied();
    let outcome = Read::new(&text, "the outcome").map_err(|_| Unmerged::Layout)?;
    if outcome.values() != work.wanted {
        return Err(Unmerged::Layout);
    }
    Ok(Merged {
        text,
        changes: work.changes,
        by_hand: work.by_hand,
    })
}

struct Work<'w, 't> {
    stands: &'w Read<'t>,
    new: &'w Read<'t>,
    edits: Vec<Edit>,
    changes: Vec<Change>,
    /// What the outcome is to hold.
    wanted: BTreeMap<Path, String>,
    by_hand: usize,
}

impl Work<'_, '_> {
    fn key(
        &mut self,
        path: &Path,
        before: Option<&String>,
        mine: Option<&String>,
        theirs: Option<&String>,
    ) -> Result<(), Unmerged> {
        if theirs == before {
            self.by_hand += usize::from(mine != before);
            return Ok(());
        }
        if theirs == mine {
            return Ok(());
        }
        let what = match (mine == before, mine.is_some(), theirs.is_some()) {
            (false, ..) => What::Both,
            (true, false, _) => What::Added,
            (true, true, false) => What::Gone,
            (true, true, true) => What::Changed,
        };
        self.changes.push(Change {
            what,
            record: path.1.clone(),
            key: Some(path.2.clone()),
            before: before.cloned(),
            stands: mine.cloned(),
            now: theirs.cloned(),
        });
        match what {
            What::Both => {}
            What::Added => self.add_key(path)?,
            What::Gone => self.drop_key(path)?,
            What::Changed => self.replace(path)?,
        }
        if what != What::Both {
            match theirs {
                Some(value) => self.wanted.insert(path.clone(), value.clone()),
                None => self.wanted.remove(path),
            };
        }
        Ok(())
    }

    /// The value of a key of the new draft, at another column.
    fn value_at(&self, entry: &Entry, column: usize) -> String {
        let from = self.new.column(entry.key.span.start);
        moved(self.new.slice(entry.value.span).trim_end(), from, column)
    }

    fn replace(&mut self, path: &Path) -> Result<(), Unmerged> {
        let old = self.stands.key(path).ok_or(Unmerged::Layout)?;
        let new = self.new.key(path).ok_or(Unmerged::Layout)?;
        let column = self.stands.column(old.key.span.start);
        let text = self.value_at(new, column);
        let (start, end) = (old.value.span.start as usize, old.value.span.end as usize);
        let slice = self.stands.text.get(start..end).ok_or(Unmerged::Layout)?;
        let kept = slice.trim_end().len();
        self.edits.push(Edit {
            start,
            end: start + kept,
            text,
        });
        Ok(())
    }

    /// A new key stands before the parts, which come last in a draft.
    fn add_key(&mut self, path: &Path) -> Result<(), Unmerged> {
        let entry = self.new.key(path).ok_or(Unmerged::Layout)?;
        let record = self
            .stands
            .record(&path.0, &path.1)
            .ok_or(Unmerged::Layout)?;
        let entries = record.value.entries().unwrap_or(&[]);
        let before = entries
            .iter()
            .find(|e| e.key.text == "parts")
            .or(entries.first());
        let Some(before) = before else {
            return Err(Unmerged::Layout);
        };
        let column = self.stands.column(before.key.span.start);
        let block = self.new.slice(Span {
            start: entry.key.span.end,
            ..entry.value.span
        });
        let from = self.new.column(entry.key.span.start);
        let text = format!(
            "{}{}\n{}",
            scalar(&entry.key.text),
            moved(block.trim_end(), from, column),
            " ".repeat(column)
        );
        let start = before.key.span.start as usize;
        self.edits.push(Edit {
            start,
            end: start,
            text,
        });
        Ok(())
    }

    fn drop_key(&mut self, path: &Path) -> Result<(), Unmerged> {
        let record = self
            .stands
            .record(&path.0, &path.1)
            .ok_or(Unmerged::Layout)?;
        let entries = record.value.entries().ok_or(Unmerged::Layout)?;
        let at = entries
            .iter()
            .position(|e| e.key.text == path.2)
            .ok_or(Unmerged::Layout)?;
        let start = entries[at].key.span.start as usize;
        match entries.get(at + 1) {
            Some(next) => self.edits.push(Edit {
                start,
                end: next.key.span.start as usize,
                text: String::new(),
            }),
            None => {
                let end = entries[at].value.span.end as usize;
                let slice = self.stands.text.get(..start).ok_or(Unmerged::Layout)?;
                let line = slice.rfind('\n').unwrap_or(0);
                let kept = self
                    .stands
                    .text
                    .get(start..end)
                    .map_or(end, |s| start + s.trim_end().len());
                self.edits.push(Edit {
                    start: line,
                    end: kept,
                    text: String::new(),
                });
            }
        }
        Ok(())
    }

    /// A new record comes behind the last of its section.
    fn add_record(&mut self, section: &str, name: &str, theirs: &BTreeMap<Path, String>) {
        self.changes.push(Change {
            what: What::Added,
            record: name.to_owned(),
            key: None,
            before: None,
            stands: None,
            now: None,
        });
        let Some(entry) = self.new.record(section, name) else {
            return;
        };
        for (path, value) in theirs.iter().filter(|(p, _)| p.0 == section && p.1 == name) {
            self.wanted.insert(path.clone(), value.clone());
        }
        let block = self.new.slice(Span {
            start: entry.key.span.end,
            ..entry.value.span
        });
        let from = self.new.column(entry.key.span.start);
        let held = self.stands.sections();
        let records: &[Entry] = held
            .iter()
            .find(|(s, _)| s == section)
            .map_or(&[], |(_, e)| e);
        let (at, column, lead) = match records.iter().rfind(|e| e.key.text != "file") {
            Some(last) => {
                let end = last.value.span.end.max(last.key.span.end) as usize;
                let rest = self.stands.text.get(end..).unwrap_or("");
                // Behind the line of the last value, remarks at its end included.
                let written = self.stands.text.get(..end).unwrap_or("").ends_with('\n');
                let line = if written {
                    0
                } else {
                    rest.find('\n').map_or(rest.len(), |n| n + 1)
                };
                let newline = if written || rest[..line].ends_with('\n') {
                    ""
                } else {
                    "\n"
                };
                (
                    end + line,
                    self.stands.column(last.key.span.start),
                    newline.to_owned(),
                )
            }
            None => {
                let text = self.stands.text;
                let newline = if text.ends_with('\n') { "" } else { "\n" };
                let head = if section.is_empty() {
                    String::new()
                } else {
                    format!("{section}:\n")
                };
                (
                    text.len(),
                    if section.is_empty() { 0 } else { 2 },
                    format!("{newline}{head}"),
                )
            }
        };
        let text = format!(
            "{lead}{}{}{}\n",
            " ".repeat(column),
            scalar(name),
            moved(block.trim_end(), from, column)
        );
        self.edits.push(Edit {
            start: at,
            end: at,
            text,
        });
    }

    fn applied(&mut self) -> String {
        // Stable: what is added in one place stays in the order of the draft.
        self.edits.sort_by_key(|e| e.start);
        let mut out = String::new();
        let mut at = 0;
        for edit in &self.edits {
            out.push_str(self.stands.text.get(at..edit.start).unwrap_or(""));
            out.push_str(&edit.text);
            at = edit.end.max(at);
        }
        out.push_str(self.stands.text.get(at..).unwrap_or(""));
        out
    }
}

/// A block of lines moved to another column; its first line stands behind its key.
fn moved(block: &str, from: usize, to: usize) -> String {
    let mut lines = block.lines();
    let mut out = lines.next().unwrap_or("").to_owned();
    for line in lines {
        out.push('\n');
        let indent = line.len() - line.trim_start().len();
        if !line.trim().is_empty() {
            out.push_str(&" ".repeat((indent + to).saturating_sub(from)));
            out.push_str(line.trim_start());
        }
    }
    out
}

#[cfg(test)]
mod tests;
