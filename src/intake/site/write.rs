//! The draft as text.

use super::Reader;
use crate::intake::draft::Record;
use crate::intake::machine::Machine;
use crate::intake::yaml::scalar;
use std::fmt::Write as _;

pub(super) fn write(reader: &Reader<'_>, machines: &[Vec<Machine>], left_out: &[String]) -> String {
    let mut out = format!(
        "# yaml-language-server: $schema=./.filmwright/site.schema.json\n\
         # Drafted by filmwright intake from {}. Values carry `register` where they stand there,\n\
         # `assumed` where something had to be added; cells that were not understood are notes.\n\
         file: site 1\n",
        reader.context.file
    );
    if !reader.areas.is_empty() {
        out.push_str("\nareas:\n");
        for area in &reader.areas {
            let _ = writeln!(
                out,
                "  {}: {{}}                  # ambient: coldest .. hottest",
                scalar(area)
            );
        }
    }
    if machines.is_empty() {
        out.push_str("\nmachines: {}\n");
    } else {
        out.push_str("\nmachines:\n");
    }
    for group in machines {
        match group.as_slice() {
            [one] => one.record.write(&mut out, 2),
            several => points(&mut out, several),
        }
        out.push('\n');
    }
    if !left_out.is_empty() {
        out.push_str("# Rows of the register that were not carried:\n");
        for line in left_out {
            let _ = writeln!(
                out,
                "# {}",
                line.split_whitespace().collect::<Vec<_>>().join(" ")
            );
        }
    }
    out
}

/// A machine with several points.
fn points(out: &mut String, several: &[Machine]) {
    let shared = ["name", "area", "register row"];
    let first = &several[0].record;
    let mut head = Record {
        name: first.name.clone(),
        ..Record::default()
    };
    for key in shared {
        let value = first.get(key);
        if let Some(value) = value.filter(|v| several.iter().all(|m| m.record.get(key) == Some(*v)))
        {
            head.set(key, value);
        }
    }
    head.write(out, 2);
    out.push_str("    points:\n");
    for machine in several {
        let mut record = machine.record.clone();
        if head.get("register row").is_none() {
            // The row of a point stands in its notes: a machine has one row.
            record.keys.retain(|(k, _)| k != "register row");
            record
                .notes
                .insert(0, format!("row {} of the register", record.row));
        }
        record.name = machine.point.clone().unwrap_or_default();
        record.keys.retain(|(k, _)| head.get(k).is_none());
        record.write(out, 6);
    }
}
