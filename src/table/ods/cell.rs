//! One cell: its value as stored, and as shown.

use crate::table::Content;
use crate::table::xml::Tag;

/// A cell as far as it was read.
pub(super) struct Open {
    /// How often it stands there.
    pub(super) repeated: u32,
    /// How many rows and columns it spans, where more than itself.
    pub(super) spans: Option<(u32, u32)>,
    kind: String,
    value: Option<String>,
    formula: Option<String>,
    /// Its paragraphs.
    shown: String,
    paragraphs: usize,
}

impl Open {
    pub(super) fn new(tag: &Tag) -> Self {
        let count = |name: &str| tag.number(name).unwrap_or(1).max(1);
        let spans = (
            count("number-rows-spanned"),
            count("number-columns-spanned"),
        );
        let keys = [
            "value",
            "date-value",
            "time-value",
            "boolean-value",
            "string-value",
        ];
        let value = keys.iter().find_map(|key| tag.get(key));
        Self {
            repeated: count("number-columns-repeated"),
            spans: (spans != (1, 1)).then_some(spans),
            kind: tag.get("value-type").unwrap_or("").to_owned(),
            value: value.map(str::to_owned),
            formula: tag.get("formula").map(|f| {
                let plain = f.split_once(":=").map_or(f, |(_, rest)| rest);
                format!("={}", plain.trim_start_matches('='))
            }),
            shown: String::new(),
            paragraphs: 0,
        }
    }

    /// An element inside the cell.
    pub(super) fn opens(&mut self, name: &str, tag: &Tag) {
        match name {
            "p" => {
                if self.paragraphs > 0 {
                    self.shown.push('\n');
                }
                self.paragraphs += 1;
            }
            "s" => {
                let count = tag.number("c").unwrap_or(1).min(256);
                self.shown.extend((0..count).map(|_| ' '));
            }
            "tab" => self.shown.push('\t'),
            "line-break" => self.shown.push('\n'),
            _ => {}
        }
    }

    /// Text of the cell; space between paragraphs is none of it.
    pub(super) fn text(&mut self, piece: &str) {
        if self.paragraphs > 0 {
            self.shown.push_str(piece);
        }
    }

    /// What the cell holds; nothing where it is only formatted.
    pub(super) fn content(&self) -> Option<Content> {
        let number = || {
            self.value
                .as_ref()?
                .parse::<f64>()
                .ok()
                .filter(|v| v.is_finite())
        };
        let text = || Content::Text(self.value.clone().unwrap_or_else(|| self.shown.clone()));
        let fault = self.shown.starts_with('#') || self.shown.starts_with("Err:");
        if self.formula.is_some() && fault {
            return Some(Content::Fault(self.shown.clone()));
        }
        match self.kind.as_str() {
            "percentage" => number().map(Content::Percent),
            "float" | "currency" => number().map(|value| Content::Number {
                value,
                unit: unit(&self.shown),
            }),
            "date" => self.value.as_ref().map(|v| {
                let day = v.trim_end_matches("T00:00:00").replace('T', " ");
                // Seconds are told where there are any, as of the other form of workbook.
                let minute = day.strip_suffix(":00").filter(|m| m.len() == 16);
                Content::Date(minute.unwrap_or(&day).to_owned())
            }),
            "time" => Some(Content::Text(self.shown.clone())),
            "boolean" => Some(Content::Truth(self.value.as_deref() == Some("true"))),
            "string" => Some(text()),
            _ if !self.shown.is_empty() => Some(text()),
            _ => self
                .formula
                .clone()
                .map(|formula| Content::NoValue { formula }),
        }
    }
}

/// The unit a number is shown with: `L` of `68.0 L`.
fn unit(shown: &str) -> Option<Box<str>> {
    let figures = |c: char| c.is_ascii_digit() || ".,+-'\u{a0}\u{202f} \u{2212}".contains(c);
    let rest = shown.trim().trim_start_matches(figures).trim();
    let exponent = rest.starts_with(['E', 'e']) && rest[1..].starts_with(['+', '-']);
    let named = rest.chars().any(|c| c.is_alphabetic() || c == '°') && !exponent;
    let before = shown.trim().starts_with(figures);
    (named && before).then(|| rest.into())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn units_are_taken_from_what_is_shown() {
        assert_eq!(unit("68.0 L").as_deref(), Some("L"));
        assert_eq!(unit("1 480 r/min").as_deref(), Some("r/min"));
        assert_eq!(unit("-15,0 °C").as_deref(), Some("°C"));
        assert_eq!(unit("1.50E+03"), None);
        assert_eq!(unit("EUR 12.00"), None);
        assert_eq!(unit("12"), None);
    }
}
