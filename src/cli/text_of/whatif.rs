//! `whatif`: what a changed value moves, as text.

use crate::cli::text::{Column, hanging, table};
use crate::decide::whatif::{Change, Governing, LimitMoved, OilMoved};
use crate::quantity::show::{Toward, Units, margin, quantity};
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::results::need::end_word;
use crate::results::whatif::is_kelvin;
use std::fmt::Write as _;

const COLUMNS: [Column; 4] = [
    Column::text("oil", 0),
    Column::text("verdict", 0),
    Column::text("margins", 0),
    Column::text("conditions", 1),
];

/// Everything that moves on the points.
pub fn text(changes: &[Change], units: Units, width: usize) -> String {
    let all: Vec<String> = changes.iter().map(|c| one(c, units, width)).collect();
    let mut out = all.join("\n");
    out.push_str("Files untouched.\n");
    out
}

fn one(change: &Change, units: Units, width: usize) -> String {
    let lead = format!("{}  ", change.address);
    if change.empty {
        let text = "nothing weighed: the oil list holds nothing of the sort this point takes  [nothing-to-weigh]";
        return hanging(&lead, text, width);
    }
    if change.nothing() {
        return hanging(&lead, "nothing changes", width);
    }
    let mut out = hanging(&lead, &headline(change), width);
    for limit in &change.limits {
        let text = format!(
            "{} -> {}",
            side(limit, limit.before.as_ref(), units),
            side(limit, limit.after.as_ref(), units)
        );
        let lead = format!("  {}  ", end_word(limit.end));
        out.push_str(&hanging(&lead, &text, width));
    }
    let rows: Vec<Vec<String>> = change.oils.iter().map(row).collect();
    if !rows.is_empty() {
        let said = |i: usize| rows.iter().any(|r| !r[i].is_empty());
        let kept: Vec<usize> = (0..COLUMNS.len()).filter(|i| said(*i)).collect();
        let columns: Vec<Column> = kept.iter().map(|i| COLUMNS[*i]).collect();
        let rows: Vec<Vec<String>> = rows
            .iter()
            .map(|r| kept.iter().map(|i| r[*i].clone()).collect())
            .collect();
        out.push('\n');
        out.push_str(&table(&columns, &rows, width));
    }
    let _ = match change.still {
        0 => writeln!(out, "\n  every oil moves"),
        1 => writeln!(out, "\n  1 other oil does not move"),
        n => writeln!(out, "\n  {n} other oils do not move"),
    };
    out
}

fn headline(change: &Change) -> String {
    let name = |id: &Option<String>| id.clone().unwrap_or_else(|| "none".to_owned());
    match &change.proposed {
        Some((before, after)) => format!(
            "the oil proposed changes: {} -> {}",
            name(before),
            name(after)
        ),
        None => {
            let turned = change
                .oils
                .iter()
                .filter(|o| o.stand.0 != o.stand.1)
                .count();
            match turned {
                0 => "the oil proposed stays, no verdict turns".to_owned(),
                1 => "the oil proposed stays, 1 verdict turns".to_owned(),
                n => format!("the oil proposed stays, {n} verdicts turn"),
            }
        }
    }
}

fn side(limit: &LimitMoved, governing: Option<&Governing>, units: Units) -> String {
    let Some(g) = governing else {
        return "none".to_owned();
    };
    let other = match (&limit.before, &limit.after) {
        (Some(a), Some(b)) => a.says != b.says || a.part != b.part,
        _ => true,
    };
    let mut text = g
        .limit
        .map_or_else(|| g.says.clone(), |a| quantity(a, units, Toward::Nearest));
    if let Some(t) = g.at {
        let t = ThermodynamicTemperature::from_base(t).amount();
        let _ = write!(text, " at {}", quantity(t, units, Toward::Nearest));
    }
    if other && g.limit.is_some() {
        let part = g.part.as_ref().map_or(String::new(), |p| format!("{p}: "));
        let _ = write!(text, " ({part}{})", g.says);
    }
    text
}

fn row(o: &OilMoved) -> Vec<String> {
    let name = if o.in_use {
        format!("{} (in use)", o.oil)
    } else {
        o.oil.clone()
    };
    let (was, is) = (o.stand.0.word(), o.stand.1.word());
    let verdict = if was == is {
        format!("{is}, as before")
    } else {
        format!("{was} -> {is}")
    };
    let margins: Vec<String> = o
        .margins
        .iter()
        .map(|m| {
            let (decimals, unit) = if is_kelvin(m.name) {
                (1, " K")
            } else {
                (2, "")
            };
            let shown =
                |v: Option<f64>| v.map_or_else(|| "none".to_owned(), |v| margin(v, decimals));
            format!("{} {} -> {}{unit}", m.name, shown(m.before), shown(m.after))
        })
        .collect();
    let mut conditions: Vec<String> = Vec::new();
    conditions.extend(o.conditions.0.iter().map(|r| format!("+ {r}")));
    conditions.extend(o.conditions.1.iter().map(|r| format!("- {r}")));
    vec![name, verdict, margins.join(", "), conditions.join(", ")]
}
