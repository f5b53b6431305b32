//! What a heading means: the words of registers and oil lists, and the unit in them.

mod known;

use super::target::{Makes, Target};
use super::units::{Unit, unit};
use known::{OILS, SITE};

/// A heading taken apart.
#[derive(Clone, Debug, PartialEq)]
pub struct Heading {
    /// Its words, in lower case, without the unit.
    pub words: String,
    /// The unit in it.
    pub unit: Option<Unit>,
    /// The unit as written.
    pub unit_written: Option<String>,
    /// A temperature in it, degC: of `KV 100`.
    pub at: Option<f64>,
}

/// A guess, and how sure it is.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Guess {
    /// What the column holds.
    pub target: Target,
    /// 3 for a heading known as it stands, 2 for one that holds the words, 1 for one nearly it.
    pub sure: u8,
}

/// Takes a heading apart.
pub fn apart(text: &str) -> Heading {
    let one_line = text.split_whitespace().collect::<Vec<_>>().join(" ");
    let (rest, written) = unit_in(&one_line);
    let found = written.as_deref().and_then(|u| unit(u, &[]));
    let lower = if found.is_some() { &rest } else { &one_line }.to_lowercase();
    let at = temperature_in(&lower);
    let spaced: String = lower
        .chars()
        .map(|c| {
            if c.is_alphanumeric() || c == '#' || c == '&' {
                c
            } else {
                ' '
            }
        })
        .collect();
    Heading {
        words: spaced.split_whitespace().collect::<Vec<_>>().join(" "),
        unit: found,
        unit_written: written.filter(|_| found.is_some()),
        at,
    }
}

/// The unit in a heading: in brackets, behind a comma or slash, or as the last word.
fn unit_in(text: &str) -> (String, Option<String>) {
    for (open, close) in [('(', ')'), ('[', ']')] {
        if let (Some(from), Some(to)) = (text.rfind(open), text.rfind(close))
            && from < to
        {
            let inside = text[from + 1..to].trim();
            let whole = inside.strip_prefix("in ").unwrap_or(inside);
            if unit(whole, &[]).is_some() {
                let rest = format!("{}{}", &text[..from], &text[to + close.len_utf8()..]);
                return (rest, Some(whole.to_owned()));
            }
        }
    }
    for mark in [',', '/', '_'] {
        if let Some((before, behind)) = text.split_once(mark)
            && unit(behind.trim(), &[]).is_some()
        {
            return (before.to_owned(), Some(behind.trim().to_owned()));
        }
    }
    let words: Vec<&str> = text.split(' ').collect();
    for n in [2, 1] {
        if words.len() > n {
            let last = words[words.len() - n..].join(" ");
            // "Amb. min" is no time, "no in" no length.
            let plausible = match last.to_lowercase().as_str() {
                "min" | "in" | "day" | "days" | "year" | "years" | "month" | "months" | "hour"
                | "hours" => false,
                one => {
                    one.chars().count() > 1 || matches!(last.as_str(), "L" | "l" | "C" | "F" | "K")
                }
            };
            if plausible && unit(&last, &[]).is_some() {
                return (words[..words.len() - n].join(" "), Some(last));
            }
        }
    }
    (text.to_owned(), None)
}

/// A temperature in a heading about viscosity: `KV40`, `visc. 100 °C`, `V 210F`.
fn temperature_in(lower: &str) -> Option<f64> {
    let viscous = ["visc", "visk", "kv", "nu", "v40", "v100", "cst"]
        .iter()
        .any(|w| lower.contains(w));
    if !viscous {
        return None;
    }
    let numbers = lower
        .split(|c: char| !c.is_ascii_digit())
        .filter(|t| !t.is_empty());
    numbers
        .filter_map(|t| t.parse::<f64>().ok())
        .find_map(|t| match t {
            _ if [20.0, 40.0, 50.0, 80.0, 100.0].contains(&t)
                && !lower.contains(&format!("{t}f")) =>
            {
                Some(t)
            }
            _ if [100.0, 130.0, 210.0].contains(&t) => Some(((t - 32.0) / 1.8 * 1e3).round() / 1e3),
            _ => None,
        })
}

/// What a heading means. The samples decide where the words do not: `qty` beside litres is a fill.
pub fn guess(makes: Makes, heading: &Heading, samples: &[String]) -> Option<Guess> {
    if let (Makes::Oils, Some(t)) = (makes, heading.at) {
        return Some(Guess {
            target: Target::ViscosityAt(t),
            sure: 3,
        });
    }
    if makes == Makes::Site && matches!(heading.words.as_str(), "qty" | "quantity" | "amount") {
        let word = if of_volume(heading, samples) {
            "fill"
        } else {
            "count"
        };
        return Target::of(makes, word).map(|target| Guess { target, sure: 2 });
    }
    let table = match makes {
        Makes::Site => SITE,
        Makes::Oils => OILS,
    };
    let mut best: Option<(u8, usize, &str)> = None;
    for (word, phrases) in table {
        for phrase in phrases.split('|') {
            let sure = likeness(&heading.words, phrase);
            let better =
                best.is_none_or(|(s, len, _)| sure > s || (sure == s && phrase.len() > len));
            if sure > 0 && better {
                best = Some((sure, phrase.len(), word));
            }
        }
    }
    let (sure, _, word) = best?;
    Target::of(makes, word).map(|target| Guess { target, sure })
}

fn of_volume(heading: &Heading, samples: &[String]) -> bool {
    use crate::quantity::Kind;
    let volume = |u: Unit| matches!(u, Unit::Gallon | Unit::Of(Kind::Volume | Kind::Mass, _));
    if heading.unit.is_some_and(volume) {
        return true;
    }
    samples.iter().any(|s| {
        let parsed = super::parsed::parse(s, &[Kind::Volume, Kind::Mass]);
        parsed.is_some_and(|p| p.unit.is_some_and(volume) || p.number.contains(['.', ',']))
    })
}

fn likeness(words: &str, phrase: &str) -> u8 {
    if words == phrase {
        return 3;
    }
    let padded = format!(" {words} ");
    if phrase.len() > 2 && padded.contains(&format!(" {phrase} ")) {
        return 2;
    }
    let near = phrase.len() > 4 && strsim::normalized_damerau_levenshtein(words, phrase) >= 0.85;
    u8::from(near)
}

#[cfg(test)]
mod tests;
