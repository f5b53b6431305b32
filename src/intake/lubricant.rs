//! What a register writes where the lubricant's name belongs: grade and family apart, and what of
//! it is no name at all.

mod graded;
mod viscosity;

use crate::quantity::KinematicViscosity;
use crate::quantity::convert::to_mm2_s;
use crate::relation::oil::grade::IsoGrade;
use graded::{agma, sae};
use viscosity::viscosity;

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
