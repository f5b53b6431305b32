//! Encoding and delimiter of a text table.

use super::{Delimiter, Encoding, Found};
use crate::table::Fault;
use std::borrow::Cow;

/// Delimiters looked for, in the order in which they win where two fit alike.
const DELIMITERS: [char; 4] = [';', '\t', ',', '|'];
/// Rows looked at.
const SAMPLE: usize = 200;

/// Bytes as text. Text that is no UTF-8 and has no mark is taken as the encoding of western
/// office programs, which has a character for nearly every byte: said, so that it can be stated
/// otherwise.
pub(super) fn text<'b>(
    bytes: &'b [u8],
    stated: Option<&str>,
) -> Result<(Cow<'b, str>, Encoding), Fault> {
    let (encoding, by) = match stated {
        Some(label) => {
            let known = encoding_rs::Encoding::for_label(label.trim().as_bytes());
            let encoding = known.ok_or_else(|| Fault::NoEncoding {
                stated: label.to_owned(),
            })?;
            (encoding, Found::Stated)
        }
        None => found(bytes),
    };
    let (text, faulty) = encoding.decode_with_bom_removal(bytes);
    let name = encoding.name();
    if faulty {
        return Err(Fault::NotText { encoding: name });
    }
    let text = unbroken(text);
    Ok((text, Encoding { name, by }))
}

fn found(bytes: &[u8]) -> (&'static encoding_rs::Encoding, Found) {
    if let Some((encoding, _)) = encoding_rs::Encoding::for_bom(bytes) {
        return (encoding, Found::Marked);
    }
    if std::str::from_utf8(bytes).is_ok() {
        return (encoding_rs::UTF_8, Found::Fits);
    }
    (encoding_rs::WINDOWS_1252, Found::Fits)
}

/// Line breaks of machines that break lines with a carriage return alone.
fn unbroken(text: Cow<'_, str>) -> Cow<'_, str> {
    if text.contains('\r') && !text.contains('\n') {
        Cow::Owned(text.replace('\r', "\n"))
    } else {
        text
    }
}

/// The delimiter, and the text behind a line `sep=;` that states it.
pub(super) fn delimiter(text: &str, stated: Option<char>) -> (&str, Delimiter) {
    let mut rest = text;
    let mut marked = None;
    if let Some(after) = text.strip_prefix("sep=") {
        let mut chars = after.chars();
        if let Some(c) = chars.next()
            && let behind = chars.as_str().trim_start_matches('\r')
            && let Some(below) = behind.strip_prefix('\n')
        {
            marked = Some(c);
            rest = below;
        }
    }
    let (character, by) = match (stated, marked) {
        (Some(c), _) => (c, Found::Stated),
        (None, Some(c)) => (c, Found::Marked),
        (None, None) => (best(rest), Found::Fits),
    };
    (rest, Delimiter { character, by })
}

/// The delimiter that gives most rows the same number of cells, and more than one.
fn best(text: &str) -> char {
    let mut best = (',', 0.0, 1);
    for c in DELIMITERS {
        let (share, width) = fit(text, c);
        let better =
            width > 1 && (share > best.1 + 1e-9 || (share > best.1 - 1e-9 && width > best.2));
        if better {
            best = (c, share, width);
        }
    }
    best.0
}

/// The most frequent number of cells, and the share of rows that have it.
fn fit(text: &str, delimiter: char) -> (f64, usize) {
    let mut counts = std::collections::BTreeMap::new();
    let mut rows = 0_usize;
    let mut reader = reader(text.as_bytes(), delimiter);
    let mut record = csv::StringRecord::new();
    while rows < SAMPLE && reader.read_record(&mut record).is_ok_and(|more| more) {
        *counts.entry(record.len()).or_insert(0_usize) += 1;
        rows += 1;
    }
    // Among equals the wider: a title above the table has one cell.
    let most = counts
        .iter()
        .max_by_key(|(width, count)| (**count, **width));
    most.map_or((0.0, 1), |(width, count)| {
        (*count as f64 / rows.max(1) as f64, *width)
    })
}

/// A reader of rows of any length.
pub(super) fn reader(bytes: &[u8], delimiter: char) -> csv::Reader<&[u8]> {
    csv::ReaderBuilder::new()
        .has_headers(false)
        .flexible(true)
        .delimiter(u8::try_from(delimiter).unwrap_or(b','))
        .from_reader(bytes)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn delimiter_of(text: &str) -> char {
        delimiter(text, None).1.character
    }

    #[test]
    fn the_delimiter_is_the_one_that_fits() {
        assert_eq!(delimiter_of("tag;temp\nA;52,0\nB;60,5\n"), ';');
        assert_eq!(delimiter_of("tag,note\nA,\"x; y; z\"\nB,w\n"), ',');
        assert_eq!(delimiter_of("tag\tqty\nA\t1,2\n"), '\t');
        assert_eq!(delimiter_of("only\none\n"), ',');
        assert_eq!(
            delimiter_of("Register of assets\ntag;oil;qty\nA;B;1\nC;D;2\n"),
            ';'
        );
        let (rest, found) = delimiter("sep=|\r\ntag|oil\n", None);
        assert_eq!(
            (rest, found.character, found.by),
            ("tag|oil\n", '|', Found::Marked)
        );
    }

    #[test]
    fn encodings_are_found_and_said() {
        let (read, encoding) = text(b"tag;60 \xb0C\n", None).expect("text");
        assert_eq!(read, "tag;60 °C\n");
        assert_eq!((encoding.name, encoding.by), ("windows-1252", Found::Fits));
        let (read, encoding) = text("\u{feff}a;µ\n".as_bytes(), None).expect("text");
        assert_eq!(read, "a;µ\n");
        assert_eq!((encoding.name, encoding.by), ("UTF-8", Found::Marked));
        let (read, encoding) = text(b"\xff\xfea\x00;\x00", None).expect("text");
        assert_eq!((read.as_ref(), encoding.name), ("a;", "UTF-16LE"));
        let (read, _) = text(b"\xb9\xe6", Some("iso-8859-2")).expect("text");
        assert_eq!(read, "šć");
    }
}
