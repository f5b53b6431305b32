//! `pool`: the shortest oil list, as text.

use crate::cli::Marks;
use crate::cli::text::{Column, folded, table, verdict};
use crate::decide::pool::case::{Pick, litres_a_year};
use crate::decide::pool::figures::{Pool, Sums, smallest};
use crate::decide::pool::{Outcome, Solved, Stock};
use crate::judge::Verdict;
use crate::quantity::show::{Toward, fixed, margin};
use crate::results::pool::{Asked, of_stock, replaces, why_undecided};
use crate::weighing::Scales;
use std::fmt::Write as _;

/// How the list is printed.
#[derive(Clone, Copy, Debug)]
pub struct Style {
    /// Verdict marks.
    pub marks: Marks,
    /// Columns of the terminal.
    pub width: usize,
}

/// The answer.
pub fn text(scales: &Scales<'_>, pool: &Pool<'_, '_>, asked: &Asked<'_>, style: Style) -> String {
    match &pool.outcome {
        Outcome::Solved(solved) => solved_text(scales, pool, solved, asked, style),
        Outcome::Gap {
            bound,
            known,
            nodes,
        } => gap(*bound, *known, *nodes),
        Outcome::Impossible(_) => String::new(),
    }
}

fn gap(bound: usize, known: usize, nodes: u64) -> String {
    format!(
        "not proven: the shortest list has {bound} to {known} oils, a gap of {}\n  {} looked at. To look at more: filmwright pool --nodes {}\n",
        known - bound,
        self::nodes(nodes),
        nodes.max(1).saturating_mul(10)
    )
}

fn solved_text(
    scales: &Scales<'_>,
    pool: &Pool<'_, '_>,
    solved: &Solved,
    asked: &Asked<'_>,
    style: Style,
) -> String {
    let sums = pool.sums(scales.site, &solved.picks, &[]);
    let told = Told {
        scales,
        pool,
        asked,
        style,
    };
    let mut out = told.dearer(&sums, solved.stocks.len());
    out.push_str(&told.headline(solved));
    out.push('\n');
    out.push_str(&told.oils(solved));
    out.push('\n');
    out.push_str(&told.lists(solved, &sums));
    out.push_str(&told.money(&sums, solved.stocks.len()));
    out.push_str(&told.margins(&sums));
    out.push_str(&told.left_out());
    out.push_str(&told.proof(solved));
    out
}

pub(super) struct Told<'t, 'w, 'a> {
    pub(super) scales: &'t Scales<'a>,
    pub(super) pool: &'t Pool<'w, 'a>,
    pub(super) asked: &'t Asked<'t>,
    pub(super) style: Style,
}

impl Told<'_, '_, '_> {
    pub(super) fn id(&self, oil: usize) -> &str {
        &self.scales.site.oils[oil].id
    }

    fn currency(&self) -> String {
        let unit = self.scales.site.frame.currency.as_deref();
        unit.map_or(String::new(), |u| format!(" {u}"))
    }

    /// A sum of money a year.
    pub(super) fn sum(&self, x: f64) -> String {
        format!("{}{}", fixed(x, 0, Toward::Nearest), self.currency())
    }

    /// Cost with what holding the oils costs, where that is given.
    pub(super) fn with_holding(&self, cost: f64, oils: usize) -> f64 {
        cost + self.asked.site_price.unwrap_or(0.0) * oils as f64
    }

    /// `17 lubrication points`, `14 machines`.
    pub(super) fn count(&self, n: usize) -> String {
        let several = self.pool.weighed.iter().any(|w| w.point.point.is_some());
        let (one, many) = if several {
            ("lubrication point", "lubrication points")
        } else {
            ("machine", "machines")
        };
        format!("{n} {}", if n == 1 { one } else { many })
    }

    /// A list that costs more says so before anything else.
    fn dearer(&self, sums: &Sums, oils: usize) -> String {
        let cost = self.with_holding(sums.cost, oils);
        let today = self.with_holding(sums.cost_today, self.pool.today.len());
        if cost <= today {
            return String::new();
        }
        format!(
            "this list costs more: {} a year where today's oils cost {}\n",
            self.sum(cost),
            self.sum(today)
        )
    }

    fn headline(&self, solved: &Solved) -> String {
        let n = solved.stocks.len();
        let oils = if n == 1 { "oil covers" } else { "oils cover" };
        let twice = repeated(&solved.stocks);
        let mut text = format!(
            "{n} {oils} all {} that can be decided ({} in use today)\n",
            self.count(self.pool.places.len()),
            self.pool.today.len()
        );
        for oil in twice {
            let _ = writeln!(
                text,
                "  {} stands on the list twice: stocks on two sides of a ring fence are never one",
                self.id(oil)
            );
        }
        text
    }

    /// The oils with what they serve.
    fn oils(&self, solved: &Solved) -> String {
        let fenced = solved.stocks.iter().any(|s| s.fence.stands());
        let mut columns = vec![
            Column::text("oil", 0),
            Column::text("fenced", 0),
            Column::text("verdict", 0),
            Column::text("tightest", 4),
            Column::number("L a year", 3),
            Column::text("replaces", 2),
            Column::text("serves", 0),
        ];
        let rows = solved.stocks.iter().map(|s| self.row(solved, *s));
        let mut rows: Vec<Vec<String>> = rows.collect();
        if !fenced {
            columns.remove(1);
            for row in &mut rows {
                row.remove(1);
            }
        }
        table(&columns, &rows, self.style.width)
    }

    fn row(&self, solved: &Solved, stock: Stock) -> Vec<String> {
        let mine: Vec<&Pick> = of_stock(self.pool, &solved.picks, stock).collect();
        let tight = mine.iter().any(|p| p.offer.tight);
        let word = if tight {
            Verdict::Tight
        } else {
            Verdict::Holds
        };
        let stated: Vec<f64> = mine
            .iter()
            .filter_map(|p| litres_a_year(self.pool.point(p.place)))
            .collect();
        let sum = fixed(stated.iter().sum(), 0, Toward::Nearest);
        let litres = match stated.len() {
            0 => "-".to_owned(),
            n if n < mine.len() => format!(">= {sum}"),
            _ => sum,
        };
        let old = replaces(self.scales, self.pool, &mine);
        let serves: Vec<String> = mine
            .iter()
            .map(|p| self.pool.point(p.place).point.address())
            .collect();
        let fence = if stock.fence.stands() {
            stock.fence.words()
        } else {
            "-".to_owned()
        };
        vec![
            self.id(stock.oil).to_owned(),
            fence,
            if mine.is_empty() {
                "kept, serves nothing".to_owned()
            } else {
                verdict(word, self.style.marks)
            },
            self.tightest(&mine),
            litres,
            if old.is_empty() {
                "-".to_owned()
            } else {
                old.join(" ")
            },
            serves.join(", "),
        ]
    }

    fn tightest(&self, mine: &[&Pick]) -> String {
        mine.iter()
            .filter_map(|p| {
                let c = self.pool.candidate(p.place, p.offer.oil)?;
                Some((smallest(&c.judgement)?, p.place))
            })
            .min_by(|a, b| a.0.total_cmp(&b.0))
            .map_or_else(
                || "-".to_owned(),
                |(m, place)| {
                    format!(
                        "{} {}",
                        margin(m, 1),
                        self.pool.point(place).point.address()
                    )
                },
            )
    }

    /// Points without an answer, and why.
    fn left_out(&self) -> String {
        let mut out = String::new();
        if self.pool.undecided.is_empty() {
            return out;
        }
        let _ = writeln!(
            out,
            "\n  {} cannot be decided, on no list:",
            self.count(self.pool.undecided.len())
        );
        for i in &self.pool.undecided {
            let w = &self.pool.weighed[*i];
            let _ = writeln!(out, "    {}: {}", w.point.address(), why_undecided(w));
        }
        out
    }

    fn proof(&self, solved: &Solved) -> String {
        let ties = if solved.ties_proven {
            "Ties: fewest changes from today and conditions they bring, then cost, then name."
        } else {
            "Not all lists of this length were compared: the nodes ran out among ties."
        };
        let text = format!(
            "Proven: no list is shorter than {} ({} looked at). {ties} Every pair of the list was weighed again.",
            solved.bound,
            nodes(solved.nodes)
        );
        format!("\n{}", folded(&text, "  ", self.style.width))
    }
}

/// `1 node`, `24 nodes`.
fn nodes(n: u64) -> String {
    format!("{n} {}", if n == 1 { "node" } else { "nodes" })
}

/// Oils that stand on the list more than once.
fn repeated(stocks: &[Stock]) -> Vec<usize> {
    let mut oils: Vec<usize> = stocks.iter().map(|s| s.oil).collect();
    oils.sort_unstable();
    let twice = oils.windows(2).filter(|w| w[0] == w[1]).map(|w| w[0]);
    let mut found: Vec<usize> = twice.collect();
    found.dedup();
    found
}
