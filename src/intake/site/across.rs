//! What is to be said across rows: columns without units, machines that may be one, tags twice.

use super::{Reader, of_file};
use crate::intake::finding::{Finding, Kind};
use crate::intake::layout::Column;
use crate::intake::machine::{Machine, counted};
use crate::intake::tags;
use crate::intake::target::Target;
use std::collections::BTreeMap;

/// What is to be said of whole columns.
pub(super) fn of_columns(reader: &mut Reader<'_>) {
    for (number, (n, cell, read_as)) in std::mem::take(&mut reader.bare) {
        let column = reader.layout.columns.iter().find(|c| c.number == number);
        let heading = column.map(|c| c.heading.clone()).unwrap_or_default();
        let cells = if n == 1 {
            "1 number".to_owned()
        } else {
            format!("{n} numbers")
        };
        reader.findings.push(Finding {
            kind: Kind::Question,
            row: None,
            column: Some(number),
            name: None,
            heading,
            text: String::new(),
            says: format!("{cells} without a unit, the first in {cell}, {read_as} and so on, as assumed: which unit? State it in the map"),
        });
    }
    if reader.sumps > 0 && reader.context.at_ambient.is_none() {
        let n = reader.sumps;
        let mut finding = of_file(format!(
            "{n} oil temperatures are given without the ambient they were read at; 20 degC is assumed: state it in the map or at the machine"
        ));
        finding.kind = Kind::Question;
        reader.findings.push(finding);
    }
    let unread: Vec<&Column> = reader
        .layout
        .columns
        .iter()
        .filter(|c| c.sure == 0 && matches!(c.target, Target::Note))
        .collect();
    for column in unread {
        let finding = Finding {
            kind: Kind::ReadAs,
            row: None,
            column: Some(column.number),
            name: None,
            heading: column.heading.clone(),
            text: String::new(),
            says: match &column.twice {
                Some(other) => format!("\"{other}\" holds the same already: every cell is kept as a note; the map can choose the other"),
                None => "the heading was not recognised: every cell is kept as a note; the map can say what it is".into(),
            },
        };
        reader.findings.push(finding);
    }
    let hidden: Vec<String> = reader
        .layout
        .columns
        .iter()
        .filter(|c| c.hidden && counted(&c.target))
        .map(|c| c.heading.clone())
        .collect();
    if !hidden.is_empty() {
        reader.findings.push(of_file(format!(
            "hidden columns are carried as well: {}",
            hidden.join(", ")
        )));
    }
}

/// Machines that may be one.
pub(super) fn alike(reader: &mut Reader<'_>, machines: &mut [Machine]) {
    let names: Vec<String> = machines.iter().map(|m| m.record.name.clone()).collect();
    let names: Vec<&str> = names.iter().map(String::as_str).collect();
    for (a, b) in tags::duplicates(&names) {
        if names[a] == names[b] || machines[a].record.row == machines[b].record.row {
            continue;
        }
        let mut says = format!(
            "{} of row {} and {} of row {} may be the same machine: look, and delete one",
            names[a], machines[a].record.row, names[b], machines[b].record.row
        );
        for (what, x, y) in [
            ("fill", &machines[a].fill, &machines[b].fill),
            ("temperature", &machines[a].sump, &machines[b].sump),
        ] {
            if let Some(more) = agreement(what, x, y) {
                says.push_str("; ");
                says.push_str(&more);
            }
        }
        for i in [a, b] {
            machines[i].record.notes.push(says.clone());
        }
        reader.findings.push(Finding {
            kind: Kind::Question,
            row: Some(machines[b].record.row),
            column: None,
            name: Some(names[b].to_owned()),
            heading: String::new(),
            text: names[b].to_owned(),
            says,
        });
    }
}

/// Whether readings of two rows agree, and which of several then.
fn agreement(what: &str, a: &[(String, f64)], b: &[(String, f64)]) -> Option<String> {
    if a.is_empty() || b.is_empty() {
        return None;
    }
    // Half a per cent apart are two roundings of one value.
    let same = |x: f64, y: f64| (x - y).abs() <= 0.005 * x.abs().max(y.abs());
    let pairs = a.iter().flat_map(|x| b.iter().map(move |y| (x, y)));
    let agree: Vec<_> = pairs.clone().filter(|(x, y)| same(x.1, y.1)).collect();
    Some(match agree.first() {
        Some((x, y)) if x.0 == y.0 => format!("their {what} agrees, {}", x.0),
        Some((x, y)) => format!("their {what} agrees as {} and {}", x.0, y.0),
        None => {
            let (x, y) = pairs.into_iter().next()?;
            format!("their {what} differs, {} and {}", x.0, y.0)
        }
    })
}

/// Machines of one tag: points where the register names points, else machines of their own.
pub(super) fn named_once(reader: &mut Reader<'_>, machines: Vec<Machine>) -> Vec<Vec<Machine>> {
    let mut groups: Vec<Vec<Machine>> = Vec::new();
    let mut at: BTreeMap<String, usize> = BTreeMap::new();
    for mut machine in machines {
        let name = machine.record.name.clone();
        match at.get(&name).copied() {
            None => {
                at.insert(name, groups.len());
                groups.push(vec![machine]);
            }
            Some(first) => {
                let new = machine.point.as_ref().is_some_and(|p| {
                    groups[first]
                        .iter()
                        .all(|m| m.point.as_ref().is_some_and(|q| q != p))
                });
                if new {
                    groups[first].push(machine);
                    continue;
                }
                let row = machine.record.row;
                let other = groups[first][0].record.row;
                let says = format!(
                    "the tag {name} stands in row {other} and row {row}: the same machine, or several points of it? Written as {name} (row {row})"
                );
                reader.findings.push(Finding {
                    kind: Kind::Question,
                    row: Some(row),
                    column: None,
                    name: Some(name.clone()),
                    heading: String::new(),
                    text: name.clone(),
                    says: says.clone(),
                });
                machine.record.notes.push(says);
                machine.record.name = format!("{name} (row {row})");
                at.insert(machine.record.name.clone(), groups.len());
                groups.push(vec![machine]);
            }
        }
    }
    groups
}
