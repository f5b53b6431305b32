//! Units as registers spell them.

use crate::quantity::Kind;

/// A unit found.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Unit {
    /// A unit of a kind, in the program's spelling.
    Of(Kind, &'static str),
    /// A gallon, or a part of it, of which nobody said whether US or UK.
    Gallon(Part),
}

/// What of a gallon.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Part {
    /// The whole.
    Whole,
    /// A quart, the fourth part.
    Quart,
    /// A pint, the eighth part.
    Pint,
}

impl Part {
    /// Its sign.
    pub const fn sign(self) -> &'static str {
        match self {
            Self::Whole => "gal",
            Self::Quart => "qt",
            Self::Pint => "pt",
        }
    }

    /// How many make a gallon.
    pub const fn in_a_gallon(self) -> f64 {
        match self {
            Self::Whole => 1.0,
            Self::Quart => 4.0,
            Self::Pint => 8.0,
        }
    }
}

fn of_gallon(lower: &str) -> Option<Part> {
    Some(match lower {
        "gal" | "gals" | "gallon" | "gallons" => Part::Whole,
        "qt" | "qts" | "quart" | "quarts" => Part::Quart,
        "pt" | "pts" | "pint" | "pints" => Part::Pint,
        _ => return None,
    })
}

/// Spellings of registers beside those of the reader, in lower case.
const ALSO: &[(&str, Kind, &str)] = &[
    ("degc", Kind::Temperature, "degC"),
    ("deg. c", Kind::Temperature, "degC"),
    ("celsius", Kind::Temperature, "degC"),
    ("grad c", Kind::Temperature, "degC"),
    ("degf", Kind::Temperature, "degF"),
    ("deg. f", Kind::Temperature, "degF"),
    ("fahrenheit", Kind::Temperature, "degF"),
    ("ltr", Kind::Volume, "L"),
    ("ltrs", Kind::Volume, "L"),
    ("lit", Kind::Volume, "L"),
    ("liter", Kind::Volume, "L"),
    ("liters", Kind::Volume, "L"),
    ("litres", Kind::Volume, "L"),
    ("us gal", Kind::Volume, "gal(US)"),
    ("us gallon", Kind::Volume, "gal(US)"),
    ("us gallons", Kind::Volume, "gal(US)"),
    ("usg", Kind::Volume, "gal(US)"),
    ("gal us", Kind::Volume, "gal(US)"),
    ("gal (us)", Kind::Volume, "gal(US)"),
    ("imp gal", Kind::Volume, "gal(UK)"),
    ("imp. gal", Kind::Volume, "gal(UK)"),
    ("imperial gallons", Kind::Volume, "gal(UK)"),
    ("imperial gallon", Kind::Volume, "gal(UK)"),
    ("uk gallons", Kind::Volume, "gal(UK)"),
    ("gal uk", Kind::Volume, "gal(UK)"),
    ("gal (uk)", Kind::Volume, "gal(UK)"),
    ("kgs", Kind::Mass, "kg"),
    ("lbs", Kind::Mass, "lb"),
    ("gr", Kind::Mass, "g"),
    ("grams", Kind::Mass, "g"),
    ("u/min", Kind::RotationalSpeed, "r/min"),
    ("min^-1", Kind::RotationalSpeed, "r/min"),
    ("revs/min", Kind::RotationalSpeed, "r/min"),
    ("kilowatt", Kind::Power, "kW"),
    ("barg", Kind::Pressure, "bar"),
    ("bar(g)", Kind::Pressure, "bar"),
    ("psig", Kind::Pressure, "psi"),
    ("inches", Kind::Length, "in"),
    ("\"", Kind::Length, "in"),
    ("centistokes", Kind::KinematicViscosity, "mm2/s"),
    ("saybolt", Kind::Efflux, "SUS"),
    ("engler", Kind::Efflux, "degE"),
    ("hrs", Kind::Time, "h"),
    ("hr", Kind::Time, "h"),
    ("l/yr", Kind::VolumePerYear, "L a year"),
    ("l/y", Kind::VolumePerYear, "L a year"),
    ("l per year", Kind::VolumePerYear, "L a year"),
    ("litres/year", Kind::VolumePerYear, "L a year"),
    ("h/yr", Kind::HoursPerYear, "h a year"),
    ("hours/year", Kind::HoursPerYear, "h a year"),
    ("h per year", Kind::HoursPerYear, "h a year"),
];

/// The unit a text spells, of one of the kinds wanted first, else of any.
pub fn unit(text: &str, wanted: &[Kind]) -> Option<Unit> {
    let text = text.trim().trim_end_matches('.').trim();
    if text.is_empty() {
        return None;
    }
    let lower = text.to_lowercase();
    // A degree sign alone tells no scale; only where an angle is wanted is it one.
    if matches!(lower.as_str(), "\u{b0}" | "deg") && !wanted.contains(&Kind::Angle) {
        return None;
    }
    if let Some(part) = of_gallon(&lower) {
        return Some(Unit::Gallon(part));
    }
    let of = |kinds: &[Kind]| kinds.iter().find_map(|k| spelt(*k, text, &lower));
    of(wanted).or_else(|| of(Kind::ALL))
}

fn spelt(kind: Kind, text: &str, lower: &str) -> Option<Unit> {
    if let Some(unit) = kind.unit(text) {
        return Some(Unit::Of(kind, unit.name));
    }
    if let Some((_, _, name)) = ALSO.iter().find(|(s, k, _)| *k == kind && *s == lower) {
        return Some(Unit::Of(kind, name));
    }
    // Case decides between prefixes: mN is no MN.
    let fits = |s: &&str| s.len() > 1 && s.to_lowercase() == lower && !prefixed(s);
    let spec = kind.spec();
    let found = spec
        .units
        .iter()
        .find(|u| std::iter::once(&u.name).chain(u.also).any(&fits));
    found.map(|u| Unit::Of(kind, u.name))
}

/// Whether a unit begins with a prefix that case tells from another.
fn prefixed(unit: &str) -> bool {
    unit.starts_with("MN")
        || unit.starts_with("MW")
        || unit.starts_with("MPa")
        || unit.starts_with("mPa")
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn spellings_of_registers_are_known() {
        let of = |text, kind| unit(text, &[kind]);
        assert_eq!(of("l", Kind::Volume), Some(Unit::Of(Kind::Volume, "L")));
        assert_eq!(of("gal", Kind::Volume), Some(Unit::Gallon(Part::Whole)));
        assert_eq!(of("pints", Kind::Volume), Some(Unit::Gallon(Part::Pint)));
        assert_eq!(
            of("US gal", Kind::Volume),
            Some(Unit::Of(Kind::Volume, "gal(US)"))
        );
        assert_eq!(
            of("RPM", Kind::RotationalSpeed),
            Some(Unit::Of(Kind::RotationalSpeed, "r/min"))
        );
        assert_eq!(
            of("°F", Kind::Temperature),
            Some(Unit::Of(Kind::Temperature, "degF"))
        );
        // a mass where a volume is wanted is still told as what it is
        assert_eq!(of("kg", Kind::Volume), Some(Unit::Of(Kind::Mass, "kg")));
        assert_eq!(of("MN", Kind::Force), Some(Unit::Of(Kind::Force, "MN")));
        assert_eq!(of("mn", Kind::Force), None);
        assert_eq!(of("plate", Kind::Volume), None);
    }
}
