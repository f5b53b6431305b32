//! One cell into a figure: decimal commas where stated, bounds, units, and what stands for
//! nothing.

use crate::audit::bottle::{Bounds, Figure};
use crate::model::sample::Reading;
use crate::quantity::kind::Unit;
use crate::table::Content;

/// What a cell of figures came to.
#[derive(Clone, Debug, PartialEq)]
pub(super) enum Read {
    /// A figure.
    Figure(Figure),
    /// Nothing measured: blank, a dash, `n/a`, `not run`.
    Nothing,
    /// A figure that stands for nothing in many tables: 0 where there is no zero, 999.
    Placeholder,
    /// A decimal comma or point other than stated.
    OtherDecimal,
    /// A unit of another kind, or none known.
    OtherUnit(String),
    /// A figure no oil has.
    Impossible,
    /// A formula whose value was never stored.
    NoValue,
    /// A date where a figure belongs.
    IsDate,
    /// Not understood.
    NotUnderstood,
}

/// Words laboratories write where nothing was measured.
const NOTHING: &[&str] = &[
    "",
    "-",
    "--",
    "---",
    "n/a",
    "na",
    "n.a.",
    "nd",
    "n.d.",
    "nil",
    "none",
    "nr",
    "n.r.",
    "nt",
    "n.t.",
    "n.n.",
    "n. n.",
    "nn",
    "n.b.",
    "n. b.",
    "k.a.",
    "k. a.",
    "bdl",
    "not detected",
    "not detectable",
    "insufficient sample",
    "not run",
    "not tested",
    "not measured",
    "not determined",
    "unknown",
    "?",
    ".",
    "x",
    "pending",
];

/// How a column is read.
#[derive(Clone, Copy, Debug)]
pub(super) struct How {
    pub(super) reading: Reading,
    /// Unit of a value that carries none.
    pub(super) unit: &'static Unit,
    pub(super) decimal_comma: bool,
}

pub(super) fn read(content: Option<&Content>, how: How, column: u32) -> Read {
    match content {
        None => Read::Nothing,
        Some(Content::NoValue { .. }) => Read::NoValue,
        Some(Content::Date(_)) => Read::IsDate,
        Some(Content::Fault(_) | Content::Truth(_)) => Read::NotUnderstood,
        Some(Content::Number { value, unit }) => {
            let unit = match unit {
                None => Some(how.unit),
                Some(name) => how.reading.kind().unit(name.trim()),
            };
            match unit {
                None => Read::OtherUnit(content.map(Content::text).unwrap_or_default()),
                Some(unit) => {
                    let written = content.map(Content::text).unwrap_or_default();
                    judged(how, *value, unit, Bounds::Exactly, &written, column)
                }
            }
        }
        Some(Content::Percent(share)) => {
            let written = content.map(Content::text).unwrap_or_default();
            match how.reading.kind().unit("%") {
                None => Read::OtherUnit(written),
                Some(unit) => judged(how, share * 100.0, unit, Bounds::Exactly, &written, column),
            }
        }
        Some(Content::Text(text)) => of_text(text, how, column),
    }
}

fn of_text(text: &str, how: How, column: u32) -> Read {
    let text = text.trim();
    if NOTHING.iter().any(|n| text.eq_ignore_ascii_case(n)) {
        return Read::Nothing;
    }
    let (bounds, rest) = bound(text);
    let end = rest
        .find(|c: char| !(c.is_ascii_digit() || ".,+-eE'\u{a0}\u{202f} ".contains(c)))
        .unwrap_or(rest.len());
    let (number, unit) = rest.split_at(end);
    // the e of a number is not the first letter of a unit
    let (number, unit) = match number.find(['e', 'E']) {
        Some(at)
            if !number[at + 1..]
                .trim_start_matches(['+', '-'])
                .starts_with(|c: char| c.is_ascii_digit()) =>
        {
            rest.split_at(at)
        }
        _ => (number, unit),
    };
    let unit = unit.trim();
    if looks_like_date(text) {
        return Read::IsDate;
    }
    let value = match decimal(number.trim(), how.decimal_comma) {
        Ok(value) => value,
        Err(read) => return read,
    };
    let found = match unit {
        "" => Some(how.unit),
        name => how.reading.kind().unit(name),
    };
    match found {
        Some(found) => judged(how, value, found, bounds, text, column),
        None => Read::OtherUnit(unit.to_owned()),
    }
}

fn bound(text: &str) -> (Bounds, &str) {
    for (signs, bounds) in [
        (&["<=", "<", "≤", "less than", "below"][..], Bounds::Below),
        (&[">=", ">", "≥", "more than", "above"][..], Bounds::Above),
    ] {
        for sign in signs {
            if let Some(rest) = text.strip_prefix(sign) {
                return (bounds, rest.trim_start());
            }
        }
    }
    (Bounds::Exactly, text)
}

/// Three groups of figures parted by points, strokes or dashes.
fn looks_like_date(text: &str) -> bool {
    let parts: Vec<&str> = text.split(['-', '/', '.']).collect();
    parts.len() == 3
        && parts
            .iter()
            .all(|p| !p.is_empty() && p.len() <= 4 && p.bytes().all(|b| b.is_ascii_digit()))
        && parts.iter().any(|p| p.len() == 4)
}

/// A number as people write it, with a point or a comma before the decimals.
fn decimal(text: &str, comma: bool) -> Result<f64, Read> {
    if text.is_empty() {
        return Err(Read::NotUnderstood);
    }
    let plain: String = text
        .chars()
        .filter(|c| !matches!(c, ' ' | '\u{a0}' | '\u{202f}' | '\''))
        .collect();
    let (part, group) = if comma { (',', '.') } else { ('.', ',') };
    if let Some((whole, rest)) = plain.split_once(group) {
        // 1,250 or 1,250.5 with a point: groups of three before the decimals
        let groups: Vec<&str> = rest.split(part).next().unwrap_or("").split(group).collect();
        let grouped = whole.len() <= 3
            && !whole.trim_start_matches('-').is_empty()
            && !whole.starts_with('0')
            && groups
                .iter()
                .all(|g| g.len() == 3 && g.bytes().all(|b| b.is_ascii_digit()));
        // 1,250 alone may as well be 1.250: it is not guessed at
        let sure = grouped && (plain.contains(part) || groups.len() > 1);
        if !sure {
            return Err(Read::OtherDecimal);
        }
    }
    let number: String = plain
        .chars()
        .filter(|c| *c != group)
        .map(|c| if c == part { '.' } else { c })
        .collect();
    let value: Result<f64, _> = number.parse();
    value
        .ok()
        .filter(|v| v.is_finite())
        .ok_or(Read::NotUnderstood)
}

/// What an oil in use can have, in the unit of the reading: lowest and highest.
fn possible(reading: Reading) -> (f64, f64) {
    match reading {
        Reading::Nu40 => (0.3, 100_000.0),
        Reading::Nu100 => (0.2, 10_000.0),
        Reading::Density => (600.0, 2200.0),
        Reading::Flash => (-60.0, 500.0),
        Reading::AcidNumber | Reading::BaseNumber => (0.0, 200.0),
        Reading::Water => (0.0, 1e6),
        Reading::Fuel | Reading::Soot => (0.0, 100.0),
        Reading::OxidationLife => (0.0, 200.0),
        // absorbance over new oil may come out a little negative
        Reading::Oxidation | Reading::Nitration => (-50.0, 1000.0),
        Reading::HoursOnOil | Reading::HoursOnMachine => (0.0, 1e6),
        Reading::ToppedUp => (0.0, 1e6),
        Reading::Count4 | Reading::Count6 | Reading::Count14 => (0.0, 1e9),
        _ => (0.0, 1e6),
    }
}

/// Readings that cannot be nought in any oil.
fn never_zero(reading: Reading) -> bool {
    matches!(
        reading,
        Reading::Nu40 | Reading::Nu100 | Reading::Density | Reading::Flash | Reading::AcidNumber
    )
}

fn judged(
    how: How,
    value: f64,
    unit: &'static Unit,
    bounds: Bounds,
    written: &str,
    column: u32,
) -> Read {
    let reading = how.reading;
    let nines = [999.0, 9999.0, 99_999.0, 999.9, 999.99, -999.0, -9999.0];
    if bounds == Bounds::Exactly
        && ((value == 0.0 && never_zero(reading)) || nines.contains(&value))
    {
        return Read::Placeholder;
    }
    let own = match reading.unit() {
        "" => unit,
        name => reading.kind().unit(name).unwrap_or(unit),
    };
    let value = if std::ptr::eq(own, unit) {
        value
    } else {
        own.from_base(unit.to_base(value))
    };
    let (least, most) = possible(reading);
    if !(least..=most).contains(&value) {
        return Read::Impossible;
    }
    Read::Figure(Figure {
        value,
        bounds,
        written: written.into(),
        column,
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    fn how(reading: Reading, decimal_comma: bool) -> How {
        let unit = match reading.unit() {
            "" => reading.kind().unit("").expect("a pure number"),
            name => reading.kind().unit(name).expect("its own unit"),
        };
        How {
            reading,
            unit,
            decimal_comma,
        }
    }

    fn value(reading: Reading, text: &str, comma: bool) -> Option<(f64, Bounds)> {
        match read(Some(&Content::Text(text.into())), how(reading, comma), 1) {
            Read::Figure(f) => Some((f.value, f.bounds)),
            _ => None,
        }
    }

    #[test]
    fn figures_bounds_and_units_are_read() {
        let exactly = |x: f64| Some((x, Bounds::Exactly));
        assert_eq!(value(Reading::Nu40, "45.6", false), exactly(45.6));
        assert_eq!(value(Reading::Nu40, "45,6", true), exactly(45.6));
        assert_eq!(value(Reading::Nu40, "45.6 cSt", false), exactly(45.6));
        assert_eq!(value(Reading::Fe, "<5", false), Some((5.0, Bounds::Below)));
        assert_eq!(
            value(Reading::Fe, "> 200 ppm", false),
            Some((200.0, Bounds::Above))
        );
        assert_eq!(
            value(Reading::HoursOnOil, "1,250.5", false),
            exactly(1250.5)
        );
        assert_eq!(value(Reading::HoursOnOil, "1.250,5", true), exactly(1250.5));
        assert_eq!(value(Reading::Water, "1e3", false), exactly(1000.0));
        let water = value(Reading::Water, "0.02 %", false).expect("read");
        assert!((water.0 - 200.0).abs() < 1e-9);
        let flash = value(Reading::Flash, "400 degF", false).expect("read");
        assert!((flash.0 - 204.444_444).abs() < 1e-5, "{}", flash.0);
    }

    #[test]
    fn what_is_no_figure_is_told_apart() {
        let text =
            |reading, t: &str, comma| read(Some(&Content::Text(t.into())), how(reading, comma), 1);
        assert_eq!(text(Reading::Nu40, "n/a", false), Read::Nothing);
        assert_eq!(text(Reading::Nu40, "Not run", false), Read::Nothing);
        assert_eq!(text(Reading::Nu40, "45,6", false), Read::OtherDecimal);
        assert_eq!(text(Reading::Nu40, "1,250", false), Read::OtherDecimal);
        assert_eq!(text(Reading::Nu40, "45.6", true), Read::OtherDecimal);
        assert_eq!(text(Reading::Nu40, "0", false), Read::Placeholder);
        assert_eq!(text(Reading::Fe, "999", false), Read::Placeholder);
        assert!(matches!(text(Reading::Fe, "0", false), Read::Figure(_)));
        assert_eq!(text(Reading::Nu40, "12-10-2026", false), Read::IsDate);
        assert_eq!(
            text(Reading::Nu40, "45 mPa.s", false),
            Read::OtherUnit("mPa.s".into())
        );
        assert_eq!(text(Reading::Nu40, "cloudy", false), Read::NotUnderstood);
        assert_eq!(text(Reading::Density, "12", false), Read::Impossible);
        assert_eq!(read(None, how(Reading::Nu40, false), 1), Read::Nothing);
        let written = "=A1";
        let formula = Content::NoValue {
            formula: written.into(),
        };
        assert_eq!(
            read(Some(&formula), how(Reading::Nu40, false), 1),
            Read::NoValue
        );
    }
}
