//! From results to page models.
//!
//! A [`Report`] plans its sheets, then makes them one by one: a machine is weighed, its sheet is
//! handed over and only a digest is kept, from which the overview, the methods and the rules are
//! made at the end. So a site of any size needs no more room than its digests.

mod ambient;
mod answer;
mod assumed;
mod audit;
mod barred;
mod candidates;
mod case;
mod caution;
mod changes;
mod checked;
mod curves;
mod digest;
mod eligible;
mod first;
mod gaps;
mod inputs;
mod labels;
mod lists;
mod machine;
mod machines;
mod needs;
mod next;
mod oil_says;
mod oil_steps;
mod oils;
mod overview;
mod plan;
mod point;
mod reference;
mod register;
mod revision;
mod rules;
mod running;
mod say;
mod season;
mod sign;
mod site_gaps;
mod state;
mod steps;
mod store;
mod uses;
mod vary;

use crate::audit::Audit;
pub use revision::Since;

use crate::demand::End;
use crate::judge::{PreparedOil, Verdict};
use crate::model::Point;
use crate::quantity::show::Units;
use crate::relation::Law;
use crate::report::model::{Body, Frame, Image, NavLink, Paper, Phrase, Sheet};
use crate::report::names::{Bundle, Href, plain};
use crate::results::json::Head;
use crate::source::SourceSet;
use crate::source::place::Place;
use crate::weighing::Scales;
use digest::Digest;
use plan::{On, Plan};
use rayon::iter::{IntoParallelIterator, ParallelIterator};
use std::collections::BTreeMap;

/// The ends whose governing limits are told in one line.
const ENDS: [End; 4] = [
    End::HotFloor,
    End::RunningCeiling,
    End::StartCeiling,
    End::MakerGrade,
];

/// How the pages are to be.
#[derive(Clone, Debug, Default)]
pub struct Options {
    /// A folder of pages, or one file.
    pub bundle: Bundle,
    /// Paper.
    pub paper: Paper,
    /// The client's logo.
    pub logo: Option<Image>,
    /// A warning on every sheet.
    pub warning: Option<String>,
    /// What the commands printed on the sheets need behind them to find the same site.
    pub flags: String,
    /// Cases sampled for the oil each sheet tells of; none unless asked for.
    pub scatter: Option<u32>,
    /// An older state, and what moved since.
    pub since: Option<Since>,
}

/// What a report is made from.
pub struct Run<'a> {
    scales: &'a Scales<'a>,
    sources: &'a SourceSet,
    head: Head,
    options: Options,
    /// Thickened oils as new, by their place in the list.
    fresh: BTreeMap<usize, PreparedOil>,
    /// The audit of the oils in use, where there are samples.
    audit: Option<&'a Audit>,
    /// Where the oils' sheets stand.
    oil_sheets: Vec<Href>,
}

impl<'a> Run<'a> {
    /// Makes ready what every sheet needs.
    pub fn new(
        scales: &'a Scales<'a>,
        sources: &'a SourceSet,
        head: Head,
        options: Options,
    ) -> Self {
        let fresh = scales
            .oils
            .iter()
            .enumerate()
            .filter(|(_, ready)| ready.curves.thickened)
            .filter_map(|(i, _)| {
                let oil = &scales.site.oils[i];
                Some((i, PreparedOil::new(oil, scales.rules, false).ok()?))
            })
            .collect();
        Self {
            scales,
            sources,
            head,
            options,
            fresh,
            oil_sheets: Vec::new(),
            audit: None,
        }
    }

    /// An oil's id, leading to its sheet.
    fn oil_link(&self, oil: usize) -> Phrase {
        let id = &self.scales.site.oils[oil].id;
        match self.oil_sheets.get(oil) {
            Some(href) => Phrase::new().tag_link(id, href.clone()),
            None => Phrase::new().tag(id),
        }
    }

    /// With an audit sheet.
    #[must_use]
    pub fn audited(mut self, audit: &'a Audit) -> Self {
        self.audit = Some(audit);
        self
    }

    /// An oil judged as new, where it is thickened.
    fn fresh(&self, oil: usize) -> Option<&PreparedOil> {
        self.fresh.get(&oil)
    }

    /// Where something stands, as people find it.
    fn stands(&self, place: &Place) -> String {
        let shown = self.sources.shown(place);
        shown
            .strip_prefix("<builtin>/")
            .map_or(shown.clone(), str::to_owned)
    }
}

/// What is kept of the machines made.
#[derive(Default)]
struct Kept {
    /// Digests of their points, by machine in the plan.
    machines: Vec<Vec<Digest>>,
    /// Every oil on every point, by oil.
    uses: Vec<Vec<uses::Use>>,
    /// Relations used, by name, and the machines they were used on.
    laws: BTreeMap<&'static str, (&'static Law, Vec<usize>)>,
    /// What was judged, and on how many machines.
    judged: Vec<(String, u32)>,
    not_judged: Vec<(String, u32)>,
}

/// A machine's sheet made, with what the command line says of it.
pub struct Made {
    /// The sheet.
    pub sheet: Sheet,
    /// The machine.
    pub tag: String,
    /// Its answer in one line.
    pub headline: String,
    /// Its state: `settled`, `need attention`, `not decided`.
    pub state: &'static str,
    /// The verdict on the oil in use, the worst of its points; a barred oil counts as failing.
    pub gate: Option<Verdict>,
}

/// A report being made.
pub struct Report<'a> {
    run: Run<'a>,
    plan: Plan<'a>,
    kept: Kept,
}

impl<'a> Report<'a> {
    /// Plans the sheets of these points.
    pub fn new(run: Run<'a>, points: &[&'a Point]) -> Self {
        let plan = Plan::new(
            points,
            &run.scales.site.oils,
            run.options.bundle,
            run.audit.is_some(),
            run.options.since.is_some(),
        );
        let mut run = run;
        run.oil_sheets = plan.oils.iter().map(|o| plan.href(&o.place)).collect();
        Self {
            run,
            plan,
            kept: Kept::default(),
        }
    }

    /// How many machines there are.
    pub fn machines(&self) -> usize {
        self.plan.machines.len()
    }

    /// The files of a folder of pages, before any is made.
    pub fn files(&self) -> Vec<String> {
        self.plan.files()
    }

    /// How many sheets there will be.
    pub fn sheets(&self) -> u32 {
        self.plan.of
    }

    /// Makes the sheets of the next machines, so many at a time side by side; none after the last.
    pub fn next_machines(&mut self, most: usize) -> Vec<Made> {
        let from = self.kept.machines.len();
        let to = self.plan.machines.len().min(from.saturating_add(most));
        let this = &*self;
        let made: Vec<machine::OfMachine> = (from..to)
            .into_par_iter()
            .map(|place| machine::machine(this, place))
            .collect();
        made.into_iter().map(|of| self.keep(of)).collect()
    }

    /// Keeps of a machine what the other sheets need.
    fn keep(&mut self, mut of: machine::OfMachine) -> Made {
        let place = self.kept.machines.len();
        uses::keep(&mut self.kept.uses, place, &of.digests);
        if self.plan.machines.len() > store::MATRIX {
            // the table of every oil on every machine is left out: its cells need not be kept
            for digest in &mut of.digests {
                digest.cells = Vec::new();
            }
        }
        self.kept.machines.push(of.digests);
        for (name, law) in of.laws {
            let (_, machines) = self.kept.laws.entry(name).or_insert((law, Vec::new()));
            machines.push(place);
        }
        if let Body::Machine(body) = &of.made.sheet.body {
            tally(&mut self.kept.judged, &body.caution.judged);
            tally(&mut self.kept.not_judged, &body.caution.not_judged);
        }
        of.made
    }

    /// The sheets beside those of the machines, the overview first. All machines are to be made
    /// before.
    pub fn others(&self) -> impl Iterator<Item = Sheet> + '_ {
        let areas = (0..self.plan.areas.len()).map(|i| machines::area(self, i));
        let oils = (0..self.plan.oils.len()).filter_map(|i| oils::oil(self, i));
        std::iter::once_with(|| overview::sheet(self))
            .chain(areas)
            .chain(oils)
            .chain(self.run.audit.and_then(|a| audit::sheet(self, a)))
            .chain(self.changes())
            .chain(std::iter::once_with(|| reference::methods(self)))
            .chain(std::iter::once_with(|| reference::rules(self)))
            .chain(std::iter::once_with(|| reference::words(self)))
    }

    /// The page of what moved, where an older state was named.
    fn changes(&self) -> Option<Sheet> {
        let (fixed, since) = self
            .plan
            .revision
            .as_ref()
            .zip(self.run.options.since.as_ref())?;
        Some(revision::sheet(self, fixed, since))
    }

    /// The links of the bar of a document that holds all sheets.
    pub fn nav(&self) -> Vec<NavLink> {
        self.plan.nav(On::Overview)
    }

    /// What all sheets share.
    pub fn frame(&self) -> Frame {
        let site = &self.run.scales.site.frame;
        let head = &self.run.head;
        Frame {
            site: site.site.clone().unwrap_or_else(|| "Site".to_owned()),
            client: site.client.clone(),
            document: site.document.clone(),
            revision: site.revision.clone(),
            date: head.date.clone(),
            author: site.author.clone(),
            status: site.status.clone(),
            logo: self.run.options.logo.clone(),
            fingerprint: grouped(&head.inputs),
            program: format!(
                concat!("filmwright ", env!("CARGO_PKG_VERSION"), ", rules {}"),
                head.rules
            ),
            units: match self.run.scales.units {
                Units::Si => "SI; °C, mm²/s".to_owned(),
                Units::Us => "US customary; °F, viscosity in mm²/s".to_owned(),
            },
            paper: self.run.options.paper,
            warning: self.run.options.warning.clone(),
        }
    }

    fn oil_id(&self, oil: usize) -> String {
        self.run.scales.site.oils[oil].id.clone()
    }
}

/// Counts what stands on a sheet; what stands in brackets is particular to it.
fn tally(into: &mut Vec<(String, u32)>, items: &[String]) {
    for item in items {
        let bare = item.split(" (").next().unwrap_or(item);
        match into.iter_mut().find(|(known, _)| known == bare) {
            Some((_, n)) => *n += 1,
            None => into.push((bare.to_owned(), 1)),
        }
    }
}

/// A fingerprint in groups of eight.
fn grouped(hex: &str) -> String {
    let letters: Vec<char> = hex.chars().collect();
    let groups: Vec<String> = letters.chunks(8).map(|g| g.iter().collect()).collect();
    groups.join(" ")
}

/// A text as part of an id.
fn ascii(text: &str) -> String {
    plain(text)
}
