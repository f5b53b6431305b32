//! How hot each candidate runs by its own losses, and what it costs, as text.

use crate::cli::text::{Column, folded, table};
use crate::judge::own::Running;
use crate::quantity::show::{Toward, Units, quantity, significant};
use crate::quantity::{Measure, Power, ThermodynamicTemperature};
use crate::weighing::{Scales, Weighed};

const COLUMNS: [Column; 9] = [
    Column::text("", 0),
    Column::text("oil", 0),
    Column::text("as read", 3),
    Column::text("by losses", 0),
    Column::text("judged at", 1),
    Column::text("film", 2),
    Column::text("drag", 0),
    Column::text("over today", 2),
    Column::text("a year", 1),
];

/// A table of the candidates whose losses are known; nothing where there are none.
pub fn running(out: &mut String, scales: &Scales<'_>, w: &Weighed<'_>, width: usize) {
    let found: Vec<(usize, &Running)> = w
        .candidates
        .iter()
        .enumerate()
        .filter_map(|(i, c)| Some((i, c.running.as_ref()?)))
        .collect();
    let Some((_, first)) = found.first() else {
        return;
    };
    let units = scales.units;
    let ambient = temperature(Some(first.drag.ambient.base()), units);
    let says = first.stands_on(&ambient);
    out.push('\n');
    out.push_str(&folded(&says, "  ", width));
    let rows: Vec<Vec<String>> = found
        .iter()
        .map(|(i, r)| {
            let oil = scales.site.oils[w.candidates[*i].oil].id.clone();
            let mut cells = vec![super::weigh::letter(*i), oil];
            cells.extend(row(r, units));
            cells
        })
        .collect();
    let said = |i: usize| rows.iter().any(|r| r[i] != "-");
    let kept: Vec<usize> = (0..COLUMNS.len()).filter(|i| said(*i)).collect();
    let columns: Vec<Column> = kept.iter().map(|i| COLUMNS[*i]).collect();
    let rows: Vec<Vec<String>> = rows
        .iter()
        .map(|r| kept.iter().map(|i| r[*i].clone()).collect())
        .collect();
    out.push_str(&table(&columns, &rows, width));
}

fn row(r: &Running, units: Units) -> [String; 7] {
    let watts = |w: f64| quantity(Power::from_base(w).amount(), units, Toward::Nearest);
    let over = r.over_in_use.filter(|w| w.abs() > 0.0).map_or_else(
        || "-".to_owned(),
        |w| {
            let sign = if w < 0.0 { "-" } else { "+" };
            format!("{sign}{}", watts(w.abs()))
        },
    );
    let energy = r.energy_kwh.map_or_else(
        || "-".to_owned(),
        |kwh| format!("{} kWh", significant(kwh, 3, Toward::Up)),
    );
    let films = r.drag.films.iter().map(|(_, t)| t.base());
    let warmest = films.max_by(f64::total_cmp);
    [
        temperature(r.stated, units),
        temperature(r.by_losses, units),
        temperature(r.used(), units),
        temperature(warmest, units),
        watts(r.drag.total.base()),
        over,
        energy,
    ]
}

fn temperature(t: Option<f64>, units: Units) -> String {
    t.map_or_else(
        || "-".to_owned(),
        |t| {
            let t = ThermodynamicTemperature::from_base(t);
            quantity(t.amount(), units, Toward::Nearest)
        },
    )
}
