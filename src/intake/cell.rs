//! What a cell says of a key: a value for the draft, a question, or why it was not understood.

mod in_unit;
mod volumes;

use super::number::{self, Decimal, Read};
use super::parsed::{Parsed, Placeholder, parse, placeholder};
use super::units::Unit;
use super::yaml;
use crate::input::value::Want;
use crate::quantity::Kind;
use crate::table::Content;
use in_unit::in_unit;

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

/// A number in a unit of a kind, base units.
pub fn to_base(kind: Kind, unit: &str, number: &str) -> Option<f64> {
    let value: f64 = number.parse().ok()?;
    let base = kind.unit(unit)?.to_base(value);
    base.is_finite().then_some(base)
}

#[cfg(test)]
mod tests;
