//! Days as laboratories write them.

use crate::model::sample::DateOrder;
use crate::table::Content;
use jiff::civil::Date;

/// What a cell of days came to.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) enum Day {
    /// A day.
    Is(Date),
    /// Nothing there.
    Nothing,
    /// A day only in another order of the figures than stated.
    OtherOrder,
    /// A formula whose value was never stored.
    NoValue,
    /// No day at all.
    No,
}

/// Reads a day.
pub(super) fn read(content: Option<&Content>, order: Option<DateOrder>) -> Day {
    let text = match content {
        None => return Day::Nothing,
        Some(Content::NoValue { .. }) => return Day::NoValue,
        Some(Content::Date(text) | Content::Text(text)) => text.trim(),
        Some(_) => return Day::No,
    };
    if text.is_empty() || text == "-" {
        return Day::Nothing;
    }
    let words: Vec<&str> = text.split_whitespace().collect();
    // a time of day behind the date is left aside
    let text = match words.as_slice() {
        [day, time, ..] if time.contains(':') => day,
        [day] => day.split_once('T').map_or(*day, |(d, _)| d),
        _ => text,
    };
    let pieces: Vec<&str> = text
        .split(['-', '/', '.', ' '])
        .filter(|p| !p.is_empty())
        .collect();
    let [a, b, c] = pieces.as_slice() else {
        return Day::No;
    };
    if let Some(day) = with_month_name(a, b, c) {
        return Day::Is(day);
    }
    // a year of four figures in front settles the order
    let stated = order.unwrap_or_default();
    let order = if a.len() == 4 {
        DateOrder::YearMonthDay
    } else {
        stated
    };
    match of(a, b, c, order) {
        Some(day) => Day::Is(day),
        None if ORDERS
            .iter()
            .any(|o| *o != order && of(a, b, c, *o).is_some()) =>
        {
            Day::OtherOrder
        }
        None => Day::No,
    }
}

/// Whether a text has the shape of a day: three groups of figures. It may be none all the same.
pub(super) fn looks_like_one(text: &str) -> bool {
    let groups: Vec<&str> = text.split(['-', '/', '.', ' ']).collect();
    let figures = |g: &&str| !g.is_empty() && g.len() <= 4 && g.bytes().all(|b| b.is_ascii_digit());
    groups.len() == 3 && groups.iter().all(figures)
}

const ORDERS: [DateOrder; 3] = [
    DateOrder::YearMonthDay,
    DateOrder::DayMonthYear,
    DateOrder::MonthDayYear,
];

fn of(a: &str, b: &str, c: &str, order: DateOrder) -> Option<Date> {
    let (year, month, day) = match order {
        DateOrder::YearMonthDay => (a, b, c),
        DateOrder::DayMonthYear => (c, b, a),
        DateOrder::MonthDayYear => (c, a, b),
    };
    // a year of two figures cannot be told from a day
    if year.len() != 4 {
        return None;
    }
    Date::new(year.parse().ok()?, month.parse().ok()?, day.parse().ok()?).ok()
}

const MONTHS: [&str; 12] = [
    "jan", "feb", "mar", "apr", "may", "jun", "jul", "aug", "sep", "oct", "nov", "dec",
];

/// `12 Oct 2026`, `Oct 12, 2026`, `12-Oct-2026`.
fn with_month_name(a: &str, b: &str, c: &str) -> Option<Date> {
    let month = |t: &str| {
        let name = t.trim_end_matches(',').to_ascii_lowercase();
        let at = MONTHS.iter().position(|m| name.starts_with(m))?;
        i8::try_from(at + 1).ok()
    };
    let number = |t: &str| t.trim_end_matches(',').parse::<i16>().ok();
    let (day, month, year) = match (month(a), month(b)) {
        (None, Some(m)) => (number(a)?, m, number(c)?),
        (Some(m), None) => (number(b)?, m, number(c)?),
        _ => return None,
    };
    Date::new(year, month, i8::try_from(day).ok()?).ok()
}

#[cfg(test)]
mod tests {
    use super::*;

    fn day(text: &str, order: Option<DateOrder>) -> Day {
        read(Some(&Content::Text(text.into())), order)
    }

    #[test]
    fn days_are_read_in_the_order_stated() {
        let the = Day::Is(Date::constant(2026, 10, 12));
        let dmy = Some(DateOrder::DayMonthYear);
        for text in [
            "12-10-2026",
            "12.10.2026",
            "12/10/2026 08:30",
            "2026-10-12",
            "12 Oct 2026",
            "Oct 12, 2026",
        ] {
            assert_eq!(day(text, dmy), the, "{text}");
        }
        assert_eq!(day("10/12/2026", Some(DateOrder::MonthDayYear)), the);
        assert_eq!(day("2026-10-12T09:00:00", None), the);
        assert_eq!(read(Some(&Content::Date("2026-10-12".into())), dmy), the);
    }

    #[test]
    fn days_of_another_order_are_not_guessed_at() {
        assert_eq!(
            day("10/13/2026", Some(DateOrder::DayMonthYear)),
            Day::OtherOrder
        );
        assert_eq!(day("13-10-2026", None), Day::OtherOrder);
        assert_eq!(day("13-10-26", Some(DateOrder::DayMonthYear)), Day::No);
        assert_eq!(day("45.6", None), Day::No);
        assert_eq!(day("31-02-2026", Some(DateOrder::DayMonthYear)), Day::No);
        assert_eq!(day("", None), Day::Nothing);
    }
}
