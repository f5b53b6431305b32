//! The shortest list that serves all points of the report, one shorter, one longer.

use super::digest::Digest;
use super::{Report, say};
use crate::decide::pool::solve::solve;
use crate::decide::pool::step::{Step, longer, shorter};
use crate::decide::pool::{Outcome, Pick, Place, Solved, Stock, Terms};
use crate::quantity::show::{Toward, fixed};
use crate::report::draw::list_length::{ListFigure, ListRow};
use crate::report::model::Phrase;

/// Reports of more points than this are not searched for the shortest list: the command does it.
const MOST: usize = 2000;

/// What is known of the lists.
pub(super) struct Lists<'d> {
    digests: Vec<&'d Digest>,
    places: Vec<Place>,
    outcome: Outcome,
    steps: [Option<Step>; 2],
}

/// Works the lists out; none where no point can be decided, or there are too many.
pub(super) fn lists<'d>(report: &'d Report<'_>) -> Option<Lists<'d>> {
    let points = report.kept.machines.iter().flatten();
    let digests: Vec<&Digest> = points.filter(|d| d.place_on_list.is_some()).collect();
    if digests.is_empty() || digests.len() > MOST {
        return None;
    }
    let places: Vec<Place> = digests
        .iter()
        .filter_map(|d| d.place_on_list.clone())
        .collect();
    let site = report.run.scales.site;
    let names: Vec<&str> = site.oils.iter().map(|o| o.id.as_str()).collect();
    let terms = Terms::default();
    let outcome = solve(&places, &names, &terms);
    let steps = match &outcome {
        Outcome::Solved(solved) => [
            shorter(&places, solved, &terms),
            longer(&places, solved, &terms),
        ],
        _ => [None, None],
    };
    Some(Lists {
        digests,
        places,
        outcome,
        steps,
    })
}

impl Lists<'_> {
    fn solved(&self) -> Option<&Solved> {
        match &self.outcome {
            Outcome::Solved(solved) => Some(solved),
            _ => None,
        }
    }

    /// Points that hold, are tight, have no oil of the list.
    fn counts(picks: &[Pick], without: usize) -> [u32; 4] {
        let tight = picks.iter().filter(|p| p.offer.tight).count();
        let small = |n: usize| u32::try_from(n).unwrap_or(u32::MAX);
        [small(picks.len() - tight), small(tight), small(without), 0]
    }

    /// The figure of list lengths.
    pub(super) fn figure(&self, report: &Report<'_>) -> Option<ListFigure> {
        let solved = self.solved()?;
        let n = solved.stocks.len();
        let row = |title: usize, note: String, picked: bool, counts: [u32; 4]| ListRow {
            title: say::count(title, "oil or grease", "oils and greases"),
            note,
            picked,
            counts,
        };
        let id = |step: &Step| report.oil_id(step.stock.oil);
        let mut rows = Vec::new();
        if let Some(step) = &self.steps[0] {
            let counts = Self::counts(&step.picks, step.unserved.len());
            rows.push(row(n - 1, format!("without {}", id(step)), false, counts));
        }
        let counts = Self::counts(&solved.picks, 0);
        rows.push(row(n, "shortest that serves all".to_owned(), true, counts));
        if let Some(step) = &self.steps[1] {
            let counts = Self::counts(&step.picks, step.unserved.len());
            rows.push(row(n + 1, format!("with {}", id(step)), false, counts));
        }
        let points = say::count(self.places.len(), "lubrication point", "lubrication points");
        Some(ListFigure {
            id: "fig-lists".to_owned(),
            title: "How many lubrication points each oil list serves".to_owned(),
            description: format!("The shortest list that serves {points} has {n} oils and greases."),
            caption: "One mark a lubrication point that can be decided. A point without an oil of the list counts as failing.".to_owned(),
            rows,
        })
    }

    /// What the lists are and cost, in sentences; where the shorter list costs more, that first.
    pub(super) fn notes(&self, report: &Report<'_>) -> Vec<Phrase> {
        let Some(solved) = self.solved() else {
            return vec!["The shortest list was not proven within the limit of the search; see: filmwright pool.".into()];
        };
        let mut notes = Vec::new();
        let (cost, today, left_out) = self.money(&solved.picks);
        let money = |x: f64| {
            let unit = report.run.scales.site.frame.currency.as_deref();
            let unit = unit.map_or(String::new(), |u| format!(" {u}"));
            format!("{}{unit}", fixed(x, 0, Toward::Nearest))
        };
        let known = self.places.len() - left_out;
        if known > 0 {
            let dearer = if cost > today {
                "The shortest list costs more"
            } else {
                "The shortest list does not cost more"
            };
            notes.push(
                format!(
                    "{dearer}: {} a year where today's oils cost {}, at today's use, on the {} for which use and prices are stated.",
                    money(cost),
                    money(today),
                    say::count(known, "point", "points")
                )
                .into(),
            );
        }
        notes.push(self.served(report, solved));
        notes.extend(
            self.steps
                .iter()
                .flatten()
                .map(|s| self.step(report, s, solved)),
        );
        notes.push(
            format!(
                "Proven: no list is shorter than {}. Ties go by fewest changes from today with the conditions they bring, then cost, then name. Lubricants behind a ring fence (food, fire, water protection, oxygen) are never counted as one with others.",
                solved.bound
            )
            .into(),
        );
        notes
    }

    /// Cost a year of the points for which it is known on both sides, and what they cost today.
    fn money(&self, picks: &[Pick]) -> (f64, f64, usize) {
        let (mut cost, mut today, mut left_out) = (0.0, 0.0, 0);
        for pick in picks {
            match (pick.offer.cost, self.digests[pick.place].cost_now) {
                (Some(new), Some(old)) => {
                    cost += new as f64 / 1e3;
                    today += old;
                }
                _ => left_out += 1,
            }
        }
        (cost, today, left_out)
    }

    fn served(&self, report: &Report<'_>, solved: &Solved) -> Phrase {
        let mut phrase = Phrase::new().and(format!(
            "The shortest list that serves all has {}: ",
            say::count(solved.stocks.len(), "oil or grease", "oils and greases")
        ));
        for (i, stock) in solved.stocks.iter().enumerate() {
            if i > 0 {
                phrase = phrase.and("; ");
            }
            phrase = phrase
                .tag(report.oil_id(stock.oil))
                .and(self.what_it_serves(*stock, solved));
        }
        phrase.and(".")
    }

    fn what_it_serves(&self, stock: Stock, solved: &Solved) -> String {
        let mine = solved
            .picks
            .iter()
            .filter(|p| p.offer.oil == stock.oil && self.places[p.place].fence == stock.fence);
        let n = mine.count();
        let fence = if stock.fence.stands() {
            format!(", behind the fence of {}", stock.fence.words())
        } else {
            String::new()
        };
        format!(" for {}{fence}", say::count(n, "point", "points"))
    }

    fn step(&self, report: &Report<'_>, step: &Step, solved: &Solved) -> Phrase {
        let id = report.oil_id(step.stock.oil);
        let address = |place: &usize| self.digests[*place].address.clone();
        if !step.unserved.is_empty() {
            let lost: Vec<String> = step.unserved.iter().map(address).collect();
            return Phrase::new()
                .and("One shorter, without ")
                .tag(id)
                .and(format!(", leaves no oil for {}.", lost.join(", ")));
        }
        let was_tight = |p: &&Pick| {
            let before = solved.picks.iter().find(|b| b.place == p.place);
            before.is_some_and(|b| b.offer.tight) && !p.offer.tight
        };
        let gains: Vec<String> = step
            .picks
            .iter()
            .filter(was_tight)
            .map(|p| address(&p.place))
            .collect();
        let says = if gains.is_empty() {
            ", saves changes or cost but moves no verdict.".to_owned()
        } else {
            format!(", lets {} hold instead of tight.", gains.join(", "))
        };
        Phrase::new().and("One longer, with ").tag(id).and(says)
    }
}
