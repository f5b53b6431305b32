//! Tags: several machines in one, the same machine twice, references from row to row.

use std::collections::BTreeMap;

/// The machines of a tag such as `P-210 A/B/C`; itself alone where it is one.
pub fn machines(tag: &str) -> Vec<String> {
    let tag = tag.trim();
    if let Some(several) = numbered(tag) {
        return several;
    }
    let parts: Vec<&str> = tag.split(['/', ',', '&', '+']).map(str::trim).collect();
    if parts.len() < 2 || parts.len() > 26 || parts.iter().any(|p| p.is_empty()) {
        return vec![tag.to_owned()];
    }
    let (first, more) = (parts[0], &parts[1..]);
    let letter = |p: &str| p.len() == 1 && p.bytes().all(|b| b.is_ascii_alphabetic());
    if more.iter().all(|p| letter(p)) {
        let ends_alone = first.ends_with(|c: char| c.is_ascii_alphabetic())
            && first[..first.len() - 1]
                .ends_with(|c: char| c.is_ascii_digit() || matches!(c, ' ' | '-' | '.' | '_'));
        if ends_alone {
            let stem = &first[..first.len() - 1];
            let last = &first[stem.len()..];
            return std::iter::once(last)
                .chain(more.iter().copied())
                .map(|end| format!("{stem}{end}"))
                .collect();
        }
    }
    let figures = first.bytes().rev().take_while(u8::is_ascii_digit).count();
    let number =
        |p: &str| !p.is_empty() && p.len() <= figures && p.bytes().all(|b| b.is_ascii_digit());
    if figures > 0 && figures < first.len() && more.iter().all(|p| number(p)) {
        return std::iter::once(first.to_owned())
            .chain(
                more.iter()
                    .map(|p| format!("{}{p}", &first[..first.len() - p.len()])),
            )
            .collect();
    }
    vec![tag.to_owned()]
}

/// A piece of a tag: letters or figures.
#[derive(Clone, Debug, PartialEq, Eq)]
enum Piece {
    Letters(String),
    Figures(String),
}

fn pieces(tag: &str) -> Vec<Piece> {
    let mut out: Vec<Piece> = Vec::new();
    let chars: Vec<char> = tag.to_uppercase().chars().collect();
    for (i, c) in chars.iter().enumerate() {
        // The letter O between figures is a zero nobody typed.
        let between = |n: Option<&char>| n.is_some_and(char::is_ascii_digit);
        let c = match c {
            'O' if between(i.checked_sub(1).and_then(|i| chars.get(i)))
                && between(chars.get(i + 1)) =>
            {
                '0'
            }
            c => *c,
        };
        if c.is_ascii_digit() {
            match out.last_mut() {
                Some(Piece::Figures(t)) if i > 0 && chars[i - 1].is_alphanumeric() => t.push(c),
                _ => out.push(Piece::Figures(c.to_string())),
            }
        } else if c.is_alphabetic() {
            match out.last_mut() {
                Some(Piece::Letters(t)) if i > 0 && chars[i - 1].is_alphanumeric() => t.push(c),
                _ => out.push(Piece::Letters(c.to_string())),
            }
        }
    }
    out
}

/// Whether two tags may be the same machine: the same but for separators and case, for letters cut
/// short at the end of a word, or for one letter of a longer word. Figures that differ are other
/// machines.
pub fn alike(a: &str, b: &str) -> bool {
    let (a, b) = (pieces(a), pieces(b));
    !a.is_empty()
        && (joined(&a) == joined(&b)
            || (a.len() == b.len() && a.iter().zip(&b).all(|(a, b)| near(a, b))))
}

fn joined(pieces: &[Piece]) -> String {
    pieces
        .iter()
        .map(|p| match p {
            Piece::Letters(t) | Piece::Figures(t) => t.as_str(),
        })
        .collect()
}

fn near(a: &Piece, b: &Piece) -> bool {
    match (a, b) {
        (Piece::Figures(a), Piece::Figures(b)) => a == b,
        (Piece::Letters(a), Piece::Letters(b)) => {
            let (short, long) = if a.len() <= b.len() { (a, b) } else { (b, a) };
            a == b
                || (short.chars().count() >= 2 && long.starts_with(short.as_str()))
                || (short.chars().count() >= 4 && strsim::osa_distance(a, b) == 1)
        }
        _ => false,
    }
}

/// Pairs of tags that may be the same machine, by their places in the list. Only tags with the
/// same figures are compared, so that a long register stays quick.
pub fn duplicates(tags: &[&str]) -> Vec<(usize, usize)> {
    /// Tags of the same figures compared with each other: a register without numbers is a list.
    const GROUP: usize = 400;
    let mut groups: BTreeMap<String, Vec<usize>> = BTreeMap::new();
    for (i, tag) in tags.iter().enumerate() {
        let figures: String = pieces(tag)
            .iter()
            .filter_map(|p| match p {
                Piece::Figures(t) => Some(format!("{t} ")),
                Piece::Letters(_) => None,
            })
            .collect();
        groups.entry(figures).or_default().push(i);
    }
    let mut found = Vec::new();
    for group in groups.values() {
        for (n, a) in group.iter().enumerate().take(GROUP) {
            for b in group[n + 1..].iter().take(GROUP) {
                if alike(tags[*a], tags[*b]) {
                    found.push((*a, *b));
                }
            }
        }
    }
    found.sort_unstable();
    found
}

/// What another row's cell is referred to by: `same as row 6`, `same as turbine`, `ditto`.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Reference {
    /// A row by its number.
    Row(u32),
    /// A row by a word of its tag or description.
    Named(String),
    /// The row above.
    Above,
}

/// The reference a text makes, if it makes one.
pub fn reference(text: &str) -> Option<Reference> {
    let plain = text.trim().trim_end_matches(['.', '?']).trim();
    let lower = plain.to_lowercase();
    if matches!(
        lower.as_str(),
        "ditto"
            | "dito"
            | "do"
            | "dto"
            | "idem"
            | "wie oben"
            | "s. o"
            | "s.o"
            | "\""
            | "''"
            | "\u{3003}"
            | "same"
            | "as above"
            | "same as above"
    ) {
        return Some(Reference::Above);
    }
    let skip = [
        "same as ", "as per ", "as for ", "like ", "see row ", "as row ", "wie ", "siehe ",
    ]
    .into_iter()
    .find(|w| lower.starts_with(w))?;
    let target = plain.get(skip.len()..)?.trim();
    let lower = target.to_lowercase();
    let number = lower
        .strip_prefix("row ")
        .or_else(|| lower.strip_prefix("line "))
        .or_else(|| lower.strip_prefix("zeile "))
        .or_else(|| lower.strip_prefix("no. "))
        .map_or(lower.as_str(), str::trim);
    let row_word = skip.ends_with("row ") || number != lower;
    match number.parse() {
        Ok(row) if row_word || number == lower => Some(Reference::Row(row)),
        _ if target.is_empty() => None,
        _ => Some(Reference::Named(target.to_owned())),
    }
}

/// A name in lower case without anything between its letters and figures.
pub fn bare(text: &str) -> String {
    let kept = text.chars().filter(|c| c.is_alphanumeric());
    kept.flat_map(char::to_lowercase).collect()
}

/// The words of a tag or description that a reference may name it by, in lower case and singular.
pub fn name_words(text: &str) -> impl Iterator<Item = String> + '_ {
    text.split(|c: char| !c.is_alphanumeric())
        .map(|w| w.to_lowercase().trim_end_matches('s').to_owned())
        .filter(|w| !w.is_empty())
}

/// Tags of machines numbered from one to another: `AG-1 to AG-4`, `P-101 thru 104`.
fn numbered(tag: &str) -> Option<Vec<String>> {
    const MOST: u32 = 26;
    let lower = tag.to_ascii_lowercase();
    let words = [" to ", " thru ", " through ", " bis ", "..", "\u{2026}"];
    let (first, last) = words.iter().find_map(|w| {
        let at = lower.find(w)?;
        Some((tag.get(..at)?.trim(), tag.get(at + w.len()..)?.trim()))
    })?;
    let figures = |t: &str| t.bytes().rev().take_while(u8::is_ascii_digit).count();
    let (stem, from) = first.split_at(first.len() - figures(first));
    let (end_stem, to) = last.split_at(last.len() - figures(last));
    let same = end_stem.is_empty() || end_stem.eq_ignore_ascii_case(stem);
    let (a, b): (u32, u32) = (from.parse().ok()?, to.parse().ok()?);
    if stem.is_empty() || !same || b <= a || b - a >= MOST {
        return None;
    }
    let width = from.len();
    Some((a..=b).map(|n| format!("{stem}{n:0width$}")).collect())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn one_row_may_be_several_machines() {
        assert_eq!(machines("P-210 A/B/C"), ["P-210 A", "P-210 B", "P-210 C"]);
        assert_eq!(machines("P-101A/B"), ["P-101A", "P-101B"]);
        assert_eq!(machines("P-210/211/212"), ["P-210", "P-211", "P-212"]);
        assert_eq!(machines("FN-1/2"), ["FN-1", "FN-2"]);
        assert_eq!(machines("AG-1 to AG-4"), ["AG-1", "AG-2", "AG-3", "AG-4"]);
        assert_eq!(machines("P-099 thru 101"), ["P-099", "P-100", "P-101"]);
        assert_eq!(machines("road to mill 4"), ["road to mill 4"]);
        assert_eq!(machines("CV-4 to CV-1"), ["CV-4 to CV-1"]);
        assert_eq!(machines("A/C unit"), ["A/C unit"]);
        assert_eq!(machines("CV-101 GBX"), ["CV-101 GBX"]);
        assert_eq!(machines("PUMP/MOTOR"), ["PUMP/MOTOR"]);
        assert_eq!(machines("KL-501/"), ["KL-501/"]);
    }

    #[test]
    fn tags_alike_are_asked_about_and_others_are_not() {
        assert!(alike("CV-101 GBX", "CV101-GB"));
        assert!(alike("cv 101", "CV-101"));
        assert!(alike("CV-1O1", "CV-101"));
        assert!(alike("MIXER-4", "MIXRE-4"));
        assert!(!alike("CV-101", "CV-102"));
        assert!(!alike("P-101 A", "P-101 B"));
        assert!(!alike("C-101", "CV-101"));
        assert!(!alike("CV-101", "CV-101 A"));
        assert!(!alike("FN-1", "KL-1"));
        let found = duplicates(&["CV-101 GBX", "CV101-GB", "HPU REEL", "P-210 A", "P-210 B"]);
        assert_eq!(found, [(0, 1)]);
    }

    #[test]
    fn references_point_at_rows() {
        assert_eq!(reference("same as row 6"), Some(Reference::Row(6)));
        assert_eq!(reference("as row 6"), Some(Reference::Row(6)));
        assert_eq!(
            reference("same as turbine"),
            Some(Reference::Named("turbine".into()))
        );
        assert_eq!(
            reference("same as TURB-1"),
            Some(Reference::Named("TURB-1".into()))
        );
        assert_eq!(reference("ditto"), Some(Reference::Above));
        assert_eq!(reference("wie Zeile 6"), Some(Reference::Row(6)));
        assert_eq!(reference("ISO 68"), None);
        assert_eq!(bare("TURB-1"), bare("turb 1"));
        let words: Vec<String> = name_words("Press pumps, north").collect();
        assert_eq!(words, ["pre", "pump", "north"]);
    }
}
