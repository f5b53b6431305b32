//! A bottle as the laboratory's table gives it.

use crate::model::sample::Reading;
use crate::source::place::Cell;
use jiff::civil::Date;

/// Whether a figure is the value or only bounds it.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Bounds {
    /// The value itself.
    #[default]
    Exactly,
    /// `<5`: it lies below.
    Below,
    /// `>200`: it lies above.
    Above,
}

/// A figure of a laboratory.
#[derive(Clone, Debug, PartialEq)]
pub struct Figure {
    /// In the unit its reading is kept in ([`Reading::unit`]).
    pub value: f64,
    /// Whether it is the value or bounds it.
    pub bounds: Bounds,
    /// As written.
    pub written: Box<str>,
    /// Column of the cell, counted from one.
    pub column: u32,
}

/// The figures of a bottle, by reading.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Figures(Vec<(Reading, Figure)>);

impl Figures {
    /// Puts a figure in.
    pub fn put(&mut self, reading: Reading, figure: Figure) {
        match self.0.binary_search_by_key(&reading, |(r, _)| *r) {
            Ok(at) => self.0[at].1 = figure,
            Err(at) => self.0.insert(at, (reading, figure)),
        }
    }

    /// The figure of a reading.
    pub fn get(&self, reading: Reading) -> Option<&Figure> {
        let at = self.0.binary_search_by_key(&reading, |(r, _)| *r).ok()?;
        Some(&self.0[at].1)
    }

    /// The value of a reading where it is one and not a bound.
    pub fn exact(&self, reading: Reading) -> Option<f64> {
        let figure = self.get(reading)?;
        (figure.bounds == Bounds::Exactly).then_some(figure.value)
    }

    /// Every figure, in the order of readings.
    pub fn iter(&self) -> impl Iterator<Item = (Reading, &Figure)> {
        self.0.iter().map(|(r, f)| (*r, f))
    }

    /// Whether there is none.
    pub fn is_empty(&self) -> bool {
        self.0.is_empty()
    }
}

/// A cleanliness code, ISO 4406; a part may be missing (`-/17/14`).
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Code(pub [Option<u8>; 3]);

impl Code {
    /// Reads `19/17/14` or `-/17/14`.
    pub fn read(text: &str) -> Option<Self> {
        let text = text.trim();
        let mut parts = Vec::new();
        for part in text.split('/') {
            let part = part.trim().trim_start_matches('>');
            parts.push(match part {
                "-" | "--" | "*" | "" => None,
                number => Some(number.parse::<u8>().ok().filter(|n| *n <= 30)?),
            });
        }
        match parts.as_slice() {
            [four, six, fourteen] => Some(Self([*four, *six, *fourteen])),
            // the older code of two figures, 5 and 15 um
            [six, fourteen] => Some(Self([None, *six, *fourteen])),
            _ => None,
        }
        .filter(|c| c.0.iter().any(Option::is_some))
    }

    /// From particles in a millilitre of 4, 6 and 14 µm(c) and more.
    pub fn of_counts(counts: [Option<f64>; 3]) -> Option<Self> {
        let code = Self(counts.map(|n| n.and_then(number_of)));
        code.0.iter().any(Option::is_some).then_some(code)
    }

    /// Codes over a target: the greatest excess of the parts both state; negative where cleaner.
    pub fn over(self, target: Self) -> Option<i16> {
        let parts = self.0.iter().zip(&target.0);
        let over = parts.filter_map(|(a, b)| Some(i16::from((*a)?) - i16::from((*b)?)));
        over.max()
    }
}

impl std::fmt::Display for Code {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        for (i, part) in self.0.iter().enumerate() {
            if i > 0 {
                f.write_str("/")?;
            }
            match part {
                Some(n) => write!(f, "{n}")?,
                None => f.write_str("-")?,
            }
        }
        Ok(())
    }
}

/// Upper counts in a millilitre of codes 1 to 28, ISO 4406:2017 table 1
const UPPER: [f64; 28] = [
    0.02,
    0.04,
    0.08,
    0.16,
    0.32,
    0.64,
    1.3,
    2.5,
    5.0,
    10.0,
    20.0,
    40.0,
    80.0,
    160.0,
    320.0,
    640.0,
    1300.0,
    2500.0,
    5000.0,
    10_000.0,
    20_000.0,
    40_000.0,
    80_000.0,
    160_000.0,
    320_000.0,
    640_000.0,
    1_300_000.0,
    2_500_000.0,
];

/// The code of a count: the upper count doubles from code to code, 80 to 160 is 14.
fn number_of(count: f64) -> Option<u8> {
    if !(count.is_finite() && count >= 0.0) {
        return None;
    }
    let at = UPPER.iter().position(|upper| count <= *upper);
    Some(at.map_or(29, |at| u8::try_from(at + 1).unwrap_or(29)))
}

/// A bottle.
#[derive(Clone, Debug, PartialEq)]
pub struct Bottle {
    /// Its number, where the table has one.
    pub number: Option<String>,
    /// What it says of the machine, as written.
    pub machine: String,
    /// The oil on the label, as written.
    pub label: Option<String>,
    /// Day it was drawn.
    pub drawn: Option<Date>,
    /// The day as written.
    pub drawn_written: String,
    /// Figures of the oil in use.
    pub figures: Figures,
    /// Figures of the new oil beside them.
    pub new: Figures,
    /// Cleanliness, and whether it was worked out from counts.
    pub cleanliness: Option<(Code, bool)>,
    /// Remarks of the laboratory, untouched.
    pub flags: Option<String>,
    /// What was not understood: heading and cell as written.
    pub unread: Vec<(String, String)>,
    /// Whether the figures do not belong under their headings.
    pub shifted: bool,
    /// Where it stands; the column is that of the machine.
    pub place: Cell,
}

impl Bottle {
    /// What it is called: its number, else its row.
    pub fn name(&self) -> String {
        match &self.number {
            Some(number) => number.clone(),
            None => format!("row {}", self.place.row),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// ISO 4406:2017 table 1: 80 to 160 is 14, 1300 to 2500 is 18, 5000 to 10 000 is 20.
    #[test]
    fn counts_become_codes() {
        let code = Code::of_counts([Some(6000.0), Some(1400.0), Some(160.0)]);
        assert_eq!(code.map(|c| c.to_string()).as_deref(), Some("20/18/14"));
        let code = Code::of_counts([None, Some(161.0), Some(0.0)]);
        assert_eq!(code.map(|c| c.to_string()).as_deref(), Some("-/15/1"));
        assert_eq!(Code::of_counts([None, None, Some(f64::NAN)]), None);
    }

    #[test]
    fn codes_are_read_and_compared() {
        let read = |t| Code::read(t).expect("a code");
        assert_eq!(read("19/17/14").over(read("16/14/11")), Some(3));
        assert_eq!(read("-/17/14").over(read("18/16/14")), Some(1));
        assert_eq!(read(" 17/14 ").to_string(), "-/17/14");
        for bad in ["", "19", "19/17/14/2", "a/b/c", "-/-/-", "99/17/14"] {
            assert_eq!(Code::read(bad), None, "{bad}");
        }
    }
}
