//! Reads `75 degC`: a number, an optional space, a unit of the kind wanted.
//!
//! Accepts `°`, `µ`, `·`, `²`, a Unicode minus, a no-break space, exponents. Refuses everything
//! that could mean two things, each with its own [`Bad`].

use super::kind::{Amount, Kind, Unit};

/// A number read, with the unit it was written in.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Read {
    /// The number in base units, with its kind.
    pub amount: Amount,
    /// As written, before conversion.
    pub value: f64,
    /// The program's spelling of the unit written.
    pub unit: &'static str,
}

/// Why a text is not a quantity of the kind wanted.
#[derive(Clone, Debug, PartialEq, thiserror::Error)]
pub enum Bad {
    /// Nothing there.
    #[error("no value")]
    Empty,
    /// The text does not begin with a number.
    #[error("`{text}` does not begin with a number")]
    NotANumber {
        /// The text.
        text: String,
    },
    /// Infinite, or not a number at all.
    #[error("`{text}` is not a finite number")]
    NotFinite {
        /// The text.
        text: String,
    },
    /// A number alone where the unit decides.
    #[error("no unit")]
    NoUnit {
        /// The number as written.
        number: String,
    },
    /// `26,4`.
    #[error("decimal comma")]
    DecimalComma {
        /// The whole text with a point instead.
        instead: String,
    },
    /// `1,480`.
    #[error("comma in a number")]
    ThousandsComma {
        /// The whole text without the comma.
        instead: String,
    },
    /// Not a unit the program knows.
    #[error("unknown unit `{unit}`")]
    UnknownUnit {
        /// The unit as written.
        unit: String,
        /// The spelling it nearly is, of the kind wanted, where that is certain.
        nearest: Option<&'static str>,
        /// The number as written.
        number: String,
    },
    /// A unit of another kind.
    #[error("`{unit}` is {is}, {wanted} is wanted")]
    OtherKind {
        /// The unit as written.
        unit: String,
        /// What it measures, with its article.
        is: &'static str,
        /// What is wanted, with its article.
        wanted: &'static str,
        /// The kind it is.
        kind: Kind,
    },
    /// `degC` where a difference is wanted.
    #[error("this is a temperature, a temperature rise is wanted")]
    RiseNotTemperature {
        /// The number as written.
        number: String,
        /// The unit as written.
        unit: String,
    },
    /// `gal`: which?
    #[error("`gal` may be the US or the UK gallon")]
    WhichGallon {
        /// The number as written.
        number: String,
    },
    /// Physically impossible.
    #[error("{shown} is not possible for {noun}")]
    Impossible {
        /// The value as read.
        shown: String,
        /// What is wanted, with its article.
        noun: &'static str,
    },
}

/// Reads a quantity of one kind.
///
/// # Errors
/// One [`Bad`] for each way a text can fail to be that quantity.
pub fn parse(kind: Kind, text: &str) -> Result<Read, Bad> {
    let text = text.trim_matches(|c: char| c.is_whitespace() || c == '\u{a0}');
    if text.is_empty() {
        return Err(Bad::Empty);
    }
    let (number, rest) = split_number(text)?;
    let value = to_number(&number, text)?;
    let spelling = rest.trim_matches(|c: char| c.is_whitespace() || is_thin_space(c));
    if spelling.is_empty() {
        if kind.spec().bare {
            return checked(kind, value, &kind.spec().units[0]);
        }
        return Err(Bad::NoUnit { number });
    }
    match kind.unit(spelling) {
        Some(unit) => checked(kind, value, unit),
        None => Err(misfit(kind, &number, spelling)),
    }
}

fn is_thin_space(c: char) -> bool {
    matches!(c, '\u{a0}' | '\u{202f}' | '\u{2009}')
}

fn checked(kind: Kind, value: f64, unit: &'static Unit) -> Result<Read, Bad> {
    let base = unit.to_base(value);
    let spec = kind.spec();
    if !base.is_finite() || base < spec.possible.0 || base > spec.possible.1 {
        let shown = format!("{value} {}", unit.name).trim_end().to_owned();
        return Err(Bad::Impossible {
            shown,
            noun: spec.noun,
        });
    }
    Ok(Read {
        amount: Amount { kind, base },
        value,
        unit: unit.name,
    })
}

fn misfit(kind: Kind, number: &str, spelling: &str) -> Bad {
    if kind == Kind::Rise && Kind::Temperature.unit(spelling).is_some() {
        return Bad::RiseNotTemperature {
            number: number.to_owned(),
            unit: spelling.to_owned(),
        };
    }
    if matches!(kind, Kind::Volume | Kind::VolumePerYear) && spelling.starts_with("gal") {
        return Bad::WhichGallon {
            number: number.to_owned(),
        };
    }
    let other = Kind::ALL
        .iter()
        .find(|k| **k != kind && k.unit(spelling).is_some());
    match other {
        Some(other) => Bad::OtherKind {
            unit: spelling.to_owned(),
            is: other.spec().noun,
            wanted: kind.spec().noun,
            kind: *other,
        },
        None => Bad::UnknownUnit {
            unit: spelling.to_owned(),
            nearest: nearest(kind, spelling),
            number: number.to_owned(),
        },
    }
}

/// The one spelling of this kind that differs only in case or in punctuation.
fn nearest(kind: Kind, spelling: &str) -> Option<&'static str> {
    let plain = |s: &str| {
        s.chars()
            .filter(|c| c.is_alphanumeric() || *c == '/')
            .collect::<String>()
            .to_lowercase()
    };
    let wanted = plain(spelling);
    let mut hits = kind
        .spec()
        .units
        .iter()
        .filter(|u| {
            !u.name.is_empty()
                && (plain(u.name) == wanted || u.also.iter().any(|a| plain(a) == wanted))
        })
        .map(|u| u.name);
    let first = hits.next()?;
    hits.next().is_none().then_some(first)
}

/// Splits the longest number off the front; commas are kept so that they can be named.
fn split_number(text: &str) -> Result<(String, &str), Bad> {
    let mut number = String::new();
    let mut rest = text;
    let mut chars = text.char_indices().peekable();
    while let Some((at, c)) = chars.next() {
        let keep = match c {
            '0'..='9' | '.' | ',' => Some(c),
            '+' | '-' if number.is_empty() || number.ends_with(['e', 'E']) => Some(c),
            '\u{2212}' | '\u{2013}' if number.is_empty() || number.ends_with(['e', 'E']) => {
                Some('-')
            }
            'e' | 'E' if is_exponent(&number, &text[at + 1..]) => Some(c),
            c if is_thin_space(c) && follows_digits(&number, chars.peek().map(|p| p.1)) => {
                continue;
            }
            _ => None,
        };
        let Some(c) = keep else {
            rest = &text[at..];
            return finish(number, rest, text);
        };
        number.push(c);
    }
    if !number.is_empty() {
        rest = "";
    }
    finish(number, rest, text)
}

fn finish<'t>(number: String, rest: &'t str, text: &str) -> Result<(String, &'t str), Bad> {
    if number.chars().any(|c| c.is_ascii_digit()) {
        Ok((number, rest))
    } else if ["nan", "inf", "infinity"].iter().any(|w| {
        text.trim_start_matches(['-', '+'])
            .to_lowercase()
            .starts_with(w)
    }) {
        Err(Bad::NotFinite {
            text: text.to_owned(),
        })
    } else {
        Err(Bad::NotANumber {
            text: text.to_owned(),
        })
    }
}

fn is_exponent(number: &str, after: &str) -> bool {
    let digits = after.strip_prefix(['+', '-', '\u{2212}']).unwrap_or(after);
    number.ends_with(|c: char| c.is_ascii_digit() || c == '.')
        && digits.starts_with(|c: char| c.is_ascii_digit())
}

/// A narrow space groups thousands, as in `25 000` printed by the program itself.
fn follows_digits(number: &str, next: Option<char>) -> bool {
    number.ends_with(|c: char| c.is_ascii_digit()) && next.is_some_and(|c| c.is_ascii_digit())
}

fn to_number(number: &str, text: &str) -> Result<f64, Bad> {
    if number.contains(',') {
        return Err(comma(number, text));
    }
    let value: f64 = number.parse().map_err(|_| Bad::NotANumber {
        text: text.to_owned(),
    })?;
    if value.is_finite() {
        Ok(value)
    } else {
        Err(Bad::NotFinite {
            text: text.to_owned(),
        })
    }
}

fn comma(number: &str, text: &str) -> Bad {
    let decimals = number.rsplit(',').next().map_or(0, str::len);
    let groups = number.matches(',').count() > 1 || number.contains('.') || decimals == 3;
    let cleaned = if groups {
        number.replace(',', "")
    } else {
        number.replace(',', ".")
    };
    let instead = text.replacen(number, &cleaned, 1);
    if groups {
        Bad::ThousandsComma { instead }
    } else {
        Bad::DecimalComma { instead }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn base(kind: Kind, text: &str) -> f64 {
        parse(kind, text).map_or(f64::NAN, |r| r.amount.base)
    }

    #[test]
    fn reads_the_spellings_of_the_trade() {
        for (kind, text, want) in [
            (Kind::Temperature, "75 degC", 348.15),
            (Kind::Temperature, "75°C", 348.15),
            (Kind::Temperature, "167 F", 348.15),
            (Kind::Temperature, "\u{2212}18 degC", 255.15),
            (Kind::Force, "45kN", 45e3),
            (Kind::KinematicViscosity, "68 mm²/s", 68e-6),
            (Kind::KinematicViscosity, "68 mm^2/s", 68e-6),
            (Kind::KinematicViscosity, "2.2e1 cSt", 22e-6),
            (
                Kind::KinematicViscosity,
                "25\u{202f}000\u{202f}mm2/s",
                25e-3,
            ),
            (Kind::DynamicViscosity, "10 mPa·s", 0.01),
            (Kind::Volume, "15 gal(US)", 0.056_781_176_76),
            (Kind::Rise, "18 degF difference", 10.0),
            (Kind::Ratio, "24 %", 0.24),
            (Kind::Ratio, "0.7", 0.7),
        ] {
            let got = base(kind, text);
            assert!((got - want).abs() <= 1e-12 * want.abs(), "{text}: {got}");
        }
    }

    #[test]
    fn refuses_what_could_mean_two_things() {
        let bad = |kind, text: &str| parse(kind, text).expect_err("must be refused");
        assert_eq!(bad(Kind::Temperature, ""), Bad::Empty);
        assert!(matches!(
            bad(Kind::RotationalSpeed, "236"),
            Bad::NoUnit { .. }
        ));
        assert!(
            matches!(bad(Kind::Temperature, "75,5 degC"), Bad::DecimalComma { instead } if instead == "75.5 degC")
        );
        assert!(
            matches!(bad(Kind::RotationalSpeed, "1,480 rpm"), Bad::ThousandsComma { instead } if instead == "1480 rpm")
        );
        assert!(matches!(
            bad(Kind::KinematicViscosity, "NaN cSt"),
            Bad::NotFinite { .. }
        ));
        assert!(matches!(
            bad(Kind::KinematicViscosity, "1e999 cSt"),
            Bad::NotFinite { .. }
        ));
        assert!(matches!(
            bad(Kind::KinematicViscosity, "-5 cSt"),
            Bad::Impossible { .. }
        ));
        assert!(matches!(
            bad(Kind::Temperature, "-300 degC"),
            Bad::Impossible { .. }
        ));
        assert!(matches!(
            bad(Kind::Force, "45 KN"),
            Bad::UnknownUnit {
                nearest: Some("kN"),
                ..
            }
        ));
        assert!(matches!(
            bad(Kind::KinematicViscosity, "68 cst"),
            Bad::UnknownUnit {
                nearest: Some("mm2/s"),
                ..
            }
        ));
        assert!(matches!(
            bad(Kind::DynamicViscosity, "68 cSt"),
            Bad::OtherKind { .. }
        ));
        assert!(matches!(
            bad(Kind::DynamicViscosity, "10 MPa.s"),
            Bad::UnknownUnit {
                nearest: Some("mPa.s"),
                ..
            }
        ));
        assert!(matches!(
            bad(Kind::Rise, "42 degC"),
            Bad::RiseNotTemperature { .. }
        ));
        assert!(matches!(
            bad(Kind::Volume, "15 gal"),
            Bad::WhichGallon { .. }
        ));
        assert!(matches!(bad(Kind::Length, "fast"), Bad::NotANumber { .. }));
    }

    proptest::proptest! {
        #[test]
        fn never_panics(text in "\\PC{0,40}") {
            for kind in Kind::ALL {
                drop(parse(*kind, &text));
            }
        }
    }
}
