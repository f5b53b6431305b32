//! The inputs of `work`: `key=value` pairs or a JSON object, read as quantities.

use super::{Refusal, Worked};
use crate::quantity::parse::{Bad, parse};
use crate::quantity::{DynamicViscosity, KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::source::Origin;
use crate::source::place::Given;
use crate::trace::{Known, Recorder};
use std::collections::{BTreeMap, BTreeSet};

/// What the user wrote, by key.
#[derive(Clone, Debug, Default)]
pub struct Args {
    written: BTreeMap<String, Vec<String>>,
    lists: BTreeSet<String>,
    asked: BTreeSet<String>,
}

impl Args {
    /// From `key=value` texts; a list is written `key=[a, b]` or the key repeated.
    ///
    /// # Errors
    /// A text without `=`.
    pub fn from_pairs(pairs: &[String]) -> Result<Self, Refusal> {
        let mut args = Self::default();
        for pair in pairs {
            let Some((key, value)) = pair.split_once('=') else {
                let words = format!("`{pair}` is not KEY=VALUE; write it as speed=\"236 r/min\"");
                return Err(Refusal::new("pair-malformed", words));
            };
            let key = normal(key);
            let value = value.trim();
            let inner = value.strip_prefix('[').and_then(|v| v.strip_suffix(']'));
            if let Some(inner) = inner {
                args.lists.insert(key.clone());
                for item in inner.split(',').map(str::trim).filter(|i| !i.is_empty()) {
                    args.put(&key, item);
                }
            } else {
                args.put(&key, value);
            }
        }
        Ok(args)
    }

    /// From the `with` object of a batch line.
    ///
    /// # Errors
    /// Values that are neither text, number, truth value nor a list of those.
    pub fn from_json(with: &serde_json::Map<String, serde_json::Value>) -> Result<Self, Refusal> {
        let mut args = Self::default();
        for (key, value) in with {
            let key = normal(key);
            if let serde_json::Value::Array(items) = value {
                args.lists.insert(key.clone());
                args.written.entry(key.clone()).or_default();
                for item in items {
                    args.put(&key, &scalar(&key, item)?);
                }
            } else {
                args.put(&key, &scalar(&key, value)?);
            }
        }
        Ok(args)
    }

    fn put(&mut self, key: &str, value: &str) {
        self.written
            .entry(key.to_owned())
            .or_default()
            .push(value.trim().trim_matches('"').to_owned());
    }

    /// Whether the key was given.
    pub fn has(&mut self, key: &str) -> bool {
        self.asked.insert(key.to_owned());
        self.written.contains_key(key)
    }

    /// The text of a key, if given.
    ///
    /// # Errors
    /// A list where one value is wanted.
    pub fn maybe_text(&mut self, key: &str) -> Result<Option<String>, Refusal> {
        self.asked.insert(key.to_owned());
        match self.written.get(key).map(Vec::as_slice) {
            None => Ok(None),
            Some([one]) => Ok(Some(one.clone())),
            Some(_) => Err(Refusal::new(
                "list-unwanted",
                format!("{key} takes one value"),
            )),
        }
    }

    /// The text of a key that must be given.
    ///
    /// # Errors
    /// Missing, or a list.
    pub fn text(&mut self, key: &str, example: &str) -> Result<String, Refusal> {
        self.maybe_text(key)?.ok_or_else(|| {
            Refusal::new(
                "input-missing",
                format!("{key} is missing; write {key}={example}"),
            )
        })
    }

    /// One of several words; `default` where the key is not given.
    ///
    /// # Errors
    /// Any other word.
    pub fn choice(
        &mut self,
        key: &str,
        words: &[&'static str],
        default: Option<&'static str>,
    ) -> Result<&'static str, Refusal> {
        let given = self.maybe_text(key)?;
        let list = words.join(", ");
        match (given, default) {
            (None, Some(default)) => Ok(default),
            (None, None) => Err(Refusal::new(
                "input-missing",
                format!("{key} is missing; it is one of {list}"),
            )),
            (Some(word), _) => {
                let found = words.iter().find(|w| w.eq_ignore_ascii_case(word.trim()));
                found.copied().ok_or_else(|| {
                    Refusal::new(
                        "choice-unknown",
                        format!("{key} is `{word}`; it is one of {list}"),
                    )
                })
            }
        }
    }

    /// A quantity that must be given, told to the calculation.
    ///
    /// # Errors
    /// Missing or not such a quantity.
    pub fn quantity<Q: Measure>(
        &mut self,
        worked: &mut Worked,
        key: &'static str,
        says: &'static str,
    ) -> Result<Known<Q>, Refusal> {
        let text = self.text(key, &format!("\"{}\"", Q::KIND.spec().example))?;
        read(worked, key, says, &text)
    }

    /// A quantity that need not be given.
    ///
    /// # Errors
    /// Given, but not such a quantity.
    pub fn maybe<Q: Measure>(
        &mut self,
        worked: &mut Worked,
        key: &'static str,
        says: &'static str,
    ) -> Result<Option<Known<Q>>, Refusal> {
        self.maybe_text(key)?
            .map(|text| read(worked, key, says, &text))
            .transpose()
    }

    /// A list of quantities that must be given.
    ///
    /// # Errors
    /// Missing, empty, or an item that is not such a quantity.
    pub fn list<Q: Measure>(
        &mut self,
        worked: &mut Worked,
        key: &'static str,
        says: &'static str,
    ) -> Result<Vec<Known<Q>>, Refusal> {
        self.items(key, Q::KIND.spec().example)?
            .iter()
            .map(|text| read(worked, key, says, text))
            .collect()
    }

    /// The texts of a list that must be given.
    ///
    /// # Errors
    /// Missing or empty.
    pub fn items(&mut self, key: &str, example: &str) -> Result<Vec<String>, Refusal> {
        self.asked.insert(key.to_owned());
        match self.written.get(key) {
            Some(items) if !items.is_empty() => Ok(items.clone()),
            _ => Err(Refusal::new(
                "input-missing",
                format!("{key} is missing; write {key}=[\"{example}\", …]"),
            )),
        }
    }

    /// Viscosities with their temperatures, as `"32 mm2/s at 40 degC"`.
    ///
    /// # Errors
    /// Missing, or an item of another form.
    pub fn points(
        &mut self,
        worked: &mut Worked,
        key: &'static str,
    ) -> Result<Vec<Point>, Refusal> {
        let items = self.items(key, "32 mm2/s at 40 degC")?;
        let read = |item: &String| {
            let (nu, at) = point(worked, key, item, "32 mm2/s at 40 degC")?;
            Ok(Point { at, nu })
        };
        items.iter().map(read).collect()
    }

    /// Dynamic viscosities with their temperatures, as `"6500 mPa.s at -25 degC"`.
    ///
    /// # Errors
    /// Missing, or an item of another form.
    pub fn dynamic_points(
        &mut self,
        worked: &mut Worked,
        key: &'static str,
    ) -> Result<Vec<DynamicPoint>, Refusal> {
        let items = self.items(key, "6500 mPa.s at -25 degC")?;
        let read = |item: &String| {
            let (eta, at) = point(worked, key, item, "6500 mPa.s at -25 degC")?;
            Ok(DynamicPoint { at, eta })
        };
        items.iter().map(read).collect()
    }

    /// Refuses keys that nothing asked for, once a relation has read its inputs.
    ///
    /// # Errors
    /// Keys left over.
    pub fn finish(&self, relation: &str) -> Result<(), Refusal> {
        let extra: Vec<&str> = self
            .written
            .keys()
            .filter(|k| !self.asked.contains(*k))
            .map(String::as_str)
            .collect();
        if extra.is_empty() {
            return Ok(());
        }
        let words = format!(
            "{relation} does not take {}; see: filmwright work {relation}",
            extra.join(", ")
        );
        Err(Refusal::new("input-unknown", words))
    }
}

/// A viscosity at a temperature.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Point {
    /// The temperature.
    pub at: Known<ThermodynamicTemperature>,
    /// The viscosity.
    pub nu: Known<KinematicViscosity>,
}

/// A dynamic viscosity at a temperature.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct DynamicPoint {
    /// The temperature.
    pub at: Known<ThermodynamicTemperature>,
    /// The viscosity.
    pub eta: Known<DynamicViscosity>,
}

fn point<Q: Measure>(
    worked: &mut Worked,
    key: &'static str,
    item: &str,
    example: &str,
) -> Result<(Known<Q>, Known<ThermodynamicTemperature>), Refusal> {
    let Some((value, at)) = item.split_once(" at ") else {
        let words =
            format!("{key}: `{item}` is not a viscosity at a temperature; write \"{example}\"");
        return Err(Refusal::new("point-malformed", words));
    };
    Ok((
        read(worked, key, "viscosity of a point", value)?,
        read(worked, key, "temperature of a point", at)?,
    ))
}

fn read<Q: Measure>(
    worked: &mut Worked,
    key: &'static str,
    says: &'static str,
    text: &str,
) -> Result<Known<Q>, Refusal> {
    let read = parse(Q::KIND, text).map_err(|bad| refuse(key, Q::KIND.spec().example, &bad))?;
    let given = Given::new(
        Q::from_base(read.amount.base),
        text.trim(),
        Origin::flag(key),
    );
    Ok(worked.trace.given(key, says, &given))
}

/// A [`Bad`] text as a refusal that says what to write.
fn refuse(key: &str, example: &str, bad: &Bad) -> Refusal {
    let (name, write) = match bad {
        Bad::Empty => ("value-missing", example.to_owned()),
        Bad::NotANumber { .. } => ("number-unreadable", example.to_owned()),
        Bad::NotFinite { .. } => ("number-not-finite", example.to_owned()),
        Bad::NoUnit { .. } => ("unit-missing", example.to_owned()),
        Bad::DecimalComma { instead } => ("comma-decimal", instead.clone()),
        Bad::ThousandsComma { instead } => ("comma-thousands", instead.clone()),
        Bad::UnknownUnit {
            nearest: Some(unit),
            number,
            ..
        } => ("unit-unknown", format!("{number} {unit}")),
        Bad::UnknownUnit { .. } => ("unit-unknown", example.to_owned()),
        Bad::OtherKind { .. } => ("unit-of-another-kind", example.to_owned()),
        Bad::RiseNotTemperature { number, .. } => ("rise-not-temperature", format!("{number} K")),
        Bad::WhichGallon { number } => ("gallon-ambiguous", format!("{number} gal(US)")),
        Bad::Impossible { .. } => ("value-impossible", example.to_owned()),
    };
    Refusal::new(name, format!("{key}: {bad}; write {key}=\"{write}\""))
}

fn scalar(key: &str, value: &serde_json::Value) -> Result<String, Refusal> {
    match value {
        serde_json::Value::String(s) => Ok(s.clone()),
        serde_json::Value::Number(n) => Ok(n.to_string()),
        serde_json::Value::Bool(b) => Ok(if *b { "yes".into() } else { "no".into() }),
        _ => Err(Refusal::new(
            "value-malformed",
            format!("{key} is neither a text, a number nor a list of them"),
        )),
    }
}

/// Keys may be written with spaces, hyphens or underscores.
fn normal(key: &str) -> String {
    key.trim().replace([' ', '-'], "_")
}
