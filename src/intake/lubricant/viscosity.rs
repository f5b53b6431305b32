//! A viscosity that stands in the place of a name: `315 SUS`, `68 cSt`, `220 mm2/s at 40`.

use super::{Lubricant, nearest};
use crate::quantity::convert::{celsius, mm2_s, to_mm2_s};
use crate::quantity::show::{Toward, fixed, significant};
use crate::quantity::{Efflux, KinematicViscosity, Measure, Ratio};
use crate::relation::oil::{saybolt, viscosity_index};

/// A viscosity: `315 SUS`, `68 cSt`, `220 mm2/s at 40`.
pub(super) fn viscosity(words: &mut Vec<String>, out: &mut Lubricant) {
    let unit = |w: &str| {
        let w = w.to_lowercase();
        match w.as_str() {
            "sus" | "ssu" | "suv" => Some("SUS"),
            "cst" | "mm2/s" | "mm²/s" => Some("mm2/s"),
            _ => None,
        }
    };
    let glued = |w: &str| {
        let digits = w.bytes().take_while(u8::is_ascii_digit).count();
        unit(&w[digits..])
            .filter(|_| digits > 0)
            .map(|u| (w[..digits].to_owned(), u))
    };
    let found = words.iter().enumerate().find_map(|(i, w)| match glued(w) {
        Some((number, unit)) => Some((i, 1, number, unit)),
        None => unit(w)
            .filter(|_| i > 0)
            .map(|u| (i - 1, 2, words[i - 1].clone(), u)),
    });
    let Some((at, n, number, unit)) = found else {
        return;
    };
    let Ok(value) = number.replace(',', ".").parse::<f64>() else {
        return;
    };
    let (stated, taken) = match temperature_behind(words, at + n, unit) {
        Some((t, taken)) => (Some(t), taken),
        None => (None, 0),
    };
    let t = stated.unwrap_or(if unit == "SUS" { FAHRENHEIT_100 } else { 40.0 });
    let nu = if unit == "SUS" {
        let reading: Efflux = Efflux::from_base(value);
        saybolt::from_universal(reading, celsius(t)).ok()
    } else {
        (value > 0.0).then(|| mm2_s(value))
    };
    let Some(nu) = nu else { return };
    let end = (at + n + taken).min(words.len());
    let said = words[at..end].join(" ");
    out.viscosity_for_name = true;
    let (grade, by) = about_grade(nu, t);
    out.grade = grade;
    let shown = significant(to_mm2_s(nu), 3, Toward::Nearest);
    let about = grade.map_or_else(String::new, |g| format!(", about ISO VG {g}{by}"));
    let degrees = fixed(t, i32::from((t - t.round()).abs() >= 0.05), Toward::Nearest);
    out.grade_as = Some(match (stated, unit) {
        (Some(_), _) => format!("{said} is {shown} mm2/s at {degrees} degC{about}"),
        (None, "SUS") => {
            format!("{said} at 100 degF is {shown} mm2/s{about}, the temperature assumed")
        }
        (None, _) => {
            format!("{said} at 40 degC is {shown} mm2/s{about}, the temperature assumed")
        }
    });
    words.drain(at..end);
}

/// 100 °F in °C, where Saybolt readings of oils are taken.
const FAHRENHEIT_100: f64 = 37.777_8;

/// The grade of a viscosity at a temperature; by an index of 95 where it was taken hot.
fn about_grade(nu: KinematicViscosity, t: f64) -> (Option<u32>, &'static str) {
    match t {
        t if (37.0..=41.0).contains(&t) => (nearest(nu), ""),
        t if (98.0..=100.5).contains(&t) => {
            let nu40 = viscosity_index::nu40(nu, Ratio::from_base(95.0)).ok();
            (nu40.and_then(nearest), " by an index of 95")
        }
        _ => (None, ""),
    }
}

/// `at 40`, `@ 100F`, `@210 °F`: the temperature in °C, and how many words it takes. Saybolt
/// readings are in °F, mm²/s in °C, where no scale is named.
fn temperature_behind(words: &[String], from: usize, unit: &str) -> Option<(f64, usize)> {
    let sign = words.get(from)?;
    let (text, mut taken) = match sign.strip_prefix('@') {
        Some("") => (words.get(from + 1)?.as_str(), 2),
        Some(glued) => (glued, 1),
        None if sign.eq_ignore_ascii_case("at") => (words.get(from + 1)?.as_str(), 2),
        None => return None,
    };
    let digits = text
        .find(|c: char| !(c.is_ascii_digit() || c == '.'))
        .unwrap_or(text.len());
    let number: f64 = text[..digits].parse().ok()?;
    let scale_of = |t: &str| {
        let plain = t
            .to_lowercase()
            .replace(['°', 'º', '.'], "")
            .replace("deg", "");
        match plain.as_str() {
            "c" => Some('c'),
            "f" => Some('f'),
            _ => None,
        }
    };
    let mut scale = scale_of(&text[digits..]);
    let degree = |w: &String| matches!(w.to_lowercase().as_str(), "deg" | "deg." | "°");
    if scale.is_none() && words.get(from + taken).is_some_and(degree) {
        taken += 1;
    }
    if scale.is_none()
        && let Some(found) = words.get(from + taken).and_then(|w| scale_of(w))
    {
        scale = Some(found);
        taken += 1;
    }
    let fahrenheit = scale.map_or(unit == "SUS", |s| s == 'f');
    let t = if fahrenheit {
        (number - 32.0) / 1.8
    } else {
        number
    };
    Some((t, taken))
}
