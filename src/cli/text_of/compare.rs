//! `compare`: what moved and why, as text.

use crate::cli::text::hanging;
use crate::compare::{Change, Comparison, Moved, What};
use crate::source::{Place, SourceSet};
use std::fmt::Write as _;

/// What moved, then what else changed.
pub fn text(found: &Comparison, all: bool, set: &SourceSet, width: usize) -> String {
    if found.is_empty() {
        return "nothing differs\n".to_owned();
    }
    let mut out = headline(found);
    let mut point = "";
    for moved in &found.moved {
        if moved.point != point {
            let _ = writeln!(out, "\n{}", moved.point);
        }
        point = &moved.point;
        let lead = format!("  {}  ", what(&moved.what));
        out.push_str(&hanging(&lead, &says(moved), width));
        let because = because(found, moved, set);
        if !because.is_empty() {
            out.push_str(&hanging("      because ", &because, width));
        }
    }
    out.push_str(&idle(found, all, set, width));
    out
}

fn headline(found: &Comparison) -> String {
    let count =
        |n: usize, one: &str, many: &str| format!("{n} {}", if n == 1 { one } else { many });
    let kinds = [
        ("machine", "machine", "machines"),
        ("verdict", "verdict", "verdicts"),
        ("oil", "oil proposed", "oils proposed"),
        ("limit", "limit", "limits"),
    ];
    let moved: Vec<String> = kinds
        .into_iter()
        .map(|(word, one, many)| (found.count(word), one, many))
        .filter(|(n, ..)| *n > 0)
        .map(|(n, one, many)| count(n, one, many))
        .collect();
    let changed = count(found.changes.len(), "input differs", "inputs differ");
    if moved.is_empty() {
        return format!("{changed}; nothing moved\n");
    }
    format!("moved: {}; {changed}\n", moved.join(", "))
}

/// What moved, in words.
fn what(what: &What) -> String {
    match what {
        What::Point => "machine".to_owned(),
        What::Oil => "oil proposed".to_owned(),
        What::Verdict(oil) => oil.clone(),
        What::Limit(end) => (*end).to_owned(),
    }
}

/// `holds -> tight`; `new`, `gone`.
pub fn says(moved: &Moved) -> String {
    match (&moved.was, &moved.is) {
        (Some(was), Some(is)) => format!("{was} -> {is}"),
        (None, Some(_)) if moved.what == What::Point => "new".to_owned(),
        (Some(_), None) if moved.what == What::Point => "gone".to_owned(),
        (None, Some(is)) => format!("none -> {is}"),
        (Some(was), None) => format!("{was} -> none"),
        (None, None) => String::new(),
    }
}

fn because(found: &Comparison, moved: &Moved, set: &SourceSet) -> String {
    let named: Vec<String> = moved
        .because
        .iter()
        .map(|i| input(&found.changes[*i], set))
        .collect();
    let joint = if moved.alone {
        "; or, by itself, "
    } else {
        "; together with "
    };
    named.join(joint)
}

/// `M01: sump rise 31 K -> 25 K (site.yaml:80)`.
fn input(change: &Change, set: &SourceSet) -> String {
    let place = change.span.map_or(String::new(), |s| {
        format!(" ({})", set.shown(&Place::Text(s)))
    });
    format!("{} {}{place}", change.input, change.says())
}

fn idle(found: &Comparison, all: bool, set: &SourceSet, width: usize) -> String {
    let idle = found.idle();
    if idle.is_empty() {
        return String::new();
    }
    let n = idle.len();
    let (noun, verb) = if n == 1 {
        ("input", "has")
    } else {
        ("inputs", "have")
    };
    if !all {
        return format!("\n{n} {noun} changed and {verb} moved nothing; --all lists them\n");
    }
    let mut out = String::from("\nchanged without moving anything\n");
    for i in idle {
        out.push_str(&hanging("  ", &input(&found.changes[i], set), width));
    }
    out
}
