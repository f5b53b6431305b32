//! What the figures of an oil are when new: the baseline a sample is compared with.
//!
//! Of several sources the nearest to the machine counts: a figure of new oil beside the sample,
//! then the latest sample of new oil, then the data sheet, then what oils of its kind usually
//! read (rules, new-oil readings). Which one it was is carried to every sentence.

use super::bottle::{Bounds, Figures};
use super::scatter::{Scatter, in_unit};
use crate::judge::PreparedOil;
use crate::model::Oil;
use crate::model::facts::{OilFacts, PointFacts};
use crate::model::rulebook::Rulebook;
use crate::model::sample::Reading;
use crate::numeric::math::ln;
use crate::oil::Curves;
use crate::quantity::Measure;
use crate::quantity::convert::{celsius, to_celsius, to_mm2_s};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::viscosity_index;
use crate::suitability::{Suitability, Truth};
use std::collections::BTreeMap;

/// Where a figure of new oil comes from.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum From {
    /// Beside the sample in the laboratory's table.
    Beside,
    /// A sample of new oil, in that row.
    NewOil(u32),
    /// The data sheet.
    DataSheet,
    /// What oils of its kind usually read.
    Usual,
}

impl From {
    /// In words.
    pub fn words(self) -> String {
        match self {
            Self::Beside => "new-oil figure beside the sample".into(),
            Self::NewOil(row) => format!("new-oil sample, row {row}"),
            Self::DataSheet => "data sheet".into(),
            Self::Usual => "usual for its kind, assumed".into(),
        }
    }
}

/// An expected figure.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Expected {
    /// The value, in the unit of the reading.
    pub value: f64,
    /// How far new oil may lie from it, one standard deviation.
    pub spread: f64,
    /// Where it comes from.
    pub from: From,
}

/// The elements additives bring.
pub const ADDITIVE: [Reading; 7] = [
    Reading::Zn,
    Reading::P,
    Reading::Ca,
    Reading::Mg,
    Reading::B,
    Reading::Mo,
    Reading::Ba,
];

/// The figures of an oil when new.
#[derive(Clone, Debug, PartialEq)]
pub struct Profile {
    /// ln of the viscosity at 40 °C, mm²/s.
    pub ln40: f64,
    /// ln of the viscosity at 100 °C, mm²/s.
    pub ln100: f64,
    /// Whether the viscosity was measured on this oil, and in which row.
    pub viscosity_from: From,
    /// Viscosity index.
    pub vi: Option<f64>,
    /// Other figures.
    pub figures: BTreeMap<Reading, Expected>,
    /// Base stock.
    pub base: BaseStock,
    /// Whether polymer thickens it.
    pub thickened: bool,
    /// Loss by shear at 100 °C known from a test.
    pub test_loss: Option<f64>,
}

impl Profile {
    /// Of an oil of the list.
    pub fn of(
        oil: &Oil,
        ready: &PreparedOil,
        facts: &OilFacts,
        rules: &Rulebook,
        suitability: &Suitability<'_>,
    ) -> Self {
        let curves = &ready.curves;
        let nu = |t: f64| to_mm2_s(curves.nu_new(celsius(t)));
        let mut figures = usual(facts, rules, suitability);
        if let Some((flash, _)) = &oil.flash_point {
            let expected = Expected {
                value: to_celsius(flash.value.figure()),
                spread: 5.0,
                from: From::DataSheet,
            };
            figures.insert(Reading::Flash, expected);
        }
        if oil.density.is_some() {
            let expected = Expected {
                value: curves.density.at(celsius(15.0)).base(),
                spread: 3.0,
                from: From::DataSheet,
            };
            figures.insert(Reading::Density, expected);
        }
        Self {
            ln40: ln(nu(40.0)),
            ln100: ln(nu(100.0)),
            viscosity_from: From::DataSheet,
            vi: index(nu(40.0), nu(100.0)),
            figures,
            base: curves.base,
            thickened: curves.thickened,
            test_loss: test_loss(curves),
        }
    }

    /// With figures measured on new oil in the place of others.
    #[must_use]
    pub fn with(mut self, measured: &Figures, from: From, scatter: &Scatter) -> Self {
        for (reading, figure) in measured.iter() {
            if figure.bounds == Bounds::Above {
                continue;
            }
            let below = figure.bounds == Bounds::Below;
            match reading {
                Reading::Nu40 if !below => {
                    self.ln40 = ln(figure.value);
                    self.viscosity_from = from;
                }
                Reading::Nu100 if !below => {
                    self.ln100 = ln(figure.value);
                    self.viscosity_from = from;
                }
                Reading::Nu40 | Reading::Nu100 | Reading::HoursOnOil | Reading::HoursOnMachine => {}
                _ => {
                    let value = if below {
                        0.5 * figure.value
                    } else {
                        figure.value
                    };
                    let spread = scatter.sigma(reading, figure.value).max(if below {
                        0.3 * figure.value
                    } else {
                        0.0
                    });
                    let expected = Expected {
                        value,
                        spread,
                        from,
                    };
                    self.figures.insert(reading, expected);
                }
            }
        }
        self.vi = index(self.nu40(), self.nu100());
        self
    }

    /// Viscosity at 40 °C, mm²/s.
    pub fn nu40(&self) -> f64 {
        crate::numeric::math::exp(self.ln40)
    }

    /// Viscosity at 100 °C, mm²/s.
    pub fn nu100(&self) -> f64 {
        crate::numeric::math::exp(self.ln100)
    }

    /// Batches of new oil differ from a data sheet; a sample of the oil itself only by its test.
    pub fn batch_spread(&self) -> f64 {
        match self.viscosity_from {
            From::DataSheet | From::Usual => BATCH,
            From::Beside | From::NewOil(_) => 0.005,
        }
    }
}

/// How far the viscosity of a batch lies from the data sheet, one standard deviation as a share:
/// grades allow 10 %, fills of one blending plant keep to 2 % (common practice).
const BATCH: f64 = 0.01;

/// Viscosity index of two viscosities, mm²/s.
pub fn index(nu40: f64, nu100: f64) -> Option<f64> {
    use crate::quantity::convert::mm2_s;
    viscosity_index::index(mm2_s(nu40), mm2_s(nu100))
        .ok()
        .map(Measure::base)
}

/// Loss at 100 °C after the oil's shear test, a share.
fn test_loss(curves: &Curves) -> Option<f64> {
    let worn = curves.worn_after(0.0)?;
    curves.loss_range(true).is_none().then(|| {
        use crate::relation::oil::viscosity_temperature::ViscosityCurve;
        let t = celsius(100.0);
        1.0 - worn.nu_at(t).base() / curves.nu_new(t).base()
    })
}

/// What oils of its kind usually read: of several rules the one with the most conditions.
fn usual(
    facts: &OilFacts,
    rules: &Rulebook,
    suitability: &Suitability<'_>,
) -> BTreeMap<Reading, Expected> {
    let nowhere = PointFacts::default();
    let (point, oil) = (suitability.point(&nowhere), suitability.oil(facts));
    let mut best: BTreeMap<Reading, (usize, Expected)> = BTreeMap::new();
    for rule in &rules.new_oil {
        let n = rule.when.len();
        let better = best.get(&rule.reading).is_none_or(|(most, _)| n >= *most);
        if !better || suitability.holds(&rule.when, &point, Some(&oil)) != Truth::True {
            continue;
        }
        let expected = Expected {
            value: in_unit(rule.reading, rule.value),
            spread: in_unit(rule.reading, rule.spread),
            from: From::Usual,
        };
        best.insert(rule.reading, (n, expected));
    }
    best.into_iter().map(|(r, (_, e))| (r, e)).collect()
}
