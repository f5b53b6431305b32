//! The grease code of DIN 51502, both ways: read from a label, and written from data.
//!
//! `KP2K-30` is a bearing grease (K) with EP or antiwear (P), NLGI 2, to 120 °C (K), down to
//! -30 °C. Letters and their meanings are entries of the rules.

use crate::model::facts::Additive;
use crate::model::oil::{Oil, OilKind};
use crate::model::rulebook::Rulebook;
use crate::model::rulebook::grease::{CodeLetter, CodePlace};
use crate::quantity::ThermodynamicTemperature;
use crate::quantity::convert::{celsius, to_celsius};
use crate::relation::oil::base_stock::BaseStock;

/// A grease code taken apart.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct GreaseCode {
    /// What it is for: `K`, `G`, `OG`, `M`.
    pub usage: String,
    /// Letters of the additives, in the order written.
    pub additives: Vec<String>,
    /// Letters of the base oil; empty for mineral oil.
    pub base: String,
    /// NLGI number.
    pub nlgi: String,
    /// Letter of the upper temperature and the behaviour with water; empty where left out.
    pub upper: String,
    /// Lowest temperature, °C.
    pub lowest_c: Option<i32>,
}

/// Why a code is not understood: what, and where in the text.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
pub enum Unread {
    /// It does not begin with a letter of use.
    #[error("it begins with none of K, G, OG, M")]
    Usage,
    /// The letters before the NLGI number are not known.
    #[error("the letters {0} before the NLGI number are not in the code")]
    Letters(String),
    /// No NLGI number.
    #[error("it holds no NLGI number, 000 to 6")]
    Nlgi,
    /// The letter of the upper temperature is not known.
    #[error("{0} is no letter of an upper temperature")]
    Upper(String),
    /// The lowest temperature is not a number behind a minus.
    #[error("{0} is no lowest temperature as -30")]
    Lowest(String),
}

/// NLGI numbers, the longest first.
const NLGI: [&str; 9] = ["000", "00", "0", "1", "2", "3", "4", "5", "6"];

fn letters(rules: &Rulebook, place: CodePlace) -> Vec<&CodeLetter> {
    let of_place = rules.grease_code.iter().filter(|l| l.place == place);
    let mut found: Vec<&CodeLetter> = of_place.filter(|l| !l.letter.is_empty()).collect();
    found.sort_by(|a, b| {
        b.letter
            .len()
            .cmp(&a.letter.len())
            .then(a.letter.cmp(&b.letter))
    });
    found
}

fn letter<'r>(rules: &'r Rulebook, place: CodePlace, written: &str) -> Option<&'r CodeLetter> {
    rules
        .grease_code
        .iter()
        .find(|l| l.place == place && l.letter == written)
}

impl GreaseCode {
    /// Reads a code.
    ///
    /// # Errors
    /// What is not understood.
    pub fn read(text: &str, rules: &Rulebook) -> Result<Self, Unread> {
        let plain: String = text
            .to_uppercase()
            .chars()
            .filter(|c| !c.is_whitespace())
            .map(|c| {
                if c == '\u{2212}' || c == '\u{2013}' {
                    '-'
                } else {
                    c
                }
            })
            .collect();
        let usage = letters(rules, CodePlace::Use)
            .into_iter()
            .map(|l| l.letter.as_str())
            .find(|l| plain.starts_with(l))
            .ok_or(Unread::Usage)?;
        let rest = &plain[usage.len()..];
        let digit = rest
            .find(|c: char| c.is_ascii_digit())
            .ok_or(Unread::Nlgi)?;
        let (middle, behind) = rest.split_at(digit);
        let mut code = Self {
            usage: usage.to_owned(),
            ..Self::default()
        };
        if !code.take_letters(middle, rules) {
            return Err(Unread::Letters(middle.to_owned()));
        }
        let nlgi = NLGI
            .iter()
            .find(|n| behind.starts_with(**n))
            .ok_or(Unread::Nlgi)?;
        (*nlgi).clone_into(&mut code.nlgi);
        code.take_temperatures(&behind[nlgi.len()..], rules)?;
        Ok(code)
    }

    /// Additives and base in any order: `PHC` is P and HC, never PH and C.
    fn take_letters(&mut self, text: &str, rules: &Rulebook) -> bool {
        if text.is_empty() {
            return true;
        }
        for l in letters(rules, CodePlace::Additive) {
            if let Some(rest) = text.strip_prefix(l.letter.as_str()) {
                let mut tried = self.clone();
                tried.additives.push(l.letter.clone());
                if tried.take_letters(rest, rules) {
                    *self = tried;
                    return true;
                }
            }
        }
        for l in letters(rules, CodePlace::Base) {
            if let Some(rest) = text.strip_prefix(l.letter.as_str())
                && self.base.is_empty()
            {
                let mut tried = self.clone();
                tried.base.clone_from(&l.letter);
                if tried.take_letters(rest, rules) {
                    *self = tried;
                    return true;
                }
            }
        }
        false
    }

    fn take_temperatures(&mut self, text: &str, rules: &Rulebook) -> Result<(), Unread> {
        let (upper, lowest) = match text.find('-') {
            Some(at) => (&text[..at], Some(&text[at..])),
            None => (text, None),
        };
        if !upper.is_empty() {
            letter(rules, CodePlace::Temperature, upper)
                .ok_or_else(|| Unread::Upper(upper.to_owned()))?;
            upper.clone_into(&mut self.upper);
        }
        if let Some(lowest) = lowest {
            let number = lowest.parse::<i32>().ok().filter(|t| *t <= 0 && *t >= -100);
            self.lowest_c = Some(number.ok_or_else(|| Unread::Lowest(lowest.to_owned()))?);
        }
        Ok(())
    }

    /// As it is printed on a label.
    pub fn written(&self) -> String {
        let mut text = format!(
            "{}{}{}{}{}",
            self.usage,
            self.additives.concat(),
            self.base,
            self.nlgi,
            self.upper
        );
        if let Some(t) = self.lowest_c {
            if t == 0 {
                text.push_str("-0");
            } else {
                text.push_str(&t.to_string());
            }
        }
        text
    }

    /// Highest temperature it promises.
    pub fn upper(&self, rules: &Rulebook) -> Option<ThermodynamicTemperature> {
        letter(rules, CodePlace::Temperature, &self.upper)?.upper
    }

    /// Lowest temperature it promises.
    pub fn lowest(&self) -> Option<ThermodynamicTemperature> {
        self.lowest_c.map(|t| celsius(f64::from(t)))
    }

    /// What it says, in words.
    pub fn says(&self, rules: &Rulebook) -> String {
        let meaning = |place, written: &str| {
            letter(rules, place, written).map_or_else(String::new, |l| l.meaning.clone())
        };
        let mut parts = vec![meaning(CodePlace::Use, &self.usage)];
        parts.push(meaning(CodePlace::Base, &self.base));
        parts.extend(
            self.additives
                .iter()
                .map(|a| meaning(CodePlace::Additive, a)),
        );
        parts.push(format!("NLGI {}", self.nlgi));
        if let Some(l) = letter(rules, CodePlace::Temperature, &self.upper) {
            parts.push(l.meaning.clone());
            parts.extend(l.water.iter().map(|w| format!("water {w}")));
        }
        parts.extend(self.lowest_c.map(|t| format!("down to {t} degC")));
        parts.retain(|p| !p.is_empty());
        parts.join(", ")
    }
}

/// The code a grease would carry by its data; `None` without NLGI number or thickener.
pub fn of_grease(oil: &Oil, rules: &Rulebook) -> Option<GreaseCode> {
    if oil.kind != OilKind::Grease {
        return None;
    }
    let grease = oil.grease.as_ref()?;
    let nlgi = grease.nlgi.as_ref()?.value.clone();
    let thickener = rules.thickeners.find(&grease.thickener.as_ref()?.value)?;
    let has = |wanted: &[Additive]| {
        let all = oil.facts.additives.iter().flatten();
        all.clone().any(|a| wanted.contains(a))
    };
    let mut additives = Vec::new();
    if has(&[Additive::Moly, Additive::Graphite]) {
        additives.push("F".to_owned());
    }
    if has(&[Additive::Ep, Additive::Aw]) {
        additives.push("P".to_owned());
    }
    Some(GreaseCode {
        usage: "K".to_owned(),
        additives,
        base: oil
            .base
            .as_ref()
            .map_or("", |b| base_letter(b.value))
            .to_owned(),
        nlgi,
        upper: upper_letter(
            rules,
            thickener.range.hi,
            thickener.water.contains("poor"),
            false,
        ),
        lowest_c: Some(tens_above(thickener.range.lo)),
    })
}

/// Coldest and hottest use of a grease: its thickener's range, narrowed by what its code
/// promises; the code alone where the thickener is not known.
pub fn use_range(
    oil: &Oil,
    rules: &Rulebook,
) -> Option<(ThermodynamicTemperature, ThermodynamicTemperature)> {
    let stated = oil.grease.as_ref().and_then(|g| g.code.as_ref());
    let code = stated.and_then(|c| GreaseCode::read(&c.value, rules).ok());
    let promised = code.and_then(|c| Some((c.lowest()?, c.upper(rules)?)));
    match (rules.use_range(oil), promised) {
        (Some((lo, hi)), Some((low, high))) => Some((
            if low > lo { low } else { lo },
            if high < hi { high } else { hi },
        )),
        (Some(range), None) | (None, Some(range)) => Some(range),
        (None, None) => None,
    }
}

/// Letters of a base oil.
pub fn base_letter(base: BaseStock) -> &'static str {
    match base {
        BaseStock::MineralI
        | BaseStock::MineralII
        | BaseStock::MineralIII
        | BaseStock::Naphthenic => "",
        BaseStock::Pao => "HC",
        BaseStock::DiEster | BaseStock::PolyolEster => "E",
        BaseStock::PagWaterSoluble | BaseStock::PagOilSoluble => "PG",
        BaseStock::Silicone => "SI",
        BaseStock::Pfpe => "FK",
        BaseStock::PhosphateEster => "PH",
        BaseStock::AlkylatedNaphthalene | BaseStock::Vegetable | BaseStock::WaterGlycol => "X",
    }
}

/// The letter that promises a temperature: the highest that is not above it, or, where it is
/// `wanted`, the lowest that is not below.
pub fn upper_letter(
    rules: &Rulebook,
    t: ThermodynamicTemperature,
    washes_out: bool,
    wanted: bool,
) -> String {
    let mut all: Vec<&CodeLetter> = rules
        .grease_code
        .iter()
        .filter(|l| l.place == CodePlace::Temperature && l.upper.is_some())
        .filter(|l| {
            let worse = l.water.as_deref().is_some_and(|w| w.starts_with('2'));
            worse == washes_out || l.water.as_deref() == Some("by agreement")
        })
        .collect();
    let by = |l: &CodeLetter| l.upper.map_or(0.0, to_celsius);
    all.sort_by(|a, b| by(a).total_cmp(&by(b)));
    let t = to_celsius(t);
    let found = if wanted {
        all.iter().find(|l| by(l) >= t - 1e-9).or(all.last())
    } else {
        all.iter().rev().find(|l| by(l) <= t + 1e-9)
    };
    found.map_or_else(String::new, |l| l.letter.clone())
}

/// The ten degrees at or above a temperature, as the code counts cold.
fn tens_above(t: ThermodynamicTemperature) -> i32 {
    rounded((to_celsius(t) / 10.0 - 1e-9).ceil() * 10.0)
}

/// The ten degrees at or below a temperature, 0 at most.
pub fn tens_below(t: ThermodynamicTemperature) -> i32 {
    rounded((to_celsius(t) / 10.0 + 1e-9).floor() * 10.0).min(0)
}

#[expect(
    clippy::cast_possible_truncation,
    reason = "whole tens of a temperature on earth"
)]
fn rounded(t: f64) -> i32 {
    t.clamp(-300.0, 300.0).round() as i32
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::assets::builtin_rules;
    use crate::input::rules::rulebook;
    use std::sync::LazyLock;

    static BOOK: LazyLock<Rulebook> =
        LazyLock::new(|| rulebook(&[builtin_rules()]).expect("built-in rules"));

    /// DIN 51502, the decoded example of public tables.
    #[test]
    fn an_example_is_read() {
        let code = GreaseCode::read("KP2K-30", &BOOK).expect("a code");
        assert_eq!(code.usage, "K");
        assert_eq!(code.additives, ["P"]);
        assert_eq!(code.base, "");
        assert_eq!(code.nlgi, "2");
        assert_eq!(code.upper(&BOOK), Some(celsius(120.0)));
        assert_eq!(code.lowest(), Some(celsius(-30.0)));
        assert_eq!(
            code.says(&BOOK),
            "bearings, plain and rolling, and slides, mineral oil, EP or antiwear, NLGI 2, to 120 \
             degC, water 0-90 or 1-90, down to -30 degC"
        );
    }

    #[test]
    fn every_code_comes_back_as_written() {
        let mut count = 0;
        for usage in ["K", "G", "OG", "M"] {
            for additives in ["", "P", "F", "FP"] {
                for base in ["", "E", "FK", "HC", "PG", "PH", "SI", "X"] {
                    for nlgi in NLGI {
                        for upper in ["C", "H", "K", "N", "U"] {
                            for low in ["", "-0", "-10", "-50"] {
                                let text = format!("{usage}{additives}{base}{nlgi}{upper}{low}");
                                let code = GreaseCode::read(&text, &BOOK);
                                let code = code.unwrap_or_else(|e| panic!("{text}: {e}"));
                                assert_eq!(code.written(), text);
                                count += 1;
                            }
                        }
                    }
                }
            }
        }
        assert_eq!(count, 4 * 4 * 8 * 9 * 5 * 4);
    }

    #[test]
    fn what_is_not_a_code_is_named() {
        for (text, fault) in [
            ("XP2K-30", Unread::Usage),
            ("KP", Unread::Nlgi),
            ("KP7K-30", Unread::Nlgi),
            ("KW2K-30", Unread::Letters("W".into())),
            ("KP2Y-30", Unread::Upper("Y".into())),
            ("KP2K-3x", Unread::Lowest("-3X".into())),
            ("", Unread::Usage),
        ] {
            assert_eq!(GreaseCode::read(text, &BOOK), Err(fault), "{text}");
        }
        assert!(GreaseCode::read(" kp 2 k - 30 ", &BOOK).is_ok());
    }

    #[test]
    fn cold_is_promised_in_tens() {
        assert_eq!(tens_below(celsius(-18.0)), -20);
        assert_eq!(tens_below(celsius(-20.0)), -20);
        assert_eq!(tens_below(celsius(5.0)), 0);
        assert_eq!(tens_above(celsius(-25.0)), -20);
        assert_eq!(upper_letter(&BOOK, celsius(125.0), false, false), "K");
        assert_eq!(upper_letter(&BOOK, celsius(95.0), false, true), "G");
        assert_eq!(upper_letter(&BOOK, celsius(95.0), true, true), "H");
    }
}
