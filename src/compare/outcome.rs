//! What weighing a state gives, as far as two states are compared: verdicts, the oil proposed and
//! the governing limits of each point.

use crate::demand::governing::limit_amount;
use crate::demand::{Demands, End};
use crate::model::Site;
use crate::model::rulebook::Rulebook;
use crate::quantity::show::{Toward, Units, exact, quantity};
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::weighing::{Scales, Settings};
use std::collections::BTreeMap;

/// One thing that may move.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum What {
    /// The point itself: there or not.
    Point,
    /// The oil proposed.
    Oil,
    /// The word of an oil.
    Verdict(String),
    /// The governing limit of an end.
    Limit(&'static str),
}

impl What {
    /// The word of JSON documents.
    pub fn word(&self) -> &'static str {
        match self {
            Self::Point => "machine",
            Self::Oil => "oil",
            Self::Verdict(_) => "verdict",
            Self::Limit(_) => "limit",
        }
    }
}

/// A thing as shown, with the figures it stands for.
#[derive(Clone, Debug, PartialEq)]
pub struct Shown {
    /// As printed.
    pub says: String,
    /// The figures behind it, unrounded.
    pub figures: Vec<f64>,
    /// What set a limit.
    pub by: String,
}

impl Shown {
    fn word(says: impl Into<String>) -> Self {
        Self {
            says: says.into(),
            figures: Vec::new(),
            by: String::new(),
        }
    }

    /// Whether two are the same: in words, and figures within a billionth.
    pub fn same(&self, other: &Self) -> bool {
        let close = |(a, b): (&f64, &f64)| (a - b).abs() <= 1e-9 * a.abs().max(b.abs());
        let figures = self.figures.len() == other.figures.len()
            && self.figures.iter().zip(&other.figures).all(close);
        // words of a limit are its figures, rounded
        let words = !self.figures.is_empty() || self.says == other.says;
        figures && words && self.by == other.by
    }

    /// Both as printed; where the print does not tell them apart the figures are added.
    pub fn apart(was: Option<&Self>, is: Option<&Self>) -> (Option<String>, Option<String>) {
        let alike = matches!((was, is), (Some(a), Some(b)) if a.says == b.says);
        let others = matches!((was, is), (Some(a), Some(b)) if a.by != b.by);
        let one = |s: &Self| {
            if others {
                format!("{} ({})", s.says, s.by)
            } else if alike {
                let figures: Vec<String> =
                    s.figures.iter().map(|f| format!("{}", exact(*f))).collect();
                format!("{} (in base units {})", s.says, figures.join(", "))
            } else {
                s.says.clone()
            }
        };
        (was.map(one), is.map(one))
    }
}

/// Everything that may move, by address and thing.
pub type Outcome = BTreeMap<(String, What), Shown>;

/// The ends whose governing limit is compared, with their words.
const ENDS: [(End, &str); 5] = [
    (End::HotFloor, "hot floor"),
    (End::RunningCeiling, "running ceiling"),
    (End::StartCeiling, "start ceiling"),
    (End::MakerGrade, "maker's grade"),
    (End::PourMargin, "pour margin"),
];

/// Weighs every oil on every point; none where an oil makes no curve.
pub fn outcome(site: &Site, rules: &Rulebook, settings: Settings) -> Option<Outcome> {
    let scales = Scales::new(site, rules, settings).ok()?;
    let mut found = Outcome::new();
    for point in &site.points {
        let w = scales.weigh(point);
        let address = point.address();
        let id = |oil: usize| site.oils[oil].id.clone();
        let mut put = |what: What, says: Shown| {
            found.insert((address.clone(), what), says);
        };
        put(What::Point, Shown::word("there"));
        let proposed = w.proposed().map_or("none".to_owned(), |c| id(c.oil));
        put(What::Oil, Shown::word(proposed));
        for c in &w.candidates {
            put(
                What::Verdict(id(c.oil)),
                Shown::word(c.judgement.verdict.word()),
            );
        }
        for b in &w.barred {
            put(What::Verdict(id(b.oil)), Shown::word("barred"));
        }
        for (end, word) in ENDS {
            if let Some(says) = limit(&w.demands.middle, end, settings.units) {
                put(What::Limit(word), says);
            }
        }
    }
    Some(found)
}

/// The governing limit of an end.
fn limit(demands: &Demands, end: End, units: Units) -> Option<Shown> {
    let demand = &demands.list[demands.governing(end)?];
    let t = demands.governing_temperature(demand);
    let shown = |base: f64| {
        quantity(
            ThermodynamicTemperature::from_base(base).amount(),
            units,
            Toward::Nearest,
        )
    };
    let at = t.map_or(String::new(), |t| format!(" at {}", shown(t)));
    let amount = limit_amount(demand, t);
    let says = amount.map_or_else(
        || "the oil's own".to_owned(),
        |a| quantity(a, units, Toward::Nearest),
    );
    let figures = amount.map(|a| a.base).into_iter().chain(t).collect();
    Some(Shown {
        says: format!("{says}{at}"),
        figures,
        by: demand.says.clone(),
    })
}
