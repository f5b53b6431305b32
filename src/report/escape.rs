//! The one place where text becomes markup: HTML and SVG text and attributes, CSS strings, data
//! addresses.

use serde::Serialize;
use std::fmt::Write as _;

/// Markup made by the program itself, safe to print unescaped. Only this module's siblings make it.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize)]
#[serde(transparent)]
pub struct Markup(String);

impl Markup {
    pub(in crate::report) fn trusted(text: String) -> Self {
        Self(text)
    }

    /// The markup as text.
    pub fn as_str(&self) -> &str {
        &self.0
    }
}

/// What takes the place of a character that must not be printed.
const STAND_IN: char = '\u{fffd}';

/// Whether a character has no place in a printed page: controls other than tab and line feed, and
/// the marks that turn the direction of the text after them. A name with such a mark could make
/// the figure beside it read backwards.
fn unprintable(c: char) -> bool {
    (c.is_control() && c != '\n' && c != '\t')
        || matches!(c, '\u{200e}' | '\u{200f}' | '\u{061c}' | '\u{202a}'..='\u{202e}' | '\u{2066}'..='\u{2069}' | '\u{feff}' | '\u{fffe}' | '\u{ffff}')
}

/// Appends text so that it stays text, inside an element or a quoted attribute, in HTML as in SVG.
pub fn push_text(out: &mut String, text: &str) {
    for c in text.chars() {
        match c {
            '&' => out.push_str("&amp;"),
            '<' => out.push_str("&lt;"),
            '>' => out.push_str("&gt;"),
            '"' => out.push_str("&quot;"),
            '\'' => out.push_str("&#39;"),
            c if unprintable(c) => out.push(STAND_IN),
            c => out.push(c),
        }
    }
}

/// The same, as a new text.
pub fn text(raw: &str) -> String {
    let mut out = String::with_capacity(raw.len() + 8);
    push_text(&mut out, raw);
    out
}

/// Longer names may break at their dashes.
const WHOLE: usize = 24;

/// Text for a heading: names such as `O-12` are not broken at their dashes.
pub(in crate::report) fn whole(raw: &str) -> Markup {
    let mut out = String::with_capacity(raw.len() + 32);
    for (i, word) in raw.split(' ').enumerate() {
        if i > 0 {
            out.push(' ');
        }
        if word.contains('-') && word.chars().count() <= WHOLE {
            out.push_str("<span class=\"nw\">");
            push_text(&mut out, word);
            out.push_str("</span>");
        } else {
            push_text(&mut out, word);
        }
    }
    Markup::trusted(out)
}

/// A CSS string in quotes. Everything but letters, digits and spaces is written by its number, so
/// that neither the string nor the style element can be closed from inside.
pub fn css_string(raw: &str) -> String {
    let mut out = String::from("\"");
    for c in raw.chars() {
        match c {
            c if c.is_ascii_alphanumeric() || c == ' ' => out.push(c),
            c if unprintable(c) || c == '\n' || c == '\t' => out.push(' '),
            c => {
                let _ = write!(out, "\\{:x} ", u32::from(c));
            }
        }
    }
    out.push('"');
    out
}

/// Base64 with padding (RFC 4648, section 4).
pub fn base64(bytes: &[u8]) -> String {
    const ALPHABET: &[u8; 64] = b"ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/";
    let mut out = String::with_capacity(bytes.len().div_ceil(3) * 4);
    for chunk in bytes.chunks(3) {
        let block = chunk
            .iter()
            .chain([0_u8; 2].iter())
            .take(3)
            .fold(0_u32, |sum, byte| (sum << 8) | u32::from(*byte));
        for place in 0..4 {
            if place <= chunk.len() {
                let six = (block >> (18 - 6 * place)) & 63;
                out.push(char::from(ALPHABET[six as usize]));
            } else {
                out.push('=');
            }
        }
    }
    out
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn text_stays_text() {
        assert_eq!(text("a<b>&\"'"), "a&lt;b&gt;&amp;&quot;&#39;");
        assert_eq!(text("x\u{202e}y\u{0}z\n"), "x\u{fffd}y\u{fffd}z\n");
    }

    #[test]
    fn css_strings_cannot_be_left() {
        let hostile = css_string("\"}</style><script>\\\n");
        assert_eq!(hostile.matches('"').count(), 2);
        assert!(!hostile.contains('<') && !hostile.contains('}') && !hostile.contains('\n'));
    }

    #[test]
    fn base64_of_the_standard() {
        // RFC 4648, section 10, test vectors
        for (raw, coded) in [
            ("", ""),
            ("f", "Zg=="),
            ("fo", "Zm8="),
            ("foo", "Zm9v"),
            ("foob", "Zm9vYg=="),
            ("fooba", "Zm9vYmE="),
            ("foobar", "Zm9vYmFy"),
        ] {
            assert_eq!(base64(raw.as_bytes()), coded);
        }
    }
}
