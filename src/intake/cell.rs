//! What a cell says of a key: a value for the draft, a question, or why it was not understood.

mod volumes;

use super::number::{self, Decimal, Read};
use super::parsed::{Parsed, Placeholder, parse, placeholder};
use super::units::Unit;
use super::yaml;
use crate::input::value::Want;
use crate::quantity::Kind;
use crate::quantity::show::{Toward, significant};
use crate::table::Content;
use volumes::{gallons, range, weighed};

/// How the cells of a file are read.
#[derive(Clone, Copy, Debug)]
pub struct Rules {
    /// The rule of decimals, found or stated.
    pub decimal: Option<Decimal>,
    /// Which gallon, where stated: `gal(US)` or `gal(UK)`.
    pub gallon: Option<&'static str>,
    /// Density by which a mass of oil becomes a volume, kg/m3.
    pub density_kg_m3: f64,
}

/// What a column is expected to hold.
#[derive(Clone, Copy, Debug)]
pub struct Expect<'a> {
    /// The key.
    pub key: &'a str,
    /// The quantity the key takes.
    pub want: &'a Want,
    /// The unit of the column, in the program's spelling.
    pub unit: Option<Unit>,
    /// Whether the row is greased: a mass is then a mass.
    pub grease: bool,
}

/// A cell read.
#[expect(
    clippy::struct_excessive_bools,
    reason = "each is one thing a cell may say"
)]
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Reading {
    /// What to write behind the key, without whose word it is.
    pub value: Option<String>,
    /// Whether the value rests on an assumption.
    pub assumed: bool,
    /// Remark behind the value.
    pub remark: Option<String>,
    /// What it was read as.
    pub read_as: Option<String>,
    /// A question to whoever keeps the register.
    pub ask: Option<String>,
    /// Why it was not understood.
    pub fault: Option<String>,
    /// Whether nothing is there.
    pub missing: bool,
    /// Whether the unit was assumed.
    pub unitless: bool,
    /// Whether the value holds for each of several machines.
    pub each: bool,
    /// Values it may be, in base units, with how they are written.
    pub candidates: Vec<(String, f64)>,
}

impl Reading {
    /// Nothing there.
    pub fn missing() -> Self {
        Self {
            missing: true,
            ..Self::default()
        }
    }

    /// Not understood.
    pub fn fault(why: impl Into<String>) -> Self {
        Self {
            fault: Some(why.into()),
            missing: true,
            ..Self::default()
        }
    }

    /// The value with whose word it is, as the draft writes it.
    pub fn written(&self, text: &str) -> Option<String> {
        let value = self.value.as_ref()?;
        if value.starts_with("unknown") {
            return Some(value.clone());
        }
        let whose = if self.assumed { "assumed" } else { "register" };
        let same = self.remark.is_none() && value == text.trim();
        let remark = self
            .remark
            .clone()
            .unwrap_or_else(|| text.trim().to_owned());
        Some(if same {
            format!("{value}, {whose}")
        } else {
            format!("{value}, {whose} {}", yaml::remark(&remark))
        })
    }
}

/// What stands in a cell as text.
///
/// # Errors
/// Why nothing can be read from it: a formula without a value, a fault of the spreadsheet.
pub fn text_of(content: &Content) -> Result<String, String> {
    match content {
        Content::NoValue { formula } => Err(format!(
            "the formula {formula} has no stored value; open the workbook in a spreadsheet program, let it calculate, save it"
        )),
        Content::Fault(fault) => Err(format!(
            "the spreadsheet itself could not work it out: {fault}"
        )),
        other => Ok(other.text()),
    }
}

/// Temperatures of a key that can be, degC.
fn plausible(key: &str) -> Option<(f64, f64)> {
    Some(match key {
        "sump" => (-20.0, 130.0),
        "start" | "ambient" | "ambient low" | "ambient high" | "at ambient" => (-60.0, 80.0),
        "heater" => (-40.0, 100.0),
        "pour point" | "cloud point" => (-90.0, 60.0),
        "flash point" | "dropping point" => (60.0, 400.0),
        "oil limit" => (40.0, 350.0),
        _ => return None,
    })
}

/// Whether a zero of the key may be meant.
fn zero_counts(key: &str) -> bool {
    matches!(
        key,
        "start"
            | "ambient"
            | "ambient low"
            | "ambient high"
            | "at ambient"
            | "pour point"
            | "cloud point"
    ) || key.ends_with("helix")
        || key.ends_with("contact angle")
}

/// The unit a bare number is taken in where the column names none.
fn usual(kinds: &[Kind], grease: bool, number: &str) -> Option<&'static str> {
    Some(match kinds.first()? {
        Kind::Volume if grease && kinds.contains(&Kind::Mass) => "g",
        Kind::Force | Kind::Efflux | Kind::LoadPerLength => return None,
        Kind::Density => {
            if number.parse::<f64>().is_ok_and(|v| v < 10.0) {
                "g/cm3"
            } else {
                "kg/m3"
            }
        }
        kind => kind.spec().units[0].name,
    })
}

/// Reads the cell of a quantity.
pub fn quantity(content: &Content, expect: &Expect<'_>, rules: &Rules) -> Reading {
    let text = match text_of(content) {
        Ok(text) => text,
        Err(why) => return Reading::fault(why),
    };
    if let Content::Date(_) | Content::Truth(_) = content {
        return Reading::fault(format!(
            "{} found, {} is wanted",
            kind_of(content),
            expect.want.noun()
        ));
    }
    match placeholder(&text, !zero_counts(expect.key)) {
        Some(Placeholder::Nothing) => return Reading::missing(),
        Some(Placeholder::Number) => {
            return Reading {
                read_as: Some("taken as not known".into()),
                ..Reading::missing()
            };
        }
        Some(Placeholder::Elsewhere) => return Reading::fault("unknown; it stands elsewhere"),
        None => {}
    }
    let Some(parsed) = parse(&text, expect.want.kinds) else {
        return Reading::fault(format!("{} is wanted", expect.want.noun()));
    };
    // 999 stands for nothing known whatever unit a number format prints behind it; so does 0, but
    // for a temperature that says its scale.
    let scale = parsed.unit.is_some() && expect.want.kinds.contains(&Kind::Temperature);
    let alone = parsed.second.is_none() && parsed.bound.is_none();
    let none = placeholder(&parsed.number, !scale && !zero_counts(expect.key));
    if alone && none == Some(Placeholder::Number) {
        return Reading {
            read_as: Some("taken as not known".into()),
            ..Reading::missing()
        };
    }
    conclude(&parsed, expect, rules)
}

fn kind_of(content: &Content) -> &'static str {
    match content {
        Content::Date(_) => "a date",
        Content::Truth(_) => "yes or no",
        _ => "text",
    }
}

fn conclude(parsed: &Parsed, expect: &Expect<'_>, rules: &Rules) -> Reading {
    if let Some(why) = elsewhere_measured(expect.key, parsed.remark.as_deref()) {
        return why;
    }
    let number = |token: &str| match number::read(token, rules.decimal) {
        Read::Is(number) => Ok(number),
        Read::Either(a, b) => Err(format!(
            "{a} or {b}? No other cell tells decimal point from comma; state it with --decimal"
        )),
    };
    let first = match number(&parsed.number) {
        Ok(n) => n,
        Err(why) => return Reading::fault(why),
    };
    let second = match parsed.second.as_deref().map(number).transpose() {
        Ok(n) => n,
        Err(why) => return Reading::fault(why),
    };
    let mut reading = in_unit(parsed, expect, rules, (first, second));
    reading.each = parsed.each;
    if reading.value.is_some() && (parsed.doubtful || parsed.about) {
        reading.assumed = true;
        if parsed.doubtful {
            reading
                .ask
                .get_or_insert("the register puts a question mark behind it".into());
        }
    }
    reading
}

/// A temperature of something that is not the oil.
fn elsewhere_measured(key: &str, remark: Option<&str>) -> Option<Reading> {
    let remark = remark?.to_lowercase();
    let place = [
        "discharge",
        "disch",
        "housing",
        "surface",
        "casing",
        "room",
        "bearing",
        "inlet air",
        "ambient",
        "water",
        "gas",
        "shell",
        "skin",
        "gehäuse",
        "druckseite",
        "raum",
    ]
    .into_iter()
    .find(|p| remark.contains(p))?;
    let place = match place {
        "disch" | "druckseite" => "discharge",
        "gehäuse" => "housing",
        "raum" => "room",
        place => place,
    };
    (key == "sump").then(|| Reading {
        ask: Some(format!(
            "the {place} temperature is given; which is that of the oil?"
        )),
        ..Reading::fault(format!(
            "it is the {place} temperature, that of the oil is wanted"
        ))
    })
}

/// The number or numbers in the unit of the cell, of the column, or the usual one.
fn in_unit(
    parsed: &Parsed,
    expect: &Expect<'_>,
    rules: &Rules,
    (first, second): (String, Option<String>),
) -> Reading {
    let kinds = expect.want.kinds;
    let degree_alone = parsed
        .strange
        .as_deref()
        .is_some_and(|s| matches!(s, "°" | "º" | "deg" | "o"))
        && kinds.contains(&Kind::Temperature);
    if let Some(strange) = &parsed.strange
        && !degree_alone
    {
        return Reading::fault(format!(
            "\"{strange}\" is no unit of {}",
            expect.want.noun()
        ));
    }
    let from_column = parsed.unit.is_none();
    let unit = match parsed.unit.or(expect.unit) {
        Some(Unit::Gallon(part)) => {
            return gallons(expect, rules, part, (&first, second.as_deref()));
        }
        Some(Unit::Of(kind, unit)) if kinds.contains(&kind) => Some((kind, unit)),
        Some(Unit::Of(kind, unit)) if same_dimension(kind, kinds) => {
            Some((kinds[0], respelt(kind, unit)))
        }
        Some(Unit::Of(kind, unit)) => {
            return Reading::fault(format!(
                "{unit} is {}, {} is wanted",
                kind.spec().noun,
                expect.want.noun()
            ));
        }
        None => None,
    };
    match unit {
        Some((Kind::Mass, unit)) if kinds[0] == Kind::Volume && !expect.grease => {
            weighed(expect, rules, &first, unit)
        }
        Some((kind, unit)) => stated(parsed, expect, (kind, unit), (first, second), from_column),
        None if kinds[0] == Kind::Ratio => {
            stated(parsed, expect, (Kind::Ratio, ""), (first, second), false)
        }
        None => bare(parsed, expect, (first, second), degree_alone),
    }
}

/// A volume is as good as a volume a year, and so on, where the column says so.
fn same_dimension(kind: Kind, kinds: &[Kind]) -> bool {
    matches!(
        (kinds.first(), kind),
        (Some(Kind::VolumePerYear), Kind::Volume)
            | (Some(Kind::HoursPerYear), Kind::Time)
            | (Some(Kind::Rise), Kind::Temperature)
    )
}

fn respelt(kind: Kind, unit: &'static str) -> &'static str {
    match (kind, unit) {
        (Kind::Volume, "gal(US)") => "gal(US) a year",
        (Kind::Volume, "gal(UK)") => "gal(UK) a year",
        (Kind::Volume, _) => "L a year",
        (Kind::Time, _) => "h a year",
        (Kind::Temperature, "degF") => "degF difference",
        (Kind::Temperature, _) => "K",
        _ => unit,
    }
}

/// A value whose unit is known.
fn stated(
    parsed: &Parsed,
    expect: &Expect<'_>,
    (kind, unit): (Kind, &'static str),
    (first, second): (String, Option<String>),
    from_column: bool,
) -> Reading {
    let base = |n: &str| to_base(kind, unit, n);
    let Some(amount) = base(&first) else {
        return Reading::fault("the number is not finite");
    };
    let spec = kind.spec();
    if amount < spec.possible.0 || amount > spec.possible.1 {
        return Reading::fault(format!("{first} {unit} is not possible for {}", spec.noun));
    }
    let join = |n: &str| format!("{n} {unit}").trim_end().to_owned();
    if let Some(second) = second {
        return range(expect, (kind, unit), (&first, &second));
    }
    if let Some(bound) = parsed.bound {
        return if expect.want.bound {
            Reading {
                value: Some(format!("{bound} {}", join(&first))),
                ..Reading::default()
            }
        } else {
            Reading::fault(format!("a bound, {} is wanted", expect.want.noun()))
        };
    }
    let mut reading = Reading {
        value: Some(join(&first)),
        candidates: vec![(join(&first), amount)],
        ..Reading::default()
    };
    if let (Kind::Temperature, Some((lo, hi))) = (kind, plausible(expect.key)) {
        let celsius = amount - 273.15;
        if !(lo..=hi).contains(&celsius) {
            outside(&mut reading, &first, unit, (lo, hi), from_column);
        }
    }
    reading
}

/// A temperature outside what can be: in a column of degC perhaps degF.
fn outside(
    reading: &mut Reading,
    number: &str,
    unit: &str,
    (lo, hi): (f64, f64),
    from_column: bool,
) {
    let fahrenheit = to_base(Kind::Temperature, "degF", number).map(|k| k - 273.15);
    match fahrenheit.filter(|f| (lo..=hi).contains(f)) {
        Some(f) if from_column && unit == "degC" => {
            let f = significant(f, 4, Toward::Nearest);
            reading.value = None;
            reading.missing = true;
            reading.candidates.clear();
            reading.fault = Some(format!(
                "{number} degC is outside {lo} to {hi} degC; {number} degF would be {f} degC"
            ));
            reading.ask = Some(format!("is {number} in degF?"));
        }
        _ => {
            reading.ask = Some(format!(
                "{number} {unit} is outside {lo} to {hi} degC: is it right?"
            ));
        }
    }
}

/// A number without a unit anywhere.
fn bare(
    parsed: &Parsed,
    expect: &Expect<'_>,
    (first, second): (String, Option<String>),
    degree_alone: bool,
) -> Reading {
    let kinds = expect.want.kinds;
    let Some(unit) = usual(kinds, expect.grease, &first) else {
        return Reading::fault(format!(
            "no unit; {} is wanted, as {}",
            expect.want.noun(),
            expect.want.example()
        ));
    };
    let kind = kinds
        .iter()
        .copied()
        .find(|k| k.unit(unit).is_some())
        .unwrap_or(kinds[0]);
    let mut unit = unit;
    let mut ask = None;
    if let (Kind::Temperature, Some((lo, hi))) = (kind, plausible(expect.key))
        && let Ok(n) = first.parse::<f64>()
        && !(lo..=hi).contains(&n)
    {
        let as_f = (n - 32.0) / 1.8;
        if !(lo..=hi).contains(&as_f) {
            return Reading {
                ask: Some(format!(
                    "{first} without a unit is outside what can be: which unit?"
                )),
                ..Reading::fault(format!(
                    "{first} is outside {lo} to {hi} degC in degC and in degF"
                ))
            };
        }
        unit = "degF";
        let c = significant(as_f, 3, Toward::Nearest);
        ask = Some(format!(
            "{first} without a unit: {first} degC is outside {lo} to {hi} degC, {first} degF is {c} degC; is it degF?"
        ));
    }
    let mut reading = stated(parsed, expect, (kind, unit), (first.clone(), second), false);
    if reading.fault.is_none() {
        reading.assumed = true;
        reading.unitless = ask.is_none() && !degree_alone;
        if degree_alone {
            reading.fault = Some(format!(
                "no scale behind the degree sign: read as {first} degC"
            ));
        } else {
            reading.read_as = Some(format!("read as {first} {unit}").trim_end().to_owned());
        }
        reading.remark = Some(format!("register: {first} without a unit"));
        if ask.is_some() {
            reading.ask = ask;
        }
    }
    reading
}

/// A number in a unit of a kind, base units.
pub fn to_base(kind: Kind, unit: &str, number: &str) -> Option<f64> {
    let value: f64 = number.parse().ok()?;
    let base = kind.unit(unit)?.to_base(value);
    base.is_finite().then_some(base)
}

#[cfg(test)]
mod tests;
