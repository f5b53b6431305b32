//! The cold end of an oil, and its life when hot, as text.

use super::{entry, hours, temperature, viscosity};
use crate::cli::text::{Column, table};
use crate::model::stated::{Bound, ViscosityLimit};
use crate::oil::sheet::{ColdSheet, OilSheet};
use crate::oil::start::Standing;
use crate::quantity::show::{Toward, Units, fixed, quantity, significant, unit_of};
use crate::quantity::{Kind, Measure, ThermodynamicTemperature, Time};
use std::fmt::Write as _;

fn bound(b: Option<Bound<ThermodynamicTemperature>>, units: Units) -> String {
    b.map_or_else(
        || "not stated".to_owned(),
        |b| b.says(|t| temperature(t, units)),
    )
}

/// What is measured cold, where limits are reached.
pub(super) fn cold(out: &mut String, c: &ColdSheet, units: Units, width: usize) {
    out.push('\n');
    let mut says = format!("pour point {}", bound(c.pour, units));
    if c.cloud.is_some() {
        let _ = write!(says, ", cloud point {}", bound(c.cloud, units));
    }
    let _ = write!(says, "; known down to {}", temperature(c.coldest, units));
    out.push_str(&entry("cold", &says, width));
    for r in &c.measured {
        let used = r.point.used.says();
        let says = format!(
            "{} at {} ({}), the line gives {}: {used}",
            quantity(r.point.eta.amount(), units, Toward::Nearest),
            temperature(r.point.at, units),
            r.point.test.word(),
            viscosity(r.point.line, units)
        );
        out.push_str(&entry("measured", &says, width));
    }
    starts(out, c, units, width);
    if let Some((d, t)) = &c.designation {
        let (name, how, lacks) = d.says();
        let says = format!(
            "{name}: 750 mPa.s at {} ({how}){lacks}",
            temperature(t.value, units)
        );
        out.push_str(&entry("ASTM D6080", &says, width));
    }
}

/// Start temperatures are cold ends: rounded up.
fn starts(out: &mut String, c: &ColdSheet, units: Units, width: usize) {
    let unit = unit_of(Kind::Temperature, units);
    let rows: Vec<Vec<String>> = c
        .starts
        .iter()
        .map(|s| {
            let limit = match s.start.limit {
                ViscosityLimit::Kinematic(nu) => nu.amount(),
                ViscosityLimit::Dynamic(eta) => eta.amount(),
            };
            let far = match s.start.standing {
                Standing::Below(by) => format!("{by:.0} K"),
                _ => String::new(),
            };
            let at = fixed(s.at.value.amount().in_unit(unit), 0, Toward::Up);
            vec![
                format!("{at} {}", unit.name),
                quantity(limit, units, Toward::Nearest),
                far,
                s.start.part.clone(),
            ]
        })
        .collect();
    let columns = [
        Column::number("reaches at", 0),
        Column::number("limit", 0),
        Column::number("extrapolated", 0),
        Column::text("of", 1),
    ];
    if !rows.is_empty() {
        out.push_str(&table(&columns, &rows, width));
    }
}

/// Life against temperature, both ways.
pub(super) fn life(out: &mut String, sheet: &OilSheet, units: Units, width: usize) {
    out.push('\n');
    let (basis, rows) = match &sheet.life {
        Err(why) => {
            out.push_str(&entry("life", &format!("no figure: {why}"), width));
            return;
        }
        Ok(life) => life,
    };
    let calendar = basis.calendar.map_or(String::new(), |c| {
        let years = c.base() / 31_556_952.0;
        format!(
            "; by the calendar at most {} years without analysis",
            significant(years, 2, Toward::Down)
        )
    });
    let says = format!(
        "guidance, never a promise: {}, {} times mineral oil; the shorter figure is with free water \
         and metal{calendar}",
        basis.oil,
        significant(basis.multiple.base(), 2, Toward::Nearest)
    );
    out.push_str(&entry("life", &says, width));
    let columns = [
        Column::text("runs at", 0),
        Column::text("by the equation", 0),
        Column::text("by the rule of ten", 0),
    ];
    let pair = |(a, b): (Time, Time)| format!("{} to {}", hours(a), hours(b));
    let lines: Vec<Vec<String>> = rows
        .iter()
        .map(|r| {
            vec![
                temperature(r.at, units),
                pair(r.equation),
                pair(r.rule_of_ten),
            ]
        })
        .collect();
    out.push_str(&table(&columns, &lines, width));
}
