//! Figures and sentences as they stand on a page: true minus, units tied to their figures, Greek
//! letters where the trade writes them.

use crate::judge::Band;
use crate::quantity::kind::Unit;
use crate::quantity::show::{self, Toward, Units, in_unit, pretty_unit, unit_for, unit_of};
use crate::quantity::{Amount, Kind, KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::report::model::{Degrees, minus};

/// Narrow no-break space between a figure and its unit.
const TIE: char = '\u{202f}';

/// The scale temperatures are drawn in.
pub(super) fn degrees(units: Units) -> Degrees {
    match units {
        Units::Si => Degrees::Celsius,
        Units::Us => Degrees::Fahrenheit,
    }
}

/// Kelvins as °C, for drawings.
pub(super) fn celsius(kelvins: f64) -> f64 {
    unit_of(Kind::Temperature, Units::Si).from_base(kelvins)
}

/// m²/s as mm²/s, for drawings.
pub(super) fn mm2_s(base: f64) -> f64 {
    unit_of(Kind::KinematicViscosity, Units::Si).from_base(base)
}

/// The figure and the unit of a quantity.
pub(super) fn parts(amount: Amount, units: Units, toward: Toward) -> (String, String) {
    let unit = unit_for(amount, units);
    let text = in_unit(amount, unit, toward);
    let figure = text.strip_suffix(unit.name).unwrap_or(&text).trim_end();
    (minus(figure), pretty_unit(unit.name))
}

/// A quantity with its unit.
pub(super) fn amount(amount: Amount, units: Units, toward: Toward) -> String {
    let (figure, unit) = parts(amount, units, toward);
    if unit.is_empty() {
        figure
    } else {
        format!("{figure}{TIE}{unit}")
    }
}

/// A temperature of so many kelvins.
pub(super) fn temperature(kelvins: f64, units: Units) -> String {
    amount(at(kelvins), units, Toward::Nearest)
}

/// A temperature of so many kelvins without its unit.
pub(super) fn temperature_figure(kelvins: f64, units: Units) -> String {
    parts(at(kelvins), units, Toward::Nearest).0
}

fn at(kelvins: f64) -> Amount {
    ThermodynamicTemperature::from_base(kelvins).amount()
}

/// A viscosity of so many m²/s.
pub(super) fn viscosity(base: f64, units: Units, toward: Toward) -> String {
    amount(nu(base), units, toward)
}

/// A viscosity of so many m²/s without its unit.
pub(super) fn viscosity_figure(base: f64, units: Units, toward: Toward) -> String {
    parts(nu(base), units, toward).0
}

fn nu(base: f64) -> Amount {
    KinematicViscosity::from_base(base).amount()
}

/// A margin in VG steps, rounded down.
pub(super) fn steps(value: f64, decimals: i32) -> String {
    minus(&show::margin(value, decimals))
}

/// A margin in kelvins, or in the degrees of the output, rounded down.
pub(super) fn kelvins(value: f64, units: Units) -> String {
    let figure = minus(&show::margin(
        unit_of(Kind::Rise, units).from_base(value),
        1,
    ));
    format!("{figure}{TIE}{}", difference(units))
}

/// How far something is short, in kelvins or in the degrees of the output, rounded up.
pub(super) fn shortfall(kelvins: f64, units: Units) -> String {
    let short = unit_of(Kind::Rise, units).from_base(kelvins);
    show::fixed(short, 0, Toward::Up)
}

/// The unit of a difference of temperatures where the words around say that it is one.
pub(super) fn difference(units: Units) -> String {
    let unit = unit_of(Kind::Rise, units);
    pretty_unit(unit.name.trim_end_matches(" difference"))
}

/// A band in words, its ends rounded inwards.
pub(super) fn band(band: Band, degrees: Degrees) -> String {
    if band.is_nowhere() {
        return "nowhere".to_owned();
    }
    let unit = degrees.unit();
    let low = band.low_end().map(|t| degrees.figure_up(celsius(t)));
    let high = band.high_end().map(|t| degrees.figure_down(celsius(t)));
    match (low, high) {
        (Some(low), Some(high)) => format!("{low} to {high}{TIE}{unit}"),
        (Some(low), None) => format!("from {low}{TIE}{unit} up"),
        (None, Some(high)) => format!("up to {high}{TIE}{unit}"),
        (None, None) => "not limited".to_owned(),
    }
}

/// A number of things in words: `two machines`, `14 machines`.
pub(super) fn count(n: usize, one: &str, many: &str) -> String {
    format!("{} {}", number(n), if n == 1 { one } else { many })
}

/// A small number in words.
pub(super) fn number(n: usize) -> String {
    const WORDS: [&str; 13] = [
        "no", "one", "two", "three", "four", "five", "six", "seven", "eight", "nine", "ten",
        "eleven", "twelve",
    ];
    WORDS
        .get(n)
        .map_or_else(|| n.to_string(), |w| (*w).to_owned())
}

/// The text with a capital first letter.
pub(super) fn sentence(text: &str) -> String {
    let mut letters = text.chars();
    letters.next().map_or_else(String::new, |first| {
        first.to_uppercase().chain(letters).collect()
    })
}

/// The text with a full stop at its end.
pub(super) fn stopped(text: &str) -> String {
    let text = text.trim_end();
    if text.ends_with(['.', '?', ':']) || text.is_empty() {
        text.to_owned()
    } else {
        format!("{text}.")
    }
}

/// A list in words: `a, b and c`.
pub(super) fn list(items: &[String]) -> String {
    match items {
        [] => String::new(),
        [one] => one.clone(),
        [first @ .., last] => format!("{} and {last}", first.join(", ")),
    }
}

/// A sentence of the program's own, set for the page: `kappa >= 1 at 78 degC` becomes
/// `κ ≥ 1 at 78 °C` with the figure tied to its unit.
pub(super) fn set(text: &str) -> String {
    told(text, Units::Si)
}

/// The same in the units of the output: a figure whose unit is another there is converted, and so
/// is the other end of its range.
pub(super) fn told(text: &str, units: Units) -> String {
    let words: Vec<&str> = text.split(' ').collect();
    let mut set: Vec<String> = Vec::with_capacity(words.len());
    // whether a word stands tied to the one before it
    let mut tied: Vec<bool> = Vec::with_capacity(words.len());
    for (i, word) in words.iter().enumerate() {
        let before = i.checked_sub(1).map_or("", |p| words[p]);
        let (core, tail) = trailing(word);
        let unit = is_figure(before) && is_unit(core);
        tied.push(unit);
        if unit {
            let unit = convert(&words, i, core, units, &mut set);
            set.push(format!("{unit}{tail}"));
        } else {
            let after = words.get(i + 1).copied().unwrap_or("");
            let bare = core.trim_start_matches('(');
            let open = &core[..core.len() - bare.len()];
            set.push(format!("{open}{}{tail}", symbol(bare, before, after)));
        }
    }
    let mut out = String::with_capacity(text.len() + 8);
    for (i, (word, tied)) in set.iter().zip(tied).enumerate() {
        if i > 0 {
            out.push(if tied { TIE } else { ' ' });
        }
        out.push_str(word);
    }
    minus(&out)
}

/// The unit a figure is told in; the figure before it, and the one at the other end of a range,
/// are put into that unit where it is another than the one written.
fn convert(words: &[&str], at: usize, unit: &str, units: Units, set: &mut [String]) -> String {
    let (Units::Us, Some((kind, from))) = (units, unit_called(unit)) else {
        return pretty_unit(unit);
    };
    let to = unit_of(kind, units);
    if to.name == from.name {
        return pretty_unit(unit);
    }
    let mut places = vec![at - 1];
    let between = at.checked_sub(2).map_or("", |i| words[i]);
    if ["to", "..", "x", "and"].contains(&between) && at >= 3 && is_figure(words[at - 3]) {
        places.push(at - 3);
    }
    for place in places {
        let (text, digits) = (words[place], words[place].trim_start_matches('('));
        let open = &text[..text.len() - digits.len()];
        let plain = digits.replace(['\u{202f}'], "").replace('\u{2212}', "-");
        let Ok(value) = plain.parse::<f64>() else {
            return pretty_unit(unit);
        };
        let converted = to.from_base(from.to_base(value));
        let figure = match kind {
            Kind::Temperature | Kind::Rise => {
                let decimals = i32::from(plain.contains('.'));
                show::fixed(converted, decimals, Toward::Nearest)
            }
            _ => show::significant(converted, 3, Toward::Nearest),
        };
        set[place] = format!("{open}{figure}");
    }
    // a difference reads as one from the words around it
    pretty_unit(to.name.trim_end_matches(" difference"))
}

/// The unit of that name, and what it measures. Kelvins in a sentence are a difference.
fn unit_called(name: &str) -> Option<(Kind, &'static Unit)> {
    let first = if name == "K" {
        Kind::Rise
    } else {
        Kind::Temperature
    };
    std::iter::once(&first).chain(Kind::ALL).find_map(|kind| {
        let found = kind.spec().units.iter().find(|u| u.name == name)?;
        Some((*kind, found))
    })
}

/// A word and the punctuation behind it.
fn trailing(word: &str) -> (&str, &str) {
    let core = word.trim_end_matches([',', '.', ';', ':', ')', '?']);
    (core, &word[core.len()..])
}

fn is_figure(word: &str) -> bool {
    let word = word.trim_start_matches(['(', '-', '\u{2212}', '+']);
    !word.is_empty()
        && word
            .chars()
            .all(|c| c.is_ascii_digit() || matches!(c, '.' | TIE))
}

fn is_unit(word: &str) -> bool {
    word.starts_with(|c: char| c.is_ascii_alphabetic() || matches!(c, '1' | '%'))
        && unit_called(word).is_some()
}

/// Signs and Greek letters, where the words around show that they are meant.
fn symbol<'w>(word: &'w str, before: &str, after: &str) -> &'w str {
    let compared = matches!(after, ">=" | "<=" | "=") || before == "ratio";
    match word {
        ">=" => "≥",
        "<=" => "≤",
        "degC" => "°C",
        "degF" => "°F",
        "mm2/s" => "mm²/s",
        "kappa" if compared => "κ",
        "lambda" if compared => "λ",
        _ => word,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn sentences_are_set_for_the_page() {
        assert_eq!(
            set("too thick at -12 degC: 12\u{202f}500 mm2/s, at most 1725 mm2/s (kappa >= 1)"),
            "too thick at −12\u{202f}°C: 12\u{202f}500\u{202f}mm²/s, at most 1725\u{202f}mm²/s (κ ≥ 1)"
        );
        assert_eq!(
            set("kappa mill, bay 3 m east"),
            "kappa mill, bay 3\u{202f}m east"
        );
    }

    #[test]
    fn sentences_follow_the_units_of_the_output() {
        let us = |text: &str| told(text, Units::Us);
        assert_eq!(
            us("too thin at 85 degC: 9.31 mm2/s"),
            "too thin at 185\u{202f}°F: 9.31\u{202f}mm²/s"
        );
        assert_eq!(
            us("start at least 10 K above the pour point"),
            "start at least 18\u{202f}°F above the pour point"
        );
        assert_eq!(us("ambient -10 .. 35 degC"), "ambient 14 .. 95\u{202f}°F");
        assert_eq!(us("(-40 degC)"), "(−40\u{202f}°F)");
        assert_eq!(
            us("from 5 K and 10 K to 60 degC: 3 to 8 K"),
            "from 9\u{202f}°F and 18\u{202f}°F to 140\u{202f}°F: 5 to 14\u{202f}°F"
        );
        assert_eq!(set("ambient -10 .. 35 degC"), "ambient −10 .. 35\u{202f}°C");
    }

    #[test]
    fn films_are_told_in_micrometres() {
        let film = Amount {
            kind: Kind::Length,
            base: 0.118e-6,
        };
        assert_eq!(amount(film, Units::Si, Toward::Nearest), "0.118\u{202f}µm");
    }

    #[test]
    fn words_for_numbers_and_lists() {
        assert_eq!(count(1, "oil", "oils"), "one oil");
        assert_eq!(count(14, "oil", "oils"), "14 oils");
        assert_eq!(list(&["a".into(), "b".into(), "c".into()]), "a, b and c");
        assert_eq!(stopped("does it?"), "does it?");
    }
}
