//! What a register writes where the lubricant's name belongs: grade and family apart, and what of
//! it is no name at all.

use crate::input::points::{Grade, read_grade};
use crate::quantity::convert::{celsius, mm2_s, to_mm2_s};
use crate::quantity::show::{Toward, fixed, significant};
use crate::quantity::{Efflux, KinematicViscosity, Measure, Ratio};
use crate::relation::oil::grade::IsoGrade;
use crate::relation::oil::{saybolt, viscosity_index};

/// A lubricant cell read.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Lubricant {
    /// ISO grade, where one is named or the name has one.
    pub grade: Option<u32>,
    /// The grade as written and what it was read as, where it is no ISO grade.
    pub grade_as: Option<String>,
    /// Families of additives: EP, AW, R&O.
    pub families: Vec<&'static str>,
    /// Classes: CLP, HM.
    pub classes: Vec<String>,
    /// Base stock, where stated.
    pub base: Option<&'static str>,
    /// What it is for, in a word: gear, hydraulic.
    pub kind: Option<&'static str>,
    /// NLGI consistency of a grease.
    pub nlgi: Option<String>,
    /// `or equivalent`.
    pub or_equivalent: bool,
    /// A question mark stood in it.
    pub doubtful: bool,
    /// A viscosity stands in place of a name.
    pub viscosity_for_name: bool,
    /// What no reading was found for.
    pub rest: Vec<String>,
}

const KINDS: &[(&str, &str)] = &[
    ("gear", "gear"),
    ("hydraulic", "hydraulic"),
    ("hydr", "hydraulic"),
    ("hyd", "hydraulic"),
    ("turbine", "turbine"),
    ("turb", "turbine"),
    ("compressor", "compressor"),
    ("comp", "compressor"),
    ("circulating", "circulating"),
    ("engine", "engine"),
    ("motor oil", "engine"),
    ("spindle", "spindle"),
    ("slideway", "slideway"),
    ("way", "slideway"),
    ("chain", "chain"),
    ("worm", "worm"),
    ("grease", "grease"),
];

const FAMILIES: &[(&str, &str)] = &[
    ("ep", "EP"),
    ("aw", "AW"),
    ("r&o", "R&O"),
    ("ro", "R&O"),
    ("r+o", "R&O"),
    ("compounded", "compounded"),
    ("moly", "moly"),
    ("mos2", "moly"),
    ("graphite", "graphite"),
    ("zinc", "zinc"),
];

/// Classes of ISO 6743 and DIN 51517, 51524 and 51515 that stand in names.
const CLASSES: &[&str] = &[
    "CKB", "CKC", "CKD", "CKE", "CKSMP", "CKT", "CLP", "CLPPG", "CLPHC", "CL", "HL", "HM", "HV",
    "HG", "HLP", "HVLP", "HLPD", "HVLPD", "HFA", "HFB", "HFC", "HFDU", "HFDR", "HEES", "HETG",
    "HEPG", "HEPR", "TSA", "TGA", "TSE", "TGE", "TD", "DAA", "DAB", "DAG", "DAH", "DAJ", "VDL",
    "VBL", "GL-4", "GL-5", "GL4", "GL5",
];

const BASES: &[(&str, &str)] = &[
    ("pao", "PAO"),
    ("pag", "PAG"),
    ("ester", "ester"),
    ("mineral", "mineral"),
    ("silicone", "silicone"),
    ("pfpe", "PFPE"),
];

const FILLERS: &[&str] = &[
    "oil",
    "fluid",
    "lube",
    "lubricant",
    "iso",
    "vg",
    "grade",
    "of",
    "for",
    "the",
    "-",
    "/",
    "no",
    "type",
    "type:",
];

/// Reads the text of a lubricant cell.
pub fn read(text: &str) -> Lubricant {
    let mut out = Lubricant {
        doubtful: text.contains('?'),
        ..Lubricant::default()
    };
    let plain = text.replace(['?', ',', ';', '(', ')'], " ");
    let mut words: Vec<String> = plain.split_whitespace().map(str::to_owned).collect();
    equivalent(&mut words, &mut out);
    consistency(&mut words, &mut out);
    viscosity(&mut words, &mut out);
    agma(&mut words, &mut out);
    sae(&mut words, &mut out);
    named(&mut words, &mut out);
    out.rest = words;
    out
}

fn equivalent(words: &mut Vec<String>, out: &mut Lubricant) {
    let is = |w: &str| {
        w.to_lowercase().trim_end_matches('.').starts_with("equiv")
            || w.eq_ignore_ascii_case("equal")
    };
    if let Some(at) = words.iter().position(|w| is(w)) {
        out.or_equivalent = true;
        let from = if at > 0 && words[at - 1].eq_ignore_ascii_case("or") {
            at - 1
        } else {
            at
        };
        words.drain(from..=at);
    }
}

/// A grease by its consistency: `EP2`, `EP 2`, `Lithium 2`, `MP-00`. No EP oil is thinner than
/// VG 10, so a number so small behind it is one of NLGI.
fn consistency(words: &mut Vec<String>, out: &mut Lubricant) {
    const NLGI: [&str; 6] = ["000", "00", "0", "1", "2", "3"];
    const LEADS: [&str; 8] = ["EP", "MP", "LI", "LITHIUM", "CALCIUM", "GREASE", "LX", "HT"];
    let upper: Vec<String> = words.iter().map(|w| w.to_uppercase()).collect();
    if upper.iter().any(|w| w == "NLGI" || w.starts_with("AGMA")) {
        return;
    }
    let found = upper.iter().enumerate().find_map(|(i, w)| {
        let letters = w.trim_end_matches(|c: char| c.is_ascii_digit());
        let (lead, number) = (letters.trim_end_matches('-'), &w[letters.len()..]);
        if LEADS.contains(&lead) && NLGI.contains(&number) {
            return Some((i, i + 1, number.to_owned()));
        }
        let next = upper.get(i + 1)?;
        (number.is_empty() && LEADS.contains(&lead) && NLGI.contains(&next.as_str()))
            .then(|| (i, i + 2, next.clone()))
    });
    let Some((from, to, number)) = found else {
        return;
    };
    if upper[from].starts_with("EP") && !out.families.contains(&"EP") {
        out.families.push("EP");
    }
    out.nlgi = Some(number);
    out.kind = Some("grease");
    words.drain(from..to);
}

/// A viscosity: `315 SUS`, `68 cSt`, `220 mm2/s at 40`.
fn viscosity(words: &mut Vec<String>, out: &mut Lubricant) {
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
    let degrees = fixed(
        t,
        if (t - t.round()).abs() < 0.05 { 0 } else { 1 },
        Toward::Nearest,
    );
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

/// The ISO grade whose middle lies nearest.
pub fn nearest(nu40: KinematicViscosity) -> Option<u32> {
    let nu = to_mm2_s(nu40);
    let off = |g: &IsoGrade| {
        let middle = to_mm2_s(g.midpoint());
        (middle / nu).max(nu / middle)
    };
    IsoGrade::all()
        .min_by(|a, b| off(a).total_cmp(&off(b)))
        .map(IsoGrade::number)
}

/// `AGMA 7 Comp`, `AGMA 5EP`, `7 Comp`, `5EP`.
fn agma(words: &mut Vec<String>, out: &mut Lubricant) {
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
fn sae(words: &mut Vec<String>, out: &mut Lubricant) {
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

/// Grades, classes, families, bases and uses by their words.
fn named(words: &mut Vec<String>, out: &mut Lubricant) {
    let mut rest = Vec::new();
    let mut taken = std::mem::take(words).into_iter().peekable();
    while let Some(word) = taken.next() {
        let lower = word.to_lowercase();
        if lower == "nlgi" {
            out.nlgi = taken.next();
            out.kind = Some("grease");
        } else if lower == "synthetic" || lower == "synth" {
            rest.push(word); // no specification: which base it is stays open
        } else if !word_of(&lower, &word, out) && !FILLERS.contains(&lower.as_str()) {
            rest.push(word);
        }
    }
    *words = rest;
}

fn word_of(lower: &str, word: &str, out: &mut Lubricant) -> bool {
    if let Some((_, family)) = FAMILIES.iter().find(|(w, _)| *w == lower) {
        if !out.families.contains(family) {
            out.families.push(family);
        }
        return true;
    }
    if let Some((_, base)) = BASES.iter().find(|(w, _)| *w == lower) {
        out.base = Some(base);
        return true;
    }
    if let Some((_, kind)) = KINDS.iter().find(|(w, _)| *w == lower) {
        out.kind = Some(kind);
        return true;
    }
    let upper = word.to_uppercase().replace("ISO", "").replace("VG", "");
    let upper = upper.trim_matches(['-', '.']).to_owned();
    let figures = upper.bytes().rev().take_while(u8::is_ascii_digit).count();
    let (name, number) = upper.split_at(upper.len() - figures);
    let name = name.trim_end_matches('-');
    let grade = number.parse().ok().and_then(IsoGrade::of_number);
    let class = CLASSES.iter().find(|c| **c == upper || **c == name);
    match (class, grade, name) {
        (Some(class), grade, _) => {
            out.classes.push((*class).to_owned());
            if let (Some(grade), true) = (grade, **class != upper) {
                out.grade = Some(grade.number());
            }
            true
        }
        (None, Some(grade), "") => {
            out.grade.get_or_insert(grade.number());
            true
        }
        (None, Some(grade), "EP" | "AW") => {
            out.grade.get_or_insert(grade.number());
            out.families.push(if name == "EP" { "EP" } else { "AW" });
            true
        }
        _ => upper.is_empty(),
    }
}

impl Lubricant {
    /// What was understood, in words; nothing where nothing was.
    pub fn says(&self) -> String {
        let mut said = Vec::new();
        match (&self.grade_as, self.grade) {
            (Some(text), _) => said.push(text.clone()),
            (None, Some(grade)) => said.push(format!("ISO VG {grade}")),
            _ => {}
        }
        if !self.classes.is_empty() {
            said.push(format!("class {}", self.classes.join(", ")));
        }
        if !self.families.is_empty() {
            said.push(format!("family {}", self.families.join(", ")));
        }
        if let Some(kind) = self.kind {
            said.push(format!("{kind} oil").replace("grease oil", "grease"));
        }
        if let Some(nlgi) = &self.nlgi {
            said.push(format!("NLGI {nlgi}"));
        }
        if !said.is_empty() {
            said.push(
                self.base
                    .map_or("base unknown".to_owned(), |b| format!("base {b}")),
            );
        }
        said.join("; ")
    }

    /// Whether it is a grease.
    pub fn is_grease(&self) -> bool {
        self.kind == Some("grease") || self.nlgi.is_some()
    }
}

#[cfg(test)]
mod tests;
