//! `pool`: the list beside one shorter and one longer, with what each costs.

use super::pool::Told;
use crate::cli::text::{Column, folded, hanging, table};
use crate::decide::pool::Solved;
use crate::decide::pool::figures::Sums;
use crate::decide::pool::step::Step;
use crate::quantity::show::{Toward, fixed, margin};
use std::fmt::Write as _;

impl Told<'_, '_, '_> {
    /// The list, one shorter and one longer, side by side.
    pub(super) fn lists(&self, solved: &Solved, sums: &Sums) -> String {
        let columns = [
            Column::text("list", 0),
            Column::number("holds", 0),
            Column::number("tight", 0),
            Column::number("without", 0),
            Column::number("changed", 3),
            Column::number("L filled", 2),
            Column::number("cost a year", 5),
            Column::number("smallest", 4),
        ];
        let n = solved.stocks.len();
        let mut rows = vec![self.list_row(&format!("{n} oils, shortest"), sums, n)];
        let mut under = Vec::new();
        for (step, words, n) in [
            (&self.pool.shorter, "without", n.saturating_sub(1)),
            (&self.pool.longer, "with", n + 1),
        ] {
            let Some(step) = step else {
                continue;
            };
            let sums = self
                .pool
                .sums(self.scales.site, &step.picks, &step.unserved);
            let title = format!("{n} oils, {words} {}", self.id(step.stock.oil));
            rows.push(self.list_row(&title, &sums, n));
            under.extend(self.step_says(step, solved));
        }
        let mut out = table(&columns, &rows, self.style.width);
        for line in under {
            out.push_str(&hanging("  ", &line, self.style.width));
        }
        if self.pool.longer.is_none() {
            out.push_str("  one oil more gains nothing\n");
        }
        out
    }

    fn list_row(&self, title: &str, sums: &Sums, oils: usize) -> Vec<String> {
        vec![
            title.to_owned(),
            sums.words[0].to_string(),
            sums.words[1].to_string(),
            sums.words[2].to_string(),
            sums.changes.to_string(),
            fixed(sums.filled, 0, Toward::Up),
            self.sum(self.with_holding(sums.cost, oils)),
            sums.smallest
                .map_or_else(|| "-".to_owned(), |(m, _)| margin(m, 2)),
        ]
    }

    /// Which points a step leaves without an oil, or lifts from tight.
    fn step_says(&self, step: &Step, solved: &Solved) -> Option<String> {
        let id = self.id(step.stock.oil);
        let address = |place: usize| self.pool.point(place).point.address();
        if !step.unserved.is_empty() {
            let lost: Vec<String> = step.unserved.iter().map(|p| address(*p)).collect();
            return Some(format!("without {id} no oil serves {}", lost.join(", ")));
        }
        let tight = |place: usize| {
            let before = solved.picks.iter().find(|p| p.place == place);
            before.is_some_and(|p| p.offer.tight)
        };
        let gains: Vec<String> = step
            .picks
            .iter()
            .filter(|p| tight(p.place) && !p.offer.tight)
            .map(|p| address(p.place))
            .collect();
        (!gains.is_empty()).then(|| format!("with {id} {} hold instead of tight", gains.join(", ")))
    }

    pub(super) fn money(&self, sums: &Sums, oils: usize) -> String {
        let mut text = format!(
            "at today's use: today {} a year, this list {}",
            self.sum(self.with_holding(sums.cost_today, self.pool.today.len())),
            self.sum(self.with_holding(sums.cost, oils))
        );
        if let Some(price) = self.asked.site_price {
            let _ = write!(
                text,
                ", {} a year for each oil held included ({} today, {oils} then)",
                self.sum(price),
                self.pool.today.len()
            );
        }
        let _ = write!(
            text,
            "; {} L a year",
            fixed(sums.litres, 0, Toward::Nearest)
        );
        if sums.unpriced > 0 {
            let _ = write!(
                text,
                ". Left out of both sums, price or use not stated: {}",
                self.count(sums.unpriced)
            );
        }
        if sums.changes > 0 {
            let _ = write!(
                text,
                ". To change over: {}, {} L to be filled",
                self.count(sums.changes),
                fixed(sums.filled, 0, Toward::Up)
            );
        }
        if sums.fills_unknown > 0 {
            let _ = write!(text, " ({} not stated)", sums.fills_unknown);
        }
        text.push('.');
        format!("\n{}", folded(&text, "  ", self.style.width))
    }

    pub(super) fn margins(&self, sums: &Sums) -> String {
        let text = format!(
            "Against the oils of today {} {} margin and {} {}; against the first choice of each point {} VG step are given up in all.",
            self.count(sums.lose),
            if sums.lose == 1 { "loses" } else { "lose" },
            sums.gain,
            if sums.gain == 1 { "gains" } else { "gain" },
            fixed(sums.given_up, 1, Toward::Up)
        );
        folded(&text, "  ", self.style.width)
    }
}
