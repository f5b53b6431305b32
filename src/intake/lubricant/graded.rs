//! Grades of other systems in names: AGMA numbers, SAE grades.

use super::{Lubricant, nearest};
use crate::input::points::{Grade, read_grade};
use crate::quantity::convert::to_mm2_s;
use crate::quantity::show::{Toward, significant};
use crate::quantity::{KinematicViscosity, Measure, Ratio};
use crate::relation::oil::viscosity_index;

/// `AGMA 7 Comp`, `AGMA 5EP`, `7 Comp`, `5EP`.
pub(super) fn agma(words: &mut Vec<String>, out: &mut Lubricant) {
    let named = words
        .iter()
        .position(|w| w.to_uppercase().starts_with("AGMA"));
    let suffix = |w: &str| {
        matches!(
            w.to_uppercase().as_str(),
            "EP" | "COMP" | "COMPOUNDED" | "S"
        )
    };
    let number = |w: &str| {
        let upper = w.to_uppercase();
        let digits = upper
            .trim_end_matches("EP")
            .trim_end_matches("COMP")
            .trim_end_matches(['S', 'A', 'R']);
        !digits.is_empty() && digits.len() <= 2 && digits.bytes().all(|b| b.is_ascii_digit())
    };
    let (from, mut to) = match named {
        Some(at) => (at, at + 1),
        None => {
            // Without its name only a number with a suffix is one: 5EP, 7 Comp.
            let at = (0..words.len()).find(|i| {
                let glued = words[*i].to_uppercase();
                number(&words[*i])
                    && (glued.ends_with("EP")
                        || glued.ends_with("COMP")
                        || words.get(i + 1).is_some_and(|w| suffix(w)))
            });
            match at {
                Some(at) => (at, at),
                None => return,
            }
        }
    };
    if words.get(to).is_some_and(|w| number(w)) {
        to += 1;
    }
    while words.get(to).is_some_and(|w| suffix(w)) {
        to += 1;
    }
    let text = words[from..to].join(" ");
    let spaced = text.to_uppercase().replace("COMPOUNDED", "COMP");
    let spaced = spaced.trim_start_matches("AGMA").trim();
    let Ok(grade) = read_grade(&format!("AGMA {spaced}")) else {
        return;
    };
    if spaced.contains("EP") {
        out.families.push("EP");
    }
    if spaced.contains("COMP") {
        out.families.push("compounded");
    }
    of_grade(out, grade, &text);
    words.drain(from..to);
}

/// `SAE 90`, `80W-90`, `15W40`.
pub(super) fn sae(words: &mut Vec<String>, out: &mut Lubricant) {
    let upper: Vec<String> = words.iter().map(|w| w.to_uppercase()).collect();
    let multigrade = |w: &str| {
        w.split_once('W').is_some_and(|(cold, hot)| {
            let hot = hot.trim_start_matches('-');
            !cold.is_empty()
                && !hot.is_empty()
                && cold.bytes().chain(hot.bytes()).all(|b| b.is_ascii_digit())
        })
    };
    let found = upper.iter().enumerate().find_map(|(i, w)| {
        if let Some(rest) = w.strip_prefix("SAE") {
            if rest.is_empty() {
                let next = upper.get(i + 1)?;
                return Some((i, i + 2, next.clone()));
            }
            return Some((i, i + 1, rest.trim_start_matches('-').to_owned()));
        }
        multigrade(w).then(|| (i, i + 1, w.clone()))
    });
    let Some((from, to, number)) = found else {
        return;
    };
    let hot = match number.split_once('W') {
        Some((cold, hot)) if !hot.is_empty() => format!("{cold}W-{}", hot.trim_start_matches('-')),
        _ => number,
    };
    let written = words[from..to].join(" ");
    match read_grade(&format!("SAE {hot}")) {
        Ok(grade) => of_grade(out, grade, &written),
        Err(_) if is_winter(&hot) => {
            out.grade_as = Some(format!(
                "{written} says how the oil starts in the cold, not how thick it is when hot"
            ));
        }
        Err(_) => return,
    }
    words.drain(from..to);
}

/// A W grade without a hot one: `10W`.
fn is_winter(grade: &str) -> bool {
    let number = grade.strip_suffix('W').unwrap_or("");
    !number.is_empty() && number.bytes().all(|b| b.is_ascii_digit())
}

/// Takes a grade over: what it says at 40 °C, and about which ISO grades that is.
fn of_grade(out: &mut Lubricant, grade: Grade, written: &str) {
    match grade {
        Grade::Iso { number, .. } => {
            out.grade = Some(number);
            out.grade_as = Some(format!("{written} is ISO VG {number}"));
        }
        Grade::At40(lo, hi) => {
            out.grade_as = Some(format!(
                "{written} is {} to {} mm2/s at 40 degC",
                shown(lo),
                shown(hi)
            ));
        }
        Grade::At100(lo, hi) => {
            let at40 = |nu| {
                viscosity_index::nu40(nu, Ratio::from_base(95.0))
                    .ok()
                    .and_then(nearest)
            };
            let about = match (at40(lo), at40(hi)) {
                (Some(a), Some(b)) if a == b => format!(", about ISO VG {a}"),
                (Some(a), Some(b)) => format!(", roughly ISO VG {a} to {b}"),
                _ => String::new(),
            };
            out.grade_as = Some(format!(
                "{written} is a range, {} to {} mm2/s at 100 degC{about}; it is not equal to one ISO grade",
                shown(lo),
                shown(hi)
            ));
        }
    }
}

fn shown(nu: KinematicViscosity) -> String {
    significant(to_mm2_s(nu), 3, Toward::Nearest)
}
