//! Viscosity grades: ISO 3448, AGMA 9005, SAE J300 and J306.

use crate::input::convert::shown;
use crate::input::value::{Fault, Mend};
use crate::problem::Code;
use crate::quantity::convert::{mm2_s, to_mm2_s};
use crate::quantity::{KinematicViscosity, Measure, Ratio};
use crate::relation::oil::agma::{AgmaNumber, Range};
use crate::relation::oil::grade::IsoGrade;
use crate::relation::oil::{sae_engine, sae_gear, viscosity_index};

/// What a grade says about viscosity.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Grade {
    /// An ISO grade; whether another name was written for it.
    Iso {
        /// Its number.
        number: u32,
        /// Written as an AGMA number.
        converted: bool,
    },
    /// Limits at 40 °C.
    At40(KinematicViscosity, KinematicViscosity),
    /// Limits at 100 °C.
    At100(KinematicViscosity, KinematicViscosity),
}

impl Grade {
    /// What it was read as, where another name than an ISO grade was written.
    pub fn read_as(self) -> Option<String> {
        match self {
            Self::Iso {
                converted: false, ..
            } => None,
            Self::Iso { number, .. } => Some(format!("ISO VG {number}")),
            Self::At40(lo, hi) => Some(range(lo, hi, 40)),
            Self::At100(lo, hi) => Some(range(lo, hi, 100)),
        }
    }

    /// The ISO grade whose middle lies nearest to its thinnest oil: a floor it asks for. Limits
    /// at 100 °C are carried to 40 °C on a line of index 95.
    pub fn as_floor(self) -> Option<u32> {
        let thinnest = match self {
            Self::Iso { number, .. } => return Some(number),
            Self::At40(lo, _) => lo,
            Self::At100(lo, _) => viscosity_index::nu40(lo, Ratio::from_base(95.0)).ok()?,
        };
        let wanted = to_mm2_s(thinnest);
        let off = |g: &IsoGrade| {
            let middle = to_mm2_s(g.midpoint());
            (middle / wanted).max(wanted / middle)
        };
        IsoGrade::all()
            .min_by(|a, b| off(a).total_cmp(&off(b)))
            .map(IsoGrade::number)
    }
}

fn range(lo: KinematicViscosity, hi: KinematicViscosity, at: u32) -> String {
    let lo = shown(lo).replace(" mm2/s", "");
    format!("{lo} to {} at {at} degC", shown(hi))
}

/// Whether a text begins as a grade does.
pub(super) fn opens(text: &str) -> bool {
    let upper = text.to_uppercase();
    ["ISO", "VG", "AGMA", "SAE"]
        .iter()
        .any(|word| upper.starts_with(word))
}

/// Reads `ISO VG 220`, `VG 220`, `AGMA 5 EP`, `SAE 90`, `SAE 15W-40`.
///
/// # Errors
/// A grade that does not exist, with those next to it.
pub fn read_grade(text: &str) -> Result<Grade, Fault> {
    let upper = text.trim().to_uppercase();
    if upper.starts_with("AGMA") {
        return agma(text);
    }
    if let Some(number) = upper.strip_prefix("SAE") {
        return sae(text, number.trim());
    }
    let number = upper
        .trim_start_matches("ISO")
        .trim_start_matches(['-', ' '])
        .trim_start_matches("VG")
        .trim_start_matches(['-', ' ']);
    match number.parse::<u32>().ok().and_then(IsoGrade::of_number) {
        Some(grade) => Ok(Grade::Iso {
            number: grade.number(),
            converted: false,
        }),
        None => Err(unknown_iso(text, number)),
    }
}

fn unknown_iso(text: &str, number: &str) -> Fault {
    let all = 0..text.len();
    let fault = Fault::new(
        Code::GradeUnknown,
        format!("there is no grade {text}"),
        all.clone(),
    )
    .why("ISO 3448 has the grades 2, 3, 5, 7, 10, 15, 22, 32, 46, 68, 100, 150, 220, 320, 460, 680, 1000, 1500, 2200 and 3200");
    let Ok(value) = number.parse::<f64>() else {
        return fault.mend(Mend::new(all, "ISO VG 220").remark("or the right grade"));
    };
    let middle = |g: &IsoGrade| f64::from(g.number());
    let below = IsoGrade::all().rfind(|g| middle(g) <= value);
    let above = IsoGrade::all().find(|g| middle(g) > value);
    below.into_iter().chain(above).fold(fault, |f, g| {
        f.mend(Mend::new(all.clone(), format!("ISO VG {}", g.number())))
    })
}

fn agma(text: &str) -> Result<Grade, Fault> {
    let number = AgmaNumber::read(text).map_err(|why| {
        Fault::new(
            Code::GradeUnknown,
            format!("there is no grade {text}"),
            0..text.len(),
        )
        .why(why.to_string())
        .mend(Mend::new(0..text.len(), "AGMA 5 EP").remark("or the right number"))
    })?;
    Ok(match number.range {
        Range::Iso(grade) => Grade::Iso {
            number: grade.number(),
            converted: true,
        },
        Range::At40(lo, hi) => Grade::At40(lo, hi),
        Range::At100(lo, hi) => Grade::At100(lo, hi),
    })
}

/// The hot grade of an SAE designation: of `15W-40` the 40.
fn sae(text: &str, number: &str) -> Result<Grade, Fault> {
    let hot = number.rsplit('-').next().unwrap_or(number).trim();
    if let Some(grade) = sae_engine::HOT.iter().find(|g| g.name == hot) {
        return Ok(Grade::At100(grade.nu100_least(), grade.nu100_below()));
    }
    if let Some(grade) = sae_gear::HOT.iter().find(|g| g.name == hot) {
        let least = grade.nu100_least();
        // The thickest grade has no upper limit; half as much again spans the others.
        let most = grade
            .nu100_below()
            .unwrap_or_else(|| mm2_s(to_mm2_s(least) * 1.5));
        return Ok(Grade::At100(least, most));
    }
    let winter = hot.ends_with('W');
    let fault = Fault::new(
        Code::GradeUnknown,
        format!("there is no hot grade in {text}"),
        0..text.len(),
    );
    let bare = hot.trim_end_matches('W');
    Err(if winter {
        fault
            .why("a W grade says how the oil starts in the cold, not how thick it is when hot")
            .mend(
                Mend::new(0..text.len(), format!("SAE {bare}W-90"))
                    .remark("with the right hot grade"),
            )
    } else {
        fault
            .why("engine oils are graded 8 to 60 by SAE J300, gear oils 65 to 250 by SAE J306")
            .mend(Mend::new(0..text.len(), "SAE 90").remark("or the right grade"))
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn reads_the_grades_of_the_trade() {
        let iso = |number, converted| Grade::Iso { number, converted };
        for (text, want) in [
            ("ISO VG 220", iso(220, false)),
            ("VG 32", iso(32, false)),
            ("iso-vg-68", iso(68, false)),
            ("AGMA 5 EP", iso(220, true)),
            ("AGMA 8A Comp", iso(1000, true)),
            // SAE J306 FEB2019
            ("SAE 90", Grade::At100(mm2_s(13.5), mm2_s(18.5))),
            ("SAE 80W-90", Grade::At100(mm2_s(13.5), mm2_s(18.5))),
            // SAE J300
            ("SAE 15W-40", Grade::At100(mm2_s(12.5), mm2_s(16.3))),
        ] {
            assert_eq!(read_grade(text), Ok(want), "{text}");
        }
        // gear 80W-90 is about VG 150 to 220 (common practice): the thin end is a floor of VG 150
        assert_eq!(
            read_grade("SAE 90").ok().and_then(Grade::as_floor),
            Some(150)
        );
        let read_as = read_grade("SAE 90").ok().and_then(Grade::read_as);
        assert_eq!(read_as.as_deref(), Some("13.5 to 18.5 mm2/s at 100 degC"));
    }

    #[test]
    fn names_the_neighbours_of_a_grade_that_does_not_exist() {
        let fault = read_grade("ISO VG 225").expect_err("none");
        assert_eq!(fault.code, Code::GradeUnknown);
        let mends: Vec<&str> = fault.mends.iter().map(|m| m.text.as_str()).collect();
        assert_eq!(mends, ["ISO VG 220", "ISO VG 320"]);
        for text in ["AGMA 99", "SAE 80W", "SAE 33", "VG abc"] {
            let fault = read_grade(text).expect_err(text);
            for mend in &fault.mends {
                assert!(
                    read_grade(&mend.applied(text)).is_ok(),
                    "{text}: {}",
                    mend.text
                );
            }
        }
    }
}
