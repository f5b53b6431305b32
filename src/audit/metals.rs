//! Metals as reasons and trends: what rose between two samples of a fill, where such metal comes
//! from, and which companions say more. No metal is judged by a threshold of its own.

use super::bottle::Figures;
use super::scatter::Scatter;
use crate::model::rulebook::{Rulebook, WearSign};
use crate::model::sample::Reading;
use crate::quantity::show::{Toward, significant};
use std::fmt::Write as _;

/// A metal that rose.
#[derive(Clone, Debug, PartialEq)]
pub struct Rise {
    /// The metal.
    pub element: Reading,
    /// From and to, ppm.
    pub from: f64,
    /// The latest figure.
    pub to: f64,
    /// Rise in a thousand hours, where hours are known.
    pub per_1000_h: Option<f64>,
    /// Where it comes from, with what companions add.
    pub says: String,
    /// Whether it must be acted on at once.
    pub urgent: bool,
}

const WEAR: [Reading; 12] = [
    Reading::Fe,
    Reading::Cu,
    Reading::Pb,
    Reading::Sn,
    Reading::Sb,
    Reading::Al,
    Reading::Cr,
    Reading::Ni,
    Reading::Ag,
    Reading::Ti,
    Reading::Mn,
    Reading::Si,
];

/// Metals that rose between two samples of one fill by more than the test scatters.
pub(super) fn rises(
    before: &Figures,
    after: &Figures,
    hours: Option<f64>,
    rules: &Rulebook,
    scatter: &Scatter,
) -> Vec<Rise> {
    let rose = |element: Reading| {
        let (from, to) = (before.exact(element)?, after.exact(element)?);
        let (a, b) = (scatter.sigma(element, from), scatter.sigma(element, to));
        let scatter = (a * a + b * b).sqrt();
        (to - from > 3.0 * scatter && to > 1.5 * from).then_some((element, from, to))
    };
    let all: Vec<_> = WEAR.into_iter().filter_map(rose).collect();
    let risen: Vec<Reading> = all.iter().map(|(e, ..)| *e).collect();
    all.into_iter()
        .map(|(element, from, to)| {
            let rate = hours.filter(|h| *h > 0.0).map(|h| (to - from) / h * 1000.0);
            let sign = sign_of(rules, element);
            Rise {
                element,
                from,
                to,
                per_1000_h: rate,
                urgent: sign.is_some_and(|s| s.urgent),
                says: says(element, from, to, rate, sign, &risen),
            }
        })
        .collect()
}

fn sign_of(rules: &Rulebook, element: Reading) -> Option<&WearSign> {
    rules
        .wear
        .iter()
        .find(|s| s.elements.iter().any(|e| e == element.key()))
}

fn says(
    element: Reading,
    from: f64,
    to: f64,
    rate: Option<f64>,
    sign: Option<&WearSign>,
    risen: &[Reading],
) -> String {
    let show = |v: f64| significant(v, 2, Toward::Nearest);
    let mut says = format!("{} from {} to {} ppm", element.says(), show(from), show(to));
    if let Some(rate) = rate {
        let _ = write!(says, " ({} in 1000 h)", show(rate));
    }
    if let Some(sign) = sign {
        let _ = write!(says, ": from {}", sign.from);
        for (with, adds) in &sign.with {
            let companions: Vec<&str> = with.split(',').map(str::trim).collect();
            let there = companions
                .iter()
                .any(|c| risen.iter().any(|r| r.key() == *c));
            if there {
                let _ = write!(says, "; with {with} {adds}");
            }
        }
    }
    says
}
