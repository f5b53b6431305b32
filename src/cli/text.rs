//! Text for people: tables that drop columns rather than wrap, verdict marks, numbers.

use super::Marks;
use crate::judge::{Band, Verdict};
use crate::quantity::Kind;
use crate::quantity::show::{Toward, Units, fixed, round_to, unit_of};

/// One column of a table.
#[derive(Clone, Copy, Debug)]
pub struct Column {
    /// Heading.
    pub heading: &'static str,
    /// Numbers stand right.
    pub right: bool,
    /// The lower, the sooner it is dropped where the width is short; 0 is never dropped.
    pub keep: u8,
}

impl Column {
    /// A column of text.
    pub const fn text(heading: &'static str, keep: u8) -> Self {
        Self {
            heading,
            right: false,
            keep,
        }
    }

    /// A column of numbers.
    pub const fn number(heading: &'static str, keep: u8) -> Self {
        Self {
            heading,
            right: true,
            keep,
        }
    }
}

/// Least width a last column is folded to; narrower, it runs on.
const LEAST_FOLD: usize = 18;

/// A table as lines, each indented by two. A last column that is never dropped is folded within
/// the width; what is dropped is named below.
pub fn table(columns: &[Column], rows: &[Vec<String>], width: usize) -> String {
    let mut shown: Vec<usize> = (0..columns.len()).collect();
    let widths: Vec<usize> = (0..columns.len())
        .map(|i| {
            rows.iter()
                .map(|r| r.get(i).map_or(0, |c| c.chars().count()))
                .chain([columns[i].heading.chars().count()])
                .max()
                .unwrap_or(0)
        })
        .collect();
    loop {
        let last = shown.last().copied();
        // a last column that is never dropped may run on: only its heading must fit
        let runs_on = |i: usize| Some(i) == last && columns[i].keep == 0;
        let total: usize = shown
            .iter()
            .map(|i| {
                2 + if runs_on(*i) {
                    columns[*i].heading.chars().count()
                } else {
                    widths[*i]
                }
            })
            .sum();
        let droppable = shown
            .iter()
            .filter(|i| columns[**i].keep > 0)
            .min_by_key(|i| columns[**i].keep);
        match droppable.copied() {
            Some(drop) if total > width => shown.retain(|i| *i != drop),
            _ => break,
        }
    }
    let mut out = String::new();
    let headings: Vec<String> = columns.iter().map(|c| c.heading.to_owned()).collect();
    if headings.iter().any(|h| !h.is_empty()) {
        line(&mut out, columns, &shown, &widths, &headings);
    }
    let left_out: Vec<&str> = (0..columns.len())
        .filter(|i| {
            !shown.contains(i)
                && rows
                    .iter()
                    .any(|r| r.get(*i).is_some_and(|c| !c.is_empty()))
        })
        .map(|i| columns[i].heading)
        .filter(|h| !h.is_empty())
        .collect();
    let before: usize = shown.iter().rev().skip(1).map(|i| widths[*i] + 2).sum();
    let left = width.saturating_sub(2 + before);
    for row in rows {
        let last = shown.last().copied().unwrap_or(0);
        let cell = row.get(last).map_or("", String::as_str);
        if columns[last].keep > 0 || left < LEAST_FOLD || cell.chars().count() <= left {
            line(&mut out, columns, &shown, &widths, row);
            continue;
        }
        let mut row = row.clone();
        let text = folded(cell, "", left);
        for (k, piece) in text.lines().enumerate() {
            if k > 0 {
                row.iter_mut().for_each(String::clear);
            }
            piece.clone_into(&mut row[last]);
            line(&mut out, columns, &shown, &widths, &row);
        }
    }
    if !left_out.is_empty() {
        let text = format!(
            "left out for width: {}; -f json has all",
            left_out.join(", ")
        );
        out.push_str(&folded(&text, "  ", width));
    }
    out
}

fn line(out: &mut String, columns: &[Column], shown: &[usize], widths: &[usize], row: &[String]) {
    let mut text = String::from("  ");
    for (k, i) in shown.iter().enumerate() {
        let cell = row.get(*i).map_or("", String::as_str);
        let pad = widths[*i].saturating_sub(cell.chars().count());
        let last = k + 1 == shown.len();
        if columns[*i].right {
            text.push_str(&" ".repeat(pad));
            text.push_str(cell);
        } else {
            text.push_str(cell);
            if !last {
                text.push_str(&" ".repeat(pad));
            }
        }
        if !last {
            text.push_str("  ");
        }
    }
    out.push_str(text.trim_end());
    out.push('\n');
}

/// A verdict with its mark: a bar against its limit.
pub fn verdict(verdict: Verdict, marks: Marks) -> String {
    let word = verdict.word();
    let bar = match (marks, verdict) {
        (Marks::Words, _) => return word.to_owned(),
        (Marks::Plain, Verdict::Holds) => "####|##",
        (Marks::Plain, Verdict::Tight) => "####|  ",
        (Marks::Plain, Verdict::Open) => "- - |- -",
        (Marks::Plain, Verdict::Fails) => "##  |  ",
        (Marks::Drawn, Verdict::Holds) => {
            "\u{2580}\u{2580}\u{2580}\u{2580}\u{2502}\u{2580}\u{2580}"
        }
        (Marks::Drawn, Verdict::Tight) => "\u{2580}\u{2580}\u{2580}\u{2580}\u{2502}  ",
        (Marks::Drawn, Verdict::Open) => "\u{254c}\u{254c}\u{254c}\u{254c}\u{2502}\u{254c}\u{254c}",
        (Marks::Drawn, Verdict::Fails) => "\u{2580}\u{2580}  \u{2502}  ",
    };
    format!("{bar:<8} {word}")
}

/// A band of ambient temperatures, ends rounded inwards.
pub fn band(band: Band, units: Units) -> String {
    if band.is_nowhere() {
        return "nowhere".to_owned();
    }
    let unit = unit_of(Kind::Temperature, units);
    let end = |t: f64, toward| fixed(round_to(unit.from_base(t), 0, toward), 0, Toward::Nearest);
    match (band.low_end(), band.high_end()) {
        (Some(low), Some(high)) => {
            format!(
                "{}..{} {}",
                end(low, Toward::Up),
                end(high, Toward::Down),
                unit.name
            )
        }
        (Some(low), None) => format!("from {} {}", end(low, Toward::Up), unit.name),
        (None, Some(high)) => format!("to {} {}", end(high, Toward::Down), unit.name),
        (None, None) => "not limited".to_owned(),
    }
}

/// Words folded at a width behind a lead; further lines are indented as far as the lead reaches.
pub fn hanging(lead: &str, text: &str, width: usize) -> String {
    let indent = " ".repeat(lead.chars().count());
    let body = folded(text, &indent, width);
    format!("{lead}{}", body.get(indent.len()..).unwrap_or(""))
}

/// With a capital where the sentence begins and a stop where it ends.
pub fn sentence(text: &str) -> String {
    let text = text.trim();
    let mut letters = text.chars();
    let Some(first) = letters.next() else {
        return String::new();
    };
    let mut out: String = first.to_uppercase().chain(letters).collect();
    if !out.ends_with(['.', '?', '!']) {
        out.push('.');
    }
    out
}

/// Words folded at a width, every line indented.
pub fn folded(text: &str, indent: &str, width: usize) -> String {
    let mut out = String::new();
    let mut line = String::from(indent);
    for word in text.split_whitespace() {
        let empty = line.trim().is_empty();
        if !empty && line.chars().count() + 1 + word.chars().count() > width {
            out.push_str(line.trim_end());
            out.push('\n');
            line = String::from(indent);
        } else if !empty {
            line.push(' ');
        }
        line.push_str(word);
    }
    if !line.trim().is_empty() {
        out.push_str(line.trim_end());
        out.push('\n');
    }
    out
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_least_important_column_goes_first() {
        let columns = [
            Column::text("oil", 0),
            Column::number("hot", 2),
            Column::text("band", 1),
        ];
        let rows = vec![vec![
            "SG-220".to_owned(),
            "+0.67".to_owned(),
            "-22..42 degC".to_owned(),
        ]];
        assert!(table(&columns, &rows, 80).contains("-22..42 degC"));
        let narrow = table(&columns, &rows, 18);
        assert!(!narrow.contains("-22..") && narrow.contains("+0.67"));
        let words: Vec<&str> = narrow.split_whitespace().collect();
        assert!(
            words
                .join(" ")
                .contains("left out for width: band; -f json has all")
        );
    }

    #[test]
    fn bands_are_rounded_inwards() {
        let b = Band {
            low: 250.22,
            high: 315.41,
        };
        assert_eq!(band(b, Units::Si), "-22..42 degC");
        assert_eq!(band(Band::NOWHERE, Units::Si), "nowhere");
        assert_eq!(band(Band::OPEN, Units::Si), "not limited");
    }

    #[test]
    fn words_fold_at_the_width() {
        assert_eq!(folded("one two three", "  ", 10), "  one two\n  three\n");
    }
}
