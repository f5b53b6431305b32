//! A site: its machines, oils and house rules.

use super::machine::Point;
use super::oil::Oil;
use super::sample::{Event, SampleMap};
use crate::quantity::{Ratio, TemperatureInterval, Time, VgStep};
use crate::source::Origin;
use crate::source::place::Given;

/// Everything the reader has read.
#[derive(Clone, Debug, PartialEq)]
pub struct Site {
    /// What stands in the frame of the sheets.
    pub frame: Frame,
    /// House values and rules.
    pub house: House,
    /// Lubrication points, in file order.
    pub points: Vec<Point>,
    /// Oils, in file order.
    pub oils: Vec<Oil>,
    /// Acceptances of tight verdicts.
    pub accept: Vec<Acceptance>,
    /// Verdicts the user expects.
    pub expect: Vec<Expectation>,
    /// Maps to laboratory tables.
    pub samples: Vec<SampleMap>,
    /// What was done to the oils, in file order.
    pub events: Vec<Event>,
}

impl Site {
    /// The oil of that id.
    pub fn oil(&self, id: &str) -> Option<&Oil> {
        self.oils.iter().find(|o| o.id == id)
    }
}

/// What stands in the frame of the sheets.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Frame {
    /// Name of the site.
    pub site: Option<String>,
    /// The client.
    pub client: Option<String>,
    /// Document number.
    pub document: Option<String>,
    /// Revision.
    pub revision: Option<String>,
    /// Who wrote it.
    pub author: Option<String>,
    /// Status: for review, issued.
    pub status: Option<String>,
    /// Date of review as written, ISO form.
    pub reviewed: Option<String>,
    /// Notes in Markdown.
    pub notes: Option<String>,
    /// Path of the logo.
    pub logo: Option<String>,
    /// Unit of money.
    pub currency: Option<String>,
}

/// The site's own values.
#[derive(Clone, Debug, PartialEq)]
pub struct House {
    /// Reserve asked of a margin.
    pub reserve: Given<VgStep>,
    /// Pour margin, instead of the one by lubrication.
    pub pour_margin: Option<Given<TemperatureInterval>>,
    /// Age after which a sample says nothing.
    pub sample_age: Given<Time>,
    /// House rules in file order; their numbers H-1, H-2 … follow it.
    pub rules: Vec<HouseRule>,
}

/// A house rule.
#[derive(Clone, Debug, PartialEq)]
pub struct HouseRule {
    /// Its name.
    pub name: String,
    /// The rule it replaces, by id.
    pub replaces: Option<Given<String>>,
    /// The limit it sets.
    pub limit: HouseLimit,
    /// The limit as written.
    pub written: String,
    /// Only for oils with this additive or class.
    pub only_for: Option<Given<String>>,
    /// Its source.
    pub source: Option<String>,
    /// Where it stands.
    pub origin: Origin,
}

/// What a house rule may set.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum HouseLimit {
    /// `kappa >= 0.4`.
    Kappa(f64),
    /// `film ratio >= 0.7`.
    FilmRatio(f64),
    /// `film height >= 15 um`.
    FilmHeight(crate::quantity::Length),
    /// `floor = 0.7 nu_ref`: so many times the reference viscosity of the pitch-line rule.
    ShareOfReference(Ratio),
}

/// A tight verdict accepted by name.
#[derive(Clone, Debug, PartialEq)]
pub struct Acceptance {
    /// Address of the point.
    pub machine: Given<String>,
    /// The oil.
    pub oil: Given<String>,
    /// Who accepts.
    pub by: Option<String>,
    /// From when, ISO date.
    pub on: Option<String>,
    /// Until when, ISO date.
    pub until: Option<String>,
    /// Why.
    pub because: Option<String>,
}

impl Acceptance {
    /// Whether it is in force on a day; ISO dates compare as text.
    pub fn stands(&self, on: &str) -> bool {
        let begun = self.on.as_deref().is_none_or(|from| from <= on);
        let lasts = self.until.as_deref().is_none_or(|until| on <= until);
        begun && lasts
    }

    /// Whether it has run out by a day.
    pub fn expired(&self, on: &str) -> bool {
        self.until.as_deref().is_some_and(|until| until < on)
    }
}

/// A verdict the user expects; `check` fails where the judge says otherwise.
#[derive(Clone, Debug, PartialEq)]
pub struct Expectation {
    /// Address of the point.
    pub machine: Given<String>,
    /// The oil.
    pub oil: Given<String>,
    /// The word.
    pub verdict: Given<String>,
}
