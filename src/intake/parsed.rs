//! The text of a cell, parted: sign of doubt, bound, one or two numbers, unit, remark.

use super::number;
use super::units::{Unit, unit};
use crate::quantity::Kind;

/// A text parted, before anything is concluded from it.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Parsed {
    /// The first number as written.
    pub number: String,
    /// The second, of `60-65`.
    pub second: Option<String>,
    /// The unit, where one is understood.
    pub unit: Option<Unit>,
    /// What stands where a unit is expected and is none.
    pub strange: Option<String>,
    /// What stands in parentheses or behind the unit.
    pub remark: Option<String>,
    /// A question mark was in it.
    pub doubtful: bool,
    /// `approx`, `ca`, `~`.
    pub about: bool,
    /// `below` or `above`.
    pub bound: Option<&'static str>,
    /// `each`.
    pub each: bool,
}

/// Text that stands for nothing known, with what to call it.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Placeholder {
    /// Nothing, a dash, `n/a`.
    Nothing,
    /// A number nobody means: 0, 999.
    Number,
    /// `see plate`: somebody knows.
    Elsewhere,
}

/// Whether a text stands for nothing known. A zero only counts where it cannot be a value.
pub fn placeholder(text: &str, zero_is_none: bool) -> Option<Placeholder> {
    let lower = text.trim().trim_end_matches(['.', '!']).to_lowercase();
    let bare: String = lower.chars().filter(|c| c.is_alphanumeric()).collect();
    if bare.is_empty() {
        let only_number_signs = lower.chars().any(|c| c.is_ascii_digit());
        return (!only_number_signs).then_some(Placeholder::Nothing);
    }
    let nothing = [
        "na",
        "nk",
        "tbc",
        "tba",
        "tbd",
        "unknown",
        "unk",
        "notknown",
        "nodata",
        "missing",
        "xx",
        "xxx",
        "blank",
        "notstated",
        "notavailable",
        "ka",
        "nil",
    ];
    if nothing.contains(&bare.as_str()) {
        return Some(Placeholder::Nothing);
    }
    let see = lower.starts_with("see ") || lower.starts_with("per ") || lower.starts_with("refer ");
    let plate = [
        "plate",
        "nameplate",
        "manual",
        "drawing",
        "label",
        "oem",
        "maker",
    ];
    if see || plate.iter().any(|p| lower == *p) {
        return Some(Placeholder::Elsewhere);
    }
    let number = lower.trim_start_matches('-');
    let nines = number.len() >= 2
        && number.bytes().all(|b| b == b'9')
        && (number.len() > 2 || lower.starts_with('-'));
    let zero = number.bytes().all(|b| matches!(b, b'0' | b'.' | b',')) && number.contains('0');
    (nines || (zero && zero_is_none)).then_some(Placeholder::Number)
}

/// Parts a text; `None` where no number is in its beginning.
pub fn parse(text: &str, wanted: &[Kind]) -> Option<Parsed> {
    let spaced = text.replace(['\u{a0}', '\n', '\t'], " ");
    let mut out = Parsed {
        doubtful: spaced.contains('?'),
        ..Parsed::default()
    };
    let plain = spaced.replace('?', " ");
    let mut rest = plain.trim();
    rest = opening(rest, &mut out);
    let (first, behind) = number::split(rest)?;
    first.clone_into(&mut out.number);
    let behind = second(behind, wanted, &mut out);
    unit_and_remark(&behind, wanted, &mut out);
    Some(out)
}

fn opening<'t>(mut rest: &'t str, out: &mut Parsed) -> &'t str {
    const ABOUT: [&str; 8] = [
        "approximately",
        "approx.",
        "approx",
        "about",
        "circa",
        "ca.",
        "ca ",
        "~",
    ];
    const BOUND: [(&str, &str); 10] = [
        ("<=", "below"),
        ("<", "below"),
        ("≤", "below"),
        ("below", "below"),
        ("under", "below"),
        (">=", "above"),
        (">", "above"),
        ("≥", "above"),
        ("above", "above"),
        ("over", "above"),
    ];
    let lower = rest.to_lowercase();
    if let Some(word) = ABOUT.iter().find(|w| lower.starts_with(**w)) {
        out.about = true;
        rest = rest.get(word.len()..).unwrap_or("").trim_start();
    }
    let lower = rest.to_lowercase();
    if let Some((word, bound)) = BOUND.iter().find(|(w, _)| lower.starts_with(w)) {
        out.bound = Some(bound);
        rest = rest.get(word.len()..).unwrap_or("").trim_start();
    }
    for (word, says) in [
        ("max.", "max"),
        ("max", "max"),
        ("min.", "min"),
        ("min", "min"),
    ] {
        let named = rest.to_lowercase().starts_with(word);
        let number_behind = rest
            .get(word.len()..)
            .is_some_and(|r| number::split(r.trim_start()).is_some());
        if named && number_behind {
            out.remark = Some(says.into());
            rest = rest.get(word.len()..).unwrap_or("").trim_start();
            break;
        }
    }
    rest
}

/// A second number behind a dash, `to` or dots, with or without the unit before it.
fn second(behind: &str, wanted: &[Kind], out: &mut Parsed) -> String {
    const BETWEEN: [&str; 6] = ["...", "..", "\u{2013}", "-", " to ", "to "];
    for mark in BETWEEN {
        let Some((before, after)) = behind.split_once(mark) else {
            continue;
        };
        let before = before.trim();
        let is_unit = before.is_empty() || unit(before, wanted).is_some();
        if let (true, Some((number, rest))) = (is_unit, number::split(after.trim())) {
            out.second = Some(number.to_owned());
            let rest = rest.trim();
            return if rest.is_empty() {
                before.to_owned()
            } else {
                rest.to_owned()
            };
        }
    }
    behind.trim().to_owned()
}

fn unit_and_remark(text: &str, wanted: &[Kind], out: &mut Parsed) {
    let mut text = text.trim().to_owned();
    if let Some(found) = unit(&text, wanted) {
        out.unit = Some(found);
        return;
    }
    if let (Some(open), true) = (text.find('('), text.ends_with(')')) {
        let inside = text[open + 1..text.len() - 1].trim().to_owned();
        text.truncate(open);
        text.truncate(text.trim_end().len());
        if text.is_empty()
            && let Some(found) = unit(&inside, wanted)
        {
            out.unit = Some(found);
            return;
        }
        out.remark = Some(inside);
    }
    for word in [" each", " ea.", " ea", "/ea", " per machine", " per unit"] {
        let padded = format!(" {text}");
        if let Some(before) = padded.to_lowercase().strip_suffix(word) {
            out.each = true;
            let kept = padded.get(..before.len()).unwrap_or("");
            kept.trim().clone_into(&mut text);
            break;
        }
    }
    if text.is_empty() {
        return;
    }
    if let Some(found) = unit(&text, wanted) {
        out.unit = Some(found);
        return;
    }
    let words: Vec<&str> = text.split_whitespace().collect();
    for n in (1..words.len()).rev() {
        if let Some(found) = unit(&words[..n].join(" "), wanted) {
            out.unit = Some(found);
            let more = words[n..].join(" ");
            out.remark = Some(match out.remark.take() {
                Some(before) => format!("{more} ({before})"),
                None => more,
            });
            return;
        }
    }
    out.strange = Some(text);
}

#[cfg(test)]
mod tests {
    use super::*;

    const VOLUME: &[Kind] = &[Kind::Volume, Kind::Mass];
    const TEMPERATURE: &[Kind] = &[Kind::Temperature];

    #[test]
    fn cells_of_a_register_are_parted() {
        let p = parse("1,2 L ea", VOLUME).expect("a number");
        assert_eq!(
            (p.number.as_str(), p.unit, p.each),
            ("1,2", Some(Unit::Of(Kind::Volume, "L")), true)
        );
        let p = parse("92 (discharge)", TEMPERATURE).expect("a number");
        assert_eq!(
            (p.number.as_str(), p.remark.as_deref(), p.unit),
            ("92", Some("discharge"), None)
        );
        let p = parse("60-65 °C", TEMPERATURE).expect("a number");
        assert_eq!((p.number.as_str(), p.second.as_deref()), ("60", Some("65")));
        assert_eq!(p.unit, Some(Unit::Of(Kind::Temperature, "degC")));
        let p = parse("60 C to 65 C", TEMPERATURE).expect("a number");
        assert_eq!(
            (p.second.as_deref(), p.unit),
            (Some("65"), Some(Unit::Of(Kind::Temperature, "degC")))
        );
        let p = parse("-20 .. -5", TEMPERATURE).expect("a number");
        assert_eq!(
            (p.number.as_str(), p.second.as_deref()),
            ("-20", Some("-5"))
        );
        let p = parse("113F", TEMPERATURE).expect("a number");
        assert_eq!(p.unit, Some(Unit::Of(Kind::Temperature, "degF")));
        let p = parse("ca. 15 gal?", VOLUME).expect("a number");
        assert!(
            p.about
                && p.doubtful
                && p.unit == Some(Unit::Gallon(crate::intake::units::Part::Whole))
        );
        let p = parse("15 gal (US)", VOLUME).expect("a number");
        assert_eq!(p.unit, Some(Unit::Of(Kind::Volume, "gal(US)")));
        let p = parse("< -40 °C", TEMPERATURE).expect("a number");
        assert_eq!((p.bound, p.number.as_str()), (Some("below"), "-40"));
        let p = parse("-15°", TEMPERATURE).expect("a number");
        assert_eq!(p.strange.as_deref(), Some("°"));
        assert_eq!(parse("see plate", VOLUME), None);
    }

    #[test]
    fn placeholders_are_no_values() {
        use Placeholder::{Elsewhere, Nothing, Number};
        for (text, want) in [
            ("n/a", Some(Nothing)),
            ("-", Some(Nothing)),
            ("?", Some(Nothing)),
            ("N.A.", Some(Nothing)),
            ("TBC", Some(Nothing)),
            ("see plate", Some(Elsewhere)),
            ("999", Some(Number)),
            ("9999", Some(Number)),
            ("-99", Some(Number)),
            ("99", None),
            ("0", Some(Number)),
            ("0,0", Some(Number)),
            ("10", None),
            ("HLP46", None),
        ] {
            assert_eq!(placeholder(text, true), want, "{text}");
        }
        assert_eq!(placeholder("0", false), None);
    }
}
