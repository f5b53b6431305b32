//! What a heading means: the words of registers and oil lists, and the unit in them.

mod known;

use super::target::{Makes, Target};
use super::units::{Unit, unit};
use known::{OILS, SITE};
use std::sync::LazyLock;

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
    let best = by_words(makes, &heading.words, heading.unit)
        .or_else(|| by_unit(makes, heading))
        .or_else(|| by_words(makes, &heading.words, None));
    best.and_then(|(sure, word)| Target::of(makes, word).map(|target| Guess { target, sure }))
}

/// The phrase a heading is likest to, of what may hold the unit in it.
fn by_words(makes: Makes, words: &str, unit: Option<Unit>) -> Option<(u8, &'static str)> {
    let table = match makes {
        Makes::Site => &*SITE_IN_FULL,
        Makes::Oils => &*OILS_IN_FULL,
    };
    let words = in_full(words);
    let mut best: Option<(u8, usize, &'static str)> = None;
    for (word, phrases) in table {
        if unit.is_some_and(|u| !may_hold(makes, word, u)) {
            continue;
        }
        for phrase in phrases {
            let sure = likeness(&words, phrase);
            let better =
                best.is_none_or(|(s, len, _)| sure > s || (sure == s && phrase.len() > len));
            if sure > 0 && better {
                best = Some((sure, phrase.len(), word));
            }
        }
    }
    best.map(|(sure, _, word)| (sure, word))
}

/// Whether a column of that unit may hold this: litres are no temperature and no name.
fn may_hold(makes: Makes, word: &str, unit: Unit) -> bool {
    use crate::quantity::Kind;
    let Some(target) = Target::of(makes, word) else {
        return false;
    };
    let kinds = target.kinds();
    match unit {
        _ if matches!(target, Target::Note) => true,
        Unit::Gallon(_) => kinds.contains(&Kind::Volume) || kinds.contains(&Kind::VolumePerYear),
        Unit::Of(Kind::Mass, _) => kinds.contains(&Kind::Volume) || kinds.contains(&Kind::Mass),
        Unit::Of(Kind::Volume, _) => {
            kinds.contains(&Kind::Volume) || kinds.contains(&Kind::VolumePerYear)
        }
        Unit::Of(Kind::Time, _) => {
            kinds.contains(&Kind::Time) || kinds.contains(&Kind::HoursPerYear)
        }
        Unit::Of(Kind::Temperature, _) => {
            kinds.contains(&Kind::Temperature) || kinds.contains(&Kind::Rise)
        }
        Unit::Of(kind, _) => kinds.contains(&kind),
    }
}

/// What a unit alone tells of a column of a register: litres are a fill, kilowatts a power.
fn by_unit(makes: Makes, heading: &Heading) -> Option<(u8, &'static str)> {
    use crate::quantity::Kind;
    if makes != Makes::Site {
        return None;
    }
    let has = |w: &str| in_full(&heading.words).split(' ').any(|one| one == w);
    let word = match heading.unit? {
        Unit::Gallon(_) | Unit::Of(Kind::Volume, _) => "fill",
        Unit::Of(Kind::RotationalSpeed, _) if has("motor") => "motor speed",
        Unit::Of(Kind::RotationalSpeed, _) => "speed",
        Unit::Of(Kind::Power, _) => "gear mesh: power",
        Unit::Of(Kind::Temperature, _) if has("oil") || has("sump") => "sump",
        Unit::Of(..) => return None,
    };
    Some((1, word))
}

/// Words of headings cut short, and in full (common practice of registers).
const SHORT: &[(&str, &str)] = &[
    ("equip", "equipment"),
    ("eqpt", "equipment"),
    ("eqp", "equipment"),
    ("mach", "machine"),
    ("brg", "bearing"),
    ("brgs", "bearing"),
    ("brng", "bearing"),
    ("bearings", "bearing"),
    ("desc", "description"),
    ("descr", "description"),
    ("descrip", "description"),
    ("no", "number"),
    ("nr", "number"),
    ("num", "number"),
    ("nbr", "number"),
    ("vol", "volume"),
    ("qty", "quantity"),
    ("qnty", "quantity"),
    ("temp", "temperature"),
    ("temps", "temperature"),
    ("oper", "operating"),
    ("op", "operating"),
    ("amb", "ambient"),
    ("min", "minimum"),
    ("max", "maximum"),
    ("cap", "capacity"),
    ("lub", "lubricant"),
    ("lubr", "lubricant"),
    ("mtr", "motor"),
    ("spd", "speed"),
    ("pwr", "power"),
    ("visc", "viscosity"),
    ("spec", "specification"),
    ("specs", "specification"),
    ("loc", "location"),
    ("dept", "department"),
    ("hrs", "hours"),
    ("rem", "remarks"),
    ("assy", "assembly"),
];

/// A heading or phrase with its short words written out.
fn in_full(words: &str) -> String {
    let one = |w| SHORT.iter().find(|(s, _)| *s == w).map_or(w, |(_, f)| *f);
    words.split(' ').map(one).collect::<Vec<_>>().join(" ")
}

/// A word of the map file with the phrases it is known by, in full.
type Phrases = Vec<(&'static str, Vec<String>)>;

fn phrases_of(table: &'static [(&'static str, &'static str)]) -> Phrases {
    let one = |(word, phrases): &(&'static str, &'static str)| {
        (*word, phrases.split('|').map(in_full).collect())
    };
    table.iter().map(one).collect()
}

static SITE_IN_FULL: LazyLock<Phrases> = LazyLock::new(|| phrases_of(SITE));
static OILS_IN_FULL: LazyLock<Phrases> = LazyLock::new(|| phrases_of(OILS));

fn of_volume(heading: &Heading, samples: &[String]) -> bool {
    use crate::quantity::Kind;
    let volume = |u: Unit| matches!(u, Unit::Gallon(_) | Unit::Of(Kind::Volume | Kind::Mass, _));
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
