//! The machines an oil is weighed on, as text.

use super::{entry, hours, per_cent, temperature};
use crate::cli::Marks;
use crate::cli::text::verdict;
use crate::judge::allowance::Room;
use crate::quantity::show::{Toward, Units, fixed, margin, significant};
use crate::weighing::uses::{Age, OilUse};
use std::fmt::Write as _;

/// One paragraph a machine.
pub fn text(uses: &[OilUse], units: Units, marks: Marks, width: usize) -> String {
    let mut out = String::new();
    for u in uses {
        out.push('\n');
        let title = u.title.as_ref().map_or(String::new(), |t| format!("  {t}"));
        let word = u
            .verdict
            .map_or("barred".to_owned(), |v| verdict(v, marks).trim().to_owned());
        let _ = writeln!(out, "  {}{title}: {}, {word}", u.address, u.role.word());
        if let Some(j) = &u.judgement {
            let mut ends = Vec::new();
            for (m, end) in [(j.hot, "hot"), (j.cold, "cold")] {
                ends.extend(m.map(|m| format!("{} step {end}", margin(m.value, 2))));
            }
            if !ends.is_empty() {
                out.push_str(&entry("margins", &ends.join(", "), width));
            }
        }
        out.push_str(&entry("because", &u.because, width));
        if let Some((room, demand)) = &u.room {
            out.push_str(&entry("may shear", &shear(*room, demand.as_deref()), width));
        }
        if let Some(age) = &u.age {
            aged(&mut out, age, units, width);
        }
    }
    out
}

fn shear(room: Room, demand: Option<&str>) -> String {
    let demand = demand.unwrap_or("the floor");
    match room {
        Room::NoFloor => "nothing there asks for a least viscosity".to_owned(),
        Room::None { .. } => format!("not at all: the new oil is below {demand}"),
        Room::AllOfIt => "all its polymer: the base oil alone meets every floor".to_owned(),
        Room::UpTo { loss, .. } => {
            format!(
                "{} at 100 degC until it meets {demand} no longer",
                per_cent(loss)
            )
        }
    }
}

fn aged(out: &mut String, age: &Age, units: Units, width: usize) {
    let says = match &age.life {
        Err(why) => format!("no figure: {why}"),
        Ok(l) => {
            let below = if l.decides {
                ""
            } else {
                "; so cool that additives and dirt decide, not oxidation"
            };
            format!(
                "at {} {} to {} by the equation, {} to {} by the rule of ten{below}; guidance only",
                temperature(age.at, units),
                hours(l.equation.0),
                hours(l.equation.1),
                hours(l.rule_of_ten.0),
                hours(l.rule_of_ten.1)
            )
        }
    };
    out.push_str(&entry("life", &says, width));
    for d in &age.drain {
        let says = format!(
            "{} to {}, {} [{}]; the maker's figure and analysis come first",
            hours(d.hours.0),
            hours(d.hours.1),
            d.by,
            d.source
        );
        out.push_str(&entry("drain", &says, width));
    }
    match age.cost {
        Some((least, most)) => {
            let money = |c: f64| significant(c, 3, Toward::Up);
            let says = format!(
                "{} to {} for {} to {} changes and {} to {} L",
                money(least.cost),
                money(most.cost),
                fixed(least.changes, 2, Toward::Nearest),
                fixed(most.changes, 2, Toward::Nearest),
                significant(least.litres, 3, Toward::Nearest),
                significant(most.litres, 3, Toward::Nearest)
            );
            out.push_str(&entry("a year", &says, width));
        }
        None => {
            let says = format!("no cost: not known are {}", age.cost_lacks.join(", "));
            out.push_str(&entry("a year", &says, width));
        }
    }
}
