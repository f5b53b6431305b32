//! Quantities and ranges of an entry.

use super::Fields;
use crate::input::rules::probe::Shape;
use crate::model::stated::Between;
use crate::quantity::{Amount, Kind, Measure, parse};
use serde_yaml::Value;

impl Fields<'_> {
    fn read_amount(&self, key: &str, kind: Kind, text: &str) -> Option<parse::Read> {
        match parse::parse(kind, text) {
            Ok(read) => Some(read),
            Err(bad) => {
                self.wrong(key, text, &bad.to_string(), kind.spec().example);
                None
            }
        }
    }

    /// A quantity that may be there, of a kind known only here.
    pub(in crate::input::rules) fn opt_amount(
        &self,
        key: &'static str,
        kind: Kind,
    ) -> Option<Amount> {
        self.told(key, || Shape::Quantity(kind));
        match self.take(key)? {
            Value::Number(n) if kind.spec().bare => n.as_f64().map(|base| Amount { kind, base }),
            other => self
                .read_amount(key, kind, self.scalar(key, other)?)
                .map(|read| read.amount),
        }
    }

    /// A quantity that may be there.
    pub(in crate::input::rules) fn opt<Q: Measure>(&self, key: &'static str) -> Option<Q> {
        self.opt_amount(key, Q::KIND).map(|a| Q::from_base(a.base))
    }

    /// A quantity that must be there; one in base units after a fault.
    pub(in crate::input::rules) fn quantity<Q: Measure>(&self, key: &'static str) -> Q {
        if self.take(key).is_none() {
            self.missing(key, Q::KIND.spec().example);
        }
        self.opt(key).unwrap_or(Q::from_base(1.0))
    }

    /// Quantities, one or a list of them.
    pub(in crate::input::rules) fn quantities<Q: Measure>(&self, key: &'static str) -> Vec<Q> {
        self.told(key, || Shape::Quantities(Q::KIND));
        self.scalars(key)
            .into_iter()
            .filter_map(|text| self.read_amount(key, Q::KIND, text))
            .map(|read| Q::from_base(read.amount.base))
            .collect()
    }

    /// A range `a .. b unit`; either end may be left open.
    pub(in crate::input::rules) fn open<Q: Measure>(
        &self,
        key: &'static str,
    ) -> Option<(Option<Q>, Option<Q>)> {
        self.told(key, || Shape::Range(Q::KIND));
        let text = self.scalar(key, self.take(key)?)?;
        self.read_open(key, text)
    }

    fn read_open<Q: Measure>(&self, key: &str, text: &str) -> Option<(Option<Q>, Option<Q>)> {
        let Some((low, high)) = text.split_once("..") else {
            let example = Q::KIND.spec().example;
            self.wrong(
                key,
                text,
                "a range is wanted",
                &format!("{example} .. {example}"),
            );
            return None;
        };
        let (low, high) = (low.trim(), high.trim());
        let end = |text: &str| self.read_amount(key, Q::KIND, text);
        let high_read = if high.is_empty() {
            None
        } else {
            Some(end(high)?)
        };
        let low_read = match (&high_read, low.is_empty()) {
            (_, true) => None,
            // the unit may stand once, behind both numbers
            (Some(high), false) if low.parse::<f64>().is_ok() => {
                Some(end(&format!("{low} {}", high.unit))?)
            }
            _ => Some(end(low)?),
        };
        let value = |r: parse::Read| Q::from_base(r.amount.base);
        Some((low_read.map(value), high_read.map(value)))
    }

    /// A range with both ends that may be there.
    pub(in crate::input::rules) fn opt_between<Q: Measure>(
        &self,
        key: &'static str,
    ) -> Option<Between<Q>> {
        self.told(key, || Shape::Range(Q::KIND));
        let text = self.scalar(key, self.take(key)?)?;
        let (lo, hi) = self.read_open(key, text)?;
        if let (Some(lo), Some(hi)) = (lo, hi)
            && lo <= hi
        {
            return Some(Between { lo, hi });
        }
        self.wrong(
            key,
            text,
            "two ends are wanted, the lower first",
            "LOW .. HIGH UNIT",
        );
        None
    }

    /// A range with both ends that must be there.
    pub(in crate::input::rules) fn between<Q: Measure>(&self, key: &'static str) -> Between<Q> {
        if self.take(key).is_none() {
            let example = Q::KIND.spec().example;
            self.missing(key, &format!("{example} .. {example}"));
        }
        let one = Q::from_base(1.0);
        self.opt_between(key)
            .unwrap_or(Between { lo: one, hi: one })
    }
}
