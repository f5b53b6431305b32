//! The rule of decimals of a table: found from its cells, or stated.

use super::finding::letters;
use super::layout::Layout;
use super::number::{Decimal, evidence, split};
use crate::table::{Content, Sheet};
use std::collections::BTreeMap;

/// The rule of decimals of a table, and the cell that shows it.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Decimals {
    /// The user states it.
    Stated(Decimal),
    /// A cell can only be read this way.
    Found {
        /// The rule.
        rule: Decimal,
        /// The cell.
        cell: String,
        /// What stands in it.
        text: String,
        /// How many cells show it.
        cells: usize,
    },
    /// Cells contradict each other; each is read by itself.
    Mixed {
        /// A cell with a decimal point.
        point: String,
        /// A cell with a decimal comma.
        comma: String,
    },
    /// No cell shows it.
    Nothing,
}

impl Decimals {
    /// The rule, where there is one.
    pub fn rule(&self) -> Option<Decimal> {
        match self {
            Self::Stated(rule) | Self::Found { rule, .. } => Some(*rule),
            Self::Mixed { .. } | Self::Nothing => None,
        }
    }

    /// In words.
    pub fn says(&self) -> String {
        match self {
            Self::Stated(rule) => format!("decimal {}, as stated", rule.word()),
            Self::Found {
                rule,
                cell,
                text,
                cells,
            } => {
                let n = if *cells == 1 {
                    "1 cell".into()
                } else {
                    format!("{cells} cells")
                };
                format!(
                    "decimal {}, found from {n}, the first {cell} \"{text}\"",
                    rule.word()
                )
            }
            Self::Mixed { point, comma } => {
                format!(
                    "decimal point and comma both occur ({point}, {comma}); numbers either rule can read are asked about"
                )
            }
            Self::Nothing => "no cell tells decimal point from comma".into(),
        }
    }
}

/// Finds the rule of decimals from the texts of the columns that hold quantities.
pub fn decimals(sheet: &Sheet, layout: &Layout) -> Decimals {
    let below = layout.unit_row.unwrap_or(layout.heading_row);
    let mut found: BTreeMap<&'static str, (Decimal, String, String, usize)> = BTreeMap::new();
    for column in layout
        .columns
        .iter()
        .filter(|c| !c.target.kinds().is_empty())
    {
        for row in sheet.rows.iter().filter(|r| r.number > below) {
            let Some(Content::Text(text)) = row.at(column.number) else {
                continue;
            };
            let Some(parsed) = super::parsed::parse(text, column.target.kinds()) else {
                continue;
            };
            for token in std::iter::once(&parsed.number).chain(&parsed.second) {
                if let Some(rule) = evidence(token).filter(|_| split(token).is_some()) {
                    let cell = format!("{}{}", letters(column.number), row.number);
                    let entry =
                        found
                            .entry(rule.word())
                            .or_insert((rule, cell.clone(), text.clone(), 0));
                    entry.3 += 1;
                    // The first cell in the order of rows is the one shown.
                    let earlier = row_of(&entry.1) > row.number;
                    if earlier {
                        entry.1 = cell;
                        entry.2.clone_from(text);
                    }
                }
            }
        }
    }
    match (found.get("point"), found.get("comma")) {
        (Some(p), Some(c)) => Decimals::Mixed {
            point: format!("{} \"{}\"", p.1, p.2),
            comma: format!("{} \"{}\"", c.1, c.2),
        },
        (Some((rule, cell, text, cells)), None) | (None, Some((rule, cell, text, cells))) => {
            Decimals::Found {
                rule: *rule,
                cell: cell.clone(),
                text: text.clone(),
                cells: *cells,
            }
        }
        (None, None) => Decimals::Nothing,
    }
}

fn row_of(cell: &str) -> u32 {
    cell.trim_start_matches(|c: char| c.is_ascii_alphabetic())
        .parse()
        .unwrap_or(0)
}
