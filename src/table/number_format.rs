//! What a number format of a workbook makes of a number: a day, a share, a number with its unit.
//!
//! Source: ECMA-376 part 1, 18.8.30 and 18.8.31 (number formats and the numbers built in).

use super::Content;
use jiff::civil::{Date, DateTime, Time, date};

/// What a number is, by its format.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) enum Meaning {
    /// A number.
    Plain,
    /// A day, with or without a time, counted from the workbook's first day.
    Day,
    /// A duration counted in days, shown in hours.
    Elapsed,
    /// A share.
    Percent,
    /// A number with a unit behind it.
    Unit(Box<str>),
}

/// A format that every workbook has without saying so.
pub(super) fn built_in(id: u32) -> Meaning {
    match id {
        9 | 10 => Meaning::Percent,
        14..=22 | 27..=36 | 45 | 47 | 50..=58 => Meaning::Day,
        46 => Meaning::Elapsed,
        _ => Meaning::Plain,
    }
}

/// The meaning of a format code.
pub(super) fn meaning(code: &str) -> Meaning {
    let pieces = pieces(code);
    let placeholder = pieces
        .iter()
        .any(|p| matches!(p, Piece::Sign(c) if "0#?".contains(*c)));
    if pieces.iter().any(|p| matches!(p, Piece::Sign('%'))) {
        return Meaning::Percent;
    }
    if pieces.iter().any(|p| matches!(p, Piece::Elapsed)) {
        return Meaning::Elapsed;
    }
    let general = code.to_lowercase().contains("general");
    let day = |p: &Piece| matches!(p, Piece::Sign(c) if "ymdhs".contains(c.to_ascii_lowercase()));
    if !placeholder && !general && pieces.iter().any(day) {
        return Meaning::Day;
    }
    if placeholder || general {
        let unit = behind(&pieces);
        if unit.chars().any(|c| c.is_alphabetic() || c == '°') {
            return Meaning::Unit(unit.into());
        }
    }
    Meaning::Plain
}

enum Piece {
    /// A character that stands for something.
    Sign(char),
    /// A character printed as it is.
    Printed(char),
    /// `[h]`, `[mm]`, `[s]`.
    Elapsed,
}

/// The first section of a code, taken apart: colours and conditions fall out.
fn pieces(code: &str) -> Vec<Piece> {
    let mut out = Vec::new();
    let mut chars = code.chars();
    while let Some(c) = chars.next() {
        match c {
            ';' => break,
            '"' => out.extend(chars.by_ref().take_while(|c| *c != '"').map(Piece::Printed)),
            '\\' => out.extend(chars.next().map(Piece::Printed)),
            '_' | '*' => drop(chars.next()),
            '[' => {
                let inner: String = chars.by_ref().take_while(|c| *c != ']').collect();
                let time = !inner.is_empty()
                    && inner
                        .chars()
                        .all(|c| "hms".contains(c.to_ascii_lowercase()));
                if time {
                    out.push(Piece::Elapsed);
                } else if let Some(money) = inner.strip_prefix('$') {
                    let printed = money.split('-').next().unwrap_or("");
                    out.extend(printed.chars().map(Piece::Printed));
                }
            }
            c => out.push(Piece::Sign(c)),
        }
    }
    out
}

/// What is printed behind the last figure.
fn behind(pieces: &[Piece]) -> String {
    let last = pieces
        .iter()
        .rposition(|p| matches!(p, Piece::Sign(c) if "0#?.,lL".contains(*c)));
    let rest = &pieces[last.map_or(0, |at| at + 1)..];
    let text: String = rest
        .iter()
        .filter_map(|p| match p {
            Piece::Printed(c) => Some(*c),
            Piece::Sign(c) if " /()".contains(*c) => Some(*c),
            _ => None,
        })
        .collect();
    text.trim().to_owned()
}

/// A number under its format.
pub(super) fn content(value: f64, meaning: &Meaning, from_1904: bool) -> Content {
    match meaning {
        Meaning::Plain => Content::Number { value, unit: None },
        Meaning::Percent => Content::Percent(value),
        Meaning::Unit(unit) => Content::Number {
            value,
            unit: Some(unit.clone()),
        },
        Meaning::Elapsed => Content::Number {
            value: value * 24.0,
            unit: Some("h".into()),
        },
        Meaning::Day => {
            day(value, from_1904).map_or(Content::Number { value, unit: None }, Content::Date)
        }
    }
}

/// A count of days as a day, with its time where it has one.
fn day(serial: f64, from_1904: bool) -> Option<String> {
    if !(0.0..2_958_466.0).contains(&serial) {
        return None;
    }
    let whole = serial.floor();
    let seconds = ((serial - whole) * 86_400.0).round();
    let (whole, seconds) = if seconds >= 86_400.0 {
        (whole + 1.0, 0.0)
    } else {
        (whole, seconds)
    };
    #[expect(clippy::cast_possible_truncation, reason = "both are bounded above")]
    let (days, seconds) = (whole as i64, seconds as i64);
    let time = clock(seconds)?;
    if days == 0 && !from_1904 {
        return Some(time_text(time));
    }
    let date = first_day(days, from_1904)
        .checked_add(jiff::Span::new().days(days))
        .ok()?;
    Some(if seconds == 0 {
        date.to_string()
    } else {
        let at = DateTime::from_parts(date, time);
        format!("{} {}", at.date(), time_text(at.time()))
    })
}

fn clock(seconds: i64) -> Option<Time> {
    let part = |x: i64| i8::try_from(x).ok();
    Time::new(
        part(seconds / 3600)?,
        part(seconds / 60 % 60)?,
        part(seconds % 60)?,
        0,
    )
    .ok()
}

fn time_text(time: Time) -> String {
    if time.second() == 0 {
        format!("{:02}:{:02}", time.hour(), time.minute())
    } else {
        time.to_string()
    }
}

/// The day before the first. The calendar that counts from 1900 has a 29 February 1900, so that
/// days from 1 March on count one more.
fn first_day(days: i64, from_1904: bool) -> Date {
    if from_1904 {
        date(1904, 1, 1)
    } else if days < 60 {
        date(1899, 12, 31)
    } else {
        date(1899, 12, 30)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn formats_say_what_a_number_is() {
        for (code, want) in [
            ("General", Meaning::Plain),
            ("0.00", Meaning::Plain),
            ("#,##0.0;[Red]-#,##0.0", Meaning::Plain),
            ("0.00E+00", Meaning::Plain),
            ("0%", Meaning::Percent),
            ("yyyy\\-mm\\-dd", Meaning::Day),
            ("[$-407]d. mmmm yyyy;@", Meaning::Day),
            ("hh:mm", Meaning::Day),
            ("[h]:mm:ss", Meaning::Elapsed),
            ("0.0\" L\"", Meaning::Unit("L".into())),
            ("#,##0\\ \"r/min\"", Meaning::Unit("r/min".into())),
            ("0\" °C\";-0\" °C\"", Meaning::Unit("°C".into())),
            ("General\" mm\"", Meaning::Unit("mm".into())),
            ("[$EUR-407] 0.00", Meaning::Plain),
            ("_-* #,##0.00\\ _€_-", Meaning::Plain),
        ] {
            assert_eq!(meaning(code), want, "{code}");
        }
    }

    /// Days of both calendars: ECMA-376 part 1, 18.17.4.1.
    #[test]
    fn days_count_from_1900_or_1904() {
        assert_eq!(day(1.0, false).as_deref(), Some("1900-01-01"));
        assert_eq!(day(61.0, false).as_deref(), Some("1900-03-01"));
        assert_eq!(day(46_221.0, false).as_deref(), Some("2026-07-18"));
        assert_eq!(day(44_759.0, true).as_deref(), Some("2026-07-18"));
        assert_eq!(
            day(46_221.562_5, false).as_deref(),
            Some("2026-07-18 13:30")
        );
        assert_eq!(day(0.25, false).as_deref(), Some("06:00"));
        assert_eq!(day(1e9, false), None);
        assert_eq!(day(-3.0, false), None);
    }
}
