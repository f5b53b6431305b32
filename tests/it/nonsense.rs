//! Every kind of part refuses figures that cannot be, by name: zero, below zero, not a number,
//! without end, and sizes no machine has. The keys come from the table the reader reads through,
//! so that a key added there is tried here.

use crate::scenario::on;
use filmwright::cli::exit::Exit;
use filmwright::cli::host::MemoryHost;
use filmwright::input::keys::part::{BEARING_SIZES, KINDS};
use filmwright::input::keys::{Form, Key, Record, example};

/// Every key of a part that takes a quantity, with those of the records it includes.
fn quantities(record: &'static Record) -> Vec<&'static Key> {
    let mut keys: Vec<&'static Key> = record.keys.iter().collect();
    for also in record.also {
        keys.extend(also.keys);
    }
    keys.retain(|k| matches!(k.form, Form::Quantity(_)));
    keys
}

/// Limits that somebody states may be any viscosity; signs of a hollow body, of a difference or a
/// temperature say something.
fn takes(key: &str, figure: &str) -> bool {
    match key {
        "floor" | "ceiling" | "start limit" => false,
        "r1x" | "r2x" | "r1y" | "r2y" => figure != "-1",
        "part rise" | "feed temperature" => figure != "-1" && figure != "0",
        "slide-roll" | "poisson1" | "poisson2" | "helix" | "angle" | "contact angle" => {
            figure != "0"
        }
        _ => true,
    }
}

/// The example of a key with another figure: `12 kN` as `-1 kN`.
fn with(example: &str, figure: &str) -> String {
    let (mean, rest) = match example.strip_prefix("R") {
        Some(_) => example.split_at(3),
        None => ("", example),
    };
    let unit = rest.trim_start_matches(|c: char| c.is_ascii_digit() || c == '.');
    format!("{mean}{figure}{unit}")
}

fn refused(part: &str, key: &str, value: &str) -> Result<(), String> {
    let site = format!(
        "file: site 1\nmachines:\n  M-1:\n    parts:\n      - {part}\n        {key}: {value}\n"
    );
    let ran = on(MemoryHost::new().with("site.yaml", &site), "check");
    let named = ran.err.contains(key) && ran.err.contains(value);
    if ran.exit == Exit::Input && named && ran.err.contains("write  ") {
        Ok(())
    } else {
        Err(format!("{part}, {key}: {value}\n{}{}", ran.out, ran.err))
    }
}

#[test]
fn every_part_refuses_what_cannot_be() {
    let mut wrong = Vec::new();
    let mut tried = 0;
    for kind in &KINDS {
        let first = match kind.first {
            "rolling bearing" => "rolling bearing: 22220".to_owned(),
            "component" => "component: hyd_motor_axial".to_owned(),
            other => format!("{other}: x"),
        };
        for key in quantities(kind.record) {
            for figure in ["0", "-1", "nan", "inf", "1e30"] {
                if !takes(key.name, figure) {
                    continue;
                }
                tried += 1;
                let value = with(&example(key), figure);
                wrong.extend(refused(&first, key.name, &value).err());
            }
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
    assert!(tried > 300, "{tried}");
}

#[test]
fn the_sizes_of_a_bearing_are_refused_too() {
    for key in quantities(&BEARING_SIZES) {
        for figure in ["0", "-1", "1e30"] {
            let value = with(&example(key), figure);
            let site = format!(
                "file: site 1\nmachines:\n  M-1:\n    parts:\n      - rolling bearing: {{ {}: {value} }}\n        speed: 300 r/min\n",
                key.name
            );
            let ran = on(MemoryHost::new().with("site.yaml", &site), "check");
            assert!(ran.err.contains("[value-impossible]"), "{}", ran.err);
            assert!(ran.err.contains(key.name), "{}", ran.err);
        }
    }
}

/// Both ends of what is not known are looked at.
#[test]
fn a_range_is_looked_at_at_both_ends() {
    let site = "file: site 1\nmachines:\n  M-1:\n    parts:\n      - rolling bearing: 22220\n        speed: unknown (0 .. 300 r/min)\n";
    let ran = on(MemoryHost::new().with("site.yaml", site), "check");
    assert!(ran.err.contains("speed is zero"), "{}", ran.err);
    assert!(ran.err.contains("stands still"), "{}", ran.err);
}
