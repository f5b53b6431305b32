//! What a bearing's number says: its kind, its bore and its outside diameter.
//!
//! Source: DIN 623-1 (designations) over the boundary dimensions of ISO 15, ISO 104 and ISO 355.
//! The dimensions are data and handed in.

use super::class::BearingKind;
use crate::quantity::Length;
use crate::quantity::convert::{mm, to_mm};
use std::collections::BTreeMap;

/// Boundary dimensions by series.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct DimensionTable {
    /// Bores of the codes `00` to `03`.
    pub bore_codes: BTreeMap<String, Length>,
    /// Outside diameter by diameter series and bore in micrometres, radial bearings.
    pub radial: BTreeMap<u8, BTreeMap<u32, Length>>,
    /// The same for thrust bearings.
    pub thrust: BTreeMap<u8, BTreeMap<u32, Length>>,
    /// Kind, what stands before the bore code, and the diameter series.
    pub series: Vec<(BearingKind, String, u8)>,
}

impl DimensionTable {
    /// The key of a bore: whole micrometres.
    pub fn key(bore: Length) -> u32 {
        #[expect(
            clippy::cast_possible_truncation,
            clippy::cast_sign_loss,
            reason = "a float cast saturates, and no bearing has a bore of 4 km"
        )]
        let key = (to_mm(bore) * 1e3).round() as u32;
        key
    }

    fn outside(&self, kind: BearingKind, series: u8, bore: Length) -> Option<Length> {
        let table = if kind.is_thrust() {
            &self.thrust
        } else {
            &self.radial
        };
        table.get(&series)?.get(&Self::key(bore)).copied()
    }
}

/// A bearing known by its number.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Designated {
    /// Its kind.
    pub kind: BearingKind,
    /// Bore.
    pub bore: Length,
    /// Outside diameter.
    pub outside: Length,
}

/// Why a number says nothing.
#[derive(Clone, Debug, PartialEq, thiserror::Error)]
pub enum Unknown {
    /// The number is of no series that the table holds.
    #[error("`{text}` is of no bearing series known here; state bore and outside diameter")]
    Series {
        /// As written.
        text: String,
    },
    /// The series is known, but not this size of it.
    #[error(
        "`{text}` reads as a {} bearing, but its size is not in the table; state bore and outside diameter", kind.name()
    )]
    Size {
        /// As written.
        text: String,
        /// The kind it reads as.
        kind: BearingKind,
    },
}

/// Letters that make a cylindrical roller bearing.
const CYLINDRICAL: &[&str] = &["N", "NU", "NJ", "NUP", "NF"];

/// Reads a designation: `22220 EK C3`, `6312-2RS`, `NU 1020 M`, `230/500`. Suffixes for design,
/// cage, seals and clearance do not matter here; case and spaces neither.
///
/// # Errors
/// [`Unknown`], with the advice to state the dimensions.
pub fn read(table: &DimensionTable, text: &str) -> Result<Designated, Unknown> {
    let unknown = || Unknown::Series {
        text: text.trim().to_owned(),
    };
    let number = Number::of(text).ok_or_else(unknown)?;
    let (kind, series, bore) = number.meaning(table).ok_or_else(unknown)?;
    let size = || Unknown::Size {
        text: text.trim().to_owned(),
        kind,
    };
    let bore = bore.ok_or_else(size)?;
    let outside = table.outside(kind, series, bore).ok_or_else(size)?;
    Ok(Designated {
        kind,
        bore,
        outside,
    })
}

/// The parts of a designation that carry its dimensions.
struct Number {
    letters: String,
    digits: String,
    /// The bore in millimetres where it stands after a slash.
    slashed: Option<u32>,
}

impl Number {
    fn of(text: &str) -> Option<Self> {
        let text = text.trim().to_ascii_uppercase();
        let letters: String = text.chars().take_while(char::is_ascii_alphabetic).collect();
        let rest = text[letters.len()..].trim_start_matches([' ', '-', '.']);
        let digits: String = rest.chars().take_while(char::is_ascii_digit).collect();
        if digits.is_empty() || !(letters.is_empty() || CYLINDRICAL.contains(&letters.as_str())) {
            return None;
        }
        let slashed = rest[digits.len()..].strip_prefix('/').and_then(|after| {
            let bore: String = after.chars().take_while(char::is_ascii_digit).collect();
            bore.parse().ok()
        });
        Some(Self {
            letters,
            digits,
            slashed,
        })
    }

    /// Kind, diameter series and, if its code means one, the bore.
    fn meaning(&self, table: &DimensionTable) -> Option<(BearingKind, u8, Option<Length>)> {
        let cylindrical = !self.letters.is_empty();
        let rows = table
            .series
            .iter()
            .filter(|(kind, _, _)| (*kind == BearingKind::CylindricalRoller) == cylindrical);
        for (kind, prefix, series) in rows {
            let Some(code) = self.digits.strip_prefix(prefix.as_str()) else {
                continue;
            };
            match (code.len(), self.slashed) {
                (0, Some(bore)) => return Some((*kind, *series, Some(mm(f64::from(bore))))),
                (2, _) => return Some((*kind, *series, bore_of(table, code))),
                _ => {}
            }
        }
        None
    }
}

/// The bore of a two-figure code: from the table to `03`, then five times the code.
fn bore_of(table: &DimensionTable, code: &str) -> Option<Length> {
    if let Some(bore) = table.bore_codes.get(code) {
        return Some(*bore);
    }
    let number: u32 = code.parse().ok()?;
    (4..=96)
        .contains(&number)
        .then(|| mm(f64::from(number * 5)))
}
