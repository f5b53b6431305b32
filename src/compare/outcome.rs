//! What weighing a state gives, as far as two states are compared: verdicts, the oil proposed and
//! the governing limits of each point.

use crate::demand::governing::limit_amount;
use crate::demand::{Demands, End};
use crate::model::rulebook::Rulebook;
use crate::model::site::House;
use crate::model::{Oil, Point, Site};
use crate::quantity::show::{Toward, Units, exact, quantity};
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::weighing::{Scales, Settings, oil_in_use};
use std::collections::{BTreeMap, BTreeSet};

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

/// What everything on a site is weighed with: two points that read alike come out alike under it.
#[derive(PartialEq)]
struct Terms {
    oils: Vec<Oil>,
    house: House,
    /// The oils in use somewhere on the site: the order of candidates goes by them.
    on_site: BTreeSet<String>,
    own_rules: String,
    reserve: Option<f64>,
    worn: bool,
    units: Units,
}

/// A point that was weighed, with what came out.
struct Known {
    terms: usize,
    point: Point,
    found: Vec<(What, Shown)>,
}

/// Everything weighed so far. States that differ in one input agree in most points; a point is
/// weighed again only where it, or what it is weighed with, is another.
#[derive(Default)]
pub struct Book {
    terms: Vec<Terms>,
    known: BTreeMap<String, Vec<Known>>,
    /// Points weighed, not found in the book.
    pub weighed: usize,
}

/// The rules in force, with the user's own as one text: what tells two of them apart.
#[derive(Clone, Copy)]
pub struct Rules<'r> {
    /// All of them.
    pub all: &'r Rulebook,
    /// The user's own.
    pub own: &'r str,
}

impl Book {
    /// Weighs every oil on every point; none where an oil makes no curve.
    pub fn outcome(
        &mut self,
        site: &Site,
        rules: Rules<'_>,
        settings: Settings,
    ) -> Option<Outcome> {
        let terms = self.terms(site, rules, settings);
        let mut scales: Option<Scales<'_>> = None;
        let mut all = Outcome::new();
        for point in &site.points {
            let address = point.address();
            let mut known = self.known.get(&address).into_iter().flatten();
            let before = known.find(|k| k.terms == terms && k.point == *point);
            let found = if let Some(known) = before {
                known.found.clone()
            } else {
                if scales.is_none() {
                    scales = Some(Scales::new(site, rules.all, settings).ok()?);
                }
                let found = of_point(scales.as_ref()?, point);
                self.weighed += 1;
                self.known.entry(address.clone()).or_default().push(Known {
                    terms,
                    point: point.clone(),
                    found: found.clone(),
                });
                found
            };
            let found = found.into_iter();
            all.extend(found.map(|(what, shown)| ((address.clone(), what), shown)));
        }
        Some(all)
    }

    fn terms(&mut self, site: &Site, rules: Rules<'_>, settings: Settings) -> usize {
        let on_site = site.points.iter().filter_map(oil_in_use);
        let terms = Terms {
            oils: site.oils.clone(),
            house: site.house.clone(),
            on_site: on_site.map(str::to_owned).collect(),
            own_rules: rules.own.to_owned(),
            reserve: settings.reserve,
            worn: settings.worn,
            units: settings.units,
        };
        let known = self.terms.iter().position(|t| *t == terms);
        known.unwrap_or_else(|| {
            self.terms.push(terms);
            self.terms.len() - 1
        })
    }
}

/// What weighing a point gives.
fn of_point<'a>(scales: &Scales<'a>, point: &'a Point) -> Vec<(What, Shown)> {
    let w = scales.weigh(point);
    let id = |oil: usize| scales.site.oils[oil].id.clone();
    let proposed = w.proposed().map_or("none".to_owned(), |c| id(c.oil));
    let mut found = vec![
        (What::Point, Shown::word("there")),
        (What::Oil, Shown::word(proposed)),
    ];
    found.extend(w.candidates.iter().map(|c| {
        let word = c.judgement.verdict.word();
        (What::Verdict(id(c.oil)), Shown::word(word))
    }));
    let barred = w.barred.iter();
    found.extend(barred.map(|b| (What::Verdict(id(b.oil)), Shown::word("barred"))));
    found.extend(ENDS.into_iter().filter_map(|(end, word)| {
        let says = limit(&w.demands.middle, end, scales.units)?;
        Some((What::Limit(word), says))
    }));
    found
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
