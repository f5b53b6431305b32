//! Fill-point labels: what goes into a point once its sheet is signed.

use super::Run;
use super::case::{Case, Now};
use super::sign;
use crate::judge::Verdict;
use crate::report::model::FillLabel;
use crate::report::names::{Names, Place};
use crate::weighing::Weighed;

impl Run<'_> {
    /// The label of a point; with no oil where none is proposed.
    pub fn label(&self, weighed: &Weighed<'_>) -> FillLabel {
        let place = Place::new(&mut Names::new(), "label", "");
        let case = Case::new(self, weighed, "p1".to_owned(), &place);
        let lead = case.lead.filter(|_| case.proposed);
        let oil = lead.map(|c| case.oil(c.oil));
        FillLabel {
            address: weighed.point.address(),
            title: weighed.point.title.clone().unwrap_or_default(),
            oil: oil.map(|o| o.id.clone()),
            oil_name: oil.and_then(|o| o.name.clone()).unwrap_or_default(),
            grease: case.grease(),
            fill: sign::fill(&case),
            count: weighed.point.count,
            remove: lead.filter(|c| !c.in_use).and_then(|_| match case.now {
                Now::Weighed(c) => Some(case.id(c.oil).to_owned()),
                Now::Barred(b) => Some(case.id(b.oil).to_owned()),
                Now::Other(id) => Some(id.to_owned()),
                Now::Unknown | Now::Nothing => None,
            }),
            tight: lead.is_some_and(|c| c.judgement.verdict == Verdict::Tight),
            conditions: lead.map_or(0, |c| c.conditions.len()),
        }
    }
}
