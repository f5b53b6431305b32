//! The oils in use against their labels and against their machines.
//!
//! Two questions, never mixed: is it the oil on the label, and does it serve the machine? Then the
//! likely causes, each with its evidence ([`causes`]), the trend ([`trend`]), cleanliness and
//! water, and what to do ([`findings`]).

pub mod bottle;
pub mod causes;
pub mod cross;
pub mod findings;
pub mod judged;
pub mod limits;
pub mod matching;
pub mod metals;
pub mod profile;
pub mod read;
pub mod readings;
pub mod scatter;
pub mod serves;
pub mod shear;
pub mod trend;
pub mod units;
pub mod whose;
pub mod worked;

use crate::judge::Verdict;
use crate::model::Site;
use crate::problem::Problem;
use crate::weighing::{Condition, Scales};
use bottle::Bottle;
use findings::Finding;
use jiff::civil::Date;
use judged::{Auditor, Judged};
use matching::{Match, Matcher};
use rayon::prelude::*;
use shear::Fed;
use units::Unit;

/// What an audit is asked with.
#[derive(Clone, Debug)]
pub struct Asked {
    /// The day of the audit.
    pub on: Date,
    /// Names on bottles and the points they mean, beside the aliases of the map.
    pub matches: Vec<(String, String)>,
    /// Whether a shear loss measured in one machine is laid on the others with the same oil.
    pub measured_shear: bool,
    /// Only these points, by place; all where empty.
    pub only: Vec<usize>,
}

/// A bottle that belongs to no machine.
#[derive(Clone, Debug)]
pub struct Unmatched {
    /// The bottle.
    pub bottle: usize,
    /// The point that may be meant.
    pub meant: Option<String>,
    /// Why there is no match.
    pub why: String,
}

/// An oil in use without a sample: judged as its label says.
#[derive(Clone, Debug)]
pub struct Unsampled {
    /// The point.
    pub point: usize,
    /// The oil in use, by place in the list; none where nobody knows it.
    pub oil: Option<usize>,
    /// Its verdict as labelled; none where the oil is unknown or barred.
    pub verdict: Option<Verdict>,
    /// Why it is barred.
    pub barred: Vec<Condition>,
    /// Why.
    pub because: Vec<String>,
}

/// An audit.
#[derive(Clone, Debug)]
pub struct Audit {
    /// The bottles, in the order of the tables.
    pub bottles: Vec<Bottle>,
    /// Each bottle of a machine, or without one, judged; in the same order, new oil left out.
    pub judged: Vec<Judged>,
    /// Fills that were sampled, in the order of the site.
    pub units: Vec<Unit>,
    /// Bottles that belong to no machine.
    pub unmatched: Vec<Unmatched>,
    /// Bottles of new oil.
    pub new_oil: Vec<usize>,
    /// Oils in use without a sample.
    pub unsampled: Vec<Unsampled>,
    /// Shear measured, laid on other machines.
    pub fed: Vec<Fed>,
    /// What to do, most pressing first.
    pub findings: Vec<Finding>,
}

/// Audits the oils in use of a site by its bottles. Problems with bottles are told beside.
pub fn audit(
    scales: &Scales<'_>,
    bottles: Vec<Bottle>,
    asked: &Asked,
    problems: &mut Vec<Problem>,
) -> Audit {
    let site: &Site = scales.site;
    let matcher = Matcher::new(site, &asked.matches);
    let wanted = |point: usize| asked.only.is_empty() || asked.only.contains(&point);
    let found: Vec<Match> = bottles.iter().map(|b| matcher.find(b)).collect();
    let (mut new_oil, mut unmatched) = (Vec::new(), Vec::new());
    let mut rows: Vec<(usize, Option<usize>)> = Vec::new();
    for (i, one) in found.iter().enumerate() {
        match one {
            Match::NewOil => new_oil.push(i),
            Match::Point(point) if wanted(*point) => rows.push((i, Some(*point))),
            Match::Point(_) => {}
            Match::None { meant, why } => {
                unmatched.push(Unmatched {
                    bottle: i,
                    meant: meant.clone(),
                    why: why.clone(),
                });
                rows.push((i, None));
            }
        }
    }
    let mut units = units::of(site, &bottles, &rows);
    units::tell_twice(&units, &bottles, problems);
    let auditor = Auditor::new(scales, &bottles, &new_oil, asked.on);
    let mut judged: Vec<Judged> = rows
        .par_iter()
        .map(|(bottle, point)| auditor.judge(*bottle, *point))
        .collect();
    judged::tell_labels(&judged, &bottles, problems);
    units::settle(&mut units, &mut judged, &bottles, site, &auditor);
    let sampled: Vec<usize> = units.iter().map(|u| u.point).collect();
    let unsampled = (0..site.points.len())
        .filter(|p| wanted(*p) && !sampled.contains(p))
        .filter_map(|p| auditor.unsampled(p))
        .collect();
    let fed = if asked.measured_shear {
        shear::feed(scales, &units, &judged, &bottles)
    } else {
        Vec::new()
    };
    let mut audit = Audit {
        bottles,
        judged,
        units,
        unmatched,
        new_oil,
        unsampled,
        fed,
        findings: Vec::new(),
    };
    audit.findings = findings::of(&audit, scales);
    audit
}
