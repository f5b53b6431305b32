//! Dates: `2026`, `2026-07`, `2026-07-18`, and spans of them `2020..2026`.

use super::fault::{Fault, Mend};
use crate::problem::Code;
use jiff::civil::Date;

/// Whether a word can only be meant as a date: it begins with a figure and holds four of them, or
/// three groups parted by points, strokes or dashes.
pub fn looks_like(word: &str) -> bool {
    let figures = word.chars().filter(char::is_ascii_digit).count();
    let mut parts = word.split(['-', '/', '.']).filter(|p| !p.is_empty());
    let parted = parts.clone().count() == 3
        && parts.all(|p| p.chars().all(|c| c.is_ascii_digit()) || month(p).is_some());
    word.starts_with(|c: char| c.is_ascii_digit()) && (figures >= 4 || parted)
}

/// Reads a date or a span of dates, exactly as it stands.
///
/// # Errors
/// A form not understood, a day that does not exist, a span that runs backwards.
pub fn read(text: &str) -> Result<String, Fault> {
    if let Some((from, to)) = text.split_once("..") {
        let (from, to) = (from.trim(), to.trim());
        let first = one(from)?;
        let second = one(to).map_err(|f| f.shifted(text.len() - to.len()))?;
        if second < first {
            return Err(Fault::new(
                Code::DateOrder,
                format!("{from} stands before {to}"),
                0..text.len(),
            )
            .why("the earlier date comes first")
            .mend(Mend::new(0..text.len(), format!("{to}..{from}"))));
        }
        return Ok(format!("{from}..{to}"));
    }
    one(text).map(|_| text.to_owned())
}

/// Reads a whole date, year, month and day.
///
/// # Errors
/// As [`read`]; a year or a month alone is not enough.
pub fn day(text: &str) -> Result<Date, Fault> {
    let date = one(text).map_err(|mut fault| {
        for mend in &mut fault.mends {
            if let (true, Ok(date)) = (mend.text.len() < WHOLE, one(&mend.text)) {
                mend.text = date.strftime("%Y-%m-%d").to_string();
                mend.remark = Some("with the right day".into());
            }
        }
        fault
    })?;
    if text.len() < WHOLE {
        let whole = date.strftime("%Y-%m-%d").to_string();
        return Err(form(text, "a day is wanted, as 2026-07-18")
            .mend(Mend::new(0..text.len(), whole).remark("with the right day")));
    }
    Ok(date)
}

/// Characters of a whole date.
const WHOLE: usize = "2026-07-18".len();

/// The first day of a year, of a month, or the day itself.
fn one(text: &str) -> Result<Date, Fault> {
    let parts: Vec<&str> = text.split('-').collect();
    let lengths: Vec<usize> = parts.iter().map(|p| p.len()).collect();
    let figures = parts.iter().all(|p| p.chars().all(|c| c.is_ascii_digit()));
    if !figures || !matches!(lengths.as_slice(), [4] | [4, 2] | [4, 2, 2]) {
        return Err(other_form(text));
    }
    let number = |at: usize| parts.get(at).and_then(|p| p.parse::<i16>().ok());
    let year = number(0).unwrap_or(0);
    let month = small(number(1));
    let day = small(number(2));
    Date::new(year, month, day).map_err(|_| {
        let last = last_day(year, month);
        let fault = Fault::new(
            Code::DateImpossible,
            format!("there is no day {text}"),
            0..text.len(),
        )
        .why("dates are written year-month-day");
        let instead = match last {
            Some(last) => format!("{year:04}-{month:02}-{last:02}"),
            None => format!("{year:04}"),
        };
        fault.mend(Mend::new(0..text.len(), instead).remark("or the date it was"))
    })
}

fn small(number: Option<i16>) -> i8 {
    number.map_or(1, |n| i8::try_from(n).unwrap_or(0))
}

/// The last day of a month, if the month exists.
fn last_day(year: i16, month: i8) -> Option<i8> {
    Date::new(year, month, 1).ok().map(Date::days_in_month)
}

fn form(text: &str, why: &str) -> Fault {
    Fault::new(
        Code::DateForm,
        format!("date \"{text}\" not understood"),
        0..text.len(),
    )
    .why(why)
}

/// A date in another custom: turned into ours where it can be, both ways where it may be two.
fn other_form(text: &str) -> Fault {
    let fault = form(text, "dates are written 2026, 2026-07 or 2026-07-18");
    let whole = 0..text.len();
    let readings = readings(text);
    if readings.is_empty() {
        let year = text
            .split(|c: char| !c.is_ascii_digit())
            .find(|p| p.len() == 4)
            .unwrap_or("2026");
        return fault.mend(Mend::new(whole, year).remark("or the date it was"));
    }
    readings
        .into_iter()
        .fold(fault, |f, r| f.mend(Mend::new(whole.clone(), r)))
}

/// What `18.07.2026`, `7/18/2026` or `18 July 2026` can mean.
fn readings(text: &str) -> Vec<String> {
    let parts: Vec<&str> = text
        .split(['.', '/', '-', ' ', ','])
        .filter(|p| !p.is_empty())
        .collect();
    let is_year = |p: &&str| p.len() == 4 && p.parse::<i16>().is_ok();
    let Some(year_at) = parts.iter().position(is_year) else {
        return Vec::new();
    };
    let year = parts[year_at].parse().unwrap_or(0);
    let named = parts.iter().find_map(|p| month(p));
    let rest = parts.iter().enumerate().filter(|(at, _)| *at != year_at);
    let numbers: Vec<i16> = rest.filter_map(|(_, p)| p.parse().ok()).collect();
    let month_and_day: Vec<(i16, Option<i16>)> = match (named, numbers.as_slice()) {
        (Some(month), [day]) => vec![(month, Some(*day))],
        (Some(month), []) => vec![(month, None)],
        (None, [month]) => vec![(*month, None)],
        (None, [month, day]) if year_at == 0 => vec![(*month, Some(*day))],
        (None, [day, month]) if text.contains('.') || day == month => vec![(*month, Some(*day))],
        (None, [one, two]) => vec![(*two, Some(*one)), (*one, Some(*two))],
        _ => Vec::new(),
    };
    month_and_day
        .into_iter()
        .filter(|(m, d)| Date::new(year, small(Some(*m)), small(d.or(Some(1)))).is_ok())
        .map(|(m, day)| match day {
            Some(day) => format!("{year:04}-{m:02}-{day:02}"),
            None => format!("{year:04}-{m:02}"),
        })
        .collect()
}

/// The number of an English month, by its first three letters.
fn month(word: &str) -> Option<i16> {
    const MONTHS: [&str; 12] = [
        "january",
        "february",
        "march",
        "april",
        "may",
        "june",
        "july",
        "august",
        "september",
        "october",
        "november",
        "december",
    ];
    let word = word.to_lowercase();
    let at = MONTHS
        .iter()
        .position(|m| word.len() >= 3 && m.starts_with(&word))?;
    i16::try_from(at + 1).ok()
}

#[cfg(test)]
mod tests {
    use super::*;

    fn mends(text: &str) -> (Code, Vec<String>) {
        let fault = read(text).expect_err("not ours");
        let texts = fault.mends.iter().map(|m| m.applied(text)).collect();
        (fault.code, texts)
    }

    #[test]
    fn reads_years_months_days_and_spans() {
        for text in [
            "2026",
            "2026-07",
            "2026-07-18",
            "2020..2026",
            "2020-01..2026-07",
        ] {
            assert_eq!(read(text).as_deref(), Ok(text));
        }
        assert_eq!(day("2024-02-29").map(Date::day), Ok(29));
        assert_eq!(day("2026-07").expect_err("no day").code, Code::DateForm);
    }

    #[test]
    fn turns_other_customs_into_ours() {
        for (text, code, want) in [
            ("18.07.2026", Code::DateForm, &["2026-07-18"][..]),
            ("07/18/2026", Code::DateForm, &["2026-07-18"]),
            ("3/4/2026", Code::DateForm, &["2026-04-03", "2026-03-04"]),
            ("July 2026", Code::DateForm, &["2026-07"]),
            ("18 Jul 2026", Code::DateForm, &["2026-07-18"]),
            ("2026/7/18", Code::DateForm, &["2026-07-18"]),
            ("spring 2026", Code::DateForm, &["2026"]),
            ("2026-02-30", Code::DateImpossible, &["2026-02-28"]),
            ("2026-13-01", Code::DateImpossible, &["2026"]),
            ("2026..2020", Code::DateOrder, &["2020..2026"]),
        ] {
            let (found, texts) = mends(text);
            assert_eq!(
                (found, texts.as_slice()),
                (
                    code,
                    &want.iter().map(ToString::to_string).collect::<Vec<_>>()[..]
                ),
                "{text}"
            );
            for mended in texts {
                assert!(read(&mended).is_ok(), "{mended}");
            }
        }
    }

    #[test]
    fn tells_dates_from_remarks() {
        for (word, want) in [
            ("2026", true),
            ("18.07.26", true),
            ("6.3", false),
            ("3", false),
            ("by", false),
        ] {
            assert_eq!(looks_like(word), want, "{word}");
        }
    }
}
