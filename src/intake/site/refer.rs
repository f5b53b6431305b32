//! Rows that refer to others for their lubricant.

use super::{Outline, Reader, about_row};
use crate::intake::finding::Kind;
use crate::intake::tags::{self, Reference};

/// The text of the lubricant cell, references followed.
pub(super) fn resolved(
    reader: &mut Reader<'_>,
    outlines: &[Outline],
    from: usize,
) -> Option<String> {
    let mut at = from;
    let mut seen = vec![from];
    loop {
        let text = outlines[at].oil.clone()?;
        let Some(reference) = tags::reference(&text) else {
            if at != from {
                let to = &outlines[at];
                let says = format!("{} of row {}: \"{text}\"", to.tag, to.row);
                let mut finding = about_row(&outlines[from], Kind::ReadAs, says);
                finding.column = reader.oil_column().map(|c| c.number);
                finding.text = outlines[from].oil.clone().unwrap_or_default();
                reader.findings.push(finding);
            }
            return Some(text);
        };
        let next = target_of(&reference, outlines, at);
        match next.filter(|n| !seen.contains(n)) {
            Some(next) => {
                seen.push(next);
                at = next;
            }
            None => {
                let why = match next {
                    Some(_) => "the rows refer to each other in a circle".to_owned(),
                    None => "no one row answers to this reference".to_owned(),
                };
                let mut finding = about_row(&outlines[from], Kind::NotUnderstood, why);
                finding.column = reader.oil_column().map(|c| c.number);
                finding.heading = reader.oil_column().map(|c| c.heading).unwrap_or_default();
                finding.text = text;
                reader.findings.push(finding);
                return outlines[from].oil.clone();
            }
        }
    }
}

fn target_of(reference: &Reference, outlines: &[Outline], at: usize) -> Option<usize> {
    match reference {
        Reference::Above => at.checked_sub(1),
        Reference::Row(n) => {
            let numbered = outlines.iter().any(|o| o.number.is_some());
            let is = |o: &Outline| {
                if numbered {
                    o.number == Some(*n)
                } else {
                    o.row == *n
                }
            };
            outlines.iter().position(is)
        }
        Reference::Named(word) => {
            let mut found = (0..outlines.len())
                .filter(|i| *i != at)
                .filter(|i| tags::answers(word, &outlines[*i].tag, &outlines[*i].description));
            let first = found.next();
            first.filter(|_| found.next().is_none())
        }
    }
}
