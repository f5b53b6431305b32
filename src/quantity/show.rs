//! Writes quantities. The only place that rounds, and always towards caution.

use super::kind::{Amount, Kind, Measure, Unit};
use crate::numeric::math::{lg, power_of_ten};

/// Which way a rounded figure may move.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Toward {
    /// To the nearest.
    Nearest,
    /// Down: margins, ceilings, hot ends of bands.
    Down,
    /// Up: floors, cold ends of bands.
    Up,
}

/// Which units the output uses.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Units {
    /// The SI units of the trade: mm2/s, degC, mm.
    #[default]
    Si,
    /// As customary in the United States where the kind has such a unit.
    Us,
}

/// The unit a kind is shown in.
pub fn unit_of(kind: Kind, units: Units) -> &'static Unit {
    let spec = kind.spec();
    match units {
        Units::Si => &spec.units[0],
        Units::Us => &spec.units[spec.us],
    }
}

/// The unit one figure is told in: that of its kind, or a smaller or larger sister where the kind's
/// own would bury the figure in zeros. A film is told in micrometres, a churning loss in watts, a
/// shot of grease in grams, a contact pressure in megapascals. Documents for machines keep
/// [`unit_of`].
pub fn unit_for(amount: Amount, units: Units) -> &'static Unit {
    let own = unit_of(amount.kind, units);
    let size = amount.base.abs();
    let sister = match (own.name, amount.kind) {
        ("mm", Kind::Length) if size < 5e-5 => "um",
        ("kW", Kind::Power) if size < 1e3 => "W",
        ("kg", Kind::Mass) if size < 1.0 => "g",
        ("bar", Kind::Pressure) if size >= 1e8 => "MPa",
        _ => return own,
    };
    if size > 0.0 {
        amount.kind.unit(sister).unwrap_or(own)
    } else {
        own
    }
}

/// A unit as printed for people: `mm²/s`, `°C`, `r/min`.
pub fn pretty_unit(name: &str) -> String {
    match name {
        "degC" => "°C".into(),
        "degF" => "°F".into(),
        "um" => "µm".into(),
        "degF difference" => "°F difference".into(),
        "deg" => "°".into(),
        _ => name
            .replace("m2", "m²")
            .replace("m3", "m³")
            .replace("Pa.s", "Pa·s")
            .replace("N.m", "N·m"),
    }
}

/// A number with so many significant digits, no exponent, thousands parted by a narrow space.
pub fn significant(value: f64, digits: i32, toward: Toward) -> String {
    if value == 0.0 || !value.is_finite() {
        return if value.is_finite() {
            "0".into()
        } else {
            "not finite".into()
        };
    }
    let order = lg(value.abs()).floor();
    #[expect(
        clippy::cast_possible_truncation,
        reason = "lg of a finite f64 is within ±324"
    )]
    let decimals = digits - 1 - order as i32;
    fixed(value, decimals, toward)
}

/// A number with so many decimals (negative: rounded to tens, hundreds), thousands parted.
pub fn fixed(value: f64, decimals: i32, toward: Toward) -> String {
    let rounded = round_to(value, decimals, toward);
    let places = usize::try_from(decimals.max(0)).unwrap_or(0);
    let text = format!("{:.*}", places, rounded.abs());
    let minus = rounded < 0.0 && text.chars().any(|c| c.is_ascii_digit() && c != '0');
    let grouped = group_thousands(&text);
    if minus {
        format!("-{grouped}")
    } else {
        grouped
    }
}

/// A number rounded to so many decimals; a value within 1e-9 of a step counts as on it.
pub fn round_to(value: f64, decimals: i32, toward: Toward) -> f64 {
    let scale = power_of_ten(f64::from(decimals));
    let scaled = value * scale;
    let nearest = scaled.round();
    let on_step = (scaled - nearest).abs() <= 1e-9 * scaled.abs().max(1.0);
    let rounded = match toward {
        _ if on_step => nearest,
        Toward::Nearest => nearest,
        Toward::Down => scaled.floor(),
        Toward::Up => scaled.ceil(),
    };
    rounded / scale
}

/// Narrow no-break space between groups of three, from five digits on.
fn group_thousands(text: &str) -> String {
    let (whole, part) = text
        .split_once('.')
        .map_or((text, None), |(w, p)| (w, Some(p)));
    let mut out = String::new();
    for (i, c) in whole.chars().enumerate() {
        if i > 0 && whole.len() > 4 && (whole.len() - i) % 3 == 0 {
            out.push('\u{202f}');
        }
        out.push(c);
    }
    if let Some(part) = part {
        out.push('.');
        out.push_str(part);
    }
    out
}

/// A quantity in the unit of its kind, three significant digits: `40.8 mm2/s`.
pub fn quantity(amount: Amount, units: Units, toward: Toward) -> String {
    let unit = unit_for(amount, units);
    in_unit(amount, unit, toward)
}

/// A quantity in a given unit, as many digits as its kind deserves.
pub fn in_unit(amount: Amount, unit: &Unit, toward: Toward) -> String {
    let value = amount.in_unit(unit);
    let number = match amount.kind {
        Kind::Temperature | Kind::Rise => trim_zero(&fixed(value, 1, toward)),
        Kind::RotationalSpeed | Kind::Force | Kind::Power | Kind::Density | Kind::Torque => {
            trim_zero(&significant(value, 4, toward))
        }
        Kind::VgStep => margin(value, 2),
        _ if is_short(value) => trim_zero(&significant(value, 4, Toward::Nearest)),
        _ => trim_zero(&significant(value, 3, toward)),
    };
    if unit.name.is_empty() {
        number
    } else {
        format!("{number} {}", unit.name)
    }
}

/// Whether a value is written in full with four digits: a stated 1725 stays 1725.
fn is_short(value: f64) -> bool {
    if value == 0.0 || !value.is_finite() {
        return true;
    }
    #[expect(
        clippy::cast_possible_truncation,
        reason = "lg of a finite f64 is within ±324"
    )]
    let decimals = 3 - lg(value.abs()).floor() as i32;
    let rounded = round_to(value, decimals, Toward::Nearest);
    (rounded - value).abs() <= 1e-12 * value.abs()
}

/// The same with the unit as people print it: `40.8 mm²/s`.
pub fn pretty(amount: Amount, units: Units, toward: Toward) -> String {
    let unit = unit_for(amount, units);
    let text = in_unit(amount, unit, toward);
    let number = text.strip_suffix(unit.name).unwrap_or(&text).trim_end();
    let number = number.replace('-', "\u{2212}");
    if unit.name.is_empty() {
        number
    } else {
        format!("{number}\u{202f}{}", pretty_unit(unit.name))
    }
}

/// The number of a typed quantity in the unit of its kind, unrounded.
pub fn value<Q: Measure>(quantity: Q, units: Units) -> f64 {
    quantity.amount().in_unit(unit_of(Q::KIND, units))
}

/// A margin with its sign, rounded down: `+0.67`, `-0.30`. Zero is `+0.00`.
pub fn margin(steps: f64, decimals: i32) -> String {
    let steps = if steps.abs() < 1e-9 { 0.0 } else { steps };
    let rounded = round_to(steps, decimals, Toward::Down);
    let places = usize::try_from(decimals.max(0)).unwrap_or(0);
    if rounded < 0.0 {
        format!("-{:.*}", places, -rounded)
    } else {
        format!("+{rounded:.places$}")
    }
}

fn trim_zero(text: &str) -> String {
    if text.contains('.') {
        text.trim_end_matches('0').trim_end_matches('.').to_owned()
    } else {
        text.to_owned()
    }
}

/// A number for JSON and CSV: fifteen significant digits, which drops the noise of unit
/// conversion and nothing else.
pub fn exact(value: f64) -> f64 {
    format!("{value:.14e}").parse().unwrap_or(value)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{celsius, mm2_s};

    #[test]
    fn small_figures_are_told_in_a_small_unit() {
        let told = |kind, base| quantity(Amount { kind, base }, Units::Si, Toward::Nearest);
        assert_eq!(told(Kind::Length, 1.4e-5), "14 um");
        assert_eq!(told(Kind::Length, 8e-5), "0.08 mm");
        assert_eq!(told(Kind::Length, 0.0), "0 mm");
        assert_eq!(told(Kind::Power, 26.89), "26.89 W");
        assert_eq!(told(Kind::Power, 1500.0), "1.5 kW");
        assert_eq!(told(Kind::Mass, 0.0125), "12.5 g");
        assert_eq!(told(Kind::Mass, 1.25), "1.25 kg");
        assert_eq!(told(Kind::Pressure, 1.0e9), "1000 MPa");
        assert_eq!(told(Kind::Pressure, 2e5), "2 bar");
    }

    #[test]
    fn rounds_towards_caution() {
        assert_eq!(significant(40.797, 3, Toward::Up), "40.8");
        assert_eq!(significant(40.713, 3, Toward::Up), "40.8");
        assert_eq!(significant(40.797, 3, Toward::Down), "40.7");
        assert_eq!(significant(25_000.0, 3, Toward::Down), "25\u{202f}000");
        assert_eq!(margin(0.676, 2), "+0.67");
        assert_eq!(margin(-0.291, 2), "-0.30");
        assert_eq!(margin(-0.004, 1), "-0.1");
        assert_eq!(margin(1e-12, 1), "+0.0");
        assert_eq!(margin(0.499_999, 1), "+0.4");
        assert_eq!(fixed(-0.04, 1, Toward::Nearest), "0.0");
    }

    #[test]
    fn shows_what_people_write() {
        let t = celsius(78.0).amount();
        assert_eq!(quantity(t, Units::Si, Toward::Nearest), "78 degC");
        assert_eq!(quantity(t, Units::Us, Toward::Nearest), "172.4 degF");
        assert_eq!(
            pretty(mm2_s(40.797).amount(), Units::Si, Toward::Up),
            "40.8\u{202f}mm²/s"
        );
        assert!((exact(mm2_s(68.0).base() * 1e6) - 68.0).abs() < f64::EPSILON);
    }

    proptest::proptest! {
        #[test]
        fn shown_is_read_again(v in 1e-3_f64..1e6) {
            for kind in Kind::ALL {
                if matches!(kind, Kind::VgStep | Kind::HoursPerYear | Kind::Density | Kind::Rise) { continue; }
                let unit = unit_of(*kind, Units::Si);
                let base = unit.to_base(v);
                if base > kind.spec().possible.1 || base < kind.spec().possible.0 { continue; }
                let text = in_unit(Amount { kind: *kind, base }, unit, Toward::Nearest);
                let again = crate::quantity::parse::parse(*kind, &text);
                if *kind == Kind::Temperature && v < 0.1 { continue; }
                match again {
                    Ok(r) => proptest::prop_assert!((r.value - v).abs() <= 0.006 * v.abs() + 0.051, "{text}"),
                    // a speed or a length may round to nothing only below the digits shown
                    Err(e) => proptest::prop_assert!(false, "{text}: {e}"),
                }
            }
        }
    }
}
