//! YAML as a draft writes it: plain where the gate reads it back as it stands, quoted elsewhere.

use std::fmt::Write as _;

/// A text as a value or key behind which nothing but a line break or a colon follows.
pub fn scalar(text: &str) -> String {
    if is_plain(text) {
        return text.to_owned();
    }
    let printable = |c: char| c == ' ' || !(c.is_control() || c.is_whitespace());
    if text.chars().all(printable) {
        return format!("'{}'", text.replace('\'', "''"));
    }
    let mut out = String::from("\"");
    for c in text.chars() {
        match c {
            '"' => out.push_str("\\\""),
            '\\' => out.push_str("\\\\"),
            '\n' => out.push_str("\\n"),
            '\t' => out.push_str("\\t"),
            '\r' => out.push_str("\\r"),
            c if c.is_control() || (c.is_whitespace() && c != ' ') => {
                let _ = write!(out, "\\u{:04x}", u32::from(c));
            }
            c => out.push(c),
        }
    }
    out.push('"');
    out
}

/// Whether a text may stand without quotation marks, in a record as well as in a list.
fn is_plain(text: &str) -> bool {
    let Some(first) = text.chars().next() else {
        return false;
    };
    let opens = |c: char| "-?:,[]{}#&*!|>'\"%@`=~".contains(c);
    let number = |t: &str| {
        t.strip_prefix('-')
            .is_some_and(|r| r.starts_with(|c: char| c.is_ascii_digit()))
    };
    (!opens(first) || number(text))
        && text.trim() == text
        && !text.contains(": ")
        && !text.contains(" #")
        && !text.ends_with(':')
        && text
            .chars()
            .all(|c| c == ' ' || !(c.is_control() || c.is_whitespace()))
}

/// A remark behind a value: it stands in quotation marks and cannot hold them.
pub fn remark(text: &str) -> String {
    let one_line: Vec<&str> = text.split_whitespace().collect();
    format!("\"{}\"", one_line.join(" ").replace('"', "'"))
}

/// A value in a list in brackets, where commas part the items.
pub fn item(text: &str) -> String {
    if text.contains([',', '[', ']', '{', '}']) {
        format!("'{}'", text.replace('\'', "''"))
    } else {
        scalar(text)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::source::FileId;
    use crate::source::yaml::read;

    #[test]
    fn what_is_written_is_read_back() {
        for text in [
            "CV-101",
            "P-210 A",
            "- x",
            "-18 .. 36 degC",
            "a: b",
            "a #b",
            "\"quoted\"",
            "it's",
            "'",
            "two\nlines",
            "tab\there",
            "0104",
            "no",
            "[x",
            "*y",
            "68 L, register \"68 l: each\"",
            "ends:",
            " leading",
            "no\u{a0}break",
            "back\\slash\n",
            "=1+1",
            "~",
        ] {
            let yaml = format!("{}: {}\n", scalar(text), scalar(text));
            let gated = read(FileId(0), &yaml);
            assert!(gated.faults.is_empty(), "{yaml}: {:?}", gated.faults);
            let root = gated.root.expect("a record");
            let entry = &root.entries().expect("entries")[0];
            assert_eq!(entry.key.text, text, "{yaml}");
            assert_eq!(entry.value.text(), Some(text), "{yaml}");
            let list = format!("[{}, x]\n", item(text));
            let root = read(FileId(0), &list).root.expect("a list");
            assert_eq!(root.items().expect("items")[0].text(), Some(text), "{list}");
        }
    }
}
