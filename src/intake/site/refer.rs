//! Rows that refer to others for their lubricant: `same as row 6`, `ditto`. Every row is looked at
//! once, however long the chains of references are.

use super::{Outline, Reader, about_row};
use crate::intake::finding::Kind;
use crate::intake::tags::{self, Reference};
use std::collections::BTreeMap;

/// Where the references of a row lead.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum End {
    /// To the text of that row, which may be the row itself.
    Text(usize),
    /// To a row without a lubricant.
    Nothing,
    /// To no row, or to several.
    Nobody,
    /// Back to themselves.
    Circle,
}

/// Where the references of every row lead.
pub(super) struct Ends(Vec<End>);

impl Ends {
    /// Follows the references of all rows.
    pub(super) fn of(outlines: &[Outline]) -> Self {
        let refers = |o: &Outline| {
            o.oil
                .as_deref()
                .is_some_and(|t| tags::reference(t).is_some())
        };
        let index = if outlines.iter().any(refers) {
            Index::of(outlines)
        } else {
            Index::default()
        };
        let mut ends: Vec<Option<End>> = vec![None; outlines.len()];
        let mut on_path = vec![false; outlines.len()];
        for from in 0..outlines.len() {
            let mut path = Vec::new();
            let mut at = from;
            let end = loop {
                if let Some(end) = ends[at] {
                    break end;
                }
                if on_path[at] {
                    break End::Circle;
                }
                path.push(at);
                on_path[at] = true;
                let Some(text) = &outlines[at].oil else {
                    break End::Nothing;
                };
                let Some(reference) = tags::reference(text) else {
                    break End::Text(at);
                };
                match index.target_of(&reference, at) {
                    Some(next) => at = next,
                    None => break End::Nobody,
                }
            };
            for one in path {
                on_path[one] = false;
                ends[one] = Some(end);
            }
        }
        Self(
            ends.into_iter()
                .map(|e| e.unwrap_or(End::Nothing))
                .collect(),
        )
    }

    /// The text of the lubricant cell of a row, references followed.
    pub(super) fn resolved(
        &self,
        reader: &mut Reader<'_>,
        outlines: &[Outline],
        from: usize,
    ) -> Option<String> {
        let own = outlines[from].oil.clone();
        let (kind, says, text) = match self.0[from] {
            End::Text(at) if at == from => return own,
            End::Text(at) => {
                let to = &outlines[at];
                let text = to.oil.clone()?;
                let says = format!("{} of row {}: \"{text}\"", to.tag, to.row);
                (Kind::ReadAs, says, Some(text))
            }
            End::Nothing => return None,
            End::Nobody => {
                let why = "no one row answers to this reference".to_owned();
                (Kind::NotUnderstood, why, own.clone())
            }
            End::Circle => {
                let why = "the rows refer to each other in a circle".to_owned();
                (Kind::NotUnderstood, why, own.clone())
            }
        };
        let mut finding = about_row(&outlines[from], kind, says);
        let column = reader.oil_column();
        finding.column = column.as_ref().map(|c| c.number);
        finding.heading = column.map(|c| c.heading).unwrap_or_default();
        finding.text = own.unwrap_or_default();
        reader.findings.push(finding);
        text
    }
}

/// Rows by what a reference may call them.
#[derive(Default)]
struct Index {
    numbers: BTreeMap<u32, usize>,
    /// Whole tags and descriptions, and the words of both, each with the rows that have it; two
    /// rows are enough to tell that it is not one.
    names: BTreeMap<String, Vec<usize>>,
    words: BTreeMap<String, Vec<usize>>,
}

impl Index {
    fn of(outlines: &[Outline]) -> Self {
        let numbered = outlines.iter().any(|o| o.number.is_some());
        let mut index = Self::default();
        for (i, one) in outlines.iter().enumerate() {
            let number = if numbered { one.number } else { Some(one.row) };
            if let Some(number) = number {
                index.numbers.entry(number).or_insert(i);
            }
            for text in [&one.tag, &one.description] {
                add(&mut index.names, tags::bare(text), i);
                for word in tags::name_words(text) {
                    add(&mut index.words, word, i);
                }
            }
        }
        index
    }

    fn target_of(&self, reference: &Reference, at: usize) -> Option<usize> {
        match reference {
            Reference::Above => at.checked_sub(1),
            Reference::Row(n) => self.numbers.get(n).copied(),
            Reference::Named(word) => {
                let whole = tags::bare(word);
                let one_word = whole.trim_end_matches('s');
                let named = self.names.get(&whole).into_iter().flatten();
                let worded = self.words.get(one_word).into_iter().flatten();
                let mut found = named.chain(worded).copied().filter(|i| *i != at);
                let first = found.next()?;
                found.all(|other| other == first).then_some(first)
            }
        }
    }
}

fn add(map: &mut BTreeMap<String, Vec<usize>>, name: String, row: usize) {
    /// The row itself, and two others that tell it is not one.
    const ENOUGH: usize = 3;
    if name.is_empty() {
        return;
    }
    let rows = map.entry(name).or_default();
    if rows.len() < ENOUGH && rows.last() != Some(&row) {
        rows.push(row);
    }
}
