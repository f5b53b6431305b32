//! What an intake read, for people.

use crate::intake::compare::{Change, What};
use crate::intake::draft::Draft;
use crate::intake::finding::{Finding, Kind};
use crate::results::intake::Outcome;
use std::fmt::Write as _;

/// Findings of a kind that are printed; all are in the JSON and the CSV.
const SHOWN: usize = 40;

/// The reading report.
pub fn report(file: &str, draft: &Draft, outcome: &Outcome, width: usize) -> String {
    let c = draft.counts;
    let mut out = format!(
        "{} read, {} carried, {} missing, {} not understood, {}\n",
        n(c.rows, "row"),
        c.carried,
        n(c.missing, "value"),
        n(draft.count(Kind::NotUnderstood), "cell"),
        n(draft.count(Kind::Question), "question"),
    );
    let how = format!("{file}: {}", draft.how.join("; "));
    out.push_str(&hung(&format!("  {how}"), width, 4));
    for (kind, title) in [
        (Kind::NotUnderstood, "not understood, kept as notes"),
        (Kind::Question, "questions"),
        (Kind::ReadAs, "read as"),
        (Kind::LeftOut, "left out"),
    ] {
        section(&mut out, draft, kind, title, width);
    }
    changes(&mut out, outcome, width);
    if !outcome.written.is_empty() {
        out.push('\n');
    }
    for file in &outcome.written {
        let _ = writeln!(out, "wrote {file}");
    }
    out
}

fn n(count: usize, word: &str) -> String {
    if count == 1 {
        format!("1 {word}")
    } else {
        format!("{count} {word}s")
    }
}

fn section(out: &mut String, draft: &Draft, kind: Kind, title: &str, width: usize) {
    let all: Vec<&Finding> = draft.findings.iter().filter(|f| f.kind == kind).collect();
    if all.is_empty() {
        return;
    }
    let _ = writeln!(out, "\n{title}");
    for finding in all.iter().take(SHOWN) {
        out.push_str(&hung(&line(finding), width, 10));
    }
    if all.len() > SHOWN {
        let more = all.len() - SHOWN;
        let _ = writeln!(
            out,
            "  and {more} more: filmwright intake FILE -f csv lists them all"
        );
    }
}

fn line(f: &Finding) -> String {
    let mut line = format!("  {:<7} ", f.cell());
    let place = match (&f.name, f.heading.is_empty()) {
        (Some(name), true) => name.clone(),
        (Some(name), false) => format!("{name}, {}", f.heading),
        (None, _) => f.heading.clone(),
    };
    line.push_str(&place);
    if !f.text.is_empty() {
        let text: String = f.text.split_whitespace().collect::<Vec<_>>().join(" ");
        let _ = write!(
            line,
            "{}\"{text}\"",
            if place.is_empty() { "" } else { " " }
        );
    }
    let stop = if place.is_empty() && f.text.is_empty() {
        ""
    } else {
        ": "
    };
    let _ = write!(line, "{stop}{}", f.says);
    line
}

fn changes(out: &mut String, outcome: &Outcome, width: usize) {
    if outcome.changes.is_empty() && outcome.by_hand == 0 {
        return;
    }
    let _ = writeln!(out, "\nagainst the last intake");
    for c in outcome.changes.iter().take(SHOWN) {
        out.push_str(&hung(&change(c), width, 6));
    }
    if outcome.changes.len() > SHOWN {
        let _ = writeln!(
            out,
            "  and {} more: -f json lists them all",
            outcome.changes.len() - SHOWN
        );
    }
    if outcome.by_hand > 0 {
        let _ = writeln!(
            out,
            "  {} changed by hand alone: kept",
            n(outcome.by_hand, "value")
        );
    }
}

fn change(c: &Change) -> String {
    let one = |t: &Option<String>| {
        t.as_deref()
            .map(|t| t.split_whitespace().collect::<Vec<_>>().join(" "))
            .unwrap_or_default()
    };
    let Some(key) = &c.key else {
        return match c.what {
            What::Gone => format!(
                "  {}: no longer in the register; it stays until you delete it",
                c.record
            ),
            _ => format!("  {}: new in the register", c.record),
        };
    };
    match c.what {
        What::Added => format!("  {}, {key}: now {}", c.record, one(&c.now)),
        What::Changed => format!(
            "  {}, {key}: {} becomes {}",
            c.record,
            one(&c.stands),
            one(&c.now)
        ),
        What::Gone => format!(
            "  {}, {key}: {} is no longer in the register",
            c.record,
            one(&c.stands)
        ),
        What::Both => {
            let now = c.now.as_ref().map_or_else(
                || "no longer has it".to_owned(),
                |_| format!("now says {}", one(&c.now)),
            );
            let stands = c.stands.as_ref().map_or_else(
                || "deleted by hand".to_owned(),
                |_| format!("{} by hand is kept", one(&c.stands)),
            );
            format!("  {}, {key}: {stands}; the register {now}", c.record)
        }
    }
}

/// Words folded at a width; lines behind the first are indented.
fn hung(text: &str, width: usize, indent: usize) -> String {
    let own = text.len() - text.trim_start().len();
    let mut out = " ".repeat(own);
    let mut at = own;
    let mut first = true;
    for word in text.trim_start().split(' ') {
        let long = word.chars().count();
        if !first && at + 1 + long > width {
            out.truncate(out.trim_end().len());
            out.push('\n');
            out.push_str(&" ".repeat(indent));
            at = indent;
        } else if !first {
            out.push(' ');
            at += 1;
        }
        out.push_str(word);
        at += long;
        first = false;
    }
    out.truncate(out.trim_end().len());
    out.push('\n');
    out
}
