//! AGMA lubricant numbers, as still stamped on nameplates.

use super::grade::IsoGrade;
use crate::quantity::KinematicViscosity;
use crate::quantity::convert::mm2_s;
use crate::relation::Law;

/// The AGMA lubricant numbers.
pub static AGMA: Law = Law {
    name: "agma-grade",
    title: "Viscosity of an AGMA lubricant number",
    formula: "0 to 9: the ISO grades 32 to 1500; 10 to 12: ranges of their own at 40 degC; 13, \
              14R, 15R: ranges at 100 degC",
    range: "0 to 15R; 10 to 12 depend on the edition",
    source: "AGMA 9005-D94; the mapping of 10 and 11 in 9005-E02 from memory and uncertain",
};

/// Why a text is no AGMA number.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
pub enum NotAgma {
    /// No such number.
    #[error("`{0}` is not an AGMA lubricant number; those are 0 to 13 with 8A, 14R and 15R")]
    Number(String),
    /// A suffix nobody defined.
    #[error("`{0}` is not a suffix of an AGMA number; those are EP, S, Comp and R")]
    Suffix(String),
}

/// Where the viscosity of a number is laid down.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Range {
    /// The limits of an ISO grade at 40 °C.
    Iso(IsoGrade),
    /// Limits at 40 °C outside the ISO grades.
    At40(KinematicViscosity, KinematicViscosity),
    /// Limits at 100 °C.
    At100(KinematicViscosity, KinematicViscosity),
}

/// What stands behind a number.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Suffix {
    /// EP: extreme pressure (antiscuff).
    ExtremePressure,
    /// S: synthetic.
    Synthetic,
    /// Comp: compounded with 3 to 10 % fatty oil.
    Compounded,
    /// R: residual, with a diluent.
    Residual,
}

impl Suffix {
    fn read(text: &str) -> Result<Self, NotAgma> {
        match text {
            "EP" => Ok(Self::ExtremePressure),
            "S" => Ok(Self::Synthetic),
            "COMP" | "COMPOUNDED" => Ok(Self::Compounded),
            "R" => Ok(Self::Residual),
            _ => Err(NotAgma::Suffix(text.to_owned())),
        }
    }
}

/// An AGMA lubricant number with its suffixes.
#[derive(Clone, Debug, PartialEq)]
pub struct AgmaNumber {
    /// The number as printed: `5`, `8A`, `14R`.
    pub number: &'static str,
    /// Its suffixes, in the order written.
    pub suffixes: Vec<Suffix>,
    /// Its viscosity by 9005-D94.
    pub range: Range,
    /// Whether editions differ (10 to 12): the ISO grade must then be asked for.
    pub edition_dependent: bool,
}

static ISO_NUMBERS: [(&str, u32); 11] = [
    ("0", 32),
    ("1", 46),
    ("2", 68),
    ("3", 100),
    ("4", 150),
    ("5", 220),
    ("6", 320),
    ("7", 460),
    ("8", 680),
    ("8A", 1000),
    ("9", 1500),
];
/// Number, lowest and highest at 40 °C.
static HEAVY: [(&str, f64, f64); 3] = [
    ("10", 2880.0, 3520.0),
    ("11", 4140.0, 5060.0),
    ("12", 6120.0, 7480.0),
];
/// Number, lowest and highest at 100 °C.
static RESIDUAL: [(&str, f64, f64); 3] = [
    ("13", 190.0, 220.0),
    ("14R", 428.5, 857.0),
    ("15R", 857.0, 1714.0),
];

impl AgmaNumber {
    /// Reads `5 EP`, `8A Comp`, `AGMA 7S`, `14R`.
    ///
    /// # Errors
    /// [`NotAgma`].
    pub fn read(text: &str) -> Result<Self, NotAgma> {
        let upper = text.trim().to_uppercase();
        let rest = upper.strip_prefix("AGMA").unwrap_or(&upper);
        let rest = rest
            .trim_start_matches([' ', '-', '.'])
            .trim_start_matches("NO");
        let rest = rest.trim_start_matches([' ', '.']);
        let digits = rest.chars().take_while(char::is_ascii_digit).count();
        let (stem, mut tail) = rest.split_at(digits);
        let mut number = stem.to_owned();
        if stem == "8" && tail.starts_with('A') {
            number.push('A');
            tail = &tail[1..];
        } else if matches!(stem, "14" | "15") && tail.starts_with('R') {
            number.push('R');
        }
        let (number, range) = range_of(&number).ok_or_else(|| NotAgma::Number(text.into()))?;
        let suffixes = tail
            .split([' ', '-', ',', '/'])
            .filter(|s| !s.is_empty())
            .map(Suffix::read)
            .collect::<Result<_, _>>()?;
        Ok(Self {
            number,
            suffixes,
            range,
            edition_dependent: matches!(number, "10" | "11" | "12"),
        })
    }

    /// The ISO grade, where the number has one in every edition.
    pub fn iso_grade(&self) -> Option<IsoGrade> {
        match self.range {
            Range::Iso(grade) => Some(grade),
            Range::At40(..) | Range::At100(..) => None,
        }
    }
}

fn range_of(number: &str) -> Option<(&'static str, Range)> {
    if let Some((name, vg)) = ISO_NUMBERS.iter().find(|r| r.0 == number) {
        return Some((name, Range::Iso(IsoGrade::of_number(*vg)?)));
    }
    if let Some((name, least, most)) = HEAVY.iter().find(|r| r.0 == number) {
        return Some((name, Range::At40(mm2_s(*least), mm2_s(*most))));
    }
    let (name, least, most) = RESIDUAL.iter().find(|r| r.0 == number)?;
    Some((name, Range::At100(mm2_s(*least), mm2_s(*most))))
}

#[cfg(test)]
mod tests {
    use super::Suffix::{Compounded, ExtremePressure, Residual, Synthetic};
    use super::*;

    #[test]
    fn reads_numbers_as_stamped() {
        let read = |text: &str| {
            let a = AgmaNumber::read(text).expect("an AGMA number");
            (
                a.number,
                a.suffixes.clone(),
                a.iso_grade().map(IsoGrade::number),
            )
        };
        assert_eq!(read("5 EP"), ("5", vec![ExtremePressure], Some(220)));
        assert_eq!(read("AGMA 8A Comp"), ("8A", vec![Compounded], Some(1000)));
        assert_eq!(read("agma no. 7s"), ("7", vec![Synthetic], Some(460)));
        assert_eq!(read("14R"), ("14R", vec![Residual], None));
        assert_eq!(read("10"), ("10", vec![], None));
        assert!(AgmaNumber::read("10").is_ok_and(|a| a.edition_dependent));
    }

    #[test]
    fn refuses_what_is_no_number() {
        for text in ["", "16", "EP", "8B", "5 XX", "220"] {
            assert!(AgmaNumber::read(text).is_err(), "{text}");
        }
    }
}
