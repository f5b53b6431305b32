//! Figures and sentences as they stand on a page: true minus, units tied to their figures, Greek
//! letters where the trade writes them.

use crate::judge::Band;
use crate::quantity::kind::Unit;
use crate::quantity::show::{self, Toward, Units, in_unit, pretty_unit, unit_of};
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

/// A film is a few ten-thousandths of a millimetre: it is told in micrometres.
fn unit_for(amount: Amount, units: Units) -> &'static Unit {
    let small = amount.kind == Kind::Length && amount.base.abs() < 5e-5 && amount.base != 0.0;
    match Kind::Length.unit("um") {
        Some(um) if small => um,
        _ => unit_of(amount.kind, units),
    }
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

/// A margin in kelvins, rounded down.
pub(super) fn kelvins(value: f64) -> String {
    format!("{}{TIE}K", minus(&show::margin(value, 1)))
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
    let mut out = String::with_capacity(text.len() + 8);
    let words: Vec<&str> = text.split(' ').collect();
    for (i, word) in words.iter().enumerate() {
        let before = i.checked_sub(1).map_or("", |p| words[p]);
        let (core, tail) = trailing(word);
        let tied = is_figure(before) && is_unit(core);
        if i > 0 {
            out.push(if tied { TIE } else { ' ' });
        }
        if tied {
            out.push_str(&pretty_unit(core));
            out.push_str(tail);
        } else {
            let after = words.get(i + 1).copied().unwrap_or("");
            let bare = core.trim_start_matches('(');
            out.push_str(&core[..core.len() - bare.len()]);
            out.push_str(symbol(bare, before, after));
            out.push_str(tail);
        }
    }
    minus(&out)
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
        && Kind::ALL
            .iter()
            .any(|kind| kind.spec().units.iter().any(|u| u.name == word))
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
