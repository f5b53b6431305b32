//! What dirt in the oil or grease leaves of a rolling bearing's fatigue strength.
//!
//! Source: ISO 281:2007, annex A (from memory). The formulas give clearly lower values for small
//! bearings than the standard's own table of guide values; the program goes by the formulas and
//! offers the guide values for comparison.

use crate::numeric::math::{cbrt, pow};
use crate::quantity::convert::{mm, to_mm};
use crate::quantity::{Length, Measure, Ratio};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// The contamination factor.
pub static CONTAMINATION_FACTOR: Law = Law {
    name: "bearing-contamination",
    title: "Contamination factor of a rolling bearing",
    formula: "e_C = min(1, k kappa^0.68 Dpw^0.55) (1 - c / Dpw^(1/3))",
    range: "Dpw in mm; k and c by lubrication and cleanliness; below zero counts as zero",
    source: "ISO 281:2007, annex A (from memory)",
};

/// How the oil is kept clean.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Method {
    /// Circulating oil, filtered on its way to the bearing.
    OnlineFilter,
    /// Oil bath, or a filter beside the main flow.
    OilBath,
}

/// How clean a greased bearing is.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum GreaseCleanliness {
    /// Fitted with great care, well sealed, greased continuously or at short intervals.
    High,
    /// Clean fitting, good seals, greased as the maker says.
    Normal,
    /// Clean fitting, fair seals.
    Slight,
    /// Workshop fitting, no washing, longer intervals.
    Severe,
    /// Dirty surroundings, poor seals, long intervals.
    VerySevere,
}

impl GreaseCleanliness {
    /// As written by the user.
    pub const WORDS: &'static [(&'static str, Self)] = &[
        ("high", Self::High),
        ("normal", Self::Normal),
        ("slight", Self::Slight),
        ("severe", Self::Severe),
        ("very-severe", Self::VerySevere),
    ];
}

/// The two coefficients of a row of the annex.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Row {
    k: f64,
    c: f64,
}

const fn row(k: f64, c: f64) -> Row {
    Row { k, c }
}

/// The 6 µm and 14 µm codes of a row, and its coefficients.
const ONLINE: [(u8, u8, Row); 4] = [
    (13, 10, row(0.0864, 0.5663)),
    (15, 12, row(0.0432, 0.9987)),
    (17, 14, row(0.0288, 1.6329)),
    (19, 16, row(0.0216, 2.3362)),
];
const BATH: [(u8, u8, Row); 5] = [
    (13, 10, row(0.0864, 0.6796)),
    (15, 12, row(0.0288, 1.141)),
    (17, 14, row(0.0133, 1.670)),
    (19, 16, row(0.008_64, 2.5164)),
    (21, 18, row(0.004_11, 3.8974)),
];

/// A cleanliness code of ISO 4406, as far as the annex uses it: particles of 6 µm and 14 µm.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Code {
    /// Code number at 6 µm.
    pub six: u8,
    /// Code number at 14 µm.
    pub fourteen: u8,
}

impl Code {
    /// Reads `-/15/12`, `18/15/12` or `15/12`.
    pub fn read(text: &str) -> Option<Self> {
        let parts: Vec<&str> = text.split('/').map(str::trim).collect();
        let ([six, fourteen] | [_, six, fourteen]) = parts.as_slice() else {
            return None;
        };
        let number = |t: &str| t.parse::<u8>().ok().filter(|n| *n <= 28);
        Some(Self {
            six: number(six)?,
            fourteen: number(fourteen)?,
        })
    }
}

/// The row of the annex for an oil: the cleanest one that is as dirty as the code in both sizes.
///
/// # Errors
/// A code dirtier than the annex knows.
pub fn oil_row(method: Method, code: Code) -> Result<Row, Outside> {
    let rows: &[(u8, u8, Row)] = match method {
        Method::OnlineFilter => &ONLINE,
        Method::OilBath => &BATH,
    };
    let needs = match method {
        Method::OnlineFilter => "with an on-line filter the annex ends at -/19/16",
        Method::OilBath => "in an oil bath the annex ends at -/21/18",
    };
    rows.iter()
        .find(|(six, fourteen, _)| code.six <= *six && code.fourteen <= *fourteen)
        .map(|(_, _, row)| *row)
        .ok_or(Outside::Range {
            what: "the cleanliness code at 6 um",
            value: f64::from(code.six),
            needs,
        })
}

/// The row of the annex for a grease.
pub fn grease_row(cleanliness: GreaseCleanliness, pitch_diameter: Length) -> Row {
    let large = pitch_diameter >= mm(500.0);
    match cleanliness {
        GreaseCleanliness::High => row(0.0864, 0.6796),
        GreaseCleanliness::Normal => row(0.0432, 1.141),
        GreaseCleanliness::Slight => row(0.0177, if large { 1.677 } else { 1.887 }),
        GreaseCleanliness::Severe => row(0.0115, 2.662),
        GreaseCleanliness::VerySevere => row(0.006_17, 4.06),
    }
}

/// Contamination factor, between 0 and 1.
///
/// # Errors
/// A viscosity ratio or a diameter that is not above zero.
pub fn factor(row: Row, kappa: Ratio, pitch_diameter: Length) -> Result<Ratio, Outside> {
    let kappa = positive("kappa", kappa)?;
    positive("the pitch diameter", pitch_diameter)?;
    let d_mm = to_mm(pitch_diameter);
    let first = (row.k * pow(kappa, 0.68) * pow(d_mm, 0.55)).min(1.0);
    let factor = first * (1.0 - row.c / cbrt(d_mm));
    Ok(Ratio::from_base(factor.max(0.0)))
}

/// Guide values for one degree of cleanliness: lowest and highest factor.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Guide {
    /// The degree, in words.
    pub cleanliness: &'static str,
    /// Pitch diameters below 100 mm.
    pub small: (f64, f64),
    /// From 100 mm on.
    pub large: (f64, f64),
}

const fn guide(cleanliness: &'static str, small: (f64, f64), large: (f64, f64)) -> Guide {
    Guide {
        cleanliness,
        small,
        large,
    }
}

/// The standard's table of guide values (from memory).
pub const GUIDE: &[Guide] = &[
    guide("extreme", (1.0, 1.0), (1.0, 1.0)),
    guide("high", (0.6, 0.8), (0.8, 0.9)),
    guide("normal", (0.5, 0.6), (0.6, 0.8)),
    guide("slight", (0.3, 0.5), (0.4, 0.6)),
    guide("typical", (0.1, 0.3), (0.2, 0.4)),
    guide("severe", (0.0, 0.1), (0.0, 0.1)),
    guide("very severe", (0.0, 0.0), (0.0, 0.0)),
];

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_code_between_two_rows_takes_the_dirtier() {
        let rough = oil_row(
            Method::OnlineFilter,
            Code {
                six: 14,
                fourteen: 12,
            },
        );
        let exact = oil_row(
            Method::OnlineFilter,
            Code {
                six: 15,
                fourteen: 12,
            },
        );
        assert_eq!(rough, exact);
        assert!(
            oil_row(
                Method::OnlineFilter,
                Code {
                    six: 20,
                    fourteen: 10
                }
            )
            .is_err()
        );
        assert_eq!(
            Code::read("18/15/12"),
            Some(Code {
                six: 15,
                fourteen: 12
            })
        );
        assert_eq!(Code::read("-/15/12"), Code::read("15 / 12"));
        assert_eq!(Code::read("15"), None);
    }
}
