//! Words on a page: phrases with weight and links, verdict marks, origin letters, temperature
//! scales.

use crate::quantity::show::{self, Toward};
use crate::report::draw::axes::{Axis, round_ticks};
use crate::report::names::Href;
use serde::ser::SerializeStruct;
use serde::{Deserialize, Deserializer, Serialize, Serializer};

/// A verdict, as its mark shows it.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum Mark {
    /// Every limit met, reserve kept.
    Holds,
    /// Every limit met, reserve not kept.
    Tight,
    /// A limit not met.
    Fails,
    /// A missing input could decide either way.
    #[default]
    Open,
}

impl Mark {
    /// The verdict's word.
    pub fn word(self) -> &'static str {
        match self {
            Mark::Holds => "holds",
            Mark::Tight => "tight",
            Mark::Fails => "fails",
            Mark::Open => "open",
        }
    }
}

/// How a run of words is set.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum RunKind {
    /// As the rest.
    #[default]
    Plain,
    /// Heavier: the words that carry the answer.
    Strong,
    /// A tag or an oil's name, never broken at its dashes.
    Tag,
    /// Less: asides, origins.
    Quiet,
    /// What is to be typed.
    Code,
}

/// Words of one kind, perhaps with a link.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Run {
    /// The words.
    pub text: String,
    /// How they are set.
    pub kind: RunKind,
    /// Where they lead.
    pub href: Option<Href>,
}

/// A sentence or two.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(transparent)]
pub struct Phrase {
    runs: Vec<Run>,
}

impl Phrase {
    /// No words yet.
    pub fn new() -> Self {
        Self::default()
    }

    /// Adds words of a kind.
    #[must_use]
    pub fn with(mut self, kind: RunKind, text: impl Into<String>) -> Self {
        self.runs.push(Run {
            text: text.into(),
            kind,
            href: None,
        });
        self
    }

    /// Adds plain words.
    #[must_use]
    pub fn and(self, text: impl Into<String>) -> Self {
        self.with(RunKind::Plain, text)
    }

    /// Adds heavier words.
    #[must_use]
    pub fn strong(self, text: impl Into<String>) -> Self {
        self.with(RunKind::Strong, text)
    }

    /// Adds a tag or an oil's name.
    #[must_use]
    pub fn tag(self, text: impl Into<String>) -> Self {
        self.with(RunKind::Tag, text)
    }

    /// Adds a tag or an oil's name that leads to its sheet.
    #[must_use]
    pub fn tag_link(mut self, text: impl Into<String>, href: Href) -> Self {
        self.runs.push(Run {
            text: text.into(),
            kind: RunKind::Tag,
            href: Some(href),
        });
        self
    }

    /// Adds another phrase.
    #[must_use]
    pub fn join(mut self, other: Phrase) -> Self {
        self.runs.extend(other.runs);
        self
    }

    /// Adds words that lead somewhere.
    #[must_use]
    pub fn link(mut self, text: impl Into<String>, href: Href) -> Self {
        self.runs.push(Run {
            text: text.into(),
            kind: RunKind::Plain,
            href: Some(href),
        });
        self
    }

    /// The words alone.
    pub fn text(&self) -> String {
        self.runs.iter().map(|run| run.text.as_str()).collect()
    }

    /// Whether there are none.
    pub fn is_empty(&self) -> bool {
        self.runs.iter().all(|run| run.text.is_empty())
    }
}

impl From<&str> for Phrase {
    fn from(text: &str) -> Self {
        Self::new().and(text)
    }
}

impl From<String> for Phrase {
    fn from(text: String) -> Self {
        Self::new().and(text)
    }
}

/// Where a value comes from, shown as a letter beside it.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord)]
pub enum Origin {
    /// Measured on site.
    Measured,
    /// On the nameplate or in the maker's papers.
    Maker,
    /// In the asset register.
    Register,
    /// From the oil's supplier.
    Supplier,
    /// A house value or rule.
    House,
    /// A published rule or standard.
    Standard,
    /// Assumed.
    Assumed,
    /// Given without an origin.
    #[default]
    NotStated,
}

impl Origin {
    /// Every origin, in the order of their key.
    pub const ALL: [Origin; 8] = [
        Origin::Measured,
        Origin::Maker,
        Origin::Register,
        Origin::Supplier,
        Origin::House,
        Origin::Standard,
        Origin::Assumed,
        Origin::NotStated,
    ];

    /// Letter and words.
    pub fn key(self) -> (&'static str, &'static str) {
        match self {
            Origin::Measured => ("M", "measured on site"),
            Origin::Maker => ("N", "nameplate or maker"),
            Origin::Register => ("R", "asset register"),
            Origin::Supplier => ("S", "supplier of the oil"),
            Origin::House => ("H", "house value"),
            Origin::Standard => ("P", "published rule"),
            Origin::Assumed => ("A", "assumed"),
            Origin::NotStated => ("?", "origin not stated"),
        }
    }

    /// Whether the box round the letter is dashed: the value rests on nobody's word.
    pub fn soft(self) -> bool {
        matches!(self, Origin::Assumed | Origin::NotStated)
    }
}

impl Serialize for Origin {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        let (letter, words) = self.key();
        let mut out = serializer.serialize_struct("Origin", 3)?;
        out.serialize_field("letter", letter)?;
        out.serialize_field("words", words)?;
        out.serialize_field("soft", &self.soft())?;
        out.end()
    }
}

impl<'de> Deserialize<'de> for Origin {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        #[derive(Deserialize)]
        struct Written {
            letter: String,
        }
        let written = Written::deserialize(deserializer)?;
        Origin::ALL
            .into_iter()
            .find(|origin| origin.key().0 == written.letter)
            .ok_or_else(|| serde::de::Error::custom("no such letter of origin"))
    }
}

/// The scale temperatures are shown in.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum Degrees {
    /// °C.
    #[default]
    Celsius,
    /// °F.
    Fahrenheit,
}

impl Degrees {
    /// The unit as printed.
    pub fn unit(self) -> &'static str {
        match self {
            Degrees::Celsius => "°C",
            Degrees::Fahrenheit => "°F",
        }
    }

    fn of(self, celsius: f64) -> f64 {
        match self {
            Degrees::Celsius => celsius,
            Degrees::Fahrenheit => celsius * 1.8 + 32.0,
        }
    }

    fn back(self, shown: f64) -> f64 {
        match self {
            Degrees::Celsius => shown,
            Degrees::Fahrenheit => (shown - 32.0) / 1.8,
        }
    }

    /// Round temperatures of this scale on an axis in °C, with their figures.
    pub fn ticks(self, axis: &Axis, gap: f64) -> Vec<(f64, String)> {
        let shown = Axis {
            low: self.of(axis.low),
            high: self.of(axis.high),
            ..*axis
        };
        round_ticks(&shown, gap)
            .into_iter()
            .map(|t| (self.back(t), minus(&grouped(t))))
            .collect()
    }

    /// The cold end of a band, rounded inwards: up.
    pub fn figure_up(self, celsius: f64) -> String {
        minus(&show::fixed(self.of(celsius), 0, Toward::Up))
    }

    /// The hot end of a band, rounded inwards: down.
    pub fn figure_down(self, celsius: f64) -> String {
        minus(&show::fixed(self.of(celsius), 0, Toward::Down))
    }
}

/// The letter of the item at a place in the list, from 0: A, B, C …, then AA, AB … H and K are the
/// letters of the enlarged views, I and O read as figures; none of the four is given out.
pub fn item_letter(place: usize) -> String {
    const LETTERS: &[u8; 22] = b"ABCDEFGJLMNPQRSTUVWXYZ";
    let last = char::from(LETTERS[place % LETTERS.len()]);
    if place < LETTERS.len() {
        last.to_string()
    } else {
        format!("{}{last}", item_letter(place / LETTERS.len() - 1))
    }
}

/// The text with true minus signs before figures.
pub fn minus(text: &str) -> String {
    let mut out = String::with_capacity(text.len() + 4);
    let mut before = ' ';
    let mut rest = text.chars().peekable();
    while let Some(c) = rest.next() {
        let sign =
            c == '-' && !before.is_alphanumeric() && rest.peek().is_some_and(char::is_ascii_digit);
        out.push(if sign { '\u{2212}' } else { c });
        before = c;
    }
    out
}

/// A figure on an axis: three digits at most, thousands parted, no trailing zeros.
pub fn grouped(value: f64) -> String {
    // the noise of a product of powers of ten must not show
    let value = if value.abs() < 1e-9 { 0.0 } else { value };
    let text = if value.abs() >= 1000.0 {
        show::fixed(value, 0, Toward::Nearest)
    } else {
        show::significant(value, 3, Toward::Nearest)
    };
    let text = if text.contains('.') {
        text.trim_end_matches('0').trim_end_matches('.')
    } else {
        &text
    };
    minus(text)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn minus_signs_only_before_figures() {
        assert_eq!(minus("-18 .. 36, CV-104"), "\u{2212}18 .. 36, CV-104");
        assert_eq!(grouped(-20.0), "\u{2212}20");
        assert_eq!(grouped(25_000.0), "25\u{202f}000");
        assert_eq!(grouped(0.0), "0");
    }

    #[test]
    fn item_letters_skip_what_is_taken() {
        let letters: Vec<String> = [0, 6, 7, 8, 21, 22].into_iter().map(item_letter).collect();
        assert_eq!(letters, ["A", "G", "J", "L", "Z", "AA"]);
    }

    #[test]
    fn bands_are_rounded_inwards() {
        assert_eq!(Degrees::Celsius.figure_up(-22.9), "\u{2212}22");
        assert_eq!(Degrees::Celsius.figure_down(42.2), "42");
        assert_eq!(Degrees::Fahrenheit.figure_up(-22.9), "\u{2212}9");
    }
}
